package markov_test

import (
	"fmt"
	"math/big"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/farey"
	"example.com/onecusp/markov"
)

func ExampleCohn() {
	for _, text := range []string{"0/1", "1/2", "1/1"} {
		c, _ := markov.Cohn(farey.MustParse(text), 1)
		fmt.Println(text, c, c.Trace())
	}
	// Output:
	// 0/1 [[1, 1], [1, 2]] 3
	// 1/2 [[7, 5], [11, 8]] 15
	// 1/1 [[3, 2], [4, 3]] 6
}

func ExampleChristoffel() {
	index := farey.MustParse("2/5")
	word, _ := markov.Christoffel(index)
	period, _ := markov.Period(index)
	fmt.Println(word, period)
	// Output: xxyxy [(1; 1, 1, 1, 2, 2, 1, 1, 2, 2)]
}

func ExampleForm() {
	f, _ := markov.Form(farey.MustParse("1/2"))
	least, _ := f.Minimum()
	fmt.Println(f, f.Discriminant(), least)
	// Output: (5, 11, -5) 221 5
}

func ExampleSpectrum() {
	n := 0
	for index, v := range markov.Spectrum() {
		decimal, _ := v.Decimal(12)
		fmt.Println(index, v, decimal)
		if n++; n == 6 {
			break
		}
	}
	// Output:
	// 0/1 √5 2.236067977500
	// 1/1 √32/2 2.828427124746
	// 1/2 √221/5 2.973213749464
	// 1/3 √1517/13 2.996052629869
	// 2/3 √7565/29 2.999207188147
	// 1/4 √10400/34 2.999423243290
}

func ExampleIndexOf() {
	x, _ := contfrac.SurdOf(-29, 1517, 26)
	p, _ := x.Periodic()
	index, err := markov.IndexOf(p)
	fmt.Println(p, index, err)
	// Output: [0; (2, 1, 1, 1, 1, 2)] 1/3 <nil>
}

func ExampleApproximations() {
	index := farey.MustParse("1/1")
	all, _ := markov.Approximations(index)
	n := 0
	for a := range all {
		p, q := a.Fraction()
		c, _ := a.Constant().Decimal(6)
		fmt.Printf("%s/%s %s\n", p, q, c)
		if n++; n == 4 {
			break
		}
	}
	v, _ := markov.LagrangeValue(index)
	limit, _ := v.Constant().Decimal(6)
	fmt.Println("limit", limit)
	// Output:
	// 0/1 0.414214
	// 1/2 0.343146
	// 2/5 0.355339
	// 5/12 0.353247
	// limit 0.353553
}

// Multiples of the point of index 1/2: 5, 75, 1120.
func ExampleNumberAt() {
	for n := int64(1); n <= 3; n++ {
		m, _ := markov.NumberAt(big.NewInt(2*n), big.NewInt(n))
		fmt.Println(m)
	}
	// Output:
	// 5
	// 75
	// 1120
}
