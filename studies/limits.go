package studies

import (
	"fmt"
	"strconv"
	"strings"

	yaml "go.yaml.in/yaml/v4"
)

const mostAims = 3

// limits reads the limits: by the name of a result or input, or a named formula.
func (r *reader) limits(n *yaml.Node) {
	if n.Tag == "!!null" {
		return
	}
	entries, ok := r.block(n, "limits")
	if !ok {
		return
	}
	seen := map[string]bool{}
	for _, e := range entries {
		if !seen[e.key] {
			seen[e.key] = true
			r.limit(e, "limits."+e.key)
		}
	}
}

func (r *reader) limit(e entry, path string) {
	entries, ok := r.blockAs(e.value, path, "as in {max: 1} or {min: 1}")
	if !ok {
		return
	}
	parts := map[string]scalar{}
	for _, p := range entries {
		keys := []string{"max", "min", "expr"}
		if !contains(keys, p.key) {
			r.unknownKey(p, path, keys)
			ok = false
			continue
		}
		s, read := r.scalar(p.value, join(path, p.key))
		ok = ok && read
		if read {
			parts[p.key] = s
		}
	}
	l := Limit{Name: e.key}
	dim, reading, known := r.limited(&l, e, parts, path)
	_, hasMax := parts["max"]
	_, hasMin := parts["min"]
	if ok && !hasMax && !hasMin {
		r.fault(e.where, path, &fault{LimitNoBound, "has no bound", "give max:, min: or both"})
	}
	if !known {
		return
	}
	var bounds []Limit
	for _, key := range []string{"max", "min"} {
		s, given := parts[key]
		if !given {
			continue
		}
		v, f := bound(&l, s.text, dim, reading)
		if f != nil {
			r.fault(s.place, path+"."+key, f)
			continue
		}
		b := l
		b.Bound, b.AtMost = v, key == "max"
		bounds = append(bounds, b)
	}
	if len(bounds) == 2 && bounds[1].Bound > bounds[0].Bound {
		r.fault(parts["min"].place, path, &fault{LimitInverted, fmt.Sprintf("min %s is above max %s", parts["min"].text, parts["max"].text), "no design can meet both"})
		return
	}
	r.study.Limits = append(r.study.Limits, bounds...)
}

// limited finds what is limited: its program, dimension and whether it is a temperature reading.
func (r *reader) limited(l *Limit, e entry, parts map[string]scalar, path string) (dim dimension, reading, ok bool) {
	names := scope{fields: r.fields, outputs: r.outputs, absent: r.absent, engine: &r.study.Engine, usable: r.usable}
	if expr, given := parts["expr"]; given {
		if names.has(e.key) {
			r.fault(e.where, path, &fault{Contradiction, "a formula needs a name of its own, this one is taken", "call it something else"})
			return dim, false, false
		}
		if bad := badText(e.key, 60); bad != "" {
			r.fault(e.where, path, &fault{TextExpected, "the name of the limit " + bad, ""})
			return dim, false, false
		}
		p, t, f, offset := compile(expr.text, names)
		if f != nil {
			r.fault(inside(expr, offset), join(path, "expr"), f)
			return dim, false, false
		}
		l.Expr, l.program = expr.text, p
		return t.dimension, t.reading, true
	}
	if o, found := OutputNamed(r.outputs, e.key); found {
		l.Quantity, l.Unit, l.program = o.Quantity, o.Unit, outputProgram(o)
		return o.Quantity.dimension(), o.Quantity == Temperature, true
	}
	if o, found := OutputNamed(r.absent, e.key); found {
		r.fault(e.where, path, &fault{DoesNotApply, "applies only " + o.When.Words, "take it out"})
		return dim, false, false
	}
	f, found := FieldNamed(r.fields, e.key)
	switch {
	case !found:
		if _, hasExpr := parts["expr"]; !hasExpr {
			r.fault(e.where, path, &fault{LimitUnknown, fmt.Sprintf("no result or input is called %q", clip(e.key)), r.limitHint(e.key)})
		}
		return dim, false, false
	case f.Kind == Choice:
		r.fault(e.where, path, &fault{LimitUnknown, "a choice cannot be limited", "list the allowed ones below free"})
		return dim, false, false
	case r.usable && !f.Applies(&r.study.Engine):
		r.fault(e.where, path, &fault{DoesNotApply, "applies only " + f.When.Words, "take it out"})
		return dim, false, false
	}
	l.Quantity, l.Unit, l.program = f.Quantity, f.Unit, fieldProgram(f)
	return f.Quantity.dimension(), f.Quantity == Temperature, true
}

func (r *reader) limitHint(name string) string {
	if isPrefix(r.fields, name+".") {
		return "write the whole name, as in heater.metal_temperature"
	}
	if s := r.suggest(name, append(outputNames(r.outputs), fieldPaths(r.fields)...)); s != "" {
		return s
	}
	return "`hotfront fields` lists the names; a limit of your own needs expr:"
}

// bound reads a bound. That of a formula may have any unit of the formula's dimension, in which
// tables then show it.
func bound(l *Limit, text string, dim dimension, reading bool) (float64, *fault) {
	if l.Expr == "" {
		return parseQuantity(text, l.Quantity)
	}
	v, u, bare, f := parseAny(text)
	switch {
	case f != nil:
		return 0, f
	case bare:
		return v, nil
	case !u.quantity.dimension().equal(dim):
		return 0, &fault{ExprDimension, fmt.Sprintf("the bound is %s, the formula gives %s", article(u.quantity.String()), article(dim.String())), ""}
	case u.offset != 0 && !reading:
		return 0, &fault{ExprDimension, "the bound is a temperature reading, the formula gives a difference or a product", "write the bound in K"}
	}
	l.Unit, l.Quantity = u.name, u.quantity
	if u.quantity == Temperature && !reading {
		l.Quantity = TemperatureDifference
	}
	return v, nil
}

// inside is the place of a letter of a formula that stands on one line of the file.
func inside(s scalar, offset int) place {
	p := s.place
	if s.node == nil || s.node.Line == 0 || strings.Contains(s.text, "\n") {
		return p
	}
	const plain, quoted = 0, 1
	quote := plain
	if s.node.Style&(yaml.DoubleQuotedStyle|yaml.SingleQuotedStyle) != 0 {
		quote = quoted
	}
	if s.node.Style&(yaml.LiteralStyle|yaml.FoldedStyle) == 0 {
		p.column += quote + offset
	}
	return p
}

// aims reads the aims; a study that frees something needs one to three.
func (r *reader) aims(e, free entry) {
	if e.value == nil {
		if free.value != nil {
			r.fault(free.where, "aims", &fault{AimsCount, "something is free and there is no aim", "as in aims: {brake_power: most, brake_efficiency: most}"})
		}
		return
	}
	if e.value.Tag == "!!null" || (e.value.Kind == yaml.MappingNode && len(e.value.Content) == 0) {
		r.fault(e.where, "aims", &fault{AimsCount, "there is no aim", "as in aims: {brake_power: most, brake_efficiency: most}"})
		return
	}
	entries, ok := r.block(e.value, "aims")
	if !ok {
		return
	}
	if len(entries) > mostAims {
		r.fault(entries[mostAims].where, "aims", &fault{AimsCount, fmt.Sprintf("%d aims; a front of more than %d cannot be read", len(entries), mostAims), "make limits of the others"})
	}
	seen := map[string]bool{}
	for _, a := range entries {
		path := join("aims", a.key)
		o, found := OutputNamed(r.outputs, a.key)
		if other, known := OutputNamed(r.absent, a.key); known {
			r.fault(a.where, path, &fault{DoesNotApply, "applies only " + other.When.Words, "aim at another result"})
			continue
		}
		if !found {
			hint := r.suggest(a.key, outputNames(r.outputs))
			if hint == "" {
				hint = "`hotfront fields` lists the results"
			}
			if isField(r.fields, a.key) {
				hint = "an input cannot be an aim: limit it"
			}
			r.fault(a.where, path, &fault{AimUnknown, fmt.Sprintf("no result is called %q", clip(a.key)), hint})
		}
		s, read := r.scalar(a.value, path)
		if read && s.text != "most" && s.text != "least" {
			r.fault(s.place, path, &fault{AimDirection, fmt.Sprintf("%q is not a direction", clip(s.text)), "most or least"})
			read = false
		}
		if found && read && !seen[a.key] && len(r.study.Aims) < mostAims {
			seen[a.key] = true
			r.study.Aims = append(r.study.Aims, Aim{Name: a.key, Most: s.text == "most", output: outputIndex(r.outputs, o)})
		}
	}
	if free.value == nil || len(free.value.Content) == 0 {
		r.fault(e.where, "aims", &fault{NothingToDo, "nothing is free", "a search needs variables below free:"})
	}
}

func outputIndex(outputs []Output, o *Output) int {
	for i := range outputs {
		if &outputs[i] == o {
			return i
		}
	}
	panic("studies: output of another table")
}

// budget reads the number of evaluations.
func (r *reader) budget(n *yaml.Node) {
	const most = 1e9
	entries, ok := r.block(n, "budget")
	if !ok {
		return
	}
	for _, e := range entries {
		if e.key != "evaluations" {
			r.unknownKey(e, "budget", []string{"evaluations"})
			continue
		}
		s, ok := r.scalar(e.value, "budget.evaluations")
		if !ok {
			continue
		}
		v, f := parseWhole(s.text)
		if f != nil || v < 1 || v > most {
			hint := ""
			if f != nil {
				hint = f.text
			}
			r.fault(s.place, "budget.evaluations", &fault{BudgetInvalid, "a whole number of evaluations from 1 to 1e9 is wanted", hint})
			continue
		}
		r.study.Evaluations = int(v)
	}
}

// seed reads the seed.
func (r *reader) seed(n *yaml.Node) {
	s, ok := r.scalar(n, "seed")
	if !ok {
		return
	}
	v, err := strconv.ParseUint(s.text, 10, 64)
	if err != nil || (len(s.text) > 1 && s.text[0] == '0') {
		r.fault(s.place, "seed", &fault{SeedInvalid, fmt.Sprintf("%q is not a whole number from 0 to 18446744073709551615", clip(s.text)), ""})
		return
	}
	r.study.Seed = v
}
