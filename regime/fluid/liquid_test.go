package fluid

import (
	"testing"
)

// Oils thin with heat and keep their order; the grade and the value at 100 °C
// are met.
func TestOils(t *testing.T) {
	grades := []mineralOil{{32, 5.4, 872}, {46, 6.8, 877}, {68, 8.7, 882}}
	if len(oils) != len(grades) {
		t.Fatalf("%d oils, want %d", len(oils), len(grades))
	}
	for i, o := range grades {
		for _, c := range []struct{ t, ν float64 }{{40, o.ν40}, {100, o.ν100}} {
			p, err := oils[i].At(State{Temperature: zeroCelsius + c.t, Pressure: standardAtmosphere})
			if err != nil {
				t.Fatal(err)
			}
			if got := p.Viscosity / p.Density * 1e6; !near(got, c.ν, 1e-9) {
				t.Errorf("%s at %g °C: %.6g mm²/s, want %g", oils[i].Name, c.t, got, c.ν)
			}
		}
	}
	for c := oilCold; c < oilHot; c += 5 {
		T := zeroCelsius + c
		for i, o := range grades {
			if o.kinematic(T+5) >= o.kinematic(T) {
				t.Errorf("%s thickens at %g °C", oils[i].Name, c)
			}
			if i > 0 && o.kinematic(T) <= grades[i-1].kinematic(T) {
				t.Errorf("%s is thinner than the grade below it at %g °C", oils[i].Name, c)
			}
		}
	}
}

// An oil of grade 46 and viscosity index 100 has about 130 mm²/s at 20 °C and
// 29 mm²/s at 50 °C (typical data sheets, from memory).
func TestOilAwayFromItsGrade(t *testing.T) {
	o := mineralOil{46, 6.8, 877}
	for _, c := range []struct{ t, ν float64 }{{20, 130}, {50, 29.5}} {
		if got := o.kinematic(zeroCelsius+c.t) * 1e6; !near(got, c.ν, 0.1) {
			t.Errorf("at %g °C %.4g mm²/s, want %g", c.t, got, c.ν)
		}
	}
}

// The two metals thin, lighten and slow down with heat, and boil where they
// should: sodium at 1155 K, the eutectic at 1927 K (from memory of their
// sources).
func TestLiquidMetals(t *testing.T) {
	for _, m := range []*Model{sodium, leadBismuth} {
		r := m.Range.Temperature
		for T := r.Min; T+10 < r.Max; T += 10 {
			a, b := m.eval(State{Temperature: T}), m.eval(State{Temperature: T + 10})
			if !(b.Density < a.Density && b.Viscosity < a.Viscosity && b.SoundSpeed < a.SoundSpeed &&
				b.SurfaceTension < a.SurfaceTension && b.VapourPressure > a.VapourPressure) {
				t.Errorf("%s at %g K: %+v, 10 K warmer %+v", m.Name, T, a, b)
			}
		}
	}
	if got := sodiumAt(State{Temperature: 1154.7}).VapourPressure; !near(got, standardAtmosphere, 0.02) {
		t.Errorf("sodium at its boiling point: %.5g Pa", got)
	}
	if got := leadBismuthAt(State{Temperature: 1927}).VapourPressure; !near(got, standardAtmosphere, 0.1) {
		t.Errorf("lead-bismuth at its boiling point: %.5g Pa", got)
	}
}

// What leadBismuthAt says about the other work.
func TestLeadBismuthAgainstTheOtherWork(t *testing.T) {
	for T := 400.0; T <= 800; T += 25 {
		p := leadBismuthAt(State{Temperature: T})
		if other := 11096 - 1.3236*T; !near(p.Density, other, 2e-3) {
			t.Errorf("ρ(%g K) = %.6g, other %.6g", T, p.Density, other)
		}
		if other := 1773 + 0.1049*T - 2.873e-4*T*T; !near(p.SoundSpeed, other, 2e-2) {
			t.Errorf("c(%g K) = %.6g, other %.6g", T, p.SoundSpeed, other)
		}
	}
}

// The vapour pressure of the aqueous liquids follows from that of water:
// blood as water, glycol by Raoult with 0.775 moles of water per mole.
func TestAqueousVapourPressures(t *testing.T) {
	if got := blood.eval(blood.Default).VapourPressure; !near(got, saturationPressureWater(310.15), 0.01) {
		t.Errorf("blood %g Pa, water %g Pa", got, saturationPressureWater(310.15))
	}
	want := 0.775 * saturationPressureWater(293.15)
	if got := glycol.eval(glycol.Default).VapourPressure; !near(got, want, 0.02) {
		t.Errorf("glycol %g Pa, Raoult %g Pa", got, want)
	}
}
