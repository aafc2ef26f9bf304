package design

import (
	"slices"
	"strings"
)

// didYouMean hints at the known name nearest to a name, or lists the known
// names if none is near.
func didYouMean(name string, known []string) hint {
	return func() string {
		if best := nearest(name, known); best != "" {
			return `did you mean "` + best + `"?`
		}
		if len(known) == 0 {
			return ""
		}
		return "known here: " + strings.Join(known[:min(len(known), 20)], ", ")
	}
}

// nearest returns the known name with the smallest edit distance to name, if
// that is at most a third of its length; the first of equals.
func nearest(name string, known []string) string {
	best, bestDistance := "", max(1, len(name)/3)+1
	for _, k := range known {
		if strings.EqualFold(k, name) {
			return k
		}
		if d := editDistance(name, k, bestDistance); d < bestDistance {
			best, bestDistance = k, d
		}
	}
	return best
}

// editDistance is the number of insertions, deletions, substitutions and
// swaps of neighbours between two names (optimal string alignment), or limit
// if it is at least that.
func editDistance(a, b string, limit int) int {
	if len(a) > longestName || len(b) > longestName || len(a)-len(b) >= limit || len(b)-len(a) >= limit {
		return limit
	}
	before, last, row := make([]int, len(b)+1), make([]int, len(b)+1), make([]int, len(b)+1)
	for j := range last {
		last[j] = j
	}
	for i := 1; i <= len(a); i++ {
		row[0] = i
		for j := 1; j <= len(b); j++ {
			change := last[j-1]
			if a[i-1] != b[j-1] {
				change++
			}
			row[j] = min(change, last[j]+1, row[j-1]+1)
			if i > 1 && j > 1 && a[i-1] == b[j-2] && a[i-2] == b[j-1] {
				row[j] = min(row[j], before[j-2]+1)
			}
		}
		if slices.Min(row) >= limit {
			return limit
		}
		before, last, row = last, row, before
	}
	return min(last[len(b)], limit)
}
