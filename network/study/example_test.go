package study_test

import (
	"context"
	"fmt"

	"headfall/network"
	"headfall/network/study"
	"headfall/scenarios"
)

func starter() (*network.Plant, error) {
	plant, err := scenarios.Load("first.yaml", scenarios.Starter(), scenarios.Options{})
	if err == nil {
		plant.Validate()
	}
	return plant, err
}

// Judge answers whether the sequence can run as written.
func ExampleJudge() {
	res, err := study.Judge(context.Background(), starter, study.Options{})
	if err != nil {
		fmt.Println(err)
		return
	}
	tight := res.Tightest()
	fmt.Printf("%s; least margin %.2f m: %s\n", res.Verdict, *tight.Margin, tight.Says)
	// Output: run; least margin 0.40 m: level of SUMP below 1.6 m
}
