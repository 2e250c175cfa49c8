package model

import "math"

// geometry holds what follows from the dimensions alone.
type geometry struct {
	hot  *Reciprocator // body between the hot and the cold end: displacer or expansion piston
	cold *Reciprocator // piston or compression piston

	hotArea    float64 // [m2]
	hotRodArea float64 // [m2]
	coldArea   float64 // [m2]
	hotStroke  float64 // [m]
	coldStroke float64 // [m]

	sweptExpansion float64 // [m3]
	sweptPiston    float64 // of the body or bodies that give power [m3]

	heaterOuter float64 // outer diameter of the heater tubes [m]
	heaterEnds  float64 // volume of the unheated tube ends [m3]
	coolerOuter float64 // [m]
	coolerEnds  float64 // [m3]

	matrixArea   float64 // frontal area of all matrices [m2]
	matrixVolume float64 // with the wires [m3]
}

const (
	// pitchLimit is the smallest pitch of tubes on their ring over outer diameter that leaves metal
	// between the holes for brazing or welding (common practice, no source).
	pitchLimit = 1.15
	// leastCylinders and mostCylinders are those of a double-acting machine: with two the hot space would not lead.
	leastCylinders, mostCylinders = 3, 12
	// bundlePitch is the pitch of cooler tubes in a triangular pattern over outer diameter (common
	// practice in shell-and-tube exchangers, no source).
	bundlePitch = 1.3
)

// set fills the geometry and reports what cannot be built.
func (g *geometry) set(e *Engine) Cause {
	g.hot, g.cold = &e.Displacer, &e.Piston
	switch e.Layout {
	case Alpha:
		g.hot, g.cold = &e.ExpansionPiston, &e.CompressionPiston
	case DoubleActing:
		g.hot = &e.Piston
		if e.Cylinders < leastCylinders || e.Cylinders > mostCylinders {
			return BadInput
		}
	}
	h, r, c := &e.Heater, &e.Regenerator, &e.Cooler
	if !finiteInputs(e, g) {
		return BadInput
	}
	if e.Layout == Beta && math.Abs(g.hot.Bore-g.cold.Bore) > 1e-9*g.hot.Bore {
		return BoresDiffer
	}
	if h.HeatedLength > h.TubeLength*(1+1e-9) || c.CooledLength > c.TubeLength*(1+1e-9) {
		return HeatedTooLong
	}
	if r.InnerDiameter >= r.Diameter {
		return AnnulusInverted
	}
	if r.Porosity <= 0.2 || r.Porosity >= 0.99 || r.WireDiameter > 0.1*r.Length {
		return MatrixImpossible
	}
	if 2*(g.hot.Gap+g.hot.Wall) >= g.hot.Bore || (e.Layout != Alpha && g.hot.Rod >= 0.9*g.hot.Bore) {
		return GapTooWide
	}
	g.hotArea = circle(g.hot.Bore)
	g.coldArea = circle(g.cold.Bore)
	g.hotRodArea = 0
	if e.Layout != Alpha {
		g.hotRodArea = circle(g.hot.Rod)
	}

	g.heaterOuter = h.TubeBore + 2*h.TubeWall
	g.heaterEnds = float64(h.TubeCount) * circle(h.TubeBore) * max(h.TubeLength-h.HeatedLength, 0)
	g.coolerOuter = c.TubeBore + 2*c.TubeWall
	g.coolerEnds = float64(c.TubeCount) * circle(c.TubeBore) * max(c.TubeLength-c.CooledLength, 0)
	g.matrixArea = float64(r.Count) * (circle(r.Diameter) - circle(r.InnerDiameter))
	g.matrixVolume = g.matrixArea * r.Length
	if h.RingDiameter > 0 && g.pitchRatio(e) < pitchLimit {
		return TubesOverlap
	}
	if c.ShellDiameter > 0 && g.bundleDiameter(c) > c.ShellDiameter {
		return BundleTooWide
	}
	return None
}

// pitchRatio is the distance of neighbouring tubes on the mean ring, on which all circuits stand, over their outer diameter.
func (g *geometry) pitchRatio(e *Engine) float64 {
	return e.Heater.RingDiameter * math.Sin(math.Pi/max(e.tubesPerRow(), 2)) / g.heaterOuter
}

// tubesPerRow is the mean number of tubes on a ring; no number of rows given counts as one.
func (e *Engine) tubesPerRow() float64 {
	return e.circuits() * float64(e.Heater.TubeCount) / float64(max(e.Heater.Rows, 1))
}

// bundleDiameter is the diameter of the circle that holds the cooler tubes in a triangular pattern:
// each tube takes sqrt(3)/2 of the square of the pitch, and the rim is ragged by half a pitch all round.
func (g *geometry) bundleDiameter(c *Cooler) float64 {
	pitch := bundlePitch * g.coolerOuter
	return math.Sqrt(float64(c.TubeCount)*pitch*pitch*(2*math.Sqrt(3)/math.Pi)) + g.coolerOuter
}

func circle(d float64) float64 { return math.Pi / 4 * d * d }

// finiteInputs tells whether every number is finite and has the sign it must have.
func finiteInputs(e *Engine, g *geometry) bool {
	h, r, c := &e.Heater, &e.Regenerator, &e.Cooler
	positive := [...]float64{
		e.ChargePressure, e.Speed, g.hot.Bore, g.cold.Bore, g.hot.Length,
		float64(h.TubeCount), h.TubeBore, h.TubeWall, h.TubeLength, h.HeatedLength, h.DesignLife,
		float64(r.Count), r.Diameter, r.Length, r.WireDiameter,
		float64(c.TubeCount), c.TubeBore, c.TubeWall, c.TubeLength, c.CooledLength,
		e.Coolant.Inlet, e.Coolant.Flow, e.Coolant.Film,
	}
	if e.Heat.Held() && !(e.Heat.Temperature > 0 && !math.IsInf(e.Heat.Temperature, 1)) {
		return false
	}
	notNegative := [...]float64{
		e.ExpansionClearance, e.CompressionClearance, e.BufferVolume, g.hot.Rod, g.hot.Gap, g.hot.Wall,
		g.hot.SealGap, g.hot.SealLength, g.cold.SealGap, g.cold.SealLength, g.hot.Mass, g.cold.Mass,
		e.Drive.SpeedFluctuation, e.Drive.CylinderAngle, e.Drive.CylinderDistance, e.Drive.CylinderCircle,
		e.Cylinder.Wall, h.EndLoss, float64(h.Rows), h.RingDiameter, h.FluxPeaking - 1, h.StressFactor - 1,
		r.InnerDiameter, r.Porosity, r.CanisterWall, c.EndLoss, c.ShellDiameter,
		e.ExpansionDuct.Volume, e.ExpansionDuct.Area, e.ExpansionDuct.Loss,
		e.HotDuct.Volume, e.HotDuct.Area, e.HotDuct.Loss,
		e.ColdDuct.Volume, e.ColdDuct.Area, e.ColdDuct.Loss,
		e.CompressionDuct.Volume, e.CompressionDuct.Area, e.CompressionDuct.Loss,
	}
	for _, v := range positive {
		if !(v > 0) || math.IsInf(v, 1) {
			return false
		}
	}
	for _, v := range notNegative {
		if !(v >= 0) || math.IsInf(v, 1) {
			return false
		}
	}
	return true
}
