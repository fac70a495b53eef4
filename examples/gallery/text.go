package main

import (
	"fmt"
	"strings"
	"text/tabwriter"
	"unicode/utf8"
)

// summary is one line for each exhibit.
func (g *gallery) summary() string {
	var b strings.Builder
	heading(&b, "Gallery of snake graphs", '=')
	if g.Note != "" {
		b.WriteString(wrap(g.Note) + "\n\n")
	}
	w := tabwriter.NewWriter(&b, 0, 0, 2, ' ', 0)
	fmt.Fprintln(w, "Slope\tFamily\tNumber\tTiles\tHexagons\tPictures\tContinued fraction")
	for _, x := range g.exhibits() {
		fmt.Fprintf(w, "%v\t%v\t%s\t%d\t%d\t%d\t%s\n",
			x.Slope, x.Family, x.Number(), x.graph.Tiles(), x.hexagons, len(x.Pictures), x.fact("Continued fraction"))
	}
	w.Flush()
	return b.String()
}

// fact is the value of a fact by its name.
func (x *exhibit) fact(name string) string {
	for _, f := range x.Facts {
		if f.Name == name {
			return f.Value
		}
	}
	return ""
}

// text is the gallery with pictures made of characters.
func (g *gallery) text() string {
	var b strings.Builder
	b.WriteString(g.summary())
	for _, x := range g.exhibits() {
		b.WriteString("\n\n")
		heading(&b, fmt.Sprintf("Slope %v in the family %v: %s", x.Slope, x.Family, x.Number()), '=')
		for _, f := range x.Facts {
			value := f.Value
			if f.Whole != "" {
				value = f.Whole
			}
			fmt.Fprintf(&b, "%-20s %s\n", f.Name, value)
			if f.Note != "" {
				fmt.Fprintf(&b, "%-20s (%s)\n", "", f.Note)
			}
		}
		for _, p := range x.Pictures {
			if p.Text != "" {
				b.WriteByte('\n')
				heading(&b, p.Title, '-')
				fmt.Fprintf(&b, "%s\n\n%s", wrap(p.Caption+"."), p.Text)
			}
		}
	}
	return b.String()
}

func heading(b *strings.Builder, title string, line rune) {
	fmt.Fprintf(b, "%s\n%s\n", title, strings.Repeat(string(line), utf8.RuneCountInString(title)))
}

// wrap breaks a sentence into lines.
func wrap(text string) string {
	const width = 96
	var b strings.Builder
	column := 0
	for _, word := range strings.Fields(text) {
		n := utf8.RuneCountInString(word)
		switch {
		case column == 0:
		case column+1+n > width:
			b.WriteByte('\n')
			column = 0
		default:
			b.WriteByte(' ')
			column++
		}
		b.WriteString(word)
		column += n
	}
	return b.String()
}
