// Package pareto orders designs by several aims at once. All aims are minimised. It takes plain numbers
// and knows nothing of what they mean.
//
//	dominate.go     who beats whom
//	sort.go         fronts: the designs nobody beats, those beaten by the first front alone, ...
//	archive.go      every non-dominated point seen so far, without a bound on their number
//	hypervolume.go  the measure of what a set of points dominates, and each point's own share
//	truncate.go     the points to keep when each drop should cost the least
//	choose.go       the k points that stand for a front best
//
// Numbers that are not comparable (NaN) are refused at the entry of every function that keeps or orders
// points: a NaN compares false with everything and would pass for unbeaten.
package pareto
