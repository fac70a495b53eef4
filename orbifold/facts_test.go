package orbifold_test

import (
	"bufio"
	"fmt"
	"math/big"
	"os"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
)

// The source of each set of facts stands in the header of its file in testdata.

// readFacts returns the fields of the lines of a file in testdata.
func readFacts(t *testing.T, name string) (lines [][]string) {
	file, err := os.Open("testdata/" + name)
	require.NoError(t, err)
	defer file.Close()
	for in := bufio.NewScanner(file); in.Scan(); {
		if line := in.Text(); !strings.HasPrefix(line, "#") {
			lines = append(lines, strings.Fields(line))
		}
	}
	require.NotEmpty(t, lines)
	return lines
}

func TestNumbersOfTheSlowModel(t *testing.T) {
	for _, line := range readFacts(t, "values.txt") {
		f, err := orbifold.Parse(strings.Join(line[:3], ","))
		require.NoError(t, err)
		for _, fact := range line[3:] {
			slope, want, _ := strings.Cut(fact, "=")
			n := assertFourRoutes(t, f, farey.MustParse(slope))
			assert.Equal(t, want, n.String(), "%v at %s", f, slope)
		}
	}
}

func TestAscendingGivesThePublishedNumbers(t *testing.T) {
	for name, f := range map[string]orbifold.Family{"a002559.txt": {}, "a357749.txt": orbifold.MustNew(1, 1, 1)} {
		var want []string
		for _, line := range readFacts(t, name) {
			want = append(want, line...)
		}
		var got []string
		for n := range f.Ascending() {
			if len(got) == len(want) {
				break
			}
			got = append(got, n.Number().String())
		}
		assert.Equal(t, want, got, name)
	}
}

func TestAscendingTriplesOfOneOneOne(t *testing.T) {
	f := orbifold.MustNew(1, 1, 1)
	var got []string
	want := readFacts(t, "a351372.txt")
	for n := range f.Ascending() {
		if len(got) == len(want) {
			break
		}
		s := n.Triple().Sorted()
		got = append(got, fmt.Sprint(s[0], s[1], s[2]))
	}
	for i, line := range want {
		assert.Equal(t, strings.Join(line, " "), got[i])
	}
}

func TestCountsOfSmallMarkovNumbers(t *testing.T) {
	// Distinct Markov numbers up to 10ⁿ: 3, 7, 13, 21, 31, 40 for n = 1 … 6, 88
	// for n = 9 and 328 for n = 18 (a sketch in double precision, confirmed here
	// by exact walks). 93 up to 2·10⁹: OEIS A002559.
	bound := func(s string) *big.Int { n, _ := new(big.Int).SetString(s, 10); return n }
	for text, want := range map[string]int{
		"10": 3, "100": 7, "1000": 13, "10000": 21, "100000": 31, "1000000": 40,
		"1000000000": 88, "2000000000": 93, "1000000000000000000": 328,
	} {
		distinct := map[string]bool{}
		for n := range (orbifold.Family{}).Within(bound(text)) {
			distinct[n.Number().String()] = true
		}
		assert.Len(t, distinct, want, "up to %s", text)
	}
}

func TestCountsOfSlopesByTrace(t *testing.T) {
	// Slopes with arccosh(t/2) ≤ 300: 97,584 for (0,0,0), 37,536 for (1,1,1),
	// 24,384 for (2,2,2), 24,879 for (1,2,3) (an independent slow model). With
	// arccosh(t/2) = 300, t = e³⁰⁰ + e⁻³⁰⁰.
	want := map[string]int{"(0,0,0)": 97_584, "(1,1,1)": 37_536, "(2,2,2)": 24_384, "(1,2,3)": 24_879}
	e300, _, err := big.ParseFloat(eTo300, 10, 600, big.ToNearestEven)
	require.NoError(t, err)
	bound, _ := e300.Int(nil) // t ≤ e³⁰⁰ + e⁻³⁰⁰ is t ≤ ⌊e³⁰⁰⌋, for integers t
	for name, count := range want {
		f, err := orbifold.Parse(name)
		require.NoError(t, err)
		// N ≤ (t + k)/K, so this bound misses nothing.
		most := new(big.Int).Add(bound, big.NewInt(10))
		got := 0
		for n := range f.Within(most.Quo(most, f.K())) {
			tr := n.Number()
			tr.Mul(tr, f.K()).Sub(tr, big.NewInt(f.Weight(n.Slope().Class())))
			if tr.Cmp(bound) <= 0 {
				got++
			}
		}
		assert.Equal(t, count, got, name)
	}
}

// eTo300 is e³⁰⁰, by the series of e in exact rationals.
var eTo300 = func() string {
	e, term := new(big.Rat).SetInt64(1), new(big.Rat).SetInt64(1)
	for k := int64(1); k < 120; k++ {
		term.Mul(term, big.NewRat(1, k))
		e.Add(e, term)
	}
	f := new(big.Float).SetPrec(700).SetRat(e)
	p := new(big.Float).SetPrec(700).SetInt64(1)
	for range 300 {
		p.Mul(p, f)
	}
	return p.Text('f', 40)
}()
