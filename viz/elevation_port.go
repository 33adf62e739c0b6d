package viz

import (
	"math"
	"sort"

	"headfall/network"
)

// port is where a line meets a spot on the drawing.
type port struct {
	spot   *spot
	line   int
	far    *spot // at the other end
	enters bool
	form   network.PortForm
	inside [][2]float64 // from the opening to where the line comes out of the vessel
	x, y   float64      // where the line gets onto the grid
	dir    int          // the way out: index into dirs
}

const (
	right = iota
	down
	left
	up
)

// ports finds for every line the places where it meets its two ends.
func (k *canvas) ports() [][2]*port {
	all := make([][2]*port, len(k.plant.Lines))
	for i, l := range k.plant.Lines {
		a, b := k.byTag[l.From], k.byTag[l.To]
		if a == nil || b == nil {
			continue
		}
		all[i][0] = &port{spot: a, line: i, far: b, form: l.Leaves.Form}
		all[i][1] = &port{spot: b, line: i, far: a, form: l.Enters.Form, enters: true}
		a.ports = append(a.ports, all[i][0])
		b.ports = append(b.ports, all[i][1])
	}
	for _, s := range k.spots {
		switch {
		case s.vessel != nil:
			k.vesselPorts(s)
		case s.tee != nil:
			k.teePorts(s)
		default:
			k.outsidePorts(s)
		}
	}
	return all
}

func (p *port) height(plant *network.Plant) float64 {
	l := plant.Lines[p.line]
	if p.enters {
		return portHeight(l.Enters)
	}
	return portHeight(l.Leaves)
}

func (k *canvas) vesselPorts(s *spot) {
	var under []*port
	taken := map[int][]float64{} // by side: heights in use
	for _, p := range s.ports {
		if p.form == network.Bottom {
			under = append(under, p)
			continue
		}
		p.dir = k.sideOf(s, p, taken)
		h := p.height(k.plant)
		y := nudge(taken[p.dir], k.y(s.low+h))
		taken[p.dir] = append(taken[p.dir], y)
		sign := 1.0
		if p.dir == left {
			sign = -1
		}
		out := s.x + sign*(s.w/2+9)
		wall := s.x + sign*s.halfAt(h)*s.across
		if p.form == network.Dip { // in from over the rim, mouth down
			rim := k.y(s.high) - 5
			rim = nudge(taken[p.dir], rim)
			taken[p.dir] = append(taken[p.dir], rim)
			in := s.x + sign*(s.w/2-10-6*float64(len(taken[p.dir])-2))
			p.inside = [][2]float64{{in, y}, {in, rim}}
			y = rim
		} else {
			p.inside = [][2]float64{{wall, y}}
		}
		p.x, p.y = out, y
	}
	sort.SliceStable(under, func(a, b int) bool { return under[a].far.x < under[b].far.x })
	for n, p := range under {
		x := s.x + 12*(float64(n)-float64(len(under)-1)/2)
		p.inside = [][2]float64{{x, k.y(s.low + s.lowestAt((x-s.x)/s.across))}}
		p.x, p.y, p.dir = x, s.box[3]+4, down
	}
}

// sideOf takes the side that faces the other end, or the freer one.
func (k *canvas) sideOf(s *spot, p *port, taken map[int][]float64) int {
	switch {
	case p.far.x > s.x+1:
		return right
	case p.far.x < s.x-1:
		return left
	case len(taken[left]) < len(taken[right]):
		return left
	}
	return right
}

// nudge moves a coordinate off those in use.
func nudge(used []float64, y float64) float64 {
	for _, try := range []float64{0, -8, 8, -16, 16, -24, 24, -32, 32} {
		free := true
		for _, u := range used {
			free = free && math.Abs(u-(y+try)) > 6
		}
		if free {
			return y + try
		}
	}
	return y
}

func (k *canvas) teePorts(s *spot) {
	var over, under []*port
	for _, p := range s.ports {
		y := (k.y(p.far.low) + k.y(p.far.high)) / 2
		if at := k.y(s.low); y < at-2 || y < at+2 && p.enters {
			over = append(over, p)
		} else {
			under = append(under, p)
		}
	}
	k.row(s, over, s.box[1]-6, k.y(s.low), up)
	k.row(s, under, s.box[3]+6, k.y(s.low), down)
}

func (k *canvas) outsidePorts(s *spot) {
	y := k.y(s.high)
	if len(s.beyond.Surface) > 0 {
		y = k.y(s.low) + 9 // under the surface at its lowest
	}
	k.row(s, s.ports, s.box[1]-6, y, up)
}

// row spaces ports along the upper or lower side of a spot.
func (k *canvas) row(s *spot, ports []*port, y, inner float64, dir int) {
	sort.SliceStable(ports, func(a, b int) bool { return ports[a].far.x < ports[b].far.x })
	for n, p := range ports {
		x := s.x + 11*(float64(n)-float64(len(ports)-1)/2)
		p.inside = [][2]float64{{x, inner}}
		p.x, p.y, p.dir = x, y, dir
	}
}

// halfAt returns the half width of the outline, m, at a height over the base.
func (s *spot) halfAt(h float64) float64 {
	h = math.Min(math.Max(h, 0), s.high-s.low)
	half := 0.0
	for i, a := range s.outline {
		b := s.outline[(i+1)%len(s.outline)]
		if (a.Y-h)*(b.Y-h) > 0 {
			continue
		}
		x := math.Max(math.Abs(a.X), math.Abs(b.X))
		if a.Y != b.Y {
			x = math.Abs(a.X + (b.X-a.X)*(h-a.Y)/(b.Y-a.Y))
		}
		half = math.Max(half, x)
	}
	return half
}

// lowestAt returns the height of the bottom, m over the base, at x from the middle.
func (s *spot) lowestAt(x float64) float64 {
	low := math.Inf(1)
	for i, a := range s.outline {
		b := s.outline[(i+1)%len(s.outline)]
		if (a.X-x)*(b.X-x) > 0 {
			continue
		}
		y := math.Min(a.Y, b.Y)
		if a.X != b.X {
			y = a.Y + (b.Y-a.Y)*(x-a.X)/(b.X-a.X)
		}
		low = math.Min(low, y)
	}
	if !finite(low) {
		return 0
	}
	return low
}
