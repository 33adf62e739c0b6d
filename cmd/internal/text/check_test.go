package text_test

import (
	"bytes"
	"testing"

	"headfall/cmd/internal/text"
	"headfall/elements/quantity"
	"headfall/network"
)

// What people do and what must hold is echoed in the words of the file; a star marks a default, a wave an assumed doubt.
func TestCheckPage(t *testing.T) {
	p := cascade()
	kv := quantity.Value{SI: 95, Dim: quantity.Kv, Doubt: quantity.Doubt{Kind: quantity.Normal95, Half: 14.25}}
	p.RunFor, p.ReportEvery, p.Gravity, p.Atmosphere = 4*3600, 10, 9.80665, 101325
	p.Lines = nil
	p.Steps = []*network.Step{
		{ID: "s1", At: network.Moment{Given: true, Text: "06:05"}, Action: network.MoveValve, Target: "V-1", ToText: "50 %", Over: 40},
		{ID: "h1", After: "s1", Action: network.HoldPoint, Hold: "lead signs", UpTo: 1800},
		{ID: "s2", When: &network.Condition{Subject: network.Level, Of: []string{"PIT"}, Above: true, Text: "1.6 m"}, Wait: 120, Action: network.SetPump,
			Target: "P-1", Optional: true},
		{ID: "s3", Action: network.SetVent, Target: "AV-1", To: 1},
		{ID: "s4", Action: network.CancelBatch, Target: "dump-1"},
	}
	p.Limits = []*network.Limit{
		{Must: network.Condition{Subject: network.Flow, Of: []string{"AIR"}, Text: "18 m3/h"}, AveragedOver: 900, Why: "permit"},
		{Must: network.Condition{Subject: network.Emptied, Of: []string{"T-1"}}, Within: network.Moment{Text: "10:00", Clock: true}},
		{Must: network.Condition{Subject: network.Level, Of: []string{"T-1"}, Above: true, Text: "0.3 m"}, Until: network.Edge{After: "h1"}},
		{Must: network.Condition{Subject: network.Passed, Of: []string{"AIR"}, Text: "150 m3"}, EachDay: true},
		{Permitted: true, Must: network.Condition{Of: []string{"AIR"}}, OnlyBetween: [2]network.Moment{{Text: "06:00"}, {Text: "22:00"}}},
	}
	p.Numbers = []*network.Number{
		{Name: "V-1.kv", Value: kv, Assumed: true}, {Name: "V-1.stroke", Value: quantity.Value{Dim: quantity.Time}, Default: true},
		{Name: "T-1.level", Value: quantity.Value{SI: 4.2, Dim: quantity.Length, Text: "4.20 m"}},
	}
	var b bytes.Buffer
	if err := text.Check(&b, p, text.Options{}); err != nil {
		t.Fatal(err)
	}
	golden(t, "check", b.Bytes())
	proper(t, b.String())
}
