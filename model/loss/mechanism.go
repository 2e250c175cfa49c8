package loss

// ShaftWork gives the work at the shaft of a cycle [J] by Senft's theorem.
//
//	Ws = E W - (1/E - E) W-
//
// W indicated work [J], forced work W- [J] (ForcedWork), E effectiveness of the mechanism [-], 0 < E <= 1:
// the share of the work put into it that it hands on, the same in both directions. The result may be
// negative: such an engine does not run.
//
// Derivation: the piston gives W + W- to the mechanism, which hands on E (W + W-); the mechanism gives W-
// to the piston and takes W-/E for it. Equality where E is constant; for a drive whose effectiveness is
// nowhere below E the result is a lower bound.
//
// Source: [Senft1987], from memory.
func ShaftWork(E, W, forced float64) float64 { return E*W - (1/E-E)*forced }

// DriveLoss gives the work lost in the drive in a cycle [J], W - Ws of ShaftWork. It is not negative for
// W >= 0, and zero for E = 1.
func DriveLoss(E, W, forced float64) float64 { return (1-E)*W + (1/E-E)*forced }

// ForcedWork gives, for one body, the work of a cycle and the forced work in it [J]: the part of the work,
// taken positive, where the pressure difference acts against the motion and the mechanism must drive the
// body.
//
//	W = sum of (p - pb) dV,   W- = sum of max(0, -(p - pb) dV)
//
// p working and pb buffer pressure [Pa], dV the change of the volume above the body in one step [m3] with
// the pressures taken at its middle (or dV/dt at the same instant times the step). For several bodies on
// one shaft add the results of each.
//
// Source: [Senft1987], from memory.
func ForcedWork(p, pb, dV []float64) (work, forced float64) {
	for i, dv := range dV {
		w := (p[i] - pb[i]) * dv
		work += w
		if w < 0 {
			forced -= w
		}
	}
	return work, forced
}
