package viz

import (
	"testing"

	"headfall/network"
)

func TestStopWords(t *testing.T) {
	for in, want := range map[string]string{
		"rising of INT-10 above 20 mm/min": "INT-10 rises faster than 20 mm/min", "level of PIT above 2 m": "PIT over 2 m", "flow of L-1 below 1 L/s": "flow of L-1 below 1 L/s", "": "",
	} {
		if got := stopWords(in); got != want {
			t.Errorf("%q: %q, want %q", in, got, want)
		}
	}
}

// A step without a reading in the file is read off the level that it moves most, with the band of that moment.
func TestExpected(t *testing.T) {
	p := cascade(t)
	r := p.Result
	s := *r.Steps[0]
	s.Expect = nil
	p.Plant.Steps = []*network.Step{{ID: s.ID, Action: network.MoveValve, Target: "V-1"}}
	e := expected(p, &s)
	if e == nil {
		t.Fatal("nothing is expected")
	}
	if want := valueAt(r.Series.Time, r.Series.Level[e.Read], e.At); e.Mid != want || e.Low != want || e.High != want || e.At > *s.Done+readAfter || e.At < *s.Done {
		t.Errorf("%+v, want %g", e, want)
	}
	low, high := []float64{e.Mid - 0.2, e.Mid - 0.2}, []float64{e.Mid + 0.1, e.Mid + 0.3}
	r.SeriesBand = &network.SeriesBand{Time: []float64{0, 2 * e.At}, Level: map[string]*network.LevelBand{e.Read: {Low: low, Mid: low, High: high}}}
	if b := expected(p, &s); b.Low != e.Mid-0.2 || b.High < e.Mid+0.19 || b.High > e.Mid+0.21 {
		t.Errorf("the band is %+v", b)
	}
	s.Done = nil
	if expected(p, &s) != nil {
		t.Error("a step that never came has no reading")
	}
}
