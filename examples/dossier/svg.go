package main

import (
	"fmt"
	"html/template"
	"math"
	"strings"

	"example.com/onecusp/farey"
)

// Colours of the pictures. They stay apart for colour-blind readers and, since
// they differ in lightness, in grey print; each class has a dash pattern besides. They
// are the ones that package snake draws its classes with.
const (
	paperColour = "#fffdf8"
	inkColour   = "#101f33"
	faintColour = "#b9b4a6"
	fillColour  = "#f1ede0"
)

var (
	classColours = [3]string{"#a86b00", "#13507d", "#4a5568"}
	classDashes  = [3]string{"7 3", "", "10 3 3 3"}
)

// drawing collects the elements of an SVG picture, in pixels, y downwards.
type drawing struct {
	strings.Builder
	width, height float64
}

// style is how a line or an area is drawn; the zero value draws nothing.
type style struct {
	Stroke, Fill, Dash string
	Width              float64
}

func (s style) String() string {
	var b strings.Builder
	fill := s.Fill
	if fill == "" {
		fill = "none"
	}
	fmt.Fprintf(&b, `fill="%s"`, fill)
	if s.Stroke != "" {
		fmt.Fprintf(&b, ` stroke="%s" stroke-width="%s" stroke-linejoin="round"`, s.Stroke, pixels(s.Width))
	}
	if s.Dash != "" {
		fmt.Fprintf(&b, ` stroke-dasharray="%s"`, s.Dash)
	}
	return b.String()
}

// classLine is the line of an edge of class c.
func classLine(c farey.Class, width float64) style {
	return style{Stroke: classColours[c%3], Dash: classDashes[c%3], Width: width}
}

// spot is a point of a drawing.
type spot struct{ x, y float64 }

func (d *drawing) line(a, b spot, s style) {
	fmt.Fprintf(d, `<line x1="%s" y1="%s" x2="%s" y2="%s" %v/>`+"\n", pixels(a.x), pixels(a.y), pixels(b.x), pixels(b.y), s)
}

func (d *drawing) circle(c spot, r float64, s style) {
	fmt.Fprintf(d, `<circle cx="%s" cy="%s" r="%s" %v/>`+"\n", pixels(c.x), pixels(c.y), pixels(r), s)
}

func (d *drawing) polygon(s style, corners ...spot) {
	points := make([]string, len(corners))
	for i, c := range corners {
		points[i] = pixels(c.x) + "," + pixels(c.y)
	}
	fmt.Fprintf(d, `<polygon points="%s" %v/>`+"\n", strings.Join(points, " "), s)
}

func (d *drawing) path(data string, s style) {
	fmt.Fprintf(d, `<path d="%s" %v/>`+"\n", data, s)
}

// write puts a text at a spot, anchored at its "start", "middle" or "end", with a halo
// of the paper's colour so that lines behind it do not disturb.
func (d *drawing) write(at spot, anchor string, size float64, colour, text string) {
	fmt.Fprintf(d, `<text x="%s" y="%s" dy=".35em" text-anchor="%s" font-size="%s" fill="%s" stroke="%s" stroke-width="3" paint-order="stroke" stroke-linejoin="round">%s</text>`+"\n",
		pixels(at.x), pixels(at.y), anchor, pixels(size), colour, paperColour, template.HTMLEscapeString(text))
}

// document is the finished picture; title is what a reader who cannot see it is told.
func (d *drawing) document(title string) template.HTML {
	return template.HTML(fmt.Sprintf(`<svg xmlns="http://www.w3.org/2000/svg" width="%[1]s" height="%[2]s" viewBox="0 0 %[1]s %[2]s" role="img" font-family="'DejaVu Sans', Verdana, sans-serif">
<title>%[3]s</title>
<rect width="100%%" height="100%%" fill="%[4]s"/>
%[5]s</svg>
`, pixels(math.Ceil(d.width)), pixels(math.Ceil(d.height)), template.HTMLEscapeString(title), paperColour, d.String()))
}

// least is the width below which a picture is not shrunk to fit a narrow screen but
// scrolled: its texts would be hard to read.
func (d *drawing) least() int { return int(.74 * d.width) }

// sample is a small picture for a key, on the page's own background.
func sample(draw func(d *drawing)) template.HTML {
	d := &drawing{width: 34, height: 16}
	draw(d)
	return template.HTML(fmt.Sprintf(`<svg xmlns="http://www.w3.org/2000/svg" width="34" height="16" viewBox="0 0 34 16" aria-hidden="true"><rect width="34" height="16" rx="2" fill="%s"/>%s</svg>`, paperColour, d.String()))
}

// pixels writes a coordinate with at most two decimals and no needless zeros.
func pixels(v float64) string {
	s := strings.TrimRight(fmt.Sprintf("%.2f", v), "0")
	s = strings.TrimSuffix(s, ".")
	if s == "-0" {
		return "0"
	}
	return s
}
