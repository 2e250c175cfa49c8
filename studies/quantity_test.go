package studies

import (
	"math"
	"strings"
	"testing"

	floatcmp "gonum.org/v1/gonum/floats/scalar"
)

func TestParseQuantity(t *testing.T) {
	cases := []struct {
		text string
		q    Quantity
		want float64
	}{
		{"60 bar", Pressure, 6e6},
		{"60bar", Pressure, 6e6},
		{"6 MPa", Pressure, 6e6},
		{"6e6", Pressure, 6e6},
		{"101.325 kPa", Pressure, 101325},
		{"0.3 mm", Length, 3e-4},
		{"+5 um", Length, 5e-6},
		{".5 cm", Length, 5e-3},
		{"12 cm3", Volume, 12e-6},
		{"1.5 l", Volume, 1.5e-3},
		{"700 degC", Temperature, 973.15},
		{"-40 degC", Temperature, 233.15},
		{"973.15 K", Temperature, 973.15},
		{"30 K", TemperatureDifference, 30},
		{"1500 rpm", Frequency, 25},
		{"180 deg", Angle, math.Pi},
		{"5 %", Number, 0.05},
		{"5 -", Number, 5},
		{"0.5", Number, 0.5},
		{"40000 h", Duration, 1.44e8},
		{"20 W/cm2", HeatFlux, 2e5},
		{"6  kW/(m2   K)", FilmCoefficient, 6000},
		{" 2 kW ", Power, 2000},
		{"20 N m", Torque, 20},
		{"200 g/s", MassFlow, 0.2},
	}
	for _, c := range cases {
		const rounding = 2e-16 // one rounding
		got, err := ParseQuantity(c.text, c.q)
		if err != nil || !floatcmp.EqualWithinRel(got, c.want, rounding) {
			t.Errorf("%q: got %v, %v; want %v", c.text, got, err, c.want)
		}
	}
}

func TestQuantityMistakes(t *testing.T) {
	cases := []struct {
		text string
		q    Quantity
		code Code
		says string
	}{
		{"1,5 bar", Pressure, NumberFormat, "1.5 bar"},
		{"012", Number, NumberFormat, "write 12"},
		{"-007 mm", Length, NumberFormat, "write -7 mm"},
		{"1_000 mm", Length, NumberFormat, "write 1000 mm"},
		{"1 000 mm", Length, NumberFormat, "write 1000 mm"},
		{"1'000 mm", Length, NumberFormat, "write 1000 mm"},
		{"1e999", Number, NumberFormat, "too large"},
		{"1e308 MPa", Pressure, NumberFormat, "too large"},
		{"many", Number, NumberExpected, "not a number"},
		{"", Number, NumberExpected, "not a number"},
		{".inf", Number, NumberExpected, "not a number"},
		{"NaN", Number, NumberExpected, "not a number"},
		{"1.2.3", Number, NumberExpected, "not a number"},
		{"1-2", Number, NumberExpected, "not a number"},
		{"0x10", Number, UnitUnknown, "x10"},
		{"60 Bar", Pressure, UnitUnknown, "did you mean bar?"},
		{"700 °C", Temperature, UnitUnknown, "did you mean degC?"},
		{"12 ccm", Volume, UnitUnknown, "did you mean cm3?"},
		{"5 parsec", Length, UnitUnknown, "write it in m, mm, cm or um"},
		{"60 mm", Pressure, UnitWrong, "a pressure is wanted"},
		{"30 degC", TemperatureDifference, UnitWrong, "write it in K"},
		{"5 bar", Number, UnitWrong, "a plain number is wanted"},
	}
	for _, c := range cases {
		_, f := parseQuantity(c.text, c.q)
		if f == nil || f.code != c.code || !strings.Contains(f.Error(), c.says) {
			t.Errorf("%q: got %v, want %s and %q", c.text, f, c.code, c.says)
		}
	}
}

func TestFormat(t *testing.T) {
	cases := []struct {
		si     float64
		q      Quantity
		unit   string
		digits int
		want   string
	}{
		{4260.4, Power, "kW", 3, "4.26"},
		{12345.6, Power, "kW", 3, "12.3"},
		{973.4, Temperature, "degC", 3, "700"},
		{272.9, Temperature, "degC", 3, "0"},
		{1234.0 / 60, Frequency, "rpm", 3, "1234"},
		{math.Pi / 2, Angle, "deg", 4, "90.00"},
		{6e-5, Length, "mm", 4, "0.06000"},
		{0.31742, Number, "%", 3, "31.7"},
		{0, Number, "-", 3, "0"},
		{1.2e-7, Number, "-", 3, "1.2e-07"},
		{-0.00052, Number, "-", 3, "-0.000520"},
	}
	for _, c := range cases {
		if got := FormatSI(c.si, c.q, c.unit, c.digits); got != c.want {
			t.Errorf("%v in %s: got %s, want %s", c.si, c.unit, got, c.want)
		}
	}
}

// TestUnits: every unit leads there and back, and its SI unit is 1.
func TestUnits(t *testing.T) {
	const rounding = 4e-16 // two operations
	for _, u := range units() {
		if got := u.of(u.si(7)); !floatcmp.EqualWithinRel(got, 7, 1000*rounding) || (u.offset == 0 && !floatcmp.EqualWithinRel(got, 7, rounding)) {
			t.Errorf("%s: 7 comes back as %v", u.name, got)
		}
		if UnitNames(u.quantity)[0] == u.name && u.si(7) != 7 {
			t.Errorf("%s is not SI", u.name)
		}
	}
}

// FuzzQuantity: what is read is finite, and what is written of it reads as the same value.
func FuzzQuantity(f *testing.F) {
	for _, s := range []string{"60 bar", "1,5 bar", "012", "1_000", "-3e-5 mm", "700 degC", "90 deg", "1e308 MPa", "5 %", "0.1 rpm", "\xff", "+", "1e", "1 2 3"} {
		for q := range quantities {
			f.Add(s, uint8(q))
		}
	}
	f.Fuzz(func(t *testing.T, s string, kind uint8) {
		q := Quantity(kind) % quantities
		v, fault := parseQuantity(s, q)
		if fault != nil {
			if fault.text == "" || fault.code == "" {
				t.Fatalf("%q: empty fault", s)
			}
			return
		}
		if math.IsNaN(v) || math.IsInf(v, 0) {
			t.Fatalf("%q reads as %v", s, v)
		}
		for _, name := range UnitNames(q) {
			text := exactText(v, q, name)
			back, fault := parseQuantity(text, q)
			if fault != nil || back != v {
				t.Fatalf("%q reads as %v, written %q, read again %v, %v", s, v, text, back, fault)
			}
		}
	})
}

// TestOtherSpellings: common spellings of a unit lead to ours.
func TestOtherSpellings(t *testing.T) {
	for spelling, want := range map[string]string{
		"C": "degC", "ccm": "cm3", "1/min": "rpm", "1/s": "Hz", "°": "deg", "dm3": "l", "µm": "um", "Nm": "N m",
		"W/m2K": "W/(m2 K)", "percent": "%", "years": "a", "hours": "h",
	} {
		u, known := unitOf(want, Number)
		if !known {
			t.Errorf("%s is no unit", want)
			continue
		}
		_, f := parseQuantity("5 "+spelling, u.quantity)
		if f == nil || f.code != UnitUnknown || f.hint != didYouMean(want) {
			t.Errorf("%s: %v", spelling, f)
		}
	}
}

func TestDimensionNames(t *testing.T) {
	for q := range quantities {
		want := q.String()
		switch q {
		case Angle:
			want = "plain number"
		case TemperatureDifference:
			want = "temperature"
		case Energy:
			want = "torque" // the same exponents
		}
		if got := q.dimension().String(); got != want {
			t.Errorf("%s is called %s", q, got)
		}
	}
	if got := (dimension{1, 0, -2, 0.5}).String(); got != "m s^-2 K^0.5" {
		t.Errorf("got %s", got)
	}
}
