package report

import (
	"fmt"
	"io"
	"math"

	"hotfront/studies"
	"hotfront/studies/calibration"
)

type calibrationJSON struct {
	Factors  []factorJSON  `json:"factors"`
	Rows     []testRowJSON `json:"rows"`
	Sum      float64       `json:"sum_of_squares"`
	Warnings []string      `json:"warnings"`
}

type factorJSON struct {
	Name        string             `json:"name"`
	Value       float64            `json:"value"`
	Fitted      bool               `json:"fitted"`
	Uncertainty float64            `json:"standard_uncertainty"`
	Correlation map[string]float64 `json:"correlation,omitempty"`
}

type testRowJSON struct {
	Line        int      `json:"line"`
	Settings    string   `json:"settings"`
	Quantity    string   `json:"quantity"`
	Measured    float64  `json:"measured"`
	Uncertainty float64  `json:"uncertainty"`
	Before      *float64 `json:"before"`
	Model       float64  `json:"model"`
	LeaveOut    *float64 `json:"fit_without_it"`
}

func number(v float64) *float64 {
	if math.IsNaN(v) || math.IsInf(v, 0) {
		return nil
	}
	return &v
}

// CalibrationJSON gives an outcome for JSON, SI.
func CalibrationJSON(o *calibration.Outcome) any {
	j := calibrationJSON{Sum: o.Fit.Sum, Warnings: append([]string{}, o.Warnings()...)}
	for _, f := range studies.Factors() {
		v := factorJSON{Name: f.Name, Value: *f.At(&o.Corrections)}
		for i, name := range o.Names {
			if name != f.Name {
				continue
			}
			v.Fitted, v.Correlation = true, map[string]float64{}
			if u := number(o.Fit.Uncertainty[i]); u != nil {
				v.Uncertainty = *u
			}
			for k, other := range o.Names {
				v.Correlation[other] = o.Fit.Correlation[i][k]
			}
		}
		j.Factors = append(j.Factors, v)
	}
	for i := range o.Rows {
		r := &o.Rows[i]
		row := testRowJSON{Line: r.Line, Settings: r.Label, Quantity: r.Quantity, Measured: r.Value, Uncertainty: r.Sigma,
			Before: number(o.Before[i]), Model: o.Model[i]}
		if len(o.LeaveOut) > 0 {
			row.LeaveOut = number(o.LeaveOut[i])
		}
		j.Rows = append(j.Rows, row)
	}
	return j
}

// testRows are the rows of an outcome as text.
func testRows(o *calibration.Outcome) (head []string, rows [][]string) {
	head = []string{"settings", "quantity", "measured", "uncertainty", "before", "fitted", "off by", "in uncertainties", "fit without it", "that off by"}
	off := func(v, measured float64) string {
		if measured == 0 {
			return "-"
		}
		return fmt.Sprintf("%+.1f %%", 100*(v/measured-1))
	}
	text := func(r *calibration.Row, v float64) string {
		if math.IsNaN(v) {
			return "no result"
		}
		return r.Text(v)
	}
	for i := range o.Rows {
		r := &o.Rows[i]
		row := []string{r.Label, r.Quantity, r.Text(r.Value), r.Text(r.Sigma), text(r, o.Before[i]), text(r, o.Model[i]),
			off(o.Model[i], r.Value), fmt.Sprintf("%+.1f", o.Fit.Residuals[i]), "-", "-"}
		if len(o.LeaveOut) > 0 && !math.IsNaN(o.LeaveOut[i]) {
			row[8], row[9] = text(r, o.LeaveOut[i]), off(o.LeaveOut[i], r.Value)
		}
		rows = append(rows, row)
	}
	return head, rows
}

// CalibrationCSV writes the rows of an outcome.
func CalibrationCSV(w io.Writer, o *calibration.Outcome) error {
	head, rows := testRows(o)
	return CSV(w, head, rows)
}

// CalibrationTable writes an outcome for people.
func CalibrationTable(w io.Writer, o *calibration.Outcome, s Style) error {
	factors := Table{Title: "Factors", Head: [][]string{{"factor", "value", "+-", "unit", ""}}, Left: []int{3, 4}}
	for _, f := range studies.Factors() {
		row := []string{f.Name, studies.FormatNumber(studies.FromSI(*f.At(&o.Corrections), f.Quantity, f.Unit), 4), "", unit(f.Unit), "stated"}
		for i, name := range o.Names {
			if name == f.Name {
				row[2], row[4] = studies.FormatNumber(studies.FromSI(o.Fit.Uncertainty[i], f.Quantity, f.Unit), 2), "fitted; +- is a standard uncertainty"
			}
		}
		factors.Rows = append(factors.Rows, row)
	}
	if err := factors.Write(w, s); err != nil {
		return err
	}
	for i, a := range o.Names {
		for k, b := range o.Names[:i] {
			fmt.Fprintf(w, "Correlation of %s and %s: %.2f\n", b, a, o.Fit.Correlation[i][k])
		}
	}
	fmt.Fprintln(w)
	head, rows := testRows(o)
	table := Table{Title: "Tests", Head: [][]string{head}, Rows: rows, Left: []int{1}}
	if err := table.Write(w, s); err != nil {
		return err
	}
	fmt.Fprintln(w)
	for _, text := range o.Warnings() {
		fmt.Fprintf(w, "Warning: %s.\n", text)
	}
	_, err := fmt.Fprintf(w, "Starts that agree: %d of %d. The same engine type measured in two laboratories differed by 16 %%: take no fit for finer.\n", o.Fit.Agreeing, o.Fit.Ended)
	return err
}
