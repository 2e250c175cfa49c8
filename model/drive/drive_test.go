package drive

import (
	"fmt"
	"math"
	"testing"
)

// mechanisms is the set that the identities below are checked on: usual and unusual proportions of every
// kind.
func mechanisms() []Mechanism {
	return []Mechanism{
		{Kind: Sinusoidal, Phase: math.Pi / 2, Stroke1: 0.03, Stroke2: 0.03},
		{Kind: Sinusoidal, Phase: 1.9, Stroke1: 0.05, Stroke2: 0.02},
		{Kind: Sinusoidal, Phase: 0.3, Stroke1: 0.01, Stroke2: 0.06},
		{Kind: SliderCrank, Phase: math.Pi / 2, Rod: 0.08, Stroke1: 0.03, Stroke2: 0.03},
		{Kind: SliderCrank, Phase: 1.2, Rod: 0.04, Stroke1: 0.07, Stroke2: 0.05},
		{Kind: SliderCrank, Phase: 2.2, Rod: 0.5, Stroke1: 0.02, Stroke2: 0.06},
		{Kind: SliderCrank, Phase: 0.05, Rod: 0.021, Stroke1: 0.04, Stroke2: 0.04},
		{Kind: SliderCrank, Phase: 3.1, Rod: 0.024, Stroke1: 0.04, Stroke2: 0.039},
		{Kind: Rhombic, Rod: 0.046, Radius: 0.0138, Eccentricity: 0.0208},
		{Kind: Rhombic, Rod: 0.09, Radius: 0.015, Eccentricity: 0.016},
		{Kind: Rhombic, Rod: 0.06, Radius: 0.01, Eccentricity: 0.045},
		{Kind: RossYoke, Radius: 0.008, Rod: 0.06, YokeArm: 0.03, YokeHalfWidth: 0.03, LinkLength: 0.05},
		{Kind: RossYoke, Radius: 0.02, Rod: 0.05, YokeArm: 0.04, YokeHalfWidth: 0.06, LinkLength: 0.1},
		{Kind: RossYoke, Radius: 0.004, Rod: 0.3, YokeArm: 0.09, YokeHalfWidth: 0.02, LinkLength: 0.007},
	}
}

func name(i int, m *Mechanism) string { return fmt.Sprintf("%d %v", i, m.Kind) }

func near(t *testing.T, what string, got, want, tol float64) {
	t.Helper()
	if !(math.Abs(got-want) <= tol) {
		t.Errorf("%s: got %.15g, want %.15g, off by %.2g, allowed %.2g", what, got, want, got-want, tol)
	}
}

func TestDerivativesAgainstCentralDifference(t *testing.T) {
	// Step 1e-4: truncation h^2/6 of the third derivative (of the size of the stroke), about 1e-8 of it;
	// rounding 1e-16/h of the position, less. 1e-7 leaves room for the harmonics of short rods.
	const h, tol = 1e-4, 1e-7
	for i, m := range mechanisms() {
		if f := m.Check(); f != None {
			t.Fatalf("%s: %v", name(i, &m), f)
		}
		e := m.Extremes()
		scale := max(e.Stroke1(), e.Stroke2())
		var lo, mid, hi Motion
		for k := range 97 {
			th := float64(k) * 2 * math.Pi / 97
			m.At(&lo, th-h)
			m.At(&mid, th)
			m.At(&hi, th+h)
			at := fmt.Sprintf("%s theta %.3f", name(i, &m), th)
			near(t, at+" V1", mid.V1, (hi.Y1-lo.Y1)/(2*h), tol*scale)
			near(t, at+" V2", mid.V2, (hi.Y2-lo.Y2)/(2*h), tol*scale)
			near(t, at+" A1", mid.A1, (hi.V1-lo.V1)/(2*h), tol*scale)
			near(t, at+" A2", mid.A2, (hi.V2-lo.V2)/(2*h), tol*scale)
		}
	}
}

func TestCloses(t *testing.T) {
	var a, b Motion
	for i, m := range mechanisms() {
		e := m.Extremes()
		m.At(&a, 0.7)
		m.At(&b, 0.7+2*math.Pi)
		near(t, name(i, &m)+" Y1", b.Y1, a.Y1, 1e-14*e.Stroke1()*10)
		near(t, name(i, &m)+" V2", b.V2, a.V2, 1e-14*e.Stroke2()*10)
		// A body comes back: the slope sums to nothing over a turn (spectral for a periodic function).
		sum1, sum2 := 0.0, 0.0
		const n = 256
		for k := range n {
			m.At(&a, 2*math.Pi*float64(k)/n)
			sum1 += a.V1
			sum2 += a.V2
		}
		near(t, name(i, &m)+" mean V1", sum1/n, 0, 1e-14*e.Stroke1())
		near(t, name(i, &m)+" mean V2", sum2/n, 0, 1e-14*e.Stroke2())
	}
}

func TestExtremes(t *testing.T) {
	for i, m := range mechanisms() {
		e := m.Extremes()
		scale := max(e.Stroke1(), e.Stroke2())
		size := scale
		if m.Kind == Rhombic || m.Kind == RossYoke {
			size = m.Rod
		}
		// 1. Each is the position at the angle stated, and the slope there is zero.
		at := func(theta float64) Motion {
			var mo Motion
			if theta < 0 || theta > 2*math.Pi {
				t.Errorf("%s: angle %g outside a turn", name(i, &m), theta)
			}
			m.At(&mo, theta)
			return mo
		}
		for _, c := range []struct {
			what                          string
			value, position, slope, curve float64
		}{
			{"Top1", e.Top1, at(e.Top1At).Y1, at(e.Top1At).V1, at(e.Top1At).A1},
			{"Bottom1", e.Bottom1, at(e.Bottom1At).Y1, at(e.Bottom1At).V1, at(e.Bottom1At).A1},
			{"Top2", e.Top2, at(e.Top2At).Y2, at(e.Top2At).V2, at(e.Top2At).A2},
			{"Bottom2", e.Bottom2, at(e.Bottom2At).Y2, at(e.Bottom2At).V2, at(e.Bottom2At).A2},
			{"MinGap", e.MinGap, at(e.MinGapAt).Y1 - at(e.MinGapAt).Y2, at(e.MinGapAt).V1 - at(e.MinGapAt).V2, at(e.MinGapAt).A1 - at(e.MinGapAt).A2},
			{"MaxGap", e.MaxGap, at(e.MaxGapAt).Y1 - at(e.MaxGapAt).Y2, at(e.MaxGapAt).V1 - at(e.MaxGapAt).V2, at(e.MaxGapAt).A1 - at(e.MaxGapAt).A2},
		} {
			near(t, name(i, &m)+" "+c.what, c.position, c.value, 2e-15*size)
			// Rounding: an angle up to 2 pi is held to 9e-16, which the curvature turns into slope; and with
			// a short rod (L/q)^2, 3 to 10 here, multiplies the rounding of L^2 - r^2 sin^2.
			near(t, name(i, &m)+" slope at "+c.what, c.slope, 0, 1e-15*math.Abs(c.curve)+5e-15*size)
		}
		// 2. Nothing on a grid passes them, and the grid comes as near as its step allows.
		const n = 20000
		top1, bottom1, top2, bottom2 := math.Inf(-1), math.Inf(1), math.Inf(-1), math.Inf(1)
		least, most := math.Inf(1), math.Inf(-1)
		var mo Motion
		for k := range n {
			m.At(&mo, 2*math.Pi*float64(k)/n)
			top1, bottom1 = max(top1, mo.Y1), min(bottom1, mo.Y1)
			top2, bottom2 = max(top2, mo.Y2), min(bottom2, mo.Y2)
			least, most = min(least, mo.Y1-mo.Y2), max(most, mo.Y1-mo.Y2)
		}
		for _, c := range []struct {
			what        string
			exact, grid float64
		}{
			{"Top1", e.Top1, top1}, {"Bottom1", -e.Bottom1, -bottom1}, {"Top2", e.Top2, top2},
			{"Bottom2", -e.Bottom2, -bottom2}, {"MinGap", -e.MinGap, -least}, {"MaxGap", e.MaxGap, most},
		} {
			if c.grid > c.exact+2e-15*size || c.grid < c.exact-5e-8*scale {
				t.Errorf("%s %s: exact %.15g, best on a grid %.15g", name(i, &m), c.what, c.exact, c.grid)
			}
		}
	}
}

// Two spaces at one pressure and two temperatures (isothermal, hot above 3 times cold) must give work
// for the usual phase: the displacer leads.
func TestUsualPhaseGivesWork(t *testing.T) {
	for i, m := range mechanisms() {
		e := m.Extremes()
		const n = 360
		work := map[string]float64{}
		var mo Motion
		for k := range n {
			m.At(&mo, 2*math.Pi*float64(k)/n)
			spaces := map[string][4]float64{ // Ve, Vc, dVe, dVc for areas of one
				"alpha": {e.Top1 - mo.Y1, e.Top2 - mo.Y2, -mo.V1, -mo.V2},
				"gamma": {e.Top1 - mo.Y1, mo.Y1 - e.Bottom1 + e.Top2 - mo.Y2, -mo.V1, mo.V1 - mo.V2},
				"beta":  {e.Top1 - mo.Y1, mo.Y1 - mo.Y2 - e.MinGap, -mo.V1, mo.V1 - mo.V2},
			}
			for layout, v := range spaces {
				if v[0] < -1e-15 || v[1] < -1e-15 {
					t.Errorf("%s %s: negative volume %v", name(i, &m), layout, v)
				}
				p := 1 / (0.05 + v[0]/3 + v[1])
				work[layout] += p * (v[2] + v[3])
			}
		}
		for layout, w := range work {
			if layout == "alpha" && m.Kind == Rhombic || layout == "beta" && m.Kind == RossYoke {
				continue // no such machine
			}
			if !(w > 0) {
				t.Errorf("%s %s: work %g, want > 0", name(i, &m), layout, w)
			}
		}
	}
}

func TestCheck(t *testing.T) {
	nan, inf := math.NaN(), math.Inf(1)
	for _, c := range []struct {
		m    Mechanism
		want Fault
	}{
		{Mechanism{Kind: Sinusoidal, Phase: 1, Stroke1: 1, Stroke2: 1}, None},
		{Mechanism{Kind: Sinusoidal, Phase: nan, Stroke1: 1, Stroke2: 1}, NotFinite},
		{Mechanism{Kind: Sinusoidal, Phase: 1, Stroke1: 0, Stroke2: 1}, NotPositive},
		{Mechanism{Kind: Sinusoidal, Phase: 1, Stroke1: 1, Stroke2: -1}, NotPositive},
		{Mechanism{Kind: SliderCrank, Rod: 0.5, Stroke1: 1, Stroke2: 0.2}, RodTooShort},
		{Mechanism{Kind: SliderCrank, Rod: 0.51, Stroke1: 1, Stroke2: 0.2}, None},
		{Mechanism{Kind: SliderCrank, Rod: inf, Stroke1: 1, Stroke2: 0.2}, NotFinite},
		{Mechanism{Kind: SliderCrank, Rod: 3, Stroke1: 1}, NotPositive},
		{Mechanism{Kind: Rhombic, Rod: 3, Radius: 1, Eccentricity: 1.5}, None},
		{Mechanism{Kind: Rhombic, Rod: 2.5, Radius: 1, Eccentricity: 1.5}, RodTooShort},
		{Mechanism{Kind: Rhombic, Rod: 3, Radius: 1, Eccentricity: 1}, CranksCollide},
		{Mechanism{Kind: Rhombic, Rod: 3, Radius: -1, Eccentricity: 1}, NotPositive},
		{Mechanism{Kind: Rhombic, Rod: 3, Radius: 1, Eccentricity: nan}, NotFinite},
		{Mechanism{Kind: 9}, UnknownKind},
	} {
		if got := c.m.Check(); got != c.want {
			t.Errorf("%+v: %v, want %v", c.m, got, c.want)
		}
	}
}

func TestStrings(t *testing.T) {
	for k, want := range map[Kind]string{Sinusoidal: "sinusoidal", SliderCrank: "slider-crank", Rhombic: "rhombic", RossYoke: "ross-yoke", 7: "unknown"} {
		if k.String() != want {
			t.Errorf("kind %d: %q, want %q", k, k.String(), want)
		}
	}
	seen := map[string]bool{}
	for f := None; f <= YokeJams; f++ {
		if seen[f.String()] || f.String() == "unknown fault" {
			t.Errorf("fault %d has no text of its own: %q", f, f.String())
		}
		seen[f.String()] = true
	}
}

func TestNoAllocation(t *testing.T) {
	var mo Motion
	var e Extremes
	for i, m := range mechanisms() {
		if n := testing.AllocsPerRun(10, func() { m.At(&mo, 1.1); e = m.Extremes() }); n != 0 {
			t.Errorf("%s: %v allocations", name(i, &m), n)
		}
	}
	_ = e
}

func BenchmarkAt(b *testing.B) {
	for i, m := range mechanisms() {
		if i%3 != 0 {
			continue
		}
		b.Run(m.Kind.String(), func(b *testing.B) {
			b.ReportAllocs()
			var mo Motion
			th := 0.0
			for b.Loop() {
				m.At(&mo, th)
				th += 0.01
			}
		})
	}
}

func BenchmarkExtremes(b *testing.B) {
	m := mechanisms()[3]
	b.ReportAllocs()
	for b.Loop() {
		m.Extremes()
	}
}
