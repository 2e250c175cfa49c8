package studies

import (
	"slices"

	"hotfront/model"
)

// heatGroup is the group of fields of which one may say how hot the hot end is, in place of a heat source.
const heatGroup = "heat"

// surroundingFields are what the engine meets: heat at the hot end, coolant at the cold one.
func surroundingFields() []Field {
	return slices.Concat([]Field{
		heatField("heat.tube_wall", "mean outer temperature of the heater tubes", model.HeatTubeWall),
		heatField("heat.tube_gas", "time-mean gas temperature in the heated tubes, as tests of engines state it", model.HeatTubeGas),
	}, burnerFields(), receiverFields(), []Field{
		measured("coolant.inlet", "coolant temperature at its entry", Temperature, "degC", "-100 degC to 300 degC", "0 degC to 90 degC",
			func(e *model.Engine) *float64 { return &e.Coolant.Inlet }),
		measured("coolant.flow", "coolant flow (water)", MassFlow, "kg/s", "0.0001 kg/s to 1000 kg/s", "0.01 kg/s to 5 kg/s",
			func(e *model.Engine) *float64 { return &e.Coolant.Flow }),
		measured("coolant.film", "film coefficient outside the cooler tubes", FilmCoefficient, "W/(m2 K)", "1 W/(m2 K) to 1e6 W/(m2 K)", "500 W/(m2 K) to 20000 W/(m2 K)",
			func(e *model.Engine) *float64 { return &e.Coolant.Film }, defaults("6000 W/(m2 K)")),
	})
}

func whenNoSource() Condition {
	return Condition{"to engines without burner and receiver", func(e *model.Engine) bool { return e.Heat.Kind <= model.HeatTubeGas }}
}

func heatField(path, text string, kind model.HeatKind) Field {
	return Field{
		Path: path, Text: text, Quantity: Temperature, Unit: "degC", Group: heatGroup, Freeable: true, When: whenNoSource(),
		Hard: parseRange("-50 degC to 1500 degC", Temperature), Usual: parseRange("100 degC to 900 degC", Temperature),
		get: func(e *model.Engine) float64 { return e.Heat.Temperature },
		set: func(e *model.Engine, v float64) { e.Heat.Kind, e.Heat.Temperature = kind, v },
	}
}

// correction is one factor of a corrections block.
type correction struct {
	name     string
	text     string
	quantity Quantity
	unit     string
	hard     Range
	at       func(c *model.Corrections) *float64
}

// correctionTable lists the factors by which the model is fitted.
func correctionTable() []correction {
	return []correction{
		{"flow_friction", "multiplies every pressure difference by friction", Number, "-", Range{0, 20},
			func(c *model.Corrections) *float64 { return &c.FlowFriction }},
		{"cycle_work", "share of the p-V work that survives what one dimension leaves out", Number, "-", Range{0, 1},
			func(c *model.Corrections) *float64 { return &c.CycleWork }},
		{"drive_effectiveness", "of the drive, E of Senft's theorem", Number, "-", Range{0, 1},
			func(c *model.Corrections) *float64 { return &c.Effectiveness }},
		{"seal_friction", "friction mean effective pressure of seals and bearings", Pressure, "bar", Range{0, 50e5},
			func(c *model.Corrections) *float64 { return &c.SealFriction }},
	}
}
