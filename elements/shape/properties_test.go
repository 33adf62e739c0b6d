package shape

import (
	"math"
	"sort"
	"strings"
	"testing"

	"pgregory.net/rapid"
)

// levels returns levels all over a shape: even, crowded at bottom, top and joints, and beyond both ends.
func levels(s Shape) []float64 {
	h := s.Height()
	var all []float64
	for i := range 2001 {
		all = append(all, h*(-0.1+1.2*float64(i)/2000))
	}
	joints := append([]float64{0, h}, s.Corners()...)
	for _, sl := range s.(*body).slices {
		joints = append(joints, sl.z)
	}
	for _, z := range joints {
		for x := 1e-12; x < 1; x *= 1.9 {
			all = append(all, z-x*h, z+x*h)
		}
		all = append(all, z)
	}
	sort.Float64s(all)
	return all
}

// Level(Volume(h)) = h to 1e-12 of h, but for the rounding of the volume itself and a unit in the last place of the height.
func TestRoundTrip(t *testing.T) {
	for _, s := range specimens() {
		for _, h := range levels(s.shape) {
			v, a := s.shape.Volume(h)
			back, slope := s.shape.Level(v)
			// What the rounding of v alone is worth in level, where the section is small under a large volume.
			rounding := 4e-16 * math.Abs(v) / a
			if math.Abs(back-h) > 1e-12*math.Abs(h)+rounding+2.3e-16*s.shape.Height() {
				t.Errorf("%s: level %g came back as %g (%.2g)", s.name, h, back, back-h)
			}
			// The slope belongs to the level, as well as a level can be told near a full top.
			off := 1e-12*math.Abs(h) + 2e-15*math.Abs(v)*math.Max(slope, 1/a)
			_, low := s.shape.Volume(h - off)
			_, high := s.shape.Volume(math.Min(h+off, math.Max(h, s.shape.Height()))) // not past a jump
			if area := 1 / slope; area < (1-1e-11)*min(low, a, high) || area > (1+1e-11)*max(low, a, high) {
				t.Errorf("%s: slope %g at level %g, want %g", s.name, slope, h, 1/a)
			}
		}
	}
}

func TestRoundTripAnyVolume(t *testing.T) {
	all := specimens()
	rapid.Check(t, func(t *rapid.T) {
		s := all[rapid.IntRange(0, len(all)-1).Draw(t, "specimen")]
		full, _ := s.shape.Volume(s.shape.Height())
		v := full * rapid.Float64Range(-0.2, 1.2).Draw(t, "share")
		h, _ := s.shape.Level(v)
		back, a := s.shape.Volume(h)
		if math.Abs(back-v) > 1e-14*full+4e-16*math.Abs(h)*a {
			t.Fatalf("%s: volume %g came back as %g (%.2g)", s.name, v, back, back-v)
		}
	})
}

// Spheres, cylinders and frustums of any proportion.
func TestRoundTripAnyShape(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		d := math.Pow(10, rapid.Float64Range(-1, 1.8).Draw(t, "log diameter"))
		crown := d * rapid.Float64Range(0.51, 3).Draw(t, "crown")
		knuckle := d * rapid.Float64Range(0, 0.49).Draw(t, "knuckle")
		head, err := Torispherical(d, crown, knuckle, 0)
		if err != nil {
			t.Fatal(err)
		}
		length := d * rapid.Float64Range(0.05, 20).Draw(t, "length")
		for i, s := range []Shape{
			must(UprightCylinder(d, 0, length, head, head)),
			must(LyingCylinder(d, length, 0, head)),
			must(Frustum(Section{Diameter: knuckle + 0.02}, Section{Diameter: crown}, length)),
		} {
			h := s.Height() * rapid.Float64Range(0, 1).Draw(t, "level")
			v, a := s.Volume(h)
			if back, _ := s.Level(v); math.Abs(back-h) > 1e-12*h+4e-16*v/a+1e-300 {
				t.Fatalf("shape %d: level %g of %g came back %.2g off", i, h, s.Height(), back-h)
			}
		}
	})
}

// dV/dh is the derivative of V: against central differences, away from joints.
func TestAreaIsDerivative(t *testing.T) {
	for _, s := range specimens() {
		b := s.shape.(*body)
		for i := range b.slices {
			sl := &b.slices[i]
			for k := 1; k < 40; k++ {
				z := sl.h * float64(k) / 40
				d := 1e-4 * math.Min(z, sl.h-z)
				below, _ := sl.at(z - d)
				above, _ := sl.at(z + d)
				_, a, grow := sl.eval(z)
				if got := (above - below) / (2 * d); math.Abs(got-a) > 1e-6*a+1e-15*math.Abs(above)/d {
					t.Errorf("%s, slice %d, z %g: area %g, difference %g", s.name, i, z, a, got)
				}
				_, low := sl.at(z - d)
				_, high := sl.at(z + d)
				if got := (high - low) / (2 * d); math.Abs(got-grow) > 1e-4*math.Abs(grow)+1e-3*a/sl.h+1e-14*a/d {
					t.Errorf("%s, slice %d, z %g: dA/dh %g, difference %g", s.name, i, z, grow, got)
				}
			}
		}
	}
}

// The area jumps nowhere but at corners; in tanks of one piece, at knuckle, pole and axis, nowhere at all.
func TestJumpsOnlyAtCorners(t *testing.T) {
	for _, s := range specimens() {
		b := s.shape.(*body)
		corners := map[float64]bool{}
		for _, c := range b.Corners() {
			corners[c] = true
		}
		if !sort.Float64sAreSorted(b.Corners()) {
			t.Errorf("%s: corners %v do not ascend", s.name, b.Corners())
		}
		for i := 1; i < len(b.slices); i++ {
			_, below := b.slices[i-1].at(b.slices[i-1].h)
			_, above := b.slices[i].at(0)
			jump, allowed := math.Abs(above/below-1), 1e-9
			if strings.HasPrefix(s.name, "stack") || strings.HasPrefix(s.name, "inside") || strings.HasPrefix(s.name, "table") {
				allowed = cornerJump
			}
			if jump > allowed && !corners[b.slices[i].z] {
				t.Errorf("%s: area jumps from %g to %g at %g, no corner", s.name, below, above, b.slices[i].z)
			}
		}
	}
}

// Volume and level both rise, and no section is under 1 cm².
func TestMonotone(t *testing.T) {
	for _, s := range specimens() {
		last := math.Inf(-1)
		for _, h := range levels(s.shape) {
			v, a := s.shape.Volume(h)
			if v < last || a < minArea*(1-1e-9) {
				t.Errorf("%s: at level %g volume %g after %g, area %g", s.name, h, v, last, a)
			}
			last = v
		}
	}
}

func TestBeyondTheEnds(t *testing.T) {
	for _, s := range specimens() {
		full, top := s.shape.Volume(s.shape.Height())
		_, tip := s.shape.Volume(0)
		v, a := s.shape.Volume(-0.1)
		closeTo(t, s.name+": volume below", v, -0.1*tip, 1e-14)
		closeTo(t, s.name+": area below", a, tip, 1e-14)
		v, a = s.shape.Volume(s.shape.Height() + 0.2)
		least := math.Max(top, 0.01*s.shape.(*body).largest)
		closeTo(t, s.name+": area above", a, least, 1e-12)
		closeTo(t, s.name+": volume above", v, full+0.2*least, 1e-12)
	}
}

func TestOutline(t *testing.T) {
	for _, s := range specimens() {
		o := s.shape.Outline()
		low, high := math.Inf(1), math.Inf(-1)
		for i, p := range o {
			low, high = math.Min(low, p.Y), math.Max(high, p.Y)
			if q := o[len(o)-1-i]; q.X != -p.X || q.Y != p.Y {
				t.Errorf("%s: outline is not even-sided at %v", s.name, p)
			}
			if math.IsNaN(p.X) || math.IsNaN(p.Y) {
				t.Errorf("%s: outline has no number at %d", s.name, i)
			}
		}
		closeTo(t, s.name+": outline's height", high-low, s.shape.Height(), 1e-12)
		if p := s.shape.Perimeter(s.shape.Height()); !(p > 0) {
			t.Errorf("%s: perimeter %g", s.name, p)
		}
	}
}

func TestNoAllocation(t *testing.T) {
	for _, s := range specimens() {
		full, _ := s.shape.Volume(s.shape.Height())
		if n := testing.AllocsPerRun(20, func() {
			for _, x := range [...]float64{-0.1, 1e-6, 0.1, 0.4, 0.6, 0.99, 1.1} {
				s.shape.Level(x * full)
				s.shape.Volume(x * s.shape.Height())
			}
		}); n != 0 {
			t.Errorf("%s: %g allocations", s.name, n)
		}
	}
}

func TestNeverNaN(t *testing.T) {
	for _, s := range specimens() {
		for _, x := range []float64{-math.MaxFloat64 / 1e10, -1e-300, math.Copysign(0, -1), 0, 5e-324, 1e-300, math.MaxFloat64 / 1e10} {
			h, slope := s.shape.Level(x)
			v, a := s.shape.Volume(x)
			for _, y := range []float64{h, slope, v, a} {
				if math.IsNaN(y) {
					t.Errorf("%s: not a number at %g", s.name, x)
				}
			}
		}
	}
}
