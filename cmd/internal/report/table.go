package report

import (
	"io"
	"slices"
	"strings"
	"unicode/utf8"

	"github.com/olekukonko/tablewriter"
	"github.com/olekukonko/tablewriter/renderer"
	"github.com/olekukonko/tablewriter/tw"
)

// Table is a table of texts. Its first column stands left, the rest right, numbers on their decimal point,
// unless Left says otherwise.
type Table struct {
	Title string
	Head  [][]string // lines of the head, each with a text a column
	Rows  [][]string
	Left  []int // further columns that stand left
	Wrap  []int // columns of sentences, of those in Left, that may go over several lines
	Spare int   // the last column, one of sentences, is left out where there is no room for it; 0 = none such
}

// Style says how tables look.
type Style struct {
	Ruled bool // a line under the head, for a terminal; else plain text only
	Width int  // columns of text to keep within by cutting the table into parts; 0 = no limit
}

// Listing is the style of tables that are read line by line: they keep to the width of a terminal, but
// elsewhere each row stays one line, whatever its length.
func (s Style) Listing() Style {
	if !s.Ruled {
		s.Width = 0
	}
	return s
}

const (
	gap      = 2  // blanks between columns
	sentence = 28 // narrowest column that a sentence is wrapped to
)

// Write prints the table. One that is too wide has its sentences wrapped and is then printed in parts,
// each with the first column.
func (t *Table) Write(w io.Writer, s Style) error {
	if t.Title != "" {
		if _, err := io.WriteString(w, t.Title+"\n"); err != nil {
			return err
		}
	}
	laid := t.aligned()
	widths := laid.widths()
	if t.Spare > 0 && s.Width > 0 {
		used := sentence
		for _, w := range widths[:t.Spare] {
			used += w + gap
		}
		if used > s.Width {
			widths = widths[:t.Spare]
		}
	}
	laid.wrap(widths, s.Width)
	for start := 1; ; {
		end, used := start, widths[0]
		for end < len(widths) && (end == start || s.Width == 0 || used+gap+widths[end] <= s.Width) {
			used += gap + widths[end]
			end++
		}
		if err := laid.part(w, s, start, end); err != nil {
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

// aligned is the table with blanks behind numbers, so that right-aligned ones stand on their decimal point.
func (t *Table) aligned() *Table {
	laid := *t
	laid.Rows = make([][]string, len(t.Rows))
	var tails []int // longest fraction of a column
	for r, row := range t.Rows {
		laid.Rows[r] = slices.Clone(row)
		for i, text := range row {
			for len(tails) <= i {
				tails = append(tails, 0)
			}
			if number, tail := fraction(text); number {
				tails[i] = max(tails[i], tail)
			}
		}
	}
	for _, row := range laid.Rows {
		for i, text := range row {
			if number, tail := fraction(text); number && i > 0 && !slices.Contains(t.Left, i) {
				row[i] += strings.Repeat(" ", tails[i]-tail)
			}
		}
	}
	return &laid
}

// fraction tells whether a text is a number and how long it is from its decimal point on.
func fraction(text string) (number bool, tail int) {
	if text == "" || strings.Trim(text, "+-.0123456789eE %") != "" || !strings.ContainsAny(text, "0123456789") {
		return false, 0
	}
	if point := strings.IndexByte(text, '.'); point >= 0 {
		return true, len(text) - point
	}
	if end := strings.IndexAny(text, "eE %"); end >= 0 {
		return true, len(text) - end
	}
	return true, 0
}

// wrap breaks the sentences of a table that is too wide and corrects the widths.
func (t *Table) wrap(widths []int, limit int) {
	total := -gap
	for _, w := range widths {
		total += gap + w
	}
	if limit == 0 || total <= limit || len(t.Wrap) == 0 {
		return
	}
	room, natural := limit-total, 0
	for _, i := range t.Wrap {
		if i >= len(widths) {
			return
		}
		room += widths[i]
		natural += widths[i]
	}
	for _, i := range t.Wrap {
		width := max(sentence, room*widths[i]/natural)
		if width >= widths[i] {
			continue
		}
		widths[i] = 0
		for _, lines := range [][][]string{t.Head, t.Rows} {
			for _, row := range lines {
				if i < len(row) {
					row[i] = broken(row[i], width)
					for line := range strings.Lines(row[i]) {
						widths[i] = max(widths[i], utf8.RuneCountInString(strings.TrimSuffix(line, "\n")))
					}
				}
			}
		}
	}
}

// broken puts line ends between the words of a text.
func broken(text string, width int) string {
	var b strings.Builder
	used := 0
	for _, word := range strings.Fields(text) {
		n := utf8.RuneCountInString(word)
		switch {
		case used == 0:
		case used+1+n <= width:
			b.WriteByte(' ')
			used++
		default:
			b.WriteByte('\n')
			used = 0
		}
		b.WriteString(word)
		used += n
	}
	return b.String()
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
		if slices.Contains(t.Left, i) {
			a = tw.AlignLeft
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
		tablewriter.WithTrimSpace(tw.Off),
		tablewriter.WithHeaderAlignmentConfig(tw.CellAlignment{PerColumn: align}),
		tablewriter.WithRowAlignmentConfig(tw.CellAlignment{PerColumn: align}),
		tablewriter.WithPadding(tw.Padding{Left: "", Right: strings.Repeat(" ", gap), Overwrite: true}),
	)
	if len(t.Head) > 0 {
		lines := make([][]string, end-start+1)
		for _, line := range t.Head {
			cells := pick(line)
			if strings.Join(cells, "") == "" { // of use in another part only
				continue
			}
			for j, text := range cells {
				lines[j] = append(lines[j], text)
			}
		}
		var head []string
		for _, cell := range lines {
			head = append(head, strings.Join(cell, "\n"))
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
		line = strings.TrimRight(line, " \n")
		if s.Ruled && len(line) > gap && strings.Trim(line, "-") == "" {
			line = line[gap:] // the rule is drawn below the blanks behind the last column too
		}
		if _, err := io.WriteString(w, line+"\n"); err != nil {
			return err
		}
	}
	return nil
}
