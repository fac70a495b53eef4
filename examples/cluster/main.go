// Command cluster makes a survey of a family as an Apache Beam pipeline: the counts, the proof
// that inequivalent slopes carry different numbers, and a sweep of one's own.
//
// Scenario: the bound that a group wants to reach is past one machine. The walk is split into
// shards; machines take shards, and meet again only to compare keys, which are
// grouped by their leading bits, and to merge small summaries.
//
//	go run . -weights 2,0,1 -digits 300 -shards 40 -out report.json -sweep sweep.json
//
// Without a -runner the pipeline runs in this process, on Beam's Prism runner. README.md says
// how the same binary goes to a Flink, Spark or Dataflow runner.
package main

import (
	"context"
	"flag"
	"fmt"
	"os"

	"github.com/apache/beam/sdks/v2/go/pkg/beam"
	"github.com/apache/beam/sdks/v2/go/pkg/beam/x/beamx"

	"example.com/onecusp/orbifold"
	"example.com/onecusp/orbifold/survey"
)

var (
	weights = flag.String("weights", "0,0,0", "weights k₀,k∞,k₁ of the family")
	digits  = flag.Int("digits", 300, "the bound is 10^digits")
	shards  = flag.Int("shards", 64, "number of shards, at most")
	buckets = flag.Int("buckets", 64, "number of groups of keys; one of them has to fit the memory of a worker")
	report  = flag.String("out", "cluster-report.json", "file for the report, in any file system that Beam knows")
	answer  = flag.String("sweep", "cluster-sweep.json", "file for the answer of the sweep")
)

func main() {
	flag.Parse()
	beam.Init() // on a worker machine this does the work and does not return
	if err := run(context.Background()); err != nil {
		fmt.Fprintln(os.Stderr, err)
		os.Exit(1)
	}
}

func run(ctx context.Context) error {
	f, err := orbifold.Parse(*weights)
	if err != nil {
		return err
	}
	p, s := beam.NewPipelineWithRoot()
	job := Job{Region: survey.Up(f, survey.PowerOfTen(*digits)), Shards: *shards, Buckets: *buckets}
	if err := job.Build(s, *report, *answer); err != nil {
		return err
	}
	return beamx.Run(ctx, p)
}
