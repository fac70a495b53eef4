package snake

import (
	"fmt"
	"iter"
	"math/big"
	"slices"
	"strings"

	"example.com/onecusp/contfrac"
)

// Laurent is a Laurent polynomial with integer coefficients in the variables
// x1, x2, …, kept as a sum of monomials. It is immutable; the zero value is 0.
//
// Exponents are of type int and must stay in its range; they wrap past it.
type Laurent struct {
	terms []laurentTerm // by exponents, highest first; no zero coefficient
}

type laurentTerm struct {
	exponents []int // of x1, x2, …; no trailing zeros; shared, never changed
	c         *big.Int
}

// MaxVariables is the largest number of a variable.
const MaxVariables = 1 << 16

// NewLaurent returns the monomial c·x1^e1·x2^e2·…; a nil coefficient counts as
// 0. It returns [ErrIndex] with more than [MaxVariables] exponents.
func NewLaurent(c *big.Int, exponents ...int) (Laurent, error) {
	if len(exponents) > MaxVariables {
		return Laurent{}, fmt.Errorf("snake: monomial in %d variables: at most %d are accepted: %w", len(exponents), MaxVariables, ErrIndex)
	}
	if orZero(c).Sign() == 0 {
		return Laurent{}, nil
	}
	return Laurent{[]laurentTerm{{trimExponents(slices.Clone(exponents)), new(big.Int).Set(c)}}}, nil
}

// Variable returns the variable with a number counted from 1. It returns
// [ErrIndex] unless 1 ≤ number ≤ [MaxVariables].
func Variable(number int) (Laurent, error) {
	if number < 1 || number > MaxVariables {
		return Laurent{}, fmt.Errorf("snake: variable x%d: variables are x1 to x%d: %w", number, MaxVariables, ErrIndex)
	}
	e := make([]int, number)
	e[number-1] = 1
	return Laurent{[]laurentTerm{{e, big.NewInt(1)}}}, nil
}

func trimExponents(e []int) []int {
	for len(e) > 0 && e[len(e)-1] == 0 {
		e = e[:len(e)-1]
	}
	return e
}

// compareExponents orders monomials lexicographically, missing exponents being 0.
func compareExponents(a, b []int) int {
	for i := range max(len(a), len(b)) {
		x, y := 0, 0
		if i < len(a) {
			x = a[i]
		}
		if i < len(b) {
			y = b[i]
		}
		if x != y {
			if x > y {
				return -1
			}
			return 1
		}
	}
	return 0
}

// Len returns the number of monomials.
func (p Laurent) Len() int { return len(p.terms) }

// Terms yields the exponents and the coefficient of every monomial, both fresh,
// highest first: exponents in lexicographic order, x1 before x2. It can be run
// again.
func (p Laurent) Terms() iter.Seq2[[]int, *big.Int] {
	return func(yield func([]int, *big.Int) bool) {
		for _, t := range p.terms {
			if !yield(slices.Clone(t.exponents), new(big.Int).Set(t.c)) {
				return
			}
		}
	}
}

// Coefficient returns the coefficient of x1^e1·x2^e2·….
func (p Laurent) Coefficient(exponents ...int) *big.Int {
	i, ok := slices.BinarySearchFunc(p.terms, exponents, func(t laurentTerm, e []int) int {
		return compareExponents(t.exponents, e)
	})
	if !ok {
		return new(big.Int)
	}
	return new(big.Int).Set(p.terms[i].c)
}

// Equal reports whether p = o.
func (p Laurent) Equal(o Laurent) bool {
	return slices.EqualFunc(p.terms, o.terms, func(a, b laurentTerm) bool {
		return compareExponents(a.exponents, b.exponents) == 0 && a.c.Cmp(b.c) == 0
	})
}

// Add returns p + o. Cost: one step a monomial.
func (p Laurent) Add(o Laurent) Laurent {
	switch {
	case len(p.terms) == 0:
		return o
	case len(o.terms) == 0:
		return p
	}
	a, b := p.terms, o.terms
	out := make([]laurentTerm, 0, len(a)+len(b))
	for len(a) > 0 && len(b) > 0 {
		switch compareExponents(a[0].exponents, b[0].exponents) {
		case -1:
			out, a = append(out, a[0]), a[1:]
		case 1:
			out, b = append(out, b[0]), b[1:]
		default:
			if c := new(big.Int).Add(a[0].c, b[0].c); c.Sign() != 0 {
				out = append(out, laurentTerm{a[0].exponents, c})
			}
			a, b = a[1:], b[1:]
		}
	}
	return Laurent{append(append(out, a...), b...)}
}

// Mul returns po. Cost: one step for each pair of monomials, and log as many
// for sorting.
func (p Laurent) Mul(o Laurent) Laurent {
	if len(p.terms) < len(o.terms) {
		p, o = o, p
	}
	// Multiplying by one monomial keeps the order; such rows are added in pairs.
	rows := make([]Laurent, len(o.terms))
	for i, t := range o.terms {
		rows[i] = p.scale(t)
	}
	for len(rows) > 1 {
		half := (len(rows) + 1) / 2
		for i := half; i < len(rows); i++ {
			rows[i-half] = rows[i-half].Add(rows[i])
		}
		rows = rows[:half]
	}
	if len(rows) == 0 {
		return Laurent{}
	}
	return rows[0]
}

// scale multiplies by one monomial.
func (p Laurent) scale(t laurentTerm) Laurent {
	out := make([]laurentTerm, len(p.terms))
	one := t.c.IsInt64() && t.c.Int64() == 1
	for i, u := range p.terms {
		e := make([]int, max(len(t.exponents), len(u.exponents)))
		copy(e, u.exponents)
		for k, x := range t.exponents {
			e[k] += x
		}
		c := u.c
		if !one {
			c = contfrac.Product(c, t.c)
		}
		out[i] = laurentTerm{trimExponents(e), c}
	}
	return Laurent{out}
}

// MaxValueBits is the largest size, in bits, of a power that [Laurent.Eval]
// takes.
const MaxValueBits = 1 << 30

// Eval returns the value with x1, x2, … replaced by rational numbers. It returns
// [ErrIndex] when a value of a variable that occurs is missing or nil, or 0 with a
// negative exponent, and [ErrTooLarge] when a power of one of them would have more
// than [MaxValueBits] bits.
func (p Laurent) Eval(values ...*big.Rat) (*big.Rat, error) {
	total := new(big.Rat)
	for _, t := range p.terms {
		v := new(big.Rat).SetInt(t.c)
		for i, e := range t.exponents {
			if e == 0 {
				continue
			}
			if i >= len(values) || values[i] == nil || values[i].Sign() == 0 && e < 0 {
				return nil, fmt.Errorf("snake: value of a Laurent polynomial: x%d^%d needs a value, and with a negative exponent one that is not 0: %w", i+1, e, ErrIndex)
			}
			if values[i].Sign() == 0 {
				v = new(big.Rat) // of whatever exponent; the other values are still looked at
				continue
			}
			size := max(values[i].Num().BitLen(), values[i].Denom().BitLen())
			if limit := MaxValueBits / size; e > limit || e < -limit {
				return nil, fmt.Errorf("snake: value of a Laurent polynomial with x%d^%d at a number of %d bits: at most %d bits in all are accepted: %w", i+1, e, size, MaxValueBits, ErrTooLarge)
			}
			v.Mul(v, ratPower(values[i], e))
		}
		total.Add(total, v)
	}
	return total, nil
}

// ratPower returns x^e for x ≠ 0.
func ratPower(x *big.Rat, e int) *big.Rat {
	k := big.NewInt(int64(max(e, -e)))
	num, den := new(big.Int).Exp(x.Num(), k, nil), new(big.Int).Exp(x.Denom(), k, nil)
	if e < 0 {
		num, den = den, num
	}
	return new(big.Rat).SetFrac(num, den)
}

// String writes the monomials, highest first: "x1^2*x2^-1 + 2*x2".
func (p Laurent) String() string { return p.write((*big.Int).String, len(p.terms), ascii{}) }

// Text writes the monomials for reading, highest first, with names for the
// variables: "x₀²·x∞⁻¹ + 2·x∞" for the names "x₀", "x∞". Variables without a
// name are called x1, x2, … as in String.
func (p Laurent) Text(names ...string) string {
	return p.write((*big.Int).String, len(p.terms), raised(names))
}

// notation writes a power of a variable, counted from 0, and the sign between factors.
type notation interface {
	power(variable, exponent int) string
	times() string
}

type ascii struct{}

func (ascii) times() string { return "*" }

func (ascii) power(variable, exponent int) string {
	if exponent == 1 {
		return fmt.Sprintf("x%d", variable+1)
	}
	return fmt.Sprintf("x%d^%d", variable+1, exponent)
}

// raised holds names of variables and writes exponents as superscripts.
type raised []string

func (raised) times() string { return "·" }

func (names raised) power(variable, exponent int) string {
	name := fmt.Sprintf("x%d", variable+1)
	if variable < len(names) {
		name = names[variable]
	}
	if exponent == 1 {
		return name
	}
	digits := []rune("⁰¹²³⁴⁵⁶⁷⁸⁹")
	return name + strings.Map(func(c rune) rune {
		if c == '-' {
			return '⁻'
		}
		return digits[c-'0']
	}, fmt.Sprint(exponent))
}

// Format implements fmt.Formatter: %s writes what String returns, %q quotes it,
// %v and every other verb leave out middle terms of a long sum and shorten
// long coefficients.
func (p Laurent) Format(f fmt.State, verb rune) {
	formatAs(f, verb, func(as string) string {
		if as == "%s" {
			return p.String()
		}
		return p.write(contfrac.Abbreviate, 6, ascii{})
	})
}

func (p Laurent) write(number func(*big.Int) string, keep int, as notation) string {
	var terms []signed
	for i, t := range p.terms {
		if len(p.terms) > 2*keep && i >= keep && i < len(p.terms)-keep {
			if i == keep {
				terms = append(terms, signed{text: "…"})
			}
			continue
		}
		var factors []string
		for k, e := range t.exponents {
			if e != 0 {
				factors = append(factors, as.power(k, e))
			}
		}
		s := coefficient(t.c, strings.Join(factors, as.times()), number)
		if abs := new(big.Int).Abs(t.c); len(factors) > 0 && (!abs.IsInt64() || abs.Int64() != 1) {
			s.text = number(abs) + as.times() + strings.Join(factors, as.times())
		}
		terms = append(terms, s)
	}
	return sum(terms)
}

// Laurents is the ring of Laurent polynomials. Weighing every edge with the
// variable of its label gives the numerator of the Laurent expansion of an arc.
type Laurents struct{}

// Zero returns 0.
func (Laurents) Zero() Laurent { return Laurent{} }

// One returns 1.
func (Laurents) One() Laurent { return Laurent{[]laurentTerm{{nil, big.NewInt(1)}}} }

// Add returns a + b.
func (Laurents) Add(a, b Laurent) Laurent { return a.Add(b) }

// Mul returns ab.
func (Laurents) Mul(a, b Laurent) Laurent { return a.Mul(b) }
