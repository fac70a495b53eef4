package snake

import (
	"fmt"
	"slices"
	"strings"
)

// Vertices returns the vertices, numbered from 0 in the order in which the
// tiles bring them in: of tile 1 south-west, south-east, north-west,
// north-east, of every other tile the two new ones, lower or left one first. A
// graph of n tiles has 2n + 2. It returns [ErrTooLong] past [MaxTiles] tiles.
func (g Graph) Vertices() ([]Point, error) {
	s, err := g.layout("vertices", MaxTiles)
	if err != nil {
		return nil, err
	}
	if s == nil {
		return []Point{{0, 0}, {0, 1}}, nil
	}
	v := make([]Point, 0, 2*s.n+2)
	v = append(v, Point{0, 0}, Point{1, 0}, Point{0, 1}, Point{1, 1})
	for t := range s.walk() {
		if t.Index > 1 {
			a, b := t.Ends(t.In.exit())
			v = append(v, a, b)
		}
	}
	return v, nil
}

// Adjacency returns, for each vertex by its number in [Graph.Vertices], the
// numbers of its neighbours in increasing order. It returns [ErrTooLong] past
// [MaxTiles] tiles.
func (g Graph) Adjacency() ([][]int, error) {
	v, err := g.Vertices()
	if err != nil {
		return nil, err
	}
	number := make(map[Point]int, len(v))
	for i, p := range v {
		number[p] = i
	}
	lists := make([][]int, len(v))
	link := func(a, b Point) {
		i, j := number[a], number[b]
		lists[i], lists[j] = append(lists[i], j), append(lists[j], i)
	}
	if g.form == singleEdge {
		link(v[0], v[1])
	}
	for t := range g.AllTiles() {
		for f := South; f <= West; f++ {
			if t.Index == 1 || f != t.In.entry() { // the entry edge is the last tile's
				link(t.Ends(f))
			}
		}
	}
	for _, l := range lists {
		slices.Sort(l)
	}
	return lists, nil
}

// AdjacencyText writes the adjacency lists, one line for each vertex: its
// number, a colon, and the numbers of its neighbours. It returns [ErrTooLong]
// past [MaxTiles] tiles.
func (g Graph) AdjacencyText() (string, error) {
	lists, err := g.Adjacency()
	if err != nil {
		return "", err
	}
	var b strings.Builder
	for i, l := range lists {
		fmt.Fprintf(&b, "%d:", i)
		for _, j := range l {
			fmt.Fprintf(&b, " %d", j)
		}
		b.WriteByte('\n')
	}
	return b.String(), nil
}
