package orbifold_test

import (
	"context"
	"fmt"
	"math/big"
	"os"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
)

// The tour of doc.go at the top of the module and of the README, as a program
// that runs.
func Example() {
	f, _ := orbifold.New(2, 0, 1) // weights k₀, k∞, k₁
	s, _ := farey.Parse("3/7")    // a lattice slope
	n, _ := f.Number(s)           // by the exchange rule
	a, _ := f.Fraction(s)         // its numerator is the number
	g, _ := f.Snake(s)            // its perfect matchings are counted
	m, _ := f.Matrix(s)           // its upper right entry
	fmt.Println(n, a.Numerator(), g.Count(), m.B())

	w, _ := f.Word(s)
	fmt.Println(w, a)

	c, _ := f.Certify(s) // all four routes, to be checked by others
	fmt.Println(c.Verify())

	far, _ := farey.Parse("271828182845904523536/314159265358979323846")
	r, _ := f.NumberMod(far, big.NewInt(1_000_000_007))
	lo, hi, _ := f.Log(far)
	fmt.Println(r, lo, hi)

	same, _ := f.Identify(context.Background(), big.NewInt(81))
	fmt.Println(same)
	// Output:
	// 961 961 961 961
	// RLLLLLRRLLLRRRRRL [2; 5, 2, 3, 5, 2]
	// <nil>
	// 301258517 2.2988814389713502e+20 2.2988814389713505e+20
	// [2/5 4/3]
}

// TestTourIsTheOneInTheDocuments compares the body of Example with the tour in
// doc.go and README.md, line by line.
func TestTourIsTheOneInTheDocuments(t *testing.T) {
	read := func(name string) string {
		text, err := os.ReadFile(name)
		require.NoError(t, err)
		return string(text)
	}
	_, body, ok := strings.Cut(read("tour_test.go"), "func Example() {\n")
	require.True(t, ok)
	code, rest, ok := strings.Cut(body, "\t// Output:\n")
	require.True(t, ok)
	output, _, _ := strings.Cut(rest, "}\n")
	output = strings.ReplaceAll(output, "\t// ", "")
	lines := strings.Split(strings.TrimSpace(code), "\n")
	require.Greater(t, len(lines), 15)
	lines = append(lines, strings.Split(strings.TrimSpace(output), "\n")...)
	for _, name := range []string{"../doc.go", "../README.md"} {
		text := read(name)
		for _, line := range lines {
			assert.Contains(t, text, strings.TrimSpace(line), name)
		}
	}
}
