package farey_test

import (
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
