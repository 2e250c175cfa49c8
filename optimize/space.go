package optimize

import "math"

// space maps a problem's variables to the unit cube that drivers work in, and back.
//
// A real variable is u = (x - low) / (high - low). A variable of whole numbers with m values gives each an
// equal part of [0, 1], and u is kept at the middle of its part, so that equal designs have equal u.
type space struct {
	vars   []Variable
	levels []float64 // number of values of each variable, 0 for a real one with a range
	size   float64   // number of designs, +Inf with a free real variable
	start  [][]float64
}

func newSpace(p Problem) (*space, error) {
	if err := checkProblem(p); err != nil {
		return nil, err
	}
	s := &space{vars: p.Variables(), size: 1, start: p.Start()}
	s.levels = make([]float64, len(s.vars))
	for k, v := range s.vars {
		switch {
		case v.Low == v.High:
			s.levels[k] = 1
		case v.Kind == Real:
			s.size = math.Inf(1)
		default:
			s.levels[k] = v.High - v.Low + 1
		}
		if s.levels[k] > 0 {
			s.size *= s.levels[k]
		}
	}
	return s, nil
}

func (s *space) dims() int { return len(s.vars) }

// decode writes the natural values of u to x and moves u to the values' own places.
func (s *space) decode(x, u []float64) {
	for k, v := range s.vars {
		if m := s.levels[k]; m > 0 {
			i := s.level(k, u[k])
			u[k] = (i + 0.5) / m
			x[k] = v.Low + i
			continue
		}
		// Both ends are hit exactly; the clamp takes away a rounding error beyond them.
		x[k] = min(max(v.Low+u[k]*(v.High-v.Low), v.Low), v.High)
		if u[k] == 1 {
			x[k] = v.High
		}
	}
}

// level is the place, 0 to levels-1, of u on a variable of whole numbers.
func (s *space) level(k int, u float64) float64 {
	m := s.levels[k]
	return min(max(math.Floor(u*m), 0), m-1)
}

// encode writes the place of the natural values x to u.
func (s *space) encode(u, x []float64) {
	for k, v := range s.vars {
		if m := s.levels[k]; m > 0 {
			u[k] = (x[k] - v.Low + 0.5) / m
			if v.Kind == Real {
				u[k] = 0.5
			}
			continue
		}
		u[k] = min(max((x[k]-v.Low)/(v.High-v.Low), 0), 1)
	}
}
