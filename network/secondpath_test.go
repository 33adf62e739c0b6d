package network

import (
	"testing"

	"headfall/elements"
)

// valved is a part that is only a valve.
type valved struct {
	elements.Part
	act elements.Actuator
}

func (v *valved) Actuator() *elements.Actuator { return &v.act }

func TestSecondPath(t *testing.T) {
	line := func(tag, from, to, valve string, open float64) *Line {
		return &Line{Tag: tag, From: from, To: to, Parts: []*Fitted{{Part: &valved{act: elements.Actuator{Tag: valve, Open: open}}}}}
	}
	p := &Plant{
		Vessels: []*Vessel{{Tag: "A"}, {Tag: "B"}, {Tag: "C"}},
		Tees:    []*Tee{{Tag: "H"}},
		Outside: []*Outside{{Tag: "X"}},
		Lines:   []*Line{line("1", "A", "H", "V-1", 0), line("2", "B", "H", "V-2", 0), line("3", "H", "X", "V-3", 1), line("4", "H", "C", "V-4", 0)},
		Steps:   []*Step{{ID: "s", Action: MoveValve, Target: "V-1"}},
	}
	p.index()
	for valve, want := range map[string]string{"V-1": "", "V-2": "B to A, X", "V-3": "", "V-4": "A, X to C"} {
		for _, l := range p.Lines {
			if a := l.Parts[0].Part.(*valved).Actuator(); a.Tag == valve {
				if got := p.secondPath(l, a); got != want {
					t.Errorf("%s would open %q, want %q", valve, got, want)
				}
			}
		}
	}
}
