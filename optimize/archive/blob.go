package archive

import (
	"encoding/binary"
	"hash/crc32"
	"math"
	"slices"

	"hotfront/optimize"
)

// Flags of a design in the data of a batch.
const (
	flagFailed = 1 << iota // it has a cause
	flagZero               // aims and limits are all +0 and not stored
	flagExtra              // its further results are stored

	flagsKnown = flagFailed | flagZero | flagExtra
)

// shape is how many numbers a design has.
type shape struct{ x, f, g, extra int }

func (m *Meta) shape() shape { return shape{len(m.Variables), m.Aims, m.Limits, len(m.Extras)} }

// fits says whether a point has this shape, with or without further results.
func (s shape) fits(p *optimize.Point) bool {
	return len(p.X) == s.x && len(p.F) == s.f && len(p.G) == s.g && (p.Extra == nil || len(p.Extra) == s.extra)
}

func appendFloats(dst []byte, numbers []float64) []byte {
	for _, v := range numbers {
		dst = binary.LittleEndian.AppendUint64(dst, math.Float64bits(v))
	}
	return dst
}

func allZero(numbers []float64) bool {
	for _, v := range numbers {
		if math.Float64bits(v) != 0 {
			return false
		}
	}
	return true
}

// appendBatch appends the data of a batch as the package documentation has it.
func appendBatch(dst []byte, points []optimize.Point) []byte {
	begin := len(dst)
	failed := false
	for i := range points {
		p := &points[i]
		var flag byte
		if p.Cause != "" {
			flag |= flagFailed
			failed = true
		}
		if allZero(p.F) && allZero(p.G) {
			flag |= flagZero
		}
		if len(p.Extra) > 0 {
			flag |= flagExtra
		}
		dst = append(dst, flag)
	}
	flags := dst[begin:len(dst):len(dst)] // stays what it is where appending moves dst
	for i := range points {
		dst = appendFloats(dst, points[i].X)
	}
	for i := range points {
		if flags[i]&flagZero == 0 {
			dst = appendFloats(appendFloats(dst, points[i].F), points[i].G)
		}
	}
	if !failed {
		return dst
	}
	var causes []string
	for i := range points {
		if c := points[i].Cause; c != "" && !slices.Contains(causes, c) {
			causes = append(causes, c)
		}
	}
	dst = binary.AppendUvarint(dst, uint64(len(causes)))
	for _, c := range causes {
		dst = append(binary.AppendUvarint(dst, uint64(len(c))), c...)
	}
	for i := range points {
		if c := points[i].Cause; c != "" {
			dst = binary.AppendUvarint(dst, uint64(slices.Index(causes, c)))
		}
	}
	return dst
}

// appendResults appends the further results of the points that have them.
func appendResults(dst []byte, points []optimize.Point) []byte {
	for i := range points {
		dst = appendFloats(dst, points[i].Extra)
	}
	return dst
}

// batch reads the data of a batch design by design. Only what was written has the right sum, so what cannot
// be read is a mistake of the writer or of somebody else; it is an error all the same and never a panic.
type batch struct {
	shape  shape
	first  int
	flags  []byte
	x, fg  []byte
	causes []string
	which  []byte // the failed designs' causes

	stored  int    // designs with further results
	results []byte // of these
}

// parse takes the data of a batch of count designs apart and reports whether it could.
func (b *batch) parse(first, count int, data []byte, s shape) bool {
	*b = batch{shape: s, first: first}
	if count < 1 || count > len(data) {
		return false
	}
	b.flags, data = data[:count], data[count:]
	full, failed := 0, 0
	for _, flag := range b.flags {
		if flag&^flagsKnown != 0 {
			return false
		}
		if flag&flagZero == 0 {
			full++
		}
		if flag&flagFailed != 0 {
			failed++
		}
		if flag&flagExtra != 0 {
			b.stored++
		}
	}
	nx, nf := 8*s.x*count, 8*(s.f+s.g)*full
	if len(data) < nx+nf {
		return false
	}
	b.x, b.fg, data = data[:nx], data[nx:nx+nf], data[nx+nf:]
	if failed == 0 {
		return len(data) == 0
	}
	n, data, ok := uvarint(data)
	if !ok || n > failed {
		return false
	}
	for range n {
		var length int
		if length, data, ok = uvarint(data); !ok || length > len(data) {
			return false
		}
		b.causes = append(b.causes, string(data[:length]))
		data = data[length:]
	}
	b.which = data
	return true
}

// next fills p with the next design. It reuses the point's slices where there is room, but for Extra, which is
// nil where no further results are stored.
func (b *batch) next(p *optimize.Point) bool {
	flag := b.flags[0]
	b.flags = b.flags[1:]
	p.X, b.x = readFloats(p.X, b.x, b.shape.x)
	if flag&flagZero == 0 {
		p.F, b.fg = readFloats(p.F, b.fg, b.shape.f)
		p.G, b.fg = readFloats(p.G, b.fg, b.shape.g)
	} else {
		p.F, p.G = zeros(p.F, b.shape.f), zeros(p.G, b.shape.g)
	}
	p.Cause = ""
	if flag&flagFailed != 0 {
		k, rest, ok := uvarint(b.which)
		if !ok || k >= len(b.causes) {
			return false
		}
		p.Cause, b.which = b.causes[k], rest
	}
	if flag&flagExtra == 0 {
		p.Extra = nil
		return true
	}
	p.Extra, b.results = readFloats(nil, b.results, b.shape.extra)
	return true
}

// uvarint reads a number that fits an int.
func uvarint(data []byte) (int, []byte, bool) {
	v, n := binary.Uvarint(data)
	if n <= 0 || v > math.MaxInt32 {
		return 0, data, false
	}
	return int(v), data[n:], true
}

// zeros is dst with n zeros.
func zeros(dst []float64, n int) []float64 {
	if cap(dst) < n || dst == nil {
		return make([]float64, n)
	}
	dst = dst[:n]
	clear(dst)
	return dst
}

// readFloats fills dst[:n], growing it if need be, from the front of data and gives the rest of them.
func readFloats(dst []float64, data []byte, n int) ([]float64, []byte) {
	if cap(dst) < n || dst == nil {
		dst = make([]float64, n)
	}
	dst = dst[:n]
	for i := range dst {
		dst[i] = math.Float64frombits(binary.LittleEndian.Uint64(data[8*i:]))
	}
	return dst, data[8*n:]
}

// checksum is the CRC-32C of a row: its numbers and its data.
func checksum(data []byte, numbers ...int) int64 {
	table := crc32.MakeTable(crc32.Castagnoli) // made once by the library
	var head []byte
	for _, n := range numbers {
		head = binary.LittleEndian.AppendUint64(head, uint64(n))
	}
	return int64(crc32.Update(crc32.Update(0, table, head), table, data))
}
