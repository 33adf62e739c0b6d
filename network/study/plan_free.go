package study

import (
	"fmt"
	"math"

	"headfall/elements/quantity"
	"headfall/network"
)

// freedom is one number that plan may move, on a grid that people set by: value = origin + k·step, k from low to high.
type freedom struct {
	step         *network.Step
	number       *network.Number
	at           int // its place in the plant's list
	time         bool
	origin, unit float64 // SI
	low, high    int
	first        int // where it stands in the file, rounded to the closed side
	coarse       []int
}

func (f *freedom) value(k int) float64 {
	return math.Round((f.origin+float64(k)*f.unit)*1e9) / 1e9
}

// freedoms lists what is free.
func freedoms(p *network.Plant) ([]freedom, error) {
	var all []freedom
	for _, s := range p.Steps {
		if s.Free == nil {
			continue
		}
		if a := s.Free.At; !math.IsNaN(a[0]) {
			f := freedom{step: s, time: true, unit: 60, coarse: []int{60, 25, 10, 4, 2, 1}}
			if !p.Start.IsZero() {
				f.origin = -float64(p.Start.Second())
			}
			if err := f.span(p, &s.At.S, a); err != nil {
				return nil, err
			}
			all = append(all, f)
		}
		if a := s.Free.To; !math.IsNaN(a[0]) {
			f := freedom{step: s, unit: openingStep, coarse: []int{5, 3, 2, 1, 1, 1}}
			if s.Action != network.MoveValve {
				f.unit = (a[1] - a[0]) / 20
				f.origin = a[0]
			}
			if err := f.span(p, &s.To, a); err != nil {
				return nil, err
			}
			all = append(all, f)
		}
	}
	return all, nil
}

// span finds the number and the ends of its grid.
func (f *freedom) span(p *network.Plant, at *float64, ends [2]float64) error {
	f.at = -1
	for i, n := range p.Numbers {
		if n.At == at {
			f.at, f.number = i, n
		}
	}
	if f.at < 0 {
		return fmt.Errorf("what is free in step %s has no number of its own", f.step.ID)
	}
	if f.unit == 0 {
		f.unit = 1
	}
	f.low = int(math.Ceil((ends[0]-f.origin)/f.unit - 1e-9))
	f.high = int(math.Floor((ends[1]-f.origin)/f.unit + 1e-9))
	if f.low > f.high {
		what := "no whole minute"
		if !f.time {
			what = "no step of 5 %"
		}
		return fmt.Errorf("between the ends of what is free in step %s lies %s", f.step.ID, what)
	}
	f.first = f.clamp(int(math.Floor((*at-f.origin)/f.unit + 1e-9)))
	return nil
}

func (f *freedom) clamp(k int) int { return max(f.low, min(f.high, k)) }

// says writes "HV-2 to 45 %" or "HV-2 at 06:55".
func (f *freedom) says(p *network.Plant, k int) string {
	v := f.value(k)
	if f.time {
		return fmt.Sprintf("%s (%s) at %s", f.step.ID, f.step.Target, momentText(p, v, f.step.At.Clock))
	}
	if f.step.Action == network.MoveValve {
		return fmt.Sprintf("%s (%s) to %s", f.step.ID, f.step.Target, network.Percent(v))
	}
	return fmt.Sprintf("%s (%s) to %s", f.step.ID, f.step.Target, quantity.Format(v, f.number.Dim, unitOf(f.number), 4))
}
