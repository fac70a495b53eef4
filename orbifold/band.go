package orbifold

import (
	"fmt"
	"math/big"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/farey"
	"example.com/onecusp/snake"
)

// Loop returns the matrix −P·M⁻¹ of the closed curve around the arc of slope s,
// M the matrix of s: hyperbolic of determinant 1, with trace t = K·N − k and
// upper right entry −N. Cost and errors are those of Matrix.
func (f Family) Loop(s farey.Slope) (contfrac.Matrix, error) {
	m, err := f.Matrix(s)
	if err != nil {
		return contfrac.Matrix{}, err
	}
	p := contfrac.NewMatrix(big.NewInt(-1), new(big.Int), f.K(), big.NewInt(-1))
	return p.Neg().Mul(matrices{}.inverse(m)), nil
}

// Band returns the band graph of the closed curve around the arc of slope s:
// that of the cyclic word of L and R to whose matrix Loop(s) is conjugate. The
// number of its good matchings is the trace t = K·N − k. In the classical case
// the word is the sequence of turns along the line of slope s, shifted off the lattice points, over
// one period.
//
// The graph carries no labels. Cost and errors are those of Matrix; the word
// has as many runs as the expansion of the fixed points of the matrix.
// Source: "Bases for cluster algebras from surfaces", Compositio Math. 149
// (2013) (memory).
func (f Family) Band(s farey.Slope) (snake.Band, error) {
	loop, err := f.Loop(s)
	if err != nil {
		return snake.Band{}, err
	}
	w, err := loop.Cycle()
	if err != nil {
		return snake.Band{}, fmt.Errorf("orbifold: closed curve around %v: %w", s, err)
	}
	b, err := snake.BandFromWord(w)
	if err != nil {
		return snake.Band{}, fmt.Errorf("orbifold: closed curve around %v: %w", s, err)
	}
	return b, nil
}
