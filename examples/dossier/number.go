package main

import (
	"context"
	"fmt"
	"math/big"
	"strconv"

	"example.com/onecusp/orbifold"
	"example.com/onecusp/snake"
)

// maxResidueTiles bounds the tiles of an arc whose word and snake graph are gone
// through for residues.
const maxResidueTiles = 1 << 22

const notRun = "not run"

// numberSection is the number by its four routes, or its residues when it is too
// large to hold.
func (e *entry) numberSection(ctx context.Context) (section, error) {
	if !e.held {
		return e.residueSection(ctx)
	}
	c := e.certificate
	n := c.Number()
	e.Headline = digits(n)
	var s section
	s.Title = "The number, by four routes"
	s.add("Number N", "%s", digits(n))
	s.add("Digits, bits", "%d, %d", len(n.String()), n.BitLen())
	s.Table = &table{
		Caption: "The four routes share as little as possible",
		Head:    []string{"Route", "Agrees", "Result", "Computed", "In Go"},
		Marked:  -1,
		Rows: [][]string{
			{"descent by the exchange rule", "yes", digits(n), "exact", "f.Number(s)"},
			countRow("continuant of the word", c.Continuant(), n, "f.Fraction(s) → Numerator()"),
			countRow("matchings of the snake graph", c.Matchings(), n, "f.Snake(s) → Count()"),
			{"upper right entry of the matrix", yesNo(c.Matrix().B().Cmp(n) == 0), digits(c.Matrix().B()), "exact", "f.Matrix(s) → B()"},
		},
	}
	s.Remark = agreement(s.Table.Rows, 1)
	return s, nil
}

// countRow is the line of one of the long routes, which a certificate has exactly or
// modulo primes.
func countRow(name string, c orbifold.Count, n *big.Int, call string) []string {
	switch c.Method {
	case orbifold.Exact:
		value, _ := c.Value()
		return []string{name, yesNo(c.Agrees(n)), digits(value), "exact", call}
	case orbifold.ModuloPrimes:
		return []string{name, yesNo(c.Agrees(n)), fmt.Sprintf("%d residues", len(c.Residues())), "modulo primes", call}
	}
	return []string{name, "", "", notRun, call}
}

func yesNo(b bool) string {
	if b {
		return "yes"
	}
	return "NO"
}

// agreement sums up a column of "yes", "NO" and, for routes not run, nothing.
func agreement(rows [][]string, column int) string {
	yes := 0
	for _, r := range rows {
		switch r[column] {
		case "yes":
			yes++
		case "NO":
			return "The routes DISAGREE. That is an error of the library; please report it."
		}
	}
	if yes == len(rows) {
		return "All four routes agree."
	}
	return fmt.Sprintf("The %d routes that ran agree.", yes)
}

// residueSection stands in for the number when it is too large to hold: the routes
// modulo three primes.
func (e *entry) residueSection(ctx context.Context) (section, error) {
	lo, hi, err := e.family.Bits(e.Slope)
	if err != nil {
		return section{}, err
	}
	e.Headline = "a number of " + between(lo, hi) + " bits"
	var s section
	s.Title = "The number, by its residues"
	s.add("Bits", "%s", between(lo, hi))
	s.say("Not held", "the number and what goes with it would pass the %d bits of a certificate; "+
		"residues and logarithms are no harder at any size", orbifold.MaxCertificateBits)
	s.Table = &table{
		Caption: "The routes modulo three primes",
		Head:    []string{"Route", "2⁶¹ − 1", "2⁶³ − 25", "2⁶⁴ − 59", "In Go"},
		Marked:  -1,
		Rows: [][]string{
			{"descent by the exchange rule"}, {"continuant of the word"}, {"matchings of the snake graph"}, {"upper right entry of the matrix"},
		},
	}
	routes, err := e.modularRoutes()
	if err != nil {
		return s, err
	}
	agree, ran := true, 0
	for i, route := range routes {
		row := &s.Table.Rows[i]
		for j, p := range orbifold.Primes() {
			if route == nil {
				*row = append(*row, notRun)
				continue
			}
			if err := ctx.Err(); err != nil {
				return s, err
			}
			r, err := route(new(big.Int).SetUint64(p))
			if err != nil {
				return s, err
			}
			*row = append(*row, r.String())
			agree = agree && r.String() == s.Table.Rows[0][j+1]
		}
		if route != nil {
			ran++
		}
		*row = append(*row, [4]string{"f.NumberMod(s, m)", "f.Fraction(s) → NumeratorMod(m)", "f.Snake(s) → snake.Weigh", "f.RootMod(s, m)"}[i])
	}
	switch {
	case !agree:
		s.Remark = "The routes DISAGREE. That is an error of the library; please report it."
	case ran == len(routes):
		s.Remark = "All four routes agree modulo each prime."
	default:
		s.Remark = "The " + strconv.Itoa(ran) + " routes that ran agree modulo each prime; the other two go through the arc crossing by crossing, and it is too long for that here."
	}
	return s, nil
}

// modularRoutes returns the four routes modulo m; nil for the two that are too long.
func (e *entry) modularRoutes() ([4]func(m *big.Int) (*big.Int, error), error) {
	f, at := e.family, e.Slope
	routes := [4]func(m *big.Int) (*big.Int, error){
		0: func(m *big.Int) (*big.Int, error) { return f.NumberMod(at, m) },
		3: func(m *big.Int) (*big.Int, error) { n, _, err := f.RootMod(at, m); return n, err },
	}
	if f.Tiles(at).Cmp(big.NewInt(maxResidueTiles)) > 0 {
		return routes, nil
	}
	fraction, err := f.Fraction(at)
	if err != nil {
		return routes, err
	}
	graph, err := f.Snake(at)
	if err != nil {
		return routes, err
	}
	routes[1] = fraction.NumeratorMod
	routes[2] = func(m *big.Int) (*big.Int, error) {
		ring, err := snake.NewModular(m)
		if err != nil {
			return nil, err
		}
		return snake.Weigh(ring, graph, snake.Weights[*big.Int]{})
	}
	return routes, nil
}
