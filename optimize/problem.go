package optimize

// Kind says what values a variable may take.
type Kind uint8

const (
	Real    Kind = iota // any number in [Low, High]
	Integer             // a whole number in [Low, High]
	Ordered             // index 0..High of an ordered list (stock sizes)
	Choice              // index 0..High of a list without an order (gas, alloy)
)

// Variable is one free variable of a problem, in its natural units.
type Variable struct {
	Name string
	Kind Kind
	Low  float64 // smallest value; 0 for Ordered and Choice
	High float64 // largest value; last index for Ordered and Choice
}

// Problem is all that a driver knows of what it searches: it knows nothing of engines.
type Problem interface {
	// Variables lists the free variables; the length of Point.X.
	Variables() []Variable
	// Aims is the number of aims, all minimised; the length of Point.F.
	Aims() int
	// Limits is the number of limits; the length of Point.G.
	Limits() int
	// Extras is the number of further results a point carries along unread; the length of Point.Extra.
	Extras() int
	// Start lists designs (natural values) that enter the first generation as they are.
	Start() [][]float64
	// Reference is the point the hypervolume is measured from, in the minimised aims.
	Reference() []float64
	// NewEvaluator makes an evaluator for one worker. An evaluator is used by one goroutine at a time
	// and its answer depends on the point's X alone.
	NewEvaluator() Evaluator
}

// Evaluator fills a point. It never panics and never returns NaN: a design that fails has a Cause.
type Evaluator interface {
	Evaluate(p *Point)
}
