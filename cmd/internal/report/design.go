package report

import (
	"cmp"
	"fmt"
	"io"
	"math"
	"slices"
	"strconv"
	"strings"

	"hotfront/model"
	"hotfront/studies"
)

// Design is one evaluated design.
type Design struct {
	Study       *studies.Study
	Engine      model.Engine
	Performance model.Performance
	SecondLaw   *model.SecondLaw // may be nil
	Heater      []model.HeaterCell
	Turn        []model.TurnSample
}

// DesignJSON is a Design as JSON holds it: SI, names as `hotfront fields` lists them.
type DesignJSON struct {
	Study       string             `json:"study"`
	Version     string             `json:"model_version"`
	Cause       string             `json:"cause,omitempty"`
	Design      map[string]any     `json:"design"`
	Performance map[string]float64 `json:"performance,omitempty"`
	Losses      map[string]float64 `json:"losses,omitempty"`
	LostWork    map[string]float64 `json:"lost_work,omitempty"`
	Heater      []heaterJSON       `json:"heater_along,omitempty"`
	Turn        []turnJSON         `json:"over_turn,omitempty"`
	Limits      []LimitJSON        `json:"limits,omitempty"`
	Corrections map[string]any     `json:"corrections"`
	Warnings    []string           `json:"warnings"`
}

type heaterJSON struct {
	Position float64 `json:"position"`
	Outer    float64 `json:"outer_temperature"`
	Hottest  float64 `json:"hottest_temperature"`
	Inner    float64 `json:"inner_temperature"`
	Gas      float64 `json:"gas_temperature"`
	Flux     float64 `json:"heat_flux"`
}

type turnJSON struct {
	Angle             float64 `json:"crank_angle"`
	Pressure          float64 `json:"pressure"`
	ExpansionVolume   float64 `json:"expansion_volume"`
	CompressionVolume float64 `json:"compression_volume"`
	HotForce          float64 `json:"hot_force"`
	ColdForce         float64 `json:"cold_force"`
	Torque            float64 `json:"torque"`
}

// LimitJSON is one limit, SI.
type LimitJSON struct {
	Name   string  `json:"name"`
	Value  float64 `json:"value"`
	Bound  float64 `json:"bound"`
	Margin float64 `json:"margin"`
	Met    bool    `json:"met"`
}

// JSON gives the design for JSON.
func (d *Design) JSON() DesignJSON {
	j := DesignJSON{
		Study: d.Study.Name, Version: model.Version,
		Design:      Inputs(d.Study, &d.Engine),
		Corrections: corrections(d.Study),
		Warnings:    []string{},
	}
	if d.Performance.Cause != model.None {
		j.Cause = d.Performance.Cause.String()
		return j
	}
	j.Performance, j.Losses = Results(d.Study, &d.Performance)
	j.LostWork = d.lostWork()
	for _, c := range d.Heater {
		j.Heater = append(j.Heater, heaterJSON(c))
	}
	for _, c := range d.Turn {
		j.Turn = append(j.Turn, turnJSON(c))
	}
	j.Limits = Limits(d.Study, &d.Engine, &d.Performance)
	j.Warnings = append(j.Warnings, d.Performance.Warnings.Texts()...)
	return j
}

func corrections(s *studies.Study) map[string]any {
	c := &s.Corrections
	return map[string]any{
		"set": s.CorrectionsName(), "flow_friction": c.FlowFriction, "cycle_work": c.CycleWork,
		"drive_effectiveness": c.Effectiveness, "seal_friction": c.SealFriction,
	}
}

func correctionsText(s *studies.Study) string {
	c := &s.Corrections
	return fmt.Sprintf("Corrections %s: flow friction x %.3g, cycle work x %.3g, drive effectiveness %.3g, seal friction %.3g bar.",
		s.CorrectionsName(), c.FlowFriction, c.CycleWork, c.Effectiveness, c.SealFriction/1e5)
}

// Inputs lists the inputs that say a design: numbers in SI, choices by name.
func Inputs(s *studies.Study, e *model.Engine) map[string]any {
	m := map[string]any{}
	for _, v := range s.Design(e) {
		switch v.Field.Kind {
		case studies.Choice:
			m[v.Field.Path] = v.Field.Choices[int(v.SI)]
		case studies.Whole:
			m[v.Field.Path] = int(v.SI)
		default:
			m[v.Field.Path] = v.SI
		}
	}
	return m
}

// Results splits the results into performance and losses, SI.
func Results(s *studies.Study, p *model.Performance) (performance, losses map[string]float64) {
	performance, losses = map[string]float64{}, map[string]float64{}
	outputs := s.Outputs()
	for i := range outputs {
		o := &outputs[i]
		if name, ok := strings.CutPrefix(o.Name, studies.LossPrefix); ok {
			losses[name] = o.Get(p)
		} else {
			performance[o.Name] = o.Get(p)
		}
	}
	return performance, losses
}

// Limits says how the limits stand.
func Limits(s *studies.Study, e *model.Engine, p *model.Performance) []LimitJSON {
	list := []LimitJSON{}
	for _, r := range s.LimitResults(e, p) {
		list = append(list, LimitJSON(r))
	}
	return list
}

// CSV writes every input and result on a line of its own.
func (d *Design) CSV(w io.Writer) error {
	var rows [][]string
	for _, v := range d.Study.Design(&d.Engine) {
		rows = append(rows, []string{"design", v.Field.Path, exact(v.Field, &d.Engine), unit(v.Field.Unit)})
	}
	if d.Performance.Cause != model.None {
		rows = append(rows, []string{"cause", "", d.Performance.Cause.String(), ""})
		return CSV(w, []string{"part", "name", "value", "unit"}, rows)
	}
	outputs := d.Study.Outputs()
	for i := range outputs {
		o := &outputs[i]
		part, name := "performance", o.Name
		if short, ok := strings.CutPrefix(o.Name, studies.LossPrefix); ok {
			part, name = "losses", short
		}
		rows = append(rows, []string{part, name, resultCSV(studies.FromSI(o.Get(&d.Performance), o.Quantity, o.Unit)), unit(o.Unit)})
	}
	for i, r := range d.Study.LimitResults(&d.Engine, &d.Performance) {
		l := &d.Study.Limits[i]
		met := "yes"
		if !r.Met {
			met = "no"
		}
		rows = append(rows, []string{"limits", r.Name, l.Format(r.Value), unit(l.Unit)}, []string{"met", r.Name, met, ""})
	}
	return CSV(w, []string{"part", "name", "value", "unit"}, rows)
}

// resultText writes a result to three digits, whole numbers too: no power or life is known to more.
func resultText(o *studies.Output, p *model.Performance) string {
	v := o.Get(p)
	if o.Quantity == studies.Temperature {
		return o.Format(v)
	}
	in := studies.FromSI(v, o.Quantity, o.Unit)
	if a := math.Abs(in); a < 1000 || a >= 1e9 {
		return o.Format(v)
	}
	step := math.Pow(10, math.Floor(math.Log10(math.Abs(in)))-2)
	return strconv.FormatFloat(math.Round(in/step)*step, 'f', 0, 64)
}

func unit(name string) string {
	if name == "-" {
		return ""
	}
	return name
}

// Table writes the design for people.
func (d *Design) Table(w io.Writer, s Style) error {
	p := &d.Performance
	fmt.Fprintf(w, "%s\n", d.Study.Name)
	if d.Study.About != "" {
		fmt.Fprintf(w, "%s\n", d.Study.About)
	}
	fmt.Fprintf(w, "\n")
	if p.Cause != model.None {
		_, err := fmt.Fprintf(w, "No result: %s.\n", p.Cause)
		return err
	}
	outputs := d.Study.Outputs()
	table := Table{Title: "Performance", Head: [][]string{{"result", "value", "unit", "meaning"}}, Left: []int{2, 3}, Wrap: []int{3}, Spare: 3}
	for i, group := range grouped(outputs) {
		if i > 0 {
			table.Rows = append(table.Rows, []string{"", "", "", ""})
		}
		for _, o := range group {
			table.Rows = append(table.Rows, []string{o.Name, resultText(o, p), unit(o.Unit), o.Text})
		}
	}
	if err := table.Write(w, s.Listing()); err != nil {
		return err
	}
	fmt.Fprintln(w)
	if err := d.ledger(w, s); err != nil {
		return err
	}
	fmt.Fprintln(w)
	if d.SecondLaw != nil {
		if err := d.secondLaw(w, s); err != nil {
			return err
		}
		fmt.Fprintln(w)
	}
	if err := d.heater(w, s); err != nil {
		return err
	}
	if err := d.turn(w, s); err != nil {
		return err
	}
	if err := d.limits(w, s); err != nil {
		return err
	}
	for _, text := range p.Warnings.Texts() {
		fmt.Fprintf(w, "Warning: %s.\n", text)
	}
	_, err := fmt.Fprintf(w, "%s Model version %s.\n%s\n", correctionsText(d.Study), model.Version, Caution)
	return err
}

// grouped puts the results that are no losses in groups: power and heat, gas, machine, then each part by
// the first word of its name.
func grouped(outputs []studies.Output) [][]*studies.Output {
	var groups [][]*studies.Output
	at := map[string]int{}
	general := "power"
	for i := range outputs {
		o := &outputs[i]
		if strings.HasPrefix(o.Name, studies.LossPrefix) || o.Name == "energy_residual" {
			continue
		}
		part, _, ok := strings.Cut(o.Name, ".")
		if !ok {
			switch o.Name {
			case "pressure_mean":
				general = "gas"
			case "swept_volume":
				general = "machine"
			case "fuel_power", "solar_efficiency":
				general = "source"
			}
			part = general
		} else {
			switch part {
			case "coolant":
				part = "cooler"
			case "burner", "receiver":
				part = "source"
			}
		}
		k, known := at[part]
		if !known {
			k = len(groups)
			at[part] = k
			groups = append(groups, nil)
		}
		groups[k] = append(groups[k], o)
	}
	return groups
}

// ledger prints where the heat goes.
func (d *Design) ledger(w io.Writer, s Style) error {
	p := &d.Performance
	share := func(v float64) string { return fmt.Sprintf("%.1f", math.Round(1000*v/p.HeatIn)/10+0) }
	watts := func(v float64) string { return fmt.Sprintf("%.0f", math.Round(v)+0) }
	table := Table{Title: "Where the heat goes", Head: [][]string{{"entry", "W", "% of heat in", "what and whereto"}}, Left: []int{3}, Wrap: []int{3}, Spare: 3}
	add := func(name string, v float64, text string) {
		table.Rows = append(table.Rows, []string{name, watts(v), share(v), text})
	}
	d.sourceRows(add)
	add("heat in", p.HeatIn, "at the hot end")
	add("shaft work", p.BrakePower, "")
	add("coolant", p.CoolantHeat, "")
	add("surroundings", p.Losses.Drive+p.Losses.SealFriction, "from drive and seals")
	add("rest", p.EnergyResidual*p.HeatIn, "what the solution leaves unbalanced")
	table.Rows = append(table.Rows, []string{"losses, within these:", "", "", ""})
	outputs := d.Study.Outputs()
	for i := range outputs {
		o := &outputs[i]
		if name, ok := strings.CutPrefix(o.Name, studies.LossPrefix); ok {
			add("  "+name, o.Get(p), o.Text)
		}
	}
	return table.Write(w, s.Listing())
}

// sourceRows adds where the heat of burner or receiver goes before it reaches the engine.
func (d *Design) sourceRows(add func(name string, v float64, text string)) {
	p := &d.Performance
	switch d.Engine.Heat.Kind {
	case model.HeatBurner:
		add("fuel", p.FuelPower, "lower heating value")
		add("  chimney", p.Burner.Chimney, "with the flue gas")
		add("  burner casing", p.Burner.Casing, "to the surroundings")
	case model.HeatReceiver:
		r := &p.Receiver
		add("radiation", d.Engine.Heat.Receiver.Power, "into the aperture")
		add("  window", r.WindowLoss, "reflected or absorbed")
		add("  reflection", r.Reflection, "by the wall, out of the aperture")
		add("  re-radiation", r.Reradiation, "by the hot wall, out of the aperture")
		add("  convection", r.Convection, "out of the aperture")
		add("  receiver casing", r.Casing, "to the surroundings")
	}
}

// lostWork is the work that each part costs [W].
func (d *Design) lostWork() map[string]float64 {
	if d.SecondLaw == nil {
		return nil
	}
	m := map[string]float64{}
	for _, item := range d.SecondLaw.Items() {
		m[item.Name] = item.Made * d.Engine.Coolant.Inlet
	}
	return m
}

// secondLaw prints where work is lost, most first.
func (d *Design) secondLaw(w io.Writer, s Style) error {
	items := d.SecondLaw.Items()
	sorted := items[:]
	slices.SortStableFunc(sorted, func(a, b model.SecondLawItem) int { return cmp.Compare(b.Made, a.Made) })
	table := Table{Title: "Where work is lost, by the entropy made", Head: [][]string{{"part", "W", "% of what the heat could give"}}}
	could := d.SecondLaw.LostWork + d.Performance.BrakePower
	for _, item := range sorted {
		lost := item.Made * d.Engine.Coolant.Inlet
		table.Rows = append(table.Rows, []string{item.Name, fmt.Sprintf("%.0f", lost), fmt.Sprintf("%.1f", 100*lost/could)})
	}
	table.Rows = append(table.Rows, []string{"shaft work", fmt.Sprintf("%.0f", d.Performance.BrakePower), fmt.Sprintf("%.1f", 100*d.Performance.BrakePower/could)})
	return table.Write(w, s.Listing())
}

// heater prints the heater along its tubes.
func (d *Design) heater(w io.Writer, s Style) error {
	if len(d.Heater) == 0 {
		return nil
	}
	table := Table{Title: "Heater along the tubes, from the expansion space, time means", Head: [][]string{
		{"place", "outer wall", "at the flux peak", "inner wall", "gas", "flux"}, {"mm", "degC", "degC", "degC", "degC", "W/cm2"}}}
	for _, c := range d.Heater {
		row := []string{fmt.Sprintf("%.0f", 1e3*c.Position)}
		for _, t := range []float64{c.Outer, c.Hottest, c.Inner, c.Gas} {
			row = append(row, studies.FormatSI(t, studies.Temperature, "degC", 3))
		}
		table.Rows = append(table.Rows, append(row, fmt.Sprintf("%.3g", c.Flux/1e4)))
	}
	if err := table.Write(w, Style{Ruled: s.Ruled}); err != nil {
		return err
	}
	_, err := fmt.Fprintln(w)
	return err
}

// turn prints pressure, forces and torque over a turn, every other step.
func (d *Design) turn(w io.Writer, s Style) error {
	if len(d.Turn) == 0 {
		return nil
	}
	cold := "piston"
	switch d.Engine.Layout {
	case model.Alpha:
		cold = "compression piston"
	case model.DoubleActing:
		cold = ""
	}
	hot := map[model.Layout]string{model.Alpha: "expansion piston", model.Beta: "displacer", model.Gamma: "displacer", model.DoubleActing: "piston"}[d.Engine.Layout]
	table := Table{Title: "Over a turn: gas forces upwards, torque with inertia", Head: [][]string{
		{"crank angle", "pressure", hot, "torque"}, {"deg", "bar", "kN", "N m"}}}
	if cold != "" {
		table.Head = [][]string{{"crank angle", "pressure", hot, cold, "torque"}, {"deg", "bar", "kN", "kN", "N m"}}
	}
	for i := 1; i < len(d.Turn); i += 2 {
		c := &d.Turn[i]
		row := []string{fmt.Sprintf("%.0f", c.Angle*180/math.Pi), fmt.Sprintf("%.1f", c.Pressure/1e5), fmt.Sprintf("%.2f", c.HotForce/1e3)}
		if cold != "" {
			row = append(row, fmt.Sprintf("%.2f", c.ColdForce/1e3))
		}
		table.Rows = append(table.Rows, append(row, fmt.Sprintf("%.0f", math.Round(c.Torque)+0)))
	}
	if err := table.Write(w, Style{Ruled: s.Ruled}); err != nil {
		return err
	}
	_, err := fmt.Fprintln(w)
	return err
}

func (d *Design) limits(w io.Writer, s Style) error {
	if len(d.Study.Limits) == 0 {
		return nil
	}
	table := Table{Title: "Limits", Head: [][]string{{"limit", "value", "bound", "margin", "", ""}}, Left: []int{2, 4, 5}, Wrap: []int{5}, Spare: 5}
	for i, r := range d.Study.LimitResults(&d.Engine, &d.Performance) {
		l := &d.Study.Limits[i]
		met := "met"
		if !r.Met {
			met = "NOT MET"
		}
		margin := "-"
		switch {
		case l.Quantity == studies.Temperature: // a share of a reading means nothing
			margin = fmt.Sprintf("%.0f K", r.Margin)
		case r.Bound != 0:
			margin = fmt.Sprintf("%.1f %%", 100*r.Margin/math.Abs(r.Bound))
		}
		table.Rows = append(table.Rows, []string{r.Name, l.Format(r.Value), l.BoundText(), margin, met, l.Expr})
	}
	if err := table.Write(w, s.Listing()); err != nil {
		return err
	}
	_, err := fmt.Fprintln(w)
	return err
}
