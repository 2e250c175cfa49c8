package cycle

import (
	"encoding/json"
	"math"
	"os"
	"testing"

	"hotfront/model/correlation"
	"hotfront/model/gas"
)

type reference struct {
	Name, Drive, Gas                string
	Vse, Vsc, Vcle, Vclc, Alpha     float64
	R, L, E, Bore, Drod             float64
	Vh, Vr, Vk, Th, Tk, Pmean, Freq float64
	Result                          map[string]float64
}

// perfect gives the constant-property gas of the reference computation.
func perfect(name string) gas.Gas {
	switch name {
	case "He":
		return gas.Perfect(2077.265, 5.0/3, 2e-5, 0.15)
	case "H2":
		return gas.Perfect(4124.2, 1.40, 1e-5, 0.2)
	}
	return gas.Perfect(287.05, 1.40, 2e-5, 0.03)
}

// volumes fills the spaces of path from functions of the crank angle.
func volumes(path *Path, steps int, freq float64, at func(th float64) (ve, dve, vc, dvc float64)) {
	m := &path.Fine
	m.Steps = steps
	path.Period = 1 / freq
	w := 2 * math.Pi * freq
	dth := 2 * math.Pi / float64(steps)
	for n := range steps {
		for j, c := range []float64{Gamma, 1} {
			k := 2*n + j
			ve, dve, vc, dvc := at((float64(n) + c) * dth)
			m.Ve[k], m.DVe[k], m.Vc[k], m.DVc[k] = ve, dve*w, vc, dvc*w
		}
	}
	m.Ve0, _, m.Vc0, _ = at(0)
}

func sinusoid(c *reference) func(th float64) (ve, dve, vc, dvc float64) {
	al := c.Alpha * math.Pi / 180
	return func(th float64) (ve, dve, vc, dvc float64) {
		return c.Vcle + c.Vse/2*(1+math.Cos(th+al)), -c.Vse / 2 * math.Sin(th+al),
			c.Vclc + c.Vsc/2*(1+math.Cos(th)), -c.Vsc / 2 * math.Sin(th)
	}
}

// rhombic is written here a second time, from the drive's geometry, so that the cycle's test does
// not lean on package drive.
func rhombic(c *reference) func(th float64) (ve, dve, vc, dvc float64) {
	area := math.Pi / 4 * c.Bore * c.Bore
	rod := math.Pi / 4 * c.Drod * c.Drod
	pos := func(t float64) (yp, yd, vp, vd float64) {
		u := c.E - c.R*math.Cos(t)
		b := math.Sqrt(c.L*c.L - u*u)
		db := -u * c.R * math.Sin(t) / b
		return c.R*math.Sin(t) + b, c.R*math.Sin(t) - b, c.R*math.Cos(t) + db, c.R*math.Cos(t) - db
	}
	top, gap := math.Inf(-1), math.Inf(1)
	for i := range 200001 {
		yp, yd, _, _ := pos(2 * math.Pi * float64(i) / 200000)
		top = max(top, yd)
		gap = min(gap, yd-yp)
	}
	return func(th float64) (ve, dve, vc, dvc float64) {
		yp, yd, vp, vd := pos(-th)
		return c.Vcle + area*(top-yd), area * vd, c.Vclc + (area-rod)*(yd-yp-gap), -(area - rod) * (vd - vp)
	}
}

// idealPath is the five-space machine of the ideal analyses with nr matrix cells: perfect
// exchangers, adiabatic (film 0) or isothermal spaces, linear matrix profile.
func idealPath(c *reference, nr int, space float64) *Path {
	p := new(Path)
	p.Gas = perfect(c.Gas)
	p.Mean = c.Pmean
	p.FixedRun = true
	const perfectFilm = 1e9
	add := func(cell Cell) {
		p.Cells[p.N] = cell
		p.N++
	}
	add(Cell{Kind: Space, Part: PartExpansion, Wall: c.Th, FixedFilm: space})
	add(Cell{Kind: Tube, Part: PartHeater, Volume: c.Vh, Wall: c.Th, Outer: c.Th, FixedFilm: perfectFilm})
	for i := range nr {
		t := c.Th + (c.Tk-c.Th)*(float64(i)+0.5)/float64(nr)
		if nr == 1 {
			t = (c.Th - c.Tk) / math.Log(c.Th/c.Tk)
		}
		add(Cell{Kind: Matrix, Part: PartRegenerator, Volume: c.Vr / float64(nr), Wall: t, FixedFilm: perfectFilm, Capacity: 1e9})
	}
	add(Cell{Kind: Tube, Part: PartCooler, Volume: c.Vk, Wall: c.Tk, Outer: c.Tk, FixedFilm: perfectFilm})
	add(Cell{Kind: Space, Part: PartCompression, Wall: c.Tk, FixedFilm: space})
	return p
}

func loadReference(t *testing.T) []reference {
	t.Helper()
	b, err := os.ReadFile("../../testdata/reference/adiabatic_reference.json")
	if err != nil {
		t.Fatal(err)
	}
	var cases []reference
	if err := json.Unmarshal(b, &cases); err != nil {
		t.Fatal(err)
	}
	return cases
}

// TestAdiabaticLimit holds the solver against the ideal adiabatic cycle of four machines, integrated
// by a general-purpose integrator to tight tolerance (testdata/reference/adiabatic_reference.json,
// made by adiabatic_reference.py).
func TestAdiabaticLimit(t *testing.T) {
	s := NewSolver(correlation.NewFast())
	for _, c := range loadReference(t) {
		at := sinusoid(&c)
		if c.Drive == "rhombic" {
			at = rhombic(&c)
		}
		for _, steps := range []int{60, 120, 240} {
			p := idealPath(&c, 20, 0)
			volumes(p, steps, c.Freq, at)
			var r Result
			s.Solve(&r, p, DefaultSettings())
			for _, q := range []struct {
				name      string
				got, want float64
			}{
				{"W_e", r.WorkExpansion, c.Result["W_e"]},
				{"W_c", r.WorkCompression, c.Result["W_c"]},
				{"W", r.WorkExpansion + r.WorkCompression, c.Result["W"]},
				{"p_max", r.PressureMax, c.Result["p_max"]},
				{"p_min", r.PressureMin, c.Result["p_min"]},
				{"Te", r.Temperature[0], c.Result["Te_mean"]},
				{"Tc", r.Temperature[p.N-1], c.Result["Tc_mean"]},
				{"Q_h", heat(&r, p, PartHeater), c.Result["Q_h"]},
				{"Q_k", heat(&r, p, PartCooler), c.Result["Q_k"]},
			} {
				e := q.got/q.want - 1
				t.Logf("%s steps %d cycles %d conv %v %s %.6g %.6g %+.1e", c.Name, steps, r.Cycles, r.Converged, q.name, q.got, q.want, e)
			}
		}
	}
}

func heat(r *Result, p *Path, part Part) float64 {
	sum := 0.0
	for i := range p.N {
		if p.Cells[i].Part == part {
			sum += r.Heat[i]
		}
	}
	return sum
}
