package main

import (
	"fmt"
	"math"
	"math/big"

	"example.com/onecusp/farey"
)

const (
	discRadius  = 132.0
	discMargin  = 92.0
	discDepth   = 5  // flips from the base triangle up to which all triangles are drawn
	discStops   = 60 // triangles of the path that are drawn; the later ones are too small to see
	labelSpread = .2 // least angle between two names at the rim
)

// discPicture shows all Farey triangles as ideal triangles in a disc, those on the path
// to s tinted.
func discPicture(s farey.Slope) picture {
	d := &drawing{width: 2 * (discRadius + discMargin), height: 2*discRadius + 70}
	d.circle(d.centre(), discRadius, style{Stroke: inkColour, Width: 1.2, Fill: "#fffefb"})
	tint := style{Fill: "#f6dfa4", Stroke: "#a86b00", Width: .8}
	d.triangle(farey.Triangle{}, tint)
	last, drawn := farey.Triangle{}, 0
	for stop := range trail(s.Path()) {
		last = stop.Triangle
		d.triangle(last, tint)
		if drawn++; drawn == discStops {
			break
		}
	}
	caption := fmt.Sprintf("light, the path from the base triangle; dark, the triangle in which %v appears first", s)
	if drawn == 0 {
		caption = "dark, the base triangle, where every path begins"
	}
	if drawn < discStops {
		d.triangle(last, style{Fill: "#e5a50a", Stroke: "#a86b00", Width: 1})
	} else {
		caption = fmt.Sprintf("light, the first %d triangles on the path from the base triangle to %v; the later ones are too small to see", discStops, s)
	}
	d.tessellation(farey.Triangle{}, 3, discDepth)
	d.rim(s)
	return picture{
		Caption: "The Farey triangles as ideal triangles in a disc: " + caption,
		Least:   d.least(),
		SVG:     d.document(fmt.Sprintf("Farey triangles in a disc, with the path from the base triangle to %v", s)),
		Key:     classKey(),
	}
}

func (d *drawing) centre() spot { return spot{d.width / 2, d.height / 2} }

// rimAngle places a slope on the rim: the vector q + p·ω, with ω a third root of
// unity, has half the angle, so that 0/1, 1/1 and 1/0 stand a third of the way round from each
// other and Farey triangles become ideal triangles.
func rimAngle(s farey.Slope) float64 {
	x, y := -.5, math.Sqrt(3)/2 // ω, for 1/0
	if !s.IsInfinite() {
		ratio, _ := new(big.Rat).SetFrac(s.Num(), s.Den()).Float64()
		if math.Abs(ratio) < 1e15 {
			x, y = 1+ratio*x, ratio*y
		}
	}
	return 2*math.Atan2(y, x) - math.Pi/6
}

func (d *drawing) onRim(angle, radius float64) spot {
	c := d.centre()
	return spot{c.x + radius*math.Cos(angle), c.y - radius*math.Sin(angle)}
}

// geodesic continues a path of SVG commands from the rim point at angle a to the
// one at angle b, by the circle through both that meets the rim at right angles. Neighbours
// are never opposite each other, so that it is no straight line.
func (d *drawing) geodesic(a, b float64) string {
	turn := math.Remainder(b-a, 2*math.Pi)
	end := d.onRim(b, discRadius)
	radius := discRadius * math.Abs(math.Tan(turn/2))
	sweep := 0
	if turn > 0 {
		sweep = 1
	}
	return fmt.Sprintf("A%[1]s %[1]s 0 0 %[2]d %[3]s %[4]s", pixels(radius), sweep, pixels(end.x), pixels(end.y))
}

// triangle draws a Farey triangle with curved sides.
func (d *drawing) triangle(t farey.Triangle, s style) {
	var angles [3]float64
	for i, c := range classes {
		angles[i] = rimAngle(t.Vertex(c))
	}
	from := d.onRim(angles[0], discRadius)
	d.path(fmt.Sprintf("M%s %s", pixels(from.x), pixels(from.y))+
		d.geodesic(angles[0], angles[1])+d.geodesic(angles[1], angles[2])+d.geodesic(angles[2], angles[0])+"Z", s)
}

// tessellation outlines the triangles behind t up to a depth; made is the class of the
// vertex that led to t, 3 for none.
func (d *drawing) tessellation(t farey.Triangle, made farey.Class, depth int) {
	d.triangle(t, style{Stroke: "#8a8577", Width: .6})
	if depth == 0 {
		return
	}
	for _, c := range classes {
		if c != made {
			d.tessellation(t.Flip(c), c, depth-1)
		}
	}
}

// rim names the slope s, its older vertices, and of the first slopes those that do not
// stand too close.
func (d *drawing) rim(s farey.Slope) {
	named := []farey.Slope{s}
	if a, b, err := s.Parents(); err == nil {
		named = append(named, a, b)
	}
	for _, text := range [...]string{"0/1", "1/0", "1/1", "1/2", "2/1", "-1/1", "1/3", "2/3", "3/2", "3/1", "-1/2", "-2/1"} {
		named = append(named, farey.MustParse(text))
	}
	var taken []float64
	for i, t := range named {
		angle := rimAngle(t)
		if crowded(angle, taken) {
			continue
		}
		taken = append(taken, angle)
		size, colour := 12.0, "#5c5a52"
		if i == 0 {
			size, colour = 15, inkColour
		}
		vertexMark(d, d.onRim(angle, discRadius), t.Class(), size/3.2)
		at := d.onRim(angle, discRadius+11)
		anchor := "middle"
		switch {
		case math.Cos(angle) > .35:
			anchor = "start"
		case math.Cos(angle) < -.35:
			anchor = "end"
		default:
			at = d.onRim(angle, discRadius+16)
		}
		name := fmt.Sprint(t)
		if len(name) > 9 {
			name, size = "this slope", 12
		}
		d.write(at, anchor, size, colour, name)
	}
}

func crowded(angle float64, taken []float64) bool {
	for _, other := range taken {
		if math.Abs(math.Remainder(angle-other, 2*math.Pi)) < labelSpread {
			return true
		}
	}
	return false
}

// vertexMark draws a slope by its class: a square for zero, a disc for infinity, a
// triangle for one.
func vertexMark(d *drawing, at spot, c farey.Class, r float64) {
	s := style{Fill: classColours[c%3], Stroke: paperColour, Width: 1}
	switch c {
	case farey.Zero:
		d.polygon(s, spot{at.x - r, at.y - r}, spot{at.x + r, at.y - r}, spot{at.x + r, at.y + r}, spot{at.x - r, at.y + r})
	case farey.One:
		d.polygon(s, spot{at.x, at.y - 1.3*r}, spot{at.x + 1.25*r, at.y + .9*r}, spot{at.x - 1.25*r, at.y + .9*r})
	default:
		d.circle(at, 1.1*r, s)
	}
}

func classKey() []keyItem {
	var key []keyItem
	for _, c := range classes {
		key = append(key, keyItem{
			Mark: sample(func(d *drawing) { vertexMark(d, spot{17, 8}, c, 5) }),
			Text: "slope of class " + c.String(),
		})
	}
	return key
}
