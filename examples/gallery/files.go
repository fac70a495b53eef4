package main

import (
	"bytes"
	_ "embed"
	"fmt"
	"html/template"
	"os"
	"path/filepath"
	"strings"
)

//go:embed page.html
var pageSource string

var pageTemplate = template.Must(template.New("page").Parse(pageSource))

// file is one file to be written.
type file struct{ name, content string }

// files are all that the gallery writes.
func (g *gallery) files() ([]file, error) {
	var page bytes.Buffer
	if err := pageTemplate.Execute(&page, g); err != nil {
		return nil, err
	}
	all := []file{{"gallery.html", page.String()}, {"gallery.txt", g.text()}, {"gallery.tex", g.document()}}
	for _, x := range g.exhibits() {
		for _, p := range x.Pictures {
			for _, form := range []file{{".tikz", p.TikZ}, {".dot", p.DOT}} {
				if form.content != "" {
					all = append(all, file{x.FileName(p, form.name), form.content})
				}
			}
		}
	}
	return all, nil
}

// FileName names the file of a picture: random-2_0_1-at-minus-3_4.tikz.
func (x *exhibit) FileName(p picture, ending string) string {
	return p.Stem + "-" + strings.NewReplacer("(", "", ")", "", ",", "_").Replace(x.Family.String()) +
		"-at-" + strings.NewReplacer("-", "minus-", "/", "_").Replace(x.Slope.String()) + ending
}

// document is a LaTeX document with all TikZ pictures, those that are too wide shrunk to the
// width of the text.
func (g *gallery) document() string {
	var b strings.Builder
	b.WriteString(`\documentclass{article}
\usepackage{tikz}
\newcommand{\hang}[1]{\par\medskip\noindent
  \resizebox{\ifdim\width>\linewidth\linewidth\else\width\fi}{!}{\input{#1}}\par}
\begin{document}
`)
	for _, x := range g.exhibits() {
		fmt.Fprintf(&b, "\n\\section*{Slope $%v$ in the family $%v$: %s}\n", x.Slope, x.Family, x.Number())
		for _, p := range x.Pictures {
			if p.TikZ != "" {
				fmt.Fprintf(&b, "\\subsection*{%s}\n\\hang{%s}\n", p.Title, x.FileName(p, ".tikz"))
			}
		}
	}
	b.WriteString("\n\\end{document}\n")
	return b.String()
}

// writeFiles writes the files into the folder, which is made if it is missing.
func writeFiles(folder string, files []file) error {
	if err := os.MkdirAll(folder, 0o755); err != nil {
		return err
	}
	for _, f := range files {
		if err := os.WriteFile(filepath.Join(folder, f.name), []byte(f.content), 0o644); err != nil {
			return err
		}
	}
	return nil
}
