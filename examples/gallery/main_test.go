package main

import (
	"bytes"
	"context"
	"flag"
	"fmt"
	"os"
	"path/filepath"
	"regexp"
	"strconv"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
)

// scaleVariable multiplies the effort of the randomised tests: 0.1 to 100.
const scaleVariable = "ONECUSP_TEST_SCALE"

// TestMain scales the effort of the randomised tests by [scaleVariable].
func TestMain(m *testing.M) {
	flag.Parse()
	scale := 1.0
	if text, ok := os.LookupEnv(scaleVariable); ok {
		var err error
		if scale, err = strconv.ParseFloat(text, 64); err != nil || !(scale >= 0.1 && scale <= 100) {
			fmt.Fprintf(os.Stderr, "%s=%q: a number from 0.1 to 100 would be accepted\n", scaleVariable, text)
			os.Exit(2)
		}
	}
	for name, value := range map[string]string{
		"rapid.checks":     strconv.Itoa(max(10, int(100*scale))),
		"rapid.nofailfile": "true",
	} {
		if err := flag.Set(name, value); err != nil {
			fmt.Fprintln(os.Stderr, err)
			os.Exit(2)
		}
	}
	os.Exit(m.Run())
}

// TestEffortFollowsTheEnvironment also makes cached results depend on the variable,
// which what TestMain reads does not.
func TestEffortFollowsTheEnvironment(t *testing.T) {
	want := 100
	if text, ok := os.LookupEnv(scaleVariable); ok {
		scale, err := strconv.ParseFloat(text, 64)
		require.NoError(t, err)
		want = max(10, int(100*scale))
	}
	assert.Equal(t, strconv.Itoa(want), flag.Lookup("rapid.checks").Value.String())
}

// outcome is what one run of the command did.
type outcome struct {
	status         int
	stdout, stderr string
	folder         string
}

// runIn runs the command in an empty current folder.
func runIn(t *testing.T, args ...string) outcome {
	t.Helper()
	t.Chdir(t.TempDir())
	var stdout, stderr bytes.Buffer
	status := run(t.Context(), args, &stdout, &stderr)
	return outcome{status, stdout.String(), stderr.String(), "gallery-out"}
}

func (o outcome) ok(t *testing.T) outcome {
	t.Helper()
	require.Equal(t, 0, o.status, o.stderr)
	require.Empty(t, o.stderr)
	return o
}

func (o outcome) read(t *testing.T, name string) string {
	t.Helper()
	text, err := os.ReadFile(filepath.Join(o.folder, name))
	require.NoError(t, err)
	return string(text)
}

// names lists the files of a folder.
func names(t *testing.T, folder string) []string {
	t.Helper()
	entries, err := os.ReadDir(folder)
	require.NoError(t, err)
	var all []string
	for _, e := range entries {
		all = append(all, e.Name())
	}
	return all
}

// Numbers by an independent slow model (plain definitions, no code of this project); those
// of (0,0,0) are also in OEIS A002559, those of (1,1,1) in OEIS A357749.
var numbersOfTheTable = map[string][3]string{ // weights (0,0,0), (1,1,1), (2,0,1)
	"1/2": {"2", "3", "2"}, "1/3": {"5", "13", "7"}, "2/3": {"5", "13", "9"}, "3/7": {"169", "3673", "961"},
	"5/2": {"29", "217", "457"}, "-1/1": {"2", "3", "3"},
}

var familiesOfTheTable = [3]string{"(0,0,0)", "(1,1,1)", "(2,0,1)"}

func TestNumbersAreStated(t *testing.T) {
	o := runIn(t).ok(t)
	page, text := o.read(t, "gallery.html"), o.read(t, "gallery.txt")
	for s, numbers := range numbersOfTheTable {
		for i, f := range familiesOfTheTable {
			assert.Regexp(t, "\n"+s+` +`+regexp.QuoteMeta(f)+" +"+numbers[i]+" ", o.stdout)
			assert.Contains(t, text, "\nSlope "+s+" in the family "+f+": "+numbers[i]+"\n")
			assert.Contains(t, page, "<h3>"+s+" in the family "+f+": "+numbers[i]+"</h3>")
		}
	}
	assert.True(t, strings.HasPrefix(text, o.stdout[:strings.Index(o.stdout, "\nWritten")]), "the summary is in the folder too")
}

func TestScenarioShowsADozenSlopesOfThreeFamilies(t *testing.T) {
	o := runIn(t).ok(t)
	assert.Contains(t, strings.Join(strings.Fields(o.stdout), " "), scenarioNote)
	page := o.read(t, "gallery.html")
	assert.Contains(t, page, "invented")
	assert.Equal(t, 12, strings.Count(page, "<article"))
	assert.Equal(t, 36, strings.Count(page, "<section"))
	assert.Equal(t, 36, strings.Count(page, "<h4>Minimal matching</h4>"))
	assert.Equal(t, 36, strings.Count(page, "<h4>A matching at random</h4>"))
	assert.NotContains(t, runIn(t, "-slopes", "1/2").ok(t).stdout, "invented")
	assert.NotContains(t, runIn(t, "-weights", "0,0,5").ok(t).stdout, "invented")
}

// TestFilesAreThoseThatThePageNames, and no others: one TikZ file a picture but for
// lattices, one DOT file a lattice.
func TestFilesAreThoseThatThePageNames(t *testing.T) {
	o := runIn(t, "-out", "deep/er", "-slopes", "-6/8 -3/4 3/7", "-weights", "(2,0,1)").ok(t)
	o.folder = "deep/er"
	assert.Equal(t, []string{"deep"}, names(t, "."))
	assert.Equal(t, []string{"er"}, names(t, "deep"))
	assert.Equal(t, []string{
		"band-2_0_1-at-3_7.tikz", "band-2_0_1-at-minus-3_4.tikz", "gallery.html", "gallery.tex", "gallery.txt",
		"hexagons-2_0_1-at-3_7.tikz", "hexagons-2_0_1-at-minus-3_4.tikz",
		"minimal-2_0_1-at-3_7.tikz", "minimal-2_0_1-at-minus-3_4.tikz",
		"random-2_0_1-at-3_7.tikz", "random-2_0_1-at-minus-3_4.tikz",
	}, names(t, "deep/er"))
	page, document := o.read(t, "gallery.html"), o.read(t, "gallery.tex")
	for _, name := range names(t, o.folder) {
		if strings.HasSuffix(name, ".tikz") {
			assert.Contains(t, page, name)
			assert.Contains(t, document, `\hang{`+name+"}")
			picture := o.read(t, name)
			assert.True(t, strings.HasPrefix(picture, `\begin{tikzpicture}`))
			assert.NotContains(t, picture, "∞", "plain LaTeX has no such letter")
		}
	}

	o = runIn(t, "-slopes", "1/3", "-weights", "1,1,1").ok(t)
	dot := o.read(t, "lattice-1_1_1-at-1_3.dot")
	assert.Equal(t, 13, strings.Count(dot, "[label=\"")-strings.Count(dot, "->"), "a node for each matching")
}

func TestOtherFilesInTheFolderStay(t *testing.T) {
	t.Chdir(t.TempDir())
	require.NoError(t, os.WriteFile("mine.txt", []byte("mine"), 0o600))
	var stdout, stderr bytes.Buffer
	for range 2 { // the second run replaces the files of the first
		require.Equal(t, 0, run(t.Context(), []string{"-out", ".", "-slopes", "0/1", "-weights", "0,0,0"}, &stdout, &stderr), stderr.String())
	}
	assert.Equal(t, []string{"band-0_0_0-at-0_1.tikz", "gallery.html", "gallery.tex", "gallery.txt", "mine.txt", "minimal-0_0_0-at-0_1.tikz"}, names(t, "."))
}

// TestSeedChoosesTheRandomMatchingsOnly: the same seed draws the same, another one others.
func TestSeedChoosesTheRandomMatchingsOnly(t *testing.T) {
	read := func(seed, picture string) string {
		return runIn(t, "-seed", seed, "-slopes", "3/7").ok(t).read(t, picture+"-1_1_1-at-3_7.tikz")
	}
	assert.Equal(t, read("5", "random"), read("5", "random"))
	assert.NotEqual(t, read("5", "random"), read("6", "random"))
	assert.Equal(t, read("5", "minimal"), read("6", "minimal"))
}

func TestUnusableArguments(t *testing.T) {
	many := make([]string, maxExhibits)
	for i := range many {
		many[i] = fmt.Sprintf("1/%d", i+2)
	}
	for name, test := range map[string]struct {
		args []string
		says string
	}{
		"unknown flag":         {[]string{"-colour", "red"}, "-colour"},
		"weights malformed":    {[]string{"-weights", "1,2"}, "-weights"},
		"weight negative":      {[]string{"-weights", "-1,0,0"}, "≥ 0"},
		"no weights":           {[]string{"-weights", " "}, "nothing to show"},
		"no slope":             {[]string{"-slopes", "abc"}, `"abc"`},
		"0/0":                  {[]string{"-slopes", "0/0"}, "0/0"},
		"slopes without flag":  {[]string{"3/7"}, "-slopes"},
		"empty folder":         {[]string{"-out", "", "-slopes", "3/7"}, "-out"},
		"too many pictures":    {[]string{"-slopes", strings.Join(many, " ")}, "at most 64"},
		"too many tiles":       {[]string{"-slopes", "1/1000"}, "1997 tiles"}, // 999 crossings of one class, 998 of another
		"far too many tiles":   {[]string{"-slopes", "1/" + strings.Repeat("9", 500)}, "tiles"},
		"weight far too large": {[]string{"-weights", "0,1000000000000000000,0", "-slopes", "1/2"}, "tiles"},
		"seed is no number":    {[]string{"-seed", "x"}, "-seed"},
		"value missing":        {[]string{"-weights"}, "-weights"},
	} {
		t.Run(name, func(t *testing.T) {
			o := runIn(t, test.args...)
			assert.Equal(t, 2, o.status)
			assert.Contains(t, o.stderr, test.says)
			assert.Equal(t, 1, strings.Count(o.stderr, "\n"), "one line: %q", o.stderr)
			assert.Less(t, len(o.stderr), 2000)
			assert.Empty(t, o.stdout)
			assert.Empty(t, names(t, "."), "nothing is written")
		})
	}
}

func TestHelp(t *testing.T) {
	o := runIn(t, "-help").ok(t)
	for _, name := range []string{"-weights", "-slopes", "-out", "-seed"} {
		assert.Contains(t, o.stdout, name)
	}
	assert.Empty(t, names(t, "."))
}

func TestFolderThatCannotBeMade(t *testing.T) {
	t.Chdir(t.TempDir())
	require.NoError(t, os.WriteFile("taken", nil, 0o600))
	require.NoError(t, os.MkdirAll("full/gallery.html", 0o700))
	for _, folder := range []string{"taken", "full"} {
		var stdout, stderr bytes.Buffer
		assert.Equal(t, 1, run(t.Context(), []string{"-out", folder, "-slopes", "1/2"}, &stdout, &stderr))
		assert.Equal(t, 1, strings.Count(stderr.String(), "\n"))
		assert.Empty(t, stdout.String())
	}
}

func TestInterrupt(t *testing.T) {
	t.Chdir(t.TempDir())
	ctx, cancel := context.WithCancel(t.Context())
	cancel()
	var stdout, stderr bytes.Buffer
	assert.Equal(t, 1, run(ctx, nil, &stdout, &stderr))
	assert.Contains(t, stderr.String(), context.Canceled.Error())
	assert.Empty(t, names(t, "."))
}

// closed is a standard output that nobody reads any more.
type closed struct{}

func (closed) Write([]byte) (int, error) { return 0, os.ErrClosed }

func TestStandardOutputClosed(t *testing.T) {
	t.Chdir(t.TempDir())
	var stderr bytes.Buffer
	assert.Equal(t, 1, run(t.Context(), []string{"-slopes", "1/2"}, closed{}, &stderr))
	assert.Contains(t, stderr.String(), os.ErrClosed.Error())
}
