package correlation

// LaminarLimit is the Reynolds number [-] up to which tube flow is taken as laminar.
const LaminarLimit = 2300

// TurbulentLimit is the Reynolds number [-] from which tube flow is taken as fully turbulent.
const TurbulentLimit = 3000

// LaminarFriction gives the Darcy friction factor of developed laminar flow in a round tube [-].
//
//	f = 64/Re
//
// Re Reynolds number on the bore [-], 0 < Re < 2300. Exact (Hagen-Poiseuille).
//
// Source: [Incropera2007], eq. 8.19, from memory.
func LaminarFriction(Re float64) float64 { return 64 / Re }
