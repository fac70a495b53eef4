package snake

import "fmt"

// MaxDrawnTiles is the largest number of tiles that a picture is made of.
const MaxDrawnTiles = 500

// Drawing says what a picture shows besides the graph. The zero value draws
// the tiles and their diagonals only.
type Drawing struct {
	Matching  *Matching          // drawn thick, its flipped tiles hatched; nil for none
	Name      func(Label) string // text for a label, written into tiles; nil for none
	EdgeNames bool               // also write the labels of the edges (not in plain text)
	Numbers   bool               // write tile numbers into the tiles instead of labels
	Hexagons  bool               // draw the pairs of Graph.Hexagons as hexagons (not in plain text)
}

// spot is a point of a picture in lattice units.
type spot struct{ x, y float64 }

// picture is a graph laid out for drawing.
type picture struct {
	Drawing
	tiles []Tile
	edges []drawnEdge
	moved map[Point]spot // ends of hexagon chords, pushed outwards
	pair  []bool         // pair[i]: tiles i and i+1 are drawn as one
	max   Point          // upper right corner
}

type drawnEdge struct {
	Side
	from, to Point
	matched  bool
	cut      bool // one of the two copies of the edge where a band is cut
}

// chordStretch is how far a hexagon pushes the ends of its chord outwards.
const chordStretch = 0.22

// picture checks the drawing and lays the graph out.
func (g Graph) picture(d Drawing) (*picture, error) {
	s, err := g.layout("picture", MaxDrawnTiles)
	if err != nil {
		return nil, err
	}
	return Set{s: s, side: g.singleSide()}.picture(d)
}

// picture checks the drawing and lays the band out, cut.
func (b Band) picture(d Drawing) (*picture, error) {
	s, err := b.layout("picture", MaxDrawnTiles)
	if err != nil {
		return nil, err
	}
	return Set{s: s, none: s == nil}.picture(d)
}

// picture checks the drawing and lays the graph of the set out.
func (t Set) picture(d Drawing) (*picture, error) {
	used := map[Side]bool{}
	if d.Matching != nil {
		edges, err := t.EdgesOf(*d.Matching)
		if err != nil {
			return nil, err
		}
		for _, e := range edges {
			used[e] = true
		}
	}
	p := &picture{Drawing: d, moved: map[Point]spot{}, pair: make([]bool, t.Tiles()+2), max: Point{0, 1}}
	for tile := range t.s.walk() {
		p.tiles = append(p.tiles, tile)
		p.max = Point{tile.At.X + 1, tile.At.Y + 1}
	}
	for e := range t.edges() {
		from, to := Point{}, Point{0, 1}
		if e.Tile > 0 {
			from, to = p.tiles[e.Tile-1].Ends(e.Face)
		}
		cut := t.s != nil && t.s.closed && e.Tile == t.s.n && e.Face == t.s.dir[t.s.n].exit()
		p.edges = append(p.edges, drawnEdge{e, from, to, used[e], cut})
		if cut { // the other copy
			from, to = p.tiles[0].Ends(t.s.dir[0].entry())
			p.edges = append(p.edges, drawnEdge{e, from, to, used[e], cut})
		}
	}
	if d.Hexagons {
		for h := range t.s.hexagons() {
			p.pair[h.First] = true
			a, b := p.tiles[h.First-1].Ends(h.Chord.Face)
			dx, dy := chordStretch*float64(b.X-a.X), chordStretch*float64(b.Y-a.Y)
			p.moved[a] = spot{float64(a.X) - dx, float64(a.Y) - dy}
			p.moved[b] = spot{float64(b.X) + dx, float64(b.Y) + dy}
		}
	}
	return p, nil
}

// at is where a vertex is drawn.
func (p *picture) at(v Point) spot {
	if s, ok := p.moved[v]; ok {
		return s
	}
	return spot{float64(v.X), float64(v.Y)}
}

// vertices lists the vertices, each once, along the chain.
func (p *picture) vertices() []Point {
	var all []Point
	seen := map[Point]bool{}
	for _, e := range p.edges {
		for _, v := range [2]Point{e.from, e.to} {
			if !seen[v] {
				seen[v] = true
				all = append(all, v)
			}
		}
	}
	return all
}

// outline is the polygon of a tile, or of the hexagon that starts with it.
func (p *picture) outline(tile int) []spot {
	t := p.tiles[tile-1]
	c := t.Corners()
	points := c[:]
	if p.pair[tile] {
		d := p.tiles[tile].Corners()
		if t.Out == Right {
			points = []Point{c[0], c[1], d[1], d[2], c[2], c[3]}
		} else {
			points = []Point{c[0], c[1], c[2], d[2], d[3], c[3]}
		}
	}
	out := make([]spot, len(points))
	for i, v := range points {
		out[i] = p.at(v)
	}
	return out
}

// inside is the text written into a tile.
func (p *picture) inside(t Tile) string {
	switch {
	case p.Numbers:
		return fmt.Sprint(t.Index)
	case p.Name != nil && t.Diagonal != NoLabel:
		return p.Name(t.Diagonal)
	}
	return ""
}

// texts places the texts: of the tiles, one for a hexagon beside its chord,
// then of the edges.
func (p *picture) texts(put func(at spot, l Label, text string, edge bool)) {
	for i := 1; i <= len(p.tiles); i++ {
		t := p.tiles[i-1]
		k := t.Corners()
		at := middle([]spot{p.at(k[0]), p.at(k[1]), p.at(k[2]), p.at(k[3])})
		together := p.pair[i] && !p.Numbers
		if together {
			at = middle([]spot{middle(p.outline(i)), middle(p.outline(i + 1))})
		}
		if s := p.inside(t); s != "" {
			put(at, t.Diagonal, s, false)
		}
		if together {
			i++
		}
	}
	if !p.EdgeNames || p.Name == nil {
		return
	}
	for _, e := range p.edges {
		if e.Label != NoLabel {
			part := .5
			if e.cut {
				part = 1 - p.cutMark()
			}
			put(between(p.at(e.from), p.at(e.to), part), e.Label, p.Name(e.Label), true)
		}
	}
}

// cutMark is the part of the way along a cut edge at which its mark stands, so
// that there is room for a name.
func (p *picture) cutMark() float64 {
	if p.EdgeNames {
		return .68
	}
	return .5
}

// between is the spot at a part of the way from a to b.
func between(a, b spot, part float64) spot {
	return spot{a.x + part*(b.x-a.x), a.y + part*(b.y-a.y)}
}

// middle is the centre of gravity of some spots.
func middle(s []spot) spot {
	var m spot
	for _, a := range s {
		m.x += a.x / float64(len(s))
		m.y += a.y / float64(len(s))
	}
	return m
}
