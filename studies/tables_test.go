package studies

import (
	"reflect"
	"slices"
	"strings"
	"testing"

	"hotfront/model"
	"hotfront/model/drive"
	"hotfront/model/gas"
	"hotfront/model/metal"
)

// floats collects the float64 fields of a struct by path.
func floats(v reflect.Value, path string, into map[string]reflect.Value) {
	for i := range v.NumField() {
		name := path + v.Type().Field(i).Name
		switch f := v.Field(i); f.Kind() {
		case reflect.Float64:
			into[name] = f
		case reflect.Struct:
			floats(f, name+".", into)
		}
	}
}

// snake makes heater_flow_loss of HeaterFlowLoss; a run of capitals is one word.
func snake(name string) string {
	var b strings.Builder
	r := []rune(name)
	for i, c := range r {
		upper := c >= 'A' && c <= 'Z'
		if upper && i > 0 {
			lowerBefore := r[i-1] >= 'a' && r[i-1] <= 'z'
			lowerAfter := i+1 < len(r) && r[i+1] >= 'a' && r[i+1] <= 'z'
			if r[i-1] != '.' && (lowerBefore || lowerAfter) {
				b.WriteByte('_')
			}
		}
		b.WriteString(strings.ToLower(string(c)))
	}
	return b.String()
}

// TestOutputsAreComplete: each float64 of Performance has one row, named after the field.
func TestOutputsAreComplete(t *testing.T) {
	var perf model.Performance
	fields := map[string]reflect.Value{}
	floats(reflect.ValueOf(&perf).Elem(), "", fields)
	names := map[string]string{} // normalised field name -> field
	for name := range fields {
		names[strings.NewReplacer(".", "_").Replace(snake(name))] = name
	}
	outputs := Outputs()
	if len(outputs) != len(fields) {
		t.Errorf("%d rows, %d fields", len(outputs), len(fields))
	}
	for i := range outputs {
		o := &outputs[i]
		field, ok := names[strings.ReplaceAll(o.Name, ".", "_")]
		if !ok {
			t.Errorf("%s: no field of this name", o.Name)
			continue
		}
		delete(names, strings.ReplaceAll(o.Name, ".", "_"))
		perf = model.Performance{}
		fields[field].SetFloat(42)
		if got := o.Get(&perf); got != 42 {
			t.Errorf("%s does not read %s", o.Name, field)
		}
		if o.Text == "" {
			t.Errorf("%s: no text", o.Name)
		}
		o.Format(1) // panics when the unit is not one of the quantity
	}
	for _, field := range names {
		t.Errorf("%s: no row", field)
	}
}

// TestFieldsReachTheWholeEngine: each number and each choice of Engine is written by some field,
// and no field writes two of them, save the alternatives that write the same one.
func TestFieldsReachTheWholeEngine(t *testing.T) {
	reached := map[string]bool{}
	for _, f := range Fields() {
		var e model.Engine
		v := 1.0
		f.Set(&e, v)
		changed := leaves(reflect.ValueOf(e), "")
		if got := f.Get(&e); got != v {
			t.Errorf("%s: set %g, get %g", f.Path, v, got)
		}
		if len(changed) == 0 {
			t.Errorf("%s writes nothing", f.Path)
		}
		for _, c := range changed {
			reached[c] = true
		}
		if len(changed) > 1 && f.Group != heatGroup {
			t.Errorf("%s writes %v", f.Path, changed)
		}
	}
	// What a machine has and no study gives: bodies of parts that carry no heat, and what follows from the alloy.
	unused := []string{"Heat.Burner.Fins.Conductivity",
		"ExpansionPiston.Rod",
		"CompressionPiston.Rod", "CompressionPiston.Length", "CompressionPiston.Gap", "CompressionPiston.Wall"}
	for _, name := range leafNames(reflect.TypeFor[model.Engine](), "") {
		if reached[name] == slices.Contains(unused, name) {
			t.Errorf("%s: reached %v", name, reached[name])
		}
	}
}

// leaves lists the fields that are not zero.
func leaves(v reflect.Value, path string) []string {
	if v.Kind() != reflect.Struct {
		if v.IsZero() {
			return nil
		}
		return []string{strings.TrimSuffix(path, ".")}
	}
	var names []string
	for i := range v.NumField() {
		names = append(names, leaves(v.Field(i), path+v.Type().Field(i).Name+".")...)
	}
	return names
}

func leafNames(t reflect.Type, path string) []string {
	if t.Kind() != reflect.Struct {
		return []string{strings.TrimSuffix(path, ".")}
	}
	var names []string
	for i := range t.NumField() {
		names = append(names, leafNames(t.Field(i).Type, path+t.Field(i).Name+".")...)
	}
	return names
}

func TestFieldTable(t *testing.T) {
	fields, outputs := Fields(), Outputs()
	seen := map[string]int{}
	for i := range fields {
		f := &fields[i]
		if _, twice := seen[f.Path]; twice {
			t.Errorf("%s stands twice", f.Path)
		}
		seen[f.Path] = i
		if _, both := OutputNamed(outputs, f.Path); both {
			t.Errorf("%s is an input and a result", f.Path)
		}
		if f.Text == "" {
			t.Errorf("%s: no text", f.Path)
		}
		if (f.Kind == Choice) != (len(f.Choices) > 0) || (f.Kind != Choice) == f.Hard.Empty() {
			t.Errorf("%s: kind %v, choices %v, range %v", f.Path, f.Kind, f.Choices, f.Hard)
		}
		if !f.Usual.Empty() && (f.Usual.Low < f.Hard.Low || f.Usual.High > f.Hard.High) {
			t.Errorf("%s: usual range outside the physical one", f.Path)
		}
		if f.Default != "" {
			v := f.defaultValue()
			if !f.Usual.Empty() && !f.Usual.holds(v) {
				t.Errorf("%s: default is unusual", f.Path)
			}
		}
		if f.Follows != "" {
			if j, before := seen[f.Follows]; !before || j == i {
				t.Errorf("%s follows %s, which does not stand before it", f.Path, f.Follows)
			}
		}
		f.withUnit(f.Hard.Low)
	}
}

// TestChoicesAreConstants: the index of a choice is the model's constant of that name.
func TestChoicesAreConstants(t *testing.T) {
	for i, k := range gas.Kinds() {
		if int(k) != i {
			t.Errorf("gas %v has index %d", k, i)
		}
	}
	for i, a := range metal.Alloys() {
		if int(a) != i {
			t.Errorf("alloy %v has index %d", a, i)
		}
	}
	if drive.Sinusoidal != 0 || drive.SliderCrank != 1 || drive.Rhombic != 2 {
		t.Error("drives are not in the order of driveNames")
	}
	if model.Alpha != 0 || model.Beta != 1 || model.Gamma != 2 || model.WovenScreen != 0 || model.RandomFibre != 1 {
		t.Error("layouts or matrices are not in the order of their names")
	}
}
