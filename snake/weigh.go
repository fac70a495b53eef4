package snake

// Weights gives the edges and the flipped tiles of a graph their weights. A
// nil function stands for the weight One everywhere.
type Weights[T any] struct {
	Edge func(Side) T     // weight of an edge; the Side carries its label
	Tile func(tile int) T // weight of a tile when it is flipped
}

// Weigh returns the weight of a graph in a semiring: the sum over its perfect
// matchings of the product of the weights of the edges used and the tiles
// flipped. With weights One it is the number of matchings (in the semiring).
//
// The Laurent expansion of an arc is this sum with each edge weighted by the
// variable of its label, divided by the product of all diagonals
// ([Tile.Diagonal]). Weights One on edges and q on tiles give the rank
// generating function.
//
// It asks for each weight at most twice, and takes at most 10 multiplications
// and 4 additions a tile. It returns [ErrTooLong] past [MaxTiles] tiles.
// Source: "Positivity for cluster algebras from surfaces", Adv. Math. 227 (2011).
func Weigh[T any](r Semiring[T], g Graph, w Weights[T]) (T, error) {
	s, err := g.layout("weight", MaxTiles)
	if err != nil {
		return r.Zero(), err
	}
	if s == nil {
		if w.Edge == nil {
			return r.One(), nil
		}
		return w.Edge(g.singleSide()), nil
	}
	v := transfer(r, s, w, [2]T{free: r.One(), covered: r.Zero()})
	if w.Edge != nil {
		v[free] = r.Mul(v[free], w.Edge(s.side(s.n, s.dir[s.n].exit())))
	}
	return r.Add(v[free], v[covered]), nil
}

// transfer carries a row vector of weights by state through all tiles.
func transfer[T any](r Semiring[T], s *shape, w Weights[T], v [2]T) [2]T {
	for i := 1; i <= s.n; i++ {
		next := [2]T{r.Zero(), r.Zero()}
		for _, t := range s.at(i) {
			x := v[t.from]
			if w.Edge != nil {
				if t.entry {
					x = r.Mul(x, w.Edge(s.side(i, s.dir[i-1].entry())))
				}
				for _, f := range t.sides[:t.n] {
					x = r.Mul(x, w.Edge(s.side(i, f)))
				}
			}
			if w.Tile != nil && flipped(i, t.vertical) {
				x = r.Mul(x, w.Tile(i))
			}
			next[t.to] = r.Add(next[t.to], x)
		}
		v = next
	}
	return v
}

// singleSide is the edge of the graph without tiles.
func (g Graph) singleSide() Side { return Side{Tile: 0, Face: West, Label: g.edge} }
