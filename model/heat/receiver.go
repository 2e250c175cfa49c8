package heat

import "math"

// Receiver takes up concentrated radiation in a cavity, or on a flat plate (wall area = aperture area). The wall has
// one temperature and is diffuse and grey in each of the two bands, solar and thermal.
type Receiver struct {
	Power               float64 // radiation that reaches the aperture [W], >= 0
	ApertureArea        float64 // [m2], > 0
	WallArea            float64 // inner wall of the cavity without the aperture [m2], >= aperture area
	Absorptance         float64 // of the wall for the incoming radiation [-], 0..1
	Emittance           float64 // of the wall for its own radiation [-], 0..1
	WindowTransmittance float64 // for the incoming radiation [-], 0..1; 1 = no window
	WindowThermal       float64 // share of the wall's own radiation that the window lets out, the rest comes back [-], 0..1; 1 = no window
	Film                float64 // convection on the aperture area [W/(m2 K)], >= 0
	CasingConductance   float64 // heat loss through the insulation [W/K], >= 0
	Ambient             float64 // temperature of air, surroundings and sky [K], > 0, <= 400
}

// ReceiverBalance says where the radiation went. It closes: Incident = WindowLoss + Reflection + Reradiation +
// Convection + Casing + Heat.
type ReceiverBalance struct {
	Incident    float64 // [W]
	WindowLoss  float64 // reflected or absorbed by the window [W]
	Reflection  float64 // reflected by the wall and out of the aperture [W]
	Reradiation float64 // [W]
	Convection  float64 // [W]
	Casing      float64 // [W]
	Heat        float64 // to the tubes [W]
	Slope       float64 // change of Heat with the wall temperature [W/K]
	Efficiency  float64 // Heat over Incident [-]; 0 without incident radiation
}

// CavityEmittance gives the effective emittance or absorptance [-] of the aperture of a cavity,
//
//	e = 1/(1 + (A_aperture/A_wall) (1/wall - 1))
//
// wall of the inner wall [-], ratio A_aperture/A_wall [-], 0 < ratio <= 1. A diffuse wall at one temperature whose
// radiosity is uniform; the aperture is plane, so that the wall sees it under the view factor ratio (reciprocity).
// A flat plate, ratio 1, keeps its own value; a small aperture is black.
//
// Derivation: of the light on the wall, 1 - wall comes back each time, of that the share ratio leaves and the rest
// falls on the wall again: wall (1 + x + x^2 + ...) with x = (1 - wall)(1 - ratio). Also [SiegelHowell1992], from memory
func CavityEmittance(wall, ratio float64) (float64, Fault) {
	if !share(wall) || !(ratio > 0 && ratio <= 1) {
		return 0, BadShare
	}
	return wall / (wall + ratio*(1-wall)), OK
}

// check gives the effective absorptance and emittance of the aperture.
func (r *Receiver) check() (absorptance, emittance float64, fault Fault) {
	for _, x := range [...]float64{r.Power, r.Film, r.CasingConductance} {
		if !(x >= 0 && finite(x)) {
			return 0, 0, BadNumber
		}
	}
	if !(r.ApertureArea > 0 && r.WallArea >= r.ApertureArea && finite(r.WallArea)) {
		return 0, 0, BadNumber
	}
	if !(r.Ambient > 0 && r.Ambient <= 400) {
		return 0, 0, TemperatureRange
	}
	if !share(r.WindowTransmittance) || !share(r.WindowThermal) {
		return 0, 0, BadShare
	}
	ratio := r.ApertureArea / r.WallArea
	if absorptance, fault = CavityEmittance(r.Absorptance, ratio); fault != OK {
		return 0, 0, fault
	}
	emittance, fault = CavityEmittance(r.Emittance, ratio)
	return absorptance, emittance, fault
}

// Solve fills dst with the balance at the wall temperature Tw [K], > 0, <= 5000:
//
//	Heat = tw a P - tt e sigma A (Tw^4 - Ta^4) - h A (Tw - Ta) - K (Tw - Ta)
//
// tw, tt WindowTransmittance and WindowThermal, a and e effective absorptance and emittance of the aperture, P Power,
// A ApertureArea, h Film, K CasingConductance, Ta Ambient. Heat below zero means that the wall is hotter than its
// stagnation temperature. The little that the window takes from light on its way out is left out.
//
// Derivation: energy balance.
func (r *Receiver) Solve(dst *ReceiverBalance, Tw float64) Fault {
	*dst = ReceiverBalance{}
	a, e, fault := r.check()
	if fault != OK {
		return fault
	}
	if !(Tw > 0 && Tw <= 5000) {
		return TemperatureRange
	}
	out := r.WindowThermal * e
	entered := r.WindowTransmittance * r.Power
	dst.Incident = r.Power
	dst.WindowLoss = r.Power - entered
	dst.Reflection = (1 - a) * entered
	dst.Reradiation = r.ApertureArea * Radiation(out, Tw, r.Ambient)
	dst.Convection = r.Film * r.ApertureArea * (Tw - r.Ambient)
	dst.Casing = r.CasingConductance * (Tw - r.Ambient)
	dst.Heat = a*entered - dst.Reradiation - dst.Convection - dst.Casing
	dst.Slope = -4*out*stefanBoltzmann*r.ApertureArea*Tw*Tw*Tw - r.Film*r.ApertureArea - r.CasingConductance
	if r.Power > 0 {
		dst.Efficiency = dst.Heat / r.Power
	}
	return OK
}

// Stagnation gives the wall temperature [K] at which no heat is left for the tubes; at a higher one they
// would heat the receiver. Without any loss there is none: LossFree.
func (r *Receiver) Stagnation() (float64, Fault) {
	return r.WallTemperature(0)
}

// WallTemperature gives the wall temperature [K] at which the receiver gives the heat Q [W]. The balance falls with
// the temperature, and faster the hotter, so Newton's method from above comes down to the root without passing it. More than
// the receiver takes up at 0 K is TooCold.
func (r *Receiver) WallTemperature(Q float64) (float64, Fault) {
	a, e, fault := r.check()
	if fault != OK {
		return 0, fault
	}
	if !finite(Q) {
		return 0, BadNumber
	}
	c4 := r.WindowThermal * e * stefanBoltzmann * r.ApertureArea
	c1 := r.Film*r.ApertureArea + r.CasingConductance
	Ta := r.Ambient
	// c4 T^4 + c1 T = sum
	sum := a*r.WindowTransmittance*r.Power - Q + c4*Ta*Ta*Ta*Ta + c1*Ta
	if c4 == 0 && c1 == 0 {
		return 0, LossFree
	}
	if !(sum > 0) {
		return 0, TooCold
	}
	// Without the linear losses, or without radiation, the wall would be hotter: both are above the root.
	T := math.Inf(1)
	if c4 > 0 {
		T = math.Sqrt(math.Sqrt(sum / c4))
	}
	if c1 > 0 {
		T = min(T, sum/c1)
	}
	if !finite(T) {
		return 0, LossFree
	}
	for range 200 {
		d := (c4*T*T*T*T + c1*T - sum) / (4*c4*T*T*T + c1)
		T -= d
		if math.Abs(d) <= 1e-14*T {
			return T, OK
		}
	}
	return 0, NoConvergence
}
