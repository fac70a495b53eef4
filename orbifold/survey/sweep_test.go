package survey

import (
	"context"
	"encoding/json"
	"fmt"
	"math/big"
	"math/rand/v2"
	"os"
	"path/filepath"
	"slices"
	"strings"
	"testing"
	"time"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
)

// histogram is a question of a user: slopes by the last digit of the denominator, and the largest
// numerator.
type histogram struct {
	Digits [10]int `json:"digits"`
	Most   int64   `json:"most"`
}

func histograms() Question[histogram] {
	return Question[histogram]{
		Name: "denominators",
		Visit: func(h *histogram, v *Visit) {
			h.Digits[v.Den()%10]++
			h.Most = max(h.Most, v.Num())
		},
		Merge: func(h *histogram, o histogram) {
			for i, n := range o.Digits {
				h.Digits[i] += n
			}
			h.Most = max(h.Most, o.Most)
		},
	}
}

// A sweep over any split into shards, merged in any order and grouping, sums up the
// plain enumeration.
func TestShardsMergeToTheWhole(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f := families().Draw(t, "family")
		r := regions(f, 60).Draw(t, "region")
		var want histogram
		for _, x := range brute(r) {
			p, q, _ := x.slope.Int64s()
			want.Digits[q%10]++
			want.Most = max(want.Most, p)
		}
		got, err := Sweep(context.Background(), r, histograms(), Options{Workers: rapid.IntRange(1, 3).Draw(t, "workers")})
		require.NoError(t, err)
		require.Equal(t, want, got)

		n := rapid.IntRange(1, 40).Draw(t, "shards")
		shards, err := Split(r, n)
		require.NoError(t, err)
		require.LessOrEqual(t, len(shards), n)
		var parts []Part[histogram]
		for _, s := range shards {
			again, err := ParseShard(r, s.String())
			require.NoError(t, err)
			p, err := SweepShards(context.Background(), []Shard{again}, histograms(), Options{})
			require.NoError(t, err)
			text, err := json.Marshal(p)
			require.NoError(t, err)
			var back Part[histogram]
			require.NoError(t, json.Unmarshal(text, &back))
			parts = append(parts, back)
		}
		order := rapid.Permutation(parts).Draw(t, "order")
		for len(order) > 1 { // any grouping
			i := rapid.IntRange(0, len(order)-2).Draw(t, "merge")
			m, err := order[i].Merge(order[i+1])
			require.NoError(t, err)
			order = slices.Replace(order, i, i+2, m)
		}
		require.Zero(t, order[0].Missing())
		got, err = order[0].Result(histograms())
		require.NoError(t, err)
		require.Equal(t, want, got)
	})
}

// Shards are named and cut the same on every machine.
func TestShardNamesAreStable(t *testing.T) {
	var b strings.Builder
	for _, r := range []Region{Up(orbifold.Family{}, PowerOfTen(3000)), Up(orbifold.MustNew(1, 2, 3), PowerOfTen(400)), {Box: &Box{300, 200}, All: true}} {
		shards, err := Split(r, 24)
		require.NoError(t, err)
		fmt.Fprintf(&b, "%v\n", r)
		for _, s := range shards {
			fmt.Fprintf(&b, "  %s: %.0f\n", s, s.Load())
		}
	}
	golden(t, "shards.txt", []byte(b.String()))
}

// The loads of shards are near to the truth, and even.
func TestShardsAreBalanced(t *testing.T) {
	for _, f := range tenFamilies()[:9] {
		r := Up(f, PowerOfTen(far(600)))
		shards, err := Split(r, 100)
		require.NoError(t, err)
		total, largest := 0.0, 0.0
		for _, s := range shards {
			p, err := SweepShards(context.Background(), []Shard{s}, Tally(), Options{Workers: 1})
			require.NoError(t, err)
			n := float64(p.sums[0].Sum.Slopes)
			if s.Load() > 2000 {
				assert.InEpsilon(t, n, s.Load(), 0.3, "%v %v", f, s)
			}
			total += n
			largest = max(largest, n)
		}
		assert.Less(t, largest, 6*total/float64(len(shards)), "%v", f)
	}
}

func TestMergeRefuses(t *testing.T) {
	ctx := context.Background()
	part := func(f orbifold.Family, bound *big.Int, name string, n, i int) Part[histogram] {
		shards, err := Split(Up(f, bound), n)
		require.NoError(t, err)
		q := histograms()
		q.Name = name
		p, err := SweepShards(ctx, shards[i:i+1], q, Options{})
		require.NoError(t, err)
		return p
	}
	f := orbifold.MustNew(1, 2, 3)
	a := part(f, PowerOfTen(200), "x", 8, 0)
	for what, b := range map[string]Part[histogram]{
		"family": part(orbifold.Family{}, PowerOfTen(200), "x", 8, 1),
		"bound":  part(f, PowerOfTen(201), "x", 8, 1),
		"name":   part(f, PowerOfTen(200), "y", 8, 1),
		"split":  part(f, PowerOfTen(200), "x", 6, 1),
		"twice":  a,
	} {
		_, err := a.Merge(b)
		assert.ErrorIs(t, err, ErrMismatch, what)
	}
	both, err := a.Merge(part(f, PowerOfTen(200), "x", 8, 3))
	require.NoError(t, err)
	assert.Len(t, both.Shards(), 2)
	_, err = both.Result(histograms())
	require.ErrorIs(t, err, ErrMismatch, "shards are missing")
	none, err := Part[histogram]{}.Merge(a)
	require.NoError(t, err)
	assert.Equal(t, a, none)
	none, err = a.Merge(Part[histogram]{})
	require.NoError(t, err)
	assert.Equal(t, a, none)
	_, err = Part[histogram]{}.Result(histograms())
	require.ErrorIs(t, err, ErrMismatch)
	text, err := json.Marshal(Part[histogram]{})
	require.NoError(t, err)
	assert.Equal(t, "null", string(text))
	whole := part(f, big.NewInt(5), "x", 1, 0)
	_, err = whole.Result(histograms())
	require.ErrorIs(t, err, ErrMismatch, "another question")

	text, err = json.Marshal(both)
	require.NoError(t, err)
	golden(t, "part.json", append(text, '\n'))
	for _, change := range [][2]string{
		{`"version":1`, `"version":2`}, {`"format":"onecusp/survey"`, `"format":"x"`}, {`"shards":8`, `"shards":9`},
		{`"split":8`, `"split":7`}, {`"split":8`, `"split":0`}, {"4/8 ", "3/8 "}, {"4/8 ", "1/8 "}, {"{", `{"a":1,`}, {"10^200", "0"},
	} {
		bad := strings.Replace(string(text), change[0], change[1], 1)
		require.NotEqual(t, string(text), bad)
		var p Part[histogram]
		require.Error(t, json.Unmarshal([]byte(bad), &p), "%q", change)
	}
	var p Part[histogram]
	require.ErrorIs(t, p.UnmarshalJSON(make([]byte, MaxText+1)), ErrTooLarge)
}

func TestShardsAreRefused(t *testing.T) {
	r := Up(orbifold.Family{}, PowerOfTen(300))
	for _, n := range []int{0, -1, MaxShards + 1} {
		_, err := Split(r, n)
		require.ErrorIs(t, err, ErrOptions)
	}
	_, err := Split(Region{}, 3)
	require.ErrorIs(t, err, ErrRegion)
	for text, want := range map[string]error{
		"": ErrSyntax, "1": ErrSyntax, "1/4": ErrSyntax, "0/4 top": ErrSyntax, "5/4 top": ErrSyntax, "1/99999 top": ErrSyntax,
		"x/4 top": ErrSyntax, "2/8 top": ErrMismatch, "01/8 top": ErrMismatch, "1/3 zero:": ErrMismatch, "2/3 top": ErrMismatch,
	} {
		_, err := ParseShard(r, text)
		assert.ErrorIs(t, err, want, "%q", text)
	}
	_, err = ParseShard(Region{}, "1/1 top")
	require.ErrorIs(t, err, ErrRegion)
	assert.Equal(t, "no shard", Shard{}.String())
	assert.Empty(t, Shard{}.Name())
	_, err = SweepShards(context.Background(), nil, Tally(), Options{})
	require.ErrorIs(t, err, ErrOptions)
	_, err = SweepShards(context.Background(), []Shard{{}}, Tally(), Options{})
	require.ErrorIs(t, err, ErrOptions)
	a, err := Split(r, 8)
	require.NoError(t, err)
	b, err := Split(r, 5)
	require.NoError(t, err)
	_, err = SweepShards(context.Background(), []Shard{a[0], b[1]}, Tally(), Options{})
	require.ErrorIs(t, err, ErrMismatch)
	assert.Equal(t, 8, a[3].Of())
	assert.Equal(t, 3, a[3].Index())
	assert.Equal(t, r.String(), a[3].Region().String())
	_, err = SweepShards(context.Background(), a, Question[int]{}, Options{})
	require.ErrorIs(t, err, ErrOptions)
	_, err = Sweep(context.Background(), Region{}, Tally(), Options{})
	require.ErrorIs(t, err, ErrRegion)
}

// Progress begins and ends, and never goes back.
func TestProgressIsReported(t *testing.T) {
	for _, run := range []func(Options) error{
		func(o Options) error {
			_, err := Sweep(context.Background(), Up(orbifold.Family{}, PowerOfTen(far(4000))), Tally(), o)
			return err
		},
		func(o Options) error {
			_, err := Distinct(context.Background(), orbifold.Family{}, PowerOfTen(far(2000)), o)
			return err
		},
	} {
		var list []Progress
		require.NoError(t, run(Options{Progress: func(p Progress) { list = append(list, p) }}))
		require.NotEmpty(t, list)
		for i, p := range list {
			assert.GreaterOrEqual(t, p.Rate, 0.0)
			assert.GreaterOrEqual(t, p.ETA, time.Duration(0))
			if i > 0 {
				assert.GreaterOrEqual(t, p.Done, list[i-1].Done)
			}
		}
		assert.Equal(t, "done", list[len(list)-1].Stage)
		assert.Equal(t, list[0].Total, list[len(list)-1].Done)
	}
}

// A sweep that is cancelled again and again goes on from its checkpoint, with any workers.
func TestCancelledSweepGoesOn(t *testing.T) {
	r := Up(orbifold.MustNew(2, 0, 1), PowerOfTen(far(500)))
	want, err := Sweep(context.Background(), r, Tally(), Options{})
	require.NoError(t, err)
	file := filepath.Join(t.TempDir(), "checkpoint")
	for i := range 1000 {
		ctx, cancel := context.WithTimeout(context.Background(), time.Duration(10+rand.IntN(5+i))*time.Millisecond)
		got, err := Sweep(ctx, r, Tally(), Options{Checkpoint: file, Workers: 1 + i%3})
		cancel()
		if err == nil {
			require.Equal(t, want, got)
			return
		}
		require.ErrorIs(t, err, context.DeadlineExceeded)
	}
	t.Error("the sweep does not come to an end")
}

func TestCheckpointOfASweepIsChecked(t *testing.T) {
	ctx := context.Background()
	file := filepath.Join(t.TempDir(), "checkpoint")
	o := Options{Checkpoint: file}
	r := Up(orbifold.MustNew(2, 0, 1), PowerOfTen(20))
	_, err := Sweep(ctx, r, Tally(), o)
	require.NoError(t, err)
	r.All = true
	_, err = Sweep(ctx, r, Tally(), o)
	require.ErrorIs(t, err, ErrMismatch)
	require.NoError(t, os.WriteFile(file, []byte("{"), 0o644))
	_, err = Sweep(ctx, r, Tally(), o)
	require.Error(t, err)
	require.NoError(t, os.WriteFile(file, make([]byte, MaxText+1), 0o644))
	_, err = Sweep(ctx, r, Tally(), o)
	require.ErrorIs(t, err, ErrTooLarge)
	_, err = Sweep(ctx, r, Tally(), Options{Checkpoint: filepath.Join(t.TempDir(), "no", "folder")})
	require.Error(t, err)
	_, err = Sweep(ctx, r, Question[func()]{Name: "no JSON", Visit: func(*func(), *Visit) {}, Merge: func(*func(), func()) {}},
		Options{Checkpoint: filepath.Join(t.TempDir(), "x")})
	require.Error(t, err)
}

// The sum of digests does not depend on the order of slopes.
func TestDigestIsASum(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		draw := func(name string) Digest {
			return Digest{rapid.Uint64().Draw(t, name), rapid.Uint64().Draw(t, name), rapid.Uint64Range(0, mersenne-1).Draw(t, name)}
		}
		a, b, c := draw("a"), draw("b"), draw("c")
		x, y := a, c
		x.Merge(b)
		x.Merge(c)
		y.Merge(b)
		y.Merge(a)
		require.Equal(t, x, y)
		text, err := x.MarshalText()
		require.NoError(t, err)
		var back Digest
		require.NoError(t, back.UnmarshalText(text))
		require.Equal(t, x, back)
	})
	d, err := Sweep(context.Background(), Up(orbifold.Family{}, big.NewInt(100)), Tally(), Options{})
	require.NoError(t, err)
	// 1, 2, 5, 13, 29, 34, 89: OEIS A002559.
	sum := uint64(1 + 2 + 5 + 13 + 29 + 34 + 89)
	assert.Equal(t, Digest{7, sum, sum}, d)
	for _, bad := range []string{"", "1:2:3", "7:00000000000000ad:00000000000000AD", "7:00000000000000ad:2000000000000000", strings.Repeat("1", 100)} {
		require.ErrorIs(t, d.UnmarshalText([]byte(bad)), ErrSyntax, bad)
	}
}

var _ = farey.Zero
