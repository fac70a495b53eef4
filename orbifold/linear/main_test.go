package linear_test

import (
	"flag"
	"fmt"
	"os"
	"strconv"
	"testing"
)

// scale multiplies the effort of all randomised tests; ONECUSP_TEST_SCALE sets
// it, 0.1 … 100.
var scale = 1.0

func TestMain(m *testing.M) {
	flag.Parse()
	if s := os.Getenv("ONECUSP_TEST_SCALE"); s != "" {
		x, err := strconv.ParseFloat(s, 64)
		if err != nil || x < 0.1 || x > 100 {
			fmt.Fprintf(os.Stderr, "ONECUSP_TEST_SCALE = %q: want a number from 0.1 to 100\n", s)
			os.Exit(2)
		}
		scale = x
	}
	_ = flag.Set("rapid.checks", strconv.Itoa(scaled(100)))
	_ = flag.Set("rapid.nofailfile", "true")
	os.Exit(m.Run())
}

// scaled returns n times the scale, at least 10.
func scaled(n int) int { return max(int(float64(n)*scale), 10) }
