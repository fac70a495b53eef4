// Package onecusp is the front page of a library for research with
// Markov-type numbers. It computes the solutions of the Markov equation and of
// its whole exchange family
//
//	x² + y² + z² + k₀·yz + k∞·zx + k₁·xy = K·xyz,   K = 3 + k₀ + k∞ + k₁,
//
// exactly, at any Farey slope, by four independent routes that must agree;
// finds the slopes of a number; and writes certificates that others can check
// without it. The package itself is empty; the work is done in these rooms, each
// of which uses those above it only (orbifold also uses orbifold/linear):
//
//   - contfrac: continued fractions, continuants, words in L and R, 2×2 integer
//     matrices, fast multiplication;
//   - farey: slopes, their classes, triangles and paths, the edges that an arc
//     crosses, Christoffel words, symmetries;
//   - snake: snake and band graphs and their perfect matchings: count, list,
//     rank, sample, weigh in any semiring, draw;
//   - orbifold: the exchange family: numbers, residues, logarithms, triples, the
//     tree, fans, words, graphs, matrices, Laurent expansions, certificates,
//     identification;
//   - orbifold/spectrum: forms and Lagrange values, and the way back from them;
//   - orbifold/linear: linear recurrences and their generating functions;
//   - orbifold/recognize: integers and sequences back to families, slopes and
//     recurrences;
//   - orbifold/survey: sweeps over whole regions, with proof;
//   - markov: the classical case under its classical names.
//
// The folder examples has whole programs; the first to try is examples/dossier.
//
// # A tour
//
//	f, _ := orbifold.New(2, 0, 1) // weights k₀, k∞, k₁
//	s, _ := farey.Parse("3/7")    // a lattice slope
//	n, _ := f.Number(s)           // by the exchange rule
//	a, _ := f.Fraction(s)         // its numerator is the number
//	g, _ := f.Snake(s)            // its perfect matchings are counted
//	m, _ := f.Matrix(s)           // its upper right entry
//	fmt.Println(n, a.Numerator(), g.Count(), m.B())
//
//	w, _ := f.Word(s)
//	fmt.Println(w, a)
//
//	c, _ := f.Certify(s) // all four routes, to be checked by others
//	fmt.Println(c.Verify())
//
//	far, _ := farey.Parse("271828182845904523536/314159265358979323846")
//	r, _ := f.NumberMod(far, big.NewInt(1_000_000_007))
//	lo, hi, _ := f.Log(far)
//	fmt.Println(r, lo, hi)
//
//	same, _ := f.Identify(context.Background(), big.NewInt(81))
//	fmt.Println(same)
//
// It prints
//
//	961 961 961 961
//	RLLLLLRRLLLRRRRRL [2; 5, 2, 3, 5, 2]
//	<nil>
//	301258517 2.2988814389713502e+20 2.2988814389713505e+20
//	[2/5 4/3]
//
// # Two labellings
//
// Papers label the same arc in two ways. A lattice slope p/q belongs to the
// triangulation with base triangle {0/1, 1/0, 1/1}, whose numbers are 1, 1, 1:
// this is what every package here takes unless it says otherwise. A Frobenius
// index t in [0, 1] labels the Markov numbers; its lattice slope is t/(1+t). The
// Markov number 5 has lattice slope 1/3 and index 1/2. Package markov converts.
package onecusp
