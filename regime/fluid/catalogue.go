package fluid

import "slices"

// catalogue is every fluid, in the order in which it is shown.
var catalogue = slices.Concat(
	one(water),
	one(seawater),
	one(air),
	one(steam),
	one(nitrogen),
	one(helium),
	one(hydrogen),
	one(methane),
	one(carbonDioxide),
	one(argon),
	oils,
	one(glycol),
	one(blood),
	one(mercury),
	one(sodium),
	one(leadBismuth),
)

func one(m *Model) []*Model { return []*Model{m} }

// All lists the models in the order of the catalogue.
func All() []*Model { return slices.Clone(catalogue) }

// Find returns the model of that name, or nil.
func Find(name string) *Model {
	for _, m := range catalogue {
		if m.Name == name {
			return m
		}
	}
	return nil
}

// Names lists the names in the order of the catalogue.
func Names() []string {
	names := make([]string, len(catalogue))
	for i, m := range catalogue {
		names[i] = m.Name
	}
	return names
}
