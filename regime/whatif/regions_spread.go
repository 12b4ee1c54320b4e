package whatif

import "slices"

// mostSpread is how many edges of a net are followed anew, at most, where bands are
// traced from edge to edge.
const mostSpread = 8 * steps * steps

// spread looks on the edges beside some others for what lies between two cuts of
// these: a narrow band that was found on one of them goes on. Edges on which it is
// found are followed anew, and looked beside in turn. It returns the numbers of those
// that were.
func (t *tracer) spread(w *web, from []int) []int {
	var changed []int
	queue := slices.Clone(from)
	for len(queue) > 0 && len(changed) < mostSpread && t.stop.Err() == nil {
		i := queue[0]
		queue = queue[1:]
		for _, k := range t.goesOn(w, i) {
			changed, queue = append(changed, k), append(queue, k)
		}
	}
	slices.Sort(changed)
	return slices.Compact(changed)
}

// goesOn follows anew the edges parallel to one on which one of its bands is met,
// and lists them.
func (t *tracer) goesOn(w *web, i int) []int {
	e := *w.edge(i)
	var changed []int
	for n, at := range e.bands() {
		for _, side := range []int{-1, 1} {
			k := i/2%(steps+1) + side
			if k < 0 || k > steps {
				continue
			}
			// Straight on, and in the direction from where it came.
			places := []float64{at}
			if before, ok := w.band(i, -side, e.zones[n+1], at); ok {
				places = append(places, 2*at-before)
			}
			for _, place := range places {
				if m, ok := t.meet(w, i, side, place); ok && !slices.Contains(changed, m) {
					changed = append(changed, m)
				}
			}
		}
	}
	return changed
}

// parallel is the number of the edge beside another, at a place along it; places
// below 0 and from 1 on lie on the edge before or after that one. ok is false
// outside the net.
func parallel(i, side int, place float64) (k int, part float64, ok bool) {
	along, line := i/2/(steps+1), i/2%(steps+1)+side
	for place < 0 {
		along, place = along-1, place+1
	}
	for place > 1 {
		along, place = along+1, place-1
	}
	if along < 0 || along >= steps || line < 0 || line > steps {
		return 0, 0, false
	}
	return 2*(along*(steps+1)+line) + i%2, place, true
}

// band is where on the edge beside another the middle of a band of a zone lies, as
// near as possible to a place.
func (w *web) band(i, side int, z *Zone, place float64) (float64, bool) {
	k, _, ok := parallel(i, side, place)
	if !ok {
		return 0, false
	}
	e := *w.edge(k)
	best, found := 0.0, false
	for n, at := range e.bands() {
		if e.zones[n+1] == z && (!found || (at-place)*(at-place) < (best-place)*(best-place)) {
			best, found = at, true
		}
	}
	return best, found
}

// meet judges the case at a place on the edge beside another, and follows that edge
// anew if it did not know what it finds.
func (t *tracer) meet(w *web, i, side int, place float64) (int, bool) {
	k, part, ok := parallel(i, side, place)
	if !ok {
		return 0, false
	}
	e := *w.edge(k)
	says, _ := e.zoneAt(part)
	n := t.look(between(e.from, e.to, part))
	if n.zone == says {
		return 0, false
	}
	for _, c := range e.cuts {
		if apart(c.at, n.at) < 4*Precise {
			return 0, false
		}
	}
	*w.edge(k) = t.netEdge(w, k, append(slices.Clip(e.met), n))
	return k, true
}
