package studies

import (
	"fmt"
	"math"
	"strings"

	yaml "go.yaml.in/yaml/v4"

	"hotfront/model"
	"hotfront/model/drive"
)

// engineBlock collects the values of the engine as text. A key is a field, or the first part of
// the paths of some.
func (r *reader) engineBlock(n *yaml.Node, prefix string) {
	entries, ok := r.block(n, strings.TrimSuffix("engine."+prefix, "."))
	if !ok {
		return
	}
	for _, e := range entries {
		path := prefix + e.key
		switch {
		case isField(r.fields, path):
			s, ok := r.scalar(e.value, "engine."+path)
			if !ok {
				r.bad[path] = true
				continue
			}
			if first, twice := r.raw[path]; twice && first.node != s.node {
				if first.line != s.line || first.column != s.column {
					r.twice(e, path, first)
				}
				continue
			}
			r.raw[path] = s
		case isPrefix(r.fields, path+"."):
			r.blocks[path] = e.where
			r.engineBlock(e.value, path+".")
		default:
			r.unknownField(e, prefix)
		}
	}
}

// unknownField reports a key of the engine that is none, with the nearest of its block or, when
// there is none, of the whole engine.
func (r *reader) unknownField(e entry, prefix string) {
	block := strings.TrimSuffix("engine."+prefix, ".")
	if children := childKeys(r.fields, prefix); r.suggest(e.key, children) != "" {
		r.unknownKey(e, block, children)
	} else if hint := r.suggest(e.key, fieldPaths(r.fields)); hint != "" {
		r.fault(e.where, join(block, e.key), &fault{KeyUnknown, fmt.Sprintf("unknown key %q", clip(e.key)), hint})
	} else {
		r.unknownKey(e, block, children)
	}
}

// twice reports a path written both as a block and with a point; scan found the plain case.
func (r *reader) twice(e entry, path string, first scalar) {
	if r.repeated[e.where] {
		return
	}
	r.fault(e.where, "engine."+path, &fault{KeyTwice, "given twice", fmt.Sprintf("it is already on line %d", first.line)})
}

func isField(fields []Field, path string) bool {
	_, ok := FieldNamed(fields, path)
	return ok
}

func isPrefix(fields []Field, prefix string) bool {
	for i := range fields {
		if strings.HasPrefix(fields[i].Path, prefix) {
			return true
		}
	}
	return false
}

// childKeys are the keys a block may have; for the whole engine also the full paths.
func childKeys(fields []Field, prefix string) []string {
	var keys []string
	for i := range fields {
		rest, ok := strings.CutPrefix(fields[i].Path, prefix)
		if !ok {
			continue
		}
		first, _, _ := strings.Cut(rest, ".")
		if !contains(keys, first) {
			keys = append(keys, first)
		}
	}
	return keys
}

// engine turns the texts into the start design.
func (r *reader) engine() {
	e := &r.study.Engine
	r.usable = r.selectors(e)
	for i := range r.fields {
		f := &r.fields[i]
		s, given := r.raw[f.Path]
		switch {
		case f.Path == "layout" || f.Path == "drive.kind":
		case r.usable && !f.Applies(e):
			if given {
				r.fault(s.place, "engine."+f.Path, &fault{DoesNotApply, "applies only " + f.When.Words, "take it out"})
			}
		case f.Group != "":
			r.grouped(f, e)
		case given:
			v, ok := r.value(f, s, "engine."+f.Path)
			if !ok {
				r.bad[f.Path] = true
				continue
			}
			f.Set(e, v)
			if r.usable && f.tied(e) {
				r.mustEqual(f, s, e)
			}
		case r.bad[f.Path]:
		case f.Follows != "" && (f.Tied.ok == nil || f.tied(e)):
			r.follow(f, e)
		case f.Default != "":
			f.Set(e, f.defaultValue())
		case r.usable:
			r.missing(f)
		}
	}
	r.source(e)
	r.lengths(e)
	r.outputsOf(e)
}

// outputsOf keeps the results that mean something with this machine; the others are known, to say so.
func (r *reader) outputsOf(e *model.Engine) {
	if !r.usable {
		return
	}
	all := r.outputs
	r.outputs = nil
	for i := range all {
		if o := all[i]; o.Applies(e) {
			r.outputs = append(r.outputs, o)
		} else {
			r.absent = append(r.absent, o)
		}
	}
	r.study.outputs = r.outputs
}

// selectors reads the values that decide which fields apply.
func (r *reader) selectors(e *model.Engine) bool {
	ok := true
	for _, path := range []string{"layout", "drive.kind"} {
		f, _ := FieldNamed(r.fields, path)
		s, given := r.raw[path]
		if !given {
			if !r.bad[path] {
				r.missing(f)
			}
			ok = false
			continue
		}
		v, read := r.value(f, s, "engine."+path)
		if read {
			f.Set(e, v)
		}
		ok = ok && read
	}
	if ok && e.Layout == model.Alpha && e.Drive.Kind == drive.Rhombic {
		r.fault(r.raw["drive.kind"].place, "engine.drive.kind", &fault{Contradiction, "a rhombic drive moves a displacer and a piston, an alpha machine has two pistons", "take beta or gamma, or another drive"})
		ok = false
	}
	if ok && e.Layout == model.Beta && e.Drive.Kind == drive.RossYoke {
		r.fault(r.raw["drive.kind"].place, "engine.drive.kind", &fault{Contradiction, "a Ross yoke drives two cylinders side by side, a beta machine has one",
			"take alpha or gamma, or another drive"})
		ok = false
	}
	if ok && e.Layout == model.DoubleActing && e.Drive.Kind != drive.Sinusoidal && e.Drive.Kind != drive.SliderCrank {
		r.fault(r.raw["drive.kind"].place, "engine.drive.kind", &fault{Contradiction, "the pistons of a double-acting machine move each in the same way",
			"take sinusoidal (as a swash plate gives) or slider-crank"})
		ok = false
	}
	return r.heatKind(e) && ok
}

// grouped reads a field of which only one of a group may be given.
func (r *reader) grouped(f *Field, e *model.Engine) {
	s, given := r.raw[f.Path]
	if !given {
		if f.Follows != "" && !r.bad[f.Path] {
			r.follow(f, e) // an alternative that is given stands later in the table and replaces it
		}
		return
	}
	for i := range r.fields {
		o := &r.fields[i]
		if o.Path == f.Path {
			break
		}
		if _, both := r.raw[o.Path]; both && o.Group == f.Group {
			r.fault(s.place, "engine."+f.Path, &fault{Contradiction, "given beside " + o.Path + ", which says the same", "keep one of them"})
			return
		}
	}
	v, ok := r.value(f, s, "engine."+f.Path)
	if !ok {
		r.bad[f.Path] = true
		return
	}
	f.Set(e, v)
}

func (r *reader) follow(f *Field, e *model.Engine) {
	if r.bad[f.Follows] {
		r.bad[f.Path] = true
		return
	}
	source, _ := FieldNamed(r.fields, f.Follows)
	f.Set(e, source.Get(e))
}

func (r *reader) mustEqual(f *Field, s scalar, e *model.Engine) {
	source, _ := FieldNamed(r.fields, f.Follows)
	if _, given := r.raw[f.Follows]; r.bad[f.Follows] || !given {
		return // reported there
	}
	if want := source.Get(e); math.Abs(f.Get(e)-want) > 1e-9*math.Abs(want) {
		r.fault(s.place, "engine."+f.Path, &fault{Contradiction,
			fmt.Sprintf("applied %s it equals %s, which is %s", f.Tied.Words, f.Follows, f.withUnit(want)), "take it out"})
	}
}

// lengths finds heated and cooled lengths above the tubes' lengths.
func (r *reader) lengths(e *model.Engine) {
	check := func(part, long, whole string, length, tube float64) {
		s, given := r.raw[part+"."+long]
		if !given {
			long = whole
			s, given = r.raw[part+"."+long]
		}
		if !given || r.bad[part+"."+long] || r.bad[part+".tube_length"] {
			return
		}
		if length > tube*(1+1e-12) || length <= 0 {
			r.bad[part+"."+long] = true
			r.fault(s.place, "engine."+part+"."+long, &fault{Contradiction,
				fmt.Sprintf("does not go with a tube length of %s", shown(tube, Length, "mm")), ""})
		}
	}
	if e.Heater.TubeLength > 0 {
		check("heater", "heated_length", "unheated_length", e.Heater.HeatedLength, e.Heater.TubeLength)
	}
	if e.Cooler.TubeLength > 0 {
		check("cooler", "cooled_length", "uncooled_length", e.Cooler.CooledLength, e.Cooler.TubeLength)
	}
}

func (r *reader) missing(f *Field) {
	text := "missing"
	if len(f.Choices) > 0 {
		text += ": one of " + strings.Join(f.Choices, ", ")
	}
	r.fault(r.blockOf(f.Path), "engine."+f.Path, &fault{KeyMissing, text, f.Text})
}

// blockOf is where the block of a path begins.
func (r *reader) blockOf(path string) place {
	for {
		i := strings.LastIndexByte(path, '.')
		if i < 0 {
			return r.blocks[""]
		}
		path = path[:i]
		if p, ok := r.blocks[path]; ok {
			return p
		}
	}
}
