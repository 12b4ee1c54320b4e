// Package fluid gives the properties of named fluids at a state.
//
// A model knows its range and refuses a state outside it: nothing here
// extrapolates. What a model does not give is NaN, never zero. All quantities
// are in SI units; temperatures are absolute (ITS-90), pressures are absolute.
//
//	water                    IAPWS-IF97 region 1, IAPWS R12-08, IAPWS R1-76
//	seawater                 UNESCO 44 (EOS-80), Sharqawy et al. 2010
//	air                      ideal gas after the US Standard Atmosphere 1976
//	steam and other gases    ideal gas, Sutherland viscosity, heat capacity of
//	                         the rigid rotor with harmonic vibrations
//	oils, glycol, blood,     typical values, marked as such
//	liquid metals
//
// A fluid, or a family of fluids, is one file and one line in catalogue.go.
package fluid
