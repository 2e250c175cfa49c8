package main

import (
	"github.com/spf13/cobra"

	"hotfront/cmd/internal/report"
	"hotfront/model"
)

type evaluateOptions struct {
	format      format
	sets        []string
	corrections string
}

func (p *program) evaluateCommand() *cobra.Command {
	var o evaluateOptions
	c := &cobra.Command{
		Use:   "evaluate STUDY",
		Short: "Works out one design: performance, losses, limits",
		Long: `evaluate works out the start design of a study, changed by --set, and prints its performance, the ledger of its
losses and how its limits stand.

` + cautions,
		Example: `  hotfront evaluate studies/examples/sawmill-heat-and-power.yaml
  hotfront evaluate my-engine.yaml --set speed=800rpm --set gas=hydrogen
  hotfront evaluate my-engine.yaml --corrections none --format json`,
		Args: arguments("STUDY"),
		RunE: func(_ *cobra.Command, args []string) error { return p.evaluate(args[0], &o) },
	}
	o.format.add(c)
	c.Flags().StringArrayVar(&o.sets, "set", nil, "path=value instead of the study's; may be given often")
	c.Flags().StringVar(&o.corrections, "corrections", "", "corrections instead of the study's: none")
	return c
}

func (p *program) evaluate(file string, o *evaluateOptions) error {
	sets := o.sets
	if o.corrections != "" {
		sets = append(sets, "corrections="+o.corrections)
	}
	s, _, err := p.load(file, sets...)
	if err != nil {
		return err
	}
	d := report.Design{Study: s, Engine: s.Engine}
	model.Evaluate(&d.Performance, &d.Engine, &s.Corrections, model.NewWorkspace())
	var fine model.Performance
	w := model.NewWorkspaceGrid(model.SecondLawGrid())
	model.Evaluate(&fine, &d.Engine, &s.Corrections, w)
	if d.Performance.Cause == model.None && fine.Cause == model.None {
		d.SecondLaw = new(model.SecondLaw)
		model.SecondLawOf(d.SecondLaw, &fine, &d.Engine, w)
	}
	switch o.format {
	case "json":
		err = report.JSON(p.out, d.JSON())
	case "csv":
		err = d.CSV(p.out)
	default:
		err = d.Table(p.out, p.style())
	}
	if err == nil && d.Performance.Cause != model.None {
		return failed(exitFailure, "no result: "+d.Performance.Cause.String())
	}
	return err
}
