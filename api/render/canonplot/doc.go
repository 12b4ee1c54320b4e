// Package canonplot draws a canonical solution over its range: one curve for each
// of its values, the limits that it is known to reach dashed, and below it what the
// lines mean and where the solution comes from. SVG or PNG.
package canonplot
