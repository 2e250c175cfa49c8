package report

import (
	"strings"
	"testing"
)

func TestLook(t *testing.T) {
	tab := Table{Title: "Front", Head: [][]string{{"design", "power", "efficiency"}, {"", "kW", "%"}}, Rows: [][]string{{"d12", "1.2", "33.4"}, {"d1213", "12.2", "3.4"}}}
	for _, s := range []Style{{}, {Ruled: true}, {Width: 14}} {
		var b strings.Builder
		if err := tab.Write(&b, s); err != nil {
			t.Fatal(err)
		}
		t.Logf("\n%s", b.String())
	}
}
