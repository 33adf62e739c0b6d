package viz

import "math"

// place puts the spots into columns. Going along with the liquid, each takes the column that keeps its lines short: one whose things stand clear
// over or under it, or a new one next to where it is fed from.
func (k *canvas) place() {
	next := k.neighbours()
	var cols [][]*spot
	placed := map[*spot]bool{}
	for _, s := range k.order() {
		best, cost, fresh := 0, math.Inf(1), true
		for c := range cols {
			if clear(cols[c], s) {
				if w := spread(next[s], placed, c, -1) + 0.3; w < cost {
					best, cost, fresh = c, w, false
				}
			}
		}
		for c := 0; c <= len(cols); c++ {
			if w := spread(next[s], placed, c, c) + 2.2 - 0.01*float64(c); w < cost {
				best, cost, fresh = c, w, true
			}
		}
		if fresh {
			cols = append(cols, nil)
			copy(cols[best+1:], cols[best:])
			cols[best] = nil
			for c := range cols {
				for _, x := range cols[c] {
					x.col = c
				}
			}
		}
		cols[best] = append(cols[best], s)
		s.col = best
		placed[s] = true
	}
	k.improve(cols, next)
	k.spread(cols)
}

// neighbours lists for each spot those it shares a line with.
func (k *canvas) neighbours() map[*spot][]*spot {
	next := map[*spot][]*spot{}
	for _, l := range k.plant.Lines {
		a, b := k.byTag[l.From], k.byTag[l.To]
		if a != nil && b != nil && a != b {
			next[a] = append(next[a], b)
			next[b] = append(next[b], a)
		}
	}
	return next
}

// order returns the spots such that what feeds comes before what is fed, as far as there is no circle; else in the order of the file.
func (k *canvas) order() []*spot {
	feeds := map[*spot]int{}
	to := map[*spot][]*spot{}
	for _, l := range k.plant.Lines {
		a, b := k.byTag[l.From], k.byTag[l.To]
		if a != nil && b != nil && a != b {
			to[a] = append(to[a], b)
			feeds[b]++
		}
	}
	var out []*spot
	seen := map[*spot]bool{}
	for len(out) < len(k.spots) {
		var pick *spot
		for _, s := range k.spots { // the first that nothing waiting feeds; in a circle the least fed
			if !seen[s] && (pick == nil || feeds[s] < feeds[pick]) {
				pick = s
			}
		}
		seen[pick] = true
		out = append(out, pick)
		for _, b := range to[pick] {
			feeds[b]--
		}
	}
	return out
}

// clear reports whether s stands clear of all in the column.
func clear(col []*spot, s *spot) bool {
	for _, o := range col {
		if s.y0 < o.y1+14 && o.y0 < s.y1+14 {
			return false
		}
	}
	return true
}

// spread is how many columns lie between a place and the neighbours already placed; at is where a new column would be put in, -1 none.
func spread(next []*spot, placed map[*spot]bool, c, at int) float64 {
	sum := 0.0
	for _, o := range next {
		if placed[o] {
			oc := o.col
			if at >= 0 && oc >= at {
				oc++
			}
			sum += math.Abs(float64(oc - c))
		}
	}
	return sum
}

// improve moves columns to other places as long as lines get shorter.
func (k *canvas) improve(cols [][]*spot, next map[*spot][]*spot) {
	total := func() float64 {
		sum := 0.0
		for _, s := range k.spots {
			for _, o := range next[s] {
				sum += math.Abs(float64(s.col - o.col))
			}
		}
		return sum
	}
	move := func(from, to int) {
		c := cols[from]
		copy(cols[from:], cols[from+1:])
		copy(cols[to+1:], cols[to:len(cols)-1])
		cols[to] = c
		for i, col := range cols {
			for _, s := range col {
				s.col = i
			}
		}
	}
	best := total()
	for range 6 {
		better := false
		for from := range cols {
			for to := range cols {
				if from == to {
					continue
				}
				move(from, to)
				if t := total(); t < best-1e-9 {
					best, better = t, true
				} else {
					move(to, from)
				}
			}
		}
		if !better {
			return
		}
	}
}

// spread gives every column its place across: as wide as its widest thing, with lanes between for the lines that pass.
func (k *canvas) spread(cols [][]*spot) {
	passing := make([]int, len(cols)+1)
	for _, l := range k.plant.Lines {
		a, b := k.byTag[l.From], k.byTag[l.To]
		if a == nil || b == nil {
			continue
		}
		for c := min(a.col, b.col); c <= max(a.col, b.col); c++ {
			passing[c+1]++
		}
		passing[min(a.col, b.col)]++
	}
	x := railPx + 14
	for c, col := range cols {
		x += 18 + 8*math.Min(float64(passing[c]), 8)
		w := 0.0
		for _, s := range col {
			w = math.Max(w, s.slack())
		}
		for _, s := range col {
			s.x = math.Round(x + w/2)
		}
		x += w
	}
	x += 24 + 8*math.Min(float64(passing[len(cols)]), 8)
	k.width = math.Max(math.Ceil(x), 420)
	for _, s := range k.spots {
		s.box[0] += s.x
		s.box[2] += s.x
	}
}
