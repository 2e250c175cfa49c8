package report

import (
	"fmt"
	"io"
	"math"

	"hotfront/model"
	"hotfront/studies"
)

// Polish is a design before and after it was polished.
type Polish struct {
	Study       *studies.Study
	Evaluations int
	Improved    bool
	Before      Polished
	After       Polished
}

// Polished is one of the two, worked out.
type Polished struct {
	Engine      model.Engine
	Performance model.Performance
}

type polishJSON struct {
	Study       string             `json:"study"`
	Version     string             `json:"model_version"`
	Evaluations int                `json:"evaluations"`
	Improved    bool               `json:"improved"`
	Aims        []string           `json:"aims"`
	Before      polishedDesignJSON `json:"before"`
	After       polishedDesignJSON `json:"after"`
	Corrections map[string]any     `json:"corrections"`
}

type polishedDesignJSON struct {
	Design      map[string]any     `json:"design"`
	Performance map[string]float64 `json:"performance"`
	Losses      map[string]float64 `json:"losses"`
	Limits      []LimitJSON        `json:"limits"`
}

// JSON writes both designs, SI.
func (p *Polish) JSON(w io.Writer) error {
	j := polishJSON{Study: p.Study.Name, Version: model.Version, Evaluations: p.Evaluations, Improved: p.Improved, Aims: []string{},
		Before: p.json(&p.Before), After: p.json(&p.After), Corrections: corrections(p.Study)}
	for _, a := range p.Study.Aims {
		j.Aims = append(j.Aims, a.Text())
	}
	return JSON(w, j)
}

func (p *Polish) json(d *Polished) polishedDesignJSON {
	performance, losses := Results(p.Study, &d.Performance)
	return polishedDesignJSON{Inputs(p.Study, &d.Engine), performance, losses, Limits(p.Study, &d.Engine, &d.Performance)}
}

// CSV writes what the table shows with more digits, each on a line of its own.
func (p *Polish) CSV(w io.Writer) error {
	var rows [][]string
	for _, a := range p.Study.Aims {
		if o, ok := studies.OutputNamed(p.Study.Outputs(), a.Name); ok {
			rows = append(rows, []string{"aim", a.Name, digits(o, o.Get(&p.Before.Performance)), digits(o, o.Get(&p.After.Performance)), unit(o.Unit)})
		}
	}
	for i := range p.Study.Free {
		f, _ := studies.FieldNamed(p.Study.Fields(), p.Study.Free[i].Path)
		rows = append(rows, []string{"design", f.Path, exact(f, &p.Before.Engine), exact(f, &p.After.Engine), unit(f.Unit)})
	}
	after := p.Study.LimitResults(&p.After.Engine, &p.After.Performance)
	for i, b := range p.Study.LimitResults(&p.Before.Engine, &p.Before.Performance) {
		l := &p.Study.Limits[i]
		rows = append(rows, []string{"limit", b.Name, l.Format(b.Value), l.Format(after[i].Value), unit(l.Unit)})
	}
	return CSV(w, []string{"kind", "name", "before", "after", "unit"}, rows)
}

func digits(o *studies.Output, v float64) string {
	return studies.FormatSI(v, o.Quantity, o.Unit, 10)
}

// Feasible says whether the result meets all limits.
func (p *Polish) Feasible() bool { return p.meets(&p.After) }

func (p *Polish) meets(d *Polished) bool {
	for _, r := range p.Study.LimitResults(&d.Engine, &d.Performance) {
		if !r.Met {
			return false
		}
	}
	return true
}

// outcome says in words what polishing has done.
func (p *Polish) outcome() string {
	switch {
	case !p.Improved:
		return "no better one found: the design stays as it is"
	case !p.Feasible():
		return "one found that is nearer to its limits, none that meets them"
	case !p.meets(&p.Before):
		return "one found that meets all limits, as the design did not"
	}
	return "a better one found"
}

// Table writes what has changed for people.
func (p *Polish) Table(w io.Writer, s Style) error {
	if _, err := fmt.Fprintf(w, "%s: %d designs tried, %s.\n\n", p.Study.Name, p.Evaluations, p.outcome()); err != nil {
		return err
	}
	aims := Table{Title: "Aims", Head: [][]string{{"aim", "before", "after", "change", "unit"}}, Left: []int{4}}
	for _, a := range p.Study.Aims {
		o, ok := studies.OutputNamed(p.Study.Outputs(), a.Name)
		if !ok {
			continue
		}
		before, after := o.Get(&p.Before.Performance), o.Get(&p.After.Performance)
		change := ""
		if before != 0 {
			change = fmt.Sprintf("%+.2f %%", 100*(after-before)/math.Abs(before))
		}
		format := func(v float64) string { return studies.FormatSI(v, o.Quantity, o.Unit, 4) }
		aims.Rows = append(aims.Rows, []string{a.Text(), format(before), format(after), change, unit(o.Unit)})
	}
	design := Table{Title: "\nDesign", Head: [][]string{{"variable", "before", "after", "unit"}}, Left: []int{3}}
	for i := range p.Study.Free {
		f, _ := studies.FieldNamed(p.Study.Fields(), p.Study.Free[i].Path)
		design.Rows = append(design.Rows, []string{f.Path, f.Format(f.Get(&p.Before.Engine)), f.Format(f.Get(&p.After.Engine)), unit(f.Unit)})
	}
	limits := Table{Title: "\nLimits", Head: [][]string{{"limit", "before", "after", "unit", "bound", ""}}, Left: []int{3, 4, 5}}
	after := p.Study.LimitResults(&p.After.Engine, &p.After.Performance)
	for i, b := range p.Study.LimitResults(&p.Before.Engine, &p.Before.Performance) {
		l := &p.Study.Limits[i]
		met := "met"
		if !after[i].Met {
			met = "NOT MET"
		}
		limits.Rows = append(limits.Rows, []string{b.Name, l.Format(b.Value), l.Format(after[i].Value), unit(l.Unit), l.BoundText(), met})
	}
	for _, t := range []*Table{&aims, &design, &limits} {
		if len(t.Rows) == 0 {
			continue
		}
		if err := t.Write(w, s); err != nil {
			return err
		}
	}
	_, err := fmt.Fprintf(w, "\n%s Model version %s.\n%s\n", correctionsText(p.Study), model.Version, Caution)
	return err
}
