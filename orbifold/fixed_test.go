package orbifold

import (
	"math/big"
	"math/rand"
	"testing"
)

// The errors promised by the fixed-point functions, against themselves at a far
// higher precision; what they are is checked on LogBig and Cosine against other
// methods.

// offBy returns |a/2^w − b/2^(w+extra)| in units of 2^−w.
func offBy(a, b *big.Int, extra uint) float64 {
	d := new(big.Int).Lsh(a, extra)
	d.Sub(d, b).Abs(d)
	x, _ := new(big.Float).SetMantExp(new(big.Float).SetInt(d), -int(extra)).Float64()
	return x
}

func TestFixedLogIsWithinOneUnit(t *testing.T) {
	r := rand.New(rand.NewSource(3))
	for _, w := range []uint{32, 40, 54, 82, 100, 130, 200, 400} {
		for range 500 {
			x := new(big.Int).Rand(r, new(big.Int).Lsh(unit, uint(1+r.Intn(300))))
			x.Add(x, unit)
			if off := offBy(fixedLog(x, w), fixedLog(x, w+300), 300); off >= 1 {
				t.Fatalf("ln %v with %d bits is off by %v", x, w, off)
			}
		}
		for _, e := range []int{0, 1, 2, 1000, 1 << 30} {
			if off := offBy(ln2Times(e, w), ln2Times(e, w+300), 300); off >= 1 {
				t.Fatalf("%d·ln 2 with %d bits is off by %v", e, w, off)
			}
		}
	}
}

func TestFixedCosineIsWithinOneUnit(t *testing.T) {
	for w := uint(8); w < 300; w++ {
		if off := offBy(piFixed(w), piFixed(w+200), 200); off >= 1 {
			t.Fatalf("π with %d bits is off by %v", w, off)
		}
		for _, n := range []int{2, 3, 4, 5, 7, 12, 100, MaxCosineOrder} {
			if off := offBy(cosineFixed(n, w), cosineFixed(n, w+200), 200); off >= 1 {
				t.Fatalf("2cos(π/%d) with %d bits is off by %v", n, w, off)
			}
		}
	}
}

func TestFixedElementOfACosineRingIsWithinItsBound(t *testing.T) {
	r := rand.New(rand.NewSource(5))
	for _, n := range []int{4, 5, 7, 12, 30, 101} {
		q, err := NewCosineRing(n)
		if err != nil {
			t.Fatal(err)
		}
		for _, prec := range []uint{64, 100, 200} {
			for range 30 {
				c := make([]*big.Int, q.Degree())
				for i := range c {
					c[i] = new(big.Int).Rand(r, new(big.Int).Lsh(unit, uint(1+r.Intn(200))))
					if r.Intn(2) == 0 {
						c[i].Neg(c[i])
					}
				}
				x := q.ring().element(c)
				v, e := x.fixed(prec)
				far, _ := x.fixed(prec + 1000)
				bound, _ := new(big.Float).SetInt(e).Float64()
				if off := offBy(v, far, 1000); off > bound+1e-9 {
					t.Fatalf("%v with %d bits is off by %v, more than %v", x, prec, off, bound)
				}
			}
		}
	}
}
