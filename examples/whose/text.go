package main

import (
	"fmt"
	"regexp"
	"strings"
)

// text writes the answer for people, with the middle left out of long integers.
func (a answer) text() string {
	var b strings.Builder
	list := strings.Join(a.Integers, ", ")
	switch a.Question {
	case "number":
		fmt.Fprintf(&b, "Numbers: %s\n", list)
		a.writeNumbers(&b)
	case "triple":
		fmt.Fprintf(&b, "Triple: %s at the classes of 0/1, 1/0 and 1/1\n", list)
		a.writeTriple(&b)
	default:
		fmt.Fprintf(&b, "Sequence of %d terms: %s\n", len(a.Integers), list)
		a.writeSequence(&b)
	}
	b.WriteString("\n")
	return long.ReplaceAllStringFunc(b.String(), func(digits string) string {
		return fmt.Sprintf("%s…%s (%d digits)", digits[:12], digits[len(digits)-12:], len(digits))
	})
}

var long = regexp.MustCompile(`[0-9]{41,}`)

func (x family) name() string {
	return fmt.Sprintf("(%d,%d,%d)", x.Weights[0], x.Weights[1], x.Weights[2])
}

// most is the number of families that the text lists.
const most = 12

func (a answer) writeNumbers(b *strings.Builder) {
	fmt.Fprintf(b, "  All families with weights up to %d were searched; the lists of slopes are complete up to symmetry.\n", a.SearchedTo)
	if len(a.Families) == 0 {
		b.WriteString("  None of them carries any of these integers.\n")
		return
	}
	for i, x := range a.Families {
		if i == most {
			fmt.Fprintf(b, "  and %d families more\n", len(a.Families)-most)
			break
		}
		fmt.Fprintf(b, "  %s carries %d of %d", x.name(), x.Carried, len(a.Integers))
		for j, list := range x.Slopes {
			if len(list) > 0 {
				fmt.Fprintf(b, "; %s at %s", a.Integers[j], strings.Join(list, ", "))
				if r := x.Rarity[j]; r >= 1 {
					fmt.Fprintf(b, " (one integer in about 10^%.0f of this size is carried)", r)
				}
			}
		}
		if x.Together {
			b.WriteString("; at slopes that are neighbours of each other")
		}
		b.WriteString("\n")
	}
}

func (a answer) writeTriple(b *strings.Builder) {
	if a.Weights == nil {
		b.WriteString("  They solve (E) for no weights; this is proved.\n")
		return
	}
	fmt.Fprintf(b, "  They solve (E) for these weights and no others: k₀ = %s, k∞ = %s, k₁ = %s\n", a.Weights.Zero, a.Weights.Infinity, a.Weights.One)
	if len(a.Families) == 0 {
		b.WriteString("  None is within the bound of the search, so no slopes are given.\n")
	}
	for _, x := range a.Families {
		fmt.Fprintf(b, "  %s, %s: at the slopes %s, %s, %s\n", x.name(), x.Equation, x.Slopes[0][0], x.Slopes[1][0], x.Slopes[2][0])
	}
}

func (a answer) writeSequence(b *strings.Builder) {
	b.WriteString("  From the terms alone: ")
	if r := a.Recurrence; r.Rule == "" {
		b.WriteString("not enough terms to decide on a recurrence\n")
	} else {
		fmt.Fprintf(b, "%s, confirmed by %d terms more than needed\n", r.Rule, r.Surplus)
		writeRecurrence(b, *r)
	}
	fmt.Fprintf(b, "  Fans: %s\n", a.Fans.Verdict)
	if a.Fans.Reason != "" {
		fmt.Fprintf(b, "    %s\n", a.Fans.Reason)
	}
	if !a.Found && len(a.Fans.Matches) > 0 {
		b.WriteString("    Candidates with small weights, the terms one after the other:\n")
	}
	for i, x := range a.Fans.Matches {
		fmt.Fprintf(b, "  %d. Family (%d,%d,%d), %s\n", i+1, x.Weights[0], x.Weights[1], x.Weights[2], x.Equation)
		if x.FreeWeight != "" {
			fmt.Fprintf(b, "    the number at the centre is 1, so that the weight of the class %s may be any other too\n", x.FreeWeight)
		}
		fmt.Fprintf(b, "    round the slope %s, at the slopes %s\n", x.Centre, strings.Join(x.Slopes, ", "))
		fmt.Fprintf(b, "    proved: %s\n", x.Proved.Rule)
		writeRecurrence(b, x.Proved)
		fmt.Fprintf(b, "    why: %s\n", x.Law)
		if x.Agrees {
			b.WriteString("    the terms alone tell the same recurrence\n")
		}
		fmt.Fprintf(b, "    closed form of neighbouring arcs: %s\n", x.ClosedForm)
		fmt.Fprintf(b, "    neighbouring arcs grow by %s\n", x.Ratio)
		if len(x.Next) > 0 {
			fmt.Fprintf(b, "    next: %s\n", strings.Join(x.Next, ", "))
		}
		for _, line := range x.Checks {
			fmt.Fprintf(b, "    checked: %s\n", line)
		}
	}
}

func writeRecurrence(b *strings.Builder, r recurrence) {
	if len(r.Factors) > 0 {
		fmt.Fprintf(b, "    characteristic polynomial %s = %s\n", r.Characteristic, strings.Join(r.Factors, "·"))
	}
	fmt.Fprintf(b, "    generating function %s\n", r.GeneratingFunction)
}
