package quantity

// All factors here are exact: the foot is 0.3048 m and the inch 0.0254 m by the
// international agreement of 1959 (SP 811, B.6); the litre is 1 dm³ (SI Brochure,
// table 8); the US gallon is 231 in³, the UK gallon 4.54609 L, the barrel of
// petroleum 42 US gallons (SP 811, B.8).

// lengthUnits: metres in one.
var lengthUnits = []def{
	{"m", "1"},
	{"mm", "0.001"},
	{"cm", "0.01"},
	{"km", "1000"},
	{"µm um", "0.000001"},
	{"in", "0.0254"},
	{"ft", "0.3048"},
}

// areaUnits: square metres in one.
var areaUnits = []def{
	{"m2", "1"},
	{"cm2", "0.01*0.01"},
	{"mm2", "0.001*0.001"},
	{"in2", "0.0254*0.0254"},
	{"ft2", "0.3048*0.3048"},
}

// volumeUnits: cubic metres in one.
var volumeUnits = []def{
	{"m3", "1"},
	{"L l", "0.001"},
	{"mL ml", "0.000001"},
	{"cm3", "0.000001"},
	{"hL hl", "0.1"},
	{"in3", "0.0254*0.0254*0.0254"},
	{"ft3", "0.3048*0.3048*0.3048"},
	{"gal(US)", "231*0.0254*0.0254*0.0254"},
	{"gal(UK)", "0.00454609"},
	{"bbl", "42*231*0.0254*0.0254*0.0254"},
	{"mm3", "0.000000001"},
	{"dm3", "0.001"},
}

// angleUnits: radians in one. A degree is π/180 rad; π is taken to 50 decimals.
var angleUnits = []def{
	{"deg °", "3.14159265358979323846264338327950288419716939937510/180"},
	{"rad", "1"},
}
