package studies

import (
	"fmt"
	"math"

	"hotfront/model"
)

// step makes one field of a design from X or from another field. Steps run in the order of the
// table of fields, so that what a field depends on is there before it.
type step struct {
	set    func(e *model.Engine, v float64)
	source func(e *model.Engine) float64 // nil: from X
	x      int
	list   []float64 // X is an index into it; nil: X is the value
	whole  bool
}

// design writes the design X into e, which must hold the start design or an earlier design of the
// same study.
func (s *Study) design(e *model.Engine, x []float64) {
	for i := range s.steps {
		st := &s.steps[i]
		var v float64
		switch {
		case st.source != nil:
			v = st.source(e)
		case st.list != nil:
			v = st.list[min(max(0, int(math.Round(x[st.x]))), len(st.list)-1)]
		case st.whole:
			v = math.Round(x[st.x])
		default:
			v = x[st.x]
		}
		st.set(e, v)
	}
}

// EngineAt gives the engine of a point's X.
func (s *Study) EngineAt(x []float64) model.Engine {
	if len(x) != len(s.Free) {
		panic("studies: a design of another study")
	}
	e := s.Engine
	s.design(&e, x)
	return e
}

// StartX gives the start design as X; ok is false when a --set put it outside its free ranges.
func (s *Study) StartX() (x []float64, ok bool) {
	return append([]float64(nil), s.start...), s.start != nil
}

// plan lays out the steps and the fields that say a design.
func (r *reader) plan() {
	s := r.study
	freeOf := map[string]int{}
	for i := range s.Free {
		freeOf[s.Free[i].Path] = i
	}
	if !r.usable {
		return
	}
	for i := range r.fields {
		f := &r.fields[i]
		if !f.Applies(&s.Engine) {
			continue
		}
		x, isFree := freeOf[f.Path]
		_, given := r.raw[f.Path]
		tied := f.tied(&s.Engine)
		follows := f.Follows != "" && (f.Tied.ok == nil || tied) && !isFree && (!given || tied)
		switch {
		case isFree:
			s.steps = append(s.steps, step{set: f.set, x: x, list: s.Free[x].List, whole: f.Kind == Whole})
		case follows:
			from, _ := FieldNamed(r.fields, f.Follows)
			s.steps = append(s.steps, step{set: f.set, source: from.get})
		case f.Group != "" && f.Follows == "" && f.Group != heatGroup && given:
			v := f.get(&s.Engine)
			s.steps = append(s.steps, step{set: f.set, source: func(*model.Engine) float64 { return v }})
		}
		if !follows && (f.Group == "" || given || isFree) {
			s.written = append(s.written, i)
		}
	}
	if s.start == nil && len(s.Free) == 0 {
		s.start = []float64{}
	}
	r.mayFail("heater", "heated_length", "unheated_length")
	r.mayFail("cooler", "cooled_length", "uncooled_length")
}

// mayFail warns when part of the box has a heated (cooled) length above the tube length.
func (r *reader) mayFail(part, inside, outside string) {
	s := r.study
	bounds := func(path string) (low, high float64, free bool) {
		for i := range s.Free {
			if f := &s.Free[i]; f.Path == path {
				if f.List != nil {
					return f.List[0], f.List[len(f.List)-1], true
				}
				return f.Low, f.High, true
			}
		}
		field, _ := FieldNamed(r.fields, path)
		v := field.Get(&s.Engine)
		return v, v, false
	}
	tube, _, tubeFree := bounds(part + ".tube_length")
	for _, name := range []string{inside, outside} {
		path := part + "." + name
		_, high, free := bounds(path)
		given, ok := r.raw[path]
		if (!ok && !free) || (!free && !tubeFree) || r.bad[path] {
			continue
		}
		if high > tube || name == outside && high == tube {
			hint := "give or free " + part + "." + outside + " instead"
			if name == outside {
				hint = "such designs fail"
			}
			p := given.place
			if !ok {
				p = r.blockOf(path)
			}
			r.fault(p, "engine."+path, &fault{MayFail,
				fmt.Sprintf("reaches %s, the shortest tube has %s", shown(high, Length, "mm"), shown(tube, Length, "mm")), hint})
		}
	}
}
