package farey

import (
	"fmt"
	"math"
	"math/big"
	"testing"

	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"
)

// TestReduceIsTheSameOnBothSidesOfItsThreshold forces the threshold to its minimum and
// to infinity.
func TestReduceIsTheSameOnBothSidesOfItsThreshold(t *testing.T) {
	tuned := reduceBits
	defer func() { reduceBits = tuned }()
	integers := rapid.Custom(func(t *rapid.T) *big.Int {
		n := new(big.Int).SetBytes(rapid.SliceOfN(rapid.Byte(), 0, 60).Draw(t, "bytes"))
		if rapid.Bool().Draw(t, "negative") {
			n.Neg(n)
		}
		return n
	})
	rapid.Check(t, func(t *rapid.T) {
		p, q, k := integers.Draw(t, "p"), integers.Draw(t, "q"), integers.Draw(t, "k")
		if p.Sign() == 0 && q.Sign() == 0 {
			return
		}
		if k.Sign() != 0 {
			p.Mul(p, k)
			q.Mul(q, k)
		}
		var made [3]Slope
		for i, bits := range []int{0, tuned, math.MaxInt} {
			reduceBits = bits
			made[i] = fromCoprime(reduce(p, q))
		}
		require.Equal(t, made[2], made[0])
		require.Equal(t, made[2], made[1])
		// Lowest terms, by cross multiplication and the plain divisor.
		num, den := made[0].Num(), made[0].Den()
		require.Zero(t, new(big.Int).Mul(num, q).Cmp(new(big.Int).Mul(p, den)))
		require.Equal(t, "1", new(big.Int).GCD(nil, nil, new(big.Int).Abs(num), den).String())
	})
}

// BenchmarkReduce calibrates reduceBits: the size at which the two ways cost the same.
func BenchmarkReduce(b *testing.B) {
	tuned := reduceBits
	defer func() { reduceBits = tuned }()
	for _, bits := range []uint{30_000, 60_000, 90_000, 120_000, 160_000, 240_000, 1_000_000} {
		p := new(big.Int).Lsh(big.NewInt(1), bits)
		q := new(big.Int).Sqrt(new(big.Int).Lsh(big.NewInt(3), 2*bits-1))
		for name, threshold := range map[string]int{"fraction": 0, "divisor": math.MaxInt} {
			b.Run(fmt.Sprintf("bits=%d/%s", bits, name), func(b *testing.B) {
				reduceBits = threshold
				for b.Loop() {
					reduce(p, q)
				}
			})
		}
	}
}
