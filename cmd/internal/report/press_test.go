package report

import (
	"slices"
	"strings"
	"testing"

	"hotfront/optimize"
	"hotfront/studies"
)

// sawmill is the problem of a shipped study with its start design as a point, evaluated.
func sawmill(t *testing.T) (*studies.Problem, optimize.Point) {
	t.Helper()
	examples, err := studies.Examples()
	if err != nil {
		t.Fatal(err)
	}
	for _, e := range examples {
		if e.Name != "sawmill-heat-and-power" {
			continue
		}
		s, issues := studies.Load(e.Name, e.Data)
		if s == nil {
			t.Fatal(issues)
		}
		p, err := studies.NewProblem(s)
		if err != nil {
			t.Fatal(err)
		}
		point := optimize.NewPoint(p)
		copy(point.X, p.Start()[0])
		p.NewEvaluator().Evaluate(&point)
		if point.Cause != "" {
			t.Fatal(point.Cause)
		}
		return p, point
	}
	t.Fatal("no such study")
	return nil, optimize.Point{}
}

func limit(t *testing.T, s *studies.Study, name string) int {
	t.Helper()
	i := slices.IndexFunc(s.Limits, func(l studies.Limit) bool { return l.Name == name })
	if i < 0 {
		t.Fatalf("no limit %s", name)
	}
	return i
}

// TestPress: limits count as pressing within 1 % of their bound, variables at an end within 1 % of their
// range, and are told from a quarter of the front on.
func TestPress(t *testing.T) {
	p, start := sawmill(t)
	s := p.Study()
	flux := limit(t, s, "heater.heat_flux")
	pressure := slices.IndexFunc(p.Variables(), func(v optimize.Variable) bool { return v.Name == "charge_pressure" })
	wire := slices.IndexFunc(p.Variables(), func(v optimize.Variable) bool { return v.Name == "regenerator.wire_diameter" })
	f := &Front{Problem: p, Failures: []optimize.CauseCount{{Cause: "too hot to touch", Count: 3}}}
	for i := range 8 {
		x := optimize.Point{X: slices.Clone(start.X), F: start.F, G: slices.Repeat([]float64{-0.5}, len(s.Limits)), Extra: start.Extra}
		if i < 3 {
			x.G[flux] = -0.009
			x.X[pressure] = p.Variables()[pressure].High
		}
		if i < 2 {
			x.X[wire] = 0
		}
		f.Points = append(f.Points, x)
	}
	f.Points[7].G[flux] = -0.011
	var b strings.Builder
	f.Press(&b)
	want := "3 of 8 front designs stand within 1 % of the limit heater.heat_flux (at most 20 W/cm2).\n" +
		"2 of 8 sit at the lower end of regenerator.wire_diameter (0.04 mm): widen it if such a machine can be built.\n" +
		"3 of 8 sit at the upper end of charge_pressure (90 bar): widen it if such a machine can be built.\n" +
		"3 designs without a result: too hot to touch.\n"
	if b.String() != want {
		t.Errorf("got:\n%s\nwant:\n%s", b.String(), want)
	}
}

// TestBlame: a limit that no design meets is named with the best that was reached; limits that each are met
// by some are said to contradict each other; designs without a result have no limit to blame.
func TestBlame(t *testing.T) {
	p, start := sawmill(t)
	s := p.Study()
	perf, engine := p.PerformanceOf(start.Extra), s.EngineAt(start.X)
	results := s.LimitResults(&engine, &perf)
	f := &Front{Problem: p, Evaluations: 50, Nearest: &start, NearestSeq: 12}
	for _, r := range results {
		f.Reach = append(f.Reach, Reach{Met: 40, Result: r, Seq: 3})
	}
	blame := func() string {
		var b strings.Builder
		f.Blame(&b)
		return b.String()
	}
	if got := blame(); !strings.Contains(got, "None of 50 designs") || !strings.Contains(got, "contradict each other") ||
		!strings.Contains(got, "heater.heat_flux (at most 20 W/cm2): met by 40") {
		t.Errorf("contradiction:\n%s", got)
	}
	flux := limit(t, s, "heater.heat_flux")
	f.Reach[flux] = Reach{Met: 0, Result: studies.LimitResult{Name: "heater.heat_flux", Value: 25e4, Bound: 20e4, Margin: -5e4}, Seq: 3}
	if got := blame(); strings.Contains(got, "contradict") ||
		!strings.Contains(got, "No design meets heater.heat_flux (at most 20 W/cm2); the best on its own is d000003 with 25 W/cm2, by 25.0 %.") ||
		!strings.Contains(got, "The nearest to all, d000012, misses:") {
		t.Errorf("out of reach:\n%s", got)
	}
	f.Nearest, f.Failures = nil, []optimize.CauseCount{{Cause: "tubes melt", Count: 50}}
	if got := blame(); got != "None of 50 designs has a result.\n50 designs without a result: tubes melt.\n" {
		t.Errorf("all failed:\n%s", got)
	}
}
