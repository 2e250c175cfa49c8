package report

import (
	"fmt"
	"io"
	"math"
	"strings"

	"hotfront/optimize"
	"hotfront/studies"
)

// near is the share of a bound or of a range that counts as at it.
const near = 0.01

// Press says what pressed a front: limits that hold it, variables at the ends of their ranges, and why
// designs failed.
func (f *Front) Press(w io.Writer) {
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
	f.failures(w)
}

func (f *Front) failures(w io.Writer) {
	for _, c := range f.Failures {
		fmt.Fprintf(w, "%s without a result: %s.\n", counted(c.Count, "design"), c.Cause)
	}
}

// Blame says, of a run in which nothing is feasible, which limits are out of reach or contradict each
// other, and what the nearest design misses.
func (f *Front) Blame(w io.Writer) {
	s := f.Problem.Study()
	if f.Evaluations == 0 {
		fmt.Fprintf(w, "The run holds no design yet: its search ended before the first batch, or is in it. The same search goes on.\n")
		return
	}
	if f.Nearest == nil {
		fmt.Fprintf(w, "None of %s has a result.\n", counted(f.Evaluations, "design"))
		f.failures(w)
		return
	}
	fmt.Fprintf(w, "None of %s meets all limits.\n", counted(f.Evaluations, "design"))
	blamed := false
	for i := range f.Reach {
		if r := &f.Reach[i]; r.Met == 0 {
			blamed = true
			l := &s.Limits[i]
			fmt.Fprintf(w, "No design meets %s (%s); the best on its own is %s with %s%s.\n",
				l.Name, l.BoundText(), ID(r.Seq), valueText(l, r.Result.Value), missText(r.Result))
		}
	}
	if !blamed {
		fmt.Fprintf(w, "Each limit is met by some designs, but no design meets all: they contradict each other here.\n")
		for i := range f.Reach {
			l := &s.Limits[i]
			fmt.Fprintf(w, "  %s (%s): met by %d\n", l.Name, l.BoundText(), f.Reach[i].Met)
		}
	}
	fmt.Fprintf(w, "The nearest to all, %s, misses:\n", ID(f.NearestSeq))
	perf, engine := f.Problem.PerformanceOf(f.Nearest.Extra), s.EngineAt(f.Nearest.X)
	for i, r := range s.LimitResults(&engine, &perf) {
		if l := &s.Limits[i]; !r.Met {
			fmt.Fprintf(w, "  %s is %s, to be %s%s\n", l.Name, valueText(l, r.Value), l.BoundText(), missText(r))
		}
	}
	f.failures(w)
}

// counted writes a number of things.
func counted(n int, thing string) string {
	if n == 1 {
		return "1 " + thing
	}
	return fmt.Sprintf("%d %ss", n, thing)
}

func valueText(l *studies.Limit, v float64) string {
	return strings.TrimSpace(l.Format(v) + " " + unit(l.Unit))
}

// missText says by what share of its bound a limit is missed.
func missText(r studies.LimitResult) string {
	if r.Bound == 0 {
		return ""
	}
	return fmt.Sprintf(", by %.1f %%", 100*math.Abs(r.Margin/r.Bound))
}
