package render

import "testing"

func BenchmarkAppendJSON(b *testing.B) {
	for name, a := range answers(b) {
		b.Run(name, func(b *testing.B) {
			buf := AppendJSON(nil, a, All)
			b.SetBytes(int64(len(buf)))
			b.ReportAllocs()
			for b.Loop() {
				buf = AppendJSON(buf[:0], a, All)
			}
			b.ReportMetric(float64(len(buf)), "bytes")
		})
	}
}

func BenchmarkAppendText(b *testing.B) {
	a := riser(b)
	buf := AppendText(nil, a, TextOptions{})
	b.ReportAllocs()
	for b.Loop() {
		buf = AppendText(buf[:0], a, TextOptions{})
	}
	b.ReportMetric(float64(len(buf)), "bytes")
}
