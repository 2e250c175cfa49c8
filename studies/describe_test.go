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

func TestFormatsOfTables(t *testing.T) {
	s := mustLoad(t, refuge(t))
	for path, want := range map[string]string{"charge_pressure": "60", "drive.phase_angle": "90", "heater.tube_count": "36",
		"regenerator.wire_diameter": "0.06", "gas": "helium", "heat.tube_wall": "700"} {
		f, ok := FieldNamed(s.Fields(), path)
		if !ok || f.Format(f.Get(&s.Engine)) != want {
			t.Errorf("%s: got %s, want %s", path, f.Format(f.Get(&s.Engine)), want)
		}
	}
	power, _ := OutputNamed(s.Outputs(), "brake_power")
	if got := power.Format(4263.7); got != "4.26" {
		t.Errorf("brake power %s", got)
	}
	if got := s.Limits[0].Format(1000.2); got != "727" {
		t.Errorf("limit in degC %s", got)
	}
	if got := s.Limits[3].Format(10.8); got != "10.8" {
		t.Errorf("limit in m %s", got)
	}
}
