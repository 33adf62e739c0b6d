package viz

import (
	"container/heap"
	"math"
	"sort"
)

// grid finds ways for lines between the things on the drawing: along rows and columns, around obstacles, few bends, few crossings, and never two
// lines on one track.
type grid struct {
	xs, ys  []float64
	blocked []bool
	across  []int16 // lines that run along the row through a node
	along   []int16 // lines that run along the column through a node
	cost    []float64
	from    []int32
	stamp   []int32
	run     int32
}

const (
	bendCost  = 26.0
	crossCost = 34.0
	shareCost = 900.0
)

// newGrid makes tracks at the wanted coordinates and, between them, about every pitch.
func newGrid(wantX, wantY []float64, width, height, pitch float64) *grid {
	g := &grid{xs: tracks(wantX, 6, width-6, pitch), ys: tracks(wantY, 6, height-6, pitch)}
	n := len(g.xs) * len(g.ys)
	g.blocked = make([]bool, n)
	g.across, g.along = make([]int16, n), make([]int16, n)
	g.cost, g.from, g.stamp = make([]float64, 4*n), make([]int32, 4*n), make([]int32, 4*n)
	return g
}

func tracks(want []float64, low, high, pitch float64) []float64 {
	want = append([]float64(nil), want...)
	sort.Float64s(want)
	var out []float64
	for _, w := range want {
		if n := len(out); n == 0 || w-out[n-1] > 0.5 {
			out = append(out, w)
		}
	}
	fixed := append([]float64(nil), out...)
	for x := low; x <= high; x += pitch {
		i := sort.SearchFloat64s(fixed, x)
		if (i == len(fixed) || fixed[i]-x >= 0.75*pitch) && (i == 0 || x-fixed[i-1] >= 0.75*pitch) {
			out = append(out, x)
		}
	}
	sort.Float64s(out)
	return out
}

func (g *grid) node(i, j int) int { return j*len(g.xs) + i }

// at returns the node nearest to a place.
func (g *grid) at(x, y float64) (i, j int) { return nearest(g.xs, x), nearest(g.ys, y) }

func nearest(v []float64, x float64) int {
	i := sort.SearchFloat64s(v, x)
	if i == len(v) || i > 0 && x-v[i-1] < v[i]-x {
		i--
	}
	return max(i, 0)
}

// block forbids the inside of a box.
func (g *grid) block(box [4]float64) {
	for j, y := range g.ys {
		if y <= box[1] || y >= box[3] {
			continue
		}
		for i, x := range g.xs {
			if x > box[0] && x < box[2] {
				g.blocked[g.node(i, j)] = true
			}
		}
	}
}

type state struct {
	key  int32 // 4·node + direction
	rank float64
}

type queue []state

func (q queue) Len() int { return len(q) }
func (q queue) Less(a, b int) bool {
	return q[a].rank < q[b].rank || q[a].rank == q[b].rank && q[a].key < q[b].key
}
func (q queue) Swap(a, b int) { q[a], q[b] = q[b], q[a] }
func (q *queue) Push(x any)   { *q = append(*q, x.(state)) }
func (q *queue) Pop() any     { s := *q; x := s[len(s)-1]; *q = s[:len(s)-1]; return x }

var dirs = [4][2]int{{1, 0}, {0, 1}, {-1, 0}, {0, -1}}

// find returns the corners of the cheapest way from one place to another; first is the direction it begins in, or -1. Nil when there is none.
func (g *grid) find(x0, y0, x1, y1 float64, first int) [][2]float64 {
	i0, j0 := g.at(x0, y0)
	i1, j1 := g.at(x1, y1)
	g.run++
	var q queue
	guess := func(i, j int) float64 {
		return math.Abs(g.xs[i]-g.xs[i1]) + math.Abs(g.ys[j]-g.ys[j1])
	}
	for d := range dirs {
		if first >= 0 && d != first {
			continue
		}
		key := int32(4*g.node(i0, j0) + d)
		g.cost[key], g.from[key], g.stamp[key] = 0, -1, g.run
		heap.Push(&q, state{key, guess(i0, j0)})
	}
	goal := g.node(i1, j1)
	for q.Len() > 0 {
		s := heap.Pop(&q).(state)
		n, d := int(s.key)/4, int(s.key)%4
		if n == goal {
			return g.trace(s.key)
		}
		i, j := n%len(g.xs), n/len(g.xs)
		if s.rank > g.cost[s.key]+guess(i, j)+1e-9 {
			continue // a cheaper way here came first
		}
		for e := range dirs {
			if e == (d+2)%4 || g.from[s.key] < 0 && e != d {
				continue
			}
			ni, nj := i+dirs[e][0], j+dirs[e][1]
			if ni < 0 || nj < 0 || ni >= len(g.xs) || nj >= len(g.ys) {
				continue
			}
			m := g.node(ni, nj)
			if g.blocked[m] && m != goal {
				continue
			}
			c := g.cost[s.key] + math.Abs(g.xs[ni]-g.xs[i]) + math.Abs(g.ys[nj]-g.ys[j]) + g.toll(m, e)
			if e != d {
				c += bendCost
				if g.across[n]+g.along[n] > 0 {
					c += shareCost // a corner on another line reads as a joint
				}
			}
			key := int32(4*m + e)
			if g.stamp[key] == g.run && g.cost[key] <= c {
				continue
			}
			g.cost[key], g.from[key], g.stamp[key] = c, s.key, g.run
			heap.Push(&q, state{key, c + guess(ni, nj)})
		}
	}
	return nil
}

// toll is what entering a node costs for the lines already there.
func (g *grid) toll(m, dir int) float64 {
	same, other := g.across[m], g.along[m]
	if dir%2 == 1 {
		same, other = other, same
	}
	return shareCost*float64(same) + crossCost*float64(other)
}

// trace reads the way back and leaves out what is straight.
func (g *grid) trace(key int32) [][2]float64 {
	var back []int32
	for ; key >= 0; key = g.from[key] {
		back = append(back, key)
	}
	var out [][2]float64
	for n := len(back) - 1; n >= 0; n-- {
		at := int(back[n]) / 4
		if n > 0 && n < len(back)-1 && back[n]%4 == back[n-1]%4 {
			continue
		}
		out = append(out, [2]float64{g.xs[at%len(g.xs)], g.ys[at/len(g.xs)]})
	}
	return out
}

// occupy books the tracks of a way.
func (g *grid) occupy(way [][2]float64) {
	for n := 1; n < len(way); n++ {
		i0, j0 := g.at(way[n-1][0], way[n-1][1])
		i1, j1 := g.at(way[n][0], way[n][1])
		for i := min(i0, i1); i <= max(i0, i1); i++ {
			for j := min(j0, j1); j <= max(j0, j1); j++ {
				m := g.node(i, j)
				if j0 == j1 {
					g.across[m]++
				}
				if i0 == i1 {
					g.along[m]++
				}
			}
		}
	}
}
