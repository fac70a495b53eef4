package main

import (
	"fmt"
	"math/big"
	"strings"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/farey"
)

const (
	maxRibbonFlips = 24 // a path is unrolled up to this many flips
	ribbonTop      = 56.0
	ribbonBottom   = 156.0
	ribbonMiddle   = (ribbonTop + ribbonBottom) / 2
)

// ribbonPicture unrolls the path to the slope: triangle beside triangle, the smaller
// slopes below and the greater above, each with its number. False for the base slopes and for
// long paths.
func (e *entry) ribbonPicture() (picture, bool) {
	path := e.Slope.Path()
	if path.IsBase() || path.Moves().Len().Cmp(big.NewInt(maxRibbonFlips)) >= 0 {
		return picture{}, false
	}
	stops := make([]stop, 0, maxRibbonFlips)
	widest := 8
	for s := range trail(path) {
		stops = append(stops, s)
		widest = max(widest, len(s.Newest.String()), len(e.numberLabel(s.Newest)))
	}
	step := 8.2 * float64(widest)
	column := func(i int) float64 { return 62 + step*float64(i) }

	// The state is an edge with its lower and upper end, as Path describes it. Faces
	// are drawn at once, the names of their corners after all faces.
	d := &drawing{height: ribbonBottom + 52}
	var names []func()
	place := func(s farey.Slope, at spot, side string) spot {
		names = append(names, func() { e.nameVertex(d, s, at, side) })
		return at
	}
	face := func(a, b, c spot, fill string) { d.polygon(style{Fill: fill, Stroke: inkColour, Width: 1}, a, b, c) }
	below, above, behind := farey.NewPath(path.First(), contfrac.Word{}).Edge() // the base edge crossed first
	first := place(behind, spot{column(0), ribbonMiddle}, "end")
	low := place(below, spot{column(1), ribbonBottom}, "below")
	high := place(above, spot{column(1), ribbonTop}, "above")
	face(first, low, high, fillColour)

	var text strings.Builder
	fmt.Fprintf(&text, "%-9s %s,  %s,  %s\n", "base", e.named(below), e.named(above), e.named(behind))
	move := "first"
	for i, s := range stops {
		fmt.Fprintf(&text, "%-9s %s\n", move, e.named(s.Newest))
		move = s.Next.String() + " to"
		x := column(i + 2)
		switch {
		case s.Last:
			at := place(s.Newest, spot{x - step/3, ribbonMiddle}, "start")
			face(low, high, at, "#f6dfa4")
			d.width = at.x
		case s.Next == contfrac.L: // the newest slope becomes the upper end
			at := place(s.Newest, spot{x, ribbonTop}, "above")
			face(low, high, at, fillColour)
			high = at
		default:
			at := place(s.Newest, spot{x, ribbonBottom}, "below")
			face(low, high, at, fillColour)
			low = at
		}
	}
	for _, name := range names {
		name()
	}
	d.width += 16 + 8.6*float64(widest)
	return picture{
		Caption: "The path unrolled: each flip adds the next triangle and its slope, with the number below the name; smaller slopes run along the lower rim, greater ones along the upper",
		Least:   d.least(),
		SVG: d.document(fmt.Sprintf("The %s from the base triangle to %v, unrolled into a strip",
			plural(big.NewInt(int64(len(stops))), "flip", "flips"), e.Slope)),
		Text: text.String(),
	}, true
}

// nameVertex marks a slope and writes its name and number beside it.
func (e *entry) nameVertex(d *drawing, s farey.Slope, at spot, place string) {
	vertexMark(d, at, s.Class(), 4.6)
	text, anchor := at, place
	switch place {
	case "above":
		text.y, anchor = at.y-33, "middle"
	case "below":
		text.y, anchor = at.y+20, "middle"
	case "start":
		text.x, text.y = at.x+12, at.y-8
	case "end":
		text.x, text.y = at.x-12, at.y-8
	}
	d.write(text, anchor, 13.5, inkColour, s.String())
	text.y += 17
	d.write(text, anchor, 11.5, "#5c5a52", e.numberLabel(s))
}

// maxLabelBits is the size of a number up to which a picture shows it.
const maxLabelBits = 40

// numberLabel is the number at a slope, or its length where there is little room.
func (e *entry) numberLabel(s farey.Slope) string {
	lo, hi, err := e.family.Bits(s)
	if err != nil {
		return ""
	}
	if hi.Cmp(big.NewInt(maxLabelBits)) > 0 {
		return digits(lo) + " bits"
	}
	n, err := e.family.Number(s)
	if err != nil {
		return ""
	}
	return n.String()
}

func (e *entry) named(s farey.Slope) string { return fmt.Sprintf("%v = %s", s, e.numberLabel(s)) }
