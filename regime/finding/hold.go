package finding

import "math"

// hold finds the value v at which an estimate reaches the limit. least is true
// where the estimate falls with v, so that the assumption holds from v on. It
// returns NaN where the estimate never reaches the limit or always exceeds it.
//
// Most estimates are powers of the group: one step in log-log finds these
// exactly. The others are bisected in log v over 24 decades.
func hold(estimate func(v float64) float64, limit float64) (v float64, least bool) {
	if estimate == nil {
		return math.NaN(), false
	}
	if v, ok := holdOfPower(estimate, limit); ok {
		return v, estimate(2) < estimate(1)
	}
	lo, hi := 1e-12, 1e12
	atLo, atHi := estimate(lo) <= limit, estimate(hi) <= limit
	if atLo == atHi {
		return math.NaN(), false
	}
	for hi/lo > 1+1e-12 {
		mid := math.Sqrt(lo * hi)
		if (estimate(mid) <= limit) == atLo {
			lo = mid
		} else {
			hi = mid
		}
	}
	return lo, !atLo
}

func holdOfPower(estimate func(v float64) float64, limit float64) (float64, bool) {
	e1, e2 := estimate(1), estimate(2)
	if !(e1 > 0) || !(e2 > 0) || e1 == e2 || math.IsInf(e1, 0) || math.IsInf(e2, 0) {
		return 0, false
	}
	v := math.Pow(limit/e1, math.Ln2/math.Log(e2/e1))
	if math.IsInf(v, 0) || v == 0 || math.Abs(estimate(v)/limit-1) > 1e-9 {
		return 0, false
	}
	return v, true
}
