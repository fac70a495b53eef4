package orbifold_test

import (
	"math/big"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
)

// plainTriple is the slow twin of the descent: it flips vertex by vertex by
// the first form of (X), u·u' = v² + k_u·v·w + w², with an exact division, and
// takes the classes to flip from the path. It returns the numbers by class and
// the class flipped last.
func plainTriple(f orbifold.Family, p farey.Path) (n [3]*big.Int, newest farey.Class) {
	n = [3]*big.Int{big.NewInt(1), big.NewInt(1), big.NewInt(1)}
	for u := range p.Flips() {
		v, w := n[(u+1)%3], n[(u+2)%3]
		sum := new(big.Int).Mul(v, v)
		sum.Add(sum, new(big.Int).Mul(w, w))
		kvw := new(big.Int).Mul(v, w)
		sum.Add(sum, kvw.Mul(kvw, big.NewInt(f.Weight(u))))
		q, r := sum.QuoRem(sum, n[u], new(big.Int))
		if r.Sign() != 0 {
			panic("the exchange rule divides")
		}
		n[u], newest = q, u
	}
	return n, newest
}

// plainNumber is the slow twin of Family.Number.
func plainNumber(f orbifold.Family, s farey.Slope) *big.Int {
	n, newest := plainTriple(f, s.Path())
	return n[newest]
}

// plainNumberMod steps with the second form of (X) modulo m, flip by flip.
func plainNumberMod(f orbifold.Family, s farey.Slope, m *big.Int) *big.Int {
	n := [3]*big.Int{big.NewInt(1), big.NewInt(1), big.NewInt(1)}
	newest := farey.Zero
	for u := range s.Path().Flips() {
		v, w := (u+1)%3, (u+2)%3
		x := new(big.Int).Mul(n[v], n[w])
		x.Mul(x, f.K())
		x.Sub(x, new(big.Int).Mul(big.NewInt(f.Weight(v)), n[w]))
		x.Sub(x, new(big.Int).Mul(big.NewInt(f.Weight(w)), n[v]))
		x.Sub(x, n[u])
		n[u], newest = x.Mod(x, m), u
	}
	return new(big.Int).Mod(n[newest], m)
}

// plainWord writes the word of an arc letter by letter from the definition of
// the crossings, with the middle crossing taken as middle.
func plainWord(f orbifold.Family, s farey.Slope, middle contfrac.Letter) contfrac.Word {
	var b contfrac.WordBuilder
	crossings, err := s.Crossings()
	if err != nil {
		panic(err)
	}
	letter := map[farey.Side]contfrac.Letter{farey.Left: contfrac.L, farey.Right: contfrac.R, farey.Middle: middle}
	for x := range crossings {
		for range f.Weight(x.Class) {
			b.Append(letter[x.Nearer], 1)
		}
		if x.Turn != farey.Middle {
			b.Append(letter[x.Turn], 1)
		}
	}
	return b.Word()
}
