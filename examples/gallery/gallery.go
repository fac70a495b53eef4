package main

import (
	"context"
	"fmt"
	"html/template"
	"math/big"
	"slices"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
)

// gallery is the whole page: a wall for each slope.
type gallery struct {
	Note     string // says that the demonstration is invented; empty for a user's own choice
	Seed     uint64
	Families []orbifold.Family
	Key      []keyItem
	Walls    []wall
}

// wall is one slope, seen in every family.
type wall struct {
	Slope    farey.Slope
	Exhibits []*exhibit
}

// fact is a name with a value and perhaps a remark on it; Whole is the value in full where
// Value is shortened.
type fact struct{ Name, Value, Whole, Note string }

// picture is a drawing in its several forms; a form that there is not is empty.
type picture struct {
	Title, Caption string
	SVG            template.HTML
	Least          int    // pixels of width below which it is scrolled, not shrunk
	Wide           bool   // it may take the whole width of the page
	Text           string // the same with characters
	TikZ, DOT      string // the same as code
	Stem           string // first part of the names of its files
}

// newGallery draws everything.
func newGallery(ctx context.Context, o options) (*gallery, error) {
	key, err := newKey()
	if err != nil {
		return nil, err
	}
	g := &gallery{Note: o.note, Seed: o.seed, Families: o.families, Key: key}
	for _, s := range o.slopes {
		w := wall{Slope: s}
		for _, f := range o.families {
			if err := ctx.Err(); err != nil {
				return nil, err
			}
			x, err := newExhibit(f, s, o.seed)
			if err != nil {
				return nil, fmt.Errorf("slope %v in family %v: %w", s, f, err)
			}
			w.Exhibits = append(w.Exhibits, x)
		}
		g.Walls = append(g.Walls, w)
	}
	return g, nil
}

// Crossings is what all families share at a slope: how often the arc crosses edges of
// the three classes.
func (w wall) Crossings() string {
	n := w.Slope.CrossingCounts()
	return fmt.Sprintf("%v horizontal, %v vertical and %v diagonal edges", n[farey.Zero], n[farey.Infinity], n[farey.One])
}

// exhibits are those of all walls, in order.
func (g *gallery) exhibits() []*exhibit {
	var all []*exhibit
	for _, w := range g.Walls {
		all = slices.Concat(all, w.Exhibits)
	}
	return all
}

// digits writes an integer whole when it is short, else its ends and its length.
func digits(n *big.Int) string { return contfrac.Abbreviate(n) }

// sign is the short sign of a class in pictures.
func sign(c farey.Class) string { return [3]string{"0", "∞", "1"}[c%3] }

// plural writes a count with its noun.
func plural(n int, one, many string) string {
	if n == 1 {
		return "1 " + one
	}
	return fmt.Sprintf("%d %s", n, many)
}
