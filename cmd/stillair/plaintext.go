package main

import (
	"regexp"
	"strings"
	"unicode"
)

// powers of ten as people write them: 1e-10 becomes 1·10⁻¹⁰.
var exponent = regexp.MustCompile(`\b([0-9]+(?:\.[0-9]+)?)e(-?[0-9]+)\b`)

func tenPowers(text string) string {
	return exponent.ReplaceAllStringFunc(text, func(s string) string {
		m := exponent.FindStringSubmatch(s)
		return m[1] + "·10" + superscript(m[2])
	})
}

func superscript(digits string) string {
	return strings.NewReplacer("-", "⁻", "0", "⁰", "1", "¹", "2", "²", "3", "³", "4", "⁴", "5", "⁵",
		"6", "⁶", "7", "⁷", "8", "⁸", "9", "⁹").Replace(digits)
}

// plainEquation turns the small TeX subset of the correlations into a line a
// person can read and retype: Nu = 2 + 0.43 Ra^(1/4).
func plainEquation(source string) string {
	var lines []string
	for _, line := range strings.Split(source, "\n") {
		t := &tex{src: []rune(line)}
		lines = append(lines, t.row())
	}
	return strings.Join(lines, "\n")
}

// tex reads one equation from left to right.
type tex struct {
	src []rune
	pos int
}

func (t *tex) peek() rune {
	if t.pos < len(t.src) {
		return t.src[t.pos]
	}
	return 0
}

// take reads one character; nothing at the end.
func (t *tex) take() string {
	if t.pos >= len(t.src) {
		return ""
	}
	t.pos++
	return string(t.src[t.pos-1])
}

// row reads to the end, or to the brace or \right that closes it.
func (t *tex) row() string {
	var b strings.Builder
	for {
		switch c := t.peek(); {
		case c == 0 || c == '}' || strings.HasPrefix(string(t.src[t.pos:]), `\right`):
			return strings.Join(strings.Fields(b.String()), " ")
		case c == '\\':
			b.WriteString(t.command())
		case c == '^' || c == '_':
			t.take()
			b.WriteString(script(c, t.argument()))
		default:
			b.WriteString(t.take())
		}
	}
}

// argument reads {...} or one character.
func (t *tex) argument() string {
	if t.peek() != '{' {
		return t.take()
	}
	t.take()
	in := t.row()
	t.take() // the brace
	return in
}

// script writes a power or an index; powers that are no plain number are put
// in brackets.
func script(mark rune, in string) string {
	if mark == '^' && strings.ContainsAny(in, "/ ·+") {
		in = "(" + in + ")"
	}
	return string(mark) + in
}

// command reads what begins with a backslash.
func (t *tex) command() string {
	start := t.pos + 1
	for t.pos = start; unicode.IsLetter(t.peek()); t.pos++ {
	}
	switch name := string(t.src[start:t.pos]); name {
	case "": // a space such as \,
		t.take()
		return " "
	case "mathrm", "text":
		return t.argument()
	case "frac":
		return quotient(t.argument(), t.argument())
	case "sqrt":
		return "√" + tight(t.argument())
	case "left":
		open := t.fence()
		in := t.row()
		t.pos = min(t.pos+len(`\right`), len(t.src))
		return open + in + t.fence()
	case "cdot":
		return "·"
	case "theta":
		return "θ"
	default:
		return name
	}
}

// fence reads the bracket behind \left or \right.
func (t *tex) fence() string {
	if t.peek() == '\\' {
		t.take()
	}
	return t.take()
}

// quotient writes a fraction on one line, with brackets where they are needed.
func quotient(over, under string) string {
	if strings.Contains(outside(over), " + ") || strings.Contains(outside(over), " - ") {
		over = "(" + over + ")"
	}
	under = tight(under)
	if strings.Contains(outside(over), " ") {
		return over + " / " + under
	}
	return over + "/" + under
}

// tight puts brackets around what is more than one factor.
func tight(s string) string {
	if strings.ContainsAny(outside(s), " /·") {
		return "(" + s + ")"
	}
	return s
}

// outside is the part of a text that stands in no bracket.
func outside(s string) string {
	var b strings.Builder
	depth := 0
	for _, c := range s {
		switch {
		case strings.ContainsRune("([{", c):
			depth++
		case strings.ContainsRune(")]}", c):
			depth--
		case depth == 0:
			b.WriteRune(c)
		}
	}
	return b.String()
}
