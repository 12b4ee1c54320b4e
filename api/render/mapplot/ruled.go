package mapplot

import (
	"math/bits"
	"strings"

	"gonum.org/v1/plot/vg"

	"regimed/regime/assumption"
)

// ruled is a line of utilisation 1 as it is drawn: of one assumption, or of several
// where their lines run together.
type ruled struct {
	names  []string
	of     uint64 // whose it is, a bit for each assumption that has a line
	tracks []*track
	bit    uint64 // its own, in the raster
}

func (l *ruled) name() string { return strings.Join(l.names, ", ") }

// turns reports whether a track is so long and bent that one does not see at its
// one end that it is the line named at the other.
func (t *track) turns() bool {
	straight := distance(t.points[0], t.points[len(t.points)-1])
	return t.length() > longTurn && straight < 0.92*t.length()
}

// Lines nearer than together run together; parts shorter than shortest are not
// told apart from what they belong to.
const (
	together = 1.1
	shortest = 3 * vg.Millimeter
	stride   = 0.4 * vg.Millimeter

	shortestRun = 12 // in strides

	worthAName = 6 * vg.Millimeter  // a further part of a line
	longTurn   = 70 * vg.Millimeter // a line that turns is named twice
)

// takeLines takes the lines of utilisation 1 from the map. Where several run
// together one of them is drawn, for all.
func (s *sheet) takeLines() {
	var entries []*assumption.Entry
	tracks := map[*assumption.Entry][]*track{}
	for i := range s.m.Lines {
		l := &s.m.Lines[i]
		points := make([]vg.Point, 0, len(l.Points)+1)
		for _, p := range l.Points {
			points = append(points, s.point(p))
		}
		if l.Closed {
			points = append(points, points[0])
		}
		t := newTrack(points)
		if t.length() < shortest {
			continue
		}
		if tracks[l.Entry] == nil {
			entries = append(entries, l.Entry)
		}
		tracks[l.Entry] = append(tracks[l.Entry], t)
	}
	for i, e := range entries {
		for _, t := range tracks[e] {
			for _, r := range s.shared(i, t, entries, tracks) {
				s.addRuled(r)
			}
		}
	}
	for i := range s.ruled {
		s.ruled[i].bit = 1 << (i % 64)
	}
}

// shared divides a track by which other lines run together with it, and leaves out
// what an earlier line draws.
func (s *sheet) shared(i int, t *track, entries []*assumption.Entry, tracks map[*assumption.Entry][]*track) []ruled {
	n := max(1, int(t.length()/stride))
	with := make([]uint64, n+1)
	for k := range with {
		p := t.at(t.length() * vg.Length(k) / vg.Length(n))
		with[k] = 1 << (i % 64)
		for j, e := range entries {
			for _, other := range tracks[e] {
				if j != i && other.passes(p, together) {
					with[k] |= 1 << (j % 64)
				}
			}
		}
	}
	settle(with, shortestRun)
	var list []ruled
	for from := 0; from < n; {
		to := from
		for to < n && with[to] == with[from] {
			to++
		}
		if bits.TrailingZeros64(with[from]) == i%64 {
			r := ruled{of: with[from], tracks: []*track{t.part(t.length()*vg.Length(from)/vg.Length(n), t.length()*vg.Length(to)/vg.Length(n))}}
			for j, e := range entries {
				if r.of&(1<<(j%64)) != 0 {
					r.names = append(r.names, e.ID)
				}
			}
			list = append(list, r)
		}
		from = to
	}
	return list
}

// settle gives runs that are too short to the run before them, or at the beginning
// to the one after.
func settle(with []uint64, least int) {
	for changed := true; changed; {
		changed = false
		for from := 0; from < len(with); {
			to := from
			for to < len(with) && with[to] == with[from] {
				to++
			}
			if to-from < least && to-from < len(with) {
				other := with[max(from-1, 0)]
				if from == 0 {
					other = with[to]
				}
				for k := from; k < to; k++ {
					with[k] = other
				}
				changed = true
				break
			}
			from = to
		}
	}
}

func (s *sheet) addRuled(r ruled) {
	for i := range s.ruled {
		if s.ruled[i].of == r.of {
			s.ruled[i].tracks = append(s.ruled[i].tracks, r.tracks...)
			return
		}
	}
	s.ruled = append(s.ruled, r)
}
