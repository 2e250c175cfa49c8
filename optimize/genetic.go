package optimize

import (
	"math"
	oldrand "math/rand"
	"math/rand/v2"
	"slices"

	"github.com/MaxHalford/eaopt"
)

const (
	defaultPopulation = 32
	// With limits and few variables a smaller population loses corners of the feasible front.
	limitedPopulation = 80
	limitedDims       = 8
	// In a small space of whole numbers a large population is mostly its first sample.
	leastPopulation  = 8
	designsPerMember = 20

	neighbours  = 4  // one in so many of the first population is a neighbour of a start design
	retries     = 8  // attempts to vary a child that was known before
	leadShare   = 8  // one in so many children is under way while the next ones are bred
	barrenLimit = 50 // broods without a new design that end the search
)

// member is one design of the population. It does not change once it is evaluated.
type member struct {
	u         []float64 // place in the unit cube
	x         []float64 // natural values, until it is asked for
	f         []float64
	violation float64 // +Inf for a failed design
	seq       int

	op     int       // operator that made it
	parent *member   // whom its operator is judged against, nil once judged
	origin []float64 // place of the parent, nil if the parent met the limits better
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
	streamRenew
)

// runGenetic searches by generations until ask stops it.
//
// The population begins with the problem's start designs, neighbours of them, and a Latin hypercube. Each
// generation makes as many children as the population has members (see variation), asks for them, and keeps the
// best of the population and the children that are in (see survive). The last leadShare-th of what is asked for
// may still be under way then, so that workers have something to do meanwhile; it takes part in the next
// selection. Which designs those are is told by their numbers, never by who comes first. Every feasible non-dominated design ever seen stays in
// the session's archive, however small the population. A population that has settled gets a second start (see
// renewal).
func runGenetic(s *session, set Settings) error {
	size := set.Population
	if size == 0 {
		size = defaultPopulation
		if s.problem.Limits() > 0 && s.space.dims() <= limitedDims {
			size = limitedPopulation
		}
		size = int(min(float64(size), max(leastPopulation, s.space.size/designsPerMember)))
	}
	g := &generation{
		session: s,
		size:    size,
		shelter: newShelter(s.space, size),
		vary:    newVariation(s.space, rand.New(rand.NewPCG(set.Seed, streamVary))),
		renew:   renewal{rng: rand.New(rand.NewPCG(set.Seed, streamRenew))},
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
	size    int
	vary    *variation
	relax   relaxation
	shelter shelter
	renew   renewal
	scan    scanner
	barren  int       // broods without a new design, up to now
	flight  []*member // asked for and not awaited
	upto    int       // number to await for all of them
	values  []float64 // natural values of the brood until it is asked for
	xs      [][]float64
	seqs    []int
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
	members, err := g.renewed(members)
	if err != nil {
		return err
	}
	pop.Individuals = pop.Individuals[:min(len(pop.Individuals), len(members))]
	children, err := g.breed(members)
	if err != nil {
		if failed := g.session.await(g.upto); failed != nil {
			return failed
		}
		return err
	}
	if children, err = g.ask(children); err != nil {
		return err
	}
	g.flight = append(g.flight, children...)
	arrived, upto := len(g.flight), g.upto
	if lead := g.size / leadShare; lead > 0 && len(children) > lead {
		arrived -= lead
		upto = g.flight[arrived-1].seq + 1
	}
	if err := g.session.await(upto); err != nil {
		return err
	}
	born := len(members)
	all := append(members, g.flight[:arrived]...)
	g.flight = slices.Clone(g.flight[arrived:])
	g.learn(all[born:])
	count := g.session.counted
	kept := g.shelter.survive(all, g.size, g.relax.level(count-g.renew.since), count)
	alive := make([]bool, len(all))
	members = make([]*member, len(kept))
	for k, i := range kept {
		alive[i] = true
		members[k] = all[i]
	}
	g.vary.credit(all, born, alive)
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
	var first []*member
	for _, x := range sp.start { // the designs as they are, not as they decode
		m := &member{u: make([]float64, sp.dims()), x: slices.Clone(x)}
		sp.encode(m.u, x)
		first = append(first, m)
	}
	if starts := len(first); starts > 0 {
		for i := range max(0, min(g.size/neighbours, g.size-starts)) {
			u := slices.Clone(first[i%starts].u)
			g.vary.nudge(u)
			first = append(first, sp.member(u))
		}
	}
	first, err := g.first(rng, first)
	if err != nil {
		return nil, err
	}
	g.relax = newRelaxation(first, g.size)
	return choose(first, survive(first, g.size, g.relax.level(0))), nil
}

// member makes a member that is not evaluated yet and moves u to its values' own places.
func (s *space) member(u []float64) *member {
	m := &member{u: u, x: make([]float64, len(u))}
	s.decode(m.x, u)
	return m
}

// ask asks for members and drops repetitions: what was known before and twins among them.
func (g *generation) ask(members []*member) (kept []*member, err error) {
	xs, seqs := g.xs[:0], slices.Grow(g.seqs[:0], len(members))[:len(members)]
	for _, m := range members {
		xs = append(xs, m.x)
	}
	g.xs, g.seqs = xs, seqs
	first := g.session.asked()
	if g.upto, err = g.session.ask(xs, seqs); err != nil {
		return nil, err
	}
	kept = members[:0]
	for i, m := range members {
		if seqs[i] == first+len(kept) {
			m.seq, m.x = seqs[i], nil // the memo has it
			kept = append(kept, m)
		}
	}
	return kept, nil
}

// learn takes up what became of members whose answers are there.
func (g *generation) learn(members []*member) {
	memo := g.session.memo
	for _, m := range members {
		if m.f != nil {
			continue
		}
		m.f, m.violation = memo.aimsOf(m.seq), memo.violationOf(m.seq)
		if m.parent != nil && m.violation <= m.parent.violation {
			m.origin = m.parent.u
		}
	}
}

// breed makes the children of a generation: designs never asked for before as far as they can be found. In
// a small space of whole numbers and choices the scanner finds what chance does not; when there is none
// left, or for barrenLimit generations no new design turned up in a large space, the search is exhausted.
func (g *generation) breed(members []*member) ([]*member, error) {
	sp := g.session.space
	known := func(x []float64) bool {
		_, found := g.session.lookup(x)
		return found
	}
	g.vary.prepare(members)
	children := make([]*member, 0, g.size)
	dims := sp.dims()
	places, born := make([]float64, g.size*dims), make([]member, g.size)
	if len(g.values) == 0 {
		g.values = make([]float64, g.size*dims)
	}
	for i := range g.size {
		m := &born[i]
		m.u, m.x = places[i*dims:(i+1)*dims:(i+1)*dims], g.values[i*dims:(i+1)*dims]
		m.op, m.parent = g.vary.child(m.u, members)
		sp.decode(m.x, m.u)
		for try := 0; known(m.x); try++ {
			g.session.progress.Duplicates++
			if try == retries {
				if !g.scan.next(m.x, sp, known) {
					m = nil
					break
				}
				sp.encode(m.u, m.x)
				continue
			}
			g.vary.nudge(m.u)
			sp.decode(m.x, m.u)
		}
		if m != nil {
			children = append(children, m)
		}
	}
	if len(children) > 0 {
		g.barren = 0
		return children, nil
	}
	g.barren++
	if sp.size <= scanLimit || g.barren == barrenLimit {
		return nil, errExhausted
	}
	return nil, nil
}
