package calibration

import (
	"bytes"
	"encoding/csv"
	"errors"
	"fmt"
	"io"
	"slices"
	"strings"

	"hotfront/model"
	"hotfront/studies"
)

// BestSpeed is the quantity of a row that says at which speed the brake power was largest, other settings
// held.
const BestSpeed = "speed_of_most_brake_power"

// Row is one measurement.
type Row struct {
	Line     int    // in the file of tests
	Label    string // settings as written
	Engine   model.Engine
	Quantity string // name of a result, or BestSpeed
	Value    float64
	Sigma    float64 // standard uncertainty, unit of the value
	output   *studies.Output
}

// reserved are the columns that are no input.
func reserved() []string { return []string{"quantity", "value", "uncertainty", "note"} }

// ReadTests reads rows of measurements: CSV with a head of column names. Columns quantity, value and
// uncertainty (with units, the uncertainty also in % of the value; 3 % when empty) say what was measured,
// every further column is an input of the study by its path and replaces its value where the cell is not
// empty; note is passed over. All mistakes come at once, each with its line.
func ReadTests(file string, tests []byte, studyFile string, study []byte) ([]Row, error) {
	r := csv.NewReader(bytes.NewReader(tests))
	r.Comment = '#'
	r.TrimLeadingSpace = true
	r.FieldsPerRecord = -1
	head, err := r.Read()
	if errors.Is(err, io.EOF) {
		return nil, fmt.Errorf("%s: no rows", file)
	} else if err != nil {
		return nil, fmt.Errorf("%s: %w", file, err)
	}
	var mistakes []error
	for _, name := range []string{"quantity", "value"} {
		if !slices.Contains(head, name) {
			mistakes = append(mistakes, fmt.Errorf("%s:1: no column %q", file, name))
		}
	}
	if len(mistakes) > 0 {
		return nil, errors.Join(mistakes...)
	}
	var rows []Row
	for {
		cells, err := r.Read()
		if errors.Is(err, io.EOF) {
			break
		}
		var line int
		if broken, ok := errors.AsType[*csv.ParseError](err); ok { // no field has a place then
			line, err = broken.Line, broken.Err
		} else {
			line, _ = r.FieldPos(0)
		}
		if err == nil && len(cells) != len(head) {
			err = fmt.Errorf("%d cells, the head has %d", len(cells), len(head))
		}
		if err != nil {
			mistakes = append(mistakes, fmt.Errorf("%s:%d: %w", file, line, err))
			if len(mistakes) > 50 {
				break
			}
			continue
		}
		row, err := readRow(head, cells, studyFile, study)
		if err != nil {
			mistakes = append(mistakes, fmt.Errorf("%s:%d: %w", file, line, err))
			continue
		}
		row.Line = line
		rows = append(rows, row)
	}
	if len(mistakes) == 0 && len(rows) == 0 {
		mistakes = append(mistakes, fmt.Errorf("%s: no rows", file))
	}
	return rows, errors.Join(mistakes...)
}

func readRow(head, cells []string, studyFile string, study []byte) (Row, error) {
	var row Row
	cell := map[string]string{}
	var sets, label []string
	for i, name := range head {
		text := strings.TrimSpace(cells[i])
		cell[name] = text
		if text != "" && !slices.Contains(reserved(), name) {
			sets = append(sets, name+"="+text)
			label = append(label, text)
		}
	}
	s, issues := studies.Load(studyFile, study, sets...)
	if s == nil {
		return row, issues.Mistakes()
	}
	row.Engine = s.Engine
	row.Label = strings.Join(label, ", ")
	row.Quantity = cell["quantity"]
	quantity, unit := studies.Frequency, "rpm"
	if row.Quantity != BestSpeed {
		o, ok := studies.OutputNamed(s.Outputs(), row.Quantity)
		if !ok {
			return row, fmt.Errorf("no result is called %q; `hotfront fields` lists them, and %s is known", row.Quantity, BestSpeed)
		}
		row.output = o
		quantity, unit = o.Quantity, o.Unit
	}
	var err error
	if row.Value, err = studies.ParseQuantity(cell["value"], quantity); err != nil {
		return row, fmt.Errorf("value: %w", err)
	}
	row.Sigma, err = uncertainty(cell["uncertainty"], row.Value, quantity)
	if err == nil && !(row.Sigma > 0) {
		err = fmt.Errorf("must be above zero")
	}
	if err != nil {
		return row, fmt.Errorf("uncertainty (in %% of the value or in a unit such as %s): %w", unit, err)
	}
	return row, nil
}

// usualUncertainty is taken where a row gives none, as a share of the value (common practice for tests of
// small engines, no source).
const usualUncertainty = 0.03

func uncertainty(text string, value float64, q studies.Quantity) (float64, error) {
	if text == "" {
		return usualUncertainty * max(value, -value), nil
	}
	if strings.HasSuffix(text, "%") && q != studies.Number {
		share, err := studies.ParseQuantity(text, studies.Number)
		return share * max(value, -value), err
	}
	return studies.ParseQuantity(text, q)
}

// Text writes a value of the row's quantity with its unit.
func (r *Row) Text(v float64) string {
	if r.output == nil {
		return studies.FormatSI(v, studies.Frequency, "rpm", 4) + " rpm"
	}
	unit := r.output.Unit
	if unit == "-" {
		unit = ""
	}
	return strings.TrimSpace(studies.FormatSI(v, r.output.Quantity, r.output.Unit, 4) + " " + unit)
}

// Model gives the row's quantity with corrections.
func (r *Row) Model(c *model.Corrections, w *model.Workspace) (float64, error) {
	var p model.Performance
	at := func(speed float64) (float64, error) {
		e := r.Engine
		e.Speed = speed
		model.Evaluate(&p, &e, c, w)
		if p.Cause != model.None {
			return 0, p.Cause
		}
		if r.output == nil {
			return p.BrakePower, nil
		}
		return r.output.Get(&p), nil
	}
	if r.output != nil {
		return at(r.Engine.Speed)
	}
	return bestSpeed(r.Value, at)
}

// bestSpeed is the vertex of the parabola through the power at the speed stated and 20 % beside it. Where
// the power bends upward or hardly at all the vertex says nothing; the bend is then taken as that of a power
// which falls by a fiftieth at those 20 %, so that the answer still points to where the power rises.
func bestSpeed(stated float64, power func(speed float64) (float64, error)) (float64, error) {
	const h = 0.2
	low, err1 := power((1 - h) * stated)
	mid, err2 := power(stated)
	high, err3 := power((1 + h) * stated)
	if err := errors.Join(err1, err2, err3); err != nil {
		return 0, err
	}
	slope := (high - low) / (2 * h)
	bend := (high - 2*mid + low) / (h * h)
	bend = min(bend, -abs(mid))
	return stated * (1 - slope/bend), nil
}

func abs(v float64) float64 { return max(v, -v) }
