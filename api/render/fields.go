package render

import (
	"strings"

	"regimed/regime/input"
)

// Fields is a set of top-level members of the answer.
type Fields uint32

// The top-level members, in the order of the answer.
const (
	Digest Fields = 1 << iota
	Engine
	Title
	Reference
	Kind
	Study
	Scales
	Groups
	Findings
	Recommendation
	Uncertainty
	TurningPoints
	Setup
	Frequencies
	Modes
	Warnings
	Cautions

	fieldsEnd
)

// All is the whole answer.
const All = fieldsEnd - 1

var fieldNames = []string{"digest", "engine", "title", "reference", "kind", "study", "scales", "groups", "findings",
	"recommendation", "uncertainty", "turning_points", "setup", "frequencies", "modes", "warnings", "cautions"}

// FieldNames lists the top-level members by name, in the order of the answer.
func FieldNames() []string { return append([]string(nil), fieldNames...) }

// Has reports whether a member is in the set.
func (f Fields) Has(member Fields) bool { return f&member != 0 }

// Explored reports whether a member is in the set that exploring a case adds to.
func (f Fields) Explored() bool { return f.Has(Findings | TurningPoints) }

// UnknownFieldsError names the members that were asked for and do not exist.
type UnknownFieldsError struct {
	Names []string
	Near  [][]string // known names that differ least, one list a name
}

func (e *UnknownFieldsError) Error() string {
	var b strings.Builder
	for i, name := range e.Names {
		if i > 0 {
			b.WriteByte(' ')
		}
		if len(name) > 60 {
			name = "a long name"
		}
		b.WriteString("The answer has no member \"" + name + "\"")
		near := e.Near[i]
		if len(near) == 0 {
			b.WriteString("; it has " + strings.Join(fieldNames, ", ") + ".")
			continue
		}
		b.WriteString("; did you mean " + strings.Join(near, " or ") + "?")
	}
	return b.String()
}

// ParseFields reads a list of members. An empty list means the whole answer.
// Names that are not known come back in an [UnknownFieldsError].
func ParseFields(names []string) (Fields, error) {
	var set Fields
	var bad UnknownFieldsError
	for _, name := range names {
		name = strings.TrimSpace(name)
		if name == "" {
			continue
		}
		f := fieldOf(name)
		if f == 0 {
			bad.Names = append(bad.Names, name)
			bad.Near = append(bad.Near, input.Nearest(name, fieldNames))
		}
		set |= f
	}
	if len(bad.Names) > 0 {
		return 0, &bad
	}
	if set == 0 {
		return All, nil
	}
	return set, nil
}

func fieldOf(name string) Fields {
	for i, n := range fieldNames {
		if n == name {
			return 1 << i
		}
	}
	return 0
}
