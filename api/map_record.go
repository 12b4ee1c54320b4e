package api

import (
	"regimed/regime/kind"
	"regimed/regime/whatif"
)

// MapRecord is a map as it is sent to those who draw it themselves. Coordinates are
// the two inputs in SI.
type MapRecord struct {
	Engine  EngineRecord      `json:"engine"`
	Digest  string            `json:"digest"`
	Title   string            `json:"title"`
	Kind    string            `json:"kind"`
	X       MapAxisRecord     `json:"x"`
	Y       MapAxisRecord     `json:"y"`
	Point   *MapPointRecord   `json:"point"` // null where the case has no place on the map
	Regions []MapRegionRecord `json:"regions"`
	Lines   []MapLineRecord   `json:"lines"`
	Cloud   *MapCloudRecord   `json:"cloud"` // null where both inputs are certain
	Judged  int               `json:"judged"`
}

// MapAxisRecord is an axis.
type MapAxisRecord struct {
	Input   string  `json:"input"`
	From    float64 `json:"from"`
	To      float64 `json:"to"`
	Unit    string  `json:"unit"`
	Spacing string  `json:"spacing"`
}

// MapPointRecord is where the case stands.
type MapPointRecord struct {
	X     float64 `json:"x"`
	Y     float64 `json:"y"`
	Class *string `json:"class"`
}

// MapRegionRecord is a connected part of the map with one class; or where nothing
// can be computed, with the inputs that are refused there.
type MapRegionRecord struct {
	Class   *string       `json:"class"`
	Title   string        `json:"title"`
	Outside []string      `json:"outside,omitempty"`
	Share   float64       `json:"share"` // of the area of the map
	Rings   [][][]float64 `json:"rings"` // the outline, then holes
}

// MapLineRecord is where an assumption reaches its limit.
type MapLineRecord struct {
	Assumption string      `json:"assumption"`
	Title      string      `json:"title"`
	Closed     bool        `json:"closed"`
	Points     [][]float64 `json:"points"`
	Leaps      []int       `json:"leaps,omitempty"`
}

// MapCloudRecord is where the case may stand.
type MapCloudRecord struct {
	Draws  int                   `json:"draws"`
	Points [][]float64           `json:"points"` // those on the map
	Box    map[string][]*float64 `json:"box"`    // 5 and 95 % of each input
}

// NewMapRecord makes the record of a map.
func NewMapRecord(m *whatif.Map) *MapRecord {
	r := &MapRecord{Engine: engineRecord(), Digest: m.Case.Digest(), Kind: m.Case.Kind, X: mapAxisRecord(&m.X), Y: mapAxisRecord(&m.Y),
		Regions: []MapRegionRecord{}, Lines: []MapLineRecord{}, Judged: m.Judged}
	if v := m.Case.Lookup(kind.Title); v != nil {
		r.Title = v.Text
	}
	if m.Here != nil {
		class, _ := zoneRecord(m.Zone)
		r.Point = &MapPointRecord{m.Case.At(m.X.Place).Value, m.Case.At(m.Y.Place).Value, class}
	}
	for i := range m.Regions {
		region := &m.Regions[i]
		record := MapRegionRecord{Outside: region.Outside, Share: region.Area}
		record.Class, record.Title = zoneRecord(region.Zone)
		for _, ring := range region.Rings {
			record.Rings = append(record.Rings, coordinates(m, ring))
		}
		r.Regions = append(r.Regions, record)
	}
	for _, l := range m.Lines {
		r.Lines = append(r.Lines, MapLineRecord{l.Entry.ID, l.Entry.Title, l.Closed, coordinates(m, l.Points), l.Leaps})
	}
	r.Cloud = cloudRecord(m)
	return r
}

func mapAxisRecord(a *whatif.MapAxis) MapAxisRecord {
	spacing := "linear"
	if a.Log {
		spacing = "log"
	}
	return MapAxisRecord{a.Name(), a.From, a.To, a.Place.Kind().SI(), spacing}
}

func zoneRecord(z *whatif.Zone) (class *string, title string) {
	if z.Class == nil {
		return nil, "Outside the range of an input"
	}
	return &z.Class.ID, z.Class.Title
}

func coordinates(m *whatif.Map, points []whatif.Point) [][]float64 {
	list := make([][]float64, len(points))
	for i, p := range points {
		list[i] = []float64{m.X.At(p.X), m.Y.At(p.Y)}
	}
	return list
}

func cloudRecord(m *whatif.Map) *MapCloudRecord {
	if m.Cloud == nil {
		return nil
	}
	low, high := m.Cloud.Quantiles[0], m.Cloud.Quantiles[1]
	return &MapCloudRecord{m.Cloud.Draws, coordinates(m, m.Cloud.Points),
		map[string][]*float64{"x": {number(low[0]), number(high[0])}, "y": {number(low[1]), number(high[1])}}}
}
