package cycle

import (
	"fmt"
	"math"
	"testing"

	"hotfront/model/correlation"
)

// schmidt is the isothermal cycle of sinusoidal volumes in closed form. The gas in the machine fills
// Ve/Th + Vc/Tk + dead/T = S (1 + b cos(th - x)), so that p = M R/(S (1 + b cos(th - x))), whose time
// mean is M R/(S sqrt(1 - b^2)). With q = (1 - sqrt(1 - b^2))/b its first harmonic is -2 q pmean
// cos(th - x), and the work of a space of volume V0 + A cos(th + phi) is the integral of p dV over a turn:
//
//	W = 2 pi A q pmean sin(phi + x)
//
// Source: derived here; the classical result of Schmidt (1871).
func schmidt(c *reference) (we, wc, pmax, pmin float64) {
	al := c.Alpha * math.Pi / 180
	tr := (c.Th - c.Tk) / math.Log(c.Th/c.Tk)
	s := (c.Vcle+c.Vse/2)/c.Th + (c.Vclc+c.Vsc/2)/c.Tk + c.Vh/c.Th + c.Vr/tr + c.Vk/c.Tk
	re := c.Vse/2/c.Th*math.Cos(al) + c.Vsc/2/c.Tk
	im := -c.Vse / 2 / c.Th * math.Sin(al) // a cos th + b sin th with b = im
	b := math.Hypot(re, im) / s
	x := math.Atan2(im, re)
	q := (1 - math.Sqrt(1-b*b)) / b
	work := func(a, phi float64) float64 { return 2 * math.Pi * a * q * c.Pmean * math.Sin(phi+x) }
	root := math.Sqrt(1 - b*b)
	return work(c.Vse/2, al), work(c.Vsc/2, 0), c.Pmean * root / (1 - b), c.Pmean * root / (1 + b)
}

// TestSchmidt holds the solver with isothermal spaces against the closed form of the isothermal cycle,
// to 1e-6: the pressure follows from the mass and the volumes alone, and an equally spaced sum over a
// periodic function is exact, so steps hardly matter. The extremes of the pressure are read from a
// parabola through three steps, which is good to 1e-4 at 60 steps a cycle. testdata/reference/schmidt_check.csv
// (seven or eight digits) holds the same closed form against a quadrature; both must agree with ours.
func TestSchmidt(t *testing.T) {
	s := NewSolver(correlation.NewFast())
	for _, row := range table(t, "schmidt_check.csv") {
		get := func(name string) float64 { return number(t, row[name]) }
		c := reference{
			Gas: "He", Vse: get("Vswe_m3"), Vsc: get("Vswc_m3"), Vcle: get("Vcle_m3"), Vclc: get("Vclc_m3"), Alpha: get("alpha_deg"),
			Vh: get("Vh_m3"), Vr: get("Vr_m3"), Vk: get("Vk_m3"), Th: get("Th_K"), Tk: get("Tk_K"), Pmean: get("pmean_Pa"), Freq: get("freq_Hz"),
		}
		t.Run(row["case"], func(t *testing.T) {
			we, wc, pmax, pmin := schmidt(&c)
			near(t, "closed forms, expansion work", we, get("We_J"), 1e-7)
			near(t, "closed forms, compression work", wc, get("Wc_J"), 1e-7)
			near(t, "closed forms, largest pressure", pmax, get("pmax_Pa"), 1e-7)
			near(t, "closed forms, smallest pressure", pmin, get("pmin_Pa"), 1e-7)
			for _, steps := range []int{60, 240} {
				p := idealPath(&c, 1, perfectFilm)
				volumes(&p.Fine, steps, c.Freq, c.law())
				var r Result
				s.Solve(&r, p, DefaultSettings())
				if !r.Converged {
					t.Fatalf("%d steps: not converged after %d cycles", steps, r.Cycles)
				}
				at := fmt.Sprintf("%d steps, ", steps)
				near(t, at+"expansion work", r.WorkExpansion, we, 1e-6)
				near(t, at+"compression work", r.WorkCompression, wc, 1e-6)
				near(t, at+"work", r.WorkExpansion+r.WorkCompression, we+wc, 1e-6)
				near(t, at+"mean pressure", r.PressureMean, c.Pmean, 1e-6)
				top := 1e-4 * math.Pow(60/float64(steps), 4)
				near(t, at+"largest pressure", r.PressureMax, pmax, max(top, 1e-6))
				near(t, at+"smallest pressure", r.PressureMin, pmin, max(top, 1e-6))
			}
		})
	}
}

// TestSchmidtRhombic holds it against a quadrature over the exact motion of a rhombic drive
// (testdata/reference/gpu3_isothermal_rhombic_check.csv, printed to six digits; drive dimensions in its
// source column). Two sets of volumes, as the file names them.
func TestSchmidtRhombic(t *testing.T) {
	s := NewSolver(correlation.NewFast())
	for i, row := range table(t, "gpu3_isothermal_rhombic_check.csv") {
		get := func(name string) float64 { return number(t, row[name]) }
		c := reference{
			Gas: "He", Drive: "rhombic", R: 13.8e-3, L: 46e-3, E: 20.8e-3, Bore: 69.9e-3, Drod: 9.52e-3,
			Vcle: 30.52e-6, Vh: 70.88e-6, Vr: 50.55e-6, Vk: 13.8e-6, Vclc: 28.68e-6,
			Th: get("Th_K"), Tk: get("Tk_K"), Pmean: get("pmean_Pa"), Freq: get("freq_Hz"),
		}
		if row["dead_volumes"] != "lumped voids of the papers" {
			c.Vcle, c.Vh, c.Vr, c.Vk, c.Vclc = 12.5e-6, 80.8e-6, 65.5e-6, 13.13e-6, 21.1e-6
		}
		p := idealPath(&c, 1, perfectFilm)
		volumes(&p.Fine, 60, c.Freq, c.law())
		var r Result
		s.Solve(&r, p, DefaultSettings())
		at := fmt.Sprintf("row %d, ", i+1)
		const digits = 5e-6 // six printed digits
		near(t, at+"expansion work", r.WorkExpansion, get("We_J"), digits)
		near(t, at+"compression work", r.WorkCompression, get("Wc_J"), digits)
		near(t, at+"work", r.WorkExpansion+r.WorkCompression, get("W_J"), digits)
		near(t, at+"largest pressure", r.PressureMax, get("pmax_Pa"), 1e-4)
		near(t, at+"smallest pressure", r.PressureMin, get("pmin_Pa"), 1e-4)
	}
}
