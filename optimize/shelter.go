package optimize

// shelter keeps every value of the choices without an order in the population for a while. A gas or an alloy
// shows its worth only after the other variables have been fitted to it; without a shelter the first one to be
// fitted by chance drives the others out.
//
// For the first shelterGenerations each value of each choice keeps the best of its own kind in the population,
// up to an equal part of half the population per choice.
type shelter struct {
	space *space
	until int // designs asked for at which it ends
}

const shelterGenerations = 60

func newShelter(sp *space, size int) shelter {
	return shelter{space: sp, until: shelterGenerations * size}
}

// survive is the function of this name with the shelter's exceptions.
func (h shelter) survive(all []*member, size int, epsilon float64, evaluations int) []int {
	kept := survive(all, size, epsilon)
	if evaluations >= h.until || len(all) <= size {
		return kept
	}
	var choices []int
	for k, v := range h.space.vars {
		if v.Kind == Choice && h.space.levels[k] > 1 {
			choices = append(choices, k)
		}
	}
	for _, k := range choices {
		levels := int(h.space.levels[k])
		quota := size / (2 * len(choices) * levels)
		have := make([]int, levels)
		taken := make([]bool, len(all))
		for _, i := range kept {
			have[int(h.space.level(k, all[i].u[k]))]++
			taken[i] = true
		}
		for level := range levels {
			var kin []*member
			var index []int
			for i, m := range all {
				if !taken[i] && int(h.space.level(k, m.u[k])) == level {
					kin, index = append(kin, m), append(index, i)
				}
			}
			if have[level] >= quota || len(kin) == 0 {
				continue
			}
			for _, j := range survive(kin, quota-have[level], epsilon) {
				kept = h.replace(kept, index[j], all, k, have, quota)
			}
		}
	}
	return kept
}

// replace puts a member in the place of the last one whose own value is kept by more than the quota.
func (h shelter) replace(kept []int, by int, all []*member, k int, have []int, quota int) []int {
	for at := len(kept) - 1; at >= 0; at-- {
		level := int(h.space.level(k, all[kept[at]].u[k]))
		if have[level] > quota {
			have[level]--
			have[int(h.space.level(k, all[by].u[k]))]++
			copy(kept[at:], kept[at+1:])
			kept[len(kept)-1] = by
			break
		}
	}
	return kept
}
