package render

import "testing"

// The forms for people, to be compared with JSON.
func BenchmarkForms(b *testing.B) {
	a := classify(b, classified["riser"])
	rows := []struct {
		name string
		draw func() error
	}{
		{"json", func() error { AppendJSON(nil, a, All); return nil }},
		{"html", func() error { _, err := HTML(a); return err }},
		{"markdown", func() error { _, err := Markdown(a); return err }},
		{"csv", func() error { _, err := CSV(a); return err }},
		{"svg", func() error { MarginChart(a).AppendSVG(nil); return nil }},
		{"png", func() error { _, err := MarginChart(a).PNG(); return err }},
		{"strip", func() error { AppendStrip(nil, a); return nil }},
	}
	for _, row := range rows {
		b.Run(row.name, func(b *testing.B) {
			for b.Loop() {
				if err := row.draw(); err != nil {
					b.Fatal(err)
				}
			}
		})
	}
}
