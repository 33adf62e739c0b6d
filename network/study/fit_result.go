package study

import (
	"math"

	"headfall/elements/quantity"
	"headfall/network"
)

// Verdicts of a fit.
const (
	Fitted    = "fitted"
	NotApart  = "not_told_apart" // the readings do not tell the numbers apart, or say nothing about one of them
	NotFitted = "not_fitted"     // the search did not end
)

// FitResult is what a fit gives back: SI units, unit in the key.
type FitResult struct {
	Schema   int              `json:"schema"`
	Command  string           `json:"command"`
	Scenario network.Scenario `json:"scenario"`
	Verdict  string           `json:"verdict"`
	Ending
	Values    []*FittedValue     `json:"values"`
	Used      int                `json:"readings_used"`
	Of        int                `json:"readings"`
	Scatter   float64            `json:"scatter_m"`   // standard deviation of the readings used about the fit
	Together  float64            `json:"persistence"` // correlation of residuals that follow one another
	Condition *float64           `json:"condition"`   // of the slopes; from 30 on the numbers cannot be told apart
	Pairs     []Pair             `json:"pairs"`       // of numbers, with their correlation
	Range     map[string]*Tested `json:"tested"`      // of each vessel that was read
	Warnings  []string           `json:"warnings"`
	Rows      []*FittedReading   `json:"rows"`
	Work      struct {
		Runs int `json:"runs"`
	} `json:"work"`
}

// FittedValue is one number that was fitted.
type FittedValue struct {
	Name     string   `json:"name"`
	Unit     string   `json:"unit_si"`
	Value    float64  `json:"value_si"`
	Low      *float64 `json:"low_si"` // 95 % band, from the scatter of the readings; null when they say nothing
	High     *float64 `json:"high_si"`
	LowAll   *float64 `json:"low_with_doubts_si"` // the same with the doubts of the numbers that were not fitted
	HighAll  *float64 `json:"high_with_doubts_si"`
	Was      float64  `json:"was_si"`
	PulledBy []Pull   `json:"pulled_by"` // the doubts that move it most, the first first
	Says     string   `json:"says"`      // as it would be written into the file: "0.668 ± 0.012"

	Dim    quantity.Dim `json:"-"`
	Shown  string       `json:"-"` // unit it is written in
	scaled scaled
	x      float64
	half   float64
}

// Pull is how far the doubt of another number moves a fitted one, SI of the fitted one; signed, for that number's upper end.
type Pull struct {
	Name string  `json:"name"`
	By   float64 `json:"by_si"`
}

// Pair is the correlation of two fitted numbers.
type Pair struct {
	A     string  `json:"a"`
	B     string  `json:"b"`
	Value float64 `json:"correlation"`
}

// Tested is the range of levels and times that readings of a vessel cover.
type Tested struct {
	Low  float64 `json:"low_m"`
	High float64 `json:"high_m"`
	From float64 `json:"from_s"`
	To   float64 `json:"to_s"`
}

// FittedReading is one reading beside what the fitted plant has there.
type FittedReading struct {
	Time   float64 `json:"time_s"`
	Vessel string  `json:"vessel"`
	Read   float64 `json:"read_m"`
	Level  float64 `json:"fitted_m"`
	Weight float64 `json:"weight"` // 1 counts in full, 0 left out
}

// apart is the correlation from which two numbers cannot be told apart, and entangled the condition.
const (
	apart     = 0.95
	entangled = 30
)

// result puts together what least squares found.
func (f *fitter) result(s *solved) *FitResult {
	res := &FitResult{Schema: 1, Command: "fit", Ending: Ending{Complete: true}, Scenario: scenarioOf(f.plant), Of: len(s.r), Scatter: rms(s.r, s.w, len(s.x)),
		Pairs: []Pair{}, Warnings: []string{}, Range: map[string]*Tested{}, Verdict: Fitted}
	b := certaintyOf(s)
	res.Together = b.persistence
	if !math.IsInf(b.condition, 0) {
		res.Condition = &b.condition
	}
	for k := range f.numbers {
		v := newFittedValue(&f.numbers[k], s.x[k], b.half[k])
		res.Values = append(res.Values, v)
		for m := range k {
			if b.correlation != nil {
				res.Pairs = append(res.Pairs, Pair{f.numbers[m].n.Name, v.Name, b.correlation[m][k]})
			}
		}
		if b.dead[k] {
			v.Low, v.High = nil, nil
			res.Verdict = NotApart
		}
	}
	if b.condition > entangled {
		res.Verdict = NotApart
	}
	if !s.settled {
		res.Verdict = NotFitted
	}
	for i, x := range f.opt.Readings.List {
		res.Rows = append(res.Rows, &FittedReading{x.Time, x.Vessel, x.Level, x.Level + s.r[i], s.w[i]})
		if s.w[i] > 0 {
			res.Used++
			res.tested(x)
		}
	}
	res.Work.Runs = f.runs
	return res
}

func newFittedValue(s *scaled, x, half float64) *FittedValue {
	v := &FittedValue{Name: s.n.Name, Unit: quantity.SIUnit(s.n.Dim), Value: s.from(x), Was: *s.n.At, PulledBy: []Pull{}, Dim: s.n.Dim,
		Shown: s.n.Value.Unit, scaled: *s, x: x, half: half}
	if !math.IsInf(half, 0) {
		v.Low, v.High = v.band(half)
	}
	v.Says = v.written()
	return v
}

// band returns the ends of a band of half-width half on the number's scale.
func (v *FittedValue) band(half float64) (low, high *float64) {
	a, b := v.scaled.out(v.x-half), v.scaled.out(v.x+half)
	return &a, &b
}

func (r *FitResult) tested(x Reading) {
	t := r.Range[x.Vessel]
	if t == nil {
		t = &Tested{x.Level, x.Level, x.Time, x.Time}
		r.Range[x.Vessel] = t
	}
	t.Low, t.High = math.Min(t.Low, x.Level), math.Max(t.High, x.Level)
	t.From, t.To = math.Min(t.From, x.Time), math.Max(t.To, x.Time)
}

// rms is the scatter of the readings that count, p numbers being fitted.
func rms(r, w []float64, p int) float64 {
	var sum, n float64
	for i, v := range r {
		sum += w[i] * v * v
		n += w[i]
	}
	return math.Sqrt(sum / math.Max(1, n-float64(p)))
}

// scenarioOf tells which plan an answer is about.
func scenarioOf(p *network.Plant) network.Scenario {
	s := network.Scenario{Title: p.Title, Revision: p.Revision, File: p.File, SHA256: p.SHA256}
	if p.Case != "" {
		c := p.Case
		s.Case = &c
	}
	if !p.Start.IsZero() {
		t := p.Start.Format("2006-01-02T15:04:05")
		s.Start = &t
	}
	return s
}

// Tags lists the vessels that were read, in the order of their tags.
func (r *FitResult) Tags() []string { return sortedKeys(r.Range) }
