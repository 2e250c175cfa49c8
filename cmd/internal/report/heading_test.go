package report

import (
	"reflect"
	"testing"
)

func TestHeadings(t *testing.T) {
	got := headings([]string{"design", "brake_power", "heater.metal_temperature", "regenerator.wire_diameter", "mach"},
		[]string{"", "kW", "degC", "mm", ""})
	want := [][]string{
		{"", "", "heater", "regenerator", ""},
		{"", "", "metal", "wire", ""},
		{"design", "brake_power", "temperature", "diameter", "mach"},
		{"", "kW", "degC", "mm", ""},
	}
	if !reflect.DeepEqual(got, want) {
		t.Errorf("headings %q, want %q", got, want)
	}
	if got := headings([]string{"a", "b"}, []string{"", ""}); !reflect.DeepEqual(got, [][]string{{"a", "b"}}) {
		t.Errorf("without units: %q", got)
	}
}

func TestNamesOfDesigns(t *testing.T) {
	for _, seq := range []int{0, 7, 123, 999999, 12345678} {
		if got, ok := SeqOf(ID(seq)); !ok || got != seq {
			t.Errorf("%s is %d, %v", ID(seq), got, ok)
		}
	}
	if ID(123) != "d000123" {
		t.Errorf("name %s", ID(123))
	}
	for _, bad := range []string{"", "d", "123", "d-1", "d1.5", "x12", "d99999999999999999999"} {
		if _, ok := SeqOf(bad); ok {
			t.Errorf("%q passed for a design", bad)
		}
	}
}
