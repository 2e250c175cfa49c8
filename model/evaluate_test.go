package model

import (
	"flag"
	"math"
	"math/rand/v2"
	"reflect"
	"slices"
	"testing"

	"hotfront/model/cycle"
	"hotfront/model/gas"
)

// numbers walks over every float64 of a performance.
func numbers(v reflect.Value, visit func(name string, x float64)) {
	for i := range v.NumField() {
		f := v.Field(i)
		switch f.Kind() {
		case reflect.Float64:
			visit(v.Type().Field(i).Name, f.Float())
		case reflect.Struct:
			numbers(f, visit)
		}
	}
}

// sound checks what must hold for any design: no number that is none; with a cause nothing but zeros; with
// a result a closed ledger, no loss below zero and no efficiency above Carnot's.
func sound(t *testing.T, p *Performance) {
	t.Helper()
	numbers(reflect.ValueOf(*p), func(name string, x float64) {
		if math.IsNaN(x) || math.IsInf(x, 0) {
			t.Errorf("%s is %v", name, x)
		}
		if p.Cause != None && x != 0 {
			t.Errorf("%s is %v in a design without a result (%v)", name, x, p.Cause)
		}
	})
	if p.Cause != None {
		return
	}
	if math.Abs(p.EnergyResidual) > 1e-3 {
		t.Errorf("energy residual %.1e", p.EnergyResidual)
	}
	if p.BrakeEfficiency > p.CarnotEfficiency {
		t.Errorf("efficiency %g above Carnot's %g", p.BrakeEfficiency, p.CarnotEfficiency)
	}
	numbers(reflect.ValueOf(p.Losses), func(name string, x float64) {
		// A machine that takes work is a heat pump: its matrix may be hotter at the cold end, and Senft's loss
		// is none of an engine.
		if x < 0 && p.IndicatedPower > 0 {
			t.Errorf("loss %s is %g W", name, x)
		}
	})
}

// TestWildDesigns takes designs from a box far wider than any study: every one has a sound result or a
// cause. How many settle is printed, not asserted: most of the box is no engine.
func TestWildDesigns(t *testing.T) {
	rng := rand.New(rand.NewPCG(5, 5))
	w := NewWorkspace()
	c := Corrections{FlowFriction: 2, CycleWork: 0.8, Effectiveness: 0.85, SealFriction: 2e4}
	var p Performance
	causes := map[Cause]int{}
	for range 700 {
		e := wildEngine(rng)
		Evaluate(&p, &e, &c, w)
		causes[p.Cause]++
		sound(t, &p)
	}
	t.Logf("results %d of 700; not settled %d, diverged %d; %v", causes[None], causes[NoConvergence], causes[Diverged], causes)
	if causes[None] < 20 {
		t.Errorf("only %d of 700 designs have a result", causes[None])
	}
}

// FuzzEvaluate evaluates wild designs by the seed of their generator.
func FuzzEvaluate(f *testing.F) {
	for seed := range uint64(8) {
		f.Add(seed)
	}
	w := NewWorkspace()
	f.Fuzz(func(t *testing.T, seed uint64) {
		e := wildEngine(rand.New(rand.NewPCG(seed, 9)))
		c := NoCorrections()
		var p Performance
		Evaluate(&p, &e, &c, w)
		sound(t, &p)
	})
}

// TestEvaluateLeavesNoTrace: a design evaluated after others in the same workspace, failed ones among them,
// has the result of a fresh workspace, bit for bit.
func TestEvaluateLeavesNoTrace(t *testing.T) {
	rng := rand.New(rand.NewPCG(6, 6))
	used := NewWorkspace()
	c := NoCorrections()
	var fresh, after, between Performance
	for i := range 60 {
		cl := classes()[i%3]
		e := drawEngine(rng, &cl)
		wild := wildEngine(rng)
		Evaluate(&between, &wild, &c, used)
		Evaluate(&after, &e, &c, used)
		Evaluate(&fresh, &e, &c, NewWorkspace())
		if after != fresh {
			t.Errorf("design %d: %+v\nfresh: %+v", i, after, fresh)
		}
	}
}

func TestEvaluateAllocs(t *testing.T) {
	w := NewWorkspace()
	c := NoCorrections()
	var p Performance
	e := gammaSet()
	bad := gammaSet()
	bad.Heater.RingDiameter = 0.02
	if n := testing.AllocsPerRun(3, func() {
		Evaluate(&p, &e, &c, w)
		Evaluate(&p, &bad, &c, w)
	}); n != 0 {
		t.Errorf("%v allocations", n)
	}
}

var gridDesigns = flag.Int("grid-designs", 14, "designs of each class in TestGridError")

// TestGridError compares the production grid with one of eight times the cells and steps together, over
// sensible designs of three classes. The median is held to the half per cent that is small against the
// corrections, nine in ten to one per cent. The worst designs have exchangers that hold as much gas as the pistons move; those of less
// than a tenth of efficiency, whose power is a small difference of large works, are told apart.
//
// More designs of each class: go test ./model -run GridError -v -grid-designs 67
func TestGridError(t *testing.T) {
	coarse := NewWorkspace()
	fine := NewWorkspaceGrid(Grid{Heater: 12, Regenerator: 24, Cooler: 12, Steps: 240, CoarseSteps: 24})
	c := NoCorrections()
	var power, efficiency, low []float64
	for i := range classes() {
		cl := classes()[i]
		rng := rand.New(rand.NewPCG(7, uint64(i)))
		for range *gridDesigns {
			e, p := drawSensible(rng, &cl, coarse)
			var q Performance
			Evaluate(&q, &e, &c, fine)
			if q.Cause != None {
				t.Errorf("%s: no result on the fine grid: %v", cl.name, q.Cause)
				continue
			}
			if q.BrakeEfficiency < 0.1 {
				low = append(low, math.Abs(p.BrakePower/q.BrakePower-1))
				continue
			}
			power = append(power, math.Abs(p.BrakePower/q.BrakePower-1))
			efficiency = append(efficiency, math.Abs(p.BrakeEfficiency/q.BrakeEfficiency-1))
		}
	}
	slices.Sort(low)
	if n := len(low); n > 0 {
		t.Logf("power of %d designs of less than 10 %% efficiency: median %.2f %%, 90 %% below %.2f %%, worst %.2f %%", n, 100*low[n/2], 100*low[n*9/10], 100*low[n-1])
	}
	for name, errs := range map[string][]float64{"power": power, "efficiency": efficiency} {
		slices.Sort(errs)
		n := len(errs)
		t.Logf("%s of %d designs: median %.2f %%, 90 %% below %.2f %%, worst %.2f %%", name, n, 100*errs[n/2], 100*errs[n*9/10], 100*errs[n-1])
		if errs[n/2] > 0.005 {
			t.Errorf("%s: median error %.2f %%", name, 100*errs[n/2])
		}
		if errs[n*9/10] > 0.01 {
			t.Errorf("%s: 90 %% below %.2f %%", name, 100*errs[n*9/10])
		}
		if errs[n-1] > 0.06 {
			t.Errorf("%s: worst error %.2f %%", name, 100*errs[n-1])
		}
	}
}

// TestStepError holds the estimated error of the power by the time step against a run with eight times the steps on the same
// cells, on the six machines of the cost page. What is off, on 48 steps and on as many as the estimate asks for, is no more than the
// estimate and what the solution is accepted with: 2e-4 of the heat each in its balance and in its work.
func TestStepError(t *testing.T) {
	fixed, fine := ProductionGrid(), ProductionGrid()
	fixed.Doublings, fine.Doublings = 0, 0
	fine.Steps *= 8
	plain, exact, used := NewWorkspaceGrid(fixed), NewWorkspaceGrid(fine), NewWorkspace()
	c := costCorrections()
	doubled := false
	for _, m := range costMachines() {
		var p, q, want Performance
		Evaluate(&p, &m.engine, &c, plain)
		Evaluate(&q, &m.engine, &c, used)
		Evaluate(&want, &m.engine, &c, exact)
		if p.Cause != None || q.Cause != None || want.Cause != None {
			t.Fatalf("%s: %v, %v, %v", m.name, p.Cause, q.Cause, want.Cause)
		}
		off, left := math.Abs(p.BrakePower/want.BrakePower-1), math.Abs(q.BrakePower/want.BrakePower-1)
		t.Logf("%s: 48 steps off by %.2f %%, estimated %.2f %%; %d steps off by %.2f %%, estimated %.2f %%", m.name, 100*off, 100*p.StepError, q.Steps, 100*left, 100*q.StepError)
		accepted := 4e-4 * want.HeatIn / math.Abs(want.BrakePower) // with corrections the fourth machine has to be driven
		if off > p.StepError+accepted || left > q.StepError+accepted {
			t.Errorf("%s: off by %.2f %% and %.2f %%, estimated %.2f %% and %.2f %%", m.name, 100*off, 100*left, 100*p.StepError, 100*q.StepError)
		}
		doubled = doubled || q.Steps > p.Steps
	}
	if !doubled {
		t.Error("no machine had its steps doubled: one is known to need it")
	}
}

// TestLossesVanishWithTheirCause: each loss is zero without its cause, and above zero with it.
func TestLossesVanishWithTheirCause(t *testing.T) {
	w := NewWorkspace()
	full := Corrections{FlowFriction: 2, CycleWork: 0.8, Effectiveness: 0.85, SealFriction: 2e4}
	var p Performance
	for _, c := range []struct {
		name   string
		loss   func(l *Losses) float64
		change func(e *Engine, c *Corrections)
	}{
		{"flow friction", func(l *Losses) float64 { return l.FlowFriction }, func(_ *Engine, c *Corrections) { c.FlowFriction = 0 }},
		{"cycle work", func(l *Losses) float64 { return l.CycleWork }, func(_ *Engine, c *Corrections) { c.CycleWork = 1 }},
		{"drive", func(l *Losses) float64 { return l.Drive }, func(_ *Engine, c *Corrections) { c.Effectiveness = 1 }},
		{"seal friction", func(l *Losses) float64 { return l.SealFriction }, func(_ *Engine, c *Corrections) { c.SealFriction = 0 }},
		{"leakage", func(l *Losses) float64 { return l.Leakage }, func(e *Engine, _ *Corrections) { e.Piston.SealGap = 0 }},
		{"displacer leakage", func(l *Losses) float64 { return l.DisplacerLeakage }, func(e *Engine, _ *Corrections) { e.Displacer.SealGap = 0 }},
		{"shuttle", func(l *Losses) float64 { return l.Shuttle }, func(e *Engine, _ *Corrections) { e.Displacer.Gap = 0 }},
		{"appendix gap", func(l *Losses) float64 { return l.AppendixGap }, func(e *Engine, _ *Corrections) { e.Displacer.Gap = 0 }},
		{"cylinder wall", func(l *Losses) float64 { return l.CylinderConduction }, func(e *Engine, _ *Corrections) { e.Cylinder.Wall = 0 }},
		{"canister", func(l *Losses) float64 { return l.CanisterConduction }, func(e *Engine, _ *Corrections) { e.Regenerator.CanisterWall = 0 }},
		{"displacer wall", func(l *Losses) float64 { return l.DisplacerConduction }, func(e *Engine, _ *Corrections) { e.Displacer.Wall = 0 }},
	} {
		e, k := gammaSet(), full
		Evaluate(&p, &e, &k, w)
		if v := c.loss(&p.Losses); p.Cause != None || !(v > 0) {
			t.Errorf("%s: %g W with its cause (%v)", c.name, v, p.Cause)
		}
		c.change(&e, &k)
		Evaluate(&p, &e, &k, w)
		if v := c.loss(&p.Losses); p.Cause != None || v != 0 {
			t.Errorf("%s: %g W without its cause (%v)", c.name, v, p.Cause)
		}
	}
}

// TestPressureRaisesPower: raising the charge pressure raises p-V power in proportion (common practice, no
// source), in a perfect-like gas at moderate pressures; films and real gas bend it a little.
func TestPressureRaisesPower(t *testing.T) {
	w := NewWorkspace()
	c := NoCorrections()
	var low, high Performance
	e := gammaSet()
	e.ChargePressure = 20e5
	Evaluate(&low, &e, &c, w)
	e.ChargePressure = 40e5
	Evaluate(&high, &e, &c, w)
	if r := high.PVPower / low.PVPower; !(r > 1.75 && r < 2.05) {
		t.Errorf("twice the pressure gives %.2f times the p-V power", r)
	}
}

// TestGasesRank: in a machine that turns fast hydrogen and helium beat air (common practice, no source).
func TestGasesRank(t *testing.T) {
	w := NewWorkspace()
	c := NoCorrections()
	power := map[gas.Kind]float64{}
	for _, k := range gas.Kinds() {
		e := gammaSet()
		e.Gas, e.Speed = k, 1500.0/60
		var p Performance
		Evaluate(&p, &e, &c, w)
		power[k] = p.BrakePower
	}
	if !(power[gas.Hydrogen] > power[gas.Helium] && power[gas.Helium] > power[gas.Air]) {
		t.Errorf("brake power %v", power)
	}
}

// TestGroundPowerUnit holds the uncorrected model against what is published of the GPU-3 engine. Without
// corrections it must flatter the engine: 4.26 kW came off the shaft with helium at 2500 rpm and 6.82 kW with
// hydrogen at 3500 rpm (NASA TM-82646, testdata/reference/measured_points.csv). With the flow friction
// multiplied by 3, inside the 2.4 to 4.3 that trial fits of such models needed, the indicated power with helium
// has its maximum at the 2500 rpm where the report puts that of the measured power, of 1500, 2000, ..., 3500, and
// with hydrogen it still rises at 3500 rpm.
func TestGroundPowerUnit(t *testing.T) {
	w := NewWorkspace()
	indicated := func(k gas.Kind, friction, rpm float64) float64 {
		e := groundPowerUnit(k, rpm)
		c := NoCorrections()
		c.FlowFriction = friction
		var p Performance
		Evaluate(&p, &e, &c, w)
		if p.Cause != None {
			t.Fatal(p.Cause)
		}
		if math.Abs(p.HeaterGasTemperature-950) > 0.5 {
			t.Errorf("mean gas temperature in the heater %.1f K, asked for 950 K", p.HeaterGasTemperature)
		}
		return p.IndicatedPower
	}
	if v := indicated(gas.Helium, 1, 2500); !(v > 1.5*4260 && v < 2.6*4260) {
		t.Errorf("helium at 2500 rpm: %.0f W indicated against 4260 W measured at the shaft", v)
	}
	if v := indicated(gas.Hydrogen, 1, 3500); !(v > 1.4*6820 && v < 2.6*6820) {
		t.Errorf("hydrogen at 3500 rpm: %.0f W indicated against 6820 W measured at the shaft", v)
	}
	best, most := 0.0, 0.0
	for rpm := 1500.0; rpm <= 3500; rpm += 500 {
		if v := indicated(gas.Helium, 3, rpm); v > most {
			best, most = rpm, v
		}
	}
	if best != 2500 {
		t.Errorf("helium: most power at %g rpm", best)
	}
	if !(indicated(gas.Hydrogen, 3, 3500) > indicated(gas.Hydrogen, 3, 3000)) {
		t.Error("hydrogen: power no longer rises at 3500 rpm")
	}
}

func BenchmarkEvaluate(b *testing.B) {
	c := NoCorrections()
	w := NewWorkspace()
	e := gammaSet()
	var p Performance
	b.ReportAllocs()
	for b.Loop() {
		Evaluate(&p, &e, &c, w)
	}
}

func BenchmarkCycle(b *testing.B) {
	c := NoCorrections()
	w := NewWorkspace()
	e := gammaSet()
	var p Performance
	Evaluate(&p, &e, &c, w)
	var r cycle.Result
	b.ReportAllocs()
	for b.Loop() {
		w.solver.Solve(&r, &w.Path, w.Settings)
	}
}
