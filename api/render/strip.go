package render

import (
	"bytes"
	"fmt"
	"strings"

	"regimed/api/render/marginchart"
	"regimed/regime"
	"regimed/regime/finding"
	"regimed/units"
)

// Measures of the strip, in pixels.
const (
	stripWidth  = 640
	stripHeight = 64
	stripMargin = 14
)

// AppendStrip appends the answer as a strip of SVG, 640 by 64: title and digest,
// the recommended class, and the finding that stands worst.
func AppendStrip(dst []byte, a *regime.Answer) []byte {
	const family = "Liberation Sans, Arial, Helvetica, sans-serif"
	room := float64(stripWidth - 2*stripMargin)
	worst, verdict := worstText(a)
	digest := ""
	if a.Case != nil {
		digest = a.Case.Digest()[:12]
	}
	class := strings.TrimSuffix(recommendedText(a), ".")
	var b bytes.Buffer
	fmt.Fprintf(&b, `<svg xmlns="http://www.w3.org/2000/svg" width="%d" height="%d" viewBox="0 0 %d %d" role="img" aria-label="%s" font-family="%s">`,
		stripWidth, stripHeight, stripWidth, stripHeight, marginchart.Escape(subjectOf(a)+". "+class+". "+worst+"."), family)
	fmt.Fprintf(&b, `<rect x="0.5" y="0.5" width="%d" height="%d" rx="5" fill="#ffffff" stroke="#c9ced4"/>`, stripWidth-1, stripHeight-1)
	fmt.Fprintf(&b, `<rect x="1" y="1" width="5" height="%d" fill="%s"/>`, stripHeight-2, marginchart.Colour(verdict))
	say := func(x, y, size float64, colour, extra, s string) {
		fmt.Fprintf(&b, `<text x="%g" y="%g" font-size="%g" fill="%s"%s>%s</text>`, x, y, size, colour, extra, marginchart.Escape(s))
	}
	say(stripMargin, 19, 11, "#5a6068", "", marginchart.Clip(subjectOf(a), 11, false, room-110))
	say(stripWidth-stripMargin, 19, 11, "#5a6068", ` text-anchor="end"`, digest)
	say(stripMargin, 37, 14, "#1c1f23", ` font-weight="bold"`, marginchart.Clip(class, 14, true, room))
	say(stripMargin, 54, 11, marginchart.Colour(verdict), "", marginchart.Clip(verdictSign(verdict)+" "+worst, 11, false, room))
	b.WriteString("</svg>\n")
	return append(dst, b.Bytes()...)
}

// worstText names the finding of the recommended class that stands worst: what is
// not determined, else what is most loaded.
func worstText(a *regime.Answer) (string, finding.Verdict) {
	var worst *finding.Finding
	name := ""
	for _, e := range a.Recommendation.Class.RestsOn {
		f := &a.Findings[e.Index()]
		if f.Main() != nil && f.OfInterest && (worst == nil || f.WorseThan(worst)) {
			worst, name = f, e.ID
		}
	}
	if worst == nil {
		return "The class rests on no assumption that could fail here", finding.Valid
	}
	dst := append(append([]byte(name), ' '), worst.Verdict.String()...)
	if u, ok := worst.Utilisation(); ok {
		dst = append(dst, ", at "...)
		dst = append(units.AppendNumber(dst, u, digits), " of its limit"...)
	} else {
		dst = append(dst, ": "...)
		dst = appendMissing(dst, a, worst)
	}
	return string(dst), worst.Verdict
}
