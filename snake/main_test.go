package snake_test

import (
	"flag"
	"fmt"
	"os"
	"strconv"
	"testing"
)

// TestMain scales the effort of the property tests by ONECUSP_TEST_SCALE.
func TestMain(m *testing.M) {
	scale := 1.0
	if s := os.Getenv("ONECUSP_TEST_SCALE"); s != "" {
		v, err := strconv.ParseFloat(s, 64)
		if err != nil || !(v >= 0.1 && v <= 100) {
			fmt.Fprintf(os.Stderr, "ONECUSP_TEST_SCALE is %q: a number from 0.1 to 100 is needed\n", s)
			os.Exit(2)
		}
		scale = v
	}
	flag.Parse()
	set := func(name, value string) {
		if err := flag.Set(name, value); err != nil {
			panic(err)
		}
	}
	set("rapid.checks", strconv.Itoa(max(10, int(100*scale))))
	set("rapid.nofailfile", "true")
	os.Exit(m.Run())
}
