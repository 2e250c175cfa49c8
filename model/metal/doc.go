// Package metal gives the properties of the alloys of hot parts: creep rupture strength, short-time
// strength, conductivity, specific heat, density, expansion and stiffness; and the hoop stress of a
// thick tube.
//
// Creep rupture by the Larson-Miller parameter with constant 20:
//
//	P  = T (20 + log10 t)        T in K, t in hours
//	log10 s = c0 + c1 z + c2 z^2 + c3 z^3,  z = P/1000 - 25,  s in Pa
//
// Source: [LarsonMiller]. The polynomials are fitted here to the rupture rows of
// testdata/reference/alloy_creep_rupture.csv and give each row in use within 10 % on stress; the
// tests list the rows left out with the reason. Outside the parameter range of an alloy's rows the
// curve goes on along its end tangent, and the result is marked as outside the range. An alloy
// is offered only where its rows let a fit be checked, so one with two rows (S34700, S30908) is not.
//
// The strength of a short load is held beside it: tensile and 0.2 % yield strength against
// temperature. They and the physical properties are typical handbook values from memory, no better
// than 10 % (strength 20 % above 650 degC), for the annealed state.
//
// These are mean values of published short and long tests, without the scatter of heats, welds,
// cycling, corrosion or hydrogen. They serve to compare designs. They are no basis for a
// pressure vessel.
package metal
