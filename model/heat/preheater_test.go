package heat

import (
	"math"
	"testing"
)

func TestEffectiveness(t *testing.T) {
	for _, c := range []struct{ N, C, want float64 }{
		{0, 0.5, 0}, {1, 0, 1 - math.Exp(-1)}, {3, 1, 0.75}, {math.Inf(1), 0.7, 1}, {math.Inf(1), 1, 1},
		// Tables of [Kays1984], counterflow, from memory and to their three digits: N = 2, C = 0.5: 0.775; N = 1, C = 0.5: 0.565.
		{2, 0.5, 0.775}, {1, 0.5, 0.565},
	} {
		got, fault := Effectiveness(c.N, c.C)
		if fault != OK || !(math.Abs(got-c.want) < 6e-4) || (c.C == 0 || c.C == 1 || c.N == 0) && !(math.Abs(got-c.want) < 1e-14) {
			t.Errorf("N %g, C %g: %.6f, want %.6f %v", c.N, c.C, got, c.want, fault)
		}
	}
	for _, C := range []float64{0, 0.3, 0.9, 1 - 1e-9, 1 - 1e-15, 1} {
		for _, N := range []float64{1e-6, 0.1, 1, 5, 20} {
			e, f1 := Effectiveness(N, C)
			back, f2 := TransferUnits(e, C)
			// Near e = 1 the inverse loses what 1 - e has lost: exp(N (1 - C)) of rounding.
			if within := 1e-12 + 4e-16*math.Exp(N*(1-C)); f1 != OK || f2 != OK || !(math.Abs(back/N-1) < within) {
				t.Errorf("C %g: %g units come back as %g", C, N, back)
			}
		}
	}
	// The march: two streams, cut into steps by the midpoint rule from the cold end of the hot stream.
	const N, C, steps = 2.3, 0.8, 20000
	hot, cold := 0.0, -1.0 // at the end where the smaller stream leaves; the difference grows along the march
	hot0, cold0 := hot, cold
	for range steps {
		d := hot - cold
		mid := d + (1-C)*d*N/steps/2
		cold -= mid * N / steps // the smaller stream, taken against its flow
		hot -= mid * C * N / steps
	}
	// Smaller stream: from cold (end) to cold0; most = hot0 - cold (counterflow, inlets at opposite ends).
	got := (cold0 - cold) / (hot0 - cold)
	if want, _ := Effectiveness(N, C); !(math.Abs(got/want-1) < 1e-6) {
		t.Errorf("march gives %.8f, formula %.8f", got, want)
	}
	for _, c := range []struct {
		x, C float64
		a, b Fault // of Effectiveness and TransferUnits
	}{
		{-1, 0.5, BadNumber, BadNumber}, {math.NaN(), 0.5, BadNumber, BadNumber}, {0.5, 1.1, BadNumber, BadNumber},
		{0.5, -0.1, BadNumber, BadNumber}, {0.5, math.NaN(), BadNumber, BadNumber}, {1, 0.5, OK, TransferImpossible}, {2, 0, OK, TransferImpossible},
	} {
		_, a := Effectiveness(c.x, c.C)
		_, b := TransferUnits(c.x, c.C)
		if a != c.a || b != c.b {
			t.Errorf("%g, C %g: %q and %q", c.x, c.C, a, b)
		}
	}
}

func TestRadiation(t *testing.T) {
	for _, c := range []struct {
		flame, wall, want float64
		fault             Fault
	}{{1, 0.8, 0.8, OK}, {0.3, 1, 0.3, OK}, {0.5, 0.5, 1.0 / 3, OK}, {0, 0.5, 0, OK}, {0.5, 0, 0, OK}, {1.1, 0.5, 0, BadShare}, {0.5, math.NaN(), 0, BadShare}} {
		got, fault := EffectiveEmissivity(c.flame, c.wall)
		if fault != c.fault || !(math.Abs(got-c.want) < 1e-14) {
			t.Errorf("%g and %g: %g, want %g %v", c.flame, c.wall, got, c.want, fault)
		}
	}
	// Black body at 1000 K against 0 K: 56.70 kW/m2 by tables.
	if got := Radiation(1, 1000, 0); !(math.Abs(got/56.70e3-1) < 1e-4) {
		t.Errorf("black body: %g W/m2", got)
	}
	if got, want := Radiation(0.4, 1500, 900), 0.4*5.670374419e-8*(math.Pow(1500, 4)-math.Pow(900, 4)); !(math.Abs(got/want-1) < 1e-13) {
		t.Errorf("flux %g, want %g W/m2", got, want)
	}
	if got, want := RadiationConductance(1, 800, 800), 4*5.670374419e-8*800*800*800; !(math.Abs(got/want-1) < 1e-13) {
		t.Errorf("conductance %g, want %g W/(m2 K)", got, want)
	}
}
