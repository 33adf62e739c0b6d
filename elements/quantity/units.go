package quantity

import "strings"

// Units returns the canonical spellings understood for d, the common ones first.
// Bare dimensions have the empty unit first; it is left out here.
func Units(d Dim) []string {
	var names []string
	for _, u := range tables[d].list {
		if u.name != "" {
			names = append(names, u.name)
		}
	}
	return names
}

// SIUnit returns the canonical spelling of the unit Value.SI is in, "" when bare;
// for a kinematic viscosity it is m2/s instead.
func SIUnit(d Dim) string { return tables[d].si.name }

// CanonicalUnit returns the canonical spelling of a unit of d, "m3/h" for "m³/h".
func CanonicalUnit(d Dim, name string) (string, bool) {
	u := tables[d].find(strings.TrimSpace(plain(name)))
	if u == nil {
		return "", false
	}
	return u.name, true
}

// find looks a spelling up, first as it is, then with what does not matter
// taken out. It returns nil when there is none.
func (t *unitTable) find(name string) *unit {
	if u := t.byName[name]; u != nil {
		return u
	}
	return t.byName[squeeze(name)]
}

// squeeze takes out carets and blanks and makes a point of a multiplication sign or
// of a blank between letters: "m^3 / h" is m3/h, "mPa s" and "mPa·s" are mPa.s.
func squeeze(name string) string {
	if !strings.ContainsAny(name, " ^·*") {
		return name
	}
	name = strings.NewReplacer("^", "", "·", ".", "*", ".").Replace(name)
	b := make([]byte, 0, len(name))
	for i := range len(name) {
		switch {
		case name[i] != ' ':
			b = append(b, name[i])
		case len(b) > 0 && isLetter(b[len(b)-1]) && i+1 < len(name) && isLetter(name[i+1]):
			b = append(b, '.')
		}
	}
	return string(b)
}

// canonical returns a def's own name.
func canonical(d def) string {
	name, _, _ := strings.Cut(d.names, " ")
	return name
}

// overEach joins every spelling above with every one below: "L l" over "s" is
// "L/s l/s".
func overEach(tops, unders string) string {
	var names []string
	for top := range strings.SplitSeq(tops, " ") {
		for under := range strings.SplitSeq(unders, " ") {
			names = append(names, top+"/"+under)
		}
	}
	return strings.Join(names, " ")
}
