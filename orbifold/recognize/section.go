package recognize

import (
	"math/big"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/orbifold"
)

// section is a way to see a sequence of trace T as every d-th term of one of
// trace t: T = V_d(t) for the Lucas sequence of t.
type section struct {
	d int64
	t *big.Int
}

// weights returns the possible values of (c·N, c'·N) for the weights c, c' of
// the arcs of even and odd index of a fan of trace t, from the E_j of every
// d-th term:
//
//	E = N·(G·(t·c_m + 2·c_{m+1}) + [d odd]·c_m),  G = U_⌊d/2⌋·U_⌈d/2⌉
//
// at the arc m of the fan.
func (x section) weights(even, odd *big.Int) ([][2]*big.Int, error) {
	if x.d == 1 {
		if even.Sign() < 0 || odd.Sign() < 0 {
			return nil, nil
		}
		return [][2]*big.Int{{even, odd}}, nil
	}
	u, _, err := orbifold.Lucas(uint64(x.d/2), x.t)
	if err != nil {
		return nil, err
	}
	u1, _, err := orbifold.Lucas(uint64(x.d-x.d/2), x.t)
	if err != nil {
		return nil, err
	}
	g := contfrac.Product(u, u1)
	if x.d%2 == 1 {
		// p·c + q·c' = even, q·c + p·c' = odd, with p > q.
		p := contfrac.Product(g, x.t)
		p.Add(p, big.NewInt(1))
		q := new(big.Int).Lsh(g, 1)
		det := contfrac.Product(p, p)
		det.Sub(det, contfrac.Product(q, q))
		solve := func(e, f *big.Int) (*big.Int, bool) {
			n := contfrac.Product(p, e)
			return exact(n.Sub(n, contfrac.Product(q, f)), det)
		}
		c, ok1 := solve(even, odd)
		c1, ok2 := solve(odd, even)
		if !ok1 || !ok2 {
			return nil, nil
		}
		return [][2]*big.Int{{c, c1}}, nil
	}
	if even.Cmp(odd) != 0 {
		return nil, nil
	}
	b, ok := exact(even, g)
	if !ok {
		return nil, nil
	}
	// t·u + 2·v = b for u = c·N and v = c'·N < K·N − k = t.
	var pairs [][2]*big.Int
	most := new(big.Int).Quo(b, x.t)
	for i := range int64(2) {
		c := new(big.Int).Sub(most, big.NewInt(i))
		rest := contfrac.Product(x.t, c)
		rest.Sub(b, rest)
		if c.Sign() >= 0 && rest.Bit(0) == 0 {
			pairs = append(pairs, [2]*big.Int{c, rest.Rsh(rest, 1)})
		}
	}
	return pairs, nil
}

// exact returns n/d ≥ 0 for d > 0, if it is an integer.
func exact(n, d *big.Int) (*big.Int, bool) {
	if n.Sign() < 0 {
		return nil, false
	}
	q, r := new(big.Int).QuoRem(n, d, new(big.Int))
	return q, r.Sign() == 0
}

// next returns the arc y₁ of the fan from y₀ and y_d, by the closed form:
// z_n = y_n − e_n is z_d = U_d·z₁ − U_{d−1}·z₀, where e_n has period two and
// (t²−4)·e_n = t·w_n + 2·w_{n+1} for the weights w times N.
func (x section) next(y0, yd *big.Int, w [2]*big.Int) (*big.Int, bool) {
	if x.d == 1 {
		return yd, true
	}
	u, v, err := orbifold.Lucas(uint64(x.d), x.t)
	if err != nil {
		return nil, false
	}
	before := contfrac.Product(x.t, u) // 2·U_{d−1} = t·U_d − V_d
	before.Sub(before, v).Rsh(before, 1)
	d := discriminant(x.t) // all below is multiplied by it
	z0 := contfrac.Product(d, y0)
	z0.Sub(z0, x.resting(w, 0))
	zd := contfrac.Product(d, yd)
	zd.Sub(zd, x.resting(w, x.d)).Add(zd, contfrac.Product(before, z0))
	z1, r := zd.QuoRem(zd, u, new(big.Int))
	if r.Sign() != 0 {
		return nil, false
	}
	y1, ok := exact(z1.Add(z1, x.resting(w, 1)), d)
	return y1, ok && y1.Sign() > 0
}

// narrowest returns the j ≥ 0 with the least y_{−j}, and that term and
// y_{1−j}, for y₀ ≤ y₁. With D·y_n = Z_n + R_n for D = t² − 4 and the resting part R of
// next, Z_{−j} = U_{j+1}·Z₀ − U_j·Z₁. Since a fan is convex, j is found by doubling
// and halving.
func (x section) narrowest(w, y [2]*big.Int) (j int64, low, above *big.Int) {
	d := discriminant(x.t)
	var z [2]*big.Int
	for n := range z {
		z[n] = contfrac.Product(d, y[n])
		z[n].Sub(z[n], x.resting(w, int64(n)))
	}
	at := func(j int64) *big.Int {
		if j <= 0 {
			return y[-j]
		}
		u, v, err := orbifold.Lucas(uint64(j), x.t)
		if err != nil {
			return nil
		}
		after := contfrac.Product(x.t, u) // 2·U_{j+1} = t·U_j + V_j
		after.Add(after, v).Rsh(after, 1)
		r := contfrac.Product(after, z[0])
		r.Sub(r, contfrac.Product(u, z[1])).Add(r, x.resting(w, j))
		return r.Quo(r, d)
	}
	// rises tells whether the fan no longer falls from y_{−j} to y_{−j−1}.
	rises := func(j int64) bool {
		a, b := at(j+1), at(j)
		return a == nil || b == nil || a.Cmp(b) >= 0
	}
	below, top := int64(-1), int64(0) // rises(−1) is false, or j = 0 is right too
	for !rises(top) {
		below, top = top, 2*top+1
	}
	for below+1 < top {
		if mid := below + (top-below)/2; rises(mid) {
			top = mid
		} else {
			below = mid
		}
	}
	return top, at(top), at(top - 1)
}

// discriminant returns t² − 4.
func discriminant(t *big.Int) *big.Int {
	d := contfrac.Product(t, t)
	return d.Sub(d, big.NewInt(4))
}

// resting returns t·w_n + 2·w_{n+1}: t² − 4 times the part of the closed form
// that has period two.
func (x section) resting(w [2]*big.Int, n int64) *big.Int {
	e := contfrac.Product(x.t, w[n&1])
	return e.Add(e, new(big.Int).Lsh(w[(n+1)&1], 1))
}
