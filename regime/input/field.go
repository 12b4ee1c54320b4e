// Package input reads cases: what the caller said, checked for units and
// plausible range, in SI, with its uncertainty. Fields are data: from one
// description follow decoding, violations, the JSON Schema, the catalogue and
// the help texts.
package input

import "regimed/units"

// Type says what a field holds.
type Type uint8

// The types of field.
const (
	Quantity Type = iota // a number with a unit
	Number               // a pure number
	Integer
	Flag   // true or false
	Text   // free text
	Choice // one of a list of names
	Choices
	Interval // lowest and highest of a quantity
	Rows     // a list of objects with fields of their own
)

// Field describes one field of a case.
type Field struct {
	Name    string
	Type    Type
	Kind    units.Kind // of a Quantity or Interval
	Doc     string     // one line for help texts, schema and form
	Default string     // what is assumed when it is not given, for people; may be empty
	Rule    string     // rule of the validator package for the number, in SI: "gt=0"
	Options []string   // names of a Choice
	Needed  bool       // a case without it is refused
	Of      string     // block; filled in by the schema: "structure"
	Row     *Block     // fields of each object of Rows
	Service *Field     // the Interval that a range marked "as": "range" stands for; may be nil
}

// Pointer is the JSON Pointer of the field (RFC 6901).
func (f *Field) Pointer() string {
	if f.Of == "" {
		return "/" + f.Name
	}
	return "/" + f.Of + "/" + f.Name
}

// Path is the dotted path of the field: "structure.diameter".
func (f *Field) Path() string {
	if f.Of == "" {
		return f.Name
	}
	return f.Of + "." + f.Name
}

// Block is an object of fields inside a case.
type Block struct {
	Name      string
	Title     string
	Doc       string
	Fields    []*Field
	Shorthand *Field // field that a bare string stands for; may be nil
}

// Find returns the field of that name, or nil.
func (b *Block) Find(name string) *Field {
	for _, f := range b.Fields {
		if f.Name == name {
			return f
		}
	}
	return nil
}

// Schema is everything that a case may contain.
type Schema struct {
	Top    *Block   // the fields of the case itself
	Kinds  []*Block // the structure, one block a kind; the block's name is the kind's
	Blocks []*Block // the other objects
}

// NewSchema ties fields to their blocks.
func NewSchema(top *Block, kinds, blocks []*Block) *Schema {
	for _, b := range kinds {
		for _, f := range b.Fields {
			f.Of = "structure"
		}
	}
	for _, b := range blocks {
		for _, f := range b.Fields {
			f.Of = b.Name
		}
	}
	return &Schema{Top: top, Kinds: kinds, Blocks: blocks}
}

// Kind returns the block of a structure kind, or nil.
func (s *Schema) Kind(name string) *Block {
	for _, b := range s.Kinds {
		if b.Name == name {
			return b
		}
	}
	return nil
}

// Block returns the block of that name, or nil.
func (s *Schema) Block(name string) *Block {
	for _, b := range s.Blocks {
		if b.Name == name {
			return b
		}
	}
	return nil
}
