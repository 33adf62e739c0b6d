package integrate

import "math"

// control is the PI step control of Gustafsson (ACM Trans. Math. Softw. 17:533, 1991) with exponents 0.7/q and 0.4/q, q the order of the
// error estimate plus one.
type control struct {
	q        float64
	previous float64 // logarithm of the error of the last accepted step
	begun    bool    // there is one
	rejected bool    // the last attempt was
}

const (
	safety   = 0.9
	growBy   = 6.0
	shrinkBy = 0.2
	least    = -9.2 // logarithm of the error below which the memory does not look
)

func (c *control) restart() { c.begun, c.rejected = false, false }

// accept returns the factor from a good step to the next.
func (c *control) accept(e float64) float64 {
	log := math.Log(max(e, 1e-10))
	grow := -log
	if c.begun {
		grow = 0.4*c.previous - 0.7*log
	}
	factor := safety * math.Exp(grow/c.q)
	factor = min(max(factor, shrinkBy), growBy)
	if c.rejected {
		factor = min(factor, 1)
	}
	c.previous, c.begun, c.rejected = max(log, least), true, false
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
