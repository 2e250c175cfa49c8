package gas

import (
	"math"
	"testing"
)

// TestEntropyBelongsToState checks ds/dT = cp/T and ds/dp = -dv/dT by central differences.
func TestEntropyBelongsToState(t *testing.T) {
	for _, k := range Kinds() {
		g := New(k)
		for _, T := range []float64{260, 300, 450, 700, 1100} {
			for _, p := range []float64{1e5, 3e6, 15e6} {
				var s State
				g.At(&s, T, p)
				dT, dp := 1e-3*T, 1e-3*p
				byT := (g.Entropy(T+dT, p) - g.Entropy(T-dT, p)) / (2 * dT)
				byP := (g.Entropy(T, p+dp) - g.Entropy(T, p-dp)) / (2 * dp)
				if e := byT/(s.Cp/T) - 1; math.Abs(e) > 1e-5 {
					t.Errorf("%v at %g K, %g Pa: ds/dT %g, cp/T %g [J/(kg K2)], off by %.1e", k, T, p, byT, s.Cp/T, e)
				}
				if e := byP/-s.VT - 1; math.Abs(e) > 1e-5 {
					t.Errorf("%v at %g K, %g Pa: ds/dp %g, -dv/dT %g [m3/(kg K)], off by %.1e", k, T, p, byP, -s.VT, e)
				}
			}
		}
	}
}
