package recognize_test

import (
	"math/big"
	"testing"

	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
	"example.com/onecusp/orbifold/recognize"
)

func farPiece(b *testing.B, start int64, n int) recognize.Sequence {
	f := must(orbifold.MustNew(1, 1, 1).Fan(farey.Slope{}, farey.MustParse("1/0")))(b)
	p := progression{must(orbifold.MustNew(1, 1, 1).Fan(farey.Slope{}, f.Slope(big.NewInt(start))))(b), 1}
	return must(recognize.NewSequence(p.terms(b, n)...))(b)
}

func BenchmarkFans(b *testing.B) {
	for _, x := range []struct {
		name  string
		start int64
	}{{"Small", 1}, {"Index1000", 1000}, {"Index10000", 10000}} {
		b.Run(x.name, func(b *testing.B) {
			s := farPiece(b, x.start, 8)
			for b.Loop() {
				must(s.Fans(b.Context(), recognize.Options{}))(b)
			}
		})
	}
}

func BenchmarkRecurrence(b *testing.B) {
	for _, x := range []struct {
		name string
		n    int
	}{{"Terms10", 10}, {"Terms1000", 1000}} {
		b.Run(x.name, func(b *testing.B) {
			s := farPiece(b, 0, x.n)
			for b.Loop() {
				must(s.Recurrence(b.Context()))(b)
			}
		})
	}
}

func BenchmarkWeights(b *testing.B) {
	x, y, z := must(orbifold.MustNew(3, 0, 2).Triple(farey.MustParse("34/89").Path().Triangle()))(b).Numbers()
	for b.Loop() {
		must(recognize.Weights(x, y, z))(b)
	}
}

func BenchmarkFamilies(b *testing.B) {
	n := ints(3673, 4683)
	for b.Loop() {
		must(recognize.Families(b.Context(), n, recognize.Options{}))(b)
	}
}
