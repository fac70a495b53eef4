package farey

// Symmetry is one of the six projective maps of slopes that permute 0/1, 1/0 and 1/1.
// They keep neighbours and triangles and permute the classes; the group is generated
// by s ↦ 1/s and s ↦ 1−s. The zero value is the identity. Symmetries are comparable
// with ==.
type Symmetry struct{ index uint8 }

// symmetryTable lists the maps as matrices (a, b; c, d) of p/q ↦ (a·p + b·q)/(c·p + d·q).
var symmetryTable = [6]struct {
	a, b, c, d int64
	text       string
}{
	{1, 0, 0, 1, "s ↦ s"},
	{0, 1, 1, 0, "s ↦ 1/s"},
	{-1, 1, 0, 1, "s ↦ 1−s"},
	{1, 0, 1, -1, "s ↦ s/(s−1)"},
	{0, 1, -1, 1, "s ↦ 1/(1−s)"},
	{1, -1, 1, 0, "s ↦ (s−1)/s"},
}

// Symmetries returns the six maps: the identity, 1/s, 1−s, s/(s−1), 1/(1−s), (s−1)/s.
// The first four are their own inverses, the last two each other's.
func Symmetries() [6]Symmetry { return [6]Symmetry{{0}, {1}, {2}, {3}, {4}, {5}} }

// Apply returns the image g(s).
func (g Symmetry) Apply(s Slope) Slope {
	m := symmetryTable[g.index]
	return s.linear(m.a, m.b, m.c, m.d)
}

// Class returns the class of g(s) for any slope s of class c.
func (g Symmetry) Class(c Class) Class { return g.Apply(c.Slope()).Class() }

// Triangle returns the image of a triangle, vertex by vertex.
func (g Symmetry) Triangle(t Triangle) Triangle {
	return triangleOf(g.Apply(t.Vertex(Zero)), g.Apply(t.Vertex(Infinity)), g.Apply(t.Vertex(One)))
}

// Then returns the map that applies g first and then h.
func (g Symmetry) Then(h Symmetry) Symmetry {
	// A symmetry is known by what it does to two of the classes.
	zero, infinity := h.Class(g.Class(Zero)), h.Class(g.Class(Infinity))
	var product Symmetry
	for _, k := range Symmetries() {
		if k.Class(Zero) == zero && k.Class(Infinity) == infinity {
			product = k
		}
	}
	return product
}

// Inverse returns the map that undoes g.
func (g Symmetry) Inverse() Symmetry {
	switch g.index {
	case 4:
		return Symmetry{5}
	case 5:
		return Symmetry{4}
	default:
		return g
	}
}

// String returns the map as a formula: "s ↦ 1/s".
func (g Symmetry) String() string { return symmetryTable[g.index].text }
