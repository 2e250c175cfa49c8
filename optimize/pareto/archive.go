package pareto

import (
	"slices"
	"sort"
)

// Archive keeps every non-dominated point it was given, however many they are. Of points equal in all
// aims it keeps the one with the lowest tag, so that what it holds does not depend on the order of the
// additions. The zero value is not usable; see NewArchive.
type Archive struct {
	aims  int
	f     []float64 // aims of all points, one behind another, ascending by aim 0, then by the further aims
	tags  []int
	left  []int // tags of the points that the latest addition made leave
	sweep sweep

	ref    []float64 // what Measured is measured from, nil for nothing
	volume float64   // with one or two aims kept up to date, with three computed when asked for
	rest   float64   // what adding up volume has rounded away
	stale  bool
}

// Tagged is a point with a number of the caller's.
type Tagged struct {
	F   []float64
	Tag int
}

// NewArchive makes an empty archive for points of the given number of aims.
func NewArchive(aims int) *Archive {
	return &Archive{aims: aims}
}

// Len is the number of points held.
func (a *Archive) Len() int { return len(a.tags) }

// At is the i-th point in ascending order of aim 0, then of the further aims. The caller must not change
// its numbers, which are valid until the next addition.
func (a *Archive) At(i int) Tagged { return Tagged{F: a.at(i), Tag: a.tags[i]} }

func (a *Archive) at(i int) []float64 { return a.f[i*a.aims : (i+1)*a.aims : (i+1)*a.aims] }

// Hypervolume is that of the points held (see the function of this name), without the sorting.
func (a *Archive) Hypervolume(ref []float64) float64 {
	order := a.sweep.order[:0]
	for i := range a.tags {
		if p := a.at(i); below(p, ref) {
			order = append(order, p)
		}
	}
	a.sweep.order = order
	return a.sweep.sorted(ref)
}

// Measure makes Measured the hypervolume from ref, which an empty archive follows at a small cost: with one and
// two aims each addition adds what it gains.
func (a *Archive) Measure(ref []float64) {
	if a.Len() > 0 {
		panic("pareto: archive is not empty")
	}
	a.ref = slices.Clone(ref)
}

// Measured is the hypervolume of the points held from the reference of Measure. It is that of Hypervolume but for
// rounding, 1e-15 of it.
func (a *Archive) Measured() float64 {
	if a.aims > 2 && a.stale {
		a.volume, a.stale = a.Hypervolume(a.ref), false
	}
	return a.volume + a.rest
}

// Left are the tags of the points that left with the latest addition. The slice is used again by the next.
func (a *Archive) Left() []int { return a.left }

// Add offers a point and reports whether the archive took it; points that it dominates leave. The search for a
// place costs log n with one or two aims and n with three.
func (a *Archive) Add(f []float64, tag int) (bool, error) {
	if len(f) != a.aims {
		panic("pareto: point of the wrong length")
	}
	if err := check(0, f); err != nil {
		return false, err
	}
	a.left = a.left[:0]
	n := a.Len()
	at := sort.Search(n, func(i int) bool { return slices.Compare(a.at(i), f) >= 0 })
	if at < n && slices.Equal(a.at(at), f) {
		if tag < a.tags[at] {
			a.left = append(a.left, a.tags[at])
			a.tags[at] = tag
			return true, nil
		}
		return false, nil
	}
	// Only points before the place can dominate f, only points from it on can be dominated. With two aims
	// aim 1 falls along the archive, so that the neighbours decide.
	if a.aims <= 2 {
		if at > 0 && Dominates(a.at(at-1), f) {
			return false, nil
		}
		end := at
		for end < n && Dominates(f, a.at(end)) { // nor is any later point dominated
			end++
		}
		a.gain(f, at, end)
		a.left = append(a.left, a.tags[at:end]...)
		a.f = slices.Replace(a.f, at*a.aims, end*a.aims, f...)
		a.tags = slices.Replace(a.tags, at, end, tag)
		return true, nil
	}
	for i := range at {
		if Dominates(a.at(i), f) {
			return false, nil
		}
	}
	kept := at
	for i := at; i < n; i++ {
		if Dominates(f, a.at(i)) {
			a.left = append(a.left, a.tags[i])
			continue
		}
		copy(a.at(kept), a.at(i))
		a.tags[kept] = a.tags[i]
		kept++
	}
	a.f = slices.Insert(a.f[:kept*a.aims], at*a.aims, f...)
	a.tags = slices.Insert(a.tags[:kept], at, tag)
	a.stale = true
	return true, nil
}

// gain adds to the volume what f gains before it takes the place of the points at to end-1.
func (a *Archive) gain(f []float64, at, end int) {
	if a.ref == nil || !below(f, a.ref) {
		return
	}
	gained := 0.0
	if a.aims == 1 {
		gained = a.ref[0] - f[0]
		if at < a.Len() {
			gained = min(a.at(at)[0], a.ref[0]) - f[0]
		}
	} else {
		top := a.ref[1] // height of the staircase right of left
		if at > 0 {
			top = min(top, a.at(at - 1)[1])
		}
		left := f[0]
		for i := at; i < end; i++ {
			q := a.at(i)
			gained += max(0, min(q[0], a.ref[0])-left) * (top - f[1])
			left, top = min(q[0], a.ref[0]), min(top, q[1])
		}
		right := a.ref[0]
		if end < a.Len() {
			right = min(right, a.at(end)[0])
		}
		gained += max(0, right-left) * (top - f[1])
	}
	// The sum with what it rounds away, exact as if added in twice the digits.
	sum := a.volume + gained
	if a.volume >= gained {
		a.rest += (a.volume - sum) + gained
	} else {
		a.rest += (gained - sum) + a.volume
	}
	a.volume = sum
}
