package integrate

import "math"

// control is the PI step control of Gustafsson (ACM Trans. Math. Softw. 17:533, 1991) with exponents 0.7/q and 0.4/q, q the order of the
// error estimate plus one.
type control struct {
	q        float64
	previous float64 // error of the last accepted step, 0 if there is none
	rejected bool    // the last attempt was
}

const (
	safety   = 0.9
	growBy   = 6.0
	shrinkBy = 0.2
	least    = 1e-4 // error below which the memory does not look
)

func (c *control) restart() { c.previous, c.rejected = 0, false }

// accept returns the factor from a good step to the next.
func (c *control) accept(e float64) float64 {
	e = max(e, 1e-10)
	factor := safety * math.Pow(e, -1/c.q)
	if c.previous > 0 {
		factor = safety * math.Pow(e, -0.7/c.q) * math.Pow(c.previous, 0.4/c.q)
	}
	factor = min(max(factor, shrinkBy), growBy)
	if c.rejected {
		factor = min(factor, 1)
	}
	c.previous, c.rejected = max(e, least), false
	return factor
}

// reject returns the factor from a refused step to the next attempt.
func (c *control) reject(e float64) float64 {
	c.rejected = true
	if e-e != 0 { // refused by the Guard, or not a number
		return 0.4
	}
	return max(safety*math.Pow(e, -1/c.q), 0.1)
}
