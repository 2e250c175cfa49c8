package pareto

import (
	"errors"
	"math"
	"math/rand/v2"
	"slices"
	"testing"

	"pgregory.net/rapid"
)

// gridPoint draws points on a coarse grid, so that ties are common.
func gridPoint(aims int) *rapid.Generator[[]float64] {
	return rapid.Custom(func(t *rapid.T) []float64 {
		p := make([]float64, aims)
		for i := range p {
			p[i] = float64(rapid.IntRange(0, 4).Draw(t, "f"))
		}
		return p
	})
}

func gridSet(aims, most int) *rapid.Generator[[][]float64] {
	return rapid.SliceOfN(gridPoint(aims), 0, most)
}

func TestBeatsIsAStrictOrder(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		aims := rapid.IntRange(1, 3).Draw(t, "aims")
		var f [3][]float64
		var v [3]float64
		for i := range f {
			f[i] = gridPoint(aims).Draw(t, "f")
			v[i] = rapid.SampledFrom([]float64{0, 0, 1, 2, math.Inf(1)}).Draw(t, "v")
		}
		beats := func(i, j int) bool { return Beats(f[i], v[i], f[j], v[j]) }
		if beats(0, 0) {
			t.Fatal("a design beats itself")
		}
		if beats(0, 1) && beats(1, 0) {
			t.Fatal("two designs beat each other")
		}
		if beats(0, 1) && beats(1, 2) && !beats(0, 2) {
			t.Fatal("not transitive")
		}
	})
}

func TestDominatesByHand(t *testing.T) {
	nan, inf := math.NaN(), math.Inf(1)
	for _, c := range []struct {
		a, b []float64
		want bool
	}{
		{[]float64{1, 2}, []float64{1, 3}, true},
		{[]float64{1, 2}, []float64{1, 2}, false},
		{[]float64{1, 3}, []float64{2, 2}, false},
		{[]float64{-inf, 0}, []float64{0, 0}, true},
		{[]float64{nan, 0}, []float64{1, 1}, false},
		{[]float64{0, 0}, []float64{nan, 1}, false},
	} {
		if got := Dominates(c.a, c.b); got != c.want {
			t.Errorf("Dominates(%v, %v) = %v", c.a, c.b, got)
		}
	}
}

func TestViolation(t *testing.T) {
	if v := Violation([]float64{-3, 0, 0.5, 0.25}); v != 0.75 {
		t.Errorf("got %v, want 0.75", v)
	}
	if v := Violation([]float64{-3, math.NaN()}); !math.IsNaN(v) {
		t.Errorf("a NaN among the limits gave %v", v)
	}
}

func TestNaNIsRefused(t *testing.T) {
	bad := [][]float64{{1, 2}, {1, math.NaN()}}
	var e *NaNError
	if _, err := Fronts(bad, nil); !errors.As(err, &e) || e.Point != 1 || e.Aim != 1 {
		t.Errorf("Fronts: %v", err)
	}
	if _, err := Fronts([][]float64{{1, 2}}, []float64{math.NaN()}); !errors.As(err, &e) || e.Aim != -1 {
		t.Errorf("Fronts: %v", err)
	}
	if took, err := NewArchive(2).Add(bad[1], 0); took || !errors.As(err, &e) {
		t.Errorf("Add: %v, %v", took, err)
	}
}

// TestFronts holds the fast sort against the definition.
func TestFronts(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		points := gridSet(rapid.IntRange(1, 3).Draw(t, "aims"), 20).Draw(t, "points")
		violations := make([]float64, len(points))
		for i := range violations {
			violations[i] = float64(rapid.IntRange(0, 2).Draw(t, "v"))
		}
		fronts, err := Fronts(points, violations)
		if err != nil {
			t.Fatal(err)
		}
		left := make([]bool, len(points))
		for i := range left {
			left[i] = true
		}
		for _, front := range fronts {
			var want []int
			for i := range points {
				beaten := !left[i]
				for j := range points {
					beaten = beaten || left[j] && Beats(points[j], violations[j], points[i], violations[i])
				}
				if !beaten {
					want = append(want, i)
				}
			}
			if !slices.Equal(front, want) {
				t.Fatalf("front %v, want %v", front, want)
			}
			for _, i := range front {
				left[i] = false
			}
		}
		if slices.Contains(left, true) {
			t.Fatal("a design is in no front")
		}
	})
}

// TestArchive holds the archive against the definition, and its content against the order of additions.
func TestArchive(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		aims := rapid.IntRange(1, 3).Draw(t, "aims")
		points := gridSet(aims, 25).Draw(t, "points")
		tags := rapid.Permutation(indices(len(points))).Draw(t, "order")
		ref := []float64{4, 3, 4}[:aims]
		forward, shuffled := NewArchive(aims), NewArchive(aims)
		forward.Measure(ref)
		shuffled.Measure(ref)
		held := map[int]bool{} // by Add and Left, of forward
		for i := range points {
			if add(t, forward, points[i], i) {
				held[i] = true
			}
			for _, tag := range forward.Left() {
				if !held[tag] {
					t.Fatalf("%d left, which was not there", tag)
				}
				delete(held, tag)
			}
			add(t, shuffled, points[tags[i]], tags[i])
			for _, a := range []*Archive{forward, shuffled} {
				if got, want := a.Measured(), a.Hypervolume(ref); math.Abs(got-want) > 1e-12 {
					t.Fatalf("hypervolume followed to %v, is %v", got, want)
				}
			}
		}
		for i := range forward.Len() {
			if !held[forward.At(i).Tag] {
				t.Fatalf("%d is there, which nothing said", forward.At(i).Tag)
			}
		}
		if len(held) != forward.Len() {
			t.Fatalf("%d said to be there, %d are", len(held), forward.Len())
		}
		var want []Tagged
		for i, p := range points {
			keep := true
			for j, q := range points {
				if Dominates(q, p) || slices.Equal(p, q) && j < i {
					keep = false
				}
			}
			if keep {
				want = append(want, Tagged{F: p, Tag: i})
			}
		}
		slices.SortFunc(want, func(a, b Tagged) int { return slices.Compare(a.F, b.F) })
		for _, a := range []*Archive{forward, shuffled} {
			if got, want := a.Hypervolume(ref), Hypervolume(points, ref); got != want {
				t.Fatalf("hypervolume %v, want %v", got, want)
			}
			if a.Len() != len(want) {
				t.Fatalf("%d points, want %d", a.Len(), len(want))
			}
			for i, w := range want {
				if got := a.At(i); got.Tag != w.Tag || !slices.Equal(got.F, w.F) {
					t.Fatalf("point %d is %v, want %v", i, got, w)
				}
			}
		}
	})
}

func add(t *rapid.T, a *Archive, f []float64, tag int) bool {
	taken, err := a.Add(f, tag)
	if err != nil {
		t.Fatal(err)
	}
	return taken
}

func indices(n int) []int {
	out := make([]int, n)
	for i := range out {
		out[i] = i
	}
	return out
}

func TestHypervolumeByHand(t *testing.T) {
	for _, c := range []struct {
		name   string
		points [][]float64
		ref    []float64
		want   float64
	}{
		{"none", nil, []float64{1, 1}, 0},
		{"one aim", [][]float64{{3}, {1}, {2}}, []float64{4}, 3},
		{"one point", [][]float64{{1, 1}}, []float64{3, 4}, 6},
		{"staircase", [][]float64{{1, 3}, {2, 2}, {3, 1}}, []float64{4, 4}, 6},
		{"outside", [][]float64{{1, 1}, {5, 0}, {4, 0}}, []float64{4, 4}, 9},
		{"cube", [][]float64{{1, 1, 1}}, []float64{2, 3, 4}, 6},
		{"two cubes", [][]float64{{0, 0, 1}, {1, 1, 0}}, []float64{2, 2, 2}, 5},             // 4 + 2 - 1
		{"three bars", [][]float64{{0, 1, 1}, {1, 0, 1}, {1, 1, 0}}, []float64{2, 2, 2}, 4}, // 3 bars of 2, 3 overlaps of 1, 1 of all
	} {
		if got := Hypervolume(c.points, c.ref); math.Abs(got-c.want) > 1e-12 {
			t.Errorf("%s: got %v, want %v", c.name, got, c.want)
		}
	}
}

// TestHypervolumeByCells counts unit cells of the grid that the points live on.
func TestHypervolumeByCells(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		aims := rapid.IntRange(1, 3).Draw(t, "aims")
		points := gridSet(aims, 12).Draw(t, "points")
		ref := []float64{4, 3, 4}[:aims]
		cells := func(points [][]float64) float64 {
			count := 0.0
			for c := range 64 {
				z := []float64{float64(c % 4), float64(c / 4 % 4), float64(c / 16)}
				if aims < 2 && z[1] > 0 || aims < 3 && z[2] > 0 || aims > 1 && z[1] >= 3 {
					continue
				}
				if slices.ContainsFunc(points, func(p []float64) bool {
					for k, v := range p {
						if v > z[k] {
							return false
						}
					}
					return true
				}) {
					count++
				}
			}
			return count
		}
		whole := Hypervolume(points, ref)
		if want := cells(points); whole != want {
			t.Fatalf("got %v, want %v cells", whole, want)
		}
		for i, got := range Contributions(points, ref) {
			if want := whole - cells(slices.Delete(slices.Clone(points), i, i+1)); got != want {
				t.Fatalf("contribution of %d is %v, want %v", i, got, want)
			}
		}
	})
}

// randomFront is points on a simplex, none of which dominates another.
func randomFront(seed uint64, n, aims int) [][]float64 {
	rng := rand.New(rand.NewPCG(seed, 0))
	points := make([][]float64, n)
	for i := range points {
		points[i] = make([]float64, aims)
		sum := 0.0
		for k := range points[i] {
			points[i][k] = rng.ExpFloat64()
			sum += points[i][k]
		}
		for k := range points[i] {
			points[i][k] /= sum
		}
	}
	return points
}

// TestTruncateDropsTheLeast holds the quick ways against a full computation of every contribution per drop.
func TestTruncateDropsTheLeast(t *testing.T) {
	for _, aims := range []int{2, 3} {
		points := randomFront(7, 30, aims)
		ref := []float64{1.1, 1.1, 1.1}[:aims]
		left := indices(len(points))
		extreme := extremes(points)
		for len(left) > 8 {
			set := make([][]float64, len(left))
			for k, i := range left {
				set[k] = points[i]
			}
			share := Contributions(set, ref)
			worst := -1
			for k, i := range left {
				if !extreme[i] && (worst < 0 || share[k] < share[worst]) {
					worst = k
				}
			}
			left = slices.Delete(left, worst, worst+1)
		}
		if got := Truncate(points, ref, 8); !slices.Equal(got, left) {
			t.Errorf("%d aims: kept %v, want %v", aims, got, left)
		}
	}
	if got := Truncate(randomFront(1, 3, 2), []float64{1, 1}, 5); !slices.Equal(got, []int{0, 1, 2}) {
		t.Errorf("fewer points than room: %v", got)
	}
}

// TestChooseIsGreedy holds the lazy choice against the plain one.
func TestChooseIsGreedy(t *testing.T) {
	for _, aims := range []int{1, 2, 3} {
		points := randomFront(11, 40, aims)
		ref := []float64{1.2, 1.1, 1.3}[:aims]
		var set [][]float64
		var want []int
		for range 10 {
			best, gain := -1, 1e-12
			for i, p := range points {
				if g := Hypervolume(append(set, p), ref) - Hypervolume(set, ref); g > gain+1e-12 {
					best, gain = i, g
				}
			}
			if best < 0 {
				break
			}
			want, set = append(want, best), append(set, points[best])
		}
		if got := Choose(points, ref, 10); !slices.Equal(got, want) {
			t.Errorf("%d aims: chose %v, want %v", aims, got, want)
		}
	}
}

func BenchmarkHypervolume3(b *testing.B) {
	points := randomFront(3, 2000, 3)
	b.ReportAllocs()
	for b.Loop() {
		Hypervolume(points, []float64{1.1, 1.1, 1.1})
	}
}

func BenchmarkTruncate3(b *testing.B) {
	points := randomFront(3, 64, 3)
	b.ReportAllocs()
	for b.Loop() {
		Truncate(points, []float64{1.1, 1.1, 1.1}, 32)
	}
}
