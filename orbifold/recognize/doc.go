// Package recognize leads back from integers to the exchange families of
// package orbifold: from numbers to the families and slopes that carry them,
// from a triple to the weights for which it solves the equation (E), from a
// sequence to its linear recurrence and to the fans that it is a part of.
//
//   - [Families] searches all weights up to a bound for families that carry
//     given integers, and ranks them.
//   - [Weights] describes all weights for which three integers solve (E),
//     completely and finitely, though there may be infinitely many.
//   - [Sequence.Recurrence] finds the minimal linear recurrence of a sequence over
//     the rational numbers, and says so when the terms do not determine one.
//   - [Sequence.Fans] finds every fan of every family that has the terms in
//     arithmetic progression.
//
// # What is proved
//
// Five terms determine the fans that contain them but for symmetries, unless
// the second and the fourth are equal; then six do. For so many terms
// [Sequence.Fans] is complete: an empty answer proves that no fan of any
// family, with whatever weights, has the terms, in any arithmetic
// progression. Fewer terms can be refuted, when they are not convex, but not
// confirmed; the answer is [Undecided] then.
//
// A recurrence of finitely many terms is a guess by nature. It is reported
// when it is the only one of its order or less and at least one term more than
// needed confirms it; [Recurrence.Surplus] counts those. For a fan the
// recurrence is a theorem: [FanMatch] has it with the fan's own first terms,
// computed at its slopes.
//
// Everything is exact, and safe for concurrent use. Long work takes a context
// and stops when it ends.
package recognize
