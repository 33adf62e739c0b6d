package integrate

import "math"

// BDF is the second, independent family: the numerical differentiation formulas of orders 1 to 5 in backward differences, with the step held
// constant for a while and the history interpolated when it changes (Shampine and Reichelt, SIAM J. Sci. Comput. 18:1, 1997). Each step
// solves its equation by Newton's method on a linearisation at the step's start.
var BDF Method = ndf{}

type ndf struct{}

func (ndf) Name() string { return "BDF" }

func (ndf) stepper(s *Solver) stepper {
	b := &bdf{s: s}
	for k := range b.d {
		b.d[k], b.moved[k] = make([]float64, s.n), make([]float64, s.n)
		b.dz[k], b.movedZ[k] = make([]float64, s.m), make([]float64, s.m)
	}
	for _, v := range []*[]float64{&b.change, &b.psi, &b.rate, &b.delta} {
		*v = make([]float64, s.n)
	}
	b.changeZ, b.psiZ, b.rateZ = make([]float64, s.m), make([]float64, s.m), make([]float64, s.m)
	for k := 1; k <= highest; k++ {
		b.gamma[k] = b.gamma[k-1] + 1/float64(k)
	}
	return b
}

const (
	highest = 5           // order
	history = highest + 3 // differences kept
)

// kappa are the coefficients of the term that makes the formulas more accurate than the plain BDF of the same order.
var kappa = [highest + 1]float64{0, -0.1850, -1.0 / 9, -0.0823, -0.0415, 0}

// bdf is the stepper of BDF. With ∇ʲ for d[j], γ_k = Σ_{j≤k} 1/j and Δ = y − Σ_{j≤k} ∇ʲ, the change against the prediction, a step of h solves
//
//	M ((1−κ) γ_k Δ + Σ_{j≤k} γⱼ ∇ʲ) = h f(t+h, y)
//
// and the integrals obey the same formula with g.
type bdf struct {
	s             *Solver
	k             int // order
	h             float64
	d, moved      [history][]float64 // backward differences at the start of the step and at its end
	dz, movedZ    [history][]float64
	ready         bool // moved and movedZ belong to the last attempt
	change, psi   []float64
	changeZ, psiZ []float64
	rate, rateZ   []float64
	delta         []float64
	gamma         [highest + 1]float64
	steps         int // with this step and order
	failures      int // in a row
	norm          float64
	rounds        int // of Newton
}

func (b *bdf) order() int  { return 1 }
func (b *bdf) degree() int { return highest - 1 }

// constant returns the factor from Δ to the error of order k.
func (b *bdf) constant(k int) float64 { return kappa[k]*b.gamma[k] + 1/float64(k+1) }

func (b *bdf) restart() {
	s := b.s
	b.k, b.steps, b.failures = 1, 0, 0
	if b.h = s.next; math.IsInf(b.h, 1) {
		b.h = 1
	}
	for j := range b.d {
		clear(b.d[j])
		clear(b.dz[j])
	}
	copy(b.d[0], s.y)
	copy(b.dz[0], s.z)
	for i, v := range s.slope {
		if s.settler == nil || s.mass[i] { // what is settled may have no slope worth the name: it begins as standing still
			b.d[1][i] = b.h * v
		}
	}
	for i, v := range s.g {
		b.dz[1][i] = b.h * v
	}
	b.balance()
}

// balance takes out of the first differences what the algebraic equations are out of balance by, as one more Newton correction of them would: what is
// invariant between unknowns and integrals holds for the formulas only when it holds for the history.
func (b *bdf) balance() {
	s := b.s
	if !s.algebraic || !s.linear || s.factoriseAlgebraic() != nil {
		return
	}
	s.algebraicResidual(b.delta, s.f)
	s.factor.Solve(b.delta)
	for j, v := range b.delta {
		if s.mass[j] || v == 0 {
			continue
		}
		for k := s.pat.Ptr[j]; k < s.pat.Ptr[j+1]; k++ {
			if i := s.pat.Row[k]; s.mass[i] {
				b.d[1][i] += b.h * s.lin.DfDy[k] * v
			}
		}
	}
	for i := range s.g {
		for l := s.iptr[i]; l < s.iptr[i+1]; l++ {
			if j := s.icol[l]; !s.mass[j] {
				b.dz[1][i] += b.h * s.lin.DgDy[l] * b.delta[j]
			}
		}
	}
}

func (b *bdf) attempt(h float64) (float64, error) {
	s := b.s
	s.linearise()
	b.rescale(h)
	b.ready = false
	alpha := (1 - kappa[b.k]) * b.gamma[b.k]
	if err := s.factorise(alpha / h); err != nil {
		return 0, err
	}
	predict(s.y1, b.psi, b.d[:b.k+1], b.gamma[:], alpha)
	predict(s.z1, b.psiZ, b.dz[:b.k+1], b.gamma[:], alpha)
	if ok, err := b.newton(h, alpha/h); !ok || err != nil {
		return math.NaN(), err
	}
	c := b.constant(b.k)
	for i, v := range b.change {
		s.err[i] = c * v
	}
	b.norm = norm(s.err, s.scale)
	return b.norm, nil
}

// predict sets y to Σ ∇ʲ and psi to Σ γⱼ∇ʲ/α.
func predict(y, psi []float64, d [][]float64, gamma []float64, alpha float64) {
	copy(y, d[0])
	clear(psi)
	for j := 1; j < len(d); j++ {
		c := gamma[j] / alpha
		for i, v := range d[j] {
			y[i] += v
			psi[i] += c * v
		}
	}
}

func (b *bdf) implicit() bool { return true }

const (
	maxRounds = 6
	converged = 0.02 // error of Newton's method allowed, in tolerances
	stirring  = 0.3  // corrections that do not shrink are let be below this, in tolerances
)

// newton solves for the change against the prediction in y1. The integrals follow from the rates linearised in the same way as in the last
// correction, so that what is invariant between them and the unknowns stays so to rounding, converged or not.
func (b *bdf) newton(h, shift float64) (ok bool, err error) {
	s := b.s
	clear(b.change)
	before, rate := 0.0, 0.0
	renewed := 0 // rounds until the slopes were worked out anew
	for b.rounds = 1; b.rounds <= maxRounds+renewed; b.rounds++ {
		s.rates(s.t+h, s.y1, b.rate, b.rateZ)
		if s.settler != nil && !s.settler.Settled(b.rate, false) {
			b.settle(s.t + h)
		}
		for i, f := range b.rate {
			b.delta[i] = f
			if s.mass[i] {
				b.delta[i] -= shift * (b.psi[i] + b.change[i])
			}
		}
		if b.rounds == 1 {
			if _, err := s.factor.SolveChecked(b.delta); err != nil {
				return false, err
			}
		} else {
			s.factor.Solve(b.delta)
		}
		for i, v := range b.delta {
			b.change[i] += v
			s.y1[i] += v
		}
		size := norm(b.delta, s.scale)
		rate = 0
		if before > 0 {
			rate = size / before
		}
		left := maxRounds + renewed - b.rounds
		switch {
		case b.rounds > 2 && rate >= 0.5 && size <= stirring: // to and fro over a corner of the law, within the tolerance
			return b.integrals(shift), nil
		case !(rate < 1) || size != size, rate > 0 && size*math.Pow(rate, float64(left))/(1-rate) > converged:
			if renewed == 0 && size == size && s.settler != nil { // the slopes of the step's start mislead: once more with those of here
				renewed = b.rounds
				if err := b.renew(h, shift); err != nil {
					return false, err
				}
				size = 0
				break
			}
			copy(s.err, b.delta)
			return false, nil
		case size <= converged/100 || rate > 0 && size*rate/(1-rate) <= converged:
			return b.integrals(shift), nil
		}
		before = size
	}
	copy(s.err, b.delta)
	return false, nil
}

// renew factorises the linearisation where Newton's method has got to, which is then no longer that of the step's start.
func (b *bdf) renew(h, shift float64) error {
	s := b.s
	s.sys.Linearise(s.t+h, s.y1, b.rate, b.rateZ, &s.lin)
	s.stats.Linearisations++
	s.linear = false
	return s.factorise(shift)
}

// settle lets the System balance its algebraic unknowns where Newton's method has got to: on the linearisation of the step's start alone it may not.
func (b *bdf) settle(t float64) {
	s := b.s
	for i, differential := range s.mass {
		if !differential {
			b.change[i] -= s.y1[i]
		}
	}
	s.settler.Settle(t, s.y1)
	for i, differential := range s.mass {
		if !differential {
			b.change[i] += s.y1[i]
		}
	}
	s.rates(t, s.y1, b.rate, b.rateZ)
}

// integrals sets z1 and its change against the prediction.
func (b *bdf) integrals(shift float64) bool {
	s := b.s
	for k := range s.z1 {
		sum := b.rateZ[k]
		for l := s.iptr[k]; l < s.iptr[k+1]; l++ {
			sum += s.lin.DgDy[l] * b.delta[s.icol[l]]
		}
		b.changeZ[k] = sum/shift - b.psiZ[k]
		s.z1[k] += b.changeZ[k]
		if sum-sum != 0 {
			return false
		}
	}
	return true
}
