package main

import (
	"context"
	"fmt"
	"strings"

	"example.com/onecusp/orbifold"
)

const (
	maxComparedBits = 192 // the numbers below the slope's are gone through up to this size
	eachSide        = 3   // neighbours shown on each side
)

// neighbourSection is the slope's place in the increasing list of the numbers of the
// family, and all slopes with the same number.
func (e *entry) neighbourSection(ctx context.Context) (section, error) {
	s := section{Title: "Neighbours in size"}
	if !e.held || e.certificate.Number().BitLen() > maxComparedBits {
		s.Remark = fmt.Sprintf("Not listed: that is done for numbers of at most %d bits.", maxComparedBits)
		return s, nil
	}
	same, err := e.family.Identify(ctx, e.certificate.Number())
	if err != nil {
		return s, err
	}
	names := make([]string, len(same))
	for i, t := range same {
		names[i] = t.String()
	}
	s.add("Slopes with this number", "%s", strings.Join(names, ",  "))
	if len(same) == 1 {
		s.note("the only one up to symmetry; proved, since every place was looked at where N could stand")
	} else {
		s.note("%d slopes that no symmetry takes to each other; proved complete, since every place was looked at where N could stand", len(same))
	}
	s.Table = &table{Caption: "In the increasing list of the numbers, one slope of each symmetry class", Head: []string{"Place", "Number", "Slope"}, Marked: -1}
	own := e.family.Representative(e.Slope)
	place, left := 0, -1 // left: how many more to list, once the slope is met
	for node := range e.family.Ascending() {
		place++
		if left < 0 && len(s.Table.Rows) > eachSide {
			s.Table.Rows = s.Table.Rows[1:]
		}
		s.Table.Rows = append(s.Table.Rows, placeRow(place, node))
		switch {
		case node.Slope().Equal(own):
			s.Table.Marked, left = len(s.Table.Rows)-1, eachSide
		case left > 0:
			left--
		}
		if left == 0 {
			break
		}
		if err := ctx.Err(); err != nil {
			return s, err
		}
	}
	return s, nil
}

func placeRow(place int, node orbifold.Node) []string {
	return []string{fmt.Sprint(place), digits(node.Number()), node.Slope().String()}
}
