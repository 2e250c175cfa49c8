package studies

import (
	"math"
	"strconv"
	"strings"
)

// FromSI gives the number of an SI value in a unit. The unit must be one of the quantity's.
func FromSI(si float64, q Quantity, unitName string) float64 {
	u, ok := unitOf(unitName, q)
	if !ok || u.quantity != q {
		panic("studies: unit " + unitName + " is not one of " + q.String())
	}
	return u.of(si)
}

// FormatNumber writes a number with as many significant digits as asked, whole numbers whole and
// without an exponent between 1e-4 and 1e7.
func FormatNumber(v float64, significant int) string {
	a := math.Abs(v)
	switch {
	case a == 0:
		return "0"
	case math.IsNaN(v) || math.IsInf(v, 0) || a < 1e-4 || a >= 1e7:
		return strconv.FormatFloat(v, 'g', significant, 64)
	}
	decimals := max(0, significant-1-int(math.Floor(math.Log10(a))))
	s := strconv.FormatFloat(v, 'f', decimals, 64)
	if f, _ := strconv.ParseFloat(s, 64); f == 0 {
		return "0"
	}
	return s
}

// trimmed takes the zeros off the end of a decimal fraction.
func trimmed(s string) string {
	if !strings.Contains(s, ".") || strings.ContainsAny(s, "eE") {
		return s
	}
	return strings.TrimSuffix(strings.TrimRight(s, "0"), ".")
}

// FormatSI writes an SI value in a unit, without the unit: temperatures in whole degrees, other
// values to the digits asked. Three digits are more than the model is worth on a power; inputs
// are shown with four, as the shop needs them.
func FormatSI(si float64, q Quantity, unitName string, significant int) string {
	v := FromSI(si, q, unitName)
	if q == Temperature {
		return strconv.FormatFloat(math.Round(v)+0, 'f', 0, 64)
	}
	return FormatNumber(v, significant)
}

// exactText writes an SI value in a unit so that reading the text gives the very same value; where
// no number in that unit does, it writes the bare SI number.
func exactText(si float64, q Quantity, unitName string) string {
	u, ok := unitOf(unitName, q)
	if ok && u.quantity == q {
		v := u.of(si)
		for _, precision := range []int{6, 9, 12, 15, 17} {
			s := strconv.FormatFloat(v, 'g', precision, 64)
			if back, err := strconv.ParseFloat(s, 64); err == nil && u.si(back) == si {
				return withUnit(back, unitName)
			}
		}
	}
	return plainNumber(si)
}

func withUnit(v float64, unitName string) string {
	if unitName == "-" {
		return plainNumber(v)
	}
	return plainNumber(v) + " " + unitName
}

func plainNumber(v float64) string {
	if a := math.Abs(v); a == 0 || (a >= 1e-4 && a < 1e7) {
		return strconv.FormatFloat(v, 'f', -1, 64)
	}
	return strconv.FormatFloat(v, 'g', -1, 64)
}
