// Package linear has linear recurrences with constant rational coefficients,
// and what belongs to them: their characteristic polynomials over Q and their
// generating functions. Fans of arcs (orbifold.Fan) obey such recurrences, and
// orbifold/recognize finds them in sequences.
//
// A Recurrence of order d is a monic characteristic polynomial of degree d and d first
// terms. Everything is exact, immutable and safe for concurrent use.
package linear
