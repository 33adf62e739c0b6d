package study

// Ending is how a study came to its end; every answer carries it.
type Ending struct {
	ExitCode int    `json:"exit_code"`
	Complete bool   `json:"complete"`
	Trouble  string `json:"trouble,omitempty"` // why it is not complete
}

// Exit is the exit code.
func (e *Ending) Exit() int { return e.ExitCode }

// Outcome is how a study of many cases came to its end.
type Outcome struct {
	ExitCode int    `json:"exit_code"`
	Complete bool   `json:"complete"`
	Stopped  string `json:"stopped_because"` // done | interrupted | failed
	Trouble  string `json:"trouble,omitempty"`
}

// outcomeOf begins an outcome: of all cases, or of those that were done.
func outcomeOf(complete bool) Outcome {
	if complete {
		return Outcome{Complete: true, Stopped: "done"}
	}
	return Outcome{Stopped: "interrupted"}
}

// Halt marks an answer that did not come to its end.
func (o *Outcome) Halt(stopped, why string, exit int) { *o = Outcome{exit, false, stopped, why} }

// End marks an answer that did not come to its end.
func (e *Ending) End(exit int, why string) { e.ExitCode, e.Complete, e.Trouble = exit, false, why }
