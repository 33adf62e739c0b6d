package sparse

import (
	"errors"
	"math"
	"math/rand/v2"
	"slices"
	"testing"

	"gonum.org/v1/gonum/mat"
	"pgregory.net/rapid"
)

// dense solves A x = b with gonum's LU, the oracle of these tests.
func dense(p *Pattern, v, b []float64) (x []float64, cond float64) {
	a := mat.NewDense(p.N, p.N, nil)
	for j := range p.N {
		for k := p.Ptr[j]; k < p.Ptr[j+1]; k++ {
			a.Set(int(p.Row[k]), j, v[k])
		}
	}
	var lu mat.LU
	lu.Factorize(a)
	var s mat.VecDense
	if err := lu.SolveVecTo(&s, false, mat.NewVecDense(p.N, slices.Clone(b))); err != nil && s.IsEmpty() {
		return nil, math.Inf(1)
	}
	return s.RawVector().Data, lu.Cond()
}

func compare(t interface {
	Fatalf(string, ...any)
	Helper()
}, got, want []float64, cond float64) {
	t.Helper()
	size, worst := 0.0, 0.0
	for i := range want {
		size = max(size, math.Abs(want[i]))
		worst = max(worst, math.Abs(got[i]-want[i]))
	}
	if !(worst <= 1e-14*max(cond, 100)*size) {
		t.Fatalf("differs from the dense solution by %.3g of %.3g, condition %.3g", worst, size, cond)
	}
}

func TestSolveAgainstDense(t *testing.T) {
	rng := rand.New(rand.NewPCG(1, 2))
	for name, p := range map[string]*Pattern{
		"one": chain(1), "two": chain(2), "chain": chain(57), "both ends": bothEnds(58), "odd ends": bothEnds(59),
		"grid": grid(12), "renumbered grid": renumbered(grid(12)), "large grid": grid(20), "tree": tree(80, rng),
		"random": random(60, 4, rng), "full": random(30, 200, rng), "star": graph(20, star(20)),
	} {
		t.Run(name, func(t *testing.T) {
			f := Analyse(p)
			for range 3 {
				v, b := dominant(p, rng), normals(p.N, rng)
				want, cond := dense(p, v, b)
				if err := f.Refactor(v); err != nil {
					t.Fatal(err)
				}
				f.wild = true // to have the result tested
				got := slices.Clone(b)
				e, err := f.SolveChecked(got)
				if err != nil || e > 1e-13 {
					t.Fatalf("backward error %g, %v", e, err)
				}
				compare(t, got, want, cond)
				f.Solve(b)
				compare(t, b, want, cond)
			}
			if f.Counts().Pivoted > 0 {
				t.Errorf("pivoted %d times on dominant matrices", f.Counts().Pivoted)
			}
		})
	}
}

func TestOrderOnceFoundIsKept(t *testing.T) {
	rng := rand.New(rand.NewPCG(8, 9))
	for name, p := range map[string]*Pattern{"chain": chain(50), "tree": tree(200, rng), "grid": grid(15)} {
		q := renumbered(p)
		if f := Analyse(q); !f.plain || 10*f.Size() > 11*Analyse(p).Size() {
			t.Errorf("%s: unknowns in the order of elimination are ordered anew, %d numbers instead of %d", name, f.Size(), Analyse(p).Size())
		}
	}
}

func star(n int) (edges [][2]int) {
	for i := 1; i < n; i++ {
		edges = append(edges, [2]int{0, i})
	}
	return edges
}

func normals(n int, rng *rand.Rand) []float64 {
	b := make([]float64, n)
	for i := range b {
		b[i] = rng.NormFloat64()
	}
	return b
}

// Random unsymmetric matrices, of which many have tiny or zero diagonals and rows in very different units.
func TestPropertyAgainstDense(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		n := rapid.IntRange(1, 40).Draw(t, "n")
		extra := rapid.IntRange(0, 6).Draw(t, "extra")
		rng := rand.New(rand.NewPCG(rapid.Uint64().Draw(t, "seed"), 7))
		small := rapid.SampledFrom([]float64{1, 1e-3, 1e-13, 0}).Draw(t, "diagonal")
		p := random(n, extra, rng)
		v, b := dominant(p, rng), normals(n, rng)
		row := make([]float64, n)
		for i := range row {
			row[i] = math.Pow(10, float64(rng.IntN(9)-4))
		}
		for j := range n {
			for k := p.Ptr[j]; k < p.Ptr[j+1]; k++ {
				if p.Row[k] == int32(j) && rng.IntN(2) == 0 {
					v[k] *= small
				}
				v[k] *= row[p.Row[k]]
			}
		}
		for i := range b {
			b[i] *= row[i]
		}
		want, cond := dense(p, v, b)
		f := Analyse(p)
		if err := f.Refactor(v); err != nil {
			var s *SingularError
			if !errors.As(err, &s) || cond < 1e12 {
				t.Fatalf("%v at condition %g", err, cond)
			}
			return
		}
		e, err := f.SolveChecked(b)
		if err != nil && cond < 1e12 {
			t.Fatalf("%v at condition %g", err, cond)
		}
		if err != nil || cond > 1e12 {
			return
		}
		if e > Tolerated {
			t.Fatalf("backward error %g", e)
		}
		compare(t, b, want, cond*max(1, 1e15*e))
	})
}

func TestZeroDiagonalNeedsPivoting(t *testing.T) {
	p := graph(2, [][2]int{{0, 1}})
	f := Analyse(p)
	if err := f.Refactor([]float64{0, 1, 1, 0}); err != nil {
		t.Fatal(err)
	}
	b := []float64{3, 5}
	f.Solve(b)
	if b[0] != 5 || b[1] != 3 || f.Counts().Pivoted != 1 {
		t.Errorf("got %v with %+v", b, f.Counts())
	}
}

// A tiny pivot passes the guard where its row is large in other units; the residual then finds the loss of digits and pivoting repairs it.
func TestResidualFindsWhatTheGuardLetsPass(t *testing.T) {
	p := graph(3, [][2]int{{0, 1}, {1, 2}, {0, 2}})
	v := []float64{1e-9, 1, 2, 1, 1, 3, 2, 5, 1}
	f := Analyse(p)
	if err := f.Refactor(v); err != nil {
		t.Fatal(err)
	}
	b := []float64{1, 2, 3}
	want, cond := dense(p, v, b)
	e, err := f.SolveChecked(b)
	if err != nil || e > 1e-14 {
		t.Fatalf("backward error %g, %v", e, err)
	}
	compare(t, b, want, cond)
}

func TestSingularNamesItsColumn(t *testing.T) {
	// Two parts: the second is a closed chain of conductances, whose last pivot is nothing but rounding.
	p := graph(9, [][2]int{{0, 1}, {1, 2}, {3, 4}, {4, 5}, {5, 6}, {6, 7}, {7, 8}, {8, 3}})
	v := dominant(p, rand.New(rand.NewPCG(3, 4)))
	for j := int32(3); j < 9; j++ {
		for k := p.Ptr[j]; k < p.Ptr[j+1]; k++ {
			c := 0.3 + 0.1*float64(min(j, p.Row[k])) // of the pipe from the smaller end on
			if a, b := min(j, p.Row[k]), max(j, p.Row[k]); a == 3 && b == 8 {
				c = 1.7
			}
			v[k] = -c
		}
	}
	for j := int32(3); j < 9; j++ { // a pipe's conductance is on the diagonal of both its ends
		sum, diag := 0.0, int32(0)
		for k := p.Ptr[j]; k < p.Ptr[j+1]; k++ {
			if p.Row[k] == j {
				diag = k
			} else {
				sum -= v[k]
			}
		}
		v[diag] = sum
	}
	err := Analyse(p).Refactor(v)
	var s *SingularError
	if !errors.As(err, &s) || s.Column < 3 {
		t.Fatalf("got %v", err)
	}
	v[p.Ptr[4]] *= 1.001
	if err := Analyse(p).Refactor(v); err != nil {
		t.Error(err)
	}
}

func TestNoAllocation(t *testing.T) {
	rng := rand.New(rand.NewPCG(5, 6))
	for name, p := range map[string]*Pattern{"chain": chain(100), "grid": grid(10)} {
		f := Analyse(p)
		v, b := dominant(p, rng), normals(p.N, rng)
		n := testing.AllocsPerRun(10, func() {
			if err := f.Refactor(v); err != nil {
				t.Fatal(err)
			}
			f.Solve(b)
			if _, err := f.SolveChecked(b); err != nil {
				t.Fatal(err)
			}
		})
		if n != 0 {
			t.Errorf("%s: %g allocations", name, n)
		}
	}
}
