package shape_test

import (
	"fmt"

	"headfall/elements/shape"
)

// A fermenter: 3.2 m in diameter, 5 m over all, with a cone of 0.9 m down to an outlet of 80 mm.
func ExampleUprightCylinder() {
	cone, err := shape.Cone(3.2, 0.9, 0, 0.080)
	if err != nil {
		fmt.Println(err)
		return
	}
	tank, err := shape.UprightCylinder(3.2, 5, 0, cone, nil)
	if err != nil {
		fmt.Println(err)
		return
	}
	v, area := tank.Volume(4.2)
	fmt.Printf("at 4.2 m: %.3f m3, %.4f m2\n", v, area)
	h, slope := tank.Level(10)
	fmt.Printf("10 m3 stand %.4f m deep; 1 L is %.3f mm\n", h, slope)
	// Output:
	// at 4.2 m: 29.015 m3, 8.0425 m2
	// 10 m3 stand 1.8357 m deep; 1 L is 0.124 mm
}

func ExampleLyingCylinder() {
	ends, _ := shape.TorisphericalForm(2.4, "din_28011", 0)
	tank, _ := shape.LyingCylinder(2.4, 6, 0, ends)
	for _, h := range []float64{0.6, 1.2, 2.4} {
		v, _ := tank.Volume(h)
		fmt.Printf("%.1f m: %.3f m3\n", h, v)
	}
	// Output:
	// 0.6 m: 5.735 m3
	// 1.2 m: 14.940 m3
	// 2.4 m: 29.880 m3
}

// A strapping table whose section jumps at 1 m, where a baffle ends.
func ExampleTable() {
	tank, _ := shape.Table([][2]float64{{0, 0}, {1, 1.8}, {3, 6}}, false)
	fmt.Println(tank.Corners())
	_, err := shape.Table([][2]float64{{0, 0}, {1, 1.8}, {0.9, 2}}, false)
	fmt.Println(err)
	// Output:
	// [1]
	// table: row 3: level and volume must both increase from row to row
}

func ExampleInside() {
	sump, _ := shape.Box(4, 3, 2.2)
	filter, _ := shape.Inside(sump, shape.Internal{From: 0, To: 0.4, Voids: 0.42})
	v, _ := filter.Volume(0.3)
	fmt.Printf("%.3f m3\n", v)
	// Output:
	// 1.512 m3
}
