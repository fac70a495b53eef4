// Package spectrum computes with the indefinite binary quadratic forms that belong to the slopes
// of an exchange family, their minima and Lagrange values, and finds the way back from a form, a
// quadratic irrational or a root to its slopes.
//
// Let M = [[y, N], [c, −k−y]] be the matrix of the slope s in a family (orbifold.Family.Matrix), N
// its number, k the weight of its class, K the constant of the family and P = [[−1, 0], [K, −1]].
// The matrix −P⁻¹·M is hyperbolic with trace t = K·N − k, and keeps the form
//
//	F_s = N·X² − (t − 2y)·XY − (K·y + c)·Y²
//
// of discriminant t² − 4, whose least nonzero absolute value is N. So its roots have the Lagrange
// value
//
//	L = √(t² − 4)/N.
//
// For weights (0,0,0) that is √(9 − 4/m²), and those are all the values below 3 of the Lagrange
// and of the Markov spectrum.
//
// # The way back
//
// N and y modulo N determine the slope up to a choice among three, and no search is needed: see
// [IdentifyRoot], which holds for all weights, and [BelowThree] for the classical case, which
// reads the slope off the period. None of this takes the uniqueness conjecture for granted:
// different slopes of [0, 1/2] with the same Markov number, if they existed, would have different
// roots and periods.
//
// Slopes are lattice slopes, as everywhere but in package markov.
//
// # Sources
//
// Matrices for equal weights: "SL(2,Z)-matrixizations of generalized Markov numbers", arXiv
// 2407.08203. The spectrum below 3: "An Introduction to Diophantine Approximation", Cambridge
// 1957, ch. II. The laws for general weights were derived for this library and are tested; what is
// proved is said at each function.
package spectrum
