package report

import (
	"strings"
	"testing"
)

func TestTable(t *testing.T) {
	table := Table{
		Title: "Front", Left: []int{3},
		Head: [][]string{{"design", "power", "η", "what"}, {"", "kW", "%"}},
		Rows: [][]string{{"d12", "1.2", "33.4", "slow"}, {"d1213", "12.2", "3.4", "fast µ"}},
	}
	for _, c := range []struct {
		name  string
		style Style
		want  string
	}{
		{"plain", Style{}, "Front\n" +
			"design  power     η  what\n" +
			"           kW     %\n" +
			"d12       1.2  33.4  slow\n" +
			"d1213    12.2   3.4  fast µ\n"},
		{"in parts", Style{Width: 15}, "Front\n" +
			"design  power\n" +
			"           kW\n" +
			"d12       1.2\n" +
			"d1213    12.2\n\n" +
			"design     η\n" +
			"           %\n" +
			"d12     33.4\n" +
			"d1213    3.4\n\n" +
			"design  what\n" +
			"d12     slow\n" +
			"d1213   fast µ\n"},
	} {
		var b strings.Builder
		if err := table.Write(&b, c.style); err != nil {
			t.Fatal(err)
		}
		if b.String() != c.want {
			t.Errorf("%s:\n%s\nwant:\n%s", c.name, b.String(), c.want)
		}
	}
	var b strings.Builder
	if err := table.Write(&b, Style{Ruled: true}); err != nil {
		t.Fatal(err)
	}
	if !strings.Contains(b.String(), "-----") || strings.ContainsAny(b.String(), "│┌\x1b") {
		t.Errorf("a ruled table has a line of dashes and nothing else:\n%s", b.String())
	}
}

// TestTableKeepsToTheWidth: sentences are wrapped, the spare one is left out where there is no room, and no
// line is wider than asked for.
func TestTableKeepsToTheWidth(t *testing.T) {
	table := Table{
		Head: [][]string{{"result", "value", "unit", "meaning"}}, Left: []int{2, 3}, Wrap: []int{3}, Spare: 3,
		Rows: [][]string{
			{"power", "9.5", "kW", "what the shaft hands on to the machine that it drives"},
			{"speed", "1200", "rpm", "revolutions"},
			{"share", "33.25 %", "", ""},
		},
	}
	for _, c := range []struct {
		width int
		want  string
	}{
		{0, "result      value  unit  meaning\n" +
			"power      9.5     kW    what the shaft hands on to the machine that it drives\n" +
			"speed   1200       rpm   revolutions\n" +
			"share     33.25 %\n"},
		{56, "result      value  unit  meaning\n" +
			"power      9.5     kW    what the shaft hands on to the\n" +
			"                         machine that it drives\n" +
			"speed   1200       rpm   revolutions\n" +
			"share     33.25 %\n"},
		{40, "result      value  unit\n" +
			"power      9.5     kW\n" +
			"speed   1200       rpm\n" +
			"share     33.25 %\n"},
	} {
		var b strings.Builder
		if err := table.Write(&b, Style{Width: c.width}); err != nil {
			t.Fatal(err)
		}
		got := b.String()
		for line := range strings.Lines(got) {
			if c.width > 0 && len(strings.TrimSuffix(line, "\n")) > c.width {
				t.Errorf("width %d: %q is wider", c.width, line)
			}
		}
		if got != c.want {
			t.Errorf("width %d:\n%s\nwant:\n%s", c.width, got, c.want)
		}
	}
}
