package main

import (
	"context"
	"errors"
	"fmt"
	"math"
	"os"
	"runtime"

	"github.com/spf13/cobra"

	"hotfront/cmd/internal/report"
	"hotfront/model"
	"hotfront/optimize"
	"hotfront/optimize/archive"
	"hotfront/studies"
)

type polishOptions struct {
	format      format
	design      string
	sets        []string
	evaluations int
	workers     int
	out         string
}

func (p *program) polishCommand() *cobra.Command {
	var o polishOptions
	c := &cobra.Command{
		Use:   "polish STUDY | DIR --design ID",
		Short: "Improves one design in all aims at once",
		Long: `polish looks in the neighbourhood of a design, the start design of a study or one of a run, for a design that beats it:
better in one aim and worse in none, within all limits. A design that misses limits is brought nearer to them first, whatever that
costs its aims. Several Nelder-Mead simplexes lower an achievement function together,
which weighs the aims by the extent of the run's front, or for a study by the design's own aims. It never returns a worse design:
when it finds none that beats it, the design stays as it is. The archive of a run is read only.

` + cautions,
		Example: `  hotfront polish runs/sawmill --design d000123
  hotfront polish runs/sawmill --design d000123 --evaluations 2000 --out polished.yaml
  hotfront polish my-engine.yaml --set speed=900rpm --format json`,
		Args: arguments("STUDY or DIR"),
		RunE: func(_ *cobra.Command, args []string) error { return p.polish(context.Background(), args[0], &o) },
	}
	o.format.add(c)
	f := c.Flags()
	f.StringVar(&o.design, "design", "", "a design of the run in DIR, as d000123")
	f.StringArrayVar(&o.sets, "set", nil, "path=value instead of the study's or the design's; may be given often")
	f.IntVar(&o.evaluations, "evaluations", 500, "designs to try")
	f.IntVar(&o.workers, "workers", runtime.GOMAXPROCS(0), "designs worked on at a time; does not change the result")
	f.StringVar(&o.out, "out", "", "write the study with the result as its start design to this file, which must not exist")
	return c
}

func (p *program) polish(ctx context.Context, file string, o *polishOptions) error {
	if o.evaluations < 1 || o.evaluations > mostEvaluations || o.workers < 1 {
		return failed(exitUsage, fmt.Sprintf("--evaluations must be from 1 to %d, --workers at least 1", int(mostEvaluations)))
	}
	if _, err := os.Lstat(o.out); o.out != "" && err == nil {
		return fmt.Errorf("%s exists already", o.out) // before the work, not after it
	}
	var s *studies.Study
	var scale []float64
	var err error
	if o.design != "" {
		if s, err = p.runDesign(file, o.design, o.sets); err == nil {
			scale, err = frontExtent(file)
		}
	} else {
		s, _, err = p.load(file, o.sets...)
	}
	if err != nil {
		return err
	}
	problem, err := studies.NewProblem(s)
	if err != nil {
		return p.noProblem(file, err)
	}
	x, ok := s.StartX()
	if !ok {
		return failed(exitStudy, "the design to polish lies outside the ranges of its free variables")
	}
	ctx, release := withSignals(ctx, p.err)
	defer release()
	from := optimize.NewPoint(problem)
	copy(from.X, x)
	problem.NewEvaluator().Evaluate(&from)
	if from.Cause != "" {
		return failed(exitFailure, "the design to polish has no result: "+from.Cause)
	}
	set := optimize.PolishSettings{Evaluations: o.evaluations, Workers: o.workers, Scale: scale}
	found, err := optimize.Polish(ctx, problem, from, set, nil)
	if err != nil && (ctx.Err() == nil || !errors.Is(err, ctx.Err())) {
		return err
	}
	stopped := err != nil
	r := report.Polish{Study: s, Evaluations: found.Evaluations, Improved: found.Improved}
	w := model.NewWorkspace()
	for _, d := range []struct {
		x   []float64
		dst *report.Polished
	}{{from.X, &r.Before}, {found.Point.X, &r.After}} {
		d.dst.Engine = s.EngineAt(d.x)
		model.Evaluate(&d.dst.Performance, &d.dst.Engine, &s.Corrections, w)
	}
	switch o.format {
	case "json":
		err = r.JSON(p.out)
	case "csv":
		err = r.CSV(p.out)
	default:
		err = r.Table(p.out, p.style())
	}
	if err == nil && o.out != "" {
		err = p.writePolished(s, &r.After.Engine, o.out)
	}
	switch {
	case err != nil:
		return err
	case stopped:
		return failed(exitInterrupted, fmt.Sprintf("stopped after %d of %d designs; this is the best so far, and the same command begins anew", found.Evaluations, o.evaluations))
	case !r.Feasible():
		return failed(exitInfeasible, "no design nearby meets all limits")
	}
	return nil
}

// writePolished writes the study with a design as its start design.
func (p *program) writePolished(s *studies.Study, e *model.Engine, file string) error {
	polished := *s
	polished.Engine = *e
	f, err := os.OpenFile(file, os.O_WRONLY|os.O_CREATE|os.O_EXCL, 0o666)
	if err != nil {
		return err
	}
	if _, err := f.Write(polished.Encode()); err != nil {
		return errors.Join(err, f.Close())
	}
	if err := f.Close(); err != nil {
		return err
	}
	fmt.Fprintf(p.err, "Wrote %s.\n", file)
	return nil
}

// frontExtent is how far the front of a run reaches in each aim; nil where it is a point in one.
func frontExtent(dir string) ([]float64, error) {
	run, err := archive.Read(dir)
	if err != nil {
		return nil, err
	}
	f, err := readFront(run, -1)
	if err := errors.Join(err, run.Close()); err != nil {
		return nil, err
	}
	if len(f.Points) < 2 {
		return nil, nil
	}
	extent := make([]float64, len(f.Points[0].F))
	for k := range extent {
		low, high := math.Inf(1), math.Inf(-1)
		for i := range f.Points {
			low, high = min(low, f.Points[i].F[k]), max(high, f.Points[i].F[k])
		}
		if extent[k] = high - low; extent[k] <= 0 {
			return nil, nil
		}
	}
	return extent, nil
}
