// Package survey sweeps whole regions of an exchange family, with proof: counts
// all slopes with numbers up to a bound, proves that inequivalent ones carry
// different numbers or lists those that do not, hunts for counterexamples, compares the
// order of the numbers with directions in the lattice, and answers questions of one's own.
//
//   - Walk visits a Region, the slopes up to a bound and in a box, interval, fan or
//     line, one by one, at tens of millions a second.
//   - Count and Table give exact counts without visiting each slope; Growth the constant
//     of their asymptotics.
//   - Distinct proves distinctness and returns a Report; Check audits a walk alone.
//   - Search returns the slopes that satisfy a predicate, with certificates.
//   - Ordering tests monotony along directions.
//   - Sweep summarises answers to a Question in parallel. Split, SweepShards and Part do so
//     over many machines, and a checkpoint file lets work that was
//     killed go on.
//
// # What makes it fast and what makes it proof
//
// Deep in the tree an arc is five machine words: its number modulo 2⁶⁴ and modulo
// 2⁶¹ − 1, the two ends of an enclosure of its logarithm, and its slope. The exchange
// rule
//
//	u + u' = K·v·w − k_v·w − k_w·v                                  (X)
//
// needs no division and is followed modulo both moduli; logarithms are integers in a fixed
// unit, so that they add up without rounding. Near the base, where sums of
// logarithms are not exact enough, numbers are kept whole, and at the bound the few cases that
// enclosures leave open are decided by better ones or by the numbers.
// Every walk can be audited, see Audit.
//
// All slopes are lattice slopes; Ordering can go by Frobenius index. One slope of each
// symmetry class is taken, the representative of orbifold.Family.Domain, unless a region says
// otherwise. Results do not depend on the number of workers, the split into shards or the
// memory budget. Everything is safe for concurrent use; a Visit belongs to the function that it
// is given to.
//
// Sources: the family, "Generalization of Markov Diophantine equation via generalized
// cluster algebra", Electron. J. Combin. 30 (2023); earlier surveys, "Some numerical evidence
// concerning the uniqueness of the Markov numbers", Math. Comp. 25 (1971), and "On the number of
// Markoff numbers below a given bound", Math. Comp. 39 (1982).
package survey
