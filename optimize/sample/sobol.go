package sample

import (
	"fmt"
	"math/bits"
	"math/rand/v2"
)

// Sobol generates a Sobol' sequence: points that fill the unit cube far more evenly than random ones. Of
// its first 2^k points each 2^-k interval of every axis holds one. It gives 2^32 points before it ends.
//
// Point i + 1 follows from point i by one exclusive or per axis, with the direction number of the lowest
// zero bit of i (the Gray code order).
//
// Sources: I. M. Sobol', On the distribution of points in a cube and the approximate evaluation of
// integrals, USSR Computational Mathematics and Mathematical Physics 7 (1967) 86-112; the order is I. A.
// Antonov, V. M. Saleev, An economic method of computing LP-tau sequences, same journal 19 (1979) 252-256;
// the direction numbers are of Joe and Kuo (see directions). The random scrambling is J. Matousek, On the
// L2-discrepancy for anchored boxes, Journal of Complexity 14 (1998) 527-556: a random lower triangular
// binary matrix per axis on the digits, then a random digital shift. It keeps the evenness and makes every
// point uniform in the cube.
type Sobol struct {
	v     [][32]uint32 // direction numbers per axis, most significant bit first
	x     []uint32
	count uint32
	fine  float64 // place within the last binary interval: 0 plain, 1/2 scrambled
}

// NewSobol makes the plain sequence in d dimensions, 1 to MaxDimensions. Its first point is the origin.
func NewSobol(d int) *Sobol {
	if d < 1 || d > MaxDimensions {
		panic(fmt.Sprintf("sample: Sobol' sequence in %d dimensions, table reaches 1 to %d", d, MaxDimensions))
	}
	s := &Sobol{v: make([][32]uint32, d), x: make([]uint32, d)}
	for j := range 32 {
		s.v[0][j] = 1 << (31 - j)
	}
	table := directions()
	for k := 1; k < d; k++ {
		row, v := &table[k-1], &s.v[k]
		for j := range 32 {
			if j < row.degree {
				v[j] = row.first[j] << (31 - j)
				continue
			}
			v[j] = v[j-row.degree] ^ v[j-row.degree]>>row.degree
			for i := 1; i < row.degree; i++ {
				if row.inner>>(row.degree-1-i)&1 == 1 {
					v[j] ^= v[j-i]
				}
			}
		}
	}
	return s
}

// NewScrambledSobol makes a randomly scrambled sequence in d dimensions, 1 to MaxDimensions.
func NewScrambledSobol(rng *rand.Rand, d int) *Sobol {
	s := NewSobol(d)
	s.fine = 0.5
	for k := range d {
		var column [32]uint32 // what each digit becomes: itself and random later ones
		for j := range column {
			bit := uint32(1) << (31 - j)
			column[j] = bit | rng.Uint32()&(bit-1)
		}
		for j, v := range s.v[k] {
			w := uint32(0)
			for v != 0 {
				lead := bits.LeadingZeros32(v)
				w ^= column[lead]
				v &^= 1 << (31 - lead)
			}
			s.v[k][j] = w
		}
		s.x[k] = rng.Uint32()
	}
	return s
}

// Next writes the next point into dst, which has one place per dimension, in [0, 1), and reports whether
// there was one left.
func (s *Sobol) Next(dst []float64) bool {
	if s.count == 1<<32-1 {
		return false
	}
	for k, x := range s.x {
		dst[k] = (float64(x) + s.fine) / (1 << 32)
	}
	c := bits.TrailingZeros32(^s.count)
	for k := range s.x {
		s.x[k] ^= s.v[k][c]
	}
	s.count++
	return true
}
