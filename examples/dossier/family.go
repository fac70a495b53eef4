package main

import (
	"strings"

	"example.com/onecusp/farey"
	"example.com/onecusp/markov"
	"example.com/onecusp/orbifold"
)

var classes = [3]farey.Class{farey.Zero, farey.Infinity, farey.One}

// sign is the short sign of a class in pictures and tables.
func sign(c farey.Class) string { return [3]string{"0", "∞", "1"}[c%3] }

// familyFacts states the family: weights, equation, symmetries and labelling.
func familyFacts(f orbifold.Family) []fact {
	var s section
	s.add("Weights", "k₀ = %d,  k∞ = %d,  k₁ = %d,  K = %v", f.Weight(farey.Zero), f.Weight(farey.Infinity), f.Weight(farey.One), f.K())
	s.add("Equation", "%s", f.Equation())
	s.say("Its unknowns", "x, y, z are the numbers at the classes of 0/1, 1/0 and 1/1; the base triangle {0/1, 1/0, 1/1} carries 1, 1, 1")
	s.say("Symmetries", "%s", symmetryList(f))
	labelling := "Slopes are lattice slopes: p/q is the arc from (0,0) to (q,p)."
	if f == markov.Family() {
		labelling += " In this classical family each class of equivalent slopes has a Frobenius index too, given below with each slope."
	}
	s.say("Labelling", "%s", labelling)
	return s.Facts
}

func symmetryList(f orbifold.Family) string {
	group := f.Symmetries()
	if len(group) == 1 {
		return "none, since all three weights differ: every slope stands for itself"
	}
	names := make([]string, 0, len(group))
	for _, g := range group[1:] {
		names = append(names, g.String())
	}
	return "numbers stay the same under " + strings.Join(names, ", ")
}
