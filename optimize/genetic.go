package optimize

import (
	"context"
	"math"
	oldrand "math/rand"
	"math/rand/v2"

	"github.com/MaxHalford/eaopt"

	"hotfront/optimize/sample"
)

const (
	defaultPopulation = 40
	// With limits and few variables a population of 40 loses corners of the feasible front.
	limitedPopulation = 60
	limitedDims       = 8

	retries     = 8  // attempts to vary a child that was known before
	barrenLimit = 50 // generations without a new design that end the search
)

// member is one design of the population. It does not change once it is evaluated.
type member struct {
	u         []float64 // place in the unit cube
	seq       int
	f         []float64
	violation float64 // +Inf for a failed design
}

// genome hands a member to eaopt, which keeps a population sorted by fitness and no more: variation and
// selection are the generation's.
type genome struct {
	*member
	place float64 // order of survival, 0 best
}

var _ eaopt.Genome = genome{}

// Evaluate returns the place that the selection gave.
func (g genome) Evaluate() (float64, error) { return g.place, nil }

// Mutate is never called: the generation varies its brood itself.
func (g genome) Mutate(*oldrand.Rand) { panic("optimize: mutation belongs to the generation") }

// Crossover is never called: the generation varies its brood itself.
func (g genome) Crossover(eaopt.Genome, *oldrand.Rand) {
	panic("optimize: crossover belongs to the generation")
}

// Clone returns the genome itself, as members do not change.
func (g genome) Clone() eaopt.Genome { return g }

// seeded lends the run's generator to eaopt, which draws names for its individuals from it.
type seeded struct{ *rand.PCG }

var _ oldrand.Source64 = seeded{}

func (s seeded) Int63() int64 { return int64(s.Uint64() >> 1) }

func (s seeded) Seed(seed int64) { s.PCG.Seed(uint64(seed), 0) }

// The streams of a seed: each use of random numbers has its own, so that one can change without the others.
const (
	streamStart = iota + 1
	streamVary
	streamNames
	streamSimplex
)

// runGenetic searches by generations until ask stops it.
//
// The population begins with the problem's start designs, neighbours of them, and a Latin hypercube. Each
// generation makes as many children as the population has members (see variation), evaluates them as one
// batch, and keeps the best of both (see selection). Every feasible non-dominated design ever seen stays in
// the session's archive, however small the population.
func runGenetic(ctx context.Context, s *session, set Settings) error {
	size := set.Population
	if size == 0 {
		size = defaultPopulation
		if s.problem.Limits() > 0 && s.space.dims() <= limitedDims {
			size = limitedPopulation
		}
	}
	g := &generation{
		session: s,
		ask:     func(xs [][]float64, seqs []int) error { return s.evaluate(ctx, xs, seqs) },
		size:    size,
		vary:    newVariation(s.space, rand.New(rand.NewPCG(set.Seed, streamVary))),
	}
	members, err := g.begin(rand.New(rand.NewPCG(set.Seed, streamStart)))
	if err != nil {
		return err
	}
	next := 0
	ga, err := eaopt.GAConfig{
		NPops:        1,
		PopSize:      uint(len(members)),
		NGenerations: math.MaxUint32,
		HofSize:      1,
		Model:        g,
		RNG:          oldrand.New(seeded{rand.NewPCG(set.Seed, streamNames)}),
	}.NewGA()
	if err != nil {
		return err
	}
	return ga.Minimize(func(*oldrand.Rand) eaopt.Genome {
		next++
		return genome{members[next-1], float64(next - 1)}
	})
}

// generation is the model that eaopt applies once per generation.
type generation struct {
	session *session
	ask     func(xs [][]float64, seqs []int) error
	size    int
	vary    *variation
	relax   relaxation
	scan    scanner
	barren  int // generations without a new design, up to now
}

var _ eaopt.Model = (*generation)(nil)

// Validate has nothing to check: the settings were checked by Run.
func (g *generation) Validate() error { return nil }

// Apply replaces the population by the next one.
func (g *generation) Apply(pop *eaopt.Population) error {
	members := make([]*member, len(pop.Individuals), 2*len(pop.Individuals)+g.size)
	for i := range pop.Individuals {
		members[i] = pop.Individuals[i].Genome.(genome).member
	}
	us, xs, err := g.brood(members)
	if err != nil {
		return err
	}
	children, err := g.evaluate(us, xs)
	if err != nil {
		return err
	}
	g.vary.credit(members, children)
	members = survive(append(members, children...), g.size, g.relax.level(len(g.session.points)))
	if len(members) < len(pop.Individuals) {
		panic("optimize: population shrank")
	}
	for len(pop.Individuals) < len(members) {
		pop.Individuals = append(pop.Individuals, eaopt.NewIndividual(nil, pop.RNG))
	}
	for i, m := range members {
		ind := &pop.Individuals[i]
		ind.Genome, ind.Fitness, ind.Evaluated = genome{m, float64(i)}, float64(i), true
	}
	return nil
}

// begin makes and evaluates the first population. It may be smaller than asked for where the space is.
func (g *generation) begin(rng *rand.Rand) ([]*member, error) {
	sp := g.session.space
	var us, xs [][]float64
	add := func(u, x []float64) {
		us, xs = append(us, u), append(xs, x)
	}
	for _, x := range sp.start {
		u := make([]float64, sp.dims())
		sp.encode(u, x)
		add(u, append([]float64(nil), x...)) // the design as it is, not as it decodes
	}
	starts := len(us)
	if starts > 0 {
		for i := range max(0, min(g.size/4, g.size-starts)) {
			u := append([]float64(nil), us[i%starts]...)
			g.vary.nudge(u)
			x := make([]float64, sp.dims())
			sp.decode(x, u)
			add(u, x)
		}
	}
	for _, u := range sample.Latin(rng, max(0, g.size-len(us)), sp.dims()) {
		x := make([]float64, sp.dims())
		sp.decode(x, u)
		add(u, x)
	}
	members, err := g.evaluate(us, xs)
	if err != nil {
		return nil, err
	}
	g.relax = newRelaxation(members, g.size)
	return survive(members, g.size, g.relax.level(0)), nil
}

// evaluate answers designs and drops repetitions.
func (g *generation) evaluate(us, xs [][]float64) ([]*member, error) {
	first := len(g.session.points)
	seqs := make([]int, len(xs))
	if err := g.ask(xs, seqs); err != nil {
		return nil, err
	}
	members := make([]*member, 0, len(xs))
	for i, seq := range seqs {
		if seq != first+len(members) {
			continue // known before, or a twin within the batch
		}
		members = append(members, &member{u: us[i], seq: seq, f: g.session.points[seq].F, violation: g.session.violation[seq]})
	}
	return members, nil
}

// brood makes the children of a generation: designs never asked for before as far as they can be found. In
// a small space of whole numbers and choices the scanner finds what chance does not; when there is none
// left, or for barrenLimit generations no new design turned up in a large space, the search is exhausted.
func (g *generation) brood(members []*member) (us, xs [][]float64, err error) {
	sp := g.session.space
	known := func(x []float64) bool {
		_, found := g.session.lookup(x)
		return found
	}
	g.vary.prepare(members)
	fresh := false
	for range g.size {
		u, x := make([]float64, sp.dims()), make([]float64, sp.dims())
		g.vary.child(u, members)
		sp.decode(x, u)
		for try := 0; known(x); try++ {
			g.session.progress.Duplicates++
			if try == retries {
				x = nil
				break
			}
			g.vary.nudge(u)
			sp.decode(x, u)
		}
		if x == nil {
			x = make([]float64, sp.dims())
			if !g.scan.next(x, sp, known) {
				continue
			}
			sp.encode(u, x)
		}
		fresh = true
		us, xs = append(us, u), append(xs, x)
	}
	g.barren++
	if fresh {
		g.barren = 0
	}
	if g.barren > 0 && (sp.size <= scanLimit || g.barren == barrenLimit) {
		return nil, nil, errExhausted
	}
	return us, xs, nil
}
