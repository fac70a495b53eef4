package orbifold

import (
	"fmt"
	"math/big"
	"math/rand"
	"testing"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/farey"
)

// BenchmarkJumpLength compares stepping and jumping a run of n flips: exact,
// about a number of the size given, and modulo 256 bits and a word.
// exactJumps and residueJumps are the lengths where the two meet.
func BenchmarkJumpLength(b *testing.B) {
	defer func(n, m jumpFrom) { exactJumps, residueJumps = n, m }(exactJumps, residueJumps)
	big256 := new(big.Int).Lsh(big.NewInt(1), 256)
	for _, n := range []uint64{4, 6, 8, 12, 16, 24, 32, 48, 64} {
		for _, f := range []Family{{}, MustNew(1, 0, 2)} {
			for _, way := range []string{"step", "jump"} {
				at := jumpFrom{1, 1}
				if way == "step" {
					at = jumpFrom{1 << 63, 1 << 63}
				}
				exactJumps, residueJumps = at, at
				for _, depth := range []uint64{1, 12, 20} { // flips before
					var w contfrac.WordBuilder
					letter := contfrac.L
					for range depth {
						w.Append(letter, 1)
						letter = letter.Other()
					}
					w.Append(letter, n)
					last := farey.NewPath(farey.Infinity, w.Word())
					b.Run(fmt.Sprintf("%v/last/depth%d/%d/%s", f, depth, n, way), func(b *testing.B) {
						x := f.exact()
						for b.Loop() {
							x.newest(last, always)
						}
					})
					w.Append(letter.Other(), 1)
					p := farey.NewPath(farey.Infinity, w.Word())
					b.Run(fmt.Sprintf("%v/exact/depth%d/%d/%s", f, depth, n, way), func(b *testing.B) {
						x := f.exact()
						for b.Loop() {
							x.newest(p, always)
						}
					})
				}
				// One path with many runs of this length.
				var w contfrac.WordBuilder
				for i := range 100 {
					w.Append([2]contfrac.Letter{contfrac.L, contfrac.R}[i&1], n)
				}
				p := farey.NewPath(farey.Infinity, w.Word())
				b.Run(fmt.Sprintf("%v/256bits/%d/%s", f, n, way), func(b *testing.B) {
					for b.Loop() {
						newRule(f, ring[*big.Int](newResidues(big256)), residueJumps).newest(p, always)
					}
				})
				b.Run(fmt.Sprintf("%v/word/%d/%s", f, n, way), func(b *testing.B) {
					for b.Loop() {
						f.numberMod64(p, Primes()[0])
					}
				})
			}
		}
	}
}

// TestNumbersDoNotDependOnTheJumpLength runs with the thresholds forced to
// their least and to infinity.
func TestNumbersDoNotDependOnTheJumpLength(t *testing.T) {
	defer func(n, m jumpFrom) { exactJumps, residueJumps = n, m }(exactJumps, residueJumps)
	r := rand.New(rand.NewSource(11))
	m := new(big.Int).Lsh(big.NewInt(3), 70)
	for range 200 {
		f := MustNew(r.Int63n(3), r.Int63n(3), r.Int63n(3))
		var w contfrac.WordBuilder
		for range r.Intn(4) {
			w.Append(contfrac.Letter(r.Intn(2)), uint64(r.Intn(40)))
		}
		s, _ := farey.NewPath(farey.Class(r.Intn(3)), w.Word()).Slope()
		var want *big.Int
		for _, n := range []uint64{0, 1, 2, 3, 7, 1 << 63} {
			exactJumps, residueJumps = jumpFrom{n, n}, jumpFrom{n, n}
			got, err := f.Number(s)
			if err != nil {
				t.Fatal(err)
			}
			if want == nil {
				want = got
			}
			reduced, err := f.NumberMod(s, m)
			if err != nil {
				t.Fatal(err)
			}
			word := f.numberMod64(s.Path(), 97)
			if got.Cmp(want) != 0 || reduced.Cmp(new(big.Int).Mod(want, m)) != 0 || word != new(big.Int).Mod(want, big.NewInt(97)).Uint64() {
				t.Fatalf("%v at %v with jumps from %d: %v, %v, %v; want %v", f, s, n, got, reduced, word, want)
			}
		}
	}
}
