package drive

import "math"

// rhombic is the symmetric drive with two mirrored cranks of radius r at distance e on either side of
// the cylinder axis, and rods of length L up to the piston's yoke and down to the displacer's yoke. A
// crank pin stands at x = e - r cos(theta) from the cylinder axis and at height -r sin(theta), so
//
//	Y1 = -r sin(theta) - b     (displacer: lower yoke)
//	Y2 = -r sin(theta) + b     (piston: upper yoke),    b = sqrt(L^2 - x^2)
//
// These are the positions of the yokes. The displacer is carried by a long rod through the piston and
// stands above it although its yoke is the lower one; Y1 - Y2 = -2 b therefore is the gap between the
// two bodies less a constant, which MinGap takes out. The sense of rotation is the one of an engine:
// the expansion volume leads.
//
//	db/dtheta   = -x r sin(theta)/b
//	d2b/dtheta2 = -(r^2 sin^2(theta) + x r cos(theta) + (db/dtheta)^2)/b
//
// Source: derived here from the triangle of crank pin, yoke and axis; dimensions and strokes of a
// published drive of this kind in [Thieme1979].
func rhombic(dst *Motion, m *Mechanism, theta float64) {
	s, c := math.Sincos(theta)
	rs, rc := m.Radius*s, m.Radius*c
	x := m.Eccentricity - rc
	b := math.Sqrt(m.Rod*m.Rod - x*x)
	db := -x * rs / b
	ddb := -(rs*rs + x*rc + db*db) / b
	dst.Y1, dst.V1, dst.A1 = -rs-b, -rc-db, rs-ddb
	dst.Y2, dst.V2, dst.A2 = -rs+b, -rc+db, rs+ddb
}

func checkRhombic(m *Mechanism) Fault {
	if !finite(m.Rod, m.Radius, m.Eccentricity) {
		return NotFinite
	}
	if m.Radius <= 0 || m.Rod <= 0 {
		return NotPositive
	}
	if m.Eccentricity <= m.Radius {
		return CranksCollide
	}
	if m.Rod <= m.Radius+m.Eccentricity {
		return RodTooShort
	}
	return None
}

// extremesRhombic is a closed form. A yoke turns back where crank and rod lie in one line, at the
// distances L + r and L - r from the crank's axis; the stroke of both bodies is the difference of the
// two heights sqrt((L +- r)^2 - e^2). The bodies are closest where b is largest: at theta = 0, since the
// eccentricity is above the crank radius.
func extremesRhombic(m *Mechanism) Extremes {
	r, L, e := m.Radius, m.Rod, m.Eccentricity
	far := math.Sqrt((L+r)*(L+r) - e*e)
	near := math.Sqrt((L-r)*(L-r) - e*e)
	// The angle of the line from crank axis to yoke, measured from the direction towards the cylinder
	// axis (there cos theta = e/(L+r) stretched, and the opposite direction folded).
	stretched := math.Acos(e / (L + r))
	folded := math.Acos(-e / (L - r))
	return Extremes{
		Top1: -near, Top1At: turn(-folded),
		Bottom1: -far, Bottom1At: stretched,
		Top2: far, Top2At: turn(-stretched),
		Bottom2: near, Bottom2At: folded,
		MinGap: -2 * math.Sqrt(L*L-(e-r)*(e-r)), MinGapAt: 0,
		MaxGap: -2 * math.Sqrt(L*L-(e+r)*(e+r)), MaxGapAt: math.Pi,
	}
}
