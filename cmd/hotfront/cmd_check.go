package main

import (
	"errors"
	"fmt"

	"github.com/spf13/cobra"

	"hotfront/cmd/internal/report"
	"hotfront/model"
	"hotfront/studies"
)

type checkOptions struct {
	format format
	sets   []string
}

func (p *program) checkCommand() *cobra.Command {
	var o checkOptions
	c := &cobra.Command{
		Use:   "check STUDY",
		Short: "Says every mistake of a study, or what it asks for",
		Example: `  hotfront check studies/examples/kiln-waste-heat.yaml
  hotfront check my-engine.yaml --set speed=1200rpm --format json`,
		Args: arguments("STUDY"),
		RunE: func(_ *cobra.Command, args []string) error { return p.check(args[0], &o) },
	}
	o.format.add(c)
	c.Flags().StringArrayVar(&o.sets, "set", nil, "path=value instead of the study's; may be given often")
	return c
}

type checkJSON struct {
	Valid       bool           `json:"valid"`
	Issues      []issueJSON    `json:"issues"`
	Study       string         `json:"study"`
	About       string         `json:"about"`
	Design      map[string]any `json:"design"`
	Free        []namedText    `json:"free"`
	Limits      []namedText    `json:"limits"`
	Aims        []string       `json:"aims"`
	Evaluations int            `json:"evaluations"`
	Seed        uint64         `json:"seed"`
	Corrections string         `json:"corrections"`
	Version     string         `json:"model_version"`
}

// issueJSON is a mistake or a warning.
type issueJSON struct {
	Code    string `json:"code"`
	Warning bool   `json:"warning"`
	File    string `json:"file"`
	Line    int    `json:"line"` // 0 when it belongs to no line
	Column  int    `json:"column"`
	Key     string `json:"key"`
	Text    string `json:"text"`
	Hint    string `json:"hint"`
}

// mistakesJSON is what JSON holds of a study that is not valid.
type mistakesJSON struct {
	Valid  bool        `json:"valid"`
	Issues []issueJSON `json:"issues"`
}

func issueList(issues studies.Issues) []issueJSON {
	list := make([]issueJSON, len(issues))
	for k, i := range issues {
		list[k] = issueJSON{string(i.Code), i.Code.Warning(), i.File, i.Line, i.Column, i.Path, i.Text, i.Hint}
	}
	return list
}

type namedText struct {
	Name string `json:"name"`
	Text string `json:"text"`
}

func (p *program) check(file string, o *checkOptions) error {
	s, _, issues, err := read(file, o.sets...)
	for _, i := range issues {
		fmt.Fprintln(p.err, i.String())
	}
	if len(issues) > 0 && s == nil && o.format == "json" {
		err = errors.Join(err, report.JSON(p.out, mistakesJSON{Issues: issueList(issues)}))
	}
	if err != nil {
		return err
	}
	switch o.format {
	case "json":
		return report.JSON(p.out, checkSummary(s, issues))
	case "csv":
		var rows [][]string
		j := checkSummary(s, issues)
		for _, v := range s.Design(&s.Engine) {
			rows = append(rows, []string{"design", v.Field.Path, v.Field.ValueText(v.SI)})
		}
		for _, f := range j.Free {
			rows = append(rows, []string{"free", f.Name, f.Text})
		}
		for _, l := range j.Limits {
			rows = append(rows, []string{"limit", l.Name, l.Text})
		}
		for _, a := range j.Aims {
			rows = append(rows, []string{"aim", a, ""})
		}
		return report.CSV(p.out, []string{"part", "name", "value"}, rows)
	}
	return p.checkTable(s)
}

func checkSummary(s *studies.Study, issues studies.Issues) checkJSON {
	j := checkJSON{Valid: true, Issues: issueList(issues), Study: s.Name, About: s.About, Design: report.Inputs(s, &s.Engine), Free: []namedText{}, Limits: []namedText{},
		Aims: []string{}, Evaluations: s.Evaluations, Seed: s.Seed, Corrections: s.CorrectionsName(), Version: model.Version}
	for i := range s.Free {
		j.Free = append(j.Free, namedText{s.Free[i].Path, s.FreeText(i)})
	}
	for i := range s.Limits {
		j.Limits = append(j.Limits, namedText{s.Limits[i].Name, limitText(&s.Limits[i])})
	}
	for _, a := range s.Aims {
		j.Aims = append(j.Aims, a.Text())
	}
	return j
}

func limitText(l *studies.Limit) string {
	if l.Expr == "" {
		return l.BoundText()
	}
	return l.BoundText() + ": " + l.Expr
}

func (p *program) checkTable(s *studies.Study) error {
	style := p.style().Listing()
	fmt.Fprintf(p.out, "%s\n", s.Name)
	if s.About != "" {
		fmt.Fprintf(p.out, "%s\n", s.About)
	}
	fmt.Fprintln(p.out)
	start := report.Table{Title: "Start design", Head: [][]string{{"variable", "value", "free"}}, Left: []int{2}, Wrap: []int{2}}
	free := map[string]string{}
	for i := range s.Free {
		free[s.Free[i].Path] = s.FreeText(i)
	}
	for _, v := range s.Design(&s.Engine) {
		start.Rows = append(start.Rows, []string{v.Field.Path, v.Field.ValueText(v.SI), free[v.Field.Path]})
	}
	if err := start.Write(p.out, style); err != nil {
		return err
	}
	if len(s.Limits) > 0 {
		fmt.Fprintln(p.out)
		limits := report.Table{Title: "Limits", Head: [][]string{{"limit", "bound"}}, Left: []int{1}, Wrap: []int{1}}
		for i := range s.Limits {
			limits.Rows = append(limits.Rows, []string{s.Limits[i].Name, limitText(&s.Limits[i])})
		}
		if err := limits.Write(p.out, style); err != nil {
			return err
		}
	}
	fmt.Fprintln(p.out)
	for _, a := range s.Aims {
		fmt.Fprintf(p.out, "Aim: %s\n", a.Text())
	}
	fmt.Fprintf(p.out, "Budget %d evaluations, seed %d. Corrections: %s. %d variables free.\n", s.Evaluations, s.Seed, s.CorrectionsName(), len(s.Free))
	return nil
}
