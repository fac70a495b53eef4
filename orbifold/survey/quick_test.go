package survey

import (
	"context"
	"math/big"
	"testing"
	"time"

	"example.com/onecusp/orbifold"
)

func TestQuick(t *testing.T) {
	for _, d := range []int{6, 9, 18, 100, 1300, 4000} {
		start := time.Now()
		n, s := 0, uint64(0)
		err := Walk(context.Background(), Up(orbifold.Family{}, PowerOfTen(d)), func(v *Visit) bool { n++; s += v.Mod64(); return true })
		t.Log(d, n, s, err, time.Since(start), float64(time.Since(start).Nanoseconds())/float64(n))
	}
	for _, k := range [][3]int64{{0, 0, 0}, {1, 1, 1}, {2, 0, 1}, {3, 0, 0}, {0, 0, 7}, {1, 5, 1}, {1 << 62, 1 << 40, 3}} {
		f := orbifold.MustNew(k[0], k[1], k[2])
		for _, all := range []bool{false, true} {
			r := Up(f, PowerOfTen(150))
			r.All = all
			n := 0
			var sum, want uint64
			_ = Walk(context.Background(), r, func(v *Visit) bool { n++; sum += v.Mod64() * uint64(v.Num()+1234567*v.Den()); return true })
			m := 0
			lo, hi, every := f.Domain()
			for x := range f.Within(r.Bound) {
				if all || every || lo.Cmp(x.Slope()) <= 0 && x.Slope().Cmp(hi) <= 0 {
					m++
					p, q, _ := x.Slope().Int64s()
					want += low64(x.Number()) * uint64(p+1234567*q)
				}
			}
			if n != m || sum != want {
				t.Error(k, all, n, m)
			}
			t.Log(k, all, n, m)
		}
	}
	_ = big.NewInt
}
