package main

import (
	"errors"
	"fmt"

	"github.com/spf13/cobra"

	"hotfront/cmd/internal/report"
	"hotfront/optimize/archive"
)

// shownDesigns is how many designs of a front a table shows.
const shownDesigns = 12

// top is the --top flag: how many designs to show.
type top struct {
	n     int
	given bool
}

func (t *top) add(c *cobra.Command) {
	c.Flags().Var(t, "top", fmt.Sprintf("designs to show, those that stand for the front best; 0 for all (default %d in tables, all in json and csv)", shownDesigns))
}

func (t *top) String() string { return "" }
func (t *top) Type() string   { return "K" }
func (t *top) Set(text string) error {
	if _, err := fmt.Sscanf(text+"\n", "%d\n", &t.n); err != nil || t.n < 0 {
		return fmt.Errorf("%q is not a whole number from 0 on", text)
	}
	t.given = true
	return nil
}

// in is the number of designs in a format, 0 for all.
func (t *top) in(as format) int {
	if !t.given && as == "table" {
		return shownDesigns
	}
	return t.n
}

type frontOptions struct {
	format format
	top    top
}

func (p *program) frontCommand() *cobra.Command {
	var o frontOptions
	c := &cobra.Command{
		Use:   "front DIR",
		Short: "The front of a run, read from its archive",
		Long: `front reads the designs of a run from its archive and prints the front: the designs that meet all limits and that no
other design beats. It evaluates none of them anew, and may be used while a search is writing to DIR.
Designs are named by the number they were tried at: d000123.`,
		Example: `  hotfront front runs/sawmill
  hotfront front runs/sawmill --format csv > front.csv
  hotfront front runs/sawmill --top 3 --format json`,
		Args: arguments("DIR"),
		RunE: func(_ *cobra.Command, args []string) error { return p.front(args[0], &o) },
	}
	o.format.add(c)
	o.top.add(c)
	return c
}

func (p *program) front(dir string, o *frontOptions) error {
	run, err := archive.Read(dir)
	if err != nil {
		return err
	}
	f, err := readFront(run, -1)
	if err := errors.Join(err, run.Close()); err != nil {
		return err
	}
	return p.printFront(f, o.format, &o.top, run.Meta().Model)
}

// printFront prints a front in the format asked for, or says why there is none.
func (p *program) printFront(f *report.Front, as format, t *top, version string) error {
	if len(f.Points) == 0 {
		f.Blame(p.err)
		return failed(exitInfeasible, "no design meets all limits")
	}
	picked := f.Pick(t.in(as))
	switch as {
	case "json":
		return f.JSON(p.out, picked, version)
	case "csv":
		return f.CSV(p.out, picked)
	}
	return f.Report(p.out, picked, p.style(), version)
}
