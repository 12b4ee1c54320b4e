// Package regime decides which physics a coupled fluid-structure model needs.
//
// Data flows one way, and each stage is a type of its own:
//
//	input.Case             what the caller said, unit-checked, in SI
//	scale.Set              lengths, masses, frequencies, speeds, with their origin
//	group.Set              dimensionless groups and traits; no unit beyond this point
//	finding.Finding        one per assumption: the error that it costs, and the verdict
//	ladder.Recommendation  the cheapest model class that holds, and why the others fell
//	Answer                 the record of it all, which a rendering shows
package regime
