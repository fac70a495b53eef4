package snake

import (
	"cmp"
	"fmt"
	"math"
	"slices"
)

// MaxDrawnMatchings is the largest number of matchings that [Hasse.SVG] draws,
// and MaxLatticeTiles the largest number of tiles in all its small pictures
// together.
const (
	MaxDrawnMatchings = 400
	MaxLatticeTiles   = 20000
)

// SVG draws the diagram as a self-contained SVG image, growing upwards, with a
// small picture of the matching at every node and the flipped tile's number at
// every line. The Drawing's Matching is ignored, and texts are left out of the
// small pictures.
//
// It returns a [*TooManyError] past [MaxDrawnMatchings] matchings and
// [ErrTooLong] past [MaxDrawnTiles] tiles in the graph or [MaxLatticeTiles] in
// all.
func (h Hasse) SVG(d Drawing) (string, error) {
	if len(h.nodes) > MaxDrawnMatchings {
		return "", tooMany(len(h.nodes), MaxDrawnMatchings)
	}
	if n := h.set.Tiles(); n > MaxDrawnTiles || n*len(h.nodes) > MaxLatticeTiles {
		return "", fmt.Errorf("snake: picture of %d matchings of %s: at most %d tiles, and %d in all, are accepted: %w",
			len(h.nodes), tileCount(n), MaxDrawnTiles, MaxLatticeTiles, ErrTooLong)
	}
	const unit, pad, across = 18.0, 8.0, 22.0 // across is the gap between boxes of one level
	d.Name, d.EdgeNames, d.Numbers = nil, false, false
	pictures := make([]*picture, len(h.nodes))
	for k, m := range h.nodes {
		d.Matching = &m
		p, err := h.set.picture(d)
		if err != nil {
			return "", err
		}
		pictures[k] = p
	}
	levels := h.arranged()
	if len(levels) == 0 {
		return (&canvas{}).document(2*svgMargin, 2*svgMargin, "no matchings"), nil
	}
	low, high := pictures[0].bounds()
	boxWide, boxHigh := (high.x-low.x)*unit+2*pad, (high.y-low.y)*unit+2*pad
	widest := 0
	for _, l := range levels {
		widest = max(widest, len(l))
	}
	up := math.Min(46+6*float64(widest-1), 160) // the gap between levels; lines are to be steep
	width := float64(widest)*(boxWide+across) - across + 2*svgMargin
	height := float64(len(levels))*(boxHigh+up) - up + 2*svgMargin
	corner := make([]spot, len(h.nodes)) // upper left corner of the box, in pixels
	for y, l := range levels {
		left := (width - float64(len(l))*(boxWide+across) + across) / 2
		for x, k := range l {
			corner[k] = spot{left + float64(x)*(boxWide+across), height - svgMargin - float64(y)*(boxHigh+up) - boxHigh}
		}
	}
	var c canvas
	for _, a := range h.arcs {
		x1, y1 := corner[a.Lower].x+boxWide/2, corner[a.Lower].y
		x2, y2 := corner[a.Upper].x+boxWide/2, corner[a.Upper].y+boxHigh
		c.add(`<line x1="%s" y1="%s" x2="%s" y2="%s" stroke="%s" stroke-width="1.4"/>`, decimal(x1), decimal(y1), decimal(x2), decimal(y2), outline)
	}
	var placed []spot
	for _, a := range h.arcs {
		x1, y1 := corner[a.Lower].x+boxWide/2, corner[a.Lower].y
		x2, y2 := corner[a.Upper].x+boxWide/2, corner[a.Upper].y+boxHigh
		s := clearSpot(spot{x1, y1}, spot{x2, y2}, placed)
		placed = append(placed, s)
		at := canvas{unit: 1, left: s.x, top: s.y}
		at.text(spot{}, 11, heavy, paper, fmt.Sprint(a.Tile))
		c.WriteString(at.String())
	}
	for k, p := range pictures {
		c.add(`<rect x="%s" y="%s" width="%s" height="%s" rx="5" fill="%s" stroke="#c9ced4"/>`, decimal(corner[k].x), decimal(corner[k].y), decimal(boxWide), decimal(boxHigh), paper)
		small := canvas{unit: unit, left: corner[k].x + pad - low.x*unit, top: corner[k].y + pad + high.y*unit}
		small.draw(p)
		c.WriteString(small.String())
	}
	return c.document(width, height, fmt.Sprintf("lattice of %d matchings", len(h.nodes))), nil
}

// clearSpot is a spot for a number on the line from a to b: the first of some that keeps clear
// of the numbers placed before, else the one that keeps clearest. The first choice is where
// lines from one node have parted but not yet crossed.
func clearSpot(a, b spot, placed []spot) spot {
	const apart = 17 // pixels
	var best spot
	most := -1.0
	for _, part := range []float64{.36, .5, .64, .26, .74, .43, .57} {
		s := between(a, b, part)
		room := math.Inf(1)
		for _, o := range placed {
			room = min(room, math.Hypot(s.x-o.x, s.y-o.y))
		}
		if room >= apart {
			return s
		}
		if room > most {
			best, most = s, room
		}
	}
	return best
}

// arranged orders every level so that lines cross little: nodes go to the mean
// place of their neighbours on the level before, sweeping up and down a few
// times.
func (h Hasse) arranged() [][]int {
	levels := h.levels()
	place := make([]float64, len(h.nodes))
	linked := make([][]int, len(h.nodes))
	for _, a := range h.arcs {
		linked[a.Lower] = append(linked[a.Lower], a.Upper)
		linked[a.Upper] = append(linked[a.Upper], a.Lower)
	}
	settle := func(l []int) {
		for x, k := range l {
			place[k] = float64(x) - float64(len(l)-1)/2
		}
	}
	for _, l := range levels {
		settle(l)
	}
	sweep := func(y, from int) {
		mean := map[int]float64{}
		for _, k := range levels[y] {
			sum, n := 0.0, 0
			for _, o := range linked[k] {
				if height := h.nodes[o].Height(); height == h.nodes[levels[from][0]].Height() {
					sum += place[o]
					n++
				}
			}
			mean[k] = place[k]
			if n > 0 {
				mean[k] = sum / float64(n)
			}
		}
		slices.SortStableFunc(levels[y], func(a, b int) int { return cmp.Compare(mean[a], mean[b]) })
		settle(levels[y])
	}
	for range 6 {
		for y := 1; y < len(levels); y++ {
			sweep(y, y-1)
		}
		for y := len(levels) - 2; y >= 0; y-- {
			sweep(y, y+1)
		}
	}
	return levels
}
