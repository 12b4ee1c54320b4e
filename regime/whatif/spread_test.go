package whatif

import (
	"context"
	"errors"
	"fmt"
	"math"
	"math/rand/v2"
	"runtime"
	"slices"
	"strings"
	"sync"
	"testing"

	"gonum.org/v1/gonum/stat/distuv"

	"regimed/regime"
	"regimed/regime/assumption"
	"regimed/regime/finding"
	"regimed/regime/group"
	"regimed/regime/input"
	"regimed/regime/kind"
	"regimed/regime/ladder"
	"regimed/units"
)

// pile is a rod across a stream, everything by values.
const pile = `{"structure": {"kind": "cylinder", "diameter": "0.3 m", "mass_per_length": "145 kg/m", "frequency_dry": "5 Hz", "damping_ratio": %s},
	"fluid": {"density": "1000 kg/m3", "viscosity": "1 mPa s", "sound_speed": "1480 m/s", "phase": "liquid"}, "flow": {"speed": %q}}`

func uncertainCase(t testing.TB, doc string) *input.Case {
	t.Helper()
	c, bad, err := input.Decode([]byte(doc), kind.Schema())
	if err != nil || len(bad) > 0 {
		t.Fatalf("%s\n%v %+v", doc, err, bad)
	}
	return c
}

func spreadOf(t testing.TB, c *input.Case, samples int) *regime.Spread {
	t.Helper()
	s, err := Spread(context.Background(), c, samples)
	if err != nil || s == nil {
		t.Fatalf("spread %v, error %v", s, err)
	}
	return s
}

// exhaustive is a spread that does not end sooner, with replicates of a length and
// a scrambling of its own where one is named.
func exhaustive(t testing.TB, c *input.Case, length int, scrambling string) *regime.Spread {
	t.Helper()
	s := newSampling(c, MaxSamples)
	s.seed += scrambling
	if err := s.grow(context.Background(), length); err != nil {
		t.Fatal(err)
	}
	r := s.shares()
	if err := s.quantiles(context.Background(), r); err != nil {
		t.Fatal(err)
	}
	return r
}

func classShare(s *regime.Spread, c *ladder.Class) regime.Probability {
	for _, p := range s.Classes {
		if p.Class == c {
			return p.Probability
		}
	}
	return regime.Probability{StandardError: 1.5 / float64(s.Samples)}
}

// One uncertain speed that straddles lock-in: the probabilities are those of plain
// Monte Carlo, within three standard errors of the two.
func TestSpreadAgreesWithMonteCarlo(t *testing.T) {
	c := uncertainCase(t, fmt.Sprintf(pile, "0.01", "1.4 m/s +- 20 %"))
	s := spreadOf(t, c, 4096)
	const draws = 1_000_000
	plain := monteCarlo(t, c, draws)
	rows, open := 0, 0
	compare := func(what string, p regime.Probability, hits int) {
		t.Helper()
		q := float64(hits) / draws
		allowed := 3 * math.Hypot(p.StandardError, math.Sqrt(q*(1-q)/draws))
		if off := math.Abs(p.Share - q); off > allowed {
			t.Errorf("%s: %.4f ± %.4f, plain Monte Carlo %.4f: off by %.4f, allowed %.4f", what, p.Share, p.StandardError, q, off, allowed)
		}
		if q > 0.1 && q < 0.9 {
			open++
		}
		rows++
	}
	for i := range ladder.Classes {
		compare(ladder.Classes[i].ID, classShare(s, &ladder.Classes[i]), plain.classes[i])
	}
	if open < 2 {
		t.Errorf("only %d classes are open", open)
	}
	open = 0
	lockIn := assumption.Find("no-lock-in").Index()
	for v := range finding.Invalid + 1 {
		compare("no-lock-in "+v.String(), s.Verdicts[lockIn][v], plain.verdicts[lockIn][v])
	}
	if open < 2 || rows != len(ladder.Classes)+5 {
		t.Errorf("%d verdicts are open, %d rows", open, rows)
	}
}

// monteCarlo judges independent draws of a normal speed, on two workers with a
// seed each.
func monteCarlo(t *testing.T, c *input.Case, draws int) *tally {
	t.Helper()
	place := Uncertain(c)[0]
	q := *c.At(place)
	const workers = 2
	var tallies [workers]tally
	var all sync.WaitGroup
	for w := range workers {
		all.Go(func() {
			random, d, own := rand.New(rand.NewPCG(20260412, uint64(w))), c.Clone(), newTally()
			for range draws / workers {
				if !d.Set(place, q.Value+q.Spread*random.NormFloat64()) {
					continue
				}
				a, _ := regime.Judge(d)
				own.count(a)
				a.Release()
			}
			tallies[w] = own
		})
	}
	all.Wait()
	for _, more := range tallies[1:] {
		tallies[0].add(&more)
	}
	if n := tallies[0].judged; n < draws*999/1000 {
		t.Errorf("only %d draws were judged", n)
	}
	return &tallies[0]
}

// quantity is an input by its value in SI, with a standard deviation as a part of it.
type quantity struct {
	block, name string
	kind        units.Kind
	x           float64
	spread      float64
	other       string // another unit
}

// pole is a cylinder with everything that has a dimension written out.
var pole = []quantity{
	{"structure", "diameter", units.Length, 0.3, 0.02, "ft"},
	{"structure", "mass_per_length", units.MassPerLength, 145, 0, "lbm/ft"},
	{"structure", "frequency_dry", units.Frequency, 5, 0.1, "rpm"},
	{"fluid", "density", units.Density, 1000, 0, "slug/ft3"},
	{"fluid", "viscosity", units.DynamicViscosity, 1e-3, 0, "cP"},
	{"fluid", "sound_speed", units.Speed, 1480, 0, "ft/s"},
	{"flow", "speed", units.Speed, 1.4, 0.2, "kn"},
	{"surroundings", "gravity", units.Acceleration, 9.81, 0, "ft/s2"},
	{"surroundings", "ambient_pressure", units.Pressure, 101325, 0, "psia"},
}

// written is the pole in SI, or in the other units, with masses, lengths and
// times multiplied.
func written(t testing.TB, other bool, mass, length, time float64) *input.Case {
	t.Helper()
	blocks := map[string][]string{"structure": {`"kind": "cylinder", "damping_ratio": {"low": 0.005, "high": 0.02}`}, "fluid": {`"phase": "liquid"`}}
	for _, q := range pole {
		m, l, s := q.kind.Exponents()
		x, unit := q.x*math.Pow(mass, float64(m))*math.Pow(length, float64(l))*math.Pow(time, float64(s)), q.kind.SI()
		if other {
			one, err := units.FromValueUnit(1, q.other, q.kind)
			if err != nil {
				t.Fatal(err)
			}
			x, unit = x/one.Value, q.other
		}
		text := fmt.Sprintf(`%q: {"value": %v, "std": %v, "unit": %q}`, q.name, x, x*q.spread, unit)
		blocks[q.block] = append(blocks[q.block], text)
	}
	var parts []string
	for name, members := range blocks {
		parts = append(parts, fmt.Sprintf("%q: {%s}", name, strings.Join(members, ", ")))
	}
	return uncertainCase(t, "{"+strings.Join(parts, ", ")+"}")
}

// The same case in other units, or with all masses, lengths and times multiplied,
// gives the same probabilities, and the same quantiles but for the last digits.
func TestSpreadKnowsNoUnits(t *testing.T) {
	base := spreadOf(t, written(t, false, 1, 1, 1), 1024)
	if len(base.Inputs) != 4 || len(base.Classes) < 2 {
		t.Fatalf("%d uncertain inputs, %d classes", len(base.Inputs), len(base.Classes))
	}
	rows := []struct {
		name               string
		other              bool
		mass, length, time float64
	}{{"other units", true, 1, 1, 1}, {"a model", false, 1e-3, 0.1, 0.3}, {"larger", false, 700, 13, 7}, {"a model in other units", true, 0.02, 0.03, 0.05}}
	for _, r := range rows {
		s := spreadOf(t, written(t, r.other, r.mass, r.length, r.time), 1024)
		if s.Samples != base.Samples || s.Outside != base.Outside || s.Settled != base.Settled || len(s.Groups) != len(base.Groups) {
			t.Errorf("%s: %d samples, %d outside, %d groups; %d, %d, %d", r.name, s.Samples, s.Outside, len(s.Groups), base.Samples, base.Outside, len(base.Groups))
		}
		if !slices.Equal(s.Classes, base.Classes) || !slices.Equal(s.Verdicts, base.Verdicts) {
			t.Errorf("%s: %+v, and not %+v", r.name, s.Classes, base.Classes)
		}
		for id, q := range base.Groups {
			nearQuantiles(t, r.name+", "+group.Of(id).ID, s.Groups[id], q)
		}
		for i, q := range base.Utilisations {
			nearQuantiles(t, r.name+", "+assumption.Catalogue[i].ID, s.Utilisations[i], q)
		}
	}
	if len(rows) != 4 {
		t.Errorf("%d rows", len(rows))
	}
}

func nearQuantiles(t *testing.T, what string, got, want regime.Quantiles) {
	t.Helper()
	for i, x := range want {
		if math.IsNaN(x) && math.IsNaN(got[i]) {
			continue
		}
		if !(math.Abs(got[i]-x) <= 1e-9*max(1, math.Abs(x))) {
			t.Errorf("%s: %v, and not %v", what, got, want)
		}
	}
}

// However many processors there are, the answer is the same to the last bit.
func TestSpreadIsTheSameOnAnyMachine(t *testing.T) {
	c := uncertainCase(t, fmt.Sprintf(pile, `"0.002 .. 0.02"`, "1.4 m/s +- 50 %"))
	before := runtime.GOMAXPROCS(0)
	defer runtime.GOMAXPROCS(before)
	var first string
	rows := 0
	for _, processors := range []int{1, 2, 5} {
		runtime.GOMAXPROCS(processors)
		s := spreadOf(t, c, 2000)
		got := fmt.Sprintf("%v %v %v %v %v %v %v", s.Samples, s.Outside, s.Refusals, s.Classes, s.Verdicts, s.Utilisations, s.Groups)
		if first == "" {
			first = got
		}
		if got != first {
			t.Errorf("with %d processors another answer", processors)
		}
		rows++
	}
	if rows != 3 || len(first) < 1000 {
		t.Errorf("%d rows: %.200s", rows, first)
	}
}

// The Reynolds number is linear in the speed, so that its quantiles are known. Of
// m = 2^k points of one input one lies in each m-th part of its distribution, and
// an interpolated quantile lies within one sample: the share below it is off by at
// most 1/m + 1/n.
func TestQuantilesOfALinearGroup(t *testing.T) {
	rows := 0
	for _, text := range []string{"1.4 m/s +- 0.28 m/s", "1.0 .. 1.8 m/s"} {
		c := uncertainCase(t, fmt.Sprintf(pile, "0.01", text))
		speed := *c.At(Uncertain(c)[0])
		for _, length := range []int{16, 128, 1024} {
			s := exhaustive(t, c, length, "")
			if s.Samples != 16*length {
				t.Fatalf("%d samples", s.Samples)
			}
			off := 1/float64(length) + 1/float64(s.Samples)
			for i, p := range []float64{0.05, 0.5, 0.95} {
				const perSpeed = 1000 * 0.3 / 1e-3
				low, high := perSpeed*exactQuantile(speed, p-off), perSpeed*exactQuantile(speed, p+off)
				if got := s.Groups[group.Reynolds][i]; !(got >= low*(1-1e-12) && got <= high*(1+1e-12)) {
					t.Errorf("%s, %d samples: the quantile %g is %g, not between %g and %g", text, s.Samples, p, got, low, high)
				}
				rows++
			}
		}
	}
	if rows != 18 {
		t.Errorf("%d rows", rows)
	}
}

func exactQuantile(q units.Quantity, p float64) float64 {
	p = min(max(p, 0), 1)
	if q.Form == units.Uniform {
		return distuv.Uniform{Min: q.Low(), Max: q.High()}.Quantile(p)
	}
	return distuv.Normal{Mu: q.Value, Sigma: q.Spread}.Quantile(p)
}

// Where every draw has the same outcome, little is drawn.
func TestCertainOutcomeEndsSoon(t *testing.T) {
	s := spreadOf(t, uncertainCase(t, fmt.Sprintf(pile, "0.01", "6 m/s +- 1 %")), MaxSamples)
	if !s.Settled || s.Samples > 500 || len(s.Classes) != 1 || s.Classes[0].Share != 1 {
		t.Errorf("%d samples, settled %v, %+v", s.Samples, s.Settled, s.Classes)
	}
	if e := s.Classes[0].StandardError; e <= 0 || 2*e > Known {
		t.Errorf("standard error %g", e)
	}
	few := spreadOf(t, uncertainCase(t, fmt.Sprintf(pile, "0.01", "6 m/s +- 1 %")), MinSamples)
	if few.Samples != MinSamples || few.Settled {
		t.Errorf("%d samples, settled %v", few.Samples, few.Settled)
	}
}

// The bounds of the number of samples hold, and 0 stands for the default.
func TestNumberOfSamples(t *testing.T) {
	c := uncertainCase(t, `{"structure": {"kind": "generic", "length": "1 m", "frequency_dry": "10 Hz +- 300 %", "mass": "8 kg"}, "fluid": "air"}`)
	rows := 0
	for _, r := range []struct{ asked, most int }{{0, 1024}, {-5, 1024}, {1, 64}, {64, 64}, {100, 96}, {256, 256}, {1000, 992}, {1 << 30, 65536}} {
		if n := newSampling(c, r.asked); n.most*len(n.tallies) != r.most {
			t.Errorf("%d asked for: %d in %d replicates", r.asked, n.most, len(n.tallies))
		}
		rows++
	}
	if rows != 8 {
		t.Errorf("%d rows", rows)
	}
}

// What is said to be known is known: against many more samples of another
// scrambling, few of the settled probabilities are off by more than 0.01, as two
// standard errors promise, and standard errors are what errors are like.
func TestStandardErrorsAreHonest(t *testing.T) {
	settled, missed, open := 0, 0, 0
	squares := 0.0
	for i := range 24 {
		speed := fmt.Sprintf("%.3g m/s +- 15 %%", 0.5+0.12*float64(i))
		damping := []string{"0.01", `"0.002 .. 0.02"`}[i%2]
		c := uncertainCase(t, fmt.Sprintf(pile, damping, speed))
		s, truth := spreadOf(t, c, 2048), exhaustive(t, c, 256, "another")
		if s.Settled {
			settled++
		}
		worst := 0.0
		for _, p := range s.Classes {
			off := p.Share - classShare(truth, p.Class).Share
			worst = max(worst, math.Abs(off))
			if p.Share > 0.02 && p.Share < 0.98 {
				squares += off * off / (p.StandardError * p.StandardError)
				open++
			}
		}
		if s.Settled && worst > Known {
			missed++
		}
	}
	if settled < 20 || missed > settled/10 {
		t.Errorf("%d of %d settled probabilities are off by more than %g", missed, settled, Known)
	}
	if z := math.Sqrt(squares / float64(open)); open < 20 || z < 0.3 || z > 1.3 {
		t.Errorf("%d errors are %.2f standard errors in the mean square", open, z)
	}
}

// Draws that an input, an interval or a property refuses are left out and counted,
// each with the input that refused it.
func TestDrawsOutside(t *testing.T) {
	rows := []struct {
		name, doc, pointer string
		share              float64 // of the draws, outside
	}{
		{"a negative speed", fmt.Sprintf(pile, "0.01", "1 m/s +- 50 %"), "/flow/speed", distuv.UnitNormal.CDF(-2)},
		{"a damping below nothing", fmt.Sprintf(pile, `"0.01 +- 0.01"`, "1 m/s"), "/structure/damping_ratio", distuv.UnitNormal.CDF(-1)},
		{"an interval upside down", `{"structure": {"kind": "cylinder", "diameter": "0.3 m", "frequency_dry": "5 Hz", "mass_per_length": "145 kg/m"}, "fluid": "water",
			"flow": {"operating": ["4 m/s +- 0.5 m/s", "4.5 m/s +- 0.5 m/s"], "speed": "4.5 m/s"}}`, "/flow/operating", distuv.UnitNormal.CDF(-0.5 / math.Sqrt(0.5))},
	}
	for _, r := range rows {
		c := uncertainCase(t, r.doc)
		s := exhaustive(t, c, 256, "")
		drawn := s.Samples + s.Outside
		if got := float64(s.Outside) / float64(drawn); drawn != 16*256 || math.Abs(got-r.share) > 0.01 {
			t.Errorf("%s: %d of %d outside, want %g of them", r.name, s.Outside, drawn, r.share)
		}
		refused := 0
		for i, n := range s.Refusals {
			if strings.HasPrefix(s.Inputs[i].Pointer(), r.pointer) {
				refused += n
			}
		}
		if refused != s.Outside {
			t.Errorf("%s: %d of %d refused by %s: %v", r.name, refused, s.Outside, r.pointer, s.Refusals)
		}
		requireOutsideWarning(t, c, r.pointer)
	}
	if len(rows) != 3 {
		t.Errorf("%d rows", len(rows))
	}
}

// A property that does not reach as far as a draw refuses it too.
func TestDrawsBeyondAProperty(t *testing.T) {
	c := uncertainCase(t, `{"structure": {"kind": "cylinder", "diameter": "0.3 m", "frequency_dry": "5 Hz", "mass_per_length": "145 kg/m"},
		"fluid": {"name": "water", "temperature": "4 degC +- 4 K"}}`)
	s := exhaustive(t, c, 64, "")
	if s.Outside == 0 || s.Refusals[0] != s.Outside || s.Samples == 0 {
		t.Errorf("%d judged, %d outside, %v", s.Samples, s.Outside, s.Refusals)
	}
	requireOutsideWarning(t, c, "/fluid/temperature")
}

func requireOutsideWarning(t *testing.T, c *input.Case, pointer string) {
	t.Helper()
	a, _, err := Classify(context.Background(), c, Options{})
	if err != nil {
		t.Fatal(err)
	}
	found := slices.ContainsFunc(a.Warnings, func(w kind.Warning) bool {
		return w.Code == OutsideCode && strings.HasPrefix(w.Pointer, pointer)
	})
	if !found {
		t.Errorf("no warning about %s: %+v", pointer, a.Warnings)
	}
}

// Ends of intervals and fields of objects in lists are sampled like others.
func TestEndsAndRowsAreSampled(t *testing.T) {
	c := uncertainCase(t, `{"structure": {"kind": "cylinder", "diameter": "0.3 m", "mass_per_length": "145 kg/m",
			"modes": [{"frequency_dry": "5 Hz +- 10 %", "damping_ratio": 0.01}, {"frequency_dry": "(9 +- 1) Hz", "damping_ratio": "0.005 .. 0.02"}]},
		"fluid": "water", "flow": {"speed": "1.4 m/s", "operating": ["0.1 m/s", "1.4 m/s +- 20 %"]}}`)
	var pointers []string
	for _, p := range Uncertain(c) {
		pointers = append(pointers, p.Pointer())
	}
	want := []string{"/flow/operating/1", "/structure/modes/0/frequency_dry", "/structure/modes/1/damping_ratio", "/structure/modes/1/frequency_dry"}
	if !slices.Equal(pointers, want) {
		t.Fatalf("%v", pointers)
	}
	s := spreadOf(t, c, 1024)
	if u := s.Utilisations[assumption.Find("no-lock-in").Index()]; !(u[0] < u[1] && u[1] < u[2]) {
		t.Errorf("lock-in does not spread: %v", u)
	}
	if len(s.Classes) < 2 || c.At(Uncertain(c)[0]).Form != units.Normal {
		t.Errorf("%+v", s.Classes)
	}
}

// Probabilities of the classes, and of the verdicts of each finding, sum to 1.
func TestProbabilitiesSumToOne(t *testing.T) {
	for _, speed := range []string{"1.4 m/s +- 20 %", "1 m/s +- 60 %"} {
		s := spreadOf(t, uncertainCase(t, fmt.Sprintf(pile, `"0.002 .. 0.02"`, speed)), 1024)
		if where := improbable(s); where != "" {
			t.Errorf("%s: %s", speed, where)
		}
	}
}

// improbable says what in a spread no probability or quantile can be, or "".
func improbable(s *regime.Spread) string {
	if s.Samples == 0 {
		return ""
	}
	sum := 0.0
	for _, p := range s.Classes {
		if where := notAProbability(p.Probability); where != "" || p.Share == 0 {
			return p.Class.ID + ": " + where
		}
		sum += p.Share
	}
	if math.Abs(sum-1) > 1e-12 {
		return fmt.Sprintf("the classes sum to %v", sum)
	}
	for i := range s.Verdicts {
		sum := 0.0
		for _, p := range s.Verdicts[i] {
			if where := notAProbability(p); where != "" {
				return assumption.Catalogue[i].ID + ": " + where
			}
			sum += p.Share
		}
		if math.Abs(sum-1) > 1e-12 {
			return fmt.Sprintf("the verdicts of %s sum to %v", assumption.Catalogue[i].ID, sum)
		}
	}
	for id, q := range s.Groups {
		if !(q[0] <= q[1] && q[1] <= q[2]) || math.IsInf(q[0], 0) || math.IsInf(q[2], 0) {
			return fmt.Sprintf("%s: quantiles %v", group.Of(id).ID, q)
		}
	}
	for i, q := range s.Utilisations {
		if none := math.IsNaN(q[0]) && math.IsNaN(q[1]) && math.IsNaN(q[2]); !none && !(q[0] >= 1e-6 && q[0] <= q[1] && q[1] <= q[2] && q[2] <= 1e6) {
			return fmt.Sprintf("%s: quantiles %v", assumption.Catalogue[i].ID, q)
		}
	}
	return ""
}

func notAProbability(p regime.Probability) string {
	if p.Share >= 0 && p.Share <= 1 && p.StandardError > 0 && p.StandardError <= 0.5 {
		return ""
	}
	return fmt.Sprintf("%v ± %v", p.Share, p.StandardError)
}

// expiring is a context that ends itself after it was asked a number of times.
type expiring struct {
	context.Context
	mutex  sync.Mutex
	left   int
	cancel context.CancelFunc
}

func (e *expiring) Err() error {
	e.mutex.Lock()
	defer e.mutex.Unlock()
	if e.left--; e.left == 0 {
		e.cancel()
	}
	return e.Context.Err()
}

// A context that ends stops the sampling, before it begins or in its middle.
func TestSpreadHonoursItsContext(t *testing.T) {
	c := uncertainCase(t, fmt.Sprintf(pile, `"0.002 .. 0.02"`, "1.4 m/s +- 20 %"))
	rows := 0
	for _, after := range []int{1, 2, 50, 300} {
		ctx, cancel := context.WithCancel(context.Background())
		s, err := Spread(&expiring{Context: ctx, left: after, cancel: cancel}, c, 4096)
		if s != nil || !errors.Is(err, context.Canceled) {
			t.Errorf("after %d: %v, %v", after, s, err)
		}
		a, bad, err := Classify(ctx, c, Options{})
		if a != nil || bad != nil || !errors.Is(err, context.Canceled) {
			t.Errorf("%v %v %v", a, bad, err)
		}
		rows++
	}
	if rows != 4 {
		t.Errorf("%d rows", rows)
	}
}

// There can be no more uncertain inputs than there are dimensions of the sequence.
func TestInputsFitTheSequence(t *testing.T) {
	const dimensions, rowsOfAList = 1000, 50
	schema := kind.Schema()
	count := func(fields []*input.Field) (n int) {
		for _, f := range fields {
			switch f.Type {
			case input.Quantity, input.Number:
				n++
			case input.Interval:
				n += 2
			case input.Rows:
				n += rowsOfAList * len(f.Row.Fields)
			}
		}
		return n
	}
	others := 0
	for _, b := range schema.Blocks {
		others += count(b.Fields)
	}
	for _, k := range schema.Kinds {
		if n := count(k.Fields) + others; n >= dimensions {
			t.Errorf("a %s can have %d uncertain inputs", k.Name, n)
		}
	}
}
