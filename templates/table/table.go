// Package table writes the outcome of a check as plain text for a terminal or
// a file: what was found first, how it was found below it. Colour is optional
// and repeats what the words say. Nothing is cut; with Width 0 nothing is
// wrapped either.
package table

import (
	"fmt"
	"io"
	"strings"
	"unicode"

	"stillair/checks"
	"stillair/checks/unit"
)

// Options of the report.
type Options struct {
	Units   unit.System // units to show results in
	Verbose bool        // every load case in full, every effect and caution
	Color   bool        // colour the verdict words
	Width   int         // characters to wrap sentences at; 0 never wraps
	Partial string      // said under the head when only some load cases were computed
}

// Check writes the report of o to w. The same outcome gives the same bytes.
func Check(w io.Writer, o *checks.Outcome, opt Options) error {
	p := &page{o: o, opt: opt}
	p.head()
	p.compare()
	for i := range o.Loads {
		if p.full(&o.Loads[i]) {
			p.load(&o.Loads[i])
		}
	}
	p.assumptions()
	p.warnings()
	p.cautions()
	p.foot()
	_, err := io.WriteString(w, p.b.String())
	return err
}

// page collects the report.
type page struct {
	b   strings.Builder
	o   *checks.Outcome
	opt Options
}

const reset = "\x1b[0m"

// paint is the colour of a verdict: 4-bit, so that the terminal's own theme
// decides how it looks.
func paint(v checks.Verdict) string {
	switch v {
	case checks.Pass:
		return "\x1b[32m"
	case checks.ConditionalPass, checks.ConditionalFail:
		return "\x1b[33m"
	case checks.Fail, checks.NoResult:
		return "\x1b[1;31m"
	}
	return ""
}

// verdictWord is how a verdict is printed.
func verdictWord(v checks.Verdict) string { return strings.ToUpper(string(v)) }

// sayVerdict writes the verdict word, coloured when asked, and what follows it.
func (p *page) sayVerdict(mark string, v checks.Verdict, rest string) {
	word := verdictWord(v)
	lines := wrap(word+clean(rest), p.opt.Width-width(mark))
	if after, ok := strings.CutPrefix(lines[0], word); ok && p.opt.Color && paint(v) != "" {
		lines[0] = paint(v) + word + reset + after
	}
	p.lines(mark, lines)
}

// full tells whether a load case is shown in full.
func (p *page) full(l *checks.LoadOutcome) bool {
	if p.opt.Verbose || l.Governing || len(p.o.Loads) == 1 || l.Status != checks.Converged {
		return true
	}
	return !p.anyGoverns() && l == &p.o.Loads[0]
}

func (p *page) anyGoverns() bool {
	for _, l := range p.o.Loads {
		if l.Governing {
			return true
		}
	}
	return false
}

func (p *page) line(format string, a ...any) {
	p.b.WriteString(strings.TrimRight(fmt.Sprintf(format, a...), " "))
	p.b.WriteByte('\n')
}

func (p *page) heading(text string) { p.line("\n%s", text) }

func (p *page) grid(g *grid) {
	for _, l := range g.lines(p.opt.Color) {
		p.line("  %s", l)
	}
}

// say writes a sentence, wrapped when a width is set, after a mark and with
// its following lines under its first word.
func (p *page) say(mark, text string) {
	p.lines(mark, wrap(clean(text), p.opt.Width-width(mark)))
}

func (p *page) lines(mark string, lines []string) {
	for i, l := range lines {
		if i > 0 {
			mark = strings.Repeat(" ", width(mark))
		}
		p.line("%s%s", mark, l)
	}
}

// wrap breaks text at spaces into lines of at most w characters, longer words
// excepted. A w below 20 does not wrap.
func wrap(text string, w int) []string {
	if w < 20 {
		return []string{text}
	}
	var lines []string
	current := ""
	for _, word := range strings.Split(text, " ") {
		if current != "" && width(current)+1+width(word) > w {
			lines = append(lines, current)
			current = ""
		}
		if current != "" {
			current += " "
		}
		current += word
	}
	return append(lines, current)
}

// clean makes text harmless for a terminal: control characters, which could
// move the cursor or recolour the report, become a replacement mark.
func clean(s string) string {
	return strings.Map(func(r rune) rune {
		if unicode.IsControl(r) || unicode.Is(unicode.Bidi_Control, r) {
			return unicode.ReplacementChar
		}
		return r
	}, strings.Join(strings.FieldsFunc(s, func(r rune) bool { return r == '\n' || r == '\r' || r == '\t' }), " "))
}
