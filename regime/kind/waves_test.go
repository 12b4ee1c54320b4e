package kind

import (
	"math"
	"testing"

	"pgregory.net/rapid"

	"regimed/regime/canon"
	"regimed/regime/criterion"
	"regimed/regime/scale"
	"regimed/units"
)

func about(t *testing.T, what string, got, want, tol float64) {
	t.Helper()
	if !(math.Abs(got/want-1) <= tol) {
		t.Errorf("%s: %.6g, want %.6g within %g", what, got, want, tol)
	}
}

// seaAt is the wave of a height, a period and a depth (0: deep) on water.
func seaAt(height, period, depth float64) sea {
	s := scale.New()
	put := func(id scale.ID, x float64) { s.Put(id, x, units.Length, scale.Given, "") }
	put(scale.Gravity, 9.81)
	put(scale.WaveHeight, height)
	put(scale.FrequencyWave, 1/period)
	if depth > 0 {
		put(scale.WaterDepth, depth)
	}
	return seaOf(s)
}

// The regular wave of the monopile benchmark OC3: 6 m, 10 s in 20 m of water
// (Jonkman & Musial 2010, from memory): λ 121.2 m, KC 4.05 on 6 m.
func TestSeaOfTheMonopile(t *testing.T) {
	w := seaAt(6, 10, 20)
	about(t, "wavelength", 2*math.Pi/w.k, 121.24, 1e-3)
	about(t, "KC", w.speed()*10/6, 4.0458, 1e-3)
	about(t, "speed at the bed over that at the surface", w.decay(-20), 1/math.Cosh(w.kd()), 1e-12)
	about(t, "breaking", w.breaking(), 6/(0.142*121.24*math.Tanh(w.kd())), 1e-3)
	about(t, "second order", w.second(), 0.199, 0.01)
}

// Deep water is the limit of depth, and half a wavelength down e^(−π) is left.
func TestSeaDeep(t *testing.T) {
	deep, deepish := seaAt(2, 8, 0), seaAt(2, 8, 2000)
	about(t, "wave number", deepish.k, deep.k, 1e-12)
	about(t, "decay", deepish.decay(-30), deep.decay(-30), 1e-12)
	about(t, "half a wavelength down", deep.decay(-math.Pi/deep.k), math.Exp(-math.Pi), 1e-12)
	about(t, "a seventh is where a deep wave breaks", seaAt(2*math.Pi/deep.k/7, 8, 0).breaking(), 1/(7*0.142), 1e-9)
}

// Speeds solve continuity: the flow below a crest carries the wave, cη = ∫u dz.
func TestSeaCarriesItself(t *testing.T) {
	rapid.Check(t, func(rt *rapid.T) {
		w := seaAt(rapid.Float64Range(0.1, 10).Draw(rt, "height"), rapid.Float64Range(1, 20).Draw(rt, "period"), rapid.Float64Range(1, 60).Draw(rt, "depth"))
		const n = 4000
		carried := 0.0
		for i := range n {
			carried += w.speed() * w.decay(-w.d*(float64(i)+0.5)/n) * w.d / n
		}
		if c := w.omega / w.k; math.Abs(carried/(c*w.a)-1) > 1e-3 {
			rt.Fatalf("the flow carries %g of %g", carried, c*w.a)
		}
	})
}

// The largest of drag and inertia a quarter period apart, by trial.
func TestMorisonPeak(t *testing.T) {
	rapid.Check(t, func(rt *rapid.T) {
		drag := math.Pow(10, rapid.Float64Range(-2, 2).Draw(rt, "drag"))
		most := 0.0
		for i := range 20000 {
			phase := math.Pi * float64(i) / 20000
			most = math.Max(most, drag*math.Cos(phase)*math.Abs(math.Cos(phase))+math.Sin(phase))
		}
		if math.Abs(morison(drag, 1)/most-1) > 1e-6 {
			rt.Fatalf("F_D/F_I %g: %g, by trial %g", drag, morison(drag, 1), most)
		}
	})
}

// The integrals of the wetted part go over into those of the whole mode.
func TestWettedPartOfTheMode(t *testing.T) {
	one := func(float64) float64 { return 1 }
	ran := 0
	for _, support := range []canon.BeamSupport{canon.ClampedFree, canon.PinnedPinned, canon.ClampedClamped, canon.ClampedPinned} {
		f, err := canon.BeamModeFactors(support, 1)
		if err != nil {
			t.Fatal(err)
		}
		c := &cylinder{support: support, n: 1, factors: f}
		about(t, "mean", c.modalMean(1, 1, one), f.Mean/f.MeanSquare, 1e-5)
		about(t, "mean square", c.modalMean(1, 2, one), 1, 1e-5)
		half := c.modalMean(0.5, 2, one)
		if !(half > 0 && half < 1) || support == canon.PinnedPinned && math.Abs(half-0.5) > 1e-5 {
			t.Errorf("half of the length has %g of the mode", half)
		}
		ran++
	}
	// near the root a cantilever bends as x²: w = 1.758 x²(1 − …), ∫w² → 1.758² x⁵/5 over ¼
	f, _ := canon.BeamModeFactors(canon.ClampedFree, 1)
	c := &cylinder{support: canon.ClampedFree, n: 1, factors: f}
	about(t, "near the root", c.modalMean(0.02, 2, one), 1.758*1.758*math.Pow(0.02, 5)/5/0.25, 0.06)
	if ran != 4 {
		t.Errorf("ran %d supports", ran)
	}
}

// Volumes of a circle and a sphere half immersed, and the plate's added mass.
func TestFloaterGeometry(t *testing.T) {
	ball := &floater{shape: "sphere", d: 2, l: 2, b: 2}
	about(t, "half a sphere", ball.immersed(1), 2*math.Pi/3, 1e-12)
	about(t, "a whole sphere", ball.immersed(2), 4*math.Pi/3, 1e-12)
	about(t, "front of half a sphere", ball.front(1), math.Pi/2, 1e-12)
	log := &floater{shape: "horizontal-cylinder", d: 2, l: 2, b: 5}
	about(t, "half a cylinder", log.immersed(1), 5*math.Pi/2, 1e-12)
	about(t, "its waterplane", log.area(1), 10, 1e-12)
	for _, draft := range []float64{0.3, 1, 1.7} { // dV/dT is the waterplane
		for _, b := range []*floater{ball, log} {
			about(t, "dV/dT", (b.immersed(draft+1e-5)-b.immersed(draft-1e-5))/2e-5, b.area(draft), 1e-6)
		}
	}
	about(t, "square plate", broadside(1, 1), 0.4547, 1e-3)
	about(t, "strip", broadside(1, 1000), math.Pi/4*1000, 1e-3)
	about(t, "at the end of the table", broadside(1, 10*(1+1e-9)), broadside(1, 10*(1-1e-9)), 1e-6)
}

// Damping by the layers against the integrals of the potential, done by
// quadrature: rectangle 1.5 × 0.7, h 0.4; circle R 0.8, h 0.6.
func TestSloshingDampingByQuadrature(t *testing.T) {
	const n = 400
	rect := &tank{l: 1.5, b: 0.7, h: 0.4, unit: 1.5}
	k := math.Pi / 1.5
	walls, volume := 0.0, 0.0
	for i := range n {
		x := 1.5 * (float64(i) + 0.5) / n
		walls += k * k * math.Pow(math.Sin(k*x), 2) * 0.7 * 1.5 / n // bottom
		for j := range n {
			z := 0.4 * (float64(j) + 0.5) / n
			u2 := k * k * math.Pow(math.Sin(k*x)*math.Cosh(k*z), 2)
			w2 := k * k * math.Pow(math.Cos(k*x)*math.Sinh(k*z), 2)
			volume += (u2 + w2) * 0.7 * 1.5 / n * 0.4 / n
			walls += 2 * (u2 + w2) * 1.5 / n * 0.4 / n // sides
			if i == 0 {
				walls += 2 * k * k * math.Pow(math.Sinh(k*z), 2) * 0.7 * 0.4 / n // ends
			}
		}
	}
	about(t, "rectangle", rect.layerDamping(), walls/volume/4, 1e-4)
	round := &tank{upright: true, l: 1.6, b: 1.6, h: 0.6, unit: 0.8}
	about(t, "circle", round.layerDamping(), roundLosses(0.8, 0.6)/4, 1e-3)
}

// roundLosses is ∫|∇φ|² over wall and bottom over that of the volume.
func roundLosses(radius, h float64) float64 {
	const n = 600
	k := uprightRoot / radius
	j1 := math.J1(uprightRoot)
	walls, volume := 0.0, 0.0
	for i := range n {
		r := radius * (float64(i) + 0.5) / n
		j := math.J1(k * r)
		slope := k * (math.J0(k*r) - j/(k*r))
		plan := math.Pi * (slope*slope + j*j/(r*r)) * r * radius / n // horizontal speeds, over θ
		up := math.Pi * k * k * j * j * r * radius / n
		walls += plan
		for m := range n {
			z := h * (float64(m) + 0.5) / n
			c, s := math.Cosh(k*z), math.Sinh(k*z)
			volume += (plan*c*c + up*s*s) * h / n
			if i == 0 {
				walls += math.Pi * radius * j1 * j1 * (c*c/(radius*radius) + k*k*s*s) * h / n
			}
		}
	}
	return walls / volume
}

// The deep circular tank against the measured law, ζ = 0.79 √ν/(R^¾ g^¼)
// (Mikishev & Dorozhkin, in NASA SP-106, from memory): theory of clean walls lies
// below it, by a factor between 1.2 and 1.6.
func TestSloshingDampingAgainstMeasurement(t *testing.T) {
	const radius, g, nu = 0.5, 9.81, 1e-6
	deep := &tank{upright: true, l: 1, b: 1, h: 2, unit: radius}
	omega := math.Sqrt(g * uprightRoot / radius)
	zeta := math.Sqrt(2*nu/omega) * deep.layerDamping()
	law := math.Sqrt(nu) / (math.Pow(radius, 0.75) * math.Pow(g, 0.25))
	about(t, "coefficient", zeta/law, 0.557, 0.005)
	if ratio := 0.79 * law / zeta; ratio < 1.2 || ratio > 1.6 {
		t.Errorf("measured over theory %g", ratio)
	}
}

// Rayleigh's quotient of the wall against the Ritz solution, which is lower.
func TestClampedWallAgainstRitz(t *testing.T) {
	ran := 0
	for _, aspect := range []float64{0.3, 0.7, 1, 2, 5} {
		lambda, _, err := canon.PlateMode("CCCF", aspect, 1, 1, 0.3)
		if err != nil {
			t.Fatal(err)
		}
		got := math.Sqrt(clampedWall(aspect, 1, 0.3)) * aspect * aspect
		if got < lambda*(1-1e-3) || got > 1.04*lambda {
			t.Errorf("aspect %g: λ² %.4g, Ritz %.4g", aspect, got, lambda)
		}
		ran++
	}
	if ran != 5 {
		t.Errorf("ran %d aspects", ran)
	}
}

// The bulging coefficient is continuous at the ends of its table, and gives the
// period of a worked tank: R 10 m, H 8 m, s 9.6 mm of steel, 0.123 s (Malhotra et
// al. 2000, from memory).
func TestImpulsiveCoefficient(t *testing.T) {
	for _, end := range []float64{0.3, 3} {
		about(t, "end of the table", impulsiveCoefficient(end*(1+1e-9)), impulsiveCoefficient(end*(1-1e-9)), 1e-6)
	}
	period := impulsiveCoefficient(0.8) * 8 * math.Sqrt(1000.0/2e11) / math.Sqrt(0.0096/10)
	about(t, "impulsive period", period, 0.123, 0.02)
}

// Numbers that standards print against linear theory, at any fill.
func TestStandardsAgainstLinearSloshing(t *testing.T) {
	ran := 0
	for _, fill := range []float64{0.15, 0.3, 0.5, 0.8, 1.2, 2} {
		_, share, err := canon.UprightTank(1, 2*fill)
		if err != nil {
			t.Fatal(err)
		}
		about(t, "Housner's share", criterion.Housner(fill), share, 0.02)
		about(t, "convective period", criterion.APIConvectiveRatio(fill), 1, 1e-3)
		ran++
	}
	about(t, "T_c of D 20 m, H 8 m", 1.8*0.578/math.Sqrt(math.Tanh(3.68*8/20))*math.Sqrt(20), 4.9046, 1e-3)
	if ran != 6 {
		t.Errorf("ran %d fills", ran)
	}
}
