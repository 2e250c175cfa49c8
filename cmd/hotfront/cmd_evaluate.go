package main

import (
	"errors"
	"fmt"
	"strconv"

	"github.com/spf13/cobra"

	"hotfront/cmd/internal/report"
	"hotfront/model"
	"hotfront/optimize"
	"hotfront/optimize/archive"
	"hotfront/studies"
)

type evaluateOptions struct {
	format      format
	sets        []string
	corrections string
	design      string
}

func (p *program) evaluateCommand() *cobra.Command {
	var o evaluateOptions
	c := &cobra.Command{
		Use:   "evaluate STUDY | DIR --design ID",
		Short: "Works out one design: performance, losses, limits",
		Long: `evaluate works out the start design of a study, or a design of a run, changed by --set, and prints its performance,
the ledger of its losses and how its limits stand. It works out a design that has no result too, and says why.

` + cautions,
		Example: `  hotfront evaluate studies/examples/sawmill-heat-and-power.yaml
  hotfront evaluate my-engine.yaml --set speed=800rpm --set gas=hydrogen
  hotfront evaluate my-engine.yaml --corrections none --format json
  hotfront evaluate runs/sawmill --design d000123`,
		Args: arguments("STUDY or DIR"),
		RunE: func(_ *cobra.Command, args []string) error { return p.evaluate(args[0], &o) },
	}
	o.format.add(c)
	c.Flags().StringArrayVar(&o.sets, "set", nil, "path=value instead of the study's; may be given often")
	c.Flags().StringVar(&o.corrections, "corrections", "", "corrections instead of the study's: none")
	c.Flags().StringVar(&o.design, "design", "", "a design of the run in DIR, as d000123")
	return c
}

func (p *program) evaluate(file string, o *evaluateOptions) error {
	sets := o.sets
	if o.corrections != "" {
		sets = append(sets, "corrections="+o.corrections)
	}
	var s *studies.Study
	var err error
	if o.design != "" {
		s, err = p.runDesign(file, o.design, sets)
	} else {
		s, _, err = p.load(file, sets...)
	}
	if err != nil {
		return err
	}
	d := report.Design{Study: s, Engine: s.Engine}
	production := model.NewWorkspace()
	model.Evaluate(&d.Performance, &d.Engine, &s.Corrections, production)
	if d.Performance.Cause == model.None {
		d.Heater = model.HeaterProfile(nil, &d.Engine, production)
		d.Turn = model.Turn(nil, production)
	}
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

// runDesign gives the study of a run with one of its designs as the start design. sets come on top.
func (p *program) runDesign(dir, id string, sets []string) (s *studies.Study, err error) {
	seq, ok := report.SeqOf(id)
	if !ok {
		return nil, failed(exitUsage, fmt.Sprintf("%q is no name of a design, as d000123", id))
	}
	run, err := archive.Read(dir)
	if err != nil {
		return nil, err
	}
	defer func() { err = errors.Join(err, run.Close()) }()
	if s, err = storedStudy(run.Meta()); err != nil {
		return nil, err
	}
	points := make([]optimize.Point, 1)
	n, err := run.Recall(seq, points)
	if err != nil {
		return nil, err
	}
	if n == 0 {
		return nil, failed(exitUsage, fmt.Sprintf("%s has no design %s", dir, id))
	}
	if stored := run.Meta().Model; stored != model.Version {
		fmt.Fprintf(p.err, "warning: the run was worked out by version %s of the model, this is version %s: results differ from the run's\n", stored, model.Version)
	}
	engine := s.EngineAt(points[0].X)
	var all []string
	for _, v := range s.Design(&engine) {
		switch {
		case !v.Free:
		case v.Field.Kind == studies.Choice:
			all = append(all, v.Field.Path+"="+v.Field.Choices[int(v.SI)])
		default: // SI, to the last bit
			all = append(all, v.Field.Path+"="+strconv.FormatFloat(v.SI, 'f', -1, 64))
		}
	}
	s, issues := studies.Load("the study of the run", []byte(run.Meta().Canonical), append(all, sets...)...)
	if s == nil {
		return nil, failed(exitStudy, issues.Error())
	}
	s.Name += " " + id
	return s, nil
}
