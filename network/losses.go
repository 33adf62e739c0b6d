package network

import (
	"math"

	"headfall/elements"
)

// Usual end losses, on the velocity head in the bore at that end: 0.5 where liquid enters a sharp-edged pipe from a vessel, 1.0 where its
// velocity head is lost in a vessel or the air. Source: any handbook of hydraulics, e.g. Crane TP-410.
const (
	entryLoss = 0.5
	exitLoss  = 1.0
)

// directed is a loss that depends on the direction of flow, standing before part `at` (len(parts) for the `to` end): coefficients of q|q|, Pa·s²/m⁶.
type directed struct {
	at       int
	fwd, rev float64
}

// velocityHead returns ρ/2A², Pa·s²/m⁶, of a bore; 0 for none.
func velocityHead(rho, bore float64) float64 {
	if bore <= 0 {
		return 0
	}
	a := math.Pi / 4 * bore * bore
	return rho / (2 * a * a)
}

// endLosses works out the losses of a line that depend on the direction of flow and puts their sum into its chain.
func (s *system) endLosses(c *line) {
	l := c.plan
	if in, out := s.lossesAt(l, false); in+out > 0 {
		c.losses = append(c.losses, directed{0, in, out})
	}
	c.losses = append(c.losses, boreChanges(l, s.fluid.Density)...)
	if in, out := s.lossesAt(l, true); in+out > 0 {
		c.losses = append(c.losses, directed{len(l.Parts), out, in})
	}
	for _, d := range c.losses {
		c.chain.fwd += d.fwd
		c.chain.rev += d.rev
	}
}

// lossesAt returns the coefficients for liquid entering and leaving the line at one of its ends.
func (s *system) lossesAt(l *Line, to bool) (in, out float64) {
	tag := l.From
	if to {
		tag = l.To
	}
	bore := l.endBore(to)
	if _, ok := s.teeAt[tag]; ok || bore == 0 {
		return 0, 0
	}
	kIn, kOut := entryLoss, exitLoss
	if own, ok := l.endPart(to).(elements.OwnEnd); ok && own.OwnEnd() {
		kIn, kOut = 0, 0
	}
	if i, ok := s.outsideAt[tag]; ok && s.outside[i].point.Pressed {
		kIn, kOut = 0, 0
	}
	if !math.IsNaN(l.Entry) {
		kIn = l.Entry
	}
	if !math.IsNaN(l.Exit) {
		kOut = l.Exit
	}
	head := velocityHead(s.fluid.Density, bore)
	return kIn * head, kOut * head
}

// boreChanges returns the losses of sudden changes of bore between pipes and fittings in series: (1−β²)² where the stream widens (Borda–Carnot),
// 0.5·(1−β²) where it narrows, on the velocity head in the smaller bore, β the ratio of bores; none where a reducer is given between.
func boreChanges(l *Line, rho float64) (all []directed) {
	last := 0.0
	for i, f := range l.Parts {
		_, long := f.Part.(elements.Long)
		r, fits := f.Part.(elements.Reduces)
		if fits && r.Reduces() {
			last = 0
		}
		b := boreOf(f.Part)
		if !long && !fits || b == 0 {
			continue
		}
		if last > 0 && math.Abs(b-last) > 1e-9*b {
			small, beta := math.Min(b, last), math.Min(b, last)/math.Max(b, last)
			head := velocityHead(rho, small)
			widen, narrow := math.Pow(1-beta*beta, 2)*head, 0.5*(1-beta*beta)*head
			if b > last {
				all = append(all, directed{i, widen, narrow})
			} else {
				all = append(all, directed{i, narrow, widen})
			}
		}
		last = b
		if fits && r.Reduces() {
			last = 0
		}
	}
	return all
}
