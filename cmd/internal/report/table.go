package report

import (
	"io"
	"strings"
	"unicode/utf8"

	"github.com/olekukonko/tablewriter"
	"github.com/olekukonko/tablewriter/renderer"
	"github.com/olekukonko/tablewriter/tw"
)

// Table is a table of texts. Its first column stands left, the rest right unless Left says otherwise.
type Table struct {
	Title string
	Head  [][]string // lines of the head, each with a text a column
	Rows  [][]string
	Left  []int // further columns that stand left
}

// Style says how tables look.
type Style struct {
	Ruled bool // a line under the head, for a terminal; else plain text only
	Width int  // columns of text to keep within by cutting the table into parts; 0 = no limit
}

const gap = 2 // blanks between columns

// Write prints the table. One that is too wide is printed in parts, each with the first column.
func (t *Table) Write(w io.Writer, s Style) error {
	if t.Title != "" {
		if _, err := io.WriteString(w, t.Title+"\n"); err != nil {
			return err
		}
	}
	widths := t.widths()
	for start := 1; ; {
		end, used := start, widths[0]
		for end < len(widths) && (end == start || s.Width == 0 || used+gap+widths[end] <= s.Width) {
			used += gap + widths[end]
			end++
		}
		if err := t.part(w, s, start, end); err != nil {
			return err
		}
		if end >= len(widths) {
			return nil
		}
		if _, err := io.WriteString(w, "\n"); err != nil {
			return err
		}
		start = end
	}
}

func (t *Table) widths() []int {
	var widths []int
	for _, lines := range [][][]string{t.Head, t.Rows} {
		for _, line := range lines {
			for len(widths) < len(line) {
				widths = append(widths, 0)
			}
			for i, text := range line {
				widths[i] = max(widths[i], utf8.RuneCountInString(text))
			}
		}
	}
	if widths == nil {
		widths = []int{0}
	}
	return widths
}

// part prints the first column and columns start..end-1.
func (t *Table) part(w io.Writer, s Style, start, end int) error {
	align := []tw.Align{tw.AlignLeft}
	for i := start; i < end; i++ {
		a := tw.AlignRight
		for _, l := range t.Left {
			if l == i {
				a = tw.AlignLeft
			}
		}
		align = append(align, a)
	}
	pick := func(line []string) []string {
		cells := []string{line[0]}
		for i := start; i < end; i++ {
			if i < len(line) {
				cells = append(cells, line[i])
			} else {
				cells = append(cells, "")
			}
		}
		return cells
	}
	rule := tw.Off
	if s.Ruled {
		rule = tw.On
	}
	var text strings.Builder
	table := tablewriter.NewTable(&text,
		tablewriter.WithRenderer(renderer.NewBlueprint(tw.Rendition{
			Borders: tw.Border{Left: tw.Off, Right: tw.Off, Top: tw.Off, Bottom: tw.Off},
			Symbols: tw.NewSymbolCustom("hotfront").WithRow("-").WithColumn(" ").WithCenter(" ").WithHeaderMid(" "),
			Settings: tw.Settings{
				Lines:      tw.Lines{ShowHeaderLine: rule, ShowTop: tw.Off, ShowBottom: tw.Off, ShowFooterLine: tw.Off},
				Separators: tw.Separators{BetweenColumns: tw.Off, BetweenRows: tw.Off, ShowHeader: tw.Off},
			},
		})),
		tablewriter.WithHeaderAutoFormat(tw.Off), tablewriter.WithHeaderAutoWrap(tw.WrapNone), tablewriter.WithRowAutoWrap(tw.WrapNone),
		tablewriter.WithHeaderAlignmentConfig(tw.CellAlignment{PerColumn: align}),
		tablewriter.WithRowAlignmentConfig(tw.CellAlignment{PerColumn: align}),
		tablewriter.WithPadding(tw.Padding{Left: "", Right: strings.Repeat(" ", gap), Overwrite: true}),
	)
	if len(t.Head) > 0 {
		head := make([]string, end-start+1)
		for i, line := range t.Head {
			for j, text := range pick(line) {
				if i > 0 {
					head[j] += "\n"
				}
				head[j] += text
			}
		}
		table.Header(head)
	}
	for _, row := range t.Rows {
		if err := table.Append(pick(row)); err != nil {
			return err
		}
	}
	if err := table.Render(); err != nil {
		return err
	}
	for line := range strings.Lines(text.String()) {
		if _, err := io.WriteString(w, strings.TrimRight(line, " \n")+"\n"); err != nil {
			return err
		}
	}
	return nil
}
