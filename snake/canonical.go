package snake

import (
	"slices"

	"example.com/onecusp/contfrac"
)

// Canonical returns the word that stands for the graph however it lies: of the
// word, its reversal, and both with the letters exchanged, the first in
// lexicographic order with L before R. It returns false for the single edge,
// which has no word. Cost: O(runs).
//
// Turning a snake graph round reverses the word; reflecting it in a diagonal
// exchanges the letters. Up to 6 tiles, where all pairs were searched, graphs
// with different canonical words are not isomorphic as plain graphs either.
func (g Graph) Canonical() (contfrac.Word, bool) {
	w, ok := g.Word()
	if !ok {
		return w, false
	}
	return earlier(startingL(w), startingL(w.Reverse())), true
}

// Isomorphic reports whether two graphs have the same shape up to moving and
// reflecting. Labels do not matter.
func (g Graph) Isomorphic(h Graph) bool {
	v, hasV := g.Canonical()
	w, hasW := h.Canonical()
	return hasV == hasW && v == w
}

// startingL exchanges the letters if that makes the first one L.
func startingL(w contfrac.Word) contfrac.Word {
	if first, ok := w.First(); ok && first == contfrac.R {
		return w.Swap()
	}
	return w
}

// earlier returns the lexicographically first of two words of one length that
// start with the same letter.
func earlier(v, w contfrac.Word) contfrac.Word {
	a, b := v.Fraction().Terms(), w.Fraction().Terms()
	for i := range min(len(a), len(b)) {
		if c := a[i].Cmp(b[i]); c != 0 {
			// Where the shorter run ends the other letter follows: L's want to
			// be many, R's few.
			if (c > 0) == (i%2 == 0) {
				return v
			}
			return w
		}
	}
	return v
}

// Canonical returns the cyclic word that stands for the band wherever it is cut
// and however it lies: it starts with a whole run of L's, and among all
// rotations of its run lengths, forwards and backwards, its own come first in
// lexicographic order. It returns the empty word for the zero value. Cost:
// O(runs).
func (b Band) Canonical() contfrac.Word {
	if b.run.IsEmpty() {
		return b.run
	}
	// A rotation that starts at a run boundary has an even number of runs; where
	// the cut went through a run its two parts are joined.
	w := b.run
	first, _ := w.First()
	if last, _ := w.Last(); first == last {
		w = rotateFirstRun(w)
	}
	runs := w.Fraction().Terms()
	back := slices.Clone(runs)
	slices.Reverse(back)
	least := leastRotation(runs)
	if other := leastRotation(back); slices.CompareFunc(other, least, cmpInt) < 0 {
		least = other
	}
	var out contfrac.WordBuilder
	letter := contfrac.L
	for _, a := range least {
		_ = out.AppendBig(letter, a) // run lengths are positive
		letter = letter.Other()
	}
	return out.Word()
}

// Isomorphic reports whether two bands have the same cyclic word up to
// rotation, reversal and exchange of the letters. Labels do not matter.
func (b Band) Isomorphic(o Band) bool { return b.Canonical() == o.Canonical() }

// rotateFirstRun moves the first run behind the last.
func rotateFirstRun(w contfrac.Word) contfrac.Word {
	var head, tail contfrac.WordBuilder
	i := 0
	for l, n := range w.Runs() {
		if i == 0 {
			_ = head.AppendBig(l, n) // run lengths are positive
		} else {
			_ = tail.AppendBig(l, n)
		}
		i++
	}
	return tail.Word().Concat(head.Word())
}
