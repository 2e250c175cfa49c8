package studies

import (
	"slices"
	"strings"
)

// distance is the number of letters to change, drop, add or swap with a neighbour to make one word
// of the other (Damerau-Levenshtein in its restricted form, each letter edited once).
func distance(a, b string) int {
	s, t := []rune(a), []rune(b)
	before, last, row := make([]int, len(t)+1), make([]int, len(t)+1), make([]int, len(t)+1)
	for j := range last {
		last[j] = j
	}
	for i := 1; i <= len(s); i++ {
		row[0] = i
		for j := 1; j <= len(t); j++ {
			cost := 1
			if s[i-1] == t[j-1] {
				cost = 0
			}
			row[j] = min(last[j]+1, row[j-1]+1, last[j-1]+cost)
			if i > 1 && j > 1 && s[i-1] == t[j-2] && s[i-2] == t[j-1] {
				row[j] = min(row[j], before[j-2]+1)
			}
		}
		before, last, row = last, row, before
	}
	return last[len(t)]
}

// nearest gives the candidate nearest to a word, or "" when none is near: at most a third of the
// letters may differ. Ties go to the first in the alphabet. A candidate whose last part equals the
// word (tube_bore for heater.tube_bore, efficiency for brake_efficiency) is near when nothing nearer is.
func nearest(word string, candidates []string) string {
	const longest = 60
	if word == "" || len(word) > longest {
		return ""
	}
	sorted := slices.Clone(candidates)
	slices.Sort(sorted)
	lower := strings.ReplaceAll(strings.ToLower(word), "-", "_")
	best, bestDistance := "", 1+max(1, len(word)/3)
	for _, c := range sorted {
		if len(c) > len(word)+bestDistance || len(word) > len(c)+bestDistance {
			continue
		}
		if d := distance(lower, strings.ReplaceAll(strings.ToLower(c), "-", "_")); d < bestDistance {
			best, bestDistance = c, d
		}
	}
	if best != "" {
		return best
	}
	for _, c := range sorted {
		if strings.HasSuffix(c, "."+lower) || strings.HasSuffix(c, "_"+lower) {
			return c
		}
	}
	return ""
}

func didYouMean(name string) string { return "did you mean " + name + "?" }

// suggestion is the hint for an unknown name, "" when no candidate is near.
func suggestion(word string, candidates []string) string {
	if n := nearest(word, candidates); n != "" {
		return didYouMean(n)
	}
	return ""
}

// oneOf is the hint that lists the candidates when they are few and none is near.
func oneOf(word string, candidates []string) string {
	if h := suggestion(word, candidates); h != "" {
		return h
	}
	return "one of " + strings.Join(candidates, ", ")
}

func orList(names []string) string {
	if len(names) < 2 {
		return strings.Join(names, "")
	}
	return strings.Join(names[:len(names)-1], ", ") + " or " + names[len(names)-1]
}

// article puts a or an before a noun.
func article(noun string) string {
	if strings.ContainsRune("aeiou", rune(noun[0])) {
		return "an " + noun
	}
	return "a " + noun
}
