package studies

import (
	"fmt"
	"math"
	"slices"
	"strconv"
)

// value reads one value of a field: type, unit, physical range, usual range.
func (r *reader) value(f *Field, s scalar, path string) (float64, bool) {
	v, fault := f.parse(s.text)
	if fault != nil {
		r.fault(s.place, path, fault)
		return 0, false
	}
	if f.Kind != Choice && !f.Usual.Empty() && !f.Usual.holds(v) {
		r.fault(s.place, path, unusual(f, v))
	}
	return v, true
}

// parse reads a value within the field's physical range.
func (f *Field) parse(text string) (float64, *fault) {
	switch f.Kind {
	case Choice:
		i := slices.Index(f.Choices, text)
		if i < 0 {
			return 0, f.unknownChoice(text)
		}
		return float64(i), nil
	case Whole:
		v, fault := parseWhole(text)
		if fault == nil && !f.Hard.holds(v) {
			fault = outside(v, f.Quantity, f.Unit, f.Hard)
		}
		return v, fault
	}
	v, fault := parseQuantity(text, f.Quantity)
	if fault == nil && !f.Hard.holds(v) {
		fault = outside(v, f.Quantity, f.Unit, f.Hard)
	}
	return v, fault
}

func (f *Field) unknownChoice(text string) *fault {
	return &fault{ChoiceUnknown, fmt.Sprintf("%q is not one of its values", clip(text)), oneOf(text, f.Choices)}
}

func parseWhole(text string) (float64, *fault) {
	v, rest, f := splitNumber(text)
	switch {
	case f != nil:
		return 0, f
	case rest != "" && rest != "-":
		if _, known := unitOf(rest, Number); known {
			return 0, &fault{UnitWrong, fmt.Sprintf("a count has no unit, not %q", clip(rest)), ""}
		}
		return 0, &fault{UnitUnknown, fmt.Sprintf("a count has no unit, not %q", clip(rest)), ""}
	case v != math.Trunc(v) || math.Abs(v) > 1<<53:
		return 0, &fault{WholeExpected, fmt.Sprintf("%q is not a whole number", clip(text)), ""}
	}
	return v, nil
}

// defaultValue reads the default of the table; a slip there is a programmer's mistake.
func (f *Field) defaultValue() float64 {
	v, fault := f.parse(f.Default)
	if fault != nil {
		panic("studies: bad default in the table of fields: " + f.Path)
	}
	return v
}

func (f *Field) withUnit(v float64) string {
	if f.Kind == Choice {
		return f.Format(v)
	}
	return shown(v, f.Quantity, f.Unit)
}

func outside(v float64, q Quantity, unitName string, r Range) *fault {
	return &fault{OutOfRange, fmt.Sprintf("%s is outside the physical range %s", shown(v, q, unitName), span(r, q, unitName)), ""}
}

func unusual(f *Field, v float64) *fault {
	return &fault{Unusual, fmt.Sprintf("%s is outside the usual range %s", shown(v, f.Quantity, f.Unit), span(f.Usual, f.Quantity, f.Unit)), "check it"}
}

func shown(v float64, q Quantity, unitName string) string {
	s := short(FromSI(v, q, unitName))
	if unitName == "-" {
		return s
	}
	return s + " " + unitName
}

func span(r Range, q Quantity, unitName string) string {
	return short(FromSI(r.Low, q, unitName)) + " to " + shown(r.High, q, unitName)
}

// short writes a number with at most six digits and no zeros at its end.
func short(v float64) string {
	rounded, err := strconv.ParseFloat(strconv.FormatFloat(v, 'g', 6, 64), 64)
	if err != nil {
		return FormatNumber(v, 6)
	}
	return plainNumber(rounded)
}
