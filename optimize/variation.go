package optimize

import (
	"math"
	"math/rand/v2"
)

const (
	crossEta  = 15.0 // distribution index of the crossover
	crossRate = 0.9
	mutateEta = 20.0 // distribution index of the mutation
)

// variation makes children in the unit cube, half of the calls each by
//
//   - simulated binary crossover of two parents (distribution index 15, rate 0.9), and
//   - differential evolution, rand/1/bin, F uniform in 0.3 to 0.9, CR one of 0.1, 0.5, 0.9, 1,
//
// both followed by polynomial mutation (index 20, one variable in the mean). Numbers that leave the cube are
// mirrored at its faces. A choice without order is never blended: it comes from one of the parents whole,
// and mutates to any other value with equal chance. Whole numbers take part as numbers and mutate by at
// least one step.
//
// Sources: K. Deb, R. B. Agrawal, Simulated binary crossover for continuous search space, Complex Systems 9
// (1995) 115-148; R. Storn, K. Price, Differential evolution, Journal of Global Optimization 11 (1997)
// 341-359; K. Deb, M. Goyal, A combined genetic adaptive search (GeneAS) for engineering design, Computer
// Science and Informatics 26 (1996) 30-45 (the mutation).
type variation struct {
	space *space
	rng   *rand.Rand
	turn  int
}

func newVariation(sp *space, rng *rand.Rand) *variation {
	return &variation{space: sp, rng: rng}
}

func (v *variation) prepare(members []*member) {}

func (v *variation) credit(members, children []*member) {}

// child writes a new child of the members to u.
func (v *variation) child(u []float64, members []*member) {
	v.turn++
	if v.turn%2 == 0 && len(members) >= 4 {
		v.differ(u, members)
	} else {
		v.cross(u, members)
	}
	v.mutate(u)
}

// pick is a member drawn by a tournament of two; members are in the order of survival.
func (v *variation) pick(members []*member) int {
	return min(v.rng.IntN(len(members)), v.rng.IntN(len(members)))
}

func (v *variation) cross(u []float64, members []*member) {
	a, b := members[v.pick(members)].u, members[v.pick(members)].u
	copy(u, a)
	if v.rng.Float64() >= crossRate {
		return
	}
	for k := range u {
		if v.rng.Float64() < 0.5 {
			continue
		}
		if v.space.vars[k].Kind == Choice {
			u[k] = b[k]
			continue
		}
		if a[k] == b[k] {
			continue
		}
		r := v.rng.Float64()
		beta := math.Pow(2*r, 1/(crossEta+1))
		if r > 0.5 {
			beta = math.Pow(1/(2*(1-r)), 1/(crossEta+1))
		}
		u[k] = mirror(0.5 * ((1+beta)*a[k] + (1-beta)*b[k]))
	}
}

func (v *variation) differ(u []float64, members []*member) {
	n := len(members)
	i := v.rng.IntN(n)
	a, b, c := v.rng.IntN(n), v.rng.IntN(n), v.rng.IntN(n)
	copy(u, members[i].u)
	scale := 0.3 + 0.6*v.rng.Float64()
	rate := [4]float64{0.1, 0.5, 0.9, 1}[v.rng.IntN(4)]
	sure := v.rng.IntN(len(u))
	for k := range u {
		if k != sure && v.rng.Float64() >= rate {
			continue
		}
		if v.space.vars[k].Kind == Choice {
			u[k] = members[a].u[k]
			continue
		}
		u[k] = mirror(members[a].u[k] + scale*(members[b].u[k]-members[c].u[k]))
	}
}

// mutate changes each variable with a chance of one in their number.
func (v *variation) mutate(u []float64) {
	chance := 1 / float64(len(u))
	for k := range u {
		if v.rng.Float64() < chance {
			u[k] = v.move(k, u[k], mutateEta)
		}
	}
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
		d := math.Pow(1-u, eta+1)
		delta = math.Pow(2*r+(1-2*r)*d, 1/(eta+1)) - 1
	} else {
		d := math.Pow(u, eta+1)
		delta = 1 - math.Pow(2*(1-r)+2*(r-0.5)*d, 1/(eta+1))
	}
	w := min(max(u+delta, 0), 1)
	if m > 0 && v.space.level(k, w) == v.space.level(k, u) {
		step := 1 / m
		if r < 0.5 && u >= step || u+step > 1 {
			step = -step
		}
		w = u + step
	}
	return w
}

// mirror brings a number back into [0, 1] by reflection at the ends.
func mirror(u float64) float64 {
	u = math.Abs(u)
	if u > 1 {
		u = math.Mod(u, 2)
		if u > 1 {
			u = 2 - u
		}
	}
	return u
}
