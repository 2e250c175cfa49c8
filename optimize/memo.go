package optimize

import (
	"math"
	"math/bits"
)

// memo keeps what a session must know of every design, by sequence number: its place, its aims and by how much
// it exceeds the limits. A run may ask for millions, so these lie in chunks without pointers, and the table
// that finds a design again holds numbers alone: 8 (dims + aims + 1) bytes a design, and 5 to 11 for the table.
type memo struct {
	dims, aims int
	n          int
	x          [][]float64
	f          [][]float64
	violation  [][]float64
	table      []uint32 // sequence number + 1 of the designs by hash of X, 0 for none; open addressing
}

// memoChunk is the number of designs in a chunk.
const memoChunk = 1 << 10

func newMemo(dims, aims int) *memo {
	return &memo{dims: dims, aims: aims, table: make([]uint32, 256)}
}

// at is the design's place. It must not be changed.
func (m *memo) at(seq int) []float64 { return part(m.x, seq, m.dims) }

// aimsOf are the design's aims, all zero before they are known.
func (m *memo) aimsOf(seq int) []float64 { return part(m.f, seq, m.aims) }

// violationOf is the sum of what the design exceeds the limits by, +Inf if it failed.
func (m *memo) violationOf(seq int) float64 { return m.violation[seq/memoChunk][seq%memoChunk] }

func (m *memo) setViolation(seq int, v float64) { m.violation[seq/memoChunk][seq%memoChunk] = v }

func part(chunks [][]float64, seq, width int) []float64 {
	begin := seq % memoChunk * width
	return chunks[seq/memoChunk][begin : begin+width : begin+width]
}

// find is the sequence number of a design.
func (m *memo) find(x []float64) (int, bool) {
	seq, _ := m.look(x)
	return seq, seq >= 0
}

// look gives the sequence number of a design, -1 for none, and its place in the table or the free one for it.
func (m *memo) look(x []float64) (seq, place int) {
	mask := len(m.table) - 1
	for place = int(hash(x)) & mask; m.table[place] != 0; place = (place + 1) & mask {
		seq = int(m.table[place]) - 1
		if equal(m.at(seq), x) {
			return seq, place
		}
	}
	return -1, place
}

// equal compares places; -0 is 0.
func equal(a, b []float64) bool {
	for k, v := range a {
		if v != b[k] {
			return false
		}
	}
	return true
}

func hash(x []float64) uint64 {
	h := uint64(len(x))
	for _, v := range x {
		hi, lo := bits.Mul64(h^math.Float64bits(v+0), 0x9e3779b97f4a7c15) // -0 is 0
		h = hi ^ lo
		h ^= h >> 29
	}
	h *= 0xbf58476d1ce4e5b9
	return h ^ h>>32
}

// add gives the number of a design and whether it is new. It copies x.
func (m *memo) add(x []float64) (seq int, fresh bool) {
	seq, place := m.look(x)
	if seq >= 0 {
		return seq, false
	}
	if m.n%memoChunk == 0 && m.n/memoChunk == len(m.x) {
		m.x = append(m.x, make([]float64, memoChunk*m.dims))
		m.f = append(m.f, make([]float64, memoChunk*m.aims))
		m.violation = append(m.violation, make([]float64, memoChunk))
	}
	seq = m.n
	copy(m.at(seq), x)
	clear(m.aimsOf(seq))
	m.n++
	if 4*m.n > 3*len(m.table) {
		m.table = make([]uint32, 2*len(m.table))
		for known := range m.n {
			m.enter(known)
		}
		return seq, true
	}
	m.table[place] = uint32(seq) + 1
	return seq, true
}

func (m *memo) enter(seq int) {
	_, place := m.look(m.at(seq))
	m.table[place] = uint32(seq) + 1
}

// drop takes back the numbers from n on. A design entered last is in no other one's way, so that emptying its
// place is all.
func (m *memo) drop(n int) {
	for m.n > n {
		m.n--
		_, place := m.look(m.at(m.n))
		m.table[place] = 0
	}
}
