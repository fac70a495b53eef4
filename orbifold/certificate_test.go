package orbifold_test

import (
	"context"
	"encoding/json"
	"errors"
	"fmt"
	"math/big"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
)

func TestCertificatesVerifyAndComeBackFromJSON(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f, s := families().Draw(t, "family"), slopes().Draw(t, "slope")
		c := must(f.Certify(s))(t)
		require.NoError(t, c.Verify())
		text := must(json.Marshal(c))(t)
		var back orbifold.Certificate
		require.NoError(t, json.Unmarshal(text, &back))
		require.NoError(t, back.Verify())
		assert.JSONEq(t, string(text), string(must(json.Marshal(back))(t)))
		assert.Equal(t, f, back.Family())
		assert.True(t, s.Equal(back.Slope()))
		assertEqualInt(t, must(f.Number(s))(t), back.Number())
	})
}

// TestCertificateCanBeCheckedWithoutTheLibrary is the reader of a certificate who has
// exact integers and JSON only.
func TestCertificateCanBeCheckedWithoutTheLibrary(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f, s := families().Draw(t, "family"), slopes().Draw(t, "slope")
		var c struct {
			Weights  map[string]string
			Number   string
			Path     string
			Triangle []struct{ Slope, Number string }
			Fraction []string
			Matrix   [2][2]string
			Root     string
			Trace    string
		}
		require.NoError(t, json.Unmarshal(must(json.Marshal(must(f.Certify(s))(t)))(t), &c))
		number := integer(t, c.Number)

		// Replay (X), u' = K·v·w − k_v·w − k_w·v − u, along the path.
		names := []string{"zero", "infinity", "one"}
		k, bigK := map[string]*big.Int{}, big.NewInt(3)
		for _, class := range names {
			k[class] = integer(t, c.Weights[class])
			bigK.Add(bigK, k[class])
		}
		at := map[string]*big.Int{"zero": big.NewInt(1), "infinity": big.NewInt(1), "one": big.NewInt(1)}
		newest := ""
		flip := func(u, v, w string) {
			n := new(big.Int).Mul(at[v], at[w])
			n.Mul(n, bigK)
			n.Sub(n, new(big.Int).Mul(k[v], at[w])).Sub(n, new(big.Int).Mul(k[w], at[v])).Sub(n, at[u])
			at[u], newest = n, u
		}
		if c.Path != "base" {
			first, moves, _ := strings.Cut(c.Path, ":")
			edge := map[string][2]string{"infinity": {"zero", "one"}, "zero": {"one", "infinity"}, "one": {"infinity", "zero"}}[first]
			a, b := edge[0], edge[1]
			flip(first, a, b)
			for _, run := range strings.Fields(moves) {
				length := 1
				if len(run) > 1 {
					_, err := fmt.Sscan(run[1:], &length)
					require.NoError(t, err)
				}
				for range length {
					if run[0] == 'L' {
						old := b
						b = newest
						flip(old, a, b)
					} else {
						old := a
						a = newest
						flip(old, a, b)
					}
				}
			}
			assertEqualInt(t, number, at[newest], "replayed path")
			assertEqualInt(t, number, integer(t, c.Triangle[2].Number))
		}

		// The continuant of the fraction.
		p, q := big.NewInt(1), new(big.Int)
		for _, text := range c.Fraction {
			p, q = new(big.Int).Add(new(big.Int).Mul(integer(t, text), p), q), p
		}
		assertEqualInt(t, number, p, "continuant")

		// N | y² + k·y + 1.
		y := integer(t, c.Root)
		ky := big.NewInt(f.Weight(s.Class()))
		sum := ky.Add(ky, y).Mul(ky, y)
		assertEqualInt(t, new(big.Int), sum.Add(sum, big.NewInt(1)).Mod(sum, number), "root")
		assert.Equal(t, c.Number, c.Matrix[0][1])
		assert.Equal(t, c.Root, c.Matrix[0][0])
	})
}

func integer(t require.TestingT, text string) *big.Int {
	n, ok := new(big.Int).SetString(text, 10)
	require.True(t, ok, "integer %q", text)
	return n
}

// mutate returns the certificate's JSON once for each value in it, with that value
// changed, and the names of the top-level fields touched.
func mutate(t *testing.T, text []byte) (mutants map[string][]byte) {
	mutants = map[string][]byte{}
	var leaves []string
	d := json.NewDecoder(strings.NewReader(string(text)))
	for {
		tok, err := d.Token()
		if err != nil {
			break
		}
		switch v := tok.(type) {
		case string:
			leaves = append(leaves, fmt.Sprintf("%d:%s", d.InputOffset(), v))
		case float64:
			leaves = append(leaves, fmt.Sprintf("%d:%v", d.InputOffset(), v))
		}
	}
	for _, leaf := range leaves {
		at, value, _ := strings.Cut(leaf, ":")
		var end int
		_, err := fmt.Sscan(at, &end)
		require.NoError(t, err)
		changed := []byte(text[:end])
		last := len(changed) - 1
		if changed[last] == '"' {
			last--
		}
		if changed[last] == '"' { // the empty text
			mutants[leaf] = []byte(string(changed[:last+1]) + "L" + string(text[last+1:]))
			continue
		}
		_ = value
		switch changed[last] {
		case '9':
			changed[last] = '3'
		case '0', '1', '2', '3', '4', '5', '6', '7', '8':
			changed[last]++
		case 'L':
			changed[last] = 'R'
		case 'R':
			changed[last] = 'L'
		default:
			changed[last]++
		}
		mutants[leaf] = []byte(string(changed) + string(text[end:]))
	}
	return mutants
}

func TestChangingAnyValueOfACertificateIsNoticed(t *testing.T) {
	for _, pair := range []struct{ family, slope string }{
		{"0,0,0", "3/7"}, {"2,0,1", "3/7"}, {"1,1,1", "-5/3"}, {"0,0,0", "1/2"}, {"0,0,0", "0/1"}, {"3,1,4", "17/5"},
	} {
		f := must(orbifold.Parse(pair.family))(t)
		text := must(json.Marshal(must(f.Certify(farey.MustParse(pair.slope)))(t)))(t)
		mutants := mutate(t, text)
		require.Greater(t, len(mutants), 30)
		for leaf, mutant := range mutants {
			var c orbifold.Certificate
			err := json.Unmarshal(mutant, &c)
			if err == nil {
				err = c.Verify()
			}
			assert.Error(t, err, "%v at %s, changed at %s: %s", f, pair.slope, leaf, mutant)
		}
	}
}

func TestVerifyNamesTheFirstWrongField(t *testing.T) {
	text := string(must(json.Marshal(must(orbifold.MustNew(2, 0, 1).Certify(farey.MustParse("3/7")))(t)))(t))
	for _, change := range []struct{ field, old, new string }{
		{"number", `"number":"961","path"`, `"number":"962","path"`},
		{"path", `"path":"infinity: `, `"path":"zero: `},
		{"word", `"word":"R`, `"word":"R2`},
		{"tiles", `"tiles":"18"`, `"tiles":"17"`},
		{"trace", `"trace":"`, `"trace":"1`},
		{"root", `"root":"-`, `"root":"-1`},
	} {
		require.Contains(t, text, change.old)
		var c orbifold.Certificate
		require.NoError(t, json.Unmarshal([]byte(strings.Replace(text, change.old, change.new, 1)), &c), change.field)
		err := c.Verify()
		assert.ErrorIs(t, err, orbifold.ErrCertificate)
		assert.ErrorContains(t, err, fmt.Sprintf("field %q", change.field))
	}
}

func TestZeroCertificateFailsVerify(t *testing.T) {
	var c orbifold.Certificate
	assert.ErrorIs(t, c.Verify(), orbifold.ErrCertificate)
	assert.Equal(t, "null", string(must(json.Marshal(c))(t)))
	require.NoError(t, json.Unmarshal([]byte("null"), &c))
	assert.ErrorIs(t, c.Verify(), orbifold.ErrCertificate)
	assert.Zero(t, c.Number().Sign())
	assert.Zero(t, c.Trace().Sign())
	assert.Zero(t, c.Root().Sign())
	assert.Zero(t, c.Tiles().Sign())
	_, ok := c.Word()
	assert.False(t, ok)
	_, ok = c.Fraction()
	assert.False(t, ok)
	for i := -1; i < 4; i++ {
		_, n := c.Vertex(i)
		assert.Zero(t, n.Sign())
	}
	assert.False(t, c.Continuant().Agrees(big.NewInt(0)))
	assert.False(t, c.Matchings().Agrees(nil))
	assert.True(t, c.Path().IsBase())
	assert.True(t, c.Matrix().Equal(contfrac.Matrix{}))
}

func TestDecoderRefusesWhatItWouldNotWrite(t *testing.T) {
	text := string(must(json.Marshal(must(orbifold.Family{}.Certify(farey.MustParse("3/7")))(t)))(t))
	for name, bad := range map[string]string{
		"leading zero":       strings.Replace(text, `"number":"169","path"`, `"number":"0169","path"`, 1),
		"plus sign":          strings.Replace(text, `"trace":"507"`, `"trace":"+507"`, 1),
		"unknown field":      strings.Replace(text, `{"format"`, `{"remark":"x","format"`, 1),
		"repeated field":     strings.Replace(text, `{"format"`, `{"format":"onecusp/number","format"`, 1),
		"missing field":      strings.Replace(text, `,"trace":"507"`, ``, 1),
		"number as JSON":     strings.Replace(text, `"trace":"507"`, `"trace":507`, 1),
		"unreduced slope":    strings.Replace(text, `"slope":"3/7","number":"169","path"`, `"slope":"6/14","number":"169","path"`, 1),
		"other format":       strings.Replace(text, `onecusp/number`, `onecusp/table`, 1),
		"other version":      strings.Replace(text, `"version":1`, `"version":2`, 1),
		"other labelling":    strings.Replace(text, `lattice slope`, `index`, 1),
		"negative weight":    strings.Replace(text, `"zero":"0"`, `"zero":"-1"`, 1),
		"text after":         text + "{}",
		"not an object":      `[1]`,
		"foreign letter":     strings.Replace(text, `"word":"R`, `"word":"Q`, 1),
		"zero inner term":    strings.Replace(text, `"fraction":["2","2"`, `"fraction":["2","0"`, 1),
		"hostile digits":     strings.Replace(text, `"trace":"507"`, `"trace":"`+strings.Repeat("7", 1<<21)+`"`, 1),
		"hostile size":       `"` + strings.Repeat(" ", orbifold.MaxCertificateBytes) + `"`,
		"prime not a number": strings.Replace(text, `"matchings":{"method":"exact","value":"169"}`, `"matchings":{"method":"exact","residues":[{"prime":"x","residue":"1"}]}`, 1),
		"truncated":          text[:len(text)/2],
		"empty":              ``,
		"slope 0/0":          strings.Replace(text, `"slope":"3/7","number":"169","path"`, `"slope":"0/0","number":"169","path"`, 1),
	} {
		require.NotEqual(t, text, bad, name)
		var c orbifold.Certificate
		err := c.UnmarshalJSON([]byte(bad))
		assert.ErrorIs(t, err, orbifold.ErrCertificate, name)
	}
}

func TestDecoderRefusesUnknownMethods(t *testing.T) {
	text := string(must(json.Marshal(must(orbifold.MustNew(2, 0, 1).Certify(farey.MustParse("3/7")))(t)))(t))
	for _, change := range [][2]string{
		{`{"method":"exact","value":"961"}`, `{"method":"guessed","value":"961"}`},
		{`{"method":"exact","value":"961"}`, `{"method":"exact"}`},
		{`{"method":"exact","value":"961"}`, `{"method":"not run","value":"961"}`},
		{`{"method":"exact","value":"961"}`, `{"method":"modulo primes"}`},
		{`{"method":"exact","value":"961"}`, `{"method":"exact","value":"961","residues":[{"prime":"7","residue":"2"}]}`},
	} {
		changed := strings.Replace(text, change[0], change[1], 1)
		require.NotEqual(t, text, changed)
		var c orbifold.Certificate
		assert.ErrorIs(t, json.Unmarshal([]byte(changed), &c), orbifold.ErrCertificate, change[1])
	}
}

func TestCertificatesPrintWholeAndShortened(t *testing.T) {
	c := must(orbifold.MustNew(2, 0, 1).Certify(farey.MustParse("3/7")))(t)
	assert.Equal(t, "961 at 3/7 in family (2,0,1)", fmt.Sprintf("%v", c))
	assert.Equal(t, "961", fmt.Sprintf("%v", c.Continuant()))
	assert.Equal(t, "nothing", fmt.Sprint(orbifold.Certificate{}))
	assert.Equal(t, "not run", fmt.Sprint(orbifold.Count{}))

	long := must(orbifold.Family{}.Certify(farey.MustParse("1/300")))(t)
	n := long.Number()
	assert.Equal(t, n.String()+" at 1/300 in family (0,0,0)", fmt.Sprintf("%s", long))
	assert.Equal(t, contfrac.Abbreviate(n)+" at 1/300 in family (0,0,0)", fmt.Sprintf("%v", long))
	assert.Equal(t, n.String(), fmt.Sprintf("%s", long.Matchings()))
	assert.Equal(t, contfrac.Abbreviate(n), fmt.Sprintf("%v", long.Matchings()))
	for node := range (orbifold.Family{}).Tree(299) {
		if node.Slope().Equal(long.Slope()) {
			assert.Equal(t, "1/300: "+n.String(), fmt.Sprintf("%s", node))
			assert.Equal(t, "1/300: "+contfrac.Abbreviate(n), fmt.Sprintf("%v", node))
			break
		}
	}
	assert.Equal(t, "0/1: 1", fmt.Sprint(orbifold.Node{}))
}

func TestLongRoutesRunModuloPrimesAndSaySo(t *testing.T) {
	f := orbifold.Family{}
	s := farey.MustParse("1/150000") // 299,997 letters: past the exact tiles and runs
	c := must(f.Certify(s))(t)
	for _, count := range []orbifold.Count{c.Continuant(), c.Matchings()} {
		assert.Equal(t, orbifold.ModuloPrimes, count.Method)
		assert.Len(t, count.Residues(), 3)
		assert.Equal(t, 3, strings.Count(fmt.Sprint(count), " modulo "))
		assert.True(t, count.Agrees(c.Number()))
		assert.False(t, count.Agrees(new(big.Int).Add(c.Number(), big.NewInt(1))))
		_, ok := count.Value()
		assert.False(t, ok)
	}
	_, ok := c.Word()
	assert.False(t, ok)
	var back orbifold.Certificate
	require.NoError(t, json.Unmarshal(must(json.Marshal(c))(t), &back))
	require.NoError(t, back.Verify())
}

func TestMatchingsOfGraphsTooLargeAreNotRun(t *testing.T) {
	f := orbifold.MustNew(1_000_000_000_000, 0, 0)
	c := must(f.Certify(farey.MustParse("5/3")))(t)
	assert.Equal(t, orbifold.NotRun, c.Matchings().Method)
	assert.False(t, c.Matchings().Agrees(c.Number()))
	assert.Equal(t, orbifold.Exact, c.Continuant().Method)
	assert.True(t, c.Continuant().Agrees(c.Number()))
	require.NoError(t, c.Verify())
}

func TestCertifyRefusesNumbersPastItsLimit(t *testing.T) {
	_, err := orbifold.Family{}.Certify(farey.MustParse("1/10000000"))
	assert.ErrorIs(t, err, orbifold.ErrTooLarge)
	_, err = orbifold.Family{}.WithLimit(5).Certify(farey.MustParse("3/7"))
	assert.ErrorIs(t, err, orbifold.ErrTooLarge)
}

func TestCertifyStopsWithItsContext(t *testing.T) {
	ctx, cancel := context.WithCancel(context.Background())
	cancel()
	_, err := orbifold.Family{}.CertifyContext(ctx, farey.MustParse("3/7"))
	assert.ErrorIs(t, err, context.Canceled)
	c := must(orbifold.Family{}.Certify(farey.MustParse("3/7")))(t)
	assert.ErrorIs(t, c.VerifyContext(ctx), context.Canceled)
}

func FuzzCertificateJSON(f *testing.F) {
	for _, slope := range []string{"3/7", "0/1", "-5/3", "1/2"} {
		c, err := orbifold.MustNew(2, 0, 1).Certify(farey.MustParse(slope))
		if err != nil {
			f.Fatal(err)
		}
		text, err := json.Marshal(c)
		if err != nil {
			f.Fatal(err)
		}
		f.Add(text)
	}
	f.Add([]byte("null"))
	f.Fuzz(func(t *testing.T, text []byte) {
		var c orbifold.Certificate
		if err := c.UnmarshalJSON(text); err != nil {
			if !errors.Is(err, orbifold.ErrCertificate) {
				t.Fatalf("error of another kind: %v", err)
			}
			return
		}
		again, err := c.MarshalJSON()
		if err != nil {
			t.Fatal(err)
		}
		var d orbifold.Certificate
		if err := d.UnmarshalJSON(again); err != nil {
			t.Fatalf("does not read its own output: %v", err)
		}
	})
}
