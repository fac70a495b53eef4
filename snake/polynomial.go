package snake

import (
	"fmt"
	"math/big"
	"math/bits"
	"strings"

	"example.com/onecusp/contfrac"
)

// Polynomial is a polynomial in one variable q with integer coefficients. It is
// immutable; the zero value is 0.
type Polynomial struct {
	c []*big.Int // by exponent, the last one nonzero; shared, never changed
}

// MaxDegree is the highest exponent that [Power] makes.
const MaxDegree = 1 << 20

// packedLimit is the size, in words, up to which factors are packed into
// integers for multiplication; a few large coefficients among many small ones
// are multiplied term by term past it, so that memory stays near the size of
// the result. BenchmarkPolynomialMul measures both ways.
var packedLimit = 1 << 24

// NewPolynomial returns the polynomial with the given coefficients, the constant
// one first. A nil coefficient counts as 0.
func NewPolynomial(coefficients ...*big.Int) Polynomial {
	c := make([]*big.Int, len(coefficients))
	for i, a := range coefficients {
		c[i] = new(big.Int).Set(orZero(a))
	}
	return Polynomial{trim(c)}
}

// Power returns the monomial q^exponent. It returns [ErrIndex] unless 0 ≤
// exponent ≤ [MaxDegree].
func Power(exponent int) (Polynomial, error) {
	if exponent < 0 || exponent > MaxDegree {
		return Polynomial{}, fmt.Errorf("snake: monomial q^%d: exponents are 0 to %d: %w", exponent, MaxDegree, ErrIndex)
	}
	c := make([]*big.Int, exponent+1)
	for i := range c {
		c[i] = zeroInt
	}
	c[exponent] = big.NewInt(1)
	return Polynomial{c}, nil
}

// trim cuts leading zeros.
func trim(c []*big.Int) []*big.Int {
	for len(c) > 0 && c[len(c)-1].Sign() == 0 {
		c = c[:len(c)-1]
	}
	return c
}

// Degree returns the highest exponent with a nonzero coefficient, −1 for 0.
func (p Polynomial) Degree() int { return len(p.c) - 1 }

// Coefficient returns the coefficient of q^exponent, 0 outside the range.
func (p Polynomial) Coefficient(exponent int) *big.Int {
	if exponent < 0 || exponent >= len(p.c) {
		return new(big.Int)
	}
	return new(big.Int).Set(p.c[exponent])
}

// Coefficients returns all coefficients up to the degree, the constant one first.
func (p Polynomial) Coefficients() []*big.Int {
	c := make([]*big.Int, len(p.c))
	for i := range c {
		c[i] = new(big.Int).Set(p.c[i])
	}
	return c
}

// Equal reports whether p = o.
func (p Polynomial) Equal(o Polynomial) bool {
	if len(p.c) != len(o.c) {
		return false
	}
	for i, a := range p.c {
		if a.Cmp(o.c[i]) != 0 {
			return false
		}
	}
	return true
}

// Eval returns the value at an integer, by Horner's rule; nil counts as 0.
func (p Polynomial) Eval(q *big.Int) *big.Int {
	v := new(big.Int)
	for i := len(p.c) - 1; i >= 0; i-- {
		v = contfrac.Product(v, q)
		v.Add(v, p.c[i])
	}
	return v
}

// Add returns p + o.
func (p Polynomial) Add(o Polynomial) Polynomial {
	if len(p.c) < len(o.c) {
		p, o = o, p
	}
	if len(o.c) == 0 {
		return p
	}
	c := make([]*big.Int, len(p.c))
	for i, a := range p.c {
		switch {
		case i >= len(o.c) || o.c[i].Sign() == 0:
			c[i] = a
		case a.Sign() == 0:
			c[i] = o.c[i]
		default:
			c[i] = new(big.Int).Add(a, o.c[i])
		}
	}
	return Polynomial{trim(c)}
}

// Mul returns po. A monomial factor shifts and scales; other products are made
// by one integer multiplication of the values at a power of two, or term by
// term where that integer would be far larger than the factors.
func (p Polynomial) Mul(o Polynomial) Polynomial {
	if len(p.c) == 0 || len(o.c) == 0 {
		return Polynomial{}
	}
	if p.monomial() {
		p, o = o, p
	}
	if !o.monomial() {
		return p.packedProduct(o)
	}
	shift, a := len(o.c)-1, o.c[len(o.c)-1]
	c := make([]*big.Int, shift+len(p.c))
	for i := range shift {
		c[i] = zeroInt
	}
	if a.IsInt64() && a.Int64() == 1 {
		copy(c[shift:], p.c)
		return Polynomial{c}
	}
	for i, b := range p.c {
		c[shift+i] = contfrac.Product(a, b)
	}
	return Polynomial{c}
}

// monomial reports whether a nonzero polynomial has one term only.
func (p Polynomial) monomial() bool {
	for _, a := range p.c[:len(p.c)-1] {
		if a.Sign() != 0 {
			return false
		}
	}
	return true
}

// packedProduct packs the coefficients into fields of whole words, wide enough
// for every coefficient of the product and its sign, and multiplies once.
func (p Polynomial) packedProduct(o Polynomial) Polynomial {
	need := p.bits() + o.bits() + bits.Len(uint(min(len(p.c), len(o.c)))) + 1
	words := (need + bits.UintSize - 1) / bits.UintSize
	if words > packedLimit/(len(p.c)+len(o.c)) {
		return p.termwiseProduct(o)
	}
	product := contfrac.Product(p.pack(words), o.pack(words))
	c := make([]*big.Int, len(p.c)+len(o.c)-1)
	// A half in every field makes all of them non-negative.
	half := new(big.Int).Lsh(big.NewInt(1), uint(words*bits.UintSize-1))
	halves := make([]*big.Int, len(c))
	for i := range halves {
		halves[i] = half
	}
	raised := product.Add(product, Polynomial{halves}.pack(words)).Bits()
	for i := range c {
		field := raised[min(i*words, len(raised)):min((i+1)*words, len(raised))]
		c[i] = new(big.Int).SetBits(append([]big.Word(nil), field...))
		c[i].Sub(c[i], half)
	}
	return Polynomial{trim(c)}
}

// termwiseProduct multiplies every nonzero coefficient by every other.
func (p Polynomial) termwiseProduct(o Polynomial) Polynomial {
	c := make([]*big.Int, len(p.c)+len(o.c)-1)
	for i := range c {
		c[i] = new(big.Int)
	}
	for i, a := range p.c {
		if a.Sign() == 0 {
			continue
		}
		for k, b := range o.c {
			if b.Sign() != 0 {
				c[i+k].Add(c[i+k], contfrac.Product(a, b))
			}
		}
	}
	return Polynomial{c}
}

// bits is the length of the longest coefficient.
func (p Polynomial) bits() int {
	n := 0
	for _, a := range p.c {
		n = max(n, a.BitLen())
	}
	return n
}

// pack is the value at 2 to the number of bits in a field of so many words.
func (p Polynomial) pack(words int) *big.Int {
	plus, minus := make([]big.Word, words*len(p.c)), []big.Word(nil)
	for i, a := range p.c {
		if a.Sign() >= 0 {
			copy(plus[i*words:], a.Bits())
			continue
		}
		if minus == nil {
			minus = make([]big.Word, words*len(p.c))
		}
		copy(minus[i*words:], a.Bits())
	}
	v := new(big.Int).SetBits(plus)
	if minus != nil {
		v.Sub(v, new(big.Int).SetBits(minus))
	}
	return v
}

// String writes the polynomial with increasing exponents: "1 + 2q + q^2".
func (p Polynomial) String() string { return p.write((*big.Int).String, len(p.c)) }

// Format implements fmt.Formatter: %s writes what String returns, %q quotes it,
// %v and every other verb leave out middle terms of a long polynomial and
// shorten long coefficients.
func (p Polynomial) Format(f fmt.State, verb rune) {
	formatAs(f, verb, func(as string) string {
		if as == "%s" {
			return p.String()
		}
		return p.write(contfrac.Abbreviate, 6)
	})
}

// write writes all terms, or this many from either end when there are more than
// twice as many.
func (p Polynomial) write(number func(*big.Int) string, keep int) string {
	var terms []signed
	for i, a := range p.c {
		if len(p.c) > 2*keep && i >= keep && i < len(p.c)-keep {
			if i == keep {
				terms = append(terms, signed{text: "…"})
			}
			continue
		}
		if a.Sign() != 0 {
			power := ""
			switch {
			case i == 1:
				power = "q"
			case i > 1:
				power = fmt.Sprintf("q^%d", i)
			}
			terms = append(terms, coefficient(a, power, number))
		}
	}
	return sum(terms)
}

// signed is a term of a written sum.
type signed struct {
	minus bool
	text  string
}

// coefficient writes a term, leaving out a factor 1.
func coefficient(a *big.Int, power string, number func(*big.Int) string) signed {
	abs := new(big.Int).Abs(a)
	text := number(abs) + power
	if power != "" && abs.IsInt64() && abs.Int64() == 1 {
		text = power
	}
	return signed{a.Sign() < 0, text}
}

// sum joins terms with their signs; no term at all is 0.
func sum(terms []signed) string {
	if len(terms) == 0 {
		return "0"
	}
	var b strings.Builder
	for i, t := range terms {
		switch {
		case i == 0 && t.minus:
			b.WriteString("-")
		case i > 0 && t.minus:
			b.WriteString(" - ")
		case i > 0:
			b.WriteString(" + ")
		}
		b.WriteString(t.text)
	}
	return b.String()
}

// Polynomials is the ring of polynomials in q.
type Polynomials struct{}

// Zero returns 0.
func (Polynomials) Zero() Polynomial { return Polynomial{} }

// One returns 1.
func (Polynomials) One() Polynomial { return Polynomial{[]*big.Int{big.NewInt(1)}} }

// Add returns a + b.
func (Polynomials) Add(a, b Polynomial) Polynomial { return a.Add(b) }

// Mul returns ab.
func (Polynomials) Mul(a, b Polynomial) Polynomial { return a.Mul(b) }

// RankPolynomial returns the rank generating function Σ q^height over all
// matchings: its coefficient of q^h counts the matchings with h flipped tiles,
// its value at 1 all of them. It returns [ErrTooLong] past [MaxRankedTiles]
// tiles. Cost: O(n²) additions of numbers of up to 0.7n bits for n tiles.
func (g Graph) RankPolynomial() (Polynomial, error) { return rankPolynomial(g, g.Tiles()) }

// RankPolynomial returns the rank generating function of the good matchings.
// It returns [ErrTooLong] past [MaxRankedTiles] tiles.
func (b Band) RankPolynomial() (Polynomial, error) { return rankPolynomial(b, b.Tiles()) }

// RankPolynomial returns Σ q^height over the matchings of the set. It returns
// [ErrTooLong] past [MaxRankedTiles] tiles.
func (t Set) RankPolynomial() (Polynomial, error) { return rankPolynomial(t, t.Tiles()) }

func rankPolynomial(g Matched, tiles int) (Polynomial, error) {
	if tiles > MaxRankedTiles {
		return Polynomial{}, fmt.Errorf("snake: rank polynomial of %s: at most %d are accepted: %w", tileCount(tiles), MaxRankedTiles, ErrTooLong)
	}
	q := Polynomial{[]*big.Int{zeroInt, big.NewInt(1)}}
	return Weigh(Polynomials{}, g, Weights[Polynomial]{Tile: func(int) Polynomial { return q }})
}
