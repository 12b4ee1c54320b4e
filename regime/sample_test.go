package regime_test

import (
	"bytes"
	"encoding/json"
	"math"
	"strconv"
	"strings"

	"regimed/regime"
	"regimed/regime/input"
	"regimed/regime/kind"
	"regimed/units"
)

// sample is a case before it is written down: what is given, in SI.
type sample struct {
	kind  string
	given []entry
}

// entry is one field of a sample.
type entry struct {
	f      *input.Field
	x      float64    // Quantity, Number and Integer
	ends   [2]float64 // Interval
	text   string     // Text, Choice
	list   []string   // Choices
	rows   [][]entry  // Rows
	flag   bool
	gauge  bool    // an absolute pressure to be written as a gauge pressure
	spread float64 // standard deviation over the value; 0: certain
}

// field finds a field by its dotted path; that of the structure by the kind.
func field(kindName, path string) *input.Field {
	block, name, nested := strings.Cut(path, ".")
	s := kind.Schema()
	switch {
	case !nested:
		return s.Top.Find(path)
	case block == "structure":
		return s.Kind(kindName).Find(name)
	default:
		return s.Block(block).Find(name)
	}
}

// at returns the place of a path in the sample, or −1.
func (s *sample) at(path string) int {
	for i := range s.given {
		if s.given[i].f.Path() == path {
			return i
		}
	}
	return -1
}

func (s *sample) has(path string) bool { return s.at(path) >= 0 }

// put gives a field, in place of what was given before.
func (s *sample) put(path string, e entry) {
	e.f = field(s.kind, path)
	if e.f == nil {
		panic("no field " + path + " of a " + s.kind)
	}
	if i := s.at(path); i >= 0 {
		s.given[i] = e
		return
	}
	s.given = append(s.given, e)
}

func (s *sample) drop(path string) {
	if i := s.at(path); i >= 0 {
		s.given = append(s.given[:i:i], s.given[i+1:]...)
	}
}

// number returns what was given for a field, NaN where nothing was.
func (s *sample) number(path string) float64 {
	if i := s.at(path); i >= 0 {
		return s.given[i].x
	}
	return math.NaN()
}

func (s *sample) word(path string) string {
	if i := s.at(path); i >= 0 {
		return s.given[i].text
	}
	return ""
}

func (s *sample) clone() *sample {
	return &sample{kind: s.kind, given: append([]entry(nil), s.given...)}
}

// speller writes one quantity as JSON.
type speller func(e *entry, k units.Kind, x float64) string

// document writes the sample as a case, block by block.
func (s *sample) document(spell speller) []byte {
	var top, rest []string
	blocks := map[string][]string{"structure": {`"kind":` + quoted(s.kind)}}
	order := []string{"structure"}
	for i := range s.given {
		e := &s.given[i]
		member := quoted(e.f.Name) + ":" + e.spell(spell)
		if e.f.Of == "" {
			top = append(top, member)
			continue
		}
		if _, ok := blocks[e.f.Of]; !ok {
			order = append(order, e.f.Of)
		}
		blocks[e.f.Of] = append(blocks[e.f.Of], member)
	}
	for _, name := range order {
		rest = append(rest, quoted(name)+":{"+strings.Join(blocks[name], ",")+"}")
	}
	return []byte("{" + strings.Join(append(top, rest...), ",") + "}")
}

func (e *entry) spell(spell speller) string {
	switch e.f.Type {
	case input.Quantity:
		return spell(e, e.f.Kind, e.x)
	case input.Interval:
		return "[" + spell(e, e.f.Kind, e.ends[0]) + "," + spell(e, e.f.Kind, e.ends[1]) + "]"
	case input.Number, input.Integer:
		return decimal(e.x)
	case input.Rows:
		return e.spellRows(spell)
	case input.Flag:
		return strconv.FormatBool(e.flag)
	case input.Choices:
		b, _ := json.Marshal(e.list)
		return string(b)
	default:
		return quoted(e.text)
	}
}

func (e *entry) spellRows(spell speller) string {
	var objects []string
	for _, row := range e.rows {
		var members []string
		for i := range row {
			members = append(members, quoted(row[i].f.Name)+":"+row[i].spell(spell))
		}
		objects = append(objects, "{"+strings.Join(members, ",")+"}")
	}
	return "[" + strings.Join(objects, ",") + "]"
}

func quoted(s string) string { return strconv.Quote(s) }

// decimal is the shortest decimal that reads back as the same number.
func decimal(x float64) string { return strconv.FormatFloat(x, 'g', -1, 64) }

// inSI writes objects in SI.
func inSI(_ *entry, k units.Kind, x float64) string {
	return `{"value":` + decimal(x) + `,"unit":` + quoted(k.SI()) + `}`
}

// asAnalystsWrite writes strings and objects by turns, some with an uncertainty,
// and gauge pressures where the sample says so.
func asAnalystsWrite(e *entry, k units.Kind, x float64) string {
	n := len(e.f.Name)
	switch {
	case e.gauge:
		return quoted(decimal(x) + " Pag")
	case e.spread > 0 && n%3 == 0:
		return `{"value":` + decimal(x) + `,"std":` + decimal(x*e.spread) + `,"unit":` + quoted(k.SI()) + `}`
	case e.spread > 0 && n%3 == 1:
		return quoted(decimal(x) + " " + k.SI() + " +- " + decimal(100*e.spread) + " %")
	case n%2 == 0:
		return quoted(decimal(x) + " " + k.SI())
	default:
		return inSI(e, k, x)
	}
}

// classify reads a document and classifies it. It returns no answer where the
// case was refused.
func classify(doc []byte) (*regime.Answer, []input.Violation, error) {
	c, bad, err := input.Decode(doc, kind.Schema())
	if err != nil || len(bad) > 0 {
		return nil, bad, err
	}
	a, bad := regime.Classify(c)
	return a, bad, nil
}

// pretty indents a document for a failure message.
func pretty(doc []byte) string {
	var b bytes.Buffer
	if json.Indent(&b, doc, "", " ") != nil {
		return string(doc)
	}
	return b.String()
}
