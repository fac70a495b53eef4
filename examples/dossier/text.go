package main

import (
	"fmt"
	"strings"
	"text/tabwriter"
	"unicode/utf8"
)

const (
	textWidth = 96 // sentences are broken to this width; numbers and words of letters never
	nameWidth = 24
)

// text is the dossier as plain text.
func (d *dossier) text() string {
	var b strings.Builder
	heading(&b, "Exchange family "+d.Family.String(), '=')
	if d.Note != "" {
		b.WriteString(wrap(d.Note, 0) + "\n\n")
	}
	writeFacts(&b, d.Facts)
	for _, e := range d.Entries {
		b.WriteString("\n\n")
		heading(&b, fmt.Sprintf("Slope %v: %s", e.Slope, e.Headline), '=')
		for i, s := range e.Sections {
			if i > 0 {
				b.WriteByte('\n')
			}
			s.write(&b)
		}
	}
	return b.String()
}

func (s section) write(b *strings.Builder) {
	heading(b, s.Title, '-')
	writeFacts(b, s.Facts)
	if s.Table != nil {
		s.Table.write(b)
	}
	if s.Remark != "" {
		b.WriteString(wrap(s.Remark, 0) + "\n")
	}
	for _, p := range s.Pictures {
		if p.Text != "" {
			fmt.Fprintf(b, "\n%s\n\n%s", wrap(p.Caption+":", 0), indent(p.Text, "    "))
		}
	}
}

func heading(b *strings.Builder, title string, line rune) {
	fmt.Fprintf(b, "%s\n%s\n", title, strings.Repeat(string(line), utf8.RuneCountInString(title)))
}

func writeFacts(b *strings.Builder, facts []fact) {
	for _, f := range facts {
		value := f.Value
		if f.Plain {
			value = wrap(value, nameWidth)
		}
		pad := strings.Repeat(" ", max(1, nameWidth-utf8.RuneCountInString(f.Name)))
		fmt.Fprintf(b, "%s%s%s\n", f.Name, pad, value)
		if f.Note != "" {
			fmt.Fprintf(b, "%s%s\n", strings.Repeat(" ", nameWidth), wrap("("+f.Note+")", nameWidth))
		}
	}
}

func (t *table) write(b *strings.Builder) {
	fmt.Fprintf(b, "\n%s:\n\n", t.Caption)
	w := tabwriter.NewWriter(b, 0, 0, 2, ' ', 0)
	fmt.Fprintf(w, "    %s\n", strings.Join(t.Head, "\t"))
	for i, row := range t.Rows {
		mark := "   "
		if i == t.Marked {
			mark = "  >"
		}
		fmt.Fprintf(w, "%s %s\n", mark, strings.Join(row, "\t"))
	}
	w.Flush()
	b.WriteByte('\n')
}

// wrap breaks a sentence at spaces; the lines after the first are indented.
func wrap(text string, margin int) string {
	var b strings.Builder
	column := margin
	for i, word := range strings.Fields(text) {
		width := utf8.RuneCountInString(word)
		switch {
		case i == 0:
		case column+1+width > textWidth:
			b.WriteString("\n" + strings.Repeat(" ", margin))
			column = margin
		default:
			b.WriteByte(' ')
			column++
		}
		b.WriteString(word)
		column += width
	}
	return b.String()
}

func indent(text, by string) string {
	return by + strings.ReplaceAll(strings.TrimRight(text, "\n"), "\n", "\n"+by) + "\n"
}
