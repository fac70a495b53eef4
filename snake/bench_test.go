package snake_test

import (
	"strings"
	"testing"

	"example.com/onecusp/snake"
)

// 30 tiles: the budget is two million matchings a second and core.
func BenchmarkMatchings(b *testing.B) {
	for name, word := range map[string]string{
		"straight": strings.Repeat("LR", 15)[:29],
		"markov":   "RLLRRLLRRLRRLLRRLLRLLRRLLRRLR",
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
