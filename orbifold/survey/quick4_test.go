package survey

import (
	"context"
	"testing"
	"time"

	"example.com/onecusp/orbifold"
)

func TestQuick4(t *testing.T) {
	for _, k := range [][3]int64{{0, 0, 0}, {1, 1, 1}, {2, 0, 1}, {3, 0, 0}, {0, 0, 7}, {1, 5, 1}, {0, 5, 0}, {0, 1, 2}, {1 << 62, 1 << 40, 3}} {
		f := orbifold.MustNew(k[0], k[1], k[2])
		for _, d := range []int{0, 1, 6, 9, 18, 100, 1000} {
			start := time.Now()
			r, err := Distinct(context.Background(), f, PowerOfTen(d), Options{})
			if err != nil {
				t.Error(d, err)
			}
			if d == 100 || d == 1000 && len(r.Coincidences) < 20 {
				t.Logf("%v %v %v", d, r, time.Since(start))
			}
		}
	}
}
