package orbifold

import (
	"context"
	"fmt"
	"math/big"
	"slices"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/farey"
)

// Triple is a solution of (E) in positive integers: the numbers at the vertices
// of a triangle, one for each class. The zero value is (1, 1, 1) of the
// classical family.
type Triple struct {
	family  Family
	numbers [3]*big.Int // by class; all nil for (1, 1, 1)
}

// NewTriple returns the triple with the numbers zero, infinity and one at the
// classes of 0/1, 1/0 and 1/1. Integers that do not solve (E) are
// ErrNotPositive or ErrNotSolution. Every solution is the triple of a
// triangle; Path says of which.
func (f Family) NewTriple(zero, infinity, one *big.Int) (Triple, error) {
	if err := f.Solves(zero, infinity, one); err != nil {
		return Triple{}, err
	}
	return f.triple([3]*big.Int{new(big.Int).Set(zero), new(big.Int).Set(infinity), new(big.Int).Set(one)}), nil
}

func (f Family) triple(numbers [3]*big.Int) Triple { return Triple{f, numbers} }

// Triple returns the numbers at the vertices of the triangle t. Cost and
// errors are those of Number at its newest vertex; the limit of the family is
// tested against three times the bits of the number there.
func (f Family) Triple(t farey.Triangle) (Triple, error) {
	newest, _ := t.Newest()
	if err := f.fits(context.Background(), t.Vertex(newest), 3); err != nil {
		return Triple{}, err
	}
	p := t.Path()
	if p.IsBase() {
		return Triple{family: f}, nil
	}
	e := f.exact().descend(p, always)
	var numbers [3]*big.Int
	for _, v := range [...]vertex[*big.Int]{e.a, e.b, e.front()} {
		numbers[v.class] = v.number
	}
	return f.triple(numbers), nil
}

// Family returns the family whose equation the triple solves.
func (t Triple) Family() Family { return t.family }

// At returns the number at the vertex of class c.
func (t Triple) At(c farey.Class) *big.Int { return new(big.Int).Set(t.at(c)) }

func (t Triple) at(c farey.Class) *big.Int {
	if int(c) >= len(t.numbers) {
		c = farey.Zero
	}
	if n := t.numbers[c]; n != nil {
		return n
	}
	return unit
}

var unit = big.NewInt(1)

// Numbers returns the numbers at the classes of 0/1, 1/0 and 1/1.
func (t Triple) Numbers() (zero, infinity, one *big.Int) {
	return t.At(farey.Zero), t.At(farey.Infinity), t.At(farey.One)
}

// Sorted returns the three numbers in increasing order.
func (t Triple) Sorted() [3]*big.Int {
	n := [3]*big.Int{t.At(farey.Zero), t.At(farey.Infinity), t.At(farey.One)}
	slices.SortFunc(n[:], (*big.Int).Cmp)
	return n
}

// Flip returns the triple with the number of class c exchanged by (X), the
// Vieta jump at c: u becomes K·v·w − k_v·w − k_w·v − u. Flipping twice gives
// the triple back.
func (t Triple) Flip(c farey.Class) Triple {
	if int(c) >= len(t.numbers) {
		c = farey.Zero
	}
	var v [3]vertex[*big.Int]
	for _, d := range classes {
		v[d] = vertex[*big.Int]{t.at(d), d}
	}
	u := t
	for _, d := range classes {
		u.numbers[d] = t.at(d)
	}
	u.numbers[c] = t.family.exact().flip(v[(c+1)%3], v[(c+2)%3], v[c]).number
	return u
}

// Largest returns the class of the largest number; false for (1, 1, 1). There
// are no ties: the vertex that the path to a triangle makes last has the
// strictly largest number, since u·u' = v² + k·v·w + w² > max(v, w)² ≥ u·max(v, w).
func (t Triple) Largest() (farey.Class, bool) {
	best, found := farey.Zero, false
	for _, c := range classes {
		if t.at(c).Cmp(t.at(best)) > 0 {
			best = c
		}
		found = found || t.at(c).Cmp(unit) > 0
	}
	return best, found
}

// Parent returns the triple from which the path reaches t by one flip: that of
// the largest number. False for (1, 1, 1).
func (t Triple) Parent() (Triple, bool) {
	c, ok := t.Largest()
	if !ok {
		return t, false
	}
	return t.Flip(c), true
}

// Path returns the path from the base triangle to the triangle whose triple t
// is, found by descent: flipping the largest number again and again ends at
// (1, 1, 1). Cost: one flip for each letter of the path.
// Source: "Generalization of Markov Diophantine equation via generalized
// cluster algebra", Electron. J. Combin. 30 (2023).
func (t Triple) Path() farey.Path {
	p, _ := t.PathContext(context.Background())
	return p
}

// PathContext is Path that stops when ctx ends, with its error: a triple far
// out along one fan has a long way back.
func (t Triple) PathContext(ctx context.Context) (farey.Path, error) {
	ctx = contextOf(ctx)
	var flipped []farey.Class
	for c, ok := t.Largest(); ok; c, ok = t.Largest() {
		if err := ctx.Err(); err != nil {
			return farey.Path{}, fmt.Errorf("orbifold: path to a triple: %w", err)
		}
		flipped = append(flipped, c)
		t = t.Flip(c)
	}
	if len(flipped) == 0 {
		return farey.Path{}, nil
	}
	slices.Reverse(flipped)
	// Each further flip keeps the vertex made last and replaces one end of the
	// edge before it.
	a, _ := firstEdge(flipped[0])
	newest := flipped[0]
	var moves contfrac.WordBuilder
	for _, c := range flipped[1:] {
		if c == a {
			a = newest
			moves.Append(contfrac.R, 1)
		} else {
			moves.Append(contfrac.L, 1)
		}
		newest = c
	}
	return farey.NewPath(flipped[0], moves.Word()), nil
}

// Triangle returns the triangle whose triple t is.
func (t Triple) Triangle() farey.Triangle { return t.Path().Triangle() }

// Equal tells whether two triples belong to the same weights and agree class
// by class.
func (t Triple) Equal(u Triple) bool {
	for _, c := range classes {
		if t.at(c).Cmp(u.at(c)) != 0 {
			return false
		}
	}
	return t.family.weights == u.family.weights
}

// String returns the numbers by class, "(5, 1, 2)".
func (t Triple) String() string {
	return fmt.Sprintf("(%s, %s, %s)", t.at(farey.Zero), t.at(farey.Infinity), t.at(farey.One))
}

// Format writes the numbers whole for %s and shortened for %v.
func (t Triple) Format(s fmt.State, verb rune) {
	if verb == 'v' {
		fmt.Fprintf(s, "(%s, %s, %s)", contfrac.Abbreviate(t.at(farey.Zero)), contfrac.Abbreviate(t.at(farey.Infinity)), contfrac.Abbreviate(t.at(farey.One)))
		return
	}
	fmt.Fprint(s, t.String())
}
