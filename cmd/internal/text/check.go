package text

import (
	"io"
	"strings"

	"headfall/elements/quantity"
	"headfall/network"
)

// echo is a plant being written as it was understood.
type echo struct {
	*sheet
	plant *network.Plant
	clock Clock
	units Units
}

// Check writes a plant as it was understood, with every default that was used; the plant must have been refreshed. A star marks what the file
// does not say.
func Check(w io.Writer, plant *network.Plant, opt Options) error {
	e := &echo{sheet: newSheet(w, opt.Width), plant: plant, clock: Clock{Start: plant.Start}, units: UnitsOf(plant.Show)}
	e.summary()
	if opt.Quiet {
		return e.err
	}
	for _, section := range []func(){e.basis, e.vessels, e.lines, e.lineUp, e.steps, e.limits, e.numbers, e.defaults} {
		section()
	}
	return e.err
}

// summary is the first line: that the file reads, and what is in it.
func (e *echo) summary() {
	p := e.plant
	e.raw("READS - " + strings.Join([]string{
		counted(len(p.Vessels), "vessel", "vessels"), counted(len(p.Lines), "line", "lines"), counted(len(p.Steps), "step", "steps"),
		counted(len(p.Limits), "limit", "limits"), counted(len(p.Defaults), "default used", "defaults used"),
		counted(len(p.Warnings), "warning", "warnings"),
	}, ", ") + "\n")
}

// basis writes what holds for the whole plan.
func (e *echo) basis() {
	p := e.plant
	said := []string{p.Title}
	if p.Revision != "" {
		said = append(said, "revision "+p.Revision)
	}
	if p.Case != "" {
		said = append(said, "case "+p.Case)
	}
	e.put("Plan", "%s", join(said, ", "))
	start := "not stated, times count from the start"
	if day := e.clock.Day(); day != "" {
		start = keep(day)
	}
	e.put("Start", "%s; calculated for %s, written every %s", start, keep(Duration(p.RunFor, Near)), keep(Duration(p.ReportEvery, Near)))
	e.put("Site", "gravity %s, atmosphere %s", keep(quantity.FormatExact(p.Gravity, quantity.Acceleration, "")),
		keep(quantity.FormatExact(p.Atmosphere, quantity.Pressure, "mbar")))
	if p.Liquid != nil {
		f := p.Liquid.Fluid()
		e.put("Liquid", "%s, %s, %s", f.Name, keep(quantity.Format(f.Density, quantity.Density, "kg/m3", 5)),
			keep(quantity.Format(f.Dynamic, quantity.Viscosity, "mPa.s", 3)))
	}
	e.put("Doubts", "%s", map[string]string{
		"stated": "as the file states them", "none": "none are allowed for", "default": "as the file states them, declared ones for the rest",
	}[or(p.Assume.Doubts, "default")])
}

func or(a, b string) string {
	if a == "" {
		return b
	}
	return a
}

// vessels writes every vessel with what is in it and what it could hold.
func (e *echo) vessels() {
	if len(e.plant.Vessels) == 0 {
		return
	}
	rows := [][]string{{"Vessel", "base", "level", "holds", "rim", "full", "empty at", "shape"}}
	for _, v := range e.plant.Vessels {
		if v.Shape == nil {
			continue
		}
		full, _ := v.Shape.Volume(v.RimLevel())
		at, _ := e.plant.EmptyLevel(v)
		empty := "-"
		if at == at { // not NaN
			empty = e.units.LevelOf(at, Near)
		}
		shape := strings.ReplaceAll(v.Kind, "_", " ")
		if v.Cover != nil {
			shape += ", covered, " + counted(len(v.Cover.Vents), "vent", "vents")
		}
		rows = append(rows, []string{
			pad(v.Tag, indent-2), e.units.LevelOf(v.Base, Near), e.units.LevelOf(v.StartLevel(), Near), e.units.VolumeOf(v.StartVolume(), Near),
			e.units.LevelOf(v.RimLevel(), Near), e.units.VolumeOf(full, Near), empty, shape,
		})
	}
	if len(rows) > 1 {
		e.raw("\n" + table(rows, len(rows[0])-1) + "\n")
	}
}
