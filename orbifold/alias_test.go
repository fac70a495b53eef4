package orbifold_test

import (
	"context"
	"math/big"
	"reflect"
	"sync"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
)

// aliasArguments gives every parameter type of a method that takes or returns
// big integers or slices a value to be called with.
func aliasArguments(f orbifold.Family) map[reflect.Type]func() any {
	return map[reflect.Type]func() any{
		reflect.TypeFor[farey.Slope]():     func() any { return farey.MustParse("5/13") },
		reflect.TypeFor[farey.Class]():     func() any { return farey.One },
		reflect.TypeFor[farey.Triangle]():  func() any { return farey.MustParse("5/13").Path().Triangle() },
		reflect.TypeFor[*big.Int]():        func() any { return big.NewInt(169) },
		reflect.TypeFor[context.Context](): func() any { return context.Background() },
		reflect.TypeFor[uint]():            func() any { return uint(64) },
		reflect.TypeFor[int]():             func() any { return 2 },
		reflect.TypeFor[int64]():           func() any { return int64(100) },
		reflect.TypeFor[orbifold.Triple](): func() any {
			tr, _ := f.Triple(farey.MustParse("2/5").Path().Triangle())
			return tr
		},
		reflect.TypeFor[farey.Symmetry](): func() any { return farey.Symmetries()[1] },
	}
}

// shared tells whether a method's signature has something that could be shared.
func shared(m reflect.Type) bool {
	touches := func(t reflect.Type) bool {
		return t == reflect.TypeFor[*big.Int]() || t == reflect.TypeFor[*big.Float]() || t.Kind() == reflect.Slice
	}
	for i := range m.NumOut() {
		if touches(m.Out(i)) {
			return true
		}
	}
	for i := range m.NumIn() {
		if touches(m.In(i)) {
			return true
		}
	}
	return false
}

// spoil overwrites everything that a caller can write in a result.
func spoil(v reflect.Value) {
	switch x := v.Interface().(type) {
	case *big.Int:
		if x != nil {
			for i := range x.Bits() {
				x.Bits()[i] = 0xdead
			}
			x.SetInt64(-99)
		}
	case *big.Float:
		if x != nil {
			x.SetInt64(-99)
		}
	default:
		if v.Kind() == reflect.Slice {
			for i := range v.Len() {
				v.Index(i).SetZero()
			}
		}
	}
}

// TestResultsAreFreshAndArgumentsKept calls every exported method that takes or
// returns big integers or slices twice, spoiling the results and arguments of
// the first call in between. A method without arguments known here fails.
func TestResultsAreFreshAndArgumentsKept(t *testing.T) {
	f := orbifold.MustNew(2, 0, 1)
	arguments := aliasArguments(f)
	certificate := must(f.Certify(farey.MustParse("5/13")))(t)
	var node orbifold.Node
	for n := range f.Tree(3) {
		node = n
	}
	receivers := []any{
		f, must(f.Triple(farey.MustParse("5/13").Path().Triangle()))(t), orbifold.Triple{}, node, orbifold.Node{},
		certificate, certificate.Continuant(),
		must(f.Certify(farey.MustParse("1/150000")))(t).Continuant(),
	}
	// Pure functions of texts, and solutions only.
	skip := map[string]bool{"Family.NewTriple": true, "Family.Solves": true}
	called := 0
	for _, receiver := range receivers {
		v := reflect.ValueOf(receiver)
		for i := range v.NumMethod() {
			name := v.Type().Name() + "." + v.Type().Method(i).Name
			m := v.Method(i)
			if !shared(m.Type()) || skip[name] {
				continue
			}
			call := func() (in, out []reflect.Value) {
				for j := range m.Type().NumIn() {
					make, ok := arguments[m.Type().In(j)]
					require.True(t, ok, "%s: no argument of type %v", name, m.Type().In(j))
					in = append(in, reflect.ValueOf(make()))
				}
				return in, m.Call(in)
			}
			_, first := call()
			var want []any
			for _, x := range first {
				want = append(want, copyOf(x))
			}
			for _, x := range first {
				spoil(x)
			}
			in, second := call()
			for j, x := range in {
				if n, ok := x.Interface().(*big.Int); ok {
					assert.Equal(t, "169", n.String(), "%s changes argument %d", name, j)
					spoil(x)
				}
			}
			for j, x := range second {
				assert.Equal(t, want[j], copyOf(x), "%s: result %d was shared", name, j)
			}
			called++
		}
	}
	assert.Greater(t, called, 25)
}

// copyOf returns a comparable deep copy.
func copyOf(v reflect.Value) any {
	switch x := v.Interface().(type) {
	case *big.Int:
		if x != nil {
			return x.String()
		}
	case *big.Float:
		if x != nil {
			return x.Text('p', 0)
		}
	case []byte:
		return string(x)
	case []farey.Slope:
		var texts []string
		for _, s := range x {
			texts = append(texts, s.String())
		}
		return texts
	default:
		if v.Kind() == reflect.Slice {
			c := reflect.MakeSlice(v.Type(), v.Len(), v.Len())
			reflect.Copy(c, v)
			return c.Interface()
		}
	}
	return nil
}

func TestNewTripleKeepsItsArguments(t *testing.T) {
	x, y, z := big.NewInt(5), big.NewInt(1), big.NewInt(2)
	tr := must(orbifold.Family{}.NewTriple(x, y, z))(t)
	x.SetInt64(0)
	y.SetInt64(0)
	assert.Equal(t, "(5, 1, 2)", tr.String())
}

func TestSharedFamiliesAreSafe(t *testing.T) {
	f := orbifold.MustNew(2, 0, 1)
	s := farey.MustParse("-34/55")
	ascending := f.Ascending()
	want := must(f.Certify(s))(t)
	var wg sync.WaitGroup
	for range 8 {
		wg.Go(func() {
			assert.NoError(t, want.Verify())
			assertEqualInt(t, want.Number(), must(f.Number(s))(t))
			i := 0
			for n := range ascending {
				_ = n.Triple()
				if i++; i == 200 {
					break
				}
			}
		})
	}
	wg.Wait()
}
