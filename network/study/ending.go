package study

// Ending is how a study came to its end; every answer carries it.
type Ending struct {
	ExitCode int    `json:"exit_code"`
	Complete bool   `json:"complete"`
	Trouble  string `json:"trouble,omitempty"` // why it is not complete
}

// End marks an answer that did not come to its end.
func (e *Ending) End(exit int, why string) { e.ExitCode, e.Complete, e.Trouble = exit, false, why }
