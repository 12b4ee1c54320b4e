// Package solid gives typical properties of named materials at room
// temperature.
//
// The values are typical and marked as such: a grade, a direction or a
// temperature can be tens of percent away, most of all for plastics, rubbers,
// laminates and tissue. All quantities are in SI units.
package solid
