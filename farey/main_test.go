package farey_test

import (
	"flag"
	"fmt"
	"os"
	"strconv"
	"testing"
)

// TestMain scales the effort of the randomised tests by ONECUSP_TEST_SCALE.
func TestMain(m *testing.M) {
	flag.Parse()
	scale := 1.0
	if text, ok := os.LookupEnv("ONECUSP_TEST_SCALE"); ok {
		var err error
		if scale, err = strconv.ParseFloat(text, 64); err != nil || !(scale >= 0.1 && scale <= 100) {
			fmt.Fprintf(os.Stderr, "ONECUSP_TEST_SCALE=%q: a number from 0.1 to 100 would be accepted\n", text)
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
