package force

import (
	"math"

	"hotfront/model/drive"
)

// RossYoke gives the force of the yoke of a Ross yoke on its crank pin [N].
//
// load of drive.RossYokeForces at the crank angle theta [rad], which that drive counts from the x axis: the pin stands
// at r (cos theta, sin theta).
//
// Source: derived here, the turn of the axes.
func RossYoke(load *drive.RossYokeLoad, theta float64) Pin {
	s, c := math.Sincos(theta)
	return Pin{Radial: load.PinX*c + load.PinY*s, Tangential: load.PinY*c - load.PinX*s}
}
