// Command survey proves that the numbers of a family up to 10^digits are distinct, or
// lists those that are not, and writes the report.
//
// Scenario: a group wants to state in a paper that the Markov numbers of up to so many
// digits are distinct. The survey shows how far it is, can be stopped with an interrupt or a
// kill and goes on from its checkpoint when it is started again, and ends with a report whose
// digest another run, on another machine, has to reproduce.
//
//	go run . -digits 15000 -checkpoint markov.json -out markov.txt
//	go run . -weights 0,1,2 -digits 3000
//
// Without arguments: the Markov numbers of up to 3000 digits.
package main

import (
	"context"
	"encoding/json"
	"errors"
	"flag"
	"fmt"
	"io"
	"os"
	"os/signal"
	"time"

	"example.com/onecusp/orbifold"
	"example.com/onecusp/orbifold/survey"
)

func main() {
	ctx, stop := signal.NotifyContext(context.Background(), os.Interrupt)
	defer stop()
	if err := run(ctx, os.Args[1:], os.Stdout, os.Stderr); err != nil {
		if !errors.Is(err, flag.ErrHelp) {
			fmt.Fprintln(os.Stderr, err)
		}
		os.Exit(1)
	}
}

// settings are what the command line says.
type settings struct {
	family     orbifold.Family
	digits     int
	memory     int64
	workers    int
	checkpoint string
	out, json  string
}

func read(args []string, messages io.Writer) (settings, error) {
	var s settings
	flags := flag.NewFlagSet("survey", flag.ContinueOnError)
	flags.SetOutput(messages)
	weights := flags.String("weights", "0,0,0", "weights k₀,k∞,k₁ of the family")
	flags.IntVar(&s.digits, "digits", 3000, "the bound is 10^digits")
	memory := flags.Int64("memory", 2048, "memory for keys, in MiB")
	flags.IntVar(&s.workers, "workers", 0, "number of workers; 0 for all processors")
	flags.StringVar(&s.checkpoint, "checkpoint", "", "file for finished work, to go on from")
	flags.StringVar(&s.out, "out", "", "file for the report as text")
	flags.StringVar(&s.json, "json", "", "file for the report as JSON")
	if err := flags.Parse(args); err != nil {
		return s, err
	}
	s.memory = *memory << 20
	var err error
	s.family, err = orbifold.Parse(*weights)
	return s, err
}

func run(ctx context.Context, args []string, out, messages io.Writer) error {
	s, err := read(args, messages)
	if err != nil {
		return err
	}
	bound := survey.PowerOfTen(s.digits)
	rows, err := survey.Table(ctx, s.family, append(milestones(s.digits), bound), survey.Options{Workers: s.workers})
	if err != nil {
		return err
	}
	g, _, err := survey.Growth(ctx, s.family)
	if err != nil {
		return err
	}
	fmt.Fprintf(out, "family %v: G = %s\n", s.family, g.Text('f', 30))
	for _, r := range rows {
		fmt.Fprintf(out, "%12s: %v slopes of %v up to symmetry, %.6f of G·X²\n", survey.FormatBound(r.Bound), r.All, r.Slopes, r.Ratio(g))
	}

	start := time.Now()
	bar := newBar(messages)
	report, err := survey.Distinct(ctx, s.family, bound, survey.Options{
		Workers: s.workers, MemoryBytes: s.memory, Checkpoint: s.checkpoint, Progress: bar.show,
	})
	bar.close()
	if err != nil {
		return err
	}
	fmt.Fprint(out, report.String())
	fmt.Fprintf(messages, "took %v\n", time.Since(start).Round(time.Second/10))
	if s.out != "" {
		if err := os.WriteFile(s.out, []byte(report.String()), 0o644); err != nil {
			return err
		}
	}
	if s.json != "" {
		text, err := json.MarshalIndent(report, "", "  ")
		if err != nil {
			return err
		}
		return os.WriteFile(s.json, append(text, '\n'), 0o644)
	}
	return nil
}
