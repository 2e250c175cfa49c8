// Package sample fills the unit cube with points: Latin hypercubes and Sobol' sequences. It takes plain
// numbers and a seeded source, and the same source gives the same points.
package sample
