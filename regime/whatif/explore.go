package whatif

import (
	"cmp"
	"context"
	"errors"
	"math"
	"runtime"
	"slices"
	"sync"
	"sync/atomic"

	"regimed/regime"
	"regimed/regime/assumption"
	"regimed/regime/finding"
	"regimed/regime/group"
	"regimed/regime/input"
	"regimed/regime/ladder"
)

// Explore adds to an answer what its case depends on: the drivers of each
// finding, and for each input the nearest values at which another class is
// recommended. Every number that was given is varied by itself, and so are the
// tolerances of the measures that count, given or not. An uncertain input stands
// at its middle. The inputs are worked on side by side; the result does not
// depend on how many at once.
//
// It ends early only with the context, and then leaves the answer as it was.
func Explore(ctx context.Context, a *regime.Answer) error {
	x, err := newExplorer(ctx, a)
	if err != nil {
		return err
	}
	found := make([]explored, len(x.routes))
	var next atomic.Int64
	var all sync.WaitGroup
	for range min(runtime.GOMAXPROCS(0), len(x.routes)) {
		all.Go(func() {
			for {
				i := int(next.Add(1)) - 1
				if i >= len(x.routes) || ctx.Err() != nil {
					return
				}
				found[i] = x.explore(&x.routes[i])
			}
		})
	}
	all.Wait()
	if ctx.Err() != nil {
		return context.Cause(ctx)
	}
	a.Drivers, a.Turns = x.driversOf(found), turnsOf(found)
	return nil
}

// explored is what varying one input shows.
type explored struct {
	sensitivity []float64 // by finding; NaN: none
	turns       []regime.Turn
}

// turnsOf sorts all turns by nearness: by |ln factor|, and those without a
// factor last.
func turnsOf(found []explored) []regime.Turn {
	all := []regime.Turn{}
	for i := range found {
		all = append(all, found[i].turns...)
	}
	slices.SortStableFunc(all, func(a, b regime.Turn) int {
		return cmp.Compare(rounded(distance(a.Factor)), rounded(distance(b.Factor)))
	})
	return all
}

// rounded drops what is rounding, so that what is alike stays in the order of the
// inputs, whatever their units.
func rounded(x float64) float64 { return math.Round(x*1e6) / 1e6 }

func distance(factor float64) float64 {
	if !(factor > 0) {
		return math.Inf(1)
	}
	return math.Abs(math.Log(factor))
}

// explorer varies the inputs of one case.
type explorer struct {
	ctx    context.Context
	kase   *input.Case // every input certain, and as it was given
	base   *view
	watch  watch
	parts  []governing // by finding, as it is in the case
	odd    []string    // pointers of inputs that are implausible in the case itself
	routes []route
	judged atomic.Int64 // how often the engine was asked
}

// governing is the part that governs a finding in the case.
type governing struct {
	part int8 // −1: none, or one that waits or lies at a bound of the utilisation
	mode int8
	log  float64 // of its utilisation
}

// errNoCase is returned for an answer that was decided without a case.
var errNoCase = errors.New("an answer without a case has no inputs to vary")

func newExplorer(ctx context.Context, a *regime.Answer) (*explorer, error) {
	if a.Case == nil {
		return nil, errNoCase
	}
	if ctx.Err() != nil {
		return nil, context.Cause(ctx)
	}
	x := &explorer{ctx: ctx, kase: a.Case.Clone()}
	for _, p := range x.kase.Places() {
		x.kase.Set(p, x.kase.At(p).Value)
	}
	for i := range a.Warnings {
		if a.Warnings[i].Code == implausible {
			x.odd = append(x.odd, a.Warnings[i].Pointer)
		}
	}
	x.watch = watchOf(a)
	x.base = x.watch.read(a)
	for i := range a.Findings {
		x.parts = append(x.parts, governingOf(&a.Findings[i]))
	}
	x.routes = routesOf(x.kase, a)
	return x, nil
}

// implausible is the code of a warning that an input lies outside what is usual.
const implausible = "implausible"

// explore varies one input.
func (x *explorer) explore(r *route) explored {
	w := &walker{explorer: x, route: r, kase: x.kase.Clone()}
	var o explored
	if r.smooth() {
		o.sensitivity = w.sensitivities()
	}
	for _, up := range []bool{false, true} {
		if t, ok := w.turn(up); ok {
			o.turns = append(o.turns, t)
		}
	}
	return o
}

// view is what counts of an answer at one place of a route.
type view struct {
	at     float64 // how far along the route
	open   bool    // whether the case can be judged there, and is plausible
	class  *ladder.Class
	traits group.Traits
	judged []judgement // of the watched findings
	excess []float64   // of the watched parts: ln(u/φ_inner), positive where invalid; NaN where a part has none
}

// judgement is the outcome of a finding.
type judgement struct {
	verdict finding.Verdict
	out     bool // rules out a class that rests on it
}

// watch is what the recommended class of a case depends on: the findings on
// which it and every cheaper class of its domain rest, cheapest class first.
type watch struct {
	classes []watchedClass
	entries []watchedEntry
	size    int // number of parts
}

type watchedClass struct {
	class *ladder.Class
	on    []int // indices of the entries
}

// watchedEntry is a finding with the room for its parts: one more than it has
// in the case, in which all further ones share.
type watchedEntry struct {
	entry       *assumption.Entry
	first, room int
}

func watchOf(a *regime.Answer) watch {
	var w watch
	known := map[*assumption.Entry]int{}
	for i := range ladder.Classes {
		c := &ladder.Classes[i]
		if !c.Domain.Covers(a.Kind.Name, a.Groups.Traits) && c != a.Recommendation.Class {
			continue
		}
		watched := watchedClass{class: c}
		for _, e := range c.RestsOn {
			at, seen := known[e]
			if !seen {
				at = len(w.entries)
				known[e] = at
				room := len(a.Findings[e.Index()].Parts()) + 1
				w.entries = append(w.entries, watchedEntry{e, w.size, room})
				w.size += room
			}
			watched.on = append(watched.on, at)
		}
		w.classes = append(w.classes, watched)
		if c == a.Recommendation.Class {
			break
		}
	}
	return w
}

// read takes from an answer what counts.
func (w *watch) read(a *regime.Answer) *view {
	v := &view{open: true, class: a.Recommendation.Class, traits: a.Groups.Traits,
		judged: make([]judgement, len(w.entries)), excess: make([]float64, w.size)}
	for i := range v.excess {
		v.excess[i] = math.NaN()
	}
	for i := range w.entries {
		e := &w.entries[i]
		f := &a.Findings[e.entry.Index()]
		v.judged[i] = judgement{f.Verdict, f.RulesOut()}
		if f.OfInterest {
			e.read(v.excess, f.Parts(), a.Interest)
		}
	}
	return v
}

// read takes the excesses of the parts that are of interest.
func (e *watchedEntry) read(excess []float64, parts []finding.Part, interest finding.Interest) {
	for j := range parts {
		p := &parts[j]
		if p.Waits || !interest.Has(p.Measure) {
			continue
		}
		slot := &excess[e.first+min(j, e.room-1)]
		if g := math.Log(p.Utilisation/p.Inner) - onEdge; math.IsNaN(*slot) || g > *slot {
			*slot = g
		}
	}
}

// onEdge is the rounding to which u/φ may exceed 1 before a finding is invalid,
// as in finding.Judge.
const onEdge = 1e-9

// same reports whether the class would stay, were the excesses of the watched
// parts these.
func (w *watch) same(excess []float64) bool {
	last := len(w.classes) - 1
	for i := range w.classes {
		if w.holds(&w.classes[i], excess) {
			return i == last
		}
	}
	return false
}

func (w *watch) holds(c *watchedClass, excess []float64) bool {
	for _, at := range c.on {
		if w.entries[at].worst(excess) > 0 {
			return false
		}
	}
	return true
}

// worst is the largest excess of the parts of a finding; −Inf where it has none.
func (e *watchedEntry) worst(excess []float64) float64 {
	worst := math.Inf(-1)
	for _, g := range excess[e.first : e.first+e.room] {
		if g > worst {
			worst = g
		}
	}
	return worst
}

// walker goes along one route.
type walker struct {
	*explorer
	route  *route
	kase   *input.Case
	beside [2]*view  // next to the case, below and above in ln x; nil where it is closed
	guess  []float64 // room for excesses that are expected somewhere
	places []float64 // room for places, by watched part
}

// judge asks the engine for an answer with another value of the input. It is
// nil where the value breaks a rule or contradicts the rest of the case, or
// where it is implausible.
func (w *walker) judge(value float64) *regime.Answer {
	if math.IsNaN(value) || math.IsInf(value, 0) || !w.kase.Set(w.route.place, value) {
		return nil
	}
	w.judged.Add(1)
	a, violations := regime.Judge(w.kase)
	if len(violations) > 0 {
		return nil
	}
	for i := range a.Warnings {
		if a.Warnings[i].Code == implausible && !slices.Contains(w.odd, a.Warnings[i].Pointer) {
			a.Release()
			return nil
		}
	}
	return a
}

// look is the view at a place of a leg.
func (w *walker) look(l *leg, at float64) *view {
	a := w.judge(l.value(at))
	if a == nil {
		return &view{at: at}
	}
	defer a.Release()
	v := w.watch.read(a)
	v.at = at
	return v
}
