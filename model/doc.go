// Package model works out the performance of one Stirling engine: Evaluate takes an Engine and the
// Corrections and fills a Performance. It is one model; the isothermal and the ideal adiabatic cycle are
// limits that the same code reproduces in the tests.
//
// # Assumptions
//
//   - The gas path is one-dimensional, its pressure uniform at any instant; friction gives pressure
//     differences afterwards and takes work, but does not change the flow (Mach number below 0.2).
//   - Spaces, ducts and unheated tube ends are well mixed and exchange no heat. What that leaves out, the
//     cycle-work factor stands for.
//   - Films and friction follow laws for steady flow in tubes and for the matrix at the flow of the instant.
//   - Tube walls keep their temperature over a cycle; the matrix swings. All parts of one kind share the
//     flow evenly.
//   - Conduction, shuttle, appendix gap and leakage go round the cycle and do not change it.
//   - The drive is judged by Senft's theorem with one effectiveness, each power piston by itself.
//   - Heat that goes round the cycle, lost p-V work and leakage end in the coolant; drive and seals heat the
//     surroundings.
//
// # Signs
//
// Heat into the gas, work of the gas and flow towards the compression space are positive. Powers and losses
// of a Performance are positive as their names say.
//
// # Symbols
//
//	A area, cp heat capacity, d diameter, Dh hydraulic diameter, f friction factor (Darcy) or frequency,
//	h enthalpy, k conductivity, L length, m mass, M mass flow, mu viscosity, p pressure, Q heat, R gas
//	constant, s entropy, T temperature, u velocity or internal energy, UA film conductance, v specific
//	volume, V volume, eps porosity, rho density, theta crank angle; Re, Pr, Pe, Nu, NTU as usual.
//
// Everything is SI.
package model
