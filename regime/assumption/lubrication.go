package assumption

import (
	"regimed/regime/cite"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// Lubrication: a film without inertia and without edges.
var Lubrication = &Entry{
	ID:        "lubrication",
	Title:     "Lubrication film",
	LeavesOut: "inertia and edge flow of a film",
	Estimated: "scale: gap over length against 0.1; ωg²/ν against 1",
	Measures:  []finding.Measure{finding.Scale},
	Sources:   []*cite.Source{cite.Reynolds1886, cite.Langlois1962},
	Estimate:  estimateLubrication,
}

var (
	filmThin    = finding.Say("The gap is {gap_ratio} of the length; a film is thin below 0.1.")
	filmInertia = finding.Say("The inertia of the film is {film_reynolds} of its friction: ωg²/ν.")
)

func estimateLubrication(x *finding.Context) {
	switch {
	case !x.Is(group.Fluid):
		x.NotApplicable(noFluid)
		return
	case !x.Is(group.Film):
		x.NotApplicable(noGap)
		return
	}
	p := finding.Part{Measure: finding.Scale, Basis: finding.Threshold, Limit: 0.1, Factor: 1.5, Say: filmThin, Source: cite.Reynolds1886}
	x.AddOrWait(p, group.GapRatio, identity)
	p.Limit, p.Say, p.Source = 1, filmInertia, cite.Langlois1962
	x.AddOrWait(p, group.FilmReynolds, identity)
}
