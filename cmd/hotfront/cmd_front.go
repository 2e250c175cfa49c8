package main

import (
	"errors"
	"fmt"
	"slices"
	"strings"

	"github.com/spf13/cobra"

	"hotfront/cmd/internal/report"
	"hotfront/optimize"
	"hotfront/optimize/archive"
	"hotfront/optimize/pareto"
	"hotfront/studies"
)

type frontOptions struct {
	format format
	top    int
}

func (p *program) frontCommand() *cobra.Command {
	var o frontOptions
	c := &cobra.Command{
		Use:   "front DIR",
		Short: "The front of a run, read from its archive",
		Example: `  hotfront front runs/sawmill
  hotfront front runs/sawmill --top 0 --format csv > front.csv`,
		Args: arguments("DIR"),
		RunE: func(_ *cobra.Command, args []string) error { return p.front(args[0], &o) },
	}
	o.format.add(c)
	c.Flags().IntVar(&o.top, "top", 12, "designs to show, 0 for all")
	return c
}

func (p *program) front(dir string, o *frontOptions) error {
	if o.top < 0 {
		return failed(exitUsage, "--top must not be negative")
	}
	run, err := archive.Read(dir)
	if err != nil {
		return err
	}
	f, failures, err := readFront(run)
	if err := errors.Join(err, run.Close()); err != nil {
		return err
	}
	if len(f.Points) == 0 {
		return failed(exitInfeasible, fmt.Sprintf("none of the %d designs in %s meets all limits", f.Evaluations, dir))
	}
	return p.printFront(f, o.format, o.top, failures, run.Meta().Model)
}

// historyRows is the number of rows that tell how the front grew.
const historyRows = 20

// readFront rebuilds the front from the designs of an archive.
func readFront(run *archive.Archive) (*report.Front, []optimize.CauseCount, error) {
	m := run.Meta()
	s, issues := studies.Load(m.Name, []byte(m.Canonical))
	if s == nil {
		return nil, nil, fmt.Errorf("the study in the archive cannot be read by this version of the program: %w", issues)
	}
	problem, err := studies.NewProblem(s)
	if err != nil {
		return nil, nil, err
	}
	if !slices.Equal(problem.ExtraNames(), m.Extras) {
		return nil, nil, fmt.Errorf("the run was written by version %s of the program, whose list of results differs from this one's", m.Program)
	}
	f := &report.Front{Problem: problem}
	kept := pareto.NewArchive(m.Aims)
	members := map[int]optimize.Point{}
	causes := map[string]int{}
	total, err := run.Len()
	if err != nil {
		return nil, nil, err
	}
	feasible, next := 0, 1
	err = run.Each(func(seq int, p *optimize.Point) error {
		// A row of history before the design that begins the next part, and one at the end.
		if seq == next*total/historyRows {
			f.History = append(f.History, optimize.HistoryRow{Evaluations: seq, Feasible: feasible, Front: kept.Len(), Hypervolume: kept.Hypervolume(m.Reference)})
		}
		for next < historyRows && seq >= next*total/historyRows {
			next++
		}
		f.Evaluations = seq + 1
		if p.Cause != "" {
			causes[p.Cause]++
			return nil
		}
		if pareto.Violation(p.G) > 0 {
			return nil
		}
		feasible++
		aims := slices.Clone(p.F)
		taken, err := kept.Add(aims, seq)
		if taken {
			members[seq] = optimize.Point{X: slices.Clone(p.X), F: aims, G: slices.Clone(p.G), Extra: slices.Clone(p.Extra)}
		}
		return err
	})
	if err != nil {
		return nil, nil, err
	}
	for i := range kept.Len() {
		tag := kept.At(i).Tag
		f.Seq = append(f.Seq, tag)
		f.Points = append(f.Points, members[tag])
	}
	f.Hypervolume = kept.Hypervolume(m.Reference)
	f.History = append(f.History, optimize.HistoryRow{Evaluations: f.Evaluations, Feasible: feasible, Front: kept.Len(), Hypervolume: f.Hypervolume})
	var failures []optimize.CauseCount
	for cause, n := range causes {
		failures = append(failures, optimize.CauseCount{Cause: cause, Count: n})
	}
	slices.SortFunc(failures, func(a, b optimize.CauseCount) int {
		if a.Count != b.Count {
			return b.Count - a.Count
		}
		return strings.Compare(a.Cause, b.Cause)
	})
	return f, failures, nil
}
