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

// A matrix is conjugate to a word in L and R, up to rotation.
func ExampleMatrix_Cycle() {
	m := contfrac.NewMatrix(big.NewInt(-9), big.NewInt(-5), big.NewInt(29), big.NewInt(16))
	w, err := m.Cycle()
	fmt.Println(w, err)
	fmt.Println(w.Matrix(), w.Matrix().Trace(), m.Trace())
	_, err = contfrac.Matrix{}.Cycle()
	fmt.Println(err)
	// Output:
	// RLLLLL <nil>
	// [[6, 1], [5, 1]] 7 7
	// contfrac: cycle of a matrix: trace 2: at least 3 is accepted: trace out of range
}

func ExampleWord_LeastRotation() {
	w, _ := contfrac.ParseWord("LLRRLRL")
	fmt.Println(w.LeastRotation())
	// Output: RLLLRRL
}

func ExampleSurd_Periodic() {
	x, _ := contfrac.SurdOf(0, 94, 1)
	p, err := x.Periodic()
	fmt.Printf("%s %v\n", p, err)
	fmt.Println(p.Surd())
	s, _ := x.Decimal(30)
	fmt.Println(s)
	// Output:
	// [9; (1, 2, 3, 1, 1, 5, 1, 8, 1, 5, 1, 1, 3, 2, 1, 18)] <nil>
	// √94
	// 9.695359714832658028148881150845
}

func ExampleParsePeriodic() {
	p, err := contfrac.ParsePeriodic("[5; 1, (2, 1, 2, 1)]")
	fmt.Println(p, err)
	fmt.Println(p.Surd(), p.Surd().IsReduced(), p.Surd().Conjugate())
	_, err = contfrac.ParsePeriodic("[1; (0)]")
	fmt.Println(err)
	// Output:
	// [5; (1, 2)] <nil>
	// 4 + √3 false (-4 + √3)/-1
	// contfrac: period [0]: one term or more, of at least 1, is accepted: term out of range
}

// √221/5, which is √5525/25.
func ExampleSurd_Lagrange() {
	p, _ := contfrac.ParsePeriodic("[7; 31, (2, 2, 1, 1)]")
	l, err := p.Surd().Lagrange()
	fmt.Println(l, err)
	s, _ := l.Decimal(20)
	fmt.Println(s)
	lo, hi, _ := l.Enclosure(40)
	fmt.Println(lo, hi)
	// Output:
	// √5525/25 <nil>
	// 2.97321374946370110452
	// 2.97321374946 2.973213749465
}

// How well the convergents of √2 do: q·|q√2 − p| falls to 1/√8.
func ExampleSurd_ApproximationConstant() {
	x, _ := contfrac.SurdOf(0, 2, 1)
	p, _ := x.Periodic()
	n := 0
	for num, den := range p.Convergents() {
		c, _ := x.ApproximationConstant(num, den)
		s, _ := c.Decimal(8)
		fmt.Printf("%s/%s %s\n", num, den, s)
		if n++; n == 4 {
			break
		}
	}
	// Output:
	// 1/1 0.41421356
	// 3/2 0.34314575
	// 7/5 0.35533906
	// 17/12 0.35324702
}

func ExampleForm() {
	f, _ := contfrac.FormOf(5, 11, -5)
	fmt.Println(f.Discriminant())
	n, _ := f.Minimum()
	fmt.Println("minimum", n)
	for g := range f.Cycle() {
		fmt.Println(g)
	}
	m, _ := f.Automorph()
	fmt.Println(m)
	first, second := f.Roots()
	fmt.Println(first, second)
	// Output:
	// 221
	// minimum 5
	// (5, 11, -5)
	// (-5, 9, 7)
	// (7, 5, -7)
	// (-7, 9, 5)
	// [[2, 5], [5, 13]]
	// (-11 + √221)/10 (11 + √221)/-10
}

func ExampleForm_Equivalent() {
	f, _ := contfrac.FormOf(1, 0, -3)
	g, _ := contfrac.FormOf(-1, 0, 3)
	_, ok, _ := f.Equivalent(g)
	fmt.Println(ok)
	h, _ := contfrac.FormOf(-2, -2, 1)
	m, ok, _ := f.Equivalent(h)
	fmt.Println(ok, m)
	// Output:
	// false
	// true [[1, 2], [-1, -1]]
}
