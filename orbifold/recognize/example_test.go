package recognize_test

import (
	"context"
	"fmt"
	"math/big"
	"os"

	"example.com/onecusp/orbifold/recognize"
)

// The numbers 3, 13, 61, … stand round an arc of the family (1,1,1).
func ExampleSequence_Fans() {
	s, _ := recognize.ParseSequence("3, 13, 61, 291, 1393, 6673")
	answer, err := s.Fans(context.Background(), recognize.Options{})
	fmt.Println(answer.Verdict, err)
	for _, m := range answer.Matches {
		fmt.Println(m.Fan, "step", m.Step)
		fmt.Println(m.Rule)
		next, _ := m.Term(6)
		fmt.Println("next:", next, "at", m.Slope(6))
	}
	// Output:
	// found <nil>
	// fan of (1,1,1) about 0/1 through 1/2 step 1
	// a(n) = 6·a(n−1) − 6·a(n−2) + a(n−3)
	// next: 31971 at 1/8
}

// Every second term of a fan, going backwards, through its least term.
func ExampleSequence_Fans_progression() {
	s, _ := recognize.ParseSequence("985 29 1 5 169 5741")
	answer, _ := s.Fans(context.Background(), recognize.Options{})
	for _, m := range answer.Matches {
		fmt.Println(m.Fan, "step", m.Step)
	}
	// Output:
	// fan of (0,0,0) about 1/2 through 4/9 step -2
}

func ExampleSequence_Fans_undecided() {
	for _, text := range []string{"2 5 13", "2 5 13 35 94", "1 3 6 10"} {
		s, _ := recognize.ParseSequence(text)
		answer, _ := s.Fans(context.Background(), recognize.Options{Weight: 1})
		fmt.Println(answer.Verdict, len(answer.Matches))
	}
	// Output:
	// not enough terms to decide 1
	// none 0
	// not enough terms to decide 0
}

func ExampleSequence_Recurrence() {
	s, _ := recognize.ParseSequence("1, 5, 29, 169, 985, 5741, 33461")
	r, _ := s.Recurrence(context.Background())
	fmt.Println(r.Verdict, r.Rule, r.Surplus)
	fmt.Println(r.Rule.Characteristic().Factors()[0].Polynomial)
	fmt.Println(r.Rule.GeneratingFunction())
	// Output:
	// found a(n) = 6·a(n−1) − a(n−2) 3
	// x² − 6x + 1
	// (1 − x)/(1 − 6x + x²)
}

func ExampleSequence_WriteIndexed() {
	s, _ := recognize.ParseSequence("1, 5, 29")
	_ = s.WriteIndexed(os.Stdout, 0)
	// Output:
	// 0 1
	// 1 5
	// 2 29
}

// The integers 3, 13 and 217 are neighbours in the family (1,1,1).
func ExampleFamilies() {
	numbers := []*big.Int{big.NewInt(3), big.NewInt(13), big.NewInt(217)}
	found, _ := recognize.Families(context.Background(), numbers, recognize.Options{})
	for _, m := range found[:2] {
		fmt.Println(m.Family, m.Carried, "of 3", m.Slopes, m.Together)
	}
	// Output:
	// (1,1,1) 3 of 3 [[1/2] [1/3] [2/5]] true
	// (1,0,0) 2 of 3 [[2/1] [1/4] []] false
}

func ExampleWeights() {
	for _, n := range [][3]int64{{5, 13, 194}, {1, 3, 13}, {1, 1, 7}, {2, 3, 4}} {
		set, _ := recognize.Weights(big.NewInt(n[0]), big.NewInt(n[1]), big.NewInt(n[2]))
		fmt.Println(set)
	}
	// Output:
	// k₀ = 0, k∞ = 0, k₁ = 0
	// k₀ any, k∞ = 1, k₁ = 1
	// k₀ any, k∞ any, k₁ = 5
	// none
}
