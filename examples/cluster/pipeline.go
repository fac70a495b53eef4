package main

import (
	"encoding/json"
	"fmt"

	"github.com/apache/beam/sdks/v2/go/pkg/beam"
	"github.com/apache/beam/sdks/v2/go/pkg/beam/io/textio"
	"github.com/apache/beam/sdks/v2/go/pkg/beam/register"

	"example.com/onecusp/orbifold/survey"
)

// Job is a survey as a pipeline.
type Job struct {
	Region  survey.Region // a bound alone
	Shards  int
	Buckets int
}

// Task is a shard on its way to a worker: all in text, so that any machine can take it.
type Task struct {
	Region  string
	Shard   string
	Buckets int
}

func init() {
	register.Function3x1(audit)
	register.Function3x1(ask)
	register.Function3x1(deal)
	register.Function3x1(repeated)
	register.Function4x1(locate)
	register.Function5x1(settle)
	register.Function3x1(mergeAnswers)
	register.Function5x1(conclude)
	register.Emitter1[string]()
	register.Emitter1[uint64]()
	register.Emitter2[int, []byte]()
	register.Emitter2[uint64, string]()
	register.Iter1[string]()
	register.Iter1[uint64]()
	register.Iter1[[]byte]()
}

// Build adds the survey to a pipeline:
//
//	shards → audit ─────────────────────────────────────┐
//	shards → keys → group by leading bits → repeated keys ┐ │
//	shards → slopes of the repeated keys ←───────────────┘ │
//	              → group by key → settled exactly → report ┘
//	shards → answers to the question → merged
func (j Job) Build(s beam.Scope, report, answer string) error {
	list, err := survey.Split(j.Region, j.Shards)
	if err != nil {
		return err
	}
	if j.Buckets < 1 || j.Buckets > 1<<20 {
		return fmt.Errorf("%d buckets: want 1 … %d", j.Buckets, 1<<20)
	}
	region, err := json.Marshal(j.Region)
	if err != nil {
		return err
	}
	var tasks []Task
	for _, shard := range list {
		tasks = append(tasks, Task{string(region), shard.String(), j.Buckets})
	}
	// Reshuffle lets the runner spread the shards over its workers.
	shards := beam.Reshuffle(s, beam.CreateList(s, tasks))

	audits := beam.ParDo(s.Scope("audit"), audit, shards)

	keys := beam.ParDo(s.Scope("keys"), deal, shards)
	doubles := beam.ParDo(s.Scope("repeated"), repeated, beam.GroupByKey(s, keys))
	slopes := beam.ParDo(s.Scope("locate"), locate, shards, beam.SideInput{Input: doubles})
	settled := beam.ParDo(s.Scope("settle"), settle, beam.GroupByKey(s, slopes), beam.SideInput{Input: beam.Create(s, string(region))})

	one := beam.Create(s, string(region))
	textio.Write(s.Scope("report"), report, beam.ParDo(s, conclude, one,
		beam.SideInput{Input: audits}, beam.SideInput{Input: settled}))

	answers := beam.ParDo(s.Scope("ask"), ask, shards)
	textio.Write(s.Scope("answer"), answer, beam.ParDo(s, mergeAnswers, beam.Create(s, 0), beam.SideInput{Input: answers}))
	return nil
}
