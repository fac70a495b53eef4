package recognize

import (
	"cmp"
	"context"
	"fmt"
	"math/big"
	"slices"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
)

// MaxNumbers bounds the integers of one call of Families.
const MaxNumbers = 64

// FamilyMatch is a family that carries some of the integers asked for, with
// the evidence.
type FamilyMatch struct {
	// Family has weights k₀ ≥ k∞ ≥ k₁. Families with the same weights in another order
	// have the same numbers: Family.Under leads to them.
	Family orbifold.Family
	// Slopes lists, for each integer in the order given, all slopes that carry it,
	// one of each symmetry class, increasing; none where the family has no such number.
	Slopes [][]farey.Slope
	// Carried is the number of integers with a slope.
	Carried int
	// Rarity tells, for each integer that is carried, how much that means: about
	// one in 10^Rarity integers of its size is carried by the family. It is an
	// estimate, from the exact count of the family's numbers up to 10¹² and the law that their
	// count grows like the square of the logarithm; 0 where not carried.
	Rarity []float64
	// Together tells that two or three different integers were asked for and are
	// carried by slopes that are neighbours of each other.
	Together bool
}

// Families returns the families with weights up to Options.Weight that carry at
// least one of the numbers, best first: those that carry more of them, then those
// where two or three numbers stand together, then small weights. Every answer
// is complete within the bound, since Family.Identify is.
//
// Large weights say little: every n ≥ 2 is carried at 1/2 by every family with
// k∞ = n − 2. Numbers below 1 are ErrNotPositive, an empty list is ErrEmpty, more
// than MaxNumbers are ErrTooLarge. Cost: one Identify for each number and each of
// the (w+1)(w+2)(w+3)/6 families up to the order of the weights. When ctx ends,
// the error is its.
func Families(ctx context.Context, numbers []*big.Int, o Options) ([]FamilyMatch, error) {
	bound, err := o.weight()
	if err != nil {
		return nil, err
	}
	if ctx == nil {
		ctx = context.Background()
	}
	if len(numbers) == 0 {
		return nil, fmt.Errorf("recognize: families for no numbers: want at least one: %w", ErrEmpty)
	}
	if len(numbers) > MaxNumbers {
		return nil, fmt.Errorf("recognize: families for %d numbers: at most %d are accepted: %w", len(numbers), MaxNumbers, ErrTooLarge)
	}
	for _, n := range numbers {
		if n == nil || n.Sign() <= 0 {
			return nil, fmt.Errorf("recognize: families for the number %s: %w", contfrac.Abbreviate(n), ErrNotPositive)
		}
	}
	var found []FamilyMatch
	for zero := range bound + 1 {
		for infinity := range zero + 1 {
			for one := range infinity + 1 {
				f, err := orbifold.New(zero, infinity, one)
				if err != nil {
					return nil, err
				}
				m, err := matchFamily(ctx, f, numbers)
				if err != nil {
					return nil, fmt.Errorf("recognize: families for %d numbers: %w", len(numbers), err)
				}
				if m.Carried > 0 {
					found = append(found, m)
				}
			}
		}
	}
	slices.SortStableFunc(found, func(x, y FamilyMatch) int {
		order := cmp.Compare(y.Carried, x.Carried)
		if order == 0 && x.Together != y.Together {
			if order = 1; x.Together {
				order = -1
			}
		}
		return cmp.Or(order, compareFamilies(x.Family, y.Family))
	})
	return found, nil
}

func matchFamily(ctx context.Context, f orbifold.Family, numbers []*big.Int) (FamilyMatch, error) {
	m := FamilyMatch{Family: f, Rarity: make([]float64, len(numbers))}
	for _, n := range numbers {
		slopes, err := f.Identify(ctx, n)
		if err != nil {
			return FamilyMatch{}, err
		}
		m.Slopes = append(m.Slopes, slopes)
		if len(slopes) > 0 {
			m.Carried++
		}
	}
	if m.Carried > 0 {
		c := density(f)
		for i, n := range numbers {
			if len(m.Slopes[i]) > 0 {
				m.Rarity[i] = rarity(c, n)
			}
		}
	}
	m.Together = m.Carried == len(numbers) && together(f, numbers, m.Slopes)
	return m, nil
}

// together tells whether two or three different numbers have slopes that are
// neighbours of each other, up to symmetry.
func together(f orbifold.Family, numbers []*big.Int, slopes [][]farey.Slope) bool {
	if len(numbers) < 2 || len(numbers) > 3 {
		return false
	}
	for i, n := range numbers {
		if slices.ContainsFunc(numbers[:i], func(m *big.Int) bool { return m.Cmp(n) == 0 }) {
			return false
		}
	}
	// A symmetry moves the first slope to its representative, so only the others range
	// over their orbits.
	var place func(chosen []farey.Slope) bool
	place = func(chosen []farey.Slope) bool {
		i := len(chosen)
		if i == len(numbers) {
			return true
		}
		for _, s := range slopes[i] {
			orbit := []farey.Slope{s}
			if i > 0 {
				orbit = f.Orbit(s)
			}
			for _, t := range orbit {
				if !slices.ContainsFunc(chosen, func(c farey.Slope) bool { return !farey.Neighbours(c, t) }) && place(append(chosen, t)) {
					return true
				}
			}
		}
		return false
	}
	return place(nil)
}
