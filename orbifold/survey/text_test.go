package survey

import (
	"encoding/json"
	"fmt"
	"math/big"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/orbifold"
)

func bigMod(x, y uint64) uint64 {
	z := new(big.Int).Mul(new(big.Int).SetUint64(x), new(big.Int).SetUint64(y))
	return mod61(z)
}

// Regions come back from their texts.
func TestRegionTextRoundTrip(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		r := regions(families().Draw(t, "family"), 60).Draw(t, "region")
		text, err := json.Marshal(r)
		require.NoError(t, err)
		var back Region
		require.NoError(t, json.Unmarshal(text, &back))
		require.Equal(t, r.String(), back.String())
		require.Equal(t, string(text), fmt.Sprintf("%s", back))
	})
	text := ` {"weights":"(2,0,1)","bound":"10^300","box":{"num":3,"den":4},"among":{"lo":"-1/2","hi":"1/0"},"fans":["1/2"],"lines":[{"a":1,"b":-2,"c":3}],"all":true}`
	var r Region
	require.NoError(t, json.Unmarshal([]byte(text), &r))
	golden(t, "region.json", []byte(r.String()+"\n"))
	for _, change := range [][2]string{
		{"(2,0,1)", "(2, 0,1)"}, {"10^300", "10^0300"}, {"10^300", "0"}, {"10^300", "-1"}, {"10^300", "1000000000"}, {"1/0", "2/0"}, {`["1/2"]`, `["2/4"]`},
		{`"all":true`, `"all":false`}, {`"all":true`, `"All":true`}, {"{", `{"x":1,`}, {"10^300", "10^99999999"},
	} {
		bad := strings.Replace(text, change[0], change[1], 1)
		require.NotEqual(t, text, bad)
		var r Region
		require.Error(t, json.Unmarshal([]byte(bad), &r), "%q", change)
	}
	require.ErrorIs(t, r.UnmarshalJSON(make([]byte, MaxText+1)), ErrTooLarge)
	require.ErrorIs(t, r.UnmarshalJSON([]byte(`{"weights":"(0,0,0)"}{}`)), ErrSyntax)
	long := Up(orbifold.Family{}, new(big.Int).Add(PowerOfTen(500), big.NewInt(1)))
	assert.Less(t, len(fmt.Sprint(long)), 200)
	assert.Greater(t, len(long.String()), 500)
}

func TestBoundTexts(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		b := bounds(orbifold.Family{}, 100).Draw(t, "bound")
		back, err := ParseBound(FormatBound(b))
		require.NoError(t, err)
		require.Equal(t, b.String(), back.String())
	})
	assert.Equal(t, "10^15000", FormatBound(PowerOfTen(15000)))
	assert.Equal(t, "100000", FormatBound(PowerOfTen(5)))
	assert.Equal(t, "10^6", FormatBound(PowerOfTen(6)))
	assert.Equal(t, "0", FormatBound(nil))
	assert.Equal(t, "1", PowerOfTen(-3).String())
	for text, want := range map[string]error{
		"": ErrSyntax, "0": ErrSyntax, "007": ErrSyntax, "-5": ErrSyntax, "1e5": ErrSyntax, "10^": ErrSyntax, "10^-1": ErrSyntax, "10^+1": ErrSyntax,
		"10^05": ErrSyntax, "10^99999999999": ErrSyntax, "10^99999999": ErrBound, "10^5592405": ErrBound,
		strings.Repeat("9", MaxBoundBits): ErrBound,
	} {
		_, err := ParseBound(text)
		assert.ErrorIs(t, err, want, "%q", clip(text))
	}
	n, err := ParseBound("10^3")
	require.NoError(t, err)
	assert.Equal(t, "1000", n.String())
	assert.Less(t, len(clip(strings.Repeat("x", 1000))), 100)
}

func FuzzParseBound(f *testing.F) {
	for _, s := range []string{"1", "10^3", "10^", "99999999999999999999", "0", "x"} {
		f.Add(s)
	}
	f.Fuzz(func(t *testing.T, s string) {
		n, err := ParseBound(s)
		if err != nil {
			return
		}
		back, err := ParseBound(FormatBound(n))
		require.NoError(t, err)
		require.Equal(t, n.String(), back.String())
		if !strings.HasPrefix(s, "10^") && !strings.HasPrefix(FormatBound(n), "10^") {
			require.Equal(t, s, FormatBound(n))
		}
	})
}

func FuzzRegion(f *testing.F) {
	f.Add(`{"weights":"(2,0,1)","bound":"10^300","box":{"num":3,"den":4},"among":{"lo":"-1/2","hi":"1/0"},"fans":["1/2"],"lines":[{"a":1,"b":-2,"c":3}],"all":true}`)
	f.Add(`{"weights":"(0,0,0)"}`)
	f.Add(`{}`)
	f.Fuzz(func(t *testing.T, s string) {
		var r Region
		if r.UnmarshalJSON([]byte(s)) != nil {
			return
		}
		text, err := r.MarshalJSON()
		require.NoError(t, err)
		var back Region
		require.NoError(t, back.UnmarshalJSON(text))
		_ = r.check()
	})
}

func FuzzParseShard(f *testing.F) {
	for _, s := range []string{"1/1 top", "5/24 infinity: L3 R", "2/9 zero:", "0/0 x"} {
		f.Add(s)
	}
	r := Up(orbifold.MustNew(1, 2, 3), PowerOfTen(100))
	f.Fuzz(func(t *testing.T, s string) {
		shard, err := ParseShard(r, s)
		if err == nil {
			require.Equal(t, s, shard.String())
		}
	})
}

func FuzzDigest(f *testing.F) {
	f.Add("7:00000000000000ad:00000000000000ad")
	f.Add("")
	f.Fuzz(func(t *testing.T, s string) {
		var d Digest
		if d.UnmarshalText([]byte(s)) == nil {
			require.Equal(t, s, d.String())
		}
	})
}

func FuzzPart(f *testing.F) {
	f.Add(`{"format":"onecusp/survey","version":1,"name":"tally","region":{"weights":"(0,0,0)","bound":"5"},"split":1,"shards":1,"sums":[{"shard":"1/1 top","sum":"3:0000000000000008:0000000000000008"}]}`)
	f.Add(`null`)
	f.Fuzz(func(t *testing.T, s string) {
		if len(s) > 300 {
			return // long bounds and splits only take long
		}
		var p Part[Digest]
		if p.UnmarshalJSON([]byte(s)) != nil {
			return
		}
		text, err := json.Marshal(p)
		require.NoError(t, err)
		var back Part[Digest]
		require.NoError(t, json.Unmarshal(text, &back))
	})
}
