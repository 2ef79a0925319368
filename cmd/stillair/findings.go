package main

import (
	"fmt"
	"strings"
	"unicode"

	"stillair/checks/casefile"
)

// finding is a casefile.Finding as the JSON object carries it.
type finding struct {
	Code     string `json:"code"`
	Severity string `json:"severity"`
	File     string `json:"file"`
	Line     int    `json:"line"`
	Column   int    `json:"column"`
	Width    int    `json:"width"`
	Source   string `json:"source"`
	Path     string `json:"path,omitempty"`
	Message  string `json:"message"`
	Found    string `json:"found,omitempty"`
	Expected string `json:"expected,omitempty"`
	Nearest  string `json:"nearest,omitempty"`
	Help     string `json:"help,omitempty"`
}

func severity(s casefile.Severity) string {
	if s == casefile.Warning {
		return "warning"
	}
	return "error"
}

func findingsJSON(list []casefile.Finding) []finding {
	out := make([]finding, len(list))
	for i, f := range list {
		out[i] = finding{f.Code, severity(f.Severity), f.File, f.Line, f.Column, f.Width, f.Source, f.Path,
			f.Message, f.Found, f.Expected, f.Nearest, f.Help}
	}
	return out
}

// describe writes one finding the way a compiler does: place, code, message,
// the line with its mark, what was expected, the nearest word, help.
func describe(f casefile.Finding) string {
	var b strings.Builder
	fmt.Fprintf(&b, "%s:%d:%d: %s %s: %s\n", f.File, f.Line, f.Column, severity(f.Severity), f.Code, printable(f.Message))
	margin := strings.Repeat(" ", 6)
	if f.Source != "" {
		fmt.Fprintf(&b, "%5d | %s\n", f.Line, printable(f.Source))
		fmt.Fprintf(&b, "%s| %s%s\n", margin, indentLike(f.Source, f.Column-1), strings.Repeat("^", max(f.Width, 1)))
	}
	for _, note := range [][2]string{{"found", f.Found}, {"expected", f.Expected}, {"did you mean", f.Nearest}, {"help", f.Help}} {
		if note[1] != "" {
			fmt.Fprintf(&b, "%s= %s: %s\n", margin, note[0], printable(note[1]))
		}
	}
	fmt.Fprintf(&b, "%s= more: stillair explain %s\n", margin, f.Code)
	return b.String()
}

// indentLike is as much blank as the first n characters of the line take,
// tabs kept so that the mark stands under its word.
func indentLike(line string, n int) string {
	var b strings.Builder
	for _, r := range []rune(line)[:min(max(n, 0), len([]rune(line)))] {
		if r == '\t' {
			b.WriteRune('\t')
			continue
		}
		b.WriteRune(' ')
	}
	return b.String()
}

// printable keeps text from steering the terminal.
func printable(s string) string {
	return strings.Map(func(r rune) rune {
		if r != '\t' && unicode.IsControl(r) || unicode.Is(unicode.Bidi_Control, r) {
			return unicode.ReplacementChar
		}
		return r
	}, s)
}
