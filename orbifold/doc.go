// Package orbifold computes the numbers of an exchange family: the solutions
// of Markov-type equations, labelled by slopes.
//
// A [Family] has three weights k₀, k∞, k₁ ≥ 0, one for each class of slopes, and
// K = 3 + k₀ + k∞ + k₁. The numbers x, y, z at the vertices of a Farey triangle,
// of the classes of 0/1, 1/0 and 1/1, satisfy
//
//	x² + y² + z² + k₀·yz + k∞·zx + k₁·xy = K·xyz                  (E)
//
// The base triangle carries 1, 1, 1, and flipping a vertex u of a triangle
// u, v, w gives u' with
//
//	u·u' = v² + k_u·v·w + w²,    u + u' = K·v·w − k_v·w − k_w·v    (X)
//
// Weights (0,0,0) are the classical case: the Markov numbers. A weight
// k = 2cos(π/n) stands for an orbifold point of order n.
//
// # Labels
//
// Every slope here is a lattice slope p/q: it names the arc from (0,0) to (q,p)
// in the plane triangulated by the segments of slopes 0/1, 1/0 and 1/1. The
// Frobenius index t of a Markov number is another label of the same arc, with
// lattice slope t/(1+t); package markov converts.
//
// # Routes
//
// A number is reached in four ways that share as little as possible:
// [Family.Number] descends by (X); [Family.Fraction] is a continued fraction
// whose numerator it is; [Family.Snake] is a graph whose perfect matchings it
// counts; [Family.Matrix] has it as its upper right entry. [Family.Certify]
// takes all four and writes down what a reader needs to check them.
//
// Slopes may be of any size. Where the number itself would be too large to
// hold, [Family.NumberMod], [Family.RootMod], [Family.Log], [Family.LogBig],
// [Family.Bits] and [Family.Compare] still answer.
//
// # Around a number
//
// [Family.Identify] goes back from a number to all its slopes, and
// [Family.Nearest] lists those with the numbers nearest to it. [Family.Fan] is
// the sequence of arcs round one, with its recurrence; [Family.Tree],
// [Family.Within] and [Family.Ascending] list slopes; a [Triple] is flipped and
// descended. [Family.Laurent] expands an arc in the lengths of the base arcs,
// [FPolynomial] and [GVector] are its classical companions, and [Family.Band]
// is the closed curve around it. [Eval] takes weights from any commutative
// semiring, such as a [CosineRing] for orbifold points of any order.
//
// # Sources
//
// The equation and that every solution is reached: "Generalization of Markov
// Diophantine equation via generalized cluster algebra", Electron. J. Combin. 30
// (2023). The geometry: "Teichmüller spaces of Riemann surfaces with orbifold points of
// arbitrary order and cluster variables", Int. Math. Res. Not. (2014). Snake
// graphs: "Positivity for cluster algebras from surfaces", Adv. Math. 227
// (2011). Continued fractions: "Cluster algebras and continued fractions", Compositio Math. 154
// (2018). Everything is safe for concurrent use; results are fresh and
// arguments are never changed.
package orbifold
