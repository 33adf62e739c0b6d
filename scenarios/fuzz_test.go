package scenarios

import (
	"fmt"
	"strings"
	"testing"
)

func FuzzLoad(f *testing.F) {
	for _, data := range everyFile(f) {
		f.Add(data, "", "")
	}
	f.Add([]byte(plan), "V-1.kv=3", "G")
	f.Add([]byte("a: &a {b: *a}\n<<: *a\n? [x]\n: y\n"), "=", "")
	f.Fuzz(func(t *testing.T, data []byte, set, name string) {
		p, err := Load("f.yaml", data, Options{Case: name, Set: []string{set}})
		if (p == nil) == (err == nil) {
			t.Fatalf("plant %v, error %v", p, err)
		}
		if err != nil {
			_ = err.Error()
		}
		if p, err := Load("f.yaml", data, Options{}); err == nil {
			plain, err := Normalise("f.yaml", data)
			if err != nil {
				t.Fatal(err)
			}
			if _, err := Load("f.yaml", plain, Options{}); err != nil && len(p.Vessels) > 0 {
				t.Fatalf("%v\n%s", err, plain)
			}
		}
	})
}

// chain writes a file of n tanks in a row.
func chain(n int) []byte {
	var b strings.Builder
	b.WriteString("headfall: 1\nrun_for: 4 h\nassume: {doubts: none}\nliquid: {water: 20 °C}\nvessels:\n")
	for i := range n {
		fmt.Fprintf(&b, "  T%d: {shape: {box: {length: 1 m, width: 1 m, height: 9 m}}, base: %g m, level: 4 m}\n", i, 0.02*float64(n-i))
	}
	b.WriteString("outside:\n  AIR: {free_fall: {elevation: -1 m}}\nlines:\n")
	for i := range n {
		to := fmt.Sprintf("T%d", i+1)
		if i == n-1 {
			to = "AIR"
		}
		fmt.Fprintf(&b, "  L%d: {from: T%d, to: %s, inlet: full, entry: 0, exit: 0, parts: [{pipe: {length: 10 m, bore: 100 mm, roughness: 0.045 mm}}, {fittings: {k: 2}}]}\n", i, i, to)
	}
	return []byte(b.String())
}

func TestLargeFile(t *testing.T) {
	p := mustLoad(t, "chain.yaml", chain(10_000), Options{})
	if len(p.Vessels) != 10_000 || len(p.Lines) != 10_000 {
		t.Errorf("%d vessels, %d lines", len(p.Vessels), len(p.Lines))
	}
}
