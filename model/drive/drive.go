// Package drive gives the motion of displacer and pistons: one file a mechanism.
//
// A machine has two reciprocating bodies. The first is the displacer, or the expansion piston of an
// alpha machine; it leads. The second is the piston, or the compression piston of an alpha machine.
// Positions are measured along the axis of each body's cylinder, upwards: towards the hot end, and for
// a piston that has a cylinder of its own towards its head. So a body that goes up makes the space
// above it smaller. The datum of each body is its own: only differences of positions of one body, and
// of the gap Y1 - Y2 against its smallest value, have a meaning.
//
// Volumes follow from positions in the same way for every mechanism (A areas, A1r the area of the
// displacer's cold side, cross-section less rod):
//
//	expansion space              Ve = Vcle + A1 (Top1 - Y1)
//	compression space, alpha     Vc = Vclc + A2 (Top2 - Y2)
//	compression space, gamma     Vc = Vclc + A1r (Y1 - Bottom1) + A2 (Top2 - Y2)
//	compression space, beta      Vc = Vclc + A1r (Y1 - Y2 - MinGap)
//
// The crank angle theta grows with time. With a phase angle between 0 and pi the expansion volume leads
// the volume swept by the piston, as an engine needs.
package drive

import "math"

// Kind is the kind of mechanism.
type Kind uint8

const (
	Sinusoidal  Kind = iota // both bodies move as a cosine of the crank angle
	SliderCrank             // each body on a crank throw and connecting rod of its own, in line
	Rhombic                 // two mirrored cranks and two yokes
	RossYoke                // one crank, and a yoke that carries both pistons on parallel axes; no beta machine
)

// String gives the name used in study files.
func (k Kind) String() string {
	switch k {
	case Sinusoidal:
		return "sinusoidal"
	case SliderCrank:
		return "slider-crank"
	case Rhombic:
		return "rhombic"
	case RossYoke:
		return "ross-yoke"
	}
	return "unknown"
}

// Motion is the state of both bodies at one crank angle.
type Motion struct {
	Y1 float64 // position of the first body [m]
	Y2 float64 // position of the second body [m]
	V1 float64 // dY1/dtheta [m/rad]
	V2 float64 // dY2/dtheta [m/rad]
	A1 float64 // d2Y1/dtheta2 [m/rad2]
	A2 float64 // d2Y2/dtheta2 [m/rad2]
}

// Mechanism is a drive with its dimensions. A field that a kind does not name is not read.
type Mechanism struct {
	Kind         Kind
	Phase        float64 // angle by which the first body leads the second [rad]; sinusoidal, slider-crank
	Rod          float64 // connecting rod [m]; slider-crank, rhombic, Ross yoke (both rods)
	Radius       float64 // crank radius [m]; rhombic, Ross yoke
	Eccentricity float64 // distance of each crank's axis from the cylinder axis [m]; rhombic
	Stroke1      float64 // stroke of the first body [m]; sinusoidal, slider-crank
	Stroke2      float64 // stroke of the second body [m]; sinusoidal, slider-crank

	YokeArm       float64 // distance of the tail pin from the crank pin [m]; Ross yoke
	YokeHalfWidth float64 // each rod's pin from the crank pin, each cylinder's axis from the crank's axis [m]; Ross yoke
	LinkLength    float64 // link that guides the tail pin [m]; Ross yoke
}

// Fault says why a mechanism cannot work.
type Fault uint8

const (
	None          Fault = iota // it works
	UnknownKind                // the kind is none of those defined here
	NotFinite                  // a dimension is NaN or infinite
	NotPositive                // a stroke or a length is not above zero
	RodTooShort                // the connecting rod cannot pass every crank angle
	CranksCollide              // the two crank pins of a rhombic drive meet: eccentricity not above crank radius
	YokeJams                   // yoke and link of a Ross yoke do not close at every crank angle
)

// String gives a short text for messages.
func (f Fault) String() string {
	switch f {
	case None:
		return "none"
	case UnknownKind:
		return "unknown kind of mechanism"
	case NotFinite:
		return "a dimension is not a finite number"
	case NotPositive:
		return "stroke, crank radius or another length not above zero"
	case RodTooShort:
		return "connecting rod too short to turn"
	case CranksCollide:
		return "crank pins meet: eccentricity not above crank radius"
	case YokeJams:
		return "yoke and link do not let the crank turn: crank radius too large for them"
	}
	return "unknown fault"
}

// Check tells whether the mechanism can turn. At and Extremes may be called only if it returns None.
func (m *Mechanism) Check() Fault {
	switch m.Kind {
	case Sinusoidal:
		return checkSinusoidal(m)
	case SliderCrank:
		return checkSliderCrank(m)
	case Rhombic:
		return checkRhombic(m)
	case RossYoke:
		return checkRossYoke(m)
	}
	return UnknownKind
}

// At sets dst to the motion at crank angle theta [rad].
func (m *Mechanism) At(dst *Motion, theta float64) {
	switch m.Kind {
	case Sinusoidal:
		sinusoidal(dst, m, theta)
	case SliderCrank:
		sliderCrank(dst, m, theta)
	case Rhombic:
		rhombic(dst, m, theta)
	case RossYoke:
		rossYoke(dst, m, theta)
	default:
		panic("drive: motion of an unknown kind of mechanism")
	}
}

// Extremes are the ends of the motion over one turn.
type Extremes struct {
	Top1      float64 // highest position of the first body [m]
	Bottom1   float64 // lowest position of the first body [m]
	Top2      float64 // highest position of the second body [m]
	Bottom2   float64 // lowest position of the second body [m]
	MinGap    float64 // smallest value of Y1 - Y2 [m]; negative where the data of the bodies differ
	MinGapAt  float64 // crank angle of MinGap, 0..2 pi [rad]
	Top1At    float64 // crank angle of Top1, 0..2 pi [rad]
	Bottom1At float64 // crank angle of Bottom1, 0..2 pi [rad]
	Top2At    float64 // crank angle of Top2, 0..2 pi [rad]
	Bottom2At float64 // crank angle of Bottom2, 0..2 pi [rad]
	MaxGap    float64 // largest value of Y1 - Y2 [m]
	MaxGapAt  float64 // crank angle of MaxGap, 0..2 pi [rad]
}

// Stroke1 is the stroke of the first body [m].
func (e *Extremes) Stroke1() float64 { return e.Top1 - e.Bottom1 }

// Stroke2 is the stroke of the second body [m].
func (e *Extremes) Stroke2() float64 { return e.Top2 - e.Bottom2 }

// Extremes gives the ends of the motion: in closed form, except the gap of a slider-crank and all
// of a Ross yoke, which are found by bracketing and Newton's method to rounding.
func (m *Mechanism) Extremes() Extremes {
	switch m.Kind {
	case Sinusoidal:
		return extremesSinusoidal(m)
	case SliderCrank:
		return extremesSliderCrank(m)
	case Rhombic:
		return extremesRhombic(m)
	case RossYoke:
		return extremesRossYoke(m)
	}
	panic("drive: extremes of an unknown kind of mechanism")
}

// turn brings an angle into 0..2 pi.
func turn(theta float64) float64 {
	theta = math.Mod(theta, 2*math.Pi)
	if theta < 0 {
		theta += 2 * math.Pi
	}
	return theta
}

// finite tells whether all values are finite numbers.
func finite(values ...float64) bool {
	for _, v := range values {
		if math.IsNaN(v) || math.IsInf(v, 0) {
			return false
		}
	}
	return true
}
