package studies

import (
	"hotfront/model"
	"hotfront/model/drive"
	"hotfront/model/gas"
	"hotfront/model/metal"
)

// Defaults below are common practice without a source unless a row says otherwise, and so are the
// usual ranges: typical figures of small heat-and-power, solar and low-temperature machines taken
// together, from memory. Hard ranges only keep out what cannot be meant.

func layoutNames() []string { return []string{"alpha", "beta", "gamma", "double-acting"} }

func matrixNames() []string { return []string{"woven-screen", "random-fibre"} }

func driveNames() []string {
	return []string{drive.Sinusoidal.String(), drive.SliderCrank.String(), drive.Rhombic.String(), drive.RossYoke.String()}
}

func gasNames() []string {
	var names []string
	for _, k := range gas.Kinds() {
		names = append(names, k.String())
	}
	return names
}

func alloyNames() []string {
	var names []string
	for _, a := range metal.Alloys() {
		names = append(names, a.String())
	}
	return names
}

func whenPhase() Condition {
	return Condition{"to sinusoidal and slider-crank drives of alpha, beta and gamma machines", func(e *model.Engine) bool {
		return cranked(e.Drive.Kind) && e.Layout != model.DoubleActing
	}}
}

func whenRod() Condition {
	return Condition{"to slider-crank and rhombic drives and the Ross yoke", func(e *model.Engine) bool { return e.Drive.Kind != drive.Sinusoidal }}
}

// cranked says that the drive has a stroke and phase of its own for each body.
func cranked(k drive.Kind) bool { return k == drive.Sinusoidal || k == drive.SliderCrank }

func whenRadius() Condition {
	return Condition{"to rhombic drives and the Ross yoke", func(e *model.Engine) bool { return !cranked(e.Drive.Kind) }}
}

func whenRossYoke() Condition {
	return Condition{"to the Ross yoke", func(e *model.Engine) bool { return e.Drive.Kind == drive.RossYoke }}
}

func whenRhombic() Condition {
	return Condition{"to rhombic drives", func(e *model.Engine) bool { return e.Drive.Kind == drive.Rhombic }}
}

func whenDisplacerStroke() Condition {
	return Condition{"to beta and gamma machines without rhombic drive or Ross yoke, whose strokes follow from the drive",
		func(e *model.Engine) bool { return e.Layout.HasDisplacer() && cranked(e.Drive.Kind) }}
}

func whenPistonStroke() Condition {
	return Condition{"to beta, gamma and double-acting machines without rhombic drive or Ross yoke, whose strokes follow from the drive",
		func(e *model.Engine) bool { return e.Layout != model.Alpha && cranked(e.Drive.Kind) }}
}

func whenAlphaStroke() Condition {
	return Condition{"to alpha machines without a Ross yoke, whose strokes follow from the drive",
		func(e *model.Engine) bool { return e.Layout == model.Alpha && cranked(e.Drive.Kind) }}
}

func whenTwoAxes() Condition {
	return Condition{"to alpha and gamma machines without a Ross yoke", func(e *model.Engine) bool {
		return (e.Layout == model.Alpha || e.Layout == model.Gamma) && e.Drive.Kind != drive.RossYoke
	}}
}

func whenBuffer() Condition {
	return Condition{"to alpha, beta and gamma machines", func(e *model.Engine) bool { return e.Layout != model.DoubleActing }}
}

// machineFields are layout, gas, drive, pistons and spaces.
func machineFields() []Field {
	displacer := func(e *model.Engine) *model.Reciprocator { return &e.Displacer }
	piston := func(e *model.Engine) *model.Reciprocator { return &e.Piston }
	expansion := func(e *model.Engine) *model.Reciprocator { return &e.ExpansionPiston }
	compression := func(e *model.Engine) *model.Reciprocator { return &e.CompressionPiston }

	rows := []Field{
		choice("layout", "arrangement of pistons and cylinders", layoutNames(),
			func(e *model.Engine) *model.Layout { return &e.Layout }, fixed),
		whole("cylinders", "cylinders in the ring; heater, regenerator, cooler, ducts and clearances are those of one of as many circuits", "3 to 12", "3 to 6",
			func(e *model.Engine) *int { return &e.Cylinders }, when(whenDoubleActing()), defaults("4")),
		choice("gas", "working gas", gasNames(), func(e *model.Engine) *gas.Kind { return &e.Gas }),
		measured("charge_pressure", "time mean of the working pressure over a cycle", Pressure, "bar", "0.1 bar to 500 bar", "1 bar to 250 bar",
			func(e *model.Engine) *float64 { return &e.ChargePressure }),
		measured("speed", "revolutions", Frequency, "rpm", "1 rpm to 20000 rpm", "100 rpm to 4500 rpm",
			func(e *model.Engine) *float64 { return &e.Speed }),
		choice("drive.kind", "mechanism that moves the pistons", driveNames(),
			func(e *model.Engine) *drive.Kind { return &e.Drive.Kind }, fixed),
		measured("drive.phase_angle", "lead of the expansion volume over the compression volume", Angle, "deg", "1 deg to 179 deg", "50 deg to 130 deg",
			func(e *model.Engine) *float64 { return &e.Drive.PhaseAngle }, when(whenPhase())),
		measured("drive.rod_length", "length of the connecting rods", Length, "mm", "1 mm to 5 m", "20 mm to 1 m",
			func(e *model.Engine) *float64 { return &e.Drive.RodLength }, when(whenRod())),
		measured("drive.crank_radius", "radius of the cranks", Length, "mm", "1 mm to 2 m", "5 mm to 200 mm",
			func(e *model.Engine) *float64 { return &e.Drive.CrankRadius }, when(whenRadius())),
		measured("drive.eccentricity", "distance of the crank axes from the cylinder axis", Length, "mm", "0.1 mm to 2 m", "5 mm to 300 mm",
			func(e *model.Engine) *float64 { return &e.Drive.Eccentricity }, when(whenRhombic())),
		measured("drive.yoke_arm", "from the crank pin to the tail pin of the yoke", Length, "mm", "1 mm to 2 m", "10 mm to 300 mm",
			func(e *model.Engine) *float64 { return &e.Drive.YokeArm }, when(whenRossYoke())),
		measured("drive.yoke_half_width", "from the crank pin to the pin of each connecting rod; the cylinders stand twice as far apart", Length, "mm", "1 mm to 2 m", "10 mm to 300 mm",
			func(e *model.Engine) *float64 { return &e.Drive.YokeHalfWidth }, when(whenRossYoke())),
		measured("drive.link_length", "rocking link that guides the tail pin", Length, "mm", "1 mm to 5 m", "20 mm to 500 mm",
			func(e *model.Engine) *float64 { return &e.Drive.LinkLength }, when(whenRossYoke())),
		measured("drive.cylinder_angle", "from the axis of the first cylinder to that of the second, in the sense of rotation; at the phase angle both pistons share a crank pin", Angle, "deg", "0 deg to 180 deg", "",
			func(e *model.Engine) *float64 { return &e.Drive.CylinderAngle }, when(whenTwoAxes()), defaults("0 deg")),
		measured("drive.cylinder_distance", "of both cylinder axes along the shaft", Length, "mm", "0 mm to 5 m", "",
			func(e *model.Engine) *float64 { return &e.Drive.CylinderDistance }, when(whenTwoAxes()), defaults("0 mm")),
		measured("drive.cylinder_circle", "diameter of the circle on which the cylinder axes stand; 0 leaves the shaking couple out", Length, "mm", "0 mm to 10 m", "",
			func(e *model.Engine) *float64 { return &e.Drive.CylinderCircle }, when(whenDoubleActing()), defaults("0 mm")),
		measured("drive.speed_fluctuation", "largest less smallest speed over the mean, to be held by the flywheel", Number, "%", "0.0001 to 0.5", "0.2 % to 10 %",
			func(e *model.Engine) *float64 { return &e.Drive.SpeedFluctuation }, defaults("2 %")),
	}
	rows = append(rows, moving("displacer", "displacer", displacer, whenDisplacer(), whenDisplacerStroke())...)
	rows = append(rows,
		measured("displacer.rod", "diameter of the displacer rod through the compression space, 0 for none", Length, "mm", "0 mm to 500 mm", "0 mm to 60 mm",
			func(e *model.Engine) *float64 { return &e.Displacer.Rod }, when(whenDisplacer()), defaults("0 mm")))
	rows = append(rows, hotBody("displacer", "displacer", displacer, whenDisplacer())...)
	rows = append(rows, moving("piston", "piston", piston, whenPiston(), whenPistonStroke())...)
	rows = append(rows,
		measured("piston.rod", "diameter of the piston rod through the compression space", Length, "mm", "0 mm to 500 mm", "5 mm to 60 mm",
			func(e *model.Engine) *float64 { return &e.Piston.Rod }, when(whenDoubleActing())))
	rows = append(rows, hotBody("piston", "dome of the double-acting piston", piston, whenDoubleActing())...)
	rows = append(rows, moving("expansion_piston", "expansion piston", expansion, whenAlpha(), whenAlphaStroke())...)
	rows = append(rows, hotBody("expansion_piston", "dome of the expansion piston", expansion, whenAlpha())...)
	rows = append(rows, moving("compression_piston", "compression piston", compression, whenAlpha(), whenAlphaStroke())...)
	rows = append(rows,
		measured("expansion_space.clearance", "expansion space at its smallest", Volume, "cm3", "0 cm3 to 100 l", "0.2 cm3 to 5 l",
			func(e *model.Engine) *float64 { return &e.ExpansionClearance }),
		measured("compression_space.clearance", "compression space at its smallest", Volume, "cm3", "0 cm3 to 100 l", "0.2 cm3 to 5 l",
			func(e *model.Engine) *float64 { return &e.CompressionClearance }),
		measured("buffer_space.volume", "mean volume behind the piston, 0 for a large one of constant pressure", Volume, "l", "0 l to 10 m3", "",
			func(e *model.Engine) *float64 { return &e.BufferVolume }, when(whenBuffer()), defaults("0 l")))
	for i := range rows {
		if rows[i].Path == "piston.bore" {
			tiedTo("displacer.bore", whenBeta())(&rows[i])
		}
	}
	return rows
}

// moving are the rows that every piston and displacer has.
func moving(prefix, name string, at func(*model.Engine) *model.Reciprocator, c, stroke Condition) []Field {
	return []Field{
		measured(prefix+".bore", "bore of the cylinder of the "+name, Length, "mm", "2 mm to 3 m", "20 mm to 500 mm",
			func(e *model.Engine) *float64 { return &at(e).Bore }, when(c)),
		measured(prefix+".stroke", "stroke of the "+name, Length, "mm", "1 mm to 2 m", "5 mm to 300 mm",
			func(e *model.Engine) *float64 { return &at(e).Stroke }, when(stroke)),
		measured(prefix+".seal_gap", "radial gap that stands for the leakage of the seal, 0 for tight", Length, "mm", "0 mm to 2 mm", "0 mm to 0.1 mm",
			func(e *model.Engine) *float64 { return &at(e).SealGap }, when(c), defaults("0.01 mm")),
		measured(prefix+".seal_length", "length of that seal", Length, "mm", "0.5 mm to 1 m", "3 mm to 150 mm",
			func(e *model.Engine) *float64 { return &at(e).SealLength }, when(c), defaults("15 mm")),
		measured(prefix+".mass", "moving mass of the "+name+" with its rod and a share of the connecting rod, 0 for not given: then its inertia is left out", Mass, "kg", "0 kg to 10000 kg", "",
			func(e *model.Engine) *float64 { return &at(e).Mass }, when(c), defaults("0 kg")),
	}
}

// hotBody are the rows of a displacer or of the dome of an expansion piston.
func hotBody(prefix, name string, at func(*model.Engine) *model.Reciprocator, c Condition) []Field {
	return []Field{
		measured(prefix+".length", "length of the "+name+" from hot face to seal", Length, "mm", "5 mm to 3 m", "30 mm to 600 mm",
			func(e *model.Engine) *float64 { return &at(e).Length }, when(c)),
		measured(prefix+".gap", "radial gap between the "+name+" and the cylinder", Length, "mm", "0.01 mm to 20 mm", "0.1 mm to 2 mm",
			func(e *model.Engine) *float64 { return &at(e).Gap }, when(c)),
		measured(prefix+".wall", "wall thickness of the "+name, Length, "mm", "0.1 mm to 50 mm", "0.3 mm to 5 mm",
			func(e *model.Engine) *float64 { return &at(e).Wall }, when(c), defaults("1 mm")),
	}
}
