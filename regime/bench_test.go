package regime_test

import (
	"testing"

	"regimed/regime"
	"regimed/regime/input"
	"regimed/regime/kind"
)

// The core, from a resolved case to the recommendation: the target is 20 µs.
// Memory goes back to the next case, as in a sweep.
func BenchmarkDecide(b *testing.B) {
	for name, text := range map[string]string{
		"plate":    `{"structure":{"kind":"plate","length":"1 m","width":"1 m","thickness":"10 mm","material":"steel","edges":"SSSS","wetted_sides":1},"fluid":"water"}`,
		"cylinder": `{"structure":{"kind":"cylinder","diameter":"0.3 m","length":"60 m","mass_per_length":"145 kg/m","damping_ratio":"0.5 %","support":"taut","tension":"200 kN"},"fluid":"seawater","flow":{"speed":"1 m/s"}}`,
		"generic":  `{"structure":{"kind":"generic","length":"0.1 m","mass":"2 kg","volume":"0.5 L","frequency_dry":"5 Hz"},"fluid":"water"}`,
	} {
		b.Run(name, func(b *testing.B) {
			c, violations, err := input.Decode([]byte(text), kind.Schema())
			if err != nil || len(violations) > 0 {
				b.Fatal(err, violations)
			}
			r, _, violations := kind.Resolve(c)
			if len(violations) > 0 {
				b.Fatal(violations)
			}
			study := kind.StudyOf(c)
			b.ReportAllocs()
			for b.Loop() {
				regime.Decide(r, study).Release()
			}
		})
	}
}
