// Package elements holds the constitutive laws of what a plant is built of: parts of lines, vessels' shapes, vents, liquids. It knows no
// graph, no solver and no file format.
package elements

import (
	"fmt"
	"sort"
)

// Room tells where in a plant a kind is used.
type Room string

const (
	Parts   Room = "part"    // in a line, in series
	Shapes  Room = "shape"   // of a vessel
	Heads   Room = "head"    // bottom, top or end of a shape
	Vents   Room = "vent"    // of a covered vessel
	Liquids Room = "liquid"  // one a plant
	Trims   Room = "trim"    // of a valve
	Beyond  Room = "outside" // where the plant ends
)

// Kind describes one kind of thing. A kind is one file that registers itself in its own init; decoding, units, range errors, JSON Schema, help,
// the drawing's symbol and the conformance tests follow from what stands here and from Bind.
type Kind struct {
	Name   string // as written in a plant file
	Room   Room
	Doc    string // one sentence: what it is
	Law    string // the equation in Unicode, with symbols and units
	Valid  string // range of validity
	Source string // published source; "common practice, no source" where there is none
	Symbol string // SVG path data in a box of 24 × 24, the line running through (0,12) and (24,12); "" draws a plain line
	New    func() Element
	Sample string // the parameters of one typical specimen as they would be written in braces, for the conformance kit and the help
}

// Element is one thing of some kind.
type Element interface {
	// Bind declares the parameters and where their numbers go.
	Bind(p *Params)
	// Ready is called after the parameters were set, and again whenever one of its numbers changed: it works out what the law derives from
	// them and reports parameters that do not go together. It must not change a bound number.
	Ready() error
}

var registry = map[Room]map[string]*Kind{}

// Register adds a kind; two of one name in a room is a programmer's error.
func Register(k Kind) {
	if registry[k.Room] == nil {
		registry[k.Room] = map[string]*Kind{}
	}
	if registry[k.Room][k.Name] != nil {
		panic(fmt.Sprintf("elements: %s %q registered twice", k.Room, k.Name))
	}
	registry[k.Room][k.Name] = &k
}

// Lookup returns the kind of that name in the room, or nil.
func Lookup(room Room, name string) *Kind { return registry[room][name] }

// Kinds returns all kinds of a room, by name.
func Kinds(room Room) []*Kind {
	var all []*Kind
	for _, k := range registry[room] {
		all = append(all, k)
	}
	sort.Slice(all, func(i, j int) bool { return all[i].Name < all[j].Name })
	return all
}

// Rooms returns the rooms in the order of the file format.
func Rooms() []Room { return []Room{Shapes, Heads, Parts, Trims, Vents, Beyond, Liquids} }
