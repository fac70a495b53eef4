package survey

import (
	"context"
	"testing"
	"time"

	"example.com/onecusp/orbifold"
)

func TestQuick3(t *testing.T) {
	for _, k := range [][3]int64{{0, 0, 0}, {1, 1, 1}, {2, 0, 1}, {3, 0, 0}, {0, 0, 7}, {1, 5, 1}, {0, 5, 0}, {1 << 62, 1 << 40, 3}} {
		f := orbifold.MustNew(k[0], k[1], k[2])
		for _, d := range []int{0, 1, 6, 9, 18, 100, 500} {
			start := time.Now()
			a, dg, err := Check(context.Background(), f, PowerOfTen(d), Options{})
			if err != nil {
				t.Error(d, dg, err)
			}
			if d == 500 {
				t.Logf("%v %+v %v %v", d, a, dg, time.Since(start))
			}
		}
	}
}
