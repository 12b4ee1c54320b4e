package finding

import (
	"math"
	"testing"

	"pgregory.net/rapid"
)

func TestJudge(t *testing.T) {
	rows := []struct {
		name          string
		u, phi, inner float64
		want          Verdict
	}{
		{"far below", 1e-6, 1.5, 1.5, Valid},
		{"u·φ just below 1", 0.6666, 1.5, 1.5, Valid},
		{"u·φ = 1", 1 / 1.5, 1.5, 1.5, Valid},
		{"u·φ = 1 but for the last digits", 1 / 1.5 * (1 + 1e-12), 1.5, 1.5, Valid},
		{"u·φ just above 1", 0.6668, 1.5, 1.5, Marginal},
		{"u = 1", 1, 1.5, 1.5, Marginal},
		{"u/φ = 1", 1.5, 1.5, 1.5, Marginal},
		{"u/φ = 1 but for the last digits", 1.5 * (1 + 1e-12), 1.5, 1.5, Marginal},
		{"u/φ just above 1", 1.5001, 1.5, 1.5, Invalid},
		{"far above", 1e6, 1.5, 1.5, Invalid},
		{"exact, below", 0.9999, 1, 1, Valid},
		{"exact, at the limit", 1, 1, 1, Valid},
		{"exact, above", 1.0001, 1, 1, Invalid},
		{"no marginal at φ 1", 1 + 1e-8, 1, 1, Invalid},
		{"narrow inner factor", 1.2, 1.5, 1.1, Invalid},
		{"narrow inner factor, marginal", 1.05, 1.5, 1.1, Marginal},
		{"a rule of thumb", 0.5, 3, 3, Marginal},
		{"a rule of thumb, invalid", 3.1, 3, 3, Invalid},
	}
	for _, r := range rows {
		if got := Judge(r.u, r.phi, r.inner); got != r.want {
			t.Errorf("%s: Judge(%g, %g, %g) = %s, want %s", r.name, r.u, r.phi, r.inner, got, r.want)
		}
	}
	if len(rows) != 18 {
		t.Errorf("%d rows", len(rows))
	}
}

// A larger utilisation never has the better verdict; a larger factor only
// widens the marginal range.
func TestJudgeIsMonotone(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		phi := rapid.Float64Range(1, 5).Draw(t, "phi")
		u := math.Pow(10, rapid.Float64Range(-6, 6).Draw(t, "u"))
		more := u * rapid.Float64Range(1, 10).Draw(t, "more")
		if Judge(more, phi, phi) < Judge(u, phi, phi) {
			t.Fatalf("Judge(%g) is better than Judge(%g) at φ %g", more, u, phi)
		}
		wider := phi * rapid.Float64Range(1, 3).Draw(t, "wider")
		if now := Judge(u, wider, wider); now != Marginal && now != Judge(u, phi, phi) {
			t.Fatalf("at u %g φ %g gives %s, φ %g gives %s", u, phi, Judge(u, phi, phi), wider, now)
		}
	})
}

func TestBand(t *testing.T) {
	inf := math.Inf(1)
	rows := []struct {
		name           string
		x, lo, hi, phi float64
		u, inner       float64
		want           Verdict
	}{
		{"far below", 0.1, 0.8, 1.25, 1.15, 0.125, math.Pow(1.25/0.8, 0.25), Valid},
		{"lower edge", 0.8, 0.8, 1.25, 1.15, 1, math.Pow(1.25/0.8, 0.25), Marginal},
		{"upper edge", 1.25, 0.8, 1.25, 1.15, 1, math.Pow(1.25/0.8, 0.25), Marginal},
		{"middle", 1, 0.8, 1.25, 1.15, 1.25, math.Pow(1.25/0.8, 0.25), Invalid},
		{"beginning of the inner half", 0.8 * math.Pow(1.25/0.8, 0.2499), 0.8, 1.25, 1.15, math.Pow(1.25/0.8, 0.2499), math.Pow(1.25/0.8, 0.25), Marginal},
		{"inside the inner half", 0.8 * math.Pow(1.25/0.8, 0.2501), 0.8, 1.25, 1.15, math.Pow(1.25/0.8, 0.2501), math.Pow(1.25/0.8, 0.25), Invalid},
		{"end of the inner half", 0.8 * math.Pow(1.25/0.8, 0.7501), 0.8, 1.25, 1.15, math.Pow(1.25/0.8, 0.2499), math.Pow(1.25/0.8, 0.25), Marginal},
		{"far above", 10, 0.8, 1.25, 1.15, 0.125, math.Pow(1.25/0.8, 0.25), Valid},
		{"within φ below", 0.8 / 1.1, 0.8, 1.25, 1.15, 1 / 1.1, math.Pow(1.25/0.8, 0.25), Marginal},
		{"within φ above", 1.25 * 1.1, 0.8, 1.25, 1.15, 1 / 1.1, math.Pow(1.25/0.8, 0.25), Marginal},
		{"wide: φ decides", 3.5, 1, 100, 1.5, 3.5, 1.5, Invalid},
		{"wide, near the edge", 1.4, 1, 100, 1.5, 1.4, 1.5, Marginal},
		{"open, below", 0.5, 0.67, inf, 1.15, 0.5 / 0.67, 1.15, Valid},
		{"open, above", 2, 0.67, inf, 1.15, 2 / 0.67, 1.15, Invalid},
		{"a point", 1, 1, 1, 1.3, 1, 1, Marginal},
		{"nothing", 0, 0.8, 1.25, 1.15, 0, math.Pow(1.25/0.8, 0.25), Valid},
	}
	for _, r := range rows {
		u, inner := Band(r.x, r.lo, r.hi, r.phi)
		if math.Abs(u-r.u) > 1e-12*r.u || math.Abs(inner-r.inner) > 1e-12 {
			t.Errorf("%s: Band(%g, %g, %g) = %g, %g; want %g, %g", r.name, r.x, r.lo, r.hi, u, inner, r.u, r.inner)
		}
		if got := Judge(u, r.phi, inner); got != r.want {
			t.Errorf("%s: %s, want %s", r.name, got, r.want)
		}
	}
	if len(rows) != 16 {
		t.Errorf("%d rows", len(rows))
	}
}

// The inner half of any band, in log x, is invalid, however narrow; outside the
// band nothing is; and the two sides are alike.
func TestBandProperties(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		lo := math.Pow(10, rapid.Float64Range(-3, 3).Draw(t, "lo"))
		width := 1 + math.Pow(10, rapid.Float64Range(-3, 3).Draw(t, "width"))
		phi := rapid.Float64Range(1, 3).Draw(t, "phi")
		at := func(share float64) Verdict { // 0 at the lower edge, 1 at the upper
			u, inner := Band(lo*math.Pow(width, share), lo, lo*width, phi)
			return Judge(u, phi, inner)
		}
		inside := rapid.Float64Range(0.26, 0.74).Draw(t, "inside")
		if width > 1.001 && width < math.Pow(phi, 4) && at(inside) != Invalid {
			t.Fatalf("at %g of a band of width %g: %s", inside, width, at(inside))
		}
		outside := -rapid.Float64Range(1e-9, 3).Draw(t, "outside")
		if v := at(outside); v == Invalid || at(1-outside) == Invalid {
			t.Fatalf("outside the band by %g: %s", outside, v)
		}
		u1, _ := Band(lo*math.Pow(width, inside), lo, lo*width, phi)
		u2, _ := Band(lo*math.Pow(width, 1-inside), lo, lo*width, phi)
		if math.Abs(u1/u2-1) > 1e-9 || u1 > math.Sqrt(width)*(1+1e-9) || u1 < 1 {
			t.Fatalf("u %g and %g on the two sides of a band of width %g", u1, u2, width)
		}
	})
}

func TestUtilisation(t *testing.T) {
	rows := []struct{ estimate, limit, want float64 }{
		{0.05, 0.1, 0.5}, {0, 0.1, 1e-6}, {1e-9, 1, 1e-6}, {1e-6, 1, 1e-6}, {1e9, 1, 1e6}, {math.Inf(1), 1, 1e6},
		{1, 0, 1e6}, {0, 0, 1e-6}, {math.MaxFloat64, 1e-300, 1e6}, {-1, 1, 1e-6}, {2e6, 2, 1e6},
	}
	for _, r := range rows {
		if got := Utilisation(r.estimate, r.limit); got != r.want {
			t.Errorf("Utilisation(%g, %g) = %g, want %g", r.estimate, r.limit, got, r.want)
		}
		if m := Margin(Utilisation(r.estimate, r.limit)); math.Abs(m) > 6 || math.Abs(m+math.Log10(r.want)) > 1e-12 {
			t.Errorf("margin %g at u %g", m, r.want)
		}
	}
	if len(rows) != 11 {
		t.Errorf("%d rows", len(rows))
	}
}

func TestLimits(t *testing.T) {
	rows := 0
	for _, r := range []struct {
		preset                    string
		frequency, load, response float64
	}{{"screening", 0.10, 0.20, 0.50}, {"design", 0.05, 0.10, 0.20}, {"detailed", 0.01, 0.03, 0.10}} {
		tol, ok := FindPreset(r.preset)
		want := map[Measure]float64{Frequency: r.frequency, Load: r.load, Response: r.response, Sound: r.load, Stability: 1, Scale: 1}
		for m, limit := range want {
			rows++
			if got := tol.Limit(m); !ok || got != limit {
				t.Errorf("%s: limit of %s is %g, want %g", r.preset, m, got, limit)
			}
		}
	}
	if rows != 18 || Presets[0].Name != "design" || len(Presets) != 3 {
		t.Errorf("%d limits of %d presets, the first %s", rows, len(Presets), Presets[0].Name)
	}
	if _, ok := FindPreset("sloppy"); ok {
		t.Error("an unknown preset is found")
	}
}

func TestInterest(t *testing.T) {
	counts := map[Measure]bool{Frequency: true, Load: true, Stability: true, Scale: true}
	for i, name := range MeasureNames() {
		m, ok := FindMeasure(name)
		if !ok || m != Measure(i) || m.String() != name {
			t.Errorf("measure %d is called %s", i, name)
		}
		if DefaultInterest.Has(m) != counts[m] {
			t.Errorf("%s counts by default: %v", name, DefaultInterest.Has(m))
		}
		if Interest(0).Has(m) != (m == Scale) || !Interest(0).With(m).Has(m) {
			t.Errorf("%s can't be switched", name)
		}
	}
	if len(MeasureNames()) != 6 || len(VerdictNames()) != 5 {
		t.Errorf("%d measures, %d verdicts", len(MeasureNames()), len(VerdictNames()))
	}
	for i, name := range VerdictNames() {
		if Verdict(i).String() != name {
			t.Errorf("verdict %d is %s and %s", i, Verdict(i), name)
		}
	}
}
