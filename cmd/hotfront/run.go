package main

import (
	"errors"
	"fmt"
	"math"
	"slices"
	"strings"

	"hotfront/cmd/internal/report"
	"hotfront/optimize"
	"hotfront/optimize/archive"
	"hotfront/optimize/pareto"
	"hotfront/studies"
)

// storedStudy reads the study that an archive holds, with values of --set in place of its own.
func storedStudy(m archive.Meta, sets ...string) (*studies.Study, error) {
	s, issues := studies.Load("the study of the run", []byte(m.Canonical), sets...)
	if s == nil {
		return nil, fmt.Errorf("the study in the archive, written by version %s of the program, cannot be read: %w", m.Program, issues)
	}
	return s, nil
}

// storedProblem is the search problem of the study that an archive holds.
func storedProblem(m archive.Meta) (*studies.Problem, error) {
	s, err := storedStudy(m)
	if err != nil {
		return nil, err
	}
	p, err := studies.NewProblem(s)
	if err != nil {
		return nil, err
	}
	if !slices.Equal(p.ExtraNames(), m.Extras) {
		return nil, fmt.Errorf("the run was written by version %s of the program, whose list of results differs from this one's", m.Program)
	}
	return p, nil
}

// historyRows is the number of rows that tell how the front grew.
const historyRows = 20

// errEnough ends the reading of an archive early.
const errEnough = archive.Error("read enough")

// readFront rebuilds the front from the first most designs of an archive, from all for most < 0.
func readFront(run *archive.Archive, most int) (*report.Front, error) {
	m := run.Meta()
	problem, err := storedProblem(m)
	if err != nil {
		return nil, err
	}
	total, err := run.Len()
	if err != nil {
		return nil, err
	}
	if most >= 0 {
		total = min(total, most)
	}
	f := &report.Front{Problem: problem}
	kept := pareto.NewArchive(m.Aims)
	members := map[int]optimize.Point{}
	causes := map[string]int{}
	feasible, next, least := 0, 1, math.Inf(1)
	err = run.Each(func(seq int, p *optimize.Point) error {
		if seq == total {
			return errEnough
		}
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
		if v := pareto.Violation(p.G); v > 0 {
			if v < least && feasible == 0 {
				least = v
				nearest := clonePoint(p)
				f.Nearest, f.NearestSeq = &nearest, seq
			}
			return nil
		}
		feasible++
		aims := slices.Clone(p.F)
		taken, err := kept.Add(aims, seq)
		if taken {
			members[seq] = clonePoint(p)
		}
		return err
	})
	if err != nil && !errors.Is(err, errEnough) {
		return nil, err
	}
	for i := range kept.Len() {
		tag := kept.At(i).Tag
		f.Seq = append(f.Seq, tag)
		f.Points = append(f.Points, members[tag])
	}
	f.Hypervolume = kept.Hypervolume(m.Reference)
	f.History = append(f.History, optimize.HistoryRow{Evaluations: f.Evaluations, Feasible: feasible, Front: kept.Len(), Hypervolume: f.Hypervolume})
	for cause, n := range causes {
		f.Failures = append(f.Failures, optimize.CauseCount{Cause: cause, Count: n})
	}
	slices.SortFunc(f.Failures, func(a, b optimize.CauseCount) int {
		if a.Count != b.Count {
			return b.Count - a.Count
		}
		return strings.Compare(a.Cause, b.Cause)
	})
	if feasible == 0 {
		f.Reach, err = reachOf(run, problem, total)
		return f, err
	}
	f.Nearest = nil
	return f, nil
}

func clonePoint(p *optimize.Point) optimize.Point {
	return optimize.Point{X: slices.Clone(p.X), F: slices.Clone(p.F), G: slices.Clone(p.G), Extra: slices.Clone(p.Extra), Cause: p.Cause}
}

// reachOf finds how near any of the first total designs comes to each limit on its own.
func reachOf(run *archive.Archive, problem *studies.Problem, total int) ([]report.Reach, error) {
	s := problem.Study()
	reach := make([]report.Reach, len(s.Limits))
	for i := range reach {
		reach[i].Result.Margin = math.Inf(-1)
	}
	err := run.Each(func(seq int, p *optimize.Point) error {
		if seq == total {
			return errEnough
		}
		if p.Cause != "" {
			return nil
		}
		engine, perf := s.EngineAt(p.X), problem.PerformanceOf(p.Extra)
		for i, r := range s.LimitResults(&engine, &perf) {
			if p.G[i] <= 0 {
				reach[i].Met++
			}
			if r.Margin > reach[i].Result.Margin {
				reach[i].Result, reach[i].Seq = r, seq
			}
		}
		return nil
	})
	if errors.Is(err, errEnough) {
		err = nil
	}
	return reach, err
}
