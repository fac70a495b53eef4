package contfrac_test

import (
	"fmt"
	"testing"

	"example.com/onecusp/contfrac"
)

// BenchmarkPeriod follows a long period in words and with big integers; see
// wordRootBits.
func BenchmarkPeriod(b *testing.B) {
	x, err := contfrac.SurdOf(0, 1_000_000_000_061, 1)
	if err != nil {
		b.Fatal(err)
	}
	for _, bits := range []int{61, 0} {
		b.Run(fmt.Sprintf("upto=%d", bits), func(b *testing.B) {
			defer contfrac.SetWordRootBits(contfrac.SetWordRootBits(bits))
			n := 0
			for b.Loop() {
				p, err := x.Periodic()
				if err != nil {
					b.Fatal(err)
				}
				n = p.Period().Len()
			}
			b.ReportMetric(float64(b.Elapsed().Nanoseconds())/float64(b.N)/float64(n), "ns/term")
		})
	}
}

// BenchmarkCycle takes conjugates of a long word by a matrix as large.
func BenchmarkCycle(b *testing.B) {
	for _, runs := range []int{1000, 100_000} {
		b.Run(fmt.Sprintf("runs=%d", runs), func(b *testing.B) {
			var w, u contfrac.WordBuilder
			for i := range runs {
				w.Append(contfrac.Letter(i%2), 1+uint64(i*i%7)/3)
				u.Append(contfrac.Letter(i%2), 1+uint64(i*i%11)/5)
			}
			g := u.Word().Matrix()
			inverse, err := g.Inverse()
			if err != nil {
				b.Fatal(err)
			}
			m := g.Mul(w.Word().Matrix()).Mul(inverse)
			for b.Loop() {
				if _, err := m.Cycle(); err != nil {
					b.Fatal(err)
				}
			}
			b.ReportMetric(float64(m.A().BitLen()), "bits")
		})
	}
}

func BenchmarkDecimal(b *testing.B) {
	x, err := contfrac.SurdOf(3, 221, 10)
	if err != nil {
		b.Fatal(err)
	}
	for _, digits := range []int{100, 10_000, contfrac.MaxDigits} {
		b.Run(fmt.Sprintf("digits=%d", digits), func(b *testing.B) {
			for b.Loop() {
				if _, err := x.Decimal(digits); err != nil {
					b.Fatal(err)
				}
			}
		})
	}
}

// BenchmarkReduced reduces a form with coefficients of some 14 000 bits.
func BenchmarkReduced(b *testing.B) {
	var u contfrac.WordBuilder
	for i := range uint64(10_000) {
		u.Append(contfrac.Letter(i%2), 1)
	}
	f, err := contfrac.Form{}.Apply(u.Word().Matrix())
	if err != nil {
		b.Fatal(err)
	}
	for b.Loop() {
		f.Reduced()
	}
	b.ReportMetric(float64(f.A().BitLen()), "bits")
}
