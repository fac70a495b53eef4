package contfrac_test

import (
	"flag"
	"fmt"
	"os"
	"strconv"
	"testing"
)

// TestMain sets the effort of the randomised tests: ONECUSP_TEST_SCALE, from
// 0.1 to 100, multiplies the number of checks.
func TestMain(m *testing.M) {
	flag.Parse()
	scale := 1.0
	if text := os.Getenv("ONECUSP_TEST_SCALE"); text != "" {
		value, err := strconv.ParseFloat(text, 64)
		if err != nil || !(value >= 0.1 && value <= 100) {
			fmt.Fprintf(os.Stderr, "ONECUSP_TEST_SCALE is %q: a number from 0.1 to 100 is accepted\n", text)
			os.Exit(2)
		}
		scale = value
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
