package survey

import (
	"context"
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
