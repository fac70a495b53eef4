// Package contfrac computes with finite and periodic continued fractions, words in the
// letters L and R, 2×2 integer matrices, quadratic irrationals and indefinite
// binary quadratic forms, at any size.
//
// One object is seen from several sides here. A positive continued fraction
// [a₁; a₂, …] is a word in two letters, whose runs are a₁, a₂, … letters long:
//
//	[1; 2, 2]  ↔  R LL RR.
//
// The product of the matrices of the letters, L = [[1, 0], [1, 1]] and
// R = [[1, 1], [0, 1]], over a word is, up to an exchange of rows or columns,
// the product of the matrices [[a, 1], [1, 0]] over its runs a, and its upper left
// entry is the numerator of the fraction, the Continuant of the terms. If one letter is put
// before a word and one after it (Word.WithEnds), whichever they are, the numerator
// of the run lengths is the sum of the four entries of the matrix of the word.
// The same numbers have a second expansion, with signs −, as type Minus.
//
// An infinite word that repeats is a quadratic irrational: type Surd, with type
// Periodic for its continued fraction and type Form for the quadratic form of which it is
// a root. A hyperbolic matrix is, up to conjugation, a cyclic word (Matrix.Cycle):
// the period of the continued fraction of its fixed points.
//
// # Size
//
// Words and fractions are held packed, about a byte a run or a term, and are passed by
// value. Products of long sequences go by balanced trees, expansions by a
// half-gcd, and every multiplication of large integers through Product. The halves
// of a product tree from about 130 000 bits on are worked out at the same time. Periods are
// followed term by term, up to MaxPeriod terms.
//
// # Conventions
//
// All types are immutable, safe for concurrent use (WordBuilder excepted),
// and have a zero value that means something: the empty word, the empty
// fraction 1/0, the identity matrix, the golden ratio and its form. Every *big.Int and slice that is returned is fresh, and
// none that is passed in is modified or kept. Errors wrap the sentinel errors
// of the package. The verb %s writes values in full and %v long values shortened;
// text and JSON decoders accept only what the encoders write.
package contfrac
