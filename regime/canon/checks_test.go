package canon

import (
	"flag"
	"fmt"
	"os"
	"slices"
	"strings"
	"sync"
	"testing"
)

// checkKind says what a check compares with.
type checkKind int

const (
	outside  checkKind = iota // a published value, or one computed apart: by other means, or by hand
	limit                     // a simpler problem at an end of the range
	identity                  // a law that the solution obeys all over its range
)

func (k checkKind) String() string {
	return [...]string{"outside", "limit", "identity"}[k]
}

// check is one thing that some test holds an entry to.
type check struct {
	entry string
	kind  checkKind
	name  string
	// memory: the outside value was written down from memory of its source.
	memory bool
}

// The tables of values that were computed apart, to 30 digits and more.
const (
	checkTable     = "table computed apart, 12 digits"
	referenceTable = "table computed apart, 20 digits"
)

// checks lists every check besides the limits, which are part of the entries. A
// check counts when its test has called tally for it and has not failed.
var checks = []check{
	{entry: "OscillatingCylinder", kind: outside, name: checkTable},
	{entry: "OscillatingCylinder", kind: outside, name: referenceTable},
	{entry: "OscillatingCylinder", kind: identity, name: "kinetic energy and dissipation of the flow"},
	{entry: "OscillatingSphere", kind: outside, name: checkTable},
	{entry: "OscillatingSphere", kind: identity, name: "kinetic energy and dissipation of the flow"},
	{entry: "OscillatingRibbon", kind: outside, name: checkTable},
	{entry: "OscillatingRibbon", kind: limit, name: "the circular cylinder in creeping flow"},
	{entry: "CylinderInShell", kind: outside, name: checkTable},
	{entry: "CylinderInShell", kind: outside, name: referenceTable},
	{entry: "CylinderInShell", kind: identity, name: "the four coefficients, solved as they stand"},
	{entry: "CylinderInShell", kind: identity, name: "kinetic energy and dissipation of the flow"},
	{entry: "CylinderInShell", kind: identity, name: "minimum principles of Kelvin and Helmholtz"},
	{entry: "CylinderInShell", kind: limit, name: "wide shell: the free cylinder"},
	{entry: "CylinderInShell", kind: limit, name: "narrow gap: viscous film"},
	{entry: "CylinderNearWall", kind: outside, name: checkTable},
	{entry: "CylinderNearWall", kind: outside, name: referenceTable},
	{entry: "CylinderNearWall", kind: identity, name: "images by their recurrence"},
	{entry: "CylinderNearWall", kind: limit, name: "almost touching: π²/3 − 1 − 4√e"},
	{entry: "CylinderBelowSurface", kind: outside, name: referenceTable},
	{entry: "CylinderBelowSurface", kind: identity, name: "images by their recurrence"},
	{entry: "SoundCylinder", kind: outside, name: checkTable},
	{entry: "SoundCylinder", kind: outside, name: referenceTable},
	{entry: "SoundCylinder", kind: identity, name: "radiated power"},
	{entry: "SoundCylinder", kind: identity, name: "Kramers–Kronig"},
	{entry: "SoundSphere", kind: outside, name: checkTable},
	{entry: "SoundSphere", kind: identity, name: "spherical Hankel function"},
	{entry: "SoundSphere", kind: identity, name: "Kramers–Kronig"},
	{entry: "BaffledPiston", kind: outside, name: checkTable},
	{entry: "BaffledPiston", kind: outside, name: referenceTable},
	{entry: "BaffledPiston", kind: identity, name: "radiated power"},
	{entry: "BaffledPiston", kind: identity, name: "Struve's integral"},
	{entry: "FlexuralWaveLoading", kind: outside, name: "Pythagorean wave numbers, by hand"},
	{entry: "FlexuralWaveLoading", kind: identity, name: "impedance of the fluid"},
	{entry: "FlexuralWaveLoading", kind: limit, name: "baffled plate of many half waves"},
	{entry: "ThinFilm", kind: outside, name: referenceTable},
	{entry: "ThinFilm", kind: outside, name: "cut-off of strip and square", memory: true},
	{entry: "ThinFilm", kind: identity, name: "double series, term by term, from both sides"},
	{entry: "ThinFilm", kind: identity, name: "Kramers–Kronig"},
	{entry: "ThinFilmLiquid", kind: outside, name: referenceTable},
	{entry: "ThinFilmLiquid", kind: outside, name: "square plate 0.42", memory: true},
	{entry: "ThinFilmLiquid", kind: identity, name: "reciprocity of the two sides"},
	{entry: "VeijolaViscosity", kind: outside, name: "Poiseuille flow by the linearised Boltzmann equation", memory: true},
	{entry: "VeijolaViscosity", kind: limit, name: "slip flow"},
	{entry: "PulsatileTube", kind: outside, name: checkTable},
	{entry: "PulsatileTube", kind: outside, name: referenceTable},
	{entry: "PulsatileTube", kind: identity, name: "kinetic energy and dissipation of the flow"},
	{entry: "PulsatileTube", kind: identity, name: "Kramers–Kronig"},

	{entry: "BeamMode", kind: outside, name: "published roots", memory: true},
	{entry: "BeamMode", kind: identity, name: "residual of the frequency equation"},
	{entry: "BeamMode", kind: limit, name: "heavy mass on a massless spring"},
	{entry: "BeamShape", kind: outside, name: "published middle of the cantilever", memory: true},
	{entry: "BeamShape", kind: identity, name: "end conditions"},
	{entry: "BeamShape", kind: identity, name: "orthonormality"},
	{entry: "BeamModeFactors", kind: outside, name: "published factors of the cantilever", memory: true},
	{entry: "BeamModeFactors", kind: identity, name: "quadrature of the shape"},
	{entry: "ElasticBeamMode", kind: outside, name: "cantilever with a tip spring, scalar equation"},
	{entry: "ElasticBeamMode", kind: limit, name: "rigid springs: the classical supports"},
	{entry: "ElasticBeamMode", kind: limit, name: "soft springs: bounce and rock"},
	{entry: "ElasticBeamMode", kind: identity, name: "mirror image, and rise with stiffness"},
	{entry: "TensionedBeam", kind: outside, name: "clamped ends, scalar equation"},
	{entry: "TensionedBeam", kind: identity, name: "pinned ends: √(1 + τ/(n²π²)) by the determinant"},
	{entry: "TensionedBeam", kind: identity, name: "slope at no tension by Rayleigh's quotient"},
	{entry: "TensionedBeam", kind: limit, name: "buckling"},
	{entry: "PlateMode", kind: outside, name: "published table of the combinations of edges", memory: true},
	{entry: "PlateMode", kind: identity, name: "reciprocity of the two sides"},
	{entry: "PlateMode", kind: identity, name: "Ritz in both directions against the sine"},
	{entry: "PlateMode", kind: limit, name: "strips and slender cantilevers are beams"},
	{entry: "CircularPlateMode", kind: outside, name: "published values", memory: true},
	{entry: "CircularPlateMode", kind: identity, name: "orthogonality of the modes"},
	{entry: "CircularPlateMode", kind: identity, name: "roots of free and clamped edge interleave"},
	{entry: "ElasticCircularPlateMode", kind: outside, name: "published ends 4.9351 and 10.2158", memory: true},
	{entry: "ElasticCircularPlateMode", kind: identity, name: "between the two edges, rising"},
	{entry: "LargeAmplitude", kind: outside, name: "published values", memory: true},
	{entry: "LargeAmplitude", kind: outside, name: "membrane by Ritz"},
	{entry: "LargeAmplitude", kind: identity, name: "below first order, and turned plate"},
	{entry: "LargeAmplitude", kind: limit, name: "purely cubic 0.8472√ε"},
	{entry: "CircularPlateAddedMass", kind: outside, name: "Lamb's shape 0.6689", memory: true},
	{entry: "CircularPlateAddedMass", kind: outside, name: "piston 8/(3π)"},
	{entry: "CircularPlateAddedMass", kind: outside, name: "integral over wave numbers"},
	{entry: "CircularPlateAddedMass", kind: identity, name: "towards 1/λ with every circle"},
	{entry: "BaffledCircularPlateMode", kind: outside, name: "piston's resistance"},
	{entry: "BaffledCircularPlateMode", kind: outside, name: "resistance by Rayleigh's integral in space"},
	{entry: "BaffledCircularPlateMode", kind: limit, name: "monopole of the volume"},
	{entry: "BaffledPlateMode", kind: outside, name: "low-frequency forms", memory: true},
	{entry: "BaffledPlateMode", kind: outside, name: "resistance by Rayleigh's integral in space"},
	{entry: "BaffledPlateMode", kind: outside, name: "mass by the spectrum"},
	{entry: "BaffledPlateMode", kind: identity, name: "reciprocity of the two sides"},
	{entry: "BaffledPlateMode", kind: limit, name: "many half waves: ρ/k_b"},
	{entry: "CavityStiffness", kind: outside, name: "64/π⁴ by hand"},
	{entry: "CavityStiffness", kind: identity, name: "Bessel's inequality is an equation"},
	{entry: "CavityStiffness", kind: identity, name: "mean and mean square of the shape"},
	{entry: "StringMode", kind: outside, name: "published crossover 2π and 2.861π", memory: true},
	{entry: "StringMode", kind: identity, name: "residual of the frequency equation"},
	{entry: "RingMode", kind: outside, name: "published 2.683 and 7.589", memory: true},
	{entry: "BreathingTube", kind: outside, name: "ν = 0.3 by hand"},

	{entry: "WaveNumber", kind: outside, name: checkTable},
	{entry: "WaveNumber", kind: identity, name: "residual of the dispersion relation"},
	{entry: "RectangularTank", kind: outside, name: checkTable},
	{entry: "RectangularTank", kind: outside, name: "frequency of a tank of 1 m"},
	{entry: "RectangularTank", kind: identity, name: "the shares of a shallow tank make the whole"},
	{entry: "UprightTank", kind: outside, name: checkTable},
	{entry: "UprightTank", kind: outside, name: "frequency of a tank of 1 m, zeros of J₁′"},
	{entry: "UprightTank", kind: outside, name: "Housner's formula", memory: true},
	{entry: "UprightTank", kind: identity, name: "the shares of a shallow tank make the whole"},
	{entry: "SloshingMassFraction", kind: outside, name: checkTable},
	{entry: "SloshingMassFraction", kind: identity, name: "what moves with the tank, by momentum"},
	{entry: "CylinderDiffraction", kind: outside, name: checkTable},
	{entry: "CylinderDiffraction", kind: identity, name: "slope of the lag by the Wronskian"},
	{entry: "StokesSecondOrder", kind: outside, name: "published form in cosh and sinh", memory: true},
	{entry: "StokesSecondOrder", kind: identity, name: "shallow: 3/(32π²) of the Ursell number"},
	{entry: "Theodorsen", kind: outside, name: checkTable},
	{entry: "Theodorsen", kind: outside, name: "published table", memory: true},
	{entry: "Theodorsen", kind: identity, name: "Wronskian"},
	{entry: "Theodorsen", kind: identity, name: "Kramers–Kronig"},
	{entry: "SectionFlutter", kind: outside, name: checkTable},
	{entry: "SectionFlutter", kind: outside, name: "worked section", memory: true},
	{entry: "SectionFlutter", kind: outside, name: "eigenvalues with a rational C"},
	{entry: "SectionFlutter", kind: identity, name: "no work over a period at the onset"},
	{entry: "SectionFlutter", kind: identity, name: "number of growing motions by the argument principle"},
	{entry: "SectionFlutter", kind: limit, name: "balanced section, and no damping"},
	{entry: "SectionDivergence", kind: outside, name: "2/π, and r√(μ/(1 + 2a)) of the typical section", memory: true},
	{entry: "SectionDivergence", kind: identity, name: "static zero of the flutter determinant"},
	{entry: "ConveyingPipe", kind: outside, name: checkTable},
	{entry: "ConveyingPipe", kind: outside, name: "supported pipes π, 2π, 4.4934", memory: true},
	{entry: "ConveyingPipe", kind: outside, name: "jumps over β", memory: true},
	{entry: "ConveyingPipe", kind: outside, name: "columns under their own weight", memory: true},
	{entry: "ConveyingPipe", kind: limit, name: "Beck's column", memory: true},
	{entry: "ConveyingPipe", kind: identity, name: "two determinants and the projection agree"},
	{entry: "ConveyingPipe", kind: identity, name: "no work over a period at the onset"},
	{entry: "ConveyingPipe", kind: identity, name: "the lowest branch lasts to its fold"},
	{entry: "WakeLockIn", kind: outside, name: checkTable},
	{entry: "WakeLockIn", kind: outside, name: "light cylinder in water", memory: true},
	{entry: "WakeLockIn", kind: identity, name: "eigenvalues of the pair"},
	{entry: "WakeLockInParameter", kind: outside, name: "light cylinder in water", memory: true},
	{entry: "WakeLockInParameter", kind: outside, name: "by hand"},
	{entry: "WakeLockInParameter", kind: identity, name: "as St⁻² and 1/μ′"},
	{entry: "VortexAmplitude", kind: outside, name: "heavy cylinder in air", memory: true},
	{entry: "VortexAmplitude", kind: identity, name: "the larger of two, falling with damping"},
	{entry: "SkopGriffin", kind: outside, name: "heavy cylinder in air", memory: true},
	{entry: "GovardhanWilliamson", kind: outside, name: "light cylinder in water", memory: true},
	{entry: "GovardhanWilliamson", kind: identity, name: "falls with damping, not below 0"},
	{entry: "Strouhal", kind: outside, name: "tables of sections", memory: true},
	{entry: "Strouhal", kind: outside, name: "regimes of the circular cylinder", memory: true},
	{entry: "Strouhal", kind: identity, name: "continuous over Re, within its band"},
	{entry: "CylinderDrag", kind: outside, name: "another published fit", memory: true},
	{entry: "CylinderDrag", kind: outside, name: "computed drag at Re 20", memory: true},
	{entry: "CylinderDrag", kind: identity, name: "continuous over Re, within its band"},
	{entry: "GallopingSpeed", kind: outside, name: "square section by hand"},
	{entry: "GallopingSpeed", kind: identity, name: "damping of the wind"},
	{entry: "GallopingSpeed", kind: limit, name: "no negative slope: no galloping"},
	{entry: "GallopingFactor", kind: outside, name: "table of sections", memory: true},
	{entry: "GallopingFactor", kind: identity, name: "none for a circle, by symmetry"},
	{entry: "TubeArrayCritical", kind: outside, name: "published constants", memory: true},
	{entry: "TubeArrayCritical", kind: identity, name: "as √ of the mass-damping"},
	{entry: "FlagCritical", kind: outside, name: "slender plate: the conveying pipe with its virtual mass"},
	{entry: "FlagCritical", kind: identity, name: "the waves of the dispersion relation meet"},
	{entry: "PanelFlutter", kind: outside, name: "published values of 2, 4, 10 modes", memory: true},
	{entry: "PanelFlutter", kind: outside, name: "double zero of the boundary determinant"},
	{entry: "PanelFlutter", kind: identity, name: "first meeting of two frequencies"},
	{entry: "PanelDivergence", kind: outside, name: "panel in a rigid wall by thin-aerofoil theory"},
	{entry: "WaveSpeed", kind: outside, name: checkTable},
	{entry: "WaveSpeed", kind: identity, name: "compliances of fluid and wall add"},
	{entry: "PipeConstraint", kind: outside, name: "published thin walls", memory: true},
	{entry: "PipeConstraint", kind: identity, name: "elastic cylinder of any wall"},
	{entry: "JoukowskySurge", kind: outside, name: "1.2 MPa of a stopped main", memory: true},
	{entry: "JoukowskySurge", kind: identity, name: "momentum of the column"},
	{entry: "MoensKorteweg", kind: outside, name: "artery by hand"},
	{entry: "MoensKorteweg", kind: limit, name: "the wave speed of a soft wall"},
	{entry: "PulseWave", kind: outside, name: "no inertia: e^−2π, by hand"},
	{entry: "PulseWave", kind: limit, name: "fast: 1, slow: α/2"},
	{entry: "PrandtlGlauert", kind: outside, name: "2/√3 − 1 by hand"},
	{entry: "IsentropicDensityChange", kind: outside, name: "published tables", memory: true},
	{entry: "IsentropicDensityChange", kind: limit, name: "isothermal: exp(M²/2) − 1"},
	{entry: "FlatPlate", kind: outside, name: "laminar layer integrated anew"},
	{entry: "FlatPlate", kind: identity, name: "mean friction is the mean of the local"},
	{entry: "ExplicitCoupling", kind: outside, name: "schemes marched in time"},
	{entry: "ExplicitCoupling", kind: identity, name: "ratio times limit is μ"},
	{entry: "CompressibleCoupling", kind: outside, name: "scheme marched in time"},
	{entry: "CompressibleCoupling", kind: identity, name: "ratio is 1 at the limit"},
	{entry: "FixedPointRelaxation", kind: outside, name: "two modes by hand"},
	{entry: "FixedPointRelaxation", kind: identity, name: "both extreme modes are equally slow"},
	{entry: "Electromechanical", kind: outside, name: "K² = ¼ by hand"},
	{entry: "Electromechanical", kind: identity, name: "greatest loss factor of all loads"},
	{entry: "GeneralisedCoupling", kind: outside, name: "k² = 0.2 by hand"},
	{entry: "GeneralisedCoupling", kind: identity, name: "frequency ratio 1/√(1 − k²)"},
}

// allChecks are the checks with the limits of the entries.
func allChecks() []check {
	all := slices.Clone(checks)
	for _, e := range All() {
		for _, l := range e.Limits {
			all = append(all, check{entry: e.Name, kind: limit, name: limitName(l)})
		}
	}
	return all
}

// limitName tells the limits of an entry apart.
func limitName(l Limit) string { return l.Output + ", " + l.Name }

// checked counts the values that each check compared.
var checked = struct {
	sync.Mutex
	values map[[2]string]int
}{values: map[[2]string]int{}}

// tally counts a check with the number of values that it compared, unless its
// test fails. A check that is not listed is an error.
func tally(t *testing.T, entry, name string, values int) {
	t.Helper()
	if !slices.ContainsFunc(allChecks(), func(c check) bool { return c.entry == entry && c.name == name }) {
		t.Errorf("the check %q of %s is not listed", name, entry)
	}
	if values < 1 {
		t.Errorf("the check %q of %s compares nothing", name, entry)
	}
	t.Cleanup(func() {
		if t.Failed() {
			return
		}
		checked.Lock()
		defer checked.Unlock()
		checked.values[[2]string{entry, name}] = max(values, checked.values[[2]string{entry, name}])
	})
}

// Every entry is held to an outside value, and to a limit or an identity.
func TestEveryEntryIsChecked(t *testing.T) {
	has := map[string]map[checkKind]int{}
	seen := map[[2]string]bool{}
	for _, c := range allChecks() {
		if Find(c.entry) == nil {
			t.Errorf("%s is checked, but no entry", c.entry)
		}
		if key := [2]string{c.entry, c.name}; seen[key] {
			t.Errorf("the check %q of %s is listed twice", c.name, c.entry)
		} else {
			seen[key] = true
		}
		if has[c.entry] == nil {
			has[c.entry] = map[checkKind]int{}
		}
		has[c.entry][c.kind]++
	}
	for _, e := range All() {
		if has[e.Name][outside] == 0 {
			t.Errorf("%s has no outside value", e.Name)
		}
		if has[e.Name][limit]+has[e.Name][identity] == 0 {
			t.Errorf("%s has neither a limit nor an identity", e.Name)
		}
	}
}

// checksFile shows the tally beside the code.
const checksFile = "CHECKS.md"

var updateChecks = flag.Bool("update-checks", false, "write "+checksFile+" anew")

func TestMain(m *testing.M) {
	flag.Parse()
	code := m.Run()
	if ranAll() && code == 0 {
		code = closeTally()
	}
	fmt.Println(tallyLine())
	os.Exit(code)
}

// ranAll tells whether no test was left out by a flag.
func ranAll() bool {
	for _, name := range []string{"test.run", "test.skip", "test.list", "test.fuzz"} {
		if f := flag.Lookup(name); f != nil && f.Value.String() != "" {
			return false
		}
	}
	return true
}

// closeTally fails where a check did not run, or the file is out of date.
func closeTally() int {
	code := 0
	for _, c := range allChecks() {
		if checked.values[[2]string{c.entry, c.name}] == 0 {
			fmt.Printf("the check %q of %s did not run\n", c.name, c.entry)
			code = 1
		}
	}
	text := tallyText()
	if *updateChecks {
		if err := os.WriteFile(checksFile, []byte(text), 0o644); err != nil {
			fmt.Println(err)
			return 1
		}
	}
	if shown, err := os.ReadFile(checksFile); err != nil || string(shown) != text {
		fmt.Printf("%s is out of date: go test ./regime/canon -update-checks writes it\n", checksFile)
		code = 1
	}
	return code
}

// tallyLine sums up what ran.
func tallyLine() string {
	var values [3]int
	memory := 0
	entries := map[string]bool{}
	for _, c := range allChecks() {
		n := checked.values[[2]string{c.entry, c.name}]
		if n == 0 {
			continue
		}
		values[c.kind] += n
		entries[c.entry] = true
		if c.memory {
			memory += n
		}
	}
	return fmt.Sprintf("canon: %d solutions checked against %d outside values (%d from memory), %d limits and %d identities",
		len(entries), values[outside], memory, values[limit], values[identity])
}

// tallyText is the table of all checks.
func tallyText() string {
	var b strings.Builder
	b.WriteString("# What each canonical solution is checked against\n\n")
	b.WriteString("Written by the tests of this package, from what ran. The number is that of the values compared.\n\n")
	b.WriteString("- *outside*: published, or computed apart: by other means, or by hand; † from memory of the source\n")
	b.WriteString("- *limit*: a simpler problem at an end of the range\n")
	b.WriteString("- *identity*: a law that the solution obeys all over its range\n\n")
	b.WriteString(tallyLine() + ".\n\n| solution | kind | check | values |\n|---|---|---|---:|\n")
	all := allChecks()
	for _, e := range All() {
		name := e.Name
		for kind := outside; kind <= identity; kind++ {
			for _, c := range all {
				if c.entry != e.Name || c.kind != kind {
					continue
				}
				mark := ""
				if c.memory {
					mark = " †"
				}
				fmt.Fprintf(&b, "| %s | %s | %s%s | %d |\n", name, kind, strings.ReplaceAll(c.name, "|", "\\|"), mark, checked.values[[2]string{c.entry, c.name}])
				name = ""
			}
		}
	}
	return b.String()
}
