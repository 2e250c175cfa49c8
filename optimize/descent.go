package optimize

import (
	"math"
	"slices"
)

// descent follows one simplex from its place, through restarts around the best design found, to its end.
type descent struct {
	crowd  *crowd
	free   []int // variables that the simplex moves in
	size   float64
	weight float64
	raises int
	walled bool // limits are a wall instead of a penalty

	method *simplex // nil while the first vertices are being asked for
	asked  []*vertex
	best   *vertex // by merit, since the last restart
	top    *vertex // feasible first, of the whole descent
	begin  float64 // merit that the restart began from
	turn   bool    // direction of the edges of the next simplex
	idle   int     // asks since best changed
	recent []float64
	done   bool
}

func newDescent(c *crowd, v *vertex, size float64) *descent {
	d := &descent{crowd: c, size: size, weight: c.weight, best: v, begin: math.Inf(1)}
	d.walled = c.session.problem.Limits() == 0
	for k, variable := range c.session.space.vars {
		if variable.Kind != Choice && c.session.space.levels[k] != 1 {
			d.free = append(d.free, k)
		}
	}
	d.recent = make([]float64, 2*(len(d.free)+1))
	return d
}

func (d *descent) finished() bool { return d.done }

// end lets go of the method's goroutine.
func (d *descent) end() {
	if d.method != nil {
		d.method.stop()
		d.method = nil
	}
	d.done = true
}

func (d *descent) merit(v *vertex) float64 {
	if d.walled {
		return wall(v.value, v.violation)
	}
	return penalty(v.value, v.violation, d.weight)
}

// ask is what the descent wants to know next: the whole first simplex at once, then one design at a time.
func (d *descent) ask() []*vertex {
	if d.method == nil {
		return d.corners()
	}
	u := slices.Clone(d.best.u)
	for i, w := range d.method.ask() {
		u[d.free[i]] = mirror(w)
	}
	return []*vertex{d.crowd.vertex(u)}
}

// corners is the simplex around the best design: one edge per variable, at least a step on whole numbers.
func (d *descent) corners() []*vertex {
	out := []*vertex{d.crowd.vertex(slices.Clone(d.best.u))}
	out[0].x = d.best.x // the design as it is, not as it decodes
	for _, k := range d.free {
		u := slices.Clone(d.best.u)
		edge := d.size
		if m := d.crowd.session.space.levels[k]; m > 0 {
			edge = max(edge, 1/m)
		}
		if d.turn {
			edge = -edge
		}
		if u[k]+edge < 0 || u[k]+edge > 1 {
			edge = -edge
		}
		u[k] = within(u[k] + edge)
		out = append(out, d.crowd.vertex(u))
	}
	return out
}

// tell takes the answers to what was asked.
func (d *descent) tell() {
	for _, v := range d.asked {
		if d.top == nil || wall(v.value, v.violation) < wall(d.top.value, d.top.violation) {
			d.top = v
		}
	}
	if d.method == nil {
		d.open()
		return
	}
	v := d.asked[0]
	m := d.merit(v)
	d.method.tell(m)
	d.idle++
	extent := 0.0
	for _, k := range d.free {
		extent = max(extent, math.Abs(v.u[k]-d.best.u[k]))
	}
	copy(d.recent, d.recent[1:])
	d.recent[len(d.recent)-1] = extent
	if m < d.merit(d.best) {
		d.best, d.idle = v, 0
	}
	if slices.Max(d.recent) < collapse || d.idle > 20*len(d.recent) {
		d.restart()
	}
}

// open begins the method from the answered corners.
func (d *descent) open() {
	if len(d.free) == 0 {
		d.end()
		return
	}
	vertices, values := make([][]float64, len(d.asked)), make([]float64, len(d.asked))
	d.best = d.asked[0]
	for i, v := range d.asked {
		vertices[i] = make([]float64, len(d.free))
		for j, k := range d.free {
			vertices[i][j] = v.u[k]
		}
		values[i] = d.merit(v)
		if values[i] < d.merit(d.best) {
			d.best = v
		}
	}
	d.begin = values[0]
	d.idle = 0
	for i := range d.recent {
		d.recent[i] = math.Inf(1)
	}
	d.method = newSimplex(vertices, values)
}

// restart decides how to go on after a collapse: with a heavier penalty while the best design breaks limits,
// around the best design while that gains, with the limits as walls, or not at all.
func (d *descent) restart() {
	d.method.stop()
	d.method = nil
	gained := d.begin-d.merit(d.best) > gainLeast*math.Max(math.Abs(d.begin), 1e-300)
	d.turn = !d.turn
	switch {
	case !d.walled && d.best.violation > 0 && d.raises < weightRaises:
		d.raises++
		d.weight *= weightFactor
		d.size = math.Max(d.size*againFactor, leastSize)
	case gained && d.size > leastSize:
		d.size *= againFactor
	case !d.walled:
		d.walled = true
		d.best = d.top
		d.size = beginSize * againFactor * againFactor
	case d.turn && d.size > leastSize: // once more with the edges the other way
		d.size *= againFactor
	default:
		d.done = true
	}
}
