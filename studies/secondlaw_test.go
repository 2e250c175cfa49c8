package studies

import (
	"flag"
	"math"
	"math/rand/v2"
	"testing"

	"hotfront/model"
	"hotfront/optimize"
	"hotfront/optimize/sample"
)

// TestSecondLawOfShippedStudies takes random designs over the box of each shipped study. No part may make
// entropy below zero; all parts together must cost the work that the heat could have given and the shaft did
// not get (Gouy and Stodola), within 1 %; and no design may beat Carnot.
// `go test ./studies -run SecondLaw -entropy-designs 10000` takes more designs.
func TestSecondLawOfShippedStudies(t *testing.T) {
	examples, err := Examples()
	if err != nil {
		t.Fatal(err)
	}
	for _, ex := range examples {
		t.Run(ex.Name, func(t *testing.T) {
			s := mustLoad(t, ex.Data)
			p, err := NewProblem(s)
			if err != nil {
				t.Fatal(err)
			}
			vars := p.Variables()
			unit := sample.Latin(rand.New(rand.NewPCG(1, 0)), *entropyDesigns, len(vars))
			w := model.NewWorkspaceGrid(model.SecondLawGrid())
			var perf model.Performance
			var law model.SecondLaw
			least, worst, count := 0.0, 0.0, 0
			x := make([]float64, len(vars))
			for i := range unit {
				for k, v := range vars {
					x[k] = v.Low + unit[i][k]*(v.High-v.Low)
					if v.Kind != optimize.Real {
						x[k] = math.Round(x[k])
					}
				}
				e := s.EngineAt(x)
				model.Evaluate(&perf, &e, &s.Corrections, w)
				if perf.Cause != model.None {
					continue
				}
				count++
				model.SecondLawOf(&law, &perf, &e, w)
				for _, item := range law.Items() {
					least = min(least, item.Made)
					if item.Made < 0 {
						t.Errorf("design %d: %s makes %g W/K", i, item.Name, item.Made)
					}
				}
				gap := math.Abs(law.Sum*e.Coolant.Inlet/law.LostWork - 1)
				worst = max(worst, gap)
				if gap > 1e-2 {
					t.Errorf("design %d: entropy made costs %.1f W, lost work is %.1f W", i, law.Sum*e.Coolant.Inlet, law.LostWork)
				}
				if perf.BrakeEfficiency > perf.CarnotEfficiency {
					t.Errorf("design %d: efficiency %g above Carnot's %g", i, perf.BrakeEfficiency, perf.CarnotEfficiency)
				}
			}
			t.Logf("%d designs: least entry %.1e W/K, worst gap of sum and lost work %.1e", count, least, worst)
			if count < *entropyDesigns/2 {
				t.Errorf("only %d designs of %d have a result", count, *entropyDesigns)
			}
		})
	}
}

var entropyDesigns = flag.Int("entropy-designs", 200, "random designs a study in the test of the second law")
