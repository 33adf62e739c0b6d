package study

import "headfall/network"

// Head is what every study says about itself: which program, which plan, and how it was asked for. Two parts of one study have the same head to the
// byte, whatever machine made them.
type Head struct {
	Schema   int              `json:"schema"`
	Command  string           `json:"command"`
	Program  network.Program  `json:"program"`
	Scenario network.Scenario `json:"scenario"`
	Show     Show             `json:"show"`
	Asked    Asked            `json:"asked"`
}

// Show is the display units of the file.
type Show struct {
	Level    string `json:"level"`
	Flow     string `json:"flow"`
	Volume   string `json:"volume"`
	Pressure string `json:"pressure"`
}

// Asked is what a study was asked for.
type Asked struct {
	Set       []string `json:"set"`
	Method    string   `json:"method"`
	Tolerance float64  `json:"tolerance"`
	MaxSteps  int      `json:"max_steps"`
	Samples   int      `json:"samples,omitempty"`
	Seed      int64    `json:"seed,omitempty"`
	Pairs     bool     `json:"pairs,omitempty"`
	Late      float64  `json:"late_s,omitempty"`
	Early     float64  `json:"early_s,omitempty"`
}

func headOf(command string, p *network.Plant, r *network.Result, asked Asked) Head {
	if asked.Set == nil {
		asked.Set = []string{}
	}
	return Head{Schema: 1, Command: command, Program: r.Program, Scenario: r.Scenario,
		Show: Show{p.Show.Level, p.Show.Flow, p.Show.Volume, p.Show.Pressure}, Asked: asked}
}

// Common are the options of studies that are made of many cases.
type Common struct {
	Set       []string // as given on the command line; only repeated in what is given back
	Workers   int
	Method    string
	Tolerance float64
	MaxSteps  int
	Shard     Shard
	Progress  func(share float64)
}

func (c *Common) runner(load Load) *Runner {
	return &Runner{Load: load, Model: network.Options{Method: c.Method, Tolerance: c.Tolerance, MaxSteps: c.MaxSteps}, Workers: c.Workers}
}

func (c *Common) asked() Asked {
	return Asked{Set: c.Set, Method: c.Method, Tolerance: c.Tolerance, MaxSteps: c.MaxSteps}
}
