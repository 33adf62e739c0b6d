package elements_test

import (
	"fmt"

	"headfall/elements"
	"headfall/elements/elementtest"
)

// A part turns a flow into a pressure drop.
func ExamplePart() {
	e, err := elementtest.Build(elements.Parts, "valve", "{tag: V-1, kv: 36}")
	if err != nil {
		fmt.Println(err)
		return
	}
	valve := e.(elements.Part)
	at := &elements.Local{Fluid: &elements.Fluid{Density: 1000, Dynamic: 1e-3}, Opening: 0.5, Gravity: 9.80665, Band: 1}
	dp, slope := valve.Drop(0.005, at) // 18 m³/h through a linear valve that is half open
	fmt.Printf("%.0f Pa, %.3g Pa·s/m³\n", dp, slope)
	// Output: 100000 Pa, 4e+07 Pa·s/m³
}

func ExampleLookup() {
	k := elements.Lookup(elements.Vents, "hole")
	fmt.Println(k.Doc)
	// Output: An open hole or pipe stub in the roof.
}
