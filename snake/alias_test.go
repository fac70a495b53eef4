package snake_test

import (
	"math/big"
	"reflect"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/snake"
)

// Every exported method that takes or returns a *big.Int or a slice is listed
// here with a check that spoils what came out, or went in, and looks whether
// anything noticed. Methods that return plain values from such arguments have
// nil.
func TestNothingIsAliased(t *testing.T) {
	g := snake.FromWord(mustWord("RLLR"))
	set, err := g.Set()
	require.NoError(t, err)
	band := bandBuilt("RRL")
	hasse, err := set.Hasse(100)
	require.NoError(t, err)
	fence, err := g.Fence()
	require.NoError(t, err)
	m, err := set.Maximal()
	require.NoError(t, err)
	seven := func() *big.Int { return big.NewInt(7) }
	mod, err := snake.NewModular(seven())
	require.NoError(t, err)
	p := snake.NewPolynomial(seven(), seven())
	l, err := snake.NewLaurent(seven(), 1, 2)
	require.NoError(t, err)
	relation, err := snake.Graft(g, g, contfrac.L)
	require.NoError(t, err)

	// twice calls a function two times and spoils the first result.
	twice := func(f func() *big.Int) func(*testing.T) {
		return func(t *testing.T) {
			first := f()
			want := first.String()
			first.SetInt64(-999)
			require.Equal(t, want, f().String())
		}
	}
	list := func(f func() any) func(*testing.T) {
		return func(t *testing.T) {
			first := reflect.ValueOf(f())
			want := reflect.MakeSlice(first.Type(), first.Len(), first.Len())
			reflect.Copy(want, first)
			for i := range first.Len() {
				first.Index(i).SetZero()
			}
			require.Equal(t, want.Interface(), f())
		}
	}
	must := func(v any, err error) any { require.NoError(t, err); return v }
	// inputs calls a function of two integers and looks whether they changed, or
	// the result shares memory with them.
	inputs := func(f func(a, b *big.Int) *big.Int) func(*testing.T) {
		return func(t *testing.T) {
			for _, x := range [][2]int64{{3, 5}, {0, 5}, {1, 5}, {5, 0}, {5, 1}} {
				a, b := big.NewInt(x[0]), big.NewInt(x[1])
				f(a, b).SetInt64(-999)
				require.Equal(t, x, [2]int64{a.Int64(), b.Int64()})
			}
		}
	}
	keeps := func(f func(*big.Int)) func(*testing.T) {
		return func(t *testing.T) {
			a := big.NewInt(5)
			f(a)
			require.Equal(t, int64(5), a.Int64())
		}
	}

	checks := map[string]func(*testing.T){
		"Graph.Count":             twice(g.Count),
		"Graph.EdgesOf":           list(func() any { return must(g.EdgesOf(m)) }),
		"Graph.Vertices":          list(func() any { return must(g.Vertices()) }),
		"Graph.Adjacency":         list(func() any { return must(g.Adjacency()) }),
		"Band.Count":              twice(band.Count),
		"Set.Count":               twice(set.Count),
		"Set.EdgesOf":             list(func() any { return must(set.EdgesOf(m)) }),
		"Set.Flips":               list(func() any { return must(set.Flips(m)) }),
		"Set.Rank":                twice(func() *big.Int { return must(set.Rank(m)).(*big.Int) }),
		"Set.Unrank":              keeps(func(a *big.Int) { _, err := set.Unrank(a); require.NoError(t, err) }),
		"Matching.FlippedTiles":   list(func() any { return m.FlippedTiles() }),
		"Matching.MarshalText":    list(func() any { return must(m.MarshalText()) }),
		"*Matching.UnmarshalText": nil,
		"Hasse.Nodes":             list(func() any { return hasse.Nodes() }),
		"Hasse.Arcs":              list(func() any { return hasse.Arcs() }),
		"Fence.Matching": func(t *testing.T) {
			ideal := m.FlippedTiles()
			n, err := fence.Matching(ideal...)
			require.NoError(t, err)
			clear(ideal)
			require.Equal(t, m, n)
		},
		"Relation.Sides":         twice(func() *big.Int { a, _ := relation.Sides(); return a }),
		"Integers.Zero":          twice(snake.Integers{}.Zero),
		"Integers.One":           twice(snake.Integers{}.One),
		"Integers.Add":           inputs(snake.Integers{}.Add),
		"Integers.Mul":           inputs(snake.Integers{}.Mul),
		"Modular.Zero":           twice(mod.Zero),
		"Modular.One":            twice(mod.One),
		"Modular.Add":            inputs(mod.Add),
		"Modular.Mul":            inputs(mod.Mul),
		"Modular.Modulus":        twice(mod.Modulus),
		"Polynomial.Coefficient": twice(func() *big.Int { return p.Coefficient(1) }),
		"Polynomial.Coefficients": func(t *testing.T) {
			for _, c := range p.Coefficients() {
				c.SetInt64(-999)
			}
			require.Equal(t, "7 + 7q", p.String())
		},
		"Polynomial.Eval":     keeps(func(a *big.Int) { p.Eval(a) }),
		"Laurent.Coefficient": twice(func() *big.Int { return l.Coefficient(1, 2) }),
		"Laurent.Text": func(t *testing.T) {
			names := []string{"a", "b"}
			l.Text(names...)
			require.Equal(t, []string{"a", "b"}, names)
		},
		"Laurent.Eval": func(t *testing.T) {
			x := []*big.Rat{big.NewRat(2, 3), big.NewRat(5, 7)}
			v, err := l.Eval(x...)
			require.NoError(t, err)
			v.SetInt64(0)
			require.Equal(t, "2/3 5/7", x[0].String()+" "+x[1].String())
		},
	}
	for _, v := range []any{g, band, set, m, &m, hasse, fence, relation, snake.Integers{}, mod, snake.Floats{}, snake.MaxPlus{}, snake.Booleans{},
		p, snake.Polynomials{}, l, snake.Laurents{}, snake.Tile{}, snake.Side{}, snake.Point{}, snake.Hexagon{}, &snake.Builder{}, &snake.TooManyError{}, snake.Overlap{}, snake.Arc{}, snake.Drawing{}} {
		typ := reflect.TypeOf(v)
		for i := range typ.NumMethod() {
			method := typ.Method(i)
			concerned := false
			for k := 1; k < method.Type.NumIn(); k++ {
				concerned = concerned || carries(method.Type.In(k))
			}
			for k := range method.Type.NumOut() {
				concerned = concerned || carries(method.Type.Out(k))
			}
			name := typ.Name() + "." + method.Name
			if typ.Kind() == reflect.Pointer {
				name = "*" + typ.Elem().Name() + "." + method.Name
				if _, ok := typ.Elem().MethodByName(method.Name); ok {
					continue
				}
			}
			check, ok := checks[name]
			assert.Equal(t, concerned, ok, name)
			if check != nil {
				t.Run(name, check)
			}
		}
	}

	// Constructors keep nothing of what they get.
	c := []*big.Int{seven(), seven()}
	q := snake.NewPolynomial(c...)
	c[0].SetInt64(1)
	assert.True(t, p.Equal(q))
	x, e := seven(), []int{1, 2}
	r, err := snake.NewLaurent(x, e...)
	require.NoError(t, err)
	x.SetInt64(1)
	e[0] = 9
	assert.True(t, l.Equal(r))
	modulus := seven()
	again, err := snake.NewModular(modulus)
	require.NoError(t, err)
	modulus.SetInt64(1)
	assert.Equal(t, seven(), again.Modulus())
	for exponents, c := range l.Terms() {
		exponents[0], _ = 9, c.SetInt64(9)
	}
	assert.True(t, l.Equal(r))
}

// carries reports whether a type is, or holds, a *big.Int, a *big.Rat or a slice.
func carries(t reflect.Type) bool {
	return t.Kind() == reflect.Slice || t == reflect.TypeFor[*big.Int]() || t == reflect.TypeFor[*big.Rat]()
}
