package export

import (
	"bytes"
	"encoding/csv"
	"encoding/json"
	"math"
	"testing"
	"time"

	"github.com/xuri/excelize/v2"

	"headfall/network"
)

// specimen is a plant of two vessels and a line with a result of three samples, one of them not finite.
func specimen() (*network.Plant, *network.Result) {
	p := &network.Plant{Title: "Two vessels", File: "two.yaml", Start: time.Date(2027, 10, 9, 6, 0, 0, 0, time.UTC), Show: network.Show{Level: "mm", Flow: "L/s"},
		Vessels: []*network.Vessel{{Tag: "T-2"}, {Tag: "T-1"}}, Lines: []*network.Line{{Tag: "L-1", From: "T-2", To: "T-1"}}}
	x := 1.5
	r := &network.Result{Schema: 1, Program: network.Program{Name: "headfall", Version: "0"}, Verdict: network.Run, End: 60,
		Vessels: map[string]*network.VesselResult{"T-1": {PeakLevel: 2, HeadroomTo: network.Headroom{Rim: &x}}, "T-2": {PeakLevel: math.Inf(1)}},
		Limits:  []*network.LimitResult{{ID: 1, Says: "level of T-1 below 3 m", Verdict: network.Holds, Margin: &x}},
		Series: &network.Series{Time: []float64{0, 30, 60}, Level: map[string][]float64{"T-1": {1, 1.5, 2}, "T-2": {0.1, math.NaN(), math.Copysign(0, -1)}},
			Flow: map[string][]float64{"L-1": {0.001, 0.0005, 0}}}}
	return p, r
}

func TestCSV(t *testing.T) {
	p, r := specimen()
	var b bytes.Buffer
	if err := CSV(&b, p, r); err != nil {
		t.Fatal(err)
	}
	const want = "time_s,clock,T-2.level_m,T-1.level_m,L-1.flow_m3_s\n" +
		"0,2027-10-09T06:00:00,0.1,1,0.001\n30,2027-10-09T06:00:30,,1.5,0.0005\n60,2027-10-09T06:01:00,0,2,0\n"
	if b.String() != want {
		t.Errorf("got\n%swant\n%s", b.String(), want)
	}
	p.Start = time.Time{}
	b.Reset()
	if err := CSV(&b, p, r); err != nil {
		t.Fatal(err)
	}
	rows, err := csv.NewReader(&b).ReadAll()
	if err != nil || rows[1][1] != "" {
		t.Errorf("without a start the clock must be empty: %v %v", rows, err)
	}
}

func TestJSON(t *testing.T) {
	_, r := specimen()
	var a, b bytes.Buffer
	if err := JSON(&a, r); err != nil {
		t.Fatal(err)
	}
	if err := JSON(&b, r); err != nil {
		t.Fatal(err)
	}
	if !bytes.Equal(a.Bytes(), b.Bytes()) {
		t.Error("not the same twice")
	}
	var got struct {
		Vessels map[string]struct {
			Peak *float64 `json:"peak_level_m"`
		}
		Steps  []any
		Series struct {
			Level map[string][]*float64 `json:"level_m"`
		}
	}
	if err := json.Unmarshal(a.Bytes(), &got); err != nil {
		t.Fatal(err)
	}
	if got.Vessels["T-2"].Peak != nil || *got.Vessels["T-1"].Peak != 2 || got.Series.Level["T-2"][1] != nil {
		t.Error("what is not finite must be null, and nothing else")
	}
	if got.Steps == nil {
		t.Error("an empty list must be written [], not null")
	}
}

// TestJSONAgreesWithStandard compares with encoding/json where both can write the value.
func TestJSONAgreesWithStandard(t *testing.T) {
	type inner struct {
		B string `json:"b"`
	}
	v := map[string]any{"x": []float64{1, 1e-7, 1e21, 0.1}, "s": "</script> \u2028 \"q\"", "n": 3, "t": true, "p": nil, "o": struct {
		inner
		A *int   `json:"a"`
		C string `json:"c,omitempty"`
		D string `json:"-"`
	}{inner: inner{"y"}}, "when": time.Date(2027, 1, 2, 3, 4, 5, 0, time.UTC)}
	var b bytes.Buffer
	if err := JSON(&b, v); err != nil {
		t.Fatal(err)
	}
	want, _ := json.Marshal(v)
	var got bytes.Buffer
	if err := json.Compact(&got, b.Bytes()); err != nil {
		t.Fatal(err)
	}
	if got.String() != string(want) {
		t.Errorf("got  %s\nwant %s", got.String(), want)
	}
}

func TestXLSX(t *testing.T) {
	p, r := specimen()
	var a, b bytes.Buffer
	if err := XLSX(&a, p, r); err != nil {
		t.Fatal(err)
	}
	if err := XLSX(&b, p, r); err != nil {
		t.Fatal(err)
	}
	if !bytes.Equal(a.Bytes(), b.Bytes()) {
		t.Error("not the same bytes twice")
	}
	f, err := excelize.OpenReader(&a)
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	for at, want := range map[string]string{"A1": "Time, s", "D1": "T-1, mm", "A3": "30", "C3": "", "D3": "1500"} {
		if got, err := f.GetCellValue("Levels", at); err != nil || got != want {
			t.Errorf("Levels!%s is %q, want %q (%v)", at, got, want, err)
		}
	}
	if kind, err := f.GetCellType("Levels", "D3"); err != nil || kind == excelize.CellTypeSharedString || kind == excelize.CellTypeInlineString {
		t.Errorf("numbers must be numbers: %v %v", kind, err)
	}
	if panes, err := f.GetPanes("Levels"); err != nil || !panes.Freeze {
		t.Errorf("the header must stay in view: %+v %v", panes, err)
	}
}
