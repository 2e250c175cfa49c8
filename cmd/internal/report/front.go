package report

import (
	"fmt"
	"io"
	"math"
	"slices"
	"strconv"
	"strings"

	"hotfront/model"
	"hotfront/optimize"
	"hotfront/optimize/pareto"
	"hotfront/studies"
)

// Front is the front of a run.
type Front struct {
	Problem     *studies.Problem
	Evaluations int
	Hypervolume float64
	Points      []optimize.Point // ascending by aims
	Seq         []int
	History     []optimize.HistoryRow
	Failures    []optimize.CauseCount // largest first

	// While no design meets all limits: the one that comes nearest, nil when every design failed, and how
	// near any design comes to each limit.
	Nearest    *optimize.Point
	NearestSeq int
	Reach      []Reach
}

// Reach says how near the designs of a run come to one limit.
type Reach struct {
	Met    int                 // designs that meet it
	Result studies.LimitResult // of the design with the most room, or the least miss
	Seq    int                 // number of that design
}

// ID names a design of a run by the number it was tried at.
func ID(seq int) string { return fmt.Sprintf("d%06d", seq) }

// SeqOf is the number of a design by its name, the inverse of ID.
func SeqOf(id string) (int, bool) {
	digits, ok := strings.CutPrefix(id, "d")
	seq, err := strconv.ParseUint(digits, 10, 62)
	return int(seq), ok && err == nil
}

// Pick gives the k members that together dominate most, in the order of the front; all for k <= 0. Members
// beyond the reference point dominate nothing there: they fill what is left, spread over the front.
func (f *Front) Pick(k int) []int {
	all := make([]int, len(f.Points))
	aims := make([][]float64, len(f.Points))
	for i := range f.Points {
		all[i], aims[i] = i, f.Points[i].F
	}
	if k <= 0 || k >= len(all) {
		return all
	}
	picked := pareto.Choose(aims, f.Problem.Reference(), k)
	if missing := k - len(picked); missing > 0 {
		rest := slices.DeleteFunc(all, func(i int) bool { return slices.Contains(picked, i) })
		for j := range missing {
			picked = append(picked, rest[j*len(rest)/missing])
		}
	}
	slices.Sort(picked)
	return picked
}

// HypervolumeText gives the hypervolume in the units of the tables.
func HypervolumeText(p *studies.Problem, v float64) string {
	s := p.Study()
	var units []string
	for _, a := range s.Aims {
		o, _ := studies.OutputNamed(s.Outputs(), a.Name)
		v *= studies.FromSI(1, o.Quantity, o.Unit) - studies.FromSI(0, o.Quantity, o.Unit)
		units = append(units, o.Unit)
	}
	return fmt.Sprintf("%.5g %s", v, strings.Join(units, " x "))
}

type frontJSON struct {
	Study       string            `json:"study"`
	Seed        uint64            `json:"seed"`
	Version     string            `json:"model_version"`
	Evaluations int               `json:"evaluations"`
	Hypervolume float64           `json:"hypervolume"`
	Aims        []string          `json:"aims"`
	Corrections map[string]any    `json:"corrections"`
	History     []historyJSON     `json:"history"`
	Designs     []frontDesignJSON `json:"designs"`
}

type historyJSON struct {
	Evaluations int     `json:"evaluations"`
	Feasible    int     `json:"feasible"`
	Front       int     `json:"front"`
	Hypervolume float64 `json:"hypervolume"`
}

type frontDesignJSON struct {
	ID          string             `json:"id"`
	Design      map[string]any     `json:"design"`
	Performance map[string]float64 `json:"performance"`
	Losses      map[string]float64 `json:"losses"`
	Limits      []LimitJSON        `json:"limits"`
}

// Growth says how the hypervolume grew over the run: its share of the last value at each fifth.
func (f *Front) Growth() string {
	var parts []string
	for i := 1; i <= 5; i++ {
		k := i*len(f.History)/5 - 1
		if k < 0 || f.Hypervolume <= 0 {
			continue
		}
		parts = append(parts, fmt.Sprintf("%.1f %% at %d", 100*f.History[k].Hypervolume/f.Hypervolume, f.History[k].Evaluations))
	}
	return strings.Join(parts, ", ")
}

// JSON writes the members picked, SI.
func (f *Front) JSON(w io.Writer, picked []int, version string) error {
	s := f.Problem.Study()
	j := frontJSON{Study: s.Name, Seed: s.Seed, Version: version, Evaluations: f.Evaluations, Hypervolume: f.Hypervolume,
		Aims: []string{}, Corrections: corrections(s), History: []historyJSON{}, Designs: []frontDesignJSON{}}
	for _, h := range f.History {
		j.History = append(j.History, historyJSON(h))
	}
	for _, a := range s.Aims {
		j.Aims = append(j.Aims, a.Text())
	}
	for _, i := range picked {
		e, p := f.at(i)
		performance, losses := Results(s, &p)
		j.Designs = append(j.Designs, frontDesignJSON{
			ID: ID(f.Seq[i]), Design: Inputs(s, &e), Performance: performance, Losses: losses, Limits: Limits(s, &e, &p),
		})
	}
	return JSON(w, j)
}

func (f *Front) at(i int) (model.Engine, model.Performance) {
	s := f.Problem.Study()
	return s.EngineAt(f.Points[i].X), f.Problem.PerformanceOf(f.Points[i].Extra)
}

// CSV writes the members picked: id, free variables to the digits that make the design again, results and
// formulas of limits; units in the head.
func (f *Front) CSV(w io.Writer, picked []int) error {
	s := f.Problem.Study()
	outputs := s.Outputs()
	head := []string{"id"}
	for i := range s.Free {
		field, _ := studies.FieldNamed(s.Fields(), s.Free[i].Path)
		head = append(head, headed(field.Path, field.Unit))
	}
	for i := range outputs {
		head = append(head, headed(outputs[i].Name, outputs[i].Unit))
	}
	for i := range s.Limits {
		if l := &s.Limits[i]; l.Expr != "" {
			head = append(head, headed(l.Name, l.Unit))
		}
	}
	var rows [][]string
	for _, k := range picked {
		e, p := f.at(k)
		row := []string{ID(f.Seq[k])}
		for i := range s.Free {
			field, _ := studies.FieldNamed(s.Fields(), s.Free[i].Path)
			row = append(row, exact(field, &e))
		}
		for i := range outputs {
			o := &outputs[i]
			row = append(row, resultCSV(studies.FromSI(o.Get(&p), o.Quantity, o.Unit)))
		}
		for i := range s.Limits {
			l := &s.Limits[i]
			switch v := l.Value(&e, &p); {
			case l.Expr == "":
			case l.Unit == "":
				row = append(row, resultCSV(v))
			default:
				row = append(row, resultCSV(studies.FromSI(v, l.Quantity, l.Unit)))
			}
		}
		rows = append(rows, row)
	}
	return CSV(w, head, rows)
}

// resultCSV writes a result to more digits than it is worth, so that rounding adds nothing to a plot.
func resultCSV(v float64) string { return strconv.FormatFloat(v, 'g', 6, 64) }

func exact(field *studies.Field, e *model.Engine) string {
	if field.Kind == studies.Real {
		return strconv.FormatFloat(studies.FromSI(field.Get(e), field.Quantity, field.Unit), 'g', 10, 64)
	}
	return field.Format(field.Get(e))
}

func headed(name, unitName string) string {
	if u := unit(unitName); u != "" {
		return name + " [" + u + "]"
	}
	return name
}

// Report writes the members picked for people, with what pressed the front.
func (f *Front) Report(w io.Writer, picked []int, style Style, version string) error {
	s := f.Problem.Study()
	fmt.Fprintf(w, "%s: %s on the front of %d tried, seed %d; %d shown. Hypervolume %s.\n\n",
		s.Name, counted(len(f.Points), "design"), f.Evaluations, s.Seed, len(picked), HypervolumeText(f.Problem, f.Hypervolume))
	if err := f.Table(w, picked, style); err != nil {
		return err
	}
	fmt.Fprintln(w)
	if growth := f.Growth(); growth != "" {
		fmt.Fprintf(w, "Hypervolume over the run: %s designs.\n", growth)
	}
	f.Press(w)
	f.Beale(w)
	_, err := fmt.Fprintf(w, "%s Model version %s.\n%s\n", correctionsText(s), version, Caution)
	return err
}

// Table writes the members picked for people: what they give and what presses on them, then what they are.
func (f *Front) Table(w io.Writer, picked []int, style Style) error {
	s := f.Problem.Study()
	if err := f.gains(w, picked, style); err != nil {
		return err
	}
	fmt.Fprintln(w)
	table := Table{Title: "What they are"}
	names, units := []string{"design"}, []string{""}
	for i := range s.Free {
		field, _ := studies.FieldNamed(s.Fields(), s.Free[i].Path)
		names, units = append(names, field.Path), append(units, unit(field.Unit))
		if field.Kind == studies.Choice {
			table.Left = append(table.Left, i+1)
		}
	}
	table.Head = headings(names, units)
	for _, k := range picked {
		e, _ := f.at(k)
		row := []string{ID(f.Seq[k])}
		for i := range s.Free {
			field, _ := studies.FieldNamed(s.Fields(), s.Free[i].Path)
			row = append(row, field.Format(field.Get(&e)))
		}
		table.Rows = append(table.Rows, row)
	}
	return table.Write(w, style)
}

// shownResults are the results that a front's table shows after the aims, where they are not aims themselves.
func shownResults() []string {
	return []string{"brake_power", "brake_efficiency", "pressure_max", "heater.metal_temperature", "heater.heat_flux",
		"flow_loss", "losses.reheat", "regenerator.effectiveness"}
}

func (f *Front) gains(w io.Writer, picked []int, style Style) error {
	s := f.Problem.Study()
	outputs := s.Outputs()
	var shown []*studies.Output
	add := func(name string) {
		if o, ok := studies.OutputNamed(outputs, name); ok && !slices.Contains(shown, o) {
			shown = append(shown, o)
		}
	}
	for _, a := range s.Aims {
		add(a.Name)
	}
	for _, name := range shownResults() {
		add(name)
	}
	table := Table{Title: "What they give"}
	names, units := []string{"design"}, []string{""}
	for _, o := range shown {
		names, units = append(names, o.Name), append(units, unit(o.Unit))
	}
	if len(s.Limits) > 0 {
		names, units = append(names, "nearest limit"), append(units, "")
		table.Left = []int{len(shown) + 1}
	}
	table.Head = headings(names, units)
	for _, k := range picked {
		e, p := f.at(k)
		row := []string{ID(f.Seq[k])}
		for _, o := range shown {
			row = append(row, resultText(o, &p))
		}
		if len(s.Limits) > 0 {
			row = append(row, nearest(s, &e, &p))
		}
		table.Rows = append(table.Rows, row)
	}
	return table.Write(w, style)
}

// nearest names the limit with the least room, as a share of its bound, of 100 K for a temperature.
func nearest(s *studies.Study, e *model.Engine, p *model.Performance) string {
	text, least := "-", math.Inf(1)
	for i, r := range s.LimitResults(e, p) {
		l := &s.Limits[i]
		scale := math.Abs(r.Bound)
		if l.Quantity == studies.Temperature {
			scale = 100
		}
		if scale == 0 || r.Margin/scale >= least {
			continue
		}
		least = r.Margin / scale
		text = r.Name + ", " + room(l, r.Margin)
	}
	return text
}

// room says how much is left to a bound, in the limit's unit.
func room(l *studies.Limit, margin float64) string {
	if l.Quantity == studies.Temperature {
		return fmt.Sprintf("%.0f K left", margin)
	}
	return strings.TrimSpace(studies.FormatSI(margin, l.Quantity, l.Unit, 2)+" "+unit(l.Unit)) + " left"
}
