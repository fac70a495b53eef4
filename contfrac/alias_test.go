package contfrac_test

import (
	"bytes"
	"context"
	"fmt"
	"go/ast"
	"go/parser"
	"go/token"
	"go/types"
	"math/big"
	"os"
	"reflect"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"example.com/onecusp/contfrac"
)

// sharing lists the exported functions and methods whose signatures contain a
// *big.Int, a *big.Rat or a slice, or yield such things, by name; decoders are
// tested by their own laws.
func sharing(t *testing.T) map[string]bool {
	files, err := os.ReadDir(".")
	require.NoError(t, err)
	names := map[string]bool{}
	for _, f := range files {
		if !strings.HasSuffix(f.Name(), ".go") || strings.HasSuffix(f.Name(), "_test.go") {
			continue
		}
		file, err := parser.ParseFile(token.NewFileSet(), f.Name(), nil, 0)
		require.NoError(t, err)
		for _, d := range file.Decls {
			d, ok := d.(*ast.FuncDecl)
			if !ok || !d.Name.IsExported() {
				continue
			}
			name := d.Name.Name
			if d.Recv != nil {
				receiver := strings.TrimPrefix(types.ExprString(d.Recv.List[0].Type), "*")
				if !ast.IsExported(receiver) {
					continue
				}
				name = receiver + "." + name
			}
			signature := types.ExprString(d.Type)
			if strings.Contains(signature, "*big.") || strings.Contains(signature, "[]") || strings.Contains(signature, "...") {
				names[name] = true
			}
		}
	}
	return names
}

// contents lists the integers, rationals and bytes in a value.
func contents(v reflect.Value) (ns []*big.Int, texts [][]byte) {
	switch x := v.Interface().(type) {
	case *big.Int:
		return []*big.Int{x}, nil
	case *big.Rat:
		if x == nil {
			return nil, nil
		}
		return []*big.Int{x.Num(), x.Denom()}, nil
	case []*big.Int:
		return x, nil
	case *big.Float:
		n, _ := x.Int(nil)
		return []*big.Int{n}, nil
	case []byte:
		return nil, [][]byte{x}
	}
	if v.Kind() == reflect.Func {
		each := func(v reflect.Value) {
			n, b := contents(v)
			ns, texts = append(ns, n...), append(texts, b...)
		}
		if v.Type().CanSeq2() {
			for x, y := range v.Seq2() {
				each(x)
				each(y)
			}
		}
	}
	return ns, texts
}

// scribble overwrites the memory of everything in a value.
func scribble(v reflect.Value) {
	ns, texts := contents(v)
	for _, n := range ns {
		for i, w := range n.Bits() {
			n.Bits()[i] = ^w
		}
	}
	for _, b := range texts {
		for i := range b {
			b[i] ^= 0xff
		}
	}
}

// print writes a value with everything in it.
func print(v reflect.Value) string {
	if v.Kind() == reflect.Func {
		ns, texts := contents(v)
		return fmt.Sprint(ns, texts)
	}
	if e, ok := v.Interface().(error); ok && e != nil {
		return e.Error()
	}
	return fmt.Sprintf("%s", v.Interface())
}

// call calls f and hands back the results, written out.
func call(f reflect.Value, args []reflect.Value) (out []reflect.Value, text string) {
	out = f.Call(args)
	for _, v := range out {
		text += print(v) + "\n"
	}
	return out, text
}

func TestNothingIsSharedWithTheCaller(t *testing.T) {
	n := func(i int) *big.Int { return pseudorandom(100+i, uint64(i)) }
	f, err := contfrac.NewFraction(n(1), n(2), n(3), big.NewInt(1))
	require.NoError(t, err)
	m, err := contfrac.NewMinus(n(1), n(2), n(3))
	require.NoError(t, err)
	w, err := f.Word()
	require.NoError(t, err)
	x := contfrac.NewMatrix(n(1), n(2), n(3), n(4))
	terms := func() []any { return []any{n(4), n(5), n(6)} }
	cases := map[string]func() (f any, args []any){
		"Abbreviate":  func() (any, []any) { return contfrac.Abbreviate, []any{n(1)} },
		"Continuant":  func() (any, []any) { return contfrac.Continuant, []any{[]*big.Int{n(1)}} },
		"FromRat":     func() (any, []any) { return contfrac.FromRat, []any{new(big.Rat).SetFrac(n(1), n(2))} },
		"FromRatio":   func() (any, []any) { return contfrac.FromRatio, []any{n(1), n(2)} },
		"NewFraction": func() (any, []any) { return contfrac.NewFraction, terms() },
		"NewMinus":    func() (any, []any) { return contfrac.NewMinus, terms() },
		"NewMatrix":   func() (any, []any) { return contfrac.NewMatrix, append(terms(), n(7)) },
		"Product":     func() (any, []any) { return contfrac.Product, []any{n(1), n(2)} },
		"FractionOf":  func() (any, []any) { return contfrac.FractionOf, []any{int64(1), int64(2)} },
		"MinusOf":     func() (any, []any) { return contfrac.MinusOf, []any{int64(1), int64(2)} },
		"WordOf":      func() (any, []any) { return contfrac.WordOf, []any{contfrac.L, contfrac.R} },
		"WordBuilder.AppendBig": func() (any, []any) {
			return func(p *big.Int) contfrac.Word {
				var b contfrac.WordBuilder
				_ = b.AppendBig(contfrac.R, p)
				_ = b.AppendBig(contfrac.R, p)
				return b.Word()
			}, []any{n(1)}
		},
		"Word.UnmarshalText": func() (any, []any) {
			return func(b []byte) (w contfrac.Word, err error) { err = w.UnmarshalText(b); return }, []any{[]byte("R2 L12")}
		},
		"Fraction.UnmarshalText": func() (any, []any) {
			return func(b []byte) (f contfrac.Fraction, err error) { err = f.UnmarshalText(b); return }, []any{[]byte("[2; 12]")}
		},
		"Fraction.UnmarshalJSON": func() (any, []any) {
			return func(b []byte) (f contfrac.Fraction, err error) { err = f.UnmarshalJSON(b); return }, []any{[]byte(`["2","12"]`)}
		},
		"Minus.UnmarshalText": func() (any, []any) {
			return func(b []byte) (m contfrac.Minus, err error) { err = m.UnmarshalText(b); return }, []any{[]byte("[[2; 12]]")}
		},
		"Minus.UnmarshalJSON": func() (any, []any) {
			return func(b []byte) (m contfrac.Minus, err error) { err = m.UnmarshalJSON(b); return }, []any{[]byte(`["2","12"]`)}
		},
		"Matrix.UnmarshalText": func() (any, []any) {
			return func(b []byte) (x contfrac.Matrix, err error) { err = x.UnmarshalText(b); return }, []any{[]byte("[[1, 2], [3, 4]]")}
		},
		"NewSurd":     func() (any, []any) { return contfrac.NewSurd, terms() },
		"NewForm":     func() (any, []any) { return contfrac.NewForm, terms() },
		"Surd.CmpRat": func() (any, []any) { return contfrac.Surd{}.CmpRat, []any{new(big.Rat).SetFrac(n(1), n(2))} },
		"Surd.Enclosure": func() (any, []any) {
			return func() (lo, hi *big.Float, err error) { return contfrac.Surd{}.Enclosure(100) }, nil
		},
		"Form.MinimumContext": func() (any, []any) { return contfrac.Form{}.MinimumContext, []any{context.Background()} },
		"Surd.UnmarshalText": func() (any, []any) {
			return func(b []byte) (x contfrac.Surd, err error) { err = x.UnmarshalText(b); return }, []any{[]byte("√2")}
		},
		"Form.UnmarshalText": func() (any, []any) {
			return func(b []byte) (f contfrac.Form, err error) { err = f.UnmarshalText(b); return }, []any{[]byte("(1, 3, 1)")}
		},
		"Periodic.UnmarshalText": func() (any, []any) {
			return func(b []byte) (x contfrac.Periodic, err error) { err = x.UnmarshalText(b); return }, []any{[]byte("[1; (2)]")}
		},
		"Matrix.UnmarshalJSON": func() (any, []any) {
			return func(b []byte) (x contfrac.Matrix, err error) { err = x.UnmarshalJSON(b); return }, []any{[]byte(`[["1","2"],["3","4"]]`)}
		},
	}
	covered := map[string]bool{}
	check := func(name string, f reflect.Value, args []reflect.Value) {
		covered[name] = true
		given := ""
		for _, a := range args {
			given += print(a) + "\n"
		}
		out, want := call(f, args)
		after := ""
		for _, a := range args {
			after += print(a) + "\n"
		}
		assert.Equal(t, given, after, "%s modifies what it is given", name)
		for _, a := range args {
			scribble(a)
		}
		got := ""
		for _, v := range out {
			got += print(v) + "\n"
		}
		assert.Equal(t, want, got, "%s keeps what it is given", name)
	}
	for name, c := range cases {
		f, args := c()
		var values []reflect.Value
		for _, a := range args {
			values = append(values, reflect.ValueOf(a))
		}
		check(name, reflect.ValueOf(f), values)
	}
	// Every method that takes nothing, or integers, is tried on a value of its type.
	period, err := contfrac.NewPeriodic(f, f)
	require.NoError(t, err)
	for _, receiver := range []any{f, m, w, x, contfrac.R, period, period.Surd(), period.Surd().Form()} {
		v := reflect.ValueOf(receiver)
		for i := range v.NumMethod() {
			name := v.Type().Name() + "." + v.Type().Method(i).Name
			method := v.Method(i)
			var args []reflect.Value
			for j := range method.Type().NumIn() {
				if method.Type().In(j) == reflect.TypeFor[*big.Int]() {
					args = append(args, reflect.ValueOf(n(9+j)))
				}
			}
			if len(args) != method.Type().NumIn() || strings.HasSuffix(name, ".Letters") {
				continue
			}
			if name == "Periodic.All" || name == "Periodic.Convergents" { // they do not end
				covered[name] = true
				continue
			}
			before := fmt.Sprintf("%s", receiver)
			check(name, method, args)
			for j := range args {
				args[j] = reflect.ValueOf(n(9 + j))
			}
			out, want := call(method, args)
			for _, o := range out {
				scribble(o)
			}
			_, got := call(method, args)
			assert.Equal(t, want, got, "%s hands out what it holds", name)
			assert.Equal(t, before, fmt.Sprintf("%s", receiver), "%s changes its receiver", name)
		}
	}
	for name := range sharing(t) {
		assert.True(t, covered[name], "%s is not covered", name)
	}
}

func TestScribbleIsSeen(t *testing.T) {
	n := pseudorandom(100, 1)
	text := n.String()
	scribble(reflect.ValueOf([]*big.Int{n}))
	assert.NotEqual(t, text, n.String())
	b := []byte("x")
	scribble(reflect.ValueOf(b))
	assert.False(t, bytes.Equal(b, []byte("x")))
}
