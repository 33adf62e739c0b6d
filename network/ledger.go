package network

import "math"

// ledger books the volumes: what each line passed each way, what came in, and when lines ran backwards.
type ledger struct {
	forward, backward []float64 // m³ up to the last booked time
	z                 []float64 // integrals there
	reversals         [][]Reversal
	open              []bool // the last reversal of the line still runs
}

func newLedger(s *system) *ledger {
	nl := len(s.lines)
	return &ledger{forward: make([]float64, nl), backward: make([]float64, nl), z: make([]float64, s.m),
		reversals: make([][]Reversal, nl), open: make([]bool, nl)}
}

func (b *ledger) reset() {
	clear(b.forward)
	clear(b.backward)
	clear(b.z)
	clear(b.open)
	for i := range b.reversals {
		b.reversals[i] = nil
	}
}

// passed returns what line i has passed each way when its integral stands at z, taking the flow since the last booking as one way.
func (b *ledger) passed(i int, z float64) (forward, backward float64) {
	d := z - b.z[i]
	return b.forward[i] + math.Max(d, 0), b.backward[i] + math.Max(-d, 0)
}

// book takes the integrals over from one snapshot to the next, between which the flow of a line turns at most once.
func (b *ledger) book(sim *simulation, from, to *snapshot) {
	for i := range b.forward {
		b.line(sim, i, from, to)
	}
	copy(b.z, to.z)
}

func (b *ledger) line(sim *simulation, i int, from, to *snapshot) {
	qa, qb := from.q[i], to.q[i]
	switch {
	case qa >= 0 && qb >= 0:
		b.ahead(i, to.z[i]-from.z[i])
		if b.open[i] {
			b.close(i, from.t)
		}
	case qa <= 0 && qb <= 0:
		b.back(i, from.t, to.t, to.z[i]-from.z[i], math.Min(qa, qb))
	default:
		t := sim.turn(i, from.t, to.t, qa, qb)
		z := sim.solver.Dense().OneZ(i, t)
		if qa < 0 {
			b.back(i, from.t, t, z-from.z[i], qa)
			b.close(i, t)
			b.ahead(i, to.z[i]-z)
		} else {
			b.ahead(i, z-from.z[i])
			b.back(i, t, to.t, to.z[i]-z, qb)
		}
	}
}

// ahead books dz of forward flow; what is less than nothing ran back for a moment between the ends.
func (b *ledger) ahead(i int, dz float64) {
	if dz < 0 {
		b.backward[i] -= dz
		return
	}
	b.forward[i] += dz
}

// back books dz ≤ 0 of backward flow from t0 to t1.
func (b *ledger) back(i int, t0, t1, dz, peak float64) {
	if dz > 0 { // it ran forward for a moment between
		b.forward[i] += dz
		dz = 0
	}
	b.backward[i] -= dz
	if peak == 0 {
		return
	}
	if !b.open[i] {
		b.reversals[i] = append(b.reversals[i], Reversal{From: t0})
		b.open[i] = true
	}
	r := &b.reversals[i][len(b.reversals[i])-1]
	r.To = t1
	r.Volume -= dz
	r.Peak = math.Max(r.Peak, -peak)
}

// close ends the reversal that runs.
func (b *ledger) close(i int, t float64) {
	b.open[i] = false
	r := &b.reversals[i][len(b.reversals[i])-1]
	r.To = math.Max(r.To, t)
}
