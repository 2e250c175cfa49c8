package sample

import (
	"encoding/csv"
	"math"
	"math/bits"
	"math/rand/v2"
	"os"
	"strconv"
	"strings"
	"testing"
)

// TestDirectionsAgainstPublished holds the table in the code against the published rows in testdata.
func TestDirectionsAgainstPublished(t *testing.T) {
	file, err := os.Open("../../testdata/reference/joe_kuo_d6_64.csv")
	if err != nil {
		t.Fatal(err)
	}
	defer file.Close()
	r := csv.NewReader(file)
	r.Comment = '#'
	rows, err := r.ReadAll()
	if err != nil {
		t.Fatal(err)
	}
	seen := 0
	for _, row := range rows {
		d, err := strconv.Atoi(row[0])
		if err != nil {
			continue // heading
		}
		seen++
		got := directions()[d-2]
		if strconv.Itoa(got.degree) != row[1] || strconv.FormatUint(uint64(got.inner), 10) != row[2] {
			t.Errorf("dimension %d: degree %d, inner %d, want %s, %s", d, got.degree, got.inner, row[1], row[2])
		}
		m := strings.Fields(row[3])
		if len(m) != got.degree {
			t.Errorf("dimension %d: %d published integers", d, len(m))
		}
		for i, w := range m {
			if strconv.FormatUint(uint64(got.first[i]), 10) != w {
				t.Errorf("dimension %d: m[%d] = %d, want %s", d, i, got.first[i], w)
			}
		}
	}
	if seen != MaxDimensions-1 {
		t.Errorf("%d published rows", seen)
	}
}

// TestSobolFirstPoints: the first points in Gray code order, as in P. Bratley, B. L. Fox, ACM Transactions on
// Mathematical Software 14 (1988) 88-100, table for two dimensions; the third follows by hand from m = 1, 3, 1.
func TestSobolFirstPoints(t *testing.T) {
	want := [][3]float64{
		{0, 0, 0}, {0.5, 0.5, 0.5}, {0.75, 0.25, 0.25}, {0.25, 0.75, 0.75},
		{0.375, 0.375, 0.625}, {0.875, 0.875, 0.125}, {0.625, 0.125, 0.875}, {0.125, 0.625, 0.375},
	}
	s := NewSobol(3)
	var x [3]float64
	for i, w := range want {
		if !s.Next(x[:]) || x != w {
			t.Errorf("point %d is %v, want %v", i, x, w)
		}
	}
}

// TestSobolIsANet: of the first 2^k points each 2^-k part of every axis holds one, scrambled or not.
func TestSobolIsANet(t *testing.T) {
	for name, s := range map[string]*Sobol{
		"plain":     NewSobol(MaxDimensions),
		"scrambled": NewScrambledSobol(rand.New(rand.NewPCG(5, 1)), MaxDimensions),
	} {
		const n = 256
		var hit [MaxDimensions][n]int
		x := make([]float64, MaxDimensions)
		for range n {
			s.Next(x)
			for k, v := range x {
				if v < 0 || v >= 1 {
					t.Fatalf("%s: %v is outside [0, 1)", name, v)
				}
				hit[k][int(v*n)]++
			}
		}
		for k := range hit {
			for cell, count := range hit[k] {
				if count != 1 {
					t.Fatalf("%s: axis %d, part %d holds %d points", name, k, cell, count)
				}
			}
		}
	}
}

// TestSobolPlanes: for the first two axes even every elementary box of area 2^-8 holds one point of the first
// 256 (a (0, m, 2)-net, Sobol' 1967), and scrambling keeps that.
func TestSobolPlanes(t *testing.T) {
	for seed := range uint64(3) {
		s := NewScrambledSobol(rand.New(rand.NewPCG(seed, 2)), 2)
		points := make([][2]float64, 256)
		for i := range points {
			s.Next(points[i][:])
		}
		for a := range 9 {
			hit := make([]int, 256)
			for _, p := range points {
				i, j := int(p[0]*float64(int(1)<<a)), int(p[1]*float64(int(1)<<(8-a)))
				hit[i<<(8-a)|j]++
			}
			for box, count := range hit {
				if count != 1 {
					t.Fatalf("seed %d: box %d of shape %d holds %d points", seed, box, a, count)
				}
			}
		}
	}
}

// TestSobolIntegrates: the mean of prod (1 + (x_i - 1/2)) is 1; for N random points its error is about
// sqrt((13/12)^8 - 1) / sqrt(N) = 0.015 at N = 4096. A scrambled sequence must be ten times better.
func TestSobolIntegrates(t *testing.T) {
	const n, d = 4096, 8
	sum := 0.0
	for seed := range uint64(8) {
		s := NewScrambledSobol(rand.New(rand.NewPCG(seed, 3)), d)
		x := make([]float64, d)
		mean := 0.0
		for range n {
			s.Next(x)
			p := 1.0
			for _, v := range x {
				p *= 0.5 + v
			}
			mean += p / n
		}
		sum += (mean - 1) * (mean - 1)
	}
	if rms := math.Sqrt(sum / 8); rms > 0.0015 {
		t.Errorf("root mean square error %.2g, want below 0.0015", rms)
	}
}

func TestSobolEnds(t *testing.T) {
	s := NewSobol(1)
	s.count = 1<<32 - 2
	x := make([]float64, 1)
	if !s.Next(x) || s.Next(x) {
		t.Error("the sequence does not end after its last point")
	}
	if bits.OnesCount32(s.count) != 32 {
		t.Error("the count moved on")
	}
}

func TestLatin(t *testing.T) {
	const n, d = 37, 5
	points := Latin(rand.New(rand.NewPCG(1, 2)), n, d)
	for k := range d {
		var hit [n]bool
		for _, p := range points {
			cell := int(p[k] * n)
			if hit[cell] {
				t.Fatalf("axis %d: part %d holds two points", k, cell)
			}
			hit[cell] = true
		}
	}
	again := Latin(rand.New(rand.NewPCG(1, 2)), n, d)
	for i := range points {
		for k := range points[i] {
			if points[i][k] != again[i][k] {
				t.Fatal("the same source gave other points")
			}
		}
	}
	if len(Latin(rand.New(rand.NewPCG(1, 2)), 0, 3)) != 0 {
		t.Error("points out of none")
	}
}
