package fluid

import (
	"errors"
	"math"
	"strings"
	"testing"

	"pgregory.net/rapid"

	"regimed/regime/cite"
)

var gases = []struct {
	model *Model
	gas   *gas
}{
	{air, airGas}, {steam, steamGas}, {nitrogen, nitrogenGas}, {helium, heliumGas}, {hydrogen, hydrogenGas},
	{methane, methaneGas}, {carbonDioxide, carbonDioxideGas}, {argon, argonGas},
}

func TestEveryGasIsTested(t *testing.T) {
	count := 0
	for _, m := range All() {
		if m.Phase == Gas {
			count++
		}
	}
	if count != len(gases) {
		t.Errorf("%d gases in the catalogue, %d in the tests", count, len(gases))
	}
}

// The constants of the US Standard Atmosphere, 8314.32 J/(kmol·K) by 28.9644
// kg/kmol, give 287.05307 J/(kg·K); ISO 2533 prints 287.05287, which is less by
// 7e-7 and makes no digit of the tables different.
func TestGasConstantOfAir(t *testing.T) {
	if got := airGas.specificConstant(); !near(got, 287.05307, 1e-8) {
		t.Errorf("R = %.8g", got)
	}
	if got := thermalConductivityAir(288.15); !near(got, 2.5326e-2, 3e-5) {
		t.Errorf("k = %.6g W/(m·K), want 2.5326e-2", got)
	}
}

// Isobaric heat capacity by R of the ideal gases at 300 K and above, from
// memory of the JANAF tables.
func TestHeatCapacityAgainstTables(t *testing.T) {
	rows := []struct {
		gas   *gas
		T, cp float64 // J/(mol·K)
	}{
		{nitrogenGas, 300, 29.125}, {nitrogenGas, 1000, 32.70}, {hydrogenGas, 300, 28.85}, {hydrogenGas, 1000, 30.20},
		{heliumGas, 300, 20.786}, {argonGas, 1000, 20.786}, {carbonDioxideGas, 300, 37.22}, {carbonDioxideGas, 1000, 54.31},
		{methaneGas, 300, 35.71}, {methaneGas, 600, 52.23}, {steamGas, 400, 34.26}, {steamGas, 1000, 41.27},
	}
	for _, r := range rows {
		if got := (r.gas.isochoricHeat(r.T) + 1) * molarGasConstant; !near(got, r.cp, 1.2e-2) {
			t.Errorf("c_p at %g K = %.5g, want %.5g J/(mol·K)", r.T, got, r.cp)
		}
	}
	if len(rows) != 12 {
		t.Errorf("ran %d rows, want 12", len(rows))
	}
}

// Classical limits: vibrations frozen, and fully excited with one R each.
func TestHeatCapacityLimits(t *testing.T) {
	for _, g := range gases {
		if g.gas.ratio > 0 {
			continue
		}
		modes := 0.0
		for _, v := range g.gas.vibrations {
			modes += v.degeneracy
		}
		rigid := 1.5 + float64(g.gas.rotations)/2
		if got := g.gas.isochoricHeat(20); !near(got, rigid, 1e-6) {
			t.Errorf("%s: frozen c_v/R = %g, want %g", g.model.Name, got, rigid)
		}
		if got := g.gas.isochoricHeat(1e6); !near(got, rigid+modes, 1e-5) {
			t.Errorf("%s: excited c_v/R = %g, want %g", g.model.Name, got, rigid+modes)
		}
	}
}

// The ideal gas: ρ = p/RT, ρc² = γp; what depends on temperature alone does
// not feel the pressure; viscosity and sound speed rise with temperature.
func TestIdealGasIdentities(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		g := rapid.SampledFrom(gases).Draw(t, "gas")
		s := State{Temperature: rapid.Float64Range(g.model.Range.Temperature.Min, g.model.Range.Temperature.Max-5).Draw(t, "T")}
		i := g.model.PressureRange(s)
		s.Pressure = rapid.Float64Range(i.Min, i.Max/2).Draw(t, "p")
		p, err := g.model.At(s)
		if err != nil {
			t.Fatal(err)
		}
		if !near(p.BulkModulus, p.HeatCapacityRatio*s.Pressure, 1e-12) {
			t.Fatalf("ρc² = %g, γp = %g", p.BulkModulus, p.HeatCapacityRatio*s.Pressure)
		}
		double := s
		double.Pressure *= 2
		q, err := g.model.At(double)
		if err != nil {
			t.Fatal(err)
		}
		if !near(q.Density, 2*p.Density, 1e-12) || q.Viscosity != p.Viscosity || q.SoundSpeed != p.SoundSpeed || q.Prandtl != p.Prandtl {
			t.Fatalf("%+v at twice the pressure %+v", p, q)
		}
		warmer := g.gas.at(State{Temperature: s.Temperature + 5, Pressure: s.Pressure})
		if !(warmer.Viscosity > p.Viscosity && warmer.SoundSpeed > p.SoundSpeed && warmer.HeatCapacityRatio <= p.HeatCapacityRatio) {
			t.Fatalf("%+v, 5 K warmer %+v", p, warmer)
		}
		if p.Prandtl < 0.6 || p.Prandtl > 1.1 || p.HeatCapacityRatio < 1.1 || p.HeatCapacityRatio > 5.0/3+1e-12 {
			t.Fatalf("Pr %g, γ %g", p.Prandtl, p.HeatCapacityRatio)
		}
	})
}

// Eucken's relation is exact for monatomic gases.
func TestEuckenMonatomic(t *testing.T) {
	for _, g := range []*gas{heliumGas, argonGas} {
		if got := g.prandtl(300, g.viscosity.at(300)); !near(got, 2.0/3, 1e-12) {
			t.Errorf("Pr = %.15g, want 2/3", got)
		}
	}
}

// Sutherland's law of steam and the IAPWS viscosity of vanishing density, two
// works, agree within 3 %.
func TestSteamViscosityAgainstIAPWS(t *testing.T) {
	for T := 375.0; T <= 1000; T += 25 {
		if got, want := steamGas.viscosity.at(T), viscosityDiluteWater(T); !near(got, want, 3e-2) {
			t.Errorf("μ(%g K) = %.5g, IAPWS %.5g", T, got, want)
		}
	}
}

// Second virial coefficients in cm³/mol, rounded, from memory of Dymond et al.
// 2002: within 10 cm³/mol or a fifth.
func TestSecondVirialAgainstTables(t *testing.T) {
	rows := []struct {
		gas  *gas
		T, B float64
	}{
		{airGas, 300, -7.5}, {nitrogenGas, 300, -4.5}, {nitrogenGas, 200, -35}, {argonGas, 300, -15.5}, {methaneGas, 300, -42},
		{methaneGas, 200, -105}, {carbonDioxideGas, 300, -122}, {carbonDioxideGas, 220, -248}, {heliumGas, 300, 11.8},
		{hydrogenGas, 300, 14.5}, {steamGas, 400, -330}, {steamGas, 600, -115},
	}
	for _, r := range rows {
		got := r.gas.secondVirial(r.T) * 1e6
		if math.Abs(got-r.B) > math.Max(10, math.Abs(r.B)/5) {
			t.Errorf("B(%g K) = %.4g, %s has %.4g cm³/mol", r.T, got, cite.Dymond2002.Short, r.B)
		}
	}
	if len(rows) != 12 {
		t.Errorf("ran %d rows, want 12", len(rows))
	}
}

// Wherever a gas is answered it is within 5 % of the virial gas.
func TestGasIsNearlyIdealWhereAnswered(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		g := rapid.SampledFrom(gases).Draw(t, "gas")
		i := g.model.Range
		s := State{
			Temperature: rapid.Float64Range(i.Temperature.Min, i.Temperature.Max).Draw(t, "T"),
			Pressure:    rapid.Float64Range(i.Pressure.Min, i.Pressure.Max).Draw(t, "p"),
		}
		if _, err := g.model.At(s); err != nil {
			return
		}
		deviation := g.gas.secondVirial(s.Temperature) * s.Pressure / (molarGasConstant * s.Temperature)
		if math.Abs(deviation) > largestDeviation*(1+1e-12) {
			t.Fatalf("%s at %+v: pv/RT − 1 = %g", g.model.Name, s, deviation)
		}
	})
}

func TestSteamIsRefusedNearSaturation(t *testing.T) {
	for T := 373.15; T < 450; T += 5 {
		saturation := saturationPressureWater(T)
		if _, err := steam.At(State{Temperature: T, Pressure: 0.85 * saturation}); err != nil {
			t.Errorf("0.85 of saturation: %v", err)
		}
		_, err := steam.At(State{Temperature: T, Pressure: 0.95 * saturation})
		var refused *RangeError
		if !errors.As(err, &refused) || refused.Input != Pressure || !strings.Contains(refused.Reason, "saturation") {
			t.Errorf("0.95 of saturation at %g K: %v", T, err)
		}
	}
	if _, err := steam.At(State{Temperature: 373.15, Pressure: standardAtmosphere}); err == nil {
		t.Error("saturated steam is answered")
	}
}

// Liquid water and steam never answer for the same state.
func TestWaterAndSteamExcludeOneAnother(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s := State{
			Temperature: rapid.Float64Range(373.15, 623.15).Draw(t, "T"),
			Pressure:    math.Pow(10, rapid.Float64Range(3, 7).Draw(t, "log p")),
		}
		_, liquid := water.At(s)
		_, vapour := steam.At(s)
		if liquid == nil && vapour == nil {
			t.Fatalf("both answer at %+v", s)
		}
	})
}

// Saturation pressures of carbon dioxide in Pa, from memory of its tables: the
// bound on the departure from the ideal gas stays below seven tenths of them.
func TestCarbonDioxideIsKeptFromSaturation(t *testing.T) {
	rows := []struct{ T, p float64 }{{220, 0.599e6}, {250, 1.785e6}, {280, 4.161e6}, {300, 6.713e6}}
	for _, r := range rows {
		if limit := carbonDioxide.PressureRange(State{Temperature: r.T}).Max; limit > 0.7*r.p {
			t.Errorf("at %g K answered to %.3g Pa, saturation is %.3g Pa", r.T, limit, r.p)
		}
	}
	if len(rows) != 4 {
		t.Errorf("ran %d rows, want 4", len(rows))
	}
}

// All other gases are above their critical temperature over the whole range.
func TestOtherGasesAreSupercritical(t *testing.T) {
	critical := map[*Model]float64{air: 132.6, nitrogen: 126.2, helium: 5.2, hydrogen: 33.2, methane: 190.6, argon: 150.7} // K, from memory
	for m, Tc := range critical {
		if m.Range.Temperature.Min <= Tc {
			t.Errorf("%s begins at %g K, critical is %g K", m.Name, m.Range.Temperature.Min, Tc)
		}
	}
	if len(critical) != len(gases)-2 {
		t.Errorf("ran %d gases, want %d", len(critical), len(gases)-2)
	}
}
