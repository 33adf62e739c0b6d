package scenarios_test

import (
	"fmt"

	"headfall/scenarios"
)

// A file becomes a plant; a number of it may be changed on the way, as --set does.
func ExampleLoad() {
	plant, err := scenarios.Load("first.yaml", scenarios.Starter(), scenarios.Options{Set: []string{"V-1.kv=80"}})
	if err != nil {
		fmt.Println(err)
		return
	}
	kv, err := scenarios.Find(plant, "V-1.kv")
	if err != nil {
		fmt.Println(err)
		return
	}
	fmt.Printf("%s: %d vessels, %d lines; %s is %g\n", plant.Title, len(plant.Vessels), len(plant.Lines), kv.Name, *kv.At)
	// Output: First drain: 2 vessels, 2 lines; V-1.kv is 80
}

// Every fault is found in one pass and shown with its place.
func ExampleProblems() {
	_, err := scenarios.Load("plant.yaml", []byte("headfall: 1\nrun_for: 4\nliquid: {watre: 12 °C}\n"), scenarios.Options{})
	fmt.Println(err)
	// Output:
	// plant.yaml:2:10: run_for: "4" needs a unit
	//   2 | run_for: 4
	//     |          ^
	//   hint: e.g. 4 h
	// plant.yaml:3:10: there is no liquid "watre"
	//   3 | liquid: {watre: 12 °C}
	//     |          ^^^^^
	//   hint: did you mean water?
}
