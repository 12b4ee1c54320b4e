// Package marginchart draws how far the assumptions of a case stand from their
// limits: a bar each on a logarithmic scale of the utilisation u = estimate /
// limit, and over it the band from u/φ to u·φ in which the real one may lie, φ the
// model-form factor. SVG, with its words as text, or PNG.
package marginchart
