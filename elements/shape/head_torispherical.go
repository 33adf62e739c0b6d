package shape

import (
	"math"
	"sort"
	"strings"
)

// forms are the named proportions of torispherical heads: crown and knuckle radius as shares of the diameter.
var forms = map[string][2]float64{
	"asme_fd":   {1, 0.06},
	"din_28011": {1, 0.1},
	"din_28013": {0.8, 0.154},
}

// Forms returns the names of the known torispherical forms.
func Forms() []string {
	names := make([]string, 0, len(forms))
	for name := range forms {
		names = append(names, name)
	}
	sort.Strings(names)
	return names
}

// TorisphericalForm returns a torispherical head of a named form for diameter D, m, with an outlet, m, in its pole (0: 50 mm):
//
//	asme_fd    crown D,     knuckle 0.06 D    ASME BPVC VIII-1 UG-32, flanged and dished
//	din_28011  crown D,     knuckle 0.1 D     DIN 28011 (Klöpper)
//	din_28013  crown 0.8 D, knuckle 0.154 D   DIN 28013 (Korbbogen)
//
// "" is asme_fd. D is taken as the inside diameter, so wall thickness has no part in the proportions.
func TorisphericalForm(diameter float64, form string, outlet float64) (Head, error) {
	if form == "" {
		form = "asme_fd"
	}
	share, known := forms[form]
	if !known {
		var f faults
		f.add("form %q is not known; there are %s, or give crown_radius and knuckle_radius", form, strings.Join(Forms(), ", "))
		return nil, f.err("torispherical")
	}
	return Torispherical(diameter, share[0]*diameter, share[1]*diameter, outlet)
}

// Torispherical returns a head of a spherical crown and a torus-shaped knuckle for diameter D, m, with an outlet, m, in its pole (0: 50 mm, or a quarter
// of the diameter). R crown radius, k knuckle radius, m, c = D/2 − k; k = 0 is a dish without a knuckle:
//
//	depth = R − √((R − k)² − c²)
//	crown:   A(z) = π·(2·R·z − z²), not under the outlet's area, up to the joint at radius ρ₁ = R·c/(R − k)
//	knuckle: A(y) = π·(c + √(k² − y²))², y below the tangent line
//
// Source: sphere and torus segment, solid geometry. Range: R ≥ D/2, 0 ≤ k ≤ D/2, outlet within the crown.
func Torispherical(diameter, crown, knuckle, outlet float64) (Head, error) {
	var f faults
	checkHead(&f, diameter, outlet)
	f.positive("crown_radius", crown)
	f.notNegative("knuckle_radius", knuckle)
	r := diameter / 2
	switch {
	case crown < r*(1-1e-12):
		f.add("crown_radius %s is less than half the diameter, %s", metres(crown), metres(r))
	case knuckle > r*(1+1e-12):
		f.add("knuckle_radius %s is more than half the diameter, %s", metres(knuckle), metres(r))
	}
	if err := f.err("torispherical"); err != nil {
		return nil, err
	}
	if crown-r < 1e-9*r || r-knuckle < 1e-9*r {
		return ellipsoid("torispherical", diameter, r, outlet)
	}
	if knuckle < 1e-6*diameter {
		knuckle = 0
	}
	c := r - knuckle
	d := &torispherical{headBase: headBase{"torispherical", diameter}, crown: crown, knuckle: knuckle}
	d.angle = math.Asin(c / (crown - knuckle))
	d.joint = crown * c / (crown - knuckle)
	d.depth = crown - math.Sqrt((crown-knuckle-c)*(crown-knuckle+c))
	d.tip = tipArea(outletOr(outlet, diameter))
	switch crown := circle(2 * d.joint); {
	case outlet == 0: // one that fits
		d.tip = min(d.tip, tipArea(d.joint), crown)
	case d.tip > crown*(1+1e-12):
		f.add("outlet %s is wider than the crown, %s", metres(outlet), metres(2*d.joint))
	}
	if err := f.err("torispherical"); err != nil {
		return nil, err
	}
	return d, nil
}

type torispherical struct {
	headBase
	crown, knuckle float64 // m, radii
	angle          float64 // rad, from the axis to the joint, seen from the centre of the crown
	joint          float64 // m, radius of the joint
	depth, tip     float64 // m, m²
}

func (d *torispherical) Depth() float64  { return d.depth }
func (d *torispherical) Volume() float64 { return volumeOf(d.bottom()) }
func (d *torispherical) top() []slice    { return d.bottom() }

func (d *torispherical) bottom() []slice {
	up := d.knuckle * math.Cos(d.angle) // of the joint below the tangent line
	slices := capOf(d.crown, d.crown, d.depth-up, d.tip)
	if d.knuckle > 0 {
		slices = append(slices, slice{piece: search(newKnuckle(d.diameter/2-d.knuckle, d.knuckle, d.angle), up), h: up, bent: true})
	}
	return slices
}

// depthAt returns the depth under the tangent line, m, at radius rho, m.
func (d *torispherical) depthAt(rho float64) float64 {
	if rho < d.joint {
		return d.depth - d.crown + math.Sqrt(d.crown*d.crown-rho*rho)
	}
	off := rho - d.diameter/2 + d.knuckle
	return math.Sqrt(math.Max(d.knuckle*d.knuckle-off*off, 0))
}
