package main

import (
	"bytes"
	"context"
	"encoding/json"
	"errors"
	"flag"
	"fmt"
	"math/big"
	"os"
	"strconv"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
	"example.com/onecusp/orbifold/recognize"
)

// TestMain scales the effort of the randomised tests by ONECUSP_TEST_SCALE, 0.1 … 100.
func TestMain(m *testing.M) {
	flag.Parse()
	scale := 1.0
	if text := os.Getenv("ONECUSP_TEST_SCALE"); text != "" {
		var err error
		if scale, err = strconv.ParseFloat(text, 64); err != nil || !(scale >= 0.1 && scale <= 100) {
			fmt.Fprintf(os.Stderr, "ONECUSP_TEST_SCALE = %q: want a number from 0.1 to 100\n", text)
			os.Exit(2)
		}
	}
	_ = flag.Set("rapid.checks", strconv.Itoa(max(10, int(100*scale))))
	_ = flag.Set("rapid.nofailfile", "true")
	os.Exit(m.Run())
}

type outcome struct {
	status         int
	stdout, stderr string
}

func whose(stdin string, args ...string) outcome {
	var stdout, stderr bytes.Buffer
	status := run(context.Background(), args, strings.NewReader(stdin), &stdout, &stderr)
	return outcome{status, stdout.String(), stderr.String()}
}

// decode reads the JSON form of an answer.
func (o outcome) decode(t require.TestingT) answer {
	var a answer
	decoder := json.NewDecoder(strings.NewReader(o.stdout))
	decoder.DisallowUnknownFields()
	require.NoError(t, decoder.Decode(&a), o.stdout+o.stderr)
	return a
}

// TestASequenceOfWeights111 is a fan of the weights (1,1,1) with numbers of OEIS A351372:
// it gets the fan and a recurrence that is proved.
func TestASequenceOfWeights111(t *testing.T) {
	o := whose("", "3", "13", "61", "291", "1393", "6673", "31971")
	require.Equal(t, statusFound, o.status, o.stderr)
	for _, part := range []string{
		"Fans: found", "Family (1,1,1)", "round the slope 0/1, at the slopes 1/2, 1/3, 1/4",
		"proved: a(n) = 6·a(n−1) − 6·a(n−2) + a(n−3)", "(x − 1)·(x² − 5x + 1)", "next: 153181, 733933",
		"the terms alone tell the same recurrence", "four routes to the number at 1/2 agree",
	} {
		assert.Contains(t, o.stdout, part)
	}
	a := whose("", "-json", "3,13,61,291,1393,6673,31971").decode(t)
	assert.True(t, a.Found)
	require.Len(t, a.Fans.Matches, 1)
	x := a.Fans.Matches[0]
	assert.Equal(t, [3]int64{1, 1, 1}, x.Weights)
	assert.Equal(t, "5", x.Trace)
	assert.Equal(t, "zero", x.FreeWeight)
	assert.True(t, x.Agrees)
	assert.Len(t, x.Checks, 6)
}

// TestPiecesOfFansAreFound asks for random pieces of random fans.
func TestPiecesOfFansAreFound(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		weight := rapid.Int64Range(0, 4)
		f := orbifold.MustNew(weight.Draw(t, "k₀"), weight.Draw(t, "k∞"), weight.Draw(t, "k₁"))
		whole, err := f.Fan(farey.MustParse("2/5"), farey.MustParse("1/2"))
		require.NoError(t, err)
		start, step := rapid.Int64Range(-5, 5).Draw(t, "start"), rapid.SampledFrom([]int64{1, -1, 2, 3}).Draw(t, "step")
		var words []string
		for j := range int64(8) {
			y, err := whole.Term(big.NewInt(start + j*step))
			require.NoError(t, err)
			words = append(words, y.String())
		}
		a := whose(strings.Join(words[:6], "\n"), "-json", "-more", "2", "-").decode(t)
		assert.True(t, a.Found)
		found := false
		for _, x := range a.Fans.Matches {
			assert.Equal(t, words[6:], x.Next)
			found = found || x.Step == step || x.Step == -step
		}
		assert.True(t, found)
	})
}

func TestScenario(t *testing.T) {
	o := whose("")
	assert.Equal(t, statusFound, o.status, o.stderr)
	assert.Contains(t, o.stdout, "invented")
	assert.Contains(t, o.stdout, "3673 at 3/7")
	assert.Contains(t, o.stdout, "k₀ = any, k∞ = 1, k₁ = 1")
	assert.Contains(t, o.stdout, "next: 31971")
}

func TestAnswersAndStatuses(t *testing.T) {
	for _, x := range []struct {
		args   string
		status int
		part   string
	}{
		{"433", statusFound, "(0,0,0) carries 1 of 1; 433 at 3/8"},
		{"-as number 5 13 194", statusFound, "neighbours of each other"},
		{"-weight 1 8", statusNotFound, "None of them carries"},
		{"5 433 7", statusNotFound, "for no weights; this is proved"},
		{"-as triple 1 1 1", statusFound, "k₀ = any, k∞ = any, k₁ = any"},
		{"1 1 99", statusFound, "k₁ = 97"},
		{"1 1 99", statusFound, "None is within the bound"},
		{"1 4 9 16", statusNotFound, "not enough terms to decide"},
		{"1 2 5 13", statusNotFound, "Candidates with small weights"},
		{"1 2 5 13 34 90", statusNotFound, "Fans: none"},
		{"1 2 4 8 16", statusNotFound, "a(n) = 2·a(n−1), confirmed by 3 terms"},
		{"-as sequence 1 1", statusNotFound, "only the first 20"},
		{"-more 0 1 2 5 13 34", statusFound, "why: by the exchange rule"},
		{"1 5 34 233 1597", statusFound, "the terms lie 2 arcs apart"},
	} {
		o := whose("", strings.Fields(x.args)...)
		assert.Equal(t, x.status, o.status, "%s: %s", x.args, o.stderr)
		assert.Contains(t, o.stdout, x.part, x.args)
		assert.Empty(t, o.stderr)
	}
}

func TestBadInput(t *testing.T) {
	for _, x := range []struct{ stdin, args, part string }{
		{"", "0", "not a positive integer"},
		{"", "-5", "not a positive integer"},
		{"", "-weight 2 -5 3", "not a positive integer"},
		{"", "-json -5", "not a positive integer"},
		{"", "1 2 -5 13", "not a positive integer"},
		{"", "7 7 7 7", "constant sequence"},
		{"", "1/2 3", "not an integer"},
		{"", "1 2 x", "malformed"},
		{"", "-", "no integers given"},
		{"", "-json", "no integers given"},
		{"1 2\n4 5", "-indexed -", "indices out of order"},
		{"", "-indexed 5", "goes with -"},
		{"", "-as guess 5", "want number, triple or sequence"},
		{"", "-as triple 5 13", "want three"},
		{"", "-weight 0 5", "want 1"},
		{"", "-weight 101 5", "want 1"},
		{"", "-more -1 5", "want 0"},
		{"", "-within 0s 5", "want a time"},
		{"", "-nonsense 5", "not defined"},
	} {
		o := whose(x.stdin, strings.Fields(x.args)...)
		assert.Equal(t, statusBadInput, o.status, x.args)
		assert.Contains(t, o.stderr, x.part, x.args)
		assert.Empty(t, o.stdout, x.args)
		assert.Equal(t, 1, strings.Count(o.stderr, "\n"))
	}
}

func TestHelp(t *testing.T) {
	o := whose("", "-help")
	assert.Equal(t, statusFound, o.status)
	assert.Contains(t, o.stdout, "-indexed")
	assert.Empty(t, o.stderr)
}

// TestLines: a table comes back longer, and can be read again.
func TestLines(t *testing.T) {
	o := whose("# invented\n4 1\n5 2\n6 5\n7 13\n8 34\n", "-indexed", "-lines", "-more", "2", "-")
	require.Equal(t, statusFound, o.status, o.stderr)
	assert.Equal(t, "4 1\n5 2\n6 5\n7 13\n8 34\n9 89\n10 233\n", o.stdout)
	s, first, err := recognize.ReadIndexed(strings.NewReader(o.stdout))
	require.NoError(t, err)
	assert.Equal(t, 7, s.Len())
	assert.Equal(t, int64(4), first)
	o = whose("", "-lines", "2", "3", "5", "9")
	assert.Equal(t, "0 2\n1 3\n2 5\n3 9\n", o.stdout)
	assert.Equal(t, statusNotFound, o.status)
}

// TestLongIntegersAreShortened in the text, and whole as JSON.
func TestLongIntegersAreShortened(t *testing.T) {
	n, err := orbifold.Family{}.Number(farey.MustParse("1/300"))
	require.NoError(t, err)
	o := whose("", n.String())
	assert.Equal(t, statusFound, o.status, o.stderr)
	assert.NotContains(t, o.stdout, n.String())
	assert.Contains(t, o.stdout, "digits)")
	assert.Equal(t, n.String(), whose("", "-json", n.String()).decode(t).Integers[0])
}

func TestUnfinished(t *testing.T) {
	o := whose("", "-within", "1ns", "3673")
	assert.Equal(t, statusUnfinished, o.status)
	assert.Contains(t, o.stderr, "deadline")
	for _, args := range [][]string{{"3673"}, {"-json", "3673"}, {"-lines", "1", "2", "5", "13", "34"}, {}} {
		assert.Equal(t, statusUnfinished, run(t.Context(), args, strings.NewReader(""), broken{}, &bytes.Buffer{}))
	}
	var stderr bytes.Buffer
	assert.Equal(t, statusUnfinished, run(t.Context(), []string{"-"}, broken{}, &bytes.Buffer{}, &stderr))
	assert.Contains(t, stderr.String(), "broken")
}

type broken struct{}

func (broken) Read([]byte) (int, error)  { return 0, errors.New("broken") }
func (broken) Write([]byte) (int, error) { return 0, errors.New("broken") }
