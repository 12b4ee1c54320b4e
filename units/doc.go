// Package units reads physical quantities as engineers write them and turns
// them into SI numbers of a known kind.
//
// A quantity is a number, a unit expression and, where it is uncertain, a
// standard deviation or a range:
//
//	4.2 m/s   2.1 +- 0.2 m/s   2.1 m/s +- 10 %   1.8 .. 2.4 m/s   (2.1 ± 0.2) m/s
//
// Dimensions are carried and compared by gonum.org/v1/gonum/unit. They are not
// enough: a hertz and a radian per second, an absolute and a gauge pressure, a
// stiffness and a surface tension can't be told apart by their dimensions, or
// only just. Every quantity is therefore read as a [Kind], and the kind decides
// which units it accepts, what it is converted to, and what to say when a unit
// of the wrong meaning was written.
//
// Unit expressions: products by a space, *, · or a full stop; quotients by /
// or the word per; powers as m^2, m**2, m2, m², s^-1, s-1 or s⁻¹; parentheses; SI
// prefixes on SI units; %. Symbols are case-sensitive. A product that
// follows a quotient without parentheses (kg/m s) has two readings and is refused.
package units
