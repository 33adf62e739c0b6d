package e2e

import (
	"fmt"
	"math"
	"testing"
)

// tall is two basins joined by an opening in their wall, 1 m over the datum in its middle; "" for the air instead of the second.
func tall(opening string, up, down string) string {
	to, b := "AIR", ""
	if down != "" {
		to, b = "B, enters: {centre: 1 m}", "\n  B: {shape: {box: {length: 50 m, width: 10 m, height: 4 m}}, base: 0 m, level: "+down+"}"
	}
	return plant("1 s", thin, `
vessels:
  A: {shape: {box: {length: 50 m, width: 10 m, height: 4 m}}, base: 0 m, level: `+up+`}`+b+`
outside:
  AIR: {free_fall: {elevation: 1 m}}
lines:
  L: {from: A, leaves: {centre: 1 m}, to: `+to+`, parts: [{orifice: {`+opening+`}}]}`)
}

// Tall side openings: O12 and O13 of the book, free, drowned, partly drowned and reversed by the integral over strips.
func TestTallOpenings(t *testing.T) {
	book := checks(t)
	flow := func(text string) float64 { return run(t, text, how{}).Series.Flow["L"][0] }
	const slot = "width: 1 m, height: 0.5 m, cd: 0.62"
	q := flow(tall(slot, "1.35 m", ""))
	book.HoldOne(t, "O12", 0, q)
	book.HoldOne(t, "O12", 1, q/(0.62*0.5*math.Sqrt(2*g0*0.35)))
	for i, ratio := range []float64{0.25, 0.5, 0.75, 1} {
		q := flow(tall("diameter: 400 mm, cd: 0.62", fmt.Sprintf("%.17g m", 0.8+0.4*ratio), ""))
		book.HoldOne(t, "O13", i, q/(0.62*math.Sqrt(2*g0)*math.Pow(0.4, 2.5)))
	}
	// strips by the midpoint rule, ten thousand of them
	strips := func(chord func(y float64) float64, h, up, down float64) (q float64) {
		const n = 20000
		for i := range n {
			z := 1 - h/2 + h*(float64(i)+0.5)/n
			w := h / n * chord(h*(float64(i)+0.5)/n) * 0.62 * math.Sqrt(2*g0)
			a, b := math.Max(up, z), math.Max(down, z)
			q += math.Copysign(w*math.Sqrt(math.Abs(a-b)), a-b)
		}
		return q
	}
	for _, c := range []struct{ up, down float64 }{{1.35, 0.9}, {1.35, 1.2}, {1.35, 1.3}, {1.1, 0.9}, {1.1, 1.05}, {0.9, 1.2}, {1.05, 1.3}, {0.85, 0.5}, {0.6, 1.1}, {2, 1}, {3, 0.5}, {0.5, 0.6}} {
		up, down := num(c.up)+" m", num(c.down)+" m"
		want := strips(func(float64) float64 { return 1 }, 0.5, c.up, c.down)
		near(t, fmt.Sprint("slot ", c), flow(tall(slot, up, down)), want, 1e-4*math.Abs(want)+1e-9)
		want = strips(func(y float64) float64 { return 2 * math.Sqrt(math.Max(0, y*(0.4-y))) }, 0.4, c.up, c.down)
		near(t, fmt.Sprint("round ", c), flow(tall("diameter: 400 mm, cd: 0.62", up, down)), want, 1e-4*math.Abs(want)+1e-9)
	}
}

// A basin empties through a slot in its wall: time from the closed form of the strips while the slot is a weir, dh/dt = −k·h^1.5, t = 2/k·(h⁻½ − h₀⁻½).
func TestSlotEmpties(t *testing.T) {
	text := plant("1 h", thin, `
vessels:
  A: {shape: {box: {length: 5 m, width: 2 m, height: 4 m}}, base: 0 m, level: 1.25 m}
outside:
  AIR: {free_fall: {elevation: 1 m}}
lines:
  L: {from: A, leaves: {centre: 1 m}, to: AIR, parts: [{orifice: {width: 0.2 m, height: 0.5 m, cd: 0.62}}]}
milestones:
  - {name: low, level: A, below: 0.8 m}`)
	k := 2.0 / 3 * 0.62 * 0.2 * math.Sqrt(2*g0) / 10
	for _, method := range []string{"", "bdf"} {
		within(t, "time", milestone(t, run(t, text, how{method: method, tolerance: 1e-8}), "low"), 2/k*(1/math.Sqrt(0.05)-1/math.Sqrt(0.5)), 1e-5)
	}
}
