package archive

import (
	"encoding/binary"
	"hash/crc32"
	"math"
)

// appendBlob appends numbers as little-endian float64. Numbers that are all +0, as those of a failed
// design, make an empty blob.
func appendBlob(dst []byte, numbers []float64) []byte {
	zero := true
	for _, v := range numbers {
		zero = zero && math.Float64bits(v) == 0
	}
	if zero {
		return dst
	}
	for _, v := range numbers {
		dst = binary.LittleEndian.AppendUint64(dst, math.Float64bits(v))
	}
	return dst
}

// readBlob fills dst[:n], growing it if need be, and reports whether the blob holds n numbers.
func readBlob(dst []float64, blob []byte, n int) ([]float64, bool) {
	if cap(dst) < n {
		dst = make([]float64, n)
	}
	dst = dst[:n]
	if len(blob) == 0 {
		clear(dst)
		return dst, true
	}
	if len(blob) != 8*n {
		return dst, false
	}
	for i := range dst {
		dst[i] = math.Float64frombits(binary.LittleEndian.Uint64(blob[8*i:]))
	}
	return dst, true
}

// checksum is the CRC-32C of a row: its number and all its parts with their lengths.
func checksum(seq int, parts ...[]byte) int64 {
	table := crc32.MakeTable(crc32.Castagnoli) // made once by the library
	var head [8]byte
	binary.LittleEndian.PutUint64(head[:], uint64(seq))
	sum := crc32.Update(0, table, head[:])
	for _, p := range parts {
		binary.LittleEndian.PutUint64(head[:], uint64(len(p)))
		sum = crc32.Update(sum, table, head[:])
		sum = crc32.Update(sum, table, p)
	}
	return int64(sum)
}
