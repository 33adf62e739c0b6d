package elements

import "math"

// rectangularNotch is a sharp straight crest of width b, m, by one of
//
//	Q = ⅔·Cd·√(2g)·b·h^1.5,  Q = c·b·h^1.5,  Q = ⅔·Ce·√(2g)·(b + k_b)·(h + 0.001 m)^1.5, Ce = α + α'·h/p,
//
// the last one (Kindsvater–Carter) with the width B of the channel and the height p of the crest over its floor, both m, where neither Cd nor c is given.
//
// Valid: aired nappe; Kindsvater–Carter for h ≥ 0.03 m, b ≥ 0.15 m, p ≥ 0.10 m, h/p ≤ 2.5.
// Source: ISO 1438; C. E. Kindsvater, R. W. Carter, Proc. ASCE 83(HY6), 1957 (table of α, α', k_b from memory).
type rectangularNotch struct {
	width, cd, c         float64 // m, −, m^½/s
	channel, height      float64 // m
	byCd, byC            bool
	hasChannel, hasCrest bool
}

func (e *rectangularNotch) bind(p *Params) {
	p.Length(&e.width, "width", Required, "width of the crest", Positive)
	p.Ratio(&e.cd, "cd", Optional, "discharge coefficient; or c; or channel_width and crest_height", Positive).Was(&e.byCd)
	p.bare(&e.c, "c", Optional, "weir coefficient, m^½/s (about 1.8)", Positive).Was(&e.byC)
	p.Length(&e.channel, "channel_width", Optional, "width of the channel that leads to it", Positive).Was(&e.hasChannel)
	p.Length(&e.height, "crest_height", Optional, "height of the crest over the channel's floor", Positive).Was(&e.hasCrest)
}

func (e *rectangularNotch) law(f *faults) notchLaw {
	l := notchLaw{power: 1.5, mouthed: e.width}
	f.when(e.byCd && e.byC, "a weir takes cd or c, not both")
	f.when(e.hasChannel != e.hasCrest, "channel_width and crest_height go together")
	f.when(e.hasChannel && (e.byCd || e.byC), "a weir takes cd or c, or channel_width and crest_height, not both")
	f.when(!e.hasChannel && !e.byCd && !e.byC, "a rectangular weir needs cd or c, or channel_width and crest_height")
	f.when(e.hasChannel && e.width > e.channel, "the weir is wider than its channel")
	switch {
	case len(*f) > 0:
	case e.byC:
		l.factor = e.c * e.width
	case e.byCd:
		l.factor, l.rooted = twoThirdsRootTwo*e.cd*e.width, true
	default:
		a, slope, kb := kindsvaterCarter(e.width / e.channel)
		l.factor, l.rooted = twoThirdsRootTwo*a*(e.width+kb), true
		l.alpha, l.kh = slope/a/e.height, 0.001
	}
	return l
}

const twoThirdsRootTwo = 2.0 / 3 * math.Sqrt2

// kindsvaterTable is b/B, α, α', k_b in m.
var kindsvaterTable = [...][4]float64{
	{0, 0.587, -0.0023, 0.0024}, {0.1, 0.588, -0.0021, 0.0024}, {0.2, 0.589, -0.0018, 0.0024}, {0.3, 0.590, 0.0020, 0.0025},
	{0.4, 0.591, 0.0058, 0.0027}, {0.5, 0.592, 0.0100, 0.0030}, {0.6, 0.593, 0.0180, 0.0036}, {0.7, 0.594, 0.0300, 0.0041},
	{0.8, 0.596, 0.0450, 0.0042}, {0.9, 0.598, 0.0640, 0.0033}, {1, 0.602, 0.0750, -0.0009},
}

// kindsvaterCarter returns α, α' (−) and k_b, m, at a share b/B of the channel's width, straight between rows of the table.
func kindsvaterCarter(share float64) (a, slope, kb float64) {
	x := min(max(share, 0), 1) * 10
	i := min(int(x), 9)
	u := x - float64(i)
	lo, hi := &kindsvaterTable[i], &kindsvaterTable[i+1]
	mix := func(k int) float64 { return lo[k] + u*(hi[k]-lo[k]) }
	return mix(1), mix(2), mix(3)
}
