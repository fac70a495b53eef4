package recognize

import "fmt"

const (
	// DefaultWeight is the weight up to which families are searched unless told
	// otherwise.
	DefaultWeight = 3
	// MaxWeight bounds the weights of a search: there are some MaxWeight³/6
	// families up to the order of their weights.
	MaxWeight = 100
)

// Options bounds a search through families. The zero value works.
type Options struct {
	// Weight is the largest weight, 1 … MaxWeight; 0 stands for DefaultWeight.
	Weight int64
}

// weight returns the bound, or ErrOptions.
func (o Options) weight() (int64, error) {
	switch {
	case o.Weight == 0:
		return DefaultWeight, nil
	case o.Weight < 0 || o.Weight > MaxWeight:
		return 0, fmt.Errorf("recognize: weights up to %d: want 1 … %d: %w", o.Weight, MaxWeight, ErrOptions)
	}
	return o.Weight, nil
}
