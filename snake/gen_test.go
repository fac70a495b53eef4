package snake_test

import (
	"strings"

	"pgregory.net/rapid"
)

// words draws words of 0 to most letters, biased to long runs and to
// alternation, the two corners of shape.
func words(most int) *rapid.Generator[string] {
	return rapid.Custom(func(t *rapid.T) string {
		n := rapid.IntRange(0, most).Draw(t, "letters")
		switch rapid.IntRange(0, 3).Draw(t, "kind") {
		case 0: // zigzag
			return strings.Repeat(rapid.SampledFrom([]string{"L", "R"}).Draw(t, "letter"), n)
		case 1: // straight
			return strings.Repeat(rapid.SampledFrom([]string{"LR", "RL"}).Draw(t, "pair"), n)[:n]
		case 2: // runs
			var b strings.Builder
			for letter := "L"; b.Len() < n; {
				b.WriteString(strings.Repeat(letter, rapid.IntRange(1, 5).Draw(t, "run")))
				letter = map[string]string{"L": "R", "R": "L"}[letter]
			}
			return b.String()[:n]
		}
		return rapid.StringOfN(rapid.SampledFrom([]rune("LR")), n, n, -1).Draw(t, "word")
	})
}
