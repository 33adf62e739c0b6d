package elements

import (
	"math"

	"headfall/elements/quantity"
)

func init() {
	Register(Kind{
		Name: "pump", Room: Parts,
		Doc:    "A pump at fixed speed, by its curve or by a steady rate, started and stopped by people and by levels.",
		Law:    "lifts ρ·g·H(Q), H in m a smooth falling curve through the rows, straight beyond its ends; by rate Q = rate·(1 − 10⁻⁵·H/m), Q in m³/s; ρ in kg/m³, g in m/s²",
		Valid:  "water-like liquids; a curve that droops is refused",
		Source: "the maker's curve; stiff rate and what a stopped pump lets through: common practice, no source",
		Symbol: "M0 12H3M21 12H24M12 3A9 9 0 1 0 12 21A9 9 0 1 0 12 3M6 6L21 12L6 18",
		New:    func() Element { return &pump{} },
		Sample: "{tag: P-1, curve: [[0 m3/h, 14 m], [20 m3/h, 11 m], [32 m3/h, 6 m]], mode: on, when_stopped: shut}",
	})
}

type pump struct {
	rows             [][]float64 // m³/s, m
	rate             float64     // m³/s
	byCurve, byRate  bool
	mode, stopped    string
	said, saidPasses bool // mode, when_stopped was written
	drive            Drive
	curve            monotone
}

func (e *pump) Bind(p *Params) {
	p.Name(&e.drive.Tag, "tag", Required, "tag of the pump")
	p.Table(&e.rows, "curve", Optional, "flow rising, head falling; or rate", quantity.Flow, quantity.Head).Was(&e.byCurve)
	p.Number(&e.rate, "rate", quantity.Flow, Optional, "steady flow instead of a curve", Positive).Was(&e.byRate)
	p.Word(&e.mode, "mode", Optional, "off, on, auto (by its levels) or standby; default auto when it has a start level, else off", modeWords...).Was(&e.said)
	p.Levels(&e.drive.Starts, "starts", "level at which it starts")
	p.Levels(&e.drive.Stops, "stops", "level at which it stops")
	p.Name(&e.drive.StandbyFor, "standby_for", Optional, "pump that it takes over from when that fails")
	p.Word(&e.stopped, "when_stopped", Optional, "shut, or passes both ways; default shut when the line has a check valve", "shut", "passes").Was(&e.saidPasses)
}

func (e *pump) Ready() error {
	var f faults
	f.when(e.byCurve == e.byRate, "a pump takes one of: curve, rate")
	e.ready(&f)
	if e.byCurve {
		e.fit(&f)
	}
	return f.err()
}

// ready works out the drive.
func (e *pump) ready(f *faults) {
	d := &e.drive
	d.Mode = Off
	if e.said {
		for i, w := range modeWords {
			if w == e.mode {
				d.Mode = Mode(i)
			}
		}
	} else if d.Starts.Given {
		d.Mode = Auto
	}
	d.Passes, d.Stated = e.stopped == "passes", e.saidPasses
	d.Curved, d.Rate = e.byCurve, e.rate
	f.when(e.byRate && d.Passes, "a pump given by its rate lets nothing through when stopped")
	f.when(d.StandbyFor != "" && d.StandbyFor == d.Tag, "a pump cannot stand by for itself")
	f.when(d.Mode == Auto && !d.Starts.Given, "mode auto needs a start level")
	f.when(d.Mode == Standby && d.StandbyFor == "" && !d.Starts.Given, "mode standby needs standby_for or a start level")
	on, off := d.Starts, d.Stops
	if on.Given && off.Given && on.Vessel == off.Vessel {
		f.when(on.Above == off.Above, "start and stop level bound the same side")
		f.when(on.Above && !off.Above && on.Level <= off.Level, "the start level must be above the stop level")
		f.when(!on.Above && off.Above && on.Level >= off.Level, "the start level must be below the stop level")
	}
}

// fit makes the curve.
func (e *pump) fit(f *faults) {
	var x, y []float64
	f.when(len(e.rows) < 2, "a pump curve needs at least two rows")
	for i, r := range e.rows {
		f.when(r[0] < 0 || r[1] < 0, "flow and head of a pump curve are 0 or more")
		if i > 0 {
			f.when(r[0] <= e.rows[i-1][0], "the flow must rise from row to row of the curve")
			f.when(r[1] >= e.rows[i-1][1], "the head must fall from row to row of the curve: a drooping curve has two flows at one head")
		}
		x, y = append(x, r[0]), append(y, r[1])
	}
	if len(*f) == 0 {
		e.curve = newMonotone(x, y)
	}
}

// head is the lift, m, and its slope at flow q, m³/s, of a pump that has a share of its head, or of its rate, left.
func (e *pump) head(q, left float64) (h, slope float64) {
	if e.byRate {
		const stiff = 1e5 // m of head at which the flow of a rate would be nothing
		rate := e.rate * left
		return stiff * (1 - q/rate), -stiff / rate
	}
	h, slope = e.curve.at(q)
	return left * h, left * slope
}

// Drop is the lift with its sign turned, as far as the pump runs; as far as it stands still it is the fall of its curve, the pump's inner losses.
func (e *pump) Drop(q float64, at *Local) (dp, slope float64) {
	k := at.Fluid.Density * at.Gravity
	on, left := at.Opening, at.Strength
	if left <= 0 {
		left = 1
	}
	if on > 0 {
		h, s := e.head(q, left)
		dp, slope = -on*k*h, -on*k*s
	}
	if on < 1 {
		top, _ := e.head(0, 1)
		h, s := e.head(math.Abs(q), 1)
		dp += (1 - on) * k * math.Copysign(top-h, q)
		slope -= (1 - on) * k * s
	}
	return dp, slope
}

func (e *pump) Tag() string   { return e.drive.Tag }
func (e *pump) Drive() *Drive { return &e.drive }

// Shut tells that the pump stands still and lets nothing through.
func (e *pump) Shut(at *Local) bool { return at.Opening <= 0 && !e.drive.Passes }

// Runout returns the flow, m³/s, of the last row of the curve; the rate of a pump given by one.
func (e *pump) Runout() float64 {
	if e.byRate {
		return e.rate
	}
	return e.rows[len(e.rows)-1][0]
}
