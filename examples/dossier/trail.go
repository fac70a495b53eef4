package main

import (
	"iter"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/farey"
)

// stop is a triangle on a path: the one that a flip made, with its new vertex.
type stop struct {
	Triangle farey.Triangle
	Newest   farey.Slope
	Next     contfrac.Letter // the move that follows
	Last     bool            // no move follows
}

// trail yields the triangles on a path, after the base triangle.
func trail(p farey.Path) iter.Seq[stop] {
	return func(yield func(stop) bool) {
		next, end := iter.Pull(p.Moves().Letters())
		defer end()
		var t farey.Triangle
		for c := range p.Flips() {
			t = t.Flip(c)
			move, more := next()
			if !yield(stop{Triangle: t, Newest: t.Vertex(c), Next: move, Last: !more}) {
				return
			}
		}
	}
}
