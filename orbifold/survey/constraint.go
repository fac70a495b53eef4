package survey

// constraints is a region in the words of the walk, apart from the bound on the
// numbers: which slopes belong to it, and behind which edges there are none.
type constraints struct {
	box      *Box
	among    []segment
	fans     []coords
	lines    []Line
	anything bool // no constraint beyond the symmetry classes
}

// segment is a closed interval of slopes.
type segment struct{ lo, hi coords }

func (s segment) has(c coords) bool { return s.lo.det(c) >= 0 && c.det(s.hi) >= 0 }

// meets tells whether a slope strictly between a and b may lie in s; a is below b,
// and −1/0 below everything.
func (s segment) meets(a, b coords) bool {
	return s.lo.det(b) > 0 && (a.p() < 0 && a.q() == 0 || a.det(s.hi) > 0)
}

func newConstraints(r Region) constraints {
	c := constraints{box: r.Box, lines: r.Lines}
	for _, s := range r.Fans {
		c.fans = append(c.fans, coordsOf(s))
	}
	if r.Among != nil {
		c.among = append(c.among, segment{coordsOf(r.Among.Lo), coordsOf(r.Among.Hi)})
	}
	c.anything = c.box == nil && len(c.among) == 0 && len(c.fans) == 0 && len(c.lines) == 0
	if lo, hi, all := r.Family.Domain(); !all && !r.All {
		c.among = append(c.among, segment{coordsOf(lo), coordsOf(hi)})
	}
	return c
}

// has tells whether the slope at belongs to the region.
func (c *constraints) has(at coords) bool {
	p, q := at.p(), at.q()
	if c.box != nil && (max(p, -p) > c.box.Num || q > c.box.Den) {
		return false
	}
	for _, s := range c.among {
		if !s.has(at) {
			return false
		}
	}
	for _, s := range c.fans {
		if d := s.det(at); d != 1 && d != -1 {
			return false
		}
	}
	for _, l := range c.lines {
		if l.A*q+l.B*p != l.C {
			return false
		}
	}
	return true
}

// skip tells that no slope in front of the edge a, b belongs to the region.
// Those slopes are the vectors m·a + n·b with m, n ≥ 1, and what the constraints
// ask for is linear in them.
func (c *constraints) skip(a, b coords) bool {
	if c.box != nil {
		f := a + b // terms grow from here on
		if p := f.p(); max(p, -p) > c.box.Num || f.q() > c.box.Den {
			return true
		}
	}
	if len(c.among) > 0 {
		if a.det(b) < 0 {
			a, b = b, a
		}
		for _, s := range c.among {
			if !s.meets(a, b) {
				return true
			}
		}
	}
	for _, s := range c.fans {
		if x, y := s.det(a), s.det(b); misses(x, y, 1) && misses(x, y, -1) {
			return true
		}
	}
	for _, l := range c.lines {
		if misses(l.A*a.q()+l.B*a.p(), l.A*b.q()+l.B*b.p(), l.C) {
			return true
		}
	}
	return false
}

// misses tells that m·x + n·y = z has no solution m, n ≥ 1 because both terms
// have one sign and already x + y is too far out.
func misses(x, y, z int64) bool {
	return x >= 0 && y >= 0 && x+y > z || x <= 0 && y <= 0 && x+y < z
}
