package main

import (
	"context"
	"math/big"
)

// matrixSection is the matrix of the slope, and what can be read from it.
func (e *entry) matrixSection(context.Context) (section, error) {
	s := section{Title: "Matrix"}
	if !e.held {
		s.Remark = "The entries are too large to hold."
		return s, nil
	}
	c := e.certificate
	n, y, k := c.Number(), c.Root(), big.NewInt(e.weight())
	s.add("Matrix", "%v", c.Matrix())
	s.add("Determinant", "%s", digits(c.Matrix().Det()))
	s.add("Trace", "%s", digits(c.Matrix().Trace()))
	s.note("minus the weight of the slope's class")
	s.add("Upper right entry", "%s", digits(c.Matrix().B()))
	s.add("Root y", "%s", digits(y))

	value := new(big.Int).Add(y, k) // y² + k·y + 1
	value.Mul(value, y)
	value.Add(value, big.NewInt(1))
	quotient, remainder := new(big.Int).QuoRem(value, n, new(big.Int))
	if remainder.Sign() == 0 {
		s.add("N divides y² + ky + 1", "yes: %s = N · %s", digits(value), digits(quotient))
	} else {
		s.add("N divides y² + ky + 1", "NO: remainder %s", digits(remainder))
	}
	s.add("Trace t = KN − k", "%s", digits(c.Trace()))
	s.note("the trace of the closed curve round the arc")
	return s, nil
}
