package heat

import (
	"math"
	"math/rand/v2"
	"reflect"
	"testing"
)

// spoil replaces some float64 fields of a struct, at any depth, by hostile values.
func spoil(r *rand.Rand, v reflect.Value) {
	hostile := [...]float64{0, math.Copysign(0, -1), -1, 1, 1e-300, 1e-12, 1e12, 1e300, math.NaN(), math.Inf(1), math.Inf(-1)}
	for i := range v.NumField() {
		f := v.Field(i)
		switch {
		case !v.Type().Field(i).IsExported():
		case f.Kind() == reflect.Struct:
			spoil(r, f)
		case f.Kind() == reflect.Float64 && r.IntN(12) == 0:
			f.SetFloat(hostile[r.IntN(len(hostile))])
		}
	}
}

// numbers tells whether all exported float64 fields are finite.
func numbers(v reflect.Value) bool {
	for i := range v.NumField() {
		if f := v.Field(i); f.Kind() == reflect.Float64 && f.Float()-f.Float() != 0 {
			return false
		}
	}
	return true
}

// TestHostile: whatever numbers come in, a burner and a receiver give finite numbers or a fault, the ledgers close, and
// the iterations settle.
func TestHostile(t *testing.T) {
	r := rand.New(rand.NewPCG(11, 2))
	passed := 0
	for i := range 20000 {
		b := randomBurner(r)
		spoil(r, reflect.ValueOf(&b).Elem())
		power, Tw := math.Exp(5+7*r.Float64()), 300+1700*r.Float64()
		if b.Prepare() == OK {
			var d Balance
			switch fault := Solve(&d, &b, power, Tw); {
			case fault == NoConvergence:
				t.Errorf("burner %d does not settle at %g W, %g K: %+v", i, power, Tw, b)
			case fault == OK:
				passed++
				// A huge casing or radiation carries heat on a difference that the rounding of the temperatures makes.
				stiff := 1e-12 * d.GasTemperature * (b.CasingConductance + b.radiant*RadiationConductance(4, d.GasTemperature, Tw))
				if e := d.FuelPower - d.Heat - d.Casing - d.Chimney; !numbers(reflect.ValueOf(d)) || !(math.Abs(e) < 1e-9*power+stiff) {
					t.Errorf("burner %d: ledger open by %g W: %+v of %+v", i, e, d, b)
				}
			}
		}
		v := dish()
		spoil(r, reflect.ValueOf(&v).Elem())
		var e ReceiverBalance
		if fault := v.Solve(&e, Tw); fault == OK {
			passed++
			if !numbers(reflect.ValueOf(e)) {
				t.Errorf("receiver %d: %+v of %+v", i, e, v)
			}
		}
		if T, fault := v.Stagnation(); fault == NoConvergence || fault == OK && !(T > 0 && finite(T)) {
			t.Errorf("receiver %d: stagnation %g K %v of %+v", i, T, fault, v)
		}
	}
	if passed < 5000 {
		t.Errorf("only %d results", passed)
	}
	t.Logf("%d results", passed)
}
