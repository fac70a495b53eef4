package farey_test

import (
	"flag"
	"fmt"
	"os"
	"strconv"
	"testing"

	"github.com/stretchr/testify/require"
)

// scaleVariable multiplies the effort of the randomised tests: 0.1 to 100.
const scaleVariable = "ONECUSP_TEST_SCALE"

// TestEffortFollowsTheEnvironment also makes cached results depend on the variable,
// which what TestMain reads does not.
func TestEffortFollowsTheEnvironment(t *testing.T) {
	want := 100
	if text, ok := os.LookupEnv(scaleVariable); ok {
		scale, err := strconv.ParseFloat(text, 64)
		require.NoError(t, err)
		want = int(100 * scale)
	}
	require.Equal(t, strconv.Itoa(want), flag.Lookup("rapid.checks").Value.String())
}

// TestMain scales the effort of the randomised tests by [scaleVariable].
func TestMain(m *testing.M) {
	flag.Parse()
	scale := 1.0
	if text, ok := os.LookupEnv(scaleVariable); ok {
		var err error
		if scale, err = strconv.ParseFloat(text, 64); err != nil || !(scale >= 0.1 && scale <= 100) {
			fmt.Fprintf(os.Stderr, "%s=%q: a number from 0.1 to 100 would be accepted\n", scaleVariable, text)
			os.Exit(2)
		}
	}
	for name, value := range map[string]string{
		"rapid.checks":     strconv.Itoa(max(10, int(100*scale))),
		"rapid.nofailfile": "true",
	} {
		if err := flag.Set(name, value); err != nil {
			fmt.Fprintln(os.Stderr, err)
			os.Exit(2)
		}
	}
	os.Exit(m.Run())
}
