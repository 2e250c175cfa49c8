package metal

import (
	"math"
	"testing"
)

// TestThermalStress checks the thin-wall limit E a dT/(2 (1 - nu)) of handbooks and the signs.
func TestThermalStress(t *testing.T) {
	const E, a, nu, dT = 150e9, 17e-6, 0.3, 20.0
	thin := E * a * dT / (2 * (1 - nu))
	if got := ThermalStressBore(E, a, nu, 900, 900+dT, 1, 1.0005); math.Abs(got/thin-1) > 1e-3 {
		t.Errorf("bore of a thin wall: %g Pa, want %g", got, thin)
	}
	if got := ThermalStressOuter(E, a, nu, 900, 900+dT, 1, 1.0005); math.Abs(got/thin+1) > 1e-3 {
		t.Errorf("outer surface of a thin wall: %g Pa, want %g", got, -thin)
	}
}

// TestThermalStressInEquilibrium: the hoop stress over the wall has no resultant. The stress at radius r
// is that of Timoshenko's general formula, E a/((1 - nu) r^2) ((r^2 + a0^2)/(b^2 - a0^2) I(b) + I(r) - T r^2)
// with I the integral of T r dr from the bore, worked out here for the logarithmic profile; its ends must
// be the two functions.
func TestThermalStressInEquilibrium(t *testing.T) {
	const E, a, nu, ri, ro, Ti, To = 150e9, 17e-6, 0.3, 2e-3, 3.5e-3, 900.0, 960.0
	T := func(r float64) float64 { return Ti + (To-Ti)*math.Log(r/ri)/math.Log(ro/ri) }
	const n = 20000
	integral := make([]float64, n+1)
	h := (ro - ri) / n
	for i := 1; i <= n; i++ {
		r0, r1 := ri+h*float64(i-1), ri+h*float64(i)
		rm := 0.5 * (r0 + r1)
		integral[i] = integral[i-1] + h/6*(T(r0)*r0+4*T(rm)*rm+T(r1)*r1)
	}
	stress := func(i int) float64 {
		r := ri + h*float64(i)
		return E * a / ((1 - nu) * r * r) * ((r*r+ri*ri)/(ro*ro-ri*ri)*integral[n] + integral[i] - T(r)*r*r)
	}
	bore, outer := ThermalStressBore(E, a, nu, Ti, To, ri, ro), ThermalStressOuter(E, a, nu, Ti, To, ri, ro)
	if math.Abs(stress(0)/bore-1) > 1e-6 || math.Abs(stress(n)/outer-1) > 1e-6 {
		t.Errorf("bore %g, integral gives %g; outer %g, integral gives %g", bore, stress(0), outer, stress(n))
	}
	sum := 0.0
	for i := range n {
		sum += 0.5 * h * (stress(i) + stress(i+1))
	}
	if math.Abs(sum) > 1e-6*bore*(ro-ri) {
		t.Errorf("resultant %g N/m", sum)
	}
}

func TestWallNeeded(t *testing.T) {
	const allowable, pi, po, ri = 40e6, 12e6, 101325, 2e-3
	w := WallNeeded(allowable, pi, po, ri)
	if got := HoopStressBore(pi, po, ri, ri+w); math.Abs(got/allowable-1) > 1e-12 {
		t.Errorf("stress at the wall needed: %g, want %g", got, allowable)
	}
	if !math.IsInf(WallNeeded(10e6, 12e6, po, ri), 1) || WallNeeded(allowable, po, po, ri) != 0 {
		t.Error("no wall is thick enough for 12 MPa in 10 MPa metal, and none is needed without pressure")
	}
}
