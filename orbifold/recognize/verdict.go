package recognize

import "fmt"

// Verdict is the kind of an answer.
type Verdict uint8

const (
	// Undecided: there are not enough terms to decide.
	Undecided Verdict = iota
	// Found: there is an answer, and it is complete.
	Found
	// None: it is proved that there is no answer.
	None
)

// String returns "not enough terms to decide", "found" or "none"; for what is
// no verdict, "Verdict(7)".
func (v Verdict) String() string {
	switch v {
	case Undecided:
		return "not enough terms to decide"
	case Found:
		return "found"
	case None:
		return "none"
	}
	return fmt.Sprintf("Verdict(%d)", uint8(v))
}
