package orbifold

import (
	"bytes"
	"encoding/json"
	"fmt"
	"io"
	"math/big"
	"reflect"
	"strconv"
	"strings"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/farey"
)

// What the JSON form of a certificate says of itself. CertificateVersion counts
// up when the form changes; a reader refuses versions that it does not know.
const (
	CertificateFormat  = "onecusp/number"
	CertificateVersion = 1
	latticeLabelling   = "lattice slope"
)

// MaxCertificateBytes bounds the JSON text that UnmarshalJSON reads.
const MaxCertificateBytes = 64 << 20

// wire is the JSON form, field by field in the order in which it is written
// and compared. Integers are decimal strings.
type wire struct {
	Format     string          `json:"format"`
	Version    int             `json:"version"`
	Weights    wireWeights     `json:"weights"`
	Labelling  string          `json:"labelling"`
	Slope      string          `json:"slope"`
	Number     string          `json:"number"`
	Path       string          `json:"path"`
	Triangle   [3]wireVertex   `json:"triangle"`
	Word       *string         `json:"word,omitempty"`
	Fraction   []string        `json:"fraction,omitempty"`
	Continuant wireCount       `json:"continuant"`
	Tiles      string          `json:"tiles"`
	Matchings  wireCount       `json:"matchings"`
	Matrix     contfrac.Matrix `json:"matrix"`
	Root       string          `json:"root"`
	Trace      string          `json:"trace"`
}

type wireWeights struct {
	Zero     string `json:"zero"`
	Infinity string `json:"infinity"`
	One      string `json:"one"`
}

type wireVertex struct {
	Slope  string `json:"slope"`
	Number string `json:"number"`
}

type wireCount struct {
	Method   Method        `json:"method"`
	Value    string        `json:"value,omitempty"`
	Residues []wireResidue `json:"residues,omitempty"`
}

type wireResidue struct {
	Prime   string `json:"prime"`
	Residue string `json:"residue"`
}

func (c *claims) wire() wire {
	k := func(class farey.Class) string { return strconv.FormatInt(c.family.weights[class], 10) }
	w := wire{
		Format: CertificateFormat, Version: CertificateVersion,
		Weights:   wireWeights{k(farey.Zero), k(farey.Infinity), k(farey.One)},
		Labelling: latticeLabelling,
		Slope:     c.slope.String(), Number: c.number.String(), Path: c.path.String(),
		Continuant: c.continuant.wire(), Tiles: c.tiles.String(), Matchings: c.matchings.wire(),
		Matrix: c.matrix, Root: c.root.String(), Trace: c.trace.String(),
	}
	for i, v := range c.vertices {
		w.Triangle[i] = wireVertex{v.slope.String(), v.number.String()}
	}
	if c.word != nil {
		text := c.word.Compact()
		w.Word = &text
	}
	if c.fraction != nil {
		for _, t := range c.fraction.All() {
			w.Fraction = append(w.Fraction, t.String())
		}
	}
	return w
}

func (c Count) wire() wireCount {
	w := wireCount{Method: c.Method}
	if c.value != nil {
		w.Value = c.value.String()
	}
	for _, r := range c.residues {
		w.Residues = append(w.Residues, wireResidue{strconv.FormatUint(r.Prime, 10), strconv.FormatUint(r.Value, 10)})
	}
	return w
}

// firstDifference returns the JSON name of the first field in which two wires
// differ, "" when there is none.
func firstDifference(a, b wire) string {
	x, y := reflect.ValueOf(a), reflect.ValueOf(b)
	for i := range x.NumField() {
		same := reflect.DeepEqual(x.Field(i).Interface(), y.Field(i).Interface())
		if m, ok := x.Field(i).Interface().(contfrac.Matrix); ok {
			same = m.Equal(y.Field(i).Interface().(contfrac.Matrix))
		}
		if !same {
			name, _, _ := strings.Cut(x.Type().Field(i).Tag.Get("json"), ",")
			return name
		}
	}
	return ""
}

// MarshalJSON writes the certificate: an object with the fields format,
// version, weights, labelling, slope, number, path, triangle, word, fraction,
// continuant, tiles, matchings, matrix, root and trace, in this order, integers
// as decimal strings. The word is in run form ("R L2 R2", without end letters),
// and the path as Path.String has it; base slopes have no word. The zero
// value is written as null.
func (c Certificate) MarshalJSON() ([]byte, error) {
	if c.c == nil {
		return []byte("null"), nil
	}
	return json.Marshal(c.c.wire())
}

// UnmarshalJSON reads what MarshalJSON writes, up to white space, and refuses
// everything else: unknown, missing, repeated or reordered fields, integers with
// leading zeros, unknown methods, other formats and versions, texts past
// MaxCertificateBytes. The error wraps ErrCertificate. Whether the claims are
// true is for Verify to say.
func (c *Certificate) UnmarshalJSON(text []byte) error {
	refuse := func(format string, args ...any) error {
		return fmt.Errorf("orbifold: certificate: %s: %w", fmt.Sprintf(format, args...), ErrCertificate)
	}
	if len(text) > MaxCertificateBytes {
		return refuse("%d bytes, at most %d are read", len(text), MaxCertificateBytes)
	}
	if string(bytes.TrimSpace(text)) == "null" {
		*c = Certificate{}
		return nil
	}
	var w wire
	d := json.NewDecoder(bytes.NewReader(text))
	d.DisallowUnknownFields()
	if err := d.Decode(&w); err != nil {
		return refuse("%v", err)
	}
	if _, err := d.Token(); err != io.EOF {
		return refuse("text after the object")
	}
	if w.Format != CertificateFormat || w.Version != CertificateVersion || w.Labelling != latticeLabelling {
		return refuse("format %q version %d labelling %q, want %q, %d, %q",
			clip(w.Format), w.Version, clip(w.Labelling), CertificateFormat, CertificateVersion, latticeLabelling)
	}
	r := wireReader{}
	claims := r.claims(w)
	if r.err != nil {
		return refuse("%v", r.err)
	}
	var compact bytes.Buffer
	again, err := json.Marshal(claims.wire())
	if err == nil {
		err = json.Compact(&compact, text)
	}
	if err != nil || !bytes.Equal(compact.Bytes(), again) {
		return refuse("not in the form that it is written in (order of fields, repeated fields, leading zeros, unreduced slopes)")
	}
	*c = Certificate{claims}
	return nil
}

// wireReader turns the texts of a wire into values and keeps the first error.
type wireReader struct{ err error }

func (r *wireReader) claims(w wire) *claims {
	c := &claims{
		family: Family{weights: [3]int64{
			farey.Zero:     r.weight("weights.zero", w.Weights.Zero),
			farey.Infinity: r.weight("weights.infinity", w.Weights.Infinity),
			farey.One:      r.weight("weights.one", w.Weights.One),
		}},
		number: r.integer("number", w.Number), tiles: r.integer("tiles", w.Tiles), root: r.integer("root", w.Root), trace: r.integer("trace", w.Trace),
		continuant: r.count("continuant", w.Continuant), matchings: r.count("matchings", w.Matchings),
		matrix: w.Matrix,
	}
	r.text("slope", c.slope.UnmarshalText, w.Slope)
	r.text("path", c.path.UnmarshalText, w.Path)
	for i, v := range w.Triangle {
		r.text("triangle", c.vertices[i].slope.UnmarshalText, v.Slope)
		c.vertices[i].number = r.integer("triangle", v.Number)
	}
	if w.Word != nil {
		c.word = new(contfrac.Word)
		r.text("word", c.word.UnmarshalText, *w.Word)
	}
	if w.Fraction != nil {
		terms := make([]*big.Int, len(w.Fraction))
		for i, t := range w.Fraction {
			terms[i] = r.integer("fraction", t)
		}
		f, err := contfrac.NewFraction(terms...)
		r.keep("fraction", err)
		c.fraction = &f
	}
	return c
}

func (r *wireReader) keep(field string, err error) {
	if r.err == nil && err != nil {
		r.err = fmt.Errorf("field %q: %w", field, err)
	}
}

func (r *wireReader) text(field string, unmarshal func([]byte) error, text string) {
	r.keep(field, unmarshal([]byte(text)))
}

func (r *wireReader) weight(field, text string) int64 {
	k, err := strconv.ParseInt(text, 10, 64)
	if err == nil && k < 0 {
		err = ErrWeight
	}
	r.keep(field, err)
	return k
}

// maxDigits bounds a decimal integer of a certificate: numbers, traces and
// entries of matrices of MaxCertificateBits bits, and weights, have fewer.
const maxDigits = 1 << 20

func (r *wireReader) integer(field, text string) *big.Int {
	if len(text) > maxDigits {
		r.keep(field, fmt.Errorf("%d digits, at most %d are read", len(text), maxDigits))
		return new(big.Int)
	}
	n, ok := new(big.Int).SetString(text, 10)
	if !ok {
		r.keep(field, fmt.Errorf("%q is not a decimal integer", clip(text)))
		return new(big.Int)
	}
	return n
}

func (r *wireReader) count(field string, w wireCount) Count {
	c := Count{Method: w.Method}
	switch w.Method {
	case Exact, ModuloPrimes, NotRun:
	default:
		r.keep(field, fmt.Errorf("method %q: want %q, %q or %q", clip(string(w.Method)), Exact, ModuloPrimes, NotRun))
	}
	if (w.Value != "") != (w.Method == Exact) || (len(w.Residues) > 0) != (w.Method == ModuloPrimes) {
		r.keep(field, fmt.Errorf("a value goes with %q, residues with %q", Exact, ModuloPrimes))
	}
	if w.Value != "" {
		c.value = r.integer(field, w.Value)
	}
	for _, x := range w.Residues {
		p, err := strconv.ParseUint(x.Prime, 10, 64)
		r.keep(field, err)
		v, err := strconv.ParseUint(x.Residue, 10, 64)
		r.keep(field, err)
		c.residues = append(c.residues, Residue{p, v})
	}
	return c
}
