package model

// TurnSample is one instant of a turn of the shaft, of the first circuit but for the torque.
type TurnSample struct {
	Angle             float64 // crank angle [rad]
	Pressure          float64 // of the working gas [Pa]
	ExpansionVolume   float64 // [m3]
	CompressionVolume float64 // [m3]
	HotForce          float64 // axial gas force on displacer, expansion piston or double-acting piston, upwards [N]
	ColdForce         float64 // axial gas force on piston or compression piston, upwards [N]; 0 in a double-acting machine
	Torque            float64 // at the shaft, of the whole machine, with inertia [N m]
}

// Turn fills dst with the instants at the end of every step of the design that w evaluated last, from the first step on,
// and returns them: the pressure is that of the cycle, the forces have the pressure drops in them.
func Turn(dst []TurnSample, w *Workspace) []TurnSample {
	dst = dst[:0]
	l, m := &w.loads, &w.Path.Fine
	for k := 1; k < l.count; k += 2 {
		dst = append(dst, TurnSample{
			Angle: l.angle[k], Pressure: w.Trace().Pressure[k], ExpansionVolume: m.Ve[k], CompressionVolume: m.Vc[k],
			HotForce: l.hot[k] + l.hotDrop[k], ColdForce: l.cold[k] + l.coldDrop[k], Torque: l.torque[k],
		})
	}
	return dst
}
