package orbifold_test

import (
	"fmt"
	"math/big"

	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
)

// The Fibonacci branch: the classical numbers at the lattice slopes 1/n are the
// Fibonacci numbers of odd index (OEIS A001519).
func ExampleFamily_Fan() {
	f, _ := orbifold.Family{}.Fan(farey.MustParse("0/1"), farey.MustParse("1/0"))
	for n := range int64(9) {
		y, _ := f.Term(big.NewInt(n))
		fmt.Println(f.Slope(big.NewInt(n)), y)
	}
	r, _ := f.Recurrence(1)
	fmt.Println(r)
	fmt.Println(r.GeneratingFunction())
	// Output:
	// 1/0 1
	// 1/1 1
	// 1/2 2
	// 1/3 5
	// 1/4 13
	// 1/5 34
	// 1/6 89
	// 1/7 233
	// 1/8 610
	// a(n) = 3·a(n−1) − a(n−2)
	// (1 − 2x)/(1 − 3x + x²)
}

// The Pell branch: at the lattice slopes n/(2n+1), of Frobenius index n/(n+1), are
// the Pell numbers of odd index (OEIS A001653). They grow by the square of
// 1 + √2.
func ExampleFan_Ratio() {
	f, _ := orbifold.Family{}.Fan(farey.MustParse("1/2"), farey.MustParse("0/1"))
	var terms []*big.Int
	for n := range int64(7) {
		y, _ := f.Term(big.NewInt(n))
		terms = append(terms, y)
	}
	fmt.Println(terms)
	ratio, _ := f.Ratio()
	lo, hi, _ := ratio.Enclosure(80)
	fmt.Printf("%v, between %.20f and %.20f\n", ratio, lo, hi)
	// Output:
	// [1 5 29 169 985 5741 33461]
	// 3 + √8, between 5.82842712474619009760 and 5.82842712474619009760
}

func ExampleFan_Recurrence() {
	for _, weights := range []string{"0,0,0", "1,1,1", "0,2,1"} {
		family, _ := orbifold.Parse(weights)
		f, _ := family.Fan(farey.MustParse("0/1"), farey.MustParse("1/0"))
		r, _ := f.Recurrence(1)
		fmt.Println(family, r)
		for _, factor := range r.Characteristic().Factors() {
			fmt.Print("  (", factor.Polynomial, ")")
		}
		fmt.Println()
	}
	// Output:
	// (0,0,0) a(n) = 3·a(n−1) − a(n−2)
	//   (x² − 3x + 1)
	// (1,1,1) a(n) = 6·a(n−1) − 6·a(n−2) + a(n−3)
	//   (x − 1)  (x² − 5x + 1)
	// (0,2,1) a(n) = 6·a(n−1) − 6·a(n−3) + a(n−4)
	//   (x − 1)  (x + 1)  (x² − 6x + 1)
}

func ExampleFan_ClosedForm() {
	f, _ := orbifold.MustNew(1, 1, 1).Fan(farey.MustParse("0/1"), farey.MustParse("1/0"))
	form, _ := f.ClosedForm()
	fmt.Println(form)
	y, _ := form.Term(6)
	fmt.Println(y)
	// Output:
	// α·λⁿ + α′·λ⁻ⁿ + e with α = 1/3 − 1/21·√21, λ = (5 + √21)/2, e = 1/3
	// 1393
}

func ExampleFan_Find() {
	f, _ := orbifold.MustNew(1, 1, 1).Fan(farey.MustParse("0/1"), farey.MustParse("1/0"))
	found, _ := f.Find(big.NewInt(31971))
	for _, n := range found {
		fmt.Println(n, f.Slope(n))
	}
	missing, _ := f.Find(big.NewInt(31972))
	fmt.Println(len(missing))
	// Output:
	// -7 -1/7
	// 8 1/8
	// 0
}
