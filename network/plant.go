// Package network holds a plant as a graph of vessels, tees, outside points and lines, makes it into equations and runs it through time.
package network

import (
	"time"

	"headfall/elements"
	"headfall/elements/quantity"
	"headfall/elements/shape"
)

// Plant is one plant with what is in it, what will be done to it and what must not happen. All numbers are SI; heights in a vessel are above its
// base, elevations above the site datum, times in s from the start. Lists keep the order of the file.
type Plant struct {
	Title, Revision string
	File            string    // base name of the file
	SHA256          string    // of the file's bytes
	Text            string    // the file itself
	Case            string    // name of the case applied; "" for none
	Start           time.Time // local wall clock in the UTC location; zero when not given
	RunFor          float64   // s
	ReportEvery     float64   // s
	Gravity         float64   // m/s²
	Atmosphere      float64   // Pa absolute
	Liquid          elements.Liquid
	Show            Show

	Vessels    []*Vessel
	Tees       []*Tee
	Outside    []*Outside
	Lines      []*Line
	Steps      []*Step
	Upsets     []*Upset
	Milestones []*Milestone
	Limits     []*Limit
	Handover   []Moment
	Assume     Assume
	CaseNames  []string // of the file, in its order

	Numbers  []*Number // every named number, in the order of the file
	Defaults []string  // defaults used, one sentence each, in the order of the file
	Warnings []Problem // of reading

	byTag map[string]any     // vessels, tees, outside points and lines; made by Refresh
	meets map[string][]*Line // lines that meet a vessel, tee or outside point

	owners map[string]any // what owns numbers, by the beginning of their names; made by Refresh, for Touch
}

// Show is the display units; empty ones are m, m3/h, m3, mbar.
type Show struct{ Level, Flow, Volume, Pressure string }

// Place is a place in the file.
type Place struct{ Line, Column int }

// Problem is one fault or doubt found in a plant.
type Problem struct {
	At   Place
	Says string
	Hint string
}

// Number is one number of the plant by name. Writing *At and calling the plant's Refresh changes the plant.
type Number struct {
	Name    string // V-1.kv, T-2.level, L-1.pipe[2].length
	Key     string // kv: all doubts on a key may have one common draw
	Dim     quantity.Dim
	At      *float64
	Value   quantity.Value // as written, with its doubt
	Default bool           // not written in the file
	Assumed bool           // the doubt is a declared default, not the file's
	Place   Place
	Check   []elements.Check
}

// Moment is a time in s from the start, as it was written.
type Moment struct {
	S     float64
	Text  string // as written: "06:20", 5 min
	Clock bool
	Given bool
}

// Vessel stores liquid.
type Vessel struct {
	Tag        string
	Place      Place
	Kind       string // of the shape
	Element    elements.Shaped
	Inside     []Internal
	Shape      shape.Shape // built by Refresh
	Base       float64
	Level      float64 // start level, m above base; NaN when Contents is given
	Contents   float64 // start contents, m³; NaN when Level is given
	Rim        float64 // m above base; NaN: the top of the shape
	RimLength  float64 // m; NaN: of the shape
	SpillsTo   string  // vessel or outside point; "" the floor
	EmptyAt    float64 // m above base; NaN: by the rule of physics.md
	Inflow     Rows    // m³/s
	InflowText string
	Batches    []*Batch
	Gauge      *Gauge
	Alarms     []*Alarm
	Cover      *Cover
}

// Internal is media or internals within a vessel between two heights, m above base.
type Internal struct {
	From, To  float64
	Voids     float64 // share of the space left to liquid; 1 when Displaces is given
	Displaces float64 // m³ taken up
}

// Rows is a piecewise straight course: rows of {time s, value}; two rows at one time are a step; constant outside.
type Rows [][]float64

// Batch is a volume that comes in at a steady rate.
type Batch struct {
	ID     string
	Place  Place
	At     Moment
	Volume float64 // m³
	Over   float64 // s
}

// Gauge turns a level into what the panel shows.
type Gauge struct {
	Tag        string
	Zero, Span float64 // m above base of 0 %; m of 100 %
	Percent    bool    // shows per cent, else length
}

// Alarm is a level with a name, and what people do when it comes.
type Alarm struct {
	Name     string
	Place    Place
	When     Condition
	Response *Response // nil: none stated
}

// Response is detect, walk, and a valve moved.
type Response struct {
	Detect, Walk float64 // s
	Valve        string
	Pump         string
	To           float64 // travel
	Mode         elements.Mode
}

// Cover is a roof: the gas above the liquid matters.
type Cover struct {
	Pressure    float64 // Pa absolute at the start
	Temperature float64 // K
	Vents       []*VesselVent
	Vacuum      float64 // Pa below atmosphere that the vessel withstands; NaN not stated
	Overpress   float64 // Pa above atmosphere; NaN not stated
}

// VesselVent is one vent of a cover.
type VesselVent struct {
	Tag     string
	Place   Place
	Kind    string
	Vent    elements.Vent
	Blocked float64 // share, 0..1
}

// Tee is where lines meet and nothing is stored.
type Tee struct {
	Tag       string
	Place     Place
	Elevation float64 // NaN when not given
}

// Outside is a point beyond the plant.
type Outside struct {
	Tag     string
	Place   Place
	Kind    string
	Element elements.Outsider
}

// PortForm tells how a line meets a vessel.
type PortForm int

const (
	Bottom PortForm = iota
	Centre
	Invert
	Dip
	Crest
)

// Port is where a line meets a vessel.
type Port struct {
	Form   PortForm
	Height float64 // m above base; 0 for Bottom
	Given  bool
}

// Line carries liquid between two ends through parts in series.
type Line struct {
	Tag       string
	Place     Place
	From, To  string
	Leaves    Port
	Enters    Port
	InletFull bool    // ideal opening: no limit from an uncovering inlet
	Entry     float64 // end loss where liquid enters the line, at either end; NaN: by the rule of physics.md
	Exit      float64
	Parts     []*Fitted
}

// Fitted is one part in a line.
type Fitted struct {
	Kind  *elements.Kind
	Part  elements.Part
	Place Place
	Name  string // for messages and numbers: V-1, or L-1.pipe[2]
}

// ActionKind is what a step does.
type ActionKind int

const (
	MoveValve ActionKind = iota
	SetPump
	SetInflow
	SetVent
	CancelBatch
	HoldPoint
)

// Step is one thing that people do, or a hold they wait at.
type Step struct {
	ID         string
	Place      Place
	At         Moment     // trigger by time; Given false when not used
	When       *Condition // trigger by condition
	After      string     // trigger by another step or hold being done
	Wait       float64    // s, after the trigger
	Who        string
	Action     ActionKind
	Target     string
	To         float64 // travel 0..1; m³/s of an inflow; 1 open 0 shut of a vent
	ToText     string
	Mode       elements.Mode
	Over       float64 // s of the move; NaN: by the stroke
	Hold       string  // words of a hold
	UpTo       float64 // s that the hold may last
	Optional   bool
	Note       string
	CheckAfter float64 // s; NaN none
	Read       string
	StopIf     *Condition
	Free       *Free
}

// Free tells what plan may move.
type Free struct {
	At [2]float64 // s, earliest and latest; NaN when the time is fixed
	To [2]float64 // travel, least and most; NaN when the opening is fixed
}

// UpsetKind is what goes wrong.
type UpsetKind int

const (
	PumpFails UpsetKind = iota
	ValveSticks
	ValveStops
	VentBlocked
	ExtraLoss
)

// Upset is one thing that goes wrong in this run.
type Upset struct {
	Kind   UpsetKind
	Place  Place
	Target string
	At     Moment  // of PumpFails
	Value  float64 // travel of ValveSticks and ValveStops; share of VentBlocked; K of ExtraLoss
	After  float64 // m³ passed, of ExtraLoss
}

// Subject is what a condition looks at.
type Subject int

const (
	Level Subject = iota
	Flow
	Velocity
	Pressure
	CrestHead
	Opening
	Difference
	Rising
	Falling
	Passed
	Backflow
	Spilled
	Starts
	Emptied
)

// Condition is one subject and one bound.
type Condition struct {
	Subject Subject
	Of      []string // tags; two of a Difference
	Above   bool     // true: holds when above the bound; else below
	Bound   float64
	Gauge   bool   // Bound of a Pressure is over atmosphere
	Text    string // the bound as written
	Place   Place
}

// Milestone is a moment to report.
type Milestone struct {
	Name  string
	Place Place
	When  Condition
}

// Edge is one end of a limit's window.
type Edge struct {
	At    Moment
	After string
	When  *Condition
	Given bool
}

// Limit is what must hold.
type Limit struct {
	Place        Place
	Must         Condition // the state that must hold ("below 1.9 m")
	AveragedOver float64   // s; 0 instant
	EachDay      bool      // volumes by calendar day
	EachHour     bool      // starts in any hour
	InAny        float64   // s; rolling volumes; 0 none
	OnlyBetween  [2]Moment // hours within which flow is permitted
	Permitted    bool      // this is an only_between limit
	Within       Moment    // of Emptied: within a time or by a clock
	Since, Until Edge
	Why          string
}

// Assume is the assumptions declared in the file.
type Assume struct {
	Doubts    string // default | stated | none
	Together  []string
	CheckLeak float64 // share of Kv that every check valve leaks
	HeaderAir string  // vents | ignored
}
