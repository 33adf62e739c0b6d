package study

import (
	"math"
	"math/rand/v2"
	"slices"

	"gonum.org/v1/gonum/mat"
	"gonum.org/v1/gonum/stat/distmv"
	"gonum.org/v1/gonum/stat/distuv"
	"gonum.org/v1/gonum/stat/samplemv"

	"headfall/elements/quantity"
	"headfall/network"
)

// Draws are samples of everything in a plant that carries a doubt: a Latin hypercube, so that each doubt's own distribution is met evenly by any
// number of samples. They follow from the plant, the number of samples and the seed alone.
type Draws struct {
	Numbers []int    // places in the plant's list of the numbers that carry a doubt
	Names   []string // what is drawn independently: a number, or a key that has one common draw ("kv, all together")
	Of      []int    // which of Names a number follows

	laws   []law
	levels []bool
	unit   *mat.Dense // samples × Names, 0 to 1
}

// roughLevels is the number of values, even by chance, that a roughness is drawn from, so that friction tables are shared between samples.
const roughLevels = 16

// NewDraws draws n samples for a plant.
func NewDraws(p *network.Plant, n int, seed int64) *Draws {
	d := &Draws{}
	common := map[string]int{}
	for i, num := range p.Numbers {
		if !num.Value.Doubt.Stated() {
			continue
		}
		at, shared := common[num.Key]
		if !shared {
			at = len(d.Names)
			name := num.Name
			if slices.Contains(p.Assume.Together, num.Key) {
				name, common[num.Key] = num.Key+", all together", at
			}
			d.Names = append(d.Names, name)
		}
		d.Numbers, d.Of = append(d.Numbers, i), append(d.Of, at)
		d.laws = append(d.laws, lawOf(p, num))
		d.levels = append(d.levels, num.Key == "roughness")
	}
	if n > 0 && len(d.Names) > 0 {
		d.unit = mat.NewDense(n, len(d.Names), nil)
		src := rand.NewPCG(uint64(seed), 0x9e3779b97f4a7c15)
		samplemv.LatinHypercube{Q: distmv.NewUnitUniform(len(d.Names), nil), Src: src}.Sample(d.unit)
	}
	return d
}

// Values returns the numbers of sample i, in the order of Numbers.
func (d *Draws) Values(i int) []float64 {
	v := make([]float64, len(d.Numbers))
	for k := range v {
		u := d.unit.At(i, d.Of[k])
		if d.levels[k] {
			u = (math.Floor(u*roughLevels) + 0.5) / roughLevels
		}
		v[k] = d.laws[k].quantile(u)
	}
	return v
}

// Unit returns the draw of name k in sample i, from 0 to 1.
func (d *Draws) Unit(i, k int) float64 { return d.unit.At(i, k) }

// law is the distribution of one number, cut to what the number may be.
type law struct {
	doubt    quantity.Doubt
	value    float64
	from, to float64 // share of the uncut distribution that is cut off below, and that is left up to the upper cut
}

// half95 is the half-width of the interval that holds 95 % of a normal distribution, in standard deviations.
var half95 = distuv.UnitNormal.Quantile(0.975)

// tail is how many standard deviations from the middle a distribution is cut in any case.
const tail = 6

func lawOf(p *network.Plant, n *network.Number) law {
	l := law{doubt: n.Value.Doubt, value: *n.At, to: 1}
	allowed := func(v float64) bool {
		for _, check := range n.Check {
			if check(v) != "" {
				return false
			}
		}
		return v <= rimOf(p, n)
	}
	if l.doubt.Kind == quantity.Certain || !allowed(l.value) {
		return l
	}
	ends := distuv.UnitNormal.CDF(-tail)
	if l.doubt.Kind == quantity.Uniform {
		ends = 0
	}
	l.from = l.cut(0.5, ends, allowed)
	l.to = l.cut(0.5, 1-ends, allowed)
	return l
}

// cut returns the chance, between that of an allowed value and an end, up to which values are allowed.
func (l *law) cut(inside, end float64, allowed func(float64) bool) float64 {
	if allowed(l.uncut(end)) {
		return end
	}
	for range 60 {
		m := inside + (end-inside)/2
		if allowed(l.uncut(m)) {
			inside = m
		} else {
			end = m
		}
	}
	return inside
}

// quantile returns the value that is not passed with a chance of u.
func (l *law) quantile(u float64) float64 { return l.uncut(l.from + u*(l.to-l.from)) }

func (l *law) uncut(u float64) float64 {
	switch l.doubt.Kind {
	case quantity.Normal95:
		return l.value + distuv.UnitNormal.Quantile(u)/half95*l.doubt.Half
	case quantity.Factor:
		return l.value * math.Exp(distuv.UnitNormal.Quantile(u)/half95*math.Log(l.doubt.Factor))
	case quantity.Uniform:
		return l.doubt.Low + u*(l.doubt.High-l.doubt.Low)
	}
	return l.value
}

// rimOf returns the height that a start level must not pass; +Inf for other numbers.
func rimOf(p *network.Plant, n *network.Number) float64 {
	if n.Key == "level" {
		for _, v := range p.Vessels {
			if n.At == &v.Level {
				return v.RimLevel()
			}
		}
	}
	return math.Inf(1)
}
