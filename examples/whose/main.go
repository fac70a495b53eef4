// Whose asks whether integers that turned up somewhere are numbers of an exchange
// family, and answers with slopes, families, fans, recurrences and the evidence for them.
//
//	go run ./examples/whose                              # the scenario below
//	go run ./examples/whose 3673                         # which families carry a number, and where
//	go run ./examples/whose 5 13 194                     # for which weights do three numbers solve (E)
//	go run ./examples/whose 3 13 61 291 1393 6673        # of which fans is a sequence a part
//	go run ./examples/whose -as number 5 13 194          # another question than their count suggests
//	go run ./examples/whose -json 1,5,29,169,985,5741    # the answer as JSON
//	go run ./examples/whose -indexed - < table           # lines of an index and a value
//
// One or two integers are taken as numbers, three as a triple at the classes of 0/1,
// 1/0 and 1/1, four and more as a sequence. A single - reads them from standard input.
//
// The exit status is 0 if something was found: a family that carries all the
// numbers, weights for the triple, a fan with the sequence. It is 1 if not, or if
// there are not enough terms to decide; 2 for input that cannot be used; 3 if the time ran out, a limit
// was met or the answer could not be written.
//
// # The scenario
//
// It is invented, as is the person in it, who has no name. Somebody counts the perfect
// matchings of a family of graphs drawn on the back of an envelope and gets
// 3, 13, 61, 291, 1393, 6673. The next drawing, with 31971 matchings if a guess is right, would take
// a whole evening. Is there a law, and does it have a proof? Later 3673 turns up
// without any neighbours, and then the three numbers 1, 3, 13 in one picture.
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
	"slices"
	"strings"
	"time"

	"example.com/onecusp/orbifold/recognize"
)

// The exit statuses.
const (
	statusFound      = 0
	statusNotFound   = 1
	statusBadInput   = 2
	statusUnfinished = 3
)

// scenarioNote and scenario are what is shown when no argument is given.
const scenarioNote = "Demonstration. The story behind these integers is invented: somebody counts matchings by hand and asks\n" +
	"whether the counts follow a law, and where two other finds belong.\n\n"

var scenario = [...]string{"3 13 61 291 1393 6673", "3673", "1 3 13"}

// errUsage marks arguments that cannot be used.
var errUsage = errors.New("see -help")

func main() {
	ctx, stop := signal.NotifyContext(context.Background(), os.Interrupt)
	code := run(ctx, os.Args[1:], os.Stdin, os.Stdout, os.Stderr)
	stop()
	os.Exit(code)
}

// options are the arguments, understood.
type options struct {
	as      string
	weight  int64
	more    int
	json    bool
	lines   bool
	indexed bool
	within  time.Duration
	words   []string
}

// run is the command: it returns the exit status, and says what went wrong in one line.
func run(ctx context.Context, args []string, stdin io.Reader, stdout, stderr io.Writer) int {
	o, err := parseArguments(args, stdout)
	if errors.Is(err, flag.ErrHelp) {
		return statusFound
	}
	found := false
	if err == nil {
		var cancel context.CancelFunc
		ctx, cancel = context.WithTimeout(ctx, o.within)
		defer cancel()
		found, err = produce(ctx, o, stdin, stdout)
	}
	switch {
	case err == nil && found:
		return statusFound
	case err == nil:
		return statusNotFound
	}
	fmt.Fprintln(stderr, "whose:", strings.ReplaceAll(err.Error(), "\n", " "))
	for _, bad := range [...]error{errUsage, recognize.ErrEmpty, recognize.ErrConstant, recognize.ErrNotInteger, recognize.ErrOptions,
		recognize.ErrIndex, recognize.ErrSyntax, recognize.ErrNotPositive} {
		if errors.Is(err, bad) {
			return statusBadInput
		}
	}
	return statusUnfinished
}

func parseArguments(args []string, stdout io.Writer) (options, error) {
	var o options
	flags := flag.NewFlagSet("whose", flag.ContinueOnError)
	flags.SetOutput(io.Discard)
	flags.StringVar(&o.as, "as", "", "what the integers are: number, triple or sequence (by their count unless given)")
	flags.Int64Var(&o.weight, "weight", recognize.DefaultWeight, "the largest `weight` of the families that are searched")
	flags.IntVar(&o.more, "more", 3, "how many further `terms` of a fan to give, at most 1000")
	flags.BoolVar(&o.json, "json", false, "answer as JSON")
	flags.BoolVar(&o.lines, "lines", false, "only write the sequence, with further terms if it is a fan's, as lines of an index and a value")
	flags.BoolVar(&o.indexed, "indexed", false, "standard input has lines of an index and a value")
	flags.DurationVar(&o.within, "within", 5*time.Minute, "give up after this `time`")
	if err := flags.Parse(endOfFlags(args)); err != nil {
		if errors.Is(err, flag.ErrHelp) {
			printHelp(flags, stdout)
			return o, err
		}
		return o, fmt.Errorf("%w; %w", err, errUsage)
	}
	o.words = flags.Args()
	switch {
	case !slices.Contains([]string{"", "number", "triple", "sequence"}, o.as):
		return o, fmt.Errorf("-as %q: want number, triple or sequence; %w", o.as, errUsage)
	case o.more < 0 || o.more > 1000:
		return o, fmt.Errorf("-more %d: want 0 … 1000; %w", o.more, errUsage)
	case o.weight < 1 || o.weight > recognize.MaxWeight:
		return o, fmt.Errorf("-weight %d: want 1 … %d; %w", o.weight, recognize.MaxWeight, errUsage)
	case o.within <= 0:
		return o, fmt.Errorf("-within %v: want a time such as 30s; %w", o.within, errUsage)
	case len(o.words) == 0 && len(args) > 0:
		return o, fmt.Errorf("no integers given; - reads them from standard input; %w", errUsage)
	case o.indexed && !slices.Equal(o.words, []string{"-"}):
		return o, fmt.Errorf("-indexed goes with - for standard input; %w", errUsage)
	}
	return o, nil
}

// endOfFlags marks where the flags end when the first integer is negative: "-3"
// would be taken for a flag otherwise.
func endOfFlags(args []string) []string {
	for i, a := range args {
		if a == "--" || a == "-" || a != "" && a[0] != '-' && i > 0 && !strings.HasPrefix(args[i-1], "-") {
			break
		}
		if len(a) > 1 && a[0] == '-' && '0' <= a[1] && a[1] <= '9' && (i == 0 || !slices.Contains([]string{"-more", "-weight", "--more", "--weight", "-within", "--within"}, args[i-1])) {
			return slices.Insert(slices.Clone(args), i, "--")
		}
	}
	return args
}

func printHelp(flags *flag.FlagSet, w io.Writer) {
	fmt.Fprint(w, "whose [flags] integers…\n\nAre these integers numbers of an exchange family, and where? A single - reads them from\n"+
		"standard input. Without arguments: an invented demonstration.\n\n")
	flags.SetOutput(w)
	flags.PrintDefaults()
}

// produce reads the integers, answers and writes; it tells whether something
// was found.
func produce(ctx context.Context, o options, stdin io.Reader, stdout io.Writer) (bool, error) {
	if len(o.words) == 0 {
		if _, err := io.WriteString(stdout, scenarioNote); err != nil {
			return false, err
		}
		all := true
		for _, text := range scenario {
			o.words = strings.Fields(text)
			found, err := produce(ctx, o, stdin, stdout)
			if err != nil {
				return false, err
			}
			all = all && found
		}
		return all, nil
	}
	s, first, err := read(o, stdin)
	if err != nil {
		return false, err
	}
	a, err := ask(ctx, s, o)
	if err != nil {
		return false, err
	}
	switch {
	case o.lines:
		err = writeLines(stdout, a, s, first)
	case o.json:
		encoder := json.NewEncoder(stdout)
		encoder.SetEscapeHTML(false)
		encoder.SetIndent("", "  ")
		err = encoder.Encode(a)
	default:
		_, err = io.WriteString(stdout, a.text())
	}
	return a.Found, err
}

// read returns the integers and the index of the first one.
func read(o options, stdin io.Reader) (recognize.Sequence, int64, error) {
	if !slices.Equal(o.words, []string{"-"}) {
		s, err := recognize.ParseSequence(strings.Join(o.words, " "))
		return s, 0, err
	}
	if o.indexed {
		return recognize.ReadIndexed(stdin)
	}
	text, err := io.ReadAll(io.LimitReader(stdin, recognize.MaxText+1))
	if err != nil {
		return recognize.Sequence{}, 0, err
	}
	s, err := recognize.ParseSequence(string(text))
	return s, 0, err
}
