package shape

import (
	"slices"
	"testing"
)

var sink float64

// BenchmarkLevel takes levels in the manner of a drain: volumes that creep down, and, scattered, volumes anywhere.
func BenchmarkLevel(b *testing.B) {
	wanted := []string{"upright flat", "upright cone", "upright ellipsoidal", "upright asme_fd", "lying flat", "lying ellipsoidal", "lying cone", "lying asme_fd", "sphere", "box",
		"frustum widening", "frustum crossing", "table straight", "table smooth", "stack", "inside lying"}
	done := map[string]bool{}
	for _, s := range specimens() {
		if !slices.Contains(wanted, s.name) || done[s.name] {
			continue
		}
		done[s.name] = true
		full, _ := s.shape.Volume(s.shape.Height())
		b.Run(s.name, func(b *testing.B) {
			b.ReportAllocs()
			for i := 0; b.Loop(); i++ {
				h, _ := s.shape.Level(full * float64(i*617&1023) / 1024)
				sink += h
			}
		})
	}
}

// BenchmarkBuild is what a changed diameter costs.
func BenchmarkBuild(b *testing.B) {
	for name, head := range heads(2.4) {
		b.Run("upright "+name, func(b *testing.B) {
			for b.Loop() {
				must(UprightCylinder(2.4, 0, 5, head, nil))
			}
		})
		b.Run("lying "+name, func(b *testing.B) {
			for b.Loop() {
				must(LyingCylinder(2.4, 6, 0, head))
			}
		})
	}
}
