package main

import (
	"fmt"
	"slices"
	"strings"
)

// mostChanges is how many changed lines a message shows.
const mostChanges = 8

// changes lists in what two studies, as Study.Encode writes them, differ in what a search computes.
func changes(stored, asked string) []string {
	before, after := flat(stored), flat(asked)
	paths := make([]string, 0, len(before)+len(after))
	for path := range before {
		paths = append(paths, path)
	}
	for path := range after {
		paths = append(paths, path)
	}
	slices.Sort(paths)
	var list []string
	for _, path := range slices.Compact(paths) {
		old, was := before[path]
		now, is := after[path]
		switch {
		case was && is && old != now:
			list = append(list, fmt.Sprintf("  %s: %s there, %s asked for", path, old, now))
		case !is:
			list = append(list, fmt.Sprintf("  %s: %s there, not in this study", path, old))
		case !was:
			list = append(list, fmt.Sprintf("  %s: not there, %s asked for", path, now))
		}
	}
	if len(list) == 0 {
		return []string{"  the order of free variables, limits or aims"}
	}
	if more := len(list) - mostChanges; more > 0 {
		list = append(list[:mostChanges], fmt.Sprintf("  and %d more", more))
	}
	return list
}

// flat gives the values of an encoded study by path. Name, sentence, budget and seed are left out.
func flat(text string) map[string]string {
	values := map[string]string{}
	var blocks []string
	for line := range strings.Lines(text) {
		key, value, ok := strings.Cut(strings.TrimSpace(line), ":")
		if !ok {
			continue
		}
		depth := (len(line) - len(strings.TrimLeft(line, " "))) / 2
		blocks = append(blocks[:min(depth, len(blocks))], strings.TrimPrefix(key, "- "))
		value = strings.TrimSpace(value)
		if value == "" || slices.Contains([]string{"study", "about", "budget", "seed"}, blocks[0]) {
			continue
		}
		values[strings.Join(blocks, ".")] = value
	}
	return values
}
