package gas

import (
	"encoding/csv"
	"math"
	"os"
	"path/filepath"
	"strconv"
	"testing"
)

// The targets of this project, as relative errors against the published correlations.
const (
	targetDensity   = 0.005
	targetCp        = 0.005
	targetTransport = 0.02
)

// readTable returns the rows of a file of testdata/reference as maps from column to text.
func readTable(t *testing.T, name string) []map[string]string {
	t.Helper()
	f, err := os.Open(filepath.Join("..", "..", "testdata", "reference", name))
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	all, err := csv.NewReader(f).ReadAll()
	if err != nil {
		t.Fatal(err)
	}
	var rows []map[string]string
	for _, rec := range all[1:] {
		row := make(map[string]string, len(rec))
		for i, name := range all[0] {
			row[name] = rec[i]
		}
		rows = append(rows, row)
	}
	return rows
}

func number(t *testing.T, row map[string]string, column string) float64 {
	t.Helper()
	v, err := strconv.ParseFloat(row[column], 64)
	if err != nil {
		t.Fatalf("column %s: %v", column, err)
	}
	return v
}

func kindOf(t *testing.T, name string) Kind {
	t.Helper()
	for i, k := range []string{"Hydrogen", "Helium", "Nitrogen", "Air"} {
		if k == name {
			return Kind(i)
		}
	}
	t.Fatalf("unknown gas %q", name)
	return 0
}

// worst keeps the largest relative error of a quantity and where it was.
type worst struct {
	err  float64
	T, p float64
}

func (w *worst) add(err, T, p float64) {
	if !(math.Abs(err) <= w.err) { // so that NaN counts
		*w = worst{math.Abs(err), T, p}
	}
}

// TestPublishedCorrelations compares with the values of the correlations that the coefficients
// are fitted to. Two limits hold: the targets of the project, and the worst errors that the
// comments of the gases state. The reference files were computed from the correlations; how, their
// columns say (gas_properties_reference.csv: coefficients seen; gas_properties_extension.csv:
// coefficients from memory, which give the other file's rows to their last digit).
func TestPublishedCorrelations(t *testing.T) {
	stated := map[Kind]struct{ rho, cp, mu, k float64 }{
		Hydrogen: {0.0009, 0.0009, 0.004, 0.007},
		Helium:   {0.0004, 0.0006, 0.0035, 0.006},
		Nitrogen: {0.0011, 0.0018, 0.0025, 0.0040},
		Air:      {0.0011, 0.0020, 0.0050, 0.0045},
	}
	rows := readTable(t, "gas_properties_reference.csv")
	inTable := len(rows)
	rows = append(rows, readTable(t, "gas_properties_extension.csv")...)
	if inTable != 216 || len(rows) != 306 {
		t.Fatalf("rows: got %d and %d in all, want 216 and 306", inTable, len(rows))
	}
	var rho, cp, cv, sound, coldSound, mu, cond [4]worst
	for i, row := range rows {
		kind := kindOf(t, row["gas"])
		g := New(kind)
		T, p := number(t, row, "T_K"), 1e5*number(t, row, "p_bar")
		if !g.Range.Contains(T, p) {
			t.Errorf("%v %g K %g Pa: outside %+v", kind, T, p, g.Range)
		}
		var s State
		g.At(&s, T, p)
		rho[kind].add(1/s.V/number(t, row, "rho_kg_m3")-1, T, p)
		cp[kind].add(s.Cp/number(t, row, "cp_J_kgK")-1, T, p)
		if i < inTable {
			cv[kind].add((s.Cp+T*s.VT*s.VT/s.VP)/number(t, row, "cv_J_kgK")-1, T, p)
		} else if e := g.SoundSpeed(T, p)/number(t, row, "w_m_s") - 1; T >= 275 {
			sound[kind].add(e, T, p)
		} else {
			coldSound[kind].add(e, T, p)
		}
		m, k := g.Transport(T, 1/s.V)
		mu[kind].add(m/number(t, row, "mu_Pa_s")-1, T, p)
		cond[kind].add(k/number(t, row, "k_W_mK")-1, T, p)
	}
	for _, kind := range Kinds() {
		st := stated[kind]
		for _, c := range []struct {
			quantity       string
			w              worst
			target, stated float64
		}{
			{"density", rho[kind], targetDensity, st.rho},
			{"cp", cp[kind], targetCp, st.cp},
			{"cv", cv[kind], targetCp, targetCp},
			{"sound speed", sound[kind], 0.004, 0.004}, // no target of the project: as SoundSpeed states
			{"cold sound speed", coldSound[kind], 0.013, 0.013},
			{"viscosity", mu[kind], targetTransport, st.mu},
			{"conductivity", cond[kind], targetTransport, st.k},
		} {
			if c.w.T == 0 && kind == Helium {
				continue // the extension has no rows of helium, so no speed of sound
			}
			t.Logf("%-9v %-16s worst %.3f %% at %g K, %g bar", kind, c.quantity, 100*c.w.err, c.w.T, c.w.p/1e5)
			if !(c.w.err <= c.target) || !(c.w.err <= c.stated) {
				t.Errorf("%v %s: worst error %.3f %% at %g K, %g bar; target %g %%, stated %g %%",
					kind, c.quantity, 100*c.w.err, c.w.T, c.w.p/1e5, 100*c.target, 100*c.stated)
			}
		}
	}
}

// TestHeliumNIST compares with the dilute-gas values of [NIST134] (seen). B counts by what it does
// to the density at 150 bar. The source states 0.1 % on its transport values and 1 % on B.
// Rows below 250 K are outside Range and are not used; that leaves out the row at 225 K, whose
// B of 10.076 cm3/mol stands between 12.138 and 11.993 and must be a misprint.
func TestHeliumNIST(t *testing.T) {
	const (
		molarMass   = 4.002602e-3 // [kg/mol]
		gasConstant = 8.314462618 // [J/(mol K)]
		dilute      = 1e-3        // pressure at which the gas is dilute [Pa]
	)
	g := New(Helium)
	used := 0
	for _, row := range readTable(t, "helium_nist_srd134.csv") {
		T := number(t, row, "T_K")
		if T < g.Range.TemperatureLow {
			continue
		}
		used++
		var s State
		g.At(&s, T, dilute)
		if e := s.Cp*molarMass/gasConstant/number(t, row, "cp_over_R") - 1; !(math.Abs(e) < 1e-6) {
			t.Errorf("%g K: cp/R off by %g", T, e)
		}
		B := (g.B0 + g.B1/T + g.B2/(T*T) + g.B3/(T*T*T)) * molarMass
		want := 1e-6 * number(t, row, "B_cm3_mol")
		if e := (B - want) * 150e5 / (gasConstant * T); !(math.Abs(e) < targetDensity/5) {
			t.Errorf("%g K: B %.3f, want %.3f cm3/mol: %.3f %% of the density at 150 bar", T, B*1e6, want*1e6, 100*e)
		}
		mu, k := g.Transport(T, 1/s.V)
		if e := mu/(1e-6*number(t, row, "eta_uPa_s")) - 1; !(math.Abs(e) < targetTransport/4) {
			t.Errorf("%g K: viscosity off by %.2f %%", T, 100*e)
		}
		if e := k/(1e-3*number(t, row, "lambda_mW_mK")) - 1; !(math.Abs(e) < targetTransport/4) {
			t.Errorf("%g K: conductivity off by %.2f %%", T, 100*e)
		}
	}
	if used != 15 {
		t.Errorf("rows used: %d, want 15", used)
	}
}

// TestNASAPolynomials compares cp0 with the polynomials of [McBride1993], a source that took no
// part in the fit. The correlations themselves differ from them by up to 0.39 % (hydrogen at 700 K).
func TestNASAPolynomials(t *testing.T) {
	const gasConstant = 8.314462618 // [J/(mol K)]
	rows := readTable(t, "nasa7_coefficients.csv")
	// cpOverR gives cp/R of a species from the row that holds T.
	cpOverR := func(species string, T float64) float64 {
		for _, row := range rows {
			if row["species"] != species || T < number(t, row, "T_low_K") || T > number(t, row, "T_high_K") {
				continue
			}
			var sum float64
			for _, a := range []string{"a5", "a4", "a3", "a2", "a1"} {
				sum = sum*T + number(t, row, a)
			}
			return sum
		}
		t.Fatalf("no row for %s at %g K", species, T)
		return 0
	}
	type part struct {
		species string
		x       float64 // by mole
	}
	for _, c := range []struct {
		kind      Kind
		molarMass float64 // [kg/mol]
		parts     []part
	}{
		{Hydrogen, 2.01588e-3, []part{{"H2", 1}}},
		{Helium, 4.002602e-3, []part{{"He", 1}}},
		{Nitrogen, 28.0134e-3, []part{{"N2", 1}}},
		{Air, 28.9655e-3, []part{{"N2", 0.7812}, {"O2", 0.2096}, {"Ar", 0.0092}}},
	} {
		g := New(c.kind)
		for T := 250.0; T <= 1300; T += 50 {
			var want float64
			for _, p := range c.parts {
				want += p.x * cpOverR(p.species, T) * gasConstant / c.molarMass
			}
			var s State
			g.At(&s, T, 1e-3)
			if e := s.Cp/want - 1; !(math.Abs(e) < targetCp) {
				t.Errorf("%v %g K: cp0 %.2f, want %.2f J/(kg K): %.2f %%", c.kind, T, s.Cp, want, 100*e)
			}
		}
	}
}
