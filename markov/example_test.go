package markov_test

import (
	"context"
	"fmt"
	"math/big"

	"example.com/onecusp/farey"
	"example.com/onecusp/markov"
)

func ExampleNumber() {
	// 3/7, 4/7 and −3/4 are equivalent lattice slopes.
	for _, s := range []string{"0/1", "1/2", "3/7", "4/7", "-3/4"} {
		n, err := markov.Number(farey.MustParse(s))
		if err != nil {
			fmt.Println(err)
			return
		}
		fmt.Println(s, n)
	}
	// Output:
	// 0/1 1
	// 1/2 2
	// 3/7 169
	// 4/7 169
	// -3/4 169
}

func ExampleFrobenius() {
	for _, t := range []string{"0/1", "1/1", "1/2", "1/3", "2/3", "3/2"} {
		n, err := markov.Frobenius(farey.MustParse(t))
		if err != nil {
			fmt.Println(err)
			continue
		}
		fmt.Println(t, n)
	}
	// Output:
	// 0/1 1
	// 1/1 2
	// 1/2 5
	// 1/3 13
	// 2/3 29
	// markov: index 3/2: a slope from 0/1 to 1/1 would be accepted: a Frobenius index lies in [0, 1]
}

func ExampleIsNumber() {
	for _, n := range []int64{194, 195} {
		yes, err := markov.IsNumber(context.Background(), big.NewInt(n))
		fmt.Println(n, yes, err)
	}
	// Output:
	// 194 true <nil>
	// 195 false <nil>
}

func ExampleIndices() {
	indices, err := markov.Indices(context.Background(), big.NewInt(43261))
	fmt.Println(indices, err)
	// Output: [4/9] <nil>
}

func ExampleNumbers() {
	for index, n := range markov.Numbers() {
		fmt.Println(n, "at", index)
		if n.Cmp(big.NewInt(34)) >= 0 {
			break
		}
	}
	// Output:
	// 1 at 0/1
	// 2 at 1/1
	// 5 at 1/2
	// 13 at 1/3
	// 29 at 2/3
	// 34 at 1/4
}

// What this package does not have is had from the family, at the lattice slope.
func ExampleFamily() {
	lattice, err := markov.FromIndex(farey.MustParse("2/5"))
	if err != nil {
		fmt.Println(err)
		return
	}
	word, err := markov.Family().Word(lattice)
	if err != nil {
		fmt.Println(err)
		return
	}
	trace, err := markov.Family().Trace(lattice)
	fmt.Println(lattice, word, trace, err)
	// Output: 2/7 RLRLLRRLRL 582 <nil>
}

func ExampleIndex() {
	index, err := markov.Index(farey.MustParse("3/7"))
	fmt.Println(index, err)
	_, err = markov.Index(farey.MustParse("7/4"))
	fmt.Println(err)
	index, err = markov.Index(markov.Family().Representative(farey.MustParse("7/4")))
	fmt.Println(index, err)
	// Output:
	// 3/4 <nil>
	// markov: index of lattice slope 7/4: its number has the lattice slope 3/7 too, which would be accepted: a lattice slope with an index lies in [0, 1/2]
	// 3/4 <nil>
}

func ExampleFromIndex() {
	lattice, err := markov.FromIndex(farey.MustParse("3/4"))
	fmt.Println(lattice, err)
	// Output: 3/7 <nil>
}

func ExamplePoint() {
	q, p, err := markov.Point(farey.MustParse("3/4"))
	fmt.Println(q, p, err)
	// Output: 4 3 <nil>
}

func ExampleIndexAt() {
	index, err := markov.IndexAt(big.NewInt(4), big.NewInt(3))
	fmt.Println(index, err)
	_, err = markov.IndexAt(big.NewInt(4), big.NewInt(2))
	fmt.Println(err)
	// Output:
	// 3/4 <nil>
	// markov: index of the lattice point (4, 2): coprime q and p with 0 ≤ p ≤ q would be accepted: not a primitive lattice point
}

func ExampleNewTriple() {
	t, err := markov.NewTriple(big.NewInt(433), big.NewInt(5), big.NewInt(29))
	if err != nil {
		fmt.Println(err)
		return
	}
	fmt.Println(t, "at", t.Index())
	_, err = markov.NewTriple(big.NewInt(3), big.NewInt(4), big.NewInt(5))
	fmt.Println(err)
	// Output:
	// (5, 29, 433) at 3/5
	// markov: triple (3, 4, 5): positive integers with a² + b² + c² = 3abc would be accepted: orbifold: (3, 4, 5) in family (0,0,0): left side of (E) is 50, right side 180: not a solution of the equation
}

func ExampleTripleAt() {
	t, err := markov.TripleAt(farey.MustParse("2/5"))
	fmt.Println(t, err)
	// Output: (5, 13, 194) <nil>
}

func ExampleTriple_Neighbours() {
	t, err := markov.TripleAt(farey.MustParse("1/3"))
	if err != nil {
		fmt.Println(err)
		return
	}
	fmt.Println(t)
	for _, jump := range t.Neighbours() {
		fmt.Println(jump, "at", jump.Index())
	}
	// Output:
	// (1, 5, 13)
	// (5, 13, 194) at 2/5
	// (1, 13, 34) at 1/4
	// (1, 2, 5) at 1/2
}

func ExampleTriple_Parent() {
	t, err := markov.TripleAt(farey.MustParse("3/5"))
	if err != nil {
		fmt.Println(err)
		return
	}
	for ok := true; ok; t, ok = t.Parent() {
		fmt.Println(t)
	}
	// Output:
	// (5, 29, 433)
	// (2, 5, 29)
	// (1, 2, 5)
	// (1, 1, 2)
	// (1, 1, 1)
}

func ExampleTriple_Format() {
	t, err := markov.TripleAt(farey.MustParse("1/300"))
	if err != nil {
		fmt.Println(err)
		return
	}
	fmt.Printf("%v\n", t)
	fmt.Println(len(fmt.Sprintf("%s", t)), "bytes whole")
	// Output:
	// (1, 682513910961…660089420401 (125 digits), 178684461669…177991379601 (126 digits))
	// 258 bytes whole
}

func ExampleTree() {
	for index, t := range markov.Tree(3) {
		fmt.Println(index, t)
	}
	// Output:
	// 0/1 (1, 1, 1)
	// 1/1 (1, 1, 2)
	// 1/2 (1, 2, 5)
	// 1/3 (1, 5, 13)
	// 2/3 (2, 5, 29)
}

func ExampleWithin() {
	bound, count := new(big.Int).Exp(big.NewInt(10), big.NewInt(100), nil), 0
	for range markov.Within(bound) {
		count++
	}
	fmt.Println(count, "Markov triples have no number above 10^100")
	// Output: 9670 Markov triples have no number above 10^100
}
