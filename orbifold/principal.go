package orbifold

import (
	"fmt"

	"example.com/onecusp/farey"
	"example.com/onecusp/snake"
)

// FPolynomial returns the F-polynomial of the arc of slope s in the classical
// family, in the variables 1, 2 and 3 for y₀, y∞, y₁ (Text writes these names): the sum over the perfect
// matchings of its snake graph of the product of y over the flipped tiles, each
// by the class of its diagonal. With principal coefficients at the base
// triangle, whose quiver has two arrows from 0/1 to 1/0, two from 1/0 to 1/1
// and two from 1/1 to 0/1, it is the cluster variable with x₀ = x∞ = x₁ = 1.
// Its constant term is 1 (the minimal matching) and its value at y = 1 the
// Markov number.
//
// Limit and error are those of Laurent. Source: "Positivity for cluster algebras from
// surfaces", Adv. Math. 227 (2011).
func FPolynomial(s farey.Slope) (snake.Laurent, error) {
	g, err := (Family{}).expandable(s, "F-polynomial")
	if err != nil {
		return snake.Laurent{}, err
	}
	var diagonal []snake.Laurent
	for t := range g.AllTiles() {
		diagonal = append(diagonal, monomial(labelled(t.Diagonal)))
	}
	p, err := snake.Weigh(snake.Laurents{}, g, snake.Weights[snake.Laurent]{
		Tile: func(tile int) snake.Laurent { return diagonal[tile-1] },
	})
	if err != nil {
		return snake.Laurent{}, fmt.Errorf("orbifold: F-polynomial of %v: %w", s, err)
	}
	return p, nil
}

// GVector returns the g-vector of the arc of slope s in the classical family:
// the exponents of x₀, x∞, x₁ in the monomial of the minimal matching. For the base slopes
// it is the unit vector of their class. Limit, error and source are those of
// FPolynomial.
func GVector(s farey.Slope) ([3]int, error) {
	monomials, err := (Family{}).Monomials(s)
	if err != nil {
		return [3]int{}, err
	}
	for _, e := range monomials {
		return e, nil // the minimal matching comes first
	}
	return [3]int{}, nil // not reached: every snake graph has a matching
}
