package main

import (
	"context"
	"encoding/json"

	"example.com/onecusp/orbifold/survey"
)

// classes is the summary of the sweep: slopes by class, and the largest denominator.
type classes struct {
	Slopes  [3]int64 `json:"slopes"`
	Largest int64    `json:"largest"`
}

// question is a question of one's own; put another in its place.
func question() survey.Question[classes] {
	return survey.Question[classes]{
		Name: "slopes by class",
		Visit: func(sum *classes, v *survey.Visit) {
			sum.Slopes[v.Class()]++
			sum.Largest = max(sum.Largest, v.Den())
		},
		Merge: func(sum *classes, o classes) {
			for c := range sum.Slopes {
				sum.Slopes[c] += o.Slopes[c]
			}
			sum.Largest = max(sum.Largest, o.Largest)
		},
	}
}

// ask asks the question of a shard and emits the part as JSON.
func ask(ctx context.Context, t Task, emit func(string)) error {
	s, err := t.shard()
	if err != nil {
		return err
	}
	part, err := survey.SweepShards(ctx, []survey.Shard{s}, question(), one)
	if err != nil {
		return err
	}
	text, err := json.Marshal(part)
	if err != nil {
		return err
	}
	emit(string(text))
	return nil
}

// mergeAnswers makes the answer of all shards.
func mergeAnswers(_ int, parts func(*string) bool, emit func(string)) error {
	whole, err := mergeParts[classes](parts)
	if err != nil {
		return err
	}
	sum, err := whole.Result(question())
	if err != nil {
		return err
	}
	text, err := json.Marshal(sum)
	if err != nil {
		return err
	}
	emit(string(text))
	return nil
}
