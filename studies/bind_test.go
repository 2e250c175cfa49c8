package studies

import (
	"math"
	"reflect"
	"strings"
	"testing"

	"hotfront/model"
	"hotfront/optimize"
)

func mustProblem(t testing.TB, data []byte) *Problem {
	t.Helper()
	p, err := NewProblem(mustLoad(t, data))
	if err != nil {
		t.Fatal(err)
	}
	return p
}

func TestProblemAtTheStart(t *testing.T) {
	p := mustProblem(t, edit(t, "brake_power: {min: 2 kW}", "brake_power: {min: 2 kW, max: 50 kW}\n  mach: {max: 0.2}\n  speed: {max: 1200 rpm}"))
	s := p.Study()
	start := p.Start()
	if len(start) != 1 || len(p.Variables()) != len(s.Free) || p.Limits() != 7 || p.Aims() != 2 {
		t.Fatalf("%d starts, %d variables, %d limits, %d aims", len(start), len(p.Variables()), p.Limits(), p.Aims())
	}
	pt := optimize.NewPoint(p)
	copy(pt.X, start[0])
	p.NewEvaluator().Evaluate(&pt)
	if pt.Cause != "" {
		t.Fatalf("the start design fails: %s", pt.Cause)
	}

	var perf model.Performance
	engine := s.EngineAt(pt.X)
	model.Evaluate(&perf, &engine, &s.Corrections, model.NewWorkspace())
	if got := p.PerformanceOf(pt.Extra); got != perf {
		t.Errorf("performance from the point's extras differs:\n%+v\n%+v", got, perf)
	}
	if pt.F[0] != -perf.BrakePower || pt.F[1] != -perf.BrakeEfficiency {
		t.Errorf("aims %v", pt.F)
	}
	want := []float64{
		perf.HeaterMetalTemperature/1023.15 - 1,
		perf.HeaterStressUtilisation - 1,
		perf.BrakePower/50e3 - 1,
		1 - perf.BrakePower/2e3,
		perf.Mach/0.2 - 1,
		1000.0/1200 - 1,
		36*0.3/20 - 1,
	}
	for i, g := range pt.G {
		if math.Abs(g-want[i]) > 1e-12 {
			t.Errorf("limit %d, %s: got %v, want %v", i, s.Limits[i].Name, g, want[i])
		}
	}
	if len(p.ExtraNames()) != p.Extras() || len(pt.Extra) != p.Extras() {
		t.Error("extras and their names differ in number")
	}
	if !reflect.DeepEqual(p.Reference(), []float64{0, 0}) {
		t.Errorf("reference %v", p.Reference())
	}
}

func TestLeastAimAndZeroBound(t *testing.T) {
	p := mustProblem(t, edit(t, "aims: {brake_power: most, brake_efficiency: most}", "aims: {hot_metal_mass: least, brake_power: most}",
		"brake_power: {min: 2 kW}", "losses.shuttle: {max: 0}"))
	pt := optimize.NewPoint(p)
	copy(pt.X, p.Start()[0])
	p.NewEvaluator().Evaluate(&pt)
	if pt.F[0] <= 0 || p.Reference()[0] != 2*pt.F[0] || p.Reference()[1] != 0 {
		t.Errorf("aims %v, reference %v", pt.F, p.Reference())
	}
	if math.Abs(pt.G[2]-1) > 1e-12 { // the start design's own value is the scale
		t.Errorf("limit at 0: %v", pt.G[2])
	}
}

func TestFailedDesignsHaveACause(t *testing.T) {
	p := mustProblem(t, edit(t, "unheated_length: 50 mm", "heated_length: 250 mm",
		"tubing: {expr: \"heater.tube_count * heater.tube_length\", max: 20 m}",
		"root: {expr: \"sqrt(heater.tube_length - 200*mm)\", max: 1}"))
	ev := p.NewEvaluator()
	pt := optimize.NewPoint(p)
	length := 1 // heater.tube_length
	if p.Variables()[length].Name != "heater.tube_length" {
		t.Fatal("variables in another order")
	}
	fill := func(v float64) {
		copy(pt.X, p.Start()[0])
		pt.X[length] = v
		ev.Evaluate(&pt)
	}
	fill(0.2)
	if pt.Cause != model.HeatedTooLong.String() {
		t.Errorf("cause %q", pt.Cause)
	}
	for _, v := range append(append(pt.F, pt.G...), pt.Extra...) {
		if v != 0 {
			t.Fatal("a failed design carries numbers")
		}
	}
	fill(0.3)
	if pt.Cause != "" || pt.F[0] >= 0 {
		t.Errorf("after a failed design: cause %q, aims %v", pt.Cause, pt.F)
	}

	root := mustProblem(t, edit(t, "tubing: {expr: \"heater.tube_count * heater.tube_length\", max: 20 m}",
		"root: {expr: \"sqrt(heater.tube_length - 350*mm)\", max: 1}"))
	pt = optimize.NewPoint(root)
	copy(pt.X, root.Start()[0])
	root.NewEvaluator().Evaluate(&pt)
	if pt.Cause != "result not finite: root" {
		t.Errorf("root of a negative number: cause %q", pt.Cause)
	}
}

// TestEvaluatorsAgree: an evaluator's answer depends on X alone, whatever it evaluated before.
func TestEvaluatorsAgree(t *testing.T) {
	p := mustProblem(t, refuge(t))
	variables := p.Variables()
	x := func(share float64) []float64 {
		out := make([]float64, len(variables))
		for i, v := range variables {
			out[i] = v.Low + share*(v.High-v.Low)
			if v.Kind != optimize.Real {
				out[i] = math.Round(out[i])
			}
		}
		return out
	}
	used := p.NewEvaluator()
	for _, share := range []float64{0.2, 0.9, 0.5, 0.35} {
		a, b := optimize.NewPoint(p), optimize.NewPoint(p)
		copy(a.X, x(share))
		copy(b.X, x(share))
		used.Evaluate(&a)
		p.NewEvaluator().Evaluate(&b)
		if !reflect.DeepEqual(a, b) {
			t.Errorf("share %g: a used evaluator gives another result", share)
		}
	}
}

func TestEvaluatorDoesNotAllocate(t *testing.T) {
	p := mustProblem(t, refuge(t))
	ev := p.NewEvaluator()
	pt := optimize.NewPoint(p)
	copy(pt.X, p.Start()[0])
	if n := testing.AllocsPerRun(3, func() { ev.Evaluate(&pt) }); n != 0 {
		t.Errorf("%v allocations", n)
	}
}

func TestProblemsThatCannotBe(t *testing.T) {
	before, rest, _ := strings.Cut(string(refuge(t)), "free: ")
	_, after, _ := strings.Cut(rest, "limits:")
	nothing := mustLoad(t, []byte(before+"limits:"+after))
	if _, err := NewProblem(nothing); err == nil {
		t.Error("a problem without anything free")
	}
	failing := mustLoad(t, edit(t, "inlet: 40 degC", "inlet: 90 degC", "tube_wall: 700 degC", "tube_wall: 80 degC",
		"brake_power: most,", "coolant_heat: least,"))
	if _, err := NewProblem(failing); err == nil {
		t.Error("a least aim without a start design")
	}
}

// BenchmarkBinding measures what the evaluator adds to the model: everything but model.Evaluate.
func BenchmarkBinding(b *testing.B) {
	p := mustProblem(b, refuge(b))
	s := p.Study()
	engine := s.Engine
	var perf model.Performance
	model.Evaluate(&perf, &engine, &s.Corrections, model.NewWorkspace())
	pt := optimize.NewPoint(p)
	copy(pt.X, p.Start()[0])
	b.ReportAllocs()
	for b.Loop() {
		s.design(&engine, pt.X)
		for i := range s.outputs {
			pt.Extra[i] = s.outputs[i].Get(&perf)
		}
		for i := range s.Limits {
			pt.G[i] = s.Limits[i].Value(&engine, &perf)
		}
	}
}

// BenchmarkEvaluator measures a whole design of the shipped study.
func BenchmarkEvaluator(b *testing.B) {
	p := mustProblem(b, refuge(b))
	ev := p.NewEvaluator()
	pt := optimize.NewPoint(p)
	copy(pt.X, p.Start()[0])
	b.ReportAllocs()
	for b.Loop() {
		ev.Evaluate(&pt)
	}
}

func BenchmarkLoad(b *testing.B) {
	data := refuge(b)
	b.ReportAllocs()
	for b.Loop() {
		mustLoad(b, data)
	}
}
