package farey_test

import (
	"math"
	"math/big"
	"slices"
	"testing"

	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/farey"
)

// collect lists the corridor of a slope.
func collect(t require.TestingT, s farey.Slope) []farey.Crossing {
	crossings, err := s.Crossings()
	require.NoError(t, err)
	return slices.Collect(crossings)
}

// slowCorridor intersects the arc with every edge of the triangulation in its
// bounding box, in rational arithmetic, and sorts the crossings along the arc.
func slowCorridor(p, q int64) []farey.Crossing {
	type cut struct {
		along, across *big.Rat // where on the arc, and where on the edge from its lower end
		crossing      farey.Crossing
	}
	var cuts []cut
	steps := map[farey.Class]farey.Point{
		farey.Zero: {X: 1, Y: 0}, farey.Infinity: {X: 0, Y: 1}, farey.One: {X: 1, Y: 1},
	}
	for x := int64(-1); x <= q; x++ {
		for y := min(p, 0) - 1; y <= max(p, 0); y++ {
			for class, e := range steps {
				// t·(q, p) = (x, y) + u·e by Cramer's rule.
				det := e.X*p - q*e.Y
				if det == 0 {
					continue
				}
				along := big.NewRat(e.X*y-x*e.Y, det)
				across := big.NewRat(q*y-p*x, det)
				if !inside(along) || !inside(across) {
					continue
				}
				from := farey.Point{X: x, Y: y}
				crossing := farey.Crossing{Class: class, Left: from, Right: from.Add(e), Nearer: farey.Left}
				if q*crossing.Left.Y < p*crossing.Left.X { // to the right of the arc
					crossing.Left, crossing.Right = crossing.Right, crossing.Left
				}
				half := across.Cmp(big.NewRat(1, 2))
				if (half < 0) != (crossing.Left == from) {
					crossing.Nearer = farey.Right
				}
				if half == 0 {
					crossing.Nearer = farey.Middle
				}
				cuts = append(cuts, cut{along, across, crossing})
			}
		}
	}
	slices.SortFunc(cuts, func(a, b cut) int { return a.along.Cmp(b.along) })
	var list []farey.Crossing
	for i, c := range cuts {
		if i+1 < len(cuts) {
			switch next := cuts[i+1].crossing; {
			case next.Left == c.crossing.Left:
				c.crossing.Turn = farey.Left
			case next.Right == c.crossing.Right:
				c.crossing.Turn = farey.Right
			}
		}
		list = append(list, c.crossing)
	}
	return list
}

// inside reports whether 0 < x < 1.
func inside(x *big.Rat) bool { return x.Sign() > 0 && x.Cmp(big.NewRat(1, 1)) < 0 }

func TestCorridorIsTheIntersections(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		p, q := rapid.Int64Range(-16, 16).Draw(t, "p"), rapid.Int64Range(0, 16).Draw(t, "q")
		s, err := farey.FromInts(p, q)
		if err != nil {
			return
		}
		p, q, _ = s.Int64s()
		require.Equal(t, slowCorridor(p, q), collect(t, s))
	})
}

func TestCorridorHasTheCountsByClass(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s := smallSlopes().Draw(t, "s")
		var counts [3]int64
		total := 0
		for _, c := range collect(t, s) {
			counts[c.Class]++
			total++
		}
		for c, n := range s.CrossingCounts() {
			require.Equal(t, counts[c], n.Int64())
		}
		require.Equal(t, !s.IsBase(), total%2 == 1, "odd total")
	})
}

func TestCrossingCountsAreDeterminants(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s := slopes().Draw(t, "s")
		for c, n := range s.CrossingCounts() {
			want := farey.Det(s, farey.Class(c).Slope())
			want.Sub(want.Abs(want), big.NewInt(1))
			if s.IsBase() {
				want.SetInt64(0)
			}
			require.Zero(t, want.Cmp(n))
		}
	})
}

func TestCorridorIsSymmetricAboutTheMiddle(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s := rapid.OneOf(smallSlopes(), rapid.Custom(func(t *rapid.T) farey.Slope {
			s, err := farey.FromInts(rapid.Int64Range(-2000, 2000).Draw(t, "p"), rapid.Int64Range(1, 2000).Draw(t, "q"))
			require.NoError(t, err)
			return s
		})).Draw(t, "s")
		list := collect(t, s)
		p, q, _ := s.Int64s()
		end := farey.Point{X: q, Y: p}
		for i, c := range list {
			mirror := list[len(list)-1-i]
			require.Equal(t, c.Class, mirror.Class)
			require.Equal(t, c.Left, end.Sub(mirror.Right))
			require.Equal(t, c.Right, end.Sub(mirror.Left))
			require.Equal(t, c.Nearer, mirror.Nearer.Opposite())
			require.Equal(t, 2*i+1 == len(list), c.Nearer == farey.Middle)
			if i+1 < len(list) {
				require.Equal(t, c.Turn, list[len(list)-2-i].Turn.Opposite())
			} else {
				require.Equal(t, farey.Middle, c.Turn)
			}
		}
	})
}

// isCorridorStart checks what holds of each crossing and of each two in a row.
func isCorridorStart(t require.TestingT, p, q int64, list []farey.Crossing) {
	offset := func(v farey.Point) *big.Int {
		o := new(big.Int).Mul(big.NewInt(q), big.NewInt(v.Y))
		return o.Sub(o, new(big.Int).Mul(big.NewInt(p), big.NewInt(v.X)))
	}
	for i, c := range list {
		l, r := offset(c.Left), offset(c.Right)
		require.Positive(t, l.Sign())
		require.Negative(t, r.Sign())
		require.Equal(t, c.Class, c.Left.Sub(c.Right).Class())
		nearer := map[int]farey.Side{-1: farey.Left, 0: farey.Middle, 1: farey.Right}
		require.Equal(t, nearer[l.CmpAbs(r)], c.Nearer)
		if i+1 < len(list) {
			require.Equal(t, c.Turn == farey.Left, c.Left == list[i+1].Left)
			require.Equal(t, c.Turn == farey.Right, c.Right == list[i+1].Right)
			require.NotEqual(t, farey.Middle, c.Turn)
		}
	}
}

func TestCorridorOfHugeTermsDoesNotOverflow(t *testing.T) {
	const m = farey.MaxCorridorTerm
	for _, s := range [][2]int64{{m, m - 1}, {m - 1, m}, {-m, m - 1}, {1 - m, m}, {1, m}, {m, 1}, {-m, 1}, {-1, m}, {m/2 + 1, m}, {m - 1, m/2 - 1}} {
		slope, err := farey.FromInts(s[0], s[1])
		require.NoError(t, err)
		p, q, _ := slope.Int64s()
		crossings, err := slope.Crossings()
		require.NoError(t, err)
		for range 2 { // the iterator can be used again
			var list []farey.Crossing
			for c := range crossings {
				if list = append(list, c); len(list) == 1000 {
					break
				}
			}
			require.Len(t, list, 1000)
			isCorridorStart(t, p, q, list)
		}
	}
}

func TestCorridorRefusesTermsPastTheLimit(t *testing.T) {
	const m = farey.MaxCorridorTerm
	for _, s := range []string{
		"4611686018427387904/3", "-4611686018427387904/3", "3/4611686018427387904", "9223372036854775807/2",
		"100000000000000000000/3", "1/100000000000000000000",
	} {
		_, err := farey.MustParse(s).Crossings()
		require.ErrorIs(t, err, farey.ErrTooLarge, s)
	}
	require.Equal(t, int64(math.MaxInt64/2), m)
}

func TestTurnsOfThreeSevenths(t *testing.T) {
	// Turn letters of slope 3/7: "Cluster algebras and continued fractions", Compositio
	// Math. 154 (2018), gives the construction; the letters are a worked example of the
	// project's mathematics with weights (0, 0, 0).
	var word string
	for _, c := range collect(t, farey.MustParse("3/7")) {
		word += map[farey.Side]string{farey.Left: "L", farey.Right: "R"}[c.Turn]
	}
	require.Equal(t, "RLLRRLLRRL", word)
}

func TestBaseSlopesCrossNothing(t *testing.T) {
	for _, c := range allClasses {
		require.Empty(t, collect(t, c.Slope()))
	}
}

func TestPointsAddAsVectors(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		a := farey.Point{X: int64s().Draw(t, "ax"), Y: int64s().Draw(t, "ay")}
		b := farey.Point{X: int64s().Draw(t, "bx"), Y: int64s().Draw(t, "by")}
		require.Equal(t, a, a.Add(b).Sub(b))
		require.Equal(t, farey.Point{}, a.Sub(a))
		if s, err := farey.FromInts(a.Y, a.X); err == nil {
			if p, q, ok := s.Int64s(); ok {
				require.Equal(t, s.Class(), farey.Point{X: q, Y: p}.Class())
				require.Equal(t, s.Class(), farey.Point{X: -q, Y: -p}.Class())
			}
		}
	})
	require.Equal(t, "(7, -3)", farey.Point{X: 7, Y: -3}.String())
	require.Equal(t, farey.Zero, farey.Point{X: 2, Y: 4}.Class())
}

func TestSidesAreOpposite(t *testing.T) {
	for s, text := range map[farey.Side]string{farey.Middle: "middle", farey.Left: "left", farey.Right: "right", 7: "Side(7)"} {
		require.Equal(t, text, s.String())
		require.Equal(t, s, s.Opposite().Opposite())
		require.Equal(t, s == farey.Left || s == farey.Right, s != s.Opposite())
	}
}
