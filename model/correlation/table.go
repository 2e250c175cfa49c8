package correlation

import "math"

// Range of a Table, and its resolution.
const (
	tableLow     = 1.0 / (1 << 20) // smallest argument with full accuracy [-]
	tableHigh    = 1 << 27         // largest argument [-]
	tableBits    = 3               // 2^3 pieces an octave
	tableOctaves = 47
	tablePieces  = tableOctaves << tableBits
	tableBase    = (1023 - 20) << tableBits // exponent and leading fraction bits of tableLow
)

// Table is a function of one number in quadratic pieces, eight to an octave, found from the bits of the
// argument: a lookup costs no logarithm and no search. It holds for 2^-20 (1e-6) <= x < 2^27 (1.3e8).
// The pieces meet, so the function is continuous. For a power of x between -1 and 1 the relative error
// is below 1e-5.
//
// Below the range the value goes along the straight line from f(0) at 0 to the value at 2^-20, or keeps
// that value where f(0) is not finite. Above the range, for negative x and for NaN it is NaN, so that an
// argument from a solution gone wrong shows.
type Table struct {
	c      [tablePieces][3]float64
	origin float64 // value at 0 [-]
	slope  float64 // of the line below the range [-]
}

// Build fills the table from f, each piece through its two ends and its middle.
func (t *Table) Build(f func(x float64) float64) {
	const n = 1 << tableBits
	for i := range t.c {
		scale := math.Ldexp(1, i>>tableBits-20)
		x0 := scale * (1 + float64(i&(n-1))/n)
		h := scale / n
		f0, f1, f2 := f(x0), f(x0+0.5*h), f(x0+h)
		// In w = 0..1 across the piece; then in u = 1 + w, which the lookup has at hand.
		b := 4*f1 - 3*f0 - f2
		a := 2*f0 - 4*f1 + 2*f2
		t.c[i] = [3]float64{f0 - b + a, b - 2*a, a}
	}
	low := f(tableLow)
	t.origin, t.slope = f(0), 0
	if math.IsNaN(t.origin) || math.IsInf(t.origin, 0) {
		t.origin = low
	}
	t.slope = (low - t.origin) / tableLow
}

// At gives the value at x.
func (t *Table) At(x float64) float64 {
	bits := math.Float64bits(x)
	i := int(bits>>(52-tableBits)) - tableBase
	if uint(i) >= tablePieces {
		return t.outside(x)
	}
	u := math.Float64frombits(bits<<tableBits&(1<<52-1) | 1023<<52) // 1..2 across the piece
	c := &t.c[i]
	return c[0] + u*(c[1]+u*c[2])
}

func (t *Table) outside(x float64) float64 {
	if x >= 0 && x < tableLow {
		return t.origin + t.slope*x
	}
	return math.NaN()
}
