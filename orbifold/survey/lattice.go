package survey

// triangle returns the number of vectors (m, n), m, n ≥ 1, with m·x + n·y ≤ z,
// for x, y ≥ 1. Cost: z/max(x, y) divisions.
func triangle(x, y, z int64) int64 {
	if x > y {
		x, y = y, x
	}
	count := int64(0)
	for z -= y; z >= x; z -= y {
		count += z / x
	}
	return count
}

// primitive returns how many of the vectors of triangle have coprime m and n, by
// Möbius inversion: Σ μ(d)·triangle(x, y, ⌊z/d⌋). mu has to reach z/(x+y). Cost:
// O(z/max(x, y)·log(z/(x+y))) divisions.
func primitive(x, y, z int64, mu []int8) int64 {
	count := int64(0)
	for d := int64(1); d <= z/(x+y); d++ {
		if m := mu[d]; m != 0 {
			count += int64(m) * triangle(x, y, z/d)
		}
	}
	return count
}

// moebius returns the Möbius function of 0 … n; of 0 it is 0.
func moebius(n int64) []int8 {
	mu := make([]int8, n+1)
	if n > 0 {
		mu[1] = 1
	}
	for i := int64(1); i <= n; i++ {
		if mu[i] == 0 {
			continue
		}
		for j := 2 * i; j <= n; j += i {
			mu[j] -= mu[i]
		}
	}
	return mu
}
