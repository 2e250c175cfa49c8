package cycle

import (
	"encoding/csv"
	"encoding/json"
	"math"
	"os"
	"strconv"
	"testing"

	"hotfront/model/gas"
)

// reference is one machine of the ideal analyses.
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

// law gives the volumes of both spaces and their rates by the crank angle.
type law func(th float64) (ve, dve, vc, dvc float64)

// volumes fills the spaces of m from functions of the crank angle.
func volumes(m *Motion, steps int, freq float64, at law) {
	m.Steps = steps
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

func (c *reference) law() law {
	if c.Drive == "rhombic" {
		return rhombic(c)
	}
	return sinusoid(c)
}

func sinusoid(c *reference) law {
	al := c.Alpha * math.Pi / 180
	return func(th float64) (ve, dve, vc, dvc float64) {
		return c.Vcle + c.Vse/2*(1+math.Cos(th+al)), -c.Vse / 2 * math.Sin(th+al),
			c.Vclc + c.Vsc/2*(1+math.Cos(th)), -c.Vsc / 2 * math.Sin(th)
	}
}

// rhombic is written here a second time, from the drive's geometry, so that the cycle's test does
// not lean on package drive.
func rhombic(c *reference) law {
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
// exchangers, adiabatic (film 0) or isothermal spaces, linear matrix profile; one matrix cell stands at
// the temperature that gives the gas of such a profile its mass.
func idealPath(c *reference, nr int, space float64) *Path {
	p := new(Path)
	p.Gas = perfect(c.Gas)
	p.Mean = c.Pmean
	p.Period = 1 / c.Freq
	p.FixedRun = true
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

// perfectFilm keeps the gas within a thousandth of a kelvin of its wall [W/K].
const perfectFilm = 1e9

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

// table reads a file of reference data: each row as a map from the heads of its columns.
func table(t *testing.T, name string) []map[string]string {
	t.Helper()
	f, err := os.Open("../../testdata/reference/" + name)
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	rows, err := csv.NewReader(f).ReadAll()
	if err != nil {
		t.Fatal(err)
	}
	var out []map[string]string
	for _, r := range rows[1:] {
		m := map[string]string{}
		for i, h := range rows[0] {
			m[h] = r[i]
		}
		out = append(out, m)
	}
	return out
}

func number(t *testing.T, s string) float64 {
	t.Helper()
	v, err := strconv.ParseFloat(s, 64)
	if err != nil {
		t.Fatal(err)
	}
	return v
}

// near fails unless got is within the share tol of want.
func near(t *testing.T, what string, got, want, tol float64) {
	t.Helper()
	if e := got/want - 1; !(math.Abs(e) <= tol) {
		t.Errorf("%s: %.9g, want %.9g: off by %.2e, allowed %.0e", what, got, want, e, tol)
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
