package survey

import (
	"context"
	"encoding/json"
	"fmt"
	"math/big"
	"math/rand/v2"
	"os"
	"os/exec"
	"path/filepath"
	"slices"
	"strconv"
	"strings"
	"testing"
	"time"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
)

// tune sets the sizes of buckets for one test, so that small surveys take many passes.
func tune(t testing.TB, keys, buckets int) {
	k, b := bucketKeys, maxBuckets
	bucketKeys, maxBuckets = keys, buckets
	t.Cleanup(func() { bucketKeys, maxBuckets = k, b })
}

// coincidences is the plain model: numbers in a map.
func coincidences(r Region) map[string][]string {
	at := make(map[string][]farey.Slope)
	for _, x := range brute(r) {
		at[x.number.String()] = append(at[x.number.String()], x.slope)
	}
	out := make(map[string][]string)
	for n, s := range at {
		if len(s) < 2 {
			continue
		}
		slices.SortFunc(s, farey.Slope.Cmp)
		for _, x := range s {
			out[n] = append(out[n], x.String())
		}
	}
	return out
}

func listOf(r Report) map[string][]string {
	out := make(map[string][]string)
	for _, c := range r.Coincidences {
		for _, s := range c.Slopes {
			out[c.Number.String()] = append(out[c.Number.String()], s.String())
		}
	}
	return out
}

// Distinct finds the coincidences that a map of exact numbers finds.
func TestDistinctFindsAllCoincidences(t *testing.T) {
	check := func(t require.TestingT, f orbifold.Family, bound *big.Int) {
		r, err := Distinct(context.Background(), f, bound, Options{})
		require.NoError(t, err)
		assert.Equal(t, coincidences(Up(f, bound)), listOf(r), "%v up to %v", f, bound)
		assert.Equal(t, len(brute(Up(f, bound))), int(r.Slopes.Int64()))
		assert.Equal(t, r.Slopes.Uint64(), r.Digest.Slopes)
		assert.Equal(t, len(r.Coincidences) == 0, r.Distinct())
		assert.True(t, slices.IsSortedFunc(r.Coincidences, func(a, b Coincidence) int { return a.Number.Cmp(b.Number) }))
	}
	for _, f := range tenFamilies() {
		check(t, f, PowerOfTen(far(45)))
	}
	rapid.Check(t, func(t *rapid.T) {
		f := families().Draw(t, "family")
		check(t, f, bounds(f, 40).Draw(t, "bound"))
	})
}

// The coincidences named in section 2 of this project's mathematics: (3,0,0) has 5 at 2
// and −1/2 (and 1/3), (2,0,1) has 81 at 2/5 and 4/3, 4489 at −4/3 and 6/7.
func TestKnownCoincidences(t *testing.T) {
	r, err := Distinct(context.Background(), orbifold.MustNew(2, 0, 1), PowerOfTen(300), Options{})
	require.NoError(t, err)
	got := listOf(r)
	assert.Equal(t, []string{"2/5", "4/3"}, got["81"])
	assert.Equal(t, []string{"-4/3", "6/7"}, got["4489"])
	f := orbifold.MustNew(3, 0, 0)
	r, err = Distinct(context.Background(), f, PowerOfTen(300), Options{})
	require.NoError(t, err)
	assert.Equal(t, []string{"1/3", "2/1"}, listOf(r)["5"])
	assert.True(t, f.Equivalent(farey.MustParse("-1/2"), farey.MustParse("2/1")) || f.Equivalent(farey.MustParse("-1/2"), farey.MustParse("1/3")))
}

// "Some numerical evidence concerning the uniqueness of the Markov numbers", Math. Comp. 25
// (1971): all Markov numbers of up to 30 digits are distinct. OEIS A002559, comment of 2009:
// those below F(5001) are, 1,046,858 in number.
func TestMarkovNumbersAreDistinct(t *testing.T) {
	for _, bound := range []*big.Int{PowerOfTen(30), new(big.Int).Sub(fibonacci(5001), big.NewInt(1))} {
		r, err := Distinct(context.Background(), orbifold.Family{}, bound, Options{})
		require.NoError(t, err)
		assert.True(t, r.Distinct())
		if bound.BitLen() > 100 {
			assert.Equal(t, "1046858", r.Slopes.String())
		}
	}
}

// The report is the same to the byte for any number of workers, memory budget and size of
// buckets and passes.
func TestReportIsTheSameForEveryWay(t *testing.T) {
	for _, f := range []orbifold.Family{{}, orbifold.MustNew(2, 0, 1)} {
		var want string
		for i, way := range []struct{ workers, keys, buckets int }{
			{0, bucketKeys, maxBuckets}, {1, 1, 1 << 20}, {2, 1 << 30, 1}, {3, 1000, 3}, {5, 64, 100_000}, {2, 2000, 40},
		} {
			tune(t, way.keys, way.buckets)
			bound := PowerOfTen(far(150))
			if way.keys == 1000 {
				tune(t, 5000, 3)
			}
			r, err := Distinct(context.Background(), f, bound, Options{Workers: way.workers, MemoryBytes: 1 << 30})
			require.NoError(t, err)
			text, err := json.Marshal(r)
			require.NoError(t, err)
			if i == 0 {
				want = string(text) + r.String()
			}
			require.Equal(t, want, string(text)+r.String())
		}
	}
}

// A small memory budget is honoured by more passes, a smaller one refused.
func TestMemoryIsHonoured(t *testing.T) {
	for _, n := range []float64{1e3, 1e6, 2.2e8, 9.6e9} {
		for _, workers := range []int{1, 2, 16} {
			for _, memory := range []int64{MinMemory, 1 << 30, 8 << 30} {
				p, ok := newPlan(n, workers, memory)
				if !ok {
					continue
				}
				assert.LessOrEqual(t, p.memory(p.pass, workers), float64(memory))
				space := float64(p.chunks)*(8*chunkKeys+4) + float64(workers*p.pass)*(8*stageKeys+1+8)
				assert.LessOrEqual(t, space, float64(memory))
				assert.GreaterOrEqual(t, float64(p.chunks*chunkKeys), p.mean*float64(p.pass))
				passes := 0
				for from := 0; from < 1<<p.bits; from += p.pass {
					passes++
				}
				assert.Equal(t, passes, p.passes(0))
			}
		}
	}
	// The real budget: 10^15000 within 4 GiB in one pass, 10^100000 within 8 GiB; with 32 bits
	// no budget counts beyond 1 GiB.
	for n, want := range map[float64]int{2.156e8: 1, 9.6e9: 10} {
		p, ok := newPlan(n, 2, int64(4<<30)*int64(want/10+1))
		require.True(t, ok)
		if strconv.IntSize == 64 {
			assert.LessOrEqual(t, p.passes(0), want)
		} else {
			assert.LessOrEqual(t, p.memory(p.pass, 2), float64(1<<30))
		}
	}

	tune(t, 1<<30, 1)
	_, err := Distinct(context.Background(), orbifold.Family{}, PowerOfTen(2500), Options{MemoryBytes: MinMemory})
	require.ErrorIs(t, err, ErrMemory)
	_, err = Distinct(context.Background(), orbifold.Family{}, PowerOfTen(10), Options{MemoryBytes: MinMemory - 1})
	require.ErrorIs(t, err, ErrMemory)
}

func TestDistinctRefuses(t *testing.T) {
	ctx := context.Background()
	for _, b := range []*big.Int{nil, new(big.Int), PowerOfTen(1 << 30)} {
		_, err := Distinct(ctx, orbifold.Family{}, b, Options{})
		assert.ErrorIs(t, err, ErrBound)
	}
	_, err := Distinct(ctx, orbifold.Family{}, big.NewInt(9), Options{Results: -1})
	require.ErrorIs(t, err, ErrOptions)
	_, err = Distinct(ctx, orbifold.MustNew(2, 0, 1), PowerOfTen(20), Options{Results: 2})
	require.ErrorIs(t, err, ErrTooMany)
	done, cancel := context.WithCancel(ctx)
	cancel()
	_, err = Distinct(done, orbifold.Family{}, PowerOfTen(100), Options{})
	require.ErrorIs(t, err, context.Canceled)
}

// Keys alone that agree are settled: with a key made useless, everything is a suspect
// and only the real coincidences remain.
func TestSharedKeysAreSettled(t *testing.T) {
	f := orbifold.MustNew(2, 0, 1)
	d, err := newProof(context.Background(), f, PowerOfTen(40), Options{})
	require.NoError(t, err)
	list := []suspect{}
	require.NoError(t, Walk(context.Background(), Up(f, PowerOfTen(40)), func(v *Visit) bool {
		x := v.vertex()
		list = append(list, suspect{0, x.r64 & 7, x.r61 & 3, v.Slope()})
		return true
	}))
	slices.SortFunc(list, func(a, b suspect) int {
		return int(a.r64*8+a.r61) - int(b.r64*8+b.r61)
	})
	found, err := d.split(context.Background(), list)
	require.NoError(t, err)
	got := listOf(Report{Coincidences: found})
	want := coincidences(Up(f, PowerOfTen(40)))
	for _, s := range got {
		slices.Sort(s)
	}
	for _, s := range want {
		slices.Sort(s)
	}
	assert.Equal(t, want, got)
	// Wanted keys that one slope alone has count as shared keys, and are no coincidence.
	var key uint64
	require.NoError(t, Walk(context.Background(), Up(f, big.NewInt(50)), func(v *Visit) bool {
		key = v.vertex().key()
		return true
	}))
	d.state.Suspects = []uint64{key}
	d.progress = newMeter(d.o, "", 0, 0)
	found, keys, err := d.settle(context.Background())
	require.NoError(t, err)
	assert.Equal(t, len(found) == 0, keys == 1)
}

func TestReportTexts(t *testing.T) {
	r, err := Distinct(context.Background(), orbifold.MustNew(2, 0, 1), PowerOfTen(30), Options{})
	require.NoError(t, err)
	text, err := json.Marshal(r)
	require.NoError(t, err)
	golden(t, "report.json", append(text, '\n'))
	golden(t, "report.txt", []byte(r.String()))
	assert.Equal(t, r.String(), fmt.Sprintf("%s", r))

	long := Report{Bound: PowerOfTen(100).Add(PowerOfTen(100), big.NewInt(7)), Slopes: big.NewInt(100)}
	for range 30 {
		long.Coincidences = append(long.Coincidences, Coincidence{PowerOfTen(90), []farey.Slope{{}, {}}})
	}
	assert.Contains(t, fmt.Sprint(long), "and 10 more")
	assert.Contains(t, fmt.Sprint(long), "(91 digits)")
	assert.NotContains(t, long.String(), "more\n  …")
	assert.Contains(t, long.String(), PowerOfTen(90).String())
	_, err = json.Marshal(Report{})
	require.NoError(t, err)
	assert.NotEmpty(t, Report{}.String())
	assert.False(t, Report{}.Distinct())
}

// golden compares with a file of testdata; ONECUSP_GOLDEN=write writes it anew.
func golden(t *testing.T, name string, got []byte) {
	name = filepath.Join("testdata", name)
	if os.Getenv("ONECUSP_GOLDEN") == "write" {
		require.NoError(t, os.MkdirAll("testdata", 0o755))
		require.NoError(t, os.WriteFile(name, got, 0o644))
	}
	want, err := os.ReadFile(name)
	require.NoError(t, err)
	assert.Equal(t, string(want), string(got))
}

// TestHelperSurvey is the program that TestKilledSurveysGoOn kills; alone it does nothing
// but a survey that is checked against its own repetition.
func TestHelperSurvey(t *testing.T) {
	file, kind := os.Getenv("ONECUSP_SURVEY_FILE"), os.Getenv("ONECUSP_SURVEY_KIND")
	tune(t, 1<<12, 16)
	digits := far(900)
	if file == "" {
		file, digits = filepath.Join(t.TempDir(), "checkpoint"), 60
	}
	text, err := survey(kind, file, digits)
	require.NoError(t, err)
	again, err := survey(kind, file, digits)
	require.NoError(t, err)
	require.Equal(t, text, again)
	if os.Getenv("ONECUSP_SURVEY_FILE") != "" {
		require.NoError(t, os.WriteFile(file+".report", text, 0o644))
	}
}

// survey carries out one of two kinds of surveys with a checkpoint.
func survey(kind, file string, digits int) ([]byte, error) {
	r := Up(orbifold.MustNew(1, 2, 3), PowerOfTen(digits))
	o := Options{Checkpoint: file, Workers: 2}
	if kind == "sweep" {
		d, err := Sweep(context.Background(), r, Tally(), o)
		if err != nil {
			return nil, err
		}
		return []byte(d.String()), nil
	}
	report, err := Distinct(context.Background(), r.Family, r.Bound, o)
	if err != nil {
		return nil, err
	}
	return json.Marshal(report)
}

// A survey that is killed again and again, without any warning, ends with the same
// report as one that was left alone.
func TestKilledSurveysGoOn(t *testing.T) {
	for _, kind := range []string{"distinct", "sweep"} {
		tune(t, 1<<12, 16)
		want, err := survey(kind, "", far(900))
		require.NoError(t, err)
		file := filepath.Join(t.TempDir(), "checkpoint")
		random := rand.New(rand.NewPCG(1, uint64(time.Now().UnixNano())))
		kills := 0
		for kills < 100 {
			c := exec.Command(os.Args[0], "-test.run=^TestHelperSurvey$")
			c.Env = append(os.Environ(), "ONECUSP_SURVEY_FILE="+file, "ONECUSP_SURVEY_KIND="+kind)
			require.NoError(t, c.Start())
			done := make(chan error, 1)
			go func() { done <- c.Wait() }()
			finished := false
			wait := time.Duration(20+random.IntN(150+50*kills)) * time.Millisecond
			select {
			case err := <-done:
				require.NoError(t, err)
				finished = true
			case <-time.After(wait):
				require.NoError(t, c.Process.Kill())
				<-done
				kills++
			}
			if finished {
				break
			}
		}
		t.Logf("%s: killed %d times", kind, kills)
		got, err := os.ReadFile(file + ".report")
		require.NoError(t, err)
		assert.Equal(t, string(want), string(got))
	}
}

// A survey that is cancelled at random moments goes on with other workers and memory.
func TestCancelledSurveyGoesOn(t *testing.T) {
	tune(t, 1<<11, 32)
	f, bound := orbifold.MustNew(1, 5, 1), PowerOfTen(far(700))
	want, err := Distinct(context.Background(), f, bound, Options{})
	require.NoError(t, err)
	file := filepath.Join(t.TempDir(), "checkpoint")
	for i := 1; ; i++ {
		require.Less(t, i, 500)
		ctx, cancel := context.WithTimeout(context.Background(), time.Duration(i*7)*time.Millisecond)
		r, err := Distinct(ctx, f, bound, Options{Checkpoint: file, Workers: 1 + i%3, MemoryBytes: MinMemory << (i % 3)})
		cancel()
		if err != nil {
			require.ErrorIs(t, err, context.DeadlineExceeded)
			continue
		}
		require.Equal(t, want.String(), r.String())
		break
	}
}

func TestCheckpointsOfOthersAreRefused(t *testing.T) {
	file := filepath.Join(t.TempDir(), "checkpoint")
	ctx := context.Background()
	o := Options{Checkpoint: file}
	f := orbifold.MustNew(1, 2, 3)
	_, err := Distinct(ctx, f, PowerOfTen(20), o)
	require.NoError(t, err)
	_, err = Distinct(ctx, f, PowerOfTen(21), o)
	require.ErrorIs(t, err, ErrMismatch)
	_, err = Distinct(ctx, orbifold.Family{}, PowerOfTen(20), o)
	require.ErrorIs(t, err, ErrMismatch)
	_, err = Sweep(ctx, Up(f, PowerOfTen(20)), Tally(), o)
	require.Error(t, err)
	text, err := os.ReadFile(file)
	require.NoError(t, err)
	for _, change := range [][2]string{
		{`"version":1`, `"version":2`}, {`"format":"onecusp/survey"`, `"format":"other"`}, {`"2^61-1"`, `"2^61"`},
		{`"next":1`, `"next":77`}, {`"suspects":[`, `"suspects":[9,8,`}, {`{`, ``}, {`{`, `{"more":1,`}, {"\n", "{}"},
	} {
		bad := strings.Replace(string(text), change[0], change[1], 1)
		require.NotEqual(t, string(text), bad, "%q", change)
		require.NoError(t, os.WriteFile(file, []byte(bad), 0o644))
		_, err = Distinct(ctx, f, PowerOfTen(20), o)
		require.Error(t, err, "%q", change)
	}
	_, err = Distinct(ctx, f, PowerOfTen(20), Options{Checkpoint: filepath.Join(file, "below a file")})
	require.Error(t, err)
	_, err = Distinct(ctx, f, PowerOfTen(20), Options{Checkpoint: filepath.Join(t.TempDir(), "no folder", "x")})
	require.Error(t, err)
	require.NoError(t, os.WriteFile(file, make([]byte, MaxText+1), 0o644))
	_, err = Distinct(ctx, f, PowerOfTen(20), o)
	require.ErrorIs(t, err, ErrTooLarge)
	_, err = Distinct(ctx, f, PowerOfTen(20), Options{Checkpoint: t.TempDir()})
	require.Error(t, err)
}
