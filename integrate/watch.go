package integrate

import "math"

// samples is the number of equal parts of a step at whose ends the functions are looked at.
const samples = 4

// noise is the share of a function's largest value over a step below which its value at a Restart is taken for zero.
const noise = 1e-12

// watch remembers on which side of zero each event function is. A function fires when, from strictly one side, it reaches zero or the other
// side in a direction that counts. The side is not known, so that nothing fires before the function has been seen strictly on one side,
//
//   - after the function fired;
//   - while it is off (NaN);
//   - after a Restart, if it fired at that very time, or if its value is zero to noise against its largest in the first step.
//
// Two sign changes between two samples go unseen.
type watch struct {
	side    []int8 // at the start of the step: −1, 1, or 0 = not known
	walk    []int8 // at the end of it
	v       [samples + 1][]float64
	at      []float64 // functions at some time in the step
	before  []float64 // functions shortly before the end of a redone step
	y       []float64
	fired   []int
	firedAt float64 // time of fired, NaN if there is none
	fresh   bool    // sides are to be found anew: after a Restart
}

func (w *watch) forget() { w.fired, w.firedAt, w.fresh = w.fired[:0], math.NaN(), true }

// size makes room for so many functions and unknowns.
func (w *watch) size(k, n int) {
	if len(w.side) == k && len(w.y) == n {
		return
	}
	w.side, w.walk = make([]int8, k), make([]int8, k)
	for i := range w.v {
		w.v[i] = make([]float64, k)
	}
	w.at, w.before, w.y = make([]float64, k), make([]float64, k), make([]float64, n)
	w.fired = make([]int, 0, k)
	w.firedAt, w.fresh = math.NaN(), true
}

func sign(v float64) int8 {
	switch {
	case v > 0:
		return 1
	case v < 0:
		return -1
	}
	return 0 // also NaN
}

// crossed reports whether a function on one side has come to zero or the other in a direction that counts.
func crossed(side int8, v float64, direction int) bool {
	return side != 0 && v == v && sign(v) != side && (direction == 0 || int8(direction) == -side)
}

// start finds the sides at the start of a step that has been sampled.
func (w *watch) start(t float64) {
	if !w.fresh {
		return
	}
	w.fresh = false
	for i := range w.side {
		most := 0.0
		for k := range w.v {
			if a := math.Abs(w.v[k][i]); a > most {
				most = a
			}
		}
		v := w.v[0][i]
		w.side[i] = sign(v)
		if math.Abs(v) <= noise*most {
			w.side[i] = 0
		}
	}
	if t == w.firedAt {
		for _, i := range w.fired {
			w.side[i] = 0
		}
	}
}

// first returns the first sample by which any function has crossed, 0 if none has; walk then holds the sides before that sample.
func (w *watch) first(ev Events) int {
	copy(w.walk, w.side)
	for k := 1; k <= samples; k++ {
		for i, v := range w.v[k] {
			if crossed(w.walk[i], v, ev.Direction(i)) {
				return k
			}
		}
		for i, v := range w.v[k] {
			w.walk[i] = sign(v)
		}
	}
	return 0
}

// next takes over the end of a step in which nothing fired.
func (w *watch) next() {
	copy(w.side, w.walk)
	w.v[0], w.v[samples] = w.v[samples], w.v[0]
}
