package farey_test

import (
	"fmt"
	"math/big"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/farey"
)

func ExampleNew() {
	s, err := farey.New(big.NewInt(-6), big.NewInt(8))
	if err != nil {
		fmt.Println(err)
		return
	}
	fmt.Println(s, s.Class())
	// Output: -3/4 infinity
}

func ExampleParse() {
	for _, text := range []string{"3/7", "−3/4", "2/4", "5", "1/0", "0/0"} {
		s, err := farey.Parse(text)
		if err != nil {
			fmt.Println(err)
			continue
		}
		fmt.Println(s, s.Class())
	}
	// Output:
	// 3/7 one
	// -3/4 infinity
	// 1/2 infinity
	// 5/1 one
	// 1/0 infinity
	// farey: slope 0/0: a numerator or denominator other than 0 would be accepted: 0/0 is no slope
}

func ExampleSlope_Format() {
	s, err := farey.New(big.NewInt(1), new(big.Int).Lsh(big.NewInt(1), 1000))
	if err != nil {
		fmt.Println(err)
		return
	}
	fmt.Printf("%v\n", s)
	fmt.Println(len(fmt.Sprintf("%s", s)), "bytes whole")
	// Output:
	// 1/107150860718…205668069376 (302 digits)
	// 304 bytes whole
}

func ExampleSlope_Key() {
	seen := map[farey.Key]int{}
	for _, text := range []string{"1/2", "2/4", "3/7", "-1/2"} {
		seen[farey.MustParse(text).Key()]++
	}
	fmt.Println(len(seen), seen[farey.MustParse("1/2").Key()])
	// Output: 3 2
}

func ExampleSlope_Path() {
	p := farey.MustParse("3/7").Path()
	fmt.Println(p)
	fmt.Println(p.Triangle())
	a, b, behind := p.Edge()
	fmt.Println(a, b, behind)
	// Output:
	// infinity: L R2
	// {2/5, 1/2, 3/7}
	// 2/5 1/2 1/3
}

func ExampleNewPath() {
	moves, err := contfrac.ParseWord("L1000000 R2")
	if err != nil {
		fmt.Println(err)
		return
	}
	s, _ := farey.NewPath(farey.Zero, moves).Slope()
	fmt.Println(s)
	// Output: 3000004/3000001
}

func ExamplePath_Flips() {
	t := farey.Triangle{}
	fmt.Println(t)
	for c := range farey.MustParse("3/7").Path().Flips() {
		t = t.Flip(c)
		fmt.Println(t, "flipped", c)
	}
	// Output:
	// {0/1, 1/0, 1/1}
	// {0/1, 1/2, 1/1} flipped infinity
	// {0/1, 1/2, 1/3} flipped one
	// {2/5, 1/2, 1/3} flipped zero
	// {2/5, 1/2, 3/7} flipped one
}

func ExampleMediant() {
	m, err := farey.Mediant(farey.MustParse("2/5"), farey.MustParse("1/2"))
	fmt.Println(m, err)
	a, b, err := m.Parents()
	fmt.Println(a, b, err)
	// Output:
	// 3/7 <nil>
	// 2/5 1/2 <nil>
}

func ExampleNewTriangle() {
	t, err := farey.NewTriangle(farey.MustParse("1/1"), farey.MustParse("1/2"), farey.MustParse("2/3"))
	if err != nil {
		fmt.Println(err)
		return
	}
	newest, _ := t.Newest()
	fmt.Println(t, newest, t.Path())
	// Output: {2/3, 1/2, 1/1} zero infinity: R
}

func ExampleSlope_Crossings() {
	crossings, err := farey.MustParse("2/3").Crossings()
	if err != nil {
		fmt.Println(err)
		return
	}
	for c := range crossings {
		fmt.Printf("%-8v from %v to %v, nearer %v, turn %v\n", c.Class, c.Left, c.Right, c.Nearer, c.Turn)
	}
	fmt.Println(farey.MustParse("2/3").CrossingCounts())
	// Output:
	// infinity from (1, 1) to (1, 0), nearer left, turn left
	// zero     from (1, 1) to (2, 1), nearer middle, turn right
	// infinity from (2, 2) to (2, 1), nearer right, turn middle
	// [1 2 0]
}

func ExampleSlope_Christoffel() {
	word, err := farey.MustParse("3/7").Christoffel()
	fmt.Println(word, err)
	// Output: xxxyxxyxxy <nil>
}

func ExampleSequence() {
	slopes, err := farey.Sequence(5)
	if err != nil {
		fmt.Println(err)
		return
	}
	for s := range slopes {
		fmt.Print(s, " ")
	}
	fmt.Println()
	// Output: 0/1 1/5 1/4 1/3 2/5 1/2 3/5 2/3 3/4 4/5 1/1
}

func ExampleBox() {
	slopes, err := farey.Box(2, 3)
	if err != nil {
		fmt.Println(err)
		return
	}
	for s := range slopes {
		fmt.Print(s, " ")
	}
	fmt.Println()
	// Output: -2/1 -1/1 -2/3 -1/2 -1/3 0/1 1/3 1/2 2/3 1/1 2/1 1/0
}

func ExampleSymmetries() {
	s := farey.MustParse("3/7")
	for _, g := range farey.Symmetries() {
		fmt.Println(g, ":", g.Apply(s), g.Apply(s).Class(), "=", g.Class(s.Class()))
	}
	// Output:
	// s ↦ s : 3/7 one = one
	// s ↦ 1/s : 7/3 one = one
	// s ↦ 1−s : 4/7 zero = zero
	// s ↦ s/(s−1) : -3/4 infinity = infinity
	// s ↦ 1/(1−s) : 7/4 infinity = infinity
	// s ↦ (s−1)/s : -4/3 zero = zero
}
