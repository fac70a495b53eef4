package farey_test

import (
	"encoding/json"
	"fmt"
	"math/big"
	"strings"
	"testing"

	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/farey"
)

func TestTextGivesTheSlopeBack(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s := slopes().Draw(t, "s")
		require.Equal(t, s.Num().String()+"/"+s.Den().String(), s.String())
		parsed, err := farey.Parse(s.String())
		require.NoError(t, err)
		require.Equal(t, s, parsed)
		text, err := s.MarshalText()
		require.NoError(t, err)
		var back farey.Slope
		require.NoError(t, back.UnmarshalText(text))
		require.Equal(t, s, back)
		data, err := json.Marshal(map[string]farey.Slope{"s": s})
		require.NoError(t, err)
		var object map[string]farey.Slope
		require.NoError(t, json.Unmarshal(data, &object))
		require.Equal(t, s, object["s"])
	})
}

func TestParseReduces(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		p, q := integers().Draw(t, "p"), integers().Draw(t, "q")
		q.Abs(q)
		want, err1 := farey.New(p, q)
		got, err2 := farey.Parse(p.String() + "/" + q.String())
		require.Equal(t, err1, err2)
		require.Equal(t, want, got)
	})
}

func TestParseSpellings(t *testing.T) {
	for text, want := range map[string]string{
		"3/7": "3/7", "-3/4": "-3/4", "1/0": "1/0", "5": "5/1", "2/4": "1/2", "−2/4": "-1/2", "+3": "3/1",
		"-1/0": "1/0", "-0": "0/1", "0/5": "0/1", "007/0014": "1/2", "7/0": "1/0",
		"9223372036854775807/9223372036854775808":                         "9223372036854775807/9223372036854775808",
		"-9223372036854775808/9223372036854775808":                        "-1/1",
		"0000000000000000000000000000001/3":                               "1/3",
		"1/" + strings.Repeat("0", 100) + "3":                             "1/3",
		strings.Repeat("0", 100) + "/" + "123456789012345678901234567890": "0/1",
	} {
		s, err := farey.Parse(text)
		require.NoError(t, err, text)
		require.Equal(t, want, s.String())
		require.Equal(t, s, farey.MustParse(text))
	}
}

func TestParseRefusals(t *testing.T) {
	for _, text := range []string{
		"", "/", "1/", "/2", "-", "+", "−", "--1", "+-1", "−-1", "1/-2", "1/+2", "1/2/3", " 1", "1 ", "1 /2", "1.5", "1e9",
		"0x10", "1_000", "∞", "a", "1/a", "\x00", "٣/٤", "-/-", "1//2", strings.Repeat("9", 50) + "x/2",
	} {
		_, err := farey.Parse(text)
		require.ErrorIs(t, err, farey.ErrSyntax, text)
		require.Panics(t, func() { farey.MustParse(text) })
	}
	for _, text := range []string{"0/0", "-0/0", "000/00", strings.Repeat("0", 90) + "/0"} {
		_, err := farey.Parse(text)
		require.ErrorIs(t, err, farey.ErrIndeterminate, text)
	}
}

func TestTextIsBounded(t *testing.T) {
	long := "1/1" + strings.Repeat("0", farey.MaxTextLen-3)
	s, err := farey.Parse(long)
	require.NoError(t, err)
	require.Equal(t, long, s.String())
	for _, length := range []int{farey.MaxTextLen + 1, 20 * farey.MaxTextLen} {
		hostile := strings.Repeat("7", length)
		_, err := farey.Parse(hostile)
		require.ErrorIs(t, err, farey.ErrTooLarge)
		require.Less(t, len(err.Error()), 300)
		require.ErrorIs(t, new(farey.Slope).UnmarshalText([]byte(hostile)), farey.ErrTooLarge)
	}
	_, err = farey.Parse(strings.Repeat("x", farey.MaxTextLen))
	require.ErrorIs(t, err, farey.ErrSyntax)
	require.Less(t, len(err.Error()), 300)
}

func TestUnmarshalTextIsStrict(t *testing.T) {
	for _, text := range []string{"2/4", "5", "+1/2", "−1/2", "01/2", "1/02", "-0/1", "0/2", "-1/0", "2/0", "", "x", " 1/2"} {
		s := farey.MustParse("3/7")
		require.ErrorIs(t, s.UnmarshalText([]byte(text)), farey.ErrSyntax, text)
		require.Equal(t, "3/7", s.String(), "left alone")
	}
	s := farey.MustParse("3/7")
	require.ErrorIs(t, s.UnmarshalText([]byte("0/0")), farey.ErrIndeterminate)
	require.Error(t, json.Unmarshal([]byte("0.5"), &s))
	require.Equal(t, "3/7", s.String(), "left alone")
}

func TestFormatShortensUnderVOnly(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s := slopes().Draw(t, "s")
		whole := s.String()
		short := contfrac.Abbreviate(s.Num()) + "/" + contfrac.Abbreviate(s.Den())
		require.Equal(t, whole, fmt.Sprintf("%s", s))
		require.Equal(t, `"`+whole+`"`, fmt.Sprintf("%q", s))
		for _, verb := range []string{"%v", "%+v", "%#v"} {
			require.Equal(t, short, fmt.Sprintf(verb, s))
		}
		require.Equal(t, "%!d(farey.Slope="+short+")", fmt.Sprintf("%d", s))
	})
	require.Equal(t, "  3/7|3/7  ", fmt.Sprintf("%5s|%-5v", farey.MustParse("3/7"), farey.MustParse("3/7")))
	long := new(big.Int).Exp(big.NewInt(10), big.NewInt(1000), nil)
	s, err := farey.New(big.NewInt(-1), long)
	require.NoError(t, err)
	require.Equal(t, "-1/100000000000…000000000000 (1001 digits)", fmt.Sprint(s))
	require.Len(t, s.String(), 1004)
}

func FuzzParse(f *testing.F) {
	for _, seed := range []string{"3/7", "-3/4", "−1/0", "5", "2/4", "0/0", "1/", "99999999999999999999/3", "9223372036854775808"} {
		f.Add(seed)
	}
	f.Fuzz(func(t *testing.T, text string) {
		s, err := farey.Parse(text)
		if err != nil {
			return
		}
		isReduced(t, s)
		again, err := farey.Parse(s.String())
		require.NoError(t, err)
		require.Equal(t, s, again)
	})
}

func FuzzSlopeUnmarshalText(f *testing.F) {
	for _, seed := range []string{"3/7", "-3/4", "1/0", "5", "2/4", "0/1", "99999999999999999999/2"} {
		f.Add([]byte(seed))
	}
	f.Fuzz(func(t *testing.T, text []byte) {
		var s farey.Slope
		if s.UnmarshalText(text) == nil {
			require.Equal(t, string(text), s.String())
		}
	})
}

func FuzzPathUnmarshalText(f *testing.F) {
	for _, seed := range []string{"base", "zero:", "infinity: L2 R3", "one: R99999999999999999999 L", "one: ", "zero: LL", "zero: R0"} {
		f.Add([]byte(seed))
	}
	f.Fuzz(func(t *testing.T, text []byte) {
		var p farey.Path
		if p.UnmarshalText(text) == nil {
			require.Equal(t, string(text), p.String())
		}
	})
}
