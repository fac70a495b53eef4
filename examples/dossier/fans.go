package main

import (
	"context"
	"fmt"
	"math/big"

	"example.com/onecusp/farey"
)

const (
	fanArcs    = 3       // arcs shown on each side of the first
	maxFanBits = 1 << 12 // numbers past it have no fan here: its terms are too long
)

// fanSection is the fan of the slope: its neighbours in order, and the
// recurrence of their numbers.
func (e *entry) fanSection(context.Context) (section, error) {
	s := section{Title: "Fan round the slope"}
	if !e.held || e.certificate.Number().BitLen() > maxFanBits {
		s.Remark = "Not worked out for numbers of this size."
		return s, nil
	}
	fan, err := e.family.Fan(e.Slope, e.neighbour())
	if err != nil {
		return s, err
	}
	recurrence, err := fan.Recurrence(1)
	if err != nil {
		return s, err
	}
	growth, err := fan.Ratio()
	if err != nil {
		return s, err
	}
	s.add("Recurrence", "%v", recurrence)
	s.note("of the numbers at the neighbours of the slope, in order; the shortest there is")
	s.add("Growth", "%v", growth)
	s.note("the factor from one number to the next, far out")
	s.Table = &table{Caption: "Neighbours of the slope and their numbers", Head: []string{"n", "Slope", "Number"}, Marked: -1}
	for i := int64(-fanArcs); i <= fanArcs; i++ {
		n := big.NewInt(i)
		number, err := fan.Term(n)
		if err != nil {
			return s, err
		}
		s.Table.Rows = append(s.Table.Rows, []string{fmt.Sprint(i), fan.Slope(n).String(), digits(number)})
	}
	return s, nil
}

// neighbour is a neighbour of the slope to begin its fan with: a parent, for
// base slopes another base slope.
func (e *entry) neighbour() farey.Slope {
	if older, _, err := e.Slope.Parents(); err == nil {
		return older
	}
	return ((e.Class() + 1) % 3).Slope()
}
