package table

import (
	"github.com/go-json-experiment/json"

	"regimed/api/render"
	"regimed/regime/whatif"
)

// head is what every form says about its rows.
type head struct {
	Digest  string       `json:"digest"` // of the case, without the axes
	Engine  engine       `json:"engine"`
	Axes    []axisHead   `json:"axes"`
	Columns []columnHead `json:"columns"`
	Points  int64        `json:"points"` // of the whole sweep
	From    int64        `json:"from"`   // the rows of this file: from, inclusive,
	To      int64        `json:"to"`     // to, exclusive
	Middle  []string     `json:"taken_at_middle"`
}

type engine struct {
	Version   string `json:"version"`
	Catalogue string `json:"catalogue"`
}

type axisHead struct {
	Input   string   `json:"input"`
	Unit    *string  `json:"unit"` // null: names
	Points  int64    `json:"points"`
	Spacing string   `json:"spacing"` // linear, log or list
	From    *float64 `json:"from,omitzero"`
	To      *float64 `json:"to,omitzero"`
	Step    float64  `json:"step,omitzero"`
	Values  []any    `json:"values,omitempty"`
}

type columnHead struct {
	Name string  `json:"name"`
	Unit *string `json:"unit"` // null: a text, or not known
}

func (s *Sheet) head() head {
	h := head{Digest: s.Case.Digest(), Engine: engine{render.Version, render.Catalogue()},
		Points: s.Total(), From: s.From, To: s.To, Middle: s.Uncertain()}
	for i := range s.Axes {
		h.Axes = append(h.Axes, headOf(&s.Axes[i]))
	}
	for i := range s.Columns {
		h.Columns = append(h.Columns, columnHead{s.Columns[i].Name, orNull(s.Unit(i))})
	}
	return h
}

func headOf(a *whatif.Axis) axisHead {
	n := a.Len()
	h := axisHead{Input: a.Name(), Unit: orNull(a.Unit()), Points: n, Spacing: a.Spacing()}
	if !a.Listed() {
		first, last := a.X(0), a.X(n-1)
		h.From, h.To, h.Step = &first, &last, a.Step()
		return h
	}
	for i := range n {
		if a.Named() {
			h.Values = append(h.Values, a.Text(i))
			continue
		}
		h.Values = append(h.Values, a.X(i))
	}
	return h
}

func orNull(s string) *string {
	if s == "" {
		return nil
	}
	return &s
}

// headJSON writes the head. It holds finite numbers and valid texts only, which
// is all that JSON asks for.
func (s *Sheet) headJSON() []byte {
	data, err := json.Marshal(s.head())
	if err != nil {
		return []byte("null")
	}
	return data
}
