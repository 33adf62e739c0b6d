package study

import (
	"fmt"
	"math"
	"strings"

	"headfall/elements/quantity"
	"headfall/network"
)

// Need is a margin that is wanted of limits: a share of their bound, or an amount.
type Need struct {
	Subject string // "" every stated limit with a bound
	Of      string
	Share   float64 // of the bound; NaN when Amount counts
	Amount  float64 // SI
	Text    string
}

// ParseNeed reads "10 %", "flow:SEWER=10 %" or "level:PIT-4=150 mm".
func ParseNeed(text string) (Need, error) {
	n := Need{Text: text, Share: math.NaN()}
	which, value, ok := strings.Cut(text, "=")
	if !ok {
		which, value = "", text
	}
	dim := quantity.Ratio
	if which != "" {
		var found bool
		if n.Subject, n.Of, found = strings.Cut(strings.TrimSpace(which), ":"); !found {
			return n, fmt.Errorf("%q names no limit; write subject:TAG=margin, as flow:SEWER=10 %%", text)
		}
		s, known := network.SubjectNamed(n.Subject)
		if !known {
			return n, fmt.Errorf("%q is nothing that a limit looks at; as flow:SEWER=10 %%", n.Subject)
		}
		dim = s.Dim()
	}
	value = strings.TrimSpace(value)
	if v, err := quantity.Parse(value, quantity.Ratio); err == nil && (v.Unit == "%" || which == "") {
		n.Share = v.SI
	} else if v, err := quantity.Parse(value, dim); err != nil {
		return n, fmt.Errorf("--need %s: %w", text, err)
	} else {
		n.Amount = v.SI
	}
	if n.Share < 0 || n.Amount < 0 {
		return n, fmt.Errorf("--need %s: a margin is not negative", text)
	}
	return n, nil
}

// of returns the margin wanted of a limit, SI; 0 when none.
func (n *Need) of(l *network.LimitResult) float64 {
	switch {
	case n.Subject == "" && (l.Implicit || l.Subject == "emptied"):
		return 0
	case n.Subject != "" && (n.Subject != l.Subject || len(l.Of) == 0 || l.Of[0] != n.Of):
		return 0
	case math.IsNaN(n.Share):
		return n.Amount
	case l.BoundSI == nil:
		return 0
	}
	return n.Share * math.Abs(*l.BoundSI)
}

// unmet returns the first limit that holds with less than the margin wanted, or nil.
func unmet(needs []Need, limits []*network.LimitResult) *network.LimitResult {
	for _, l := range limits {
		for i := range needs {
			if want := needs[i].of(l); want > 0 && l.Margin != nil && *l.Margin < want*(1-1e-9) {
				return l
			}
		}
	}
	return nil
}
