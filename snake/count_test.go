package snake_test

import (
	"testing"

	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/snake"
)

// Counting on vertices and edges and the matrix of the word are two routes to
// one number.
func TestCountOnEdgesIsCountByWord(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		word := words(400).Draw(t, "word")
		require.Equal(t, snake.FromWord(mustWord(word)).Count(), built(word).Count())
	})
}
