package survey_test

import (
	"context"
	"encoding/json"
	"fmt"
	"math/big"

	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
	"example.com/onecusp/orbifold/survey"
)

// The Markov numbers up to 100.
func ExampleWalk() {
	r := survey.Up(orbifold.Family{}, big.NewInt(100))
	_ = survey.Walk(context.Background(), r, func(v *survey.Visit) bool {
		fmt.Println(v.Slope(), v.Mod64())
		return true
	})
	// Output:
	// 0/1 1
	// 1/2 2
	// 1/3 5
	// 1/4 13
	// 1/5 34
	// 1/6 89
	// 2/5 29
}

// There are about 2.2·10⁸ Markov numbers up to 10^15000; none is visited but some thousand.
func ExampleCount() {
	n, err := survey.Count(context.Background(), orbifold.Family{}, survey.PowerOfTen(15000))
	fmt.Println(n, err)
	// Output: 215596025 <nil>
}

func ExampleTable() {
	bounds := []*big.Int{survey.PowerOfTen(9), survey.PowerOfTen(18), survey.PowerOfTen(1000)}
	rows, err := survey.Table(context.Background(), orbifold.Family{}, bounds, survey.Options{})
	if err != nil {
		fmt.Println(err)
		return
	}
	g, _, err := survey.Growth(context.Background(), orbifold.Family{})
	if err != nil {
		fmt.Println(err)
		return
	}
	for _, r := range rows {
		fmt.Printf("%s: %v Markov numbers, %v slopes, %.4f of G·X²\n", survey.FormatBound(r.Bound), r.Slopes, r.All, r.Ratio(g))
	}
	// Output:
	// 10^9: 88 Markov numbers, 522 slopes, 1.0110 of G·X²
	// 10^18: 328 Markov numbers, 1962 slopes, 0.9997 of G·X²
	// 10^1000: 959047 Markov numbers, 5754276 slopes, 1.0000 of G·X²
}

// Weights with coincidences: 81 and 4489 belong to two slopes each.
func ExampleDistinct() {
	r, err := survey.Distinct(context.Background(), orbifold.MustNew(2, 0, 1), survey.PowerOfTen(1000), survey.Options{})
	if err != nil {
		fmt.Println(err)
		return
	}
	fmt.Println(r.Slopes, "slopes, digest", r.Digest)
	for _, c := range r.Coincidences {
		fmt.Println(c.Number, c.Slopes)
	}
	// Output:
	// 2334927 slopes, digest 2334927:c52905647ddb0cce:1612ebb369e63b58
	// 1 [0/1 1/1 1/0]
	// 81 [2/5 4/3]
	// 4489 [-4/3 6/7]
}

func ExampleGrowth() {
	lo, hi, err := survey.Growth(context.Background(), orbifold.Family{})
	fmt.Println(lo.Text('f', 30), hi.Text('f', 30), err)
	// Output: 1.084302628270838868346755894295 1.084302628270838868346755894295 <nil>
}

func ExampleCheck() {
	audit, digest, err := survey.Check(context.Background(), orbifold.MustNew(1, 1, 1), survey.PowerOfTen(100), survey.Options{})
	fmt.Println(digest.Slopes == audit.Counted, audit.Telescope == audit.Base, err)
	// Output: true true <nil>
}

// Markov numbers on the fan about 1/2 that end in 1 in decimal.
func ExampleSearch() {
	r := survey.Up(orbifold.Family{}, survey.PowerOfTen(12))
	r.Fans = []farey.Slope{farey.MustParse("1/2")}
	hits, err := survey.Search(context.Background(), r, func(v *survey.Visit) bool {
		n, err := v.Number()
		return err == nil && new(big.Int).Mod(n, big.NewInt(10)).Int64() == 1
	}, survey.Options{})
	if err != nil {
		fmt.Println(err)
		return
	}
	for _, h := range hits {
		fmt.Println(h.Slope, h.Certificate.Number(), h.Certificate.Verify())
	}
	// Output:
	// 0/1 1 <nil>
	// 5/11 5741 <nil>
	// 6/13 33461 <nil>
	// 11/23 225058681 <nil>
	// 12/25 1311738121 <nil>
}

// The directions in which Markov numbers grow, by Frobenius index.
func ExampleOrdering_Compare() {
	o := survey.Ordering{Index: true, Num: 100, Den: 100}
	e, err := o.Compare(context.Background(), survey.Directions(12), survey.Options{})
	if err != nil {
		fmt.Println(err)
		return
	}
	fmt.Printf("rising from slope %d/%d on, falling up to %d/%d\n", e.Rising.Y, e.Rising.X, e.Falling.Y, e.Falling.X)
	// Output: rising from slope -8/7 on, falling up to -5/4
}

// residues counts Markov numbers by their residues modulo 3.
func residues() survey.Question[[3]int] {
	return survey.Question[[3]int]{
		Name:  "residues modulo 3",
		Visit: func(sum *[3]int, v *survey.Visit) { sum[v.Mod61()%3]++ }, // right for numbers below 2⁶¹
		Merge: func(sum *[3]int, o [3]int) {
			for i := range sum {
				sum[i] += o[i]
			}
		},
	}
}

func ExampleSweep() {
	n, err := survey.Sweep(context.Background(), survey.Up(orbifold.Family{}, survey.PowerOfTen(18)), residues(), survey.Options{})
	fmt.Println(n, err)
	// Output: [0 164 164] <nil>
}

// Two machines take half of the shards each; their parts travel as JSON.
func ExampleSplit() {
	r := survey.Up(orbifold.MustNew(1, 2, 3), survey.PowerOfTen(18))
	shards, err := survey.Split(r, 6)
	if err != nil {
		fmt.Println(err)
		return
	}
	var whole survey.Part[survey.Digest]
	for _, half := range [][]survey.Shard{shards[:3], shards[3:]} {
		part, err := survey.SweepShards(context.Background(), half, survey.Tally(), survey.Options{})
		if err != nil {
			fmt.Println(err)
			return
		}
		text, err := json.Marshal(part)
		if err != nil {
			fmt.Println(err)
			return
		}
		var arrived survey.Part[survey.Digest]
		if err = json.Unmarshal(text, &arrived); err == nil {
			whole, err = whole.Merge(arrived)
		}
		if err != nil {
			fmt.Println(err)
			return
		}
	}
	fmt.Println(whole.Shards())
	fmt.Println(whole.Result(survey.Tally()))
	// Output:
	// [1/6 top 2/6 infinity: 3/6 zero: 4/6 one:]
	// 525:57a338dcc495af2a:17a338dcc495af34 <nil>
}
