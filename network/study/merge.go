package study

import (
	"encoding/json"
	"fmt"
	"strings"
)

// Merged is the whole of a study, joined from its parts: one of the two is set.
type Merged struct {
	Drill  *DrillResult
	Spread *SpreadResult
}

// Answer is the one that is set.
func (m *Merged) Answer() any {
	if m.Drill != nil {
		return m.Drill
	}
	return m.Spread
}

// Head is what the study says about itself.
func (m *Merged) Head() *Head {
	if m.Drill != nil {
		return &m.Drill.Head
	}
	return &m.Spread.Head
}

// Outcome is how the study came to its end.
func (m *Merged) Outcome() *Outcome {
	if m.Drill != nil {
		return &m.Drill.Outcome
	}
	return &m.Spread.Outcome
}

// Merge joins the parts of one study. The result is that of one run to the bit. It is an error when a part is missing, given twice, not finished, or of
// another study.
func Merge(parts []*PartFile) (*Merged, error) {
	if err := fit(parts); err != nil {
		return nil, err
	}
	switch command := parts[0].Command; command {
	case "drill":
		p, err := join[DrillHead, DrillUnit](parts)
		if err != nil {
			return nil, err
		}
		for i, u := range p.Units {
			if u.Row == nil && u.Move == nil {
				return nil, fmt.Errorf("unit %d is damaged; make its part again", i)
			}
		}
		return &Merged{Drill: DrillOf(p)}, nil
	case "spread":
		p, err := join[SpreadHead, SpreadUnit](parts)
		if err != nil {
			return nil, err
		}
		for i, u := range p.Units {
			if !u.whole(&p.Head) {
				return nil, fmt.Errorf("sample %d is damaged; make its part again", i)
			}
		}
		return &Merged{Spread: SpreadOf(p)}, nil
	default:
		return nil, fmt.Errorf("%s: parts of %q cannot be joined", parts[0].Name, command)
	}
}

// fit checks that the parts make one whole.
func fit(parts []*PartFile) error {
	if len(parts) == 0 {
		return fmt.Errorf("no part was given")
	}
	first := parts[0]
	have := map[int]string{}
	for _, p := range parts {
		if p.Command != first.Command || p.head != first.head || p.shard.Of != first.shard.Of || p.count != first.count {
			return fmt.Errorf("%s and %s are parts of different studies: %s", first.Name, p.Name, whyDifferent(first, p))
		}
		if other, twice := have[p.shard.Index]; twice {
			return fmt.Errorf("part %d of %d is given twice: %s and %s", p.shard.Index, p.shard.Of, other, p.Name)
		}
		have[p.shard.Index] = p.Name
	}
	var missing []string
	for i := 1; i <= first.shard.Of; i++ {
		if _, ok := have[i]; !ok {
			missing = append(missing, fmt.Sprint(i))
		}
	}
	if len(missing) > 0 {
		return fmt.Errorf("of %d parts these are missing: %s", first.shard.Of, strings.Join(missing, ", "))
	}
	for _, p := range parts {
		if want := p.shard.size(p.count); !p.ended || len(p.units) < want {
			return fmt.Errorf("%s is not finished: it has %d of %d; make part %d of %d again", p.Name, len(p.units), want, p.shard.Index, p.shard.Of)
		}
		for i := range p.units {
			if i < 0 || i >= p.count || i%p.shard.Of != p.shard.Index-1 {
				return fmt.Errorf("%s is damaged: unit %d does not belong to part %d of %d; make it again", p.Name, i, p.shard.Index, p.shard.Of)
			}
		}
	}
	return nil
}

// whyDifferent names what two parts do not have in common.
func whyDifferent(a, b *PartFile) string {
	if a.Command != b.Command {
		return "a " + a.Command + " and a " + b.Command
	}
	if a.shard.Of != b.shard.Of {
		return fmt.Sprintf("%d parts and %d parts", a.shard.Of, b.shard.Of)
	}
	var x, y Head
	json.Unmarshal([]byte(a.head), &x)
	json.Unmarshal([]byte(b.head), &y)
	switch {
	case x.Scenario.SHA256 != y.Scenario.SHA256:
		return "the plant files differ"
	case x.Program != y.Program:
		return "the program's versions differ"
	case fmt.Sprint(x.Asked) != fmt.Sprint(y.Asked):
		return "they were asked for in different ways (--samples, --seed, --set …)"
	}
	return "the plan itself came out differently"
}

// join puts the units together.
func join[H, U any](parts []*PartFile) (*Part[H, U], error) {
	whole := &Part[H, U]{Count: parts[0].count, Units: map[int]U{}}
	if err := json.Unmarshal([]byte(parts[0].head), &whole.Head); err != nil {
		return nil, fmt.Errorf("%s: %w", parts[0].Name, err)
	}
	for _, p := range parts {
		for i, data := range p.units {
			var u U
			if err := json.Unmarshal(data, &u); err != nil {
				return nil, fmt.Errorf("%s: unit %d: %w", p.Name, i, err)
			}
			whole.Units[i] = u
		}
	}
	return whole, nil
}
