package contfrac

// LeastRotation returns a normal form of the word read as a cycle: of its rotations that start
// with R and end in L, the one whose run lengths come first in lexicographic order. A word of one
// letter alone, or of none, is returned as it is. Two words are rotations of each other exactly
// when their least rotations are equal. It costs O(r) comparisons of run lengths for r runs, and a
// machine word of memory a run.
func (w Word) LeastRotation() Word {
	if w.runs < 2 {
		return w
	}
	w = w.fromRight()
	// ends[i] is just past run i, and pair i is the runs 2i and 2i+1. Of the two candidates i < j
	// that agree on k pairs, the greater one and the k starts after it are out.
	ends := w.runEnds()
	run := func(i int) string {
		i %= w.runs
		if i == 0 {
			return w.data[:ends[0]]
		}
		return w.data[ends[i-1]:ends[i]]
	}
	pairs := w.runs / 2
	i, j := 0, 1
	for k := 0; j < pairs && k < pairs; {
		c := comparePacked(run(2*(i+k)), run(2*(j+k)))
		if c == 0 {
			c = comparePacked(run(2*(i+k)+1), run(2*(j+k)+1))
		}
		switch {
		case c == 0:
			k++
			continue
		case c > 0:
			i, j = j, max(j+1, i+k+1)
		default:
			j += k + 1
		}
		k = 0
	}
	if i == 0 {
		return w
	}
	at := ends[2*i-1]
	return Word{first: R, runs: w.runs, data: w.data[at:] + w.data[:at]}
}

// fromRight returns a rotation of a word with both letters that starts with R and ends in L.
func (w Word) fromRight() Word {
	if w.first == L {
		end := packedEnd(w.data, 0)
		rest := Word{first: R, runs: w.runs - 1, data: w.data[end:]}
		return rest.Concat(Word{first: L, runs: 1, data: w.data[:end]})
	}
	if w.runs%2 == 0 {
		return w
	}
	start := packedStart(w.data, len(w.data))
	last := Word{first: R, runs: 1, data: w.data[start:]}
	return last.Concat(Word{first: R, runs: w.runs - 1, data: w.data[:start]})
}

// comparePacked compares two packed numbers.
func comparePacked(a, b string) int {
	if len(a) != len(b) {
		return len(a) - len(b)
	}
	for i := len(a) - 1; i >= 0; i-- {
		if a[i] != b[i] {
			return int(a[i]) - int(b[i])
		}
	}
	return 0
}
