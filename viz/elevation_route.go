package viz

import (
	"math"
	"sort"

	"headfall/elements"
)

// route is the way of a line over the drawing.
type route struct {
	line   int
	points [][2]float64
	crests [][2]float64 // its high points
}

// connect finds a way for every line: short ones first, so that long ones go round them.
func (k *canvas) connect() {
	ports := k.ports()
	var wantX, wantY []float64
	for _, p := range ports {
		for _, e := range p {
			if e != nil {
				wantX, wantY = append(wantX, e.x), append(wantY, e.y)
			}
		}
	}
	crests := make([][]float64, len(k.plant.Lines))
	for i, l := range k.plant.Lines {
		for _, f := range l.Parts {
			if h, ok := f.Part.(elements.Humps); ok {
				y := nudge(wantY, k.y(h.Crown().Elevation))
				crests[i] = append(crests[i], y)
				wantY = append(wantY, y)
			}
		}
	}
	for _, s := range k.spots {
		if s.tee != nil { // thin things need a track of their own to stand in the way
			wantY = append(wantY, k.y(s.low))
		}
	}
	pitch := 9.0
	if area := k.width * k.height; area > 1.6e6 {
		pitch *= math.Sqrt(area / 1.6e6)
	}
	g := newGrid(wantX, wantY, k.width, k.height, pitch)
	for _, s := range k.spots {
		g.block(s.box)
	}
	order := make([]int, 0, len(ports))
	reach := func(i int) float64 {
		a, b := ports[i][0], ports[i][1]
		return math.Abs(a.x-b.x) + math.Abs(a.y-b.y) + 400*float64(len(crests[i]))
	}
	for i := range ports {
		if ports[i][0] != nil {
			order = append(order, i)
		}
	}
	sort.SliceStable(order, func(a, b int) bool { return reach(order[a]) < reach(order[b]) })
	ways := map[int]*route{}
	for _, i := range order {
		ways[i] = route1(g, i, ports[i][0], ports[i][1], crests[i])
	}
	for i := range k.plant.Lines {
		if ways[i] != nil {
			k.routes = append(k.routes, ways[i])
		}
	}
}

// route1 finds the way of one line over its high points.
func route1(g *grid, line int, a, b *port, crests []float64) *route {
	rt := &route{line: line, points: append([][2]float64(nil), a.inside...)}
	x, y, dir := a.x, a.y, a.dir
	for n, cy := range crests {
		cx := a.x + (b.x-a.x)*float64(n+1)/float64(len(crests)+1)
		cx = g.freeNear(cx, cy)
		way := g.way(x, y, cx, cy, dir)
		g.occupy(way)
		rt.points = append(rt.points, way...)
		rt.crests = append(rt.crests, [2]float64{cx, cy})
		x, y, dir = cx, cy, -1
	}
	way := g.way(x, y, b.x, b.y, dir)
	g.occupy(way)
	rt.points = append(rt.points, way...)
	for n := len(b.inside) - 1; n >= 0; n-- {
		rt.points = append(rt.points, b.inside[n])
	}
	rt.points = straighten(rt.points)
	return rt
}

// way is find, and where there is no way a plain elbow.
func (g *grid) way(x0, y0, x1, y1 float64, dir int) [][2]float64 {
	way := g.find(x0, y0, x1, y1, dir)
	if way == nil {
		way = [][2]float64{{x0, y0}, {x0, y1}, {x1, y1}}
	}
	return way
}

// freeNear returns the x nearest to the wanted one at which a crest may stand on its row.
func (g *grid) freeNear(x, y float64) float64 {
	j := nearest(g.ys, y)
	best, gap := x, math.Inf(1)
	for i, gx := range g.xs {
		n := g.node(i, j)
		if !g.blocked[n] && g.across[n]+g.along[n] == 0 && math.Abs(gx-x) < gap {
			best, gap = gx, math.Abs(gx-x)
		}
	}
	return best
}

// straighten leaves out points between two that lie on one line with them.
func straighten(ps [][2]float64) [][2]float64 {
	var out [][2]float64
	for _, p := range ps {
		if n := len(out); n > 0 && math.Hypot(p[0]-out[n-1][0], p[1]-out[n-1][1]) < 0.05 {
			continue
		}
		if n := len(out); n > 1 {
			a, b := out[n-2], out[n-1]
			cross := (b[0]-a[0])*(p[1]-b[1]) - (b[1]-a[1])*(p[0]-b[0])
			dot := (b[0]-a[0])*(p[0]-b[0]) + (b[1]-a[1])*(p[1]-b[1])
			if math.Abs(cross) < 1e-6 && dot > 0 {
				out[n-1] = p
				continue
			}
		}
		out = append(out, p)
	}
	return out
}

// slotPitch is the room that a symbol takes along its line, px.
const slotPitch = 27.0

// slot is a place on a route where a symbol fits.
type slot struct {
	x, y float64
	dir  float64 // degrees of the line there
	leg  int     // straight piece of the route
	busy bool    // something else passes close by
}

// slots returns places for symbols along the route, in its order, closer together than symbols may stand.
func (k *canvas) slots(rt *route) []slot {
	var all []slot
	for n := 1; n < len(rt.points); n++ {
		a, b := rt.points[n-1], rt.points[n]
		length := math.Hypot(b[0]-a[0], b[1]-a[1])
		const clearance, step = 11.0, 9.0
		if length < 2*clearance {
			continue
		}
		m := int((length-2*clearance)/step) + 1
		first := (length - step*float64(m-1)) / 2
		for i := range m {
			f := (first + step*float64(i)) / length
			s := slot{x: a[0] + (b[0]-a[0])*f, y: a[1] + (b[1]-a[1])*f, dir: math.Atan2(b[1]-a[1], b[0]-a[0]) * 180 / math.Pi, leg: n}
			s.busy = k.crowded(rt, s)
			all = append(all, s)
		}
	}
	return all
}

// crowded reports whether a thing or another line comes close to a place, where the words beside a symbol stand included.
func (k *canvas) crowded(rt *route, s slot) bool {
	for _, o := range k.spots {
		if s.x > o.box[0]-4 && s.x < o.box[2]+4 && s.y > o.box[1] && s.y < o.box[3]+6 {
			return true
		}
	}
	x0, x1, y0, y1 := s.x-18, s.x+18, s.y-17, s.y+15
	if math.Abs(math.Mod(s.dir+360, 180)-90) < 45 {
		x1, y0, y1 = s.x+34, s.y-9, s.y+9
	}
	for _, o := range k.routes {
		for n := 1; n < len(o.points); n++ {
			if o == rt && n == s.leg {
				continue
			}
			a, b := o.points[n-1], o.points[n]
			if x1 > math.Min(a[0], b[0]) && x0 < math.Max(a[0], b[0]) && y1 > math.Min(a[1], b[1]) && y0 < math.Max(a[1], b[1]) {
				return true
			}
		}
	}
	return false
}
