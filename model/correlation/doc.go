// Package correlation holds laws of flow friction and heat transfer, one file a law.
//
// Plain numbers go in and come out. Friction factors are Darcy's (pressure drop = f L/d rho u^2/2);
// Reynolds and Nusselt numbers of a matrix are built on its hydraulic diameter and the velocity in the
// pores. All laws come from steady flow, or from oscillating flow reduced to instantaneous values, and
// are used here instant by instant.
//
// Every law has an exact function (with math.Pow) and, in Fast, a version from tables for the inner loop
// of the solver. Nothing is clamped: outside its range a law goes on as its formula says, and the Range
// function of the law tells so.
package correlation

// HydraulicDiameter of a matrix of wires of diameter dw [m] at porosity eps [-]: four times the void
// volume over the wetted surface of long cylinders [m].
//
//	d_h = dw eps/(1 - eps)
//
// Source: derived: wetted surface per solid volume of a long cylinder is 4/dw.
func HydraulicDiameter(dw, eps float64) float64 { return dw * eps / (1 - eps) }
