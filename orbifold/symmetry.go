package orbifold

import (
	"slices"

	"example.com/onecusp/farey"
)

// Symmetries returns the symmetry group of the family: the projective maps g
// permuting 0/1, 1/0 and 1/1 that keep its weights, k_{g(c)} = k_c for every
// class c. The numbers at s and g(s) are equal then. Six maps when all weights
// are equal, two when exactly two are, the identity alone otherwise; the
// identity comes first.
func (f Family) Symmetries() []farey.Symmetry {
	var group []farey.Symmetry
	for _, g := range farey.Symmetries() {
		if f.Under(g).weights == f.weights {
			group = append(group, g)
		}
	}
	return group
}

// Under returns the family f' with k'_c = k_{g(c)}; the number of f at g(s) is
// the number of f' at s.
func (f Family) Under(g farey.Symmetry) Family {
	h := f
	for _, c := range classes {
		h.weights[c] = f.weights[g.Class(c)]
	}
	return h
}

// Domain returns the ends of the closed interval of slopes that holds exactly
// one slope of each symmetry class: [0, 1/2] when all weights are equal, [−1, 1]
// for k₀ = k∞ alone, [1/2, ∞] for k₀ = k₁ alone, [0, 2] for k∞ = k₁ alone. When
// all weights differ there is no symmetry and every slope stands for itself: all
// is true then, and the ends mean nothing.
func (f Family) Domain() (lo, hi farey.Slope, all bool) {
	zero, infinity, one := f.weights[farey.Zero], f.weights[farey.Infinity], f.weights[farey.One]
	switch {
	case zero == infinity && infinity == one:
		return farey.Slope{}, half, false
	case zero == infinity:
		return minusOne, farey.One.Slope(), false
	case zero == one:
		return half, farey.Infinity.Slope(), false
	case infinity == one:
		return farey.Slope{}, two, false
	}
	return farey.Slope{}, farey.Slope{}, true
}

var (
	half     = farey.MustParse("1/2")
	two      = farey.MustParse("2/1")
	minusOne = farey.MustParse("-1/1")
)

// Representative returns the slope of the symmetry class of s that lies in
// the domain of Domain, for families without symmetry s itself.
func (f Family) Representative(s farey.Slope) farey.Slope {
	for _, g := range f.Symmetries() {
		if t := g.Apply(s); f.inDomain(t) {
			return t
		}
	}
	return s // not reached: the domain meets every class
}

func (f Family) inDomain(s farey.Slope) bool {
	lo, hi, all := f.Domain()
	return all || lo.Cmp(s) <= 0 && s.Cmp(hi) <= 0
}

// Equivalent tells whether a symmetry of the family takes s to t.
func (f Family) Equivalent(s, t farey.Slope) bool {
	return f.Representative(s).Equal(f.Representative(t))
}

// Orbit returns the symmetry class of s, increasing, 1/0 last.
func (f Family) Orbit(s farey.Slope) []farey.Slope {
	var orbit []farey.Slope
	for _, g := range f.Symmetries() {
		orbit = append(orbit, g.Apply(s))
	}
	slices.SortFunc(orbit, farey.Slope.Cmp)
	return slices.CompactFunc(orbit, farey.Slope.Equal)
}
