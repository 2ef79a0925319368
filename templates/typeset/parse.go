// Package typeset sets formulas: it reads a small subset of TeX, lays it out
// as boxes and draws them through the pdf package, or writes MathML from the
// same tree. Variables are italic; numbers, units, functions and \mathrm text
// are upright.
//
// The subset: \frac ^ _ \sqrt \left \right \mathrm \text \dot \bar, spaces
// (\, \; \: \! \quad), Greek letters, the usual functions and operators,
// ( ) [ ] \{ \} |. Out of scope: matrices, alignment, user macros.
package typeset

import (
	"fmt"
	"strings"
	"unicode"
	"unicode/utf8"
)

// Error is a formula that cannot be read. Offset counts bytes from 0.
type Error struct {
	Offset  int
	Message string
}

// Error is one sentence with the place.
func (e *Error) Error() string {
	return fmt.Sprintf("formula, character %d: %s", e.Offset+1, e.Message)
}

// Formula is a formula that was read.
type Formula struct{ root row }

// class says how a symbol spaces itself against its neighbours.
type class int

const (
	ordinary class = iota
	binary
	relation
	opening
	closing
	punctuation
	function
)

// node is a part of a formula: row, symbol, fraction, scripts, root, fence,
// accent or gap.
type node interface{}

type (
	row    []node
	symbol struct {
		text   string
		italic bool
		class  class
	}
	fraction struct{ over, under row }
	scripts  struct {
		base     node
		sub, sup row
	}
	root struct {
		degree, body row
	}
	fence struct {
		left, right string // "" draws none
		body        row
	}
	accent struct {
		mark string // "dot" or "bar"
		body row
	}
	gap float64 // em
)

// Limits of a formula; what people write stays far below them.
const (
	maxLength = 20000
	maxDepth  = 60
)

// Parse reads a formula.
func Parse(src string) (*Formula, error) {
	if len(src) > maxLength {
		return nil, &Error{maxLength, "the formula is too long"}
	}
	if i := invalid(src); i >= 0 {
		return nil, &Error{i, "the text is not UTF-8"}
	}
	p := &parser{src: src}
	r, err := p.row("")
	if err != nil {
		return nil, err
	}
	return &Formula{r}, nil
}

func invalid(s string) int {
	for i, r := range s {
		if r == utf8.RuneError {
			if _, n := utf8.DecodeRuneInString(s[i:]); n == 1 {
				return i
			}
		}
	}
	return -1
}

// Must is Parse for formulas written in the program: one that cannot be read
// comes back as its own source, upright.
func Must(src string) *Formula {
	f, err := Parse(src)
	if err != nil {
		return &Formula{row{symbol{text: src}}}
	}
	return f
}

type parser struct {
	src   string
	pos   int
	depth int
}

func (p *parser) fail(at int, format string, a ...any) error {
	return &Error{at, fmt.Sprintf(format, a...)}
}

func (p *parser) skip() {
	for p.pos < len(p.src) && strings.IndexByte(" \t\n\r", p.src[p.pos]) >= 0 {
		p.pos++
	}
}

// row reads nodes until the closing text stop ("}", "]" or "\right").
func (p *parser) row(stop string) (row, error) {
	p.depth++
	defer func() { p.depth-- }()
	if p.depth > maxDepth {
		return nil, p.fail(p.pos, "the formula is nested too deep")
	}
	start := p.pos
	var out row
	for {
		p.skip()
		if p.pos >= len(p.src) {
			if stop != "" {
				return nil, p.fail(start, "%q is missing for what opens here", stop)
			}
			return out, nil
		}
		if stop != "" && strings.HasPrefix(p.src[p.pos:], stop) {
			p.pos += len(stop)
			return out, nil
		}
		n, err := p.scripted(out)
		if err != nil {
			return nil, err
		}
		if s, ok := n.(scripts); ok && s.base == nil && len(out) > 0 {
			s.base = out[len(out)-1]
			out[len(out)-1] = s
			continue
		}
		out = append(out, n)
	}
}

// scripted reads ^ and _ (with an empty base to be filled by the row) or one
// atom.
func (p *parser) scripted(before row) (node, error) {
	c := p.src[p.pos]
	if c != '^' && c != '_' {
		return p.atom()
	}
	if len(before) == 0 {
		return nil, p.fail(p.pos, "%q has nothing to stand on", c)
	}
	var s scripts
	for p.pos < len(p.src) && (p.src[p.pos] == '^' || p.src[p.pos] == '_') {
		at, c := p.pos, p.src[p.pos]
		p.pos++
		arg, err := p.argument()
		if err != nil {
			return nil, err
		}
		if c == '^' && s.sup != nil || c == '_' && s.sub != nil {
			return nil, p.fail(at, "a second %q on the same symbol", c)
		}
		if c == '^' {
			s.sup = arg
		} else {
			s.sub = arg
		}
		p.skip()
	}
	return s, nil
}

// argument reads {...} or one atom.
func (p *parser) argument() (row, error) {
	p.skip()
	if p.pos >= len(p.src) {
		return nil, p.fail(p.pos, "the formula ends where an argument should be")
	}
	if p.src[p.pos] == '{' {
		p.pos++
		r, err := p.row("}")
		if r == nil {
			r = row{}
		}
		return r, err
	}
	if c := p.src[p.pos]; c == '^' || c == '_' {
		return nil, p.fail(p.pos, "%q where an argument should be", c)
	}
	n, err := p.atom()
	return row{n}, err
}

func (p *parser) atom() (node, error) {
	p.depth++
	defer func() { p.depth-- }()
	if p.depth > 2*maxDepth {
		return nil, p.fail(p.pos, "the formula is nested too deep")
	}
	c, n := utf8.DecodeRuneInString(p.src[p.pos:])
	switch {
	case c == '\\':
		return p.command()
	case c == '{':
		p.pos++
		return p.row("}")
	case c == '}':
		return nil, p.fail(p.pos, "a closing brace without an opening one")
	case c >= '0' && c <= '9':
		return p.number(), nil
	}
	p.pos += n
	return character(c), nil
}

// number reads digits with their decimal point.
func (p *parser) number() node {
	start := p.pos
	for p.pos < len(p.src) {
		c := p.src[p.pos]
		dot := c == '.' && p.pos+1 < len(p.src) && p.src[p.pos+1] >= '0' && p.src[p.pos+1] <= '9'
		if (c < '0' || c > '9') && !dot {
			break
		}
		p.pos++
	}
	return symbol{text: p.src[start:p.pos]}
}

func character(c rune) node {
	switch c {
	case '+', '−', '·', '×', '±':
		return symbol{text: string(c), class: binary}
	case '-':
		return symbol{text: "−", class: binary}
	case '*':
		return symbol{text: "·", class: binary}
	case '=', '<', '>', '≤', '≥', '≈', '≠':
		return symbol{text: string(c), class: relation}
	case '(', '[':
		return symbol{text: string(c), class: opening}
	case ')', ']':
		return symbol{text: string(c), class: closing}
	case ',', ';':
		return symbol{text: string(c), class: punctuation}
	case '~':
		return gap(0.33)
	case '\'':
		return symbol{text: "′"}
	}
	return symbol{text: string(c), italic: unicode.IsLetter(c) && !upperGreek(c)}
}

func upperGreek(c rune) bool { return c >= 'Α' && c <= 'Ω' }

func (p *parser) command() (node, error) {
	at := p.pos
	p.pos++
	if p.pos >= len(p.src) {
		return nil, p.fail(at, "a backslash at the end")
	}
	start := p.pos
	for p.pos < len(p.src) && isLetter(p.src[p.pos]) {
		p.pos++
	}
	if p.pos == start {
		_, n := utf8.DecodeRuneInString(p.src[p.pos:])
		p.pos += n
	}
	name := p.src[start:p.pos]
	if s, ok := symbols[name]; ok {
		return s, nil
	}
	if g, ok := gaps[name]; ok {
		return gap(g), nil
	}
	return p.construct(name, at)
}

func isLetter(c byte) bool { return c >= 'a' && c <= 'z' || c >= 'A' && c <= 'Z' }

func (p *parser) construct(name string, at int) (node, error) {
	switch name {
	case "frac", "dfrac", "tfrac":
		over, err := p.argument()
		if err != nil {
			return nil, err
		}
		under, err := p.argument()
		return fraction{over, under}, err
	case "sqrt":
		return p.sqrt()
	case "mathrm", "text", "operatorname", "mathsf":
		s, err := p.literal(at)
		return symbol{text: s}, err
	case "left":
		return p.fence()
	case "right":
		return nil, p.fail(at, `\right without \left`)
	case "dot", "bar", "overline":
		body, err := p.argument()
		return accent{strings.Replace(name, "overline", "bar", 1), body}, err
	}
	return nil, p.fail(at, `the command "\%s" is not known`, name)
}

func (p *parser) sqrt() (node, error) {
	var degree row
	p.skip()
	if p.pos < len(p.src) && p.src[p.pos] == '[' {
		p.pos++
		var err error
		if degree, err = p.row("]"); err != nil {
			return nil, err
		}
	}
	body, err := p.argument()
	return root{degree, body}, err
}

// literal reads {text} word for word.
func (p *parser) literal(at int) (string, error) {
	p.skip()
	if p.pos >= len(p.src) || p.src[p.pos] != '{' {
		return "", p.fail(at, "text in braces should follow")
	}
	end := strings.IndexByte(p.src[p.pos:], '}')
	if end < 0 {
		return "", p.fail(p.pos, "the closing brace is missing")
	}
	s := p.src[p.pos+1 : p.pos+end]
	p.pos += end + 1
	if i := strings.IndexAny(s, `{\`); i >= 0 {
		return "", p.fail(p.pos-len(s)+i-1, "only plain text may stand here")
	}
	return strings.ReplaceAll(s, "~", " "), nil
}

func (p *parser) fence() (node, error) {
	left, err := p.delimiter()
	if err != nil {
		return nil, err
	}
	body, err := p.row(`\right`)
	if err != nil {
		return nil, err
	}
	right, err := p.delimiter()
	return fence{left, right, body}, err
}

func (p *parser) delimiter() (string, error) {
	p.skip()
	for _, d := range [...][2]string{{"(", "("}, {")", ")"}, {"[", "["}, {"]", "]"}, {`\{`, "{"}, {`\}`, "}"}, {"|", "|"}, {".", ""}} {
		if strings.HasPrefix(p.src[p.pos:], d[0]) {
			p.pos += len(d[0])
			return d[1], nil
		}
	}
	return "", p.fail(p.pos, `( ) [ ] \{ \} | or . should follow`)
}
