package api

import (
	"slices"
	"strconv"
	"strings"
	"sync"

	"github.com/go-json-experiment/json"
	"github.com/go-json-experiment/json/jsontext"

	"regimed/regime/input"
	"regimed/regime/kind"
	"regimed/units"
)

// CaseSchema is the JSON Schema (2020-12) of a case, made from the same fields
// as decoding. It is for editors and generators: it describes which fields
// there are and how they look; whether the values make sense together is for
// the server to say.
func CaseSchema() []byte { return slices.Clone(caseSchema()) }

var caseSchema = sync.OnceValue(func() []byte {
	b := schemaBuilder{prefix: "#/$defs/"}
	root := OrderedMembers{
		{"$schema", "https://json-schema.org/draft/2020-12/schema"},
		{"$id", "urn:regimed:schema:case"},
	}
	root = append(root, b.kase(kind.Schema())...)
	root = root.with("$defs", b.defs)
	data, err := json.Marshal(root, jsontext.WithIndent("  "))
	if err != nil {
		panic("api: schema: " + err.Error()) // text and whole numbers only
	}
	return append(data, '\n')
})

// CaseComponents are the schemas of a case as components of an OpenAPI
// document, the case itself under the name Case.
func CaseComponents() OrderedMembers {
	b := schemaBuilder{prefix: "#/components/schemas/", discriminator: true}
	kase := b.kase(kind.Schema())
	return append(OrderedMembers{{"Case", kase}}, b.defs...)
}

// schemaBuilder collects definitions while it describes a case.
type schemaBuilder struct {
	prefix        string // of references to definitions
	discriminator bool   // say which property tells the kinds apart, as OpenAPI does
	defs          OrderedMembers
}

// define adds a definition, once, and returns a reference to it.
func (b *schemaBuilder) define(name string, make func() OrderedMembers) OrderedMembers {
	if !slices.ContainsFunc(b.defs, func(m Member) bool { return m.Name == name }) {
		at := len(b.defs)
		b.defs = b.defs.with(name, nil) // its place comes before what it refers to
		b.defs[at].Value = make()
	}
	return OrderedMembers{{"$ref", b.prefix + name}}
}

// kase describes the whole case.
func (b *schemaBuilder) kase(s *input.Schema) OrderedMembers {
	properties := OrderedMembers{}
	for _, f := range s.Top.Fields {
		properties = properties.with(f.Name, b.field(f))
	}
	properties = properties.with("structure", b.structure(s))
	for _, block := range s.Blocks {
		properties = properties.with(block.Name, b.blockOrName(block))
	}
	o := OrderedMembers{
		{"title", s.Top.Title},
		{"description", sentence(s.Top.Doc)},
		{"type", "object"},
		{"properties", properties},
		{"required", []string{"structure"}},
	}
	return o.with("additionalProperties", false)
}

// structure describes the structure: one alternative a kind.
func (b *schemaBuilder) structure(s *input.Schema) OrderedMembers {
	var alternatives []OrderedMembers
	mapping := OrderedMembers{}
	for _, k := range s.Kinds {
		ref := b.define("Structure"+camel(k.Name), func() OrderedMembers { return b.block(k, true) })
		alternatives = append(alternatives, ref)
		mapping = mapping.with(k.Name, ref[0].Value)
	}
	o := OrderedMembers{
		{"description", "The structure: its kind, and the fields of that kind."},
		{"oneOf", alternatives},
	}
	if b.discriminator {
		o = o.with("discriminator", OrderedMembers{{"propertyName", "kind"}, {"mapping", mapping}})
	}
	return o
}

// blockOrName describes a block, and the name that may stand in its place.
func (b *schemaBuilder) blockOrName(block *input.Block) OrderedMembers {
	ref := b.define(camel(block.Name), func() OrderedMembers { return b.block(block, false) })
	if block.Shorthand == nil {
		return ref
	}
	return OrderedMembers{
		{"description", sentence(block.Doc)},
		{"oneOf", []OrderedMembers{b.field(block.Shorthand), ref}},
	}
}

// block describes an object of fields.
func (b *schemaBuilder) block(block *input.Block, isKind bool) OrderedMembers {
	properties, required := OrderedMembers{}, []string{}
	if isKind {
		properties = properties.with("kind", OrderedMembers{
			{"description", sentence(block.Title)}, {"type", "string"}, {"const", block.Name}, {"examples", []string{block.Name}}})
		required = append(required, "kind")
	}
	for _, f := range block.Fields {
		properties = properties.with(f.Name, b.field(f))
		if f.Needed {
			required = append(required, f.Name)
		}
	}
	o := OrderedMembers{
		{"title", block.Title},
		{"description", sentence(block.Doc)},
		{"type", "object"},
		{"properties", properties},
	}
	if len(required) > 0 {
		o = o.with("required", required)
	}
	return o.with("additionalProperties", false)
}

// field describes one field.
func (b *schemaBuilder) field(f *input.Field) OrderedMembers {
	o := b.shape(f)
	if name := plainTitle(f.Name); f.Type != input.Choice {
		o = append(OrderedMembers{{"title", name}}, o...)
	}
	o = o.with("description", b.fieldText(f))
	if d, ok := defaultOf(f); ok {
		o = o.with("default", d)
	}
	return o.with("examples", examples(f))
}

// shape describes what a field holds. Bounds beside a reference concern bare
// numbers only: of a text with a unit a schema can't know the value.
func (b *schemaBuilder) shape(f *input.Field) OrderedMembers {
	switch f.Type {
	case input.Quantity:
		if f.Service != nil {
			return OrderedMembers{{"anyOf", []OrderedMembers{b.quantity(f.Kind), serviceRange()}}}
		}
		return b.quantity(f.Kind)
	case input.Number:
		return append(b.quantity(units.Dimensionless), bounds(f.Rule)...)
	case input.Integer:
		return append(OrderedMembers{{"type", "integer"}}, bounds(f.Rule)...)
	case input.Flag:
		return OrderedMembers{{"type", "boolean"}}
	case input.Choice:
		return OrderedMembers{{"type", "string"}, {"enum", f.Options}}
	case input.Choices:
		return OrderedMembers{{"type", "array"}, {"items", OrderedMembers{{"type", "string"}, {"enum", f.Options}}}}
	case input.Interval:
		return OrderedMembers{{"type", "array"}, {"items", b.quantity(f.Kind)}, {"minItems", 2}, {"maxItems", 2}}
	}
	if f.Type == input.Rows {
		return OrderedMembers{{"type", "array"}, {"items", b.block(f.Row, false)}, {"minItems", 1}, {"maxItems", 50}}
	}
	return append(OrderedMembers{{"type", "string"}}, lengths(f.Rule)...)
}

// fieldText is the description of a field: what it is, its range, and what is
// assumed without it.
func (b *schemaBuilder) fieldText(f *input.Field) string {
	text := sentence(f.Doc)
	if r := fieldRecord(f); r.Rule != "" {
		text += " Must be " + r.Rule + "."
	}
	if f.Type == input.Text && f.Rule != "" {
		text = sentence(f.Doc) + " " + sentence(fieldRecord(f).Rule)
	}
	if f.Default != "" {
		text += " Default: " + f.Default + "."
	}
	return text
}

// bounds turns the rule of a number into keywords.
func bounds(rule string) OrderedMembers {
	keywords := map[string]string{"gt": "exclusiveMinimum", "gte": "minimum", "lt": "exclusiveMaximum", "lte": "maximum", "min": "minimum", "max": "maximum"}
	return ruled(rule, keywords)
}

// lengths turns the rule of a text into keywords.
func lengths(rule string) OrderedMembers {
	return ruled(rule, map[string]string{"min": "minLength", "max": "maxLength"})
}

func ruled(rule string, keywords map[string]string) OrderedMembers {
	var o OrderedMembers
	for tag := range strings.SplitSeq(rule, ",") {
		name, bound, _ := strings.Cut(tag, "=")
		x, err := strconv.ParseFloat(bound, 64)
		if keyword := keywords[name]; keyword != "" && err == nil {
			o = o.with(keyword, x)
		}
	}
	return o
}

// sentence writes a phrase as a sentence.
func sentence(phrase string) string {
	if phrase == "" {
		return ""
	}
	s := strings.ToUpper(phrase[:1]) + phrase[1:]
	if strings.HasSuffix(s, ".") {
		return s
	}
	return s + "."
}

// plainTitle is the title of a field: its name with spaces.
func plainTitle(name string) string {
	return strings.TrimSuffix(sentence(strings.ReplaceAll(name, "_", " ")), ".")
}

// camel is a name as a component has it: tube_array becomes TubeArray.
func camel(name string) string {
	var b strings.Builder
	for part := range strings.FieldsFuncSeq(name, func(r rune) bool { return r == '_' || r == '-' || r == ' ' }) {
		b.WriteString(strings.ToUpper(part[:1]) + part[1:])
	}
	return b.String()
}
