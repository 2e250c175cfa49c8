package fit

import (
	"math"
	"testing"
)

// misra1a is a nonlinear least squares problem of higher-than-average difficulty with certified results:
// y = b1 (1 - exp(-b2 x)). Source: NIST Statistical Reference Datasets, Misra1a (data and certified values from
// memory).
func misra1a() (x, y []float64) {
	x = []float64{77.6, 114.9, 141.1, 190.8, 239.9, 289.0, 332.8, 378.4, 434.8, 477.3, 536.8, 593.1, 689.1, 760.0}
	y = []float64{10.07, 14.73, 17.94, 23.93, 29.61, 35.18, 40.02, 44.82, 50.76, 55.05, 61.01, 66.40, 75.47, 81.78}
	return x, y
}

func TestCertified(t *testing.T) {
	x, y := misra1a()
	const sigma = 0.05 // smaller than the scatter, so that the covariance is scaled by the residuals
	p := &Problem{
		Names: []string{"b1", "b2"}, Start: []float64{500, 0.0001}, Low: []float64{10, 1e-5}, High: []float64{1000, 1e-2}, Count: len(x),
		Residuals: func(dst, b []float64) error {
			for i := range x {
				dst[i] = (b[0]*(1-math.Exp(-b[1]*x[i])) - y[i]) / sigma
			}
			return nil
		},
	}
	r, err := Minimise(p, Settings{Starts: 6})
	if err != nil {
		t.Fatal(err)
	}
	for i, c := range []struct{ value, deviation float64 }{{2.3894212918e2, 2.7070075241}, {5.5015643181e-4, 7.2668688436e-6}} {
		if e := r.X[i]/c.value - 1; math.Abs(e) > 1e-4 {
			t.Errorf("%s: %g, certified %g, off by %.1e", p.Names[i], r.X[i], c.value, e)
		}
		if e := r.Uncertainty[i]/c.deviation - 1; math.Abs(e) > 1e-2 {
			t.Errorf("standard deviation of %s: %g, certified %g, off by %.1e", p.Names[i], r.Uncertainty[i], c.deviation, e)
		}
	}
	if sum := r.Sum * sigma * sigma; math.Abs(sum/1.2455138894e-1-1) > 1e-6 {
		t.Errorf("sum of squares %g, certified 0.12455138894", sum)
	}
}

// TestLine compares with the closed form of a straight line through points of known uncertainty.
func TestLine(t *testing.T) {
	x := []float64{0, 1, 2, 3, 5}
	y := []float64{1.1, 2.9, 5.2, 6.9, 11.05}
	const sigma = 0.3
	p := &Problem{Names: []string{"a", "b"}, Start: []float64{0, 0}, Low: []float64{-10, -10}, High: []float64{10, 10}, Count: len(x),
		Residuals: func(dst, v []float64) error {
			for i := range x {
				dst[i] = (v[0] + v[1]*x[i] - y[i]) / sigma
			}
			return nil
		}}
	r, err := Minimise(p, Settings{})
	if err != nil {
		t.Fatal(err)
	}
	var n, sx, sy, sxx, sxy float64
	for i := range x {
		n, sx, sy, sxx, sxy = n+1, sx+x[i], sy+y[i], sxx+x[i]*x[i], sxy+x[i]*y[i]
	}
	det := n*sxx - sx*sx
	a, b := (sxx*sy-sx*sxy)/det, (n*sxy-sx*sy)/det
	ua, ub, c := sigma*math.Sqrt(sxx/det), sigma*math.Sqrt(n/det), -sx/math.Sqrt(n*sxx)
	for name, q := range map[string][2]float64{"a": {r.X[0], a}, "b": {r.X[1], b}, "u(a)": {r.Uncertainty[0], ua},
		"u(b)": {r.Uncertainty[1], ub}, "correlation": {r.Correlation[0][1], c}} {
		if math.Abs(q[0]/q[1]-1) > 1e-6 {
			t.Errorf("%s: %g, closed form %g", name, q[0], q[1])
		}
	}
}

func TestWhatTheDataCannotTell(t *testing.T) {
	p := &Problem{Names: []string{"a", "b", "c"}, Start: []float64{1, 1, 1}, Low: []float64{0, 0, 0}, High: []float64{4, 4, 4}, Count: 3,
		Residuals: func(dst, v []float64) error { // only a + b shows, and c wants to be below its bound
			dst[0], dst[1], dst[2] = v[0]+v[1]-3, 2*(v[0]+v[1]-3), v[2]+1
			return nil
		}}
	r, err := Minimise(p, Settings{Starts: 3})
	if err != nil {
		t.Fatal(err)
	}
	if len(r.Undecided) != 1 || r.Undecided[0] != (Pair{0, 1}) || len(r.Loose) != 2 {
		t.Errorf("undecided %v, loose %v; a and b cannot be told apart", r.Undecided, r.Loose)
	}
	if !r.OnBound[2] || r.OnBound[0] || r.X[2] != 0 || math.Abs(r.X[0]+r.X[1]-3) > 1e-9 {
		t.Errorf("ended at %v, on bounds %v", r.X, r.OnBound)
	}
}

func TestLeaveOut(t *testing.T) {
	y := []float64{1, 2, 3, 10}
	p := &Problem{Names: []string{"mean"}, Start: []float64{0}, Low: []float64{-100}, High: []float64{100}, Count: 4,
		Residuals: func(dst, v []float64) error {
			for i := range y {
				dst[i] = v[0] - y[i]
			}
			return nil
		}}
	for i, want := range []float64{4, 8.0 / 3, 4.0 / 3, -8} { // mean of the others less the one
		if got := LeaveOut(p, p.Start, Settings{})[i]; math.Abs(got-want) > 1e-9 {
			t.Errorf("without %d: %g, want %g", i, got, want)
		}
	}
}

func TestNoResult(t *testing.T) {
	p := &Problem{Names: []string{"a"}, Start: []float64{0}, Low: []float64{-1}, High: []float64{1}, Count: 1,
		Residuals: func(dst, _ []float64) error { dst[0] = math.NaN(); return nil }}
	if _, err := Minimise(p, Settings{Starts: 2}); err != ErrNoResult {
		t.Errorf("%v", err)
	}
	p.Start[0] = 3
	if _, err := Minimise(p, Settings{}); err == nil {
		t.Error("a start outside the bounds was taken")
	}
}
