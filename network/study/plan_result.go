package study

import "headfall/network"

// FoundPlan is what plan gives back: SI units, unit in the key.
type FoundPlan struct {
	Schema   int              `json:"schema"`
	Command  string           `json:"command"`
	Scenario network.Scenario `json:"scenario"`
	Ending
	Found     bool            `json:"found"`
	Verdict   network.Verdict `json:"verdict"` // of the plan found, judged with the doubts
	Finish    *float64        `json:"finish_s"`
	Low       *float64        `json:"finish_low_s"` // band, 5 and 95 %
	High      *float64        `json:"finish_high_s"`
	Empties   []string        `json:"empties"` // vessels whose emptying is the finish
	Steps     []PlannedStep   `json:"steps"`
	Binds     []Bind          `json:"binds"`
	Tightest  *Margin         `json:"smallest_margin"`
	Written   Written         `json:"as_written"`
	Fails     []string        `json:"fails"`     // where nothing was found: what could not be met
	Set       []string        `json:"set"`       // as --set of run would have it
	Promising []string        `json:"promising"` // where the search was cut short: the best by then, not judged with the doubts
	Searched  int             `json:"plans_tried"`
	Judged    int             `json:"plans_judged"`

	Result *network.Result `json:"-"`
}

// PlannedStep is one free step as the plan has it.
type PlannedStep struct {
	ID     string   `json:"id"`
	Says   string   `json:"says"`
	At     *float64 `json:"at_s"`
	Clock  *string  `json:"clock"`
	To     *float64 `json:"to"`
	WasAt  *float64 `json:"was_at_s"`
	WasTo  *float64 `json:"was_to"`
	Target string   `json:"target"`
}

// Bind is a move that would end sooner, and what forbids it.
type Bind struct {
	Move   string   `json:"move"`
	Limit  string   `json:"limit"`
	Finish *float64 `json:"finish_s"`
}

// Written is the plan as it stands in the file.
type Written struct {
	Verdict network.Verdict `json:"verdict"`
	Why     string          `json:"why"`
	Finish  *float64        `json:"finish_s"`
}
