package network

import "headfall/integrate"

// Grid are moments at which the levels of a run are wanted, and the room for them. It asks for no more steps than the run takes by itself.
type Grid struct {
	At     []float64 // s, ascending, from 0 to run_for
	Levels []float64 // m, vessel by vessel: that of vessel i at At[k] is Levels[i·len(At)+k]
}

// NewGrid makes room for the levels of so many vessels.
func NewGrid(at []float64, vessels int) *Grid {
	return &Grid{At: at, Levels: make([]float64, vessels*len(at))}
}

// gridder fills a grid while a run goes on.
type gridder struct {
	grid *Grid
	next int
}

// step takes the levels at the moments within the step just taken.
func (g *gridder) step(sim *simulation, out *integrate.Outcome) {
	if g.grid == nil {
		return
	}
	for g.next < len(g.grid.At) && g.grid.At[g.next] <= out.T {
		t := max(g.grid.At[g.next], out.T0)
		g.put(sim, func(i int) float64 { return sim.solver.EvalOne(i, t) })
	}
}

// finish fills what is left with the levels of the end: a run that came to rest stays as it is.
func (g *gridder) finish(sim *simulation) {
	for g.grid != nil && g.next < len(g.grid.At) {
		g.put(sim, func(i int) float64 { return sim.y[i] })
	}
}

// put enters the levels of one moment, from the volumes.
func (g *gridder) put(sim *simulation, volume func(i int) float64) {
	n := len(g.grid.At)
	for i := range sim.sys.stations {
		h, _ := sim.sys.stations[i].shape.Level(volume(i))
		g.grid.Levels[i*n+g.next] = h
	}
	g.next++
}
