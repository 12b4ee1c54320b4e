// Package criterion records the screens that codes and standards set. A
// criterion is one record; the physical model decides unless a case picks one.
package criterion

import "regimed/regime/finding"

// All lists the criteria, in the order of their assumptions. Ids are
// append-only.
var All = []*finding.Criterion{
	asmeN1324, dnvC205, en199114, ptc193,
	enGalloping, enDivergence,
	pettigrewTaylor, asmeN1331Lower, asmeN1331Mean, connors,
	dnvC205Slender, api650Convective, api650Period, api650Freeboard,
	asmeB314,
}

// Find returns the criterion of that id, or nil.
func Find(id string) *finding.Criterion {
	for _, c := range All {
		if c.ID == id {
			return c
		}
	}
	return nil
}

// Names lists the ids of the criteria that a field of a case can pick.
func Names(field string) []string {
	var names []string
	for _, c := range All {
		if c.Field == field {
			names = append(names, c.ID)
		}
	}
	return names
}
