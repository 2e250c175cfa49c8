package main

import (
	"fmt"
	"io"
	"log/slog"
	"os"
	"time"

	"github.com/lmittmann/tint"
	"golang.org/x/term"

	"hotfront/cmd/internal/report"
	"hotfront/optimize"
	"hotfront/studies"
)

// progress tells how a search gets on: one line rewritten in place on a terminal, a line of log every
// ten seconds elsewhere.
type progress struct {
	w        io.Writer
	log      *slog.Logger
	terminal bool
	problem  *studies.Problem
	budget   int
	start    time.Time
	last     time.Time
	first    int       // designs recalled before the first was evaluated
	deadline time.Time // when --hours end; zero for never
}

func newProgress(w io.Writer, p *studies.Problem, budget int) *progress {
	now := time.Now()
	pr := &progress{w: w, problem: p, budget: budget, start: now, last: now}
	if f, ok := w.(*os.File); ok {
		pr.terminal = term.IsTerminal(int(f.Fd())) && os.Getenv("TERM") != "dumb"
	}
	pr.log = logger(w, pr.terminal)
	return pr
}

func logger(w io.Writer, terminal bool) *slog.Logger {
	if terminal {
		return slog.New(tint.NewTextHandler(w, &tint.Options{TimeFormat: time.TimeOnly, NoColor: os.Getenv("NO_COLOR") != ""}))
	}
	return slog.New(slog.NewTextHandler(w, nil))
}

// observe is called after every batch.
func (pr *progress) observe(s optimize.Progress) {
	now := time.Now()
	pause := 10 * time.Second
	if pr.terminal {
		pause = 200 * time.Millisecond
	}
	if s.Recalled == s.Evaluations {
		pr.first, pr.start = s.Recalled, now
	}
	if now.Sub(pr.last) < pause {
		return
	}
	pr.last = now
	rate := float64(s.Evaluations-pr.first) / max(now.Sub(pr.start).Seconds(), 1e-9)
	left := "-"
	if rate > 0 {
		rest := time.Duration(float64(pr.budget-s.Evaluations) / rate * float64(time.Second))
		if !pr.deadline.IsZero() {
			rest = min(rest, pr.deadline.Sub(now))
		}
		left = max(0, rest).Round(time.Second).String()
	}
	feasible := 100 * float64(s.Feasible) / float64(max(s.Evaluations, 1))
	hypervolume := report.HypervolumeText(pr.problem, s.Hypervolume)
	if pr.terminal {
		line := fmt.Sprintf("%d of %d designs  %s left  %.0f/s  %.0f %% feasible  front %d  hypervolume %s",
			s.Evaluations, pr.budget, left, rate, feasible, s.Front, hypervolume)
		fmt.Fprintf(pr.w, "\r\x1b[K%.*s", max(20, pr.width()-1), line)
		return
	}
	pr.log.Info("searching", "designs", s.Evaluations, "of", pr.budget, "per_second", int(rate), "feasible_percent", int(feasible),
		"front", s.Front, "hypervolume", hypervolume, "left", left)
}

// width is that of the terminal now.
func (pr *progress) width() int {
	if f, ok := pr.w.(*os.File); ok {
		if width, _, err := term.GetSize(int(f.Fd())); err == nil {
			return width
		}
	}
	return 80
}

// end clears the line.
func (pr *progress) end() {
	if pr.terminal {
		fmt.Fprint(pr.w, "\r\x1b[K")
	}
}
