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
				if p.Extra == nil && len(m.Extras) > 0 {
					return noResults(seq)
				}
				least = v
				nearest := clonePoint(p)
				f.Nearest, f.NearestSeq = &nearest, seq
			}
			return nil
		}
		feasible++
		aims := slices.Clone(p.F)
		taken, err := kept.Add(aims, seq)
		if !taken {
			return err
		}
		if p.Extra == nil && len(m.Extras) > 0 {
			return noResults(seq)
		}
		members[seq] = clonePoint(p)
		for _, tag := range kept.Left() {
			delete(members, tag)
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

// noResults is the error of an archive that holds less than a search stores.
func noResults(seq int) error {
	return fmt.Errorf("the archive holds no results of design %s, which a search keeps: it was not written by one", report.ID(seq))
}

// reachOf finds how near any of the first total designs comes to each limit on its own. Margins are compared by
// the limits' own numbers, as a search does, which stores the results of the designs that come nearer than those
// before.
func reachOf(run *archive.Archive, problem *studies.Problem, total int) ([]report.Reach, error) {
	s := problem.Study()
	reach := make([]report.Reach, len(s.Limits))
	least := make([]float64, len(s.Limits))
	for i := range reach {
		reach[i].Result.Margin = math.Inf(-1)
		least[i] = math.Inf(1)
	}
	err := run.Each(func(seq int, p *optimize.Point) error {
		if seq == total {
			return errEnough
		}
		if p.Cause != "" {
			return nil
		}
		var results []studies.LimitResult
		for i, g := range p.G {
			if g <= 0 {
				reach[i].Met++
			}
			if g >= least[i] {
				continue
			}
			if results == nil {
				if p.Extra == nil {
					return noResults(seq)
				}
				engine, perf := s.EngineAt(p.X), problem.PerformanceOf(p.Extra)
				results = s.LimitResults(&engine, &perf)
			}
			least[i] = g
			reach[i].Result, reach[i].Seq = results[i], seq
		}
		return nil
	})
	if errors.Is(err, errEnough) {
		err = nil
	}
	return reach, err
}
