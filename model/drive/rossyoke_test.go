package drive

import (
	"fmt"
	"math"
	"math/rand/v2"
	"testing"
)

func rossYokes() []Mechanism {
	var out []Mechanism
	for _, m := range mechanisms() {
		if m.Kind == RossYoke {
			out = append(out, m)
		}
	}
	return out
}

// turnable draws a yoke of any proportions whose crank radius is at most the part near of the largest that yoke and
// link let pass, with a rod some part longer than needed.
func turnable(rng *rand.Rand, near float64) Mechanism {
	spread := func(lo, hi float64) float64 { return lo * math.Pow(hi/lo, rng.Float64()) }
	m := Mechanism{Kind: RossYoke, YokeArm: 0.03, YokeHalfWidth: spread(0.003, 0.3), LinkLength: spread(0.003, 3)}
	m.Radius = (1 - spread(1-near, 0.95)) * passing(m.YokeArm, m.LinkLength)
	m.Rod = rossYokeOffset(&m) * spread(1.05, 10)
	return m
}

// passing is the largest crank radius in its other form.
func passing(b1, l float64) float64 { return b1 + l - math.Hypot(b1, l) }

// TestRossYokeCloses holds every bar against its length: the loop crank, yoke, link and the loop crank, yoke, rod,
// with the places of the pins built from the tilt and the link's direction.
func TestRossYokeCloses(t *testing.T) {
	rng := rand.New(rand.NewPCG(1, 2))
	set := rossYokes()
	for range 100 {
		set = append(set, turnable(rng, 0.9))
	}
	var p rossPose
	var mo Motion
	for i, m := range set {
		if f := m.Check(); f != None {
			t.Fatalf("%s: %v: %+v", name(i, &m), f, m)
		}
		size := m.YokeArm + m.YokeHalfWidth + m.LinkLength + m.Rod
		for k := range 97 {
			th := 2 * math.Pi * float64(k) / 97
			p.set(&m, th)
			m.At(&mo, th)
			near := func(what string, got, want float64) {
				t.Helper()
				near(t, fmt.Sprintf("%s theta %.3f %s", name(i, &m), th, what), got, want, 4e-15*size)
			}
			qx, qy := p.px+m.YokeArm*p.sin, p.py-m.YokeArm*p.cos
			near("crank", math.Hypot(p.px, p.py), m.Radius)
			near("link", math.Hypot(m.LinkLength-qx, -m.YokeArm-qy), m.LinkLength)
			near("link's direction x", qx+m.LinkLength*p.nx, m.LinkLength)
			near("link's direction y", qy+m.LinkLength*p.ny, -m.YokeArm)
			x1, x2 := p.one.x-m.YokeHalfWidth, p.two.x+m.YokeHalfWidth
			near("arm to first end", math.Hypot(x1-p.px, p.one.y-p.py), m.YokeHalfWidth)
			near("crossbar", math.Hypot(x2-x1, p.two.y-p.one.y), 2*m.YokeHalfWidth)
			near("crank pin in the middle, x", 0.5*(x1+x2), p.px)
			near("crank pin in the middle, y", 0.5*(p.one.y+p.two.y), p.py)
			near("tail to first end", math.Hypot(x1-qx, p.one.y-qy), math.Hypot(m.YokeArm, m.YokeHalfWidth))
			near("tail to second end", math.Hypot(x2-qx, p.two.y-qy), math.Hypot(m.YokeArm, m.YokeHalfWidth))
			near("first rod", math.Hypot(p.one.x, mo.Y1+m.Rod-p.one.y), m.Rod)
			near("second rod", math.Hypot(p.two.x, mo.Y2+m.Rod-p.two.y), m.Rod)
		}
	}
}

// TestRossYokeShortLink: with a link short beside the arm the tail pin goes far round its pivot, and the other point that
// the two circles share passes the middle of the stroke, w = 0 and c = 0 with h < 0. The link keeps its length there.
func TestRossYokeShortLink(t *testing.T) {
	var p rossPose
	found := 0
	for i, m := range rossYokes() {
		r, b1, l := m.Radius, m.YokeArm, m.LinkLength
		size := b1 + l
		// c = g K (2 + k^2 g K) changes its sign with K + 2 l (l - r cos(theta)).
		c := func(theta float64) float64 {
			s, c := math.Sincos(theta)
			return 0.5*r*r + b1*r*s + 2*l*(l-r*c)
		}
		const n = 360
		for k := range n {
			lo, hi := 2*math.Pi*float64(k)/n, 2*math.Pi*float64(k+1)/n
			if (c(lo) > 0) == (c(hi) > 0) {
				continue
			}
			found++
			for mid := 0.5 * (lo + hi); mid > lo && mid < hi; mid = 0.5 * (lo + hi) {
				if (c(lo) > 0) == (c(mid) > 0) {
					lo = mid
				} else {
					hi = mid
				}
			}
			for away := 1e-17; away < 1e-3; away *= 1.1 {
				for _, th := range []float64{lo - away, lo + away} {
					p.set(&m, th)
					at := fmt.Sprintf("%s theta %.17g ", name(i, &m), th)
					qx, qy := p.px+b1*p.sin, p.py-b1*p.cos
					near(t, at+"link", math.Hypot(l-qx, -b1-qy), l, 4e-15*size)
					near(t, at+"arm", math.Hypot(p.sin, p.cos), 1, 4e-15*size/b1)
				}
			}
		}
	}
	if found != 2 {
		t.Errorf("%d such places, want the two of the last one", found)
	}
}

// TestRossYokeMidPosition: the tail pin goes up and down between -b1 - r and -b1 + r on the crank's axis line, with the
// link square to it in the middle, as far as the link's arc allows: u = w^2/(2 l) to first order.
func TestRossYokeMidPosition(t *testing.T) {
	m := rossYokes()[0]
	m.LinkLength = 1e4
	var p rossPose
	lo, hi := math.Inf(1), math.Inf(-1)
	for k := range 360 {
		p.set(&m, 2*math.Pi*float64(k)/360)
		u, w := p.px+m.YokeArm*p.sin, p.py-m.YokeArm*p.cos+m.YokeArm
		near(t, "tail off the line", u, w*w/(2*m.LinkLength), 2e-17) // rounding of a length of 30 mm
		lo, hi = min(lo, w), max(hi, w)
	}
	near(t, "top of the tail", hi, m.Radius, 1e-8)
	near(t, "bottom of the tail", lo, -m.Radius, 1e-8)
}

// TestRossYokeLimit: link and rods without bound give the harmonic motion of the literature [UrieliOhio]: from memory,
// in its own form with the tilt and b = sqrt(b1^2 - (r cos theta)^2) for the height of the crank pin over the tail pin.
func TestRossYokeLimit(t *testing.T) {
	for i, m := range rossYokes() {
		// The third proportion has a long arm and turns with any longer link, as all do.
		m.Rod, m.LinkLength = math.MaxFloat64/1e200, math.MaxFloat64/1e200
		if f := m.Check(); f != None {
			t.Fatal(f)
		}
		r, b1, b2 := m.Radius, m.YokeArm, m.YokeHalfWidth
		amplitude, lead := r*math.Hypot(1, b2/b1), math.Atan(b2/b1)
		tol := 4e-15 * (r + b2*r/b1)
		var p rossPose
		var mo Motion
		for k := range 360 {
			th := 2 * math.Pi * float64(k) / 360
			s, c := math.Sincos(th)
			p.set(&m, th)
			at := fmt.Sprintf("%s theta %.3f ", name(i, &m), th)
			near(t, at+"sine of tilt", p.sin, -r*c/b1, 1e-15)
			near(t, at+"height over tail", b1*p.cos, math.Sqrt(b1*b1-r*r*c*c), 1e-15*b1)
			m.At(&mo, th)
			near(t, at+"Y1", mo.Y1, r*(s+c*b2/b1), tol)
			near(t, at+"Y2", mo.Y2, r*(s-c*b2/b1), tol)
			near(t, at+"V1", mo.V1, amplitude*math.Cos(th+lead), tol)
			near(t, at+"V2", mo.V2, amplitude*math.Cos(th-lead), tol)
			near(t, at+"A1", mo.A1, -amplitude*math.Sin(th+lead), 2*tol)
			near(t, at+"A2", mo.A2, -amplitude*math.Sin(th-lead), 2*tol)
		}
		e := m.Extremes()
		near(t, "stroke 1", e.Stroke1(), 2*amplitude, tol)
		near(t, "stroke 2", e.Stroke2(), 2*amplitude, tol)
		near(t, "crank angle between the tops", turn(e.Top2At-e.Top1At), 2*lead, 1e-14)
	}
}

// TestRossYokeApproach: the way to the limit. A rod adds -x^2/(2 L) and a link tilts the yoke by w^2/(2 l b1), which
// moves the ends by b2 of it, the first down and the second up; both to first order in the inverse of the length.
func TestRossYokeApproach(t *testing.T) {
	const long = 1e4
	for i, m := range rossYokes() {
		m.Rod, m.LinkLength = 1e100, 1e100
		rods, link := m, m
		rods.Rod, link.LinkLength = long, long
		var a, b Motion
		var p rossPose
		for k := range 100 {
			th := 2 * math.Pi * float64(k) / 100
			at := fmt.Sprintf("%s theta %.3f ", name(i, &m), th)
			m.At(&a, th)
			p.set(&m, th)
			rods.At(&b, th)
			// Rounding 1e-17 of a motion of some 1e-2 m, times the length; next order smaller by x/L.
			const tol = 2e-17 * long
			near(t, at+"rod 1", long*(b.Y1-a.Y1), -0.5*p.one.x*p.one.x, tol)
			near(t, at+"rod 2", long*(b.Y2-a.Y2), -0.5*p.two.x*p.two.x, tol)
			w := p.py - m.YokeArm*p.cos + m.YokeArm
			link.At(&b, th)
			shift := 0.5 * w * w * m.YokeHalfWidth / m.YokeArm
			near(t, at+"link 1", long*(b.Y1-a.Y1), -shift, tol+1e-5*math.Abs(shift))
			near(t, at+"link 2", long*(b.Y2-a.Y2), shift, tol+1e-5*math.Abs(shift))
		}
	}
}

// TestRossYokeFirstHarmonic: usual proportions with real rods and link keep amplitude and phase of the limit within
// one percent and one degree: finite lengths come in by squares such as (r/L)^2 and r^3/(b1^2 l) only.
func TestRossYokeFirstHarmonic(t *testing.T) {
	m := rossYokes()[0]
	amplitude, lead := m.Radius*math.Hypot(1, m.YokeHalfWidth/m.YokeArm), math.Atan(m.YokeHalfWidth/m.YokeArm)
	const n = 64
	var s1, c1, s2, c2 float64
	var mo Motion
	for k := range n {
		s, c := math.Sincos(2 * math.Pi * float64(k) / n)
		m.At(&mo, 2*math.Pi*float64(k)/n)
		s1, c1 = s1+mo.Y1*s*2/n, c1+mo.Y1*c*2/n
		s2, c2 = s2+mo.Y2*s*2/n, c2+mo.Y2*c*2/n
	}
	t.Logf("amplitudes %.4f %.4f of the limit's, phase %.3f %.3f deg of %.3f", math.Hypot(s1, c1)/amplitude,
		math.Hypot(s2, c2)/amplitude, math.Atan2(c1, s1)*180/math.Pi, math.Atan2(c2, s2)*180/math.Pi, lead*180/math.Pi)
	near(t, "amplitude 1", math.Hypot(s1, c1)/amplitude, 1, 0.01)
	near(t, "amplitude 2", math.Hypot(s2, c2)/amplitude, 1, 0.01)
	near(t, "lead 1", math.Atan2(c1, s1), lead, math.Pi/180)
	near(t, "lag 2", math.Atan2(c2, s2), -lead, math.Pi/180)
}

// TestRossYokeCheck: the condition for a full turn against the distance of crank pin and pivot over a turn, and the
// rod's against the offsets on a grid.
func TestRossYokeCheck(t *testing.T) {
	good := rossYokes()[0]
	change := func(f func(m *Mechanism)) Mechanism { m := good; f(&m); return m }
	for _, c := range []struct {
		m    Mechanism
		want Fault
	}{
		{good, None},
		{change(func(m *Mechanism) { m.YokeArm = math.NaN() }), NotFinite},
		{change(func(m *Mechanism) { m.YokeHalfWidth = math.Inf(1) }), NotFinite},
		{change(func(m *Mechanism) { m.LinkLength = math.Inf(1) }), NotFinite},
		{change(func(m *Mechanism) { m.Radius = 0 }), NotPositive},
		{change(func(m *Mechanism) { m.Rod = -1 }), NotPositive},
		{change(func(m *Mechanism) { m.YokeArm = 0 }), NotPositive},
		{change(func(m *Mechanism) { m.YokeHalfWidth = 0 }), NotPositive},
		{change(func(m *Mechanism) { m.LinkLength = -0.1 }), NotPositive},
		{change(func(m *Mechanism) { m.YokeArm = m.Radius }), YokeJams},
		{change(func(m *Mechanism) { m.LinkLength = m.Radius }), YokeJams},
		// 30, 40 and 50 mm: a crank of 20 mm just does not pass.
		{change(func(m *Mechanism) { m.LinkLength, m.Radius = 0.04, 0.02 }), YokeJams},
		{change(func(m *Mechanism) { m.LinkLength, m.Radius = 0.04, 0.0199 }), None},
		{change(func(m *Mechanism) { m.Rod = m.Radius }), RodTooShort},
	} {
		if got := c.m.Check(); got != c.want {
			t.Errorf("%+v: %v, want %v", c.m, got, c.want)
		}
	}

	rng := rand.New(rand.NewPCG(3, 4))
	for range 200 {
		m := turnable(rng, 0.99)
		m.Radius *= 1.5 // some of them jam
		jams := false
		for k := range 3600 {
			s, c := math.Sincos(2 * math.Pi * float64(k) / 3600)
			d := math.Hypot(m.LinkLength-m.Radius*c, m.YokeArm+m.Radius*s)
			jams = jams || d >= m.YokeArm+m.LinkLength || d <= math.Abs(m.YokeArm-m.LinkLength)
		}
		m.Rod = 1e3
		if got := m.Check(); (got == YokeJams) != jams {
			t.Errorf("%+v: %v, but jams on a grid: %v", m, got, jams)
		}
		if jams {
			continue
		}
		var p rossPose
		most := 0.0
		for k := range 3600 {
			p.set(&m, 2*math.Pi*float64(k)/3600)
			most = max(most, math.Abs(p.one.x), math.Abs(p.two.x))
		}
		for _, c := range []struct {
			rod  float64
			want Fault
		}{{most, RodTooShort}, {most * 1.001, None}} {
			m.Rod = c.rod
			if got := m.Check(); got != c.want {
				t.Errorf("%+v: %v, want %v", m, got, c.want)
			}
		}
	}
}

// TestRossYokeExtremes: random proportions near to jamming have sharp turns; no grid point may pass the ends.
func TestRossYokeExtremes(t *testing.T) {
	rng := rand.New(rand.NewPCG(5, 6))
	var mo Motion
	for i := range 400 {
		m := turnable(rng, 1-margin)
		if i%4 == 0 { // rods that only just reach
			m.Rod = rossYokeOffset(&m) * (1 + 2*margin)
		}
		if f := m.Check(); f != None {
			t.Fatalf("%+v: %v", m, f)
		}
		e := m.Extremes()
		tol := 4e-15 * (m.Rod + m.YokeHalfWidth)
		for _, c := range []struct {
			at, value float64
			of        func() float64
		}{
			{e.Top1At, e.Top1, func() float64 { return mo.Y1 }}, {e.Bottom1At, e.Bottom1, func() float64 { return mo.Y1 }},
			{e.Top2At, e.Top2, func() float64 { return mo.Y2 }}, {e.Bottom2At, e.Bottom2, func() float64 { return mo.Y2 }},
			{e.MinGapAt, e.MinGap, func() float64 { return mo.Y1 - mo.Y2 }}, {e.MaxGapAt, e.MaxGap, func() float64 { return mo.Y1 - mo.Y2 }},
		} {
			m.At(&mo, c.at)
			near(t, name(i, &m)+" end at its angle", c.of(), c.value, 4*tol)
		}
		for k := range 3600 {
			m.At(&mo, 2*math.Pi*float64(k)/3600)
			if mo.Y1 > e.Top1+tol || mo.Y1 < e.Bottom1-tol || mo.Y2 > e.Top2+tol || mo.Y2 < e.Bottom2-tol ||
				mo.Y1-mo.Y2 > e.MaxGap+tol || mo.Y1-mo.Y2 < e.MinGap-tol {
				t.Errorf("%s: outside its ends at step %d: %+v of %+v: %+v", name(i, &m), k, mo, e, m)
				break
			}
		}
	}
}

func BenchmarkRossYoke(b *testing.B) {
	m := rossYokes()[0]
	b.Run("At", func(b *testing.B) {
		b.ReportAllocs()
		var mo Motion
		th := 0.0
		for b.Loop() {
			m.At(&mo, th)
			th += 0.01
		}
	})
	b.Run("Check", func(b *testing.B) {
		b.ReportAllocs()
		for b.Loop() {
			m.Check()
		}
	})
	b.Run("Extremes", func(b *testing.B) {
		b.ReportAllocs()
		for b.Loop() {
			m.Extremes()
		}
	})
}
