package contfrac_test

import (
	"encoding/json"
	"fmt"
	"math/big"

	"example.com/onecusp/contfrac"
)

// A word, the continued fraction of its runs and its matrix.
func Example() {
	w, err := contfrac.ParseWord("RLLRR")
	if err != nil {
		fmt.Println(err)
		return
	}
	fmt.Println(w.Compact())
	fmt.Println(w.Fraction(), w.Fraction().Numerator())
	fmt.Println(w.Matrix())
	// One letter before and one after: the sum of the entries.
	fmt.Println(w.WithEnds(contfrac.L, contfrac.R).Fraction().Numerator())
	// Output:
	// R L2 R2
	// [1; 2, 2] 7
	// [[3, 7], [2, 5]]
	// 17
}

func ExampleParseWord() {
	w, err := contfrac.ParseWord("R L1000000000000000000000 R2")
	fmt.Println(w, err)
	fmt.Println(w.Len(), "letters in", w.NumRuns(), "runs")
	_, err = contfrac.ParseWord("RLX")
	fmt.Println(err)
	// Output:
	// R L1000000000000000000000 R2 (3 runs, 1000000000000000000003 letters) <nil>
	// 1000000000000000000003 letters in 3 runs
	// contfrac: word "RLX" at byte 2: letters L and R, each with or without a run length, are accepted: malformed text
}

func ExampleWordBuilder() {
	var b contfrac.WordBuilder
	for i := range 4 {
		b.Append(contfrac.L, 1)
		b.Append(contfrac.R, uint64(i))
	}
	fmt.Println(b.Word())
	// Output: LLRLRRLRRR
}

func ExampleWord_Runs() {
	for l, n := range contfrac.WordOf(contfrac.R, contfrac.L, contfrac.L).Runs() {
		fmt.Println(l, n)
	}
	// Output:
	// R 1
	// L 2
}

func ExampleFromRat() {
	f := contfrac.FromRat(big.NewRat(355, 113))
	fmt.Println(f)
	for p, q := range f.Convergents() {
		fmt.Printf("%d/%d\n", p, q)
	}
	// Output:
	// [3; 7, 16]
	// 3/1
	// 22/7
	// 355/113
}

func ExampleFromRatio() {
	f, err := contfrac.FromRatio(big.NewInt(-10), big.NewInt(4))
	fmt.Println(f, err)
	f, err = contfrac.FromRatio(big.NewInt(1), big.NewInt(0))
	fmt.Println(f, err)
	// Output:
	// [-3; 2] <nil>
	// [] <nil>
}

func ExampleFraction_Split() {
	f, err := contfrac.ParseFraction("[2; 3]")
	fmt.Println(f.Split(), f.Split().Canonical(), err)
	// Output: [2; 2, 1] [2; 3] <nil>
}

func ExampleFraction_Minus() {
	m, err := contfrac.FromRat(big.NewRat(7, 5)).Minus()
	fmt.Println(m, err)
	fmt.Println(m.Fraction())
	// Output:
	// [[2; 2, 3]] <nil>
	// [1; 2, 2]
}

func ExampleContinuant() {
	ones := make([]*big.Int, 1000)
	for i := range ones {
		ones[i] = big.NewInt(1)
	}
	// The Fibonacci number F(1001).
	fmt.Println(contfrac.Abbreviate(contfrac.Continuant(ones)))
	// Output: 703303677114…245323403501 (209 digits)
}

func ExampleMatrix_Factor() {
	m, err := contfrac.WordOf(contfrac.R, contfrac.L).Matrix().Pow(3)
	if err != nil {
		fmt.Println(err)
		return
	}
	fmt.Println(m, m.Trace())
	fmt.Println(m.Factor())
	// Output:
	// [[13, 8], [8, 5]] 18
	// RLRLRL <nil>
}

func ExampleMatrix_MarshalJSON() {
	text, err := json.Marshal(contfrac.L.Matrix())
	fmt.Println(string(text), err)
	// Output: [["1","0"],["1","1"]] <nil>
}

func ExampleProduct() {
	x := new(big.Int).Lsh(big.NewInt(1), 1_000_000)
	fmt.Println(contfrac.Product(x, x).BitLen())
	// Output: 2000001
}
