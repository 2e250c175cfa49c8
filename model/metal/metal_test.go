package metal

import (
	"math"
	"testing"
)

// TestHoopStressBore holds the Lame formula to its classical cases.
func TestHoopStressBore(t *testing.T) {
	for _, c := range []struct {
		name           string
		pi, po, ri, ro float64
		want           float64
	}{
		// Textbook case, [Timoshenko1956] from memory: an outer radius of twice the inner gives 5/3 of the pressure.
		{"twice the radius", 90e6, 0, 0.1, 0.2, 150e6},
		// K = 1.5: (2.25 + 1)/(2.25 - 1) = 2.6.
		{"one and a half times the radius", 10e6, 0, 2, 3, 26e6},
		// Outer pressure alone: -2 po K^2/(K^2 - 1) = -8/3 po for K = 2.
		{"outer pressure", 0, 30e6, 1, 2, -80e6},
		// Equal pressures: the wall is under uniform compression.
		{"equal pressures", 7e6, 7e6, 1, 1.3, -7e6},
	} {
		if got := HoopStressBore(c.pi, c.po, c.ri, c.ro); !(math.Abs(got/c.want-1) < 1e-12) {
			t.Errorf("%s: got %g Pa, want %g Pa", c.name, got, c.want)
		}
	}
	// Thin wall: p r/wall, with an error of half the wall over the radius.
	const p, r = 5e6, 1e-2
	for _, wall := range []float64{1e-4, 1e-5, 1e-6} {
		e := HoopStressBore(p, 0, r, r+wall)/(p*r/wall) - 1
		if !(math.Abs(e) < 0.6*wall/r) {
			t.Errorf("wall %g m: off the thin-wall formula by %g", wall, e)
		}
	}
}

// TestHoopStressEquilibrium: the hoop stress of the Lame field s(r) = A + B/r^2 carries the pressure on half the
// tube: its integral over the wall is pi ri - po ro. The bore value fixes the field, so this checks it.
func TestHoopStressEquilibrium(t *testing.T) {
	const pi, po, ri, ro = 15e6, 0.1e6, 1.5e-3, 2.6e-3
	bore := HoopStressBore(pi, po, ri, ro)
	// Radial stress A - B/r^2 is -pi at the bore, so A = (bore - pi)/2 and B = (bore + pi) ri^2/2.
	A, B := (bore-pi)/2, (bore+pi)*ri*ri/2
	if outer := A - B/(ro*ro); !(math.Abs(outer+po) < 1e-9*pi) {
		t.Errorf("radial stress outside: %g Pa, want %g Pa", outer, -po)
	}
	force := A*(ro-ri) + B*(1/ri-1/ro)
	if want := pi*ri - po*ro; !(math.Abs(force/want-1) < 1e-12) {
		t.Errorf("force per length: %g N/m, want %g N/m", force, want)
	}
}

// TestPhysicalProperties compares with handbook values from memory. The linear fits are to be within 10 % of them.
func TestPhysicalProperties(t *testing.T) {
	for _, c := range []struct {
		alloy    Alloy
		quantity string
		T        float64 // [K]
		want     float64
	}{
		{S30400, "conductivity", 300, 14.9}, // [Incropera2007] table A.1, as the next five
		{S30400, "conductivity", 1000, 25.4},
		{S31600, "conductivity", 300, 13.4},
		{S31600, "conductivity", 1000, 24.2},
		{S30400, "specific heat", 1000, 611},
		{S31600, "specific heat", 1000, 602},
		{S30400, "specific heat", 323.15, 500}, // 0 to 100 degC
		{S31600, "specific heat", 323.15, 500},
		{S30400, "density", 293.15, 8000},
		{S31600, "density", 293.15, 8000},
		{S30400, "expansion", 373.15, 17.2e-6},
		{S31600, "expansion", 773.15, 17.5e-6},
		{S31600, "stiffness", 293.15, 193e9},
		{S30400, "stiffness", 773.15, 158e9},
		{S31000, "conductivity", 773.15, 18.7},
		{S31000, "expansion", 373.15, 15.9e-6},
		{N06230, "conductivity", 298.15, 8.9},
		{N06230, "conductivity", 1073.15, 24.4},
		{N06230, "specific heat", 298.15, 397},
		{N06230, "specific heat", 1073.15, 595},
		{N06230, "expansion", 1073.15, 15.2e-6},
		{N06230, "stiffness", 1073.15, 164e9},
		{N06625, "conductivity", 294.15, 9.8},
		{N06625, "conductivity", 811.15, 17.5},
		{N06600, "conductivity", 293.15, 14.9},
		{N06600, "specific heat", 1073.15, 611},
		{N08810, "conductivity", 873.15, 21.1},
		{N06601, "conductivity", 873.15, 21.0},
	} {
		p := Of(c.alloy)
		var got float64
		switch c.quantity {
		case "conductivity":
			got = p.Conductivity(c.T)
		case "specific heat":
			got = p.SpecificHeat(c.T)
		case "expansion":
			got = p.Expansion(c.T)
		case "stiffness":
			got = p.Young(c.T)
		case "density":
			got = p.Density
		}
		if e := got/c.want - 1; !(math.Abs(e) <= 0.10) {
			t.Errorf("%v %s at %g K: %g, remembered %g (%+.1f %%)", c.alloy, c.quantity, c.T, got, c.want, 100*e)
		}
	}
}

// TestDulongPetit: the specific heat of a metal well above its Debye temperature is near 3 R per
// mole of atoms; electrons add up to a third of it at 1000 K. 55.5 g/mol stands for the iron-based
// alloys, 58 for the nickel-based, 61 for those with tungsten or molybdenum.
func TestDulongPetit(t *testing.T) {
	for _, a := range Alloys() {
		M := 58e-3
		switch a {
		case N06230, N06625, N06002:
			M = 61e-3
		case S30400, S30815, S31000, S31600, N08810, N08330:
			M = 55.5e-3
		}
		p := Of(a)
		for _, T := range []float64{300, 1000} {
			if x := p.SpecificHeat(T) * M / (3 * 8.314462618); !(x > 0.95 && x < 1.45) {
				t.Errorf("%v at %g K: specific heat is %.2f of 3 R", a, T, x)
			}
		}
	}
}

// TestAlloyData: names, and that each alloy's data are its own, complete and ordered.
func TestAlloyData(t *testing.T) {
	seen := map[string]bool{}
	if len(Alloys()) < 8 {
		t.Errorf("alloys: %d, want 8 or more", len(Alloys()))
	}
	for _, a := range Alloys() {
		p := Of(a)
		if p.Alloy != a || len(a.String()) != 6 || seen[a.String()] || p.PlainName == "" || seen[p.PlainName] || p.Sources == "" {
			t.Errorf("%d: %v, %q, %q", a, p.Alloy, p.PlainName, p.Sources)
		}
		seen[a.String()], seen[p.PlainName] = true, true
		if p.Density < 7700 || p.Density > 9100 {
			t.Errorf("%v: density %g", a, p.Density)
		}
		for i := range p.Yield {
			if p.Yield[i] >= p.Tensile[i] || i > 0 && (p.Yield[i] >= p.Yield[i-1] || p.Tensile[i] >= p.Tensile[i-1]) {
				t.Errorf("%v: strengths at point %d: yield %g, tensile %g", a, i, p.Yield[i], p.Tensile[i])
			}
		}
		if p.Yield.At(200) != p.Yield[0] || p.Yield.At(573.15) != p.Yield[1] {
			t.Errorf("%v: yield at a point of the table is off", a)
		}
		for T := 290.0; T <= 1250; T += 10 {
			if k, E := p.Conductivity(T), p.Young(T); !(k > 8 && k < 32 && E > 100e9 && E < 220e9) {
				t.Errorf("%v at %g K: k %g, E %g", a, T, k, E)
			}
		}
	}
	if Alloy(200).String() != "unknown alloy" {
		t.Error("an unknown alloy has a name")
	}
	defer func() {
		if recover() == nil {
			t.Error("Of accepts an unknown alloy")
		}
	}()
	Of(Alloy(200))
}
