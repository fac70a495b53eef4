package spectrum_test

import (
	"testing"

	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
	"example.com/onecusp/orbifold/spectrum"
)

// BenchmarkIdentifyRoot goes from a number and a root back to the slope, and
// for comparison to the matrix from the slope: classical numbers of about 1000, 10 000 and 100 000
// digits.
func BenchmarkIdentifyRoot(b *testing.B) {
	f := orbifold.Family{}
	for _, text := range []string{"610/1597", "4181/17711", "46368/196418"} {
		s := farey.MustParse(text)
		n, err := f.Number(s)
		if err != nil {
			b.Fatal(err)
		}
		y, err := spectrum.Root(f, s)
		if err != nil {
			b.Fatal(err)
		}
		b.Run(text+"/back", func(b *testing.B) {
			for b.Loop() {
				found, err := spectrum.IdentifyRoot(background, f, n, y)
				if err != nil || len(found) == 0 {
					b.Fatal(found, err)
				}
			}
			b.ReportMetric(float64(n.BitLen())*0.30103, "digits")
		})
		b.Run(text+"/there", func(b *testing.B) {
			for b.Loop() {
				if _, err := f.Matrix(s); err != nil {
					b.Fatal(err)
				}
			}
		})
	}
}

func BenchmarkPeriod(b *testing.B) {
	s := farey.MustParse("10946/28657")
	for b.Loop() {
		if _, err := spectrum.Period(orbifold.Family{}, s); err != nil {
			b.Fatal(err)
		}
	}
}

func BenchmarkLagrangeValueDecimal(b *testing.B) {
	v, err := spectrum.LagrangeValue(orbifold.Family{}, farey.MustParse("610/1597"))
	if err != nil {
		b.Fatal(err)
	}
	for b.Loop() {
		if _, err := v.Decimal(10_000); err != nil {
			b.Fatal(err)
		}
	}
}
