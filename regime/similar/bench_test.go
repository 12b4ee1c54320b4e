package similar_test

import (
	"testing"

	"regimed/regime"
	"regimed/regime/similar"
)

// BenchmarkScale is a scaling with its model judged, over the two answers alone.
func BenchmarkScale(b *testing.B) {
	r := request(b, pile, "length 1:40", "froude cauchy mass_ratio", "")
	b.Run("scaling", func(b *testing.B) {
		for b.Loop() {
			if _, violations := similar.Scale(r); len(violations) > 0 {
				b.Fatal(violations)
			}
		}
	})
	b.Run("two answers", func(b *testing.B) {
		for b.Loop() {
			for range 2 {
				if _, violations := regime.Classify(r.Case); len(violations) > 0 {
					b.Fatal(violations)
				}
			}
		}
	})
}
