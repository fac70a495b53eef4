package main

import (
	"context"
	"errors"
	"math/big"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/orbifold/spectrum"
)

const (
	lagrangeDigits = 30      // decimals shown of a Lagrange value
	maxFormBits    = 1 << 14 // numbers past it are not turned into forms here
)

// formSection is the invariant form of the slope, its Lagrange value and the
// period of the irrational that it fixes.
func (e *entry) formSection(context.Context) (section, error) {
	s := section{Title: "Form and Lagrange value"}
	if !e.held || e.certificate.Number().BitLen() > maxFormBits {
		s.Remark = "Not worked out for numbers of this size."
		return s, nil
	}
	form, err := spectrum.Form(e.family, e.Slope)
	if err != nil {
		return s, err
	}
	s.add("Form (a, b, c)", "%v", form)
	s.note("aX² + bXY + cY²; its least nonzero absolute value is the number N")
	s.add("Discriminant t² − 4", "%s", digits(form.Discriminant()))
	value, err := spectrum.LagrangeValue(e.family, e.Slope)
	if err != nil {
		return s, err
	}
	decimals, err := value.Decimal(lagrangeDigits)
	if err != nil {
		return s, err
	}
	s.add("Lagrange value", "%v ≈ %s", value, decimals)
	if e.family.K().Cmp(big.NewInt(3)) == 0 {
		s.note("below 3: a point of the Lagrange and Markov spectra")
	}
	period, err := spectrum.Period(e.family, e.Slope)
	switch {
	case err == nil:
		s.add("Period", "%v", period)
		s.note("of the continued fraction of a root of the form, from one of its places on")
	case !errors.Is(err, contfrac.ErrTooLarge):
		return s, err
	}
	return s, nil
}
