package farey_test

import (
	"encoding/json"
	"testing"

	"github.com/stretchr/testify/require"

	"example.com/onecusp/farey"
)

var allClasses = []farey.Class{farey.Zero, farey.Infinity, farey.One}

func TestClassOfBaseSlopeIsTheClass(t *testing.T) {
	for _, c := range allClasses {
		require.Equal(t, c, c.Slope().Class())
		require.True(t, c.Slope().IsBase())
	}
	require.Equal(t, "0/1 1/0 1/1", farey.Zero.Slope().String()+" "+farey.Infinity.Slope().String()+" "+farey.One.Slope().String())
}

func TestThirdIsTheSumOverTwoElements(t *testing.T) {
	parity := func(c farey.Class) [2]uint { return [2]uint{c.Slope().Num().Bit(0), c.Slope().Den().Bit(0)} }
	for _, c := range allClasses {
		for _, d := range allClasses {
			if c == d {
				require.Equal(t, c, c.Third(d))
				continue
			}
			x, y := parity(c), parity(d)
			require.Equal(t, [2]uint{x[0] ^ y[0], x[1] ^ y[1]}, parity(c.Third(d)))
		}
	}
}

func TestClassTextRoundTrip(t *testing.T) {
	for _, c := range allClasses {
		text, err := c.MarshalText()
		require.NoError(t, err)
		require.Equal(t, c.String(), string(text))
		var back farey.Class
		require.NoError(t, back.UnmarshalText(text))
		require.Equal(t, c, back)
	}
	data, err := json.Marshal(map[farey.Class]farey.Class{farey.One: farey.Infinity})
	require.NoError(t, err)
	require.JSONEq(t, `{"one":"infinity"}`, string(data))
}

func TestClassTextRefusals(t *testing.T) {
	c := farey.One
	for _, text := range []string{"", "Zero", "ZERO", "two", "zero ", "0", "∞", "Class(7)"} {
		require.ErrorIs(t, c.UnmarshalText([]byte(text)), farey.ErrSyntax, text)
		require.Equal(t, farey.One, c, "left alone")
	}
	_, err := farey.Class(7).MarshalText()
	require.ErrorIs(t, err, farey.ErrClass)
}

func TestWhatIsNoClassIsReadAsZero(t *testing.T) {
	for _, c := range []farey.Class{3, 7, 255} {
		require.Contains(t, c.String(), "Class(")
		require.Equal(t, farey.Slope{}, c.Slope())
		require.Equal(t, farey.Zero, c.Third(c))
		require.Equal(t, farey.One, c.Third(farey.Infinity))
		require.Equal(t, farey.Slope{}, farey.Triangle{}.Vertex(c))
		tri := farey.Triangle{}.Flip(farey.One)
		require.Equal(t, tri.Vertex(farey.Zero), tri.Vertex(c))
		require.Equal(t, tri.Flip(farey.Zero), tri.Flip(c))
		require.Equal(t, farey.Zero, farey.NewPath(c, farey.Path{}.Moves()).First())
		require.Equal(t, farey.Symmetries()[1].Class(farey.Zero), farey.Symmetries()[1].Class(c))
	}
}
