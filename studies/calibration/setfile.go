package calibration

import (
	"fmt"
	"math"
	"path/filepath"
	"strings"
	"time"

	"hotfront/model"
	"hotfront/studies"
)

// SetFile writes an outcome as a file of corrections: the block that a study takes, and below it, for
// people, what it was fitted to.
func SetFile(o *Outcome, name, studyFile, testsFile string, made time.Time) string {
	var b strings.Builder
	fmt.Fprintf(&b, "# Corrections fitted by hotfront calibrate. A study takes them by this file's name after corrections:\n")
	fmt.Fprintf(&b, "corrections:\n  set: %s\n  version: %q\n", name, made.Format("2006-01-02"))
	for _, f := range studies.Factors() {
		fmt.Fprintf(&b, "  %s: %s\n", f.Name, factorText(f, *f.At(&o.Corrections), 5))
	}
	fmt.Fprintf(&b, "fit:\n  model_version: %q\n  study: %s\n  tests: %s\n  factors:\n", model.Version, filepath.Base(studyFile), filepath.Base(testsFile))
	for i, n := range o.Names {
		for _, f := range studies.Factors() {
			if f.Name == n {
				fmt.Fprintf(&b, "    %s: {standard_uncertainty: %s}\n", n, factorText(f, o.Fit.Uncertainty[i], 2))
			}
		}
	}
	fmt.Fprintf(&b, "  rows:\n")
	for i := range o.Rows {
		r := &o.Rows[i]
		left := "none"
		if len(o.LeaveOut) > 0 && !math.IsNaN(o.LeaveOut[i]) {
			left = r.Text(o.LeaveOut[i])
		}
		fmt.Fprintf(&b, "    - {settings: %q, quantity: %s, measured: %s, model: %s, fit_without_it: %s}\n",
			r.Label, r.Quantity, r.Text(r.Value), r.Text(o.Model[i]), left)
	}
	return b.String()
}

func factorText(f studies.Factor, v float64, digits int) string {
	text := studies.FormatNumber(studies.FromSI(v, f.Quantity, f.Unit), digits)
	if f.Unit == "-" {
		return text
	}
	return text + " " + f.Unit
}
