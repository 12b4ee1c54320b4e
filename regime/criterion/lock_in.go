package criterion

import (
	"math"

	"regimed/regime/cite"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// The criteria for lock-in. V_R = U/(f_w D) is wet throughout; Sc is the
// Scruton number of the groups, with the added mass in liquid.
var (
	asmeN1324 = &finding.Criterion{
		ID: "asme-n1324", Assumption: "no-lock-in", Field: "lock_in",
		Standard: "ASME BPVC Section III, Division 1, Appendix N", Edition: "from memory, edition not checked", Clause: "N-1324.1",
		Formula:  "lock-in is excluded by any of: V_R < 1; Sc > 64; V_R < 3.3 and Sc > 1.2; f_w < 0.7 f_v or f_w > 1.3 f_v",
		Source:   cite.ASMEN1324,
		Applies:  func(x *finding.Context) bool { return x.Is(group.Circular) },
		Estimate: asme,
		Say:      finding.Say("By ASME N-1324.1 lock-in stands at {u} of what would exclude it."),
	}
	dnvC205 = &finding.Criterion{
		ID: "dnv-c205", Assumption: "no-lock-in", Field: "lock_in",
		Standard: "DNV-RP-C205", Edition: "from memory, edition not checked", Clause: "section 9",
		Formula:  "across: V_R outside 3 … 16; along: V_R outside 1 … 4.5 or Sc > 1.8",
		Source:   cite.DNVC205,
		Applies:  func(x *finding.Context) bool { return x.Is(group.Circular|group.Liquid) && !x.Is(group.Array) },
		Estimate: dnv,
		Say:      finding.Say("By DNV-RP-C205 lock-in stands at {u} of what would exclude it."),
	}
	en199114 = &finding.Criterion{
		ID: "en-1991-1-4", Assumption: "no-lock-in", Field: "lock_in",
		Standard: "EN 1991-1-4", Edition: "2005, from memory", Clause: "E.1.2(2)",
		Formula:  "v_crit = b n/St > 1.25 v_m, v_m the highest mean speed of operation",
		Source:   cite.EN1991LockIn,
		Applies:  func(x *finding.Context) bool { return x.Is(group.Gas|group.Bluff) && !x.Is(group.Array) },
		Estimate: en,
		Say:      finding.Say("By EN 1991-1-4 E.1.2 the highest speed of operation stands at {u} of the critical speed over 1.25."),
	}
	ptc193 = &finding.Criterion{
		ID: "ptc-19.3", Assumption: "no-lock-in", Field: "lock_in",
		Standard: "ASME PTC 19.3 TW", Edition: "2016, from memory", Clause: "sections 6 to 8",
		Formula:  "f_v < 0.8 f_n; along: f_v < 0.4 f_n or Sc > 2.5; both suppressed for Sc > 64",
		Source:   cite.PTC193TW,
		Applies:  func(x *finding.Context) bool { return x.Is(group.Circular|group.Cantilever) && !x.Is(group.Array) },
		Estimate: ptc,
		Say:      finding.Say("By ASME PTC 19.3 TW the shedding frequency stands at {u} of its limit."),
	}
)

// scruton is the Scruton number, or 0 where the damping is not known: a
// suppression by damping must be shown.
func scruton(x *finding.Context) float64 {
	if x.Has(group.Scruton) {
		return x.Get(group.Scruton)
	}
	return 0
}

// worst returns the largest estimate over the modes and the speeds of
// operation. The estimates rise with V_R or peak once, at the middle of a
// band, so that the highest speed and the speed of the peak settle it.
func worst(x *finding.Context, peak float64, estimate func(v float64) float64) (float64, bool) {
	if x.Modes.N == 0 || !x.Has(group.Strouhal) || !x.Has(group.OperatingHigh) {
		return 0, false
	}
	low, high := x.Get(group.OperatingLow), x.Get(group.OperatingHigh)
	most := 0.0
	for _, v := range x.Modes.V[:x.Modes.N] {
		if v <= 0 {
			continue
		}
		atPeak := math.Max(low, math.Min(peak/v, high)) * v
		most = math.Max(most, math.Max(estimate(atPeak), estimate(high*v)))
	}
	return most, true
}

func asme(x *finding.Context) (float64, bool) {
	st, sc := x.Get(group.Strouhal), scruton(x)
	const lo, hi = 1 / 1.3, 1 / 0.7 // of f_v/f_w
	return worst(x, math.Sqrt(lo*hi)/st, func(v float64) float64 {
		band, _ := finding.Band(st*v, lo, hi, 1)
		return least(v, 64/sc, math.Max(v/3.3, 1.2/sc), band)
	})
}

func dnv(x *finding.Context) (float64, bool) {
	sc := scruton(x)
	across, ok := worst(x, math.Sqrt(3*16), func(v float64) float64 {
		band, _ := finding.Band(v, 3, 16, 1)
		return band
	})
	along, _ := worst(x, math.Sqrt(4.5), func(v float64) float64 {
		band, _ := finding.Band(v, 1, 4.5, 1)
		return least(band, 1.8/sc)
	})
	return math.Max(across, along), ok
}

func en(x *finding.Context) (float64, bool) {
	st := x.Get(group.Strouhal)
	return worst(x, math.Inf(1), func(v float64) float64 { return 1.25 * st * v })
}

func ptc(x *finding.Context) (float64, bool) {
	st, sc := x.Get(group.Strouhal), scruton(x)
	return worst(x, math.Inf(1), func(v float64) float64 {
		across, along := st*v/0.8, least(st*v/0.4, 2.5/sc)
		return least(math.Max(across, along), 64/sc)
	})
}

func least(xs ...float64) float64 {
	m := math.Inf(1)
	for _, x := range xs {
		m = math.Min(m, x)
	}
	return m
}
