package report

import (
	"bytes"
	"encoding/csv"
	"encoding/json"
	"math"
	"math/rand/v2"
	"slices"
	"strings"
	"testing"

	"hotfront/optimize"
)

// frontOf makes a front of points with these aims, power [kW] and efficiency [%], to be most.
func frontOf(t *testing.T, aims ...[2]float64) *Front {
	t.Helper()
	p, start := sawmill(t)
	f := &Front{Problem: p}
	for i, a := range aims {
		x := start
		x.F = []float64{-1e3 * a[0], -a[1] / 100}
		f.Points, f.Seq = append(f.Points, x), append(f.Seq, 10+i)
	}
	return f
}

// TestPick checks the choice of few members against hand cases: the first is the one with the largest
// rectangle, and what is picked stands in the order of the front.
func TestPick(t *testing.T) {
	f := frontOf(t, [2]float64{10, 10}, [2]float64{9, 20}, [2]float64{6, 30}, [2]float64{2, 40}, [2]float64{1, 41})
	for _, c := range []struct {
		k    int
		want []int
	}{
		{1, []int{1}},    // 100, 180, 180, 80, 41: the first of the largest
		{2, []int{1, 2}}, // then 10, -, 60, 40, 21
		{3, []int{1, 2, 3}},
		{4, []int{0, 1, 2, 3}},
		{5, []int{0, 1, 2, 3, 4}}, {9, []int{0, 1, 2, 3, 4}}, {0, []int{0, 1, 2, 3, 4}}, {-1, []int{0, 1, 2, 3, 4}},
	} {
		if got := f.Pick(c.k); !slices.Equal(got, c.want) {
			t.Errorf("%d of 5: %v, want %v", c.k, got, c.want)
		}
	}
	// Designs that are worse than the reference are shown all the same, as many as are asked for.
	bad := frontOf(t, [2]float64{3, -5}, [2]float64{2, -4}, [2]float64{1, -3}, [2]float64{-1, -2}, [2]float64{-2, -1})
	for k, want := range map[int][]int{1: {0}, 2: {0, 2}, 3: {0, 1, 3}} {
		if got := bad.Pick(k); !slices.Equal(got, want) {
			t.Errorf("%d of 5 beyond the reference: %v, want %v", k, got, want)
		}
	}
	some := frontOf(t, [2]float64{3, -5}, [2]float64{2, 4}, [2]float64{1, 5}, [2]float64{-1, 6})
	if got := some.Pick(3); !slices.Equal(got, []int{0, 1, 2}) {
		t.Errorf("3 of 4, two of them beyond the reference: %v", got)
	}
}

// TestPickIsSortedAndDistinct over random fronts.
func TestPickIsSortedAndDistinct(t *testing.T) {
	random := rand.New(rand.NewPCG(5, 5))
	for range 20 {
		var aims [][2]float64
		for range 40 {
			power := 12 * random.Float64()
			aims = append(aims, [2]float64{power, 40 - 2*power - 10*random.Float64()})
		}
		f := frontOf(t, aims...)
		for k := 1; k <= 40; k += 3 {
			got := f.Pick(k)
			if len(got) != k || !slices.IsSorted(got) || len(slices.Compact(slices.Clone(got))) != k || got[0] < 0 || got[k-1] >= 40 {
				t.Fatalf("%d of 40: %v", k, got)
			}
		}
	}
}

// TestHypervolumeText: 1 kW x 1 % is 1000 W x 0.01.
func TestHypervolumeText(t *testing.T) {
	p, _ := sawmill(t)
	if got, want := HypervolumeText(p, 3700), "370 kW x %"; got != want {
		t.Errorf("%q, want %q", got, want)
	}
}

func TestGrowth(t *testing.T) {
	f := &Front{Hypervolume: 8}
	for i := range 10 {
		f.History = append(f.History, optimize.HistoryRow{Evaluations: 100 * (i + 1), Hypervolume: float64(min(i, 8))})
	}
	if got, want := f.Growth(), "12.5 % at 200, 37.5 % at 400, 62.5 % at 600, 87.5 % at 800, 100.0 % at 1000"; got != want {
		t.Errorf("%q, want %q", got, want)
	}
	if got := (&Front{History: f.History}).Growth(); got != "" {
		t.Errorf("without hypervolume: %q", got)
	}
	if got := (&Front{}).Growth(); got != "" {
		t.Errorf("without history: %q", got)
	}
}

// TestEscapes: names with signs that mean something to JSON or CSV come through as they were.
func TestEscapes(t *testing.T) {
	hard := "a \"b\", <c> & d\n\\ \u00b5\u4e2d; =1+1 \u2028"
	var j, c bytes.Buffer
	if err := JSON(&j, map[string]string{hard: hard}); err != nil {
		t.Fatal(err)
	}
	var back map[string]string
	if err := json.Unmarshal(j.Bytes(), &back); err != nil || back[hard] != hard || !strings.HasSuffix(j.String(), "}\n") {
		t.Errorf("JSON: %v: %q", err, j.String())
	}
	if !strings.Contains(j.String(), "<c> &") {
		t.Errorf("JSON escapes what needs none: %s", j.String())
	}
	if err := CSV(&c, []string{hard, ""}, [][]string{{"", hard}}); err != nil {
		t.Fatal(err)
	}
	rows, err := csv.NewReader(&c).ReadAll()
	if err != nil || len(rows) != 2 || rows[0][0] != hard || rows[1][1] != hard {
		t.Errorf("CSV: %v: %q", err, rows)
	}
	if err := JSON(&j, math.Inf(1)); err == nil {
		t.Error("JSON wrote a number that it has no word for")
	}
}
