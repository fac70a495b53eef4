package markov_test

import (
	"context"
	"math/big"
	"os"
	"path/filepath"
	"slices"
	"strconv"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/farey"
	"example.com/onecusp/markov"
)

// lines reads a file of outside values: one a line, comments aside.
func lines(t *testing.T, name string) (list []string) {
	text, err := os.ReadFile(filepath.Join("testdata", name))
	require.NoError(t, err)
	for line := range strings.Lines(string(text)) {
		if line = strings.TrimSpace(line); line != "" && !strings.HasPrefix(line, "#") {
			list = append(list, line)
		}
	}
	require.NotEmpty(t, list)
	return list
}

// integer reads a decimal integer.
func integer(t require.TestingT, s string) *big.Int {
	n, ok := new(big.Int).SetString(s, 10)
	require.True(t, ok, "%q", s)
	return n
}

func TestFirstNumbers(t *testing.T) {
	want := lines(t, "a002559.txt") // OEIS A002559
	var got []string
	for _, n := range markov.Numbers() {
		if got = append(got, n.String()); len(got) == len(want) {
			break
		}
	}
	require.Equal(t, want, got)
}

func TestNumbersAtSmallIndices(t *testing.T) {
	// "On the Markov numbers: fixed numerator, denominator, and sum conjectures",
	// Adv. Appl. Math. 130 (2021), has this labelling.
	for index, want := range map[string]string{"0/1": "1", "1/1": "2", "1/2": "5", "1/3": "13", "2/3": "29"} {
		require.Equal(t, want, must(markov.Frobenius(farey.MustParse(index)))(t).String(), index)
	}
}

func TestTriplesBelowEachNumber(t *testing.T) {
	for _, line := range lines(t, "a253809.txt") { // OEIS A253809
		f := strings.Fields(line)
		require.Len(t, f, 3)
		a, b, c := integer(t, f[0]), integer(t, f[1]), integer(t, f[2])
		want := must(markov.NewTriple(c, a, b))(t)
		found := must(markov.Indices(context.Background(), c))(t)
		require.Len(t, found, 1)
		require.True(t, want.Equal(must(markov.TripleAt(found[0]))(t)), line)
		require.Equal(t, found[0].String(), want.Index().String())
	}
}

// TestPrimesAmongThem takes the list as complete up to its last term.
func TestPrimesAmongThem(t *testing.T) {
	want := lines(t, "a178444.txt") // OEIS A178444
	top := integer(t, want[len(want)-1])
	var got []string
	for _, n := range markov.Numbers() {
		if n.Cmp(top) > 0 {
			break
		}
		if n.ProbablyPrime(20) {
			got = append(got, n.String())
		}
	}
	require.Equal(t, want, got)
	for _, p := range want {
		require.True(t, must(markov.IsNumber(context.Background(), integer(t, p)))(t), p)
	}
}

// recurrence returns x₀, x₁ and on, with x_{n+1} = c·x_n − x_{n−1}.
func recurrence(c, x0, x1 int64, n int) []*big.Int {
	x := []*big.Int{big.NewInt(x0), big.NewInt(x1)}
	for len(x) < n {
		next := new(big.Int).Mul(big.NewInt(c), x[len(x)-1])
		x = append(x, next.Sub(next, x[len(x)-2]))
	}
	return x
}

// oddFibonacci are F(1), F(3), F(5), …: 1, 2, 5, 13, … (OEIS A001519); oddPell are
// P(1), P(3), P(5), …: 1, 5, 29, 169, … (OEIS A001653).
func oddFibonacci(n int) []*big.Int { return recurrence(3, 1, 2, n) }
func oddPell(n int) []*big.Int      { return recurrence(6, 1, 5, n) }

func TestFibonacciBranch(t *testing.T) {
	for n, want := range oddFibonacci(300) { // OEIS A001519: m at 1/n is F(2n+1)
		if n > 0 {
			got := must(markov.Frobenius(must(farey.FromInts(1, int64(n)))(t)))(t)
			require.Equal(t, want.String(), got.String(), "1/%d", n)
		}
	}
}

func TestPellBranch(t *testing.T) {
	for n, want := range oddPell(300) { // OEIS A001653: m at n/(n+1) is P(2n+1)
		got := must(markov.Frobenius(must(farey.FromInts(int64(n), int64(n+1)))(t)))(t)
		require.Equal(t, want.String(), got.String(), "%d/%d", n, n+1)
	}
}

func TestPositionsOfTheBranches(t *testing.T) {
	for name, branch := range map[string]func(int) []*big.Int{
		"a158381.txt": oddFibonacci, // OEIS A158381
		"a158384.txt": oddPell,      // OEIS A158384
	} {
		want := lines(t, name)
		terms := branch(len(want))
		var got []string
		position := 0
		for _, n := range markov.Numbers() {
			position++
			if n.Cmp(terms[len(got)]) == 0 {
				if got = append(got, strconv.Itoa(position)); len(got) == len(want) {
					break
				}
			}
		}
		require.Equal(t, want, got, name)
	}
}

func TestCountsBelowBounds(t *testing.T) {
	counts := map[string]int{
		"2000000000": 93, // OEIS A158384
		// Powers of ten: an independent slow model, by plain definitions.
		"10": 3, "100": 7, "1000": 13, "10000": 21, "100000": 31, "1000000": 40,
		"1000000000": 88, "1000000000000000000": 328,
	}
	for bound, want := range counts {
		distinct := make(map[string]bool)
		for _, triple := range markov.Within(integer(t, bound)) {
			_, _, c := triple.Numbers()
			distinct[c.String()] = true
		}
		require.Len(t, distinct, want, "up to %s", bound)
	}
}

// TestNumbersBelowFibonacci5001 counts them and finds them distinct, since their
// residues modulo 2⁶⁴ are (OEIS A002559, comment of 2009).
func TestNumbersBelowFibonacci5001(t *testing.T) {
	f := oddFibonacci(2501)[2500]
	residues := make([]uint64, 0, 1<<20)
	low := new(big.Int).SetUint64(1<<64 - 1)
	for _, triple := range markov.Within(f.Sub(f, big.NewInt(1))) {
		_, _, c := triple.Numbers()
		residues = append(residues, c.And(c, low).Uint64())
	}
	slices.Sort(residues)
	require.Len(t, slices.Compact(residues), 1_046_858)
}

func TestResiduesAndPrimeDivisors(t *testing.T) {
	four, thirtyTwo := big.NewInt(4), big.NewInt(32)
	for _, n := range markov.Numbers() {
		if n.BitLen() > 300 {
			break
		}
		// OEIS A002559, comments: odd Markov numbers are ≡ 1 mod 4, and so are
		// their prime divisors other than 2. Even ones are ≡ 2 mod 32 (memory).
		if n.Bit(0) == 1 {
			require.Equal(t, "1", new(big.Int).Mod(n, four).String(), "%v", n)
		} else {
			require.Equal(t, "2", new(big.Int).Mod(n, thirtyTwo).String(), "%v", n)
		}
		for p := int64(3); p < 200; p += 4 { // divisors ≡ 3 mod 4 have a prime divisor that is
			require.NotZero(t, new(big.Int).Mod(n, big.NewInt(p)).Sign(), "%d divides %v", p, n)
		}
	}
}

// box returns the Markov numbers at the primitive points (q, p), 0 ≤ p ≤ q ≤ size;
// nil elsewhere.
func box(t *testing.T, size int64) [][]*big.Int {
	m := make([][]*big.Int, size+1)
	for q := range m {
		m[q] = make([]*big.Int, size+1)
		for p := range q + 1 {
			index, err := markov.IndexAt(big.NewInt(int64(q)), big.NewInt(int64(p)))
			if err == nil {
				m[q][p] = must(markov.Frobenius(index))(t)
			} else {
				assert.ErrorIs(t, err, markov.ErrNotPrimitive)
			}
		}
	}
	return m
}

// TestFixedNumeratorDenominatorAndSum is the theorem of "On the Markov numbers:
// fixed numerator, denominator, and sum conjectures", Adv. Appl. Math. 130 (2021),
// for primitive points.
func TestFixedNumeratorDenominatorAndSum(t *testing.T) {
	const size = 60
	m := box(t, size)
	increases := func(what string, line int64, next func(i int64) (q, p int64)) {
		last := new(big.Int)
		for i := int64(0); i <= size; i++ {
			q, p := next(i)
			if p < 0 || p > q || q > size || m[q][p] == nil {
				continue
			}
			require.Positive(t, m[q][p].Cmp(last), "%s %d at (%d, %d)", what, line, q, p)
			last = m[q][p]
		}
	}
	for line := int64(0); line <= 2*size; line++ {
		increases("fixed q", line, func(p int64) (int64, int64) { return line, p })
		increases("fixed p", line, func(q int64) (int64, int64) { return q, line })
		increases("fixed p + q", line, func(q int64) (int64, int64) { return q, line - q })
	}
}

// TestLinesOfOtherSlopes is the theorem of "On the ordering of the Markov numbers",
// Adv. Appl. Math. 143 (2023): along lines of slope ≥ −8/7 through primitive points
// with 0 < p < q the numbers increase with q, along lines of slope ≤ −5/4 they
// decrease.
func TestLinesOfOtherSlopes(t *testing.T) {
	const size = 60
	m := box(t, size)
	rapid.Check(t, func(t *rapid.T) {
		point := rapid.Custom(func(t *rapid.T) [2]int64 {
			q := rapid.Int64Range(2, size).Draw(t, "q")
			return [2]int64{q, rapid.Int64Range(1, q-1).Draw(t, "p")}
		}).Filter(func(v [2]int64) bool { return m[v[0]][v[1]] != nil })
		a, b := point.Draw(t, "a"), point.Draw(t, "b")
		if a[0] > b[0] {
			a, b = b, a
		}
		dq, dp := b[0]-a[0], b[1]-a[1]
		if dq == 0 {
			return
		}
		switch cmp := m[a[0]][a[1]].Cmp(m[b[0]][b[1]]); {
		case 7*dp >= -8*dq:
			require.Negative(t, cmp)
		case 4*dp <= -5*dq:
			require.Positive(t, cmp)
		}
	})
}
