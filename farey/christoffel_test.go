package farey_test

import (
	"math/bits"
	"strings"
	"testing"

	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/farey"
)

// slowChristoffel tries all words with q letters x and p letters y and keeps the one
// whose path stays on or below the segment and encloses the most area under it.
func slowChristoffel(p, q int) string {
	best, bestArea := "", -1
	for mask := range 1 << (p + q) {
		if bits.OnesCount(uint(mask)) != p {
			continue
		}
		x, y, area := 0, 0, 0
		var word strings.Builder
		for i := 0; i < p+q && area >= 0; i++ {
			if mask>>i&1 == 1 {
				y++
				word.WriteByte('y')
			} else {
				x++
				area += y
				word.WriteByte('x')
			}
			if y*q > p*x {
				area = -1
			}
		}
		if area > bestArea {
			best, bestArea = word.String(), area
		}
	}
	return best
}

func TestChristoffelWordIsTheHighestPathBelow(t *testing.T) {
	for p := range 7 {
		for q := range 8 {
			s, err := farey.FromInts(int64(p), int64(q))
			if err != nil {
				continue
			}
			a, b, _ := s.Int64s()
			word, err := s.Christoffel()
			require.NoError(t, err)
			require.Equal(t, slowChristoffel(int(a), int(b)), word, s)
		}
	}
}

func TestChristoffelWordsOfBooks(t *testing.T) {
	// "Combinatorics on Words: Christoffel Words and Repetitions in Words" (2008):
	// slope 4/7 (memory).
	word, err := farey.MustParse("4/7").Christoffel()
	require.NoError(t, err)
	require.Equal(t, "xxyxxyxxyxy", word)
}

func TestChristoffelWordIsThatOfItsParents(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s := smallSlopes().Draw(t, "s")
		if s.Sign() < 0 {
			_, err := s.Christoffel()
			require.ErrorIs(t, err, farey.ErrNegative)
			return
		}
		word, err := s.Christoffel()
		require.NoError(t, err)
		p, q, _ := s.Int64s()
		require.Equal(t, int(p), strings.Count(word, "y"))
		require.Equal(t, int(q), strings.Count(word, "x"))
		a, b := farey.Zero.Slope(), farey.Infinity.Slope() // the parents of 1/1 among positive slopes
		if s.Equal(a) || s.Equal(b) {
			return
		}
		if !s.IsBase() {
			a, b, err = s.Parents()
			require.NoError(t, err)
		}
		left, err := a.Christoffel()
		require.NoError(t, err)
		right, err := b.Christoffel()
		require.NoError(t, err)
		require.Equal(t, left+right, word)
	})
}

func TestChristoffelWordIsBounded(t *testing.T) {
	for text, fine := range map[string]bool{
		"1/16777215": true, "16777215/1": true, "1/16777216": false, "16777216/1": false, "8388608/8388609": false,
		"9223372036854775807/9223372036854775806": false, "100000000000000000000/7": false,
	} {
		word, err := farey.MustParse(text).Christoffel()
		if fine {
			require.NoError(t, err)
			require.Len(t, word, farey.MaxChristoffelLen)
		} else {
			require.ErrorIs(t, err, farey.ErrTooLarge, text)
		}
	}
	_, err := farey.MustParse("-100000000000000000000/7").Christoffel()
	require.ErrorIs(t, err, farey.ErrNegative)
}
