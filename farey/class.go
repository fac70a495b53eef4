package farey

import "fmt"

// Class is the parity (p mod 2, q mod 2) of a slope p/q: a point of the projective
// line over the field of two elements. Only the three constants are classes; any
// other value is read as Zero, except that it has no text form.
type Class uint8

// The classes, named after the base slope in each.
const (
	Zero     Class = iota // of 0/1: p even, q odd
	Infinity              // of 1/0: p odd, q even
	One                   // of 1/1: p odd, q odd
)

var classNames = [3]string{"zero", "infinity", "one"}

// orZero returns the class itself, and Zero for what is no class.
func (c Class) orZero() Class {
	if c > One {
		return Zero
	}
	return c
}

// classOf returns the class by the parities of numerator and denominator, not both
// even; both even gives Zero.
func classOf(p, q uint) Class {
	switch {
	case p&1 == 0:
		return Zero
	case q&1 == 0:
		return Infinity
	default:
		return One
	}
}

// Class returns the class of the slope.
func (s Slope) Class() Class {
	if s.large != nil {
		return classOf(s.large.p.Bit(0), s.large.q.Bit(0))
	}
	return classOf(uint(s.p), uint(s.below)+1)
}

// Slope returns the base slope in the class: 0/1, 1/0 or 1/1.
func (c Class) Slope() Slope {
	switch c {
	case Infinity:
		return Slope{p: 1, below: -1}
	case One:
		return Slope{p: 1}
	default:
		return Slope{}
	}
}

// Third returns the class other than c and d; for c = d it returns c. It is the
// class of the mediant of neighbours with classes c and d.
func (c Class) Third(d Class) Class {
	c, d = c.orZero(), d.orZero()
	if c == d {
		return c
	}
	return 3 - c - d
}

// String returns "zero", "infinity" or "one"; for what is no class, "Class(7)".
func (c Class) String() string {
	if c > One {
		return fmt.Sprintf("Class(%d)", uint8(c))
	}
	return classNames[c]
}

// MarshalText returns the text of [Class.String]; it fails with [ErrClass] for what
// is no class.
func (c Class) MarshalText() ([]byte, error) {
	if c > One {
		return nil, fmt.Errorf("farey: text of %v: Zero, Infinity or One would be accepted: %w", c, ErrClass)
	}
	return []byte(classNames[c]), nil
}

// UnmarshalText accepts exactly "zero", "infinity" and "one"; otherwise it fails with
// [ErrSyntax] and leaves c alone.
func (c *Class) UnmarshalText(text []byte) error {
	for i, name := range classNames {
		if string(text) == name {
			*c = Class(i)
			return nil
		}
	}
	return fmt.Errorf(`farey: class %s: "zero", "infinity" or "one" would be accepted: %w`, quote(string(text)), ErrSyntax)
}
