package survey

import (
	"context"
	"fmt"
	"testing"

	"example.com/onecusp/orbifold"
)

// BenchmarkWalk measures the walk with a trivial visitor: the metric is slopes a
// second on one core.
func BenchmarkWalk(b *testing.B) {
	for _, f := range []orbifold.Family{{}, orbifold.MustNew(2, 0, 1)} {
		b.Run(f.String(), func(b *testing.B) {
			n := 0
			for b.Loop() {
				_ = Walk(context.Background(), Up(f, PowerOfTen(3000)), func(*Visit) bool { n++; return true })
			}
			b.ReportMetric(float64(n)/b.Elapsed().Seconds()/1e6, "Mslopes/s")
		})
	}
}

// BenchmarkKeys calibrates bucketKeys and maxBuckets: it deals keys into buckets and
// finds the repeated ones, on one worker. The metric is nanoseconds a key.
func BenchmarkKeys(b *testing.B) {
	const n = 1 << 25
	for _, size := range []int{1 << 14, 1 << 15, 1 << 16, 1 << 17, 1 << 18} {
		b.Run(fmt.Sprint(size), func(b *testing.B) {
			tune(b, size, 1<<14)
			p, ok := newPlan(n, 1, 1<<30)
			if !ok || p.passes(0) != 1 {
				b.Fatal("more than one pass")
			}
			space := newKeySpace(p, 1)
			for b.Loop() {
				space.begin(0)
				for i := range uint64(n) {
					space.workers[0].put(i * keyFactor)
				}
				if _, err := space.repeated(context.Background()); err != nil {
					b.Fatal(err)
				}
			}
			b.ReportMetric(float64(b.Elapsed().Nanoseconds())/float64(b.N)/n, "ns/key")
		})
	}
}

// BenchmarkDistinct measures the proof for Markov numbers, without and with a memory
// budget that takes several passes; the metric is slopes a second, all of them counted once.
func BenchmarkDistinct(b *testing.B) {
	for _, memory := range []int64{DefaultMemory, 64 << 20} {
		b.Run(fmt.Sprintf("%dMiB", memory>>20), func(b *testing.B) {
			n := 0.0
			for b.Loop() {
				r, err := Distinct(context.Background(), orbifold.Family{}, PowerOfTen(4000), Options{MemoryBytes: memory})
				if err != nil {
					b.Fatal(err)
				}
				n += float64(r.Slopes.Int64())
			}
			b.ReportMetric(n/b.Elapsed().Seconds()/1e6, "Mslopes/s")
		})
	}
}

// BenchmarkCount measures the count without a walk, of 2.2·10⁸ and 9.6·10⁹ slopes.
func BenchmarkCount(b *testing.B) {
	for _, digits := range []int{15_000, 100_000} {
		b.Run(fmt.Sprint(digits), func(b *testing.B) {
			for b.Loop() {
				if _, err := Count(context.Background(), orbifold.Family{}, PowerOfTen(digits)); err != nil {
					b.Fatal(err)
				}
			}
		})
	}
}

// BenchmarkCheck measures the walk with the books of the audit.
func BenchmarkCheck(b *testing.B) {
	n := 0.0
	for b.Loop() {
		_, d, err := Check(context.Background(), orbifold.Family{}, PowerOfTen(3000), Options{Workers: 1})
		if err != nil {
			b.Fatal(err)
		}
		n += float64(d.Slopes)
	}
	b.ReportMetric(n/b.Elapsed().Seconds()/1e6, "Mslopes/s")
}

func BenchmarkGrowth(b *testing.B) {
	for b.Loop() {
		_, _, _ = Growth(context.Background(), orbifold.Family{})
	}
}
