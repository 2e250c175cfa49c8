package studies

import (
	"context"
	"fmt"
	"testing"

	"hotfront/optimize"
)

// BenchmarkSearch searches the sawmill study without an archive. The designs of a run are the same whatever the workers, so
// the rates compare.
func BenchmarkSearch(b *testing.B) {
	const designs = 1000
	data, err := examples.ReadFile("examples/sawmill-heat-and-power.yaml")
	if err != nil {
		b.Fatal(err)
	}
	p := mustProblem(b, data)
	for _, workers := range []int{1, 2} {
		b.Run(fmt.Sprintf("workers=%d", workers), func(b *testing.B) {
			for b.Loop() {
				set := optimize.Settings{Evaluations: designs, Seed: 1, Workers: workers}
				if _, err := optimize.Run(context.Background(), p, set, nil, nil); err != nil {
					b.Fatal(err)
				}
			}
			b.ReportMetric(designs*float64(b.N)/b.Elapsed().Seconds(), "designs/s")
		})
	}
}
