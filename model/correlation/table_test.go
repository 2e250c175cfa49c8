package correlation

import (
	"fmt"
	"math"
	"testing"
)

// sweep calls f on points spread evenly in the logarithm, off the ends of the table's pieces.
func sweep(low, high float64, f func(x float64)) {
	for x := low; x <= high; x *= 1.0137 {
		f(x)
	}
}

// tableError is what Table promises.
const tableError = 1e-5

func TestTableAccuracy(t *testing.T) {
	for _, p := range []float64{0.66, 0.62, -0.103, -0.067, 0.897, 0.933, 2.0 / 3, 0.67, 0.78, 0.6} {
		var table Table
		table.Build(func(x float64) float64 { return math.Pow(x, p) })
		worst := 0.0
		sweep(1e-3, 1e8, func(x float64) {
			worst = max(worst, math.Abs(table.At(x)/math.Pow(x, p)-1))
		})
		sweep(1e-6, 1e-3, func(x float64) {
			worst = max(worst, math.Abs(table.At(x)/math.Pow(x, p)-1))
		})
		if !(worst < tableError) {
			t.Errorf("x^%.3g: relative error %.2g", p, worst)
		}
	}
}

func TestTableEnds(t *testing.T) {
	var square, inverse Table
	square.Build(func(x float64) float64 { return x * x })
	inverse.Build(func(x float64) float64 { return 1 / x })
	near(t, "a parabola is exact", square.At(1.2345), 1.2345*1.2345, 1e-14)
	near(t, "last value", square.At(math.Nextafter(tableHigh, 0)), tableHigh*tableHigh, 1e-12)
	near(t, "first value", square.At(tableLow), tableLow*tableLow, 1e-12)
	if square.At(0) != 0 {
		t.Errorf("value at 0: %g", square.At(0))
	}
	near(t, "below the range, finite at 0", square.At(tableLow/4), tableLow*tableLow/4, 1e-12)
	near(t, "below the range, infinite at 0", inverse.At(tableLow/4), 1/tableLow, 1e-12)
	for _, x := range []float64{-1, -1e-300, tableHigh, math.Inf(1), math.Inf(-1), math.NaN()} {
		if v := square.At(x); !math.IsNaN(v) {
			t.Errorf("at %g: %g, want NaN", x, v)
		}
	}
	// Continuous across the ends of all pieces.
	for x := float64(tableLow) * 1.125; x < tableHigh/2; x *= 2 {
		near(t, fmt.Sprintf("across %g", x), inverse.At(x), inverse.At(math.Nextafter(x, 0)), 1e-13)
	}
}

func TestFastAgainstExact(t *testing.T) {
	fast := NewFast()
	worst := map[string]float64{}
	note := func(what string, got, want float64) {
		e := math.Abs(got/want - 1)
		if !(e <= worst[what]) { // also where e is NaN
			worst[what] = e
		}
	}
	for _, m := range []Matrix{WovenScreen, RandomFibre, Tanaka, KaysLondon} {
		for _, eps := range []float64{0.62, 0.7, 0.9} {
			p := NewPorous(m, eps)
			sweep(1e-3, 1e5, func(Re float64) {
				for _, Pr := range []float64{0.6, 0.75} {
					key := fmt.Sprintf("matrix %d ", m)
					note(key+"f", fast.MatrixFriction(&p, Re), MatrixFriction(m, Re))
					note(key+"f Re", fast.MatrixFrictionRe(&p, Re), Re*MatrixFriction(m, Re))
					note(key+"Nu", fast.MatrixNusselt(&p, Re, Pr), MatrixNusselt(m, Re, Pr, eps))
					note(key+"N", fast.MatrixDispersion(&p, Re, Pr), MatrixDispersion(m, Re, Pr, eps))
				}
			})
		}
	}
	sweep(1e-3, 5e6, func(Re float64) {
		note("tube f", fast.TubeFriction(Re), TubeFriction(Re))
		note("tube f Re", fast.TubeFrictionRe(Re), TubeFrictionRe(Re))
		for _, Pr := range []float64{0.5, 0.7, 7} {
			for _, d := range []float64{0, 1e-4, 0.03, 0.9} {
				film := fast.NewTubeFilm(Pr, d)
				note("tube Nu", fast.TubeNusselt(&film, Re), TubeNusselt(Re, Pr, d))
			}
		}
	})
	for what, e := range worst {
		if !(e < 2e-5) {
			t.Errorf("%s: relative error %.2g", what, e)
		}
	}
	// At rest: what the flow's reversal passes through.
	p := NewPorous(WovenScreen, 0.7)
	near(t, "matrix f Re at rest", fast.MatrixFrictionRe(&p, 0), 129, 1e-15)
	near(t, "matrix Nu at rest", fast.MatrixNusselt(&p, 0, 0.7), ScreenNusselt(0, 0.7), 1e-15)
	near(t, "matrix N at rest", fast.MatrixDispersion(&p, 0, 0.7), 0.73, 1e-15)
	long, short := fast.NewTubeFilm(0.7, 0.01), fast.NewTubeFilm(0.7, 0.1)
	near(t, "tube Nu at rest", fast.TubeNusselt(&long, 0), 3.66, 1e-15)
	if !math.IsNaN(fast.MatrixNusselt(&p, math.NaN(), 0.7)) || !math.IsNaN(fast.TubeNusselt(&short, math.NaN())) {
		t.Error("NaN hidden")
	}
}

func TestFastNoAllocation(t *testing.T) {
	fast := NewFast()
	p := NewPorous(WovenScreen, 0.7)
	sum := 0.0
	film := fast.NewTubeFilm(0.7, 0.01)
	if n := testing.AllocsPerRun(10, func() {
		sum += fast.TubeNusselt(&film, 1e4) + fast.MatrixNusselt(&p, 50, 0.7) + fast.MatrixFrictionRe(&p, 50)
	}); n != 0 {
		t.Errorf("%v allocations", n)
	}
	_ = sum
}

func benchmark(b *testing.B, low, high float64, f func(x float64) float64) {
	var xs [256]float64
	for i := range xs {
		xs[i] = low * math.Pow(high/low, float64((i*97)%256)/255)
	}
	b.ReportAllocs()
	i, sum := 0, 0.0
	for b.Loop() {
		sum += f(xs[i&255])
		i++
	}
	if math.IsNaN(sum) {
		b.Fatal("NaN")
	}
}

func BenchmarkTable(b *testing.B) {
	var table Table
	table.Build(func(x float64) float64 { return math.Pow(x, 0.66) })
	benchmark(b, 1, 1000, table.At)
}

func BenchmarkTubeNusseltLaminar(b *testing.B) {
	fast := NewFast()
	film := fast.NewTubeFilm(0.7, 0.01)
	benchmark(b, 1, 2300, func(x float64) float64 { return fast.TubeNusselt(&film, x) })
}

func BenchmarkTubeNusseltTurbulent(b *testing.B) {
	fast := NewFast()
	film := fast.NewTubeFilm(0.7, 0.01)
	benchmark(b, 3000, 1e5, func(x float64) float64 { return fast.TubeNusselt(&film, x) })
}

func BenchmarkTubeFriction(b *testing.B) {
	fast := NewFast()
	benchmark(b, 3000, 1e5, fast.TubeFriction)
}

func BenchmarkMatrixNusselt(b *testing.B) {
	fast := NewFast()
	p := NewPorous(WovenScreen, 0.7)
	benchmark(b, 1, 1000, func(x float64) float64 { return fast.MatrixNusselt(&p, x, 0.7) })
}

func BenchmarkMatrixFriction(b *testing.B) {
	fast := NewFast()
	p := NewPorous(WovenScreen, 0.7)
	benchmark(b, 1, 1000, func(x float64) float64 { return fast.MatrixFrictionRe(&p, x) })
}

func BenchmarkNewFast(b *testing.B) {
	for b.Loop() {
		NewFast()
	}
}
