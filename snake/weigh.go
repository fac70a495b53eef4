package snake

// Weights gives the edges and the flipped tiles of a graph their weights. A
// nil function stands for the weight One everywhere.
type Weights[T any] struct {
	Edge func(Side) T     // weight of an edge; the Side carries its label
	Tile func(tile int) T // weight of a tile when it is flipped
}

// Matched is what has a set of matchings: a [Graph], a [Band], or a [Set].
type Matched interface{ Set() (Set, error) }

// Set returns the set itself, so that a Set can be weighed like a graph.
func (t Set) Set() (Set, error) { return t, nil }

// Weigh returns the weight of a graph, a band or a set in a semiring: the sum
// over its matchings of the product of the weights of the edges used and the
// tiles flipped. With weights One it is the number of matchings (in the
// semiring).
//
// The Laurent expansion of an arc is this sum with each edge weighted by the
// variable of its label, divided by the product of all diagonals
// ([Tile.Diagonal]). Weights One on edges and q on tiles give the rank
// generating function.
//
// It takes at most 6 multiplications and 3 additions a tile, for a band twice
// as many, and asks for a weight where it multiplies with it. It returns
// [ErrTooLong] past [MaxTiles] tiles.
// Source: "Positivity for cluster algebras from surfaces", Adv. Math. 227 (2011).
func Weigh[T any](r Semiring[T], g Matched, w Weights[T]) (T, error) {
	t, err := g.Set()
	switch {
	case err != nil || t.none:
		return r.Zero(), err
	case t.s == nil && w.Edge == nil:
		return r.One(), nil
	case t.s == nil:
		return w.Edge(t.side), nil
	}
	v := transfer(r, t, w, [2]T{free: r.One(), covered: r.Zero()})
	if t.s.closed { // the chain comes back in the state that it started in
		u := transfer(r, t, w, [2]T{free: r.Zero(), covered: r.One()})
		return r.Add(v[free], u[covered]), nil
	}
	for end := range v {
		if t.ends()&(1<<end) == 0 {
			v[end] = r.Zero()
		}
	}
	if w.Edge != nil {
		v[free] = r.Mul(v[free], w.Edge(t.s.side(t.s.n, t.s.dir[t.s.n].exit())))
	}
	return r.Add(v[free], v[covered]), nil
}

// transfer carries a row vector of weights by state through all tiles.
func transfer[T any](r Semiring[T], t Set, w Weights[T], v [2]T) [2]T {
	s := t.s
	for i := 1; i <= s.n; i++ {
		next := [2]T{r.Zero(), r.Zero()}
		mask := t.mask(i)
		for k, st := range s.at(i) {
			if mask&(1<<k) == 0 {
				continue
			}
			x := v[st.from]
			if w.Edge != nil {
				if st.entry {
					x = r.Mul(x, w.Edge(s.side(i, s.dir[i-1].entry())))
				}
				for _, f := range st.sides[:st.n] {
					x = r.Mul(x, w.Edge(s.side(i, f)))
				}
			}
			if w.Tile != nil && flipped(i, st.vertical) {
				x = r.Mul(x, w.Tile(i))
			}
			next[st.to] = r.Add(next[st.to], x)
		}
		v = next
	}
	return v
}

// singleSide is the edge of the graph without tiles.
func (g Graph) singleSide() Side { return Side{Tile: 0, Face: West, Label: g.edge} }
