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

// Fans is an answer of Sequence.Fans.
type Fans struct {
	// Verdict is Found or None for complete answers, Undecided for too few terms.
	Verdict Verdict
	// Matches lists the fans, short steps and small weights first. When undecided,
	// these are only fans with weights up to Options.Weight that have the terms one
	// after the other; others may be there.
	Matches []FanMatch
	// Reason says in words why the verdict is None or Undecided; it is empty when Found.
	Reason string
}

// FewTerms is the number of terms past which a sequence is decided: five
// terms determine the fans that contain them, or six when the second and the
// fourth are equal.
const FewTerms = 4

// Fans returns the fans, of all families with whatever weights, that have the
// terms in arithmetic progression: every d-th arc of the fan, in either direction, d ≥ 1.
// One of each class under symmetry is reported.
//
// From five terms on the answer is complete; see FewTerms. Why nothing is missed:
// every d-th term of a fan of trace t satisfies a_{j+1} + a_{j−1} = T·a_j − E_j
// with T = V_d(t) and E_j ≥ 0 of period two, so b_j = a_{j+2} − a_j satisfies
// b_{j+1} + b_{j−1} = T·b_j, which gives T. The d and t ≥ 3 with V_d(t) = T are
// finitely many. E determines the weights of the arcs times the centre's number N:
// uniquely for odd d, up to two cases for even d. By (E), y₀² + y₁² + N² +
// N·(c₀·y₁ + c₁·y₀) = t·y₀·y₁, which gives N, and t = K·N − k gives the centre's
// weight, unless N = 1. What comes out is a solution of (E) in positive integers,
// and each of those is a triple of the family at known slopes ("Generalization of
// Markov Diophantine equation via generalized cluster algebra", Electron. J.
// Combin. 30 (2023)).
//
// Terms below 1 are ErrNotPositive, three and more equal ones ErrConstant, and
// weights that pass int64 ErrTooLarge. Options count for undecided sequences
// only. Cost: O(log n) products of the size of the terms when they lie n arcs
// from the least of the fan, the descent of the triple there, and one product a
// term. When ctx ends, the error is its.
func (s Sequence) Fans(ctx context.Context, o Options) (Fans, error) {
	bound, err := o.weight()
	if err != nil {
		return Fans{}, err
	}
	if ctx == nil {
		ctx = context.Background()
	}
	if len(s.terms) == 0 {
		return Fans{}, fmt.Errorf("recognize: fans of a sequence without terms: %w", ErrEmpty)
	}
	for j, a := range s.terms {
		if a.Sign() <= 0 {
			return Fans{}, fmt.Errorf("recognize: fans with term %d equal to %s: the numbers of fans are integers ≥ 1: %w", j, contfrac.Abbreviate(a), ErrNotPositive)
		}
	}
	if s.constant() {
		return Fans{}, fmt.Errorf("recognize: fans with %d terms %s: a fan has no value more than twice: %w", len(s.terms), contfrac.Abbreviate(s.terms[0]), ErrConstant)
	}
	trace, reason := s.trace()
	if reason != "" {
		return Fans{Verdict: None, Reason: reason}, nil
	}
	var found []FanMatch
	var answer Fans
	if trace == nil {
		answer = Fans{Verdict: Undecided, Reason: fmt.Sprintf("%d terms do not determine a fan; five do, or six if the second and the fourth are equal", len(s.terms))}
		found, err = s.candidates(ctx, bound)
	} else {
		found, err = s.decided(ctx, trace)
		if len(found) > 0 {
			answer = Fans{Verdict: Found}
		} else {
			answer = Fans{Verdict: None, Reason: fmt.Sprintf("the terms satisfy a recurrence of trace %s, but no solution of (E) belongs to it", contfrac.Abbreviate(trace))}
		}
	}
	if err != nil {
		return Fans{}, fmt.Errorf("recognize: fans of %d terms: %w", len(s.terms), err)
	}
	slices.SortStableFunc(found, func(x, y FanMatch) int {
		return cmp.Or(cmp.Compare(max(x.Step, -x.Step), max(y.Step, -y.Step)), compareFamilies(x.Fan.Family(), y.Fan.Family()),
			x.Fan.Centre().Cmp(y.Fan.Centre()), x.Slope(0).Cmp(y.Slope(0)))
	})
	answer.Matches = found
	return answer, nil
}

// compareFamilies orders families by the sum of their weights, then the
// weights.
func compareFamilies(f, g orbifold.Family) int {
	order := f.K().Cmp(g.K())
	for c := farey.Zero; c <= farey.One && order == 0; c++ {
		order = cmp.Compare(f.Weight(c), g.Weight(c))
	}
	return order
}

// trace returns the T with b_{j+1} + b_{j−1} = T·b_j for the differences
// b_j = a_{j+2} − a_j, nil when the terms leave it open; or the reason for which
// no fan has the terms.
func (s Sequence) trace() (t *big.Int, reason string) {
	a := s.terms
	sum := new(big.Int)
	for j := 1; j+1 < len(a); j++ {
		if sum.Add(a[j-1], a[j+1]).Cmp(new(big.Int).Lsh(a[j], 1)) <= 0 {
			return nil, fmt.Sprintf("the terms are not strictly convex about term %d, as all fans are", j)
		}
	}
	if len(a) <= FewTerms {
		return nil, ""
	}
	b := make([]*big.Int, len(a)-2)
	for j := range b {
		b[j] = new(big.Int).Sub(a[j+2], a[j])
	}
	for j := 1; j+1 < len(b) && t == nil; j++ {
		if b[j].Sign() == 0 {
			continue // not twice in a row, by convexity
		}
		q, r := new(big.Int).QuoRem(sum.Add(b[j-1], b[j+1]), b[j], new(big.Int))
		if r.Sign() != 0 || q.Cmp(big.NewInt(3)) < 0 {
			return nil, fmt.Sprintf("the terms about term %d satisfy no recurrence of an integer trace ≥ 3", j+1)
		}
		t = q
	}
	if t == nil {
		if sum.Add(b[0], b[2]).Sign() != 0 { // five terms, the second equal to the fourth
			return nil, "the terms are not symmetric about their least, as the second and the fourth are"
		}
		return nil, ""
	}
	for j := 1; j+1 < len(b); j++ {
		if sum.Add(b[j-1], b[j+1]).Cmp(contfrac.Product(t, b[j])) != 0 {
			return nil, fmt.Sprintf("the recurrence of trace %s that other terms satisfy fails at term %d", contfrac.Abbreviate(t), j+3)
		}
	}
	return t, ""
}

// decided returns all fans with the terms, for a trace T that they satisfy.
func (s Sequence) decided(ctx context.Context, trace *big.Int) ([]FanMatch, error) {
	all, err := sections(ctx, trace)
	if err != nil {
		return nil, err
	}
	a := s.terms
	// E_j = T·a_j − a_{j+1} − a_{j−1} has period two.
	drift := func(j int) *big.Int {
		e := contfrac.Product(trace, a[j])
		return e.Sub(e, a[j+1]).Sub(e, a[j-1])
	}
	odd, even := drift(1), drift(2)
	var found []FanMatch
	for _, x := range all {
		weights, err := x.weights(even, odd)
		if err != nil {
			return nil, err
		}
		for _, w := range weights {
			y1, ok := x.next(a[0], a[1], w)
			if !ok {
				continue
			}
			m, ok, err := newMatch(ctx, x, w, a[0], y1)
			if err != nil {
				return nil, err
			}
			if ok && m.Rule.Check(a) == nil {
				found = append(found, m)
			}
		}
	}
	return found, nil
}
