package cli

import (
	"sync"
	"time"

	"github.com/schollz/progressbar/v3"
)

// progress shows how far a long calculation is, on a terminal only and not in its first second.
type progress struct {
	mu      sync.Mutex
	a       *app
	says    string
	started time.Time
	bar     *progressbar.ProgressBar
}

const (
	patience = time.Second // what is over sooner needs no bar
	parts    = 1000
)

// progress starts one; its done is handed to the calculation.
func (a *app) progress(says string) *progress {
	return &progress{a: a, says: says, started: time.Now()}
}

// done notes the share that is done, 0 to 1; it may be called from anywhere.
func (p *progress) done(share float64) {
	if p.a.opt.quiet || !p.a.ErrTerm {
		return
	}
	p.mu.Lock()
	defer p.mu.Unlock()
	if p.bar == nil {
		if time.Since(p.started) < patience {
			return
		}
		p.bar = progressbar.NewOptions(parts,
			progressbar.OptionSetWriter(p.a.Err), progressbar.OptionSetDescription(p.says), progressbar.OptionSetPredictTime(true),
			progressbar.OptionSetWidth(30), progressbar.OptionThrottle(100*time.Millisecond), progressbar.OptionClearOnFinish())
	}
	p.bar.Set(int(share * parts))
}

// end takes the bar away.
func (p *progress) end() {
	p.mu.Lock()
	defer p.mu.Unlock()
	if p.bar != nil {
		p.bar.Clear()
		p.bar = nil
	}
}
