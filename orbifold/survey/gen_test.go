package survey

import (
	"math/big"

	"pgregory.net/rapid"

	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
)

// tenFamilies have equal, partly equal and different weights, small and huge.
func tenFamilies() []orbifold.Family {
	var list []orbifold.Family
	for _, k := range [][3]int64{
		{0, 0, 0}, {1, 1, 1}, {2, 2, 2}, // all equal
		{3, 0, 0}, {1, 5, 1}, {0, 0, 7}, // two equal: k∞ = k₁, k₀ = k₁, k₀ = k∞
		{2, 0, 1}, {0, 1, 2}, {1, 2, 3}, {1 << 62, 1 << 40, 3}, // all different
	} {
		list = append(list, orbifold.MustNew(k[0], k[1], k[2]))
	}
	return list
}

// families draws weights: zero, small, partly equal, now and then large, also such
// that K is 0 modulo a power of two or modulo 2⁶¹ − 1.
func families() *rapid.Generator[orbifold.Family] {
	weight := rapid.OneOf(rapid.Just(int64(0)), rapid.Int64Range(0, 9), rapid.SampledFrom([]int64{
		1, 5, 13, 1<<61 - 4, 1<<61 - 1, 1<<62 - 3, 1<<63 - 1,
	}))
	return rapid.Custom(func(t *rapid.T) orbifold.Family {
		k := [3]int64{weight.Draw(t, "k₀"), weight.Draw(t, "k∞"), weight.Draw(t, "k₁")}
		switch rapid.IntRange(0, 4).Draw(t, "which are equal") {
		case 0:
			k[1], k[2] = k[0], k[0]
		case 1:
			k[1] = k[0]
		case 2:
			k[2] = k[1]
		}
		return orbifold.MustNew(k[0], k[1], k[2])
	})
}

// bounds draws bounds of up to some digits: 1, small, powers of two and ten, numbers of
// the family themselves and their neighbours.
func bounds(f orbifold.Family, digits int) *rapid.Generator[*big.Int] {
	return rapid.Custom(func(t *rapid.T) *big.Int {
		switch rapid.IntRange(0, 3).Draw(t, "kind of bound") {
		case 0:
			return big.NewInt(rapid.Int64Range(1, 300).Draw(t, "bound"))
		case 1:
			return PowerOfTen(rapid.IntRange(0, digits).Draw(t, "digits"))
		case 2:
			n := new(big.Int).Lsh(big.NewInt(1), uint(rapid.IntRange(0, 3*digits).Draw(t, "bits")))
			return n.Add(n, big.NewInt(rapid.Int64Range(0, 5).Draw(t, "more")))
		}
		steps := rapid.IntRange(0, 200).Draw(t, "which number")
		limit := PowerOfTen(digits)
		n := big.NewInt(1)
		for node := range f.Ascending() {
			if steps--; steps < 0 || node.Number().Cmp(limit) > 0 {
				break
			}
			n = node.Number()
		}
		n.Add(n, big.NewInt(rapid.Int64Range(-1, 1).Draw(t, "beside")))
		if n.Sign() <= 0 {
			n.SetInt64(1)
		}
		return n
	})
}

// found is what the plain model knows of a slope.
type found struct {
	slope  farey.Slope
	number *big.Int
	node   orbifold.Node
}

// brute lists a region by plain enumeration with exact numbers: every slope up to
// the bound by Family.Within, filtered by the definition of each constraint.
func brute(r Region) []found {
	var list []found
	lo, hi, every := r.Family.Domain()
	for n := range r.Family.Within(r.Bound) {
		s := n.Slope()
		p, q, _ := s.Int64s()
		ok := r.All || every || lo.Cmp(s) <= 0 && s.Cmp(hi) <= 0
		if r.Box != nil {
			ok = ok && max(p, -p) <= r.Box.Num && q <= r.Box.Den
		}
		if r.Among != nil {
			ok = ok && r.Among.Lo.Cmp(s) <= 0 && s.Cmp(r.Among.Hi) <= 0
		}
		for _, f := range r.Fans {
			ok = ok && farey.Neighbours(f, s)
		}
		for _, l := range r.Lines {
			ok = ok && l.A*q+l.B*p == l.C
		}
		if ok {
			list = append(list, found{s, n.Number(), n})
		}
	}
	return list
}

// regions draws constraints that leave something now and then.
func regions(f orbifold.Family, digits int) *rapid.Generator[Region] {
	slope := rapid.Custom(func(t *rapid.T) farey.Slope {
		s, err := farey.FromInts(rapid.Int64Range(-9, 9).Draw(t, "p"), rapid.Int64Range(1, 9).Draw(t, "q"))
		if err != nil || rapid.IntRange(0, 9).Draw(t, "infinite") == 0 {
			return farey.Infinity.Slope()
		}
		return s
	})
	return rapid.Custom(func(t *rapid.T) Region {
		r := Region{Family: f, Bound: bounds(f, digits).Draw(t, "bound"), All: rapid.Bool().Draw(t, "all")}
		if rapid.Bool().Draw(t, "box") {
			r.Box = &Box{rapid.Int64Range(0, 40).Draw(t, "box p"), rapid.Int64Range(0, 40).Draw(t, "box q")}
		}
		if rapid.Bool().Draw(t, "interval") {
			r.Among = &Interval{slope.Draw(t, "lo"), slope.Draw(t, "hi")}
		}
		if rapid.IntRange(0, 2).Draw(t, "fan") == 0 {
			r.Fans = []farey.Slope{slope.Draw(t, "about")}
		}
		if rapid.IntRange(0, 2).Draw(t, "line") == 0 {
			l := Line{rapid.Int64Range(-3, 3).Draw(t, "a"), rapid.Int64Range(-3, 3).Draw(t, "b"), rapid.Int64Range(-20, 20).Draw(t, "c")}
			if l.A != 0 || l.B != 0 {
				r.Lines = []Line{l}
			}
		}
		return r
	})
}
