// Package metal gives the properties of the alloys of hot parts: creep rupture strength, short-time
// strength, conductivity, specific heat, density, expansion and stiffness; and the hoop stress of a
// thick tube.
//
// Creep rupture by the Larson-Miller parameter with constant 20:
//
//	P  = T (20 + log10 t)        T in K, t in hours
//	log10 s = c0 + c1 z + c2 z^2 + c3 z^3,  z = P/1000 - 25,  s in Pa
//
// Source: [LarsonMiller1952]. The polynomials are fitted here to the rupture rows of
// testdata/reference/alloy_creep_rupture.csv, by least squares on log s with more weight on the worst
// rows, and give each row in use within 10 % on stress; the tests list the rows left out with the
// reason. Of the rows in use some are extrapolated by their source, as they say. Three rows a piece
// carry N06625, N06002, N06600, N06601, N08810, N08330 and S30815 (a straight line each), five
// S30400, S31000 and S31600, 22 N06230. Outside the parameter range of an alloy's rows the curve goes on along its
// end tangent, and the result is marked as outside the range. An alloy is offered only where its rows
// let a fit be checked, so one with two rows (S34700, S30908) is not. The rows come from [NickelSheet],
// and for the stainless steels also from [ASM1990] and [SupplierSheet].
//
// The strength of a short load is held beside it: tensile and 0.2 % yield strength against
// temperature. They and the physical properties are typical handbook values from memory, no better
// than 10 % (strength 20 % above 650 degC), for the annealed state.
//
// These are mean values of published short and long tests, without the scatter of heats, welds,
// cycling, corrosion or hydrogen. They serve to compare designs. They are no basis for a
// pressure vessel.
package metal
