package network

import "math"

// ledger books the volumes: what each line passed each way, and when lines ran backwards. A line's integral is taken over where its flow turns.
type ledger struct {
	forward, backward []float64 // m³ up to the last turn
	z                 []float64 // integrals there
	reversals         [][]Reversal
	open              []bool // the last reversal of the line still runs
}

func newLedger(s *system) *ledger {
	n := len(s.lines)
	return &ledger{forward: make([]float64, n), backward: make([]float64, n), z: make([]float64, n), reversals: make([][]Reversal, n), open: make([]bool, n)}
}

func (b *ledger) reset() {
	clear(b.forward)
	clear(b.backward)
	clear(b.z)
	clear(b.open)
	for i := range b.reversals {
		b.reversals[i] = b.reversals[i][:0]
	}
}

// passed returns what line i has passed each way when its integral stands at z.
func (b *ledger) passed(i int, z float64) (forward, backward float64) {
	d := z - b.z[i]
	return b.forward[i] + math.Max(d, 0), b.backward[i] + math.Max(-d, 0)
}

// take books what line i has passed until its integral stood at z.
func (b *ledger) take(i int, z float64) {
	b.forward[i], b.backward[i] = b.passed(i, z)
	if r := b.reversals[i]; b.open[i] && z < b.z[i] {
		r[len(r)-1].Volume += b.z[i] - z
	}
	b.z[i] = z
}

// finish books what is left at the end of a run.
func (b *ledger) finish(z []float64) {
	for i := range b.forward {
		b.take(i, z[i])
	}
}

// book follows the flows from one snapshot to the next, between which that of a line turns at most once.
func (b *ledger) book(sim *simulation, from, to *snapshot) {
	for i, qa := range from.q {
		if qb := to.q[i]; qa < 0 || qb < 0 || b.open[i] {
			b.follow(sim, i, from.t, to.t, qa, qb)
		}
	}
}

// follow is book for a line that runs backwards, or did.
func (b *ledger) follow(sim *simulation, i int, t0, t1, qa, qb float64) {
	switch {
	case qa >= 0 && qb >= 0:
		b.turn(sim, i, t0)
	case qa <= 0 && qb <= 0:
		if !b.open[i] {
			b.turn(sim, i, t0)
		}
		b.back(i, t1, math.Min(qa, qb))
	default:
		t := sim.turn(i, t0, t1, qa, qb)
		if qa < 0 {
			if !b.open[i] {
				b.turn(sim, i, t0)
			}
			b.back(i, t, qa)
			b.turn(sim, i, t)
			return
		}
		if b.open[i] {
			b.turn(sim, i, t0)
		}
		b.turn(sim, i, t)
		b.back(i, t1, qb)
	}
}

// turn ends the reversal of a line that runs, or begins one.
func (b *ledger) turn(sim *simulation, i int, t float64) {
	b.take(i, sim.solver.Dense().OneZ(i, t))
	b.open[i] = !b.open[i]
	if b.open[i] {
		b.reversals[i] = append(b.reversals[i], Reversal{From: t, To: t})
		return
	}
	r := &b.reversals[i][len(b.reversals[i])-1]
	r.To = math.Max(r.To, t)
}

// back notes that the reversal goes on to t.
func (b *ledger) back(i int, t, q float64) {
	r := &b.reversals[i][len(b.reversals[i])-1]
	r.To = t
	r.Peak = math.Max(r.Peak, -q)
}
