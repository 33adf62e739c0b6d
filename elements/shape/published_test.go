package shape

import (
	"encoding/json"
	"math"
	"os"
	"testing"
)

// published is one entry of testdata/shape/volumes.json; where it was found stands there.
type published struct {
	ID        string
	Expected  json.RawMessage
	Tolerance struct {
		Type  string
		Value float64
	}
}

const (
	inch   = 0.0254
	gallon = 231 * inch * inch * inch // US
)

func load(t *testing.T) map[string]published {
	t.Helper()
	text, err := os.ReadFile("../../testdata/shape/volumes.json")
	if err != nil {
		t.Fatal(err)
	}
	var file struct{ Checks []published }
	if err := json.Unmarshal(text, &file); err != nil {
		t.Fatal(err)
	}
	byID := map[string]published{}
	for _, c := range file.Checks {
		byID[c.ID] = c
	}
	return byID
}

func lyingGallons(head Head) []float64 {
	s := must(LyingCylinder(108*inch, 156*inch, 0, head))
	v, _ := s.Volume(36 * inch)
	return []float64{v / gallon}
}

func uprightGallons(head Head) []float64 {
	s := must(UprightCylinder(132*inch, 0, 156*inch, head, nil))
	v, _ := s.Volume(24 * inch)
	return []float64{v / gallon}
}

// dish is a spherical head without a knuckle, by its depth.
func dish(d, depth float64) Head {
	return must(Torispherical(d, (d*d/4+depth*depth)/(2*depth), 0, 0.01))
}

// wholeCone is the cone bottom of V05 to its very point: ours ends at an outlet, whose part of the cone is counted in.
func wholeCone(d, depth, level float64) float64 {
	const outlet = 0.012
	tip := depth * outlet / d
	s := must(UprightCylinder(d, 0, d, must(Cone(d, depth-tip, 0, outlet)), nil))
	v, _ := s.Volume(level - tip)
	return v + circle(outlet)*tip/3
}

// V14: a plane bottom that slopes 12 in leaves half of the lowest 12 in.
func slopedWithDome() float64 {
	d := 144 * inch
	bottom := must(Table([][2]float64{{12 * inch, circle(d) * 6 * inch}}, false))
	s := must(Stack(bottom, must(UprightCylinder(d, 0, 180*inch, nil, must(Torispherical(d, 90*inch, 0, 0))))))
	v, _ := s.Volume(198 * inch)
	return v / gallon
}

func TestPublished(t *testing.T) {
	d := 108 * inch
	proportions := func() (out []float64) {
		for _, form := range []string{"asme_fd", "din_28011", "din_28013"} {
			h := must(TorisphericalForm(1, form, 0.012))
			out = append(out, h.Depth(), h.Volume())
		}
		return out
	}
	sphere, _ := must(Sphere(3, 0.012)).Volume(0.75)
	got := map[string][]float64{
		"V01": lyingGallons(must(Cone(d, 42*inch, 0, 0))),
		"V02": lyingGallons(must(Ellipsoidal(d, 42*inch, 0))),
		"V03": lyingGallons(dish(d, 42*inch)),
		"V04": lyingGallons(must(TorisphericalForm(d, "asme_fd", 0))),
		"V05": {wholeCone(132*inch, 33*inch, 24*inch) / gallon},
		"V06": uprightGallons(must(Ellipsoidal(132*inch, 33*inch, 0.012))),
		"V07": uprightGallons(dish(132*inch, 33*inch)),
		"V09": proportions(),
		"V10": {must(Ellipsoidal(1, 0, 0.012)).Volume(), must(Hemispherical(1, 0.012)).Volume()},
		"V13": {sphere},
		"V14": {slopedWithDome()},
	}
	for id, check := range load(t) {
		var want []float64
		if json.Unmarshal(check.Expected, &want) != nil {
			want = make([]float64, 1)
			if err := json.Unmarshal(check.Expected, &want[0]); err != nil {
				t.Fatal(err)
			}
		}
		if len(got[id]) != len(want) {
			t.Errorf("%s is not tried", id)
			continue
		}
		worst := 0.0
		for i := range want {
			closeTo(t, id, got[id][i], want[i], check.Tolerance.Value)
			worst = math.Max(worst, math.Abs(got[id][i]/want[i]-1))
		}
		t.Logf("%s: %.6g against %.6g, worst %.1e", id, got[id], want, worst)
	}
}
