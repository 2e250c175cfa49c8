package optimize

import (
	"cmp"
	"math"
	"math/rand/v2"
	"slices"

	"hotfront/optimize/sample"
)

const (
	defaultSimplexes = 4
	samplePerSimplex = 10   // designs of the first sample per simplex
	beginSize        = 0.1  // edge of a simplex at a new place, in parts of the bounds
	againFactor      = 0.4  // edge of a restart relative to the one before
	leastSize        = 1e-4 // edge below which no restart begins
	collapse         = 1e-9 // extent of a collapsed simplex
	gainLeast        = 1e-9 // relative gain of a restart that makes another one worth it
	weightBegin      = 10.0 // first penalty weight, in spreads of the first sample's values
	weightFactor     = 10.0
	weightRaises     = 8
	stillRounds      = 2000 // rounds without a new design that end the search
)

// runSimplex searches by Nelder-Mead simplexes in lock-step: in each round every simplex asks for its next
// designs, and all of them are one batch. They begin at the problem's start designs and at the best of a Latin
// hypercube. A simplex that has collapsed begins again around its best design, smaller, while that helps, and
// then at a new place, so that the search uses its whole budget.
//
// Numbers beyond the bounds are mirrored at them. Limits enter by an exact penalty first and as a wall at the
// end. Whole numbers are rounded; choices without order stay as they are at the place a simplex begins.
func runSimplex(s *session, set Settings) error {
	count := set.Population
	if count == 0 {
		count = defaultSimplexes
	}
	rng := rand.New(rand.NewPCG(set.Seed, streamSimplex))
	c := newCrowd(s, func(f []float64) float64 { return f[0] })

	// The first sample, and after it more places, without an end.
	first := make([]*vertex, 0, len(s.space.start)+samplePerSimplex*count)
	for _, x := range s.space.start {
		v := &vertex{u: make([]float64, s.space.dims()), x: slices.Clone(x)}
		s.space.encode(v.u, x)
		first = append(first, v)
	}
	starts := len(first)
	for _, u := range sample.Latin(rng, samplePerSimplex*count, s.space.dims()) {
		first = append(first, c.vertex(u))
	}
	if err := c.answer(first); err != nil {
		return err
	}
	c.weigh(first)
	slices.SortStableFunc(first[starts:], func(a, b *vertex) int {
		return cmp.Compare(wall(a.value, a.violation), wall(b.value, b.violation))
	})
	place := func() *vertex {
		if len(first) > 0 {
			v := first[0]
			first = first[1:]
			return v
		}
		u := make([]float64, s.space.dims())
		for k := range u {
			u[k] = rng.Float64()
		}
		return c.vertex(u)
	}
	for range count {
		c.add(place(), beginSize)
	}
	return c.run(place)
}

// vertex is a place in the unit cube and, once answered, what the design there is worth.
type vertex struct {
	u         []float64
	x         []float64
	value     float64
	violation float64 // +Inf for a failed design
}

// crowd is a set of descents that go on in lock-step.
type crowd struct {
	session  *session
	scalar   func(f []float64) float64 // one number to minimise
	weight   float64                   // first penalty weight
	descents []*descent
	still    int // rounds without a new design, up to now
}

func newCrowd(s *session, scalar func(f []float64) float64) *crowd {
	return &crowd{session: s, scalar: scalar, weight: weightBegin}
}

// vertex makes a vertex that is not answered yet. Unlike a member of a population it keeps its place between
// whole numbers.
func (c *crowd) vertex(u []float64) *vertex {
	v := &vertex{u: u, x: make([]float64, len(u))}
	c.session.space.decode(v.x, slices.Clone(u))
	return v
}

// weigh sets the first penalty weight from the spread of a sample's values: the middle half.
func (c *crowd) weigh(sample []*vertex) {
	var values []float64
	for _, v := range sample {
		if !math.IsInf(v.violation, 1) {
			values = append(values, v.value)
		}
	}
	if len(values) == 0 {
		return
	}
	slices.Sort(values)
	if spread := values[3*len(values)/4] - values[len(values)/4]; spread > 0 {
		c.weight = weightBegin * spread
	}
}

// answer evaluates vertices as one batch.
func (c *crowd) answer(vertices []*vertex) error {
	s := c.session
	xs, seqs := make([][]float64, len(vertices)), make([]int, len(vertices))
	for i, v := range vertices {
		xs[i] = v.x
	}
	before := s.asked()
	if err := s.evaluate(xs, seqs); err != nil {
		return err
	}
	c.still++
	if s.asked() > before {
		c.still = 0
	}
	for i, v := range vertices {
		v.violation = s.memo.violationOf(seqs[i])
		if !math.IsInf(v.violation, 1) {
			v.value = c.scalar(s.memo.aimsOf(seqs[i]))
		}
	}
	return nil
}

// add begins a descent at v.
func (c *crowd) add(v *vertex, size float64) {
	c.descents = append(c.descents, newDescent(c, v, size))
}

// run goes on until the budget or the context ends, no new design turns up, or every descent has finished and
// place, which may be nil, gives no new one.
func (c *crowd) run(place func() *vertex) error {
	defer func() {
		for _, d := range c.descents {
			d.end()
		}
	}()
	for {
		var batch []*vertex
		for i, d := range c.descents {
			if d.finished() && place != nil {
				d.end()
				d = newDescent(c, place(), beginSize)
				c.descents[i] = d
			}
			if !d.finished() {
				d.asked = d.ask()
				batch = append(batch, d.asked...)
			}
		}
		if len(batch) == 0 || c.still == stillRounds || float64(c.session.asked()) >= c.session.space.size {
			return errExhausted
		}
		if err := c.answer(batch); err != nil {
			return err
		}
		for _, d := range c.descents {
			if !d.finished() {
				d.tell()
			}
		}
	}
}
