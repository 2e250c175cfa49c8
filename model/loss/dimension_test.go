package loss

import (
	"math"
	"testing"
)

// TestDimensions evaluates each formula in two systems of units. A formula whose terms do not agree in
// dimension gives results that do not differ by the factor of a power, or an energy.
func TestDimensions(t *testing.T) {
	type units struct{ l, m, t, T float64 } // size of the new unit in metre, kilogram, second, kelvin
	// conv gives the value in new units of a quantity of dimension m^a kg^b s^c K^d.
	conv := func(u units, v, a, b, c, d float64) float64 {
		return v / (math.Pow(u.l, a) * math.Pow(u.m, b) * math.Pow(u.t, c) * math.Pow(u.T, d))
	}
	type kind struct{ a, b, c, d float64 }
	power, energy, flow, none := kind{2, 1, -3, 0}, kind{2, 1, -2, 0}, kind{0, 1, -1, 0}, kind{}
	for _, c := range []struct {
		what string
		dim  kind
		f    func(u units) float64
	}{
		{"Shuttle", power, func(u units) float64 {
			return Shuttle(conv(u, 0.07, 1, 0, 0, 0), conv(u, 1e-4, 1, 0, 0, 0), conv(u, 0.1, 1, 0, 0, 0), conv(u, 0.03, 1, 0, 0, 0),
				conv(u, 0.3, 1, 1, -3, -1), conv(u, 600, 0, 0, 0, 1))
		}},
		{"AppendixGap", power, func(u units) float64 {
			g := AppendixGap{
				Diameter: conv(u, 0.07, 1, 0, 0, 0), Width: conv(u, 3e-4, 1, 0, 0, 0), Length: conv(u, 0.1, 1, 0, 0, 0),
				PressureMean: conv(u, 5e6, -1, 1, -2, 0), PressureRate: conv(u, 1e16, -2, 2, -6, 0), Frequency: conv(u, 40, 0, 0, -1, 0),
				HotTemperature: conv(u, 900, 0, 0, 0, 1), ColdTemperature: conv(u, 300, 0, 0, 0, 1),
				HeatCapacity: conv(u, 5193, 2, 0, -2, -1), Conductivity: conv(u, 0.3, 1, 1, -3, -1), GasConstant: conv(u, 2077, 2, 0, -2, -1),
			}
			return g.Loss()
		}},
		{"AppendixGap lag", none, func(u units) float64 {
			g := AppendixGap{
				Width: conv(u, 3e-4, 1, 0, 0, 0), PressureMean: conv(u, 5e6, -1, 1, -2, 0), Frequency: conv(u, 40, 0, 0, -1, 0),
				HotTemperature: conv(u, 900, 0, 0, 0, 1), ColdTemperature: conv(u, 300, 0, 0, 0, 1),
				HeatCapacity: conv(u, 5193, 2, 0, -2, -1), Conductivity: conv(u, 0.3, 1, 1, -3, -1), GasConstant: conv(u, 2077, 2, 0, -2, -1),
			}
			return g.Lag()
		}},
		{"WallConduction", power, func(u units) float64 {
			return WallConduction(conv(u, 20, 1, 1, -3, -1), TubeSection(conv(u, 0.07, 1, 0, 0, 0), conv(u, 0.003, 1, 0, 0, 0)),
				conv(u, 0.1, 1, 0, 0, 0), conv(u, 600, 0, 0, 0, 1))
		}},
		{"SealFlow", flow, func(u units) float64 {
			return SealFlow(conv(u, 0.07, 1, 0, 0, 0), conv(u, 2e-5, 1, 0, 0, 0), conv(u, 0.02, 1, 0, 0, 0), conv(u, 6e6, -1, 1, -2, 0),
				conv(u, 5e6, -1, 1, -2, 0), conv(u, 2e-5, -1, 1, -1, 0), conv(u, 2077*300, 2, 0, -2, 0))
		}},
		{"SealPower", power, func(u units) float64 {
			return SealPower(conv(u, 0.07, 1, 0, 0, 0), conv(u, 2e-5, 1, 0, 0, 0), conv(u, 0.02, 1, 0, 0, 0), conv(u, 2e-5, -1, 1, -1, 0),
				[]float64{conv(u, 6e6, -1, 1, -2, 0), conv(u, 4e6, -1, 1, -2, 0)}, []float64{conv(u, 5e6, -1, 1, -2, 0), conv(u, 5e6, -1, 1, -2, 0)})
		}},
		{"SealHeat", power, func(u units) float64 {
			return SealHeat(conv(u, 0.07, 1, 0, 0, 0), conv(u, 2e-5, 1, 0, 0, 0), conv(u, 0.02, 1, 0, 0, 0), conv(u, 2e-5, -1, 1, -1, 0),
				conv(u, 2077*300, 2, 0, -2, 0), conv(u, 5193, 2, 0, -2, -1), conv(u, 600, 0, 0, 0, 1),
				[]float64{conv(u, 6e6, -1, 1, -2, 0)}, []float64{conv(u, 1e4, -1, 1, -2, 0)})
		}},
		{"ForcedWork", energy, func(u units) float64 {
			p := []float64{conv(u, 6e6, -1, 1, -2, 0), conv(u, 4e6, -1, 1, -2, 0), conv(u, 6e6, -1, 1, -2, 0)}
			b := []float64{conv(u, 5e6, -1, 1, -2, 0), conv(u, 5e6, -1, 1, -2, 0), conv(u, 5e6, -1, 1, -2, 0)}
			dV := []float64{conv(u, 2e-5, 3, 0, 0, 0), conv(u, -2e-5, 3, 0, 0, 0), conv(u, -1e-5, 3, 0, 0, 0)}
			W, forced := ForcedWork(p, b, dV)
			return DriveLoss(0.8, W, forced) + 2*ShaftWork(0.8, W, forced)
		}},
		{"FrictionPower", power, func(u units) float64 {
			return FrictionPower(conv(u, 1e5, -1, 1, -2, 0), conv(u, 1e-4, 3, 0, 0, 0), conv(u, 40, 0, 0, -1, 0))
		}},
		{"BufferPressure", kind{-1, 1, -2, 0}, func(u units) float64 {
			p := []float64{0, 0}
			BufferPressure(p, conv(u, 5e6, -1, 1, -2, 0), conv(u, 5e-4, 3, 0, 0, 0), 1.4, []float64{conv(u, 1e-4, 3, 0, 0, 0), conv(u, -1e-4, 3, 0, 0, 0)})
			return p[0]
		}},
	} {
		si := c.f(units{1, 1, 1, 1})
		if !(si > 0) {
			t.Errorf("%s: %g in SI", c.what, si)
		}
		u := units{0.3048, 0.45359237, 60, 5.0 / 9}
		near(t, c.what, c.f(u), conv(u, si, c.dim.a, c.dim.b, c.dim.c, c.dim.d), 1e-12)
	}
}
