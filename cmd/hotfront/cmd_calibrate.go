package main

import (
	"errors"
	"fmt"
	"io/fs"
	"os"
	"regexp"
	"slices"
	"strings"
	"time"

	"github.com/spf13/cobra"

	"hotfront/cmd/internal/report"
	"hotfront/studies"
	"hotfront/studies/calibration"
)

type calibrateOptions struct {
	format format
	tests  string
	fit    []string
	out    string
	name   string
}

func (p *program) calibrateCommand() *cobra.Command {
	var o calibrateOptions
	c := &cobra.Command{
		Use:   "calibrate STUDY --tests FILE.csv",
		Short: "Fits the corrections to measurements of an engine",
		Long: `calibrate fits correction factors to rows of measurements and says how well the rows determine them. STUDY describes
the engine; factors that are not fitted stay as its corrections say. FILE.csv has a head of column names:

  quantity     a result as in 'hotfront fields', or ` + calibration.BestSpeed + `
  value        with its unit
  uncertainty  in the unit of the value, or in % of it (in points where the value itself is in %); 3 % of it when empty
  note         passed over
  any input    by its path, as gas, charge_pressure, speed, heat.tube_gas: replaces that of the study

It prints each row before and after, what a fit to the other rows predicts for it, each factor with its standard
uncertainty, and warns of what the rows leave open. --out writes a file that 'corrections:' of a study takes.`,
		Example: `  hotfront calibrate my-engine.yaml --tests bench.csv
  hotfront calibrate my-engine.yaml --tests bench.csv --fit flow_friction,seal_friction --out bench.yaml --name bench`,
		Args: arguments("STUDY"),
		RunE: func(_ *cobra.Command, args []string) error { return p.calibrate(args[0], &o) },
	}
	o.format.add(c)
	f := c.Flags()
	f.StringVar(&o.tests, "tests", "", "file of measurements (needed)")
	f.StringSliceVar(&o.fit, "fit", []string{"flow_friction", "cycle_work"}, "factors to fit")
	f.StringVar(&o.out, "out", "", "file of corrections to write")
	f.StringVar(&o.name, "name", "", "name of the set in that file; that of the study when not given")
	return c
}

func (p *program) calibrate(file string, o *calibrateOptions) error {
	if o.tests == "" {
		return failed(exitUsage, "calibrate needs --tests FILE.csv")
	}
	if err := knownFactors(o.fit); err != nil {
		return err
	}
	s, data, err := p.load(file)
	if err != nil {
		return err
	}
	if o.name == "" {
		o.name = s.Name
	}
	if o.out != "" {
		if err := o.checkOut(); err != nil {
			return err
		}
	}
	tests, err := os.ReadFile(o.tests)
	if err != nil {
		return err
	}
	rows, err := calibration.ReadTests(o.tests, tests, file, data)
	if err != nil {
		return failed(exitStudy, err.Error())
	}
	outcome, err := calibration.Fit(rows, o.fit, s.Corrections)
	if err != nil {
		return err
	}
	switch o.format {
	case "json":
		err = report.JSON(p.out, report.CalibrationJSON(outcome))
	case "csv":
		err = report.CalibrationCSV(p.out, outcome)
	default:
		err = report.CalibrationTable(p.out, outcome, p.style())
	}
	if err != nil || o.out == "" {
		return err
	}
	text := calibration.SetFile(outcome, o.name, file, o.tests, time.Now().UTC())
	f, err := os.OpenFile(o.out, os.O_WRONLY|os.O_CREATE|os.O_EXCL, 0o666)
	if errors.Is(err, fs.ErrExist) {
		return fmt.Errorf("%s is there already", o.out)
	} else if err != nil {
		return err
	}
	if _, err := f.WriteString(text); err != nil {
		return errors.Join(err, f.Close())
	}
	fmt.Fprintf(p.err, "wrote %s\n", o.out)
	return f.Close()
}

// knownFactors refuses a factor that there is not.
func knownFactors(names []string) error {
	var known []string
	for _, f := range studies.Factors() {
		known = append(known, f.Name)
	}
	for _, name := range names {
		if !slices.Contains(known, name) {
			return failed(exitUsage, fmt.Sprintf("--fit: no factor is called %q: %s", name, strings.Join(known, ", ")))
		}
	}
	return nil
}

// checkOut refuses a name or a file for the corrections before any work is done for them.
func (o *calibrateOptions) checkOut() error {
	if !regexp.MustCompile(`^[A-Za-z0-9][A-Za-z0-9_-]*$`).MatchString(o.name) {
		return failed(exitUsage, fmt.Sprintf("%q is no name for a set of corrections: letters, digits, - and _; give one by --name", o.name))
	}
	if slices.Contains([]string{"none", "rig"}, o.name) {
		return failed(exitUsage, fmt.Sprintf("%q is the name of a shipped set; give another by --name", o.name))
	}
	if _, err := os.Stat(o.out); err == nil {
		return fmt.Errorf("%s is there already", o.out)
	}
	return nil
}
