package main

import (
	"fmt"
	"io"
	"math/big"
	"time"

	"github.com/schollz/progressbar/v3"

	"example.com/onecusp/orbifold/survey"
)

// bar draws the progress of a survey.
type bar struct {
	w    io.Writer
	bar  *progressbar.ProgressBar
	last survey.Progress
}

func newBar(w io.Writer) *bar { return &bar{w: w} }

// show is called by the survey, by one goroutine at a time.
func (b *bar) show(p survey.Progress) {
	b.last = p
	if b.bar == nil {
		b.bar = progressbar.NewOptions64(int64(p.Total),
			progressbar.OptionSetWriter(b.w),
			progressbar.OptionSetWidth(30),
			progressbar.OptionThrottle(200*time.Millisecond),
			progressbar.OptionSetPredictTime(false), // the survey knows better
			progressbar.OptionSetElapsedTime(false),
		)
	}
	b.bar.Describe(fmt.Sprintf("%-12s %.1f million slopes/s, %v left", p.Stage, p.Rate/1e6, p.ETA.Round(time.Second)))
	_ = b.bar.Set64(min(int64(p.Done), int64(p.Total))) // only drawing can fail
}

func (b *bar) close() {
	if b.bar != nil {
		_ = b.bar.Exit()
		fmt.Fprintln(b.w)
	}
}

// milestones are smaller bounds, for the table of counts.
func milestones(digits int) []*big.Int {
	var list []*big.Int
	for d := 10; d < digits; d *= 10 {
		list = append(list, survey.PowerOfTen(d))
	}
	return list
}
