package main

import (
	"fmt"
	"strings"
)

// nearest is the word that is fewest edits away from the one typed, or "" when
// none is near: at most two edits, and at most a third of the letters for
// short words.
func nearest(typed string, words []string) string {
	best, least := "", 3
	for _, w := range words {
		d := edits(strings.ToLower(typed), strings.ToLower(w))
		if 3*d > max(len(w), 3) {
			continue
		}
		if d < least || d == least && !sameStart(best, typed) && sameStart(w, typed) {
			best, least = w, d
		}
	}
	if best != "" || len(typed) < 3 {
		return best
	}
	for _, w := range words {
		if strings.HasPrefix(strings.ToLower(w), strings.ToLower(typed)) {
			return w
		}
	}
	return ""
}

// sameStart tells whether two words begin with the same letter.
func sameStart(a, b string) bool {
	return a != "" && b != "" && strings.EqualFold(a[:1], b[:1])
}

// didYouMean is the sentence that offers the nearest word, or lists them all.
func didYouMean(typed string, words []string) string {
	if w := nearest(typed, words); w != "" {
		return fmt.Sprintf("Did you mean %q?", w)
	}
	if len(words) > 12 {
		return ""
	}
	return "There are: " + strings.Join(words, ", ") + "."
}

// edits counts insertions, deletions, replacements and swaps of neighbours
// (optimal string alignment distance).
func edits(a, b string) int {
	x, y := []rune(a), []rune(b)
	d := make([][]int, len(x)+1)
	for i := range d {
		d[i] = make([]int, len(y)+1)
		d[i][0] = i
	}
	for j := range d[0] {
		d[0][j] = j
	}
	for i := 1; i <= len(x); i++ {
		for j := 1; j <= len(y); j++ {
			cost := 1
			if x[i-1] == y[j-1] {
				cost = 0
			}
			d[i][j] = min(d[i-1][j]+1, d[i][j-1]+1, d[i-1][j-1]+cost)
			if i > 1 && j > 1 && x[i-1] == y[j-2] && x[i-2] == y[j-1] {
				d[i][j] = min(d[i][j], d[i-2][j-2]+1)
			}
		}
	}
	return d[len(x)][len(y)]
}
