package contfrac

import (
	"fmt"
	"strings"
)

// parse reads terms in the text form.
func (r rule) parse(s string) (termBuilder, error) {
	var b termBuilder
	if err := checkText(r.name, len(s)); err != nil {
		return b, err
	}
	body, opened := strings.CutPrefix(strings.TrimSpace(s), r.open)
	body, closed := strings.CutSuffix(body, r.shut)
	if !opened || !closed {
		return b, fmt.Errorf("contfrac: %s %s: the form %s2; 3, 4%s is accepted: %w", r.name, quote(s), r.open, r.shut, ErrSyntax)
	}
	if strings.TrimSpace(body) == "" {
		return b, nil
	}
	separator := ";"
	for more := true; more; separator = "," {
		var item string
		item, body, more = strings.Cut(body, separator)
		t, err := decimal(strings.TrimSpace(item))
		if err == nil {
			err = r.add(&b, t)
		}
		if err != nil {
			return termBuilder{}, fmt.Errorf("contfrac: %s %s, term %d: %w", r.name, quote(s), b.n, err)
		}
	}
	return b, nil
}

// appendText appends terms in the text form.
func (r rule) appendText(buf []byte, neg bool, data string) []byte {
	buf = append(buf, r.open...)
	if neg {
		buf = append(buf, '-')
	}
	separator := "; "
	for i := 0; i < len(data); {
		end := packedEnd(data, i)
		if i > 0 {
			buf = append(buf, separator...)
			separator = ", "
		}
		buf = appendNumber(buf, data[i:end])
		i = end
	}
	return append(buf, r.shut...)
}

// shortened is appendText with long terms, and the middle of many, left out.
func (r rule) shortened(n int, neg bool, data string) string {
	s := elide(n, ", ", func(i int, packed string) string {
		t := packedBig(packed)
		if i == 0 && neg {
			t.Neg(t)
		}
		return Abbreviate(t)
	}, data)
	s = r.open + strings.Replace(s, ",", ";", 1) + r.shut
	if n > 2*elideKeep {
		s += fmt.Sprintf(" (%d terms)", n)
	}
	return s
}

// parseStrings reads terms as a JSON array of decimal strings.
func (r rule) parseStrings(text []byte) (termBuilder, error) {
	var b termBuilder
	if err := checkText(r.name+" in JSON", len(text)); err != nil {
		return b, err
	}
	s := jsonScanner{text: text}
	good := s.take('[')
	for good && !s.take(']') {
		if b.n > 0 && !s.take(',') {
			good = false
			break
		}
		t, err := s.integer()
		if err == nil {
			err = r.add(&b, t)
		}
		if err != nil {
			return termBuilder{}, fmt.Errorf("contfrac: %s in JSON, term %d: %w", r.name, b.n, err)
		}
	}
	if !good || !s.atEnd() {
		return termBuilder{}, fmt.Errorf("contfrac: %s in JSON %s: an array of decimal strings is accepted: %w", r.name, quote(string(text)), ErrSyntax)
	}
	return b, nil
}

// appendStrings appends terms as a JSON array of decimal strings.
func appendStrings(buf []byte, neg bool, data string) []byte {
	buf = append(buf, '[')
	for i := 0; i < len(data); {
		end := packedEnd(data, i)
		if i > 0 {
			buf = append(buf, ',')
		}
		buf = append(buf, '"')
		if i == 0 && neg {
			buf = append(buf, '-')
		}
		buf = append(appendNumber(buf, data[i:end]), '"')
		i = end
	}
	return append(buf, ']')
}

// sameText refuses a text that does not read as it would be written.
func sameText(what string, text []byte, written string) error {
	if string(text) != written {
		return fmt.Errorf("contfrac: %s %s is not as it would be written: %s is accepted: %w", what, quote(string(text)), quote(written), ErrSyntax)
	}
	return nil
}
