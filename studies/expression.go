package studies

import (
	"errors"
	"fmt"
	"math"
	"strings"
	"unicode/utf8"

	"github.com/expr-lang/expr/ast"
	"github.com/expr-lang/expr/conf"
	"github.com/expr-lang/expr/file"
	"github.com/expr-lang/expr/parser"

	"hotfront/model"
)

// Formulas are read by the parser of expr-lang. Its tree is checked for dimensions and turned into
// a short list of float64 operations of our own: the machine that comes with the parser puts every
// number in an interface and so allocates at each step. Allowed are numbers, names of results and
// inputs, units as factors (5*bar), pi, + - * / ^, sqrt, abs, min, max.

const (
	longestFormula = 2000 // letters
	deepestStack   = 32   // values kept at once
)

// scope holds the names a formula may use.
type scope struct {
	fields  []Field
	outputs []Output
	engine  *model.Engine
	absent  []Output // results that mean nothing with this engine
	usable  bool     // the engine says which fields apply
}

func (s scope) has(name string) bool {
	_, output := OutputNamed(s.outputs, name)
	return output || isField(s.fields, name)
}

// result is what is known of a part of a formula before it runs.
type result struct {
	dimension dimension
	reading   bool // a temperature reading, which may be compared with degC
	constant  bool
	value     float64 // of a constant
}

type opcode uint8

const (
	opNumber opcode = iota
	opField
	opOutput
	opNegate
	opAdd
	opSubtract
	opMultiply
	opDivide
	opPower
	opSqrt
	opAbs
	opMin
	opMax
)

type operation struct {
	code   opcode
	value  float64
	field  func(e *model.Engine) float64
	output func(p *model.Performance) *float64
}

// program computes one value of a design without allocating.
type program struct {
	operations []operation
}

// run computes the value. It may be NaN or infinite.
func (p *program) run(e *model.Engine, perf *model.Performance) float64 {
	var stack [deepestStack]float64
	n := 0 // values on the stack
	for i := range p.operations {
		o := &p.operations[i]
		switch o.code {
		case opNumber:
			stack[n] = o.value
			n++
			continue
		case opField:
			stack[n] = o.field(e)
			n++
			continue
		case opOutput:
			stack[n] = *o.output(perf)
			n++
			continue
		case opNegate:
			stack[n-1] = -stack[n-1]
			continue
		case opSqrt:
			stack[n-1] = math.Sqrt(stack[n-1])
			continue
		case opAbs:
			stack[n-1] = math.Abs(stack[n-1])
			continue
		}
		n--
		a, b := stack[n-1], stack[n]
		switch o.code {
		case opAdd:
			a += b
		case opSubtract:
			a -= b
		case opMultiply:
			a *= b
		case opDivide:
			a /= b
		case opPower:
			a = math.Pow(a, b)
		case opMin:
			a = min(a, b)
		case opMax:
			a = max(a, b)
		}
		stack[n-1] = a
	}
	return stack[0]
}

func outputProgram(o *Output) *program {
	return &program{operations: []operation{{code: opOutput, output: o.at}}}
}

func fieldProgram(f *Field) *program {
	return &program{operations: []operation{{code: opField, field: f.get}}}
}

// compile reads and checks a formula. The offset of a fault counts letters from 0.
func compile(text string, names scope) (p *program, r result, f *fault, offset int) {
	if n := utf8.RuneCountInString(text); n > longestFormula {
		return nil, r, &fault{ExprSyntax, fmt.Sprintf("the formula has %d letters, at most %d are read", n, longestFormula), ""}, 0
	}
	config := conf.CreateNew()
	for name := range config.Builtins {
		config.Disabled[name] = true
	}
	tree, err := parser.ParseWithConfig(text, config)
	if err != nil {
		f := &fault{ExprSyntax, "the formula cannot be read: " + clip(err.Error()), ""}
		if fe, ok := errors.AsType[*file.Error](err); ok {
			f.text, offset = "the formula cannot be read: "+clip(fe.Message), fe.From
		}
		return nil, r, f, offset
	}
	c := compiler{names: names, p: &program{}}
	r = c.node(tree.Node)
	if c.fault != nil {
		return nil, r, c.fault, c.offset
	}
	return c.p, r, nil, 0
}

// compiler walks the tree of a formula.
type compiler struct {
	names  scope
	p      *program
	depth  int // values on the stack
	fault  *fault
	offset int
}

// fail keeps the first fault.
func (c *compiler) fail(n ast.Node, code Code, text, hint string) result {
	if c.fault == nil {
		c.fault = &fault{code, text, hint}
		c.offset = n.Location().From
	}
	return result{}
}

func (c *compiler) emit(o operation, stack int) {
	c.p.operations = append(c.p.operations, o)
	c.depth += stack
}

// push emits an operation that puts a value on the stack.
func (c *compiler) push(n ast.Node, o operation, r result) result {
	if c.depth == deepestStack {
		return c.fail(n, ExprSyntax, "the formula is nested too deep", "split it into several limits")
	}
	c.emit(o, 1)
	return r
}

func (c *compiler) number(n ast.Node, v float64, d dimension) result {
	return c.push(n, operation{code: opNumber, value: v}, result{dimension: d, constant: true, value: v})
}

func (c *compiler) node(n ast.Node) result {
	if c.fault != nil {
		return result{}
	}
	switch n := n.(type) {
	case *ast.IntegerNode:
		return c.number(n, float64(n.Value), dimension{})
	case *ast.FloatNode:
		return c.number(n, n.Value, dimension{})
	case *ast.IdentifierNode:
		return c.name(n, n, n.Value)
	case *ast.MemberNode:
		if name, root := dotted(n); root != nil {
			return c.name(n, root, name)
		}
	case *ast.UnaryNode:
		switch n.Operator {
		case "+":
			return c.node(n.Node)
		case "-":
			r := c.node(n.Node)
			c.emit(operation{code: opNegate}, 0)
			r.reading, r.value = false, -r.value
			return r
		}
	case *ast.BinaryNode:
		return c.binary(n)
	case *ast.CallNode:
		return c.call(n)
	}
	return c.fail(n, ExprSyntax, "this is not used in formulas", "numbers, names, + - * / ^, sqrt, abs, min and max are")
}

// dotted joins heater.tube_count; root is nil when it is something else.
func dotted(n ast.Node) (name string, root *ast.IdentifierNode) {
	switch n := n.(type) {
	case *ast.IdentifierNode:
		return n.Value, n
	case *ast.MemberNode:
		property, ok := n.Property.(*ast.StringNode)
		if !ok || n.Optional {
			return "", nil
		}
		name, root = dotted(n.Node)
		return name + "." + property.Value, root
	}
	return "", nil
}

// name is a result, an input, a unit or pi.
func (c *compiler) name(n ast.Node, root *ast.IdentifierNode, name string) result {
	if o, ok := OutputNamed(c.names.outputs, name); ok {
		return c.push(root, operation{code: opOutput, output: o.at}, result{dimension: o.Quantity.dimension(), reading: o.Quantity == Temperature})
	}
	if o, ok := OutputNamed(c.names.absent, name); ok {
		return c.fail(root, ExprUnknown, name+" applies only "+o.When.Words, "")
	}
	if f, ok := FieldNamed(c.names.fields, name); ok {
		switch {
		case f.Kind == Choice:
			return c.fail(root, ExprUnknown, name+" is a choice, not a number", "")
		case c.names.usable && !f.Applies(c.names.engine):
			return c.fail(root, ExprUnknown, name+" applies only "+f.When.Words, "")
		}
		return c.push(root, operation{code: opField, field: f.get}, result{dimension: f.Quantity.dimension(), reading: f.Quantity == Temperature})
	}
	if name == "pi" {
		return c.number(n, math.Pi, dimension{})
	}
	if u, ok := unitOf(name, Number); ok && name != "-" && name != "%" {
		if u.offset != 0 {
			return c.fail(root, ExprUnknown, name+" cannot be a factor", "write the temperature in K, as in 1000*K")
		}
		return c.number(n, u.si(1), u.quantity.dimension())
	}
	hint := suggestion(name, append(outputNames(c.names.outputs), fieldPaths(c.names.fields)...))
	return c.fail(root, ExprUnknown, fmt.Sprintf("no result, input or unit is called %q", clip(name)), hint)
}

func (c *compiler) binary(n *ast.BinaryNode) result {
	code, ok := binaryCode(n.Operator)
	if !ok {
		return c.fail(n, ExprSyntax, fmt.Sprintf("%q is not used in formulas", n.Operator), "compare by max: and min:")
	}
	x, y := c.node(n.Left), c.node(n.Right)
	if c.fault != nil {
		return result{}
	}
	c.emit(operation{code: code}, -1)
	r := result{constant: x.constant && y.constant}
	switch code {
	case opAdd, opSubtract:
		if !x.dimension.equal(y.dimension) {
			return c.mismatch(n, n.Operator, x, y)
		}
		r.dimension, r.value = x.dimension, x.value+y.value
		r.reading = x.reading != y.reading
		if code == opSubtract {
			r.value = x.value - y.value
			r.reading = x.reading && !y.reading
		}
	case opMultiply:
		r.dimension, r.value = x.dimension.plus(y.dimension, 1), x.value*y.value
	case opDivide:
		r.dimension, r.value = x.dimension.plus(y.dimension, -1), x.value/y.value
	case opPower:
		if !y.dimension.equal(dimension{}) {
			return c.fail(n, ExprDimension, fmt.Sprintf("an exponent must be a plain number, not %s", article(y.dimension.String())), "")
		}
		r.value = math.Pow(x.value, y.value)
		if !x.dimension.equal(dimension{}) {
			if !y.constant || math.IsNaN(y.value) || math.Abs(y.value) > 12 {
				return c.fail(n, ExprDimension, fmt.Sprintf("the exponent of %s must be a number that is written out, at most 12", article(x.dimension.String())), "")
			}
			r.dimension = r.dimension.plus(x.dimension, y.value)
		}
	}
	return r
}

func binaryCode(operator string) (opcode, bool) {
	switch operator {
	case "+":
		return opAdd, true
	case "-":
		return opSubtract, true
	case "*":
		return opMultiply, true
	case "/":
		return opDivide, true
	case "^", "**":
		return opPower, true
	}
	return 0, false
}

func (c *compiler) mismatch(n ast.Node, between string, x, y result) result {
	hint := ""
	if x.dimension.equal(dimension{}) || y.dimension.equal(dimension{}) {
		hint = "give a number its unit as a factor, as in 5*mm"
	}
	return c.fail(n, ExprDimension, fmt.Sprintf("%s between %s and %s", between, article(x.dimension.String()), article(y.dimension.String())), hint)
}

func (c *compiler) call(n *ast.CallNode) result {
	name, root := dotted(n.Callee)
	functions := []string{"sqrt", "abs", "min", "max"}
	if root == nil || !contains(functions, name) {
		return c.fail(n.Callee, ExprUnknown, fmt.Sprintf("no function is called %q", clip(name)), oneOf(name, functions))
	}
	least, most := 1, 1
	if name == "min" || name == "max" {
		least, most = 2, 16
	}
	if len(n.Arguments) < least || len(n.Arguments) > most {
		return c.fail(root, ExprSyntax, fmt.Sprintf("%s with %d values", name, len(n.Arguments)), strings.TrimSpace(fmt.Sprintf("it takes %d", least)+map[bool]string{true: " or more"}[most > least]))
	}
	r := c.node(n.Arguments[0])
	switch name {
	case "sqrt":
		c.emit(operation{code: opSqrt}, 0)
		r.dimension, r.reading, r.value = dimension{}.plus(r.dimension, 0.5), false, math.Sqrt(r.value)
	case "abs":
		c.emit(operation{code: opAbs}, 0)
		r.value = math.Abs(r.value)
	default:
		for _, a := range n.Arguments[1:] {
			b := c.node(a)
			if c.fault != nil {
				return result{}
			}
			if !r.dimension.equal(b.dimension) {
				return c.mismatch(a, name, r, b)
			}
			code, v := opMin, min(r.value, b.value)
			if name == "max" {
				code, v = opMax, max(r.value, b.value)
			}
			c.emit(operation{code: code}, -1)
			r.value, r.reading, r.constant = v, r.reading && b.reading, r.constant && b.constant
		}
	}
	return r
}
