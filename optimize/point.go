package optimize

// Point is one design and what became of it. Drivers treat a point with a Cause as worse than any
// point without one, whatever F and G hold.
type Point struct {
	X     []float64 // natural values, one per variable
	F     []float64 // aims, minimised
	G     []float64 // limits, met when <= 0, each scaled to order one
	Extra []float64 // further results, carried along unread
	Cause string    // why the design failed; empty for a valid result
}

// NewPoint makes a point with room for a problem's results.
func NewPoint(p Problem) Point {
	return Point{
		X:     make([]float64, len(p.Variables())),
		F:     make([]float64, p.Aims()),
		G:     make([]float64, p.Limits()),
		Extra: make([]float64, p.Extras()),
	}
}
