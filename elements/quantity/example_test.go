package quantity_test

import (
	"fmt"

	"headfall/elements/quantity"
)

func Example() {
	level, err := quantity.Parse("4.20 m ± 5 cm", quantity.Length)
	fmt.Println(level.SI, level.Doubt.Half, err)

	pressure, _ := quantity.Parse("5 psig", quantity.Pressure)
	fmt.Println(quantity.Format(pressure.SI, quantity.Pressure, "mbar(g)", 4))

	_, err = quantity.Parse("4,2 m", quantity.Length)
	fmt.Println(err)
	// Output:
	// 4.2 0.05 <nil>
	// 344.7 mbar(g)
	// decimals are parted by a point, write 4.2 m
}

func ExampleFormatExact() {
	v, _ := quantity.Parse("15 m³/h", quantity.Flow)
	fmt.Println(quantity.FormatExact(v.SI, quantity.Flow, "m3/h"))
	fmt.Println(quantity.FormatExact(v.SI, quantity.Flow, "L/s"))
	// Output:
	// 15 m3/h
	// 4.166666666666667 L/s
}
