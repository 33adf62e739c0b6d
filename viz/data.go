package viz

import (
	"encoding/json"
	"html/template"
	"math"
	"sort"
	"strings"

	"headfall/network"
	"headfall/viz/export"
)

const (
	mostPoints  = 2000   // of one series in the page
	totalPoints = 160000 // of all of them
)

// dataset is the series as the page carries them: thinned, six digits, SI, on one list of moments.
type dataset struct {
	JSON    template.JS
	Thinned bool
	Samples int // of the result
	Keys    map[string]bool
}

// derived returns series that are not in the result but follow from it: all that enters an outside point on whose flow there is a limit.
func derived(plant *network.Plant, r *network.Result) []export.Column {
	var all []export.Column
	if r.Series == nil {
		return nil
	}
	for _, o := range plant.Outside {
		limited := false
		for _, l := range r.Limits {
			limited = limited || l.Subject == "flow" && len(l.Of) == 1 && l.Of[0] == o.Tag
		}
		if !limited {
			continue
		}
		sum := make([]float64, len(r.Series.Time))
		for _, l := range plant.Lines {
			q := r.Series.Flow[l.Tag]
			for i := range min(len(q), len(sum)) {
				if l.To == o.Tag {
					sum[i] += q[i]
				} else if l.From == o.Tag {
					sum[i] -= q[i]
				}
			}
		}
		all = append(all, export.Column{Tag: o.Tag, What: "into", Unit: "m3_s", Values: sum})
	}
	return all
}

// newDataset thins every series and writes them down.
func newDataset(plant *network.Plant, r *network.Result, u units, c clock, events []event) dataset {
	set := dataset{Keys: map[string]bool{}}
	var t []float64
	if r.Series != nil {
		t = r.Series.Time
	}
	set.Samples = len(t)
	cols := export.Columns(plant, r)
	own := len(cols)
	cols = append(cols, derived(plant, r)...)
	most := mostPoints
	if len(cols) > 0 {
		most = min(most, max(totalPoints/len(cols), 60))
	}
	kept := make([][]int, len(cols))
	used := map[int]bool{}
	for i, col := range cols {
		kept[i] = thin(t, col.Values, most)
		set.Thinned = set.Thinned || len(kept[i]) >= most
		for _, k := range kept[i] {
			used[k] = true
		}
	}
	place := make([]int, 0, len(used))
	for k := range used {
		place = append(place, k)
	}
	sort.Ints(place)
	at := make(map[int]int, len(place))
	var b strings.Builder
	b.WriteString(`{"start":`)
	if c.Known() {
		b.WriteString(sig(float64(c.start.UnixMilli()), 15))
	} else {
		b.WriteString("null")
	}
	b.WriteString(`,"end":` + sig(math.Max(r.End, 0), 9) + `,"thinned":` + yesNo(set.Thinned) + `,"units":`)
	writeUnits(&b, u)
	b.WriteString(`,"t":[`)
	for n, k := range place {
		at[k] = n
		if n > 0 {
			b.WriteByte(',')
		}
		b.WriteString(sig(t[k], 10))
	}
	b.WriteString("],\"series\":{")
	for i, col := range cols {
		if i > 0 {
			b.WriteString(",\n")
		}
		key := col.What + "/" + col.Tag
		set.Keys[key] = true
		writeSeries(&b, key, col, kept[i], at, i < own)
	}
	b.WriteString("},\"events\":")
	js, _ := json.Marshal(events)
	b.Write(js)
	b.WriteString("}")
	set.JSON = template.JS(b.String())
	return set
}

// writeSeries writes one series: the places of its samples in the list of moments as differences, and the values.
func writeSeries(b *strings.Builder, key string, col export.Column, kept []int, at map[int]int, own bool) {
	name, _ := json.Marshal(key)
	b.Write(name)
	b.WriteString(`:{"c":`)
	if own {
		head, _ := json.Marshal(col.Name())
		b.Write(head)
	} else {
		b.WriteString("null")
	}
	b.WriteString(`,"i":[`)
	before := 0
	for n, k := range kept {
		if n > 0 {
			b.WriteByte(',')
		}
		b.WriteString(sig(float64(at[k]-before), 9))
		before = at[k]
	}
	b.WriteString(`],"v":[`)
	for n, k := range kept {
		if n > 0 {
			b.WriteByte(',')
		}
		b.WriteString(six(col.Values[k]))
	}
	b.WriteString("]}")
}

func writeUnits(b *strings.Builder, u units) {
	type out struct {
		Name string  `json:"name"`
		K    float64 `json:"k"`
		Dec  int     `json:"dec"`
	}
	of := func(u unit) out { return out{u.Name, u.K, u.Dec} }
	js, _ := json.Marshal(map[string]out{
		"level": of(u.Level), "flow": of(u.Flow), "into": of(u.Flow), "volume": of(u.Volume), "gas": of(u.Pressure),
		"opening": of(u.Share), "running": of(u.Share), "crest": of(u.Level), "head": of(u.Level),
	})
	b.Write(js)
}

func yesNo(b bool) string {
	if b {
		return "true"
	}
	return "false"
}
