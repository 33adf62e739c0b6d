package scenarios

import "testing"

func TestDemosLoad(t *testing.T) {
	mustLoad(t, starter, Starter(), Options{})
	for _, name := range Demos() {
		data, _ := Demo(name)
		p := mustLoad(t, name+".yaml", data, Options{})
		for _, w := range p.Warnings {
			t.Errorf("%s: %+v", name, w)
		}
		for _, c := range p.CaseNames {
			if q := mustLoad(t, name+".yaml", data, Options{Case: c}); q.Case != c {
				t.Errorf("%s: case %q became %q", name, c, q.Case)
			}
		}
	}
}
