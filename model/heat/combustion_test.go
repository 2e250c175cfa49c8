package heat

import (
	"encoding/csv"
	"math"
	"os"
	"strconv"
	"testing"
)

// readTable reads a reference table; each row by column name.
func readTable(t *testing.T, name string) []map[string]string {
	t.Helper()
	f, err := os.Open("../../testdata/reference/" + name)
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	all, err := csv.NewReader(f).ReadAll()
	if err != nil {
		t.Fatal(err)
	}
	rows := make([]map[string]string, 0, len(all))
	for _, r := range all[1:] {
		m := map[string]string{}
		for i, key := range all[0] {
			m[key] = r[i]
		}
		rows = append(rows, m)
	}
	return rows
}

func number(t *testing.T, row map[string]string, key string) float64 {
	t.Helper()
	x, err := strconv.ParseFloat(row[key], 64)
	if err != nil {
		t.Fatalf("column %s: %v", key, err)
	}
	return x
}

func burn(t *testing.T, kind FuelKind, lambda float64) *Combustion {
	t.Helper()
	f := NewFuel(kind)
	c := new(Combustion)
	if fault := c.Set(&f, lambda); fault != OK {
		t.Fatalf("%v at %g: %v", kind, lambda, fault)
	}
	return c
}

// TestFlameTemperature compares with every row of flame_temperature.csv (computed from the same polynomials by
// another program) and with the 2328 K that textbooks give for methane and air without dissociation (from memory).
func TestFlameTemperature(t *testing.T) {
	kinds := map[string]FuelKind{"CH4": Methane, "C3H8": Propane, "H2": Hydrogen}
	worst, rows := 0.0, readTable(t, "flame_temperature.csv")
	for _, row := range rows {
		c := burn(t, kinds[row["fuel"]], number(t, row, "air_ratio"))
		got, fault := c.FlameTemperature(number(t, row, "fuel_K"), number(t, row, "air_K"))
		want := number(t, row, "complete_combustion_flame_K")
		e := math.Abs(got/want - 1)
		worst = max(worst, e)
		if fault != OK || !(e < 1e-3) {
			t.Errorf("%s lambda %s air %s K: got %.1f K, want %.1f K %v", row["fuel"], row["air_ratio"], row["air_K"], got, want, fault)
		}
	}
	if len(rows) != 18 {
		t.Errorf("%d rows, want 18", len(rows))
	}
	t.Logf("worst of the table: %.4f %%", 100*worst)
	got, _ := burn(t, Methane, 1).FlameTemperature(298.15, 298.15)
	if !(math.Abs(got/2328-1) < 0.01) {
		t.Errorf("methane and air: %.1f K, want 2328 K within 1 %%", got)
	}
}
