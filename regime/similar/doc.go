// Package similar compares two cases, and scales a case to a model of it: which
// dimensionless groups agree, which are distorted and by what factor; which scale
// factors follow where some groups are to be kept, and which groups exclude each
// other.
//
// Every group that can be kept is a product of powers of a few independent scale
// factors, so that the logarithms make a linear system. It is solved by row
// reduction in rational numbers: exponents are exact.
package similar
