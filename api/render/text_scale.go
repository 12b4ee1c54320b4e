package render

import (
	"fmt"
	"math"
	"strings"

	"regimed/regime/group"
	"regimed/regime/similar"
	"regimed/units"
)

// AppendScaling appends a scaling as a page for people: what can be kept first,
// then the factors, then the model and what it does otherwise than the prototype.
func AppendScaling(dst []byte, s *similar.Scaling, o TextOptions) []byte {
	p := newPage(dst, o)
	p.scalingHead(s)
	for i := range s.Exclusions {
		p.exclusion(s, &s.Exclusions[i])
	}
	p.factors(s)
	p.rules(s)
	p.scaledQuantities(s)
	p.scaledFields(s)
	p.judgedModel(s)
	return p.dst
}

func (p *page) scalingHead(s *similar.Scaling) {
	p.room = append(append(p.room[:0], "Model "...), similar.Ratio(s.Factors[similar.Length].Value)...)
	var held, gone []string
	for _, k := range s.Groups {
		if k.Held {
			held = append(held, group.Of(k.Group).Title)
		} else {
			gone = append(gone, group.Of(k.Group).Title)
		}
	}
	switch {
	case len(s.Groups) == 0:
		p.room = append(p.room, ": no group was asked to be kept."...)
	case len(gone) == 0:
		p.room = append(append(append(p.room, " that keeps "...), and(held)...), '.')
	default:
		p.room = append(append(append(p.room, ": not all groups can be kept. Kept: "...), and(held)...), "; let go: "...)
		p.room = append(append(p.room, and(gone)...), '.')
	}
	p.wrap(strong, "", p.room)
	p.blank()
	p.compared("Prototype: ", s.Prototype)
}

func and(list []string) string {
	if len(list) < 2 {
		return strings.Join(list, "")
	}
	return strings.Join(list[:len(list)-1], ", ") + " and " + list[len(list)-1]
}

// exclusion shows a set of groups that exclude each other, and the ways out.
func (p *page) exclusion(s *similar.Scaling, x *similar.Exclusion) {
	var titles []string
	for _, d := range x.Groups {
		titles = append(titles, group.Of(d.Group).Title)
	}
	var with []string
	for _, m := range x.Remedies {
		with = append(with, similar.FactorOf(m.Factor).Title+" "+heldAt(m.Now, m.Factor))
	}
	if len(titles) == 1 {
		p.heading(titles[0] + " cannot be kept")
	} else {
		p.heading(and(titles) + " exclude each other")
	}
	if len(with) > 0 {
		p.wrap(plain, "  ", []byte("With "+and(with)+":"))
	}
	for _, d := range x.Groups {
		others := ""
		if len(x.Groups) > 1 {
			others = " if the others are kept"
			if len(x.Groups) == 2 {
				others = " if the other is kept"
			}
		}
		p.wrap(yellow, "  - ", []byte(fmt.Sprintf("the %s is %s (%s)%s.", group.Of(d.Group).Title, changed(d.Factor), d.Powers.Formula(), others)))
	}
	p.line(plain, "  They would go together with one of these:")
	for _, m := range x.Remedies {
		p.wrap(plain, "  - ", p.remedy(s, m))
	}
}

// heldAt says what a factor is held at.
func heldAt(now float64, f similar.Factor) string {
	switch {
	case now == 1:
		return "unchanged"
	case f == similar.Length:
		return "at " + similar.Ratio(now)
	}
	return "at " + fourDigits(now)
}

func (p *page) remedy(s *similar.Scaling, m similar.Remedy) []byte {
	title := similar.FactorOf(m.Factor).Title
	if m.Factor == similar.Length {
		return []byte(fmt.Sprintf("%s at %s.", title, similar.Ratio(m.Needed)))
	}
	said := fmt.Sprintf("%s %s than it is: a factor of %s, %s", title, changed(m.Change), fourDigits(m.Needed), m.Powers.Formula())
	if x, k, known := s.Property(m.Factor); known {
		said += fmt.Sprintf(" (%s against %s)", units.Format(x*m.Needed, k), units.Format(x, k))
	}
	return []byte(said + ".")
}

func (p *page) factors(s *similar.Scaling) {
	p.heading("Scale factors, model over prototype")
	t := &grid{heads: []string{"", "factor", "of what is given", "", ""}}
	for i := range s.Factors {
		f := &s.Factors[i]
		if f.Factor == similar.HeatCapacityRatio && (f.Value == 1 || math.IsNaN(f.Value)) {
			continue
		}
		why := map[similar.Origin]string{similar.Given: "given", similar.Unchanged: "unchanged", similar.OfFluids: "by the two fluids",
			similar.Follows: "follows", similar.Assumed: "assumed", similar.Unknown: "not known of both fluids"}[f.Origin]
		s := plain
		if f.Origin == similar.Unchanged || f.Origin == similar.Unknown {
			s = dim
		}
		formula := f.Powers.Formula()
		if f.Origin == similar.Given || f.Origin == similar.Unknown {
			formula = ""
		}
		d := similar.FactorOf(f.Factor)
		t.add(s, d.Symbol, fourDigits(f.Value), formula, why, d.Title)
	}
	p.grid(t)
}

func (p *page) rules(s *similar.Scaling) {
	if len(s.Rules) == 0 {
		return
	}
	p.heading("Assumed, since nothing given or kept decides it")
	for _, r := range s.Rules {
		p.room = append(p.room[:0], r.Sentence...)
		p.wrap(yellow, "  - ", p.room)
	}
}

func (p *page) scaledQuantities(s *similar.Scaling) {
	p.heading("What follows")
	t := &grid{heads: []string{"", "factor", "of what is given", "rests on"}}
	for i := range s.Quantities {
		q := &s.Quantities[i]
		var rests []string
		for _, f := range q.Rests {
			rests = append(rests, similar.FactorOf(f).Symbol)
		}
		formula := q.Powers.Formula()
		if math.IsNaN(q.Value) {
			formula = ""
		}
		t.add(plain, q.Title, fourDigits(q.Value), formula, strings.Join(rests, ", "))
	}
	p.grid(t)
}

func (p *page) scaledFields(s *similar.Scaling) {
	if len(s.Model.Fields) == 0 {
		return
	}
	p.heading("The model")
	t := &grid{heads: []string{"", "prototype", "model", "factor"}}
	for i := range s.Model.Fields {
		f := &s.Model.Fields[i]
		t.add(plain, f.Place.Path(), units.Format(f.Prototype, f.Kind), units.Format(f.Model, f.Kind), fourDigits(f.Model/f.Prototype))
	}
	p.grid(t)
}

// judgedModel shows what the engine makes of the model.
func (p *page) judgedModel(s *similar.Scaling) {
	if len(s.Model.Violations) > 0 {
		p.heading("The model cannot be judged")
		for _, v := range s.Model.Violations {
			p.wrap(red, "  - ", []byte(v.Pointer+": "+v.Sentence))
		}
	}
	if len(s.Groups) > 0 && s.Comparison != nil {
		p.heading("Kept, as judged")
		t := &grid{heads: []string{"", "model/prototype", ""}}
		for _, k := range s.Groups {
			t.add(keptStyle(k), group.Of(k.Group).Symbol, fourDigits(k.Judged), group.Of(k.Group).Title+keptSaid(k))
		}
		p.grid(t)
	}
	if len(s.Notes) > 0 {
		p.heading("Notes")
		for _, n := range s.Notes {
			said := n.Sentence
			if n.Pointer != "" {
				said = n.Pointer + ": " + said
			}
			p.wrap(yellow, "  - ", []byte(said))
		}
	}
	if c := s.Comparison; c != nil {
		p.heading("Model against prototype: " + agreement(c))
		p.compared("  prototype  ", c.A)
		p.compared("  model      ", c.B)
		p.differences(c, "prototype", "model")
	}
}

func keptStyle(k similar.KeptGroup) style {
	if k.Held {
		return plain
	}
	return red
}

func keptSaid(k similar.KeptGroup) string {
	switch {
	case !k.Held:
		return ", let go: by the scales " + changed(k.Factor)
	case math.IsNaN(k.Judged):
		return ", which does not arise in the case"
	case k.Factor != 1:
		return ", not exactly: by the scales " + changed(k.Factor)
	}
	return ""
}
