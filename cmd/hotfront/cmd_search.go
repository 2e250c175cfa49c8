package main

import (
	"context"
	"errors"
	"fmt"
	"runtime"
	"runtime/debug"
	"strings"
	"time"

	"github.com/spf13/cobra"

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
	workers     int
	driver      string
	top         top
	seedGiven   bool
}

func (p *program) searchCommand() *cobra.Command {
	var o searchOptions
	c := &cobra.Command{
		Use:   "search STUDY --run DIR",
		Short: "Searches for the front; run again on the same DIR it goes on",
		Long: `search looks for the designs of a study that no other design beats. Every design goes to an archive in DIR while the
search goes on. Ctrl-C loses nothing, and a kill or a power cut what was worked on in the last moments: the same command
goes on where it was and ends with the front of an undisturbed run. The front depends on study, seed and number of
evaluations, not on the workers.
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
	f.IntVar(&o.evaluations, "evaluations", 0, "budget instead of the study's, 0 for the study's; a larger one continues a run")
	f.Float64Var(&o.hours, "hours", 0, "stop with a checkpoint after this time")
	f.Uint64Var(&o.seed, "seed", 0, "seed instead of the study's")
	f.IntVar(&o.workers, "workers", runtime.GOMAXPROCS(0), "designs worked on at a time; does not change the front")
	f.StringVar(&o.driver, "driver", "", "genetic or simplex (one aim); by default simplex for one aim over numbers, else genetic")
	o.top.add(c)
	return c
}

func (p *program) search(ctx context.Context, file string, o *searchOptions) error {
	switch {
	case o.dir == "":
		return failed(exitUsage, "search needs --run DIR, a folder for its archive")
	case o.evaluations < 0 || o.evaluations > mostEvaluations || o.workers < 1:
		return failed(exitUsage, fmt.Sprintf("--evaluations must be from 0 to %d, --workers at least 1", int(mostEvaluations)))
	case !(o.hours >= 0 && o.hours <= mostHours):
		return failed(exitUsage, fmt.Sprintf("--hours must be from 0 to %d", mostHours))
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
		return p.noProblem(file, err)
	}
	driver, err := chooseDriver(o.driver, problem)
	if err != nil {
		return err
	}
	run, err := archive.Open(o.dir, runMeta(s, data, problem, driver))
	if err != nil {
		return explainOther(err, s, o.dir)
	}
	err = p.searchIn(ctx, run, problem, driver, o)
	return errors.Join(err, run.Close())
}

// mostEvaluations is the largest budget, as in a study.
const mostEvaluations = 1e9

// mostHours is a century: more than a search runs, less than a duration holds.
const mostHours = 876000

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
	pr := newProgress(p.err, problem, s.Evaluations)
	if o.hours > 0 {
		var cancel context.CancelFunc
		ctx, cancel = context.WithTimeout(ctx, time.Duration(o.hours*float64(time.Hour)))
		defer cancel()
		pr.deadline, _ = ctx.Deadline()
	}
	before, err := run.Len()
	if err != nil {
		return err
	}
	if before > 0 {
		pr.log.Info("going on", "run", o.dir, "designs", before)
	}
	if archive.OnNetwork(o.dir) {
		pr.log.Warn("the run folder is on a network file system, where the archive is not safe: use a local disk", "run", o.dir)
	}
	start := time.Now()
	var memory thrift
	defer memory.end()
	r, err := optimize.Run(ctx, problem, optimize.Settings{Evaluations: s.Evaluations, Seed: s.Seed, Workers: o.workers, Driver: driver}, run,
		func(at optimize.Progress) {
			memory.observe(at)
			pr.observe(at)
		})
	pr.end()
	stopped := err != nil && ctx.Err() != nil && errors.Is(err, ctx.Err())
	switch {
	case stopped || err == nil:
	case errors.Is(err, optimize.ErrLedgerMismatch):
		return fmt.Errorf("%w; version %s of the program, which began this run, searched another way: give this search a folder of its own", err, run.Meta().Program)
	default:
		return fmt.Errorf("%w; what is in %s so far is safe: once this is cured the same command goes on", err, o.dir)
	}
	seconds := time.Since(start).Seconds()
	pr.log.Info("searched", "designs", r.Evaluations, "feasible", r.Feasible, "failed", r.Failed, "repeated", r.Duplicates,
		"seconds", fmt.Sprintf("%.1f", seconds), "per_second", int(float64(max(0, r.Evaluations-before))/max(seconds, 1e-9)))
	if stopped {
		return failed(exitStopped, fmt.Sprintf("stopped after %d of %d designs; the same command goes on, `hotfront front %s` shows what there is", r.Evaluations, s.Evaluations, o.dir))
	}
	if r.Exhausted {
		pr.log.Info("no further design left to try")
	}
	front, err := readFront(run, r.Evaluations)
	if err != nil {
		return err
	}
	return p.printFront(front, o.format, &o.top, run.Meta().Model)
}

// thrift keeps the memory of a long search down. Go lets the heap double before it looks for what is free, which
// with many designs in it is a lot, and looking costs little, since they hold no pointers; with few designs it is
// the other way round.
type thrift struct {
	set    bool
	before int
}

const (
	manyDesigns   = 100_000 // from here on memory counts
	thriftPercent = 25      // by which the heap may grow before a collection; Go's default is 100
)

// observe is called after every batch.
func (t *thrift) observe(at optimize.Progress) {
	if at.Evaluations >= manyDesigns && !t.set {
		t.before, t.set = debug.SetGCPercent(thriftPercent), true
	}
}

// end gives the program its own way back.
func (t *thrift) end() {
	if t.set {
		debug.SetGCPercent(t.before)
		t.set = false
	}
}

// explainOther adds to the error of a folder that holds another run what has changed in its study.
func explainOther(err error, s *studies.Study, dir string) error {
	mismatch, ok := errors.AsType[*archive.MismatchError](err)
	if !ok || !mismatch.Has("study") {
		return err
	}
	run, readErr := archive.Read(dir)
	if readErr != nil {
		return errors.Join(err, readErr)
	}
	stored := run.Meta().Canonical
	if closeErr := run.Close(); closeErr != nil {
		return errors.Join(err, closeErr)
	}
	return fmt.Errorf("%w\n%s", err, strings.Join(changes(stored, string(s.Encode())), "\n"))
}
