package main

import (
	"context"
	"fmt"
	"strings"

	"example.com/onecusp/farey"
	"example.com/onecusp/markov"
)

// triangleSection is the slope's place among the Farey triangles, with pictures.
func (e *entry) triangleSection(ctx context.Context) (section, error) {
	s := section{Title: "Place among the Farey triangles"}
	path := e.Slope.Path()
	s.add("Path", "%v", path)
	if path.IsBase() {
		s.note("the slope is a vertex of the base triangle, where every path begins")
	} else {
		s.note("the first flip replaces the base vertex of class %v; then L turns to the smaller slopes and R to the greater", path.First())
		a, b, err := e.Slope.Parents()
		if err != nil {
			return s, err
		}
		s.add("Older vertices", "%v and %v", a, b)
	}
	if e.held {
		s.Table = &table{Caption: "The triangle in which the slope appears first", Head: []string{"Slope", "Class", "Number"}, Marked: -1}
		for i := range 3 {
			v, n := e.certificate.Vertex(i)
			s.Table.Rows = append(s.Table.Rows, []string{fmt.Sprint(v), v.Class().String(), digits(n)})
			if v.Equal(e.Slope) {
				s.Table.Marked = i
			}
		}
		if err := e.solves(path.Triangle()); err != nil {
			return s, err
		}
		s.Remark = "The three numbers solve the equation of the family."
	}
	s.Pictures = append(s.Pictures, discPicture(e.Slope))
	if ribbon, ok := e.ribbonPicture(); ok {
		s.Pictures = append(s.Pictures, ribbon)
	}
	return s, ctx.Err()
}

// solves checks that the numbers of a triangle solve (E).
func (e *entry) solves(t farey.Triangle) error {
	triple, err := e.family.Triple(t)
	if err != nil {
		return err
	}
	return e.family.Solves(triple.Numbers())
}

// symmetrySection lists the slopes that carry the same number for reasons of symmetry.
func (e *entry) symmetrySection(context.Context) (section, error) {
	s := section{Title: "Symmetry class and labels"}
	orbit := e.family.Orbit(e.Slope)
	names := make([]string, len(orbit))
	for i, t := range orbit {
		names[i] = fmt.Sprint(t)
	}
	s.add("Equivalent slopes", "%s", strings.Join(names, ",  "))
	if len(orbit) == 1 {
		s.note("only itself")
	}
	if lo, hi, _ := e.family.Domain(); len(e.family.Symmetries()) > 1 {
		s.add("Representative", "%v", e.family.Representative(e.Slope))
		s.note("the one in the interval from %v to %v, which has one slope of each symmetry class", lo, hi)
	}
	s.add("Class of the slope", "%v", e.Class())
	s.note("p and q are like those of %v modulo 2", e.Class().Slope())
	s.add("Weight of the class", "%d", e.weight())
	s.add("Lattice slope", "%v", e.Slope)
	if e.family == markov.Family() {
		index, err := markov.Index(e.family.Representative(e.Slope))
		if err != nil {
			return s, err
		}
		s.add("Frobenius index", "%v", index)
		s.note("an index p/q stands for the lattice slope p/(p+q), here for the representative")
	}
	return s, nil
}
