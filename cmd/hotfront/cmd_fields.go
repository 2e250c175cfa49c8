package main

import (
	"strings"

	"github.com/spf13/cobra"

	"hotfront/cmd/internal/report"
	"hotfront/studies"
)

type fieldsOptions struct{ format format }

func (p *program) fieldsCommand() *cobra.Command {
	var o fieldsOptions
	c := &cobra.Command{
		Use:   "fields",
		Short: "Lists all variables of a study and all results",
		Example: `  hotfront fields
  hotfront fields --format json`,
		Args: arguments(),
		RunE: func(*cobra.Command, []string) error { return p.fields(&o) },
	}
	o.format.add(c)
	return c
}

type fieldJSON struct {
	Name    string   `json:"name"`
	Kind    string   `json:"kind"` // number, whole, choice, result
	Unit    string   `json:"unit"`
	Default string   `json:"default,omitempty"`
	Range   string   `json:"range,omitempty"`
	Usual   string   `json:"usual,omitempty"`
	Choices []string `json:"choices,omitempty"`
	Applies string   `json:"applies,omitempty"`
	Text    string   `json:"text"`
}

func fieldRows() []fieldJSON {
	var rows []fieldJSON
	fields := studies.Fields()
	for i := range fields {
		f := &fields[i]
		kind := [...]string{studies.Real: "number", studies.Whole: "whole", studies.Choice: "choice"}[f.Kind]
		rows = append(rows, fieldJSON{Name: f.Path, Kind: kind, Unit: f.Unit, Default: f.Default, Range: f.RangeText(f.Hard),
			Usual: f.RangeText(f.Usual), Choices: f.Choices, Applies: f.When.Words, Text: f.Text})
	}
	for _, o := range studies.Outputs() {
		rows = append(rows, fieldJSON{Name: o.Name, Kind: "result", Unit: o.Unit, Applies: o.When.Words, Text: o.Text})
	}
	return rows
}

func (p *program) fields(o *fieldsOptions) error {
	rows := fieldRows()
	switch o.format {
	case "json":
		return report.JSON(p.out, rows)
	case "csv":
		var lines [][]string
		for _, r := range rows {
			lines = append(lines, []string{r.Name, r.Kind, r.Unit, r.Default, r.Range, r.Usual, strings.Join(r.Choices, " "), r.Applies, r.Text})
		}
		return report.CSV(p.out, []string{"name", "kind", "unit", "default", "range", "usual", "choices", "applies", "text"}, lines)
	}
	inputs := report.Table{Title: "Variables, below engine: in a study", Head: [][]string{{"variable", "unit", "default", "usual", "meaning"}}, Left: []int{1, 2, 3, 4}, Wrap: []int{3, 4}}
	results := report.Table{Title: "Results, for limits and aims", Head: [][]string{{"result", "unit", "meaning"}}, Left: []int{1, 2}, Wrap: []int{2}}
	for _, r := range rows {
		text := r.Text
		if r.Applies != "" {
			text += "; applies " + r.Applies
		}
		if r.Kind == "result" {
			results.Rows = append(results.Rows, []string{r.Name, r.Unit, text})
			continue
		}
		usual := r.Usual
		if r.Kind == "choice" {
			usual = strings.Join(r.Choices, ", ")
			if len(r.Choices) > 4 {
				usual = "choice of " + usual
			}
		}
		inputs.Rows = append(inputs.Rows, []string{r.Name, r.Unit, r.Default, usual, text})
	}
	style := p.style().Listing()
	if err := inputs.Write(p.out, style); err != nil {
		return err
	}
	if _, err := p.out.Write([]byte("\n")); err != nil {
		return err
	}
	return results.Write(p.out, style)
}
