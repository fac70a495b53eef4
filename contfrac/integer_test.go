package contfrac_test

import (
	"fmt"
	"math/big"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/contfrac"
)

func TestAbbreviateKeepsTheEnds(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		n := integer(2000).Draw(t, "n")
		whole := n.String()
		digits := strings.TrimPrefix(whole, "-")
		want := whole
		if len(digits) > 40 {
			want = fmt.Sprintf("%s%s…%s (%d digits)", whole[:len(whole)-len(digits)], digits[:12], digits[len(digits)-12:], len(digits))
		}
		require.Equal(t, want, contfrac.Abbreviate(n))
	})
}

func TestAbbreviateCountsDigitsAtPowersOfTen(t *testing.T) {
	for _, n := range []int{38, 39, 40, 41, 100, 1000, 5000, 30000} {
		power := new(big.Int).Exp(big.NewInt(10), big.NewInt(int64(n)), nil)
		for _, x := range []*big.Int{power, new(big.Int).Sub(power, big.NewInt(1))} {
			if digits := len(x.String()); digits > 40 {
				assert.Contains(t, contfrac.Abbreviate(x), fmt.Sprintf("(%d digits)", digits))
			} else {
				assert.Equal(t, x.String(), contfrac.Abbreviate(x))
			}
		}
	}
	assert.Equal(t, "nil", contfrac.Abbreviate(nil))
}

func TestLongDecimalsAreRead(t *testing.T) {
	atThresholds(t, func(t *testing.T) {
		for _, digits := range []int{1, 2, 3, 19, 20, 1000} {
			s := strings.Repeat("9876543210", digits/10+1)[:digits]
			want, _ := new(big.Int).SetString(s, 10)
			same(t, want, contfrac.FromDigits(s))
		}
	})
	s := strings.Repeat("1234567890", 5000)
	want, _ := new(big.Int).SetString(s, 10)
	assert.Zero(t, want.Cmp(contfrac.FromDigits(s)))
}
