package main

import (
	"context"
	"errors"
	"fmt"
	"html/template"
	"math/big"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
)

// dossier is the whole file: a family and an entry for each slope.
type dossier struct {
	Note    string // says that the demonstration is invented; empty for a user's own slopes
	Family  orbifold.Family
	Facts   []fact // about the family
	Entries []*entry
}

// entry is the file on one slope. It is made section by section; the text and the page
// are two ways to show the same sections.
type entry struct {
	Slope    farey.Slope
	Headline string // the number, or how large it is
	Sections []section

	family      orbifold.Family
	certificate orbifold.Certificate
	held        bool // whether the number fits into a certificate; else there is none
}

// section is one heading with what is under it.
type section struct {
	Title    string
	Facts    []fact
	Table    *table
	Pictures []picture
	Remark   string
	Folded   string // long text, folded away on the page and left out of the text
}

// fact is a name with a value and perhaps a remark on it. Plain values are sentences, the
// others formulas and digits.
type fact struct {
	Name, Value, Note string
	Plain             bool
}

type table struct {
	Caption string
	Head    []string
	Rows    [][]string
	Marked  int // the row to point out; −1 for none
}

// picture is a drawing for the page, and the same with characters for the text.
type picture struct {
	Caption string
	Key     []keyItem
	SVG     template.HTML
	Least   int // pixels of width below which it is scrolled, not shrunk
	Text    string
}

// keyItem explains one mark of a picture.
type keyItem struct {
	Mark template.HTML
	Text string
}

// newDossier makes the file on the slopes s of the family f.
func newDossier(ctx context.Context, f orbifold.Family, slopes []farey.Slope) (*dossier, error) {
	d := &dossier{Family: f, Facts: familyFacts(f)}
	for _, s := range slopes {
		e, err := newEntry(ctx, f, s)
		if err != nil {
			return nil, err
		}
		d.Entries = append(d.Entries, e)
	}
	return d, nil
}

// newEntry lets Certify compute everything that a certificate states, which
// includes the four routes, and adds what is drawn and compared.
func newEntry(ctx context.Context, f orbifold.Family, s farey.Slope) (*entry, error) {
	e := &entry{Slope: s, family: f}
	c, err := f.CertifyContext(ctx, s)
	switch {
	case err == nil:
		e.certificate, e.held = c, true
	case !errors.Is(err, orbifold.ErrTooLarge): // routes that disagree, or an interrupt
		return nil, err
	}
	sections := []func(context.Context) (section, error){
		e.numberSection, e.sizeSection, e.triangleSection, e.symmetrySection, e.arcSection,
		e.wordSection, e.snakeSection, e.matrixSection, e.formSection, e.fanSection, e.neighbourSection,
	}
	for _, compile := range sections {
		part, err := compile(ctx)
		if err != nil {
			return nil, fmt.Errorf("slope %v: %w", s, err)
		}
		e.Sections = append(e.Sections, part)
	}
	return e, nil
}

// Class is the class of the slope, as a word.
func (e *entry) Class() farey.Class { return e.Slope.Class() }

// weight is the weight of the slope's class.
func (e *entry) weight() int64 { return e.family.Weight(e.Slope.Class()) }

// add appends a fact whose value is a formula or a number.
func (s *section) add(name, format string, a ...any) {
	s.Facts = append(s.Facts, fact{Name: name, Value: fmt.Sprintf(format, a...)})
}

// say appends a fact whose value is a sentence.
func (s *section) say(name, format string, a ...any) {
	s.Facts = append(s.Facts, fact{Name: name, Value: fmt.Sprintf(format, a...), Plain: true})
}

// note adds a remark to the last fact.
func (s *section) note(format string, a ...any) {
	s.Facts[len(s.Facts)-1].Note = fmt.Sprintf(format, a...)
}

// digits writes an integer whole when it is short, else its ends and its length; the
// whole is in the certificate.
func digits(n *big.Int) string { return contfrac.Abbreviate(n) }

// plural writes a count with its noun.
func plural(n *big.Int, one, many string) string {
	if n.IsInt64() && n.Int64() == 1 {
		return "1 " + one
	}
	return digits(n) + " " + many
}
