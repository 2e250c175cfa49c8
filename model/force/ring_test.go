package force

import (
	"math"
	"testing"

	"hotfront/model/drive"
)

func TestRingOfHarmonicBodies(t *testing.T) {
	const mass, r, R, omega = 0.9, 0.02, 0.12, 180.0
	const size = mass * r * omega * omega
	m := drive.Mechanism{Kind: drive.Sinusoidal, Phase: 0.7, Stroke1: 2 * r, Stroke2: 1}
	for _, n := range []int{2, 3, 4, 5, 6, 12} {
		want := RingCouple(mass, r, R, n, omega)
		near(t, "couple", want/(size*R), float64(n)/2, 1e-14)
		for k := range 50 {
			theta := 0.3 * float64(k)
			force, couple := RingShaking(&m, theta, mass, R, n, omega)
			near(t, "force", force/size, 0, 1e-14*float64(n))
			if n == 2 { // the couple swings along the line of both bodies
				near(t, "two bodies", couple.X/(size*R), -2*math.Cos(theta+0.7), 1e-14)
				near(t, "two bodies", couple.Y/(size*R), 0, 1e-14)
				continue
			}
			near(t, "constant", couple.Size()/want, 1, 1e-13)
			near(t, "turns with the shaft", couple.X/want, -math.Cos(theta+0.7), 1e-13)
			near(t, "turns with the shaft", couple.Y/want, -math.Sin(theta+0.7), 1e-13)

			// Moments in space, place times force: the bodies push along the shaft (z) at the height 0, the counterweights
			// outwards at the heights +-d/2, the upper one in the direction of the couple.
			const d = 0.2
			u := RingCounterweights(mass, r, R, n) / d * omega * omega
			x, y := couple.X/couple.Size(), couple.Y/couple.Size()
			mx := couple.Y - 2*(d/2)*u*y  // y Fz - z Fy
			my := -couple.X + 2*(d/2)*u*x // z Fx - x Fz
			near(t, "left", math.Hypot(mx, my)/want, 0, 1e-13)
		}
	}
}

// With rods the orders that the number of bodies divides are left: with three the third does not exist, so that the
// force is of the sixth; with four the fourth, m r omega^2 n times its share q^3/4; with two the second.
func TestRingOfSliderCranks(t *testing.T) {
	const mass, r, L, omega = 0.9, 0.02, 0.08, 180.0
	const size, q = mass * r * omega * omega, r / L
	m := crank(drive.SliderCrank, 0, r, L)
	for _, c := range []struct {
		n           int
		share, next float64
	}{{2, q + q*q*q/4, 0.3 * q * q * q}, {4, q * q * q / 4, q * q * q * q * q}, {3, 9 * math.Pow(q, 5) / 128, math.Pow(q, 7)}} {
		most := 0.0
		for k := range 2000 {
			force, _ := RingShaking(&m, float64(k)*math.Pi/1000, mass, 0.1, c.n, omega)
			most = max(most, math.Abs(force))
		}
		near(t, "largest", most/(size*float64(c.n)), c.share, c.next)
	}
}
