package orbifold

import (
	"fmt"
	"math"
	"math/big"
	"strconv"
	"strings"

	"example.com/onecusp/farey"
)

// DefaultLimit is the number of bits that a result may have in a family whose
// limit was not set: 2³⁰ bits, 128 MiB.
const DefaultLimit = int64(1) << 30

// Family is an exchange family: the numbers that grow from (1, 1, 1) by the
// exchange rule (X) with one weight for each class of slopes.
//
// The zero value is the classical family (0,0,0), whose numbers are the Markov
// numbers. Families are small values; compare them with ==.
type Family struct {
	weights [3]int64 // indexed by farey.Class
	limit   int64    // bits; 0 stands for DefaultLimit
}

// New returns the family with weight k₀ = zero at the class of 0/1,
// k∞ = infinity at the class of 1/0 and k₁ = one at the class of 1/1. A weight
// k = 2cos(π/n) stands for an orbifold point of order n: 0 for order 2, 1 for
// order 3, 2 for a puncture; integers k ≥ 3 have no such surface, and the
// algebra holds for them too. A negative weight is ErrWeight.
func New(zero, infinity, one int64) (Family, error) {
	f := Family{weights: [3]int64{farey.Zero: zero, farey.Infinity: infinity, farey.One: one}}
	for _, c := range classes {
		if k := f.weights[c]; k < 0 {
			return Family{}, fmt.Errorf("orbifold: weight %d of class %v: %w", k, c, ErrWeight)
		}
	}
	return f, nil
}

// MustNew is New for weights known to be right; it panics on an error.
func MustNew(zero, infinity, one int64) Family {
	f, err := New(zero, infinity, one)
	if err != nil {
		panic(err)
	}
	return f
}

// Parse reads what String prints, "(2,0,1)", also without the brackets and
// with spaces around the weights: k₀, k∞, k₁ in this order.
func Parse(s string) (Family, error) {
	refuse := func(err error) (Family, error) {
		return Family{}, fmt.Errorf("orbifold: weights %q: want three integers k₀,k∞,k₁ such as 2,0,1: %w", clip(s), err)
	}
	if len(s) > 128 {
		return refuse(ErrWeight)
	}
	t := strings.TrimSpace(s)
	if strings.HasPrefix(t, "(") && strings.HasSuffix(t, ")") {
		t = t[1 : len(t)-1]
	}
	parts := strings.Split(t, ",")
	if len(parts) != 3 {
		return refuse(ErrWeight)
	}
	var k [3]int64
	for i, part := range parts {
		x, err := strconv.ParseInt(strings.TrimSpace(part), 10, 64)
		if err != nil {
			return refuse(fmt.Errorf("%w (each at most %d)", ErrWeight, int64(math.MaxInt64)))
		}
		k[i] = x
	}
	return New(k[0], k[1], k[2])
}

// classes lists the classes in the order of the weights.
var classes = [3]farey.Class{farey.Zero, farey.Infinity, farey.One}

// Weight returns the weight of the class c.
func (f Family) Weight(c farey.Class) int64 {
	if int(c) >= len(f.weights) {
		return 0
	}
	return f.weights[c]
}

// K returns 3 + k₀ + k∞ + k₁, the constant of (E).
func (f Family) K() *big.Int {
	k := big.NewInt(3)
	for _, w := range f.weights {
		k.Add(k, big.NewInt(w))
	}
	return k
}

// WithLimit returns the same family with another bound on the bits of a
// result: what would exceed it is refused with ErrTooLarge before memory is
// taken. A limit ≤ 0 stands for DefaultLimit.
func (f Family) WithLimit(bits int64) Family {
	f.limit = max(bits, 0)
	return f
}

// Limit returns the bound on the bits of a result.
func (f Family) Limit() int64 {
	if f.limit <= 0 {
		return DefaultLimit
	}
	return f.limit
}

// String returns the weights as "(k₀,k∞,k₁)", for instance "(2,0,1)".
func (f Family) String() string {
	return fmt.Sprintf("(%d,%d,%d)", f.weights[0], f.weights[1], f.weights[2])
}

// Equation returns equation (E) of the family as text, with the weights put in:
// "x² + y² + z² + 2yz + xy = 6xyz" for (2,0,1), with x, y, z the numbers at the
// classes of 0/1, 1/0 and 1/1.
func (f Family) Equation() string {
	var b strings.Builder
	b.WriteString("x² + y² + z²")
	for c, product := range [3]string{"yz", "zx", "xy"} {
		switch k := f.weights[c]; k {
		case 0:
		case 1:
			b.WriteString(" + " + product)
		default:
			fmt.Fprintf(&b, " + %d%s", k, product)
		}
	}
	fmt.Fprintf(&b, " = %vxyz", f.K())
	return b.String()
}

// MarshalText returns the form of String. The limit is no part of it.
func (f Family) MarshalText() ([]byte, error) { return []byte(f.String()), nil }

// UnmarshalText reads the form of String and nothing else.
func (f *Family) UnmarshalText(text []byte) error {
	g, err := Parse(string(text))
	if err == nil && g.String() != string(text) {
		err = fmt.Errorf("orbifold: weights %q: the form is %q: %w", clip(string(text)), g, ErrWeight)
	}
	if err != nil {
		return err
	}
	*f = g
	return nil
}

// clip shortens text of a caller for an error message.
func clip(s string) string {
	if len(s) <= 64 {
		return s
	}
	return s[:48] + fmt.Sprintf("… (%d bytes)", len(s))
}
