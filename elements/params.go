package elements

import "headfall/elements/quantity"

// Form tells how the value of a parameter is written.
type Form int

const (
	Number    Form = iota // one quantity of dimension Dim, into Num
	YesNo                 // into Bool
	Word                  // one of Words, into Text
	Name                  // a tag or free text, into Text
	Table                 // rows of quantities with the dimensions Cols, into Rows
	Nested                // an element of room Room: a bare word or a mapping of one key; into Set
	Series                // a list of elements of room Room; into Add
	Levels                // a condition on a level, {level: TAG, above|below: h}; into Switch
	Counts                // any key of Words with a count; into Count
	LevelRows             // one quantity, or rows [[time, quantity], …] (straight lines; two rows at one time are a step); into Rows
	OwnDevice             // {tag: …, open: yes|no}: a small operable vent; into Device
	Group                 // a mapping of parameters of its own, such as rectangular: {width: …}; into Inner
)

// Need tells whether a parameter must be written.
type Need bool

const (
	Required Need = true
	Optional Need = false
)

// Check is one condition on a number in SI units; it returns what is wanted ("more than 0"), or "" when the number is fine.
type Check func(v float64) string

// Param is one parameter of an element, declared by Bind.
type Param struct {
	Key     string
	Form    Form
	Dim     quantity.Dim   // of Number; of the value in LevelRows
	Cols    []quantity.Dim // of Table
	Words   []string       // of Word and Counts
	Room    Room           // of Nested and Series
	Need    Need
	Default string // what holds when it is not written, as it would be written; "" for none
	Help    string
	Checks  []Check

	Num    *float64
	Doubt  *quantity.Value // of Number: where the decoder leaves the value with its doubt; may be nil
	Bool   *bool
	Text   *string
	Rows   *[][]float64
	Set    func(Element, string) error // of Nested: the element and its kind's name
	Add    func(Element, string) error
	Switch *LevelSwitch
	Count  map[string]int
	Device *Device
	Inner  *Params // of Group
	Given  *bool   // set true when the key was written; may be nil
}

// LevelSwitch is a bound on the level of a vessel: a pump's start or stop.
type LevelSwitch struct {
	Vessel string
	Above  bool
	Level  float64 // m above the vessel's base
	Given  bool
}

// Device is a small operable device within a part: the vent of a high point.
type Device struct {
	Tag   string
	Open  bool
	Given bool
}

// Params collects the declarations of one element, flag-style.
type Params struct{ List []*Param }

func (p *Params) add(q *Param) *Param { p.List = append(p.List, q); return q }

// Number declares a number of dimension dim.
func (p *Params) Number(v *float64, key string, dim quantity.Dim, need Need, help string, checks ...Check) *Param {
	return p.add(&Param{Key: key, Form: Number, Dim: dim, Need: need, Help: help, Checks: checks, Num: v})
}

// Length declares a length, m.
func (p *Params) Length(v *float64, key string, need Need, help string, checks ...Check) *Param {
	return p.Number(v, key, quantity.Length, need, help, checks...)
}

// area declares an optional area, m².
func (p *Params) area(v *float64, key string, help string) *Param {
	return p.Number(v, key, quantity.Area, Optional, help, Positive)
}

// Ratio declares a dimensionless value, bare or per cent.
func (p *Params) Ratio(v *float64, key string, need Need, help string, checks ...Check) *Param {
	return p.Number(v, key, quantity.Ratio, need, help, checks...)
}

// bare declares a number that is never written in per cent: a loss coefficient, a weir coefficient.
func (p *Params) bare(v *float64, key string, need Need, help string, checks ...Check) *Param {
	return p.Number(v, key, quantity.Number, need, help, checks...)
}

// YesNo declares a switch.
func (p *Params) YesNo(v *bool, key string, need Need, help string) *Param {
	return p.add(&Param{Key: key, Form: YesNo, Need: need, Help: help, Bool: v})
}

// Word declares a choice of words.
func (p *Params) Word(v *string, key string, need Need, help string, words ...string) *Param {
	return p.add(&Param{Key: key, Form: Word, Need: need, Help: help, Text: v, Words: words})
}

// Name declares a tag or a free text.
func (p *Params) Name(v *string, key string, need Need, help string) *Param {
	return p.add(&Param{Key: key, Form: Name, Need: need, Help: help, Text: v})
}

// Table declares rows of numbers.
func (p *Params) Table(v *[][]float64, key string, need Need, help string, cols ...quantity.Dim) *Param {
	return p.add(&Param{Key: key, Form: Table, Need: need, Help: help, Rows: v, Cols: cols})
}

// Nested declares an element of another room.
func (p *Params) Nested(set func(e Element, kind string) error, key string, room Room, need Need, help string) *Param {
	return p.add(&Param{Key: key, Form: Nested, Need: need, Help: help, Room: room, Set: set})
}

// Series declares a list of elements of one room.
func (p *Params) Series(add func(e Element, kind string) error, key string, room Room, need Need, help string) *Param {
	return p.add(&Param{Key: key, Form: Series, Need: need, Help: help, Room: room, Add: add})
}

// Levels declares a bound on a level.
func (p *Params) Levels(v *LevelSwitch, key string, help string) *Param {
	return p.add(&Param{Key: key, Form: Levels, Help: help, Switch: v, Given: &v.Given})
}

// Counts declares that any of the words may be a key, with a count.
func (p *Params) Counts(v map[string]int, help string, words ...string) *Param {
	return p.add(&Param{Form: Counts, Help: help, Words: words, Count: v})
}

// LevelRows declares a quantity of dimension dim that is constant or follows rows of {time s, value}.
func (p *Params) LevelRows(v *[][]float64, key string, dim quantity.Dim, need Need, help string) *Param {
	return p.add(&Param{Key: key, Form: LevelRows, Dim: dim, Need: need, Help: help, Rows: v})
}

// OwnDevice declares a small operable device.
func (p *Params) OwnDevice(v *Device, key string, help string) *Param {
	return p.add(&Param{Key: key, Form: OwnDevice, Help: help, Device: v, Given: &v.Given})
}

// Group declares a mapping of parameters of its own; bind declares them. A group that is not written needs none of them.
func (p *Params) Group(given *bool, key string, need Need, help string, bind func(inner *Params)) *Param {
	inner := &Params{}
	bind(inner)
	return p.add(&Param{Key: key, Form: Group, Need: need, Help: help, Inner: inner, Given: given})
}

// Or notes the default, as it would be written; the caller has set the number itself.
func (q *Param) Or(text string) *Param { q.Default = text; return q }

// With notes where to leave the value as it was written, with its doubt and what a pressure or viscosity refers to.
func (q *Param) With(v *quantity.Value) *Param { q.Doubt = v; return q }

// Was notes where to say that the key was written.
func (q *Param) Was(given *bool) *Param { q.Given = given; return q }

// Positive wants more than nothing.
func Positive(v float64) string {
	if v > 0 {
		return ""
	}
	return "more than 0"
}

// NotNegative wants nothing or more.
func NotNegative(v float64) string {
	if v >= 0 {
		return ""
	}
	return "0 or more"
}

// Share wants 0 to 1.
func Share(v float64) string {
	if v >= 0 && v <= 1 {
		return ""
	}
	return "from 0 % to 100 %"
}

// Coefficient wants more than nothing and at most 1.
func Coefficient(v float64) string {
	if v > 0 && v <= 1 {
		return ""
	}
	return "more than 0 and at most 1"
}
