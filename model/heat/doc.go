// Package heat gives the heat source of an engine: a burner with complete combustion, tube bank, radiation
// and air preheater, or a receiver of concentrated radiation. Both say what heat reaches the outside of the
// heater tubes at a given outer tube temperature, and where the rest went.
//
// Signs: heat to the tubes and losses are positive. Enthalpies are counted from 298.15 K with all water as
// vapour, so they go with the lower heating value. Plain numbers in and out; nothing here knows an engine.
//
// What is left out: dissociation (complete combustion overstates a flame above some 2200 K, and Balance says
// when), sulphur, humidity of the air, heat of the ash, condensation in the preheater (Balance says when the
// flue gas is below its dew point), and the power of fans.
package heat
