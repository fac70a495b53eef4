package snake

import (
	"fmt"
	"math/big"
	"strings"
	"unicode"

	"example.com/onecusp/contfrac"
)

// String describes the graph in one line, with its whole word: "snake graph,
// 4 tiles: RLL". The verb %v shortens long words. [Graph.Text] draws.
func (g Graph) String() string { return g.describe("%s") }

// Format implements fmt.Formatter: %s writes what String returns, %q quotes it,
// %v and every other verb shorten a long word.
func (g Graph) Format(f fmt.State, verb rune) { formatAs(f, verb, g.describe) }

// formatAs prints a description in full for %s and %q, shortened otherwise.
func formatAs(f fmt.State, verb rune, describe func(verb string) string) {
	switch verb {
	case 's':
		fmt.Fprint(f, describe("%s"))
	case 'q':
		fmt.Fprintf(f, "%q", describe("%s"))
	default:
		fmt.Fprint(f, describe("%v"))
	}
}

func (g Graph) describe(verb string) string {
	w, ok := g.Word()
	if !ok {
		return "snake graph, single edge"
	}
	return "snake graph, " + describeTiles(w, verb)
}

// describeTiles names the number of tiles that an open word gives, and the word.
func describeTiles(w contfrac.Word, verb string) string {
	if w.IsEmpty() {
		return "1 tile"
	}
	n := w.Len()
	n.Add(n, big.NewInt(1))
	return fmt.Sprintf("%s tiles: "+verb, contfrac.Abbreviate(n), w)
}

// Text draws the graph with box characters, one row of tiles to two lines,
// matched edges heavy and flipped tiles shaded at their corners. Of names,
// three characters fit into a tile. It returns [ErrTooLong] past
// [MaxDrawnTiles] tiles and [ErrNotMatching] for a matching of another graph.
func (g Graph) Text(d Drawing) (string, error) {
	p, err := g.picture(d)
	if err != nil {
		return "", err
	}
	return p.text(), nil
}

// Text draws the band, cut between its last and its first tile: the two copies
// of the cut edge are dotted, or heavy both when it is matched. Errors as for
// [Graph.Text].
func (b Band) Text(d Drawing) (string, error) {
	p, err := b.picture(d)
	if err != nil {
		return "", err
	}
	return p.text(), nil
}

func (p *picture) text() string {
	const wide, high = 4, 2 // characters from vertex to vertex
	rows := make([][]rune, p.max.Y*high+1)
	for i := range rows {
		rows[i] = []rune(strings.Repeat(" ", p.max.X*wide+1))
	}
	put := func(x, y int, r rune) { rows[len(rows)-1-y][x] = r }
	for _, e := range p.edges {
		x, y := e.from.X*wide, e.from.Y*high
		if e.from.Y == e.to.Y {
			for k := 1; k < wide; k++ {
				put(x+k, y, e.pick('━', '┄', '─'))
			}
		} else {
			put(x, y+1, e.pick('┃', '┆', '│'))
		}
	}
	for _, v := range p.vertices() {
		put(v.X*wide, v.Y*high, '●')
	}
	for _, t := range p.tiles {
		x, y := t.At.X*wide+1, t.At.Y*high+1
		if p.Matching != nil && p.Matching.Flipped(t.Index) {
			put(x, y, '░')
			put(x+2, y, '░')
		}
		text := []rune(p.inside(t))
		if len(text) > wide-1 {
			text = text[:wide-1]
		}
		if len(text) == 1 {
			x++
		}
		for k, r := range text {
			if r == unicode.ReplacementChar || unicode.IsControl(r) {
				r = '?'
			}
			put(x+k, y, r)
		}
	}
	var b strings.Builder
	for _, row := range rows {
		b.WriteString(strings.TrimRight(string(row), " "))
		b.WriteByte('\n')
	}
	return b.String()
}

// pick chooses the character of an edge.
func (e drawnEdge) pick(matched, cut, plain rune) rune {
	switch {
	case e.matched:
		return matched
	case e.cut:
		return cut
	}
	return plain
}
