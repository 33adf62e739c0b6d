package study

import (
	"headfall/network"
)

// TrackResult is what track gives back: SI units, unit in the key.
type TrackResult struct {
	Schema   int              `json:"schema"`
	Command  string           `json:"command"`
	Scenario network.Scenario `json:"scenario"`
	Ending
	Pace     string                    `json:"pace"` // on_plan | slow | fast | not_moving | not_known
	Ratio    *float64                  `json:"rate_ratio"`
	By       string                    `json:"rate_of"` // vessel that the pace is taken from
	Now      float64                   `json:"now_s"`
	Clock    *string                   `json:"now"`
	Vessels  map[string]*TrackedVessel `json:"vessels"`
	Fitted   []FittedOutlet            `json:"fitted"`
	Forecast Forecast                  `json:"forecast"`
	Suspects []string                  `json:"suspects"`
	Done     []string                  `json:"steps_taken_as_done"`
	Rows     []TrackedReading          `json:"rows"`

	Plant  *network.Plant  `json:"-"`
	Result *network.Result `json:"-"` // of the forecast
}

// TrackedVessel is one vessel that was read.
type TrackedVessel struct {
	Readings  int      `json:"readings"`
	FirstAt   float64  `json:"first_at_s"`
	First     float64  `json:"first_m"`
	LastAt    float64  `json:"last_at_s"`
	Last      float64  `json:"last_m"`
	Plan      float64  `json:"planned_m"`  // by the plan, at the last reading
	Expected  float64  `json:"expected_m"` // by the plan run on from the first reading
	RateRatio *float64 `json:"rate_ratio"` // volume lost over volume expected to be lost

	early, late *float64
}

// FittedOutlet is a coefficient that was changed so that a vessel drains as it was read to.
type FittedOutlet struct {
	Name   string  `json:"name"`
	Line   string  `json:"line"`
	Vessel string  `json:"vessel"`
	From   float64 `json:"from_si"`
	To     float64 `json:"to_si"`
	Factor float64 `json:"factor"`
	Met    bool    `json:"met"` // the reading is met with it
}

// Forecast is the plan judged from the last reading on.
type Forecast struct {
	Verdict  network.Verdict       `json:"verdict"`
	Why      string                `json:"why"`
	FailsAt  *float64              `json:"first_fail_at_s"`
	Finish   *float64              `json:"finish_s"`
	Low      *float64              `json:"finish_low_s"`
	High     *float64              `json:"finish_high_s"`
	Planned  *float64              `json:"planned_finish_s"`
	Emptied  map[string]*float64   `json:"emptied_at_s"`
	Tightest *Margin               `json:"smallest_margin"`
	Limits   []network.LimitResult `json:"limits"`
}

// TrackedReading is one reading beside the plan.
type TrackedReading struct {
	Time     float64 `json:"time_s"`
	Clock    *string `json:"clock"`
	Vessel   string  `json:"vessel"`
	Read     float64 `json:"read_m"`
	Expected float64 `json:"expected_m"`
	Off      float64 `json:"difference_m"`
	Text     string  `json:"as_written"`
}

func newTrackResult(t *tracking) *TrackResult {
	return &TrackResult{Schema: 1, Command: "track", Ending: Ending{ExitCode: 3}, Scenario: scenarioOf(t.plant), Now: t.now, Clock: clockOf(t.plant, t.now), Pace: "not_known",
		Vessels: map[string]*TrackedVessel{}, Fitted: []FittedOutlet{}, Suspects: []string{}, Done: []string{}, Rows: []TrackedReading{}, Plant: t.plant,
		Forecast: Forecast{Verdict: network.NotJudged, Emptied: map[string]*float64{}, Limits: []network.LimitResult{}}}
}
