package main

import (
	"context"
	"fmt"
	"math/big"
	"slices"

	"example.com/onecusp/farey"
)

// maxDrawnCrossings is the number of crossings up to which an arc is drawn.
const maxDrawnCrossings = 90

// arcSection counts the crossings of the arc and draws it in the lattice.
func (e *entry) arcSection(context.Context) (section, error) {
	s := section{Title: "The arc and what it crosses"}
	s.add("From, to", "(0,0),  (%s,%s)", digits(e.Slope.Den()), digits(e.Slope.Num()))
	total := new(big.Int)
	s.Table = &table{Caption: "Edges crossed, by class", Head: []string{"Class", "Edges", "Crossings", "Weight"}, Marked: -1}
	for c, n := range e.Slope.CrossingCounts() {
		class := farey.Class(c)
		kind := [3]string{"horizontal", "vertical", "diagonal"}[c]
		s.Table.Rows = append(s.Table.Rows, []string{class.String(), kind, digits(n), fmt.Sprint(e.family.Weight(class))})
		total.Add(total, n)
	}
	s.add("Crossings in all", "%s", digits(total))
	if total.Cmp(big.NewInt(maxDrawnCrossings)) > 0 {
		s.Remark = fmt.Sprintf("Not drawn: the arc crosses %s edges, and %d are the most that a picture shows clearly.", digits(total), maxDrawnCrossings)
		return s, nil
	}
	crossings, err := e.Slope.Crossings()
	if err != nil {
		return s, err
	}
	s.Pictures = []picture{arcPicture(e.Slope, slices.Collect(crossings))}
	if total.Sign() == 0 {
		s.Remark = "The arc is an edge of the triangulation itself."
	}
	return s, nil
}

// lattice places a part of Z² in a drawing.
type lattice struct {
	low, high farey.Point
	unit      float64
}

// margin is the room round the lattice for the names of the end points.
const margin = 46

func newLattice(points []farey.Point) lattice {
	l := lattice{low: points[0], high: points[0]}
	for _, p := range points {
		l.low.X, l.low.Y = min(l.low.X, p.X), min(l.low.Y, p.Y)
		l.high.X, l.high.Y = max(l.high.X, p.X), max(l.high.Y, p.Y)
	}
	widest := float64(max(l.high.X-l.low.X, l.high.Y-l.low.Y, 1))
	l.unit = min(64, max(26, 620/widest))
	return l
}

func (l lattice) at(x, y float64) spot {
	return spot{margin + (x-float64(l.low.X))*l.unit, margin + (float64(l.high.Y)-y)*l.unit}
}

func (l lattice) point(p farey.Point) spot { return l.at(float64(p.X), float64(p.Y)) }

// grid draws all lattice segments of slopes 0/1, 1/0 and 1/1 in the rectangle.
func (l lattice) grid(d *drawing) {
	faint := style{Stroke: faintColour, Width: 1}
	segment := func(a, b farey.Point) { d.line(l.point(a), l.point(b), faint) }
	for x := l.low.X; x <= l.high.X; x++ {
		segment(farey.Point{X: x, Y: l.low.Y}, farey.Point{X: x, Y: l.high.Y})
	}
	for y := l.low.Y; y <= l.high.Y; y++ {
		segment(farey.Point{X: l.low.X, Y: y}, farey.Point{X: l.high.X, Y: y})
	}
	diagonal := func(a farey.Point) {
		n := min(l.high.X-a.X, l.high.Y-a.Y)
		segment(a, farey.Point{X: a.X + n, Y: a.Y + n})
	}
	for x := l.low.X; x < l.high.X; x++ {
		diagonal(farey.Point{X: x, Y: l.low.Y})
	}
	for y := l.low.Y + 1; y < l.high.Y; y++ {
		diagonal(farey.Point{X: l.low.X, Y: y})
	}
}

// arcPicture draws the arc of s in the triangulated lattice: the triangles passed
// tinted, the edges crossed coloured by class, the crossings marked.
func arcPicture(s farey.Slope, crossings []farey.Crossing) picture {
	p, q, _ := s.Int64s() // few crossings, so the terms are small
	start, end := farey.Point{}, farey.Point{X: q, Y: p}
	points := []farey.Point{start, end}
	for _, c := range crossings {
		points = append(points, c.Left, c.Right)
	}
	caption := fmt.Sprintf("The arc of slope %v in the lattice, triangulated by all segments of slopes 0/1, 1/0 and 1/1", s)
	if len(crossings) > 0 {
		caption += "; the triangles passed are tinted"
	} else { // show some of the triangulation all the same
		points = append(points, start.Sub(farey.Point{X: 1, Y: 1}), end.Add(farey.Point{X: 1, Y: 1}))
	}
	l := newLattice(points)
	far := l.at(float64(l.high.X), float64(l.low.Y))
	d := &drawing{width: far.x + margin, height: far.y + margin}

	for _, t := range corridor(crossings, start, end) {
		d.polygon(style{Fill: fillColour}, l.point(t[0]), l.point(t[1]), l.point(t[2]))
	}
	l.grid(d)
	for _, c := range crossings {
		d.line(l.point(c.Left), l.point(c.Right), classLine(c.Class, 3.2))
	}
	for x := l.low.X; x <= l.high.X; x++ {
		for y := l.low.Y; y <= l.high.Y; y++ {
			d.circle(l.at(float64(x), float64(y)), 2.2, style{Fill: "#8a8577"})
		}
	}
	d.line(l.point(start), l.point(end), style{Stroke: inkColour, Width: 2})
	for _, c := range crossings {
		x, y := meets(c, p, q)
		mark(d, l.at(x, y), c.Nearer, min(4.6, l.unit/8))
	}
	for _, v := range [2]farey.Point{start, end} {
		at := l.point(v)
		d.circle(at, 5, style{Fill: inkColour})
		below := 17.0 // the name stands off the arc
		if (v == end) == (p >= 0) {
			below = -17
		}
		d.write(spot{at.x, at.y + below}, "middle", 13, inkColour, fmt.Sprintf("(%d,%d)", v.X, v.Y))
	}
	return picture{
		Caption: caption,
		Least:   d.least(),
		SVG: d.document(fmt.Sprintf("The arc of slope %v from (0,0) to (%d,%d) in the triangulated lattice, with %s marked",
			s, q, p, plural(big.NewInt(int64(len(crossings))), "crossing", "crossings"))),
		Key: arcKey(crossings),
	}
}

// corridor lists the triangles that the arc passes, each by its corners.
func corridor(crossings []farey.Crossing, start, end farey.Point) [][3]farey.Point {
	if len(crossings) == 0 {
		return nil
	}
	triangles := [][3]farey.Point{{start, crossings[0].Left, crossings[0].Right}}
	for i, c := range crossings {
		ahead := end
		if i+1 < len(crossings) {
			// The next edge shares one end with this one: its other end lies ahead.
			ahead = crossings[i+1].Left
			if c.Turn == farey.Left {
				ahead = crossings[i+1].Right
			}
		}
		triangles = append(triangles, [3]farey.Point{c.Left, c.Right, ahead})
	}
	return triangles
}

// meets is the point where the arc of slope p/q meets the crossed edge. Of a point v
// = (x,y) the integer q·y − p·x is proportional to its distance from the arc's line.
func meets(c farey.Crossing, p, q int64) (x, y float64) {
	left := float64(q*c.Left.Y - p*c.Left.X)
	right := float64(q*c.Right.Y - p*c.Right.X)
	t := left / (left - right)
	return float64(c.Left.X) + t*float64(c.Right.X-c.Left.X), float64(c.Left.Y) + t*float64(c.Right.Y-c.Left.Y)
}

// mark draws a crossing point by the side of the end that it is nearer to.
func mark(d *drawing, at spot, nearer farey.Side, r float64) {
	outline := style{Stroke: inkColour, Width: 1.6}
	switch nearer {
	case farey.Right:
		outline.Fill = inkColour
		d.circle(at, r, outline)
	case farey.Left:
		outline.Fill = paperColour
		d.circle(at, r, outline)
	default:
		outline.Fill = "#f2b705"
		d.polygon(outline, spot{at.x, at.y - 1.6*r}, spot{at.x + 1.6*r, at.y}, spot{at.x, at.y + 1.6*r}, spot{at.x - 1.6*r, at.y})
	}
}

// arcKey explains the marks that occur.
func arcKey(crossings []farey.Crossing) []keyItem {
	var key []keyItem
	for i, kind := range [3]string{"horizontal edge, class zero", "vertical edge, class infinity", "diagonal edge, class one"} {
		class := farey.Class(i)
		if slices.ContainsFunc(crossings, func(c farey.Crossing) bool { return c.Class == class }) {
			key = append(key, keyItem{sample(func(d *drawing) { d.line(spot{3, 8}, spot{31, 8}, classLine(class, 3.2)) }), kind})
		}
	}
	marks := []struct {
		side farey.Side
		text string
	}{
		{farey.Left, "nearer to the end on the left: own letter L"},
		{farey.Right, "nearer to the end on the right: own letter R"},
		{farey.Middle, "half way along the arc: the middle"},
	}
	for _, m := range marks {
		if slices.ContainsFunc(crossings, func(c farey.Crossing) bool { return c.Nearer == m.side }) {
			key = append(key, keyItem{sample(func(d *drawing) { mark(d, spot{17, 8}, m.side, 4.6) }), m.text})
		}
	}
	return key
}
