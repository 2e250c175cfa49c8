//go:build race

package optimize_test

// defaultSeeds under the race detector, which is ten times slower: it looks for races, not for quality.
const defaultSeeds = 1
