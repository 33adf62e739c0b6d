package viz

import (
	"math"

	"headfall/network"
)

// live tells the page's script which drawn thing follows which series.
type live struct {
	Vessels []liveVessel `json:"vessels"`
	Lines   []liveLine   `json:"lines"`
	Parts   []livePart   `json:"parts"`
	Waters  []liveWater  `json:"waters"`
}

type liveVessel struct {
	ID     string  `json:"id"`
	Tag    string  `json:"tag"`
	Key    string  `json:"key"`
	Gas    string  `json:"gas"`
	Bottom float64 `json:"bottom"` // px, of its base
	Scale  float64 `json:"scale"`  // px/m
	Height float64 `json:"height"` // m
	Rim    float64 `json:"rim"`    // m
}

type liveLine struct {
	ID   string  `json:"id"`
	Tag  string  `json:"tag"`
	Key  string  `json:"key"`
	Peak float64 `json:"peak"` // m³/s
}

type livePart struct {
	ID    string  `json:"id"`
	Tag   string  `json:"tag"`
	Key   string  `json:"key"`
	Pump  bool    `json:"pump"`
	First float64 `json:"first"` // travel at the start, where there is no series
}

type liveWater struct {
	ID    string      `json:"id"`
	Rows  [][]float64 `json:"rows"`
	Datum float64     `json:"datum"` // m, drawn at Top
	Top   float64     `json:"top"`
	Scale float64     `json:"scale"`
	Foot  float64     `json:"foot"`
	First float64     `json:"first"`
}

// rimOf returns where an open vessel overtops, m over its base.
func rimOf(v *network.Vessel) float64 {
	switch {
	case finite(v.Rim):
		return v.Rim
	case v.Shape != nil:
		return v.Shape.Height()
	}
	return math.NaN()
}
