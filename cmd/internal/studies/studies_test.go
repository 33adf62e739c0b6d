// Package studies tests package study on whole plant files.
package studies

import (
	"context"
	"encoding/json"
	"testing"

	"headfall/network"
	"headfall/network/study"
	"headfall/scenarios"
)

// demo returns what loads a demo plant.
func demo(t testing.TB, name string, set ...string) study.Load {
	t.Helper()
	data, ok := scenarios.Demo(name)
	if !ok {
		t.Fatalf("there is no demo %s", name)
	}
	return text(string(data), set...)
}

// text returns what loads a plant from its file's text.
func text(file string, set ...string) study.Load {
	return func() (*network.Plant, error) {
		return scenarios.Load("plant.yaml", []byte(file), scenarios.Options{Set: set})
	}
}

// bits writes a result with all its digits, without what the clock on the wall says.
func bits(t testing.TB, v any) string {
	t.Helper()
	if r, ok := v.(*network.Result); ok {
		r.Work.Wall = 0
	}
	data, err := json.MarshalIndent(v, "", " ")
	if err != nil {
		t.Fatal(err)
	}
	return string(data)
}

func must[T any](v T, err error) func(testing.TB) T {
	return func(t testing.TB) T {
		t.Helper()
		if err != nil {
			t.Fatal(err)
		}
		return v
	}
}

func bench(t testing.TB, load study.Load) *study.Bench {
	t.Helper()
	return must((&study.Runner{Load: load}).Bench(context.Background()))(t)
}

// same fails on the first place where two texts differ.
func same(t testing.TB, what, got, want string) {
	t.Helper()
	if got == want {
		return
	}
	i := 0
	for i < len(got) && i < len(want) && got[i] == want[i] {
		i++
	}
	from := max(0, i-200)
	t.Fatalf("%s: differs at %d\ngot  …%s\nwant …%s", what, i, got[from:min(len(got), i+80)], want[from:min(len(want), i+80)])
}
