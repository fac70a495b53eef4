package main

import (
	"context"
	"fmt"
	"html/template"
	"math/big"

	"example.com/onecusp/orbifold"
	"example.com/onecusp/snake"
)

const (
	maxDrawnTiles = 60 // a snake graph is drawn on the page up to this many tiles
	maxTextTiles  = 24 // and with characters up to this many
	leastTile     = 38 // pixels of a tile's side, at least
)

// snakeSection draws the snake graph with its minimal matching.
func (e *entry) snakeSection(context.Context) (section, error) {
	s := section{Title: "Snake graph"}
	tiles := e.family.Tiles(e.Slope)
	s.add("Tiles", "%s", digits(tiles))
	s.note("one for each crossing and as many more as the weight of the edge crossed")
	if tiles.Cmp(big.NewInt(maxDrawnTiles)) > 0 {
		s.Remark = fmt.Sprintf("Not drawn: the graph has %s tiles, and %d are the most that a picture shows clearly.", digits(tiles), maxDrawnTiles)
		return s, nil
	}
	graph, err := e.family.Snake(e.Slope)
	if err != nil {
		return s, err
	}
	s.add("Perfect matchings", "%s", digits(graph.Count()))
	minimal, err := graph.Minimal()
	if err != nil {
		return s, err
	}
	drawn := snake.Drawing{Matching: &minimal, Name: labelSign}
	svg, err := graph.SVG(drawn)
	if err != nil {
		return s, err
	}
	p := picture{
		Caption: "The snake graph with its minimal matching, thick; the sign in a tile, its tint and its dashed diagonal are the class of the edge crossed (0, ∞ or 1)",
		SVG:     template.HTML(svg),
		Least:   leastTile * columns(graph),
	}
	if tiles.Sign() == 0 {
		p.Caption = "The single edge, the graph of an arc that crosses nothing, with its one matching"
	}
	if tiles.Cmp(big.NewInt(maxTextTiles)) <= 0 {
		if p.Text, err = graph.Text(drawn); err != nil {
			return s, err
		}
	}
	s.Pictures = []picture{p}
	return s, nil
}

// columns is the width of a graph, in tiles.
func columns(g snake.Graph) int {
	last := 0
	for t := range g.AllTiles() {
		last = t.At.X + 1
	}
	return last
}

// labelSign is the sign of the class that a label of the graph stands for.
func labelSign(l snake.Label) string {
	if c, ok := orbifold.ClassOf(l); ok {
		return sign(c)
	}
	return ""
}
