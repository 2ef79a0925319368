package typeset

import "strings"

// pairs calls add for every two words of the list.
func pairs(list string, add func(a, b string)) {
	w := strings.Fields(list)
	for i := 0; i+1 < len(w); i += 2 {
		add(w[i], w[i+1])
	}
}
