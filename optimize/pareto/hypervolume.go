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
// Source: the sweep along the last aim follows C. M. Fonseca, L. Paquete, M. Lopez-Ibanez, An improved
// dimension-sweep algorithm for the hypervolume indicator, IEEE CEC 2006, 1157-1163, section III (from
// memory); a sorted slice takes the place of its tree.
func Hypervolume(points [][]float64, ref []float64) float64 {
	var s sweep
	return s.volume(points, ref)
}

// sweep holds the workspace of repeated volumes.
type sweep struct {
	order [][]float64
	stair [][2]float64 // aims 0 and 1 of the points passed so far: 0 ascends, 1 descends
}

func (s *sweep) volume(points [][]float64, ref []float64) float64 {
	s.order = s.order[:0]
	for _, p := range points {
		if below(p, ref) {
			s.order = append(s.order, p)
		}
	}
	if len(s.order) == 0 {
		return 0
	}
	switch len(ref) {
	case 1:
		best := s.order[0][0]
		for _, p := range s.order {
			best = min(best, p[0])
		}
		return ref[0] - best
	case 2:
		slices.SortFunc(s.order, slices.Compare)
		area, top := 0.0, ref[1]
		for _, p := range s.order {
			if p[1] < top {
				area += (ref[0] - p[0]) * (top - p[1])
				top = p[1]
			}
		}
		return area
	case 3:
		slices.SortFunc(s.order, func(a, b []float64) int {
			return cmp.Or(cmp.Compare(a[2], b[2]), cmp.Compare(a[0], b[0]), cmp.Compare(a[1], b[1]))
		})
		s.stair = s.stair[:0]
		volume, area, level := 0.0, 0.0, s.order[0][2]
		for _, p := range s.order {
			volume += area * (p[2] - level)
			level = p[2]
			area += s.step(p[0], p[1], ref)
		}
		return volume + area*(ref[2]-level)
	}
	panic("pareto: hypervolume of more than three aims")
}

// step puts the point (x, y) into the staircase and returns the area it adds.
func (s *sweep) step(x, y float64, ref []float64) float64 {
	at, found := slices.BinarySearchFunc(s.stair, x, func(p [2]float64, x float64) int { return cmp.Compare(p[0], x) })
	top := ref[1] // height of the staircase just right of x
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
	right := ref[0]
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
