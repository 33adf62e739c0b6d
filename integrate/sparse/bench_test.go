package sparse

import (
	"math/rand/v2"
	"testing"
)

func cases() []struct {
	name string
	p    *Pattern
} {
	return []struct {
		name string
		p    *Pattern
	}{
		{"chain1000", chain(1000)}, {"bothends1000", bothEnds(1000)}, {"tree1000", tree(1000, rand.New(rand.NewPCG(1, 1)))},
		{"grid1024", grid(32)}, {"numbered1024", renumbered(grid(32))}, {"grid10000", grid(100)},
	}
}

func BenchmarkAnalyse(b *testing.B) {
	for _, c := range cases() {
		b.Run(c.name, func(b *testing.B) {
			b.ReportAllocs()
			for b.Loop() {
				Analyse(c.p)
			}
		})
	}
}

func BenchmarkRefactor(b *testing.B) {
	for _, c := range cases() {
		b.Run(c.name, func(b *testing.B) {
			f := Analyse(c.p)
			v := dominant(c.p, rand.New(rand.NewPCG(1, 1)))
			b.ReportAllocs()
			for b.Loop() {
				if err := f.Refactor(v); err != nil {
					b.Fatal(err)
				}
			}
			b.ReportMetric(float64(f.Size()), "numbers")
		})
	}
}

func BenchmarkSolve(b *testing.B) {
	for _, c := range cases() {
		b.Run(c.name, func(b *testing.B) {
			f := Analyse(c.p)
			rng := rand.New(rand.NewPCG(1, 1))
			if err := f.Refactor(dominant(c.p, rng)); err != nil {
				b.Fatal(err)
			}
			x := normals(c.p.N, rng)
			y := make([]float64, len(x))
			b.ReportAllocs()
			for b.Loop() {
				copy(y, x)
				f.Solve(y)
			}
		})
	}
}

func BenchmarkSolveChecked(b *testing.B) {
	for _, c := range cases() {
		b.Run(c.name, func(b *testing.B) {
			f := Analyse(c.p)
			rng := rand.New(rand.NewPCG(1, 1))
			if err := f.Refactor(dominant(c.p, rng)); err != nil {
				b.Fatal(err)
			}
			f.wild = true
			x := normals(c.p.N, rng)
			y := make([]float64, len(x))
			b.ReportAllocs()
			for b.Loop() {
				copy(y, x)
				if _, err := f.SolveChecked(y); err != nil {
					b.Fatal(err)
				}
			}
		})
	}
}
