package study

import (
	"math"
	"testing"

	"headfall/elements"
	"headfall/elements/quantity"
	"headfall/network"
)

func number(name, key string, v float64, d quantity.Doubt, checks ...elements.Check) *network.Number {
	return &network.Number{Name: name, Key: key, At: &v, Value: quantity.Value{SI: v, Doubt: d}, Check: checks}
}

// Draws have the stated distribution, stay within what the number may be, and move together where that is asked for.
func TestDraws(t *testing.T) {
	p := &network.Plant{Numbers: []*network.Number{
		number("V-1.kv", "kv", 100, quantity.Doubt{Kind: quantity.Normal95, Half: 15}),
		number("V-2.kv", "kv", 50, quantity.Doubt{Kind: quantity.Normal95, Half: 5}),
		number("O-1.cd", "cd", 0.62, quantity.Doubt{Kind: quantity.Uniform, Low: 0.58, High: 0.66}),
		number("L-1.pipe.roughness", "roughness", 1e-4, quantity.Doubt{Kind: quantity.Factor, Factor: 2}),
		number("O-2.cd", "cd", 0.95, quantity.Doubt{Kind: quantity.Normal95, Half: 0.1}, elements.Coefficient),
		number("T-1.base", "base", 3, quantity.Doubt{}),
	}}
	p.Assume.Together = []string{"kv"}
	const n = 1000
	d := NewDraws(p, n, 1)
	if len(d.Numbers) != 5 || len(d.Names) != 4 || d.Names[0] != "kv, all together" {
		t.Fatalf("%v %v", d.Numbers, d.Names)
	}
	within := make([]int, len(d.Numbers))
	for i := range n {
		v := d.Values(i)
		if a, b := (v[0]-100)/15, (v[1]-50)/5; math.Abs(a-b) > 1e-12 {
			t.Fatalf("sample %d: kv not drawn together: %g, %g", i, a, b)
		}
		for k, ok := range []bool{v[0] > 85 && v[0] < 115, v[1] > 45 && v[1] < 55, v[2] >= 0.58 && v[2] <= 0.66, v[3] > 0.5e-4 && v[3] < 2e-4, v[4] > 0 && v[4] <= 1} {
			if ok {
				within[k]++
			}
		}
	}
	for k, want := range []int{950, 950, n, 950, n} {
		if off := within[k] - want; off < -2 || off > 2 && k != 3 || k == 3 && (off < -60 || off > 60) { // roughness has 16 levels
			t.Errorf("%s: %d of %d within, want %d", p.Numbers[d.Numbers[k]].Name, within[k], n, want)
		}
	}
	again := NewDraws(p, n, 1)
	other := NewDraws(p, n, 2)
	if again.Values(7)[2] != d.Values(7)[2] || other.Values(7)[2] == d.Values(7)[2] {
		t.Error("the seed does not decide the draws")
	}
}

func TestParseShard(t *testing.T) {
	auto := func() (int, error) { return 3, nil }
	for text, want := range map[string]Shard{"1/1": {1, 1}, "2/8": {2, 8}, "auto/4": {3, 4}} {
		if got, err := ParseShard(text, auto); err != nil || got != want {
			t.Errorf("%s: %v, %v", text, got, err)
		}
	}
	for _, text := range []string{"", "2", "0/4", "5/4", "x/4", "2/x", "auto/2", "1/0", "-1/4"} {
		if s, err := ParseShard(text, auto); err == nil {
			t.Errorf("%q gives %v", text, s)
		}
	}
}

// The shards of a study have every case once, and know how many they have.
func TestShardsCover(t *testing.T) {
	for of := 1; of < 9; of++ {
		for n := range 30 {
			seen := make([]int, n)
			for i := 1; i <= of; i++ {
				s := Shard{i, of}
				list := s.cases(n)
				if len(list) != s.size(n) {
					t.Fatalf("shard %d/%d of %d cases: size %d, has %d", i, of, n, s.size(n), len(list))
				}
				for _, k := range list {
					seen[k]++
				}
			}
			for k, times := range seen {
				if times != 1 {
					t.Fatalf("%d shards, %d cases: case %d comes %d times", of, n, k, times)
				}
			}
		}
	}
}
