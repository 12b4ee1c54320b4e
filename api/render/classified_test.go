package render

import (
	"testing"

	"regimed/regime"
	"regimed/regime/input"
	"regimed/regime/kind"
)

// classified are small cases, read and classified as a caller would have them.
var classified = map[string]string{
	"panel in water": `{"title":"panel","structure":{"kind":"plate","length":"1 m","width":"1 m","thickness":"10 mm","material":"steel","wetted_sides":1},"fluid":"water"}`,
	"riser":          `{"structure":{"kind":"cylinder","diameter":"0.3 m","length":"60 m","mass_per_length":"145 kg/m","frequency_dry":"0.8 Hz","damping_ratio":0.003},"fluid":"seawater","flow":{"speed":"1 m/s"},"motion":{"amplitude":"10 mm"}}`,
	"chimney":        `{"structure":{"kind":"cylinder","diameter":"2 m","length":"60 m","mass_per_length":"600 kg/m","frequency_dry":"0.8 Hz","damping_ratio":0.005,"support":"clamped-free"},"fluid":"air","flow":{"speed":"25 m/s","turbulence_intensity":0.1},"interest":["response","load"],"tolerance":"screening","criteria":{"lock_in":"en-1991-1-4"}}`,
	"cantilever":     `{"structure":{"kind":"generic","length":"29 um","frequency_dry":"17 kHz","mass":"1 ng"},"fluid":"water"}`,
	"static":         `{"structure":{"kind":"cylinder","diameter":"50 mm","length":"1 m","wall_thickness":"3 mm","material":"steel"},"fluid":"water","flow":{"speed":"3 m/s"}}`,
	"dry":            `{"structure":{"kind":"cylinder","diameter":"50 mm","length":"1 m","material":"steel"}}`,
}

func classify(t testing.TB, doc string) *regime.Answer {
	t.Helper()
	c, bad, err := input.Decode([]byte(doc), kind.Schema())
	if err != nil || len(bad) > 0 {
		t.Fatalf("%s\n%v %+v", doc, err, bad)
	}
	a, bad := regime.Classify(c)
	if len(bad) > 0 {
		t.Fatalf("%s\n%+v", doc, bad)
	}
	return a
}
