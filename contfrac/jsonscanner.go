package contfrac

import (
	"bytes"
	"fmt"
	"math/big"
)

// jsonScanner reads the small part of JSON that values are written in, and
// takes no memory for structure: arrays of strings that hold decimal integers.
type jsonScanner struct {
	text []byte
	at   int
}

// skip passes over white space.
func (s *jsonScanner) skip() {
	for s.at < len(s.text) && bytes.IndexByte([]byte(" \t\n\r"), s.text[s.at]) >= 0 {
		s.at++
	}
}

// take passes over the byte c, if it comes next.
func (s *jsonScanner) take(c byte) bool {
	s.skip()
	if s.at < len(s.text) && s.text[s.at] == c {
		s.at++
		return true
	}
	return false
}

// atEnd reports whether nothing is left.
func (s *jsonScanner) atEnd() bool {
	s.skip()
	return s.at == len(s.text)
}

// integer reads a string that holds an integer.
func (s *jsonScanner) integer() (*big.Int, error) {
	if s.take('"') {
		if n := bytes.IndexByte(s.text[s.at:], '"'); n >= 0 {
			item := s.text[s.at : s.at+n]
			s.at += n + 1
			return decimal(string(item))
		}
	}
	return nil, fmt.Errorf("%s: an integer between quotation marks is accepted: %w", quote(string(s.text[s.at:])), ErrSyntax)
}
