//go:build !race

package optimize_test

// defaultSeeds of the quality table.
const defaultSeeds = 11
