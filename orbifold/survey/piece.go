package survey

import (
	"container/heap"
	"slices"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/farey"
)

// piece is a part of a walk: all that is in front of an edge; or, for the piece at
// the top, the base slopes and the slopes in front of the edges that were split.
type piece struct {
	path   farey.Path // to the slope in front of the edge
	edge   edge
	split  []edge // of the top piece
	top    bool
	whole  bool    // the top piece is all there is
	load   float64 // number of slopes, about
	inside int     // order of making, for ties
}

// name is the text of the path, or "top".
func (p *piece) name() string {
	if p.top {
		return "top"
	}
	return p.path.String()
}

// smallest is the load below which a piece is not split any further.
const smallest = 512

// pieces splits the walk into at most n pieces, n ≥ 1, of loads as even as the
// tree allows: again and again the largest one is split at its first slope,
// which goes to the top. The result depends on the region and n alone, and on
// no machine: logarithms are integers, and loads are products and quotients of
// them without sums that one processor could round otherwise than another.
func (w *walker) pieces(n int) []piece {
	_, edges := w.base()
	top := piece{top: true}
	var q pieceQueue
	for i, c := range [...]farey.Class{farey.Infinity, farey.Zero, farey.One} {
		if w.constraints.skip(edges[i].a.v.at, edges[i].b.v.at) {
			continue
		}
		q = append(q, piece{path: farey.NewPath(c, contfrac.Word{}), edge: edges[i], load: w.load(edges[i]), inside: i})
	}
	if n < 4 {
		// Three subtrees and the top are the least split; else there is one piece.
		for _, p := range q {
			top.load += p.load
		}
		top.whole = true
		return []piece{top}
	}
	heap.Init(&q)
	made := len(q)
	// Where constraints cut off one side of each split, splitting makes no more pieces: no
	// more than n splits.
	for len(q) > 0 && len(q)+2 <= n && len(top.split) < n && q[0].load > smallest {
		p := q[0]
		top.split = append(top.split, p.edge)
		front := w.scale.front(p.edge)
		left, right := p.edge.behind(front)
		heap.Pop(&q)
		for i, e := range [...]edge{left, right} {
			if w.constraints.skip(e.a.v.at, e.b.v.at) {
				continue
			}
			moves := p.path.Moves().Concat(letters[i])
			heap.Push(&q, piece{path: farey.NewPath(p.path.First(), moves), edge: e, load: w.load(e), inside: made})
			made++
		}
	}
	top.load = float64(len(top.split) + 3)
	slices.SortFunc(q, func(x, y piece) int { return x.inside - y.inside })
	return append([]piece{top}, q...)
}

var letters = [...]contfrac.Word{word(contfrac.L), word(contfrac.R)}

func word(l contfrac.Letter) contfrac.Word {
	var b contfrac.WordBuilder
	b.Append(l, 1)
	return b.Word()
}

// load estimates the number of slopes in front of an edge: those are the
// primitive vectors m·u + n·w, m, n ≥ 1, in a triangle or box, and 6/π² of all
// vectors are primitive.
func (w *walker) load(e edge) float64 {
	x, y, limit := float64(w.length(e.a)), float64(w.length(e.b)), float64(w.most)
	if w.bound == nil {
		x, y, limit = w.extent(e.a.v.at), w.extent(e.b.v.at), 1
	}
	if w.constraints.skip(e.a.v.at, e.b.v.at) {
		return 0
	}
	if limit-x-y < 0 {
		return 0
	}
	// 3/π² of the square of what is left beside half a cell; one at least for the slope in front.
	rest := limit - float64((x+y)/2)
	return max(float64(0.303963550927013314*float64(rest*rest)/float64(x*y)), 1)
}

// length is f of an arc, by which the fan about it grows.
func (s *scale) length(a *arc) int64 {
	if a.n.BitLen() >= int(s.shift) {
		return a.v.lo
	}
	if a.f == 0 {
		a.f, _ = s.unit(a.n, s.family.Weight(a.v.at.class()))
	}
	return a.f
}

// extent is the size of a vector relative to the box.
func (w *walker) extent(at coords) float64 {
	p := at.p()
	return max(float64(max(p, -p))/float64(w.box.Num+1), float64(at.q())/float64(w.box.Den+1))
}

// run visits the slopes of a piece; false if stopped.
func (w *walker) run(p *piece) bool {
	if !p.top {
		return w.tree(p.edge)
	}
	if !w.start() {
		return false
	}
	if p.whole {
		_, edges := w.base()
		for _, e := range edges {
			if !w.tree(e) {
				return false
			}
		}
		return true
	}
	for _, e := range p.split {
		w.frontOf(e)
		if w.over {
			return false
		}
	}
	return true
}

// pieceQueue is a heap of pieces by load, the largest first, then by age.
type pieceQueue []piece

func (q pieceQueue) Len() int { return len(q) }
func (q pieceQueue) Less(i, j int) bool {
	if q[i].load != q[j].load {
		return q[i].load > q[j].load
	}
	return q[i].inside < q[j].inside
}
func (q pieceQueue) Swap(i, j int) { q[i], q[j] = q[j], q[i] }
func (q *pieceQueue) Push(x any)   { *q = append(*q, x.(piece)) }
func (q *pieceQueue) Pop() any {
	old := *q
	p := old[len(old)-1]
	*q = old[:len(old)-1]
	return p
}
