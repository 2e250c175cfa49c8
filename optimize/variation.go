package optimize

import (
	"math"
	"math/rand/v2"

	"hotfront/optimize/pareto"
)

// The ways to make a child.
const (
	opExchange    = iota // mixes two parents variable by variable
	opDiffer             // differential evolution
	opDrift              // a parent moved along the way from a design that was dropped to one that stayed
	opFew                // a parent with one or a few variables changed
	opExtrapolate        // a parent moved on along the step that made it
	opLocal              // a parent moved on the scale of its distance to a near member
	opCount
)

const (
	exchangeEta  = 15.0 // distribution index of the crossover
	exchangeRate = 0.9  // share of crossovers that cross at all
	exchangeOnly = 0.5  // share of crossovers that swap values without blending them
	mutateEta    = 20.0 // distribution index of the mutation
	mutateRate   = 0.65 // share of children by exchange and difference that mutate

	sureExchange = 0.4  // share of children made by exchange whatever its credit
	endShare     = 0.15 // share of parents that are the best design in one aim
	opFloor      = 0.05 // added to every operator's credit, so that none dies out
	opRate       = 0.02 // weight of one child in its operator's credit
	creditAlive  = 0.2  // credit of a child that survives its first selection; one that beats its parent too has 1
	moreVars     = 0.5  // chance that opFew changes one more variable
	stepDecades  = 4.0  // steps of opFew reach from 10^-stepDecades to 1, evenly in the logarithm
	nearDraws    = 20   // draws among which opLocal takes the nearest member
	localSpread  = 0.3  // standard deviation of opLocal's noise, in the root mean square distance per variable
)

// variation makes children in the unit cube. Six operators compete: each is drawn in proportion to how many
// of its latest children survived and beat their parent, and children by exchange have a fixed share besides,
// since they alone combine good values of single variables.
//
//	exchange     u = a or b per variable, or simulated binary crossover; then mutation
//	differ       u = a + F (b - c) on a random subset, F uniform in 0.3 to 0.9, CR of 0.1, 0.5, 0.9, 1; then mutation
//	drift        u = p + F (kept - dropped) on a random subset, F uniform in 0.3 to 1
//	few          one or a few variables: another member's value, a step of any scale, or a difference of two members
//	extrapolate  u = p + F (p - p's parent), F uniform in 0.3 to 2
//	local        u = p + F (n - p) + noise on the scale |n - p|, n a near member, F uniform in -0.5 to 1.5
//
// Mutation is polynomial, of one variable and no more: where the variables have their own local fronts, a step out of one
// of them is seen only if nothing else is changed for the worse. Numbers that leave the cube stop at its faces, where
// best designs often lie, but for differ and crossover steps, which are mirrored. A choice without order is
// never blended: it comes whole from one member, and mutates to any other value with equal chance. Whole
// numbers take part as numbers and mutate by at least one step.
//
// Sources: K. Deb, R. B. Agrawal, Simulated binary crossover for continuous search space, Complex Systems 9
// (1995) 115-148; R. Storn, K. Price, Differential evolution, Journal of Global Optimization 11 (1997)
// 341-359; K. Deb, M. Goyal, A combined genetic adaptive search (GeneAS) for engineering design, Computer
// Science and Informatics 26 (1996) 30-45 (the mutation); J. Zhang, A. C. Sanderson, JADE, IEEE Transactions
// on Evolutionary Computation 13 (2009) 945-958 (differences to dropped designs); D. Thierens, An adaptive
// pursuit strategy for allocating operator probabilities, GECCO 2005, 1539-1546 (credit and floor, from
// memory). The numbers were set by trial on test problems.
type variation struct {
	space   *space
	rng     *rand.Rand
	quality [opCount]float64
	dropped []*member // by the latest selection
	ends    []*member // best member in each aim
}

func newVariation(sp *space, rng *rand.Rand) *variation {
	v := &variation{space: sp, rng: rng}
	for op := range v.quality {
		v.quality[op] = 0.5
	}
	return v
}

// prepare looks at the members that the next children come from.
func (v *variation) prepare(members []*member) {
	v.ends = v.ends[:0]
	for k := range members[0].f {
		best := members[0]
		for _, m := range members[1:] {
			if m.violation < best.violation || m.violation == best.violation && m.f[k] < best.f[k] {
				best = m
			}
		}
		v.ends = append(v.ends, best)
	}
}

// credit takes note of what became of the latest children, all[first:], and of who had to go.
func (v *variation) credit(all []*member, first int, alive []bool) {
	var made, worth [opCount]float64
	v.dropped = v.dropped[:0]
	for i, m := range all {
		if !alive[i] {
			v.dropped = append(v.dropped, m)
		}
		if i < first {
			continue
		}
		made[m.op]++
		if alive[i] {
			worth[m.op] += creditAlive
			if pareto.Beats(m.f, m.violation, m.parent.f, m.parent.violation) {
				worth[m.op] += 1 - creditAlive
			}
		}
		m.parent = nil
	}
	for op, n := range made {
		if n > 0 {
			v.quality[op] += min(1, opRate*n) * (worth[op]/n - v.quality[op])
		}
	}
}

// operator draws the way to make the next child.
func (v *variation) operator() int {
	if v.rng.Float64() < sureExchange {
		return opExchange
	}
	sum := 0.0
	for _, q := range v.quality {
		sum += q + opFloor
	}
	r := v.rng.Float64() * sum
	for op, q := range v.quality[:opCount-1] {
		r -= q + opFloor
		if r < 0 {
			return op
		}
	}
	return opCount - 1
}

// any is a member drawn with equal chances.
func (v *variation) any(members []*member) *member { return members[v.rng.IntN(len(members))] }

// parent is a member drawn with equal chances, but for the ends of the front, which are drawn more often.
func (v *variation) parent(members []*member) *member {
	if v.rng.Float64() < endShare {
		return v.any(v.ends)
	}
	return v.any(members)
}

// child writes a new child of the members to u, and returns the operator and the parent that it is compared
// with.
func (v *variation) child(u []float64, members []*member) (op int, parent *member) {
	op, parent = v.operator(), v.parent(members)
	copy(u, parent.u)
	switch op {
	case opExchange:
		v.exchange(u, v.parent(members).u)
		v.mutate(u)
	case opDiffer:
		v.differ(u, v.any(members).u, v.any(members).u, v.any(members).u)
		v.mutate(u)
	case opDrift:
		dropped := v.any(members)
		if len(v.dropped) > 0 {
			dropped = v.any(v.dropped)
		}
		v.drift(u, v.any(members).u, dropped.u)
	case opFew:
		v.few(u, members)
	case opExtrapolate:
		if parent.origin == nil {
			v.mutate(u)
			break
		}
		v.extrapolate(u, parent.origin)
	case opLocal:
		v.local(u, members)
	}
	return op, parent
}

// exchange mixes the values of b into u.
func (v *variation) exchange(u, b []float64) {
	swap := v.rng.Float64() < exchangeOnly
	if v.rng.Float64() >= exchangeRate {
		return
	}
	for k, a := range u {
		if v.rng.Float64() < 0.5 || a == b[k] {
			continue
		}
		if swap || v.space.vars[k].Kind == Choice {
			u[k] = b[k]
			continue
		}
		from, to := a, b[k]
		if v.rng.Float64() < 0.5 {
			from, to = to, from
		}
		r := v.rng.Float64()
		beta := math.Pow(2*r, 1/(exchangeEta+1))
		if r > 0.5 {
			beta = math.Pow(1/(2*(1-r)), 1/(exchangeEta+1))
		}
		u[k] = within(0.5 * ((1+beta)*from + (1-beta)*to))
	}
}

// crossRate draws the chance of a variable to take part in a difference.
func (v *variation) crossRate() float64 {
	return [4]float64{0.1, 0.5, 0.9, 1}[v.rng.IntN(4)]
}

func (v *variation) differ(u, a, b, c []float64) {
	scale, rate := 0.3+0.6*v.rng.Float64(), v.crossRate()
	sure := v.rng.IntN(len(u))
	for k := range u {
		switch {
		case k != sure && v.rng.Float64() >= rate:
		case v.space.vars[k].Kind == Choice:
			u[k] = a[k]
		default:
			u[k] = mirror(a[k] + scale*(b[k]-c[k]))
		}
	}
}

func (v *variation) drift(u, kept, dropped []float64) {
	scale, rate := 0.3+0.7*v.rng.Float64(), v.crossRate()
	sure := v.rng.IntN(len(u))
	for k := range u {
		switch {
		case k != sure && v.rng.Float64() >= rate:
		case v.space.vars[k].Kind != Choice:
			u[k] = within(u[k] + scale*(kept[k]-dropped[k]))
		case kept[k] != dropped[k]:
			u[k] = kept[k]
		}
	}
}

func (v *variation) few(u []float64, members []*member) {
	for again := true; again; again = v.rng.Float64() < moreVars {
		k := v.rng.IntN(len(u))
		way := v.rng.IntN(3)
		switch {
		case way == 0:
			u[k] = v.any(members).u[k]
		case v.space.levels[k] > 0:
			u[k] = v.move(k, u[k], mutateEta)
		case way == 1:
			step := math.Pow(10, -stepDecades*v.rng.Float64())
			if v.rng.Float64() < 0.5 {
				step = -step
			}
			u[k] = mirror(u[k] + step)
		default:
			u[k] = within(u[k] + v.rng.NormFloat64()*(v.any(members).u[k]-v.any(members).u[k]))
		}
	}
}

func (v *variation) extrapolate(u, origin []float64) {
	scale := 0.3 + 1.7*v.rng.Float64()
	for k := range u {
		if v.space.vars[k].Kind != Choice {
			u[k] = within(u[k] + scale*(u[k]-origin[k]))
		}
	}
}

func (v *variation) local(u []float64, members []*member) {
	var near []float64
	least := math.Inf(1)
	for range nearDraws {
		m := v.any(members).u
		d := 0.0
		for k := range u {
			d += (m[k] - u[k]) * (m[k] - u[k])
		}
		if d > 0 && d < least {
			least, near = d, m
		}
	}
	if near == nil {
		v.mutate(u)
		return
	}
	along := 2*v.rng.Float64() - 0.5
	spread := localSpread * math.Sqrt(least/float64(len(u)))
	for k := range u {
		if v.space.vars[k].Kind != Choice {
			u[k] = within(u[k] + along*(near[k]-u[k]) + spread*v.rng.NormFloat64())
		} else if v.rng.Float64() < 0.5 {
			u[k] = near[k]
		}
	}
}

// mutate changes one variable, or none.
func (v *variation) mutate(u []float64) {
	if v.rng.Float64() >= mutateRate {
		return
	}
	k := v.rng.IntN(len(u))
	u[k] = v.move(k, u[k], mutateEta)
}

// nudge changes about half of the variables and at least one, to make a neighbour.
func (v *variation) nudge(u []float64) {
	sure := v.rng.IntN(len(u))
	for k := range u {
		if k == sure || v.rng.Float64() < 0.5 {
			u[k] = v.move(k, u[k], mutateEta)
		}
	}
}

// move is a neighbouring value of variable k.
func (v *variation) move(k int, u, eta float64) float64 {
	m := v.space.levels[k]
	if m == 1 {
		return u
	}
	if v.space.vars[k].Kind == Choice {
		other := v.rng.IntN(int(m) - 1)
		if other >= int(v.space.level(k, u)) {
			other++
		}
		return (float64(other) + 0.5) / m
	}
	r := v.rng.Float64()
	var delta float64
	if r < 0.5 {
		delta = math.Pow(2*r+(1-2*r)*math.Pow(1-u, eta+1), 1/(eta+1)) - 1
	} else {
		delta = 1 - math.Pow(2*(1-r)+2*(r-0.5)*math.Pow(u, eta+1), 1/(eta+1))
	}
	w := within(u + delta)
	if m > 0 && v.space.level(k, w) == v.space.level(k, u) {
		step := 1 / m
		if r < 0.5 && u > step || u+step > 1 {
			step = -step
		}
		w = u + step
	}
	return w
}

// within is the nearest number in [0, 1].
func within(u float64) float64 { return min(max(u, 0), 1) }

// mirror brings a number back into [0, 1] by reflection at the ends.
func mirror(u float64) float64 {
	u = math.Mod(math.Abs(u), 2)
	if u > 1 {
		u = 2 - u
	}
	return u
}
