package report

import (
	"fmt"
	"io"
	"math"

	"hotfront/optimize"
	"hotfront/studies"
)

// Press says what pressed a front: limits that hold it, variables at the ends of their ranges, and why
// designs failed. near is the share of a bound or range that counts as at it.
func (f *Front) Press(w io.Writer, failures []optimize.CauseCount) {
	const near = 0.01
	s := f.Problem.Study()
	n := len(f.Points)
	for i := range s.Limits {
		count := 0
		for k := range f.Points {
			if -f.Points[k].G[i] < near {
				count++
			}
		}
		if count > 0 {
			fmt.Fprintf(w, "%d of %d front designs stand within 1 %% of the limit %s (%s).\n", count, n, s.Limits[i].Name, s.Limits[i].BoundText())
		}
	}
	for i, v := range f.Problem.Variables() {
		if v.Kind == optimize.Choice || v.High <= v.Low {
			continue
		}
		low, high := 0, 0
		for k := range f.Points {
			x := (f.Points[k].X[i] - v.Low) / (v.High - v.Low)
			if x <= near {
				low++
			}
			if x >= 1-near {
				high++
			}
		}
		field, _ := studies.FieldNamed(s.Fields(), v.Name)
		end := func(count int, word string, x float64) {
			if 4*count >= n {
				if s.Free[i].List != nil {
					x = s.Free[i].List[int(x)]
				}
				fmt.Fprintf(w, "%d of %d sit at the %s end of %s (%s): widen it if such a machine can be built.\n", count, n, word, v.Name, field.ValueText(x))
			}
		}
		end(low, "lower", v.Low)
		end(high, "upper", v.High)
	}
	for _, c := range failures {
		fmt.Fprintf(w, "%d designs without a result: %s.\n", c.Count, c.Cause)
	}
}

// Blame says, of a search that found nothing feasible, which limits its nearest design misses.
func Blame(w io.Writer, p *studies.Problem, least *optimize.Point, failures []optimize.CauseCount, evaluations int) {
	s := p.Study()
	if least == nil {
		fmt.Fprintf(w, "None of %d designs has a result.\n", evaluations)
	} else {
		fmt.Fprintf(w, "None of %d designs meets all limits. The nearest misses:\n", evaluations)
		perf := p.PerformanceOf(least.Extra)
		engine := s.EngineAt(least.X)
		for i, r := range s.LimitResults(&engine, &perf) {
			if r.Met {
				continue
			}
			l := &s.Limits[i]
			miss := ""
			if r.Bound != 0 {
				miss = fmt.Sprintf(", by %.1f %%", 100*math.Abs(r.Margin/r.Bound))
			}
			fmt.Fprintf(w, "  %s is %s %s, to be %s%s\n", l.Name, l.Format(r.Value), unit(l.Unit), l.BoundText(), miss)
		}
	}
	for _, c := range failures {
		fmt.Fprintf(w, "%d designs without a result: %s.\n", c.Count, c.Cause)
	}
}
