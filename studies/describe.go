package studies

import (
	"strings"

	"hotfront/model"
)

// ValueText writes a value with its unit, as messages do.
func (f *Field) ValueText(v float64) string { return f.withUnit(v) }

// RangeText writes a range with its unit; "" for none.
func (f *Field) RangeText(r Range) string {
	if r.Empty() {
		return ""
	}
	return span(r, f.Quantity, f.Unit)
}

// FreeText writes what the i-th free variable may be: "20 to 80", "helium, hydrogen".
func (s *Study) FreeText(i int) string {
	free := &s.Free[i]
	f := &s.fields[free.field]
	if free.List == nil {
		return span(Range{free.Low, free.High}, f.Quantity, f.Unit)
	}
	texts := make([]string, len(free.List))
	for j, v := range free.List {
		texts[j] = f.withUnit(v)
	}
	return strings.Join(texts, ", ")
}

// BoundText writes the bound: "at most 750 degC".
func (l *Limit) BoundText() string {
	text := plainNumber(l.Bound)
	if l.Unit != "" {
		text = shown(l.Bound, l.Quantity, l.Unit)
	}
	if l.AtMost {
		return "at most " + text
	}
	return "at least " + text
}

// Text writes the aim: "most brake_power".
func (a Aim) Text() string {
	if a.Most {
		return "most " + a.Name
	}
	return "least " + a.Name
}

// LimitResult says how one limit stands in a design, SI.
type LimitResult struct {
	Name   string
	Value  float64
	Bound  float64
	Margin float64 // room left, negative when not met
	Met    bool
}

// LimitResults says how each limit stands. A value that is no number is not met.
func (s *Study) LimitResults(e *model.Engine, p *model.Performance) []LimitResult {
	results := make([]LimitResult, len(s.Limits))
	for i := range s.Limits {
		l := &s.Limits[i]
		v := l.Value(e, p)
		m := l.Margin(v)
		results[i] = LimitResult{Name: l.Name, Value: v, Bound: l.Bound, Margin: m, Met: m >= 0}
	}
	return results
}
