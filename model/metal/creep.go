package metal

import "math"

const (
	larsonMillerConstant = 20   // [-], with the time in hours
	parameterCentre      = 25   // [kK]
	secondsPerHour       = 3600 // [s]
)

// parameter gives the Larson-Miller parameter [kK] for T [K] and a life [s].
func parameter(T, seconds float64) float64 {
	return T * (larsonMillerConstant + math.Log10(seconds/secondsPerHour)) * 1e-3
}

// log10Stress gives the logarithm of the rupture stress [log10 Pa] and its slope [1/kK] at the
// parameter P [kK]; outside the range of the rows along the tangent at the end.
func (r *Rupture) log10Stress(P float64) (value, slope float64) {
	at := min(max(P, r.Low), r.High)
	z := at - parameterCentre
	c := &r.C
	value = c[0] + z*(c[1]+z*(c[2]+z*c[3]))
	slope = c[1] + z*(2*c[2]+z*3*c[3])
	return value + slope*(P-at), slope
}

// RuptureStress gives the stress [Pa] that breaks the metal after a time [s] at T [K], by the
// equation of the package comment. It is never above the short-time tensile strength at T.
// inRange is false where the parameter lies outside the rows of the fit.
//
// Source: [LarsonMiller1952]; rows of testdata/reference/alloy_creep_rupture.csv. Accuracy: 10 %
// against each row in use; the scatter of heats is larger, commonly taken as 20 % on stress.
func (p *Properties) RuptureStress(T, seconds float64) (stress float64, inRange bool) {
	P := parameter(T, seconds)
	v, _ := p.Rupture.log10Stress(P)
	inRange = P >= p.Rupture.Low && P <= p.Rupture.High
	return min(math.Pow(10, v), p.Tensile.At(T)), inRange
}

// RuptureLife is the inverse of RuptureStress: the time [s] after which a stress [Pa] > 0 breaks
// the metal at T [K]. A stress above the short-time tensile strength gives 0, out of range.
func (p *Properties) RuptureLife(T, stress float64) (seconds float64, inRange bool) {
	if stress > p.Tensile.At(T) {
		return 0, false
	}
	P := p.Rupture.parameterAt(math.Log10(stress))
	inRange = P >= p.Rupture.Low && P <= p.Rupture.High
	return math.Pow(10, P*1e3/T-larsonMillerConstant) * secondsPerHour, inRange
}

// heatScatter is the scatter of rupture stress from heat to heat of one alloy, a standard deviation [-]: common
// practice, no source.
const heatScatter = 0.2

// LifeBand gives the lives [s] between which about two of three heats break at T [K] under a stress [Pa] > 0: those at the
// stress moved up and down by the scatter of the rows about the fit and that from heat to heat,
//
//	s = (heat^2 + rows^2)^1/2,   low = life(stress (1 + s)),   high = life(stress/(1 + s)).
func (p *Properties) LifeBand(T, stress float64) (low, high float64) {
	s := 1 + math.Hypot(heatScatter, p.Rupture.Scatter)
	low, _ = p.RuptureLife(T, stress*s)
	high, _ = p.RuptureLife(T, stress/s)
	return low, high
}

// parameterAt solves log10Stress(P) = want. The curve falls everywhere, so outside the rows its
// tangents give the answer directly and inside halving is sure.
func (r *Rupture) parameterAt(want float64) float64 {
	lo, hi := r.Low, r.High
	if v, slope := r.log10Stress(lo); want >= v {
		return lo + (want-v)/slope
	}
	if v, slope := r.log10Stress(hi); want <= v {
		return hi + (want-v)/slope
	}
	for range 60 {
		mid := 0.5 * (lo + hi)
		if v, _ := r.log10Stress(mid); v > want {
			lo = mid
		} else {
			hi = mid
		}
	}
	return 0.5 * (lo + hi)
}

// DesignStrength gives the stress [Pa] to which a stress factor is applied: the lesser of the
// rupture stress for the life [s] and the 0.2 % yield strength, both at T [K]. inRange is false
// where the rupture stress decides, or could decide, and its parameter is outside the rows, and
// where the temperature is outside the short-time table.
//
// Below the rows the tangent of the rupture curve is too strong, since the true curve flattens
// towards the tensile strength. It counts as unable to decide when it is at least twice the yield strength.
func (p *Properties) DesignStrength(T, seconds float64) (stress float64, inRange bool) {
	rupture, inRows := p.RuptureStress(T, seconds)
	yield, inTable := p.Yield.At(T), strengthInRange(T)
	if inRows {
		return min(rupture, yield), inTable || rupture < yield
	}
	tangent, _ := p.Rupture.log10Stress(parameter(T, seconds))
	cold := parameter(T, seconds) < p.Rupture.Low && math.Pow(10, tangent) >= 2*yield
	return min(rupture, yield), cold && inTable
}

// gridCelsius returns the i-th temperature of the short-time table [degC].
func gridCelsius(i int) float64 { return [len(Strength{})]float64{20, 300, 500, 650, 800, 950}[i] }

// strengthInRange tells whether T [K] lies inside the short-time table.
func strengthInRange(T float64) bool {
	t := T - 273.15
	return t >= gridCelsius(0) && t <= gridCelsius(len(Strength{})-1)
}

// At gives the strength [Pa] at T [K], linear between the temperatures of the table. Below them
// the first value holds; above, the last falls in proportion to its last slope, not below a tenth.
func (s *Strength) At(T float64) float64 {
	t := T - 273.15
	if t <= gridCelsius(0) {
		return s[0]
	}
	i := 1
	for i < len(s)-1 && t > gridCelsius(i) {
		i++
	}
	t0, t1 := gridCelsius(i-1), gridCelsius(i)
	return max(s[i-1]+(s[i]-s[i-1])*(t-t0)/(t1-t0), 0.1*s[len(s)-1])
}
