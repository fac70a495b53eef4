package orbifold

import (
	"context"
	"fmt"
	"iter"
	"math/big"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/farey"
)

// MaxCrossings is the largest number of crossings of an arc whose corridor is
// walked from end to end by Word, Fraction, Snake, Eval and Certify.
const MaxCrossings = int64(1) << 28

// Word returns the word of the arc of slope s, without end letters: for each
// crossing its own letter as often as the weight of the crossed edge's class
// says (R when the crossing is nearer to the right end of the edge, L when
// nearer to the left; the middle crossing is taken as L), and between two
// crossings a turn letter (R when the end that the two edges share is on the
// right). The number at s is the numerator of the continued fraction of the
// run lengths, with one arbitrary letter before and one after.
//
// A letter repeated k times is one run, so weights of any size work. Cost:
// O(|p| + q) time, about two bytes a crossing. An arc that crosses nothing is
// ErrNoCrossing; more than MaxCrossings is ErrTooLarge.
func (f Family) Word(s farey.Slope) (contfrac.Word, error) {
	return f.WordContext(context.Background(), s)
}

// WordContext is Word that stops when ctx ends, with its error.
func (f Family) WordContext(ctx context.Context, s farey.Slope) (contfrac.Word, error) {
	ctx = contextOf(ctx)
	if s.IsBase() {
		return contfrac.Word{}, fmt.Errorf("orbifold: word of %v: slopes other than 0/1, 1/0 and 1/1 have one: %w", s, ErrNoCrossing)
	}
	crossings, err := corridor(ctx, s)
	if err != nil {
		return contfrac.Word{}, err
	}
	var b contfrac.WordBuilder
	for letter, n := range f.letters(crossings) {
		b.Append(letter, n)
	}
	if err := ctx.Err(); err != nil {
		return contfrac.Word{}, fmt.Errorf("orbifold: word of %v: %w", s, err)
	}
	return b.Word(), nil
}

// letters yields the word of a corridor, letter and repetition.
func (f Family) letters(crossings iter.Seq[farey.Crossing]) iter.Seq2[contfrac.Letter, uint64] {
	return func(yield func(contfrac.Letter, uint64) bool) {
		for x := range crossings {
			if k := f.weights[x.Class]; k > 0 && !yield(letterOf(x.Nearer), uint64(k)) {
				return
			}
			if x.Turn != farey.Middle && !yield(letterOf(x.Turn), 1) {
				return
			}
		}
	}
}

// letterOf returns R for the right side and L for the left and the middle.
func letterOf(s farey.Side) contfrac.Letter {
	if s == farey.Right {
		return contfrac.R
	}
	return contfrac.L
}

// corridor returns the crossings of an arc that has at most MaxCrossings. They
// break off when ctx ends, which the caller has to ask then.
func corridor(ctx context.Context, s farey.Slope) (iter.Seq[farey.Crossing], error) {
	total := new(big.Int)
	for _, n := range s.CrossingCounts() {
		total.Add(total, n)
	}
	if total.Cmp(big.NewInt(MaxCrossings)) > 0 {
		return nil, fmt.Errorf("orbifold: corridor of %v: %s crossings, at most %d are walked: %w", s, contfrac.Abbreviate(total), MaxCrossings, ErrTooLarge)
	}
	crossings, err := s.Crossings()
	if err != nil {
		return nil, err
	}
	return func(yield func(farey.Crossing) bool) {
		i := 0
		for x := range crossings {
			if i&8191 == 0 && ctx.Err() != nil {
				return
			}
			i++
			if !yield(x) {
				return
			}
		}
	}, nil
}

// Fraction returns the continued fraction of the word of s with its first and
// last letter doubled, [a₁; a₂, …] with a₁ and the last term at least 2 (the
// empty word, which the families without weight at the middle edge have at 1/2, 2/1 or
// −1/1, gives [2]); its numerator is the number at s. An arc that crosses
// nothing gives [1]. Cost and other errors as for Word.
func (f Family) Fraction(s farey.Slope) (contfrac.Fraction, error) {
	return f.FractionContext(context.Background(), s)
}

// FractionContext is Fraction that stops when ctx ends, with its error.
func (f Family) FractionContext(ctx context.Context, s farey.Slope) (contfrac.Fraction, error) {
	if s.IsBase() {
		return contfrac.FractionOf(1)
	}
	w, err := f.WordContext(ctx, s)
	if err != nil {
		return contfrac.Fraction{}, err
	}
	return fractionOf(w), nil
}

// fractionOf returns the fraction of a word with its end letters doubled.
func fractionOf(w contfrac.Word) contfrac.Fraction {
	first, _ := w.First()
	last, _ := w.Last()
	return w.WithEnds(first, last).Fraction()
}
