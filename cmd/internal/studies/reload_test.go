package studies

import (
	"math/rand/v2"
	"testing"

	"headfall/network"
	"headfall/network/study"
)

// A bench that has run many other numbers and faults gives the same bits as a plant read anew, with the numbers written, made ready as a whole and
// compiled.
func TestReloadIsCompile(t *testing.T) {
	for _, name := range []string{"cellar_passing", "hillside", "day_tank"} {
		t.Run(name, func(t *testing.T) {
			load := demo(t, name)
			used := bench(t, load)
			rng := rand.New(rand.NewPCG(1, 2))
			for round := range 3 {
				idx, values := shaken(used.Plant, rng)
				used.Put(idx, values)
				used.Run(t.Context(), network.RunOptions{Changes: upset(used.Plant)})
				got, err := used.Run(t.Context(), network.RunOptions{Series: true})
				fresh := must(load())(t)
				for k, i := range idx {
					*fresh.Numbers[i].At = values[k]
				}
				if bad := fresh.Refresh(); bad != nil {
					if err == nil {
						t.Fatalf("round %d: refused when read anew (%v), taken by the bench", round, bad)
					}
					continue
				}
				want := must(must(network.Compile(fresh, network.Options{}))(t).Run(t.Context(), network.RunOptions{Series: true}))(t)
				same(t, name, bits(t, got), bits(t, want))
			}
		})
	}
}

// shaken draws a third of all numbers anew, of every kind, by up to 2 %.
func shaken(p *network.Plant, rng *rand.Rand) (idx []int, values []float64) {
	for i, n := range p.Numbers {
		v := *n.At * (1 + 0.02*(2*rng.Float64()-1))
		allowed := v != 0
		for _, check := range n.Check {
			allowed = allowed && check(v) == ""
		}
		if allowed && rng.IntN(3) == 0 {
			idx, values = append(idx, i), append(values, v)
		}
	}
	return idx, values
}

// upset is a run with as many faults as a plant takes.
func upset(p *network.Plant) network.Changes {
	ch := network.Changes{Respond: true, CheckLeak: 0.05, HoldsUpTo: true}
	for _, l := range p.Lines {
		ch.Upsets = append(ch.Upsets, &network.Upset{Kind: network.ExtraLoss, Target: l.Tag, Value: 5}, &network.Upset{Kind: network.ExtraLoss, Target: l.Tag, Value: 9, After: 1})
	}
	return ch
}

// Without numbers put, a bench stays at the plant's own, whatever it ran before.
func TestBenchForgets(t *testing.T) {
	load := demo(t, "cellar_passing")
	b := bench(t, load)
	want := bits(t, must(b.Run(t.Context(), network.RunOptions{}))(t))
	d := study.NewDraws(b.Plant, 3, 1)
	for i := range 3 {
		b.Put(d.Numbers, d.Values(i))
		must(b.Run(t.Context(), network.RunOptions{}))(t)
	}
	b.Put(nil, nil)
	same(t, "cellar_passing", bits(t, must(b.Run(t.Context(), network.RunOptions{}))(t)), want)
}
