// Package markov is the classical case under its classical names: Markov
// numbers, Markov triples, the Frobenius index, Cohn matrices, Markov forms and the
// spectrum below 3.
//
// A Markov triple is a solution of
//
//	a² + b² + c² = 3abc
//
// in positive integers, and a Markov number is a member of one. They are the
// family with weights (0,0,0) of package orbifold, which does all the work; here
// are the names, the conversions between the labellings, and nothing that orbifold
// does already. Forms and the spectrum are those of package orbifold/spectrum. What is
// not here (residues, logarithms, comparison, words, snake graphs, matrices,
// certificates, a limit on results, a context for Number) is had from [Family] at a
// lattice slope.
//
// # Two labellings
//
// A Markov number is called by one of two slopes; every function says which it
// takes.
//
//   - The lattice slope, used by all other packages: the base triangle {0/1, 1/0,
//     1/1} carries 1, 1, 1, and the exchange rule gives the rest. Every slope in
//     Q ∪ {∞} has a number, up to six slopes the same one by symmetry, exactly one
//     of them in [0, 1/2].
//   - The Frobenius index t in [0, 1]: the index p/q stands for the lattice slope
//     p/(p+q), which lies in [0, 1/2], and for the lattice point (q, p) with
//     0 ≤ p ≤ q.
//
// [FromIndex] and [Index], [Point] and [IndexAt] go between them:
//
//	index            0/1    1/1    1/2    1/3    2/3    1/4    3/4    2/5    3/5
//	lattice slope    0/1    1/2    1/3    1/4    2/5    1/5    3/7    2/7    3/8
//	point (q, p)    (1,0)  (1,1)  (2,1)  (3,1)  (3,2)  (4,1)  (4,3)  (5,2)  (5,3)
//	Markov number      1      2      5     13     29     34    169    194    433
//
// Forms, roots, words, Cohn matrices and values of the spectrum are called by the index.
// [NumberAt] goes on to the points that are not primitive.
//
// # Uniqueness
//
// Indices and triples correspond one to one: the number at the index is the
// largest of the triple. That different indices have different numbers is the
// open uniqueness conjecture; nothing here takes it for granted.
package markov
