package elements_test

import (
	"testing"

	"headfall/elements"
	"headfall/elements/elementtest"
)

func BenchmarkDrop(b *testing.B) {
	for _, one := range [][2]string{
		{"pipe", "{length: 24 m, bore: 82.5 mm, roughness: 0.05 mm}"},
		{"fittings", "{bore: 80 mm, k: 2}"},
		{"orifice", "{diameter: 40 mm, cd: 0.62}"},
		{"valve", "{tag: V-1, kv: 95, trim: equal_percentage}"},
		{"valve", "{tag: V-1, kv: 95}"},
		{"check_valve", "{kv: 60}"},
		{"resistance", "{quadratic: 1500 s2/m5}"},
		{"pump", "{tag: P-1, curve: [[0 m3/h, 14 m], [20 m3/h, 11 m], [32 m3/h, 6 m]], mode: on}"},
	} {
		e, err := elementtest.Build(elements.Parts, one[0], one[1])
		if err != nil {
			b.Fatal(err)
		}
		p, at := e.(elements.Part), water1000()
		at.Fluid.Dynamic, at.Opening, at.Band = 1.2e-3, 0.5, 1
		b.Run(one[0], func(b *testing.B) {
			b.ReportAllocs()
			q, sum := 1e-3, 0.0
			for b.Loop() {
				dp, _ := p.Drop(q, at)
				sum += dp
				if q *= 1.01; q > 0.05 {
					q = 1e-3
				}
			}
			_ = sum
		})
	}
}
