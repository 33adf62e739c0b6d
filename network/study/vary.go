package study

import (
	"math"
	"strings"

	"headfall/elements/quantity"
	"headfall/network"
)

// setNumber makes a value the plant's own, with the doubt that goes with it: a doubt that is a share of the value stays that share, one that is
// declared for a height stays as wide as it was. Refresh is for the caller to call.
func setNumber(p *network.Plant, n *network.Number, v float64) {
	old := n.Value.SI
	*n.At, n.Value.SI, n.Value.Text = v, v, ""
	d := &n.Value.Doubt
	if old > 0 && n.Assumed && n.Key != "level" {
		d.Half *= v / old
	}
	if d.Kind == quantity.Uniform {
		d.Low, d.High = d.Low+v-old, d.High+v-old
	}
	for _, s := range p.Steps {
		switch n.At {
		case &s.At.S:
			s.At.Text = momentText(p, v, s.At.Clock)
		case &s.To:
			s.ToText = quantity.Format(v, n.Dim, n.Value.Unit, 4)
		}
	}
}

// momentText writes a moment as a file would: a clock where there is one.
func momentText(p *network.Plant, s float64, clock bool) string {
	if !clock || p.Start.IsZero() {
		return quantity.FormatDuration(s)
	}
	h, m, sec := p.Start.Clock()
	return quantity.FormatClock(s + float64(h*3600+m*60+sec))
}

// with makes a plant that has values of its own.
func with(load Load, names []string, values []float64) Load {
	return func() (*network.Plant, error) {
		p, err := load()
		if err != nil {
			return nil, err
		}
		for i, name := range names {
			for _, n := range p.Numbers {
				if n.Name == name {
					setNumber(p, n, values[i])
				}
			}
		}
		return p, p.Refresh()
	}
}

// opens tells whether a number is the travel of a valve, which people set in steps of 5 %.
func opens(n *network.Number) bool {
	return n.Dim == quantity.Ratio && (n.Key == "to" || n.Key == "open" || n.Key == "normally")
}

const openingStep = 0.05

// stepOf is the step, SI, to which people set a number: 5 % of a valve's travel, a minute, else the 1, 2 or 5 of a power of ten that is a
// twentieth of the value or less, in the unit that it is written in.
func stepOf(n *network.Number, value, from, to float64) float64 {
	switch {
	case opens(n):
		return openingStep
	case n.Dim == quantity.Time:
		return 60
	}
	unit := unitOf(n)
	one, err := quantity.Convert(1, n.Dim, unit)
	if err != nil || n.Dim == quantity.Temperature {
		one = 1
	}
	size := math.Min(math.Abs(value), math.Abs(to-from)) / 20 * one
	if size <= 0 {
		size = math.Abs(to-from) / 20 * one
	}
	power := math.Pow(10, math.Floor(math.Log10(size)+1e-9))
	for _, k := range []float64{5, 2, 1} {
		if k*power <= size*(1+1e-9) {
			return k * power / one
		}
	}
	return power / one
}

// unitOf is the unit that a number is shown in: the file's, per cent for shares.
func unitOf(n *network.Number) string {
	switch {
	case n.Dim == quantity.Ratio && n.Value.Unit == "":
		return "%"
	case n.Value.Unit != "":
		return n.Value.Unit
	}
	return quantity.SIUnit(n.Dim)
}

// shown writes a value of a number for people.
func shown(p *network.Plant, n *network.Number, v float64) string {
	if n.Dim == quantity.Time {
		return momentText(p, v, n.Key == "at" && !p.Start.IsZero())
	}
	if n.Dim.Bare() && n.Dim != quantity.Ratio {
		return trimmed(quantity.Format(v, n.Dim, "", 5))
	}
	return trimmed(quantity.Format(v, n.Dim, unitOf(n), 5))
}

// shownTo is shown with three figures, rounded up or down.
func shownTo(p *network.Plant, n *network.Number, v float64, up bool) string {
	round := math.Floor
	if up {
		round = math.Ceil
	}
	if n.Dim == quantity.Time {
		return shown(p, n, 60*round(v/60))
	}
	unit := unitOf(n)
	one, err := quantity.Convert(1, n.Dim, unit)
	if err != nil || v == 0 || n.Dim == quantity.Temperature {
		return shown(p, n, v)
	}
	step := math.Pow(10, math.Floor(math.Log10(math.Abs(v*one)))-2) / one
	return shown(p, n, round(v/step)*step)
}

// trimmed takes noughts behind the point away: "50.000 %" is "50 %".
func trimmed(s string) string {
	num, unit, found := strings.Cut(s, " ")
	if strings.Contains(num, ".") {
		num = strings.TrimRight(strings.TrimRight(num, "0"), ".")
	}
	if found {
		return num + " " + unit
	}
	return num
}

// ValueOf reads a value for a number of a plant, SI: in the number's own dimension, a moment for a time.
func ValueOf(p *network.Plant, name, text string) (float64, error) {
	n, err := numberNamed(p, name)
	if err != nil {
		return 0, Misuse{err}
	}
	if n.Dim == quantity.Time {
		v, err := MomentOf(p, text)
		return v, misuse(err)
	}
	v, err := quantity.Parse(text, n.Dim)
	return v.SI, misuse(err)
}

func misuse(err error) error {
	if err == nil {
		return nil
	}
	return Misuse{err}
}
