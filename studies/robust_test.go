package studies

import (
	"bytes"
	"fmt"
	"math/rand/v2"
	"strings"
	"testing"
	"time"

	"hotfront/model"
)

// TestHostileFiles: a megabyte made to be slow is read, or refused, in reasonable time.
func TestHostileFiles(t *testing.T) {
	const soon = 10 * time.Second // some 0.5 s on a free core; the rest is for busy machines and -race
	numbered := func(format string, n int) []byte {
		var b bytes.Buffer
		for i := range n {
			fmt.Fprintf(&b, format, i)
		}
		return b.Bytes()
	}
	text := refuge(t)
	for name, data := range map[string][]byte{
		"unknown keys":        numbered("heater_tube_conut%d: 1\n", 40000),
		"one key many times":  bytes.Repeat([]byte("study: a\n"), 100000),
		"blocks many times":   append([]byte("engine:\n"), bytes.Repeat([]byte("  heater: {tube_coutn: 1, tube_cuont: 2}\n"), 20000)...),
		"values many times":   append([]byte("engine:\n"), bytes.Repeat([]byte("  heater.tube_count: 1\n"), 40000)...),
		"a long list":         bytes.Replace(text, []byte("[helium, hydrogen]"), []byte("["+strings.Repeat("helim, ", 100000)+"]"), 1),
		"a long number":       bytes.Replace(text, []byte("60 bar"), bytes.Repeat([]byte("9"), 900000), 1),
		"a long key":          []byte("study: a\n" + strings.Repeat("k", 900) + ": 1\n" + strings.Repeat("l", 900000) + ": 1\n"),
		"a long unit":         bytes.Replace(text, []byte("60 bar"), []byte("60 "+strings.Repeat("b", 900000)), 1),
		"many limits":         append(bytes.Replace(text, []byte("limits:"), []byte("limit:"), 1), append([]byte("limits:\n"), numbered("  a%d: {expr: \"1+1\", max: 3}\n", 900)...)...),
		"limits of no result": append([]byte("limits:\n"), numbered("  a%d: {max: 3}\n", 900)...),
	} {
		begin := time.Now()
		Load(name, data)
		if took := time.Since(begin); took > soon {
			t.Errorf("%s: %v", name, took)
		} else {
			t.Logf("%s: %v", name, took.Round(time.Millisecond))
		}
	}
}

// TestEncodeRandomDesigns sets every input to random values and reads back what is written: the
// same design, to the last bit.
func TestEncodeRandomDesigns(t *testing.T) {
	rng := rand.New(rand.NewPCG(1, 2))
	beta := edit(t, "layout: gamma", "layout: beta", "piston: {bore: 80 mm,", "piston: {", "unheated_length: 50 mm", "heated_length: 250 mm")
	alpha := edit(t, "layout: gamma", "layout: alpha",
		"displacer: {bore: 90 mm, stroke: 50 mm, rod: 14 mm,", "expansion_piston: {bore: 90 mm, stroke: 50 mm,",
		"piston: {bore: 80 mm, stroke: 50 mm}", "compression_piston: {bore: 80 mm, stroke: 50 mm}")
	for _, data := range [][]byte{refuge(t), beta, alpha} {
		s := mustLoad(t, data)
		s.Free, s.Limits, s.Aims = nil, nil, nil
		for range 50 {
			e := s.Engine
			for _, v := range s.Design(&e) {
				if f := v.Field; f.Kind == Real && f.Group != "heated" && f.Group != "cooled" {
					f.Set(&e, f.Hard.Low+rng.Float64()*(f.Hard.High-f.Hard.Low))
				}
			}
			e.Heater.TubeLength, e.Cooler.TubeLength = 0.2+rng.Float64(), 0.2+rng.Float64()
			e.Heater.HeatedLength, e.Cooler.CooledLength = e.Heater.TubeLength-0.05, e.Cooler.TubeLength
			if e.Layout == model.Beta {
				e.Piston.Bore = e.Displacer.Bore
			}
			written := *s
			written.Engine = e
			text := written.Encode()
			again := mustLoad(t, text)
			if again.Fingerprint("") != written.Fingerprint("") {
				t.Fatalf("another design after\n%s", text)
			}
		}
	}
}
