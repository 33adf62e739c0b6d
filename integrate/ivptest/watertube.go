package ivptest

import (
	"encoding/json"
	"fmt"
	"math"
	"os"
)

// WaterTube is the water tube system of the Test Set for IVP Solvers: 18 alike pipes with inertia between 13 nodes, of which two store water.
// Its 49 unknowns are the 18 flows, their 18 friction factors and the 13 pressures. The balances of the nodes without storage are differentiated, which
// makes the system index 1; the hard switch between laminar and turbulent friction is frozen in Turbulent and moves at events.
type WaterTube struct {
	*Problem
	Turbulent []bool // by pipe
	Reference map[string]float64
	Switches  []Switch

	pipes   [][2]int // nodes from zero
	storage [13]bool
}

// Switch is a change of a pipe between laminar and turbulent.
type Switch struct {
	T    float64 `json:"t"`
	Pipe [2]int  `json:"pipe"`
	To   string  `json:"to"`
}

// Constants of the water tube, SI.
const (
	tubeNu       = 1.31e-6
	tubeRho      = 1000.0
	tubeCritical = 2300.0 // Reynolds number
	tubeLength   = 1000.0
	tubeRough    = 2e-4
	tubeD        = 1.0
	tubeA        = math.Pi / 4
	tubeC        = 200 / (tubeRho * 9.8) // storage, m³/Pa
	tubeInertia  = tubeRho * tubeLength / tubeA
	tubeLaminar  = 32 * tubeNu * tubeRho * tubeLength / (tubeA * tubeD * tubeD)
	tubeRe       = tubeD / (tubeNu * tubeA) // Reynolds number of a flow of one
	tubePipes    = 18
	tubeNodes    = 13
)

// NewWaterTube reads water_tube.json.
func NewWaterTube(file string) (*WaterTube, error) {
	text, err := os.ReadFile(file)
	if err != nil {
		return nil, err
	}
	var data struct {
		Edges     [][2]int
		Storage   []int `json:"storage_nodes"`
		Initial   map[string]float64
		Reference map[string]float64
		Switches  []Switch `json:"mode_events"`
	}
	if err := json.Unmarshal(text, &data); err != nil {
		return nil, err
	}
	w := &WaterTube{Reference: data.Reference, Switches: data.Switches, Turbulent: make([]bool, tubePipes)}
	for _, n := range data.Storage {
		w.storage[n-1] = true
	}
	for _, e := range data.Edges {
		w.pipes = append(w.pipes, [2]int{e[0] - 1, e[1] - 1})
	}
	n := 2*tubePipes + tubeNodes
	w.Problem = &Problem{Name: "water tube", T1: 61200, Y0: make([]float64, n), Algebraic: make([]bool, n), F: w.f, D: w.d}
	for k := range tubePipes {
		w.Y0[tubePipes+k] = data.Initial["lambda_"]
		w.Algebraic[tubePipes+k] = true
	}
	for i := range tubeNodes {
		w.Y0[2*tubePipes+i] = data.Initial["p"]
		w.Algebraic[2*tubePipes+i] = !w.storage[i]
	}
	return w, nil
}

// Named returns an unknown by its name in the reference, such as "phi1-2" or "p13".
func (w *WaterTube) Named(name string, y []float64) float64 {
	for k, e := range w.pipes {
		switch name {
		case fmt.Sprintf("phi%d-%d", e[0]+1, e[1]+1):
			return y[k]
		case fmt.Sprintf("lambda%d-%d", e[0]+1, e[1]+1):
			return y[tubePipes+k]
		}
	}
	for i := range tubeNodes {
		if name == fmt.Sprintf("p%d", i+1) {
			return y[2*tubePipes+i]
		}
	}
	return math.NaN()
}

// Pipe returns the ends of pipe k, as nodes from one.
func (w *WaterTube) Pipe(k int) [2]int { return [2]int{w.pipes[k][0] + 1, w.pipes[k][1] + 1} }

// Scale implements integrate.System: a relative tolerance on flows down to a tenth of a litre a second, 100 Pa on pressures.
func (w *WaterTube) Scale(y []float64, rtol float64, scale []float64) {
	for i := range scale {
		switch {
		case i < tubePipes:
			scale[i] = rtol * (math.Abs(y[i]) + 1e-4)
		case i < 2*tubePipes:
			scale[i] = rtol * y[i]
		default:
			scale[i] = rtol * 100
		}
	}
}

// Len, Values and Direction are the switches as integrate.Events: the Reynolds number against the critical one.
func (w *WaterTube) Len() int { return tubePipes }

// Direction implements integrate.Events.
func (w *WaterTube) Direction(int) int { return 0 }

// Values implements integrate.Events.
func (w *WaterTube) Values(_ float64, y, v []float64) {
	for k := range v {
		v[k] = math.Abs(y[k])*tubeRe - tubeCritical
	}
}
