package survey

import (
	"encoding/json"
	"fmt"
	"math/big"
	"slices"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
)

const (
	// MaxBoundBits is the number of bits that a bound may have. A number at p/q
	// has at least max(|p|, q) bits: twice the number is superadditive over Farey
	// sums up to a factor, 2N_r ≥ 2N_u·2N_w by (X), and 2 at the base. So the coordinates
	// of every slope within a bound stay below 2³¹ by far.
	MaxBoundBits = 1 << 24

	// MaxBox is the largest side of a Box.
	MaxBox = 1 << 24

	// MaxConstraints is the number of fans and of lines that a region may have.
	MaxConstraints = 64
)

// Region is a finite set of slopes of a family: those that satisfy all of the
// constraints that are set. Bound or Box has to be among them.
//
// Unless All is set, only one slope of each symmetry class is taken, the
// representative in the domain of Family.Domain, and the other constraints
// apply to that one.
type Region struct {
	Family orbifold.Family
	Bound  *big.Int      // numbers ≤ Bound; nil for no bound
	Box    *Box          // slopes in a box
	Among  *Interval     // slopes in an interval
	Fans   []farey.Slope // Farey neighbours of each of these slopes
	Lines  []Line        // vectors (q, p) on each of these lines
	All    bool          // every slope, not one for each symmetry class
}

// Box is the set of slopes p/q with |p| ≤ Num and q ≤ Den, each at most MaxBox.
type Box struct {
	Num int64 `json:"num"`
	Den int64 `json:"den"`
}

// Interval is the set of slopes from Lo to Hi, ends included; 1/0 is above all others.
type Interval struct {
	Lo farey.Slope `json:"lo"`
	Hi farey.Slope `json:"hi"`
}

// Line is the set of vectors (q, p) with A·q + B·p = C; the coefficients have
// at most 31 bits.
type Line struct {
	A int64 `json:"a"`
	B int64 `json:"b"`
	C int64 `json:"c"`
}

// Up returns the region of the numbers of f up to bound, one slope for each
// symmetry class.
func Up(f orbifold.Family, bound *big.Int) Region { return Region{Family: f, Bound: bound}.clone() }

// PowerOfTen returns 10^d, a bound as it is mostly given; d < 0 counts as 0, and
// a d for which the result would pass MaxBoundBits gives the bound just past it,
// which every region refuses.
func PowerOfTen(d int) *big.Int {
	if d > MaxBoundBits/3 {
		return new(big.Int).Lsh(big.NewInt(1), MaxBoundBits)
	}
	return new(big.Int).Exp(big.NewInt(10), big.NewInt(int64(max(d, 0))), nil)
}

// And returns the intersection of two regions of one family, ErrMismatch for
// regions of two families. It takes every slope only if both do.
func (r Region) And(o Region) (Region, error) {
	if r.Family != o.Family {
		return Region{}, fmt.Errorf("survey: intersection of regions of %v and %v: %w", r.Family, o.Family, ErrMismatch)
	}
	out := Region{Family: r.Family, All: r.All && o.All}
	switch {
	case r.Bound == nil:
		out.Bound = o.Bound
	case o.Bound == nil || r.Bound.Cmp(o.Bound) <= 0:
		out.Bound = r.Bound
	default:
		out.Bound = o.Bound
	}
	if out.Bound != nil {
		out.Bound = new(big.Int).Set(out.Bound)
	}
	for _, b := range []*Box{r.Box, o.Box} {
		if b == nil {
			continue
		}
		if out.Box == nil {
			out.Box = &Box{b.Num, b.Den}
		}
		out.Box.Num, out.Box.Den = min(out.Box.Num, b.Num), min(out.Box.Den, b.Den)
	}
	for _, i := range []*Interval{r.Among, o.Among} {
		if i == nil {
			continue
		}
		if out.Among == nil {
			out.Among = &Interval{i.Lo, i.Hi}
		}
		if out.Among.Lo.Cmp(i.Lo) < 0 {
			out.Among.Lo = i.Lo
		}
		if i.Hi.Cmp(out.Among.Hi) < 0 {
			out.Among.Hi = i.Hi
		}
	}
	out.Fans = slices.Concat(r.Fans, o.Fans)
	out.Lines = slices.Concat(r.Lines, o.Lines)
	return out, nil
}

// clone returns a region that shares nothing with r.
func (r Region) clone() Region {
	if r.Bound != nil {
		r.Bound = new(big.Int).Set(r.Bound)
	}
	if r.Box != nil {
		r.Box = &Box{r.Box.Num, r.Box.Den}
	}
	if r.Among != nil {
		r.Among = &Interval{r.Among.Lo, r.Among.Hi}
	}
	r.Fans, r.Lines = slices.Clone(r.Fans), slices.Clone(r.Lines)
	return r
}

// regionText is the JSON form of a region.
type regionText struct {
	Weights string    `json:"weights"`
	Bound   string    `json:"bound,omitempty"`
	Box     *Box      `json:"box,omitempty"`
	Among   *Interval `json:"among,omitempty"`
	Fans    []string  `json:"fans,omitempty"`
	Lines   []Line    `json:"lines,omitempty"`
	All     bool      `json:"all,omitempty"`
}

// MarshalJSON writes the constraints that are set, integers of the bound in the
// form of FormatBound. Regions are the same exactly when these texts are.
func (r Region) MarshalJSON() ([]byte, error) {
	t := regionText{Weights: r.Family.String(), Box: r.Box, Among: r.Among, Lines: r.Lines, All: r.All}
	if r.Bound != nil {
		t.Bound = FormatBound(r.Bound)
	}
	for _, s := range r.Fans {
		t.Fans = append(t.Fans, s.String())
	}
	return json.Marshal(t)
}

// UnmarshalJSON reads what MarshalJSON writes and refuses everything else. Whether
// the region can be walked is for the walk to say.
func (r *Region) UnmarshalJSON(text []byte) error {
	if len(text) > MaxText {
		return fmt.Errorf("survey: region of %d bytes: want at most %d: %w", len(text), MaxText, ErrTooLarge)
	}
	var t regionText
	if err := strictJSON(text, &t); err != nil {
		return fmt.Errorf("survey: region %q: %w", clip(string(text)), err)
	}
	out := Region{Box: t.Box, Among: t.Among, Lines: t.Lines, All: t.All}
	if err := out.Family.UnmarshalText([]byte(t.Weights)); err != nil {
		return fmt.Errorf("survey: region: %w", err)
	}
	if t.Bound != "" {
		b, err := ParseBound(t.Bound)
		if err != nil {
			return err
		}
		out.Bound = b
	}
	for _, f := range t.Fans {
		var s farey.Slope
		if err := s.UnmarshalText([]byte(f)); err != nil {
			return fmt.Errorf("survey: region: %w", err)
		}
		out.Fans = append(out.Fans, s)
	}
	if err := sameText(out, text); err != nil {
		return fmt.Errorf("survey: region %q: %w", clip(string(text)), err)
	}
	*r = out
	return nil
}

// String returns the JSON form, with a long bound in full.
func (r Region) String() string {
	text, err := r.MarshalJSON()
	if err != nil {
		return "region"
	}
	return string(text)
}

// Format writes the region whole for %s and with a long bound shortened for %v.
func (r Region) Format(f fmt.State, verb rune) {
	if verb != 's' && r.Bound != nil && len(FormatBound(r.Bound)) > 64 {
		short := r
		short.Bound = nil
		fmt.Fprintf(f, "%s up to %s", short.String(), contfrac.Abbreviate(r.Bound))
		return
	}
	fmt.Fprint(f, r.String())
}

// check refuses regions that cannot be walked.
func (r Region) check() error {
	refuse := func(what string, err error) error {
		return fmt.Errorf("survey: region of %v: %s: %w", r.Family, what, err)
	}
	if r.Bound == nil && r.Box == nil {
		return refuse("want a bound or a box", ErrRegion)
	}
	if r.Bound != nil && (r.Bound.Sign() <= 0 || r.Bound.BitLen() > MaxBoundBits) {
		return refuse(fmt.Sprintf("bound %s: want 1 … 2^%d − 1", contfrac.Abbreviate(r.Bound), MaxBoundBits), ErrBound)
	}
	if b := r.Box; b != nil && (b.Num < 0 || b.Den < 0 || b.Num > MaxBox || b.Den > MaxBox) {
		return refuse(fmt.Sprintf("box of %d by %d: want sides of 0 … %d", b.Num, b.Den, MaxBox), ErrRegion)
	}
	if i := r.Among; i != nil && (!small(i.Lo) || !small(i.Hi)) {
		return refuse("ends of the interval: want terms below 2^31", ErrRegion)
	}
	if len(r.Fans) > MaxConstraints || len(r.Lines) > MaxConstraints {
		return refuse(fmt.Sprintf("%d fans and %d lines: want at most %d each", len(r.Fans), len(r.Lines), MaxConstraints), ErrRegion)
	}
	for _, s := range r.Fans {
		if !small(s) {
			return refuse(fmt.Sprintf("fan about %v: want terms below 2^31", s), ErrRegion)
		}
	}
	for _, l := range r.Lines {
		for _, x := range [...]int64{l.A, l.B, l.C} {
			if x >= 1<<31 || x <= -1<<31 {
				return refuse(fmt.Sprintf("line %d·q + %d·p = %d: want coefficients below 2^31", l.A, l.B, l.C), ErrRegion)
			}
		}
		if l.A == 0 && l.B == 0 {
			return refuse("line without direction", ErrRegion)
		}
	}
	return nil
}

// small tells whether the terms of a slope fit coords.
func small(s farey.Slope) bool {
	p, q, ok := s.Int64s()
	return ok && p < 1<<31 && p > -1<<31 && q < 1<<31
}

func coordsOf(s farey.Slope) coords {
	p, q, _ := s.Int64s()
	return pack(p, q)
}
