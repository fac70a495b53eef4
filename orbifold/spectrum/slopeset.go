package spectrum

import (
	"slices"

	"example.com/onecusp/farey"
)

// slopeSet is a set of slopes.
type slopeSet struct{ all []farey.Slope }

func (c *slopeSet) add(s farey.Slope) { c.all = append(c.all, s) }

// sorted returns the members, each once, increasing.
func (c *slopeSet) sorted() []farey.Slope {
	slices.SortFunc(c.all, farey.Slope.Cmp)
	return slices.CompactFunc(c.all, farey.Slope.Equal)
}
