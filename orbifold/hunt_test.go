package orbifold

import (
	"context"
	"math/big"
	"runtime"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"example.com/onecusp/farey"
)

// A hunt that is far from its end, or will never reach it, must not take memory
// all the while: what it holds grows like the logarithm of the window's end.

func farHunt(t *testing.T, f Family) *hunt {
	x := big.NewFloat(1e8)
	h, ok := newHunt(f, x, x)
	require.True(t, ok)
	return h
}

func TestStackOfAHuntStaysShort(t *testing.T) {
	for _, f := range []Family{{}, MustNew(2, 0, 1), MustNew(1<<39, 0, 0)} {
		h := farHunt(t, f)
		for _, c := range classes {
			a, b := firstEdge(c)
			var base [3]prey
			for _, d := range classes {
				p, q, _ := d.Slope().Int64s()
				base[d] = prey{1, 0, d, p, q}
			}
			e := trail{a: base[a], b: base[b], c: base[c], inside: true}
			if c == farey.One {
				e.a.p = -1
			}
			stack, longest := []trail{e}, 0
			for range 20000 {
				e := stack[len(stack)-1]
				stack = h.visit(stack[:len(stack)-1], &e, func(farey.Slope) {})
				if len(stack) == 0 {
					break
				}
				longest = max(longest, len(stack))
			}
			assert.Less(t, longest, 200, "family %v behind class %v", f, c)
		}
	}
}

func TestDeepOfAHuntIsShallow(t *testing.T) {
	h := farHunt(t, Family{})
	ctx, cancel := context.WithCancel(context.Background())
	cancel() // asked at every 4096th step only
	grown := make(chan uint64)
	go func() {
		w := worker{hunt: h, ctx: ctx, found: func(farey.Slope) {}}
		var before, after runtime.MemStats
		runtime.ReadMemStats(&before)
		l := h.scaled(exactBelow)
		w.deep(l, l, 1, 40, 1, 41)
		w.stopped = false
		w.deep(l, 100*l, 1, 40, 1, 4100)
		runtime.ReadMemStats(&after)
		grown <- after.StackInuse - before.StackInuse
	}()
	assert.Less(t, int64(<-grown), int64(128<<10), "bytes of stack")
}
