package orbifold_test

import (
	"fmt"
	"math/big"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
)

func TestGoodMatchingsOfTheClosedCurveAreTheTrace(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f, s := families().Draw(t, "family"), farSlopes().Draw(t, "slope")
		b := must(f.Band(s))(t)
		trace := must(f.Trace(s))(t)
		assertEqualInt(t, trace, b.Count(), "%v at %v", f, s)
		loop := must(f.Loop(s))(t)
		assertEqualInt(t, trace, loop.Trace())
		assertEqualInt(t, big.NewInt(1), loop.Det())
		assertEqualInt(t, must(f.Number(s))(t), new(big.Int).Neg(loop.B()))
		if trace.Cmp(big.NewInt(5000)) <= 0 {
			listed := int64(0)
			for range b.Matchings() {
				listed++
			}
			assertEqualInt(t, trace, big.NewInt(listed), "matchings listed")
			p := must(b.RankPolynomial())(t)
			assertEqualInt(t, trace, p.Eval(big.NewInt(1)), "rank polynomial at 1")
		}
	})
}

// turnsAlongShiftedLine reads the turn letters of the line through (0, ½ + ε) of
// slope p/q > 0 over one period, straight from the definition: the edges of the
// triangulation that it crosses, in order, and the end that consecutive ones share.
func turnsAlongShiftedLine(p, q int64) contfrac.Word {
	type point [2]int64 // in units of the lattice
	// Heights are measured in units of 1/(4q), the line at height 4·p·x + 2q + 1 there.
	offset := func(v point) int64 { return 4*q*v[1] - 4*p*v[0] - 2*q - 1 } // never 0: odd
	left, right := point{0, 1}, point{0, 0}                                // the vertical edge crossed at x = 0
	var w contfrac.WordBuilder
	for start := left; ; {
		// The next triangle lies to the right of the edge; its third corner.
		var apex point
		switch d := (point{left[0] - right[0], left[1] - right[1]}); d {
		case point{0, 1}: // vertical
			apex = point{left[0] + 1, left[1]}
		case point{-1, 0}: // horizontal, crossed upwards
			apex = point{right[0], right[1] + 1}
		case point{-1, -1}: // diagonal, from its lower right side to its upper left one
			apex = point{left[0], left[1] + 1}
		case point{1, 1}: // diagonal, crossed downwards
			apex = point{left[0], left[1] - 1}
		default:
			panic(fmt.Sprint("edge ", d))
		}
		if offset(apex) > 0 {
			left = apex
			w.Append(contfrac.R, 1) // the edges share the right end
		} else {
			right = apex
			w.Append(contfrac.L, 1)
		}
		if left == (point{start[0] + q, start[1] + p}) && right == (point{q, p}) {
			return w.Word()
		}
	}
}

func TestClassicalBandIsTheShiftedLine(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		p, q := rapid.Int64Range(1, 25).Draw(t, "p"), rapid.Int64Range(1, 25).Draw(t, "q")
		s, err := farey.FromInts(p, q)
		require.NoError(t, err)
		p, q, _ = s.Int64s()
		line := turnsAlongShiftedLine(p, q)
		band := must(orbifold.Family{}.Band(s))(t)
		assert.True(t, line.LeastRotation() == band.Word().LeastRotation() || line.Swap().LeastRotation() == band.Word().LeastRotation(),
			"%v: line %v, band %v", s, line, band.Word())
	})
}

func TestBandPastTheLimitIsRefused(t *testing.T) {
	_, err := orbifold.Family{}.Band(farey.MustParse("1/100000000000"))
	assert.ErrorIs(t, err, orbifold.ErrTooLarge)
}

func ExampleFamily_Band() {
	b, _ := orbifold.Family{}.Band(farey.MustParse("3/7"))
	fmt.Println(b.Word(), b.Count())
	t, _ := orbifold.Family{}.Trace(farey.MustParse("3/7"))
	fmt.Println(t)
	// Output:
	// RLLRRLLRRLLRRL 507
	// 507
}
