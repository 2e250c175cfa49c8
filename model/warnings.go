package model

// Texts says each warning in words.
func (w Warnings) Texts() []string {
	var texts []string
	for bit := Warnings(1); bit <= WarnDewPoint; bit <<= 1 {
		if w&bit != 0 {
			texts = append(texts, bit.text())
		}
	}
	return texts
}

func (w Warnings) text() string {
	switch w {
	case WarnScreenRange:
		return "Reynolds number or porosity of the regenerator outside the range of its law"
	case WarnMach:
		return "Mach number above 0.2: the uniform pressure of the model no longer holds"
	case WarnGasRange:
		return "gas temperature or pressure outside the range of the property fits"
	case WarnCreepRange:
		return "metal temperature or life outside the creep data: the allowable stress is extrapolated"
	case WarnTubeRange:
		return "tubes outside the range of the laws for film and friction"
	case WarnFitUnchecked:
		return "fit of the tubes not checked: give heater.ring_diameter and cooler.shell_diameter"
	case WarnPistonSpeed:
		return "mean piston speed above 6 m/s"
	case WarnFlame:
		return "adiabatic flame above 1927 degC: dissociation is left out and the heat to the tubes overstated"
	case WarnDewPoint:
		return "flue gas below its dew point: wet and corrosive, and more heat would be had than is counted"
	}
	return "unknown warning"
}
