package snake

// Semiring is what weights live in: a commutative semiring with elements of
// type T. Add and Mul must be commutative and associative, Mul must distribute
// over Add, Zero and One be neutral, and Zero times anything be Zero. No
// operation may modify its arguments; results may share memory with them only
// when T is treated as immutable.
//
// Subtraction and division are never asked for, so shortest paths (max, +),
// truth values, probabilities and polynomials all fit.
type Semiring[T any] interface {
	Zero() T
	One() T
	Add(a, b T) T
	Mul(a, b T) T
}
