package snake_test

import (
	"math/bits"
	"slices"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/snake"
)

// The slow twins: graphs as plain lists of vertices and edges in the lattice,
// built from the prose rule alone, and searched without any transfer matrix.

// latticeEdge is an edge by its end points, lower or left one first.
type latticeEdge struct{ from, to snake.Point }

// plainTiles places the tiles of a word: equal neighbouring letters turn,
// different ones go on straight; R first goes right, L first goes up.
func plainTiles(word string) []snake.Point {
	at := snake.Point{}
	tiles := []snake.Point{at}
	right := true
	for i := range word {
		switch {
		case i == 0:
			right = word[0] == 'R'
		case word[i] == word[i-1]:
			right = !right
		}
		if right {
			at.X++
		} else {
			at.Y++
		}
		tiles = append(tiles, at)
	}
	return tiles
}

func sidesOf(p snake.Point) [4]latticeEdge {
	c := [4]snake.Point{p, {X: p.X + 1, Y: p.Y}, {X: p.X + 1, Y: p.Y + 1}, {X: p.X, Y: p.Y + 1}}
	return [4]latticeEdge{{c[0], c[1]}, {c[1], c[2]}, {c[3], c[2]}, {c[0], c[3]}}
}

func plainEdges(tiles []snake.Point) []latticeEdge {
	var edges []latticeEdge
	for _, p := range tiles {
		for _, e := range sidesOf(p) {
			if !slices.Contains(edges, e) {
				edges = append(edges, e)
			}
		}
	}
	return edges
}

// perfectMatchings lists all perfect matchings of a plain graph by trying, for
// the first uncovered vertex, every edge at it.
func perfectMatchings(edges []latticeEdge) [][]latticeEdge {
	var vertices []snake.Point
	for _, e := range edges {
		for _, v := range []snake.Point{e.from, e.to} {
			if !slices.Contains(vertices, v) {
				vertices = append(vertices, v)
			}
		}
	}
	var all [][]latticeEdge
	var chosen []latticeEdge
	done := map[snake.Point]bool{}
	var try func()
	try = func() {
		k := slices.IndexFunc(vertices, func(v snake.Point) bool { return !done[v] })
		if k < 0 {
			all = append(all, slices.Clone(chosen))
			return
		}
		v := vertices[k]
		for _, e := range edges {
			if (e.from != v && e.to != v) || done[e.from] || done[e.to] {
				continue
			}
			done[e.from], done[e.to] = true, true
			chosen = append(chosen, e)
			try()
			chosen = chosen[:len(chosen)-1]
			done[e.from], done[e.to] = false, false
		}
	}
	try()
	return all
}

// plainCount counts perfect matchings of up to 64 vertices by the same search
// on bits.
func plainCount(edges []latticeEdge) int64 {
	number := map[snake.Point]int{}
	of := func(v snake.Point) int {
		if _, ok := number[v]; !ok {
			number[v] = len(number)
		}
		return number[v]
	}
	var neighbours [64]uint64
	for _, e := range edges {
		i, j := of(e.from), of(e.to)
		neighbours[i] |= 1 << j
		neighbours[j] |= 1 << i
	}
	var count func(open uint64) int64
	count = func(open uint64) int64 {
		if open == 0 {
			return 1
		}
		n := int64(0)
		v := bits.TrailingZeros64(open)
		for rest := neighbours[v] & open; rest != 0; rest &= rest - 1 {
			n += count(open &^ (1 << v) &^ (rest & -rest))
		}
		return n
	}
	return count(1<<len(number) - 1)
}

// asLattice turns sides into edges by end points.
func asLattice(g snake.Graph, sides []snake.Side) []latticeEdge {
	tiles := slices.Collect(g.AllTiles())
	out := make([]latticeEdge, len(sides))
	for i, s := range sides {
		if s.Tile == 0 {
			out[i] = latticeEdge{snake.Point{}, snake.Point{Y: 1}}
			continue
		}
		a, b := tiles[s.Tile-1].Ends(s.Face)
		out[i] = latticeEdge{a, b}
	}
	return out
}

// sorted orders a list of edges.
func sorted(edges []latticeEdge) []latticeEdge {
	edges = slices.Clone(edges)
	slices.SortFunc(edges, func(a, b latticeEdge) int {
		key := func(e latticeEdge) []int { return []int{e.from.X, e.from.Y, e.to.X, e.to.Y} }
		return slices.Compare(key(a), key(b))
	})
	return edges
}

// plainWords yields all words of the given length.
func plainWords(length int) []string {
	words := []string{""}
	for range length {
		var longer []string
		for _, w := range words {
			longer = append(longer, w+"L", w+"R")
		}
		words = longer
	}
	return words
}

func mustWord(s string) contfrac.Word {
	w, err := contfrac.ParseWord(s)
	if err != nil {
		panic(err)
	}
	return w
}

// built is the graph of a word made tile by tile, without labels.
func built(word string) snake.Graph {
	b := snake.NewBuilder(snake.NoLabel, snake.NoLabel, snake.NoLabel)
	for _, c := range word {
		l := contfrac.L
		if c == 'R' {
			l = contfrac.R
		}
		b.Glue(l, snake.NoLabel, snake.NoLabel)
	}
	return b.Graph(snake.NoLabel, snake.NoLabel)
}
