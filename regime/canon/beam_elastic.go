package canon

import "math"

// BeamEnd says what holds one end of a beam, in units of the beam.
type BeamEnd struct {
	Translation float64 // k L³/EI of a spring across the beam; at least 1e12: held
	Rotation    float64 // kθ L/EI of a spring that resists rotation; at least 1e12: held
	Mass        float64 // point mass over the mass of the beam
}

// rigidSpring is the relative stiffness from which a spring counts as rigid: the
// change that it makes to β, about 1/stiffness, is then below rounding.
const rigidSpring = 1e12

// elasticBeamModeLimit bounds the mode number where frequencies are counted.
const elasticBeamModeLimit = 1000

// softestSpring is the smallest relative stiffness other than none: below it the
// stiffness drowns in the rounding of the beam's own.
const softestSpring = 1e-6

// beamEndBlocks are the dynamic stiffnesses of a beam of unit length, stiffness
// and mass under tension τ = a² − b² at the frequency ω = ab, for displacements
// symmetric and antisymmetric about mid-span: force on translation, force on
// rotation (positive when both ends turn outward alike), moment on rotation.
// fixed counts the natural frequencies of the beam with clamped ends below ω.
type beamEndBlocks struct {
	sym, anti struct{ translation, coupling, rotation float64 }
	fixed     int
}

// newBeamEndBlocks evaluates w = A cos bξ + C cosh aξ and w = A sin bξ + C sinh aξ
// over −½ ≤ ξ ≤ ½ for unit displacements of the ends. The hyperbolic functions
// are divided by cosh(a/2), so that nothing overflows.
func newBeamEndBlocks(a, b float64) beamEndBlocks {
	y, z := 0.5*b, 0.5*a
	sin, cos := math.Sincos(y)
	t := math.Tanh(z)
	sum := a*a + b*b

	var k beamEndBlocks
	sym := beamNotZero(a*t*cos + b*sin)
	k.sym.translation = -a * b * sin * t * sum / sym
	k.sym.coupling = a * b * (a*sin - b*t*cos) / sym
	k.sym.rotation = sum * cos / sym

	difference := a*sin - b*cos*t
	if y < 0.12 && z < 0.12 {
		difference = 0.5 * a * b * cos * tanMinusTanh(y, z)
	}
	anti := beamNotZero(difference)
	k.anti.translation = a * b * cos * sum / anti
	k.anti.coupling = -a * b * (a*cos*t + b*sin) / anti
	k.anti.rotation = sum * sin * t / anti

	// With pinned ends the frequencies are known: cos y = 0 and sin y = 0. Each
	// negative rotational stiffness is one that clamping the ends raises above ω.
	k.fixed = int(math.Floor(y/math.Pi+0.5)) + int(math.Floor(y/math.Pi))
	if k.sym.rotation < 0 {
		k.fixed--
	}
	if k.anti.rotation < 0 {
		k.fixed--
	}
	return k
}

// tanMinusTanh is tan(y)/y − tanh(z)/z for small arguments, by the series.
func tanMinusTanh(y, z float64) float64 {
	coefficients := [...]float64{1.0 / 3, 2.0 / 15, 17.0 / 315, 62.0 / 2835, 1382.0 / 155925, 21844.0 / 6081075}
	sum, yk, zk := 0.0, 1.0, 1.0
	for _, c := range coefficients {
		yk *= y * y
		zk *= -z * z
		sum += c * (yk - zk)
	}
	return sum
}

// beamNotZero keeps a denominator off its zero.
func beamNotZero(x float64) float64 {
	if x == 0 {
		return math.SmallestNonzeroFloat64 * (1 << 60)
	}
	return x
}

// beamDegrees are the degrees of freedom that the ends leave to a beam, at most
// four: translation and rotation of the left end, then of the right end.
type beamDegrees struct {
	springs, masses [4]float64
	free            [4]int
	count           int
}

func newBeamDegrees(left, right BeamEnd) beamDegrees {
	d := beamDegrees{
		springs: [4]float64{left.Translation, left.Rotation, right.Translation, right.Rotation},
		masses:  [4]float64{left.Mass, 0, right.Mass, 0},
	}
	for i, s := range d.springs {
		if s < rigidSpring {
			d.free[d.count] = i
			d.count++
		}
	}
	return d
}

// beamModesBelow counts the natural frequencies below ω of a beam under tension
// τ (T L²/EI): those with clamped ends, and the negative eigenvalues of the
// dynamic stiffness of the degrees that are free (Wittrick & Williams 1971).
func beamModesBelow(d *beamDegrees, ω, τ float64) int {
	a, b := tensionedWaveNumbers(ω, τ)
	k := newBeamEndBlocks(a, b)
	var m [4][4]float64
	for r := range d.count {
		for c := range d.count {
			i, j := d.free[r], d.free[c]
			m[r][c] = k.entry(i, j)
			if i == j {
				m[r][c] += d.springs[i] - d.masses[i]*ω*ω
			}
		}
	}
	return k.fixed + negativePivots(&m, d.count)
}

// tensionedWaveNumbers returns a and b with ab = ω and a² − b² = τ.
func tensionedWaveNumbers(ω, τ float64) (a, b float64) {
	large := math.Sqrt(0.5 * (math.Abs(τ) + math.Hypot(τ, 2*ω)))
	if τ >= 0 {
		return large, ω / large
	}
	return ω / large, large
}

// entry is the stiffness that joins degrees i and j, with rotations positive
// outward at both ends: equal to half the sum of the symmetric and antisymmetric
// stiffnesses at one end, and half their difference between the ends.
func (k *beamEndBlocks) entry(i, j int) float64 {
	s, a := k.sym.coupling, k.anti.coupling
	if i%2 == j%2 {
		s, a = k.sym.translation, k.anti.translation
		if i%2 == 1 {
			s, a = k.sym.rotation, k.anti.rotation
		}
	}
	if i/2 == j/2 {
		return 0.5 * (s + a)
	}
	return 0.5 * (s - a)
}

// negativePivots counts the negative eigenvalues of a symmetric matrix by
// elimination along the diagonal, the largest pivot first (Sylvester).
func negativePivots(m *[4][4]float64, size int) int {
	count := 0
	for done := range size {
		p := done
		for i := done + 1; i < size; i++ {
			if math.Abs(m[i][i]) > math.Abs(m[p][p]) {
				p = i
			}
		}
		m[p], m[done] = m[done], m[p]
		for i := range size {
			m[i][p], m[i][done] = m[i][done], m[i][p]
		}
		pivot := beamNotZero(m[done][done])
		if pivot < 0 {
			count++
		}
		for i := done + 1; i < size; i++ {
			factor := m[i][done] / pivot
			for j := done + 1; j < size; j++ {
				m[i][j] -= factor * m[done][j]
			}
		}
	}
	return count
}

// rigidMotions is the number of motions that strain neither beam nor springs.
func (d *beamDegrees) rigidMotions() int {
	k0, r0, k1, r1 := d.springs[0], d.springs[1], d.springs[2], d.springs[3]
	switch {
	case k0 == 0 && k1 == 0 && r0 == 0 && r1 == 0:
		return 2
	case k0 == 0 && k1 == 0:
		return 1
	case (k0 == 0 || k1 == 0) && r0 == 0 && r1 == 0:
		return 1
	}
	return 0
}

// nthBeamFrequency finds the frequency (in √(EI/(mL⁴))) below which there are
// exactly n−1 others, by halving an interval that has it inside.
func nthBeamFrequency(d *beamDegrees, n int, τ, above float64) float64 {
	for range 200 {
		if beamModesBelow(d, above, τ) >= n {
			break
		}
		above *= 2
	}
	below := 0.0
	for range 100 {
		mid := 0.5 * (below + above)
		if below > 0 && above > 4*below {
			mid = math.Sqrt(below * above)
		} else if below == 0 {
			mid = above / 16
		}
		if mid <= below || mid >= above || above-below < 4e-16*above {
			break
		}
		if beamModesBelow(d, mid, τ) >= n {
			above = mid
		} else {
			below = mid
		}
	}
	return 0.5 * (below + above)
}

func checkBeamEnd(function, side string, e BeamEnd) error {
	if err := checkSpring(function, side, "Translation", e.Translation); err != nil {
		return err
	}
	if err := checkSpring(function, side, "Rotation", e.Rotation); err != nil {
		return err
	}
	if e.Mass >= 0 && e.Mass <= beamTipMassLimit {
		return nil
	}
	return inRange(function, side+"Mass", e.Mass, 0, beamTipMassLimit)
}

func checkSpring(function, side, motion string, stiffness float64) error {
	if stiffness >= softestSpring || stiffness == 0 {
		return nil
	}
	return &RangeError{
		Function: function, Arg: side + motion, Value: stiffness, Min: softestSpring, Max: rigidSpring,
		Reason: "a relative stiffness is 0 or at least 1e-6",
	}
}

// ElasticBeamMode returns β = wave number times length of a bending mode of a
// beam whose ends rest on springs and carry point masses.
//
// Equation: ω = β²·√(EI/(m L⁴)); β is where a negative eigenvalue is added to the
// dynamic stiffness of the ends, K(β) + springs − masses·β⁴, which is 0/0-free
// in the symmetric and antisymmetric motions of a uniform beam.
//
// Symbols: k spring across the beam [N/m] as k L³/EI, kθ rotational spring
// [N m/rad] as kθ L/EI, mass [kg] over m L; EI bending stiffness [N m²], m mass
// per length [kg/m], L length [m]; n mode number from 1, motions of zero
// frequency not counted.
//
// Range: stiffness 0 or from 1e-6, at least 1e12 is rigid; mass from 0 to 1e6;
// n from 1 to 1000.
//
// Accuracy: 1e-8, and mostly 1e-12; the larger where a root falls together with
// one of clamped ends, or the springs are the softest allowed.
//
// Check: all rigid 4.7300407; rotations free π; one end rigid, the other free
// 1.8751041; one end rigid, the other on k: k = 10 gives 2.6389.
//
// Source: Wittrick & Williams 1971; Blevins 1979, table 8-2 (from memory).
func ElasticBeamMode(left, right BeamEnd, n int) (float64, error) {
	const name = "ElasticBeamMode"
	if err := inRange(name, "n", float64(n), 1, elasticBeamModeLimit); err != nil {
		return 0, err
	}
	if err := checkBeamEnd(name, "left", left); err != nil {
		return 0, err
	}
	if err := checkBeamEnd(name, "right", right); err != nil {
		return 0, err
	}
	if left == (BeamEnd{}) && right == (BeamEnd{}) {
		return beamRoot(FreeFree, n), nil // its roots are those of clamped ends, where K is infinite
	}
	d := newBeamDegrees(left, right)
	n += d.rigidMotions()
	start := beamRoot(ClampedClamped, n)
	return math.Sqrt(nthBeamFrequency(&d, n, 0, 1.0001*start*start)), nil
}

// tensionLimit bounds the tension: beyond it bending is a boundary layer of a
// thousandth of the length.
const tensionLimit = 1e6

// bucklingLoad is the axial load P L²/EI at which a beam buckles.
func bucklingLoad(support BeamSupport) float64 {
	switch support {
	case PinnedPinned:
		return math.Pi * math.Pi
	case ClampedFree:
		return 0.25 * math.Pi * math.Pi
	case ClampedClamped:
		return 4 * math.Pi * math.Pi
	}
	return 4.493409457909064 * 4.493409457909064 // tan x = x
}

var supportEnds = [...][2]BeamEnd{
	PinnedPinned:   {{Translation: rigidSpring}, {Translation: rigidSpring}},
	ClampedFree:    {{Translation: rigidSpring, Rotation: rigidSpring}, {}},
	ClampedClamped: {{Translation: rigidSpring, Rotation: rigidSpring}, {Translation: rigidSpring, Rotation: rigidSpring}},
	ClampedPinned:  {{Translation: rigidSpring, Rotation: rigidSpring}, {Translation: rigidSpring}},
}

// TensionedBeam returns the ratio of the natural frequency of a beam under axial
// tension to that of the same beam without it.
//
// Equation: pinned-pinned √(1 + τ/(n²π²)), exact; the other supports by the
// boundary determinant with a² − b² = τ, ab = ω in units of √(EI/(mL⁴)).
//
// Symbols: τ = T L²/EI, T tension [N] (negative: compression), EI bending
// stiffness [N m²], L length [m], n mode number from 1. At a free end T keeps its
// direction.
//
// Range: τ from 0.999 of the buckling load (π² pinned, π²/4 clamped-free, 4π²
// clamped, 20.19 clamped-pinned) in compression to 1e6; n from 1 to 1000; no
// free-free beam, which nothing holds in tension.
//
// Accuracy: 1e-8.
//
// Check: τ → ∞: ω → nπ√τ(1 + 2/√τ) for clamped ends; τ → −buckling load: 0.
//
// Source: Bokaian 1990 (from memory).
func TensionedBeam(support BeamSupport, n int, tension float64) (float64, error) {
	const name = "TensionedBeam"
	if err := checkBeam(name, support, n); err != nil {
		return 0, err
	}
	if support == FreeFree {
		return 0, &RangeError{Function: name, Arg: "support", Value: float64(support), Reason: "free ends hold no tension"}
	}
	if err := inRange(name, "n", float64(n), 1, elasticBeamModeLimit); err != nil {
		return 0, err
	}
	if err := inRange(name, "tension", tension, -0.999*bucklingLoad(support), tensionLimit); err != nil {
		return 0, err
	}
	β := beamRoot(support, n)
	if support == PinnedPinned {
		return math.Sqrt(1 + tension/(β*β)), nil
	}
	if tension == 0 {
		return 1, nil
	}
	ω0 := β * β
	d := newBeamDegrees(supportEnds[support][0], supportEnds[support][1])
	start := ω0 * math.Sqrt(1+math.Max(0, tension)/ω0)
	return nthBeamFrequency(&d, n, tension, start) / ω0, nil
}
