package export

import (
	"math"
	"strconv"
	"time"

	"headfall/elements"
	"headfall/network"
)

// Column is one series of a result.
type Column struct {
	Tag, What, Unit string // T-1, level, m
	Values          []float64
}

// Columns returns the series of r in the order of the plant: vessels, then lines with their parts, then tees.
func Columns(plant *network.Plant, r *network.Result) []Column {
	var all []Column
	s := r.Series
	if s == nil {
		return nil
	}
	add := func(m map[string][]float64, tag, what, unit string) {
		if v, ok := m[tag]; ok {
			all = append(all, Column{tag, what, unit, v})
		}
	}
	for _, v := range plant.Vessels {
		add(s.Level, v.Tag, "level", "m")
		add(s.Volume, v.Tag, "volume", "m3")
		add(s.Gas, v.Tag, "gas", "pa_g")
	}
	for _, l := range plant.Lines {
		add(s.Flow, l.Tag, "flow", "m3_s")
		add(s.Crest, l.Tag, "crest", "m")
	}
	for _, tag := range Movers(plant) {
		add(s.Opening, tag, "opening", "")
		add(s.Running, tag, "running", "")
	}
	for _, t := range plant.Tees {
		if v, ok := s.TeeHead[t.Tag]; ok {
			all = append(all, Column{t.Tag, "head", "m", gaps(v)})
		}
	}
	return all
}

// Name is the heading of the column: T-1.level_m.
func (c Column) Name() string {
	if c.Unit == "" {
		return c.Tag + "." + c.What
	}
	return c.Tag + "." + c.What + "_" + c.Unit
}

// Movers returns the tags of everything in the lines that opens, shuts, starts or stops, in the order of the plant.
func Movers(plant *network.Plant) []string {
	var tags []string
	for _, l := range plant.Lines {
		for _, f := range l.Parts {
			if a, ok := f.Part.(elements.Actuated); ok && a.Actuator() != nil {
				tags = append(tags, a.Actuator().Tag)
			}
			if p, ok := f.Part.(elements.Pumps); ok && p.Drive() != nil {
				tags = append(tags, p.Drive().Tag)
			}
			if h, ok := f.Part.(elements.Humps); ok && h.Crown() != nil && h.Crown().Vent.Given {
				tags = append(tags, h.Crown().Vent.Tag)
			}
		}
	}
	return tags
}

func gaps(v []*float64) []float64 {
	out := make([]float64, len(v))
	for i, p := range v {
		if out[i] = math.NaN(); p != nil {
			out[i] = *p
		}
	}
	return out
}

// number writes v with all its digits; what is not finite is an empty cell.
func number(v float64) string {
	if math.IsNaN(v) || math.IsInf(v, 0) {
		return ""
	}
	if v == 0 {
		v = 0 // there is one zero
	}
	return strconv.FormatFloat(v, 'g', -1, 64)
}

// Clock returns the wall clock s seconds after start as 2027-10-09T06:05:00, with milliseconds when they are not zero; "" without a start.
func Clock(start time.Time, s float64) string {
	if start.IsZero() || math.IsNaN(s) || math.Abs(s) > 9e9 {
		return ""
	}
	t := start.Add(time.Duration(math.Round(s*1000)) * time.Millisecond)
	if t.Nanosecond() != 0 {
		return t.Format("2006-01-02T15:04:05.000")
	}
	return t.Format("2006-01-02T15:04:05")
}
