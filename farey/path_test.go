package farey_test

import (
	"bytes"
	"fmt"
	"math/big"
	"strings"
	"testing"

	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/farey"
)

// equalSlopes is require.Equal for slopes, by their own Equal and printed whole.
func equalSlopes(t require.TestingT, want, got farey.Slope) {
	require.Truef(t, want.Equal(got), "want %s, got %s", want, got)
}

// isTriangle is the law of triangles: three mutual neighbours, one of each class.
func isTriangle(t require.TestingT, tri farey.Triangle) {
	for c := farey.Zero; c <= farey.One; c++ {
		require.Equal(t, c, tri.Vertex(c).Class())
		require.True(t, farey.Neighbours(tri.Vertex(c), tri.Vertex((c+1)%3)))
	}
}

func TestPathOfSlopeLeadsToSlope(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s := slopes().Draw(t, "s")
		path := s.Path()
		isTriangle(t, path.Triangle())
		if s.IsBase() {
			require.Equal(t, farey.Path{}, path)
			return
		}
		got, ok := path.Slope()
		require.True(t, ok)
		equalSlopes(t, s, got)
	})
}

func TestPathOfTriangleIsThePath(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		p := paths().Draw(t, "p")
		tri := p.Triangle()
		require.Equal(t, p, tri.Path())
		if s, ok := p.Slope(); ok {
			require.Equal(t, p, s.Path())
			newest, ok := tri.Newest()
			require.True(t, ok)
			equalSlopes(t, s, tri.Vertex(newest))
		}
	})
}

// slowPath walks the moves one by one by the rule of the type's comment, with flips
// of triangles.
func slowPath(first farey.Class, moves contfrac.Word) (tri farey.Triangle, a, b, c farey.Slope) {
	base := [3][2]farey.Class{
		farey.Infinity: {farey.Zero, farey.One},
		farey.Zero:     {farey.One, farey.Infinity},
		farey.One:      {farey.Infinity, farey.Zero},
	}[first]
	a, b, c = base[0].Slope(), base[1].Slope(), first.Slope()
	tri = farey.Triangle{}.Flip(first)
	behind := first
	for l := range moves.Letters() {
		newest := tri.Vertex(behind)
		if l == contfrac.L {
			b, c = newest, b
		} else {
			a, c = newest, a
		}
		behind = c.Class()
		tri = tri.Flip(behind)
	}
	return tri, a, b, c
}

func TestPathIsFlipByFlip(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		first := classes().Draw(t, "first")
		var moves contfrac.WordBuilder
		for range rapid.IntRange(0, 30).Draw(t, "length") {
			moves.Append(rapid.SampledFrom([]contfrac.Letter{contfrac.L, contfrac.R}).Draw(t, "letter"), 1)
		}
		p := farey.NewPath(first, moves.Word())
		tri, a, b, c := slowPath(first, moves.Word())
		require.True(t, tri.Equal(p.Triangle()))
		gotA, gotB, gotC := p.Edge()
		equalSlopes(t, a, gotA)
		equalSlopes(t, b, gotB)
		equalSlopes(t, c, gotC)
		s, ok := p.Slope()
		require.True(t, ok)
		equalSlopes(t, tri.Vertex(c.Class()), s)
	})
}

func TestFlipsLeadToTheTriangle(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s := smallSlopes().Draw(t, "s")
		tri, count := farey.Triangle{}, 0
		for c := range s.Path().Flips() {
			tri = tri.Flip(c)
			count++
		}
		require.True(t, tri.Equal(s.Path().Triangle()))
		for _, stop := range []int{1, 2} { // stopping early is allowed
			seen := 0
			for range s.Path().Flips() {
				if seen++; seen == stop {
					break
				}
			}
			require.Equal(t, min(stop, count), seen)
		}
	})
}

func TestPathIsTheRunsOfTheFraction(t *testing.T) {
	// A thousand-digit quotient is one run: 1/n is n−2 moves L after the first flip.
	n := stretch(7, 420)
	s, err := farey.New(big.NewInt(1), n)
	require.NoError(t, err)
	p := s.Path()
	require.Equal(t, farey.Infinity, p.First())
	require.Equal(t, 1, p.Moves().NumRuns())
	require.Zero(t, p.Moves().Len().Cmp(new(big.Int).Sub(n, big.NewInt(2))))
	require.Equal(t, s, p.Triangle().Vertex(s.Class()))
}

func TestPathText(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		p := paths().Draw(t, "p")
		text, err := p.MarshalText()
		require.NoError(t, err)
		require.Equal(t, p.String(), string(text))
		var back farey.Path
		require.NoError(t, back.UnmarshalText(text))
		require.Equal(t, p, back)
		require.True(t, p == back)
		require.Equal(t, p.String(), fmt.Sprintf("%s", p))
		require.Equal(t, p.IsBase(), p.String() == "base")
	})
	for slope, want := range map[string]string{
		"0/1": "base", "1/0": "base", "1/1": "base", "1/2": "infinity:", "2/1": "zero:", "-1/1": "one:",
		"3/7": "infinity: L R2", "1/4": "infinity: L2", "-2/1": "one: L", "-1/2": "one: R", "7/3": "zero: R L2",
	} {
		require.Equal(t, want, farey.MustParse(slope).Path().String(), slope)
	}
	require.Equal(t, "infinity: L R2", fmt.Sprint(farey.MustParse("3/7").Path()))
	require.Contains(t, fmt.Sprint(farey.NewPath(farey.Zero, hugeRun(t))), "zero: R1")
	require.Less(t, len(fmt.Sprint(farey.NewPath(farey.Zero, hugeRun(t)))), 200)
	require.Greater(t, len(fmt.Sprintf("%s", farey.NewPath(farey.Zero, hugeRun(t)))), 1000)
}

// hugeRun is R taken 10¹⁰⁰⁰ times.
func hugeRun(t require.TestingT) contfrac.Word {
	var b contfrac.WordBuilder
	require.NoError(t, b.AppendBig(contfrac.R, new(big.Int).Exp(big.NewInt(10), big.NewInt(1000), nil)))
	return b.Word()
}

func TestPathTextRefusals(t *testing.T) {
	p := farey.MustParse("3/7").Path()
	for _, text := range []string{
		"", "base:", "base ", "Base", "zero", "zero: ", "zero:L", ": L", "two: L", "zero:  L", "zero L",
		"zero: LL", "zero: L R0", "zero: x", "one: L1", "one: L ", "one: L  R", strings.Repeat("zero: L R", 1000),
	} {
		err := p.UnmarshalText([]byte(text))
		require.ErrorIs(t, err, farey.ErrSyntax, text)
		require.Less(t, len(err.Error()), 400)
	}
	hostile := append([]byte("zero: "), bytes.Repeat([]byte("L R "), contfrac.MaxText/4+1)...)
	require.ErrorIs(t, p.UnmarshalText(hostile), farey.ErrTooLarge)
	require.Equal(t, farey.MustParse("3/7").Path(), p, "left alone")
}

func TestZeroPathStays(t *testing.T) {
	var p farey.Path
	require.True(t, p.IsBase())
	require.Equal(t, farey.Zero, p.First())
	require.True(t, p.Moves().IsEmpty())
	require.Equal(t, farey.Triangle{}, p.Triangle())
	_, ok := p.Slope()
	require.False(t, ok)
	a, b, c := p.Edge()
	tri, err := farey.NewTriangle(a, b, c)
	require.NoError(t, err)
	require.Equal(t, farey.Triangle{}, tri)
	require.Equal(t, p, farey.Triangle{}.Path())
	for range p.Flips() {
		require.Fail(t, "a flip")
	}
}
