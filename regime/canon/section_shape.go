package canon

// SectionShape names a cross-section in cross flow, for the tables of Strouhal
// numbers and of the factors of galloping instability.
type SectionShape string

// The sections. Depth ratio d/b is the dimension along the flow over that
// across it.
const (
	SectionCircle    SectionShape = "circle"
	SectionSquare    SectionShape = "square"
	SectionRectangle SectionShape = "rectangle"
	SectionI         SectionShape = "i_section"
	SectionH         SectionShape = "h_section"
	SectionChannel   SectionShape = "channel"
	SectionTee       SectionShape = "tee"
	SectionIcedCable SectionShape = "iced_cable"
	SectionBluff     SectionShape = "bluff"
)

// SectionShapes lists the shapes, in the order in which entries number them.
func SectionShapes() []SectionShape {
	return []SectionShape{
		SectionCircle, SectionSquare, SectionRectangle, SectionI, SectionH,
		SectionChannel, SectionTee, SectionIcedCable, SectionBluff,
	}
}

func sectionShapeNames() []string {
	shapes := SectionShapes()
	names := make([]string, len(shapes))
	for i, s := range shapes {
		names[i] = string(s)
	}
	return names
}

// knot is a vertex of a tabulated curve.
type knot struct{ x, y float64 }

// interpolateKnots interpolates linearly, and holds the end values outside.
func interpolateKnots(x float64, table []knot) float64 {
	if x <= table[0].x {
		return table[0].y
	}
	for i := 1; i < len(table); i++ {
		if x > table[i].x {
			continue
		}
		a, b := table[i-1], table[i]
		return a.y + (b.y-a.y)*(x-a.x)/(b.x-a.x)
	}
	return table[len(table)-1].y
}
