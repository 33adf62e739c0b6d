package quantity

import "testing"

func BenchmarkParse(b *testing.B) {
	for _, c := range []struct {
		text string
		d    Dim
	}{{"4.2 m", Length}, {"82.5 mm", Length}, {"12 °C", Temperature}, {"4.20 m ± 0.05 m", Length}, {"15 m3/h", Flow}, {"1 h 20 min", Time}, {"14.696 psi(g)", Pressure}} {
		b.Run(c.text, func(b *testing.B) {
			b.ReportAllocs()
			for b.Loop() {
				if _, err := Parse(c.text, c.d); err != nil {
					b.Fatal(err)
				}
			}
		})
	}
}

func BenchmarkFormat(b *testing.B) {
	b.ReportAllocs()
	for b.Loop() {
		Format(4.2, Length, "mm", 4)
	}
}

func BenchmarkFormatExact(b *testing.B) {
	b.ReportAllocs()
	for b.Loop() {
		FormatExact(15./3600, Flow, "m3/h")
	}
}

// BenchmarkTables is the price every start of the program pays.
func BenchmarkTables(b *testing.B) {
	for b.Loop() {
		buildTables()
	}
}
