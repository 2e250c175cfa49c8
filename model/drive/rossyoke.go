package drive

import "math"

// margin is the part by which a Ross yoke must stay away from its dead points: the crank radius from the largest one
// that yoke and link let pass, and a rod from the offset that it has to reach. At a dead point forces grow without
// bound and the motion turns sharply; a drive as near to it as this, where the link comes within one to three degrees of
// the line of the yoke's arm, is refused.
const margin = 1e-4

// rossYoke is the linkage of small two-cylinder machines in which one crank drives two pistons on parallel axes
// through a yoke, a rigid T:
//
//	  axis 1             axis 2          y
//	     |                  |            |
//	[piston 1]         [piston 2]        O-- x   O crank's axis, halfway between the cylinders' axes
//	     |                  |
//	     | rod L            | rod L
//	     |                  |
//	    E1--------P--------E2            crossbar: P crank pin at its middle, b2 to each end
//	              |
//	              | b1                   tail, square to the crossbar
//	              |
//	              Q---------------G      link l, pivot G fixed
//
// The crank pin P = r (cos theta, sin theta) runs counterclockwise; theta is counted from the x axis, not from the
// lowest place as in the other mechanisms. The axes stand at x = -b2 and +b2; the first body has the left one
// and leads. The tail pin Q would best move on the line x = 0. The link holds it near: its pivot stands
// at G = (l, -b1), a free choice made here so that Q is on x = 0 and the link lies square to it in the middle of Q's
// stroke, b1 below the crank's axis. The pivot is on the side of the second body; on the other side the motion would be
// a little different. The cylinders have an axis each, so one body cannot run in the other's cylinder: this drive is for
// alpha and gamma machines and not for beta, where the gap Y1 - Y2 would have to be one in space.
//
// Position. With Q = (u, w - b1), k = 1/l, B = b1 + r sin(theta), K = r^2/2 + b1 r sin(theta) and
// g = 1/(1 - k r cos(theta)), the two circles about G and P are
//
//	u = k (u^2 + w^2)/2,   u = k g (w B - K)
//
// and so w is the smaller root of a w^2 - 2 h w + c = 0,
//
//	a = 1 + (k g B)^2,   h = g B + k^2 g^2 B K,   c = 2 g K + (k g K)^2,   w = c/(h + sqrt(h^2 - a c))
//
// a form that loses no digits for long links. With a link short beside the arm h goes below zero, and there
// w = (h - sqrt(h^2 - a c))/a is the one that loses none. The yoke's tilt phi, counterclockwise, and the rods' lower ends:
//
//	sin(phi) = (u - r cos(theta))/b1     cos(phi) = (B - w)/b1
//	E = P -+ b2 (cos(phi), sin(phi))     x1 = r cos(theta) + b2 (1 - cos(phi))   offset of E1 from axis 1
//	                                     x2 = r cos(theta) - b2 (1 - cos(phi))   offset of E2 from axis 2
//	Y = E_y - x^2/(L + q),   q = sqrt(L^2 - x^2)
//
// (the piston's pin less the rod's length). Derivatives from the condition that Q moves square to the link, n.Q' = 0
// with n = (G - Q)/l, and with d = b1 (cos(phi), sin(phi)):
//
//	phi'  = -n.P'/(n.d)
//	phi'' = (k |Q'|^2 - n.P'' - phi'^2 n.(P - Q))/(n.d)
//
// Limit: for l and L without bound Q is on the line, sin(phi) = -r cos(theta)/b1, and both bodies move harmonically,
//
//	Y1 = r sin(theta) + (b2/b1) r cos(theta) = r sqrt(1 + (b2/b1)^2) sin(theta + atan(b2/b1))
//	Y2 = r sin(theta) - (b2/b1) r cos(theta) = r sqrt(1 + (b2/b1)^2) sin(theta - atan(b2/b1))
//
// so that the first leads by 2 atan(b2/b1), a right angle for b1 = b2.
//
// Accuracy: link and arm keep their lengths within 6e-15 of their sum up to nine tenths of the crank radius that they
// let pass, within 3e-14 up to the margin; measured on 5000 random proportions.
//
// Source: [Ross1979] for the linkage, [UrieliOhio] for the limit, both from memory; equations derived here.
func rossYoke(dst *Motion, m *Mechanism, theta float64) {
	var p rossPose
	p.set(m, theta)
	dst.Y1, dst.V1, dst.A1 = p.one.piston(m.Rod)
	dst.Y2, dst.V2, dst.A2 = p.two.piston(m.Rod)
}

// rossPose is where the yoke stands.
type rossPose struct {
	px, py   float64 // crank pin, seen from the crank's axis [m]
	sin, cos float64 // of the yoke's tilt, counterclockwise
	nx, ny   float64 // unit vector along the link from tail pin to pivot
	n        float64 // n.(cos, sin): cosine of the angle between link and crossbar
	one, two rossEnd
}

// rossEnd is the lower end of a connecting rod.
type rossEnd struct {
	x, vx, ax float64 // offset from the cylinder's axis [m] and its derivatives [m/rad] [m/rad2]
	y, vy, ay float64 // height above the crank's axis [m] and its derivatives [m/rad] [m/rad2]
}

// set works out position, slope and curvature of both ends of the crossbar.
func (p *rossPose) set(m *Mechanism, theta float64) {
	b1, b2, k := m.YokeArm, m.YokeHalfWidth, 1/m.LinkLength
	s, c := math.Sincos(theta)
	rs, rc := m.Radius*s, m.Radius*c

	// Position of the tail pin (u, w - b1).
	g := 1 / (1 - k*rc)
	B, K := b1+rs, 0.5*m.Radius*m.Radius+b1*rs
	kgB, kgK := k*g*B, k*g*K
	a, h, cc := 1+kgB*kgB, g*B+kgB*kgK, 2*g*K+kgK*kgK
	root := math.Sqrt(h*h - a*cc)
	w := cc / (h + root)
	if h < 0 { // c may be zero here, and h + root with it
		w = (h - root) / a
	}
	u := k * g * (w*B - K)

	p.px, p.py = rc, rs
	p.sin, p.cos = (u-rc)/b1, (B-w)/b1
	p.nx, p.ny = 1-k*u, -k*w
	p.n = p.nx*p.cos + p.ny*p.sin

	// P' = (-rs, rc), P'' = -P, P - Q = b1 (-sin, cos), Q' = P' + phi' d.
	turn := (p.nx*rs - p.ny*rc) / (b1 * p.n)
	qx, qy := -rs+turn*b1*p.cos, rc+turn*b1*p.sin
	bend := (k*(qx*qx+qy*qy) + p.nx*rc + p.ny*rs - turn*turn*b1*(p.ny*p.cos-p.nx*p.sin)) / (b1 * p.n)

	// The crossbar from P to E2 is b2 (cos, sin), and the opposite to E1.
	x, y := b2*(w-rs)/b1, b2*p.sin // b2 (1 - cos)
	vx, vy := b2*turn*p.sin, b2*turn*p.cos
	ax, ay := b2*(bend*p.sin+turn*turn*p.cos), b2*(bend*p.cos-turn*turn*p.sin)
	p.one = rossEnd{x: rc + x, vx: -rs + vx, ax: -rc + ax, y: rs - y, vy: rc - vy, ay: -rs - ay}
	p.two = rossEnd{x: rc - x, vx: -rs - vx, ax: -rc - ax, y: rs + y, vy: rc + vy, ay: -rs + ay}
}

// piston gives the motion of the upper end of the rod of length L, which stays on the axis.
func (e *rossEnd) piston(L float64) (y, v, a float64) {
	q := math.Sqrt(L*L - e.x*e.x)
	b := e.x * e.vx / q
	return e.y - e.x*e.x/(L+q), e.vy - b, e.ay - (e.vx*e.vx+e.x*e.ax+b*b)/q
}

// checkRossYoke: the distance of the crank pin from the link's pivot goes from D - r to D + r, D = sqrt(l^2 + b1^2), and
// has to stay between |b1 - l| and b1 + l. The second is the narrower one, r < l + b1 - D = 2 b1 l/(l + b1 + D); it also
// keeps r below both b1 and l. The rods have to reach from the largest offset of their lower ends to the axis.
func checkRossYoke(m *Mechanism) Fault {
	if !finite(m.Rod, m.Radius, m.YokeArm, m.YokeHalfWidth, m.LinkLength) {
		return NotFinite
	}
	r, b1, l := m.Radius, m.YokeArm, m.LinkLength
	if r <= 0 || b1 <= 0 || l <= 0 || m.Rod <= 0 || m.YokeHalfWidth <= 0 {
		return NotPositive
	}
	if !(r*(1+margin) < 2*b1*(l/(l+b1+math.Hypot(l, b1)))) {
		return YokeJams
	}
	if !(rossYokeOffset(m)*(1+margin) < m.Rod) {
		return RodTooShort
	}
	return None
}

// rossYokeGrid is the number of steps a turn in which every low point of the motion shows: a yoke near its dead point
// has sharp ones. Of 1000 random yokes up to the margin from it 72 steps missed the
// gap's end of three and 120 none.
const rossYokeGrid = 120

// rossYokeOffset is the largest distance of a rod's lower end from its axis over a turn [m].
func rossYokeOffset(m *Mechanism) float64 {
	var one, two [rossYokeGrid]float64
	var p rossPose
	for i := range one {
		p.set(m, float64(i)*(2*math.Pi/rossYokeGrid))
		one[i], two[i] = p.one.x, p.two.x
	}
	x1 := func(theta float64) (x, v, a float64) {
		var p rossPose
		p.set(m, theta)
		return p.one.x, p.one.vx, p.one.ax
	}
	x2 := func(theta float64) (x, v, a float64) {
		var p rossPose
		p.set(m, theta)
		return p.two.x, p.two.vx, p.two.ax
	}
	// 1 - cos(phi) is not negative, so x1 is never left of x2: the ends are the right one of x1 and the left one of x2.
	right, _ := lowest(one[:], -1, x1)
	left, _ := lowest(two[:], 1, x2)
	return -min(right, left)
}

func extremesRossYoke(m *Mechanism) Extremes {
	var one, two, between [rossYokeGrid]float64
	var mo Motion
	for i := range one {
		rossYoke(&mo, m, float64(i)*(2*math.Pi/rossYokeGrid))
		one[i], two[i], between[i] = mo.Y1, mo.Y2, mo.Y1-mo.Y2
	}
	y1 := func(theta float64) (y, v, a float64) {
		var mo Motion
		rossYoke(&mo, m, theta)
		return mo.Y1, mo.V1, mo.A1
	}
	y2 := func(theta float64) (y, v, a float64) {
		var mo Motion
		rossYoke(&mo, m, theta)
		return mo.Y2, mo.V2, mo.A2
	}
	gap := func(theta float64) (y, v, a float64) {
		var mo Motion
		rossYoke(&mo, m, theta)
		return mo.Y1 - mo.Y2, mo.V1 - mo.V2, mo.A1 - mo.A2
	}
	var e Extremes
	e.Bottom1, e.Bottom1At = lowest(one[:], 1, y1)
	e.Top1, e.Top1At = lowest(one[:], -1, y1)
	e.Bottom2, e.Bottom2At = lowest(two[:], 1, y2)
	e.Top2, e.Top2At = lowest(two[:], -1, y2)
	e.MinGap, e.MinGapAt = lowest(between[:], 1, gap)
	e.MaxGap, e.MaxGapAt = lowest(between[:], -1, gap)
	e.Top1, e.Top2, e.MaxGap = -e.Top1, -e.Top2, -e.MaxGap
	return e
}

// RossYokeLoad is what the axial forces of both bodies do in a Ross yoke. Directions: x from the first body's axis to
// the second's, y upwards.
type RossYokeLoad struct {
	Rod1   float64 // pull along the connecting rod of the first body, negative for push [N]
	Rod2   float64 // of the second body [N]
	Link   float64 // pull along the link, negative for push; the link pulls its pivot back with the same force [N]
	PinX   float64 // force of the yoke on the crank pin, and of the crank on its main bearings, along x [N]
	PinY   float64 // along y [N]
	Side1  float64 // side thrust of the first body on its cylinder, along x [N]
	Side2  float64 // of the second body [N]
	Moment float64 // torque of the pin's force about the crank's axis, in the sense of rotation [N m]
}

// RossYokeForces sets dst to the forces in a Ross yoke at crank angle theta [rad] under the axial forces F1 and F2 that
// both bodies hand on, upwards [N]. Rods, yoke and link have no mass, pins and cylinders no friction.
//
// A rod stands x sideways and q upwards from its lower end to its pin; x, q, n and P as for the motion. The body
// is in balance along its axis and across:
//
//	rod = F L/q,   side = F x/q,   force on the yoke f = (-F x/q, F)
//
// The yoke is in balance about the crank pin and along x and y:
//
//	link = -[(E1 - P) x f1 + (E2 - P) x f2]/(b1 n.(cos(phi), sin(phi)))
//	pin  = f1 + f2 + link n,   moment = P x pin
//
// No velocity enters; that the moment is F1 V1 + F2 V2, as virtual work has it, is a test of both. Only for a
// mechanism of kind RossYoke whose Check gave None; others panic.
//
// Source: derived here.
func (m *Mechanism) RossYokeForces(dst *RossYokeLoad, theta, F1, F2 float64) {
	if m.Kind != RossYoke {
		panic("drive: forces of a Ross yoke in another kind of mechanism")
	}
	var p rossPose
	p.set(m, theta)
	b1, b2, L := m.YokeArm, m.YokeHalfWidth, m.Rod
	q1, q2 := math.Sqrt(L*L-p.one.x*p.one.x), math.Sqrt(L*L-p.two.x*p.two.x)
	side1, side2 := F1*p.one.x/q1, F2*p.two.x/q2
	*dst = RossYokeLoad{Rod1: F1 * L / q1, Rod2: F2 * L / q2, Side1: side1, Side2: side2}
	dst.hold(&p, b1, b2, -side1, F1, -side2, F2)
}

// RossYokeInertia sets dst to what two masses at the ends of the crossbar, the shares of the connecting rods there, do
// by their inertia. It adds to RossYokeForces; rods and cylinders feel none of it. Each mass puts a force on the yoke,
// which is held as there; the moment is the loss of kinetic energy by crank angle:
//
//	f = -m omega^2 E'',   moment = -omega^2 (m1 E1'.E1'' + m2 E2'.E2'')
//
// theta crank angle [rad], m1 and m2 masses at the ends of the first and the second body [kg], omega [rad/s]. The
// crank pin is halfway between both ends: equal masses pull on the yoke as both together would at the pin, but they
// also turn it, and link and pin hold against that.
//
// Source: derived here.
func (m *Mechanism) RossYokeInertia(dst *RossYokeLoad, theta, m1, m2, omega float64) {
	if m.Kind != RossYoke {
		panic("drive: inertia of a Ross yoke in another kind of mechanism")
	}
	var p rossPose
	p.set(m, theta)
	f1, f2 := -m1*omega*omega, -m2*omega*omega
	*dst = RossYokeLoad{}
	dst.hold(&p, m.YokeArm, m.YokeHalfWidth, f1*p.one.ax, f1*p.one.ay, f2*p.two.ax, f2*p.two.ay)
}

// hold sets link, pin and moment such that the yoke is in balance under the forces (x1, y1) and (x2, y2) on its ends.
func (l *RossYokeLoad) hold(p *rossPose, b1, b2, x1, y1, x2, y2 float64) {
	// (E2 - P) x (f2 - f1), since E1 - P is the opposite of E2 - P.
	moment := b2 * (p.cos*(y2-y1) - p.sin*(x2-x1))
	l.Link = -moment / (b1 * p.n)
	l.PinX, l.PinY = l.Link*p.nx+x1+x2, l.Link*p.ny+y1+y2
	l.Moment = p.px*l.PinY - p.py*l.PinX
}
