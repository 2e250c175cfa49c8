package main

import (
	"context"
	"fmt"
	"math"
	"math/rand/v2"
	"runtime"
	"slices"
	"time"

	"github.com/spf13/cobra"

	"hotfront/cmd/internal/report"
	"hotfront/model"
	"hotfront/optimize"
	"hotfront/optimize/batch"
	"hotfront/optimize/pareto"
	"hotfront/optimize/sample"
	"hotfront/studies"
)

type surveyOptions struct {
	format  format
	designs int
	seed    uint64
	workers int
}

func (p *program) surveyCommand() *cobra.Command {
	var o surveyOptions
	c := &cobra.Command{
		Use:   "survey STUDY",
		Short: "Random designs over the box of a study: how many can be built, how many the solver settles",
		Long: `survey works out designs spread evenly (a Latin hypercube) over all that a study leaves free, and says how many can
be built, how many of these the solver brings to a periodic state and in how many cycles, how well their energy balances,
and how many meet the limits.`,
		Example: `  hotfront survey studies/examples/kiln-waste-heat.yaml --designs 10000
  hotfront survey my-engine.yaml --format json`,
		Args: arguments("STUDY"),
		RunE: func(_ *cobra.Command, args []string) error { return p.survey(context.Background(), args[0], &o) },
	}
	o.format.add(c)
	f := c.Flags()
	f.IntVar(&o.designs, "designs", 1000, "designs to work out")
	f.Uint64Var(&o.seed, "seed", 1, "seed of the sample")
	f.IntVar(&o.workers, "workers", runtime.GOMAXPROCS(0), "designs worked on at a time")
	return c
}

// surveyJSON is what a survey found. Shares are of 1.
type surveyJSON struct {
	Study            string         `json:"study"`
	Version          string         `json:"model_version"`
	Designs          int            `json:"designs"`
	Buildable        int            `json:"buildable"`
	Converged        int            `json:"converged"`
	ConvergedShare   float64        `json:"converged_share_of_buildable"`
	Feasible         int            `json:"feasible"`
	NotANumber       int            `json:"not_a_number"`
	CyclesMedian     int            `json:"cycles_median"`
	CyclesNinety     int            `json:"cycles_90_percent"`
	CyclesWorst      int            `json:"cycles_worst"`
	ResidualMedian   float64        `json:"energy_residual_median"`
	ResidualWorst    float64        `json:"energy_residual_worst"`
	Causes           map[string]int `json:"causes"`
	Warnings         map[string]int `json:"warnings"`
	DesignsPerSecond float64        `json:"designs_per_second"`
}

func (p *program) survey(ctx context.Context, file string, o *surveyOptions) error {
	if o.designs < 1 || o.workers < 1 {
		return failed(exitUsage, "--designs and --workers must be at least 1")
	}
	s, _, err := p.load(file)
	if err != nil {
		return err
	}
	problem, err := studies.NewProblem(s)
	if err != nil {
		return p.noProblem(file, err)
	}
	points := spread(problem, o.designs, o.seed)
	ctx, release := withSignals(ctx, p.err)
	defer release()
	start := time.Now()
	pool := batch.NewPool(o.workers,
		func() func(*optimize.Point) { return problem.NewEvaluator().Evaluate },
		func(pt *optimize.Point, cause string) { pt.Cause = cause })
	done := pool.Run(ctx, points)
	stopped := done < len(points)
	points = points[:done]
	r := surveyResult(problem, points)
	r.DesignsPerSecond = math.Round(float64(len(points)) / time.Since(start).Seconds())
	err = p.printSurvey(&r, o.format)
	if err == nil && stopped {
		return failed(exitInterrupted, fmt.Sprintf("interrupted: this is the survey of the first %d of %d designs", done, o.designs))
	}
	return err
}

// spread gives points of a Latin hypercube over the problem's variables.
func spread(p *studies.Problem, n int, seed uint64) []optimize.Point {
	vars := p.Variables()
	unit := sample.Latin(rand.New(rand.NewPCG(seed, 0)), n, len(vars))
	points := make([]optimize.Point, n)
	for i := range points {
		points[i] = optimize.NewPoint(p)
		for k, v := range vars {
			if v.Kind == optimize.Real {
				points[i].X[k] = v.Low + unit[i][k]*(v.High-v.Low)
			} else {
				points[i].X[k] = min(v.Low+math.Floor(unit[i][k]*(v.High-v.Low+1)), v.High)
			}
		}
	}
	return points
}

func surveyResult(p *studies.Problem, points []optimize.Point) surveyJSON {
	s := p.Study()
	r := surveyJSON{Study: s.Name, Version: model.Version, Designs: len(points), Causes: map[string]int{}, Warnings: map[string]int{}}
	unsettled := map[string]bool{model.NoConvergence.String(): true, model.Diverged.String(): true}
	var cycles []int
	var residuals []float64
	for i := range points {
		pt := &points[i]
		if pt.Cause != "" {
			r.Causes[pt.Cause]++
			if unsettled[pt.Cause] {
				r.Buildable++
			}
			continue
		}
		r.Buildable++
		r.Converged++
		perf := p.PerformanceOf(pt.Extra)
		for _, v := range pt.Extra {
			if math.IsNaN(v) || math.IsInf(v, 0) {
				r.NotANumber++
				break
			}
		}
		cycles = append(cycles, perf.Cycles)
		residuals = append(residuals, math.Abs(perf.EnergyResidual))
		for _, w := range perf.Warnings.Texts() {
			r.Warnings[w]++
		}
		if pareto.Violation(pt.G) == 0 {
			r.Feasible++
		}
	}
	// A design heated by its own friction has a periodic state too; it counts as settled.
	if n := r.Causes[model.NoHeat.String()]; n > 0 {
		r.Buildable += n
		r.Converged += n
	}
	if r.Buildable > 0 {
		r.ConvergedShare = float64(r.Converged) / float64(r.Buildable)
	}
	if n := len(cycles); n > 0 {
		slices.Sort(cycles)
		slices.Sort(residuals)
		r.CyclesMedian, r.CyclesNinety, r.CyclesWorst = cycles[n/2], cycles[n*9/10], cycles[n-1]
		r.ResidualMedian, r.ResidualWorst = residuals[n/2], residuals[n-1]
	}
	return r
}

func (p *program) printSurvey(r *surveyJSON, as format) error {
	if as == "json" {
		return report.JSON(p.out, r)
	}
	percent := func(n, of int) string {
		if of == 0 {
			return "-"
		}
		return fmt.Sprintf("%.2f %%", 100*float64(n)/float64(of))
	}
	rows := [][]string{
		{"designs", fmt.Sprint(r.Designs), ""},
		{"can be built", fmt.Sprint(r.Buildable), percent(r.Buildable, r.Designs)},
		{"settled, of those", fmt.Sprint(r.Converged), percent(r.Converged, r.Buildable)},
		{"meet all limits", fmt.Sprint(r.Feasible), percent(r.Feasible, r.Designs)},
		{"results that are no number", fmt.Sprint(r.NotANumber), ""},
		{"cycles: median, 90 %, worst", fmt.Sprintf("%d, %d, %d", r.CyclesMedian, r.CyclesNinety, r.CyclesWorst), ""},
		{"energy residual: median, worst", fmt.Sprintf("%.1e, %.1e", r.ResidualMedian, r.ResidualWorst), "of heat in"},
		{"designs per second", fmt.Sprintf("%.0f", r.DesignsPerSecond), ""},
	}
	add := func(what string, counts map[string]int) {
		names := make([]string, 0, len(counts))
		for name := range counts {
			names = append(names, name)
		}
		slices.Sort(names)
		for _, name := range names {
			rows = append(rows, []string{what + ": " + name, fmt.Sprint(counts[name]), percent(counts[name], r.Designs)})
		}
	}
	add("no result", r.Causes)
	add("warning", r.Warnings)
	if as == "csv" {
		return report.CSV(p.out, []string{"what", "value", "share"}, rows)
	}
	table := report.Table{Title: r.Study, Head: [][]string{{"what", "value", "share"}}, Rows: rows, Wrap: []int{0}}
	return table.Write(p.out, p.style().Listing())
}
