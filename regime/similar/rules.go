package similar

import (
	"math/big"

	"regimed/regime"
	"regimed/regime/group"
	"regimed/regime/scale"
)

var minusOne = big.NewRat(-1, 1)

// Rule is what is assumed where what was given and what is to be kept leaves a
// factor open.
type Rule struct {
	ID       string
	Sentence string
	left     Powers // product that is 1
}

// The rules. A rule that no factor waits for is not used.
var (
	sameGravity       = Rule{"same-gravity", "Gravity stays as it is.", product(to(Gravity, 1))}
	sameDensity       = Rule{"same-fluid-density", "The density of the fluid stays as it is.", product(to(FluidDensity, 1))}
	sameSound         = Rule{"same-sound-speed", "The speed of sound stays as it is.", product(to(SoundSpeed, 1))}
	sameTension       = Rule{"same-surface-tension", "The surface tension stays as it is.", product(to(SurfaceTension, 1))}
	sameViscosity     = Rule{"same-viscosity", "The kinematic viscosity stays as it is.", product(to(KinematicViscosity, 1))}
	similarMotion     = Rule{"similar-motion", "Times go with length over speed: what drives and what excites keeps its place in the flow.", product(to(Time, 1), to(Speed, 1), to(Length, -1))}
	similarWaves      = Rule{"froude", "Speeds go with the square root of gravity times length, since gravity moves the fluid.", product(to(Speed, 2), to(Gravity, -1), to(Length, -1))}
	keptMassRatio     = Rule{"mass-ratio", "The structure is as heavy against the fluid as before: the mass ratio is kept.", product(to(SolidDensity, 1), to(FluidDensity, -1))}
	sameSolid         = Rule{"same-material-density", "The structure is of the same material: its density stays.", product(to(SolidDensity, 1))}
	sameModulus       = Rule{"same-material-stiffness", "The structure is of the same material: its modulus stays.", product(to(YoungModulus, 1))}
	similarVibration  = Rule{"reduced-velocity", "Springs and stiffness are made for it: the reduced velocity is kept.", product(to(YoungModulus, 1), to(SolidDensity, -1), to(Speed, -2))}
	similarDeflection = Rule{"cauchy", "Springs and stiffness are made for it: deflections keep their share of the length.", product(to(YoungModulus, 1), to(FluidDensity, -1), to(Speed, -2))}
	naturalSpeed      = Rule{"speed-of-structure", "Speeds go with the natural frequency of the structure times its length: the reduced velocity is kept.", similarVibration.left}
	sameSpeed         = Rule{"same-speed", "The speed of the flow stays as it is.", product(to(Speed, 1))}
	sameSurroundings  = Rule{"same-surroundings", "The pressure of the surroundings stays as it is.", product(to(StaticPressure, 1))}
)

// rulesOf lists the rules for a case, in the order in which they are asked.
func rulesOf(a *regime.Answer, n nature, keep []group.ID) []Rule {
	list := []Rule{sameGravity, sameDensity, sameSound, sameTension, sameViscosity, similarMotion}
	if n.gravity {
		list = append(list, similarWaves)
	}
	for _, id := range keep {
		if n.wet(id) {
			list = append(list, keptMassRatio) // or the wet frequency would not scale as the dry one
			break
		}
	}
	if a.Scales.Has(scale.SolidDensity) {
		list = append(list, sameSolid)
	} else {
		list = append(list, keptMassRatio)
	}
	switch {
	case a.Scales.Has(scale.Young):
		list = append(list, sameModulus)
	case n.restored:
		list = append(list, similarDeflection)
	default:
		list = append(list, similarVibration)
	}
	return append(list, naturalSpeed)
}

// lastRules come when the length is known.
func lastRules() []Rule { return []Rule{sameSpeed, sameSurroundings} }
