package viz_test

import (
	"bytes"
	"context"
	"fmt"

	"headfall/network"
	"headfall/network/study"
	"headfall/scenarios"
	"headfall/viz"
)

// A plant and its result become one page that needs nothing else.
func ExampleWrite() {
	load := func() (*network.Plant, error) {
		return scenarios.Load("first.yaml", scenarios.Starter(), scenarios.Options{})
	}
	res, err := study.Judge(context.Background(), load, study.Options{})
	if err != nil {
		fmt.Println(err)
		return
	}
	plant, _ := load()
	if err := plant.Refresh(); err != nil {
		fmt.Println(err)
		return
	}
	var page bytes.Buffer
	if err := viz.Write(&page, viz.Page{Plant: plant, Result: res}); err != nil {
		fmt.Println(err)
		return
	}
	fmt.Println(bytes.Contains(page.Bytes(), []byte("First drain")), bytes.Contains(page.Bytes(), []byte("src=\"http")))
	// Output: true false
}
