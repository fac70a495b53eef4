package snake

import "math/big"

func cmpInt(a, b *big.Int) int { return a.Cmp(b) }

// leastRotation returns the lexicographically least rotation of a cyclic list.
//
// Two candidates are compared position by position; where they first differ,
// after k equal entries, the larger one and the k starts behind it are all
// beaten, so the total number of comparisons is linear.
func leastRotation(a []*big.Int) []*big.Int {
	n := len(a)
	i, j, k := 0, 1, 0
	for i < n && j < n && k < n {
		switch a[(i+k)%n].Cmp(a[(j+k)%n]) {
		case 0:
			k++
			continue
		case 1:
			i += k + 1
		default:
			j += k + 1
		}
		if i == j {
			j++
		}
		k = 0
	}
	start := min(i, j)
	return append(append([]*big.Int(nil), a[start:]...), a[:start]...)
}
