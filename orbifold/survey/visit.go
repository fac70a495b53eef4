package survey

import (
	"math/big"

	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
)

// Visit is one slope met on a walk. It is valid until the function that it was
// given to returns, and belongs to one goroutine. Its methods cost a few
// machine operations unless they say otherwise. The zero value is a visit of 0/1 in the
// classical family.
type Visit struct {
	walk  *walker
	frame *frame
	i     uint32 // index of the slope in the frame
	base  bool
}

// Arc is what a walk knows of an arc.
type Arc struct {
	Num, Den     int64   // its slope
	Mod64, Mod61 uint64  // its number modulo 2⁶⁴ and modulo 2⁶¹ − 1
	LogLo, LogHi float64 // enclosure of the natural logarithm of its number
}

// Slope returns the slope of the arc.
func (a Arc) Slope() farey.Slope { return pack(a.Num, a.Den).slope() }

func (v *Visit) vertex() *vertex {
	if v.frame == nil {
		v = nowhere
	}
	return &v.frame.y[v.i&3]
}

func (v *Visit) units() *walker {
	if v.walk == nil {
		return nowhere.walk
	}
	return v.walk
}

// nowhere stands for the visit of a zero value: of 0/1 in the classical family.
var nowhere = func() *Visit {
	w, _ := newWalker(Up(orbifold.Family{}, big.NewInt(1))) // a bound of 1 is in range
	w.sink = func(*Visit) bool { return false }
	w.start()
	return &w.v
}()

// Num returns the numerator of the slope.
func (v *Visit) Num() int64 {
	return v.vertex().at.p()
}

// Den returns the denominator of the slope, 0 for 1/0.
func (v *Visit) Den() int64 { return v.vertex().at.q() }

// Slope returns the slope.
func (v *Visit) Slope() farey.Slope { return v.vertex().at.slope() }

// Class returns the class of the slope.
func (v *Visit) Class() farey.Class { return v.vertex().at.class() }

// Family returns the family of the walk.
func (v *Visit) Family() orbifold.Family { return v.units().family }

// Mod64 returns the number at the slope modulo 2⁶⁴.
func (v *Visit) Mod64() uint64 { return v.vertex().r64 }

// Mod61 returns the number at the slope modulo the prime 2⁶¹ − 1.
func (v *Visit) Mod61() uint64 { return v.vertex().r61 }

// Key returns 64 bits made of both residues: equal numbers have equal keys, and
// distinct keys prove numbers distinct.
func (v *Visit) Key() uint64 { return v.vertex().key() }

// Log returns an enclosure of the natural logarithm of the number at the slope.
// Its relative width is below 2⁻⁴⁰ for bounds up to 10^100000.
func (v *Visit) Log() (lo, hi float64) { return v.units().nats(v.vertex().lo, v.vertex().hi) }

// Arc returns all of it at once.
func (v *Visit) Arc() Arc { return v.units().arc(v.vertex()) }

// Parents returns the two Farey parents of the slope, the smaller number first,
// and the vertex behind them, whose flip makes the slope: u·u' = v² + k·v·w + w².
// False for the base slopes, which have none.
func (v *Visit) Parents() (u, w, behind Arc, ok bool) {
	if v.base || v.frame == nil {
		return Arc{}, Arc{}, Arc{}, false
	}
	pivot := v.frame.u
	pivot.lo, pivot.hi = v.frame.uLo, v.frame.uHi
	return v.walk.arc(&pivot), v.walk.arc(&v.frame.y[(v.i-1)&3]), v.walk.arc(&v.frame.y[(v.i-2)&3]), true
}

// Number computes the number itself, by Family.Number.
func (v *Visit) Number() (*big.Int, error) { return v.units().family.Number(v.Slope()) }

func (w *walker) arc(v *vertex) Arc {
	a := Arc{Num: v.at.p(), Den: v.at.q(), Mod64: v.r64, Mod61: v.r61}
	if a.Den == 0 {
		a.Num = 1
	}
	a.LogLo, a.LogHi = w.scale.nats(v.lo, v.hi)
	return a
}
