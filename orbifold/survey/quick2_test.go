package survey

import (
	"context"
	"math/big"
	"testing"
	"time"

	"example.com/onecusp/orbifold"
)

func TestQuick2(t *testing.T) {
	for _, d := range []int{6, 9, 18, 100, 1300, 15000, 100000, 1000000} {
		start := time.Now()
		rows, err := Table(context.Background(), orbifold.Family{}, []*big.Int{PowerOfTen(d)}, Options{})
		if err != nil {
			t.Fatal(err)
		}
		t.Log(d, rows[0].Slopes, rows[0].All, rows[0].X, err, time.Since(start))
		if d < 2000 {
			x, err := Sweep(context.Background(), Up(orbifold.Family{}, PowerOfTen(d)), Tally(), Options{})
			t.Log(x, err)
		}
	}
}
