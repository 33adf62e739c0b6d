package elements

// Part is one resistance in a line.
type Part interface {
	Element
	// Drop returns the total pressure lost in the line's direction, Pa, and its slope, Pa·s/m³, at flow q, m³/s.
	// Passive parts: increasing in q, C¹, slope > 0, zero at zero, linear through zero. No state between calls, no allocation.
	Drop(q float64, at *Local) (dp, slope float64)
}

// Local is all a law may read besides its own parameters.
type Local struct {
	Fluid    *Fluid
	Opening  float64 // of this part's actuator: travel of a valve 0..1, running state of a pump 0..1
	Gravity  float64 // m/s²
	Strength float64 // share of head or rate that a pump has left; 0 is taken as all
	Leak     float64 // share of Kv that a check valve passes in reverse, where it does not state more itself
	Band     float64 // Pa: drop under which a quadratic loss is made linear through zero (see Quadratic)

	kept *kept // what its part remembers from call to call; nil while it has nothing to
}

type kept struct {
	opened memo    // of a valve's opening: what its trim makes of it
	air    AirBand // of a vent
}

func (at *Local) keep() *kept {
	if at.kept == nil {
		at.kept = &kept{}
	}
	return at.kept
}

// memo keeps the last value of a function of the opening, which stands still most of the time.
type memo struct {
	known          bool
	at, phi, slope float64
}

// Place is where a part stands in its line; the line tells it once, before Ready.
type Place struct {
	BoreBefore, BoreAfter float64 // m, of the nearest part with a bore on either side; 0 for none
	First, Last           bool    // no part before it, none after it
	FromWall, ToWall      bool    // the line's end on that side is a vessel or a body of water or a free fall (not a tee), and the part stands there
}

// The capabilities below are asked for by interface assertion, once, when a plant is compiled. What is not a passive resistance says so
// with one of them and has tests of its own.
type (
	// Bored gives the line a bore, m; 0 when this specimen has none of its own.
	Bored interface{ Bore() float64 }
	// Placed wants to know its place.
	Placed interface{ SetPlace(Place) }
	// Even tells that the part loses the same both ways: Drop(−q) = −Drop(q).
	Even interface{ Even() bool }
	// OwnEnd is a part whose law includes the end loss where it stands at the end of its line: orifices, nozzles, weirs.
	OwnEnd interface{ OwnEnd() bool }
	// Tagged has a tag of its own: valves, pumps, check valves.
	Tagged interface{ Tag() string }
	// Holds is the liquid inside, m³, when full.
	Holds interface{ Holds() float64 }
	// Long has a length along the line, m.
	Long interface{ Length() float64 }
	// Inertial resists a change of flow: ρL/A·dQ/dt, Pa; Inertance returns ρL/A, kg/m⁴, or 0 when switched off.
	Inertial interface{ Inertance(f *Fluid) float64 }
	// Actuated moves: a valve. Opening in Local is its travel.
	Actuated interface{ Actuator() *Actuator }
	// Mouthed is a part whose own opening admits the liquid where it stands at an end of its line: orifices and nozzles.
	Mouthed interface{ Mouth() Mouth }
	// Shuts tells whether the part as it stands lets nothing through in either direction.
	Shuts interface{ Shut(at *Local) bool }
	// OneWay lets liquid through in the line's direction only, once the pressure across it passes Cracking, Pa; Leak is the share of Kv that
	// passes in reverse (0: tight), and is in Drop for q < 0 already, as is Local.Leak.
	OneWay interface {
		Cracking() float64
		Leak() float64
	}
	// Chokes is a part with a throat: flow is limited when its drop passes Recovery·(p₁ − CriticalRatio·p_v), p₁ its upstream static pressure.
	Chokes interface {
		Recovery(at *Local) float64 // F_L²
		CriticalRatio(f *Fluid) float64
	}
	// Crest is a line whose flow is set by depth over it, not by pressure: a weir. The first part of its line.
	Crest interface {
		// Spill returns the flow, m³/s, for a surface h over the crest on the side it comes from and hd on the other, both m, and its partials.
		Spill(h, hd float64, at *Local) (q, byH, byHd float64)
	}
	// Gaps is a weir as an opening for air: the clear area, m², above its crest up to h, m, over it.
	Gaps interface{ Gap(h float64) float64 }
	// Pumps is a source of head: starts and stops, modes. Drop is negative where it lifts. Opening in Local is 1 running, 0 stopped.
	Pumps interface{ Drive() *Drive }
	// Humps is a high point: an elevation in the line at which a pressure is looked at.
	Humps interface{ Crown() *Crown }
)

// Mouth is the clear opening of an orifice or nozzle: a circle, or a rectangle when Width is more than 0; m.
type Mouth struct{ Diameter, Width, Height float64 }

// Actuator is what moves a valve.
type Actuator struct {
	Tag      string
	Open     float64 // travel at the start, 0..1
	Normally float64 // its usual travel
	Stroke   float64 // s for full travel; 0 moves at once
	Turns    float64 // of the handwheel for full travel; 0 unknown
	Location string
	Lock     string
}

// Mode of a pump.
type Mode int

const (
	Off Mode = iota
	On
	Auto
	Standby
)

var modeWords = []string{"off", "on", "auto", "standby"}

// String returns the word of the file format.
func (m Mode) String() string { return modeWords[m] }

// Drive is what starts and stops a pump.
type Drive struct {
	Tag           string
	Mode          Mode
	Starts, Stops LevelSwitch
	StandbyFor    string  // tag of the pump it takes over from
	Passes        bool    // stopped: lets liquid through both ways
	Stated        bool    // when_stopped was written
	Curved        bool    // given by a curve, not by a rate
	Rate          float64 // m³/s nominal, for display; 0 for a curve
}

// Crown is the top of a high point.
type Crown struct {
	Elevation float64 // m over the site datum
	Vent      Device
	Primed    bool // full of liquid at the start although no end stands above it
	PrimedSet bool // primed: was written
}

// Throttles is a part that knows how its drop moves with its opening: ∂Drop/∂opening, Pa, at flow q.
type Throttles interface {
	DropByOpening(q float64, at *Local) float64
}

// Reduces is a part that may contain a reducer or expander, so that the bores on its two sides may differ without further loss.
type Reduces interface {
	Reduces() bool
}

// Squares is a part whose drop, as it stands, is c·q·|q| at flows of from and more, m³/s, either way: Square returns c for q > 0 and for q < 0,
// Pa·s²/m⁶. The sum of such parts costs no more than one.
type Squares interface {
	Square(at *Local) (forward, back, from float64)
}

// Runs is a pump with an end to its curve: Runout is the largest flow, m³/s, that it is made for.
type Runs interface{ Runout() float64 }

// Ranged is a part whose law holds within a range: Outside says, for the flow q, m³/s, and the head h over its crest, m (NaN for what has none), in what
// it is used outside; "" within. What is within at two flows is so between them. The words are ready made: nothing is allocated.
type Ranged interface {
	Outside(q, h float64, at *Local) string
}
