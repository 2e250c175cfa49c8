package studies

import (
	"bytes"
	"math"
	"strings"
	"testing"

	"hotfront/model"
	"hotfront/model/drive"
	"hotfront/model/gas"
	"hotfront/model/metal"
	"hotfront/optimize"
)

// edit replaces text of the shipped study; the text must be there.
func edit(t testing.TB, pairs ...string) []byte {
	t.Helper()
	data := string(refuge(t))
	for i := 0; i < len(pairs); i += 2 {
		if !strings.Contains(data, pairs[i]) {
			t.Fatalf("%q is not in the study", pairs[i])
		}
		data = strings.Replace(data, pairs[i], pairs[i+1], 1)
	}
	return []byte(data)
}

func TestLoadGivesSI(t *testing.T) {
	s := mustLoad(t, refuge(t))
	e := &s.Engine
	checks := []struct {
		name      string
		got, want float64
	}{
		{"charge pressure", e.ChargePressure, 60e5},
		{"speed", e.Speed, 1000.0 / 60},
		{"phase", e.Drive.PhaseAngle, math.Pi / 2},
		{"clearance", e.ExpansionClearance, 12e-6},
		{"tube bore", e.Heater.TubeBore, 4e-3},
		{"tube count", float64(e.Heater.TubeCount), 36},
		{"heat", e.Heat.Temperature, 973.15},
		{"design life", e.Heater.DesignLife, 40000 * 3600},
		{"seal gap by default", e.Piston.SealGap, 1e-5},
		{"cooled length follows", e.Cooler.CooledLength, e.Cooler.TubeLength},
	}
	for _, c := range checks {
		if math.Abs(c.got-c.want) > 1e-15*c.want {
			t.Errorf("%s: got %v, want %v", c.name, c.got, c.want)
		}
	}
	if e.Layout != model.Gamma || e.Gas != gas.Helium || e.Drive.Kind != drive.SliderCrank || e.Heat.Kind != model.HeatTubeWall {
		t.Error("a choice is wrong")
	}
	if e.Heater.Alloy != metal.N08810 || e.Cylinder.Alloy != metal.N08810 || e.Cooler.Alloy != metal.S31600 {
		t.Error("an alloy is wrong")
	}
	if s.Corrections != model.NoCorrections() || s.CorrectionsName() != "none" || s.Seed != 1 || s.Evaluations != 5000 {
		t.Error("corrections, seed or budget are wrong")
	}
	if l := s.Limits[3]; l.Name != "tubing" || l.Bound != 20 || !l.AtMost || l.Unit != "m" {
		t.Errorf("formula limit: %+v", l)
	}
}

// TestFollowersFollowInTheSearch: what depends on a free variable moves with it.
func TestFollowersFollowInTheSearch(t *testing.T) {
	data := edit(t,
		"layout: gamma", "layout: beta",
		"piston: {bore: 80 mm,", "piston: {",
		"heater.tube_count: {from: 20, to: 80}", "displacer.bore: {from: 60 mm, to: 120 mm}",
		"gas: {of: [helium, hydrogen]}", "heater.alloy: {of: [N06230, N08810]}",
		"heater.tube_bore: {of: [3 mm, 4 mm, 5 mm, 6 mm]}", "heater.tube_bore: {of: [3 mm, 4 mm, 6 mm]}")
	s := mustLoad(t, data)
	x, ok := s.StartX()
	if !ok {
		t.Fatal("no start")
	}
	set := func(path string, v float64) {
		for i := range s.Free {
			if s.Free[i].Path == path {
				x[i] = v
				return
			}
		}
		t.Fatalf("%s is not free", path)
	}
	set("displacer.bore", 0.1)
	set("heater.tube_length", 0.2)
	set("heater.alloy", 0)
	set("heater.tube_bore", 2)
	e := s.EngineAt(x)
	if e.Piston.Bore != 0.1 {
		t.Errorf("piston bore %v", e.Piston.Bore)
	}
	if math.Abs(e.Heater.HeatedLength-0.15) > 1e-15 {
		t.Errorf("heated length %v", e.Heater.HeatedLength)
	}
	if e.Heater.Alloy != metal.N06230 || e.Cylinder.Alloy != metal.N06230 || e.Regenerator.CanisterAlloy != metal.N06230 {
		t.Error("alloys do not follow")
	}
	if e.Heater.TubeBore != 6e-3 {
		t.Errorf("tube bore %v", e.Heater.TubeBore)
	}
	if again := s.EngineAt(x); again != e {
		t.Error("the same X gives another engine")
	}
	if start, _ := s.StartX(); s.EngineAt(start) != s.Engine {
		t.Error("the start X does not give the start design")
	}
}

func TestPlacesInFormulas(t *testing.T) {
	data := edit(t, "heater.tube_count * heater.tube_length", "heater.tube_count * heater.tube_lenght")
	_, issues := Load("a.yaml", data)
	if len(issues) != 1 {
		t.Fatal(issues)
	}
	line := bytes.Split(data, []byte("\n"))[issues[0].Line-1]
	if !bytes.HasPrefix(line[issues[0].Column-1:], []byte("heater.tube_lenght")) {
		t.Errorf("column %d of %q", issues[0].Column, line)
	}
}

func TestMoreMistakes(t *testing.T) {
	heated := func(source string) []byte { return edit(t, "heat: {tube_wall: 700 degC}", "heat: "+source) }
	ringed := func(source string) []byte {
		return edit(t, "heat: {tube_wall: 700 degC}", "heat: "+source, "tube_count: 36", "tube_count: 36\n    ring_diameter: 150 mm")
	}
	cases := []struct {
		name  string
		data  []byte
		codes []Code
	}{
		{"alpha with displacer", edit(t, "layout: gamma", "layout: alpha"), nil},
		{"rhombic alpha", edit(t, "layout: gamma", "layout: alpha", "slider-crank", "rhombic"), []Code{Contradiction}},
		{"Ross yoke in one cylinder", edit(t, "layout: gamma", "layout: beta", "slider-crank", "ross-yoke"), []Code{Contradiction}},
		{"Ross yoke with strokes", edit(t, "slider-crank", "ross-yoke"), []Code{DoesNotApply, KeyMissing}},
		{"ring with a rhombic drive", edit(t, "layout: gamma", "layout: double-acting", "slider-crank", "rhombic"), []Code{Contradiction}},
		{"two heats", edit(t, "heat: {tube_wall: 700 degC}", "heat: {tube_wall: 700 degC, tube_gas: 600 degC}"), []Code{Contradiction}},
		{"no heat", edit(t, "heat: {tube_wall: 700 degC}", ""), []Code{KeyMissing}},
		{"bare burner", heated("{burner: {fuel: wood}}"), []Code{KeyMissing, KeyMissing, ChoiceUnknown}},
		{"burner without fuel", heated("{burner: {tube_wall: 700 degC}}"), []Code{KeyMissing, KeyMissing}},
		{"burner beside a wall", heated("{tube_wall: 700 degC, burner: {fuel: propane}}"), []Code{Contradiction}},
		{"burner beside a receiver", heated("{burner: {fuel: propane}, receiver: {power: 20 kW}}"), []Code{Contradiction}},
		{"fuel and wall", ringed("{burner: {fuel: propane, fuel_power: 20 kW, tube_wall: 700 degC}}"), []Code{Contradiction}},
		{"two preheaters", ringed("{burner: {fuel: propane, fuel_power: 20 kW, preheater_effectiveness: 0.8, preheater_conductance: 10 W/K}}"), []Code{Contradiction}},
		{"elements of propane", ringed("{burner: {fuel: propane, fuel_power: 20 kW, elements: {carbon: 1}}}"), []Code{DoesNotApply}},
		{"given fuel without composition", ringed("{burner: {fuel: given, fuel_power: 20 kW}}"), []Code{KeyMissing}},
		{"given fuel twice", ringed("{burner: {fuel: given, fuel_power: 20 kW, elements: {carbon: 1}, gases: {methane: 1}}}"), []Code{Contradiction}},
		{"shares of 90 %", ringed("{burner: {fuel: given, fuel_power: 20 kW, gases: {methane: 60 %, hydrogen: 30 %}}}"), []Code{Contradiction}},
		{"fuel that does not burn", ringed("{burner: {fuel: given, fuel_power: 20 kW, gases: {nitrogen: 100 %}}}"), []Code{Contradiction}},
		{"fins without size", ringed("{burner: {fuel: propane, fuel_power: 20 kW, fins: {kind: annular}}}"), []Code{KeyMissing, KeyMissing, KeyMissing}},
		{"count of annular fins", ringed("{burner: {fuel: propane, fuel_power: 20 kW, fins: {kind: annular, height: 4 mm, thickness: 1 mm, pitch: 4 mm, count: 4}}}"), []Code{DoesNotApply}},
		{"receiver without size", heated("{receiver: {power: 20 kW}}"), []Code{KeyMissing, KeyMissing, KeyMissing}},
		{"receiver all aperture", heated("{receiver: {power: 20 kW, aperture_diameter: 200 mm, wall_area: 100 cm2, casing_conductance: 0 W/K}}"), []Code{Contradiction}},
		{"fuel efficiency without fuel", edit(t, "brake_power: {min: 2 kW}", "fuel_efficiency: {min: 20 %}"), []Code{DoesNotApply}},
		{"aim at fuel efficiency without fuel", edit(t, "brake_efficiency: most", "fuel_efficiency: most"), []Code{DoesNotApply}},
		{"formula of fuel without fuel", edit(t, "heater.tube_count * heater.tube_length", "heater.tube_count * heater.tube_length * fuel_efficiency"), []Code{ExprUnknown}},
		{"unheated above length", edit(t, "unheated_length: 50 mm", "unheated_length: 400 mm"), []Code{Contradiction, Unusual}},
		{"both written ways", edit(t, "  gas: helium\n", "  gas: helium\n  heater.tube_bore: 4 mm\n"), []Code{KeyTwice}},
		{"piston bore of a beta", edit(t, "layout: gamma", "layout: beta"), []Code{Contradiction}},
		{"beta frees piston bore", edit(t, "layout: gamma", "layout: beta", "piston: {bore: 80 mm,", "piston: {",
			"heater.tube_count: {from", "piston.bore: {from: 50 mm, to: 100 mm}\n  heater.tube_count: {from"), []Code{FreeNotPossible}},
		{"correction out of range", edit(t, "corrections: none", "corrections: {cycle_work: 1.2}"), []Code{OutOfRange}},
		{"correction unknown", edit(t, "corrections: none", "corrections: {cycle_wrok: 0.9}"), []Code{KeyUnknown}},
		{"free a result", edit(t, "free: ", "free:\n  mach: {from: 0, to: 1} #"), []Code{FreeNotPossible}},
		{"free heated beside unheated", edit(t, "free: ", "free:\n  heater.heated_length: {from: 100 mm, to: 140 mm} #"), []Code{Contradiction}},
		{"free without to", edit(t, "{from: 20, to: 80}", "{from: 20}"), []Code{FreeShape}},
		{"free count with a fraction", edit(t, "{from: 20, to: 80}", "{from: 20.5, to: 80}"), []Code{WholeExpected}},
		{"empty list", edit(t, "{of: [helium, hydrogen]}", "{of: []}"), []Code{FreeList}},
		{"gas twice", edit(t, "{of: [helium, hydrogen]}", "{of: [helium, helium]}"), []Code{FreeList}},
		{"start not in list", edit(t, "{of: [helium, hydrogen]}", "{of: [nitrogen, hydrogen]}"), []Code{StartOutside}},
		{"no aims", edit(t, "aims: {brake_power: most, brake_efficiency: most}", "aims: {}"), []Code{AimsCount}},
		{"aims left out", edit(t, "aims: {brake_power: most, brake_efficiency: most}", ""), []Code{AimsCount}},
		{"aim at an input", edit(t, "brake_power: most", "speed: most"), []Code{AimUnknown}},
		{"limit of a choice", edit(t, "brake_power: {min: 2 kW}", "gas: {max: 1}"), []Code{LimitUnknown}},
		{"formula named as a result", edit(t, "tubing:", "mach:"), []Code{Contradiction}},
		{"bound of another quantity", edit(t, "max: 20 m}", "max: 20 bar}"), []Code{ExprDimension}},
		{"bound in degC of a difference", edit(t, "heater.tube_count * heater.tube_length\", max: 20 m", "heat_in / heat_in * (heater.metal_temperature - heater.gas_temperature)\", max: 20 degC"), []Code{ExprDimension}},
		{"null value", edit(t, "gas: helium", "gas:"), []Code{ShapeWrong}},
		{"free by blocks", edit(t, "free: ", "free:\n  heater: {tube_wall: {from: 1 mm, to: 2 mm}} #"), []Code{KeyUnknown}},
		{"limit as a value", edit(t, "brake_power: {min: 2 kW}", "brake_power: 2 kW"), []Code{ShapeWrong}},
		{"unit on a count", edit(t, "tube_count: 36", "tube_count: 36 mm"), []Code{UnitWrong}},
		{"merge key", edit(t, "  gas: helium", "  <<: {gas: helium}"), []Code{YAMLFeature}},
		{"alias", edit(t, "gas: helium", "gas: *x"), []Code{YAMLFeature}},
		{"tag", edit(t, "gas: helium", "gas: !!str helium"), []Code{YAMLFeature}},
		{"tab", edit(t, "  gas: helium", "\tgas: helium"), []Code{FileNotYAML}},
		{"comparison", edit(t, "{min: 2 kW}", ">= 2 kW"), []Code{FileNotYAML}},
		{"UTF-16", []byte("\xff\xfes\x00"), []Code{FileNotText}},
		{"comments only", []byte("# nothing\n"), []Code{FileEmpty}},
		{"a list", []byte("- a\n- b\n"), []Code{ShapeWrong}},
		{"nothing but a name", []byte("study: a\n"), []Code{KeyMissing}},
		{"budget in words", edit(t, "evaluations: 5000", "evaluations: many"), []Code{BudgetInvalid}},
		{"budget in hours", edit(t, "evaluations: 5000", "hours: 5"), []Code{KeyUnknown}},
	}
	for _, c := range cases {
		s, issues := Load(c.name, c.data)
		if s != nil {
			t.Errorf("%s: accepted", c.name)
		}
		if c.codes == nil {
			continue
		}
		var found []string
		for _, i := range issues {
			found = append(found, string(i.Code))
		}
		var want []string
		for _, code := range c.codes {
			want = append(want, string(code))
		}
		if !sameSet(found, want) {
			t.Errorf("%s: found %v, want %v\n%v", c.name, found, want, issues)
		}
	}
}

func sameSet(a, b []string) bool {
	for _, pair := range [][2][]string{{a, b}, {b, a}} {
		for _, w := range pair[0] {
			if !contains(pair[1], w) {
				return false
			}
		}
	}
	return true
}

func TestSet(t *testing.T) {
	data := refuge(t)
	s := mustLoad(t, data, "heater.tube_count=40", "heat.tube_gas = 650 degC", "corrections.cycle_work=0.9", "speed=1200 rpm", "speed=1500 rpm")
	if s.Engine.Heater.TubeCount != 40 || s.Engine.Heat.Kind != model.HeatTubeGas || s.Engine.Speed != 25 || s.Corrections.CycleWork != 0.9 {
		t.Errorf("not set: %+v", s.Engine)
	}
	if s := mustLoad(t, data, "heater.heated_length=200 mm"); s.Engine.Heater.HeatedLength != 0.2 {
		t.Errorf("heated length %v", s.Engine.Heater.HeatedLength)
	}
	if s := mustLoad(t, data, "corrections.cycle_work=0.9", "corrections=none"); s.CorrectionsName() != "none" {
		t.Error("corrections=none does not take the factors away")
	}
	for _, c := range []struct {
		set  string
		code Code
	}{
		{"heater.tube_count", SetInvalid}, {"=4", SetInvalid}, {"", SetInvalid}, {"heater.tube_count=", SetInvalid},
		{"heater.tube_cuont=4", SetInvalid}, {"heater.tube_count=4.5", WholeExpected}, {"speed=3 mm", UnitWrong},
		{"gas=steam", ChoiceUnknown}, {"regenerator.porosity=1.2", OutOfRange}, {"expansion_piston.bore=40 mm", DoesNotApply},
		{"corrections=rigg", Corrections}, {"corrections.cycle_work=2", OutOfRange},
	} {
		s, issues := Load("a.yaml", data, c.set)
		if s != nil || issues.Mistakes()[0].Code != c.code || !strings.HasPrefix(issues.Mistakes()[0].File, "--set") {
			t.Errorf("%q: %v", c.set, issues)
		}
	}
	s, issues := Load("a.yaml", data, "heater.tube_count=100")
	if s == nil || len(issues) != 1 || issues[0].Code != OutsideSearch {
		t.Fatalf("outside the search: %v", issues)
	}
	if _, err := NewProblem(s); err == nil {
		t.Error("a search begins outside its box")
	}
}

func TestEncodeRoundTrip(t *testing.T) {
	for _, data := range [][]byte{
		refuge(t),
		edit(t, "study: refuge-heat-and-power", "study: \"no: 1 #x \\u00e9\"", "corrections: none", "corrections: {flow_friction: 2.9, seal_friction: 0.21 bar}",
			"brake_power: {min: 2 kW}", "brake_power: {min: 2 kW, max: 7.7 kW}\n  \"a b: c\": {expr: \"1 + mach\", min: 0.1}"),
		edit(t, "layout: gamma", "layout: beta", "kind: slider-crank, phase_angle: 90 deg, rod_length: 150 mm", "kind: rhombic, rod_length: 75 mm, crank_radius: 15 mm, eccentricity: 25 mm",
			"bore: 90 mm, stroke: 50 mm,", "bore: 90 mm,", "piston: {bore: 80 mm, stroke: 50 mm}", "piston.seal_gap: 0.02 mm", "drive.phase_angle:", "drive.rod_length: {from: 60 mm, to: 90 mm} #"),
	} {
		s := mustLoad(t, data)
		text := s.Encode()
		again := mustLoad(t, text)
		if again.Engine != s.Engine || again.Corrections != s.Corrections || again.Name != s.Name || again.About != s.About {
			t.Errorf("engine, corrections or names differ after\n%s", text)
		}
		if again.Fingerprint("1") != s.Fingerprint("1") || !bytes.Equal(again.Encode(), text) {
			t.Errorf("not the same study after\n%s", text)
		}
	}
}

func TestFingerprint(t *testing.T) {
	base := mustLoad(t, refuge(t)).Fingerprint("1")
	same := [][]byte{
		edit(t, "60 bar", "6 MPa"),
		edit(t, "study: refuge", "study: other"),
		edit(t, "evaluations: 5000", "evaluations: 9000"),
		edit(t, "porosity: 0.7}", "porosity: 0.7, kind: woven-screen}", "{kind: woven-screen, ", "{"),
	}
	for i, data := range same {
		if mustLoad(t, data).Fingerprint("1") != base {
			t.Errorf("same meaning %d: another fingerprint", i)
		}
	}
	other := [][]byte{
		edit(t, "60 bar", "61 bar"),
		edit(t, "seed: 1", "seed: 2"),
		edit(t, "[helium, hydrogen]", "[hydrogen, helium]"),
		edit(t, "max: 20 m}", "max: 21 m}"),
		edit(t, "brake_power: most, brake_efficiency: most", "brake_efficiency: most, brake_power: most"),
		edit(t, "corrections: none", "corrections: {cycle_work: 0.95}"),
		edit(t, "to: 80", "to: 81"),
	}
	seen := map[string]bool{base: true, mustLoad(t, refuge(t)).Fingerprint("2"): true}
	for i, data := range other {
		seen[mustLoad(t, data).Fingerprint("1")] = true
		if len(seen) != i+3 {
			t.Errorf("other meaning %d: the same fingerprint", i)
		}
	}
}

func TestDesignKinds(t *testing.T) {
	s := mustLoad(t, refuge(t))
	want := []optimize.Kind{optimize.Integer, optimize.Real, optimize.Ordered, optimize.Real, optimize.Real, optimize.Real, optimize.Choice}
	for i, f := range s.Free {
		if f.Kind != want[i] {
			t.Errorf("%s: kind %d, want %d", f.Path, f.Kind, want[i])
		}
	}
	n := 0
	for _, v := range s.Design(&s.Engine) {
		if v.Free {
			n++
		}
		if !v.Field.Applies(&s.Engine) {
			t.Errorf("%s does not apply", v.Field.Path)
		}
	}
	if n != len(s.Free) {
		t.Errorf("%d free inputs in the design, %d in the study", n, len(s.Free))
	}
}

// FuzzLoad: no input makes Load panic, and a study that is accepted survives writing and reading.
func FuzzLoad(f *testing.F) {
	f.Add(refuge(f))
	for _, code := range Codes() {
		if data, err := readBad(code); err == nil {
			f.Add(data)
		}
	}
	f.Add(edit(f, "layout: gamma", "layout: beta", "piston: {bore: 80 mm,", "piston: {"))
	f.Add([]byte("study: [a\n- b: {c: ? }"))
	f.Fuzz(func(t *testing.T, data []byte) {
		s, issues := Load("fuzz.yaml", data)
		if s == nil {
			if len(issues.Mistakes()) == 0 {
				t.Fatal("neither a study nor a mistake")
			}
			return
		}
		text := s.Encode()
		again, issues := Load("again.yaml", text)
		if again == nil {
			t.Fatalf("written study is not valid:\n%v\n%s", issues, text)
		}
		if s.Fingerprint("") != again.Fingerprint("") {
			t.Fatalf("written study is another one:\n%s\n%s", text, again.Encode())
		}
	})
}
