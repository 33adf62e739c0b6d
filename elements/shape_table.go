package elements

import (
	"headfall/elements/quantity"
	"headfall/elements/shape"
)

func init() {
	Register(Kind{
		Name: "table", Room: Shapes,
		Doc:    "A vessel by its table of level and volume.",
		Law:    "straight between rows, A = ΔV/Δh; or a smooth rising curve; A in m², V in m³, h in m",
		Valid:  "levels above the lowest inside point, within the table",
		Source: "strapping table of the vessel",
		Symbol: "M4 4H20V20H4ZM4 9H20M4 14H20M12 4V20",
		New:    func() Element { return &tableShape{between: "straight"} },
		Sample: "{rows: [[0 m, 0 m3], [1 m, 4 m3], [2 m, 9 m3]]}",
	})
}

type tableShape struct {
	rows    [][]float64 // m, m³
	between string      // straight | smooth
}

func (e *tableShape) Bind(p *Params) {
	p.Table(&e.rows, "rows", Required, "level and volume, both rising", quantity.Length, quantity.Volume)
	p.Word(&e.between, "between", Optional, "between rows", "straight", "smooth").Or("straight")
}
func (e *tableShape) Ready() error { return nil }
func (e *tableShape) Shape(float64) (shape.Shape, error) {
	rows := make([][2]float64, len(e.rows))
	for i, r := range e.rows {
		rows[i] = [2]float64{r[0], r[1]}
	}
	return shape.Table(rows, e.between == "smooth")
}
