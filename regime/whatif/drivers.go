package whatif

import (
	"cmp"
	"math"
	"slices"

	"regimed/regime"
	"regimed/regime/finding"
)

// Of each finding the three inputs are named that drive it most; one by which
// the utilisation changes a hundredth as fast as the input, or slower, is none.
const (
	mostDrivers = 3
	leastDriver = 0.01
)

// Steps of the differences in ln x, and by how much the two one-sided ones may
// differ: of a smooth function they differ by its curvature times the step.
const (
	driverStep      = 1e-3
	driverFineStep  = 1e-5
	driverAgreement = 0.01
)

// driversOf names the drivers of each finding. The tolerances are none: a
// utilisation is in inverse proportion to its own.
func (x *explorer) driversOf(found []explored) [][]regime.Driver {
	drivers := make([][]regime.Driver, len(x.parts))
	for i := range found {
		if x.routes[i].tolerance() {
			continue
		}
		for j, s := range found[i].sensitivity {
			if math.Abs(s) >= leastDriver {
				drivers[j] = append(drivers[j], regime.Driver{Place: x.routes[i].place, Sensitivity: s})
			}
		}
	}
	for j, list := range drivers {
		slices.SortStableFunc(list, func(a, b regime.Driver) int {
			return cmp.Compare(rounded(math.Abs(b.Sensitivity)), rounded(math.Abs(a.Sensitivity)))
		})
		drivers[j] = slices.Clip(list[:min(len(list), mostDrivers)])
	}
	return drivers
}

// governingOf is the part that governs a finding.
func governingOf(f *finding.Finding) governing {
	u, ok := f.Utilisation()
	if !ok || clipped(u) {
		return governing{part: -1}
	}
	return governing{part: f.Governing, mode: f.Mode, log: math.Log(u)}
}

// clipped reports whether a utilisation lies at one of its bounds, where it
// says no more than that the estimate is next to nothing, or beyond all bounds.
func clipped(u float64) bool { return u <= finding.LeastUtilisation || u >= finding.MostUtilisation }

// sensitivities are ∂ln u/∂ln x of every finding, u the utilisation of the part
// that governs it in the case, x the input. NaN where there is none: where no
// part governs, where the part that does is not made on both sides, or at a
// kink or a jump.
//
// The differences are central ones, with a step of 1e-3 in ln x, and of 1e-5
// where the two halves of that disagree by more than a hundredth. At the end of
// the range of an input the difference to its inside is taken, with the fine step.
func (w *walker) sensitivities() []float64 {
	coarse := w.slopes(driverStep)
	var fine []float64
	s := make([]float64, len(w.parts))
	for i := range s {
		if s[i] = coarse[i].agreed(); w.parts[i].part < 0 || !math.IsNaN(s[i]) && !coarse[i].closed {
			continue
		}
		if fine == nil {
			for _, p := range w.slopes(driverFineStep) {
				fine = append(fine, p.agreed())
			}
		}
		s[i] = fine[i]
	}
	return s
}

// slopePair are the differences to either side; NaN where there is none.
type slopePair struct {
	below, above float64
	closed       bool // one side lies outside the range of the input
}

// agreed is the central difference where both sides agree, and the only one
// where the other side is closed.
func (p slopePair) agreed() float64 {
	switch {
	case p.closed && math.IsNaN(p.below):
		return p.above
	case p.closed:
		return p.below
	}
	if middle := (p.below + p.above) / 2; math.Abs(p.above-p.below) <= driverAgreement*math.Max(1, math.Abs(middle)) {
		return middle
	}
	return math.NaN()
}

// slopes takes the differences over a step to either side.
func (w *walker) slopes(step float64) []slopePair {
	pairs := make([]slopePair, len(w.parts))
	below, belowOpen := w.utilisations(-step)
	above, aboveOpen := w.utilisations(step)
	for i := range pairs {
		pairs[i] = slopePair{math.NaN(), math.NaN(), belowOpen != aboveOpen}
		if belowOpen {
			pairs[i].below = (w.parts[i].log - below[i]) / step
		}
		if aboveOpen {
			pairs[i].above = (above[i] - w.parts[i].log) / step
		}
	}
	return pairs
}

// utilisations are the logarithms of those of the governing parts, with the
// input e^by of its value.
func (w *walker) utilisations(by float64) (logs []float64, open bool) {
	a := w.judge(w.route.near(by))
	if a == nil {
		return nil, false
	}
	defer a.Release()
	switch by { // the walk along the route begins there
	case -driverStep:
		w.beside[0] = w.watch.read(a)
	case driverStep:
		w.beside[1] = w.watch.read(a)
	}
	logs = make([]float64, len(w.parts))
	for i := range logs {
		logs[i] = w.parts[i].logOf(&a.Findings[i])
	}
	return logs, true
}

func (g governing) logOf(f *finding.Finding) float64 {
	if g.part < 0 || int(g.part) >= len(f.Parts()) || f.Mode != g.mode {
		return math.NaN()
	}
	if p := &f.Parts()[g.part]; !p.Waits && !clipped(p.Utilisation) {
		return math.Log(p.Utilisation)
	}
	return math.NaN()
}
