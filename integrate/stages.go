package integrate

// The stage sums are where a Rosenbrock step on a chain spends what the rates leave, hence the unrolled loops: each previous stage is read once
// and used for the point and for the right-hand side.

// extendPoint adds u to the point of the stage before.
func extendPoint(point, u []float64) {
	u = u[:len(point)]
	for k := range point {
		point[k] += u[k]
	}
}

// addPoint sets y to point + u.
func addPoint(y, point, u []float64) {
	point, u = point[:len(y)], u[:len(y)]
	for k := range y {
		y[k] = point[k] + u[k]
	}
}

// stagePoint sets point to y0 + Σ aⱼuⱼ and sum to Σ cⱼuⱼ.
func stagePoint(point, sum, y0, a, c []float64, u [][]float64) {
	n := len(point)
	sum, y0 = sum[:n], y0[:n]
	switch len(a) {
	case 1:
		u0 := u[0][:n]
		a0 := a[0]
		c0 := c[0]
		for k := range point {
			v0 := u0[k]
			point[k] = y0[k] + (a0 * v0)
			sum[k] = c0 * v0
		}
	case 2:
		u0, u1 := u[0][:n], u[1][:n]
		a0, a1 := a[0], a[1]
		c0, c1 := c[0], c[1]
		for k := range point {
			v0, v1 := u0[k], u1[k]
			point[k] = y0[k] + (a0*v0 + a1*v1)
			sum[k] = c0*v0 + c1*v1
		}
	case 3:
		u0, u1, u2 := u[0][:n], u[1][:n], u[2][:n]
		a0, a1, a2 := a[0], a[1], a[2]
		c0, c1, c2 := c[0], c[1], c[2]
		for k := range point {
			v0, v1, v2 := u0[k], u1[k], u2[k]
			point[k] = y0[k] + (a0*v0 + a1*v1 + a2*v2)
			sum[k] = c0*v0 + c1*v1 + c2*v2
		}
	case 4:
		u0, u1, u2, u3 := u[0][:n], u[1][:n], u[2][:n], u[3][:n]
		a0, a1, a2, a3 := a[0], a[1], a[2], a[3]
		c0, c1, c2, c3 := c[0], c[1], c[2], c[3]
		for k := range point {
			v0, v1, v2, v3 := u0[k], u1[k], u2[k], u3[k]
			point[k] = y0[k] + (a0*v0 + a1*v1 + a2*v2 + a3*v3)
			sum[k] = c0*v0 + c1*v1 + c2*v2 + c3*v3
		}
	case 5:
		u0, u1, u2, u3, u4 := u[0][:n], u[1][:n], u[2][:n], u[3][:n], u[4][:n]
		a0, a1, a2, a3, a4 := a[0], a[1], a[2], a[3], a[4]
		c0, c1, c2, c3, c4 := c[0], c[1], c[2], c[3], c[4]
		for k := range point {
			v0, v1, v2, v3, v4 := u0[k], u1[k], u2[k], u3[k], u4[k]
			point[k] = y0[k] + (a0*v0 + a1*v1 + a2*v2 + a3*v3 + a4*v4)
			sum[k] = c0*v0 + c1*v1 + c2*v2 + c3*v3 + c4*v4
		}
	default:
		copy(point, y0)
		for j := range a {
			for k, v := range u[j][:n] {
				point[k] += a[j] * v
			}
		}
		combine(sum, c, u)
	}
}

// combine sets sum to Σ cⱼuⱼ over the length of c.
func combine(sum, c []float64, u [][]float64) {
	n := len(sum)
	switch len(c) {
	case 5:
		u0, u1, u2, u3, u4 := u[0][:n], u[1][:n], u[2][:n], u[3][:n], u[4][:n]
		c0, c1, c2, c3, c4 := c[0], c[1], c[2], c[3], c[4]
		for k := range sum {
			sum[k] = (c0*u0[k] + c1*u1[k] + c2*u2[k]) + (c3*u3[k] + c4*u4[k])
		}
	case 6:
		u0, u1, u2, u3, u4, u5 := u[0][:n], u[1][:n], u[2][:n], u[3][:n], u[4][:n], u[5][:n]
		c0, c1, c2, c3, c4, c5 := c[0], c[1], c[2], c[3], c[4], c[5]
		for k := range sum {
			sum[k] = (c0*u0[k] + c1*u1[k] + c2*u2[k]) + (c3*u3[k] + c4*u4[k] + c5*u5[k])
		}
	case 7:
		u0, u1, u2, u3, u4, u5, u6 := u[0][:n], u[1][:n], u[2][:n], u[3][:n], u[4][:n], u[5][:n], u[6][:n]
		c0, c1, c2, c3, c4, c5, c6 := c[0], c[1], c[2], c[3], c[4], c[5], c[6]
		for k := range sum {
			sum[k] = (c0*u0[k] + c1*u1[k] + c2*u2[k] + c3*u3[k]) + (c4*u4[k] + c5*u5[k] + c6*u6[k])
		}
	case 8:
		u0, u1, u2, u3, u4, u5, u6, u7 := u[0][:n], u[1][:n], u[2][:n], u[3][:n], u[4][:n], u[5][:n], u[6][:n], u[7][:n]
		c0, c1, c2, c3, c4, c5, c6, c7 := c[0], c[1], c[2], c[3], c[4], c[5], c[6], c[7]
		for k := range sum {
			sum[k] = (c0*u0[k] + c1*u1[k] + c2*u2[k] + c3*u3[k]) + (c4*u4[k] + c5*u5[k] + c6*u6[k] + c7*u7[k])
		}
	default:
		clear(sum)
		for j := range c {
			for k, v := range u[j][:n] {
				sum[k] += c[j] * v
			}
		}
	}
}

// combine2 sets x and y to Σ aⱼuⱼ and Σ bⱼuⱼ.
func combine2(x, y, a, b []float64, u [][]float64) {
	if len(u) != 6 {
		combine(x, a, u)
		combine(y, b, u)
		return
	}
	n := len(x)
	y = y[:n]
	u0, u1, u2, u3, u4, u5 := u[0][:n], u[1][:n], u[2][:n], u[3][:n], u[4][:n], u[5][:n]
	a0, a1, a2, a3, a4, a5 := a[0], a[1], a[2], a[3], a[4], a[5]
	b0, b1, b2, b3, b4, b5 := b[0], b[1], b[2], b[3], b[4], b[5]
	for k := range x {
		v0, v1, v2, v3, v4, v5 := u0[k], u1[k], u2[k], u3[k], u4[k], u5[k]
		x[k] = (a0*v0 + a1*v1 + a2*v2) + (a3*v3 + a4*v4 + a5*v5)
		y[k] = (b0*v0 + b1*v1 + b2*v2) + (b3*v3 + b4*v4 + b5*v5)
	}
}
