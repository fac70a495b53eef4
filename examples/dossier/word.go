package main

import (
	"context"
	"fmt"
	"math/big"
	"strings"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/farey"
)

const (
	maxLetters     = 400 // a word is written letter by letter up to this length
	maxConvergents = 16  // and a fraction's convergents up to this many terms
)

// wordSection is the word of the arc and its continued fraction.
func (e *entry) wordSection(context.Context) (section, error) {
	s := section{Title: "Word and continued fraction"}
	if e.Slope.IsBase() {
		s.Remark = "The arc crosses nothing and has no word; its fraction is [1]."
		return s, nil
	}
	word, ok := e.certificate.Word()
	fraction, okToo := e.certificate.Fraction()
	letters := new(big.Int).Sub(e.family.Tiles(e.Slope), big.NewInt(1))
	s.add("Letters", "%s", digits(letters))
	if !e.held || !ok || !okToo {
		s.Remark = "The word is too long to be listed."
		return s, nil
	}
	if letters.Cmp(big.NewInt(maxLetters)) <= 0 {
		plain, err := e.withMiddle(word)
		if err != nil {
			return s, err
		}
		s.add("Word", "%s", plain)
		switch {
		case letters.Sign() == 0:
			s.note("the empty word: one crossing, of an edge without weight")
		case strings.Contains(plain, "M"):
			s.note("R and L, without the free end letters; M is the middle, either letter throughout")
		default:
			s.note("R and L, without the free end letters; the middle edge has no weight, so no letter is free")
		}
	}
	s.add("By runs", "%s", fit(word.Compact(), word))
	s.add("Continued fraction", "%s", fit(fraction.String(), fraction))
	s.note("the runs of the word, taken with L in the middle and its first and last letter doubled; its numerator is N")
	if fraction.Len() <= maxConvergents {
		s.Table = &table{Caption: "Convergents", Head: []string{"Term", "Numerator", "Denominator"}, Marked: fraction.Len() - 1}
		terms := fraction.Terms()
		for p, q := range fraction.Convergents() {
			s.Table.Rows = append(s.Table.Rows, []string{digits(terms[len(s.Table.Rows)]), digits(p), digits(q)})
		}
	}
	return s, nil
}

// fit is the whole text of a value when that is short, else what %v makes of the value.
func fit(whole string, value any) string {
	if len(whole) <= maxLetters {
		return whole
	}
	return fmt.Sprintf("%v", value)
}

// withMiddle writes a short word with M for the letters of the middle crossing,
// which may be all L or all R. Before them stand, for each earlier crossing, its own letters
// and one turn.
func (e *entry) withMiddle(w contfrac.Word) (string, error) {
	crossings, err := e.Slope.Crossings()
	if err != nil {
		return "", err
	}
	var before, middle int64
	for c := range crossings {
		if c.Nearer == farey.Middle {
			middle = e.family.Weight(c.Class)
			break
		}
		before += e.family.Weight(c.Class) + 1
	}
	plain := w.String()
	return plain[:before] + strings.Repeat("M", int(middle)) + plain[before+middle:], nil
}
