package calibration

import (
	"fmt"
	"math"
	"strings"

	"hotfront/model"
	"hotfront/optimize/fit"
	"hotfront/studies"
)

// Outcome is a fit of corrections to rows of tests.
type Outcome struct {
	Rows        []Row
	Names       []string // factors fitted
	Corrections model.Corrections
	Model       []float64 // of each row, with the corrections
	Before      []float64 // of each row, with the corrections the fit began with; NaN without a result
	LeaveOut    []float64 // of each row, predicted by a fit to the others; NaN without a result
	Fit         *fit.Result
}

// bounds are the ranges that the factors are looked for in: wider than any published fit of such a model
// needed (common practice, no source).
func bounds(name string) (low, high float64) {
	switch name {
	case "flow_friction":
		return 0.3, 8
	case "cycle_work":
		return 0.3, 1
	case "drive_effectiveness":
		return 0.4, 1
	case "seal_friction":
		return 0, 6e5
	}
	panic("calibration: unknown factor " + name)
}

// Fit finds the named factors, the others as in base, that meet the rows best.
func Fit(rows []Row, names []string, base model.Corrections) (*Outcome, error) {
	factors := map[string]studies.Factor{}
	var known []string
	for _, f := range studies.Factors() {
		factors[f.Name] = f
		known = append(known, f.Name)
	}
	p := &fit.Problem{Names: names, Count: len(rows)}
	for i, name := range names {
		f, ok := factors[name]
		if !ok {
			return nil, fmt.Errorf("no factor is called %q: %s", name, strings.Join(known, ", "))
		}
		for _, other := range names[:i] {
			if other == name {
				return nil, fmt.Errorf("factor %s is named twice", name)
			}
		}
		low, high := bounds(name)
		p.Low, p.High = append(p.Low, low), append(p.High, high)
		p.Start = append(p.Start, min(max(*f.At(&base), low), high))
	}
	w := model.NewWorkspace()
	with := func(x []float64) model.Corrections {
		c := base
		for i, name := range names {
			*factors[name].At(&c) = x[i]
		}
		return c
	}
	p.Residuals = func(dst, x []float64) error {
		c := with(x)
		for i := range rows {
			v, err := rows[i].Model(&c, w)
			if err != nil {
				return err
			}
			dst[i] = (v - rows[i].Value) / rows[i].Sigma
		}
		return nil
	}
	r, err := fit.Minimise(p, fit.Settings{Starts: 4})
	if err != nil {
		return nil, err
	}
	o := &Outcome{Rows: rows, Names: names, Corrections: with(r.X), Fit: r}
	for i := range rows {
		o.Model = append(o.Model, rows[i].Value+r.Residuals[i]*rows[i].Sigma)
		v, err := rows[i].Model(&base, w)
		if err != nil {
			v = math.NaN()
		}
		o.Before = append(o.Before, v)
	}
	if len(rows) > 1 {
		for i, left := range fit.LeaveOut(p, r.X, fit.Settings{}) {
			o.LeaveOut = append(o.LeaveOut, rows[i].Value+left*rows[i].Sigma)
		}
	}
	return o, nil
}

// Warnings says what the data leave open.
func (o *Outcome) Warnings() []string {
	var list []string
	r := o.Fit
	for _, pair := range r.Undecided {
		list = append(list, fmt.Sprintf("the tests cannot tell %s and %s apart (correlation %.3f): fit one of them and state the other",
			o.Names[pair.A], o.Names[pair.B], r.Correlation[pair.A][pair.B]))
	}
	for _, k := range r.Loose {
		list = append(list, fmt.Sprintf("the tests hardly touch %s", o.Names[k]))
	}
	for k, on := range r.OnBound {
		if on {
			list = append(list, fmt.Sprintf("%s ended on the bound of its range: the tests want more than it can give", o.Names[k]))
		}
	}
	if len(o.Rows) <= len(o.Names) {
		list = append(list, "no more rows than factors: nothing is left to show how good the fit is")
	}
	if r.Agreeing < (r.Ended+1)/2 {
		list = append(list, fmt.Sprintf("only %d of %d starts agree: there may be a better fit", r.Agreeing, r.Ended))
	}
	return list
}
