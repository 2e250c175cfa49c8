package correlation

// TubeNusselt gives the mean Nusselt number in a smooth round tube at any Reynolds number [-]: laminar
// (Hausen) to Re = 2300, turbulent (Gnielinski) from 3000 on, and between the two the same smooth blend
// of the end values as in TubeFriction, continuous and monotone.
//
// Source: [Gnielinski2013] (blend of the two end values); its shape and limits: own choice.
func TubeNusselt(Re, Pr, DoverL float64) float64 {
	switch {
	case Re <= LaminarLimit:
		return HausenNusselt(Re, Pr, DoverL)
	case Re >= TurbulentLimit:
		return GnielinskiNusselt(PetukhovFriction(Re), Re, Pr, DoverL)
	}
	low := HausenNusselt(LaminarLimit, Pr, DoverL)
	high := GnielinskiNusselt(PetukhovFriction(TurbulentLimit), TurbulentLimit, Pr, DoverL)
	return low + blend(Re)*(high-low)
}

// TubeRange tells whether tube friction and heat transfer are inside the range of their laws: Re up to
// 5e6, Pr 0.5 to 2000, bore not above length.
func TubeRange(Re, Pr, DoverL float64) bool {
	return Re >= 0 && Re <= 5e6 && Pr >= 0.5 && Pr <= 2000 && DoverL >= 0 && DoverL <= 1
}
