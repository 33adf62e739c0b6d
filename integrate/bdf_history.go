package integrate

import "math"

// stretch is the largest factor by which differences are scaled up: beyond it they would be rounding.
const stretch = 16

// rescale interpolates the history to another step: ∇ʲ for step rh follow from those for step h by the matrix R(r)·R(1) with
// R(r)_{ij} = Π_{m=1..i} (m − 1 − r j)/m (Shampine and Reichelt 1997, eq. 6).
func (b *bdf) rescale(h float64) {
	if h == b.h {
		return
	}
	r := h / b.h
	if r > stretch && b.k > 1 { // a tiny step came before, to an event or an end: start the history anew
		s := b.s
		next := s.next
		s.next = h
		b.reslope()
		b.restart()
		s.next = next
		return
	}
	var x, u, m [highest + 1][highest + 1]float64
	fillR(&x, b.k, r)
	fillR(&u, b.k, 1)
	for i := range b.k + 1 {
		for j := range b.k + 1 {
			for l := range b.k + 1 {
				m[i][j] += x[i][l] * u[l][j]
			}
		}
	}
	mix(b.d[:b.k+1], &m)
	mix(b.dz[:b.k+1], &m)
	b.h, b.steps = h, 0
}

// reslope puts y' at the present time into the Solver's slope: f for the differential unknowns, the last difference for the others.
func (b *bdf) reslope() {
	s := b.s
	for i, differential := range s.mass {
		if s.slope[i] = s.f[i]; !differential {
			s.slope[i] = b.d[1][i] / b.h
		}
	}
}

func fillR(x *[highest + 1][highest + 1]float64, k int, r float64) {
	for j := range k + 1 {
		x[0][j] = 1
		for i := 1; i <= k; i++ {
			if j == 0 {
				x[i][0] = 0
				continue
			}
			x[i][j] = x[i-1][j] * (float64(i-1) - r*float64(j)) / float64(i)
		}
	}
}

// mix sets d[j] to Σᵢ m[i][j] d[i].
func mix(d [][]float64, m *[highest + 1][highest + 1]float64) {
	var v [highest + 1]float64
	k := len(d)
	for e := range d[0] {
		for i := range k {
			v[i] = d[i][e]
		}
		for j := 1; j < k; j++ {
			sum := 0.0
			for i := 1; i < k; i++ {
				sum += m[i][j] * v[i]
			}
			d[j][e] = sum
		}
	}
}

// move forms the differences at the end of the last attempt.
func (b *bdf) move() {
	if b.ready {
		return
	}
	b.ready = true
	moveOne(b.moved[:], b.d[:], b.change, b.s.y1, b.k)
	moveOne(b.movedZ[:], b.dz[:], b.changeZ, b.s.z1, b.k)
}

func moveOne(to, from [][]float64, change, y []float64, k int) {
	for i, c := range change {
		to[k+2][i] = c - from[k+1][i]
		to[k+1][i] = c
		sum := c
		for j := k; j > 0; j-- {
			sum += from[j][i]
			to[j][i] = sum
		}
	}
	copy(to[0], y)
}

func (b *bdf) accept(float64) float64 {
	b.move()
	for j := range b.k + 3 {
		b.d[j], b.moved[j] = b.moved[j], b.d[j]
		b.dz[j], b.movedZ[j] = b.movedZ[j], b.dz[j]
	}
	b.failures = 0
	if b.steps++; b.steps <= b.k {
		return b.h
	}
	return b.h * b.chooseOrder()
}

// chooseOrder changes the order by one at most, to that which allows the longest step, and returns the factor to it.
func (b *bdf) chooseOrder() float64 {
	s := b.s
	best, order := stepFactor(b.norm, b.k), b.k
	try := func(k, difference int) {
		e := b.constant(k) * norm(b.d[difference], s.scale)
		if f := stepFactor(e, k); f > best {
			best, order = f, k
		}
	}
	if b.k > 1 {
		try(b.k-1, b.k)
	}
	if b.k < highest {
		try(b.k+1, b.k+2)
	}
	b.k, b.steps = order, 0
	f := min(b.patience()*best, 10)
	if f > 0.9 && f < 1.2 { // not worth a new history
		return 1
	}
	return f
}

func stepFactor(e float64, k int) float64 { return math.Pow(max(e, 1e-12), -1/float64(k+1)) }

// patience is the safety factor, less when Newton's method had to work.
func (b *bdf) patience() float64 {
	return safety * (2*maxRounds + 1) / (2*maxRounds + float64(b.rounds))
}

func (b *bdf) reject(e float64) float64 {
	b.steps = 0
	if b.failures++; b.failures >= 3 {
		b.k = 1
	}
	if e-e != 0 {
		return b.s.poly.H / 2
	}
	return b.s.poly.H * max(shrinkBy, b.patience()*stepFactor(e, b.k))
}

// polynomial writes the polynomial through the last values, y(θ) = y₁ + Σⱼ ∇ʲ Π_{m<j} (θ−1+m)/j!, in the form of Dense: of each ∇ʲ from the second
// on, the part −θ(1−θ) is taken out and what is left sorted by powers of θ.
func (b *bdf) polynomial(k [][]float64) {
	b.move()
	fillInner(k, b.moved[:b.k+1])
}

func (b *bdf) polynomialZ(kz [][]float64) {
	b.move()
	fillInner(kz, b.movedZ[:b.k+1])
}

func (b *bdf) row(i int) inner {
	b.move()
	return innerOf(i, b.moved[:b.k+1])
}

func (b *bdf) rowZ(i int) inner {
	b.move()
	return innerOf(i, b.movedZ[:b.k+1])
}

func (b *bdf) half(y, rate []float64) {
	for i := range y {
		c := b.row(i)
		y[i], rate[i] = c.value(0.5, 0, 0), c.slope(0.5, 0, 0)
	}
}

func (b *bdf) halfZ(rate []float64) {
	for i := range rate {
		c := b.rowZ(i)
		rate[i] = c.slope(0.5, 0, 0)
	}
}

// parts are the coefficients of Π_{m=1..j−2} (θ+m)/j! by powers of θ, for j = 2 to 5.
var parts = [][]float64{{1.0 / 2}, {1.0 / 6, 1.0 / 6}, {2.0 / 24, 3.0 / 24, 1.0 / 24}, {6.0 / 120, 11.0 / 120, 6.0 / 120, 1.0 / 120}}

func fillInner(k, d [][]float64) {
	for p := range k {
		clear(k[p])
	}
	for j := 2; j < len(d); j++ {
		for p, c := range parts[j-2] {
			for i, v := range d[j] {
				k[p][i] -= c * v
			}
		}
	}
}

// innerOf is fillInner for unknown i.
func innerOf(i int, d [][]float64) (c inner) {
	for j := 2; j < len(d); j++ {
		for p, f := range parts[j-2] {
			c[p] -= f * d[j][i]
		}
	}
	return c
}
