package optimize

import (
	"math/rand/v2"

	"hotfront/optimize/sample"
)

const (
	settleDesigns = 1000   // a front is looked at once in so many designs
	settleGain    = 0.0003 // a hypervolume that grew by a smaller share between two looks has settled
)

// renewal is a second start for a population that has settled.
//
// A small population soon agrees on the values of most variables, and what the operators make of members that
// agree is what they agree on. If by then it has lost a part of the space (another value of a choice, the far
// side of a limit), it will hardly find it again. So once the hypervolume of all that was found has settled, the
// population is put aside and a new one begins from a Latin hypercube, with as many designs to spend as the
// one before. Then the best of both go on as one population. Nothing found is lost meanwhile, as the session keeps the front.
//
// All of it is told by numbers of designs, and none of it by the budget. While no design beats the problem's reference
// there is no hypervolume, and no renewal; nor is there in spaces so small that they can be walked through.
type renewal struct {
	rng    *rand.Rand
	aside  []*member // the settled population, nil while there is none
	since  int       // designs when the present population began
	span   int       // designs that the new population may spend
	mark   int       // designs at the latest look
	volume float64   // hypervolume at the latest look
}

// renewed is the population to breed from: the present one, a new one, or the best of both.
func (g *generation) renewed(members []*member) ([]*member, error) {
	r := &g.renew
	n := g.session.counted
	if r.aside != nil {
		if n-r.since < r.span {
			return members, nil
		}
		both, err := g.land(append(members, r.aside...))
		r.aside, r.since, r.mark, r.volume = nil, g.session.counted, g.session.counted, g.session.archive.Measured()
		return both, err
	}
	if n-r.mark < settleDesigns || g.session.space.size <= scanLimit {
		return members, nil
	}
	before := r.volume
	r.mark, r.volume = n, g.session.archive.Measured()
	if !(before > 0) || r.volume-before > settleGain*r.volume {
		return members, nil
	}
	settled, err := g.land(members)
	if err != nil {
		return nil, err
	}
	fresh, err := g.first(r.rng, nil)
	if err != nil || len(fresh) == 0 {
		return settled, err
	}
	r.aside, r.span, r.since = settled, g.session.counted-r.since, g.session.counted
	g.relax = newRelaxation(fresh, g.size)
	g.shelter.until = r.since + shelterGenerations*g.size
	g.vary = newVariation(g.session.space, g.vary.rng)
	return fresh, nil
}

// land waits for all that is under way and picks the next population of it and the members.
func (g *generation) land(members []*member) ([]*member, error) {
	if err := g.session.await(g.upto); err != nil {
		return nil, err
	}
	g.learn(g.flight)
	for _, m := range g.flight {
		m.parent = nil
	}
	all := append(members, g.flight...)
	g.flight = nil
	return choose(all, survive(all, g.size, g.relax.level(g.session.counted-g.renew.since))), nil
}

// first fills a first population with a Latin hypercube, and asks for it and awaits it.
func (g *generation) first(rng *rand.Rand, members []*member) ([]*member, error) {
	sp := g.session.space
	for _, u := range sample.Latin(rng, max(0, g.size-len(members)), sp.dims()) {
		members = append(members, sp.member(u))
	}
	members, err := g.ask(members)
	if err != nil {
		return nil, err
	}
	if err := g.session.await(g.upto); err != nil {
		return nil, err
	}
	g.learn(members)
	return members, nil
}

// choose is the members of the given indices.
func choose(all []*member, indices []int) []*member {
	chosen := make([]*member, len(indices))
	for k, i := range indices {
		chosen[k] = all[i]
	}
	return chosen
}
