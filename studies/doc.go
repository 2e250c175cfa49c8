// Package studies reads study files and turns them into an engine and a search problem.
//
// A study file is YAML. Its keys are study, about, engine, corrections, free, limits, aims, budget
// and seed. A number may carry a unit and is SI without one; this package is the only place where
// units are converted. Every mistake is found in one reading and is an Issue with its place.
//
// One table of fields (Fields) says all there is to say about the inputs: path, unit, range,
// default, when they apply, and how they are read from and written to a model.Engine. A second
// one (Outputs) does so for the results. Reading, checking, --set, limits, aims, formulas and the
// lists shown to users come from these two tables.
//
// The way of a number: Load (guard.go, load.go, engine.go) -> Study -> NewProblem (bind.go) ->
// evaluator (evaluator.go) -> model.Evaluate -> optimize.Point.
package studies
