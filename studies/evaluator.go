package studies

import (
	"math"

	"hotfront/model"
	"hotfront/optimize"
)

// notFinite begins the cause of a design whose result is no number; the name of it follows.
const notFinite = "result not finite: "

// evaluator evaluates points for one worker.
type evaluator struct {
	problem     *Problem
	engine      model.Engine
	performance model.Performance
	workspace   *model.Workspace
}

// NewEvaluator makes an evaluator with an engine and a workspace of its own.
func (p *Problem) NewEvaluator() optimize.Evaluator {
	return &evaluator{problem: p, engine: p.study.Engine, workspace: model.NewWorkspace()}
}

// Evaluate fills the point from its X. A design without a result has its cause and zeros.
func (ev *evaluator) Evaluate(pt *optimize.Point) {
	s := ev.problem.study
	pt.Cause = ""
	s.design(&ev.engine, pt.X)
	model.Evaluate(&ev.performance, &ev.engine, &s.Corrections, ev.workspace)
	if ev.performance.Cause != model.None {
		fail(pt, ev.performance.Cause.String())
		return
	}
	for i := range s.outputs {
		v := s.outputs[i].Get(&ev.performance)
		if !finite(v) {
			fail(pt, notFinite+s.outputs[i].Name)
			return
		}
		pt.Extra[i] = v
	}
	n := len(s.outputs)
	pt.Extra[n] = float64(ev.performance.Warnings)
	pt.Extra[n+1], pt.Extra[n+2] = float64(ev.performance.Cycles), float64(ev.performance.Steps)
	for i := range s.Aims {
		v := pt.Extra[s.Aims[i].output]
		if s.Aims[i].Most {
			v = -v
		}
		pt.F[i] = v
	}
	for i := range s.Limits {
		l := &s.Limits[i]
		g := -l.Margin(l.Value(&ev.engine, &ev.performance)) / ev.problem.scales[i]
		if !finite(g) {
			fail(pt, notFinite+l.Name)
			return
		}
		pt.G[i] = g
	}
}

func finite(v float64) bool { return !math.IsNaN(v) && !math.IsInf(v, 0) }

// fail marks a point as failed; its numbers mean nothing and are made 0 so that no NaN gets out.
func fail(pt *optimize.Point, cause string) {
	pt.Cause = cause
	clear(pt.F)
	clear(pt.G)
	clear(pt.Extra)
}
