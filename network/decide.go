package network

// decide gives the verdict from the limits and the steps. Doubts are weighed by package study, which may turn a run into one that is too close to call.
func (r *Result) decide() {
	r.Verdict = Run
	for _, l := range r.Limits {
		switch l.Verdict {
		case Fails:
			r.Verdict = DoNotRun
		case NotJudged:
			if r.Verdict == Run {
				r.Verdict = NotJudged
			}
		}
	}
	if len(r.unreached) > 0 {
		r.Verdict = DoNotRun
	}
	if !r.Complete && r.Verdict == Run {
		r.Verdict = NotJudged
	}
	r.ExitCode = r.exitCode()
}

// exitCode follows from the verdict and from why the run stopped.
func (r *Result) exitCode() int {
	switch {
	case r.Stopped == "interrupted":
		return 130
	case r.Stopped == "failed":
		return 3
	case r.Verdict == Run:
		return 0
	}
	return 1
}

// Decide works the verdict out again after limits were changed.
func (r *Result) Decide() {
	r.decide()
	if r.Verdict != Run {
		return
	}
	for _, l := range r.Limits {
		if l.Verdict == TooClose {
			r.Verdict = TooClose
			r.ExitCode = r.exitCode()
		}
	}
}
