package contfrac_test

import (
	"encoding"
	"encoding/json"
	"fmt"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/contfrac"
)

func TestTextsOfSurdsFormsAndPeriodicFractionsComeBack(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		x := anySurd().Draw(t, "x")
		y, err := contfrac.ParseSurd(x.String())
		require.NoError(t, err)
		assert.True(t, x.Equal(y))
		f := quadratic().Draw(t, "f")
		g, err := contfrac.ParseForm(f.String())
		require.NoError(t, err)
		assert.True(t, f.Equal(g))
		p := periodic().Draw(t, "p")
		q, err := contfrac.ParsePeriodic(p.String())
		require.NoError(t, err)
		assert.Equal(t, p, q)
		type all struct {
			X contfrac.Surd
			F contfrac.Form
			P contfrac.Periodic
		}
		text, err := json.Marshal(all{x, f, p})
		require.NoError(t, err)
		var back all
		require.NoError(t, json.Unmarshal(text, &back))
		assert.True(t, x.Equal(back.X))
		assert.True(t, f.Equal(back.F))
		assert.Equal(t, p, back.P)
	})
}

func TestTextsOfPeriodicFractions(t *testing.T) {
	for given, want := range map[string]string{
		"[(1)]": "[(1)]", "[(2; 1)]": "[(2; 1)]", "[9; (1, 2, 3)]": "[9; (1, 2, 3)]", "[0; 4, (1)]": "[0; 4, (1)]",
		"[-3; 1, 4, (2, 1)]": "[-3; 1, 4, (2, 1)]", " [ 9 ;( 1,2 , 3 ) ] ": "[9; (1, 2, 3)]",
		"[1; (1)]": "[(1)]", "[(2; 1, 2, 1)]": "[(2; 1)]", "[5; 1, (2, 1)]": "[5; (1, 2)]", "[3; (1, 2, 3)]": "[(3; 1, 2)]",
		"[-1; (1)]": "[-1; (1)]", "[0; (7)]": "[0; (7)]",
	} {
		x, err := contfrac.ParsePeriodic(given)
		require.NoError(t, err, given)
		assert.Equal(t, want, x.String())
		var y contfrac.Periodic
		err = y.UnmarshalText([]byte(given))
		if given == want {
			require.NoError(t, err)
			assert.Equal(t, x, y)
		} else {
			assert.ErrorIs(t, err, contfrac.ErrSyntax)
			assert.Equal(t, contfrac.Periodic{}, y, "left alone")
		}
	}
}

func TestMalformedTextsAreRefused(t *testing.T) {
	digits := strings.Repeat("7", contfrac.MaxDigits+1)
	long := strings.Repeat(" ", contfrac.MaxText+1)
	for text, want := range map[string]error{
		"": contfrac.ErrSyntax, "[1; 2]": contfrac.ErrSyntax, "[1 (2)]": contfrac.ErrSyntax, "[1, (2)]": contfrac.ErrSyntax,
		"[1; 2; (3)]": contfrac.ErrSyntax, "[(1, 2)]": contfrac.ErrSyntax, "[1; (2; 3)]": contfrac.ErrSyntax, "[; (2)]": contfrac.ErrSyntax,
		"[1; (2)": contfrac.ErrSyntax, "[1; (2) 3]": contfrac.ErrSyntax, "[1; 2) (]": contfrac.ErrSyntax, "[1; (x)]": contfrac.ErrSyntax, "[()]": contfrac.ErrTerm,
		"[1; ()]": contfrac.ErrTerm, "[(0)]": contfrac.ErrTerm, "[1; (0)]": contfrac.ErrTerm, "[1; 0, (2)]": contfrac.ErrTerm,
		"[" + digits + "; (1)]": contfrac.ErrTooLarge, "[(" + digits + ")]": contfrac.ErrTooLarge, long: contfrac.ErrTooLarge,
	} {
		_, err := contfrac.ParsePeriodic(text)
		assert.ErrorIs(t, err, want, "%.50s", text)
		var x contfrac.Periodic
		assert.ErrorIs(t, x.UnmarshalText([]byte(text)), want)
	}
	for text, want := range map[string]error{
		"": contfrac.ErrSyntax, "√": contfrac.ErrSyntax, "√2/": contfrac.ErrSyntax, "1 + √2/3": contfrac.ErrSyntax, "2": contfrac.ErrSyntax, "(1 + √2)": contfrac.ErrSyntax, "(√2)/3/4": contfrac.ErrSyntax, "(1 + √5/2": contfrac.ErrSyntax, "(1 - √5)/2": contfrac.ErrSyntax, "(1 + √x)/2": contfrac.ErrSyntax,
		"(01 + √5)/2": contfrac.ErrSyntax, "(1 + √5)/-0": contfrac.ErrSyntax, "(1 + √5)/0": contfrac.ErrInfinite, "(1 + √4)/2": contfrac.ErrDiscriminant,
		"(1 + √-5)/2": contfrac.ErrDiscriminant, "(" + digits + " + √5)/2": contfrac.ErrTooLarge, long: contfrac.ErrTooLarge,
	} {
		_, err := contfrac.ParseSurd(text)
		assert.ErrorIs(t, err, want, "%.50s", text)
		var x contfrac.Surd
		assert.ErrorIs(t, x.UnmarshalText([]byte(text)), want)
	}
	var x contfrac.Surd
	assert.ErrorIs(t, x.UnmarshalText([]byte("(2 + √20)/4")), contfrac.ErrSyntax, "not in lowest terms")
	for short, full := range map[string]string{"√2": "(0 + √2)/1", "3 + √8": "(3 + √8)/1", "√5525/25": "(0 + √5525)/25", "√2/-1": "(0 + √2)/-1"} {
		y, err := contfrac.ParseSurd(full)
		require.NoError(t, err)
		assert.Equal(t, short, y.String())
		var z contfrac.Surd
		assert.NoError(t, z.UnmarshalText([]byte(short)))
		assert.True(t, z.Equal(y))
		assert.ErrorIs(t, z.UnmarshalText([]byte(full)), contfrac.ErrSyntax, "not the short form")
	}
	y, err := contfrac.ParseSurd("(2 + √20)/4")
	require.NoError(t, err)
	assert.True(t, x.Equal(y))
	for text, want := range map[string]error{
		"": contfrac.ErrSyntax, "(1, 2)": contfrac.ErrSyntax, "(1,3,1)": contfrac.ErrSyntax, "(1, 3, 1": contfrac.ErrSyntax, "(1, 3, 1, 2)": contfrac.ErrSyntax,
		"(1, 2, 1)": contfrac.ErrDiscriminant, "(1, " + digits + ", 1)": contfrac.ErrTooLarge, long: contfrac.ErrTooLarge,
	} {
		_, err := contfrac.ParseForm(text)
		assert.ErrorIs(t, err, want, "%.50s", text)
		var f contfrac.Form
		assert.ErrorIs(t, f.UnmarshalText([]byte(text)), want)
	}
}

func TestHugeSurdsFormsAndPeriodsAreShortened(t *testing.T) {
	n := pseudorandom(1000, 1)
	pre, err := contfrac.NewFraction(n, n)
	require.NoError(t, err)
	var terms []int64
	for i := range int64(100) {
		terms = append(terms, i+1)
	}
	period, err := contfrac.FractionOf(terms...)
	require.NoError(t, err)
	x, err := contfrac.NewPeriodic(pre, period)
	require.NoError(t, err)
	for _, v := range []encoding.TextMarshaler{x, x.Surd(), x.Surd().Form()} {
		text, err := v.MarshalText()
		require.NoError(t, err)
		assert.Equal(t, string(text), fmt.Sprintf("%s", v))
		assert.Equal(t, fmt.Sprintf("%q", text), fmt.Sprintf("%q", v))
		short := fmt.Sprintf("%v", v)
		assert.Less(t, len(short), 400)
		assert.Contains(t, short, "…")
		assert.Contains(t, fmt.Sprintf("%d", v), "%!d(contfrac.")
	}
	assert.Contains(t, fmt.Sprint(x), "(1, 2, 3, 4, 5, 6, …, 95, 96, 97, 98, 99, 100)]")
	assert.Equal(t, "[9; (1)]", fmt.Sprint(must(contfrac.ParsePeriodic("[9; (1)]"))))
}

func must[T any](v T, err error) T {
	if err != nil {
		panic(err)
	}
	return v
}
