package contfrac_test

import (
	"testing"

	"github.com/stretchr/testify/require"

	"example.com/onecusp/contfrac"
)

func FuzzParseWord(f *testing.F) {
	for _, s := range []string{"", "RLLRR", "R L2 R2", "R18446744073709551616 L", "R0", "R 1", "L99999999999999999999999"} {
		f.Add(s)
	}
	f.Fuzz(func(t *testing.T, s string) {
		w, err := contfrac.ParseWord(s)
		var v contfrac.Word
		strict := v.UnmarshalText([]byte(s))
		if err != nil {
			require.Error(t, strict)
			return
		}
		again, err := contfrac.ParseWord(w.String())
		require.NoError(t, err)
		require.Equal(t, w, again)
		require.Equal(t, w.Compact() == s, strict == nil)
	})
}

func FuzzParseFraction(f *testing.F) {
	for _, s := range []string{"[]", "[1; 2, 3]", "[-5; 1]", "[0; 18446744073709551616]", "[1; 0]", "[1, 2]", "[-0]"} {
		f.Add(s)
	}
	f.Fuzz(func(t *testing.T, s string) {
		x, err := contfrac.ParseFraction(s)
		var y contfrac.Fraction
		strict := y.UnmarshalText([]byte(s))
		if err != nil {
			require.Error(t, strict)
			return
		}
		again, err := contfrac.ParseFraction(x.String())
		require.NoError(t, err)
		require.Equal(t, x, again)
		require.Equal(t, x.String() == s, strict == nil)
	})
}

func FuzzParseMinus(f *testing.F) {
	for _, s := range []string{"[[]]", "[[2; 2, 3]]", "[[-5; 2]]", "[[0; 18446744073709551616]]", "[[1; 1]]", "[1; 2]"} {
		f.Add(s)
	}
	f.Fuzz(func(t *testing.T, s string) {
		x, err := contfrac.ParseMinus(s)
		var y contfrac.Minus
		strict := y.UnmarshalText([]byte(s))
		if err != nil {
			require.Error(t, strict)
			return
		}
		again, err := contfrac.ParseMinus(x.String())
		require.NoError(t, err)
		require.Equal(t, x, again)
		require.Equal(t, x.String() == s, strict == nil)
	})
}

func FuzzMatrixText(f *testing.F) {
	for _, s := range []string{"[[1, 2], [3, 5]]", `[["1","2"],["3","5"]]`, "[[1, 0], [0, 1]]", "[[-1, 0], [00, 1]]", "null"} {
		f.Add(s)
	}
	f.Fuzz(func(t *testing.T, s string) {
		var m, n contfrac.Matrix
		if m.UnmarshalText([]byte(s)) == nil {
			require.Equal(t, s, m.String())
		}
		if n.UnmarshalJSON([]byte(s)) == nil {
			text, err := n.MarshalJSON()
			require.NoError(t, err)
			var again contfrac.Matrix
			require.NoError(t, again.UnmarshalJSON(text))
			require.True(t, n.Equal(again))
		}
	})
}

func FuzzTermsJSON(f *testing.F) {
	for _, s := range []string{"[]", `["1","2"]`, ` [ "-1" , "2" ]`, `["1","0"]`, "null", `["1",2]`} {
		f.Add(s)
	}
	f.Fuzz(func(t *testing.T, s string) {
		var x, again contfrac.Fraction
		if x.UnmarshalJSON([]byte(s)) == nil {
			text, err := x.MarshalJSON()
			require.NoError(t, err)
			require.NoError(t, again.UnmarshalJSON(text))
			require.Equal(t, x, again)
		}
		var m, n contfrac.Minus
		if m.UnmarshalJSON([]byte(s)) == nil {
			text, err := m.MarshalJSON()
			require.NoError(t, err)
			require.NoError(t, n.UnmarshalJSON(text))
			require.Equal(t, m, n)
		}
	})
}

func FuzzParsePeriodic(f *testing.F) {
	for _, s := range []string{"[(1)]", "[9; (1, 2, 3)]", "[0; 4, (1)]", "[-3; (2; 1)]", "[1; (18446744073709551616)]", "[()]", "[1, (2)]", "[1; (0)]"} {
		f.Add(s)
	}
	f.Fuzz(func(t *testing.T, s string) {
		x, err := contfrac.ParsePeriodic(s)
		var y contfrac.Periodic
		strict := y.UnmarshalText([]byte(s))
		if err != nil {
			require.Error(t, strict)
			return
		}
		again, err := contfrac.ParsePeriodic(x.String())
		require.NoError(t, err)
		require.Equal(t, x, again)
		require.Equal(t, x.String() == s, strict == nil)
		if len(s) < 1000 {
			back, err := x.Surd().Periodic()
			require.NoError(t, err)
			require.Equal(t, x, back)
		}
	})
}

func FuzzParseSurd(f *testing.F) {
	for _, s := range []string{"(1 + √5)/2", "(2 + √20)/4", "(-3 + √7)/-2", "√4", "√2/0", "√2"} {
		f.Add(s)
	}
	f.Fuzz(func(t *testing.T, s string) {
		x, err := contfrac.ParseSurd(s)
		var y contfrac.Surd
		strict := y.UnmarshalText([]byte(s))
		if err != nil {
			require.Error(t, strict)
			return
		}
		again, err := contfrac.ParseSurd(x.String())
		require.NoError(t, err)
		require.True(t, x.Equal(again))
		require.Equal(t, x.String() == s, strict == nil)
	})
}

func FuzzParseForm(f *testing.F) {
	for _, s := range []string{"(1, -1, -1)", "(5, 11, -5)", "(1, 2, 1)", "(1, 0, 1)", "(1,2,3)"} {
		f.Add(s)
	}
	f.Fuzz(func(t *testing.T, s string) {
		x, err := contfrac.ParseForm(s)
		var y contfrac.Form
		strict := y.UnmarshalText([]byte(s))
		require.Equal(t, err == nil, strict == nil)
		if err == nil {
			require.Equal(t, s, x.String())
			require.True(t, x.Equal(y))
		}
	})
}
