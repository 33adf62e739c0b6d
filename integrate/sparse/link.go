package sparse

import "sort"

// linkPanels finds the panels that each panel updates and the places of its rows in them.
func (f *Factor) linkPanels() {
	owner := make([]int32, f.n)
	for s := range f.panels {
		p := &f.panels[s]
		for c := p.col; c < p.col+p.w; c++ {
			owner[c] = int32(s)
		}
	}
	place := make([]int32, f.n)
	for s := range f.panels {
		p := &f.panels[s]
		list := f.rows[p.row : p.row+p.r]
		p.cut = int32(len(f.cuts))
		for a := int32(0); a < p.r; {
			t := owner[list[a]]
			q := &f.panels[t]
			b := a
			for b < p.r && list[b] < q.col+q.w {
				b++
			}
			c := cut{p: t, a: a, b: b, at: int32(len(f.rel))}
			for k, i := range f.rows[q.row : q.row+q.r] {
				place[i] = int32(k)
			}
			for j := a; j < b; j++ {
				f.rel = append(f.rel, list[j]-q.col)
			}
			for j := b; j < p.r; j++ {
				f.rel = append(f.rel, place[list[j]])
			}
			f.cuts = append(f.cuts, c)
			a = b
		}
		p.ncut = int32(len(f.cuts)) - p.cut
	}
}

// find returns the place in v of the entry at row i and column j of the renumbered matrix; owner gives the panel of a column.
func (f *Factor) find(owner []int32, i, j int32) int32 {
	s := owner[min(i, j)]
	p := &f.panels[s]
	list := f.rows[p.row : p.row+p.r]
	if max(i, j) < p.col+p.w {
		return p.at + (i-p.col)*p.w + j - p.col
	}
	k := int32(sort.Search(len(list), func(k int) bool { return list[k] >= max(i, j) }))
	if i < j { // in U
		return p.at + p.w*p.w + (i-p.col)*p.r + k
	}
	return p.at + p.w*p.w + p.w*p.r + (j-p.col)*p.r + k
}

// placeEntries finds the place of each entry of the pattern, and what the small panels update.
func (f *Factor) placeEntries() {
	owner := make([]int32, f.n)
	for s := range f.panels {
		p := &f.panels[s]
		for c := p.col; c < p.col+p.w; c++ {
			owner[c] = int32(s)
		}
	}
	number := inverse(f.order)
	f.slot = make([]int32, len(f.pat.Row))
	for j := range int32(f.n) {
		for k := f.pat.Ptr[j]; k < f.pat.Ptr[j+1]; k++ {
			f.slot[k] = f.find(owner, number[f.pat.Row[k]], number[j])
		}
	}
	for s := range f.panels {
		p := &f.panels[s]
		if p.w != 1 {
			continue
		}
		switch list := f.rows[p.row : p.row+p.r]; p.r {
		case 1:
			f.spots = append(f.spots, f.find(owner, list[0], list[0]))
		case 2:
			a, b := list[0], list[1]
			f.spots = append(f.spots, f.find(owner, a, a), f.find(owner, a, b), f.find(owner, b, a), f.find(owner, b, b))
		}
	}
}

// findRoots lists the last columns of the parts.
func (f *Factor) findRoots() {
	for s := range f.panels {
		p := &f.panels[s]
		if p.r > 0 {
			continue
		}
		j := f.order[p.col+p.w-1]
		for k := f.pat.Ptr[j]; k < f.pat.Ptr[j+1]; k++ {
			if f.pat.Row[k] == j {
				f.roots = append(f.roots, root{at: p.at + p.w*p.w - 1, entry: k})
			}
		}
	}
}
