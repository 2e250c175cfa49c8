package studies

import (
	"fmt"
	"math"
	"slices"

	yaml "go.yaml.in/yaml/v4"

	"hotfront/optimize"
)

// free reads the free variables.
func (r *reader) free(n *yaml.Node) {
	if n.Tag == "!!null" {
		return
	}
	entries, ok := r.block(n, "free")
	if !ok {
		return
	}
	for _, e := range entries {
		path := "free." + e.key
		index := slices.IndexFunc(r.fields, func(f Field) bool { return f.Path == e.key })
		if index < 0 {
			if _, isOutput := OutputNamed(r.outputs, e.key); isOutput {
				r.fault(e.where, path, &fault{FreeNotPossible, "a result cannot be freed", "limit it, or aim at it"})
				continue
			}
			hint := "`hotfront fields` lists the paths"
			if isPrefix(r.fields, e.key+".") {
				hint = "write the whole path, as in heater.tube_count"
			} else if s := r.suggest(e.key, fieldPaths(r.fields)); s != "" {
				hint = s
			}
			r.fault(e.where, path, &fault{KeyUnknown, fmt.Sprintf("unknown input %q", clip(e.key)), hint})
			continue
		}
		f := &r.fields[index]
		if !r.freeable(f, e, path) {
			continue
		}
		free := Free{Path: f.Path, field: index}
		if !r.freeValues(f, &free, e, path) {
			continue
		}
		if slices.ContainsFunc(r.study.Free, func(o Free) bool { return o.Path == f.Path }) {
			continue // given twice, reported
		}
		r.study.Free = append(r.study.Free, free)
	}
	r.startX()
}

// freeable says whether a field may be freed in this engine.
func (r *reader) freeable(f *Field, e entry, path string) bool {
	engine := &r.study.Engine
	switch {
	case !f.Freeable:
		r.fault(e.where, path, &fault{FreeNotPossible, "cannot be freed: other inputs depend on it", "write a study for each"})
		return false
	case r.usable && !f.Applies(engine):
		r.fault(e.where, path, &fault{DoesNotApply, "applies only " + f.When.Words, "take it out"})
		return false
	case r.usable && f.tied(engine):
		r.fault(e.where, path, &fault{FreeNotPossible, fmt.Sprintf("applied %s it equals %s", f.Tied.Words, f.Follows), "free that one"})
		return false
	case f.Group == "":
		return true
	}
	_, given := r.raw[f.Path]
	for i := range r.fields {
		o := &r.fields[i]
		if o.Group != f.Group || o.Path == f.Path {
			continue
		}
		_, other := r.raw[o.Path]
		other = other || slices.ContainsFunc(r.study.Free, func(free Free) bool { return free.Path == o.Path })
		if other && !given {
			r.fault(e.where, path, &fault{Contradiction, "the engine says this by " + o.Path, "free that one, or give this one in the engine"})
			return false
		}
	}
	return true
}

// freeValues reads {from, to} or {of: [...]}.
func (r *reader) freeValues(f *Field, free *Free, e entry, path string) bool {
	entries, ok := r.blockAs(e.value, path, "as in {from: 1, to: 2} or {of: [1, 2]}")
	if !ok {
		return false
	}
	parts := map[string]entry{}
	for _, p := range entries {
		if !contains([]string{"from", "to", "of"}, p.key) {
			r.unknownKey(p, path, []string{"from", "to", "of"})
			ok = false
			continue
		}
		parts[p.key] = p
	}
	if !ok {
		return false
	}
	_, from := parts["from"]
	_, to := parts["to"]
	_, of := parts["of"]
	switch {
	case of && !from && !to:
		return r.freeList(f, free, parts["of"], path+".of")
	case f.Kind == Choice:
		r.fault(e.where, path, &fault{FreeShape, "a choice is freed by a list", fmt.Sprintf("as in {of: [%s, %s]}", f.Choices[0], f.Choices[len(f.Choices)-1])})
		return false
	case of || !from || !to:
		r.fault(e.where, path, &fault{FreeShape, "needs from and to, or of alone", "as in {from: 1, to: 2} or {of: [1, 2]}"})
		return false
	}
	free.Kind = optimize.Real
	if f.Kind == Whole {
		free.Kind = optimize.Integer
	}
	low, okLow := r.freeNumber(f, parts["from"].value, path+".from")
	high, okHigh := r.freeNumber(f, parts["to"].value, path+".to")
	if !okLow || !okHigh {
		return false
	}
	if low >= high {
		r.fault(at(parts["from"].value), path, &fault{FreeInverted, fmt.Sprintf("from %s is not below to %s", f.withUnit(low), f.withUnit(high)), "the smaller one comes first"})
		return false
	}
	free.Low, free.High = low, high
	return true
}

func (r *reader) freeNumber(f *Field, n *yaml.Node, path string) (float64, bool) {
	s, ok := r.scalar(n, path)
	if !ok {
		return 0, false
	}
	return r.value(f, s, path)
}

// freeList reads the list of a choice, or the sizes in stock of a number.
func (r *reader) freeList(f *Field, free *Free, e entry, path string) bool {
	if e.value.Kind != yaml.SequenceNode {
		r.fault(at(e.value), path, &fault{ShapeWrong, "a list is wanted here", "as in [a, b]"})
		return false
	}
	if n := len(e.value.Content); n > mostKeys {
		r.fault(at(e.value), path, &fault{FreeList, fmt.Sprintf("%d values, at most %d are read", n, mostKeys), ""})
		return false
	}
	if len(e.value.Content) == 0 {
		r.fault(at(e.value), path, &fault{FreeList, "the list is empty", ""})
		return false
	}
	free.Kind = optimize.Ordered
	if f.Kind == Choice {
		free.Kind = optimize.Choice
	}
	ok := true
	for _, n := range e.value.Content {
		v, read := r.freeNumber(f, n, path)
		if !read {
			ok = false
			continue
		}
		last := len(free.List) - 1
		switch {
		case f.Kind == Choice && slices.Contains(free.List, v):
			r.fault(at(n), path, &fault{FreeList, f.Format(v) + " stands twice in the list", ""})
			ok = false
		case f.Kind != Choice && last >= 0 && v <= free.List[last]:
			r.fault(at(n), path, &fault{FreeList, fmt.Sprintf("%s does not come after %s", f.withUnit(v), f.withUnit(free.List[last])), "the list goes from small to large, each size once"})
			ok = false
		default:
			free.List = append(free.List, v)
		}
	}
	return ok
}

// startX checks that the start design lies in the free ranges, and makes its X.
func (r *reader) startX() {
	s := r.study
	x := make([]float64, len(s.Free))
	inside := r.usable
	for i := range s.Free {
		free := &s.Free[i]
		f := &r.fields[free.field]
		given, has := r.raw[f.Path]
		if r.bad[f.Path] || (!has && f.Default == "" && f.Follows == "" && f.Group == "") {
			inside = false // reported
			continue
		}
		v := f.Get(&s.Engine)
		if free.List == nil {
			slack := 1e-9 * (free.High - free.Low)
			if v >= free.Low-slack && v <= free.High+slack {
				x[i] = min(max(v, free.Low), free.High)
				continue
			}
		} else if j := slices.IndexFunc(free.List, func(l float64) bool { return math.Abs(l-v) <= 1e-9*math.Abs(l) }); j >= 0 {
			x[i] = float64(j)
			continue
		}
		inside = false
		r.outsideFree(f, free, v, given)
	}
	if inside {
		s.start = x
	}
}

func (r *reader) outsideFree(f *Field, free *Free, v float64, given scalar) {
	text := fmt.Sprintf("the start value %s is outside its free range %s to %s", f.withUnit(v), f.withUnit(free.Low), f.withUnit(free.High))
	if free.List != nil {
		text = fmt.Sprintf("the start value %s is not in its free list", f.withUnit(v))
	}
	if given.set != "" {
		r.fault(given.place, f.Path, &fault{OutsideSearch, text, "a search cannot begin there"})
		return
	}
	p := given.place
	if p.line == 0 {
		p = r.blockOf(f.Path)
	}
	r.fault(p, "engine."+f.Path, &fault{StartOutside, text, "move the start design or widen the range"})
}
