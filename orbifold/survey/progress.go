package survey

import (
	"sync"
	"time"
)

// Progress tells how far a survey is.
type Progress struct {
	Stage   string        // what is being done
	Done    float64       // slopes visited, those of earlier runs included, about
	Total   float64       // slopes to visit, an estimate
	Elapsed time.Duration // of this run
	Rate    float64       // slopes a second in this run
	ETA     time.Duration // time left at that rate; 0 when unknown
}

// meter reports progress.
type meter struct {
	mu     sync.Mutex
	report func(Progress)
	start  time.Time
	last   time.Time
	first  float64
	p      Progress
}

func newMeter(o Options, stage string, done, total float64) *meter {
	now := time.Now()
	return &meter{report: o.Progress, start: now, last: now, first: done, p: Progress{Stage: stage, Done: done, Total: total}}
}

// add notes that more slopes were visited.
func (m *meter) add(slopes float64) {
	m.mu.Lock()
	defer m.mu.Unlock()
	m.p.Done += slopes
	if now := time.Now(); now.Sub(m.last) >= time.Second/4 {
		m.last = now
		m.tell(now)
	}
}

// stage names what is done from now on.
func (m *meter) stage(name string) {
	m.mu.Lock()
	defer m.mu.Unlock()
	m.p.Stage = name
}

// end reports that all is done.
func (m *meter) end() {
	m.mu.Lock()
	defer m.mu.Unlock()
	m.p.Stage, m.p.Done = "done", m.p.Total
	m.tell(time.Now())
}

func (m *meter) tell(now time.Time) {
	if m.report == nil {
		return
	}
	m.p.Elapsed = now.Sub(m.start)
	if s := m.p.Elapsed.Seconds(); s > 0 {
		m.p.Rate = (m.p.Done - m.first) / s
	}
	m.p.ETA = 0
	if m.p.Rate > 0 {
		m.p.ETA = time.Duration(max(m.p.Total-m.p.Done, 0) / m.p.Rate * float64(time.Second))
	}
	m.report(m.p)
}
