package orbifold

import (
	"fmt"
	"math/big"
	"math/bits"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/orbifold/linear"
)

// Lucas returns the terms U_n and V_n of the Lucas sequences of t and 1:
//
//	U₀ = 0, U₁ = 1, V₀ = 2, V₁ = t, both with X_{n+1} = t·X_n − X_{n−1}.
//
// Every n-th term of a fan of trace t is a sequence of trace V_n. Cost: O(log n)
// multiplications. Results of more than DefaultLimit bits are ErrTooLarge; a
// nil t counts as 0.
func Lucas(n uint64, t *big.Int) (u, v *big.Int, err error) {
	if t == nil {
		t = new(big.Int)
	}
	if t.CmpAbs(big.NewInt(2)) > 0 && pastBits(n, t, DefaultLimit) {
		return nil, nil, fmt.Errorf("orbifold: term %d of the Lucas sequences of %s: more than %d bits: %w", n, brief(t), DefaultLimit, ErrTooLarge)
	}
	// U_{2i} = U_i·V_i, V_{2i} = V_i² − 2; one step further:
	// 2·U_{i+1} = t·U_i + V_i, 2·V_{i+1} = (t²−4)·U_i + t·V_i.
	u, v = new(big.Int), big.NewInt(2)
	d := contfrac.Product(t, t)
	d.Sub(d, big.NewInt(4))
	for i := bits.Len64(n) - 1; i >= 0; i-- {
		u = contfrac.Product(u, v)
		v = contfrac.Product(v, v)
		v.Sub(v, big.NewInt(2))
		if n>>i&1 == 1 {
			next := contfrac.Product(t, u)
			next.Add(next, v).Rsh(next, 1)
			v = contfrac.Product(t, v)
			v.Add(v, contfrac.Product(d, u)).Rsh(v, 1)
			u = next
		}
	}
	return u, v, nil
}

// pastBits tells whether n times the bits of t, which bounds the bits of V_n
// for |t| ≥ 3, pass the limit.
func pastBits(n uint64, t *big.Int, limit int64) bool {
	over, size := bits.Mul64(n, uint64(t.BitLen()))
	return over != 0 || size > uint64(limit)
}

// abs64 returns |n| also for the least int64.
func abs64(n int64) uint64 {
	if n < 0 {
		return -uint64(n)
	}
	return uint64(n)
}

// lucasFits refuses the terms n of the Lucas sequences of t that pass the
// limit of the family.
func (f Fan) lucasFits(n uint64, t *big.Int) error {
	if limit := f.family.Limit(); pastBits(n, t, limit) {
		return fmt.Errorf("orbifold: %v: its trace has %d bits and steps of %d are taken; the result may have %d bits (WithLimit sets it): %w",
			f, t.BitLen(), n, limit, ErrTooLarge)
	}
	return nil
}

// Recurrence returns the minimal linear recurrence of the terms y₀, y_step,
// y_{2·step}, …; a step of 1 is the fan itself, a negative one walks it
// backwards, 0 is ErrStep.
//
// With V = V_|step| of the Lucas sequence of t (V = t for single steps) and
// weights c, c' of the arcs, the characteristic polynomial is exactly
//
//	x² − V·x + 1                    if c = c' = 0,
//	(x − 1)·(x² − V·x + 1)          if c = c' > 0, or c ≠ c' and the step is even,
//	(x − 1)·(x + 1)·(x² − V·x + 1)  if c ≠ c' and the step is odd.
//
// It is minimal since the closed form has the two powers of λ with coefficients that
// are not zero, t² − 4 being no square, and a part of period two
// that is zero only for c = c' = 0 and constant only for c = c'. Errors: those of
// Family.Number for the first terms, ErrTooLarge for V.
func (f Fan) Recurrence(step int64) (linear.Recurrence, error) {
	if step == 0 {
		return linear.Recurrence{}, fmt.Errorf("orbifold: recurrence of %v with step 0: %w", f, ErrStep)
	}
	t, err := f.Trace()
	if err != nil {
		return linear.Recurrence{}, err
	}
	n := abs64(step)
	if err := f.lucasFits(n, t); err != nil {
		return linear.Recurrence{}, err
	}
	_, v, err := Lucas(n, t)
	if err != nil {
		return linear.Recurrence{}, err
	}
	one := new(big.Rat).SetInt64(1)
	p := linear.NewPolynomial(one, new(big.Rat).SetInt(v.Neg(v)), one)
	c, d := f.Weights()
	if c != 0 || d != 0 {
		p = linear.PolynomialOf(-1, 1).Mul(p)
	}
	if c != d && n%2 == 1 {
		p = linear.PolynomialOf(1, 1).Mul(p)
	}
	initial := make([]*big.Int, p.Degree())
	for i := range initial {
		j := new(big.Int).Mul(big.NewInt(step), big.NewInt(int64(i)))
		if initial[i], err = f.Term(j); err != nil {
			return linear.Recurrence{}, err
		}
	}
	return linear.NewRecurrence(p, initial...)
}

// Ratio returns λ = (t + √(t²−4))/2, the limit of y_{n+1}/y_n as n grows and of
// y_{n−1}/y_n as n falls. Errors are those of Trace.
func (f Fan) Ratio() (contfrac.Surd, error) {
	t, err := f.Trace()
	if err != nil {
		return contfrac.Surd{}, err
	}
	return unitOf(t), nil
}

// unitOf returns λ for the trace t ≥ 3.
func unitOf(t *big.Int) contfrac.Surd {
	unit, _ := contfrac.NewSurd(t, discriminant(t), big.NewInt(2)) // t² − 4 is no square
	return unit
}

// discriminant returns t² − 4.
func discriminant(t *big.Int) *big.Int {
	d := contfrac.Product(t, t)
	return d.Sub(d, big.NewInt(4))
}

// ClosedForm writes the terms of a fan in the quadratic field Q(√(t²−4)):
//
//	y_n = α·λⁿ + α′·λ⁻ⁿ + e_n,   λ = (t + √(t²−4))/2,
//
// with α′ the conjugate of α and e_n of period two, the solution that does not
// grow: e_n = N·(t·c_n + 2·c_{n+1})/(t²−4) for the weights c_n of the arcs. The
// zero value is the closed form of the zero Fan.
type ClosedForm struct {
	trace     *big.Int // nil for the zero value
	a, b      *big.Rat // α = a + b·√(t²−4)
	even, odd *big.Rat
	limit     int64
}

// ClosedForm returns the closed form of the terms, for all integers n. Errors
// are those of Family.Number.
func (f Fan) ClosedForm() (ClosedForm, error) {
	t, err := f.Trace()
	if err != nil {
		return ClosedForm{}, err
	}
	number, err := f.family.Number(f.centre)
	if err != nil {
		return ClosedForm{}, err
	}
	var y [2]*big.Rat
	for i := range y {
		n, err := f.Term(big.NewInt(int64(i)))
		if err != nil {
			return ClosedForm{}, err
		}
		y[i] = new(big.Rat).SetInt(n)
	}
	d := discriminant(t)
	c, c1 := f.Weights()
	resting := func(c, next int64) *big.Rat {
		e := new(big.Int).Mul(t, big.NewInt(c))
		e.Add(e, new(big.Int).Lsh(big.NewInt(next), 1))
		return new(big.Rat).SetFrac(e.Mul(e, number), d)
	}
	form := ClosedForm{trace: t, even: resting(c, c1), odd: resting(c1, c), limit: f.family.Limit()}
	// α + α′ = y₀ − e₀ and α·λ + α′·λ⁻¹ = y₁ − e₁.
	y[0].Sub(y[0], form.even)
	y[1].Sub(y[1], form.odd)
	a := new(big.Rat).Mul(y[0], big.NewRat(1, 2))
	b := new(big.Rat).Mul(a, new(big.Rat).SetInt(t))
	b.Sub(y[1], b).Quo(b, new(big.Rat).SetInt(d))
	form.a, form.b = a, b
	return form, nil
}

// value returns the closed form itself, for the zero value that of Fan{}.
func (c ClosedForm) value() ClosedForm {
	if c.trace == nil {
		c, _ = Fan{}.ClosedForm()
	}
	return c
}

// Unit returns λ.
func (c ClosedForm) Unit() contfrac.Surd { return unitOf(c.value().trace) }

// Alpha returns the rational numbers a and b of α = a + b·√(t²−4); the
// conjugate α′ is a − b·√(t²−4).
func (c ClosedForm) Alpha() (a, b *big.Rat) {
	c = c.value()
	return new(big.Rat).Set(c.a), new(big.Rat).Set(c.b)
}

// Resting returns e_n for even and for odd n.
func (c ClosedForm) Resting() (even, odd *big.Rat) {
	c = c.value()
	return new(big.Rat).Set(c.even), new(big.Rat).Set(c.odd)
}

// Term returns y_n by the closed form, exactly, in the quadratic field: a way
// to the terms that shares nothing with Fan.Term but y₀ and y₁. A result that
// may have more bits than the limit of the family is ErrTooLarge.
func (c ClosedForm) Term(n int64) (*big.Int, error) {
	c = c.value()
	size := abs64(n)
	if pastBits(size, c.trace, c.limit) {
		return nil, fmt.Errorf("orbifold: term %d of a fan of trace %s: about %d bits each; the result may have %d bits (WithLimit sets it): %w",
			n, brief(c.trace), c.trace.BitLen(), c.limit, ErrTooLarge)
	}
	// λⁿ = (V_n + U_n·√d)/2, and y_n − e_n is twice the rational part of α·λⁿ.
	u, v, err := Lucas(size, c.trace)
	if err != nil {
		return nil, err
	}
	if n < 0 {
		u.Neg(u)
	}
	y := new(big.Rat).Mul(c.b, new(big.Rat).SetInt(u.Mul(u, discriminant(c.trace))))
	y.Add(y, new(big.Rat).Mul(c.a, new(big.Rat).SetInt(v)))
	if n%2 == 0 {
		y.Add(y, c.even)
	} else {
		y.Add(y, c.odd)
	}
	return new(big.Int).Set(y.Num()), nil // an integer
}

// String writes α, λ and e_n: "α·λⁿ + α′·λ⁻ⁿ + e with α = …, λ = …, e = …".
func (c ClosedForm) String() string { return c.text((*big.Int).String) }

// Format writes the form whole for %s, and with long integers shortened for
// %v.
func (c ClosedForm) Format(s fmt.State, verb rune) {
	if verb == 'v' {
		fmt.Fprint(s, c.text(contfrac.Abbreviate))
		return
	}
	fmt.Fprint(s, c.String())
}

func (c ClosedForm) text(integer func(*big.Int) string) string {
	c = c.value()
	ratio := func(r *big.Rat) string {
		if r.IsInt() {
			return integer(r.Num())
		}
		return integer(r.Num()) + "/" + integer(r.Denom())
	}
	sign := " + "
	if c.b.Sign() < 0 {
		sign = " − "
	}
	root := "√" + integer(discriminant(c.trace))
	where := " with α = " + ratio(c.a) + sign + ratio(new(big.Rat).Abs(c.b)) + "·" + root +
		", λ = (" + integer(c.trace) + " + " + root + ")/2"
	switch {
	case c.even.Sign() == 0 && c.odd.Sign() == 0:
		return "α·λⁿ + α′·λ⁻ⁿ" + where
	case c.even.Cmp(c.odd) == 0:
		return "α·λⁿ + α′·λ⁻ⁿ + e" + where + ", e = " + ratio(c.even)
	}
	return "α·λⁿ + α′·λ⁻ⁿ + e" + where + ", e = " + ratio(c.even) + " for even n, " + ratio(c.odd) + " for odd n"
}
