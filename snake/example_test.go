package snake_test

import (
	"fmt"
	"math/big"
	"math/rand/v2"
	"strings"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/snake"
)

// The word of slope 3/7 in the classical case, whose Markov number is 169.
func ExampleFromWord() {
	w, _ := contfrac.ParseWord("RLLRRLLRRL")
	g := snake.FromWord(w)
	fmt.Println(g)
	fmt.Println(g.Count())
	picture, _ := g.Text(snake.Drawing{Numbers: true})
	fmt.Print(picture)
	// Output:
	// snake graph, 11 tiles: RLLRRLLRRL
	// 169
	//                 ●───●───●───●
	//                 │ 9 │10 │11 │
	//                 ●───●───●───●
	//                 │ 8 │
	//         ●───●───●───●
	//         │ 5 │ 6 │ 7 │
	//         ●───●───●───●
	//         │ 4 │
	// ●───●───●───●
	// │ 1 │ 2 │ 3 │
	// ●───●───●───●
}

func ExampleFromFraction() {
	f, _ := contfrac.ParseFraction("[2; 3, 4]")
	g, _ := snake.FromFraction(f)
	fmt.Println(g.Tiles(), g.Count(), f.Numerator())
	// Output: 8 30 30
}

// All matchings of three tiles round a corner, smallest first, with their heights.
func ExampleGraph_Matchings() {
	w, _ := contfrac.ParseWord("RL")
	for m := range snake.FromWord(w).Matchings() {
		fmt.Println(m, m.Height(), m.FlippedTiles())
	}
	// Output:
	// 000 0 []
	// 001 1 [3]
	// 100 1 [1]
	// 101 2 [1 3]
	// 111 3 [1 2 3]
}

// The arc of slope 1/2 crosses one edge, of class ∞. Its Laurent expansion is the
// sum over the matchings, divided by the diagonal: (x1² + x3²)/x2, with x1, x2, x3 for
// the classes 0, ∞ and 1.
func ExampleBuilder() {
	const zero, infinity, one snake.Label = 1, 2, 3
	g := snake.NewBuilder(infinity, one, zero).Graph(zero, one)
	numerator, _ := snake.Weigh(snake.Laurents{}, g, snake.Weights[snake.Laurent]{
		Edge: func(e snake.Side) snake.Laurent {
			x, _ := snake.Variable(int(e.Label))
			return x
		},
	})
	diagonal, _ := snake.NewLaurent(big.NewInt(1), 0, -1)
	fmt.Println(numerator.Mul(diagonal))
	// Output: x1^2*x2^-1 + x2^-1*x3^2
}

// With weight 1 at its class, the same crossing brings a second tile; the two form a hexagon.
func ExampleGraph_Hexagons() {
	g := snake.NewBuilder(2, 3, 1).GlueOwn(contfrac.L).Graph(1, 3)
	for h := range g.Hexagons() {
		fmt.Println(h, "chord", h.Chord)
	}
	fmt.Println(g.Count())
	// Output:
	// tiles 1 and 2 chord 1 north
	// 3
}

// The heaviest matching, by its weight: edges count by where they lie.
func ExampleWeigh() {
	w, _ := contfrac.ParseWord("RLRL")
	g := snake.FromWord(w)
	heaviest, _ := snake.Weigh(snake.MaxPlus{}, g, snake.Weights[float64]{
		Edge: func(e snake.Side) float64 { return float64(e.Tile * e.Tile) },
	})
	fmt.Println(heaviest)
	// Output: 70
}

func ExampleGraph_RankPolynomial() {
	w, _ := contfrac.ParseWord("RLLR")
	p, _ := snake.FromWord(w).RankPolynomial()
	fmt.Println(p)
	fmt.Println(p.Eval(big.NewInt(1)))
	// Output:
	// 1 + 2q + 3q^2 + 3q^3 + 2q^4 + q^5
	// 12
}

func ExampleSet() {
	w, _ := contfrac.ParseWord("RLLRRLLRRL")
	g := snake.FromWord(w)
	all, _ := g.Set()
	fmt.Println("all:", all.Count())

	middle, _ := all.WithTile(6, true)
	fmt.Println("with tile 6 flipped:", middle.Count())

	m, _ := all.Unrank(big.NewInt(100))
	rank, _ := all.Rank(m)
	fmt.Println("number 100:", m, "rank", rank)

	flips, _ := all.Flips(m)
	fmt.Println("flips:", flips)

	random, _ := all.Sample(rand.NewPCG(1, 2))
	fmt.Println("a random one is a matching:", g.Contains(random))
	// Output:
	// all: 169
	// with tile 6 flipped: 25
	// number 100: 10011001111 rank 100
	// flips: [1 3 5 7 10]
	// a random one is a matching: true
}

// Meet and join of two matchings are the intersection and the union of their flipped tiles.
func ExampleMatching_Meet() {
	a, _ := snake.ParseMatching("101")
	b, _ := snake.ParseMatching("001")
	meet, _ := a.Meet(b)
	join, _ := a.Join(b)
	fmt.Println(meet, join)
	// Output: 001 101
}

// The matchings are the order ideals of a fence.
func ExampleFence() {
	w, _ := contfrac.ParseWord("RLL")
	f, _ := snake.FromWord(w).Fence()
	for lower, upper := range f.Relations() {
		fmt.Printf("%d < %d\n", lower, upper)
	}
	m, _ := f.Matching(4, 3)
	fmt.Println(m)
	// Output:
	// 1 < 2
	// 3 < 2
	// 4 < 3
	// 0011
}

func ExampleSet_Hasse() {
	w, _ := contfrac.ParseWord("R")
	set, _ := snake.FromWord(w).Set()
	h, _ := set.Hasse(10)
	fmt.Print(h.DOT())
	_, err := set.Hasse(2)
	fmt.Println(err)
	// Output:
	// digraph matchings {
	//   rankdir=BT;
	//   node [shape=box, fontname="monospace"];
	//   edge [dir=none];
	//   m0 [label="00"];
	//   m1 [label="10"];
	//   m2 [label="11"];
	//   m0 -> m1 [label="1"];
	//   m1 -> m2 [label="2"];
	//   { rank=same; m0; }
	//   { rank=same; m1; }
	//   { rank=same; m2; }
	// }
	// snake: 3 matchings, at most 2 are accepted: too many matchings
}

// The closed curve of slope 3/7 in the classical case: its trace is 3 · 169.
func ExampleBandFromWord() {
	w, _ := contfrac.ParseWord("RRLRLLRRLLRRLL")
	b, _ := snake.BandFromWord(w)
	fmt.Println(b.Count())
	p, _ := b.RankPolynomial()
	fmt.Println(p)
	// Output:
	// 507
	// 1 + 4q + 12q^2 + 25q^3 + 42q^4 + 59q^5 + … + 59q^9 + 42q^10 + 25q^11 + 12q^12 + 4q^13 + q^14
}

func ExampleGraft() {
	u, _ := contfrac.ParseWord("RL")
	v, _ := contfrac.ParseWord("LLR")
	r, _ := snake.Graft(snake.FromWord(u), snake.FromWord(v), contfrac.R)
	fmt.Println(r.Product[0].Count(), "*", r.Product[1].Count(), "=",
		r.First[0].Count(), "+", r.Second[0].Count(), "*", r.Second[1].Count())
	// Output: 5 * 7 = 31 + 2 * 2
}

// [2; 3, 4] between its first two terms: K(2, 3, 4) = K(2)·K(3, 4) + 1·K(4).
func ExampleSplit() {
	f, _ := contfrac.ParseFraction("[2; 3, 4]")
	g, _ := snake.FromFraction(f)
	r, _ := snake.Split(g, 2)
	fmt.Println(r.Product[0].Count(), "=",
		r.First[0].Count(), "*", r.First[1].Count(), "+", r.Second[0].Count(), "*", r.Second[1].Count())
	// Output: 30 = 1 * 4 + 2 * 13
}

func ExampleResolve() {
	u, _ := contfrac.ParseWord("RRL")
	v, _ := contfrac.ParseWord("LR")
	g, h := snake.FromWord(u), snake.FromWord(v)
	overlaps, _ := snake.Overlaps(g, h)
	for o := range overlaps {
		r, _ := snake.Resolve(g, h, o)
		left, right := r.Sides()
		fmt.Printf("%d tiles from %d and %d: %v = %v, as %v * %v + %v * %v\n", o.Tiles, o.First, o.Second, left, right,
			r.First[0].Count(), r.First[1].Count(), r.Second[0].Count(), r.Second[1].Count())
	}
	// Output:
	// 1 tiles from 1 and 3: 35 = 35, as 2 * 16 + 1 * 3
	// 2 tiles from 2 and 2: 35 = 35, as 4 * 8 + 3 * 1
	// 2 tiles from 3 and 1: 35 = 35, as 11 * 3 + 2 * 1
	// 1 tiles from 3 and 2: 35 = 35, as 5 * 4 + 5 * 3
	// 1 tiles from 4 and 1: 35 = 35, as 17 * 2 + 1 * 1
}

func ExampleGraph_Canonical() {
	u, _ := contfrac.ParseWord("RLLRR")
	v, _ := contfrac.ParseWord("LLRRL")
	w, _ := snake.FromWord(u).Canonical()
	fmt.Println(w, snake.FromWord(u).Isomorphic(snake.FromWord(v)))
	// Output: LLRRL true
}

func ExampleGraph_AdjacencyText() {
	w, _ := contfrac.ParseWord("R")
	lists, _ := snake.FromWord(w).AdjacencyText()
	fmt.Print(lists)
	// Output:
	// 0: 1 2
	// 1: 0 3 4
	// 2: 0 3
	// 3: 1 2 5
	// 4: 1 5
	// 5: 3 4
}

// The matchings that use the edge on the right of tile 2, counted and listed.
func ExampleSet_WithEdge() {
	w, _ := contfrac.ParseWord("RLL")
	g := snake.FromWord(w)
	edge, _ := g.Side(2, snake.East)
	all, _ := g.Set()
	with, _ := all.WithEdge(edge, true)
	fmt.Println(edge, "is used by", with.Count(), "of", all.Count())
	for m := range with.All() {
		edges, _ := g.EdgesOf(m)
		fmt.Println(m, edges)
	}
	// Output:
	// 2 east is used by 2 of 7
	// 0011 [1 south 1 north 2 east 3 east 4 north]
	// 1011 [1 west 1 east 2 east 3 east 4 north]
}

// Minimal and maximal matching: the two that lie on the boundary.
func ExampleGraph_Minimal() {
	w, _ := contfrac.ParseWord("RL")
	g := snake.FromWord(w)
	minimal, _ := g.Minimal()
	maximal, _ := g.Maximal()
	low, _ := g.Text(snake.Drawing{Matching: &minimal})
	high, _ := g.Text(snake.Drawing{Matching: &maximal})
	fmt.Printf("%v\n%s%v\n%s", minimal, low, maximal, high)
	// Output:
	// 000
	// ●━━━●───●━━━●
	// │   │   │   │
	// ●━━━●───●━━━●
	// 111
	// ●───●━━━●───●
	// ┃░ ░│░ ░│░ ░┃
	// ●───●━━━●───●
}

// Weights on flipped tiles: a variable for each tile gives a monomial for each matching.
func ExampleWeights() {
	w, _ := contfrac.ParseWord("RL")
	sum, _ := snake.Weigh(snake.Laurents{}, snake.FromWord(w), snake.Weights[snake.Laurent]{
		Tile: func(tile int) snake.Laurent {
			y, _ := snake.Variable(tile)
			return y
		},
	})
	fmt.Println(sum)
	// Output: x1*x2*x3 + x1*x3 + x1 + x3 + 1
}

// A picture of a crossing of weight 1 as a hexagon, with its minimal matching and signs
// of the caller's own. What comes back is the text of a file that a browser shows.
func ExampleGraph_SVG() {
	g := snake.NewBuilder(2, 3, 1).GlueOwn(contfrac.L).Graph(1, 3)
	minimal, _ := g.Minimal()
	picture, _ := g.SVG(snake.Drawing{
		Matching: &minimal,
		Name:     func(l snake.Label) string { return [...]string{"", "0", "∞", "1"}[l] },
		Hexagons: true,
	})
	fmt.Println(strings.Split(picture, "\n")[1])
	// Output:
	// <title>snake graph, 2 tiles: L</title>
}

// Code for LaTeX; the matched edges are the thick ones.
func ExampleGraph_TikZ() {
	minimal, _ := snake.Edge().Minimal()
	code, _ := snake.Edge().TikZ(snake.Drawing{Matching: &minimal})
	for line := range strings.Lines(code) {
		if !strings.Contains(line, "definecolor") {
			fmt.Print(line)
		}
	}
	// Output:
	// \begin{tikzpicture}[x=1.4cm, y=1.4cm, line join=round]
	//   \draw[line width=2.4pt, line cap=round] (0,0) -- (0,1);
	//   \fill (0,0) circle (.04);
	//   \fill (0,1) circle (.04);
	// \end{tikzpicture}
}
