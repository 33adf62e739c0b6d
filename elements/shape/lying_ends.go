package shape

// endPair is the liquid in the two ends of a lying cylinder, up to h, m over its lowest line, h not over the radius: volume, m³, area, m², dA/dh, m.
// depthAt is the depth of one end, m, at y, m off the axis.
type endPair interface {
	law
	depthAt(y float64) float64
}
