package snake

import (
	"fmt"
	"strings"
)

// TikZ draws the graph as a tikzpicture environment for LaTeX; a document needs
// the package tikz and nothing else. Names are written into it as they are, so
// they may hold LaTeX, and must be valid there.
//
// Flipped tiles are shaded. Errors as for [Graph.SVG].
func (g Graph) TikZ(d Drawing) (string, error) {
	p, err := g.picture(d)
	if err != nil {
		return "", err
	}
	return p.tikz(), nil
}

// TikZ draws the band, cut between its last and its first tile, the two copies
// of the cut edge dashed. Errors as for [Graph.SVG].
func (b Band) TikZ(d Drawing) (string, error) {
	p, err := b.picture(d)
	if err != nil {
		return "", err
	}
	return p.tikz(), nil
}

// tikzDashes are the dash patterns of the diagonals, as in the SVG pictures.
var tikzDashes = []string{
	"on .6pt off 2pt", "on 3.5pt off 2pt", "on .8pt off 1.6pt",
	"on 4.5pt off 1.5pt on 1pt off 1.5pt", "on 2pt off 1pt", "on 1pt off 1pt on 3pt off 1pt",
}

func (p *picture) tikz() string {
	var b strings.Builder
	line := func(format string, a ...any) { fmt.Fprintf(&b, "  "+format+"\n", a...) }
	at := func(v spot) string { return "(" + decimal(v.x) + "," + decimal(v.y) + ")" }
	path := func(s []spot) string {
		parts := make([]string, len(s))
		for i, v := range s {
			parts[i] = at(v)
		}
		return strings.Join(parts, " -- ")
	}
	b.WriteString("\\begin{tikzpicture}[x=1.4cm, y=1.4cm, line join=round]\n")
	for k := range tints {
		line(`\definecolor{tint%d}{HTML}{%s}`, k, strings.ToUpper(tints[k][1:]))
		line(`\definecolor{ink%d}{HTML}{%s}`, k, strings.ToUpper(inks[k][1:]))
	}
	for i := 1; i <= len(p.tiles); i++ {
		line(`\fill[tint%d] %s -- cycle;`, shade(p.tiles[i-1].Diagonal), path(p.outline(i)))
		if p.pair[i] {
			i++
		}
	}
	for _, t := range p.tiles {
		k := t.Corners()
		if p.Matching != nil && p.Matching.Flipped(t.Index) {
			line(`\fill[black, fill opacity=.14] %s -- cycle;`, path([]spot{p.at(k[0]), p.at(k[1]), p.at(k[2]), p.at(k[3])}))
		}
		s := shade(t.Diagonal)
		line(`\draw[ink%d, dash pattern=%s] %s;`, s, tikzDashes[s], path([]spot{p.at(k[3]), p.at(k[1])}))
	}
	for _, e := range p.edges {
		style := "gray"
		switch {
		case e.matched:
			style = "line width=2.4pt, line cap=round"
		case e.cut:
			style = "gray, dashed"
		}
		line(`\draw[%s] %s;`, style, path([]spot{p.at(e.from), p.at(e.to)}))
	}
	for _, v := range p.vertices() {
		line(`\fill %s circle (.04);`, at(p.at(v)))
	}
	p.texts(func(s spot, l Label, text string, edge bool) {
		if edge {
			line(`\node[ink%d, fill=white, inner sep=.6pt, font=\scriptsize] at %s {%s};`, shade(l), at(s), text)
		} else {
			line(`\node[fill=tint%d, fill opacity=.75, text opacity=1, inner sep=1pt] at %s {%s};`, shade(l), at(s), text)
		}
	})
	b.WriteString("\\end{tikzpicture}\n")
	return b.String()
}
