package whatif

import (
	"errors"
	"math"
	"slices"
	"strings"
	"testing"

	"pgregory.net/rapid"

	"regimed/regime/input"
	"regimed/regime/kind"
)

// rod is a case with a bit of everything that an axis may name.
const rod = `{"structure": {"kind": "cylinder", "diameter": "40 mm", "length": "2.4 m", "mass_per_length": "9 kg/m",
	"support": "clamped-clamped", "modes": [{"frequency_dry": "12 Hz"}, {"frequency_dry": "31 Hz"}]},
	"fluid": {"name": "seawater"}, "flow": {"speed": "1 m/s +- 0.1 m/s", "operating": ["0.5 m/s", "2 m/s"]}}`

func decoded(t testing.TB, text string) *input.Case {
	t.Helper()
	c, violations, err := input.Decode([]byte(text), kind.Schema())
	if err != nil || len(violations) > 0 {
		t.Fatalf("%s: %v %v", text, violations, err)
	}
	return c
}

func TestParseAxis(t *testing.T) {
	c := decoded(t, rod)
	rows := []struct {
		text   string
		name   string
		unit   string
		values []float64
	}{
		{"flow.speed=0..2 m/s:5", "flow.speed", "m/s", []float64{0, 0.5, 1, 1.5, 2}},
		{"flow.speed = 0 m/s .. 7.2 km/h : 5 : linear", "flow.speed", "m/s", []float64{0, 0.5, 1, 1.5, 2}},
		{"flow.speed=3.6..36 km/h:2", "flow.speed", "m/s", []float64{1, 10}},
		{"/flow/speed=0.01..100 m/s:5:log", "flow.speed", "m/s", []float64{0.01, 0.1, 1, 10, 100}},
		{"flow.speed=100..0.01 m/s:log:5", "flow.speed", "m/s", []float64{100, 10, 1, 0.1, 0.01}},
		{"structure.diameter=10..25 mm:step 10 mm", "structure.diameter", "m", []float64{0.01, 0.02}},
		{"structure.diameter=10...30 mm:step 0.01 m", "structure.diameter", "m", []float64{0.01, 0.02, 0.03}},
		{"structure.diameter=30..10 mm:step 10 mm", "structure.diameter", "m", []float64{0.03, 0.02, 0.01}},
		{"fluid.temperature=10..30 degC:step 10 degC", "fluid.temperature", "K", []float64{283.15, 293.15, 303.15}},
		{"fluid.temperature=10..30 degC:step 18 degF", "fluid.temperature", "K", []float64{283.15, 293.15, 303.15}},
		{"fluid.temperature=280 K,10 degC", "fluid.temperature", "K", []float64{280, 283.15}},
		{"structure.damping_ratio=0.5..2 %:4", "structure.damping_ratio", "1", []float64{0.005, 0.01, 0.015, 0.02}},
		{"structure.damping_ratio=0.01,0.02", "structure.damping_ratio", "1", []float64{0.01, 0.02}},
		{"flow.operating.1=1..3 m/s:3", "flow.operating.1", "m/s", []float64{1, 2, 3}},
		{"structure.modes.1.frequency_dry=20..40 Hz:3", "structure.modes.1.frequency_dry", "Hz", []float64{20, 30, 40}},
		{"motion.amplitude=1e-3..1 m:4:log", "motion.amplitude", "m", []float64{1e-3, 1e-2, 0.1, 1}},
		{"structure.mode=1..4:4", "structure.mode", "1", []float64{1, 2, 3, 4}},
		{"structure.mode=1..5:step 2", "structure.mode", "1", []float64{1, 3, 5}},
		{"structure.mode=1,4", "structure.mode", "1", []float64{1, 4}},
	}
	for _, row := range rows {
		a, err := ParseAxis(c, row.text)
		if err != nil {
			t.Errorf("%s: %v", row.text, err)
			continue
		}
		if a.Name() != row.name || a.Unit() != row.unit || a.Len() != int64(len(row.values)) {
			t.Errorf("%s: %s in %s, %d values", row.text, a.Name(), a.Unit(), a.Len())
			continue
		}
		for i, want := range row.values {
			if got := a.X(int64(i)); math.Abs(got-want) > 1e-14*math.Abs(want) {
				t.Errorf("%s: value %d is %v, want %v", row.text, i, got, want)
			}
		}
	}
	if len(rows) != 19 {
		t.Errorf("%d rows", len(rows))
	}
}

func TestParseAxisOfNames(t *testing.T) {
	a, err := ParseAxis(decoded(t, rod), "fluid.name=water, air")
	if err != nil {
		t.Fatal(err)
	}
	if a.Len() != 2 || a.Text(0) != "water" || a.Text(1) != "air" || !math.IsNaN(a.X(0)) || a.Unit() != "" || !a.Named() {
		t.Errorf("%+v", a)
	}
}

// What is wrong with an axis is said at once, in words that help.
func TestParseAxisRefuses(t *testing.T) {
	c := decoded(t, rod)
	rows := []struct {
		text string
		want []string // parts of the message
	}{
		{"flow.speed", []string{"FROM..TO"}},
		{"=1..2", []string{"FROM..TO"}},
		{"flow.speed=", []string{"FROM..TO"}},
		{"flow.sped=1..2 m/s:3", []string{"flow.speed?"}},
		{"flow.speed=1..2 m/s", []string{"needs points, or a step"}},
		{"flow.speed=1..2 m/s:3:cubic", []string{`"cubic"`}},
		{"flow.speed=1..2 m/s:3:4", []string{`"4"`}},
		{"flow.speed=1..2 m/s:1", []string{"between 2 and"}},
		{"flow.speed=1..2 m/s:1000000000001", []string{"between 2 and"}},
		{"flow.speed=1..2:3", []string{"without a unit"}},
		{"flow.speed=0..2 m/s:3:log", []string{"above zero"}},
		{"flow.speed=0..2 m/s:step 0 m/s", []string{"greater than 0"}},
		{"flow.speed=0..2 m/s:step 3 m/s", []string{"With this step"}},
		{"flow.speed=0..2 m/s:step 1e-300 m/s", []string{"With this step"}},
		{"flow.speed=0..2 m/s:3:step 1 m/s", []string{"either points or a step"}},
		{"flow.speed=1..2 m/s:log:step 1 m/s", []string{"points, not a step"}},
		{"structure.diameter=-1 kg..0 m:3", []string{"unit of a mass", "must be greater than 0"}},
		{"structure.diameter=1 +- 0.1 m, 2 m", []string{"uncertain"}},
		{"fluid.name=watter,air", []string{"Did you mean water?"}},
		{"fluid.name=air..water:3", []string{`air`, `water`}},
		{"structure.mode=1..4:3", []string{"whole numbers"}},
		{"structure.mode=1..4:4:log", []string{"whole numbers"}},
		{"structure.mode=1.5", []string{"whole number"}},
		{"flow.operating=1..2 m/s:2", []string{"no single number"}},
		{"structure.modes.2.frequency_dry=1..2 Hz:2", []string{"not given in this case"}},
		{"title=a,b", []string{"title"}},
	}
	for _, row := range rows {
		_, err := ParseAxis(c, row.text)
		var bad *BadAxisError
		if !errors.As(err, &bad) {
			t.Errorf("%s: %v", row.text, err)
			continue
		}
		for _, part := range row.want {
			if !strings.Contains(err.Error(), part) {
				t.Errorf("%s: %v, without %q", row.text, err, part)
			}
		}
	}
	if len(rows) != 26 {
		t.Errorf("%d rows", len(rows))
	}
}

// The values of a range are in order, between its ends, and equally spaced in
// the way that was asked for; its ends are exact.
func TestValuesOfARange(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		a := Axis{
			from:   rapid.Float64Range(1e-300, 1e300).Draw(t, "from"),
			to:     rapid.Float64Range(1e-300, 1e300).Draw(t, "to"),
			points: rapid.Int64Range(2, 1e9).Draw(t, "points"),
			log:    rapid.Bool().Draw(t, "log"),
		}
		a.Place.Field = &input.Field{}
		if a.X(0) != a.from || a.X(a.points-1) != a.to {
			t.Fatalf("from %v to %v", a.X(0), a.X(a.points-1))
		}
		i := rapid.Int64Range(0, a.points-2).Draw(t, "i")
		x, next := a.X(i), a.X(i+1)
		if a.from <= a.to && next < x || a.from >= a.to && next > x {
			t.Fatalf("%v before %v", x, next)
		}
		if x < min(a.from, a.to) || x > max(a.from, a.to) {
			t.Fatalf("%v outside", x)
		}
		at := float64(i) / float64(a.points-1)
		if a.log {
			got, want := math.Log(x), math.Log(a.from)*(1-at)+math.Log(a.to)*at
			if math.Abs(got-want) > 1e-10 {
				t.Fatalf("ln x = %v, want %v", got, want)
			}
			return
		}
		if want := a.from*(1-at) + a.to*at; math.Abs(x-want) > 1e-12*max(a.from, a.to) {
			t.Fatalf("x = %v, want %v", x, want)
		}
	})
}

// A step meets the far end in spite of rounding, and never passes it.
func TestStepsMeetTheirEnd(t *testing.T) {
	c := decoded(t, rod)
	for _, text := range []string{"flow.speed=0..0.3 m/s:step 0.1 m/s", "flow.speed=0..30 m/s:step 0.1 m/s", "flow.speed=3..0 m/s:step 0.7 m/s", "flow.speed=1..1.7 m/s:step 0.1 m/s"} {
		a, err := ParseAxis(c, text)
		if err != nil {
			t.Fatal(err)
		}
		last := a.X(a.Len() - 1)
		if a.Step() > 0 != (last > a.X(0)) || math.Abs(a.to-last) >= math.Abs(a.Step()) || a.Step()*(a.to-last) < 0 {
			t.Errorf("%s: ends at %v", text, last)
		}
	}
}

// An axis writes its value where it should, gauge pressures as such.
func TestPut(t *testing.T) {
	c := decoded(t, `{"structure": {"kind": "cylinder", "diameter": "40 mm"}, "fluid": {"name": "water", "pressure": "3 bar"}}`)
	rows := []struct {
		text  string
		i     int64
		value float64
		gauge bool
	}{
		{"fluid.pressure=1..3 barg:3", 1, 2e5, true},
		{"fluid.pressure=2 bar,1 barg", 0, 2e5, false},
		{"fluid.pressure=2 bar,1 barg", 1, 1e5, true},
		{"fluid.pressure=1..3 bar:3", 2, 3e5, false},
	}
	for _, row := range rows {
		a, err := ParseAxis(c, row.text)
		if err != nil {
			t.Fatal(err)
		}
		if !a.Put(c, row.i) {
			t.Errorf("%s: refused", row.text)
		}
		if q := c.At(a.Place); math.Abs(q.Value-row.value) > 1e-9 || q.Gauge != row.gauge {
			t.Errorf("%s: %+v", row.text, q)
		}
	}
	if len(rows) != 4 {
		t.Errorf("%d rows", len(rows))
	}
	if _, err := ParseAxis(c, "fluid.pressure=1 bar..2 barg:2"); err == nil {
		t.Error("one end gauge, the other absolute")
	}
}

// The parser never panics, and what it takes has values.
func FuzzParseAxis(f *testing.F) {
	for _, s := range []string{"flow.speed=0..2 m/s:5", "fluid.name=water,air", "structure.mode=1..5:step 2", "fluid.temperature=1..2 degC:step 1 K", "=..:", "a=1,,2", "flow.speed=..:log"} {
		f.Add(s)
	}
	c := decoded(f, rod)
	f.Fuzz(func(t *testing.T, s string) {
		a, err := ParseAxis(c, s)
		if err != nil {
			if err.Error() == "" {
				t.Error("no words")
			}
			return
		}
		n := a.Len()
		if n < 1 || n > MaxPoints {
			t.Fatalf("%d values", n)
		}
		for _, i := range slices.Compact([]int64{0, n / 2, n - 1}) {
			if x := a.X(i); a.Named() == !math.IsNaN(x) || math.IsInf(x, 0) {
				t.Fatalf("value %d is %v", i, x)
			}
		}
	})
}
