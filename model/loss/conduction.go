package loss

import "math"

// WallConduction gives the heat conducted along a wall [W].
//
//	Q = k A dT/L
//
// k conductivity of the metal at the mean temperature [W/(m K)] (exact where k is linear in T), A section
// [m2], L length [m], dT difference of the end temperatures [K].
//
// Source: Fourier's law, [Incropera2007], eq. 1.2.
func WallConduction(k, A, L, dT float64) float64 {
	if A == 0 || dT == 0 {
		return 0
	}
	return k * A * dT / L
}

// TubeSection gives the section of the wall of a tube of inner diameter d and wall w [m2].
//
//	A = pi (d + w) w
func TubeSection(d, w float64) float64 { return math.Pi * (d + w) * w }

// ShellSection gives the section of the wall of a hollow body of outer diameter D and wall w [m2], such
// as a displacer; its dome is left out, which errs by no more than its thickness against the length.
//
//	A = pi (D - w) w
func ShellSection(D, w float64) float64 { return math.Pi * (D - w) * w }

// AnnulusSection gives the area between two circles of diameters inner and outer [m2].
func AnnulusSection(inner, outer float64) float64 {
	return 0.25 * math.Pi * (outer - inner) * (outer + inner)
}
