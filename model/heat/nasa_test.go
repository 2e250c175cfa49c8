package heat

import (
	"math"
	"testing"
)

// TestCoefficients: the literals are those of nasa7_coefficients.csv, to the last digit.
func TestCoefficients(t *testing.T) {
	byName := map[string]Species{}
	for s := range speciesCount {
		byName[s.String()] = s
	}
	found := map[Species]int{}
	for _, row := range readTable(t, "nasa7_coefficients.csv") {
		s, ok := byName[row["species"]]
		if !ok {
			continue // helium, no part of a flame
		}
		low, high := s.coefficients()
		want := [7]float64{}
		for i, key := range []string{"a1", "a2", "a3", "a4", "a5", "a6", "a7"} {
			want[i] = number(t, row, key)
		}
		if from := number(t, row, "T_low_K"); from == nasaLow {
			found[s] |= 1
			if low != want {
				t.Errorf("%v below 1000 K: %v, want %v", s, low, want)
			}
		}
		if to := number(t, row, "T_high_K"); to == nasaHigh {
			found[s] |= 2
			if high != want {
				t.Errorf("%v above 1000 K: %v, want %v", s, high, want)
			}
		}
	}
	for s := range speciesCount {
		if found[s] != 3 {
			t.Errorf("%v: no rows for all of its range", s)
		}
	}
}

// TestSpecies compares with heats of formation, standard entropies and heat capacities at 298.15 K as in tables of
// thermochemistry (CODATA and textbooks, from memory, to their last digit as given here).
func TestSpecies(t *testing.T) {
	for _, c := range []struct {
		s        Species
		h, S, cp float64 // [kJ/mol, J/(mol K), J/(mol K)]
		mass     float64 // [g/mol]
	}{
		{N2, 0, 191.61, 29.12, 28.013}, {O2, 0, 205.15, 29.38, 31.999}, {Ar, 0, 154.85, 20.79, 39.948},
		{CO2, -393.51, 213.79, 37.13, 44.010}, {H2O, -241.83, 188.84, 33.59, 18.015}, {CO, -110.53, 197.66, 29.14, 28.010},
		{H2, 0, 130.68, 28.84, 2.016}, {CH4, -74.6, 186.3, 35.7, 16.043}, {C3H8, -104.7, 270.3, 73.6, 44.096},
	} {
		h, f1 := c.s.Enthalpy(reference)
		S, f2 := c.s.Entropy(reference)
		cp, f3 := c.s.Cp(reference)
		if f1 != OK || f2 != OK || f3 != OK {
			t.Fatalf("%v: fault", c.s)
		}
		// Entropies of the older tables are for 1 atm or round otherwise: 0.2 J/(mol K).
		if !(math.Abs(h/1e3-c.h) < 0.1) || !(math.Abs(S-c.S) < 0.2) || !(math.Abs(cp-c.cp) < 0.1) {
			t.Errorf("%v: h %.2f kJ/mol, s %.2f, cp %.2f J/(mol K), want %g, %g, %g", c.s, h/1e3, S, cp, c.h, c.S, c.cp)
		}
		if m := 1e3 * c.s.MolarMass(); !(math.Abs(m-c.mass) < 2e-3) {
			t.Errorf("%v: %.4f g/mol, want %g", c.s, m, c.mass)
		}
	}
}

// TestSpeciesConsistent: dh = cp dT and ds = cp dT/T, by central differences, in both ranges.
func TestSpeciesConsistent(t *testing.T) {
	for s := range speciesCount {
		for _, T := range []float64{250, 600, 990, 1010, 2000, 5000} {
			const d = 0.5
			cp, _ := s.Cp(T)
			h1, _ := s.Enthalpy(T - d)
			h2, _ := s.Enthalpy(T + d)
			s1, _ := s.Entropy(T - d)
			s2, _ := s.Entropy(T + d)
			if e := (h2-h1)/(2*d)/cp - 1; !(math.Abs(e) < 1e-6) {
				t.Errorf("%v %g K: dh/dT off cp by %g", s, T, e)
			}
			if e := T*(s2-s1)/(2*d)/cp - 1; !(math.Abs(e) < 3e-6) {
				t.Errorf("%v %g K: T ds/dT off cp by %g", s, T, e)
			}
		}
		for _, T := range []float64{199, 6001, math.NaN(), math.Inf(1)} {
			_, f1 := s.Cp(T)
			_, f2 := s.Enthalpy(T)
			_, f3 := s.Entropy(T)
			if f1 != TemperatureRange || f2 != TemperatureRange || f3 != TemperatureRange {
				t.Errorf("%v %g K: no fault", s, T)
			}
		}
	}
}

// TestMixture: enthalpy and temperature invert each other over the range and across 1000 K, where the shift that makes the
// enthalpy continuous stays below 1e-5 of it.
func TestMixture(t *testing.T) {
	for _, kind := range FuelKinds()[:GivenFuel] {
		c := burn(t, kind, 1.2)
		for T := 200.0; T <= 6000; T += 12.5 {
			h := c.GasEnthalpy(T)
			got, fault := c.GasTemperature(h)
			if fault != OK || !(math.Abs(got/T-1) < 1e-12) {
				t.Errorf("%v: %g K comes back as %.13g K %v", kind, T, got, fault)
			}
			if T > 200 && T < 6000 {
				if e := (c.GasEnthalpy(T+0.1)-c.GasEnthalpy(T-0.1))/0.2/c.GasCp(T) - 1; !(math.Abs(e) < 1e-5) {
					t.Errorf("%v %g K: dh/dT off cp by %g", kind, T, e)
				}
			}
		}
		if _, fault := c.GasTemperature(c.GasEnthalpy(6000) * 1.001); fault != TemperatureRange {
			t.Errorf("%v: %v above 6000 K", kind, fault)
		}
		if got := c.GasEnthalpy(reference); !(math.Abs(got) < 1e-6) {
			t.Errorf("%v: enthalpy %g J/kg at 298.15 K", kind, got)
		}
		// Against the species one by one.
		for _, T := range []float64{400, 900, 1400, 2600} {
			var want float64
			for s := range speciesCount {
				h, _ := s.Enthalpy(T)
				h0, _ := s.Enthalpy(reference)
				want += c.products[s] * (h - h0)
			}
			if e := c.GasEnthalpy(T)/want - 1; !(math.Abs(e) < 1e-5) {
				t.Errorf("%v %g K: enthalpy off the sum of the species by %g", kind, T, e)
			}
		}
	}
}
