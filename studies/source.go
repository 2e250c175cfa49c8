package studies

import (
	"fmt"
	"math"
	"strings"

	"hotfront/model"
	"hotfront/model/heat"
)

// sourceNames are the ways to say how the hot end is heated, as keys below heat.
func sourceNames() []string { return []string{"tube_wall", "tube_gas", "burner", "receiver"} }

// heatKind finds how the hot end is heated, from which keys are given. ok is false when none is, or several are.
func (r *reader) heatKind(e *model.Engine) (ok bool) {
	kinds := map[string]model.HeatKind{"tube_wall": model.HeatTubeWall, "tube_gas": model.HeatTubeGas, "burner": model.HeatBurner, "receiver": model.HeatReceiver}
	first := ""
	for _, name := range sourceNames() {
		where, given := r.heatGiven(name)
		switch {
		case !given:
		case first == "":
			first = name
			e.Heat.Kind = kinds[name]
		case first == "tube_wall" && name == "tube_gas": // reported with the fields of their group
		default:
			r.fault(where, "engine.heat."+name, &fault{Contradiction, "given beside " + first + ": an engine has one heat source", "keep one of them"})
			return false
		}
	}
	if first == "" {
		r.fault(r.blockOf("heat.tube_wall"), "engine.heat", &fault{KeyMissing, "the hot end is not given",
			"give one of heat." + strings.Join(sourceNames(), ", heat.")})
		return false
	}
	return true
}

// heatGiven says whether a key below heat, or any below that, is there, and where.
func (r *reader) heatGiven(name string) (place, bool) {
	path := "heat." + name
	if s, ok := r.raw[path]; ok {
		return s.place, true
	}
	if p, ok := r.blocks[path]; ok {
		return p, true
	}
	for i := range r.fields {
		p := r.fields[i].Path
		if s, ok := r.raw[p]; ok && strings.HasPrefix(p, path+".") {
			return s.place, true
		}
	}
	return place{}, r.bad[path]
}

// source checks what the fields of a heat source say together.
func (r *reader) source(e *model.Engine) {
	switch {
	case !r.usable:
	case e.Heat.Kind == model.HeatBurner:
		r.burner(e)
	case e.Heat.Kind == model.HeatReceiver:
		d, wall := e.Heat.Receiver.ApertureDiameter, e.Heat.Receiver.WallArea
		if r.bad["heat.receiver.aperture_diameter"] || r.bad["heat.receiver.wall_area"] || d == 0 || wall == 0 {
			return
		}
		if area := math.Pi / 4 * d * d; wall < area {
			r.fault(r.placeOf("heat.receiver.wall_area"), "engine.heat.receiver.wall_area", &fault{Contradiction,
				fmt.Sprintf("is less than the aperture, which has %s", shown(area, Area, "cm2")), "a flat receiver has the area of the aperture"})
		}
	}
}

func (r *reader) burner(e *model.Engine) {
	b := &e.Heat.Burner
	if e.Heater.RingDiameter == 0 && !r.bad["heater.ring_diameter"] {
		r.fault(r.blockOf("heat.burner.fuel"), "engine.heater.ring_diameter", &fault{KeyMissing,
			"a burner needs the circle on which the heater tubes stand", "the pitch across the flow follows from it"})
	}
	if len(r.givenOf(fireGroup)) == 0 && !r.bad["heat.burner.tube_wall"] && !r.bad["heat.burner.fuel_power"] {
		r.fault(r.blockOf("heat.burner.fuel"), "engine.heat.burner", &fault{KeyMissing, "neither fuel nor tube wall is given",
			"give fuel_power, and the tube wall follows, or tube_wall, and the fuel follows"})
	}
	if b.FuelKind != heat.GivenFuel || r.bad["heat.burner.fuel"] {
		return
	}
	elements, gases := false, false
	for path := range r.raw {
		elements = elements || strings.HasPrefix(path, "heat.burner.elements.")
		gases = gases || strings.HasPrefix(path, "heat.burner.gases.")
	}
	where := r.placeOf("heat.burner.fuel")
	switch {
	case elements && gases:
		r.fault(where, "engine.heat.burner.fuel", &fault{Contradiction, "the fuel is given by elements and by gases", "keep one of them"})
	case !elements && !gases:
		r.fault(where, "engine.heat.burner.fuel", &fault{KeyMissing, "the composition of the fuel is not given", "give elements:, as in {carbon: 86 %, hydrogen: 14 %}, or gases:"})
	default:
		var c heat.Combustion
		if f := c.Set(&b.Given, max(b.ExcessAir, 1)); f != heat.OK {
			r.fault(where, "engine.heat.burner.fuel", &fault{Contradiction, f.String(), ""})
		}
	}
}

// givenOf lists the paths of a group that are given.
func (r *reader) givenOf(group string) []string {
	var paths []string
	for i := range r.fields {
		if _, given := r.raw[r.fields[i].Path]; given && r.fields[i].Group == group {
			paths = append(paths, r.fields[i].Path)
		}
	}
	return paths
}

// placeOf is where a value stands, or else its block.
func (r *reader) placeOf(path string) place {
	if s, ok := r.raw[path]; ok {
		return s.place
	}
	return r.blockOf(path)
}
