package main

// nearest returns the name that word was most likely meant to be, or "" if
// none is near: more than one letter in three would have to change.
func nearest(word string, names []string) string {
	best, least := "", 0
	for _, name := range names {
		d := distance(word, name)
		if d <= (len(name)+1)/3 && (best == "" || d < least) {
			best, least = name, d
		}
	}
	return best
}

// distance is the number of letters to insert, remove, replace or exchange
// with their neighbour to get from a to b (the restricted
// Damerau-Levenshtein distance).
func distance(a, b string) int {
	before, last := make([]int, len(b)+1), make([]int, len(b)+1)
	for j := range last {
		last[j] = j
	}
	for i := range len(a) {
		row := make([]int, len(b)+1)
		row[0] = i + 1
		for j := range len(b) {
			replace := last[j]
			if a[i] != b[j] {
				replace++
			}
			row[j+1] = min(replace, last[j+1]+1, row[j]+1)
			if i > 0 && j > 0 && a[i] == b[j-1] && a[i-1] == b[j] {
				row[j+1] = min(row[j+1], before[j-1]+1)
			}
		}
		before, last = last, row
	}
	return last[len(b)]
}
