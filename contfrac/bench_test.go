package contfrac_test

import (
	"fmt"
	"math"
	"math/big"
	"math/bits"
	"testing"
	"time"

	"example.com/onecusp/contfrac"
)

// seconds returns the time of f, the best of a few runs.
func seconds(f func()) float64 {
	best := math.Inf(1)
	for i, start := 0, time.Now(); i < 3 || i < 50 && time.Since(start) < 200*time.Millisecond; i++ {
		begun := time.Now()
		f()
		best = min(best, time.Since(begun).Seconds())
	}
	return best
}

func ones(n int) []*big.Int {
	terms := make([]*big.Int, n)
	for i := range terms {
		terms[i] = big.NewInt(1)
	}
	return terms
}

// randomTerms are the quotients of a random ratio, the typical terms.
func randomTerms(size int) []*big.Int {
	f, _ := contfrac.FromRatio(pseudorandom(size, 1), pseudorandom(size, 2))
	return f.Terms()
}

// BenchmarkContinuant reports the time of the continuant of a million ones, and of
// random terms with a result of the same size, in products of two halves of the
// result. Budget: 20.
func BenchmarkContinuant(b *testing.B) {
	for name, terms := range map[string][]*big.Int{"ones": ones(1_000_000), "random": randomTerms(694_242)} {
		b.Run(name, func(b *testing.B) {
			k := contfrac.Continuant(terms)
			half := uint(k.BitLen() / 2)
			hi := new(big.Int).Rsh(k, half)
			lo := new(big.Int).Sub(k, new(big.Int).Lsh(hi, half))
			for b.Loop() {
				contfrac.Continuant(terms)
			}
			unit := seconds(func() { contfrac.Product(hi, lo) })
			b.ReportMetric(seconds(func() { contfrac.Continuant(terms) })/unit, "products")
		})
	}
}

// BenchmarkFromRatio reports how many times faster expansions are than a loop of
// QuoRem that keeps the quotients. Budget: 20 at 10⁶ bits. Pathological ratios
// with quotients of 40, 1000 and 100000 bits are beside the random one.
func BenchmarkFromRatio(b *testing.B) {
	run := func(name string, p, q *big.Int) {
		b.Run(name, func(b *testing.B) {
			var terms []*big.Int
			loop := func() {
				x, y, t, r := new(big.Int).Set(p), new(big.Int).Set(q), new(big.Int), new(big.Int)
				terms = terms[:0]
				for y.Sign() != 0 {
					t.QuoRem(x, y, r)
					terms = append(terms, new(big.Int).Set(t))
					x, y, r = y, r, x
				}
			}
			begun := time.Now()
			loop()
			slow := time.Since(begun).Seconds()
			if slow < 0.1 {
				slow = seconds(loop)
			}
			for b.Loop() {
				f, _ := contfrac.FromRatio(p, q)
				if f.Len() != len(terms) && f.Len() != len(terms)-1 {
					b.Fatalf("%d terms, the loop has %d", f.Len(), len(terms))
				}
			}
			b.ReportMetric(slow/seconds(func() { _, _ = contfrac.FromRatio(p, q) }), "times-faster")
		})
	}
	for _, size := range []int{128, 1000, 10_000, 100_000, 1_000_000} {
		run(fmt.Sprintf("random/%d", size), pseudorandom(size, 1), pseudorandom(size, 2))
	}
	f, next := fibonacci(144_000)
	run("fibonacci/100000", next, f)
	for _, size := range []int{40, 1000, 100_000} {
		var terms []*big.Int
		for i := range 200_000 / size {
			terms = append(terms, pseudorandom(size, uint64(i)))
		}
		f, _ := contfrac.NewFraction(terms...)
		p, q := f.Ratio()
		run(fmt.Sprintf("quotients/%d", size), p, q)
	}
}

// BenchmarkProduct calibrates productThreshold: it reports how many times faster a
// product by transforms is than math/big, for smaller operands of these many words
// and larger ones of the same size and of eight times that.
func BenchmarkProduct(b *testing.B) {
	for _, words := range []int{1850, 1900, 2500, 5000, 16000, 80000} {
		for _, ratio := range []int{1, 8} {
			x, y := pseudorandom(words*bits.UintSize, 1), pseudorandom(ratio*words*bits.UintSize, 2)
			compare(b, fmt.Sprintf("%dx%d", words, ratio), x, y)
		}
	}
}

// BenchmarkSquare calibrates squareThreshold in the same way.
func BenchmarkSquare(b *testing.B) {
	for _, words := range []int{2500, 3500, 3900, 5000, 16000} {
		x := pseudorandom(words*bits.UintSize, 1)
		compare(b, fmt.Sprint(words), x, x)
	}
}

func compare(b *testing.B, name string, x, y *big.Int) {
	b.Run(name, func(b *testing.B) {
		defer contfrac.SetThresholds(contfrac.SetThresholds(contfrac.Minimal))
		for b.Loop() {
			contfrac.Product(x, y)
		}
		slow := seconds(func() { new(big.Int).Mul(x, y) })
		b.ReportMetric(slow/seconds(func() { contfrac.Product(x, y) }), "times-faster")
	})
}

// sweep reports the time of f with a threshold set to each value.
func sweep(b *testing.B, values []int, set func(*contfrac.Thresholds, int), f func()) {
	for _, value := range values {
		b.Run(fmt.Sprint(value), func(b *testing.B) {
			old := contfrac.SetThresholds(contfrac.Infinite)
			changed := old
			set(&changed, value)
			contfrac.SetThresholds(changed)
			defer contfrac.SetThresholds(old)
			for b.Loop() {
				f()
			}
		})
	}
}

// BenchmarkMatrixMul calibrates sevenThreshold: eight multiplications against seven.
func BenchmarkMatrixMul(b *testing.B) {
	for _, words := range []int{12, 24, 48, 200, 1000} {
		n := func(seed uint64) *big.Int { return pseudorandom(words*bits.UintSize, seed) }
		x, y := contfrac.NewMatrix(n(1), n(2), n(3), n(4)), contfrac.NewMatrix(n(5), n(6), n(7), n(8))
		b.Run(fmt.Sprintf("words=%d/from", words), func(b *testing.B) {
			sweep(b, []int{0, math.MaxInt}, func(t *contfrac.Thresholds, v int) { t.Seven = v }, func() { x.Mul(y) })
		})
	}
}

// BenchmarkWordLeaves calibrates wordLeaves.
func BenchmarkWordLeaves(b *testing.B) {
	terms := randomTerms(100_000)
	sweep(b, []int{1, 4, 8, 12, 16, 24, 32, 64}, func(t *contfrac.Thresholds, v int) { t.WordLeaves = v }, func() { contfrac.Continuant(terms) })
}

// BenchmarkFork calibrates forkBits.
func BenchmarkFork(b *testing.B) {
	terms := randomTerms(1_000_000)
	sweep(b, []int{1 << 14, 1 << 15, 1 << 16, 1 << 17, 1 << 18, 1 << 30}, func(t *contfrac.Thresholds, v int) { t.Fork = int64(v) }, func() { contfrac.Continuant(terms) })
}

// BenchmarkLehmer calibrates lehmerBits.
func BenchmarkLehmer(b *testing.B) {
	for _, size := range []int{20_000, 300_000} {
		p, q := pseudorandom(size, 1), pseudorandom(size, 2)
		b.Run(fmt.Sprintf("bits=%d/from", size), func(b *testing.B) {
			sweep(b, []int{1000, 2000, 4000, 8000, 16000}, func(t *contfrac.Thresholds, v int) { t.Lehmer = v }, func() { _, _ = contfrac.FromRatio(p, q) })
		})
	}
}

// BenchmarkLongQuotient calibrates longQuotient and divideUpTo: divisions
// against the halving, on numbers with quotients of these many bits.
func BenchmarkLongQuotient(b *testing.B) {
	for _, size := range [][2]int{{100, 200_000}, {250, 200_000}, {500, 200_000}, {1000, 200_000}, {1000, 2_000_000}} {
		var terms []*big.Int
		for i := range size[1] / size[0] {
			terms = append(terms, pseudorandom(size[0], uint64(i)))
		}
		f, _ := contfrac.NewFraction(terms...)
		p, q := f.Ratio()
		b.Run(fmt.Sprintf("quotients=%d/bits=%d/from", size[0], size[1]), func(b *testing.B) {
			sweep(b, []int{0, math.MaxInt}, func(t *contfrac.Thresholds, v int) { t.LongQuotient = v }, func() { _, _ = contfrac.FromRatio(p, q) })
		})
	}
}

// BenchmarkFromDigits calibrates fromDigitsSize.
func BenchmarkFromDigits(b *testing.B) {
	s := pseudorandom(1_000_000, 1).String()
	sweep(b, []int{1000, 3000, 10_000, 20_000, 50_000, math.MaxInt}, func(t *contfrac.Thresholds, v int) { t.FromDigits = v }, func() { contfrac.FromDigits(s) })
}

// BenchmarkLongWord takes the matrix of a word of ten million letters, and the
// word back out of the matrix.
func BenchmarkLongWord(b *testing.B) {
	var builder contfrac.WordBuilder
	bit := pseudorandom(10_000_000, 1)
	for i := range 10_000_000 {
		builder.Append(contfrac.Letter(bit.Bit(i)), 1)
	}
	w := builder.Word()
	m := w.Matrix()
	b.Run("Matrix", func(b *testing.B) {
		b.ReportAllocs()
		for b.Loop() {
			w.Matrix()
		}
	})
	b.Run("Factor", func(b *testing.B) {
		b.ReportAllocs()
		for b.Loop() {
			_, _ = m.Factor()
		}
	})
}

func BenchmarkConvergents(b *testing.B) {
	f, _ := contfrac.NewFraction(randomTerms(20_000)...)
	for b.Loop() {
		for range f.Convergents() {
		}
	}
}
