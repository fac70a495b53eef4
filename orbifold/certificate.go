package orbifold

import (
	"context"
	"fmt"
	"math/big"
	"strings"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/farey"
	"example.com/onecusp/snake"
)

// Limits of certificates.
const (
	// MaxCertificateBits bounds the number that a certificate is written for.
	MaxCertificateBits = int64(1) << 21
	// MaxExactRuns is the number of runs of a word up to which a certificate
	// lists it and has its continuant exact; MaxExactTiles the number of tiles of a
	// snake graph up to which its matchings are counted exactly. Past them the
	// two routes run modulo the three Primes.
	MaxExactRuns  = 1 << 18
	MaxExactTiles = 1 << 18
	// MaxCountedTiles is the number of tiles past which the matchings are not
	// counted at all; the certificate says so.
	MaxCountedTiles = 1 << 24
)

// The ways in which a route of a certificate was computed.
const (
	Exact        Method = "exact"
	ModuloPrimes Method = "modulo primes"
	NotRun       Method = "not run"
)

// Method says how a route of a certificate was computed.
type Method string

// Residue is a value modulo a prime.
type Residue struct{ Prime, Value uint64 }

// Count is what one of the two long routes of a certificate found: a value when
// Method is Exact, residues when it is ModuloPrimes, nothing when NotRun.
type Count struct {
	Method   Method
	value    *big.Int
	residues []Residue
}

// Value returns the exact value; false when there is none.
func (c Count) Value() (*big.Int, bool) {
	if c.value == nil {
		return nil, false
	}
	return new(big.Int).Set(c.value), true
}

// Residues returns the residues; none unless Method is ModuloPrimes.
func (c Count) Residues() []Residue { return append([]Residue(nil), c.residues...) }

// String returns the exact value, the residues as "5 modulo 61, …", or "not
// run".
func (c Count) String() string {
	if c.Method == Exact && c.value != nil {
		return c.value.String()
	}
	return c.brief()
}

// Format writes the value whole for %s and shortened for %v.
func (c Count) Format(s fmt.State, verb rune) {
	if verb == 'v' {
		fmt.Fprint(s, c.brief())
		return
	}
	fmt.Fprint(s, c.String())
}

func (c Count) brief() string {
	switch {
	case c.Method == Exact && c.value != nil:
		return contfrac.Abbreviate(c.value)
	case c.Method != ModuloPrimes || len(c.residues) == 0:
		return string(NotRun)
	}
	var parts []string
	for _, r := range c.residues {
		parts = append(parts, fmt.Sprintf("%d modulo %d", r.Value, r.Prime))
	}
	return strings.Join(parts, ", ")
}

// Agrees tells whether the route ran and found n, exactly or modulo each prime.
func (c Count) Agrees(n *big.Int) bool {
	switch {
	case n == nil:
		return false
	case c.Method == Exact && c.value != nil:
		return c.value.Cmp(n) == 0
	case c.Method != ModuloPrimes || len(c.residues) == 0:
		return false
	}
	for _, r := range c.residues {
		if r.Prime == 0 || (wordResidues{r.Prime}).From(n) != r.Value {
			return false
		}
	}
	return true
}

// Certificate states the number at a slope with what is needed to check it:
// the path from the base triangle and the last triangle on it, the word and
// its continuant, the count of matchings, the matrix.
//
// It is evidence for a reader who has exact integers and none of this
// library: replay (X) along the path; make the word again by integer cross
// products; take the continuant; test that N divides y² + k·y + 1. It says
// nothing about other slopes with the same number.
//
// Certify makes certificates and UnmarshalJSON reads them; the fields read are
// claims until Verify has returned nil. The zero value fails Verify.
type Certificate struct{ c *claims }

type claims struct {
	family     Family
	slope      farey.Slope
	number     *big.Int
	path       farey.Path
	vertices   [3]claim // the two older first, the newest last; for base slopes by class
	word       *contfrac.Word
	fraction   *contfrac.Fraction
	continuant Count
	tiles      *big.Int
	matchings  Count
	matrix     contfrac.Matrix
	root       *big.Int
	trace      *big.Int
}

// claim is a slope with its number.
type claim struct {
	slope  farey.Slope
	number *big.Int
}

// Certify computes the number at the slope s by the four routes (descent by
// (X), continuant of the word, matchings of the snake graph, matrix) and returns
// them as a certificate. Routes that disagree, which would be an error of this
// library, are ErrCertificate.
//
// A number of more than MaxCertificateBits bits, or past the limit of the
// family, is ErrTooLarge. Past MaxExactRuns runs or MaxExactTiles tiles the two
// long routes run modulo the three Primes, and the certificate says so.
func (f Family) Certify(s farey.Slope) (Certificate, error) {
	return f.CertifyContext(context.Background(), s)
}

// CertifyContext is Certify that stops between two routes when ctx ends, with
// its error.
func (f Family) CertifyContext(ctx context.Context, s farey.Slope) (Certificate, error) {
	ctx = contextOf(ctx)
	// One number has to fit; the three of a triangle and the four entries of a
	// matrix may together have more.
	if err := f.WithLimit(min(f.Limit(), MaxCertificateBits)).fits(ctx, s, 1); err != nil {
		return Certificate{}, err
	}
	f = f.WithLimit(4 * (MaxCertificateBits + 1))
	c := claims{family: f, slope: s, path: s.Path()}
	for _, route := range [...]func(context.Context, *claims) error{
		f.certifyDescent, f.certifyContinuant, f.certifyMatchings, f.certifyMatrix,
	} {
		if err := route(ctx, &c); err != nil {
			return Certificate{}, fmt.Errorf("orbifold: certificate for %v in family %v: %w", s, f, err)
		}
	}
	return Certificate{&c}, nil
}

func (f Family) certifyDescent(ctx context.Context, c *claims) (err error) {
	if c.number, err = f.NumberContext(ctx, c.slope); err != nil {
		return err
	}
	t := c.path.Triangle()
	triple, err := f.Triple(t)
	if err != nil {
		return err
	}
	order := classes
	if newest, ok := t.Newest(); ok {
		order = [3]farey.Class{(newest + 1) % 3, (newest + 2) % 3, newest}
	}
	for i, class := range order {
		c.vertices[i] = claim{t.Vertex(class), triple.At(class)}
	}
	c.trace = f.exact().trace(vertex[*big.Int]{c.number, c.slope.Class()})
	return ctx.Err()
}

func (f Family) certifyContinuant(ctx context.Context, c *claims) error {
	fraction, err := contfrac.FractionOf(1) // of an arc that crosses nothing
	var word *contfrac.Word
	if !c.slope.IsBase() {
		w, wordErr := f.WordContext(ctx, c.slope)
		fraction, err, word = fractionOf(w), wordErr, &w
	}
	if err != nil {
		return err
	}
	if fraction.Len() > MaxExactRuns {
		c.continuant, err = countModulo(func(p uint64) (uint64, error) {
			r, err := fraction.NumeratorMod(new(big.Int).SetUint64(p))
			if err != nil {
				return 0, err
			}
			return r.Uint64(), ctx.Err()
		})
	} else {
		c.word, c.fraction = word, &fraction
		c.continuant = Count{Method: Exact, value: fraction.Numerator()}
	}
	return c.agree(ctx, "continuant", c.continuant, err)
}

func (f Family) certifyMatchings(ctx context.Context, c *claims) error {
	c.tiles = f.Tiles(c.slope)
	if c.tiles.Cmp(big.NewInt(MaxCountedTiles)) > 0 {
		c.matchings.Method = NotRun
		return nil
	}
	g, err := f.SnakeContext(ctx, c.slope)
	if err != nil {
		return err
	}
	if g.Tiles() > MaxExactTiles {
		c.matchings, err = countModulo(func(p uint64) (uint64, error) {
			return aside(ctx, func() (uint64, error) {
				return snake.Weigh(snake.Semiring[uint64](wordResidues{p}), g, snake.Weights[uint64]{})
			})
		})
	} else {
		c.matchings = Count{Method: Exact, value: g.Count()}
	}
	return c.agree(ctx, "matchings", c.matchings, err)
}

func (f Family) certifyMatrix(ctx context.Context, c *claims) (err error) {
	if c.matrix, err = f.MatrixContext(ctx, c.slope); err != nil {
		return err
	}
	c.root = c.matrix.A()
	return c.agree(ctx, "matrix", Count{Method: Exact, value: c.matrix.B()}, nil)
}

// aside returns what work returns, or the error of ctx as soon as that ends;
// work, which cannot be interrupted, then runs to its end with nobody waiting.
func aside[T any](ctx context.Context, work func() (T, error)) (T, error) {
	type result struct {
		value T
		err   error
	}
	done := make(chan result, 1)
	go func() {
		value, err := work()
		done <- result{value, err}
	}()
	select {
	case r := <-done:
		return r.value, r.err
	case <-ctx.Done():
		var none T
		return none, ctx.Err()
	}
}

// countModulo counts modulo each of the primes.
func countModulo(count func(p uint64) (uint64, error)) (Count, error) {
	c := Count{Method: ModuloPrimes}
	for _, p := range Primes() {
		r, err := count(p)
		if err != nil {
			return Count{}, err
		}
		c.residues = append(c.residues, Residue{p, r})
	}
	return c, nil
}

// agree returns an error unless a route found the number of the descent.
func (c *claims) agree(ctx context.Context, route string, n Count, err error) error {
	if err != nil {
		return err
	}
	if err := ctx.Err(); err != nil {
		return err
	}
	if !n.Agrees(c.number) {
		return fmt.Errorf("%s and descent disagree about %s: %w", route, brief(c.number), ErrCertificate)
	}
	return nil
}

// claimed returns the claims; of the zero value, those of an empty certificate.
func (c Certificate) claimed() *claims {
	if c.c == nil {
		return &claims{number: new(big.Int), tiles: new(big.Int), root: new(big.Int), trace: new(big.Int)}
	}
	return c.c
}

// String says what is certified, "961 at 3/7 in family (2,0,1)"; MarshalJSON
// writes all of it. The zero value is "nothing".
func (c Certificate) String() string {
	if c.c == nil {
		return "nothing"
	}
	return fmt.Sprintf("%s at %s in family %s", c.c.number, c.c.slope, c.c.family)
}

// Format writes the text of String whole for %s and shortened for %v.
func (c Certificate) Format(s fmt.State, verb rune) {
	if verb == 'v' && c.c != nil {
		fmt.Fprintf(s, "%s at %v in family %s", contfrac.Abbreviate(c.c.number), c.c.slope, c.c.family)
		return
	}
	fmt.Fprint(s, c.String())
}

// Family returns the family.
func (c Certificate) Family() Family { return c.claimed().family.WithLimit(0) }

// Slope returns the slope, a lattice slope.
func (c Certificate) Slope() farey.Slope { return c.claimed().slope }

// Number returns the number claimed.
func (c Certificate) Number() *big.Int { return new(big.Int).Set(c.claimed().number) }

// Path returns the path from the base triangle.
func (c Certificate) Path() farey.Path { return c.claimed().path }

// Vertex returns slope i of the last triangle on the path and its number, for
// i = 0, 1, 2: the two older vertices, then the newest (for base slopes 0/1,
// 1/0, 1/1). Any other i gives 0/1 and 0.
func (c Certificate) Vertex(i int) (farey.Slope, *big.Int) {
	v := c.claimed().vertices
	if i < 0 || i >= len(v) || v[i].number == nil {
		return farey.Slope{}, new(big.Int)
	}
	return v[i].slope, new(big.Int).Set(v[i].number)
}

// Word returns the word of the arc; false for base slopes, which have none, and
// when it has more than MaxExactRuns runs.
func (c Certificate) Word() (contfrac.Word, bool) {
	if w := c.claimed().word; w != nil {
		return *w, true
	}
	return contfrac.Word{}, false
}

// Fraction returns the continued fraction of Family.Fraction; false when it has
// more than MaxExactRuns terms.
func (c Certificate) Fraction() (contfrac.Fraction, bool) {
	if f := c.claimed().fraction; f != nil {
		return *f, true
	}
	return contfrac.Fraction{}, false
}

// Continuant returns what the continuant of the word gave.
func (c Certificate) Continuant() Count { return c.claimed().continuant }

// Tiles returns the number of tiles of the snake graph.
func (c Certificate) Tiles() *big.Int { return new(big.Int).Set(c.claimed().tiles) }

// Matchings returns what counting the perfect matchings gave.
func (c Certificate) Matchings() Count { return c.claimed().matchings }

// Matrix returns the matrix of the slope.
func (c Certificate) Matrix() contfrac.Matrix { return c.claimed().matrix }

// Root returns y, the upper left entry of the matrix: N divides y² + k·y + 1.
func (c Certificate) Root() *big.Int { return new(big.Int).Set(c.claimed().root) }

// Trace returns t = K·N − k.
func (c Certificate) Trace() *big.Int { return new(big.Int).Set(c.claimed().trace) }

// Verify computes everything again from the weights and the slope alone, by
// Certify, and compares. The error, ErrCertificate, names the first field that
// is wrong as the JSON form has it. Nil means that each field is right.
func (c Certificate) Verify() error { return c.VerifyContext(context.Background()) }

// VerifyContext is Verify that stops when ctx ends, with its error.
func (c Certificate) VerifyContext(ctx context.Context) error {
	ctx = contextOf(ctx)
	if c.c == nil {
		return fmt.Errorf("orbifold: an empty certificate: %w", ErrCertificate)
	}
	want, err := c.c.family.CertifyContext(ctx, c.c.slope)
	if err != nil {
		return fmt.Errorf("orbifold: certificate cannot be checked: %w", err)
	}
	if name := firstDifference(c.c.wire(), want.c.wire()); name != "" {
		return fmt.Errorf("orbifold: certificate for %v in family %v: field %q is wrong: %w", c.c.slope, c.c.family, name, ErrCertificate)
	}
	return nil
}
