package snake_test

import (
	"math/big"
	"math/rand/v2"
	"strings"
	"testing"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/snake"
)

// 30 tiles: the budget is two million matchings a second and core.
func BenchmarkMatchings(b *testing.B) {
	for name, word := range map[string]string{
		"straight30": strings.Repeat("LR", 15)[:29],
		"mixed30":    "RLLRRLLRRLRRLLRRLLRLLRRLLRRLR",
		"straight80": strings.Repeat("LR", 40)[:79],
	} {
		g := snake.FromWord(mustWord(word))
		b.Run(name, func(b *testing.B) {
			b.ReportAllocs()
			n := 0
			for n < b.N {
				for m := range g.Matchings() {
					sink = m
					if n++; n == b.N {
						break
					}
				}
			}
			b.ReportMetric(float64(b.N)/b.Elapsed().Seconds()/1e6, "M/s")
		})
	}
}

var sink snake.Matching

// mixed is a word with n−1 letters, by runs of 1 to 4.
func mixed(n int) string {
	r := rand.New(rand.NewPCG(3, 7))
	var b strings.Builder
	for letter := "L"; b.Len() < n-1; {
		b.WriteString(strings.Repeat(letter, 1+r.IntN(4)))
		letter = map[string]string{"L": "R", "R": "L"}[letter]
	}
	return b.String()[:n-1]
}

// 2000 tiles: the budget is seconds.
func BenchmarkRankPolynomial2000(b *testing.B) {
	for name, word := range map[string]string{"mixed": mixed(2000), "straight": strings.Repeat("LR", 1000)[:1999], "zigzag": strings.Repeat("L", 1999)} {
		g := snake.FromWord(mustWord(word))
		b.Run(name, func(b *testing.B) {
			for b.Loop() {
				if _, err := g.RankPolynomial(); err != nil {
					b.Fatal(err)
				}
			}
		})
	}
}

func BenchmarkSample(b *testing.B) {
	for name, n := range map[string]int{"30": 30, "1000": 1000} {
		set, err := snake.FromWord(mustWord(mixed(n))).Set()
		if err != nil {
			b.Fatal(err)
		}
		source := rand.NewPCG(1, 2)
		b.Run(name, func(b *testing.B) {
			for b.Loop() {
				if sink, err = set.Sample(source); err != nil {
					b.Fatal(err)
				}
			}
		})
	}
}

// The two routes to one count, each on its own form of the graph.
func BenchmarkCount(b *testing.B) {
	word := mixed(100000)
	for name, g := range map[string]snake.Graph{"word": snake.FromWord(mustWord(word)), "edges": built(word)} {
		b.Run(name, func(b *testing.B) {
			for b.Loop() {
				g.Count()
			}
		})
	}
}

func BenchmarkWeighModular(b *testing.B) {
	m, err := snake.NewModular(new(big.Int).Lsh(big.NewInt(1), 61))
	if err != nil {
		b.Fatal(err)
	}
	g := built(mixed(10000))
	for b.Loop() {
		if _, err := snake.Weigh(m, g, snake.Weights[*big.Int]{}); err != nil {
			b.Fatal(err)
		}
	}
}

// Calibrates layoutNow: making a graph and asking it for its matchings ten
// times, laid out once or at every use.
func BenchmarkLayout(b *testing.B) {
	w := mustWord(mixed(1000))
	for name, limit := range map[string]int{"at once": 1 << 12, "at every use": 0} {
		b.Run(name, func(b *testing.B) {
			defer snake.SetLayoutNow(limit)()
			for b.Loop() {
				g := snake.FromWord(w)
				for range 10 {
					if _, err := g.Side(500, snake.North); err != nil {
						b.Fatal(err)
					}
				}
			}
		})
	}
}

// Calibrates packedLimit: dense factors, packed and term by term.
func BenchmarkPolynomialMul(b *testing.B) {
	coefficients := make([]*big.Int, 200)
	for i := range coefficients {
		coefficients[i] = contfrac.Continuant([]*big.Int{big.NewInt(int64(i + 1)), big.NewInt(1 << 40)})
	}
	p := snake.NewPolynomial(coefficients...)
	for name, limit := range map[string]int{"packed": 1 << 24, "termwise": 0} {
		b.Run(name, func(b *testing.B) {
			defer snake.SetPackedLimit(limit)()
			for b.Loop() {
				p.Mul(p)
			}
		})
	}
}
