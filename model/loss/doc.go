// Package loss holds the losses that a closed formula gives, one file a loss: heat that goes from the
// hot to the cold end without taking part in the cycle, gas that leaks, and work lost in the drive.
//
// Plain numbers go in and watts, or joules a cycle, come out. A loss is never negative and is zero where
// its cause is zero. Arrays sampled over a cycle are spaced evenly in time (equal weights), because the
// solver marches in equal steps; a sum over them is then the time mean by the rectangle rule, which for a
// periodic smooth function is as good as any.
package loss
