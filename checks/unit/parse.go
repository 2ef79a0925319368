package unit

import (
	"fmt"
	"math"
	"regexp"
	"strconv"
	"strings"
	"unicode"
)

// ParseError says what is wrong with a typed quantity and where.
type ParseError struct {
	Found    string // what stands there, in words
	Expected string // what was expected, with an example
	Hint     string // one more sentence, or ""
	Nearest  string // the unit that was most likely meant, or ""
	// Offset and Width, in characters, mark the part of the text that is wrong.
	Offset, Width int
	// InUnit is true when the number could be read and its unit is at fault.
	InUnit bool
}

// Error is the whole message as one line.
func (e *ParseError) Error() string {
	msg := fmt.Sprintf("found %s, expected %s", e.Found, e.Expected)
	if e.Hint != "" {
		msg += ": " + e.Hint
	}
	return msg
}

// Limits of what a person types on purpose.
const (
	maxText      = 80 // characters of a quantity
	maxExponent  = 30 // power of ten of a number
	maxUnitPower = 6
	maxNesting   = 1 // brackets in brackets are not read
)

// number is digits with a decimal point, thin spaces between groups of three.
var number = regexp.MustCompile(`^[+-]?(?:[0-9]{1,3}(?:[\x{2009}\x{202F}][0-9]{3})+|[0-9]+)(?:\.[0-9]+)?(?:[eE][+-]?[0-9]{1,4})?`)

// Parse reads a number with its unit and returns it in SI units (kelvin for
// temperatures and differences, radian for angles, a fraction for shares).
// The error is a *ParseError.
func Parse(text string, k Kind) (si float64, err error) {
	p := &parser{kind: k, runes: normalise(text)}
	if len(p.runes) > maxText {
		return 0, p.fail(0, len(p.runes), "a very long text", "a quantity is a number and a unit")
	}
	value, perr := p.number()
	if perr != nil {
		return 0, perr
	}
	p.spaces()
	unitAt := p.pos
	si, perr = p.quantity(value)
	if perr != nil {
		p.suggest(perr, unitAt)
		perr.InUnit = true
		return 0, perr
	}
	return si, nil
}

// normalise replaces look-alikes by one spelling, character for character so
// that offsets stay true.
func normalise(text string) []rune {
	r := []rune(text)
	for i, c := range r {
		switch c {
		case '\u2212', '\u2013', '\u2010', '\u2011': // minus sign, en dash, hyphens
			r[i] = '-'
		case '\u00A0', '\t':
			r[i] = ' '
		case '\u22C5', '\u2219', '\u2022', '*', '\u00D7': // dot operators, asterisk, cross
			r[i] = '·'
		case '\u2206': // increment, beside the Greek capital
			r[i] = 'Δ'
		case '\u00BA', '\u02DA': // ordinal, ring
			r[i] = '°'
		}
	}
	return r
}

type parser struct {
	kind  Kind
	runes []rune
	pos   int
}

func (p *parser) fail(from, to int, found, hint string) *ParseError {
	in := p.kind.info()
	return &ParseError{Found: found, Expected: in.name + ", such as " + in.example, Hint: hint,
		Offset: from, Width: max(1, to-from)}
}

func (p *parser) peek() rune {
	if p.pos < len(p.runes) {
		return p.runes[p.pos]
	}
	return 0
}

func (p *parser) spaces() {
	for p.peek() == ' ' {
		p.pos++
	}
}

// number reads the number at the head of the text.
func (p *parser) number() (float64, *ParseError) {
	p.spaces()
	start := p.pos
	rest := string(p.runes[start:])
	digits := number.FindString(rest)
	if digits == "" {
		return 0, p.notANumber(start, rest)
	}
	p.pos += len([]rune(digits))
	if err := p.afterNumber(start, digits); err != nil {
		return 0, err
	}
	return p.convert(start, digits)
}

func (p *parser) convert(start int, digits string) (float64, *ParseError) {
	plain := strings.NewReplacer("\u2009", "", "\u202F", "").Replace(digits)
	if _, e, ok := strings.Cut(strings.ToLower(plain), "e"); ok {
		if n, _ := strconv.Atoi(e); n > maxExponent || n < -maxExponent {
			return 0, p.fail(start, p.pos, quote(digits), fmt.Sprintf("powers of ten beyond %d are not read", maxExponent))
		}
	}
	v, err := strconv.ParseFloat(plain, 64)
	if err != nil || math.IsInf(v, 0) || math.IsNaN(v) {
		return 0, p.fail(start, p.pos, quote(digits), "the number is too large")
	}
	return v, nil
}

// notANumber explains a text that does not begin with a number.
func (p *parser) notANumber(start int, rest string) *ParseError {
	word := rest
	if i := strings.IndexByte(rest, ' '); i > 0 {
		word = rest[:i]
	}
	end := start + len([]rune(word))
	low := strings.TrimLeft(strings.ToLower(word), "+-.")
	switch {
	case strings.TrimSpace(rest) == "":
		return p.fail(0, len(p.runes), "nothing", "")
	case low == "nan" || low == "inf" || low == "infinity":
		return p.fail(start, end, quote(word), "only finite numbers are read")
	case strings.HasPrefix(strings.TrimLeft(word, "+-"), "."):
		return p.fail(start, end, quote(word), "write a zero before the decimal point")
	}
	return p.fail(start, end, quote(word), "begin with a number, then its unit")
}

// afterNumber refuses what people write behind a number in other notations.
func (p *parser) afterNumber(start int, digits string) *ParseError {
	rest := string(p.runes[p.pos:])
	next := strings.TrimLeft(rest, " ")
	digit := func(s string) bool { return s != "" && s[0] >= '0' && s[0] <= '9' }
	end := start + len([]rune(strings.TrimRight(string(p.runes[start:]), " ")))
	switch {
	case strings.HasPrefix(rest, ",") && digit(rest[1:]):
		return p.comma(start, digits, rest)
	case (strings.HasPrefix(rest, "x") || strings.HasPrefix(rest, "X")) && strings.TrimLeft(digits, "+-") == "0":
		return p.fail(start, end, quote(digits+rest), "hexadecimal numbers are not read")
	case strings.HasPrefix(rest, "."):
		return p.fail(start, p.pos+1, quote(digits+"."), "a decimal point stands between digits")
	case digit(next) || strings.HasPrefix(next, "\u2009"):
		return p.fail(start, end, quote(digits+rest), "write the number without spaces between its digits")
	case (strings.HasPrefix(rest, "/") || strings.HasPrefix(rest, "-")) && digit(rest[1:]):
		return p.fail(start, end, quote(digits+rest), "fractions and ranges are not read: write one decimal number, such as 0.5")
	}
	return nil
}

func (p *parser) comma(start int, digits, rest string) *ParseError {
	n := 1
	for n < len(rest) && rest[n] >= '0' && rest[n] <= '9' {
		n++
	}
	point := digits + "." + rest[1:n] + rest[n:]
	hint := "a decimal point is needed: write " + point
	if n == 4 {
		hint = fmt.Sprintf("a comma is not read: write %s or %s", digits+rest[1:], point)
	}
	return p.fail(start, p.pos+n, quote(digits+rest[:n]), hint)
}

// quantity reads the unit behind the number and converts.
func (p *parser) quantity(value float64) (float64, *ParseError) {
	in := p.kind.info()
	start := p.pos
	if start == len(p.runes) {
		if in.dim == (dim{}) {
			return value, nil
		}
		return 0, p.fail(0, start, quote(strings.TrimSpace(string(p.runes)))+" without a unit", "")
	}
	if p.kind == Temperature || p.kind == TemperatureDifference {
		return p.temperature(value)
	}
	got, err := p.product(0)
	if err != nil {
		return 0, err
	}
	if p.pos < len(p.runes) {
		return 0, p.unexpected()
	}
	typed := strings.Trim(string(p.runes[start:]), " ")
	if got.dim != in.dim {
		return 0, p.fail(start, len(p.runes), kindOf(got.dim)+" ("+typed+")", wrongUnitHint(typed, p.kind))
	}
	if _, one := lookup(typed); in.single && !one {
		return 0, p.fail(start, len(p.runes), quote(typed), "write one plain unit")
	}
	return p.finite(value * got.num / got.den)
}

func (p *parser) finite(si float64) (float64, *ParseError) {
	if math.IsInf(si, 0) || math.IsNaN(si) {
		return 0, p.fail(0, len(p.runes), quote(string(p.runes)), "the number is too large")
	}
	return si, nil
}

func (p *parser) unexpected() *ParseError {
	return p.fail(p.pos, len(p.runes), quote(string(p.runes[p.pos:]))+" after the unit", "")
}

// wrongUnitHint knows the slips that brackets cure.
func wrongUnitHint(typed string, k Kind) string {
	if (k == Conductivity || k == Coefficient || k == SpecificHeat) && strings.ContainsAny(typed, "·/ ") && !strings.Contains(typed, "(") {
		return "brackets hold everything below the line: write " + info[k].si.symbol
	}
	return ""
}

// temperature reads a unit of temperature and keeps places and steps apart.
func (p *parser) temperature(value float64) (float64, *ParseError) {
	start := p.pos
	typed := strings.Trim(string(p.runes[start:]), " ")
	s, ok := lookup(temperatureName(typed))
	if !ok || s.dim != (dim{0, 0, 0, 1}) {
		return 0, p.notATemperature(start, typed)
	}
	scaled := value * s.num / s.den
	if p.kind == TemperatureDifference {
		if s.scale == celsius || s.scale == fahrenheit {
			err := p.fail(start, len(p.runes), "a temperature ("+typed+")", differenceHint(value, s.scale))
			err.Nearest = map[int]string{celsius: "K", fahrenheit: "Δ°F"}[s.scale]
			return 0, err
		}
		return p.finite(scaled)
	}
	switch s.scale {
	case step:
		return 0, p.fail(start, len(p.runes), "a temperature difference ("+typed+")", "a temperature has no Δ")
	case celsius:
		scaled = value + zeroC
	case fahrenheit:
		scaled = (value + 459.67) * s.num / s.den
	}
	return p.finite(scaled)
}

func (p *parser) notATemperature(start int, typed string) *ParseError {
	other := &parser{kind: p.kind, runes: p.runes, pos: start}
	got, err := other.product(0)
	if err != nil {
		return err
	}
	if other.pos < len(other.runes) {
		return other.unexpected()
	}
	return p.fail(start, len(p.runes), kindOf(got.dim)+" ("+typed+")", "")
}

// temperatureName joins spellings of several words: "deg C", "delta degF".
func temperatureName(typed string) string { return severalWords.Replace(typed) }

var severalWords = strings.NewReplacer("delta ", "Δ", "delta", "Δ", "deg ", "deg", "° ", "°")

func differenceHint(value float64, scale int) string {
	n := strconv.FormatFloat(value, 'g', -1, 64)
	if scale == celsius {
		return "a difference is written in kelvin: write " + n + " K"
	}
	k := strconv.FormatFloat(value/1.8, 'g', 4, 64)
	return fmt.Sprintf("a difference is written in kelvin or with Δ: write %s Δ°F or %s K", n, k)
}

// product reads units joined by ·, a space or /.
func (p *parser) product(depth int) (symbol, *ParseError) {
	acc := symbol{num: 1, den: 1}
	sign := 1
	for first := true; ; first = false {
		if !first {
			var more bool
			if sign, more = p.operator(); !more {
				return acc, nil
			}
		}
		f, err := p.factor(depth)
		if err != nil {
			return acc, err
		}
		acc = multiply(acc, f, sign)
	}
}

// operator reads the join before the next factor: +1 multiplies, -1 divides.
func (p *parser) operator() (sign int, more bool) {
	before := p.pos
	p.spaces()
	switch c := p.peek(); {
	case c == '·':
		p.pos++
	case c == '/':
		p.pos++
		sign = -2
	case p.pos == before || c == 0 || c == ')':
		return 1, false
	}
	p.spaces()
	return sign + 1, true
}

func multiply(a, b symbol, power int) symbol {
	for ; power > 0; power-- {
		a.num, a.den = a.num*b.num, a.den*b.den
		for i := range a.dim {
			a.dim[i] += b.dim[i]
		}
	}
	for ; power < 0; power++ {
		a.num, a.den = a.num*b.den, a.den*b.num
		for i := range a.dim {
			a.dim[i] -= b.dim[i]
		}
	}
	return a
}

// factor reads one unit or bracket with its power.
func (p *parser) factor(depth int) (symbol, *ParseError) {
	base, err := p.base(depth)
	if err != nil {
		return base, err
	}
	start := p.pos
	n, err := p.power()
	if err != nil {
		return base, err
	}
	if n > maxUnitPower || n < -maxUnitPower {
		return base, p.fail(start, p.pos, "the power "+strconv.Itoa(n), fmt.Sprintf("powers of units go up to %d", maxUnitPower))
	}
	return multiply(symbol{num: 1, den: 1}, base, n), nil
}

func (p *parser) base(depth int) (symbol, *ParseError) {
	if p.peek() != '(' {
		return p.name()
	}
	if depth == maxNesting {
		return symbol{}, p.fail(p.pos, len(p.runes), "too many brackets", "one pair of brackets below the line is enough")
	}
	open := p.pos
	p.pos++
	p.spaces()
	in, err := p.product(depth + 1)
	if err != nil {
		return in, err
	}
	p.spaces()
	if p.peek() != ')' {
		return in, p.fail(open, len(p.runes), "a bracket that is not closed", "")
	}
	p.pos++
	return in, nil
}

// name reads one unit symbol.
func (p *parser) name() (symbol, *ParseError) {
	start := p.pos
	for c := p.peek(); unicode.IsLetter(c) || c == '°' || c == '%'; c = p.peek() {
		p.pos++
	}
	name := string(p.runes[start:p.pos])
	if name == "" {
		return symbol{}, p.fail(start, len(p.runes), quote(string(p.runes[start:])), "a unit symbol is missing here")
	}
	if name == "deg" || name == "°" || name == "delta" {
		name = p.secondWord(name)
	}
	s, ok := lookup(name)
	if !ok {
		return s, p.unknown(start, name)
	}
	return s, nil
}

// secondWord joins "deg C" and "delta degF" inside an expression.
func (p *parser) secondWord(first string) string {
	m := secondWord.FindString(string(p.runes[p.pos:]))
	joined := temperatureName(first + m)
	if _, ok := lookup(joined); m == "" || !ok {
		return first
	}
	p.pos += len([]rune(m))
	return joined
}

var secondWord = regexp.MustCompile(`^ (?:°|deg ?)?[CFRK]`)

// power reads an exponent: ², ⁻², ^2, ^-2 or a plain digit.
func (p *parser) power() (int, *ParseError) {
	start := p.pos
	if p.peek() == '^' {
		p.pos++
	}
	var digits strings.Builder
	for {
		c := p.peek()
		if i := strings.IndexRune(superscripts, c); c != 0 && i >= 0 {
			c = rune("0123456789-"[len([]rune(superscripts[:i]))])
		}
		if (c < '0' || c > '9') && c != '-' {
			break
		}
		digits.WriteRune(c)
		p.pos++
	}
	if p.pos == start {
		return 1, nil
	}
	n, err := strconv.Atoi(digits.String())
	if err != nil {
		return 0, p.fail(start, p.pos, quote(string(p.runes[start:p.pos])), "a power of a unit is a whole number, such as m² or m^2")
	}
	if c := p.peek(); unicode.IsLetter(c) || c == '°' {
		return 0, p.fail(start, len(p.runes), "two units run together", "join units with · and put brackets below the line, as in W/(m²·K)")
	}
	return n, nil
}

const superscripts = "⁰¹²³⁴⁵⁶⁷⁸⁹⁻"

func quote(s string) string { return strconv.Quote(strings.TrimSpace(s)) }
