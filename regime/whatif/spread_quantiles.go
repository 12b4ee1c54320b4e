package whatif

import (
	"context"
	"math"
	"runtime"
	"slices"
	"sync"

	"gonum.org/v1/gonum/stat"

	"regimed/regime"
	"regimed/regime/assumption"
	"regimed/regime/group"
)

// columnCount is how many numbers of an answer are followed: its groups, then the
// utilisations of its findings.
var columnCount = int(group.Count) + len(assumption.Catalogue)

// sheet holds the numbers of a few answers, an answer a row; NaN where an answer
// has none.
type sheet struct{ cells []float64 }

var sheets = sync.Pool{New: func() any { return new(sheet) }}

func (t *sheet) clear() { t.cells = t.cells[:0] }

func (t *sheet) add(a *regime.Answer) {
	for id := range group.Count {
		t.cells = append(t.cells, a.Groups.Get(id))
	}
	for i := range a.Findings {
		u, ok := a.Findings[i].Utilisation()
		if !ok {
			u = math.NaN()
		}
		t.cells = append(t.cells, u)
	}
}

// series are the numbers of one column, those that there are. Most columns do not
// depend on what is uncertain: of these only one number is kept.
type series struct {
	count int
	first float64
	all   []float64 // nil where all are alike
}

func (t *sheet) columns() []series {
	list := make([]series, columnCount)
	for i := range list {
		list[i] = t.column(i)
	}
	return list
}

func (t *sheet) column(column int) (n series) {
	alike := true
	for i := column; i < len(t.cells); i += columnCount {
		switch x := t.cells[i]; {
		case math.IsNaN(x):
			continue
		case n.count == 0:
			n.first = x
		case x != n.first:
			alike = false
		}
		n.count++
	}
	if alike {
		return n
	}
	n.all = make([]float64, 0, n.count)
	for i := column; i < len(t.cells); i += columnCount {
		if x := t.cells[i]; !math.IsNaN(x) {
			n.all = append(n.all, x)
		}
	}
	return n
}

// pooled is a column over all draws.
type pooled struct {
	count int
	parts []series
}

func (c *pooled) append(n series) {
	if n.count == 0 {
		return
	}
	c.count += n.count
	if last := len(c.parts) - 1; last >= 0 && n.all == nil && c.parts[last].all == nil && c.parts[last].first == n.first {
		c.parts[last].count += n.count
		return
	}
	c.parts = append(c.parts, n)
}

// quantiles are the numbers below which 5, 50 and 95 % of those of a column lie.
func (c *pooled) quantiles() (q regime.Quantiles) {
	if len(c.parts) == 1 && c.parts[0].all == nil {
		return regime.Quantiles{c.parts[0].first, c.parts[0].first, c.parts[0].first}
	}
	list := make([]float64, 0, c.count)
	for _, n := range c.parts {
		if n.all != nil {
			list = append(list, n.all...)
			continue
		}
		for range n.count {
			list = append(list, n.first)
		}
	}
	slices.Sort(list)
	for i, p := range []float64{0.05, 0.5, 0.95} {
		q[i] = stat.Quantile(p, stat.LinInterp, list, nil)
		if i > 0 {
			q[i] = max(q[i], q[i-1]) // between numbers that are all but equal, interpolation rounds either way
		}
	}
	return q
}

// quantiles adds those of the groups and utilisations that at least half of the
// answers have.
func (s *sampling) quantiles(ctx context.Context, r *regime.Spread) error {
	r.Groups = map[group.ID]regime.Quantiles{}
	r.Utilisations = make([]regime.Quantiles, len(assumption.Catalogue))
	for i := range r.Utilisations {
		r.Utilisations[i] = regime.Quantiles{math.NaN(), math.NaN(), math.NaN()}
	}
	at := -1
	next := func() (int, bool, error) {
		for at++; at < columnCount; at++ {
			if n := s.columns[at].count; n > 0 && 2*n >= r.Samples {
				return at, true, nil
			}
		}
		return 0, false, nil
	}
	type made struct {
		column int
		q      regime.Quantiles
	}
	work := func(i int) made { return made{i, s.columns[i].quantiles()} }
	emit := func(m made) error {
		if id := group.ID(m.column); id < group.Count {
			r.Groups[id] = m.q
		} else {
			r.Utilisations[m.column-int(group.Count)] = m.q
		}
		return nil
	}
	return InOrder(ctx, runtime.GOMAXPROCS(0), next, work, emit)
}
