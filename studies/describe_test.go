package studies

import (
	"slices"
	"testing"

	"hotfront/model"
)

func TestDescriptions(t *testing.T) {
	s := mustLoad(t, refuge(t))
	var got []string
	for i := range s.Free {
		got = append(got, s.FreeText(i))
	}
	for i := range s.Limits {
		got = append(got, s.Limits[i].BoundText())
	}
	for _, a := range s.Aims {
		got = append(got, a.Text())
	}
	tube, _ := FieldNamed(s.Fields(), "heater.tube_bore")
	got = append(got, tube.RangeText(tube.Usual), tube.ValueText(4e-3))
	want := []string{"20 to 80", "150 to 400 mm", "3 mm, 4 mm, 5 mm, 6 mm", "0.6 to 0.85", "70 to 120 deg", "30 to 110 bar", "helium, hydrogen",
		"at most 750 degC", "at most 1", "at least 2 kW", "at most 20 m",
		"most brake_power", "most brake_efficiency", "1.5 to 10 mm", "4 mm"}
	if !slices.Equal(got, want) {
		t.Errorf("got\n%q\nwant\n%q", got, want)
	}
}

func TestLimitResults(t *testing.T) {
	s := mustLoad(t, refuge(t))
	perf := model.Performance{HeaterMetalTemperature: 1000, HeaterStressUtilisation: 1.25, BrakePower: 2500}
	got := s.LimitResults(&s.Engine, &perf)
	want := []LimitResult{
		{"heater.metal_temperature", 1000, 1023.15, s.Limits[0].Bound - 1000, true},
		{"heater.stress_utilisation", 1.25, 1, -0.25, false},
		{"brake_power", 2500, 2000, 500, true},
		{"tubing", 36 * s.Engine.Heater.TubeLength, 20, 20 - 36*s.Engine.Heater.TubeLength, true},
	}
	if !slices.Equal(got, want) {
		t.Errorf("got\n%+v\nwant\n%+v", got, want)
	}
}
