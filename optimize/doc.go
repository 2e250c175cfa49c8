// Package optimize searches a box of variables for the designs that no other design beats in every aim.
//
// A caller describes its task as a Problem: variables with bounds and kinds, aims that are minimised,
// limits that are met when not positive, and an evaluator. Run hands batches of designs to worker
// goroutines and keeps every non-dominated design it has seen.
//
// Two drivers share that loop:
//
//   - Genetic, for one to three aims (genetic.go): real-coded variation, hypervolume selection, an
//     unbounded archive of non-dominated designs.
//   - Simplex, for one aim (neldermead.go): several Nelder-Mead simplexes in lock-step.
//
// Polish improves one named design of a front by the same simplex method.
//
// # What a result depends on
//
// A run is a function of the problem, the driver, the seed and the population alone. Workers draw no
// random numbers and write their results by index, so their number and their timing change nothing.
// The budget only says where the run stops: a run with a larger budget goes through the very same
// designs first.
//
// # Memory
//
// Every design that a driver asks for gets a sequence number 0, 1, 2, ... A Ledger stores the answers
// by that number, in a goroutine beside the search. To go on after an interruption, Run starts again from
// number zero with the same problem, seed and population; what the ledger holds is taken from there instead of being evaluated,
// and the drivers, being deterministic, arrive where they were. A design that was asked for before is
// a duplicate: its answer comes from the run's own cache and costs no evaluation.
//
// A run keeps of each design its variables, aims and violation, and points with all their results only of those
// on the front.
//
// # Failures
//
// A design that cannot be evaluated is a value: its Cause says why, and it ranks below every other
// design. A panic in an evaluator and a result that is not finite become causes too.
//
// # Order
//
// Designs rank feasible first, then by the sum of what they exceed the limits by, then by dominance
// (package pareto). Ties are broken by sequence number.
package optimize
