package model

// String says in words why a design has no result.
func (c Cause) String() string {
	switch c {
	case None:
		return ""
	case BadInput:
		return "a quantity is not finite or has the wrong sign"
	case HeatedTooLong:
		return "heated or cooled length above the tube length"
	case BoresDiffer:
		return "displacer and piston of a beta machine have different bores"
	case TubesOverlap:
		return "heater tubes do not fit on their ring"
	case BundleTooWide:
		return "cooler tubes do not fit in their shell"
	case RodTooShort:
		return "connecting rod too short to turn"
	case CranksCollide:
		return "crank pins of the rhombic drive meet"
	case YokeJams:
		return "yoke and link cannot pass every crank angle"
	case GapTooWide:
		return "gap, wall or rod too large for the displacer or hot piston"
	case AnnulusInverted:
		return "inner diameter of the regenerator not below its outer diameter"
	case MatrixImpossible:
		return "porosity or wire of the regenerator cannot be made"
	case ColderThanCoolant:
		return "hot end not above the coolant"
	case SourceTooWeak:
		return "heat source too weak or too cold"
	case SourceTooHot:
		return "heat source drives the tube wall above 1530 degC"
	case ApertureTooWide:
		return "aperture larger than the wall of the receiver"
	case BankImpossible:
		return "tubes or fins leave the burner's gas no way through"
	case BankRange:
		return "burner's tube bank or fins outside the range of their laws"
	case NoHeat:
		return "flow friction, not the heat source, heats the engine"
	case BufferTooSmall:
		return "buffer space smaller than the piston's displacement"
	case NoConvergence:
		return "periodic state not reached"
	case Diverged:
		return "solution left the physical range"
	}
	return "unknown cause"
}

// Error makes a cause usable as an error.
func (c Cause) Error() string { return c.String() }
