package study

import "headfall/network"

// SizeResult is what size gives back: SI units, unit in the key.
type SizeResult struct {
	Schema   int              `json:"schema"`
	Command  string           `json:"command"`
	Scenario network.Scenario `json:"scenario"`
	Ending
	Found    bool            `json:"found"`
	Name     string          `json:"name"`
	Unit     string          `json:"unit_si"`
	Looking  string          `json:"looking_for"` // largest | smallest
	Value    *float64        `json:"value_si"`    // rounded to the side that holds, and run again with the doubts
	As       string          `json:"as_written"`
	Edge     *float64        `json:"edge_si"` // where the plain run, without doubts, ceases to hold
	EdgeAs   string          `json:"edge_as_written"`
	Beyond   string          `json:"beyond"` // what does not hold past the edge
	Holds    [][2]float64    `json:"holds_si"`
	HoldsAs  []string        `json:"holds_as_written"`
	Next     string          `json:"next_step_fails"` // why the next step is not taken
	NextAs   string          `json:"next_step"`
	Verdict  network.Verdict `json:"verdict"` // of the plan at the value
	Tightest *Margin         `json:"smallest_margin"`
	Scan     []Tried         `json:"scan"`
	Work     struct {
		Runs   int `json:"runs"`
		Judged int `json:"judged"`
	} `json:"work"`

	Result *network.Result `json:"-"` // of the judgement at the value
	step   float64
}

// Margin is what a limit has in hand.
type Margin struct {
	Limit string   `json:"limit"`
	SI    *float64 `json:"margin_si"`
	Low   *float64 `json:"margin_low_si"`
	Unit  string   `json:"unit_si"`

	Of *network.LimitResult `json:"-"`
}

// Tried is one value that was tried without doubts.
type Tried struct {
	Value float64 `json:"value_si"`
	Holds bool    `json:"holds"`
	Why   string  `json:"why_not"`
	Share float64 `json:"margin_share"` // the smallest margin as a share of its bound
}
