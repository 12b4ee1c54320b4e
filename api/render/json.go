package render

import (
	"encoding/binary"
	"math"
	"strconv"
	"unicode/utf8"

	"regimed/regime"
	"regimed/regime/assumption"
	"regimed/regime/finding"
	"regimed/regime/group"
	"regimed/regime/kind"
	"regimed/regime/scale"
	"regimed/units"
)

// AppendJSON appends the answer as JSON, in one pass. Numbers are SI, in the
// shortest form that reads back as the same number; what has no value is null.
// only trims the answer to some of its members; no member at all means all.
func AppendJSON(dst []byte, a *regime.Answer, only Fields) []byte {
	if only == 0 {
		only = All
	}
	dst = append(dst, '{')
	dst = appendHead(dst, a, only)
	if only.Has(Study) {
		dst = appendStudy(name(dst, "study"), a)
	}
	if only.Has(Scales) {
		dst = appendScales(name(dst, "scales"), a)
	}
	if only.Has(Groups) {
		dst = appendGroups(name(dst, "groups"), a)
	}
	if only.Has(Findings) {
		dst = appendFindings(name(dst, "findings"), a)
	}
	if only.Has(Recommendation) {
		dst = appendRecommendation(name(dst, "recommendation"), a)
	}
	if only.Has(Uncertainty) && a.Spread != nil {
		dst = appendUncertainty(name(dst, "uncertainty"), a)
	}
	if only.Has(TurningPoints) && a.Turns != nil {
		dst = appendTurns(name(dst, "turning_points"), a)
	}
	if only.Has(Setup) {
		dst = appendSetup(name(dst, "setup"), a)
	}
	if only.Has(Frequencies) {
		dst = appendFrequencies(name(dst, "frequencies"), a)
	}
	if only.Has(Modes) && len(a.Modes) > 0 {
		dst = appendModes(name(dst, "modes"), a)
	}
	if only.Has(Warnings) {
		dst = appendWarnings(name(dst, "warnings"), a)
	}
	if only.Has(Cautions) {
		dst = appendCautions(name(dst, "cautions"), a)
	}
	return append(dst, '}')
}

func appendHead(dst []byte, a *regime.Answer, only Fields) []byte {
	if only.Has(Digest) {
		dst = name(dst, "digest")
		if a.Case != nil {
			dst = text(dst, a.Case.Digest())
		} else {
			dst = append(dst, "null"...)
		}
	}
	if only.Has(Engine) {
		dst = append(name(dst, "engine"), '{')
		dst = member(dst, "version", Version)
		dst = member(dst, "catalogue", Catalogue())
		dst = append(dst, '}')
	}
	if only.Has(Title) {
		s, _ := textOf(a, kind.Title)
		dst = member(dst, "title", s)
	}
	if s, ok := textOf(a, kind.Reference); ok && only.Has(Reference) {
		dst = member(dst, "reference", s)
	}
	if only.Has(Kind) {
		dst = member(dst, "kind", a.Kind.Name)
	}
	return dst
}

func appendStudy(dst []byte, a *regime.Answer) []byte {
	dst = append(dst, `{"tolerance":{`...)
	dst = member(dst, "name", a.Tolerance.Name)
	dst = number(dst, "frequency", a.Tolerance.Frequency)
	dst = number(dst, "load", a.Tolerance.Load)
	dst = number(dst, "response", a.Tolerance.Response)
	dst = append(dst, `},"interest":[`...)
	for m := finding.Frequency; m <= finding.Scale; m++ {
		if a.Interest.Has(m) {
			dst = element(dst, m.String())
		}
	}
	dst = append(dst, ']')
	if ids := a.Picked.IDs(); ids != "" {
		dst = member(dst, "criterion", ids)
	}
	return append(dst, '}')
}

func appendScales(dst []byte, a *regime.Answer) []byte {
	dst = append(dst, '{')
	for id := range scale.Count {
		if !a.Scales.Has(id) {
			continue
		}
		v := a.Scales.Value(id)
		dst = append(comma(dst), scaleHeads[id]...)
		dst = number(dst, "value", v.X)
		dst = member(dst, "unit", v.Kind.SI())
		dst = member(dst, "origin", v.Origin.String())
		dst = member(dst, "note", v.Note)
		dst = append(dst, '}')
	}
	return append(dst, '}')
}

func appendGroups(dst []byte, a *regime.Answer) []byte {
	var w written
	dst = append(dst, '{')
	for id := range group.Count {
		if shownGroup(a.Groups, id) {
			dst = appendGroup(dst, a, id, &w)
		}
	}
	return append(dst, '}')
}

// written says where in the answer a scale stands already as a string, so that
// it can be copied: the same few make most groups.
type written [scale.Count]struct{ from, to int }

func appendGroup(dst []byte, a *regime.Answer, id group.ID, w *written) []byte {
	dst = append(comma(dst), groupHeads[id]...)
	dst = number(dst, "value", a.Groups.Get(id))
	dst = appendWith(name(dst, "with"), a, id, w)
	if b := groupBand(a, id); b != "" {
		dst = member(dst, "band", b)
	}
	dst = appendGroupQuantiles(dst, a, id)
	switch {
	case !a.Groups.Has(id):
		dst, start := open(name(dst, "because"))
		return append(seal(appendGroupReason(dst, a, id), start), '}')
	case a.Groups.State(id) == group.Adopted:
		dst = member(dst, "because", "Given as a group.")
	}
	return append(dst, '}')
}

// appendWith appends the scales that a group is made of, as people write them.
func appendWith(dst []byte, a *regime.Answer, id group.ID, w *written) []byte {
	dst = append(dst, '{')
	if f := formulaOf[id]; f != nil {
		for i, s := range f.From {
			if !a.Scales.Has(s) {
				continue
			}
			dst = name(dst, withKey(f.From, i))
			if at := w[s]; at.to > 0 {
				dst = append(dst, dst[at.from:at.to]...)
				continue
			}
			opened, start := open(dst)
			dst = seal(units.AppendFormat(opened, a.Scales.X(s), a.Scales.Value(s).Kind), start)
			w[s].from, w[s].to = start-1, len(dst)
		}
	}
	return append(dst, '}')
}

func appendSetup(dst []byte, a *regime.Answer) []byte {
	dst = append(dst, '{')
	for i := range a.Setup {
		f := &a.Setup[i]
		dst = append(name(dst, f.Row.ID), '{')
		dst = member(dst, "title", f.Row.Title)
		dst = number(dst, "value", f.Value)
		dst = member(dst, "unit", f.Row.Kind.SI())
		dst = member(dst, "rule", f.Row.Rule)
		var start int
		dst, start = open(name(dst, "source"))
		dst = seal(appendSource(dst, f.Row.Source), start)
		dst = append(flag(dst, "governs", f.Governs), '}')
	}
	return append(dst, '}')
}

func appendFrequencies(dst []byte, a *regime.Answer) []byte {
	var room [maxFrequencies]frequency
	wet := a.Scales.X(scale.FrequencyWet)
	dst = append(dst, '[')
	for _, f := range frequencies(room[:0], a) {
		dst = append(comma(dst), '{')
		dst = member(dst, "id", f.id)
		dst = member(dst, "title", f.title)
		dst = number(dst, "value", f.value)
		dst = member(dst, "unit", "Hz")
		dst = number(dst, "ratio_to_wet", f.value/wet)
		dst = append(dst, '}')
	}
	return append(dst, ']')
}

// appendModes lists the modes of a case that gives several.
func appendModes(dst []byte, a *regime.Answer) []byte {
	dst = append(dst, '[')
	for i := range a.Modes {
		m := &a.Modes[i]
		dst = append(comma(dst), '{')
		dst = number(dst, "mode", float64(m.Number))
		dst = number(dst, "frequency_dry", m.FrequencyDry)
		dst = number(dst, "frequency_wet", m.FrequencyWet)
		dst = member(dst, "unit", "Hz")
		dst = member(dst, "class", m.Class.ID)
		if m.Worst != nil {
			dst = member(dst, "finding", m.Worst.ID)
			dst = number(dst, "utilisation", m.Utilisation)
		}
		dst = append(dst, '}')
	}
	return append(dst, ']')
}

func appendWarnings(dst []byte, a *regime.Answer) []byte {
	dst = append(dst, '[')
	for i := range a.Warnings {
		w := &a.Warnings[i]
		dst = append(comma(dst), '{')
		dst = member(dst, "pointer", w.Pointer)
		dst = member(dst, "code", w.Code)
		dst = member(dst, "sentence", w.Sentence)
		dst = append(dst, '}')
	}
	return append(dst, ']')
}

func appendCautions(dst []byte, a *regime.Answer) []byte {
	dst = element(append(dst, '['), standingCaution)
	for i, e := range assumption.Catalogue {
		if e.Hazard != "" && isActive(&a.Findings[i]) {
			dst = element(dst, e.Hazard)
		}
	}
	return append(dst, ']')
}

// comma separates from what stands before, unless that opens an object or list.
func comma(dst []byte) []byte {
	switch dst[len(dst)-1] {
	case '{', '[':
		return dst
	}
	return append(dst, ',')
}

// name appends the name of a member. Names are plain ids or symbols.
func name(dst []byte, s string) []byte {
	dst = append(comma(dst), '"')
	dst = append(dst, s...)
	return append(dst, '"', ':')
}

func member(dst []byte, n, s string) []byte { return text(name(dst, n), s) }

func element(dst []byte, s string) []byte { return text(comma(dst), s) }

func flag(dst []byte, n string, b bool) []byte { return strconv.AppendBool(name(dst, n), b) }

func number(dst []byte, n string, x float64) []byte { return value(name(dst, n), x) }

// value appends a number in the shortest form, null where it is not finite.
func value(dst []byte, x float64) []byte {
	switch {
	case math.IsNaN(x) || math.IsInf(x, 0):
		return append(dst, "null"...)
	case x == math.Trunc(x) && math.Abs(x) < 1e15:
		return strconv.AppendInt(dst, int64(x), 10) // the same, and faster; never −0
	}
	if m := math.Abs(x); m < 1e-6 || m >= 1e15 {
		return strconv.AppendFloat(dst, x, 'e', -1, 64)
	}
	return strconv.AppendFloat(dst, x, 'f', -1, 64)
}

func text(dst []byte, s string) []byte {
	dst, start := open(dst)
	return seal(append(dst, s...), start)
}

// open begins a string, whose text is then appended as it is; seal ends it.
func open(dst []byte) (opened []byte, start int) {
	dst = append(dst, '"')
	return dst, len(dst)
}

// seal ends a string that was opened at start, and escapes its text where that
// is called for, which is rare.
func seal(dst []byte, start int) []byte {
	if isPlain(dst[start:]) {
		return append(dst, '"')
	}
	raw := string(dst[start:])
	return append(appendEscaped(dst[:start], raw), '"')
}

// isPlain reports whether a text may stand in a JSON string as it is. It looks
// at eight bytes at a time.
func isPlain(s []byte) bool {
	const (
		ones  = 0x0101010101010101
		highs = 0x8080808080808080
	)
	var beyond, all uint64 // bytes to escape, bytes beyond ASCII
	rest := s
	for ; len(rest) >= 8; rest = rest[8:] {
		x := binary.LittleEndian.Uint64(rest)
		quote, slash := x^('"'*ones), x^('\\'*ones)
		// A byte below n borrows from its high bit in x − n·ones, unless it had it.
		beyond |= ((x - ' '*ones) | (quote - ones) | (slash - ones)) &^ x
		all |= x
	}
	for _, c := range rest {
		if c < ' ' || c == '"' || c == '\\' {
			return false
		}
		all |= uint64(c)
	}
	if beyond&highs != 0 {
		return false
	}
	return all&highs == 0 || utf8.Valid(s)
}

func appendEscaped(dst []byte, s string) []byte {
	const hexadecimal = "0123456789abcdef"
	for _, r := range s { // what is no UTF-8 becomes U+FFFD
		switch {
		case r == '"' || r == '\\':
			dst = append(dst, '\\', byte(r))
		case r == '\n':
			dst = append(dst, '\\', 'n')
		case r == '\t':
			dst = append(dst, '\\', 't')
		case r < ' ':
			dst = append(dst, '\\', 'u', '0', '0', hexadecimal[r>>4], hexadecimal[r&15])
		default:
			dst = utf8.AppendRune(dst, r)
		}
	}
	return dst
}
