package orbifold_test

import (
	"context"
	"encoding/json"
	"errors"
	"fmt"
	"math/big"

	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
	"example.com/onecusp/snake"
)

func ExampleFamily_Number() {
	s := farey.MustParse("3/7")
	for _, f := range []orbifold.Family{{}, orbifold.MustNew(1, 1, 1), orbifold.MustNew(2, 0, 1)} {
		n, err := f.Number(s)
		if err != nil {
			fmt.Println(err)
			return
		}
		fmt.Println(f, n)
	}
	// Output:
	// (0,0,0) 169
	// (1,1,1) 3673
	// (2,0,1) 961
}

func ExampleFamily_Number_tooLarge() {
	_, err := orbifold.Family{}.Number(farey.MustParse("1/1000000000000"))
	fmt.Println(errors.Is(err, orbifold.ErrTooLarge))
	fmt.Println(err)
	// Output:
	// true
	// orbifold: number at 1/1000000000000 in family (0,0,0): about 1388483827260 bits; the result may have 1073741824 bits (WithLimit sets it): too large
}

func ExampleFamily_Word() {
	s := farey.MustParse("3/7")
	f := orbifold.MustNew(2, 0, 1)
	w, _ := f.Word(s)
	a, _ := f.Fraction(s)
	fmt.Println(w)
	fmt.Println(a, a.Numerator())
	// Output:
	// RLLLLLRRLLLRRRRRL
	// [2; 5, 2, 3, 5, 2] 961
}

func ExampleFamily_Snake() {
	g, _ := orbifold.Family{}.Snake(farey.MustParse("2/3"))
	fmt.Println(g.Tiles(), "tiles,", g.Count(), "matchings")
	// Output:
	// 3 tiles, 5 matchings
}

func ExampleFamily_Matrix() {
	f := orbifold.MustNew(1, 1, 1)
	m, _ := f.Matrix(farey.MustParse("1/2"))
	fmt.Println(m, "determinant", m.Det(), "trace", m.Trace())
	// Output:
	// [[-2, 3], [-1, 1]] determinant 1 trace -1
}

func ExampleFamily_NumberMod() {
	// A slope with two hundred digits, modulo 10⁹ + 7.
	p := new(big.Int).Exp(big.NewInt(10), big.NewInt(100), nil)
	s, _ := farey.New(p, new(big.Int).Add(p, big.NewInt(33)))
	r, _ := orbifold.Family{}.NumberMod(s, big.NewInt(1_000_000_007))
	fmt.Println(r)
	// Output:
	// 227973843
}

func ExampleFamily_Log() {
	s := farey.MustParse("271828/3141592")
	lo, hi, _ := orbifold.Family{}.Log(s)
	_, bits, _ := orbifold.Family{}.Bits(s)
	fmt.Printf("%.10f %.10f, at most %v bits\n", lo, hi, bits)
	// Output:
	// 743154.9085682568 743154.9085682569, at most 1072146 bits
}

func ExampleFamily_Compare() {
	f := orbifold.MustNew(1, 2, 3)
	c, _ := f.Compare(farey.MustParse("1000000007/998244353"), farey.MustParse("998244353/1000000007"))
	fmt.Println(c)
	// Output:
	// -1
}

func ExampleFamily_Identify() {
	f := orbifold.MustNew(2, 0, 1)
	slopes, err := f.Identify(context.Background(), big.NewInt(81))
	fmt.Println(slopes, err)
	// Output:
	// [2/5 4/3] <nil>
}

func ExampleFamily_Nearest() {
	below, above, err := orbifold.Family{}.Nearest(context.Background(), big.NewInt(1000), 2)
	fmt.Println(below, above, err)
	// Output:
	// [4/9 1/8] [2/9 1/9] <nil>
}

func ExampleFamily_Ascending() {
	i := 0
	for n := range (orbifold.Family{}).Ascending() {
		fmt.Print(n.Slope(), ": ", n.Number(), "  ")
		if i++; i == 6 {
			break
		}
	}
	// Output:
	// 0/1: 1  1/2: 2  1/3: 5  1/4: 13  2/5: 29  1/5: 34
}

func ExampleFamily_Within() {
	for n := range orbifold.MustNew(0, 0, 3).Within(big.NewInt(5)) {
		fmt.Print(n.Slope(), " ", n.Number(), ", ")
	}
	// Output:
	// 0/1 1, 1/0 1, 1/1 1, 1/2 2, 2/3 5, 2/1 2, 3/2 5, -1/1 5,
}

func ExampleFamily_NewTriple() {
	t, err := orbifold.MustNew(1, 1, 1).NewTriple(big.NewInt(1), big.NewInt(61), big.NewInt(13))
	if err != nil {
		fmt.Println(err)
		return
	}
	fmt.Println(t.Triangle(), "by the path", t.Path())
	_, err = orbifold.Family{}.NewTriple(big.NewInt(1), big.NewInt(61), big.NewInt(13))
	fmt.Println(err)
	// Output:
	// {0/1, 1/4, 1/3} by the path infinity: L2
	// orbifold: (1, 61, 13) in family (0,0,0): left side of (E) is 3891, right side 2379: not a solution of the equation
}

func ExampleFamily_Orbit() {
	s := farey.MustParse("3/7")
	fmt.Println(orbifold.MustNew(1, 1, 1).Orbit(s))
	fmt.Println(orbifold.MustNew(0, 0, 5).Orbit(s))
	fmt.Println(orbifold.MustNew(2, 0, 1).Orbit(s))
	// Output:
	// [-4/3 -3/4 3/7 4/7 7/4 7/3]
	// [3/7 7/3]
	// [3/7]
}

// spans is the semiring of pairs (lowest, highest) of real numbers, good enough
// for weights that are known approximately.
type spans struct{}

func (spans) Zero() [2]float64               { return [2]float64{0, 0} }
func (spans) One() [2]float64                { return [2]float64{1, 1} }
func (spans) Add(a, b [2]float64) [2]float64 { return [2]float64{a[0] + b[0], a[1] + b[1]} }
func (spans) Mul(a, b [2]float64) [2]float64 { return [2]float64{a[0] * b[0], a[1] * b[1]} }

func ExampleEval() {
	// An orbifold point of order 4 has the weight 2cos(π/4) = √2, between 1.414
	// and 1.415.
	k := [2]float64{1.414, 1.415}
	n, _ := orbifold.Eval(snake.Semiring[[2]float64](spans{}), [3][2]float64{k, k, k}, farey.MustParse("2/5"))
	fmt.Printf("%.1f … %.1f\n", n[0], n[1])
	// Output:
	// 401.7 … 402.3
}

func ExampleFamily_Certify() {
	c, err := orbifold.MustNew(0, 0, 0).Certify(farey.MustParse("1/3"))
	if err != nil {
		fmt.Println(err)
		return
	}
	text, _ := json.Marshal(c)
	fmt.Println(string(text))
	var read orbifold.Certificate
	_ = json.Unmarshal(text, &read)
	fmt.Println(read.Verify())
	// Output:
	// {"format":"onecusp/number","version":1,"weights":{"zero":"0","infinity":"0","one":"0"},"labelling":"lattice slope","slope":"1/3","number":"5","path":"infinity: L","triangle":[{"slope":"0/1","number":"1"},{"slope":"1/2","number":"2"},{"slope":"1/3","number":"5"}],"word":"R L","fraction":["2","2"],"continuant":{"method":"exact","value":"5"},"tiles":"3","matchings":{"method":"exact","value":"5"},"matrix":[["-2","5"],["-1","2"]],"root":"-2","trace":"15"}
	// <nil>
}
