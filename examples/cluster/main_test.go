package main

import (
	"context"
	"encoding/json"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"github.com/apache/beam/sdks/v2/go/pkg/beam"
	"github.com/apache/beam/sdks/v2/go/pkg/beam/testing/ptest"

	"example.com/onecusp/orbifold"
	"example.com/onecusp/orbifold/survey"
)

func TestMain(m *testing.M) { ptest.Main(m) } // the Prism runner, in this process

// The report and the answer of the pipeline are those of one machine, to the byte.
func TestPipelineIsTheSurveyOfOneMachine(t *testing.T) {
	for _, c := range []struct {
		f               orbifold.Family
		digits          int
		shards, buckets int
	}{
		{orbifold.Family{}, 300, 40, 16},
		{orbifold.MustNew(2, 0, 1), 150, 7, 3},
		{orbifold.MustNew(3, 0, 0), 60, 1, 1},
	} {
		r := survey.Up(c.f, survey.PowerOfTen(c.digits))
		dir := t.TempDir()
		report, answer := filepath.Join(dir, "report"), filepath.Join(dir, "answer")
		p, s := beam.NewPipelineWithRoot()
		if err := (Job{Region: r, Shards: c.shards, Buckets: c.buckets}).Build(s, report, answer); err != nil {
			t.Fatal(err)
		}
		ptest.RunAndValidate(t, p)

		alone, err := survey.Distinct(context.Background(), c.f, r.Bound, survey.Options{})
		if err != nil {
			t.Fatal(err)
		}
		compare(t, report, alone)
		sum, err := survey.Sweep(context.Background(), r, question(), survey.Options{})
		if err != nil {
			t.Fatal(err)
		}
		compare(t, answer, sum)
	}
}

func compare(t *testing.T, file string, want any) {
	t.Helper()
	got, err := os.ReadFile(file)
	if err != nil {
		t.Fatal(err)
	}
	text, err := json.Marshal(want)
	if err != nil {
		t.Fatal(err)
	}
	if strings.TrimSpace(string(got)) != string(text) {
		t.Errorf("pipeline: %s\none machine: %s", got, text)
	}
}

func TestJobRefuses(t *testing.T) {
	_, s := beam.NewPipelineWithRoot()
	r := survey.Up(orbifold.Family{}, survey.PowerOfTen(9))
	for _, j := range []Job{{Region: r, Buckets: 1}, {Region: r, Shards: 1}, {Shards: 1, Buckets: 1}} {
		if j.Build(s, "x", "y") == nil {
			t.Errorf("%+v is accepted", j)
		}
	}
}
