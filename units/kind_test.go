package units

import (
	"errors"
	"testing"

	"gonum.org/v1/gonum/unit"
)

func TestKindsAreComplete(t *testing.T) {
	names := map[string]bool{}
	for _, k := range Kinds() {
		if names[k.String()] || k.String() == "" {
			t.Errorf("kind %d: name %q", k, k)
		}
		names[k.String()] = true
		if len(ladders[k]) == 0 {
			t.Errorf("%s has no unit to be written in", k)
		}
		q, err := Parse(k.Example(), k)
		if err != nil || q.Value <= 0 {
			t.Errorf("%s: example: %v", k, err)
		}
		q, err = FromValueUnit(1, k.SI(), k)
		if err != nil || q.Value != 1 {
			t.Errorf("%s: 1 %s is %v, %v", k, k.SI(), q.Value, err)
		}
	}
	if len(names) != 37 || int(kindCount) != 37 || kindCount > 64 {
		t.Errorf("%d kinds", len(names))
	}
	if s := Kind(200).String(); s != "unknown kind" {
		t.Error(s)
	}
	if _, err := Parse("1 m", Kind(200)); err == nil {
		t.Error("a kind that does not exist accepts a length")
	}
	if m, l, s := Kind(200).Exponents(); m != 0 || l != 0 || s != 0 {
		t.Error("a kind that does not exist has a dimension")
	}
}

func TestExponents(t *testing.T) {
	rows := []struct {
		k       Kind
		m, l, s int
	}{
		{Dimensionless, 0, 0, 0}, {Length, 0, 1, 0}, {Frequency, 0, 0, -1}, {Density, 1, -3, 0}, {InertiaPerLength, 1, 1, 0},
		{Pressure, 1, -1, -2}, {DynamicViscosity, 1, -1, -1}, {KinematicViscosity, 0, 2, -1}, {RotationalStiffness, 1, 2, -2},
		{BendingStiffnessBeam, 1, 3, -2}, {BendingStiffnessPlate, 1, 2, -2}, {Resistance, 1, 2, -3}, {Capacitance, -1, -2, 4},
		{ForceFactor, 1, 1, -2}, {SpecificHeat, 0, 2, -2}, {ThermalConductivity, 1, 1, -3}, {Angle, 0, 0, 0}, {Temperature, 0, 0, 0},
	}
	for _, r := range rows {
		if m, l, s := r.k.Exponents(); m != r.m || l != r.l || s != r.s {
			t.Errorf("%s: %d %d %d", r.k, m, l, s)
		}
	}
	if len(rows) != 18 {
		t.Errorf("%d rows", len(rows))
	}
	// Changing base units changes every factor by the power that Exponents says.
	for _, k := range Kinds() {
		if k == Salinity {
			continue // a pure number of which Value counts the thousandths
		}
		c := mustCompile(t, k.SI())
		d := c.u.Dimensions()
		if k == RotationalStiffness {
			delete(d, unit.AngleDim)
		}
		if !unit.DimensionsMatch(unit.New(1, d), unit.New(1, k.Dimensions())) {
			t.Errorf("%s: %s has dimension %s, the kind %s", k, k.SI(), d, k.Dimensions())
		}
	}
}

// What dimensions can't separate, kinds do.
func TestKindsSeparate(t *testing.T) {
	rows := []struct {
		text string
		k    Kind
		code Code // "" if accepted
	}{
		{"12 Hz", Frequency, ""}, {"12 cycle/s", Frequency, ""}, {"75.4 rad/s", Frequency, ""}, {"720 rpm", Frequency, ""}, {"12 rev/s", Frequency, ""},
		{"720 turn/min", Frequency, ""}, {"720 cpm", Frequency, ""}, {"12 1/s", Frequency, CodeWrongKind}, {"12 s^-1", Frequency, CodeWrongKind},
		{"12 s⁻¹", Frequency, CodeWrongKind}, {"12 Bq", Frequency, CodeWrongKind}, {"12 1/min", Frequency, CodeWrongKind}, {"12 rad", Frequency, CodeWrongDimension},
		{"12 s", Frequency, CodeWrongDimension}, {"12 Hz m", Speed, CodeWrongDimension},

		{"2 bar", Pressure, ""}, {"2 bara", Pressure, ""}, {"30 psia", Pressure, ""}, {"2 barg", Pressure, ""}, {"30 psig", Pressure, ""}, {"200 kPag", Pressure, ""},
		{"2 bar", GaugePressure, ""}, {"2 barg", GaugePressure, ""}, {"2 bara", GaugePressure, CodeWrongKind}, {"30 psia", GaugePressure, CodeWrongKind},
		{"30 psi", PressureDifference, ""}, {"30 psig", PressureDifference, ""}, {"30 psia", PressureDifference, CodeWrongKind},
		{"30 ksi", Modulus, ""}, {"30 psig", Modulus, CodeWrongKind}, {"30 psia", Modulus, CodeWrongKind}, {"30 psig", StiffnessPerLength, CodeWrongKind},

		{"1 mPa s", DynamicViscosity, ""}, {"1 kg/(m s)", DynamicViscosity, ""}, {"1 cSt", DynamicViscosity, CodeWrongKind}, {"1 m2/s", DynamicViscosity, CodeWrongKind},
		{"1 mm2/s", KinematicViscosity, ""}, {"1 cP", KinematicViscosity, CodeWrongKind}, {"1 lbf s/ft2", KinematicViscosity, CodeWrongKind},

		{"1 kg", Mass, ""}, {"1 N", Mass, CodeWrongDimension}, {"1 lbf", Mass, CodeWrongDimension}, {"1 lbm", Force, CodeWrongDimension}, {"1 lb", Force, CodeAmbiguousUnit},
		{"30 deg", Angle, ""}, {"0.5 rad", Angle, ""}, {"0.1 cycle", Angle, ""}, {"0.5", Angle, CodeMissingUnit}, {"0.5 rad", Dimensionless, CodeWrongDimension},
		{"5 N m", RotationalStiffness, ""}, {"5 N m/rad", RotationalStiffness, ""}, {"5 N m/deg", RotationalStiffness, ""}, {"5 N m/rad", BendingStiffnessPlate, CodeWrongDimension},
		{"5 Pa", StiffnessPerLength, ""}, {"5 N/m2", StiffnessPerLength, ""}, {"5 N/m", Stiffness, ""}, {"5 N/m", SurfaceTension, ""}, {"5 kg/s2", ForcePerLength, ""},

		{"35 psu", Salinity, ""}, {"35 psu", Dimensionless, CodeWrongKind}, {"35 ppt", Damping, CodeWrongKind}, {"35", Salinity, CodeMissingUnit},
		{"0.02", Damping, ""}, {"2 %", Damping, ""}, {"5 %", Dimensionless, ""}, {"3 mm/m", Dimensionless, ""}, {"20 ‰", Dimensionless, ""}, {"2", Mass, CodeMissingUnit},
		{"7 T m", ForceFactor, ""}, {"7 N/A", ForceFactor, ""}, {"7 V s/m", ForceFactor, ""}, {"7 Wb/m", ForceFactor, ""}, {"7 T", ForceFactor, CodeWrongDimension},
	}
	ran := 0
	for _, r := range rows {
		ran++
		_, err := Parse(r.text, r.k)
		if r.code == "" {
			if err != nil {
				t.Errorf("%s as %s: %v", r.text, r.k, err)
			}
			continue
		}
		var e *Error
		if !errors.As(err, &e) || e.Code != r.code {
			t.Errorf("%s as %s: %v, want %s", r.text, r.k, err, r.code)
		}
	}
	if ran != 73 {
		t.Errorf("%d rows", ran)
	}
}

func TestGaugeIsMarkedOnlyWhereAmbientIsToBeAdded(t *testing.T) {
	rows := []struct {
		text string
		k    Kind
		want bool
	}{
		{"2 barg", Pressure, true}, {"30 psig", Pressure, true}, {"1 .. 2 barg", Pressure, true}, {"2 +- 0.1 barg", Pressure, true},
		{"2 bar", Pressure, false}, {"2 bara", Pressure, false}, {"2 barg", GaugePressure, false}, {"2 barg", PressureDifference, false},
	}
	for _, r := range rows {
		q, err := Parse(r.text, r.k)
		if err != nil || q.Gauge != r.want {
			t.Errorf("%s as %s: %v, %v", r.text, r.k, q, err)
		}
	}
	if len(rows) != 8 {
		t.Errorf("%d rows", len(rows))
	}
}
