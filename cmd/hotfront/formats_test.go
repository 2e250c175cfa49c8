package main

import (
	"bytes"
	"encoding/csv"
	"encoding/json"
	"math"
	"path/filepath"
	"slices"
	"strconv"
	"strings"
	"testing"
	"unicode"
)

const sawmill = "../../studies/examples/sawmill-heat-and-power.yaml"

// must runs a command that has to succeed and gives its output.
func must(t *testing.T, args ...string) string {
	t.Helper()
	var out, errw bytes.Buffer
	if code := execute(args, strings.NewReader(""), &out, &errw); code != exitDone {
		t.Fatalf("%v: exit code %d: %s", args, code, errw.String())
	}
	return out.String()
}

func table(t *testing.T, text string) (head []string, rows [][]string) {
	t.Helper()
	all, err := csv.NewReader(strings.NewReader(text)).ReadAll()
	if err != nil || len(all) < 2 {
		t.Fatalf("not a table: %v\n%s", err, text)
	}
	return all[0], all[1:]
}

// neededResults are the results that scripts may count on, of evaluate and of front.
func neededResults() []string {
	return []string{"brake_power", "indicated_power", "pv_power", "flow_loss", "heat_in", "coolant_heat", "brake_efficiency",
		"indicated_efficiency", "pressure_max", "pressure_min", "torque", "expansion_temperature", "compression_temperature",
		"energy_residual"}
}

type limitRow struct {
	Name                 string
	Value, Bound, Margin *float64
	Met                  *bool
}

func checkLimits(t *testing.T, what string, limits []limitRow, met bool) {
	t.Helper()
	if len(limits) != 7 {
		t.Errorf("%s: %d limits, the study has 7", what, len(limits))
	}
	for _, l := range limits {
		if l.Name == "" || l.Value == nil || l.Bound == nil || l.Margin == nil || l.Met == nil {
			t.Errorf("%s: limit without a part: %+v", what, l)
			continue
		}
		if math.Abs(math.Abs(*l.Value-*l.Bound)-math.Abs(*l.Margin)) > 1e-9*math.Abs(*l.Bound) || *l.Met != (*l.Margin >= 0) {
			t.Errorf("%s: %s: value %g, bound %g, margin %g, met %v do not agree", what, l.Name, *l.Value, *l.Bound, *l.Margin, *l.Met)
		}
		if met && !*l.Met {
			t.Errorf("%s: %s is not met on a front", what, l.Name)
		}
	}
}

// TestEvaluateFormats: JSON has the names that scripts count on, in SI; CSV gives the same numbers in the
// units that stand beside them; the heat is all accounted for.
func TestEvaluateFormats(t *testing.T) {
	var e struct {
		Design              map[string]any
		Performance, Losses map[string]float64
		Limits              []limitRow
		Corrections         map[string]any
		Warnings            []string
	}
	if err := json.Unmarshal([]byte(must(t, "evaluate", sawmill, "--format", "json")), &e); err != nil {
		t.Fatal(err)
	}
	for _, name := range neededResults() {
		if _, ok := e.Performance[name]; !ok {
			t.Errorf("performance has no %s", name)
		}
	}
	if e.Warnings == nil || len(e.Losses) < 5 || len(e.Corrections) < 2 {
		t.Errorf("warnings %v, losses %v, corrections %v", e.Warnings, e.Losses, e.Corrections)
	}
	checkLimits(t, "start design", e.Limits, false)
	// Inputs as the study file has them, in SI.
	for name, want := range map[string]any{"charge_pressure": 60e5, "heater.tube_count": 40.0, "heater.tube_bore": 0.004, "gas": "helium",
		"compression_duct.area": 700e-6, "heater.design_life": 40000 * 3600.0} {
		got, ok := e.Design[name].(float64)
		if w, isNumber := want.(float64); isNumber && (!ok || math.Abs(got/w-1) > 1e-12) || !isNumber && e.Design[name] != want {
			t.Errorf("design: %s is %v, want %v", name, e.Design[name], want)
		}
	}
	p := e.Performance
	if eta := p["brake_power"] / p["heat_in"]; math.Abs(eta/p["brake_efficiency"]-1) > 1e-12 {
		t.Errorf("brake power over heat in is %g, brake efficiency %g", eta, p["brake_efficiency"])
	}
	if rest := (p["heat_in"] - p["coolant_heat"] - p["brake_power"] - e.Losses["drive"] - e.Losses["seal_friction"]) / p["heat_in"]; math.Abs(rest) > 2e-3 {
		t.Errorf("%.2g of the heat is unaccounted for", rest)
	}
	// The units of CSV against SI, by their definition.
	factor := map[string]float64{"": 1, "kW": 1e3, "W": 1, "%": 0.01, "bar": 1e5, "mm": 1e-3, "cm3": 1e-6, "MPa": 1e6, "W/cm2": 1e4, "g": 1e-3,
		"kg": 1, "rpm": 1.0 / 60, "J": 1, "N m": 1, "m/s": 1, "K": 1, "kg/s": 1, "h": 3600, "deg": math.Pi / 180, "l": 1e-3, "mm2": 1e-6, "m": 1,
		"W/(m2 K)": 1, "kN": 1e3, "kg m2": 1, "kg m": 1}
	_, rows := table(t, must(t, "evaluate", sawmill, "--format", "csv"))
	checked := 0
	for _, r := range rows {
		part, name, text, unit := r[0], r[1], r[2], r[3]
		var want float64
		switch part {
		case "performance":
			want = p[name]
		case "losses":
			want = e.Losses[name]
		case "design":
			v, ok := e.Design[name].(float64)
			if !ok {
				if v, isText := e.Design[name].(string); !isText || v != text {
					t.Errorf("%s is %q in CSV, %v in JSON", name, text, e.Design[name])
				}
				continue
			}
			want = v
		default:
			continue
		}
		got, err := strconv.ParseFloat(text, 64)
		if err != nil {
			t.Errorf("%s %s: %v", part, name, err)
			continue
		}
		f, known := factor[unit]
		if unit == "degC" {
			got, f, known = got+273.15, 1, true
		}
		if !known {
			t.Errorf("%s %s: this test does not know the unit %q", part, name, unit)
		} else if math.Abs(got*f-want) > 5e-3*math.Abs(want) { // three digits
			t.Errorf("%s %s: %s %s in CSV, %g in JSON", part, name, text, unit, want)
		}
		checked++
	}
	if checked < 100 {
		t.Errorf("only %d numbers compared", checked)
	}
}

// TestFrontFormats: the front in JSON, CSV and as a table is one front, without a dominated design.
func TestFrontFormats(t *testing.T) {
	dir := filepath.Join(t.TempDir(), "run")
	must(t, "search", sawmill, "--run", dir, "--evaluations", "200")
	var f struct {
		Study       *string
		Seed        *uint64
		Evaluations int
		Hypervolume float64
		Aims        []string
		Designs     []struct {
			ID          string
			Design      map[string]any
			Performance map[string]float64
			Limits      []limitRow
		}
	}
	if err := json.Unmarshal([]byte(must(t, "front", dir, "--format", "json")), &f); err != nil {
		t.Fatal(err)
	}
	if f.Study == nil || f.Seed == nil || f.Evaluations != 200 || f.Hypervolume <= 0 || len(f.Designs) < 3 {
		t.Fatalf("front %+v", f)
	}
	if want := []string{"most brake_power", "most brake_efficiency"}; !slices.Equal(f.Aims, want) {
		t.Errorf("aims %q, want %q", f.Aims, want)
	}
	head, rows := table(t, must(t, "front", dir, "--format", "csv"))
	if len(rows) != len(f.Designs) {
		t.Fatalf("%d designs in CSV, %d in JSON", len(rows), len(f.Designs))
	}
	column := func(name string) int {
		i := slices.Index(head, name)
		if i < 0 {
			t.Fatalf("no column %q in %q", name, head)
		}
		return i
	}
	power, efficiency, pressure, count := column("brake_power [kW]"), column("brake_efficiency [%]"), column("charge_pressure [bar]"), column("heater.tube_count")
	area := 0.0
	for i, d := range f.Designs {
		checkLimits(t, d.ID, d.Limits, true)
		for _, name := range neededResults() {
			if _, ok := d.Performance[name]; !ok {
				t.Errorf("%s has no %s", d.ID, name)
			}
		}
		if i > 0 {
			before := f.Designs[i-1].Performance
			if !(d.Performance["brake_power"] < before["brake_power"] && d.Performance["brake_efficiency"] > before["brake_efficiency"]) {
				t.Errorf("%s does not follow on %s along the front", d.ID, f.Designs[i-1].ID)
			}
			area += d.Performance["brake_power"] * (d.Performance["brake_efficiency"] - before["brake_efficiency"])
		} else {
			area = d.Performance["brake_power"] * d.Performance["brake_efficiency"]
		}
		for _, c := range []struct {
			column int
			want   float64
		}{
			{power, d.Performance["brake_power"] / 1e3}, {efficiency, 100 * d.Performance["brake_efficiency"]},
			{pressure, d.Design["charge_pressure"].(float64) / 1e5}, {count, d.Design["heater.tube_count"].(float64)},
		} {
			if got, err := strconv.ParseFloat(rows[i][c.column], 64); err != nil || math.Abs(got/c.want-1) > 1e-5 {
				t.Errorf("%s: %s is %s in CSV, %g in JSON", d.ID, head[c.column], rows[i][c.column], c.want)
			}
		}
		if rows[i][0] != d.ID {
			t.Errorf("row %d is %s in CSV, %s in JSON", i, rows[i][0], d.ID)
		}
	}
	// The hypervolume of two aims is the area under the stairs; the reference point of these aims is 0, 0.
	if math.Abs(f.Hypervolume/area-1) > 1e-9 {
		t.Errorf("hypervolume %g, the stairs cover %g", f.Hypervolume, area)
	}
	// Each part of the table shows the same designs, in the order of the front.
	var order, shown []string
	for _, d := range f.Designs {
		order = append(order, d.ID)
	}
	for line := range strings.Lines(must(t, "front", dir, "--top", "3")) {
		if id, _, _ := strings.Cut(line, " "); slices.Contains(order, id) {
			shown = append(shown, id)
		}
	}
	if len(shown) < 6 || len(shown)%3 != 0 {
		t.Fatalf("the table of three designs shows %q", shown)
	}
	for i, id := range shown {
		if id != shown[i%3] || i%3 > 0 && slices.Index(order, id) <= slices.Index(order, shown[i-1]) {
			t.Errorf("the table shows %q of the front %q", shown, order)
			break
		}
	}
	// Every free variable and result with a unit says it in the head.
	for _, name := range head {
		if strings.Contains(name, "[") != strings.HasSuffix(name, "]") {
			t.Errorf("head %q", name)
		}
	}
}

// TestPlainOutput: what is not written to a terminal has no escape codes and no box characters, whatever
// the environment says.
func TestPlainOutput(t *testing.T) {
	for _, name := range []string{"CLICOLOR_FORCE", "FORCE_COLOR"} {
		t.Setenv(name, "1")
	}
	t.Setenv("TERM", "xterm-256color")
	dir := filepath.Join(t.TempDir(), "run")
	for _, args := range [][]string{
		{"search", sawmill, "--run", dir, "--evaluations", "60"}, {"front", dir}, {"front", dir, "--format", "csv"},
		{"front", dir, "--format", "json"}, {"check", sawmill}, {"evaluate", sawmill}, {"evaluate", sawmill, "--set", "x=1"}, {"fields"},
		{"version"}, {"survey", sawmill, "--designs", "20"}, {"serch"}, {"--help"}, {"search", "--help"}, {"new", "--list"},
	} {
		var out, errw bytes.Buffer
		execute(args, nil, &out, &errw)
		for _, text := range []string{out.String(), errw.String()} {
			if i := strings.IndexFunc(text, func(r rune) bool {
				return r != '\n' && unicode.IsControl(r) || r >= 0x2500 && r < 0x25a0
			}); i >= 0 {
				t.Errorf("%v: a control or box character at %q", args, text[i:min(i+20, len(text))])
			}
			for line := range strings.Lines(text) {
				if strings.TrimRight(line, " \n")+"\n" != line && line != "\n" && args[0] != "--help" && args[len(args)-1] != "--help" {
					t.Errorf("%v: blanks at the end of %q", args, line)
				}
			}
		}
	}
}
