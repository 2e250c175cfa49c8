package report

import (
	"slices"
	"strings"
)

// narrow is the length that the lines of a heading are kept to where its words allow.
const narrow = 11

// headings puts the names and units of columns on as many lines as the longest needs: words of a name that
// do not fit on one line go on the next, all names end on the same line, and units stand below.
func headings(names, units []string) [][]string {
	stacks := make([][]string, len(names))
	tall, anyUnit := 0, false
	for i, name := range names {
		stacks[i] = stacked(name)
		tall = max(tall, len(stacks[i]))
		anyUnit = anyUnit || units[i] != ""
	}
	head := make([][]string, tall)
	for l := range head {
		head[l] = make([]string, len(names))
		for i, stack := range stacks {
			if at := l - (tall - len(stack)); at >= 0 {
				head[l][i] = stack[at]
			}
		}
	}
	if anyUnit {
		head = append(head, slices.Clone(units))
	}
	return head
}

// stacked breaks a name behind its dots, and behind underscores where a line would get too long.
func stacked(name string) []string {
	var lines []string
	for part := range strings.SplitSeq(name, ".") {
		line := ""
		for word := range strings.SplitSeq(part, "_") {
			switch {
			case line == "":
				line = word
			case len(line)+1+len(word) <= narrow:
				line += "_" + word
			default:
				lines = append(lines, line)
				line = word
			}
		}
		lines = append(lines, line)
	}
	return lines
}
