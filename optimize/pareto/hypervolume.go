package pareto

import (
	"cmp"
	"slices"
)

// Hypervolume is the measure of the part of the space of aims that lies between the points and the
// reference: every place that some point dominates and that dominates the reference. A point that does
// not lie below the reference in every aim adds nothing.
//
//	H = measure { z : exists p with p <= z <= ref }
//
// It is exact, for one, two and three aims, and costs n log n (with three aims n^2 in the worst case, with
// a small factor). The unit is the product of the units of the aims. The order of the points does not
// matter but for rounding, 1e-15 per point.
//
// Source: the sweep along one aim follows C. M. Fonseca, L. Paquete, M. Lopez-Ibanez, An improved
// dimension-sweep algorithm for the hypervolume indicator, IEEE CEC 2006, 1157-1163, section III (from
// memory); a sorted slice takes the place of its tree.
func Hypervolume(points [][]float64, ref []float64) float64 {
	var s sweep
	return s.volume(points, ref)
}

// sweep holds the workspace of repeated volumes.
type sweep struct {
	order [][]float64
	stair [][2]float64 // aims 1 and 2 of the points passed so far: the first ascends, the second descends
}

func (s *sweep) volume(points [][]float64, ref []float64) float64 {
	s.order = s.order[:0]
	for _, p := range points {
		if below(p, ref) {
			s.order = append(s.order, p)
		}
	}
	slices.SortFunc(s.order, slices.Compare)
	return s.sorted(ref)
}

// sorted is the volume of s.order, which ascends by aim 0, then by the further aims, and lies below ref.
func (s *sweep) sorted(ref []float64) float64 {
	if len(s.order) == 0 {
		return 0
	}
	switch len(ref) {
	case 1:
		return ref[0] - s.order[0][0]
	case 2:
		area, top := 0.0, ref[1]
		for _, p := range s.order {
			if p[1] < top {
				area += (ref[0] - p[0]) * (top - p[1])
				top = p[1]
			}
		}
		return area
	case 3:
		s.stair = s.stair[:0]
		volume, area, level := 0.0, 0.0, s.order[0][0]
		for _, p := range s.order {
			volume += area * (p[0] - level)
			level = p[0]
			area += s.step(p[1], p[2], ref[1], ref[2])
		}
		return volume + area*(ref[0]-level)
	}
	panic("pareto: hypervolume of more than three aims")
}

// step puts the point (x, y) into the staircase below (right, top) and returns the area it adds.
func (s *sweep) step(x, y, right, top float64) float64 {
	at, found := slices.BinarySearchFunc(s.stair, x, func(p [2]float64, x float64) int { return cmp.Compare(p[0], x) })
	// From here on, top is the height of the staircase just right of x.
	if found {
		top = s.stair[at][1]
	} else if at > 0 {
		top = s.stair[at-1][1]
	}
	if y >= top {
		return 0
	}
	area, left, end := 0.0, x, at
	if found {
		end = at + 1
	}
	for end < len(s.stair) && s.stair[end][1] >= y {
		area += (s.stair[end][0] - left) * (top - y)
		left, top = s.stair[end][0], s.stair[end][1]
		end++
	}
	if end < len(s.stair) {
		right = s.stair[end][0]
	}
	area += (right - left) * (top - y)
	s.stair = slices.Replace(s.stair, at, end, [2]float64{x, y})
	return area
}

func below(p, ref []float64) bool {
	for i, v := range p {
		if !(v < ref[i]) {
			return false
		}
	}
	return true
}

// Contributions is what the hypervolume would lose with each point: the measure of what that point
// dominates alone. Points equal to another, or dominated, have none.
func Contributions(points [][]float64, ref []float64) []float64 {
	var c contributor
	out := make([]float64, len(points))
	for i := range points {
		out[i] = c.alone(points, nil, i, ref)
	}
	return out
}

// contributor holds the workspace of repeated contributions.
type contributor struct {
	sweep   sweep
	clipped [][]float64
	store   []float64
}

// alone is the contribution of points[i] among the points that are not out.
func (c *contributor) alone(points [][]float64, out []bool, i int, ref []float64) float64 {
	p := points[i]
	if !below(p, ref) {
		return 0
	}
	own := 1.0
	for k, v := range p {
		own *= ref[k] - v
	}
	c.clipped, c.store = c.clipped[:0], c.store[:0]
	if need := len(points) * len(p); cap(c.store) < need {
		c.store = make([]float64, 0, need)
	}
	for j, q := range points {
		if j == i || (out != nil && out[j]) {
			continue
		}
		begin := len(c.store)
		for k, v := range q {
			c.store = append(c.store, max(v, p[k]))
		}
		c.clipped = append(c.clipped, c.store[begin:len(c.store):len(c.store)])
	}
	return max(0, own-c.sweep.volume(c.clipped, ref))
}
