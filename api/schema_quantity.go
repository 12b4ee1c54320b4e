package api

import (
	"slices"
	"strconv"
	"strings"

	"regimed/regime/input"
	"regimed/units"
)

// Patterns of a quantity as text: a number before any letter, and where the
// quantity has a dimension a letter or sign of a unit after it. They let
// through what only the server can judge, and refuse nothing that it reads.
const (
	patternBare = `^[^0-9A-Za-z]*[0-9]`
	patternUnit = patternBare + "[\\s\\S]*[A-Za-z%‰°℃℉\u00b5\u03bc\u03a9\u2126]" // micro and ohm, each as sign and as letter
)

// quantity refers to the definition of a kind of quantity.
func (b *schemaBuilder) quantity(k units.Kind) OrderedMembers {
	return b.define(quantityName(k), func() OrderedMembers {
		bare := isBare(k)
		pattern := patternUnit
		if bare {
			pattern = patternBare
		}
		alternatives := []OrderedMembers{{{"type", "string"}, {"pattern", pattern}, {"maxLength", 300}}}
		if bare {
			alternatives = append(alternatives, OrderedMembers{{"type", "number"}, {"format", "double"}})
		}
		alternatives = append(alternatives, b.quantityValue(bare), b.quantityRange(bare))
		return OrderedMembers{
			{"title", plainTitle(k.String())},
			{"description", quantityText(k)},
			{"oneOf", alternatives},
			{"examples", quantityExamples(k)},
		}
	})
}

func quantityName(k units.Kind) string { return "Quantity" + camel(k.String()) }

// isBare reports whether a number without a unit is a quantity of the kind.
func isBare(k units.Kind) bool {
	_, err := units.FromNumber(1, k)
	return err == nil
}

func quantityText(k units.Kind) string {
	text := sentence(k.String()) + " A text with number and unit, as in \"" + k.Example() +
		"\", with ± or .. for an uncertain value; or an object with value and unit."
	if isBare(k) {
		return sentence(k.String()) + " A number; or a text, where % and ± or .. for an uncertain value may be used; or an object."
	}
	return text
}

// quantityValue refers to a quantity in parts: its value, unit and uncertainty.
func (b *schemaBuilder) quantityValue(bare bool) OrderedMembers {
	return b.parts(bare, "Value", "value in parts", "A value, alone or with one standard deviation: std, or percent of the value.", []string{"value"}, OrderedMembers{
		{"value", partSchema("The number, in the unit.")},
		{"std", partSchema("One standard deviation, in the unit.")},
		{"percent", partSchema("One standard deviation, in per cent of the value.")},
	})
}

// quantityRange refers to a quantity in parts: the two ends of a range.
func (b *schemaBuilder) quantityRange(bare bool) OrderedMembers {
	return b.parts(bare, "Range", "range in parts", "The two ends of a range, any value between them alike.", []string{"low", "high"}, OrderedMembers{
		{"low", partSchema("The lower end, in the unit.")},
		{"high", partSchema("The upper end, in the unit.")},
	})
}

func partSchema(doc string) OrderedMembers {
	return OrderedMembers{{"description", doc}, {"type", "number"}, {"format", "double"}}
}

// parts defines an object of numbers and a unit. Only a pure number may leave
// the unit out.
func (b *schemaBuilder) parts(bare bool, name, title, doc string, needed []string, numbers OrderedMembers) OrderedMembers {
	of := "Quantity"
	if bare {
		of = "Number"
	} else {
		needed = append(needed, "unit")
	}
	return b.define(of+name, func() OrderedMembers {
		unit := OrderedMembers{{"description", "The unit expression."}, {"type", "string"}, {"examples", []string{"mm", "kg/m3", "%"}}}
		return OrderedMembers{
			{"title", of + ", " + title},
			{"description", doc},
			{"type", "object"},
			{"properties", numbers.with("unit", unit)},
			{"required", needed},
			{"additionalProperties", false},
		}
	})
}

// quantityExamples are the two ways to write a typical quantity.
func quantityExamples(k units.Kind) []any {
	text := k.Example()
	number, unit, _ := strings.Cut(text, " ")
	x, err := strconv.ParseFloat(number, 64)
	if err != nil {
		return []any{text}
	}
	if unit == "" {
		return []any{x, text}
	}
	return []any{text, OrderedMembers{{"value", x}, {"unit", unit}}}
}

// examples are values that may stand in a field.
func examples(f *input.Field) []any {
	switch f.Type {
	case input.Quantity:
		return quantityExamples(f.Kind)[:1]
	case input.Number:
		return []any{exampleNumber(f.Rule, 0.05, 0.3, 1.4, 0.5, 2, 10, 100)}
	case input.Integer:
		return []any{exampleNumber(f.Rule, 1, 2, 3, 10, 0)}
	case input.Flag:
		return []any{true, false}
	case input.Choice:
		return []any{f.Options[0]}
	case input.Choices:
		return []any{f.Options[:min(2, len(f.Options))]}
	case input.Rows:
		return []any{[]any{exampleRow(f.Row)}}
	case input.Interval:
		return []any{[]string{"0 " + f.Kind.SI(), f.Kind.Example()}}
	}
	return []any{plainTitle(f.Name) + " of the case"}
}

// exampleNumber is the first candidate that the rule of a number allows.
func exampleNumber(rule string, candidates ...float64) float64 {
	for _, x := range candidates {
		if rule == "" || validate.Var(x, rule) == nil {
			return x
		}
	}
	return candidates[0]
}

// defaultOf is the default of a field where it is a value, and not a sentence.
func defaultOf(f *input.Field) (any, bool) {
	switch f.Type {
	case input.Quantity:
		_, err := units.Parse(f.Default, f.Kind)
		return f.Default, err == nil
	case input.Number, input.Integer:
		x, err := strconv.ParseFloat(f.Default, 64)
		return x, err == nil
	case input.Flag:
		x, err := strconv.ParseBool(f.Default)
		return x, err == nil
	case input.Choice:
		return f.Default, slices.Contains(f.Options, f.Default)
	case input.Choices:
		names := strings.Split(f.Default, ", ")
		for _, n := range names {
			if !slices.Contains(f.Options, n) {
				return nil, false
			}
		}
		return names, true
	}
	return nil, false
}

// exampleRow is an example of an object in a list: its first field, and the
// first pure number.
func exampleRow(row *input.Block) OrderedMembers {
	o := OrderedMembers{{row.Fields[0].Name, examples(row.Fields[0])[0]}}
	for _, f := range row.Fields {
		if f.Type == input.Number {
			return append(o, Member{f.Name, examples(f)[0]})
		}
	}
	return o
}

// serviceRange is a range that is meant as one of operation.
func serviceRange() OrderedMembers {
	return OrderedMembers{
		{"title", "Range of operation"},
		{"description", "The lowest and the highest value in service."},
		{"type", "object"},
		{"properties", OrderedMembers{
			{"low", partSchema("The lowest value, in the unit.")},
			{"high", partSchema("The highest value, in the unit.")},
			{"unit", OrderedMembers{{"description", "The unit expression."}, {"type", "string"}, {"examples", []string{"m/s"}}}},
			{"as", OrderedMembers{{"description", "What the range means."}, {"type", "string"}, {"const", "range"}}},
		}},
		{"required", []string{"low", "high", "unit", "as"}},
		{"additionalProperties", false},
	}
}
