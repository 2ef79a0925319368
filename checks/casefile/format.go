package casefile

import (
	"fmt"
	"io"
	"strings"
	"unicode"
)

// Format prints findings one after the other: place, code and message, the
// source line with the wrong part marked, what was expected and the nearest
// right word. Colour only adds to what the words say.
func Format(w io.Writer, findings []Finding, color bool) {
	p := painter(color)
	for i, f := range findings {
		if i > 0 {
			fmt.Fprintln(w)
		}
		f.format(w, p)
	}
}

// painter wraps text in a terminal colour.
func painter(color bool) func(code, s string) string {
	return func(code, s string) string {
		if !color {
			return s
		}
		return "\x1b[" + code + "m" + s + "\x1b[0m"
	}
}

// Terminal colours of a finding.
const (
	bold   = "1"
	red    = "31"
	yellow = "33"
	cyan   = "36"
)

func (f Finding) format(w io.Writer, paint func(code, s string) string) {
	kind, hue := "error", red
	if f.Severity == Warning {
		kind, hue = "warning", yellow
	}
	place := fmt.Sprintf("%s:%d:%d:", visible(f.File), f.Line, f.Column)
	fmt.Fprintf(w, "%s %s %s\n", paint(bold, place), paint(hue, kind+" "+f.Code+":"), visible(f.Message))
	if strings.TrimSpace(f.Source) != "" {
		line, before := f.excerpt()
		fmt.Fprintf(w, "%5d | %s\n      | %s%s\n", f.Line, line, strings.Repeat(" ", before), paint(hue, strings.Repeat("^", min(f.Width, excerptWidth))))
	}
	say := func(label, s string) {
		if s != "" {
			fmt.Fprintf(w, "      %s %s\n", paint(cyan, label), visible(s))
		}
	}
	say("found:", f.Found)
	say("expected:", f.Expected)
	if f.Nearest != "" {
		say("did you mean", quote(f.Nearest)+"?")
	}
	say("help:", f.Help)
}

// excerptWidth is how much of a long source line is shown.
const excerptWidth = 120

// excerpt is the source line, cut around the mark when it is long, and the
// number of characters before the mark.
func (f Finding) excerpt() (line string, before int) {
	r := []rune(visible(f.Source))
	before = min(f.Column-1, len(r))
	if len(r) <= excerptWidth {
		return string(r), before
	}
	from := max(0, before-excerptWidth/2)
	to := min(len(r), from+excerptWidth)
	line = string(r[from:to])
	if to < len(r) {
		line += " …"
	}
	if from > 0 {
		return "… " + line, before - from + 2
	}
	return line, before
}

// visible replaces characters that could move the cursor of a terminal, one
// for one.
func visible(s string) string {
	return strings.Map(func(c rune) rune {
		switch {
		case c == '\t' || c == '\n':
			return ' '
		case unicode.IsControl(c) || unprintable(c):
			return '\ufffd'
		}
		return c
	}, s)
}
