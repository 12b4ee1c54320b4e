package api

import (
	"github.com/go-json-experiment/json"
	"github.com/go-json-experiment/json/jsontext"
)

// Member is a name with its value.
type Member struct {
	Name  string
	Value any
}

// OrderedMembers is a JSON object whose members keep their order.
type OrderedMembers []Member

// MarshalJSONTo writes the object.
func (o OrderedMembers) MarshalJSONTo(enc *jsontext.Encoder) error {
	if err := enc.WriteToken(jsontext.BeginObject); err != nil {
		return err
	}
	for _, m := range o {
		if err := enc.WriteToken(jsontext.String(m.Name)); err != nil {
			return err
		}
		if err := json.MarshalEncode(enc, m.Value); err != nil {
			return err
		}
	}
	return enc.WriteToken(jsontext.EndObject)
}

// with returns the object with a member added.
func (o OrderedMembers) with(name string, value any) OrderedMembers {
	return append(o, Member{name, value})
}
