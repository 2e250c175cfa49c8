package main

import (
	"context"
	"errors"
	"fmt"
	"runtime"
	"time"

	"github.com/spf13/cobra"

	"hotfront/cmd/internal/report"
	"hotfront/model"
	"hotfront/optimize"
	"hotfront/optimize/archive"
	"hotfront/studies"
)

type searchOptions struct {
	format      format
	dir         string
	evaluations int
	hours       float64
	seed        uint64
	seedGiven   bool
	workers     int
	driver      string
	top         int
}

func (p *program) searchCommand() *cobra.Command {
	var o searchOptions
	c := &cobra.Command{
		Use:   "search STUDY --run DIR",
		Short: "Searches for the front; run again on the same DIR it goes on",
		Long: `search looks for the designs of a study that no other design beats. Every design goes to an archive in DIR before
the search goes on, so nothing is lost by Ctrl-C, a kill or a power cut: the same command goes on where it was and ends
with the front of an undisturbed run. The front depends on study, seed and number of evaluations, not on the workers.
DIR must be on a local disk: the archive is not safe on network file systems.

` + cautions,
		Example: `  hotfront search studies/examples/sawmill-heat-and-power.yaml --run runs/sawmill
  hotfront search my-engine.yaml --run runs/a --evaluations 50000 --hours 8
  hotfront search my-engine.yaml --run runs/b --seed 2 --workers 4`,
		Args: arguments("STUDY"),
		RunE: func(c *cobra.Command, args []string) error {
			o.seedGiven = c.Flags().Changed("seed")
			return p.search(context.Background(), args[0], &o)
		},
	}
	o.format.add(c)
	f := c.Flags()
	f.StringVar(&o.dir, "run", "", "folder of the run, made if it is not there (needed)")
	f.IntVar(&o.evaluations, "evaluations", 0, "budget instead of the study's; a larger one continues a run")
	f.Float64Var(&o.hours, "hours", 0, "stop with a checkpoint after this time")
	f.Uint64Var(&o.seed, "seed", 0, "seed instead of the study's")
	f.IntVar(&o.workers, "workers", runtime.GOMAXPROCS(0), "designs worked on at a time; does not change the front")
	f.StringVar(&o.driver, "driver", "", "genetic or simplex (one aim); by default simplex for one aim over numbers, else genetic")
	f.IntVar(&o.top, "top", 12, "designs of the front to show, 0 for all")
	return c
}

func (p *program) search(ctx context.Context, file string, o *searchOptions) error {
	switch {
	case o.dir == "":
		return failed(exitUsage, "search needs --run DIR, a folder for its archive")
	case o.evaluations < 0 || o.hours < 0 || o.workers < 1 || o.top < 0:
		return failed(exitUsage, "--evaluations, --hours and --top must not be negative, --workers at least 1")
	}
	s, data, err := p.load(file)
	if err != nil {
		return err
	}
	if o.seedGiven {
		s.Seed = o.seed
	}
	if o.evaluations > 0 {
		s.Evaluations = o.evaluations
	}
	problem, err := studies.NewProblem(s)
	if err != nil {
		return failed(exitStudy, err.Error())
	}
	driver, err := chooseDriver(o.driver, problem)
	if err != nil {
		return err
	}
	run, err := archive.Open(o.dir, runMeta(s, data, problem, driver))
	if err != nil {
		return err
	}
	err = p.searchIn(ctx, run, problem, driver, o)
	return errors.Join(err, run.Close())
}

// chooseDriver takes the simplex driver for one aim over numbers: there it is the better one.
func chooseDriver(name string, p *studies.Problem) (optimize.Driver, error) {
	switch name {
	case "genetic":
		return optimize.Genetic, nil
	case "simplex":
		if p.Aims() != 1 {
			return 0, failed(exitUsage, fmt.Sprintf("the simplex driver takes one aim, the study has %d", p.Aims()))
		}
		return optimize.Simplex, nil
	case "":
		if p.Aims() > 1 {
			return optimize.Genetic, nil
		}
		for _, v := range p.Variables() {
			if v.Kind == optimize.Choice || v.Kind == optimize.Ordered {
				return optimize.Genetic, nil
			}
		}
		return optimize.Simplex, nil
	}
	return 0, failed(exitUsage, fmt.Sprintf("%q is no driver: genetic or simplex", name))
}

func runMeta(s *studies.Study, data []byte, p *studies.Problem, d optimize.Driver) archive.Meta {
	seedless := *s // the seed is a part of the identity of its own
	seedless.Seed = 0
	m := archive.Meta{
		Identity: archive.Identity{Fingerprint: seedless.Fingerprint(""), Model: model.Version, Seed: s.Seed, Driver: d.String()},
		Name:     s.Name, Text: string(data), Canonical: string(s.Encode()), Program: programVersion, Created: time.Now(),
		Aims: p.Aims(), Limits: p.Limits(), Extras: p.ExtraNames(), Reference: p.Reference(),
	}
	for _, v := range p.Variables() {
		m.Variables = append(m.Variables, v.Name)
	}
	return m
}

func (p *program) searchIn(ctx context.Context, run *archive.Archive, problem *studies.Problem, driver optimize.Driver, o *searchOptions) error {
	s := problem.Study()
	ctx, release := withSignals(ctx, p.err)
	defer release()
	if o.hours > 0 {
		var cancel context.CancelFunc
		ctx, cancel = context.WithTimeout(ctx, time.Duration(o.hours*float64(time.Hour)))
		defer cancel()
	}
	pr := newProgress(p.err, problem, s.Evaluations)
	before, err := run.Len()
	if err != nil {
		return err
	}
	if before > 0 {
		pr.log.Info("going on", "run", o.dir, "designs", before)
	}
	start := time.Now()
	r, err := optimize.Run(ctx, problem, optimize.Settings{Evaluations: s.Evaluations, Seed: s.Seed, Workers: o.workers, Driver: driver}, run, pr.observe)
	pr.end()
	stopped := err != nil && ctx.Err() != nil && errors.Is(err, ctx.Err())
	if err != nil && !stopped {
		return err
	}
	pr.log.Info("searched", "designs", r.Evaluations, "feasible", r.Feasible, "failed", r.Failed, "repeated", r.Duplicates,
		"seconds", fmt.Sprintf("%.1f", time.Since(start).Seconds()))
	if stopped {
		return failed(exitStopped, fmt.Sprintf("stopped after %d of %d designs; the same command goes on, `hotfront front %s` shows what there is", r.Evaluations, s.Evaluations, o.dir))
	}
	if len(r.Front) == 0 {
		report.Blame(p.err, problem, r.LeastViolation, r.Failures, r.Evaluations)
		return failed(exitInfeasible, "no design meets all limits")
	}
	if r.Exhausted {
		pr.log.Info("no further design left to try")
	}
	front, failures, err := readFront(run)
	if err != nil {
		return err
	}
	return p.printFront(front, o.format, o.top, failures, run.Meta().Model)
}

// printFront prints a front in the format asked for.
func (p *program) printFront(f *report.Front, as format, top int, failures []optimize.CauseCount, version string) error {
	switch as {
	case "json":
		return f.JSON(p.out, f.Pick(top), version)
	case "csv":
		return f.CSV(p.out, f.Pick(top))
	}
	s := f.Problem.Study()
	picked := f.Pick(top)
	fmt.Fprintf(p.out, "%s: %d designs on the front of %d tried, seed %d; %d shown. Hypervolume %s.\n\n",
		s.Name, len(f.Points), f.Evaluations, s.Seed, len(picked), report.HypervolumeText(f.Problem, f.Hypervolume))
	if err := f.Table(p.out, picked, p.style()); err != nil {
		return err
	}
	fmt.Fprintln(p.out)
	fmt.Fprintf(p.out, "Hypervolume over the run: %s designs.\n", f.Growth())
	f.Press(p.out, failures)
	c := &s.Corrections
	fmt.Fprintf(p.out, "Corrections %s: flow friction x %.3g, cycle work x %.3g, drive effectiveness %.3g, seal friction %.3g bar. Model version %s.\n%s\n",
		s.CorrectionsName(), c.FlowFriction, c.CycleWork, c.Effectiveness, c.SealFriction/1e5, version, report.Caution)
	return nil
}
