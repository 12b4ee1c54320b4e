// Package cite is the bibliography as data: a source is named once, here, and
// everything that rests on it refers to it.
package cite

// Source is one work, with what a reader needs to find the place in it.
type Source struct {
	ID      string `json:"id"`      // short and stable: "stokes-1851"
	Short   string `json:"short"`   // the form that a sentence carries: "Stokes 1851"
	Full    string `json:"full"`    // authors, title, journal or publisher, edition, year
	Locator string `json:"locator"` // page, equation, clause or table that is used; may be empty
	// Memory is true where the content was written down from memory of the
	// work and not read in it again; an answer that uses it says so.
	Memory bool `json:"from_memory"`
}

// All lists every source, in the order of the files of this package.
func All() []*Source {
	var all []*Source
	for _, list := range [][]*Source{stillFluid, flow, structures, fluids, standards, method, assumptions, internalFlow} {
		all = append(all, list...)
	}
	return all
}

// ByID finds a source by its id, or returns nil.
func ByID(id string) *Source {
	for _, s := range All() {
		if s.ID == id {
			return s
		}
	}
	return nil
}
