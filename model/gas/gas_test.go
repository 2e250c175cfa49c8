package gas

import (
	"math"
	"testing"

	"gonum.org/v1/gonum/floats/scalar"
)

// near compares floats: it fails on NaN and says what was wanted.
func near(t *testing.T, name string, got, want, rel float64) {
	t.Helper()
	if !scalar.EqualWithinAbsOrRel(got, want, 1e-300, rel) {
		t.Errorf("%s: got %.10g, want %.10g, relative error %.3g", name, got, want, got/want-1)
	}
}

// TestMaxwellRelations holds the derivatives of At to central differences and to each other at
// states in and well outside the range.
func TestMaxwellRelations(t *testing.T) {
	const (
		rounding   = 1e-15 // same terms in another order
		difference = 1e-5  // truncation of the central difference with a step of 0.1 %, largest at 225 K
	)
	for _, kind := range Kinds() {
		g := New(kind)
		for _, T := range []float64{225, 250, 300, 421, 700, 1000, 1300, 1600} {
			for _, p := range []float64{1e4, 1e5, 3e6, 1.5e7, 2.5e7} {
				var s, a, b State
				g.At(&s, T, p)
				// HP is a small difference of v for dilute gas: its rounding is that of v.
				if !scalar.EqualWithinAbs(s.HP, s.V-T*s.VT, rounding*s.V) {
					t.Errorf("%v HP at %g K, %g Pa: got %g, v - T VT = %g", kind, T, p, s.HP, s.V-T*s.VT)
				}

				dT := 1e-3 * T
				g.At(&a, T-dT, p)
				g.At(&b, T+dT, p)
				near(t, kind.String()+" VT", (b.V-a.V)/(2*dT), s.VT, difference)
				near(t, kind.String()+" Cp", (b.H-a.H)/(2*dT), s.Cp, difference)

				dp := 1e-3 * p
				g.At(&a, T, p-dp)
				g.At(&b, T, p+dp)
				near(t, kind.String()+" VP", (b.V-a.V)/(2*dp), s.VP, difference)
				// h changes little with p: for dilute gas the difference carries the rounding of h; and HP
				// changes sign.
				if !scalar.EqualWithinAbsOrRel((b.H-a.H)/(2*dp), s.HP, 1e-14*T*s.Cp/dp+1e-6*s.V, difference) {
					t.Errorf("%v HP at %g K, %g Pa: difference %g, got %g", kind, T, p, (b.H-a.H)/(2*dp), s.HP)
				}
			}
		}
	}
}

// TestEnthalpyZero: the dilute gas has no enthalpy at 298.15 K.
func TestEnthalpyZero(t *testing.T) {
	for _, kind := range Kinds() {
		g := New(kind)
		var s State
		g.At(&s, 298.15, 1e-6)
		if math.Abs(s.H) > 1e-6 {
			t.Errorf("%v: h0(298.15 K) = %g J/kg", kind, s.H)
		}
	}
}

// TestPerfectLimit holds the perfect gas to its closed forms.
func TestPerfectLimit(t *testing.T) {
	const (
		R, gamma = 287.0, 1.4
		rounding = 1e-13
	)
	g := Perfect(R, gamma, 2e-5, 0.03)
	var s State
	for _, T := range []float64{100, 300, 1500} {
		for _, p := range []float64{1e3, 1e7} {
			g.At(&s, T, p)
			near(t, "v", s.V, R*T/p, rounding)
			near(t, "VT", s.VT, R/p, rounding)
			near(t, "VP", s.VP, -R*T/(p*p), rounding)
			near(t, "cp", s.Cp, R*gamma/(gamma-1), rounding)
			near(t, "h", s.H, R*gamma/(gamma-1)*(T-298.15), 1e-12)
			if s.HP != 0 {
				t.Errorf("HP = %g, want 0", s.HP)
			}
			near(t, "sound speed", g.SoundSpeed(T, p), math.Sqrt(gamma*R*T), rounding)
			mu, k := g.Transport(T, 1/s.V)
			near(t, "mu", mu, 2e-5, 0)
			near(t, "k", k, 0.03, 0)
			if !g.Range.Contains(T, p) {
				t.Errorf("%g K, %g Pa outside the range of a perfect gas", T, p)
			}
		}
	}
}

// TestNobleAbel: with a constant covolume b the closed forms are v = RT/p + b, h = cp T + b p and
// a = sqrt(gamma R T)/(1 - b rho).
func TestNobleAbel(t *testing.T) {
	const R, gamma, b = 2077.0, 5.0 / 3, 2.9e-3
	g := Perfect(R, gamma, 0, 0)
	g.B0 = b
	const T, p = 400.0, 150e5
	var s State
	g.At(&s, T, p)
	near(t, "v", s.V, R*T/p+b, 1e-14)
	near(t, "HP", s.HP, b, 1e-12)
	near(t, "h", s.H, R*gamma/(gamma-1)*(T-298.15)+b*p, 1e-13)
	near(t, "sound speed", g.SoundSpeed(T, p), math.Sqrt(gamma*R*T)/(1-b/s.V), 1e-13)
}

// TestVanDerWaalsTerm: B = b - a/(RT) gives HP = b - 2a/(RT) and cp - cp0 = 2 a p/(R T^2), the
// textbook first-order results for a van der Waals gas.
func TestVanDerWaalsTerm(t *testing.T) {
	const R, gamma, a, b = 296.8, 1.4, 174.0, 1.4e-3 // of the size for nitrogen, SI per kg
	g := Perfect(R, gamma, 0, 0)
	g.B0, g.B1 = b, -a/R
	const T, p = 350.0, 20e5
	var s State
	g.At(&s, T, p)
	near(t, "HP", s.HP, b-2*a/(R*T), 1e-11)
	near(t, "cp", s.Cp, R*gamma/(gamma-1)+2*a*p/(R*T*T), 1e-13)
}

// TestHandbookValues compares with values known from handbooks, all from memory. The tolerances
// are the last digit of what is remembered or the spread between handbooks.
func TestHandbookValues(t *testing.T) {
	const atm = 101325.0
	at := func(k Kind, T, p float64) State {
		g := New(k)
		var s State
		g.At(&s, T, p)
		return s
	}
	sound := func(k Kind, T, p float64) float64 { g := New(k); return g.SoundSpeed(T, p) }
	viscosity := func(k Kind, T float64) float64 {
		g := New(k)
		mu, _ := g.Transport(T, atm/(g.R*T))
		return mu
	}
	jouleThomson := func(k Kind, T float64) float64 { // [K/Pa]
		s := at(k, T, atm)
		return -s.HP / s.Cp
	}
	for _, c := range []struct {
		name      string
		got, want float64
		rel       float64
	}{
		{"air, normal density [kg/m3]", 1 / at(Air, 273.15, atm).V, 1.2929, 0.0005},
		{"nitrogen, normal density [kg/m3]", 1 / at(Nitrogen, 273.15, atm).V, 1.2505, 0.0005},
		{"hydrogen, normal density [kg/m3]", 1 / at(Hydrogen, 273.15, atm).V, 0.08988, 0.0005},
		{"helium, normal density [kg/m3]", 1 / at(Helium, 273.15, atm).V, 0.17847, 0.0005},
		{"air, speed of sound at 0 degC [m/s]", sound(Air, 273.15, atm), 331.4, 0.001},
		{"nitrogen, speed of sound at 300 K [m/s]", sound(Nitrogen, 300, atm), 353.1, 0.001},
		{"helium, speed of sound at 300 K [m/s]", sound(Helium, 300, atm), 1020, 0.001},
		{"hydrogen, speed of sound at 300 K [m/s]", sound(Hydrogen, 300, atm), 1319, 0.001},
		{"air, viscosity at 300 K [Pa s]", viscosity(Air, 300), 1.85e-5, 0.005},
		{"nitrogen, viscosity at 300 K [Pa s]", viscosity(Nitrogen, 300), 1.789e-5, 0.005},
		{"hydrogen, viscosity at 300 K [Pa s]", viscosity(Hydrogen, 300), 8.95e-6, 0.005},
		{"air, Joule-Thomson coefficient at 300 K [K/Pa]", jouleThomson(Air, 300), 0.226e-5, 0.05},
		{"nitrogen, Joule-Thomson coefficient at 300 K [K/Pa]", jouleThomson(Nitrogen, 300), 0.217e-5, 0.05},
		{"helium, Joule-Thomson coefficient at 300 K [K/Pa]", jouleThomson(Helium, 300), -0.062e-5, 0.03},
		{"hydrogen, Joule-Thomson coefficient at 300 K [K/Pa]", jouleThomson(Hydrogen, 300), -0.030e-5, 0.10},
	} {
		if !(math.Abs(c.got/c.want-1) <= c.rel) {
			t.Errorf("%s: got %.5g, want %.5g (from memory) within %g %%", c.name, c.got, c.want, 100*c.rel)
		}
	}
}

// TestHeliumPrandtl: kinetic theory gives k = 15/4 R mu for a monatomic gas to first order, so
// Pr = 2/3; higher orders and the source's own scatter are below 1.5 %.
func TestHeliumPrandtl(t *testing.T) {
	g := New(Helium)
	for T := 250.0; T <= 1300; T += 50 {
		mu, k := g.Transport(T, 1e-6)
		near(t, "Pr", mu*2.5*g.R/k, 2.0/3, 0.015)
	}
}

// TestExtrapolation: beyond the range, to 225 K, 1600 K and 300 bar, the forms stay physical:
// v falls with p and rises with T, cp stays above R, mu and k of the dilute gas rise with T with an exponent
// between that of a soft (1) and a hard (1/2) molecule, somewhat wider for k with its inner modes.
func TestExtrapolation(t *testing.T) {
	for _, kind := range Kinds() {
		g := New(kind)
		for T := 225.0; T <= 1600; T += 25 {
			for p := 1e5; p <= 300e5; p *= 1.25 {
				var s State
				g.At(&s, T, p)
				if !(s.V > 0 && s.VP < 0 && s.VT > 0 && s.Cp > 2.4*g.R && s.Cp < 6.5*g.R) {
					t.Errorf("%v %g K %.3g Pa: %+v", kind, T, p, s)
				}
				if a := g.SoundSpeed(T, p); !(a > 0.9*math.Sqrt(1.25*g.R*T)) {
					t.Errorf("%v %g K %.3g Pa: sound speed %g", kind, T, p, a)
				}
			}
			m1, k1 := g.Transport(T, 0)
			m2, k2 := g.Transport(1.01*T, 0)
			if n := math.Log(m2/m1) / math.Log(1.01); !(n > 0.5 && n < 1) {
				t.Errorf("%v %g K: viscosity goes with T^%.3f", kind, T, n)
			}
			if n := math.Log(k2/k1) / math.Log(1.01); !(n > 0.5 && n < 1.1) {
				t.Errorf("%v %g K: conductivity goes with T^%.3f", kind, T, n)
			}
		}
	}
}

func TestKinds(t *testing.T) {
	want := []string{"hydrogen", "helium", "nitrogen", "air"}
	for i, k := range Kinds() {
		g := New(k)
		if int(k) != i || k.String() != want[i] || g.Kind != k {
			t.Errorf("kind %d: %v, name %q", i, k, want[i])
		}
		r := g.Range
		if r.Contains(r.TemperatureLow-1, 1e5) || r.Contains(300, r.PressureHigh+1) || r.Contains(300, 0) || !r.Contains(300, 1e5) {
			t.Errorf("%v: Contains is wrong for %+v", k, r)
		}
	}
	if Kind(77).String() != "unknown gas" {
		t.Error("an unknown kind has a name")
	}
	defer func() {
		if recover() == nil {
			t.Error("New accepts an unknown kind")
		}
	}()
	New(Kind(77))
}

func TestAllocations(t *testing.T) {
	g := New(Air)
	var s State
	if n := testing.AllocsPerRun(100, func() {
		g.At(&s, 500, 1e6)
		s.Cp, s.H = g.Transport(500, 1/s.V)
		s.V = g.SoundSpeed(500, 1e6)
	}); n != 0 {
		t.Errorf("allocations: %g", n)
	}
}

// TestIsobarIsAt: the sums at one pressure give what At gives.
func TestIsobarIsAt(t *testing.T) {
	var T []float64
	for i := range 120 {
		T = append(T, 210+float64(i)*12)
	}
	n := len(T)
	c := Columns{make([]float64, n), make([]float64, n), make([]float64, n), make([]float64, n), make([]float64, n), make([]float64, n)}
	gases := []Gas{Perfect(2077, 5.0/3, 3e-5, 0.2)}
	for _, kind := range Kinds() {
		gases = append(gases, New(kind))
	}
	for _, g := range gases {
		for _, p := range []float64{1e3, 1e5, 4e6, 25e6} {
			var b Isobar
			b.Set(&g, p)
			b.At(&c, T)
			var s State
			for i := range T {
				g.At(&s, T[i], p)
				for _, v := range [][3]float64{{c.V[i], s.V, s.V}, {c.VT[i], s.VT, s.VT}, {c.VP[i], s.VP, s.VP}, {c.H[i], s.H, s.Cp * T[i]},
					{c.Cp[i], s.Cp, s.Cp}, {c.HP[i], s.HP, s.V}} { // the size of each sum's terms
					if math.Abs(v[0]-v[1]) > 1e-13*math.Abs(v[2]) {
						t.Fatalf("%v %g Pa %g K: %.17g, At gives %.17g", g.Kind, p, T[i], v[0], v[1])
					}
				}
			}
		}
	}
}
