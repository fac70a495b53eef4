package survey

import (
	"flag"
	"fmt"
	"math"
	"os"
	"strconv"
	"testing"
)

// effort multiplies the work of all randomised tests; ONECUSP_TEST_SCALE sets
// it, 0.1 … 100.
var effort = 1.0

func TestMain(m *testing.M) {
	flag.Parse()
	if s := os.Getenv("ONECUSP_TEST_SCALE"); s != "" {
		x, err := strconv.ParseFloat(s, 64)
		if err != nil || x < 0.1 || x > 100 {
			fmt.Fprintf(os.Stderr, "ONECUSP_TEST_SCALE = %q: want a number from 0.1 to 100\n", s)
			os.Exit(2)
		}
		effort = x
	}
	_ = flag.Set("rapid.checks", strconv.Itoa(scaled(100)))
	_ = flag.Set("rapid.nofailfile", "true")
	os.Exit(m.Run())
}

// far returns a number of digits for a bound, such that the slopes below it are fewer when
// less effort is asked for, about in proportion.
func far(digits int) int { return max(int(float64(digits)*min(math.Sqrt(effort), 1)), 20) }

// scaled returns n times the effort, at least 10.
func scaled(n int) int { return max(int(float64(n)*effort), 10) }
