package report

import (
	"fmt"
	"io"
	"math"

	"hotfront/model"
	"hotfront/model/drive"
)

// The range of Beale numbers of well-developed engines with a hot end of some 650 degC, as published (values quoted in
// textbooks, from memory).
const (
	bealeLow  = 0.11
	bealeHigh = 0.15
)

// Beale says how the front stands to the published range of Beale numbers, and where it is below, which part of the p-V
// power is lost on the way to the shaft.
func (f *Front) Beale(w io.Writer) {
	low, high := math.Inf(1), math.Inf(-1)
	below, above := 0, 0
	var flow, cycle, drive, other, hot, swept float64
	for k := range f.Points {
		e, p := f.at(k)
		low, high = min(low, p.BealeNumber), max(high, p.BealeNumber)
		if p.BealeNumber > bealeHigh {
			above++
			swept += displacerOverPiston(&e)
		}
		if p.BealeNumber >= bealeLow || p.PVPower <= 0 {
			continue
		}
		below++
		l := &p.Losses
		flow += l.FlowFriction / p.PVPower
		cycle += l.CycleWork / p.PVPower
		drive += (l.Drive + l.SealFriction) / p.PVPower
		other += (l.Leakage + l.GasSpring) / p.PVPower
		hot += (p.HeaterOuterTemperature - e.Coolant.Inlet) / p.HeaterOuterTemperature
	}
	if len(f.Points) == 0 {
		return
	}
	fmt.Fprintf(w, "Beale number %.3f to %.3f; published for well-developed engines at some 650 degC: %.2f to %.2f.\n", low, high, bealeLow, bealeHigh)
	if below > 0 {
		n := float64(below)
		fmt.Fprintf(w, "Below that are %d of %d front designs: of their p-V power flow friction takes %.0f %%, cycle work %.0f %%, drive and seals %.0f %%, leakage and buffer %.0f %%",
			below, len(f.Points), 100*flow/n, 100*cycle/n, 100*drive/n, 100*other/n)
		// Between 650 and 40 degC Carnot's efficiency is 0.66; power goes with it.
		if c := hot / n; c < 0.6 {
			fmt.Fprintf(w, ", and between their hot and cold end Carnot's efficiency is %.0f %%, not 66 %%", 100*c)
		}
		fmt.Fprintln(w, ".")
	}
	if above > 0 {
		fmt.Fprintf(w, "Above that are %d of %d front designs: ", above, len(f.Points))
		if r := swept / float64(above); r > 1.05 {
			fmt.Fprintf(w, "their displacer sweeps %.2f times as much as the piston, which alone counts.\n", r)
		} else {
			fmt.Fprintf(w, "more than engines have shown; check corrections and clearances.\n")
		}
	}
}

// displacerOverPiston is the swept volume of the displacer over that of the piston; 1 where it makes no difference.
func displacerOverPiston(e *model.Engine) float64 {
	if e.Layout != model.Gamma || e.Drive.Kind == drive.Rhombic {
		return 1
	}
	d, p := &e.Displacer, &e.Piston
	return d.Bore * d.Bore * d.Stroke / (p.Bore * p.Bore * p.Stroke)
}
