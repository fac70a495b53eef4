package farey_test

import (
	"fmt"
	"testing"

	"example.com/onecusp/farey"
)

// digits makes a slope whose terms have about n digits.
func digits(b *testing.B, n int) farey.Slope {
	size := n*1000/2408 + 1
	s, err := farey.New(stretch(1, size), stretch(2, size))
	if err != nil {
		b.Fatal(err)
	}
	return s
}

func BenchmarkPath(b *testing.B) {
	for _, n := range []int{5, 15, 100, 1000, 10000, 100000} {
		s := digits(b, n)
		b.Run(fmt.Sprintf("digits=%d", n), func(b *testing.B) {
			for b.Loop() {
				s.Path()
			}
		})
	}
}

func BenchmarkPathEdge(b *testing.B) {
	for _, n := range []int{5, 15, 1000, 100000} {
		p := digits(b, n).Path()
		b.Run(fmt.Sprintf("digits=%d", n), func(b *testing.B) {
			for b.Loop() {
				p.Edge()
			}
		})
	}
}

// BenchmarkNew measures the reduction of a fraction, the greater part of Parse.
func BenchmarkNew(b *testing.B) {
	for _, n := range []int{5, 15, 100, 1000, 10000, 100000} {
		s := digits(b, n)
		p, q := s.Num(), s.Den()
		b.Run(fmt.Sprintf("digits=%d", n), func(b *testing.B) {
			for b.Loop() {
				if _, err := farey.New(p, q); err != nil {
					b.Fatal(err)
				}
			}
		})
	}
}

func BenchmarkCmp(b *testing.B) {
	for _, n := range []int{5, 15, 1000} {
		s := digits(b, n)
		t, _, err := s.Parents()
		if err != nil {
			b.Fatal(err)
		}
		b.Run(fmt.Sprintf("digits=%d", n), func(b *testing.B) {
			for b.Loop() {
				s.Cmp(t)
			}
		})
	}
}

func BenchmarkFlip(b *testing.B) {
	for _, n := range []int{5, 1000} {
		t := digits(b, n).Path().Triangle()
		b.Run(fmt.Sprintf("digits=%d", n), func(b *testing.B) {
			for b.Loop() {
				t.Flip(farey.One)
			}
		})
	}
}

// perItem reports the time of one item of an iterator.
func perItem(b *testing.B, items int) {
	b.ReportMetric(float64(b.Elapsed().Nanoseconds())/float64(b.N)/float64(items), "ns/item")
}

func BenchmarkCrossings(b *testing.B) {
	crossings, err := farey.MustParse("271828/314159").Crossings()
	if err != nil {
		b.Fatal(err)
	}
	items := 0
	for b.Loop() {
		items = 0
		for range crossings {
			items++
		}
	}
	perItem(b, items)
}

func BenchmarkSequence(b *testing.B) {
	sequence, err := farey.Sequence(1000)
	if err != nil {
		b.Fatal(err)
	}
	items := 0
	for b.Loop() {
		items = 0
		for range sequence {
			items++
		}
	}
	perItem(b, items)
}

func BenchmarkChristoffel(b *testing.B) {
	s := farey.MustParse("271828/314159")
	for b.Loop() {
		if _, err := s.Christoffel(); err != nil {
			b.Fatal(err)
		}
	}
	perItem(b, 271828+314159)
}

func BenchmarkParse(b *testing.B) {
	for _, n := range []int{5, 1000, 100000} {
		text := digits(b, n).String()
		b.Run(fmt.Sprintf("digits=%d", n), func(b *testing.B) {
			for b.Loop() {
				if _, err := farey.Parse(text); err != nil {
					b.Fatal(err)
				}
			}
		})
	}
}
