package recognize_test

import (
	"context"
	"fmt"
	"math/big"
	"slices"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
	"example.com/onecusp/orbifold/linear"
	"example.com/onecusp/orbifold/recognize"
)

// sortedWeights returns the weights in falling order.
func sortedWeights(f orbifold.Family) []int64 {
	k := []int64{f.Weight(farey.Zero), f.Weight(farey.Infinity), f.Weight(farey.One)}
	slices.SortFunc(k, func(a, b int64) int { return int(b - a) })
	return k
}

// comesFrom tells whether a match is the progression up to symmetry: same
// step, same trace, same weights round the centre, and all weights if that of the centre
// counts.
func comesFrom(t require.TestingT, m recognize.FanMatch, p progression) bool {
	if max(m.Step, -m.Step) != max(p.step, -p.step) {
		return false
	}
	even, odd := m.Fan.Weights()
	wantEven, wantOdd := p.fan.Weights()
	if even != wantEven || odd != wantOdd || must(m.Fan.Trace())(t).Cmp(must(p.fan.Trace())(t)) != 0 {
		return false
	}
	return m.FreeWeight || slices.Equal(sortedWeights(m.Fan.Family()), sortedWeights(p.fan.Family()))
}

// TestFansOfFansAreFound: a piece of a fan of five terms, six when the second and
// the fourth are equal, leads back to the fan.
func TestFansOfFansAreFound(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		p := progressions(6).Draw(t, "progression")
		n := rapid.IntRange(5, 9).Draw(t, "terms")
		a := p.terms(t, n)
		s := must(recognize.NewSequence(a...))(t)
		answer := must(s.Fans(context.Background(), recognize.Options{}))(t)
		if n == 5 && a[1].Cmp(a[3]) == 0 {
			require.Equal(t, recognize.Undecided, answer.Verdict)
			return
		}
		require.Equal(t, recognize.Found, answer.Verdict, answer.Reason)
		assert.True(t, slices.ContainsFunc(answer.Matches, func(m recognize.FanMatch) bool { return comesFrom(t, m, p) }), "%v step %d: %v", p.fan, p.step, answer.Matches)
		for i, m := range answer.Matches {
			assertMatch(t, m, s)
			for _, o := range answer.Matches[:i] {
				assert.False(t, m.Fan.String() == o.Fan.String() && m.Step == o.Step, "%v twice", m.Fan)
			}
		}
	})
}

// assertMatch is what every match has to be: the terms at the slopes, in
// normal form, with a recurrence that holds.
func assertMatch(t require.TestingT, m recognize.FanMatch, s recognize.Sequence) {
	assert.NoError(t, m.Check(context.Background(), s))
	assert.NoError(t, m.Rule.Check(s.Terms()))
	f := m.Fan.Family()
	weights := []int64{f.Weight(farey.Zero), f.Weight(farey.Infinity), f.Weight(farey.One)}
	assert.Equal(t, sortedWeights(f), weights)
	assert.True(t, f.Representative(m.Fan.Centre()).Equal(m.Fan.Centre()))
	n := must(f.Number(m.Fan.Centre()))(t)
	assert.Equal(t, n.Cmp(big.NewInt(1)) == 0, m.FreeWeight)
	assertEqualInt(t, must(m.Term(-2))(t), must(f.Number(m.Slope(-2)))(t))
}

// TestFansAgainstAList compares the answers with a list of all progressions of
// small families about small slopes: every sequence that occurs in the list
// has all its occurrences in the answer.
func TestFansAgainstAList(t *testing.T) {
	type place struct {
		p    progression
		name string
	}
	list := map[string][]place{}
	for _, weights := range []string{"0,0,0", "1,1,1", "1,0,0", "2,1,0", "2,2,2"} {
		f := must(orbifold.Parse(weights))(t)
		for node := range f.Tree(2) {
			centre := node.Slope()
			if !f.Representative(centre).Equal(centre) {
				continue
			}
			through := farey.Class((centre.Class() + 1) % 3).Slope()
			if a, _, ok := node.Parents(); ok {
				through = a
			}
			whole := must(f.Fan(centre, through))(t)
			for start := int64(-5); start <= 5; start++ {
				for _, step := range []int64{-3, -2, -1, 1, 2, 3} {
					p := progression{must(f.Fan(centre, whole.Slope(big.NewInt(start))))(t), step}
					key := fmt.Sprint(p.terms(t, 6))
					list[key] = append(list[key], place{p, fmt.Sprint(p.fan, step)})
				}
			}
		}
	}
	require.Greater(t, len(list), 500)
	for _, places := range list {
		s := must(recognize.NewSequence(places[0].p.terms(t, 6)...))(t)
		answer := must(s.Fans(t.Context(), recognize.Options{}))(t)
		require.Equal(t, recognize.Found, answer.Verdict, "%v: %s", s, answer.Reason)
		for _, x := range places {
			assert.True(t, slices.ContainsFunc(answer.Matches, func(m recognize.FanMatch) bool { return comesFrom(t, m, x.p) }), "%v in %v", x.name, answer.Matches)
		}
	}
}

// TestChangedFansAreRefused: one term changed, of six or more, is no fan any
// longer, or another one.
func TestChangedFansAreRefused(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		p := progressions(3).Draw(t, "progression")
		a := p.terms(t, rapid.IntRange(7, 9).Draw(t, "terms"))
		i := rapid.IntRange(0, len(a)-1).Draw(t, "changed")
		a[i].Add(a[i], big.NewInt(rapid.Int64Range(1, 3).Draw(t, "by")))
		answer := must(must(recognize.NewSequence(a...))(t).Fans(context.Background(), recognize.Options{}))(t)
		assert.Equal(t, recognize.None, answer.Verdict)
		assert.NotEmpty(t, answer.Reason)
		assert.Empty(t, answer.Matches)
	})
}

// TestShortSequencesGetCandidates: two to four terms are undecided, and the fan
// they come from is among the candidates when its weights are small.
func TestShortSequencesGetCandidates(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		p := progressions(1).Draw(t, "progression")
		a := p.terms(t, rapid.IntRange(2, 4).Draw(t, "terms"))
		s := must(recognize.NewSequence(a...))(t)
		answer := must(s.Fans(context.Background(), recognize.Options{Weight: 4}))(t)
		require.Equal(t, recognize.Undecided, answer.Verdict)
		assert.NotEmpty(t, answer.Reason)
		k := sortedWeights(p.fan.Family())
		if k[0] <= 4 {
			assert.True(t, slices.ContainsFunc(answer.Matches, func(m recognize.FanMatch) bool { return comesFrom(t, m, p) }), "%v", answer.Matches)
		}
		for _, m := range answer.Matches {
			assertMatch(t, m, s)
		}
	})
}

// TestEquation113Fan is the fan of the weights (1,1,1) with the numbers of OEIS A351372:
// the triples (1,1,3), (1,3,13), (1,13,61), (1,61,291), (1,291,1393).
func TestEquation113Fan(t *testing.T) {
	s := sequenceOf(t, 3, 13, 61, 291, 1393, 6673, 31971)
	answer := must(s.Fans(t.Context(), recognize.Options{}))(t)
	require.Equal(t, recognize.Found, answer.Verdict)
	require.Len(t, answer.Matches, 1)
	m := answer.Matches[0]
	assert.Equal(t, "fan of (1,1,1) about 0/1 through 1/2", m.Fan.String())
	assert.Equal(t, int64(1), m.Step)
	assert.Equal(t, "a(n) = 6·a(n−1) − 6·a(n−2) + a(n−3)", m.Rule.String())
	assert.True(t, m.FreeWeight)
}

func TestFansSaysWhyNot(t *testing.T) {
	for _, x := range []struct {
		terms  []int64
		reason string
	}{
		{[]int64{1, 2, 3}, "convex"},
		{[]int64{3, 2, 3, 2, 3}, "convex"},
		{[]int64{1, 4, 9, 16, 25}, "recurrence of an integer trace"},
		{[]int64{1, 2, 5, 13, 35}, "recurrence of an integer trace"},
		{[]int64{1, 2, 5, 13, 34, 88}, "fails at term 5"},
		{[]int64{9, 4, 3, 4, 8}, "symmetric"},
		{[]int64{2, 3, 7, 18, 47, 123}, "no solution of (E)"}, // Lucas numbers of even index, OEIS A005248
		{[]int64{10, 4, 3, 4, 10, 27}, "recurrence of an integer trace"},
	} {
		answer := must(sequenceOf(t, x.terms...).Fans(t.Context(), recognize.Options{}))(t)
		assert.Equal(t, recognize.None, answer.Verdict, "%v", x.terms)
		assert.Contains(t, answer.Reason, x.reason, "%v", x.terms)
	}
	// Undecided: symmetric about the least of five.
	answer := must(sequenceOf(t, 13, 5, 2, 5, 13).Fans(t.Context(), recognize.Options{}))(t)
	assert.Equal(t, recognize.Undecided, answer.Verdict)
	answer = must(sequenceOf(t, 7).Fans(t.Context(), recognize.Options{}))(t)
	assert.Equal(t, recognize.Undecided, answer.Verdict)
	assert.Empty(t, answer.Matches)
}

func TestFansErrors(t *testing.T) {
	_, err := recognize.Sequence{}.Fans(t.Context(), recognize.Options{})
	assert.ErrorIs(t, err, recognize.ErrEmpty)
	for _, terms := range [][]int64{{0, 1, 3}, {1, 1, 3, -2}} {
		_, err = sequenceOf(t, terms...).Fans(t.Context(), recognize.Options{})
		assert.ErrorIs(t, err, recognize.ErrNotPositive)
	}
	_, err = sequenceOf(t, 5, 5, 5).Fans(t.Context(), recognize.Options{})
	assert.ErrorIs(t, err, recognize.ErrConstant)
	for _, w := range []int64{-1, recognize.MaxWeight + 1} {
		_, err = sequenceOf(t, 1, 2, 5).Fans(t.Context(), recognize.Options{Weight: w})
		assert.ErrorIs(t, err, recognize.ErrOptions)
	}
	ctx, cancel := context.WithCancel(t.Context())
	cancel()
	for _, terms := range [][]int64{{1, 2, 5}, {1, 2, 5, 13, 34}} {
		_, err = sequenceOf(t, terms...).Fans(ctx, recognize.Options{})
		assert.ErrorIs(t, err, context.Canceled)
	}
	// A fan about 1 with arcs of weights past int64: t = 3 + 2c.
	c := new(big.Int).Lsh(big.NewInt(1), 70)
	trace := new(big.Int).Lsh(c, 1)
	trace.Add(trace, big.NewInt(3))
	a := []*big.Int{big.NewInt(1), big.NewInt(1)}
	for len(a) < 6 {
		y := new(big.Int).Mul(trace, a[len(a)-1])
		a = append(a, y.Sub(y, c).Sub(y, a[len(a)-2]))
	}
	_, err = must(recognize.NewSequence(a...))(t).Fans(t.Context(), recognize.Options{})
	assert.ErrorIs(t, err, recognize.ErrTooLarge)
	// The check of a match notices other terms.
	s := sequenceOf(t, 1, 2, 5, 13, 34)
	m := must(s.Fans(t.Context(), recognize.Options{}))(t).Matches[0]
	assert.ErrorIs(t, m.Check(t.Context(), sequenceOf(t, 1, 2, 5, 14)), linear.ErrNotRecurrent)
	assert.ErrorIs(t, m.Check(ctx, s), context.Canceled)
}

// TestFansOfLongTerms: numbers of thousands of digits, and far out in a fan.
func TestFansOfLongTerms(t *testing.T) {
	for _, x := range []struct {
		weights, centre, through string
		step                     int64
	}{
		{"0,0,0", "0/1", "1/3000", 1},
		{"1,1,1", "0/1", "-1/50000", -1},
		{"3,2,1", "3/500", "1/167", -7},
		{"1,0,0", "2/5", "801/2002", 64},
	} {
		f := must(must(orbifold.Parse(x.weights))(t).Fan(farey.MustParse(x.centre), farey.MustParse(x.through)))(t)
		p := progression{f, x.step}
		answer := must(must(recognize.NewSequence(p.terms(t, 6)...))(t).Fans(t.Context(), recognize.Options{}))(t)
		require.Equal(t, recognize.Found, answer.Verdict)
		assert.True(t, slices.ContainsFunc(answer.Matches, func(m recognize.FanMatch) bool { return comesFrom(t, m, p) }))
	}
}
