package network_test

import (
	"context"
	"fmt"

	"headfall/network"
	"headfall/scenarios"
)

// A plant is checked, made into equations once, and run as often as wanted.
func ExampleCompile() {
	plant, err := scenarios.Load("first.yaml", scenarios.Starter(), scenarios.Options{})
	if err != nil {
		fmt.Println(err)
		return
	}
	if faults, _ := plant.Validate(); len(faults) > 0 {
		fmt.Println(scenarios.Locate(plant, faults))
		return
	}
	model, err := network.Compile(plant, network.Options{})
	if err != nil {
		fmt.Println(err)
		return
	}
	res, err := model.Run(context.Background(), network.RunOptions{})
	if err != nil {
		fmt.Println(err)
		return
	}
	t1 := res.Vessels["T-1"]
	fmt.Printf("T-1 is empty after %.0f min; the sump peaks at %.2f m\n", *t1.EmptiedAt/60, res.Vessels["SUMP"].PeakLevel)
	// Output: T-1 is empty after 80 min; the sump peaks at 1.20 m
}
