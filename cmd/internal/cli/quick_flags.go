package cli

import (
	"fmt"
	"strings"

	"github.com/spf13/pflag"

	"headfall/elements/quantity"
)

// quickFlags describe one vessel and one outlet.
type quickFlags struct {
	diameter, lying, length, width, height, level, until   string
	hole, cd, bore, pipe, roughness, k, kv, drop, outletAt string
	inflow, water, at                                      string

	vessel, outlet string // in words
	err            error
}

func (o *quickFlags) bind(f *pflag.FlagSet) {
	f.SortFlags = false
	for _, x := range []struct {
		to         *string
		name, help string
	}{
		{&o.diameter, "diameter", "inside `LENGTH` across, of an upright cylinder"},
		{&o.lying, "lying", "the cylinder lies, and is of this `LENGTH`; flat ends"},
		{&o.length, "length", "of a box, `LENGTH`"},
		{&o.width, "width", "of a box, `LENGTH`"},
		{&o.height, "height", "of the vessel, `LENGTH`; without it a fifth more than the level"},
		{&o.level, "level", "start level above the floor, `LENGTH`"},
		{&o.until, "until", "`LEVEL` that counts as empty; without it by the outlet"},
		{&o.hole, "hole", "a sharp hole of this diameter, `LENGTH`"},
		{&o.cd, "cd", "discharge coefficient of the hole; without it 0.62"},
		{&o.bore, "bore", "a line of this bore, `LENGTH`"},
		{&o.pipe, "pipe", "`LENGTH` of the line"},
		{&o.roughness, "roughness", "of the line, `LENGTH`; without it 0.05 mm"},
		{&o.k, "k", "sum of loss coefficients of fittings in the line, besides entrance and exit"},
		{&o.kv, "kv", "of a valve in the line, wide open, m3/h"},
		{&o.drop, "drop", "from the vessel's floor down to the line's end, `LENGTH`; without it none"},
		{&o.outletAt, "outlet-at", "height of the outlet's centre above the floor, `LENGTH`; without it in the bottom"},
		{&o.inflow, "inflow", "steady `FLOW` in while it drains"},
		{&o.water, "water", "`TEMPERATURE` of the water; without it 15 °C"},
		{&o.at, "at", "`CLOCK` at which it starts; answers then show the clock"},
	} {
		f.StringVar(x.to, x.name, "", x.help)
	}
}

// of reads a flag and gives its text in plain notation; an empty flag gives what it is without.
func (o *quickFlags) of(flag, text string, dim quantity.Dim, without string) string {
	if text == "" {
		text = without
	}
	v, err := quantity.Parse(text, dim)
	if err != nil {
		o.fail("--"+flag+" "+text, err)
		return ""
	}
	if v.SI < 0 || v.SI == 0 && flag != "drop" && flag != "inflow" && flag != "k" {
		o.fail("--"+flag+" "+text, fmt.Errorf("it must be more than 0"))
	}
	return v.Echo()
}

func (o *quickFlags) fail(what string, err error) {
	if o.err == nil {
		o.err = bad("headfall help quick", "%s: %w", what, err)
	}
}

// plan writes the plant file.
func (o *quickFlags) plan() (string, error) {
	shape, err := o.shape()
	if err != nil {
		return "", err
	}
	parts, err := o.parts()
	if err != nil {
		return "", err
	}
	level := o.of("level", o.level, quantity.Length, "")
	drop, err2 := quantity.Parse(o.of("drop", o.drop, quantity.Length, "0 m"), quantity.Length)
	if err2 != nil {
		o.fail("--drop", err2)
	}
	leaves, z := "", -drop.SI
	if o.outletAt != "" {
		at := o.of("outlet-at", o.outletAt, quantity.Length, "")
		leaves = "\n    leaves: {centre: " + at + "}"
		if h, err := quantity.Parse(at, quantity.Length); err == nil && o.drop == "" {
			z = h.SI
		}
	}
	var b strings.Builder
	fmt.Fprintf(&b, "headfall: 1\ntitle: quick\nrun_for: %d d\nreport_every: 1 h\nliquid: {water: %s}\n", quickDays, o.of("water", o.water, quantity.Temperature, "15 °C"))
	if o.at != "" {
		if _, err := quantity.ParseClock(o.at); err != nil {
			o.fail("--at "+o.at, err)
		}
		fmt.Fprintf(&b, "start: \"2027-01-04 %05s\"\n", o.at)
	}
	fmt.Fprintf(&b, "vessels:\n  VESSEL:\n    shape: {%s}\n    base: 0 m\n    level: %s\n", shape, level)
	if o.until != "" {
		fmt.Fprintf(&b, "    empty_at: %s\n", o.of("until", o.until, quantity.Length, ""))
	}
	if o.inflow != "" {
		fmt.Fprintf(&b, "    inflow: %s\n", o.of("inflow", o.inflow, quantity.Flow, ""))
	}
	fmt.Fprintf(&b, "outside:\n  AIR: {free_fall: {elevation: %s}}\n", quantity.FormatExact(z, quantity.Length, "m"))
	fmt.Fprintf(&b, "lines:\n  LINE:\n    from: VESSEL%s\n    to: AIR\n    parts:\n%s", leaves, parts)
	return b.String(), o.err
}

// shape writes the vessel's shape, and says it in words.
func (o *quickFlags) shape() (string, error) {
	if o.level == "" {
		return "", bad("as --level 3m", "quick needs --level")
	}
	if o.of("level", o.level, quantity.Length, ""); o.err != nil {
		return "", o.err
	}
	height := o.height
	if height == "" {
		if v, err := quantity.Parse(o.level, quantity.Length); err == nil {
			height = quantity.Format(1.2*v.SI, quantity.Length, "m", 6)
		}
	}
	switch {
	case o.diameter != "" && o.lying != "":
		d, l := o.of("diameter", o.diameter, quantity.Length, ""), o.of("lying", o.lying, quantity.Length, "")
		o.vessel = fmt.Sprintf("a lying cylinder %s across, %s long", d, l)
		return fmt.Sprintf("lying_cylinder: {diameter: %s, length: %s}", d, l), o.err
	case o.diameter != "":
		d := o.of("diameter", o.diameter, quantity.Length, "")
		o.vessel = "an upright cylinder " + d + " across"
		return fmt.Sprintf("upright_cylinder: {diameter: %s, height: %s}", d, o.of("height", height, quantity.Length, "")), o.err
	case o.length != "" && o.width != "":
		l, w := o.of("length", o.length, quantity.Length, ""), o.of("width", o.width, quantity.Length, "")
		o.vessel = fmt.Sprintf("a box of %s by %s", l, w)
		return fmt.Sprintf("box: {length: %s, width: %s, height: %s}", l, w, o.of("height", height, quantity.Length, "")), o.err
	}
	return "", bad("as --diameter 2m, or --length 3m --width 2m", "quick needs a vessel")
}

// parts writes the parts of the outlet, and says it in words.
func (o *quickFlags) parts() (text string, err error) {
	switch {
	case o.hole != "" && o.bore != "":
		return "", bad("leave one of them out", "--hole and --bore do not go together")
	case o.hole != "":
		d := o.of("hole", o.hole, quantity.Length, "")
		o.outlet = "a hole of " + d
		return fmt.Sprintf("      - orifice: {diameter: %s, cd: %s}\n", d, o.of("cd", o.cd, quantity.Ratio, "0.62")), o.err
	case o.bore == "":
		return "", bad("as --hole 40mm, or --bore 80mm --pipe 12m", "quick needs an outlet")
	}
	d, l := o.of("bore", o.bore, quantity.Length, ""), o.of("pipe", o.pipe, quantity.Length, "1 m")
	o.outlet = fmt.Sprintf("%s of line, bore %s", l, d)
	text = fmt.Sprintf("      - pipe: {length: %s, bore: %s, roughness: %s}\n", l, d, o.of("roughness", o.roughness, quantity.Length, "0.05 mm"))
	if o.k != "" {
		text += fmt.Sprintf("      - fittings: {k: %s}\n", o.of("k", o.k, quantity.Ratio, ""))
	}
	if o.kv != "" {
		text += fmt.Sprintf("      - valve: {tag: VALVE, kv: %s, open: 100 %%, normally: 100 %%}\n", o.of("kv", o.kv, quantity.Kv, ""))
		o.outlet += ", a valve of Kv " + o.kv
	}
	return text, o.err
}
