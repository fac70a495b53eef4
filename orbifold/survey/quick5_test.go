package survey

import (
	"context"
	"testing"
	"time"

	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
)

func TestQuick5(t *testing.T) {
	start := time.Now()
	lo, hi, err := Growth(context.Background(), orbifold.Family{})
	t.Log(lo.Text('g',50), hi.Text('g',50), err, time.Since(start))
	start = time.Now()
	lo, hi, err = Growth(context.Background(), orbifold.MustNew(2,0,1))
	t.Log(lo.Text('g',50), hi.Text('g',50), err, time.Since(start))
	start = time.Now()
	e, err := Ordering{Index: true, Num: 100, Den: 100}.Compare(context.Background(), Directions(12), Options{})
	t.Log(e.Rising, e.AnyRising, e.Falling, e.AnyFalling, err, len(e.Trends), time.Since(start))
	for _, x := range e.Trends { if !x.Rising() && !x.Falling() { t.Log(x.Direction, x.Rises, x.Falls, x.Ties, x.Exceptions[0]) } }
	start = time.Now()
	e, err = Ordering{Index: true, Multiples: true, Num: 60, Den: 60}.Compare(context.Background(), []farey.Point{{X:0,Y:1},{X:1,Y:0},{X:1,Y:-1},{X:1,Y:-2}}, Options{})
	t.Log(err, time.Since(start))
	for _, x := range e.Trends { t.Log(x.Direction, x.Rises, x.Falls, x.Ties) } 
	start = time.Now()
	h, err := Search(context.Background(), Region{Box: &Box{40,40}, All: true, Lines: []Line{{1,1,20}}, Fans: []farey.Slope{farey.MustParse("1/2")}}, func(*Visit) bool { return true }, Options{})
	for _, x := range h { t.Log(x.Slope, x.Certificate.Number(), x.Certificate.Verify()) } 
	t.Log(err, time.Since(start))
}
