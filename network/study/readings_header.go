package study

import (
	"fmt"
	"strings"

	"headfall/elements/quantity"
	"headfall/network"
)

// header reads the first line: what each column is, and in which unit.
func (in *readingsReader) header(record []string, row int) {
	word, unit := named(record[0])
	if !strings.EqualFold(word, "time") {
		in.fault(row, "the first column is %q; the header begins with time, as in: time,T-1 [m]", word)
		return
	}
	if in.unit = unit; unit != "" {
		if _, err := quantity.Convert(0, quantity.Time, unit); err != nil {
			in.fault(row, "time: %v", err)
		}
	}
	in.columns = []readColumn{}
	seen := map[string]bool{}
	for _, field := range record[1:] {
		tag, unit := named(field)
		col, err := in.column(tag, unit)
		if err != nil {
			in.fault(row, "%v", err)
			continue
		}
		if seen[col.vessel.Tag] {
			in.fault(row, "%s has two columns", col.vessel.Tag)
		}
		seen[col.vessel.Tag] = true
		in.columns = append(in.columns, col)
		in.out.Vessels = append(in.out.Vessels, col.vessel.Tag)
	}
	if len(record) < 2 {
		in.fault(row, "there is no vessel in the header, as in: time,T-1 [m]")
	}
}

// named takes "T-1 [m]" apart.
func named(field string) (tag, unit string) {
	tag, unit, _ = strings.Cut(strings.TrimSpace(field), "[")
	return strings.TrimSpace(tag), strings.TrimSpace(strings.TrimSuffix(strings.TrimSpace(unit), "]"))
}

// column finds the vessel of a column and sees that its unit can be read.
func (in *readingsReader) column(tag, unit string) (readColumn, error) {
	var c readColumn
	var tags []string
	for _, v := range in.plant.Vessels {
		tags = append(tags, v.Tag)
		if v.Tag == tag {
			c.vessel = v
		}
		if v.Gauge != nil && v.Gauge.Tag != "" {
			tags = append(tags, v.Gauge.Tag)
			if v.Gauge.Tag == tag {
				c.vessel, c.gauge = v, true
			}
		}
	}
	if c.vessel == nil {
		return c, fmt.Errorf("there is no vessel or gauge %q; there are %s", tag, strings.Join(tags, ", "))
	}
	c.unit = unit
	switch {
	case unit == "":
		if c.gauge && c.vessel.Gauge.Percent {
			c.unit = "%"
			break
		}
		return c, fmt.Errorf("%s has no unit; write %s [m]", tag, tag)
	case unit == "%":
		if c.vessel.Gauge == nil {
			return c, fmt.Errorf("%s [%%] needs a gauge in the plan: gauge: {zero: 0 m, span: 4 m}", tag)
		}
	}
	if _, err := c.level("1"); err != nil {
		return c, fmt.Errorf("%s [%s]: %v", tag, unit, err)
	}
	return c, nil
}

// level reads one cell, m above the vessel's base. A cell may carry its own unit.
func (c readColumn) level(cell string) (float64, error) {
	if strings.Trim(cell, "0123456789.+-eE") == "" {
		cell += " " + c.unit
	}
	if strings.Contains(cell, "%") {
		v, err := quantity.Parse(cell, quantity.Ratio)
		g := c.vessel.Gauge
		switch {
		case err != nil:
			return 0, err
		case g == nil:
			return 0, fmt.Errorf("%s has no gauge to read %s on", c.vessel.Tag, cell)
		}
		return g.Zero + v.SI*g.Span, nil
	}
	if v, err := quantity.Parse(cell, quantity.Volume); err == nil {
		return c.contents(v.SI)
	}
	v, err := quantity.Parse(cell, quantity.Length)
	if err != nil {
		return 0, err
	}
	if c.gauge {
		v.SI += c.vessel.Gauge.Zero
	}
	return v.SI, nil
}

// contents turns a volume into a level.
func (c readColumn) contents(v float64) (float64, error) {
	if full, _ := c.vessel.Shape.Volume(c.vessel.Shape.Height()); v < 0 || v > full {
		return 0, fmt.Errorf("%.4g m3 is more than %s holds, %.4g m3", v, c.vessel.Tag, full)
	}
	h, _ := c.vessel.Shape.Level(v)
	return h, nil
}

// Of returns the readings of one vessel.
func (r *Readings) Of(tag string) []Reading {
	var list []Reading
	for _, x := range r.List {
		if x.Vessel == tag {
			list = append(list, x)
		}
	}
	return list
}

// Last returns the time of the last reading, s.
func (r *Readings) Last() float64 { return r.List[len(r.List)-1].Time }

// plainFaults checks the readings against the vessels: a level over the rim or far under the floor is a slip of the pen.
func (r *Readings) plainFaults(p *network.Plant) error {
	var faults ReadingFaults
	for _, x := range r.List {
		for _, v := range p.Vessels {
			if v.Tag != x.Vessel {
				continue
			}
			if top := v.Shape.Height(); x.Level > top*1.02+0.05 || x.Level < -0.05 {
				faults = append(faults, fmt.Sprintf("row %d: %s at %s is outside the vessel, 0 to %.4g m", x.Row, x.Vessel, x.Text, top))
			}
		}
		if x.Time < 0 {
			faults = append(faults, fmt.Sprintf("row %d: %s was read before the plan starts", x.Row, x.Vessel))
		}
		if len(faults) >= 20 {
			break
		}
	}
	if len(faults) > 0 {
		return faults
	}
	return nil
}
