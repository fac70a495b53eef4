package contfrac

// Letter is a letter of a Word: L (left) or R (right). As a matrix L is
// [[1, 0], [1, 1]] and R is [[1, 1], [0, 1]]; as a step down the Stern–Brocot
// tree L goes to the smaller fraction and R to the larger. The zero value is
// L; every other value than L is read as R.
type Letter uint8

// The two letters.
const (
	L Letter = iota
	R
)

// String returns "L" or "R".
func (l Letter) String() string {
	if l == L {
		return "L"
	}
	return "R"
}

// Other returns the other letter.
func (l Letter) Other() Letter {
	if l == L {
		return R
	}
	return L
}

// Matrix returns the matrix of the letter: [[1, 0], [1, 1]] for L and
// [[1, 1], [0, 1]] for R.
func (l Letter) Matrix() Matrix {
	if l == L {
		return matrixOf(1, 0, 1, 1)
	}
	return matrixOf(1, 1, 0, 1)
}

// proper maps every value to L or R.
func (l Letter) proper() Letter {
	if l == L {
		return L
	}
	return R
}
