package recognize_test

import (
	"bytes"
	"testing"

	"github.com/stretchr/testify/require"

	"example.com/onecusp/orbifold/recognize"
)

func FuzzParseSequence(f *testing.F) {
	for _, seed := range []string{"1, 3, 13", "1 3\n13", "−5", "1/2", ",", "1,,2", "007", "1e9"} {
		f.Add(seed)
	}
	f.Fuzz(func(t *testing.T, text string) {
		s, err := recognize.ParseSequence(text)
		if err != nil {
			return
		}
		back, err := recognize.ParseSequence(s.String())
		require.NoError(t, err)
		require.Equal(t, s.String(), back.String())
	})
}

func FuzzReadIndexed(f *testing.F) {
	for _, seed := range []string{"0 1\n1 3\n", "# x\n5 7", "1 2\n3 4", "9223372036854775807 1\n-9223372036854775808 2"} {
		f.Add([]byte(seed))
	}
	f.Fuzz(func(t *testing.T, text []byte) {
		s, first, err := recognize.ReadIndexed(bytes.NewReader(text))
		if err != nil {
			return
		}
		var b bytes.Buffer
		if s.WriteIndexed(&b, first) != nil {
			return // the last index is the last of int64
		}
		back, from, err := recognize.ReadIndexed(&b)
		require.NoError(t, err)
		require.Equal(t, first, from)
		require.Equal(t, s.String(), back.String())
	})
}
