package main

import (
	"context"
	"fmt"
	"io"
	"math/big"

	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
	"example.com/onecusp/orbifold/linear"
	"example.com/onecusp/orbifold/recognize"
)

// answer is all that is said, in the form of the JSON output. Integers are
// decimal strings.
type answer struct {
	Question string   `json:"question"` // number, triple or sequence
	Integers []string `json:"integers"`
	Found    bool     `json:"found"`

	SearchedTo int64       `json:"weights_searched_to,omitempty"`
	Families   []family    `json:"families,omitempty"`
	Weights    *weights    `json:"weights,omitempty"`
	Recurrence *recurrence `json:"recurrence,omitempty"`
	Fans       *fans       `json:"fans,omitempty"`
	further    []*big.Int  // terms of the first fan after the given ones
}

// family is a family that carries numbers, or has a triple.
type family struct {
	Weights  [3]int64   `json:"weights"` // k₀, k∞, k₁
	Equation string     `json:"equation"`
	Slopes   [][]string `json:"slopes"` // by integer
	Carried  int        `json:"carried"`
	Rarity   []float64  `json:"rarity,omitempty"` // by integer: about one in 10^rarity of its size is carried
	Together bool       `json:"together"`
}

// weights are the weights for which a triple solves (E): an integer or "any"
// for k₀, k∞ and k₁.
type weights struct {
	Zero     string `json:"zero"`
	Infinity string `json:"infinity"`
	One      string `json:"one"`
}

// recurrence is what is known of a recurrence.
type recurrence struct {
	Verdict            string   `json:"verdict"`
	Surplus            int      `json:"surplus,omitempty"`
	Rule               string   `json:"rule,omitempty"`
	Characteristic     string   `json:"characteristic,omitempty"`
	Factors            []string `json:"factors,omitempty"`
	GeneratingFunction string   `json:"generating_function,omitempty"`
}

type fans struct {
	Verdict string `json:"verdict"`
	Reason  string `json:"reason,omitempty"`
	Matches []fan  `json:"matches,omitempty"`
}

type fan struct {
	Weights    [3]int64   `json:"weights"`
	Equation   string     `json:"equation"`
	FreeWeight string     `json:"free_weight,omitempty"` // the class whose weight does not count
	Centre     string     `json:"centre"`
	Number     string     `json:"number_at_centre"`
	Trace      string     `json:"trace"`
	Step       int64      `json:"step"`
	Slopes     []string   `json:"slopes"`
	Proved     recurrence `json:"recurrence"`
	Law        string     `json:"law"`
	ClosedForm string     `json:"closed_form"`
	Ratio      string     `json:"ratio_of_neighbours"`
	Next       []string   `json:"next"`
	Checks     []string   `json:"checks"`
	Agrees     bool       `json:"agrees_with_the_terms_alone"`
}

// ask answers the question that the options or the number of integers pose.
func ask(ctx context.Context, s recognize.Sequence, o options) (answer, error) {
	a := answer{Question: o.as}
	if a.Question == "" {
		switch n := s.Len(); {
		case n < 3:
			a.Question = "number"
		case n == 3:
			a.Question = "triple"
		default:
			a.Question = "sequence"
		}
	}
	for _, n := range s.Terms() {
		a.Integers = append(a.Integers, n.String())
	}
	var err error
	switch a.Question {
	case "number":
		err = a.askNumbers(ctx, s, o)
	case "triple":
		err = a.askTriple(ctx, s, o)
	default:
		err = a.askSequence(ctx, s, o)
	}
	return a, err
}

func weightsOf(f orbifold.Family) [3]int64 {
	return [3]int64{f.Weight(farey.Zero), f.Weight(farey.Infinity), f.Weight(farey.One)}
}

// askNumbers finds the families that carry the numbers.
func (a *answer) askNumbers(ctx context.Context, s recognize.Sequence, o options) error {
	found, err := recognize.Families(ctx, s.Terms(), recognize.Options{Weight: o.weight})
	if err != nil {
		return err
	}
	a.SearchedTo = o.weight
	for _, m := range found {
		x := family{Weights: weightsOf(m.Family), Equation: m.Family.Equation(), Carried: m.Carried, Rarity: m.Rarity, Together: m.Together}
		for _, list := range m.Slopes {
			texts := []string{}
			for _, slope := range list {
				texts = append(texts, slope.String())
			}
			x.Slopes = append(x.Slopes, texts)
		}
		a.Families = append(a.Families, x)
		a.Found = a.Found || m.Carried == s.Len()
	}
	return nil
}

// askTriple finds the weights for which three numbers solve (E), and the
// slopes in the families with the least free weights.
func (a *answer) askTriple(ctx context.Context, s recognize.Sequence, o options) error {
	if s.Len() != 3 {
		return fmt.Errorf("a triple of %d integers: want three, at the classes of 0/1, 1/0 and 1/1; %w", s.Len(), errUsage)
	}
	set, err := recognize.Weights(s.Term(0), s.Term(1), s.Term(2))
	if err != nil || set.IsEmpty() {
		return err
	}
	a.Found = true
	text := func(c farey.Class) string {
		if set.IsFree(c) {
			return "any"
		}
		return set.Weight(c).String()
	}
	a.Weights = &weights{text(farey.Zero), text(farey.Infinity), text(farey.One)}
	for f := range set.Families(o.weight) {
		if len(a.Families) == 5 {
			break
		}
		triple, err := f.NewTriple(s.Term(0), s.Term(1), s.Term(2))
		if err != nil {
			return err
		}
		path, err := triple.PathContext(ctx)
		if err != nil {
			return err
		}
		x := family{Weights: weightsOf(f), Equation: f.Equation(), Carried: 3, Together: true}
		for c := farey.Zero; c <= farey.One; c++ {
			x.Slopes = append(x.Slopes, []string{path.Triangle().Vertex(c).String()})
		}
		a.Families = append(a.Families, x)
	}
	return nil
}

// askSequence finds the recurrence of the terms and the fans with them.
func (a *answer) askSequence(ctx context.Context, s recognize.Sequence, o options) error {
	found, err := s.Fans(ctx, recognize.Options{Weight: o.weight})
	if err != nil {
		return err
	}
	guess, err := s.Recurrence(ctx)
	if err != nil {
		return err
	}
	r := describe(guess.Rule, guess.Verdict)
	r.Surplus = guess.Surplus
	a.Recurrence = &r
	a.Found = found.Verdict == recognize.Found
	a.Fans = &fans{Verdict: found.Verdict.String(), Reason: found.Reason}
	for _, m := range found.Matches {
		if len(a.Fans.Matches) == 20 {
			a.Fans.Reason += "; only the first 20 of " + fmt.Sprint(len(found.Matches)) + " are shown"
			break
		}
		x, next, err := describeFan(ctx, m, s, guess, o.more)
		if err != nil {
			return err
		}
		if len(a.Fans.Matches) == 0 && a.Found {
			a.further = next
		}
		a.Fans.Matches = append(a.Fans.Matches, x)
	}
	return nil
}

// describe writes down a recurrence.
func describe(r linear.Recurrence, verdict recognize.Verdict) recurrence {
	d := recurrence{Verdict: verdict.String()}
	if verdict != recognize.Found {
		return d
	}
	d.Rule = r.String()
	d.Characteristic = r.Characteristic().String()
	for _, f := range r.Characteristic().Factors() {
		text := "(" + f.Polynomial.String() + ")"
		if f.Multiplicity > 1 {
			text += fmt.Sprintf("^%d", f.Multiplicity)
		}
		d.Factors = append(d.Factors, text)
	}
	d.GeneratingFunction = r.GeneratingFunction().String()
	return d
}

// describeFan writes down a fan with its evidence, and returns the terms after
// the given ones.
func describeFan(ctx context.Context, m recognize.FanMatch, s recognize.Sequence, guess recognize.Recurrence, more int) (fan, []*big.Int, error) {
	f := m.Fan.Family()
	x := fan{Weights: weightsOf(f), Equation: f.Equation(), Centre: m.Fan.Centre().String(), Step: m.Step, Proved: describe(m.Rule, recognize.Found)}
	if m.FreeWeight {
		x.FreeWeight = m.Fan.Centre().Class().String()
	}
	number, err := f.NumberContext(ctx, m.Fan.Centre())
	if err != nil {
		return x, nil, err
	}
	trace, err := m.Fan.Trace()
	if err != nil {
		return x, nil, err
	}
	x.Number, x.Trace = number.String(), trace.String()
	for j := range s.Len() {
		x.Slopes = append(x.Slopes, m.Slope(int64(j)).String())
	}
	var next []*big.Int
	for j := range more {
		y, err := m.Fan.TermContext(ctx, new(big.Int).Mul(big.NewInt(m.Step), big.NewInt(int64(s.Len()+j))))
		if err != nil {
			return x, nil, err
		}
		next = append(next, y)
		x.Next = append(x.Next, y.String())
	}
	even, odd := m.Fan.Weights()
	x.Law = fmt.Sprintf("by the exchange rule y(n+1) = t·y(n) − c(n)·N − y(n−1) for neighbouring arcs, with N = %s, t = K·N − k = %s and c(n) = %d, %d in turn", x.Number, x.Trace, even, odd)
	if m.Step*m.Step != 1 {
		x.Law += fmt.Sprintf("; the terms lie %d arcs apart", max(m.Step, -m.Step))
	}
	form, err := m.Fan.ClosedForm()
	if err != nil {
		return x, nil, err
	}
	ratio, err := m.Fan.Ratio()
	if err != nil {
		return x, nil, err
	}
	lo, _, err := ratio.Enclosure(80) // the ends agree in more digits than are shown
	if err != nil {
		return x, nil, err
	}
	x.ClosedForm = form.String()
	x.Ratio = fmt.Sprintf("λ = %s, about %.15g", ratio, lo)
	x.Agrees = guess.Verdict == recognize.Found && guess.Rule.Characteristic().Equal(m.Rule.Characteristic())
	x.Checks, err = check(ctx, m, s, next)
	return x, next, err
}

// check proves what is said of a fan again, in ways that are independent of how it
// was found, and lists what was checked.
func check(ctx context.Context, m recognize.FanMatch, s recognize.Sequence, next []*big.Int) ([]string, error) {
	var done []string
	if err := m.Check(ctx, s); err != nil {
		return nil, err
	}
	done = append(done, fmt.Sprintf("each of the %d terms is the number at its slope, computed there again", s.Len()))
	if err := m.Rule.Check(append(s.Terms(), next...)); err != nil {
		return nil, err
	}
	done = append(done, fmt.Sprintf("the recurrence gives these and the next %d, exactly", len(next)))
	// The closed form is a third way, in a quadratic field.
	form, err := m.Fan.ClosedForm()
	if err != nil {
		return nil, err
	}
	for j := range s.Len() {
		y, err := form.Term(int64(j) * m.Step)
		if err != nil {
			return nil, err
		}
		if y.Cmp(s.Term(j)) != 0 {
			return nil, fmt.Errorf("the closed form gives %v for term %d", y, j)
		}
	}
	done = append(done, "the closed form gives the terms, in exact arithmetic")
	f := m.Fan.Family()
	for _, x := range [...]struct {
		what  string
		slope farey.Slope
	}{{"the centre", m.Fan.Centre()}, {"the first term", m.Fan.Slope(nil)}, {"the arc after it", m.Fan.Slope(big.NewInt(1))}} {
		if _, bits, err := f.Bits(x.slope); err != nil || bits.Cmp(big.NewInt(1<<14)) > 0 {
			continue // a certificate of a long number would take long
		}
		c, err := f.CertifyContext(ctx, x.slope)
		if err != nil {
			return nil, err
		}
		if err := c.VerifyContext(ctx); err != nil {
			return nil, err
		}
		done = append(done, fmt.Sprintf("%s: four routes to the number at %v agree", x.what, x.slope))
	}
	return done, nil
}

// writeLines writes the sequence, and the further terms of its first fan, as
// lines of an index and a value.
func writeLines(w io.Writer, a answer, s recognize.Sequence, first int64) error {
	all, err := recognize.NewSequence(append(s.Terms(), a.further...)...)
	if err != nil {
		return err
	}
	return all.WriteIndexed(w, first)
}
