package spectrum_test

import (
	"context"
	"fmt"
	"math/big"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
	"example.com/onecusp/orbifold/spectrum"
)

// The form of a slope, its least value and its Lagrange value.
func Example() {
	f := orbifold.MustNew(1, 1, 1)
	s := farey.MustParse("2/5")
	form, err := spectrum.Form(f, s)
	if err != nil {
		fmt.Println(err)
		return
	}
	least, _ := form.Minimum()
	number, _ := f.Number(s)
	fmt.Println(form, least, number)
	v, _ := spectrum.LagrangeValue(f, s)
	decimal, _ := v.Decimal(30)
	fmt.Println(v, decimal)
	// Output:
	// (217, -1437, 429) 217 217
	// √1692597/217 5.995384620829841579561462331598
}

func ExampleRoot() {
	s := farey.MustParse("3/7")
	y, _ := spectrum.Root(orbifold.Family{}, s)
	n, _ := orbifold.Family{}.Number(s)
	fmt.Println(y, n)
	v := new(big.Int).Mul(y, y)
	fmt.Println(v.Add(v, big.NewInt(1)).Mod(v, n))
	// Output:
	// 99 169
	// 0
}

func ExampleLagrangeValue() {
	for _, text := range []string{"0/1", "1/2", "1/3", "1/4", "2/5"} {
		v, _ := spectrum.LagrangeValue(orbifold.Family{}, farey.MustParse(text))
		decimal, _ := v.Decimal(20)
		fmt.Println(v, decimal)
	}
	// Output:
	// √5 2.23606797749978969641
	// √32/2 2.82842712474619009760
	// √221/5 2.97321374946370110452
	// √1517/13 2.99605262986929946923
	// √7565/29 2.99920718814683241501
}

func ExamplePeriod() {
	p, _ := spectrum.Period(orbifold.Family{}, farey.MustParse("3/7"))
	fmt.Println(p)
	p, _ = spectrum.Period(orbifold.MustNew(2, 0, 1), farey.MustParse("1/3"))
	fmt.Println(p)
	// Output:
	// [(1; 1, 2, 2, 2, 2, 2, 2)]
	// [(1; 1, 5, 3)]
}

// How well the convergents of the fixed point at 1/3 do, and the limit.
func ExampleApproximations() {
	s := farey.MustParse("1/3")
	v, _ := spectrum.LagrangeValue(orbifold.Family{}, s)
	limit, _ := v.Constant().Decimal(8)
	all, _ := spectrum.Approximations(orbifold.Family{}, s)
	n := 0
	for a := range all {
		p, q := a.Fraction()
		c, _ := a.Constant().Decimal(8)
		fmt.Printf("%s/%s %s\n", p, q, c)
		if n++; n == 6 {
			break
		}
	}
	fmt.Println("limit", limit)
	// Output:
	// 3/1 0.38660687
	// 7/2 0.45357250
	// 10/3 0.47946187
	// 17/5 0.33482813
	// 44/13 0.33656183
	// 105/31 0.47079338
	// limit 0.33633640
}

// Two inequivalent slopes carry 81; the root tells them apart, without a search.
func ExampleIdentifyRoot() {
	f := orbifold.MustNew(2, 0, 1)
	ctx := context.Background()
	for _, y := range []int64{44, 62, 8} {
		slopes, err := spectrum.IdentifyRoot(ctx, f, big.NewInt(81), big.NewInt(y))
		fmt.Println(y, slopes, err)
	}
	_, err := spectrum.IdentifyRoot(ctx, f, big.NewInt(81), big.NewInt(1))
	fmt.Println(err)
	// Output:
	// 44 [2/5] <nil>
	// 62 [4/3] <nil>
	// 8 [] <nil>
	// spectrum: slopes of the root 1 modulo 81 in the family (2,0,1): n | y² + k·y + 1 for a weight k would be accepted: not a root of y² + k·y + 1
}

func ExampleIdentifyForm() {
	g, _ := contfrac.FormOf(5, 11, -5)
	slopes, err := spectrum.IdentifyForm(context.Background(), orbifold.Family{}, g)
	fmt.Println(slopes, err)
	// Output: [-2/1 1/3 3/2] <nil>
}

func ExampleIdentifySurd() {
	x, _ := contfrac.SurdOf(-29, 1517, 26)
	slopes, err := spectrum.IdentifySurd(context.Background(), orbifold.Family{}, x)
	fmt.Println(slopes, err)
	// Output: [-3/1 -1/3 1/4 3/4 4/3 4/1] <nil>
}

func ExampleBelowThree() {
	x, _ := contfrac.ParsePeriodic("[3; 14, (2, 2, 1, 1, 2, 2, 1, 1, 1, 1)]")
	s, err := spectrum.BelowThree(x)
	fmt.Println(s, err)
	x, _ = contfrac.ParsePeriodic("[(2; 1)]")
	_, err = spectrum.BelowThree(x)
	fmt.Println(err)
	// Output:
	// 2/7 <nil>
	// spectrum: slope of [(2; 1)]: a period made of 1, 1 and 2, 2 in the order of a Christoffel word would be accepted: the Lagrange value is not below 3
}
