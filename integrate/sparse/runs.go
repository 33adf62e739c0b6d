package sparse

// run is a stretch of panels of one kind, done by one loop.
type run struct {
	kind   kind
	s0, s1 int32 // panels
	spot   int32 // of the first in spots
	stride int32 // of a path
}

type kind int

const (
	lone   kind = iota // one column, no rows below: a root
	leaf               // one column, one row: a vessel with one neighbour left
	twig               // one column, two rows
	column             // one column, more rows
	block              // more columns
	path               // leaves in one or two chains, each the only row below the one a stride before it
)

// shortest is the least number of leaves that make a path.
const shortest = 8

func (p *panel) kind() kind {
	if p.w > 1 {
		return block
	}
	return kind(min(p.r, 3))
}

// findRuns cuts the panels into runs, and paths out of the runs of leaves: along a path the value that the next column waits for stays in
// a register.
func (f *Factor) findRuns() {
	spot := int32(0)
	for s := int32(0); s < int32(len(f.panels)); {
		r := run{kind: f.panels[s].kind(), s0: s, spot: spot}
		if r.kind == leaf {
			if n, stride := f.pathAt(s); n >= shortest {
				r.kind, r.stride, r.s1 = path, stride, s+n
				f.runs = append(f.runs, r)
				spot += n
				s = r.s1
				continue
			}
		}
		s++
		switch r.kind {
		case leaf:
			spot++
		case twig:
			spot += 4
		}
		if n := len(f.runs); n > 0 && f.runs[n-1].kind == r.kind {
			f.runs[n-1].s1 = s
			continue
		}
		r.s1 = s
		f.runs = append(f.runs, r)
	}
}

// pathAt returns how many leaves from panel s on have their row one, or two, columns further on.
func (f *Factor) pathAt(s int32) (n, stride int32) {
	stride = f.rows[f.panels[s].row] - f.panels[s].col
	if stride > 2 {
		return 0, 0
	}
	for k := s; k < int32(len(f.panels)); k++ {
		p := &f.panels[k]
		if p.kind() != leaf || f.rows[p.row]-p.col != stride {
			break
		}
		n++
	}
	if stride == 2 {
		n -= n % 2
	}
	return n, stride
}
