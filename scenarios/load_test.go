package scenarios

import (
	"os"
	"testing"

	"headfall/network"
)

// load reads a file that must have no fault.
func mustLoad(t *testing.T, name string, data []byte, opt Options) *network.Plant {
	t.Helper()
	p, err := Load(name, data, opt)
	if err != nil {
		t.Fatalf("\n%v", err)
	}
	return p
}

func TestWholeFileExample(t *testing.T) {
	data, err := os.ReadFile("../testdata/scenarios/whole_file.yaml")
	if err != nil {
		t.Fatal(err)
	}
	p := mustLoad(t, "whole_file.yaml", data, Options{})
	if len(p.Vessels) != 4 || len(p.Lines) != 5 || len(p.Limits) != 14 {
		t.Errorf("%d vessels, %d lines, %d limits", len(p.Vessels), len(p.Lines), len(p.Limits))
	}
}
