package e2e

import (
	"context"
	"fmt"
	"io"
	"math"
	"runtime"
	"strings"
	"testing"

	"headfall/network"
	"headfall/network/study"
	"headfall/scenarios"
	"headfall/viz"
)

// bench pipe: ten metres of rough pipe of 100 mm with two velocity heads more, ideal at its ends.
const benchPipe = "inlet: full, entry: 0, exit: 0, parts: [{pipe: {length: 10 m, bore: 100 mm, roughness: 0.045 mm}}, {fittings: {k: 2}}]"

const benchHead = "headfall: 1\ntitle: Bench\nrun_for: 4 h\nreport_every: 10 min\nassume: {doubts: none}\n" +
	"liquid: {stated: {name: water, density: 998.2 kg/m3, viscosity: 1.002 mPa.s, vapour_pressure: 2.34 kPa(a)}}\n"

func benchTank(b *strings.Builder, i int, bottom, level float64) {
	fmt.Fprintf(b, "  T%d: {shape: {box: {length: 1 m, width: 1 m, height: 9 m}}, base: %.17g m, level: %.17g m}\n", i, bottom-3, level+3)
}

// chainOf is n tanks in a falling row, the last of them open to the air.
func chainOf(n int) string {
	var tanks, lines strings.Builder
	for i := 1; i <= n; i++ {
		benchTank(&tanks, i, 0.02*float64(n-i), float64(1+i%2))
		to := fmt.Sprintf("T%d", i+1)
		if i == n {
			to = "AIR"
		}
		fmt.Fprintf(&lines, "  L%d: {from: T%d, to: %s, %s}\n", i, i, to, benchPipe)
	}
	return benchHead + "vessels:\n" + tanks.String() + "outside:\n  AIR: {free_fall: {elevation: -1 m}}\nlines:\n" + lines.String()
}

// gridOf is m by m tanks at one height, joined to their neighbours, one corner open to the air.
func gridOf(m int) string {
	var tanks, lines strings.Builder
	k := 0
	line := func(from int, to string) {
		k++
		fmt.Fprintf(&lines, "  L%d: {from: T%d, to: %s, %s}\n", k, from, to, benchPipe)
	}
	for r := range m {
		for c := range m {
			i := r*m + c + 1
			benchTank(&tanks, i, 0, 1+0.5*(1+math.Sin(12.9898*float64(r+1)+78.233*float64(c+1))))
			if c+1 < m {
				line(i, fmt.Sprintf("T%d", i+1))
			}
			if r+1 < m {
				line(i, fmt.Sprintf("T%d", i+m))
			}
		}
	}
	line(m*m, "AIR")
	return benchHead + "vessels:\n" + tanks.String() + "outside:\n  AIR: {free_fall: {elevation: -1 m}}\nlines:\n" + lines.String()
}

// benchmarks are the plants whose runs are timed, each with the tolerance at which its levels are right to a micrometre or nearly so.
func benchmarks(b *testing.B) map[string]string {
	demo, ok := scenarios.Demo("ten_vessels")
	if !ok {
		b.Fatal("no such demo")
	}
	return map[string]string{"chain_10": chainOf(10), "chain_100": chainOf(100), "chain_1000": chainOf(1000), "grid_9": gridOf(3), "grid_100": gridOf(10),
		"grid_1024": gridOf(32), "grid_10000": gridOf(100), "chain_10000": chainOf(10000), "ten_vessels": string(demo),
		"mixed_10": mixedOf(10), "mixed_100": mixedOf(100), "mixed_1000": mixedOf(1000)}
}

func load(b *testing.B, text string) *network.Plant {
	p, err := scenarios.Load("plant.yaml", []byte(text), scenarios.Options{})
	if err == nil {
		err = p.Refresh()
	}
	if err != nil {
		b.Fatal(err)
	}
	return p
}

func BenchmarkCompile(b *testing.B) {
	for name, text := range benchmarks(b) {
		b.Run(name, func(b *testing.B) {
			p := load(b, text)
			b.ReportAllocs()
			for b.Loop() {
				if _, err := network.Compile(p, network.Options{}); err != nil {
					b.Fatal(err)
				}
			}
		})
	}
}

func BenchmarkRun(b *testing.B) {
	for name, text := range benchmarks(b) {
		b.Run(name, func(b *testing.B) { runs(b, text, how{}, network.RunOptions{}) })
	}
}

// BenchmarkSample runs the demos as samples of their doubts are run.
func BenchmarkSample(b *testing.B) {
	for _, name := range scenarios.Demos() {
		data, _ := scenarios.Demo(name)
		b.Run(name, func(b *testing.B) {
			m := compile(b, string(data), how{tolerance: study.SampleTolerance})
			b.ReportAllocs()
			for b.Loop() {
				if _, err := m.Brief(context.Background(), network.RunOptions{}); err != nil {
					b.Fatal(err)
				}
			}
		})
	}
}

// runs runs a compiled plant again and again.
func runs(b *testing.B, text string, h how, opt network.RunOptions) {
	m := compile(b, text, h)
	b.ReportAllocs()
	var r *network.Result
	for b.Loop() {
		var err error
		if r, err = m.Run(context.Background(), opt); err != nil {
			b.Fatal(err)
		}
	}
	b.ReportMetric(float64(r.Work.Steps), "steps")
	b.ReportMetric(float64(b.Elapsed().Microseconds())/float64(b.N)/float64(r.Work.Steps+r.Work.Rejected), "µs/step")
}

// BenchmarkLoad reads, checks and readies plant files.
func BenchmarkLoad(b *testing.B) {
	for _, n := range []int{100, 1000, 10000} {
		b.Run(fmt.Sprintf("chain_%d", n), func(b *testing.B) {
			text := chainOf(n)
			b.SetBytes(int64(len(text)))
			b.ReportAllocs()
			for b.Loop() {
				p := load(b, text)
				if faults, _ := p.Validate(); len(faults) > 0 {
					b.Fatal(faults[0])
				}
			}
		})
	}
}

// BenchmarkMemory tells what a compiled plant holds on to besides the plant itself, in bytes a line: as compiled, and after a run, without results.
func BenchmarkMemory(b *testing.B) {
	held := func() float64 {
		runtime.GC()
		var m runtime.MemStats
		runtime.ReadMemStats(&m)
		return float64(m.HeapAlloc)
	}
	for name, text := range map[string]string{"chain_10000": chainOf(10000), "chain_100000": chainOf(100000), "grid_10000": gridOf(100)} {
		b.Run(name, func(b *testing.B) {
			p := load(b, text)
			for b.Loop() {
				before := held()
				m, err := network.Compile(p, network.Options{})
				if err != nil {
					b.Fatal(err)
				}
				compiled := held()
				if _, err := m.Brief(context.Background(), network.RunOptions{}); err != nil {
					b.Fatal(err)
				}
				run := held()
				runtime.KeepAlive(m)
				b.ReportMetric((compiled-before)/float64(len(p.Lines)), "B/line")
				b.ReportMetric((run-before)/float64(len(p.Lines)), "B/line-run")
			}
		})
	}
}

// BenchmarkReport writes the report of a day of forty vessels.
func BenchmarkReport(b *testing.B) {
	text := strings.Replace(chainOf(40), "run_for: 4 h", "run_for: 24 h", 1)
	p := load(b, text)
	m := compile(b, text, how{})
	r, err := m.Run(context.Background(), network.RunOptions{Series: true})
	if err != nil {
		b.Fatal(err)
	}
	b.ReportAllocs()
	for b.Loop() {
		if err := viz.Write(io.Discard, viz.Page{Plant: p, Result: r}); err != nil {
			b.Fatal(err)
		}
	}
}
