package force

import "math"

// Swing is how the torque of a machine goes about its mean.
type Swing struct {
	Mean   float64 // mean torque [N m]
	Energy float64 // largest less smallest running integral of torque less mean [J]
	HighAt float64 // crank angle where the shaft is fastest, from the first sample on over one turn [rad]
	LowAt  float64 // crank angle where it is slowest [rad]
}

// Fluctuation gives the energy that a flywheel must take up and give back where the load asks for the mean
// torque all the time.
//
//	E(theta) = integral of (T - mean T) dtheta,   dE = max E - min E
//
// theta rising angles over less than a turn [rad], at least four, and T torque there [N m], periodic. Between two
// samples the torque is the cubic through the four samples round them. Its integral closes over a turn with
// the mean of that same interpolation, which differs from the weighted mean of the samples by the error of the
// interpolation only; the extremes of E are taken where the torque crosses its mean: there
// is at least one of each, unless the torque is constant.
//
// Accuracy: the fourth power of the spacing for a smooth torque (3e-5 of dE with 20 samples to the shortest wave,
// in the tests), the second where it has kinks.
//
// Source: derived here; the method of the turning-moment diagram, as in [KhurmiGupta2005], from memory.
func Fluctuation(theta, T []float64) Swing {
	n := len(T)
	if n < 4 || len(theta) != n {
		panic("force: fluctuation of fewer than four samples")
	}
	total := 0.0
	var c cubic
	for k := range n {
		c.set(theta, T, k, 0)
		total += c.integral(c.x[1], c.x[2])
	}
	s := Swing{Mean: total / (2 * math.Pi), HighAt: theta[0], LowAt: theta[0]}
	E, high, low := 0.0, 0.0, 0.0
	for k := range n {
		c.set(theta, T, k, s.Mean)
		if c.y[1]*c.y[2] <= 0 {
			at := c.crossing()
			e := E + c.integral(c.x[1], at)
			if e > high {
				high, s.HighAt = e, at
			}
			if e < low {
				low, s.LowAt = e, at
			}
		}
		E += c.integral(c.x[1], c.x[2])
	}
	s.Energy = high - low
	if math.IsNaN(E) { // which no comparison let through
		s.Energy = E
	}
	return s
}

// cubic is the polynomial through four neighbouring samples.
type cubic struct{ x, y [4]float64 }

// set takes the samples k-1 to k+2 of a periodic function, less a constant.
func (c *cubic) set(theta, T []float64, k int, less float64) {
	n := len(T)
	for i := range c.x {
		j, turn := k-1+i, 0.0
		if j < 0 {
			j, turn = j+n, -2*math.Pi
		} else if j >= n {
			j, turn = j-n, 2*math.Pi
		}
		c.x[i], c.y[i] = theta[j]+turn, T[j]-less
	}
}

// at is Neville's scheme.
func (c *cubic) at(x float64) float64 {
	p := c.y
	for d := 1; d < 4; d++ {
		for i := 0; i < 4-d; i++ {
			p[i] = ((x-c.x[i+d])*p[i] + (c.x[i]-x)*p[i+1]) / (c.x[i] - c.x[i+d])
		}
	}
	return p[0]
}

// integral is Gauss' rule with two points, exact for a cubic.
func (c *cubic) integral(a, b float64) float64 {
	mid, half := 0.5*(a+b), 0.5*(b-a)
	d := half / math.Sqrt(3)
	return half * (c.at(mid-d) + c.at(mid+d))
}

// crossing finds by bisection where the cubic goes through zero between the two inner samples. The running
// integral is flat there, so 30 halvings give it to rounding.
func (c *cubic) crossing() float64 {
	a, b := c.x[1], c.x[2]
	for range 30 {
		mid := 0.5 * (a + b)
		if c.at(mid)*c.y[1] > 0 {
			a = mid
		} else {
			b = mid
		}
	}
	return 0.5 * (a + b)
}

// AreaSwing gives the fluctuation of energy of a turning-moment diagram whose areas between torque and mean
// torque are given one after the other, positive above the mean, with a sum of zero over the cycle: the largest less
// the smallest of the running sums, in the unit of the areas.
//
// Source: [KhurmiGupta2005], chapter on turning-moment diagrams, from memory.
func AreaSwing(areas []float64) float64 {
	sum, high, low := 0.0, 0.0, 0.0
	for _, a := range areas {
		sum += a
		high, low = max(high, sum), min(low, sum)
	}
	return high - low
}

// FlywheelInertia gives the moment of inertia that holds the speed of the shaft within given limits [kg m2].
//
//	J = dE/(delta omega^2),   delta = (omegamax - omegamin)/omega
//
// dE fluctuation of energy [J], delta total fluctuation of speed over mean speed [-], > 0, omega mean of largest
// and smallest speed [rad/s], > 0. Exact for a torque that is given over the crank angle, since omegamax^2 -
// omegamin^2 = 2 delta omega^2. All that turns with the shaft counts towards J. For small delta the omega of the
// other functions of this package, taken as constant, is the same; inertia of the bodies then is part of the torque.
//
// Source: derived here; [KhurmiGupta2005], from memory.
func FlywheelInertia(dE, delta, omega float64) float64 { return dE / (delta * omega * omega) }

// SpeedFluctuation is the same the other way round: delta of a flywheel of the inertia J [kg m2], > 0.
func SpeedFluctuation(dE, J, omega float64) float64 { return dE / (J * omega * omega) }

// DiscWidth gives the width of a solid disc of the moment of inertia J [m]; its mass is 2 J/R^2.
//
//	b = 2 J/(pi rho R^4)
//
// J [kg m2], R outer radius [m], > 0, rho density [kg/m3], > 0.
//
// Source: derived here, integral of r^2 over the disc.
func DiscWidth(J, R, rho float64) float64 { return 2 * J / (math.Pi * rho * R * R * R * R) }

// DiscStress gives the largest stress in a thin solid disc that turns, radial and tangential at its middle [Pa].
//
//	sigma = (3 + nu)/8 rho omega^2 R^2
//
// rho density [kg/m3], omega [rad/s], R outer radius [m], nu Poisson's ratio [-]. A hole in the middle, however
// small, doubles it.
//
// Source: [Timoshenko1956], rotating discs, from memory; the tests integrate the balance of a disc.
func DiscStress(rho, omega, R, nu float64) float64 {
	return (3 + nu) / 8 * rho * omega * omega * R * R
}
