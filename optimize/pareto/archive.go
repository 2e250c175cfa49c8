package pareto

import (
	"slices"
	"sort"
)

// Archive keeps every non-dominated point it was given, however many they are. Of points equal in all
// aims it keeps the one with the lowest tag, so that what it holds does not depend on the order of the
// additions. The zero value is not usable; see NewArchive.
type Archive struct {
	aims   int
	points []*Tagged // ascending by aim 0, then by the further aims
	left   []int     // tags of the points that the latest addition made leave
	sweep  sweep
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
func (a *Archive) Len() int { return len(a.points) }

// At is the i-th point in ascending order of aim 0, then of the further aims. The caller must not change
// its numbers.
func (a *Archive) At(i int) Tagged { return *a.points[i] }

// Hypervolume is that of the points held (see the function of this name), without the sorting.
func (a *Archive) Hypervolume(ref []float64) float64 {
	order := a.sweep.order[:0]
	for _, p := range a.points {
		if below(p.F, ref) {
			order = append(order, p.F)
		}
	}
	a.sweep.order = order
	return a.sweep.sorted(ref)
}

// Left are the tags of the points that left with the latest addition. The slice is used again by the next.
func (a *Archive) Left() []int { return a.left }

// Add offers a point and reports whether the archive took it; points that it dominates leave. The archive
// keeps f, which must not change afterwards. The search for a place costs log n with one or two aims and
// n with three.
func (a *Archive) Add(f []float64, tag int) (bool, error) {
	if len(f) != a.aims {
		panic("pareto: point of the wrong length")
	}
	if err := check(0, f); err != nil {
		return false, err
	}
	a.left = a.left[:0]
	at := sort.Search(len(a.points), func(i int) bool { return slices.Compare(a.points[i].F, f) >= 0 })
	if at < len(a.points) && slices.Equal(a.points[at].F, f) {
		if tag < a.points[at].Tag {
			a.left = append(a.left, a.points[at].Tag)
			a.points[at].Tag = tag
			return true, nil
		}
		return false, nil
	}
	// Only points before the place can dominate f, only points from it on can be dominated. With two aims
	// aim 1 falls along the archive, so that the neighbours decide.
	before, after := a.points[:at], a.points[at:]
	if a.aims <= 2 && at > 0 {
		before = before[at-1:]
	}
	for _, p := range before {
		if Dominates(p.F, f) {
			return false, nil
		}
	}
	kept := at
	for i, p := range after {
		if Dominates(f, p.F) {
			a.left = append(a.left, p.Tag)
			continue
		}
		if a.aims <= 2 { // nor is any later point dominated
			kept += copy(a.points[kept:], after[i:])
			break
		}
		a.points[kept] = p
		kept++
	}
	clear(a.points[kept:])
	a.points = slices.Insert(a.points[:kept], at, &Tagged{F: f, Tag: tag})
	return true, nil
}
