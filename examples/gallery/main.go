// Gallery writes a page of pictures of snake graphs: for each of some slopes, and in
// each of some exchange families, the graph with its matchings, their lattice, the
// Laurent expansion they sum up to, and the band of the closed curve round the arc.
//
//	go run ./examples/gallery                                     # the scenario below
//	go run ./examples/gallery -weights "0,0,0 3,1,0" -slopes "3/5 -3/4"
//	go run ./examples/gallery -out folder -seed 7                 # folder, and other random matchings
//
// It prints a summary to standard output and writes into the output folder
// (gallery-out, if not told otherwise):
//
//	gallery.html     one page with all pictures; opens offline, needs no script
//	gallery.txt      the same with pictures made of characters
//	gallery.tex      a LaTeX document of the TikZ pictures: pdflatex gallery.tex
//	….tikz           the pictures, each to be put into a document of one's own
//	lattice-….dot    the lattices of matchings, in the DOT graph language
//
// Files of these names are replaced, others in the folder are left alone. The exit
// status is 0; 1 if something could not be written; 2 for flags that cannot be used.
//
// # The scenario
//
// It is invented. Somebody wants to fill the wall of a corridor with pictures, so that who
// walks along sees what the three weights of an exchange family do: the classical family
// (0,0,0), where every crossing of an arc is one tile; (1,1,1), where every crossing goes
// round an orbifold point of order 3 and becomes a hexagon; and (2,0,1), where the three
// classes of edges differ. Twelve slopes hang there, from one crossing to eleven, positive and
// negative, and each shows the same arc in the three families side by side.
package main

import (
	"context"
	"errors"
	"flag"
	"fmt"
	"io"
	"math/big"
	"os"
	"os/signal"
	"slices"
	"strings"

	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
)

// The scenario: what is shown when neither weights nor slopes are given.
const (
	scenarioNote = "Demonstration. The story behind this choice is invented: somebody fills the wall of a " +
		"corridor with twelve arcs, each in three exchange families, so that who walks along sees what weights do to a snake graph."
	scenarioWeights = "0,0,0 1,1,1 2,0,1"
	scenarioSlopes  = "1/2 2/1 -1/1 1/3 2/3 3/2 -1/2 2/5 3/5 5/2 -2/3 3/7"
)

const (
	maxExhibits = 64 // of one run, so that the page stays readable
	maxTiles    = 48 // of a graph, so that its picture does
)

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
	if err == nil || errors.Is(err, flag.ErrHelp) {
		return 0
	}
	fmt.Fprintln(stderr, "gallery:", strings.ReplaceAll(err.Error(), "\n", " "))
	if errors.Is(err, errUsage) {
		return 2
	}
	return 1
}

// produce reads the arguments, makes the gallery and writes it.
func produce(ctx context.Context, args []string, stdout io.Writer) error {
	o, err := parseArguments(args, stdout)
	if err != nil {
		return err
	}
	g, err := newGallery(ctx, o)
	if err != nil {
		return err
	}
	files, err := g.files()
	if err != nil {
		return err
	}
	if err := writeFiles(o.folder, files); err != nil {
		return err
	}
	if _, err := io.WriteString(stdout, g.summary()); err != nil {
		return err
	}
	_, err = fmt.Fprintf(stdout, "\nWritten to the folder %s: gallery.html and %d other files\n", o.folder, len(files)-1)
	return err
}

// options are the arguments, understood.
type options struct {
	families []orbifold.Family
	slopes   []farey.Slope
	seed     uint64
	folder   string
	note     string
}

func parseArguments(args []string, stdout io.Writer) (options, error) {
	flags := flag.NewFlagSet("gallery", flag.ContinueOnError)
	flags.SetOutput(io.Discard)
	var o options
	weights := flags.String("weights", "", "`families` to show, as weights k0,kinf,k1 of the classes of 0/1, 1/0 and 1/1, with spaces between families")
	slopes := flags.String("slopes", "", "`slopes` to show, with spaces between them, such as \"3/7 -3/4\"")
	flags.Uint64Var(&o.seed, "seed", 1, "`number` from which the random matchings are drawn")
	flags.StringVar(&o.folder, "out", "gallery-out", "`folder` to write into; it is made if missing")
	if err := flags.Parse(args); err != nil {
		if errors.Is(err, flag.ErrHelp) {
			printHelp(flags, stdout)
			return o, err
		}
		return o, fmt.Errorf("%w; %w", err, errUsage)
	}
	switch {
	case flags.NArg() > 0:
		return o, fmt.Errorf("%q stands after the flags: slopes are given as -slopes %[1]q; %w", flags.Arg(0), errUsage)
	case o.folder == "":
		return o, fmt.Errorf("-out names no folder; %w", errUsage)
	case *weights == "" && *slopes == "":
		o.note = scenarioNote
	}
	for _, text := range strings.Fields(orElse(*weights, scenarioWeights)) {
		f, err := orbifold.Parse(text)
		if err != nil {
			return o, fmt.Errorf("-weights: %w; %w", err, errUsage)
		}
		if !slices.Contains(o.families, f) {
			o.families = append(o.families, f)
		}
	}
	for _, text := range strings.Fields(orElse(*slopes, scenarioSlopes)) {
		s, err := farey.Parse(text)
		if err != nil {
			return o, fmt.Errorf("-slopes: %w; %w", err, errUsage)
		}
		if !slices.ContainsFunc(o.slopes, s.Equal) {
			o.slopes = append(o.slopes, s)
		}
	}
	return o, o.check()
}

// check refuses what would not fit on a page.
func (o options) check() error {
	n := len(o.families) * len(o.slopes)
	if n == 0 {
		return fmt.Errorf("nothing to show: at least one family and one slope are needed; %w", errUsage)
	}
	if n > maxExhibits {
		return fmt.Errorf("%d slopes in %d families are %d pictures, at most %d fit on a page; %w",
			len(o.slopes), len(o.families), n, maxExhibits, errUsage)
	}
	for _, s := range o.slopes {
		for _, f := range o.families {
			if tiles := f.Tiles(s); tiles.Cmp(big.NewInt(maxTiles)) > 0 {
				return fmt.Errorf("slope %v in family %v: its snake graph has %s tiles, at most %d make a clear picture; %w",
					s, f, digits(tiles), maxTiles, errUsage)
			}
		}
	}
	return nil
}

func orElse(text, otherwise string) string {
	if text == "" {
		return otherwise
	}
	return text
}

func printHelp(flags *flag.FlagSet, w io.Writer) {
	fmt.Fprint(w, "gallery [flags]\n\nA page of pictures of snake graphs. Without weights and slopes: an invented demonstration.\n\n")
	flags.SetOutput(w)
	flags.PrintDefaults()
}
