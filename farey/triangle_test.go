package farey_test

import (
	"fmt"
	"math"
	"testing"

	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/farey"
)

func TestFlipKeepsClassesAndUndoesItself(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		tri, c := triangles().Draw(t, "tri"), classes().Draw(t, "c")
		flipped := tri.Flip(c)
		isTriangle(t, flipped)
		require.False(t, tri.Equal(flipped))
		for d := farey.Zero; d <= farey.One; d++ {
			require.Equal(t, d != c, tri.Vertex(d).Equal(flipped.Vertex(d)))
		}
		require.Equal(t, tri, flipped.Flip(c))
		require.True(t, tri.Equal(flipped.Flip(c)))
	})
}

func TestFlipAwayMakesTheNewestVertex(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		tri, c := triangles().Draw(t, "tri"), classes().Draw(t, "c")
		newest, ok := tri.Newest()
		require.Equal(t, !tri.IsBase(), ok)
		flipped := tri.Flip(c)
		if ok && c == newest { // back towards the base triangle
			require.True(t, flipped.IsBase() || height(flipped.Vertex(c)).Cmp(height(tri.Vertex(c))) < 0)
			return
		}
		got, ok := flipped.Newest()
		require.True(t, ok)
		require.Equal(t, c, got)
	})
}

func TestNewTriangleTakesAnyOrder(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		tri := triangles().Draw(t, "tri")
		for _, order := range rapid.Permutation(allClasses).Draw(t, "order")[:1] {
			c, d := order, (order+1)%3
			if rapid.Bool().Draw(t, "swap") {
				c, d = d, c
			}
			got, err := farey.NewTriangle(tri.Vertex(c), tri.Vertex(d), tri.Vertex(c.Third(d)))
			require.NoError(t, err)
			require.Equal(t, tri, got)
		}
	})
}

func TestNewTriangleRefusesOthers(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		tri := triangles().Draw(t, "tri")
		s := slopes().Draw(t, "s")
		a, b := tri.Vertex(farey.Zero), tri.Vertex(farey.Infinity)
		want := farey.Neighbours(a, s) && farey.Neighbours(b, s)
		for _, args := range [][3]farey.Slope{{a, b, s}, {s, a, b}, {b, s, a}} {
			_, err := farey.NewTriangle(args[0], args[1], args[2])
			if want {
				require.NoError(t, err)
			} else {
				require.ErrorIs(t, err, farey.ErrNotNeighbours)
			}
		}
		_, err := farey.NewTriangle(a, a, b)
		require.ErrorIs(t, err, farey.ErrNotNeighbours)
	})
}

func TestZeroTriangleIsTheBase(t *testing.T) {
	var tri farey.Triangle
	isTriangle(t, tri)
	require.True(t, tri.IsBase())
	require.Equal(t, "{0/1, 1/0, 1/1}", tri.String())
	_, ok := tri.Newest()
	require.False(t, ok)
	for c := farey.Zero; c <= farey.One; c++ {
		require.Equal(t, c.Slope(), tri.Vertex(c))
		require.Equal(t, tri, tri.Flip(c).Flip(c))
	}
	require.Equal(t, "{2/1, 1/0, 1/1} {0/1, 1/2, 1/1} {0/1, 1/0, -1/1}",
		fmt.Sprintf("%s %v %s", tri.Flip(farey.Zero), tri.Flip(farey.Infinity), tri.Flip(farey.One)))
}

func TestTriangleFormat(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		tri := triangles().Draw(t, "tri")
		a, b, c := tri.Vertex(farey.Zero), tri.Vertex(farey.Infinity), tri.Vertex(farey.One)
		require.Equal(t, "{"+a.String()+", "+b.String()+", "+c.String()+"}", fmt.Sprintf("%s", tri))
		require.Equal(t, fmt.Sprintf("{%v, %v, %v}", a, b, c), fmt.Sprintf("%v", tri))
	})
	require.Equal(t, "%!d(farey.Triangle={0/1, 1/0, 1/1})", fmt.Sprintf("%d", farey.Triangle{}))
}

func TestNewestAtTheEndOfMachineIntegers(t *testing.T) {
	// Here |p| + q passes 2⁶³, and the sums of terms pass it too.
	const m = math.MaxInt64
	for _, terms := range [][2]int64{{m - 1, m}, {m, m - 1}, {1 - m, m}, {m/2 + 1, m}, {-m, m/2 + 1}, {m, 1}, {1, m}, {1<<62 + 1, 1 << 62}} {
		s, err := farey.FromInts(terms[0], terms[1])
		require.NoError(t, err)
		tri := s.Path().Triangle()
		isTriangle(t, tri)
		newest, ok := tri.Newest()
		require.True(t, ok)
		equalSlopes(t, s, tri.Vertex(newest))
		for _, c := range allClasses {
			isTriangle(t, tri.Flip(c))
			require.Equal(t, tri, tri.Flip(c).Flip(c))
		}
	}
}
