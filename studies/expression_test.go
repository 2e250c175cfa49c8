package studies

import (
	"maps"
	"strings"
	"testing"

	"github.com/expr-lang/expr"
	floatcmp "gonum.org/v1/gonum/floats/scalar"

	"hotfront/model"
)

func testScope(t testing.TB) (scope, *model.Engine, *model.Performance) {
	s := mustLoad(t, refuge(t))
	perf := &model.Performance{BrakePower: 4000, HeatIn: 13000, PressureMax: 8e6, PressureMin: 4e6,
		HeaterMetalTemperature: 1000, HeaterGasTemperature: 900, Mach: 0.05}
	return scope{fields: s.fields, outputs: s.outputs, engine: &s.Engine, usable: true}, &s.Engine, perf
}

// TestFormulasAgainstTheirParsersMachine computes formulas with our operations and with the
// machine that belongs to the parser.
func TestFormulasAgainstTheirParsersMachine(t *testing.T) {
	const rounding = 1e-14 // the same operations in the same order, up to the order in powers
	names, e, perf := testScope(t)
	env := map[string]any{"pi": 3.141592653589793}
	put := func(path string, v float64) {
		block, key, nested := strings.Cut(path, ".")
		if !nested {
			env[path] = v
			return
		}
		inner, ok := env[block].(map[string]any)
		if !ok {
			inner = map[string]any{}
			env[block] = inner
		}
		inner[key] = v
	}
	for i := range names.fields {
		put(names.fields[i].Path, names.fields[i].Get(e))
	}
	for i := range names.outputs {
		put(names.outputs[i].Name, names.outputs[i].Get(perf))
	}
	for _, u := range units() {
		if u.offset == 0 && u.name != "min" { // min is a function for the parser's machine
			env[u.name] = u.si(1)
		}
	}
	two := func(pick func(a, b float64) float64) func(...any) (any, error) {
		return func(p ...any) (any, error) {
			v := toFloat(p[0])
			for _, x := range p[1:] {
				v = pick(v, toFloat(x))
			}
			return v, nil
		}
	}
	options := []expr.Option{expr.Env(maps.Clone(env)), expr.DisableAllBuiltins(),
		expr.Function("sqrt", func(p ...any) (any, error) { return sqrt(toFloat(p[0])), nil }),
		expr.Function("abs", func(p ...any) (any, error) { return max(toFloat(p[0]), -toFloat(p[0])), nil }),
		expr.Function("min", two(func(a, b float64) float64 { return min(a, b) })),
		expr.Function("max", two(func(a, b float64) float64 { return max(a, b) })),
	}
	for _, text := range []string{
		"heater.tube_count * heater.tube_length",
		"1 + 2 * 3 - 4 / 5",
		"(1 + 2) * 3 - 4 / (5 - 7)",
		"2 ^ 3 ^ 2 / 100",
		"-3 ** 2 + abs(-4)",
		"brake_power / heat_in - 1 / 3",
		"pi / 4 * regenerator.diameter ^ 2 * (1 - regenerator.porosity)",
		"sqrt(heater.tube_bore * heater.tube_wall)",
		"max(pressure_max, 5e6 * Pa, 2 * pressure_min) - min(pressure_min, 50 * bar)",
		"heater.metal_temperature - heater.gas_temperature",
		"5 * mm + heater.tube_wall - -heater.tube_bore",
		"brake_power | max(3 * kW)",
		"mach * (1 - mach * (1 - mach * (1 - mach)))",
		"10 - 3 - 2",
		"16 / 4 / 2",
	} {
		p, _, f, _ := compile(text, names)
		if f != nil {
			t.Errorf("%s: %v", text, f)
			continue
		}
		compiled, err := expr.Compile(text, options...)
		if err != nil {
			t.Errorf("%s: %v", text, err)
			continue
		}
		out, err := expr.Run(compiled, env)
		if err != nil {
			t.Errorf("%s: %v", text, err)
			continue
		}
		if got, want := p.run(e, perf), toFloat(out); !floatcmp.EqualWithinRel(got, want, rounding) {
			t.Errorf("%s: got %v, want %v", text, got, want)
		}
	}
}

func toFloat(v any) float64 {
	switch v := v.(type) {
	case int:
		return float64(v)
	case float64:
		return v
	}
	panic("not a number")
}

// sqrt by Newton's rule, so that the test does not share the code it checks.
func sqrt(v float64) float64 {
	x := max(v, 1)
	for range 60 {
		x = (x + v/x) / 2
	}
	return x
}

func TestFormulaMistakes(t *testing.T) {
	names, _, _ := testScope(t)
	deep := strings.Repeat("1+(", 40) + "1" + strings.Repeat(")", 40)
	cases := []struct {
		text   string
		code   Code
		says   string
		offset int
	}{
		{"", ExprSyntax, "", 0},
		{"1 +", ExprSyntax, "", 2},
		{"heater.tube_bore $ 2", ExprSyntax, "", 17},
		{"brake_power > 3", ExprSyntax, "compare by max: and min:", 12},
		{"heater.tube_bore ? 1 : 2", ExprSyntax, "not used in formulas", -1},
		{"len(gas)", ExprUnknown, "no function is called \"len\"", 0},
		{"now()", ExprUnknown, "no function", 0},
		{"sqrt(1, 2)", ExprSyntax, "sqrt with 2 values", 0},
		{"max(1)", ExprSyntax, "max with 1 values", 0},
		{"heater.tube_bor", ExprUnknown, "did you mean heater.tube_bore?", 0},
		{"2 * tube_count", ExprUnknown, "tube_count", 4},
		{"gas", ExprUnknown, "a choice", 0},
		{"expansion_piston.bore", ExprUnknown, "applies only to alpha machines", 0},
		{"degC", ExprUnknown, "cannot be a factor", 0},
		{"heater.tube_bore + charge_pressure", ExprDimension, "+ between a length and a pressure", 17},
		{"heater.tube_bore - 1", ExprDimension, "as in 5*mm", 17},
		{"max(brake_power, torque)", ExprDimension, "max between a power and a torque", 17},
		{"2 ^ heater.tube_bore", ExprDimension, "an exponent must be a plain number", 2},
		{"heater.tube_bore ^ heater.tube_count", ExprDimension, "written out", 17},
		{deep, ExprSyntax, "nested too deep", -1},
		{strings.Repeat("1+", 2000) + "1", ExprSyntax, "letters", 0},
		{"let x = 1; x", ExprSyntax, "not used", -1},
		{"[1, 2]", ExprSyntax, "not used", 0},
		{"'a' + 'b'", ExprSyntax, "not used", 0},
		{"heater?.tube_bore", ExprSyntax, "not used", -1},
		{"heater[1]", ExprSyntax, "not used", -1},
		{"map(1, #)", ExprSyntax, "not used", -1},
	}
	for _, c := range cases {
		_, _, f, offset := compile(c.text, names)
		if f == nil || f.code != c.code || !strings.Contains(f.Error(), c.says) {
			t.Errorf("%s: got %v, want %s and %q", clip(c.text), f, c.code, c.says)
			continue
		}
		if c.offset >= 0 && offset != c.offset {
			t.Errorf("%s: at letter %d, want %d", clip(c.text), offset, c.offset)
		}
	}
}

func TestFormulaDimensions(t *testing.T) {
	names, _, _ := testScope(t)
	cases := []struct {
		text    string
		want    dimension
		reading bool
	}{
		{"heater.tube_count * heater.tube_length", Length.dimension(), false},
		{"brake_power / speed", Torque.dimension(), false},
		{"sqrt(heater.tube_bore ^ 4)", Area.dimension(), false},
		{"heater.tube_bore ^ (1/3) * heater.tube_bore ^ (2/3)", Length.dimension(), false},
		{"heater.metal_temperature - heater.gas_temperature", Temperature.dimension(), false},
		{"heater.metal_temperature + 20*K", Temperature.dimension(), true},
		{"max(heater.metal_temperature, heater.gas_temperature)", Temperature.dimension(), true},
		{"drive.phase_angle", dimension{}, false},
	}
	for _, c := range cases {
		_, r, f, _ := compile(c.text, names)
		if f != nil || !r.dimension.equal(c.want) || r.reading != c.reading {
			t.Errorf("%s: %v %v, %v", c.text, r.dimension, r.reading, f)
		}
	}
}

func TestFormulaDoesNotAllocate(t *testing.T) {
	names, e, perf := testScope(t)
	p, _, f, _ := compile("max(heater.tube_count * heater.tube_length ^ 2 / heater.tube_bore, sqrt(2) * mm)", names)
	if f != nil {
		t.Fatal(f)
	}
	if n := testing.AllocsPerRun(100, func() { p.run(e, perf) }); n != 0 {
		t.Errorf("%v allocations", n)
	}
}

func BenchmarkFormula(b *testing.B) {
	names, e, perf := testScope(b)
	p, _, f, _ := compile("heater.tube_count * heater.tube_length / (brake_power / heat_in)", names)
	if f != nil {
		b.Fatal(f)
	}
	b.ReportAllocs()
	for b.Loop() {
		p.run(e, perf)
	}
}
