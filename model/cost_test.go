package model

import (
	"bytes"
	"flag"
	"fmt"
	"math"
	"math/rand/v2"
	"os"
	"os/exec"
	"path/filepath"
	"runtime"
	"runtime/pprof"
	"slices"
	"strings"
	"testing"
	"time"

	"hotfront/model/drive"
	"hotfront/model/gas"
	"hotfront/model/metal"
)

var costPage = flag.Bool("cost-page", false, "write PERFORMANCE.md anew")

// costMachine is one of the machines of the cost page.
type costMachine struct {
	name   string
	engine Engine
}

// costMachines are six very different machines: published, or invented for tests.
func costMachines() []costMachine {
	const mm, cm3 = 1e-3, 1e-6
	solar := groundPowerUnit(gas.Hydrogen, 3000)
	solar.ChargePressure, solar.Heat = 14e6, Heat{Kind: HeatTubeWall, Temperature: 1050}
	low := gammaSet()
	low.Layout, low.Gas, low.ChargePressure, low.Speed = Alpha, gas.Air, 12e5, 7
	low.Drive = Drive{Kind: drive.SliderCrank, PhaseAngle: 1.8, RodLength: 200 * mm}
	low.ExpansionPiston = Reciprocator{Bore: 150 * mm, Stroke: 60 * mm, Length: 120 * mm, Gap: 0.5 * mm, Wall: 1 * mm}
	low.CompressionPiston = Reciprocator{Bore: 140 * mm, Stroke: 60 * mm}
	low.ExpansionClearance, low.CompressionClearance = 75*cm3, 50*cm3
	low.Heater.TubeCount, low.Heater.TubeBore, low.Heater.TubeLength, low.Heater.HeatedLength, low.Heater.RingDiameter = 150, 5*mm, 220*mm, 190*mm, 0.42
	low.Regenerator = Regenerator{Kind: RandomFibre, Count: 1, Diameter: 170 * mm, Length: 40 * mm, WireDiameter: 0.08 * mm, Porosity: 0.82,
		Alloy: metal.S30400, CanisterWall: 3 * mm, CanisterAlloy: metal.S31600}
	low.Cooler.TubeCount, low.Cooler.TubeBore, low.Cooler.TubeLength, low.Cooler.CooledLength, low.Cooler.ShellDiameter = 420, 3*mm, 110*mm, 110*mm, 0.2
	low.Heat, low.Coolant = Heat{Kind: HeatTubeWall, Temperature: 573}, Coolant{Inlet: 293, Flow: 0.4, Film: 6000}
	ring := ringOfFour()
	yoke := yokeAlpha()
	yoke.Gas, yoke.ChargePressure, yoke.Speed = gas.Nitrogen, 30e5, 12
	return []costMachine{
		{"published ground power unit, helium, 6.9 MPa, 2500 rpm", groundPowerUnit(gas.Helium, 2500)},
		{"gamma set, helium, 6 MPa, 1000 rpm (reference design)", gammaSet()},
		{"hydrogen, rhombic, 14 MPa, 3000 rpm", solar},
		{"alpha on 300 degC, air, felt, 1.2 MPa, 420 rpm", low},
		{"ring of four, helium, 6 MPa, 1000 rpm", ring},
		{"alpha with Ross yoke, nitrogen, 3 MPa, 720 rpm", yoke},
	}
}

func costCorrections() Corrections {
	return Corrections{FlowFriction: 2.3, CycleWork: 0.83, Effectiveness: 0.9, SealFriction: 0.2e5}
}

// cellSteps are the cells of the gas path times all time steps of the last evaluation, what its time goes with.
func cellSteps(w *Workspace) int { return w.Path.N * w.Cycle.Steps }

// TestCostOfReferenceDesign fails when the work of an evaluation grows: counts depend on no machine. A lower count is
// good news: set the constant to it.
func TestCostOfReferenceDesign(t *testing.T) {
	const recorded = 6_272
	w := NewWorkspace()
	c := costCorrections()
	e := gammaSet()
	var p Performance
	Evaluate(&p, &e, &c, w)
	n := cellSteps(w)
	t.Logf("%d cells, %d cycles, %d of them on the fine grid, %d steps: %d cell steps", w.Path.N, w.Cycle.Cycles, w.Cycle.FineCycles, w.Cycle.Steps, n)
	if p.Cause != None || n > recorded*11/10 {
		t.Errorf("%d cell steps, %d recorded: 10 %% more are allowed (%v)", n, recorded, p.Cause)
	}
}

// TestCostPage holds the counts of PERFORMANCE.md up to date, or writes the page.
func TestCostPage(t *testing.T) {
	const file = "PERFORMANCE.md"
	if !*costPage {
		page, err := os.ReadFile(file)
		if err != nil {
			t.Fatal(err)
		}
		if !bytes.Contains(page, []byte("Model version "+Version+".")) {
			t.Errorf("%s is of another model version: go test ./model -run CostPage -cost-page", file)
		}
		return
	}
	var b strings.Builder
	fmt.Fprintf(&b, "# What an evaluation costs\n\nMade by `go test ./model -run CostPage -cost-page` on %s, %s, %s/%s, %s. Model version %s.\n"+
		"Counts are the same on every machine; times are of one core of this one and vary by some 10 %%.\n\n",
		time.Now().Format(time.DateOnly), processor(), runtime.GOOS, runtime.GOARCH, runtime.Version(), Version)
	counts(t, &b)
	random(t, &b)
	curves(t, &b)
	profile(t, &b)
	if err := os.WriteFile(file, []byte(b.String()), 0o644); err != nil {
		t.Fatal(err)
	}
}

func processor() string {
	data, err := os.ReadFile("/proc/cpuinfo")
	if err == nil {
		for line := range strings.Lines(string(data)) {
			if name, ok := strings.CutPrefix(line, "model name"); ok {
				return strings.TrimSpace(strings.TrimLeft(name, "\t :"))
			}
		}
	}
	return "processor not known"
}

// counts writes cells, cycles, steps and time of each machine on the production grid.
func counts(t *testing.T, b *strings.Builder) {
	g := ProductionGrid()
	fmt.Fprintf(b, "## Production grid: %d + %d + %d cells, %d steps a cycle, %d in the first cycles\n\n"+
		"Steps are doubled, up to %d times, where the error of the power that two grids show is above %g %%.\n\n"+
		"| machine | cells | cycles, coarse + fine | steps a cycle | step error, %% | steps | cell steps | ms | ns a cell step |\n"+
		"| --- | --- | --- | --- | --- | --- | --- | --- | --- |\n",
		g.Heater, g.Regenerator, g.Cooler, g.Steps, g.CoarseSteps, g.Doublings, 100*stepError)
	c := costCorrections()
	for _, m := range costMachines() {
		w := NewWorkspace()
		var p Performance
		const times = 200
		start := time.Now()
		for range times {
			Evaluate(&p, &m.engine, &c, w)
		}
		took := time.Since(start) / times
		if p.Cause != None {
			t.Errorf("%s: %v", m.name, p.Cause)
			continue
		}
		r := &w.Cycle
		fmt.Fprintf(b, "| %s | %d | %d + %d | %d | %.2f | %d | %d | %.2f | %.0f |\n", m.name, w.Path.N, r.Cycles-r.FineCycles, r.FineCycles, p.Steps, 100*p.StepError, r.Steps, cellSteps(w),
			took.Seconds()*1e3, float64(took.Nanoseconds())/float64(cellSteps(w)))
	}
}

// random writes cycles and steps over random machines of three classes, sensible ones and any.
func random(t *testing.T, b *strings.Builder) {
	const each = 100
	fmt.Fprintf(b, "\n## Random machines, %d of each class\n\n| machines | cycles: median, 90 %%, most | steps: mean, 90 %%, most | steps a cycle: %d, doubled once, twice | not settled |\n| --- | --- | --- | --- | --- |\n",
		each, ProductionGrid().Steps)
	w := NewWorkspace()
	none := NoCorrections()
	for _, only := range []bool{true, false} {
		for i, class := range classes() {
			rng := rand.New(rand.NewPCG(11, uint64(i)))
			var cycles, steps []int
			doubled := map[int]int{}
			sum, unsettled := 0, 0
			for len(steps) < each {
				e := drawEngine(rng, &class)
				var p Performance
				Evaluate(&p, &e, &none, w)
				switch {
				case p.Cause == NoConvergence || p.Cause == Diverged:
					unsettled++
				case only && !sensible(&class, &p):
					continue
				}
				cycles, steps = append(cycles, w.Cycle.Cycles), append(steps, w.Cycle.Steps)
				doubled[w.Path.Fine.Steps]++
				sum += w.Cycle.Steps
			}
			slices.Sort(cycles)
			slices.Sort(steps)
			what := "any " + class.name
			if only {
				what = "sensible " + class.name
			}
			n := ProductionGrid().Steps
			fmt.Fprintf(b, "| %s | %d, %d, %d | %d, %d, %d | %d, %d, %d | %d |\n", what, cycles[each/2], cycles[each*9/10], cycles[each-1],
				sum/each, steps[each*9/10], steps[each-1], doubled[n], doubled[2*n], doubled[4*n], unsettled)
		}
	}
}

// curves writes the error against the cost over steps and cells, held against eight times the cells and steps together.
func curves(t *testing.T, b *strings.Builder) {
	fmt.Fprintf(b, "\n## Error against cost\n\nAgainst 12 + 24 + 12 cells and 240 steps; each entry is the error in %% of power / of efficiency / in K of the\n"+
		"hottest gas in the expansion space over the cycle, and the cell steps in thousands.\n")
	c := costCorrections()
	type grid struct{ cells, steps int }
	rows := []grid{{1, 24}, {1, 36}, {1, 48}, {1, 72}, {1, 120}, {1, 240}, {0, 48}, {2, 48}, {3, 48}}
	cells := [][3]int{{4, 8, 4}, {6, 12, 6}, {9, 18, 9}, {12, 24, 12}}
	fmt.Fprintf(b, "\n| cells | steps |")
	for i := range costMachines() {
		fmt.Fprintf(b, " machine %d |", i+1)
	}
	fmt.Fprintf(b, "\n| --- | --- |%s\n", strings.Repeat(" --- |", len(costMachines())))
	type reference struct{ power, efficiency, peak float64 }
	var want []reference
	var p Performance
	for _, m := range costMachines() {
		w := NewWorkspaceGrid(Grid{Heater: 12, Regenerator: 24, Cooler: 12, Steps: 240, CoarseSteps: 24})
		Evaluate(&p, &m.engine, &c, w)
		if p.Cause != None {
			t.Fatalf("%s: %v", m.name, p.Cause)
		}
		want = append(want, reference{p.BrakePower, p.BrakeEfficiency, peakExpansion(w)})
	}
	for _, r := range rows {
		k := cells[r.cells]
		fmt.Fprintf(b, "| %d + %d + %d | %d |", k[0], k[1], k[2], r.steps)
		for i, m := range costMachines() {
			w := NewWorkspaceGrid(Grid{Heater: k[0], Regenerator: k[1], Cooler: k[2], Steps: r.steps, CoarseSteps: min(20, r.steps)})
			Evaluate(&p, &m.engine, &c, w)
			if p.Cause != None {
				fmt.Fprintf(b, " %v |", p.Cause)
				continue
			}
			fmt.Fprintf(b, " %+.2f / %+.2f / %+.1f, %.1f |", 100*(p.BrakePower/want[i].power-1), 100*(p.BrakeEfficiency/want[i].efficiency-1),
				peakExpansion(w)-want[i].peak, float64(cellSteps(w))/1e3)
		}
		fmt.Fprintln(b)
	}
}

// peakExpansion is the highest gas temperature in the expansion space over the cycle [K].
func peakExpansion(w *Workspace) float64 {
	peak := math.Inf(-1)
	for k := range w.loads.count {
		peak = max(peak, w.Trace().Temp[k][0])
	}
	return peak
}

// instructions counts those of an evaluation under callgrind; 0 where there is none.
func instructions(t *testing.T) float64 {
	if _, err := exec.LookPath("valgrind"); err != nil {
		return 0
	}
	count := func(times int) float64 {
		cmd := exec.Command("valgrind", "--tool=callgrind", "--callgrind-out-file="+filepath.Join(t.TempDir(), "callgrind"), os.Args[0],
			"-test.run", "^$", "-test.bench", "Evaluate$", "-test.benchtime", fmt.Sprintf("%dx", times))
		cmd.Env = append(os.Environ(), "GOMAXPROCS=1", "GODEBUG=asyncpreemptoff=1")
		out, err := cmd.CombinedOutput()
		if err != nil {
			t.Fatalf("%v: %s", err, out)
		}
		_, after, _ := strings.Cut(string(out), "Collected : ")
		var n float64
		if _, err := fmt.Sscan(after, &n); err != nil {
			t.Fatalf("%v: %s", err, out)
		}
		return n
	}
	return (count(60) - count(20)) / 40
}

// profile writes where the time of the reference design goes, by the sampling profiler.
func profile(t *testing.T, b *strings.Builder) {
	file := filepath.Join(t.TempDir(), "cpu.prof")
	f, err := os.Create(file)
	if err != nil {
		t.Fatal(err)
	}
	if err := pprof.StartCPUProfile(f); err != nil {
		t.Fatal(err)
	}
	w := NewWorkspace()
	c := costCorrections()
	e := gammaSet()
	var p Performance
	for start := time.Now(); time.Since(start) < 4*time.Second; {
		Evaluate(&p, &e, &c, w)
	}
	pprof.StopCPUProfile()
	if err := f.Close(); err != nil {
		t.Fatal(err)
	}
	out, err := exec.Command("go", "tool", "pprof", "-top", "-nodecount", "16", file).Output()
	if err != nil {
		t.Fatal(err)
	}
	text := string(out)
	if n := instructions(t); n > 0 {
		fmt.Fprintf(b, "\nAn evaluation of the reference design takes %.2f million instructions (callgrind, difference of 60 and 20 evaluations).\n", n/1e6)
	}
	if i := strings.Index(text, "      flat"); i >= 0 {
		text = text[i:]
	}
	fmt.Fprintf(b, "\n## Where the time goes, reference design\n\n```text\n%s```\n", text)
}
