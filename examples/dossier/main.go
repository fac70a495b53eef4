// Dossier prints and writes the whole file on one or more slopes of an exchange
// family: the number by four routes that must agree, the slope's place among the Farey
// triangles, its arc, word and continued fraction, its snake graph, its matrix, form and
// Lagrange value, the fan round it, its neighbours in size, and a certificate that is read
// back and checked.
//
//	go run ./examples/dossier                              # the scenario below
//	go run ./examples/dossier -weights 1,1,1 3/7 5/2 -3/4  # weights and slopes of your own
//	go run ./examples/dossier -out folder 1/2              # another output folder
//
// It prints text to standard output and writes into the output folder (dossier-out, if
// not told otherwise):
//
//	dossier.txt           the same text
//	dossier.html          one page with all pictures; opens offline, needs no script
//	certificate-….json    one certificate for each slope whose number can be held
//
// Files of these names are replaced, others in the folder are left alone. The exit
// status is 0; 1 if something could not be written or a certificate fails; 2 for
// flags or slopes that cannot be used.
//
// # The scenario
//
// It is invented, as are the people in it, who have no names. Two of them study the
// exchange family with weights (2,0,1). One has made a table by hand, and the number 81
// turned up in it twice, at the slopes 2/5 and 4/3. The other, asked to check the table,
// wants to know whether that is a slip. In the classical family it would be a sensation;
// here, with three different weights, no symmetry takes one slope to the other. So
// they ask for the whole file on both slopes, with 3/7 and the negative slope −3/4 to
// compare, with one slope whose arc is too long to draw, and with one whose
// number is too long to hold.
package main

import (
	"context"
	"errors"
	"flag"
	"fmt"
	"io"
	"os"
	"os/signal"
	"slices"
	"strings"

	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
)

// The scenario: what is looked at when no argument is given.
const (
	scenarioNote = "Demonstration. The story behind these weights and slopes is invented: " +
		"in a table made by hand for the weights (2,0,1) the number 81 turned up twice, at " +
		"2/5 and at 4/3, and a reader wants the whole file on both slopes before believing it."
	scenarioWeights = "(2,0,1)"
	scenarioSlopes  = "2/5 4/3 3/7 -3/4 233/610 300007/1200011"
)

// maxSlopes bounds the slopes of one run, so that the page stays readable.
const maxSlopes = 64

// errUsage marks arguments that cannot be used.
var errUsage = errors.New("see -help")

func main() {
	ctx, stop := signal.NotifyContext(context.Background(), os.Interrupt)
	defer stop()
	os.Exit(run(ctx, os.Args[1:], os.Stdout, os.Stderr))
}

// run is the command: it returns the exit status, and says what went wrong in one line.
func run(ctx context.Context, args []string, stdout, stderr io.Writer) int {
	err := produce(ctx, args, stdout)
	switch {
	case err == nil:
		return 0
	case errors.Is(err, flag.ErrHelp):
		return 0
	}
	fmt.Fprintln(stderr, "dossier:", strings.ReplaceAll(err.Error(), "\n", " "))
	if errors.Is(err, errUsage) {
		return 2
	}
	return 1
}

// produce reads the arguments, makes the dossier and writes it.
func produce(ctx context.Context, args []string, stdout io.Writer) error {
	o, err := parseArguments(args, stdout)
	if err != nil {
		return err
	}
	d, err := newDossier(ctx, o.family, o.slopes)
	if err != nil {
		return err
	}
	d.Note = o.note
	if err := d.writeCertificates(ctx, o.folder); err != nil {
		return err
	}
	text := d.text()
	if err := d.write(o.folder, text); err != nil {
		return err
	}
	if _, err := io.WriteString(stdout, text); err != nil {
		return err
	}
	_, err = fmt.Fprintf(stdout, "\nWritten to the folder %s: dossier.html, dossier.txt and %d certificates\n",
		o.folder, d.certificates())
	return err
}

// options are the arguments, understood.
type options struct {
	family orbifold.Family
	slopes []farey.Slope
	folder string
	note   string
}

func parseArguments(args []string, stdout io.Writer) (options, error) {
	flags := flag.NewFlagSet("dossier", flag.ContinueOnError)
	flags.SetOutput(io.Discard)
	weights := flags.String("weights", "", "the three weights k0,kinf,k1 of the classes of 0/1, 1/0 and 1/1, integers ≥ 0 (0,0,0 unless given)")
	folder := flags.String("out", "dossier-out", "the `folder` to write into; it is made if missing")
	if err := flags.Parse(endOfFlags(args)); err != nil {
		if errors.Is(err, flag.ErrHelp) {
			printHelp(flags, stdout)
			return options{}, err
		}
		return options{}, fmt.Errorf("%w; %w", err, errUsage)
	}
	o := options{folder: *folder}
	if *folder == "" {
		return o, fmt.Errorf("-out names no folder; %w", errUsage)
	}
	slopes := flags.Args()
	if len(slopes) == 0 && *weights == "" {
		o.note, *weights, slopes = scenarioNote, scenarioWeights, strings.Fields(scenarioSlopes)
	}
	if len(slopes) == 0 {
		return o, fmt.Errorf("no slope given, for instance 3/7; %w", errUsage)
	}
	if len(slopes) > maxSlopes {
		return o, fmt.Errorf("%d slopes given, at most %d fit on a page; %w", len(slopes), maxSlopes, errUsage)
	}
	if *weights != "" {
		family, err := orbifold.Parse(*weights)
		if err != nil {
			return o, fmt.Errorf("-weights: %w; %w", err, errUsage)
		}
		o.family = family
	}
	for _, text := range slopes {
		s, err := farey.Parse(text)
		if err != nil {
			return o, fmt.Errorf("%w; flags go before the slopes; %w", err, errUsage)
		}
		if !slices.ContainsFunc(o.slopes, s.Equal) {
			o.slopes = append(o.slopes, s)
		}
	}
	return o, nil
}

// endOfFlags marks where the flags end when the first slope is negative: "-3/4" would
// be taken for a flag otherwise. What stands after a flag is the flag's value.
func endOfFlags(args []string) []string {
	for i := 0; i < len(args); i++ {
		a := args[i]
		if a == "--" || !strings.HasPrefix(a, "-") {
			break
		}
		if len(a) > 1 && '0' <= a[1] && a[1] <= '9' {
			return slices.Insert(slices.Clone(args), i, "--")
		}
		if !strings.Contains(a, "=") {
			i++ // its value
		}
	}
	return args
}

func printHelp(flags *flag.FlagSet, w io.Writer) {
	fmt.Fprint(w, "dossier [flags] [slopes]\n\nThe whole file on slopes of an exchange family, such as 3/7, -3/4, 5 or 1/0.\n"+
		"Without weights and slopes: an invented demonstration.\n\n")
	flags.SetOutput(w)
	flags.PrintDefaults()
}
