package render

import (
	"bytes"
	"math"
	"strings"

	"regimed/regime"
	"regimed/regime/cite"
	"regimed/regime/finding"
	"regimed/regime/group"
	"regimed/regime/scale"
	"regimed/units"
)

const digits = 3 // significant digits of a number in a sentence

// standingCaution comes with every answer.
const standingCaution = "The answer helps to choose a model and verifies no design: whether a structure is safe is for a licensed engineer to decide, by the codes that apply at its site."

// appendPercent appends a share as per cent. What is beyond any use of the
// number is only said to be so.
func appendPercent(dst []byte, x float64) []byte {
	const beyond = 100
	if x > beyond {
		return append(dst, "over 10000 %"...)
	}
	return append(units.AppendNumber(dst, 100*x, digits), " %"...)
}

func appendAmount(dst []byte, x float64, percent bool) []byte {
	if percent {
		return appendPercent(dst, x)
	}
	return units.AppendNumber(dst, x, digits)
}

// isShare reports whether an estimate is a share that reads as per cent: an
// error against a tolerance, and no ratio against a threshold.
func isShare(a *regime.Answer, p *finding.Part) bool {
	switch p.Measure {
	case finding.Stability, finding.Scale:
		return false
	}
	return p.Limit == a.Tolerance.Limit(p.Measure)
}

// counts reports whether a part counts in the verdict of its finding.
func counts(a *regime.Answer, f *finding.Finding, p *finding.Part) bool {
	return !f.OfInterest || a.Interest.Has(p.Measure)
}

// appendSaid appends a sentence with its numbers. The part may be nil where the
// sentence has none of its places. A clause whose number is not known is left
// out: one after a semicolon, or the lead before a colon.
func appendSaid(dst []byte, a *regime.Answer, s *finding.Sentence, p *finding.Part) []byte {
	start := len(dst)
	dst, whole := appendClauses(dst, a, s, p)
	if whole {
		return dst
	}
	if lead := bytes.Index(dst[start:], []byte(": ")); lead >= 0 && bytes.Contains(dst[start:start+lead], []byte(unknown)) {
		dst = append(dst[:start], dst[start+lead+len(": "):]...)
		if c := dst[start]; c >= 'a' && c <= 'z' {
			dst[start] -= 'a' - 'A'
		}
	}
	return dst
}

// unknown stands for a number that is not known, where the clause around it
// can't be left out.
const unknown = "an unknown value"

// appendClauses appends a sentence without the clauses after a semicolon whose
// number is not known. It reports whether no other number was missing.
func appendClauses(dst []byte, a *regime.Answer, s *finding.Sentence, p *finding.Part) (said []byte, whole bool) {
	start, skipping := len(dst), false
	whole = true
	for i := range s.Segments {
		g := &s.Segments[i]
		rest := g.Text
		if skipping {
			if rest = rest[endOfClause(rest):]; rest == "" {
				continue
			}
			skipping = false
		}
		dst = append(dst, rest...)
		if g.Place == finding.None {
			continue
		}
		x := placeValue(a, g, p)
		if !math.IsNaN(x) {
			dst = appendAmount(dst, x, g.Percent)
			continue
		}
		if clause := bytes.LastIndex(dst[start:], []byte("; ")); clause >= 0 {
			dst, skipping = dst[:start+clause], true
			continue
		}
		dst, whole = append(dst, unknown...), false
	}
	return dst, whole
}

// endOfClause returns where a clause ends: at a semicolon or a full stop.
func endOfClause(s string) int {
	for i := range len(s) {
		if s[i] == ';' || s[i] == '.' && (i+1 == len(s) || s[i+1] == ' ') {
			return i
		}
	}
	return len(s)
}

func placeValue(a *regime.Answer, g *finding.Segment, p *finding.Part) float64 {
	switch {
	case g.Place == finding.GroupValue:
		if p != nil && p.Groups != nil {
			return p.Groups.Get(g.Group)
		}
		return a.Groups.Get(g.Group)
	case p == nil:
		return math.NaN()
	}
	switch g.Place {
	case finding.Estimate:
		return p.Estimate
	case finding.Limit:
		return p.Limit
	case finding.UtilisationPlace:
		return p.Utilisation
	default:
		return p.Factor
	}
}

// appendEstimate appends what an estimate found, with the limit that it stands
// against, as a clause without its full stop and from a small letter on where
// it continues a sentence.
func appendEstimate(dst []byte, a *regime.Answer, p *finding.Part, continued bool) []byte {
	start := len(dst)
	if p.Say != nil {
		dst = appendSaid(dst, a, p.Say, p)
	} else {
		dst = append(dst, "The estimate is "...)
		dst = appendAmount(dst, p.Estimate, isShare(a, p))
	}
	if continued {
		lowerFirst(dst[start:])
	}
	dst = dst[:len(dst)-len(dst[start:])+len(bytes.TrimRight(dst[start:], "."))]
	end := firstSentence(dst[start:])
	if end < 0 {
		return appendLimit(dst, a, p)
	}
	// A second sentence follows: the limit belongs to the first.
	var room [256]byte
	tail := append(room[:0], dst[start+end:]...)
	return append(appendLimit(dst[:start+end], a, p), tail...)
}

// firstSentence returns where the first of several sentences ends, or −1.
func firstSentence(text []byte) int {
	for from := 0; ; {
		i := bytes.Index(text[from:], []byte(". "))
		if i < 0 {
			return -1
		}
		i += from
		if i+2 < len(text) && text[i+2] >= 'A' && text[i+2] <= 'Z' {
			return i
		}
		from = i + 2
	}
}

// appendLimit appends the limit in the terms in which the sentence spoke of
// the estimate.
func appendLimit(dst []byte, a *regime.Answer, p *finding.Part) []byte {
	if p.Basis == finding.Definition {
		if p.Estimate == 0 {
			return dst
		}
		dst = append(dst, "; by definition that counts as "...)
		dst = appendAmount(dst, p.Estimate, isShare(a, p))
		dst = append(dst, ", and the limit is "...)
		return appendAmount(dst, p.Limit, isShare(a, p))
	}
	said, percent := saysEstimate(p.Say)
	if p.Say == nil {
		said, percent = true, isShare(a, p)
	}
	if said {
		dst = append(dst, "; the limit is "...)
		return appendAmount(dst, p.Limit, percent)
	}
	dst = append(dst, "; that is "...)
	dst = units.AppendNumber(dst, p.Utilisation, digits)
	dst = append(dst, " times the limit"...)
	if p.Limit == 1 {
		return dst
	}
	dst = append(dst, " of "...)
	return appendAmount(dst, p.Limit, isShare(a, p))
}

// saysEstimate reports whether a sentence shows the estimate, and whether as
// per cent.
func saysEstimate(s *finding.Sentence) (said, percent bool) {
	if s == nil {
		return false, false
	}
	for i := range s.Segments {
		switch g := &s.Segments[i]; g.Place {
		case finding.Estimate:
			return true, g.Percent
		case finding.UtilisationPlace:
			said = true
		}
	}
	return said, false
}

// lowerFirst turns the first letter of a clause into a small one, but for
// symbols: "The flow" becomes "the flow", "Re = 100" and "KC = 2" remain.
func lowerFirst(clause []byte) {
	if len(clause) == 0 || clause[0] < 'A' || clause[0] > 'Z' {
		return
	}
	n := 1
	for n < len(clause) && clause[n] >= 'a' && clause[n] <= 'z' {
		n++
	}
	if n < len(clause) && clause[n] != ' ' && clause[n] != ',' && clause[n] != ':' {
		return
	}
	switch word := string(clause[:n]); word {
	case "At", "A", "An", "In", "No", "On", "If", "It", "Of", "By":
	default:
		if n < 3 {
			return
		}
	}
	clause[0] += 'a' - 'A'
}

// appendBecause appends the sentence that gives the reason of a verdict.
func appendBecause(dst []byte, a *regime.Answer, f *finding.Finding) []byte {
	p := f.Main()
	switch {
	case p == nil && f.Reason != nil:
		return appendSaid(dst, a, f.Reason, nil)
	case p == nil:
		return append(dst, "What it would leave out does not arise in this case."...)
	case p.Waits:
		dst = append(dst, "Not determined, since "...)
		dst = appendMissing(dst, a, f)
	default:
		dst = appendEstimate(dst, a, p, false)
	}
	dst = appendDissent(dst, f)
	return append(dst, '.')
}

// appendDissent names the published criteria that come to another verdict.
func appendDissent(dst []byte, f *finding.Finding) []byte {
	but := "; but "
	for _, c := range f.Published() {
		if c.Verdict == f.Verdict {
			continue
		}
		dst = append(dst, but...)
		if c.Criterion.Source != nil {
			dst = append(dst, c.Criterion.Source.Short...)
		} else {
			dst = append(dst, c.Criterion.Standard...)
		}
		dst = append(dst, " finds it "...)
		dst = append(dst, c.Verdict.String()...)
		dst = append(dst, ", at "...)
		dst = units.AppendNumber(dst, c.Utilisation, digits)
		dst = append(dst, " times its limit"...)
		but = ", and "
	}
	return dst
}

// appendPartBecause appends the reason of one estimate.
func appendPartBecause(dst []byte, a *regime.Answer, p *finding.Part) []byte {
	if !p.Waits {
		return append(appendEstimate(dst, a, p, false), '.')
	}
	h := holdOf(a, p)
	dst = append(dst, "Not determined, since "...)
	dst = append(dst, h.input...)
	dst = append(dst, " is not given"...)
	dst = appendHold(dst, h, "; it holds ")
	return append(dst, '.')
}

// hold is the bound up to which, or from which, an assumption holds.
type hold struct {
	input string // what is missing: an input, or else the title of a group
	named bool   // it is an input
	value float64
	unit  string
	kind  units.Kind
	least bool
	group group.ID // NaN value: the bound is known for the group only
	of    float64
}

// holdOf reads the bound of a part that waits.
func holdOf(a *regime.Answer, p *finding.Part) hold {
	groups := a.Groups
	if p.Groups != nil {
		groups = p.Groups
	}
	n := groups.Need(p.Wait)
	h := hold{input: n.Input, named: n.Input != "", unit: n.Unit, least: p.Least, value: math.NaN(), group: p.Wait, of: p.Hold}
	if !h.named {
		h.input = "the " + group.Of(p.Wait).Title
		return h
	}
	if v := n.InputFor(p.Hold); !math.IsNaN(v) && !math.IsInf(v, 0) {
		h.value = v
		h.least = p.Least != (n.Power < 0)
		h.kind = inputKind(a, n)
	}
	return h
}

// inputKind finds the kind of quantity of a missing input by the scale that it
// would give; the unit alone does not tell it.
func inputKind(a *regime.Answer, n group.Need) units.Kind {
	for id := range scale.Count {
		if scale.Of(id).Input != n.Input {
			continue
		}
		if k := a.Scales.Value(id).Kind; k.SI() == n.Unit {
			return k
		}
	}
	return units.Dimensionless
}

func appendHold(dst []byte, h hold, lead string) []byte {
	known := !math.IsNaN(h.value)
	if !known && math.IsNaN(h.of) {
		return dst
	}
	dst = append(dst, lead...)
	if h.least {
		dst = append(dst, "from "...)
	} else {
		dst = append(dst, "up to "...)
	}
	if !known {
		dst = append(dst, group.Of(h.group).Symbol...)
		dst = append(dst, " = "...)
		dst = units.AppendNumber(dst, h.of, digits)
	} else if h.kind == units.Dimensionless && h.unit != units.Dimensionless.SI() {
		dst = units.AppendNumber(dst, h.value, digits)
		dst = append(dst, ' ')
		dst = append(dst, h.unit...)
	} else {
		dst = units.AppendFormat(dst, h.value, h.kind)
	}
	if h.least {
		dst = append(dst, " on"...)
	}
	return dst
}

// holds gathers what an undetermined finding waits for: for each input and
// direction the bound that is hardest to keep, in the order of the parts.
func holds(dst []hold, a *regime.Answer, f *finding.Finding) []hold {
	for i := range f.Parts() {
		p := &f.Parts()[i]
		if p.Waits && counts(a, f, p) {
			dst = addHold(dst, holdOf(a, p))
		}
	}
	return dst
}

func addHold(list []hold, h hold) []hold {
	for i := range list {
		k := &list[i]
		if k.input != h.input || k.least != h.least {
			continue
		}
		if math.IsNaN(k.value) || k.least && h.value > k.value || !k.least && h.value < k.value {
			*k = h
		}
		return list
	}
	return append(list, h)
}

// appendMissing appends which inputs are missing and how far the assumption
// would hold: "motion.amplitude is not given; it holds up to 2.4 mm".
func appendMissing(dst []byte, a *regime.Answer, f *finding.Finding) []byte {
	var room [6]hold
	list := holds(room[:0], a, f)
	inputs := 0
	for i := range list {
		if seen(list[:i], list[i].input) {
			continue
		}
		if inputs > 0 {
			dst = append(dst, " and "...)
		}
		dst = append(dst, list[i].input...)
		inputs++
	}
	if inputs == 1 {
		dst = append(dst, " is not given"...)
	} else {
		dst = append(dst, " are not given"...)
	}
	lead := "; it holds "
	for i := range list {
		before := len(dst)
		dst = appendHold(dst, list[i], lead)
		if len(dst) == before {
			continue
		}
		if inputs > 1 {
			dst = append(dst, " of "...)
			dst = append(dst, list[i].input...)
		}
		lead = " and "
	}
	return dst
}

func seen(list []hold, input string) bool {
	for i := range list {
		if list[i].input == input {
			return true
		}
	}
	return false
}

// appendSource appends the short form of a source, and says where its content
// was written down from memory.
func appendSource(dst []byte, s *cite.Source) []byte {
	dst = append(dst, s.Short...)
	if s.Memory {
		dst = append(dst, " (from memory)"...)
	}
	return dst
}

// appendGroupReason says why a group has no value.
func appendGroupReason(dst []byte, a *regime.Answer, id group.ID) []byte {
	switch a.Groups.State(id) {
	case group.Missing:
		if n := a.Groups.Need(id); n.Input != "" {
			dst = append(dst, n.Input...)
			return append(dst, " is not given."...)
		}
		return append(dst, "A quantity that it is made of is not known."...)
	case group.OffRange:
		return append(dst, "The solution behind it does not reach as far as this case."...)
	}
	if s, ok := absentScale(a, id); ok {
		title, _, _ := strings.Cut(scale.Of(s).Title, ":")
		dst = append(dst, "It does not arise: the case has no "...)
		dst = append(dst, title...)
		return append(dst, '.')
	}
	return append(dst, "It does not arise in this case."...)
}

// absentScale returns the scale for lack of which a group does not arise:
// rather one that the case has no use for than one that could be given.
func absentScale(a *regime.Answer, id group.ID) (absent scale.ID, ok bool) {
	f := formulaOf[id]
	if f == nil {
		return 0, false
	}
	for _, s := range f.From {
		switch {
		case a.Scales.Has(s):
		case a.Scales.Needs(s) == "":
			return s, true
		case !ok:
			absent, ok = s, true
		}
	}
	return absent, ok
}

// groupBand names the range in which the value of a group lies, or is empty.
func groupBand(a *regime.Answer, id group.ID) string {
	if !a.Groups.Has(id) {
		return ""
	}
	x := a.Groups.Get(id)
	if t := &a.Groups.Band; t.High > 0 && t.Length == id {
		switch {
		case x < t.Low:
			return "laminar"
		case x < t.High:
			return "transitional"
		default:
			return "turbulent"
		}
	}
	for _, b := range group.Of(id).Bands {
		if x < b.Below {
			return b.Name
		}
	}
	return ""
}
