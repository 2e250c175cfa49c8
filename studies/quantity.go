package studies

import (
	"fmt"
	"math"
	"strconv"
	"strings"
)

// Quantity is a kind of quantity: what a unit must fit.
type Quantity uint8

const (
	Number Quantity = iota
	Length
	Area
	Volume
	Pressure
	Temperature           // a reading, may be in degC
	TemperatureDifference // never in degC
	Frequency
	Angle
	Power
	Torque
	Energy
	Duration
	Mass
	MassFlow
	HeatFlux
	FilmCoefficient
	Speed
	Conductance
	SpecificEnergy
	SpecificHeat
	Force
	Inertia
	Unbalance
	quantities // their number
)

// String is the name of the quantity in messages.
func (q Quantity) String() string {
	return [quantities]string{"plain number", "length", "area", "volume", "pressure", "temperature",
		"temperature difference", "speed of rotation", "angle", "power", "torque", "energy", "time", "mass", "mass flow",
		"heat flux", "film coefficient", "velocity", "heat conductance", "energy by mass", "heat capacity by mass", "force", "moment of inertia", "unbalance"}[q]
}

// unit is one unit of a quantity: SI value = number x mul / div + offset. Two factors, because
// 0.3/1000 is the number nearest to 0.0003 and 0.3*0.001 is not.
type unit struct {
	name     string
	quantity Quantity
	mul, div float64
	offset   float64
}

func (u unit) si(number float64) float64 { return number*u.mul/u.div + u.offset }
func (u unit) of(si float64) float64     { return (si - u.offset) * u.div / u.mul }

// units lists every unit; the first of a quantity is its SI unit.
func units() []unit {
	const day, year = 86400, 365.25 * 86400
	return []unit{
		{"-", Number, 1, 1, 0},
		{"%", Number, 1, 100, 0},
		{"m", Length, 1, 1, 0},
		{"mm", Length, 1, 1e3, 0},
		{"cm", Length, 1, 1e2, 0},
		{"um", Length, 1, 1e6, 0},
		{"m2", Area, 1, 1, 0},
		{"cm2", Area, 1, 1e4, 0},
		{"mm2", Area, 1, 1e6, 0},
		{"m3", Volume, 1, 1, 0},
		{"cm3", Volume, 1, 1e6, 0},
		{"l", Volume, 1, 1e3, 0},
		{"Pa", Pressure, 1, 1, 0},
		{"kPa", Pressure, 1e3, 1, 0},
		{"bar", Pressure, 1e5, 1, 0},
		{"MPa", Pressure, 1e6, 1, 0},
		{"K", Temperature, 1, 1, 0},
		{"degC", Temperature, 1, 1, 273.15},
		{"K", TemperatureDifference, 1, 1, 0},
		{"Hz", Frequency, 1, 1, 0},
		{"rpm", Frequency, 1, 60, 0},
		{"rad", Angle, 1, 1, 0},
		{"deg", Angle, math.Pi, 180, 0},
		{"W", Power, 1, 1, 0},
		{"kW", Power, 1e3, 1, 0},
		{"N m", Torque, 1, 1, 0},
		{"J", Energy, 1, 1, 0},
		{"kJ", Energy, 1e3, 1, 0},
		{"s", Duration, 1, 1, 0},
		{"min", Duration, 60, 1, 0},
		{"h", Duration, 3600, 1, 0},
		{"d", Duration, day, 1, 0},
		{"a", Duration, year, 1, 0},
		{"kg", Mass, 1, 1, 0},
		{"g", Mass, 1, 1e3, 0},
		{"kg/s", MassFlow, 1, 1, 0},
		{"g/s", MassFlow, 1, 1e3, 0},
		{"W/m2", HeatFlux, 1, 1, 0},
		{"kW/m2", HeatFlux, 1e3, 1, 0},
		{"W/cm2", HeatFlux, 1e4, 1, 0},
		{"W/(m2 K)", FilmCoefficient, 1, 1, 0},
		{"kW/(m2 K)", FilmCoefficient, 1e3, 1, 0},
		{"m/s", Speed, 1, 1, 0},
		{"W/K", Conductance, 1, 1, 0},
		{"J/kg", SpecificEnergy, 1, 1, 0},
		{"MJ/kg", SpecificEnergy, 1e6, 1, 0},
		{"J/(kg K)", SpecificHeat, 1, 1, 0},
		{"N", Force, 1, 1, 0},
		{"kN", Force, 1e3, 1, 0},
		{"kg m2", Inertia, 1, 1, 0},
		{"kg m", Unbalance, 1, 1, 0},
	}
}

// UnitNames lists the units of a quantity, the SI unit first.
func UnitNames(q Quantity) []string {
	var names []string
	for _, u := range units() {
		if u.quantity == q {
			names = append(names, u.name)
		}
	}
	return names
}

// unitOf finds the unit with this name that fits the quantity, and if there is none, one that does not.
func unitOf(name string, q Quantity) (u unit, known bool) {
	for _, c := range units() {
		if c.name == name {
			if c.quantity == q {
				return c, true
			}
			if !known {
				u, known = c, true
			}
		}
	}
	return u, known
}

// fault is what is wrong with a text, before it has a place.
type fault struct {
	code Code
	text string
	hint string
}

// ParseQuantity reads a number with or without a unit; without one it is SI. Text that is no such
// number gives an error that says why and what to write instead.
func ParseQuantity(text string, q Quantity) (float64, error) {
	v, f := parseQuantity(text, q)
	if f != nil {
		return 0, f
	}
	return v, nil
}

// Error makes a fault an error.
func (f *fault) Error() string {
	if f.hint == "" {
		return f.text
	}
	return f.text + "; " + f.hint
}

func parseQuantity(text string, q Quantity) (float64, *fault) {
	number, rest, f := splitNumber(text)
	if f != nil {
		return 0, f
	}
	if rest == "" {
		return number, nil
	}
	u, known := unitOf(rest, q)
	switch {
	case !known:
		return 0, unknownUnit(rest, q)
	case u.quantity != q && q == TemperatureDifference:
		return 0, &fault{UnitWrong, fmt.Sprintf("%q is the unit of a temperature reading, a temperature difference is wanted", rest), "write it in K"}
	case u.quantity != q:
		return 0, &fault{UnitWrong, fmt.Sprintf("%q is a unit of %s, %s is wanted", rest, u.quantity, article(q.String())), wanted(q)}
	}
	v := u.si(number)
	if math.IsInf(v, 0) {
		return 0, &fault{NumberFormat, fmt.Sprintf("%q is too large a number", clip(text)), ""}
	}
	return v, nil
}

// parseAny reads a number with any unit; bare says that it had none.
func parseAny(text string) (v float64, u unit, bare bool, f *fault) {
	number, rest, f := splitNumber(text)
	if f != nil {
		return 0, unit{}, false, f
	}
	if rest == "" {
		return number, unit{}, true, nil
	}
	u, known := unitOf(rest, Number)
	if !known {
		return 0, unit{}, false, unknownUnit(rest, quantities)
	}
	return u.si(number), u, false, nil
}

func wanted(q Quantity) string {
	return "write it in " + orList(UnitNames(q))
}

// unknownUnit is the fault of a unit that is in no table; q may be quantities for "any".
func unknownUnit(name string, q Quantity) *fault {
	f := &fault{code: UnitUnknown, text: fmt.Sprintf("unknown unit %q", clip(name))}
	var names []string
	for _, u := range units() {
		if q == quantities || u.quantity == q {
			names = append(names, u.name)
		}
	}
	if other := otherSpelling(name); other != "" {
		if u, _ := unitOf(other, q); q == quantities || u.quantity == q {
			f.hint = didYouMean(other)
			return f
		}
	}
	if near := nearest(name, names); near != "" {
		f.hint = didYouMean(near)
	} else if q != quantities {
		f.hint = wanted(q)
	}
	return f
}

// otherSpelling gives our spelling of common spellings of units.
func otherSpelling(name string) string {
	switch name {
	case "C", "°C", "celsius", "Celsius", "deg C", "grd":
		return "degC"
	case "ccm", "cc", "ml", "cm^3", "cm³":
		return "cm3"
	case "1/min", "min-1", "rev/min", "U/min", "RPM":
		return "rpm"
	case "1/s", "s-1", "rps":
		return "Hz"
	case "°", "degrees", "degree":
		return "deg"
	case "L", "litre", "liter", "dm3":
		return "l"
	case "µm", "μm", "micron":
		return "um"
	case "Nm", "N*m":
		return "N m"
	case "W/m2K", "W/m2/K", "W/(m2K)", "W/m^2K":
		return "W/(m2 K)"
	case "percent", "pct":
		return "%"
	case "year", "years", "yr", "y":
		return "a"
	case "hours", "hour", "hr":
		return "h"
	}
	return ""
}

// splitNumber reads the number at the front of the text and what follows it.
func splitNumber(text string) (number float64, rest string, f *fault) {
	s := strings.TrimSpace(text)
	i := 0
	if i < len(s) && (s[i] == '+' || s[i] == '-') {
		i++
	}
	first := i
	whole := digits(s[i:])
	i += whole
	fraction := 0
	if i < len(s) && s[i] == '.' {
		fraction = digits(s[i+1:])
		i += 1 + fraction
	}
	if whole+fraction == 0 {
		return 0, "", notNumber(s)
	}
	if whole > 1 && s[first] == '0' {
		return 0, "", &fault{NumberFormat, fmt.Sprintf("%q begins with a 0 that does not count", clip(s)),
			fmt.Sprintf("write %s", clip(s[:first]+trimZeros(s[first:])))}
	}
	if i < len(s) && (s[i] == 'e' || s[i] == 'E') {
		j := i + 1
		if j < len(s) && (s[j] == '+' || s[j] == '-') {
			j++
		}
		if n := digits(s[j:]); n > 0 {
			i = j + n
		}
	}
	rest = strings.Join(strings.Fields(s[i:]), " ")
	if f := badSeparator(s, rest, i); f != nil {
		return 0, "", f
	}
	number, err := strconv.ParseFloat(s[:i], 64)
	if err != nil {
		return 0, "", &fault{NumberFormat, fmt.Sprintf("%q is too large a number", clip(s)), ""}
	}
	return number, rest, nil
}

// badSeparator finds a comma, an underscore or a space inside a number that ends at i so far.
func badSeparator(s, rest string, i int) *fault {
	if rest == "" || rest == "-" {
		return nil
	}
	next := rest[0]
	switch {
	case next == ',' && len(rest) > 1 && digits(rest[1:]) > 0:
		return &fault{NumberFormat, fmt.Sprintf("%q has a comma in its number", clip(s)),
			fmt.Sprintf("write the decimal point as a point: %s", clip(s[:i]+"."+rest[1:]))}
	case next == '_' || next == '\'':
		return &fault{NumberFormat, fmt.Sprintf("%q has a separator in its number", clip(s)),
			fmt.Sprintf("write %s", clip(s[:i]+strings.NewReplacer("_", "", "'", "").Replace(rest)))}
	case next >= '0' && next <= '9' && otherSpelling(rest) == "":
		return &fault{NumberFormat, fmt.Sprintf("%q has a space in its number", clip(s)),
			fmt.Sprintf("write %s", clip(s[:i]+rest))}
	case next == '.' || next == '+' || next == '-':
		return notNumber(s)
	}
	return nil
}

func notNumber(s string) *fault {
	return &fault{NumberExpected, fmt.Sprintf("%q is not a number", clip(s)), "write a number, with a unit where it has one"}
}

func digits(s string) int {
	n := 0
	for n < len(s) && s[n] >= '0' && s[n] <= '9' {
		n++
	}
	return n
}

func trimZeros(s string) string {
	for len(s) > 1 && s[0] == '0' && s[1] >= '0' && s[1] <= '9' {
		s = s[1:]
	}
	return s
}

// clip shortens text taken from a file for a message.
func clip(s string) string {
	const most = 60
	r := []rune(s)
	if len(r) <= most {
		return s
	}
	return string(r[:most]) + "..."
}
