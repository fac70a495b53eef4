package main

import (
	"context"
	"math"
	"math/big"
	"slices"
	"strconv"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
)

// anySlope draws slopes with small terms of either sign, base slopes included.
func anySlope() *rapid.Generator[farey.Slope] {
	return rapid.Custom(func(t *rapid.T) farey.Slope {
		p := rapid.Int64Range(-40, 40).Draw(t, "p")
		q := rapid.Int64Range(0, 40).Draw(t, "q")
		if p == 0 && q == 0 {
			q = 1
		}
		s, err := farey.FromInts(p, q)
		require.NoError(t, err)
		return s
	})
}

// value returns a fact's value.
func (s section) value(name string) string {
	for _, f := range s.Facts {
		if f.Name == name {
			return f.Value
		}
	}
	return ""
}

func newEntryFor(t require.TestingT, f orbifold.Family, s farey.Slope) *entry {
	e, err := newEntry(context.Background(), f, s)
	require.NoError(t, err)
	return e
}

// TestWordShowsTheMiddle: the words of slope 3/7 with its free middle, worked out by hand
// from the definition of the word.
func TestWordShowsTheMiddle(t *testing.T) {
	for weights, word := range map[orbifold.Family]string{
		orbifold.MustNew(0, 0, 0): "RLLRRLLRRL",
		orbifold.MustNew(1, 1, 1): "RRLLLLLRRRMLLLRRRRRLL",
		orbifold.MustNew(2, 0, 1): "RLLLLLRRMLLRRRRRL",
	} {
		e := newEntryFor(t, weights, farey.MustParse("3/7"))
		s, err := e.wordSection(t.Context())
		require.NoError(t, err)
		assert.Equal(t, word, s.value("Word"), weights.String())
	}
}

// TestMiddleIsFree: with all M read as R the continuant is the number again, as with L.
func TestMiddleIsFree(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		weight := rapid.Int64Range(0, 4)
		f := orbifold.MustNew(weight.Draw(t, "k0"), weight.Draw(t, "kinf"), weight.Draw(t, "k1"))
		s := anySlope().Filter(func(s farey.Slope) bool { return !s.IsBase() }).Draw(t, "s")
		w, err := f.Word(s)
		require.NoError(t, err)
		e := &entry{Slope: s, family: f}
		plain, err := e.withMiddle(w)
		require.NoError(t, err)
		n, err := f.Number(s)
		require.NoError(t, err)
		for _, letter := range []string{"L", "R"} {
			read, err := contfrac.ParseWord(strings.ReplaceAll(plain, "M", letter))
			require.NoError(t, err)
			assert.Equal(t, n.String(), read.WithEnds(contfrac.L, contfrac.R).Fraction().Numerator().String())
		}
	})
}

// TestCorridorIsAStripOfTriangles: one triangle more than crossings, each of area 1/2, each
// sharing an edge with the next, from the start to the end.
func TestCorridorIsAStripOfTriangles(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s := anySlope().Draw(t, "s")
		seq, err := s.Crossings()
		require.NoError(t, err)
		crossings := slices.Collect(seq)
		p, q, _ := s.Int64s()
		end := farey.Point{X: q, Y: p}
		strip := corridor(crossings, farey.Point{}, end)
		if len(crossings) == 0 {
			assert.Empty(t, strip)
			return
		}
		require.Len(t, strip, len(crossings)+1)
		assert.Contains(t, strip[0], farey.Point{})
		assert.Contains(t, strip[len(strip)-1], end)
		for i, c := range strip {
			u, v := c[1].Sub(c[0]), c[2].Sub(c[0])
			assert.EqualValues(t, 1, max(u.X*v.Y-u.Y*v.X, u.Y*v.X-u.X*v.Y))
			if i > 0 {
				shared := 0
				for _, corner := range c {
					if slices.Contains(strip[i-1][:], corner) {
						shared++
					}
				}
				assert.Equal(t, 2, shared)
			}
		}
		for _, c := range crossings { // the marked points lie on the arc and on the edge
			x, y := meets(c, p, q)
			assert.InDelta(t, 0, float64(q)*y-float64(p)*x, 1e-9)
			assert.True(t, x >= 0 && x <= float64(q))
		}
	})
}

// TestTrailEndsAtTheSlope: the triangles on a path are neighbours, and the last one has the
// slope as its newest vertex.
func TestTrailEndsAtTheSlope(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s := anySlope().Draw(t, "s")
		before, last := farey.Triangle{}, stop{Newest: s, Last: true}
		for here := range trail(s.Path()) {
			kept := 0
			for _, c := range classes {
				if before.Vertex(c).Equal(here.Triangle.Vertex(c)) {
					kept++
				}
			}
			assert.Equal(t, 2, kept)
			before, last = here.Triangle, here
		}
		assert.True(t, last.Last)
		assert.True(t, last.Newest.Equal(s))
		assert.True(t, before.Equal(s.Path().Triangle()))
		for range trail(s.Path()) {
			break // may be stopped
		}
	})
}

// TestSlopesGoRoundTheRim: increasing slopes, -1/0 … 1/0, stand counter-clockwise.
func TestSlopesGoRoundTheRim(t *testing.T) {
	angle := func(s farey.Slope) float64 { // from 1/0 on, in (0, 2π]
		a := math.Mod(rimAngle(s)-rimAngle(farey.Infinity.Slope()), 2*math.Pi)
		if a <= 0 {
			a += 2 * math.Pi
		}
		return a
	}
	rapid.Check(t, func(t *rapid.T) {
		a, b := anySlope().Draw(t, "a"), anySlope().Draw(t, "b")
		switch a.Cmp(b) {
		case -1:
			assert.Less(t, angle(a), angle(b))
		case 0:
			assert.Equal(t, angle(a), angle(b))
		default:
			assert.Greater(t, angle(a), angle(b))
		}
	})
	third := 2 * math.Pi / 3
	assert.InDelta(t, third, rimAngle(farey.MustParse("1/1"))-rimAngle(farey.MustParse("0/1")), 1e-12)
	huge := farey.MustParse("-1" + strings.Repeat("0", 400))
	assert.Equal(t, rimAngle(farey.MustParse("1/0")), rimAngle(huge))
}

// TestLogarithmIsEnclosedByItsDigits: the digits printed lie outside the bounds, and close.
func TestLogarithmIsEnclosedByItsDigits(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		x := new(big.Float).SetPrec(logPrecision).SetFloat64(rapid.Float64Range(1e-300, 1e300).Draw(t, "x"))
		x.Quo(x, big.NewFloat(3))
		for _, direction := range []int64{-1, 1} {
			read, _, err := big.ParseFloat(outward(x, direction), 10, 4*logPrecision, big.ToNearestEven)
			require.NoError(t, err)
			assert.Equal(t, int(direction), read.Cmp(x))
			off := read.Sub(read, x)
			off.Quo(off, x)
			assert.Less(t, math.Abs(func() float64 { f, _ := off.Float64(); return f }()), 1e-20)
		}
	})
	assert.Equal(t, "0", outward(new(big.Float), 1))
}

// TestSizeEnclosesTheLogarithm: the number at 3/7 is 169 = 13² (OEIS A002559), and
// Go's mathematics library knows ln 13.
func TestSizeEnclosesTheLogarithm(t *testing.T) {
	e := newEntryFor(t, orbifold.Family{}, farey.MustParse("3/7"))
	s, err := e.sizeSection(t.Context())
	require.NoError(t, err)
	for _, name := range []string{"ln N is at least", "and at most"} {
		x, err := strconv.ParseFloat(s.value(name), 64)
		require.NoError(t, err)
		assert.InEpsilon(t, 2*math.Log(13), x, 1e-15)
	}
	assert.Less(t, s.value("ln N is at least"), s.value("and at most"))
}

// TestPlaceInTheListOfMarkovNumbers: positions from OEIS A002559.
func TestPlaceInTheListOfMarkovNumbers(t *testing.T) {
	numbers := []string{"1", "2", "5", "13", "29", "34", "89", "169", "194", "233", "433", "610"}
	e := newEntryFor(t, orbifold.Family{}, farey.MustParse("3/7"))
	s, err := e.neighbourSection(t.Context())
	require.NoError(t, err)
	require.Len(t, s.Table.Rows, 2*eachSide+1)
	assert.Equal(t, eachSide, s.Table.Marked)
	for i, row := range s.Table.Rows {
		place := 8 - eachSide + i // 169 is the eighth
		assert.Equal(t, []string{strconv.Itoa(place), numbers[place-1]}, row[:2])
	}

	first := newEntryFor(t, orbifold.Family{}, farey.MustParse("1/0"))
	s, err = first.neighbourSection(t.Context())
	require.NoError(t, err)
	assert.Equal(t, 0, s.Table.Marked)
	assert.Len(t, s.Table.Rows, 1+eachSide)
	assert.Equal(t, []string{"1", "1", "0/1"}, s.Table.Rows[0])
}

func TestEquation(t *testing.T) {
	for weights, want := range map[[3]int64]string{
		{0, 0, 0}: "x² + y² + z² = 3xyz",
		{2, 0, 1}: "x² + y² + z² + 2yz + xy = 6xyz",
		{0, 1, 0}: "x² + y² + z² + zx = 4xyz",
	} {
		assert.Equal(t, want, familyFacts(orbifold.MustNew(weights[0], weights[1], weights[2]))[1].Value)
	}
}

// TestLongArcIsCountedNotDrawn: too long to draw, still with all four routes.
func TestLongArcIsCountedNotDrawn(t *testing.T) {
	e := newEntryFor(t, orbifold.Family{}, farey.MustParse("1000/3001"))
	for _, compile := range []func(context.Context) (section, error){e.arcSection, e.snakeSection} {
		s, err := compile(t.Context())
		require.NoError(t, err)
		assert.Empty(t, s.Pictures)
		assert.Contains(t, s.Remark, "5999") // 999 + 3000 + 2000 crossings, as many tiles
	}
	s, err := e.numberSection(t.Context())
	require.NoError(t, err)
	assert.Equal(t, "All four routes agree.", s.Remark)
}

// TestLongRoutesModuloPrimes: a certificate with residues instead of long results.
func TestLongRoutesModuloPrimes(t *testing.T) {
	e := newEntryFor(t, orbifold.Family{}, farey.MustParse("1/150001"))
	s, err := e.numberSection(t.Context())
	require.NoError(t, err)
	assert.Equal(t, []string{"yes", "3 residues", "modulo primes"}, s.Table.Rows[2][1:4])
	assert.Equal(t, "All four routes agree.", s.Remark)
}

// TestTooLargeNumbersShowResidues: the residues of 1/1600000, whose routes all run, and of a
// slope of 300 digits, whose long routes do not.
func TestTooLargeNumbersShowResidues(t *testing.T) {
	e := newEntryFor(t, orbifold.Family{}, farey.MustParse("1/1600000"))
	require.False(t, e.held)
	s := e.Sections[0]
	assert.Equal(t, "All four routes agree modulo each prime.", s.Remark)
	// At 1/n the Markov number is the Fibonacci number F(2n−1) (OEIS A001519, index 1/(n−1)).
	for i, p := range orbifold.Primes() {
		assert.Equal(t, fibonacciMod(2*1600000-1, new(big.Int).SetUint64(p)).String(), s.Table.Rows[0][1+i])
	}
	e = newEntryFor(t, orbifold.MustNew(1, 2, 3), farey.MustParse(strings.Repeat("3", 299)+"/"+strings.Repeat("7", 300)))
	assert.Contains(t, e.Sections[0].Remark, "2 routes that ran agree modulo each prime")
	assert.Contains(t, e.Headline, "bits")
}

func fibonacciMod(n int, m *big.Int) *big.Int {
	a, b := big.NewInt(0), big.NewInt(1)
	for range n {
		a.Add(a, b)
		if a.Cmp(m) >= 0 {
			a.Sub(a, m)
		}
		a, b = b, a
	}
	return a
}

// TestDisagreementIsShouted: should two routes ever differ.
func TestDisagreementIsShouted(t *testing.T) {
	assert.Contains(t, agreement([][]string{{"a", "yes"}, {"b", "NO"}}, 1), "DISAGREE")
	assert.Equal(t, "The 1 routes that ran agree.", agreement([][]string{{"a", "yes"}, {"b", ""}}, 1))
	assert.Equal(t, "NO", yesNo(false))
	assert.Equal(t, []string{"name", "", "", notRun, "call"}, countRow("name", orbifold.Count{Method: orbifold.NotRun}, big.NewInt(1), "call"))
}

// The form, the Lagrange value and the fan of 3/7 in the classical family:
// √(9 − 4/169²) is a point of the spectrum below 3 ("An Introduction to
// Diophantine Approximation", Cambridge 1957, ch. II), and the numbers beside
// 169 follow y(n+1) = 3·169·y(n) − y(n−1).
func TestFormAndFanOfAMarkovNumber(t *testing.T) {
	d, err := newDossier(context.Background(), orbifold.Family{}, []farey.Slope{farey.MustParse("3/7")})
	require.NoError(t, err)
	text := d.text()
	root := math.Sqrt(9 - 4.0/(169*169))
	assert.Contains(t, text, "√257045/169 ≈ "+strconv.FormatFloat(root, 'f', 12, 64))
	assert.Contains(t, text, "a(n) = 507·a(n−1) − a(n−2)")
}
