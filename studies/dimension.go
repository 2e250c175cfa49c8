package studies

import (
	"fmt"
	"math"
	"strings"
)

// dimension holds the exponents of length, mass, time and temperature. Angles have none.
type dimension [4]float64

// dimension gives the exponents of a quantity.
func (q Quantity) dimension() dimension {
	switch q {
	case Length:
		return dimension{1, 0, 0, 0}
	case Area:
		return dimension{2, 0, 0, 0}
	case Volume:
		return dimension{3, 0, 0, 0}
	case Pressure:
		return dimension{-1, 1, -2, 0}
	case Temperature, TemperatureDifference:
		return dimension{0, 0, 0, 1}
	case Frequency:
		return dimension{0, 0, -1, 0}
	case Power:
		return dimension{2, 1, -3, 0}
	case Torque, Energy:
		return dimension{2, 1, -2, 0}
	case Duration:
		return dimension{0, 0, 1, 0}
	case Mass:
		return dimension{0, 1, 0, 0}
	case MassFlow:
		return dimension{0, 1, -1, 0}
	case HeatFlux:
		return dimension{0, 1, -3, 0}
	case FilmCoefficient:
		return dimension{0, 1, -3, -1}
	case Speed:
		return dimension{1, 0, -1, 0}
	case Conductance:
		return dimension{2, 1, -3, -1}
	case SpecificEnergy:
		return dimension{2, 0, -2, 0}
	case Force:
		return dimension{1, 1, -2, 0}
	case Inertia:
		return dimension{2, 1, 0, 0}
	case Unbalance:
		return dimension{1, 1, 0, 0}
	case SpecificHeat:
		return dimension{2, 0, -2, -1}
	}
	return dimension{}
}

// exponentSlack is far above the rounding of sums of a few exponents and far below any real one.
const exponentSlack = 1e-9

func (d dimension) equal(o dimension) bool {
	for i := range d {
		if math.Abs(d[i]-o[i]) > exponentSlack {
			return false
		}
	}
	return true
}

func (d dimension) plus(o dimension, times float64) dimension {
	for i := range d {
		d[i] += times * o[i]
	}
	return d
}

// String names the quantity with these exponents, or writes them in base units.
func (d dimension) String() string {
	if d.equal(dimension{}) {
		return "plain number"
	}
	for q := Length; q < quantities; q++ {
		if q != Angle && d.equal(q.dimension()) {
			return q.String()
		}
	}
	var parts []string
	for i, base := range [4]string{"m", "kg", "s", "K"} {
		switch {
		case math.Abs(d[i]) <= exponentSlack:
		case d[i] == 1:
			parts = append(parts, base)
		default:
			parts = append(parts, fmt.Sprintf("%s^%.4g", base, d[i]))
		}
	}
	return strings.Join(parts, " ")
}
