package pdf

import (
	"fmt"
	"sort"
	"strings"
	"unicode"
	"unicode/utf8"
)

// Replacement is a character that could not be printed and how often that
// happened in the document.
type Replacement struct {
	Rune  rune // utf8.RuneError stands for bytes that are not UTF-8
	Count int
}

// String names the character by its code point.
func (r Replacement) String() string {
	if r.Rune == utf8.RuneError {
		return fmt.Sprintf("bytes that are not UTF-8 (%d)", r.Count)
	}
	return fmt.Sprintf("U+%04X (%d)", r.Rune, r.Count)
}

const shown = "�" // what stands in for a character that cannot be printed

// clean makes any text printable in the face: white space becomes a space;
// bytes that are not UTF-8, controls, runes above U+FFFF and runes the face
// lacks become a visible mark and are counted.
func (d *Doc) clean(s string, f Face) string {
	if plain(s) {
		return s
	}
	var b strings.Builder
	for i, r := range s {
		if r == utf8.RuneError && !strings.HasPrefix(s[i:], shown) {
			d.replace(&b, utf8.RuneError)
			continue
		}
		switch {
		case r == '\t' || r == '\n' || r == '\r' || r == ' ':
			b.WriteByte(' ')
		case r == '\u00ad': // soft hyphen: a hint, not a character
		case printable(f, r):
			b.WriteRune(r)
		default:
			d.replace(&b, r)
		}
	}
	return b.String()
}

func (d *Doc) replace(b *strings.Builder, r rune) {
	d.replaced[r]++
	b.WriteString(shown)
}

func plain(s string) bool {
	for i := range len(s) {
		if s[i] < ' ' || s[i] > '~' {
			return false
		}
	}
	return true
}

func printable(f Face, r rune) bool {
	if r > 0xFFFF || unicode.Is(unicode.C, r) {
		return false
	}
	return Has(f, r)
}

// Replaced lists the characters shown as a mark so far, by code point.
func (d *Doc) Replaced() []Replacement {
	var list []Replacement
	for r, n := range d.replaced {
		list = append(list, Replacement{r, n})
	}
	sort.Slice(list, func(i, j int) bool { return list[i].Rune < list[j].Rune })
	return list
}

// Printable reports whether every text face shows the rune as itself. White
// space counts as printable.
func Printable(r rune) bool {
	switch r {
	case '\t', '\n', '\r':
		return true
	}
	return printable(Regular, r) && printable(Mono, r)
}
