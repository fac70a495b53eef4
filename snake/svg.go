package snake

import (
	"fmt"
	"html"
	"math"
	"strings"
	"unicode"
)

// The look of the pictures. Tints and inks go by label; neighbours in these
// lists differ in hue (safe for the common colour blindnesses) and in lightness
// (so they stay apart in grey print), and every ink has its own dash pattern
// besides.
var (
	tints  = []string{"#ffffff", "#fae9bf", "#a6c8de", "#d3d0da", "#f2c9ae", "#cfe3c8"}
	inks   = []string{"#7b8794", "#a86b00", "#13507d", "#4a5568", "#b3401f", "#2f6b3a"}
	dashes = []string{"2 4", "7 4", "1.5 3.5", "9 3 2 3", "4 2", "2 2 6 2"}
)

const (
	svgUnit   = 64.0 // pixels a tile side
	svgMargin = 22.0
	paper     = "#fffdf8"
	outline   = "#8a94a0"
	heavy     = "#101f33"
	hatch     = "#24405c"
)

// shade is the place of a label in these lists: the first is for NoLabel, the
// others are used in turn.
func shade(l Label) int {
	if l == NoLabel {
		return 0
	}
	return 1 + (int(l)-1)%(len(tints)-1)
}

// SVG draws the graph as a self-contained SVG image: tiles tinted by the label
// of their diagonal, diagonals dashed in a pattern of the label, and what the
// Drawing asks for. No element has an id, so any number of pictures can stand in
// one page.
//
// It returns [ErrTooLong] past [MaxDrawnTiles] tiles and [ErrNotMatching] for a
// matching of another graph.
func (g Graph) SVG(d Drawing) (string, error) {
	p, err := g.picture(d)
	if err != nil {
		return "", err
	}
	return p.svg(g.describe("%v")), nil
}

// SVG draws the band, cut between its last and its first tile: the two copies
// of the cut edge are dashed and marked with arrows of one kind. Errors as for
// [Graph.SVG].
func (b Band) SVG(d Drawing) (string, error) {
	p, err := b.picture(d)
	if err != nil {
		return "", err
	}
	return p.svg(b.describe("%v")), nil
}

func (p *picture) svg(title string) string {
	low, high := p.bounds()
	c := canvas{unit: svgUnit, left: svgMargin - low.x*svgUnit, top: svgMargin + high.y*svgUnit}
	c.draw(p)
	return c.document((high.x-low.x)*svgUnit+2*svgMargin, (high.y-low.y)*svgUnit+2*svgMargin, title)
}

// bounds are the lower left and upper right corner of everything drawn.
func (p *picture) bounds() (low, high spot) {
	high = spot{float64(p.max.X), float64(p.max.Y)}
	for _, s := range p.moved {
		low = spot{math.Min(low.x, s.x), math.Min(low.y, s.y)}
		high = spot{math.Max(high.x, s.x), math.Max(high.y, s.y)}
	}
	return low, high
}

// canvas collects SVG elements; lattice points are mapped with y upwards.
type canvas struct {
	strings.Builder
	unit, left, top float64
}

func (c *canvas) x(s spot) string { return decimal(c.left + s.x*c.unit) }
func (c *canvas) y(s spot) string { return decimal(c.top - s.y*c.unit) }

// decimal writes a coordinate with at most two decimals and no needless zeros.
func decimal(v float64) string {
	s := strings.TrimRight(fmt.Sprintf("%.2f", v), "0")
	return strings.TrimSuffix(s, ".")
}

func (c *canvas) add(format string, a ...any) { fmt.Fprintf(c, format+"\n", a...) }

// line draws a line between two spots with the given attributes.
func (c *canvas) line(a, b spot, attributes string) {
	c.add(`<line x1="%s" y1="%s" x2="%s" y2="%s" %s/>`, c.x(a), c.y(a), c.x(b), c.y(b), attributes)
}

// polygon draws a closed outline.
func (c *canvas) polygon(s []spot, attributes string) {
	points := make([]string, len(s))
	for i, a := range s {
		points[i] = c.x(a) + "," + c.y(a)
	}
	c.add(`<polygon points="%s" %s/>`, strings.Join(points, " "), attributes)
}

// hatching draws slanted lines across a convex tile, at right angles to the
// diagonal. They are lines and no fill pattern: a pattern needs an id, and the ids
// of several pictures in one page would be one and the same.
func (c *canvas) hatching(tile []spot) {
	lines := math.Round(c.unit / 10) // to a tile side
	low, high := math.Inf(1), math.Inf(-1)
	for _, s := range tile {
		low, high = min(low, s.y-s.x), max(high, s.y-s.x)
	}
	var path strings.Builder
	for k := math.Ceil(low*lines - .5); k+.5 < high*lines; k++ {
		offset := (k + .5) / lines // the line y = x + offset
		command := "M"
		for i, a := range tile {
			b := tile[(i+1)%len(tile)]
			u, v := a.y-a.x-offset, b.y-b.x-offset
			if (u < 0) != (v < 0) {
				s := between(a, b, u/(u-v))
				path.WriteString(command + c.x(s) + " " + c.y(s))
				command = "L"
			}
		}
	}
	c.add(`<path d="%s" fill="none" stroke="%s" stroke-width="%s" stroke-opacity=".38"/>`, path.String(), hatch, decimal(max(c.unit/40, .9)))
}

// text writes a text centred at a spot, with a halo of the given colour.
func (c *canvas) text(s spot, size float64, ink, halo, text string) {
	c.add(`<text x="%s" y="%s" dy=".35em" font-size="%s" fill="%s" stroke="%s" stroke-width="%s" paint-order="stroke" stroke-linejoin="round" text-anchor="middle">%s</text>`,
		c.x(s), c.y(s), decimal(size), ink, halo, decimal(size*.4), escape(text))
}

// escape makes a text safe inside an XML element: characters that XML does not
// have become question marks.
func escape(text string) string {
	return html.EscapeString(strings.Map(func(r rune) rune {
		if unicode.IsControl(r) || r == unicode.ReplacementChar || r >= 0xFFFE && r <= 0xFFFF {
			return '?'
		}
		return r
	}, text))
}

// arrow marks a copy of a cut edge: both copies are glued as the arrows point,
// away from the origin. It stands at a part of the way.
func (c *canvas) arrow(a, b spot, part float64) {
	m := between(a, b, part)
	dx, dy := b.x-a.x, b.y-a.y
	const long, wide = .13, .1
	c.polygon([]spot{
		{m.x + long*dx, m.y + long*dy},
		{m.x - long*dx - wide*dy, m.y - long*dy + wide*dx},
		{m.x - long*dx + wide*dy, m.y - long*dy - wide*dx},
	}, fmt.Sprintf(`fill="%s" stroke="%s" stroke-width="1"`, heavy, paper))
}

// document wraps what was drawn.
func (c *canvas) document(width, height float64, title string) string {
	return fmt.Sprintf(`<svg xmlns="http://www.w3.org/2000/svg" width="%s" height="%s" viewBox="0 0 %s %s" role="img" font-family="'DejaVu Sans', Verdana, sans-serif">
<title>%s</title>
<rect width="100%%" height="100%%" fill="%s"/>
%s</svg>
`, decimal(width), decimal(height), decimal(width), decimal(height), escape(title), paper, c.String())
}

// draw draws a laid out graph: tiles, hatching, diagonals, edges, vertices and
// texts, in this order.
func (c *canvas) draw(p *picture) {
	u := c.unit
	for i := 1; i <= len(p.tiles); i++ {
		t := p.tiles[i-1]
		c.polygon(p.outline(i), fmt.Sprintf(`fill="%s"`, tints[shade(t.Diagonal)]))
		if p.pair[i] {
			i++
		}
	}
	if p.Matching != nil {
		for _, t := range p.tiles {
			if p.Matching.Flipped(t.Index) {
				k := t.Corners()
				c.hatching([]spot{p.at(k[0]), p.at(k[1]), p.at(k[2]), p.at(k[3])})
			}
		}
	}
	for _, t := range p.tiles {
		k := t.Corners()
		c.line(p.at(k[3]), p.at(k[1]), fmt.Sprintf(`stroke="%s" stroke-width="%s" stroke-dasharray="%s"`,
			inks[shade(t.Diagonal)], decimal(max(u/50, .7)), dashes[shade(t.Diagonal)]))
	}
	for _, e := range p.edges {
		if !e.matched {
			dash := ""
			if e.cut {
				dash = ` stroke-dasharray="3 4"`
			}
			c.line(p.at(e.from), p.at(e.to), fmt.Sprintf(`stroke="%s" stroke-width="%s"%s`, outline, decimal(max(u/38, .9)), dash))
		}
	}
	for _, e := range p.edges {
		if e.matched {
			c.line(p.at(e.from), p.at(e.to), fmt.Sprintf(`stroke="%s" stroke-width="%s" stroke-linecap="round"`, heavy, decimal(max(u/9, 2.6))))
		}
	}
	for _, e := range p.edges {
		if e.cut {
			c.arrow(p.at(e.from), p.at(e.to), p.cutMark())
		}
	}
	for _, v := range p.vertices() {
		s := p.at(v)
		c.add(`<circle cx="%s" cy="%s" r="%s" fill="%s"/>`, c.x(s), c.y(s), decimal(u/18), heavy)
	}
	p.texts(func(at spot, l Label, text string, edge bool) {
		if edge {
			c.text(at, u*.19, inks[shade(l)], paper, text)
		} else {
			c.text(at, u*.27, heavy, tints[shade(l)], text)
		}
	})
}
