package study

import (
	"context"
	"fmt"
	"math"

	"gonum.org/v1/gonum/mat"
)

// curve gives the residuals of several points side by side: one row a point. A row that could not be computed is nil.
type curve func(ctx context.Context, points [][]float64) ([][]float64, error)

// solved is where least squares ended.
type solved struct {
	x, r, w  []float64 // point, residuals, weights
	jacobian *mat.Dense
	scatter  float64
	rounds   int
	settled  bool
}

const (
	slopeStep = 2e-3 // of a scaled number: wide against the accuracy of a run, narrow against the curve
	nearness  = 1e-5 // of a scaled number: steps under this end the search
	mostTurns = 40
)

// leastSquares finds the point with the least loss: Levenberg–Marquardt on residuals that are weighted anew in every round, first by Huber's rule,
// which finds its way from afar, then by Tukey's, which leaves outliers out. Several lengths of step are tried side by side.
//
// Source: Marquardt, SIAM J. Appl. Math. 11 (1963); iterative reweighting: Holland and Welsch, Comm. Statist. A6 (1977).
func leastSquares(ctx context.Context, f curve, x []float64, progress func(float64)) (*solved, error) {
	s := &solved{x: append([]float64(nil), x...)}
	for stage, l := range []loss{huber, tukey} {
		lambda := 1e-3
		for turn := range mostTurns {
			if err := s.slopes(ctx, f); err != nil {
				return s, err
			}
			progress((float64(stage) + float64(turn)/mostTurns) / 2)
			s.scatter = scatter(s.r, len(s.x))
			s.weigh(l)
			moved, err := s.step(ctx, f, l, &lambda)
			if err != nil {
				return s, err
			}
			s.rounds++
			if s.settled = moved < nearness; s.settled {
				break
			}
		}
	}
	err := s.slopes(ctx, f)
	if err == nil {
		s.scatter = scatter(s.r, len(s.x))
		s.weigh(tukey)
	}
	return s, err
}

func (s *solved) weigh(l loss) {
	s.w = make([]float64, len(s.r))
	for i, v := range s.r {
		s.w[i] = l.weight(v / s.scatter)
	}
}

// slopes computes residuals and their slopes at the present point by central differences.
func (s *solved) slopes(ctx context.Context, f curve) error {
	points := [][]float64{s.x}
	for k := range s.x {
		for _, side := range []float64{1, -1} {
			p := append([]float64(nil), s.x...)
			p[k] += side * slopeStep
			points = append(points, p)
		}
	}
	rows, err := f(ctx, points)
	if err != nil {
		return err
	}
	for i, row := range rows {
		if row == nil {
			return fmt.Errorf("the plant cannot be calculated at the values %v", points[i])
		}
	}
	s.r = rows[0]
	s.jacobian = mat.NewDense(len(s.r), len(s.x), nil)
	for k := range s.x {
		for i := range s.r {
			s.jacobian.Set(i, k, (rows[1+2*k][i]-rows[2+2*k][i])/(2*slopeStep))
		}
	}
	return nil
}

// step tries steps of several lengths, takes the best, and returns how far it went; 0 when none is better.
func (s *solved) step(ctx context.Context, f curve, l loss, lambda *float64) (moved float64, err error) {
	var points [][]float64
	var damp []float64
	for k := -1; k <= 3; k++ {
		d := *lambda * math.Pow(10, float64(k))
		dx := s.damped(d)
		p := append([]float64(nil), s.x...)
		for i := range p {
			p[i] += math.Max(-1, math.Min(1, dx[i]))
		}
		points, damp = append(points, p), append(damp, d)
	}
	rows, err := f(ctx, points)
	if err != nil {
		return 0, err
	}
	best, at := l.total(s.r, s.scatter), -1
	for i, row := range rows {
		if row != nil {
			if v := l.total(row, s.scatter); v < best {
				best, at = v, i
			}
		}
	}
	if at < 0 {
		*lambda *= 1e4
		return 0, nil
	}
	for i := range s.x {
		moved = math.Max(moved, math.Abs(points[at][i]-s.x[i]))
	}
	s.x, *lambda = points[at], math.Max(damp[at], 1e-12)
	return moved, nil
}

// damped solves (JᵀWJ + λ·diag)·dx = −JᵀWr.
func (s *solved) damped(lambda float64) []float64 {
	n := len(s.x)
	a, b := s.normal()
	for k := range n {
		a.SetSym(k, k, a.At(k, k)*(1+lambda)+1e-300)
	}
	dx := mat.NewVecDense(n, nil)
	var ch mat.Cholesky
	if !ch.Factorize(a) || ch.SolveVecTo(dx, b) != nil {
		return make([]float64, n)
	}
	return dx.RawVector().Data
}

// normal returns JᵀWJ and −JᵀWr.
func (s *solved) normal() (*mat.SymDense, *mat.VecDense) {
	n := len(s.x)
	a, b := mat.NewSymDense(n, nil), mat.NewVecDense(n, nil)
	for i := range s.r {
		w := s.w[i]
		for k := range n {
			jk := s.jacobian.At(i, k)
			b.SetVec(k, b.AtVec(k)-w*jk*s.r[i])
			for m := k; m < n; m++ {
				a.SetSym(k, m, a.At(k, m)+w*jk*s.jacobian.At(i, m))
			}
		}
	}
	return a, b
}
