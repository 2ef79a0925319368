package casefile

import (
	"fmt"
	"slices"
	"strconv"
	"strings"
)

func quote(s string) string {
	r := []rune(s)
	if len(r) > 60 {
		s = string(r[:57]) + "..."
	}
	return strconv.Quote(s)
}

func lineWord(n int) string { return "line " + strconv.Itoa(n) }

func byteCount(n int) string { return fmt.Sprintf("%d bytes", n) }

// nearest is the word of a list that a typed one most likely stands for, or
// "". A slip changes few letters: up to a third of them, at least one.
func nearest(typed string, words []string) string {
	low := strings.ToLower(strings.TrimSpace(typed))
	if low == "" || len(low) > 60 {
		return ""
	}
	best, bestAt := "", max(1, len([]rune(low))/3)+1
	for _, w := range words {
		whole := strings.ToLower(w)
		d := min(distance(low, whole, bestAt), distance(low, leading(whole, len(strings.Fields(low))), bestAt))
		if d < bestAt {
			best, bestAt = w, d
		}
	}
	if holds := containing(low, words); holds != "" && bestAt > 2 {
		return holds
	}
	return best
}

// leading is the first n words of a name, as catalogues let people type them.
func leading(name string, n int) string {
	words := strings.Fields(name)
	return strings.TrimRight(strings.Join(words[:min(n, len(words))], " "), ",")
}

// containing is the shortest word of a list that holds all parts of the typed one.
func containing(low string, words []string) string {
	best := ""
	for _, w := range words {
		if len(low) >= 3 && holdsAll(strings.ToLower(w), strings.Fields(low)) && (best == "" || len(w) < len(best)) {
			best = w
		}
	}
	return best
}

func holdsAll(word string, parts []string) bool {
	return !slices.ContainsFunc(parts, func(p string) bool { return !strings.Contains(word, p) })
}

// distance counts the changed, missing, added and swapped letters between two
// words (optimal string alignment); at least limit when it is larger.
func distance(a, b string, limit int) int {
	x, y := []rune(a), []rune(b)
	if len(x)-len(y) >= limit || len(y)-len(x) >= limit {
		return limit
	}
	before, last := make([]int, len(y)+1), make([]int, len(y)+1)
	for j := range last {
		last[j] = j
	}
	for i := 1; i <= len(x); i++ {
		row := make([]int, len(y)+1)
		row[0] = i
		for j := 1; j <= len(y); j++ {
			cost := 1
			if x[i-1] == y[j-1] {
				cost = 0
			}
			row[j] = min(row[j-1]+1, last[j]+1, last[j-1]+cost)
			if i > 1 && j > 1 && x[i-1] == y[j-2] && x[i-2] == y[j-1] {
				row[j] = min(row[j], before[j-2]+1)
			}
		}
		before, last = last, row
	}
	return last[len(y)]
}

// oneOf lists words for the "expected" of a finding, at most 15.
func oneOf(words []string) string {
	const most = 15
	between := ", "
	if slices.ContainsFunc(words, func(w string) bool { return strings.Contains(w, ",") }) {
		between = "; "
	}
	if len(words) <= most {
		return strings.Join(words, between)
	}
	return strings.Join(words[:most], between) + fmt.Sprintf(" and %d more", len(words)-most)
}

// first lists at most n words.
func first(words []string, n int) string {
	text := strings.Join(words[:min(n, len(words))], "; ")
	if len(words) > n {
		text += fmt.Sprintf(" and %d more", len(words)-n)
	}
	return text
}

// faceWords are other words for faces.
var faceWords = map[string]string{"rear": "back", "rear side": "back", "backside": "back", "door": "front", "front side": "front",
	"left side": "left", "right side": "right", "roof": "top", "ceiling": "top", "lid": "top", "upside": "top",
	"base": "bottom", "floor": "bottom", "underside": "bottom", "jacket": "side", "mantle": "side"}

// nearestFace is nearest for faces, which have other words beside slips.
func nearestFace(typed string, faces []string) string {
	if face := faceWords[strings.ToLower(strings.TrimSpace(typed))]; slices.Contains(faces, face) {
		return face
	}
	return nearest(typed, faces)
}

// facesOf lists the faces of a body, as the geometry names them.
func facesOf(kind, axis string) []string {
	switch {
	case kind == "plate":
		return []string{"front", "back"}
	case kind == "box":
		return []string{"front", "back", "left", "right", "top", "bottom"}
	case kind == "pipe":
		return []string{"side"}
	case kind == "sphere":
		return []string{"surface"}
	case kind == "cylinder" && axis == "vertical":
		return []string{"side", "top", "bottom"}
	case kind == "cylinder":
		return []string{"side", "left end", "right end"}
	case kind == "vessel" && axis == "horizontal":
		return []string{"shell", "left head", "right head"}
	case kind == "vessel":
		return []string{"shell", "top head", "bottom head"}
	}
	return allFaces
}

// allFaces are the faces of all bodies.
var allFaces = []string{"front", "back", "left", "right", "top", "bottom", "side", "left end", "right end",
	"surface", "shell", "top head", "bottom head", "left head", "right head"}

// bodyKinds are the keys of the section body.
var bodyKinds = []string{"plate", "cylinder", "pipe", "sphere", "box", "vessel"}
