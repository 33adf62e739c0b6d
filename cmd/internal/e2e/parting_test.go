package e2e

import (
	"os"
	"strings"
	"testing"
)

// starving is a header out of which a long line with a mass of liquid runs, while the vessels that feed it run dry one after the other.
func starving(inertia, riser string) string {
	return plant("2 h", "liquid: {water: 12 °C}", `
vessels:
  A: {shape: {upright_cylinder: {diameter: 1.2 m, height: 2 m, bottom: {cone: {depth: 0.4 m}}}}, base: 4 m, level: 1.5 m}
  B: {shape: {box: {length: 1 m, width: 1 m, height: 2 m}}, base: 3.5 m, level: 0.3 m}
  S: {shape: {box: {length: 3 m, width: 2 m, height: 2 m}}, base: 0 m, level: 0.2 m}
tees:
  HDR: {elevation: 3 m}
lines:
  LA: {from: A, to: HDR, parts: [{pipe: {length: 6 m, bore: 50 mm, roughness: 0.05 mm}}]}
  LB: {from: B, to: HDR, parts: [{check_valve: {kv: 60}}, {pipe: {length: 6 m, bore: 50 mm, roughness: 0.05 mm}}]}
  L: {from: HDR, to: S, enters: {centre: 1.2 m}, parts: [`+riser+`{pipe: {length: 80 m, bore: 80 mm, roughness: 0.05 mm`+inertia+`}}]}`)
}

// A column that has lost its feed parts: the plant runs on as one whose line has no mass, soon, and says so. Before that the mass of the liquid only
// matters for seconds, so that both drain alike.
func TestStarvedColumn(t *testing.T) {
	for _, method := range []string{"", "rodas4p", "bdf"} {
		with, without := run(t, starving(", inertia: yes", ""), how{method: method}), run(t, starving("", ""), how{method: method})
		for tag, v := range with.Vessels {
			near(t, method+" end of "+tag, v.EndLevel, without.Vessels[tag].EndLevel, 1e-4)
		}
		a, b := value(t, "A", with.Vessels["A"].EmptiedAt), value(t, "A", without.Vessels["A"].EmptiedAt)
		if a < b || a > b+10 {
			t.Errorf("%s: A empty at %g s with, %g s without the mass", method, a, b)
		}
		if flagged(with, "column_parted", "L") != 1 || flagged(without, "column_parted", "L") != 0 {
			t.Errorf("%s: flags %+v", method, with.Flags)
		}
		if with.Work.Steps > 5*without.Work.Steps { // most of them while the column swings in
			t.Errorf("%s: %d steps with, %d without the mass", method, with.Work.Steps, without.Work.Steps)
		}
	}
}

// A high point that the head does not keep full parts the column from the start: the flow is that of the line without mass, to rounding of the events.
func TestColumnOverHighPoint(t *testing.T) {
	riser := "{pipe: {length: 10 m, bore: 80 mm, roughness: 0.05 mm}}, {high_point: {elevation: 4.6 m, vent: {tag: AV, open: yes}}}, "
	with, without := run(t, starving(", inertia: yes", riser), how{}), run(t, starving("", riser), how{})
	for tag, v := range with.Vessels {
		near(t, "end of "+tag, v.EndLevel, without.Vessels[tag].EndLevel, 1e-4)
	}
	if flagged(with, "column_parted", "L") == 0 {
		t.Errorf("flags %+v", with.Flags)
	}
}

// The example of the whole format with vessels and losses as a sample drew them: its header starves late, under a line with a mass.
func TestWholeFileStarves(t *testing.T) {
	text, err := os.ReadFile("../../../testdata/scenarios/whole_file.yaml")
	if err != nil {
		t.Fatal(err)
	}
	r := run(t, strings.Replace(string(text), "doubts: default", "doubts: none", 1), how{set: strings.Split("T-1.level=4.192433169214018 m,T-2.level=0.575137975999199 m,"+
		"VN-2.cd=0.586295581976338,T-3.level=0.5942430912662877 m,T-3/VN-2.cd=0.6007313631180018,SUMP.level=0.3093333649223108 m,L-1.pipe.roughness=6.579914897438769e-05 m,"+
		"L-1.fittings.k=0.4375017892303838,V-1.kv=95.05873202801918,L-2.orifice.cd=0.6108895423803549,L-3.pipe[1].roughness=6.579914897438769e-05 m,"+
		"L-3.pipe[2].roughness=7.968979515155285e-05 m,NRV-1.kv=60.03709391243317,P-LINE.pipe.roughness=4.33699175026389e-05 m", ",")})
	if r.Work.Steps > 2000 {
		t.Errorf("%d steps", r.Work.Steps)
	}
}
