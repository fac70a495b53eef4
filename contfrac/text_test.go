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

func TestFractionTextRoundTrips(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f := fraction().Draw(t, "fraction")
		text, err := f.MarshalText()
		require.NoError(t, err)
		var g contfrac.Fraction
		require.NoError(t, g.UnmarshalText(text))
		require.Equal(t, f, g)
		text, err = json.Marshal(f)
		require.NoError(t, err)
		g = contfrac.Fraction{}
		require.NoError(t, json.Unmarshal(text, &g))
		require.Equal(t, f, g)
	})
}

func TestMinusTextRoundTrips(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		m, err := fewTwos().Draw(t, "fraction").Minus()
		require.NoError(t, err)
		text, err := m.MarshalText()
		require.NoError(t, err)
		var n contfrac.Minus
		require.NoError(t, n.UnmarshalText(text))
		require.Equal(t, m, n)
		text, err = json.Marshal(m)
		require.NoError(t, err)
		n = contfrac.Minus{}
		require.NoError(t, json.Unmarshal(text, &n))
		require.Equal(t, m, n)
	})
}

func TestEncodedFormsAreFixed(t *testing.T) {
	f, err := contfrac.FractionOf(-3, 1, 2)
	require.NoError(t, err)
	m, err := contfrac.MinusOf(-3, 2, 5)
	require.NoError(t, err)
	w := contfrac.WordOf(contfrac.R, contfrac.L, contfrac.L)
	text, err := json.Marshal(map[string]any{"f": f, "m": m, "w": w, "empty": contfrac.Fraction{}})
	require.NoError(t, err)
	assert.Equal(t, `{"empty":[],"f":["-3","1","2"],"m":["-3","2","5"],"w":"R L2"}`, string(text))
	text, err = m.MarshalText()
	require.NoError(t, err)
	assert.Equal(t, "[[-3; 2, 5]]", string(text))
	text, err = f.MarshalText()
	require.NoError(t, err)
	assert.Equal(t, "[-3; 1, 2]", string(text))
}

func TestParsersAreLenientAboutSpaceAndForm(t *testing.T) {
	for text, want := range map[string]string{
		"": "", " \n": "", "RLLRR": "RLLRR", "R L2 R2": "RLLRR", "RL2R2": "RLLRR", "R R1 L": "RRL", " RL\tLR\r\n2 ": "",
	} {
		w, err := contfrac.ParseWord(text)
		if strings.Contains(text, "\n2") {
			assert.ErrorIs(t, err, contfrac.ErrSyntax)
			continue
		}
		require.NoError(t, err)
		assert.Equal(t, want, w.String())
	}
	for text, want := range map[string]string{
		"[]": "[]", " [ ] ": "[]", "[2]": "[2]", " [ -1;2 ,3 ] ": "[-1; 2, 3]",
	} {
		f, err := contfrac.ParseFraction(text)
		require.NoError(t, err, text)
		assert.Equal(t, want, f.String())
	}
	m, err := contfrac.ParseMinus(" [[ -1;2 ,3 ]] ")
	require.NoError(t, err)
	assert.Equal(t, "[[-1; 2, 3]]", m.String())
	var f contfrac.Fraction
	require.NoError(t, f.UnmarshalJSON([]byte(" [ \"1\" ,\n\"2\" ] ")))
	assert.Equal(t, "[1; 2]", f.String())
}

var longDigits = strings.Repeat("1", contfrac.MaxDigits+1)

func TestBadWordsAreRefused(t *testing.T) {
	for _, text := range []string{"X", "RLl", "2R", "R0", "R02", "R-1", "R+1", "R L2,R", "R 2", "R２", "\x00", "L\xff"} {
		_, err := contfrac.ParseWord(text)
		assert.ErrorIs(t, err, contfrac.ErrSyntax, text)
	}
	_, err := contfrac.ParseWord("R" + longDigits)
	assert.ErrorIs(t, err, contfrac.ErrTooLarge)
	assert.Less(t, len(err.Error()), 400)
	_, err = contfrac.ParseWord(strings.Repeat("R", contfrac.MaxText+1))
	assert.ErrorIs(t, err, contfrac.ErrTooLarge)
}

func TestBadFractionsAreRefused(t *testing.T) {
	for _, text := range []string{"", "1", "[1", "1]", "[1, 2]", "[1; 2; 3]", "[1; 2,]", "[1;]", "[; 2]", "[1; 2 3]", "[+1]", "[01]", "[-0]", "[1.5]", "[[1; 2]", "(1; 2)", "[1/2]", "[1; 2] 3"} {
		_, err := contfrac.ParseFraction(text)
		assert.ErrorIs(t, err, contfrac.ErrSyntax, text)
	}
	for _, text := range []string{"", "[2; 3]", "[[2; 3]", "[2; 3]]", "[[2, 3]]", "[[2; 03]]", "[[[2; 3]]]"} {
		_, err := contfrac.ParseMinus(text)
		assert.ErrorIs(t, err, contfrac.ErrSyntax, text)
	}
	_, err := contfrac.ParseFraction("[1; 0]")
	assert.ErrorIs(t, err, contfrac.ErrTerm)
	_, err = contfrac.ParseMinus("[[1; 1]]")
	assert.ErrorIs(t, err, contfrac.ErrTerm)
	_, err = contfrac.ParseFraction("[1; " + longDigits + "]")
	assert.ErrorIs(t, err, contfrac.ErrTooLarge)
	_, err = contfrac.ParseFraction("[1; 2" + strings.Repeat(" ", contfrac.MaxText) + "]")
	assert.ErrorIs(t, err, contfrac.ErrTooLarge)
}

func TestDecodersAcceptOnlyWhatTheEncodersWrite(t *testing.T) {
	text := func(into encoding.TextUnmarshaler) func(string) error {
		return func(s string) error { return into.UnmarshalText([]byte(s)) }
	}
	inJSON := func(into json.Unmarshaler) func(string) error {
		return func(s string) error { return into.UnmarshalJSON([]byte(s)) }
	}
	long := strings.Repeat(" ", contfrac.MaxText+1)
	w, f, m, x := new(contfrac.Word), new(contfrac.Fraction), new(contfrac.Minus), new(contfrac.Matrix)
	require.NoError(t, w.UnmarshalText([]byte("R2 L")))
	require.NoError(t, f.UnmarshalText([]byte("[1; 2]")))
	require.NoError(t, m.UnmarshalText([]byte("[[1; 2]]")))
	require.NoError(t, x.UnmarshalText([]byte("[[1, 2], [3, 5]]")))
	for name, decoder := range map[string]struct {
		decode func(string) error
		syntax []string
		other  map[string]error
	}{
		"Word": {text(w), []string{"RR", "R1", " R", "R  L", "R L ", "x"}, map[string]error{long: contfrac.ErrTooLarge}},
		"Fraction": {text(f), []string{"[1;2]", "[ 1]", "[1; 2] ", "[1; 2,3]", "[-0]", "x"},
			map[string]error{long: contfrac.ErrTooLarge, "[1; 0]": contfrac.ErrTerm}},
		"Minus": {text(m), []string{"[[1;2]]", "[[ ]]", "[1; 2]", "x"},
			map[string]error{long: contfrac.ErrTooLarge, "[[1; 1]]": contfrac.ErrTerm}},
		"Matrix": {text(x), []string{"", "[[1, 2], [3, 5]", "[[1,2],[3,5]]", "[[1, 2], [3]]", "[[1, 2, 4], [3, 5]]", "[[1, 2], [3, +5]]", "[[1, 2], [3, 5]]]", "[[1, 2]]", "[[1, 02], [3, 5]]"},
			map[string]error{long: contfrac.ErrTooLarge, "[[1, 2], [3, " + longDigits + "]]": contfrac.ErrTooLarge}},
		"Fraction in JSON": {inJSON(f), []string{"", "null", "1", `"1"`, `[1]`, `["1"`, `["1",]`, `["1" "2"]`, `["1","2"]]`, `[["1"]]`, `["1","02"]`, `["1",null]`, `["1 "]`, `["\u0031"]`, `["1`, `{}`},
			map[string]error{long: contfrac.ErrTooLarge, `["1","0"]`: contfrac.ErrTerm, `["` + longDigits + `"]`: contfrac.ErrTooLarge}},
		"Minus in JSON": {inJSON(m), []string{"", "null", `["1",2]`},
			map[string]error{long: contfrac.ErrTooLarge, `["1","1"]`: contfrac.ErrTerm}},
		"Matrix in JSON": {inJSON(x), []string{"", "null", `[["1","2"],["3","5"]`, `[["1","2"],["3","5"]],`, `["1","2","3","5"]`, `[["1","2"],["3",5]]`, `[["1","2"],["3"]]`, `[["1","2"],["3","5"],["1","2"]]`, `[["1","2"],["3","05"]]`},
			map[string]error{long: contfrac.ErrTooLarge}},
	} {
		for _, s := range decoder.syntax {
			assert.ErrorIs(t, decoder.decode(s), contfrac.ErrSyntax, "%s: %s", name, s)
		}
		for s, want := range decoder.other {
			err := decoder.decode(s)
			assert.ErrorIs(t, err, want, name)
			assert.Less(t, len(fmt.Sprint(err)), 400, name)
		}
	}
	// A refused text leaves the value as it was.
	assert.Equal(t, "RRL [1; 2] [[1; 2]] [[1, 2], [3, 5]]", fmt.Sprint(w, " ", f, " ", m, " ", x))
}
