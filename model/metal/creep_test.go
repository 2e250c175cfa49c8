package metal

import (
	"encoding/csv"
	"math"
	"os"
	"path/filepath"
	"strconv"
	"strings"
	"testing"
)

type ruptureRow struct {
	alloy  string
	T      float64 // [K]
	life   float64 // [s]
	stress float64 // [Pa]
	source string
}

// ruptureRows returns the rows of testdata/reference/alloy_creep_rupture.csv that give rupture.
func ruptureRows(t *testing.T) []ruptureRow {
	t.Helper()
	f, err := os.Open(filepath.Join("..", "..", "testdata", "reference", "alloy_creep_rupture.csv"))
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	all, err := csv.NewReader(f).ReadAll()
	if err != nil {
		t.Fatal(err)
	}
	var rows []ruptureRow
	for _, r := range all[1:] {
		if !strings.HasPrefix(r[2], "rupture") {
			continue
		}
		var v [3]float64
		for i, text := range []string{r[1], r[3], r[4]} {
			if v[i], err = strconv.ParseFloat(text, 64); err != nil {
				t.Fatal(err)
			}
		}
		rows = append(rows, ruptureRow{r[0], v[0] + 273.15, v[1] * 3600, v[2] * 1e6, r[6]})
	}
	return rows
}

// leftOut gives the reason why a rupture row takes no part, or "" when it does.
func leftOut(r ruptureRow) string {
	switch {
	case r.alloy == "S34700" || r.alloy == "S30908":
		return "two rows alone: a fit through them cannot be checked, so the alloy is not offered"
	case r.alloy == "S31000" && r.stress == 99.28e6:
		return "99.3 MPa for 100 000 h at 649 degC stands against 124.1 MPa for only 1 000 h at 650 degC from " +
			"[ASM1990] for S31008; no such steel loses only a fifth over two decades of time; the lower source is kept"
	}
	return ""
}

// fitOf returns the alloy whose fit a row belongs to. S31008 is S31000 with less carbon; the table's
// supplier gives one set of values for both.
func fitOf(r ruptureRow) (Alloy, bool) {
	name := r.alloy
	if name == "S31008" {
		name = "S31000"
	}
	for _, a := range Alloys() {
		if a.String() == name {
			return a, true
		}
	}
	return 0, false
}

// TestRuptureRows holds every rupture row in use to 10 % on stress, the target. Sources: the rows'
// own (manufacturer data, [ASM1990] as quoted, supplier data); testdata/README.md says how they were seen.
func TestRuptureRows(t *testing.T) {
	const target = 0.10
	rows := ruptureRows(t)
	if len(rows) != 63 {
		t.Errorf("rupture rows: %d, want 63", len(rows))
	}
	var used [alloyCount]int
	var worst [alloyCount]float64
	out := 0
	for _, r := range rows {
		if why := leftOut(r); why != "" {
			out++
			t.Logf("left out: %s %.0f K %.0f h %.1f MPa: %s", r.alloy, r.T, r.life/3600, r.stress/1e6, why)
			continue
		}
		a, ok := fitOf(r)
		if !ok {
			t.Errorf("%s: no such alloy, and no reason to leave it out", r.alloy)
			continue
		}
		used[a]++
		p := Of(a)
		got, in := p.RuptureStress(r.T, r.life)
		e := got/r.stress - 1
		worst[a] = max(worst[a], math.Abs(e))
		if !(math.Abs(e) <= target) || !in {
			t.Errorf("%v %.0f K %.0f h: %.1f MPa, want %.1f MPa (%+.1f %%), in range %v; %s",
				a, r.T, r.life/3600, got/1e6, r.stress/1e6, 100*e, in, r.source)
		}
	}
	if out != 5 {
		t.Errorf("rows left out: %d, want 5", out)
	}
	for _, a := range Alloys() {
		p := Of(a)
		t.Logf("%v: %d rows, worst %.1f %% on stress", a, used[a], 100*worst[a])
		if used[a] != p.Rupture.Rows {
			t.Errorf("%v: %d rows in use, the data say %d", a, used[a], p.Rupture.Rows)
		}
	}
}

// TestRuptureElsewhere compares with strengths of the same alloys in other publications, from memory.
// They are mean values; standards give 20 % as the scatter of such.
func TestRuptureElsewhere(t *testing.T) {
	for _, c := range []struct {
		alloy  Alloy
		T      float64 // [K]
		hours  float64
		stress float64 // [Pa]
	}{
		{S30400, 873.15, 1e5, 89e6},  // X6CrNi18-10 at 600 degC
		{S31600, 873.15, 1e5, 120e6}, // X6CrNiMo17-13-2 at 600 degC
		{N08810, 1033.15, 1e4, 50e6}, // 760 degC
		{N08810, 1143.15, 1e5, 13e6}, // 870 degC
	} {
		p := Of(c.alloy)
		got, _ := p.RuptureStress(c.T, c.hours*3600)
		e := got/c.stress - 1
		t.Logf("%v %.0f K %.0f h: %+.0f %%", c.alloy, c.T, c.hours, 100*e)
		if !(math.Abs(e) <= 0.20) {
			t.Errorf("%v %.0f K %.0f h: %.1f MPa, remembered %.1f MPa (%+.0f %%)", c.alloy, c.T, c.hours, got/1e6, c.stress/1e6, 100*e)
		}
	}
}

// TestRuptureMonotone: hotter, longer or stronger pulled never lasts longer, far beyond the rows too.
func TestRuptureMonotone(t *testing.T) {
	for _, a := range Alloys() {
		p := Of(a)
		last := math.Inf(1)
		for P := 5.0; P <= 45; P += 0.01 {
			v, slope := p.Rupture.log10Stress(P)
			if !(v < last) || !(slope < -0.05) || !(slope > -0.35) {
				t.Fatalf("%v at P = %.2f: log10 stress %.4f after %.4f, slope %.3f", a, P, v, last, slope)
			}
			last = v
		}
		for _, hours := range []float64{1, 1e3, 1e5} {
			lastRupture, lastDesign := math.Inf(1), math.Inf(1)
			for T := 280.0; T <= 1500; T += 5 {
				r, _ := p.RuptureStress(T, hours*3600)
				d, _ := p.DesignStrength(T, hours*3600)
				if !(r > 0) || r > lastRupture || !(d > 0) || d > lastDesign || d > r {
					t.Fatalf("%v %g K %g h: rupture %g after %g, design %g after %g", a, T, hours, r, lastRupture, d, lastDesign)
				}
				lastRupture, lastDesign = r, d
			}
		}
	}
}

// TestRuptureLifeInverse: the life of the rupture stress is the life it was asked for.
func TestRuptureLifeInverse(t *testing.T) {
	for _, a := range Alloys() {
		p := Of(a)
		compared := 0
		for T := 850.0; T <= 1300; T += 25 {
			for _, hours := range []float64{10, 1e3, 1e4, 6e4, 3e5} {
				stress, in := p.RuptureStress(T, hours*3600)
				if stress >= p.Tensile.At(T) {
					continue // the tensile strength rules, and many lives share it
				}
				compared++
				life, inLife := p.RuptureLife(T, stress)
				if !(math.Abs(life/3600/hours-1) < 1e-9) || in != inLife {
					t.Errorf("%v %g K: %g h gives %g Pa gives %g h; in range %v, %v", a, T, hours, stress, life/3600, in, inLife)
				}
			}
		}
		if compared < 50 {
			t.Errorf("%v: only %d states compared", a, compared)
		}
		if life, in := p.RuptureLife(600, 2*p.Tensile.At(600)); life != 0 || in {
			t.Errorf("%v: twice the tensile strength lasts %g s", a, life)
		}
	}
}

// TestRuptureParameterByHand: 760 degC and 1000 h are 1033.15 (20 + 3) = 23 762.45, as the table prints.
func TestRuptureParameterByHand(t *testing.T) {
	if got := parameter(1033.15, 3.6e6); math.Abs(got-23.76245) > 1e-9 {
		t.Errorf("parameter: got %.6f, want 23.76245", got)
	}
}

// TestDesignStrength: at 300 degC creep is far away and the yield strength rules, from its table and
// so in range. The values are minimum 0.2 % yield strengths from memory.
func TestDesignStrength(t *testing.T) {
	const tenYears = 10 * 365.25 * 24 * 3600.0
	for _, c := range []struct {
		alloy Alloy
		want  float64 // [Pa]
	}{{S30400, 127e6}, {S31600, 132e6}} {
		p := Of(c.alloy)
		got, in := p.DesignStrength(573.15, tenYears)
		if !(math.Abs(got/c.want-1) < 1e-12) || !in {
			t.Errorf("%v at 300 degC: %.1f MPa, in range %v; want %.1f MPa, true", c.alloy, got/1e6, in, c.want/1e6)
		}
	}
	p := Of(S31600)
	if got, in := p.DesignStrength(973.15, 3.6e7); !in || got >= p.Yield.At(973.15) {
		t.Errorf("S31600 at 700 degC, 10 000 h: %.1f MPa, in range %v; creep should rule and be in range", got/1e6, in)
	}
	if _, in := p.DesignStrength(1400, 3.6e8); in {
		t.Error("S31600 at 1400 K for 100 000 h counts as in range")
	}
	q := Of(N06625)
	if _, in := q.DesignStrength(973.15, 7.2e7); in {
		t.Error("N06625 at 700 degC for 20 000 h is below its rows, where creep could rule: it counts as in range")
	}
}

func TestCreepAllocations(t *testing.T) {
	if n := testing.AllocsPerRun(100, func() {
		p := Of(N06230)
		s, _ := p.RuptureStress(1000, 1e8)
		p.RuptureLife(1000, s)
		p.DesignStrength(1000, 1e8)
	}); n != 0 {
		t.Errorf("allocations: %g", n)
	}
}

// TestRuptureScatter recomputes the scatter of the rows about each fit: root mean square of ln(row/fit) on stress, with as
// many degrees of freedom as rows beyond the coefficients of the fit.
func TestRuptureScatter(t *testing.T) {
	var sum [alloyCount]float64
	var n [alloyCount]float64
	for _, r := range ruptureRows(t) {
		a, ok := fitOf(r)
		if leftOut(r) != "" || !ok {
			continue
		}
		p := Of(a)
		got, _ := p.RuptureStress(r.T, r.life)
		d := math.Log(r.stress / got)
		sum[a] += d * d
		n[a]++
	}
	for _, a := range Alloys() {
		p := Of(a)
		fitted := 0.0
		for _, c := range p.Rupture.C {
			if c != 0 {
				fitted++
			}
		}
		want := math.Sqrt(sum[a] / max(n[a]-fitted, 1))
		if math.Abs(p.Rupture.Scatter-want) > 5e-4 {
			t.Errorf("%v: scatter %.4f, of the rows %.4f", a, p.Rupture.Scatter, want)
		}
	}
}

// TestLifeBand: the band is that of the life at a stress moved by the scatter, and holds the life; with a steep curve it is wide.
func TestLifeBand(t *testing.T) {
	for _, a := range Alloys() {
		p := Of(a)
		T, stress := 973.0, 40e6
		life, _ := p.RuptureLife(T, stress)
		low, high := p.LifeBand(T, stress)
		if !(low < life && life < high) {
			t.Errorf("%v: %g s in %g to %g", a, life, low, high)
		}
		s := 1 + math.Hypot(heatScatter, p.Rupture.Scatter)
		if back, _ := p.RuptureStress(T, low); math.Abs(back/(stress*s)-1) > 1e-9 {
			t.Errorf("%v: stress for the low life %g, want %g", a, back, stress*s)
		}
		t.Logf("%v: rows %.1f %%, life at 40 MPa and 700 degC %.0f h, %.0f to %.0f h", a, 100*p.Rupture.Scatter, life/3600, low/3600, high/3600)
	}
}
