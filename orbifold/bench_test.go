package orbifold_test

import (
	"context"
	"fmt"
	"math"
	"math/big"
	"math/rand"
	"os"
	"os/exec"
	"path/filepath"
	"strings"
	"testing"
	"time"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
)

// far lists the slopes of the speed budget.
var far = []struct{ name, slope string }{
	{"golden", "9227465/14930352"},
	{"fan", "1/1000000"},
	{"mixed", "271828/3141592"},
}

// best returns the shortest of n timings of f.
func best(n int, f func()) time.Duration {
	least := time.Duration(1<<63 - 1)
	for range n {
		start := time.Now()
		f()
		least = min(least, time.Since(start))
	}
	return least
}

// BenchmarkNumber times Number at the slopes of the budget. When ONECUSP_ANCHOR
// names the C file number_gmp.c, and gcc with GMP is there, it also builds and runs that and
// reports the ratio of the two best times, taken in turns.
func BenchmarkNumber(b *testing.B) {
	anchor := buildAnchor(b)
	for _, x := range far {
		b.Run(x.name, func(b *testing.B) {
			s := farey.MustParse(x.slope)
			for b.Loop() {
				_, _ = orbifold.Family{}.Number(s)
			}
			if anchor == "" {
				return
			}
			p, q, _ := strings.Cut(x.slope, "/")
			ours, theirs := time.Duration(1<<63-1), time.Duration(1<<63-1)
			for range 5 {
				ours = min(ours, best(3, func() { _, _ = orbifold.Family{}.Number(s) }))
				out, err := exec.Command(anchor, p, q, "3").Output()
				if err != nil {
					b.Fatal(err)
				}
				var ns float64
				if _, err := fmt.Sscan(string(out), &ns); err != nil {
					b.Fatal(err)
				}
				theirs = min(theirs, time.Duration(ns))
			}
			b.ReportMetric(float64(ours)/float64(theirs), "×gmp")
		})
	}
}

func buildAnchor(b *testing.B) string {
	source := os.Getenv("ONECUSP_ANCHOR")
	if source == "" {
		return ""
	}
	program := filepath.Join(b.TempDir(), "number_gmp")
	if out, err := exec.Command("gcc", "-O2", source, "-o", program, "-lgmp").CombinedOutput(); err != nil {
		b.Fatalf("%v: %s", err, out)
	}
	return program
}

// BenchmarkNumberAgainstStepping times one plain stepping of the fan at 1/1000000
// with math/big against Number; budget: at least 20 times faster.
func BenchmarkNumberAgainstStepping(b *testing.B) {
	const n = 1_000_000
	s := farey.MustParse(fmt.Sprintf("1/%d", n))
	start := time.Now()
	y0, y1, t := big.NewInt(1), big.NewInt(1), big.NewInt(3)
	next := new(big.Int)
	for range n { // from (1/0, 1/1) to (1/(n−1), 1/n)
		next.Mul(t, y1)
		y0.Sub(next, y0)
		y0, y1 = y1, y0
	}
	plain := time.Since(start)
	number, err := orbifold.Family{}.Number(s)
	if err != nil || number.Cmp(y0) != 0 {
		b.Fatal("stepping and jumping disagree", err)
	}
	for b.Loop() {
		_, _ = orbifold.Family{}.Number(s)
	}
	b.ReportMetric(float64(plain)/float64(best(3, func() { _, _ = orbifold.Family{}.Number(s) })), "×faster")
}

// digits returns a slope with numerator and denominator of n random digits.
func digits(n int) farey.Slope {
	r := rand.New(rand.NewSource(int64(n)))
	top := new(big.Int).Exp(big.NewInt(10), big.NewInt(int64(n)), nil)
	bottom := new(big.Int).Quo(top, big.NewInt(10))
	draw := func() *big.Int {
		x := new(big.Int).Rand(r, new(big.Int).Sub(top, bottom))
		return x.Add(x, bottom)
	}
	s, err := farey.New(draw(), draw())
	if err != nil {
		panic(err)
	}
	return s
}

// BenchmarkNumberMod: budget 5 ms with a modulus of 256 bits.
func BenchmarkNumberMod(b *testing.B) {
	s := digits(1000)
	f := orbifold.MustNew(1, 0, 2)
	m := new(big.Int).Lsh(big.NewInt(1), 256)
	m.Sub(m, big.NewInt(189))
	b.Run("256bits", func(b *testing.B) {
		for b.Loop() {
			_, _ = f.NumberMod(s, m)
		}
	})
	word := new(big.Int).SetUint64(orbifold.Primes()[0])
	b.Run("word", func(b *testing.B) {
		for b.Loop() {
			_, _ = f.NumberMod(s, word)
		}
	})
	b.Run("root", func(b *testing.B) {
		for b.Loop() {
			_, _, _ = f.RootMod(s, m)
		}
	})
}

// BenchmarkLogBig: budget 10 ms at 64 bits.
func BenchmarkLogBig(b *testing.B) {
	s := digits(1000)
	for b.Loop() {
		_, _, _ = orbifold.Family{}.LogBig(s, 64)
	}
}

// BenchmarkLog: budget 5 ms and a relative width of at most 2⁻⁴⁰.
func BenchmarkLog(b *testing.B) {
	s := digits(300)
	var lo, hi float64
	for b.Loop() {
		lo, hi, _ = orbifold.Family{}.Log(s)
	}
	b.ReportMetric((hi-lo)/lo*(1<<40), "width·2⁴⁰")
}

func BenchmarkCompare(b *testing.B) {
	s, t := digits(1000), digits(999)
	for b.Loop() {
		_, _ = orbifold.Family{}.Compare(s, t)
	}
}

// BenchmarkGrowth shows time against result bits for golden, mixed and extreme
// slopes; b.N is not what it is about, so one run of each is enough. ns/bit is
// the slope of the curve.
func BenchmarkGrowth(b *testing.B) {
	for _, bits := range []int64{10_000, 100_000, 1_000_000, 10_000_000, 100_000_000} {
		for _, kind := range []string{"golden", "mixed", "extreme"} {
			s := sized(kind, bits)
			_, size, err := orbifold.Family{}.Bits(s)
			if err != nil {
				b.Fatal(err)
			}
			b.Run(fmt.Sprintf("%s/%d", kind, bits), func(b *testing.B) {
				for b.Loop() {
					_, _ = orbifold.Family{}.Number(s)
				}
				b.ReportMetric(float64(b.Elapsed().Nanoseconds())/float64(b.N)/float64(size.Int64()), "ns/bit")
				b.ReportMetric(float64(size.Int64()), "bits")
			})
		}
	}
}

// sized returns a slope of a kind whose number has at most some bits, and more
// than a third of them.
func sized(kind string, bits int64) farey.Slope {
	r := rand.New(rand.NewSource(7))
	best := farey.MustParse("1/2")
	var w contfrac.WordBuilder
	if kind == "extreme" { // one long run: 2·ln φ/ln 2 = 1.3885 bits a flip
		w.Append(contfrac.L, uint64(float64(bits)/1.3885)-10)
		s, _ := farey.NewPath(farey.Infinity, w.Word()).Slope()
		return s
	}
	letter := contfrac.L
	for {
		n := uint64(1)
		if kind == "mixed" { // run lengths as in random slopes
			n = uint64(1 / (1 - 0.99*r.Float64()))
		}
		w.Append(letter, n)
		letter = letter.Other()
		s, _ := farey.NewPath(farey.Infinity, w.Word()).Slope()
		_, size, err := orbifold.Family{}.Bits(s)
		if err != nil || !size.IsInt64() || size.Int64() > bits {
			return best
		}
		best = s
	}
}

// BenchmarkIdentify: budget 50 ms at 1000 digits and 2 s at 10,000, hit or miss,
// in the classical family.
func BenchmarkIdentify(b *testing.B) {
	for _, digits := range []int{100, 1000, 10_000} {
		// A number of that many digits: slopes p/q with p/q near 1/e.
		q := int64(float64(digits) * math.Ln10 / 1.02)
		s, err := farey.FromInts(q*1000/2718, q)
		if err != nil {
			b.Fatal(err)
		}
		n, err := orbifold.Family{}.Number(s)
		if err != nil {
			b.Fatal(err)
		}
		for name, n := range map[string]*big.Int{"hit": n, "miss": new(big.Int).Add(n, big.NewInt(1))} {
			b.Run(fmt.Sprintf("%s/%d", name, digits), func(b *testing.B) {
				for b.Loop() {
					_, _ = orbifold.Family{}.Identify(context.Background(), n)
				}
				b.ReportMetric(float64(len(n.String())), "digits")
			})
		}
	}
}

func BenchmarkNearest(b *testing.B) {
	n := new(big.Int).Exp(big.NewInt(10), big.NewInt(1000), nil)
	for b.Loop() {
		_, _, _ = orbifold.Family{}.Nearest(context.Background(), n, 5)
	}
}

func BenchmarkMatrix(b *testing.B) {
	for _, x := range far[1:] {
		b.Run(x.name, func(b *testing.B) {
			s := farey.MustParse(x.slope)
			for b.Loop() {
				_, _ = orbifold.Family{}.Matrix(s)
			}
		})
	}
}
