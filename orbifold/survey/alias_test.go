package survey

import (
	"context"
	"encoding/json"
	"fmt"
	"math/big"
	"reflect"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
)

// Regions that are walked or split are not those of the caller, and what is returned is fresh.
func TestNothingIsShared(t *testing.T) {
	ctx := context.Background()
	r := Region{
		Bound: PowerOfTen(30), Box: &Box{50, 50}, Among: &Interval{farey.MustParse("0/1"), farey.MustParse("1/2")},
		Fans: []farey.Slope{farey.MustParse("1/3")}, Lines: []Line{{1, -1, 1}},
	}
	want := r.String()
	spoil := func(r *Region) {
		r.Bound.SetInt64(1)
		*r.Box, *r.Among, r.Fans[0], r.Lines[0] = Box{}, Interval{}, farey.Slope{}, Line{}
	}
	shards, err := Split(r, 3)
	require.NoError(t, err)
	w, err := newWalker(r)
	require.NoError(t, err)
	both, err := r.And(r)
	require.NoError(t, err)
	text := both.String()
	spoil(&r)
	for _, s := range shards {
		again := s.Region()
		require.Equal(t, want, again.String())
		spoil(&again)
		require.Equal(t, want, s.Region().String())
	}
	require.Equal(t, text, both.String())
	require.Equal(t, int64(50), w.box.Num)
	require.Equal(t, Line{1, -1, 1}, w.lines[0])

	bound := PowerOfTen(9)
	rows, err := Table(ctx, orbifold.Family{}, []*big.Int{bound, bound}, Options{})
	require.NoError(t, err)
	report, err := Distinct(ctx, orbifold.MustNew(2, 0, 1), bound, Options{})
	require.NoError(t, err)
	bound.SetInt64(3)
	assert.Equal(t, "1000000000", rows[0].Bound.String())
	rows[0].Bound.SetInt64(5)
	rows[0].Slopes.SetInt64(5)
	rows[0].All.SetInt64(5)
	assert.Equal(t, "up to 10^9: 522 slopes, 88 up to symmetry", rows[1].String())
	assert.Equal(t, "1000000000", report.Bound.String())

	part, err := SweepShards(ctx, shards, Tally(), Options{})
	require.NoError(t, err)
	part.Shards()[0] = "spoiled"
	assert.NotEqual(t, "spoiled", part.Shards()[0])
	Directions(2)[0] = farey.Point{}
	assert.NotEqual(t, farey.Point{}, Directions(2)[0])
	slopes := []farey.Slope{farey.MustParse("4/3"), farey.MustParse("2/5"), {}}
	found, err := Coincidences(ctx, orbifold.MustNew(2, 0, 1), slopes)
	require.NoError(t, err)
	require.Len(t, found, 1)
	assert.Equal(t, "81 at 2/5 4/3", found[0].String())
	assert.Equal(t, "4/3", slopes[0].String())
	_, err = Coincidences(ctx, orbifold.Family{}, []farey.Slope{farey.MustParse("1/999999999999")})
	require.ErrorIs(t, err, ErrTooLarge)
}

// Every exported method that takes or returns a *big.Int or a slice is in the test above or
// belongs to a type whose values are plain data.
func TestSharingIsCovered(t *testing.T) {
	covered := "Visit.Number Region.MarshalJSON Region.UnmarshalJSON Part.MarshalJSON Part.UnmarshalJSON Part.Shards " +
		"Digest.MarshalText Digest.UnmarshalText Report.MarshalJSON Coincidence.MarshalJSON Coincidence.UnmarshalJSON " +
		"Ordering.Compare Row.Ratio"
	kind := func(x reflect.Type) bool {
		return x.Kind() == reflect.Slice || x == reflect.TypeFor[*big.Int]() || x == reflect.TypeFor[*big.Float]()
	}
	for _, x := range []any{
		&Visit{}, &Region{}, &Part[Digest]{}, &Digest{}, &Report{}, &Coincidence{}, &Ordering{}, &Row{}, &Shard{}, &Arc{}, &Trend{}, &Hit{}, &Account{}, &Audit{},
	} {
		v := reflect.TypeOf(x)
		name, _, _ := strings.Cut(v.Elem().Name(), "[")
		for m := range v.NumMethod() {
			f := v.Method(m).Type
			touches := false
			for i := 1; i < f.NumIn(); i++ {
				touches = touches || kind(f.In(i))
			}
			for i := range f.NumOut() {
				touches = touches || kind(f.Out(i))
			}
			if touches {
				assert.Contains(t, strings.Fields(covered), name+"."+v.Method(m).Name)
			}
		}
	}
}

// Zero values mean something and do not panic.
func TestZeroValues(t *testing.T) {
	var v Visit
	lo, hi := v.Log()
	assert.LessOrEqual(t, lo, hi)
	assert.Equal(t, "0/1", v.Slope().String())
	assert.Equal(t, uint64(1), v.Mod64())
	assert.Equal(t, uint64(1), v.Mod61())
	assert.Equal(t, farey.Zero, v.Class())
	assert.Equal(t, orbifold.Family{}, v.Family())
	assert.Equal(t, "0/1", v.Arc().Slope().String())
	assert.NotZero(t, v.Key())
	n, err := v.Number()
	require.NoError(t, err)
	assert.Equal(t, "1", n.String())
	_, _, _, ok := v.Parents()
	assert.False(t, ok)
	assert.Equal(t, "0/1", Arc{}.Slope().String())
	assert.NotEmpty(t, Region{}.String())
	assert.Equal(t, "up to 0: 0 slopes, 0 up to symmetry", Row{}.String())
	assert.Equal(t, "0 at", Coincidence{}.String())
	assert.False(t, Trend{}.Rising() || Trend{}.Falling())
	assert.Empty(t, Part[int]{}.Shards())
	var p Part[int]
	require.NoError(t, p.UnmarshalJSON([]byte("null")))
	for _, c := range []Coincidence{{}, {big.NewInt(81), []farey.Slope{farey.MustParse("2/5"), farey.MustParse("4/3")}}} {
		text, err := json.Marshal(c)
		require.NoError(t, err)
		var back Coincidence
		require.NoError(t, json.Unmarshal(text, &back))
		assert.Equal(t, c.String(), back.String())
	}
	var c Coincidence
	for _, bad := range []string{"", "{}", `{"number":"5"}`, `{"number":"5","slopes":null,"x":1}`, `{"number":"x","slopes":null}`, `{"number":"05","slopes":null}`, `{"number":"0","slopes":[]}`} {
		require.Error(t, c.UnmarshalJSON([]byte(bad)), bad)
	}
	require.ErrorIs(t, c.UnmarshalJSON(make([]byte, MaxText+1)), ErrTooLarge)
	long := Row{Bound: new(big.Int).Add(PowerOfTen(200), big.NewInt(1))}
	assert.Less(t, len(fmt.Sprint(long)), 120)
	assert.Greater(t, len(long.String()), 200)
	err = Walk(context.Background(), Up(orbifold.Family{}, big.NewInt(1)), nil)
	require.ErrorIs(t, err, ErrOptions)
}
