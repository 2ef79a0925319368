package calcnote

import (
	"fmt"
	"math"
	"regexp"
	"strconv"
	"strings"

	"stillair/checks"
	"stillair/checks/unit"
	"stillair/templates/drawing"
	"stillair/templates/pdf"
)

// notComputed stands where a number is missing; never a zero, never a blank.
const notComputed = unit.NotComputed

func (n *note) temp(k float64) string { return n.show(unit.Temperature, k, 1) }
func (n *note) diff(k float64) string { return n.show(unit.TemperatureDifference, k, 1) }

// watts is a heat beside others of which the largest is given.
func (n *note) watts(w, largest float64) string {
	return minus(drawing.HeatText(n.sys, unit.Power, w, largest))
}

// bareWatts is watts without the unit.
func (n *note) bareWatts(w, largest float64) string {
	return strings.TrimSuffix(n.watts(w, largest), unit.NoBreak+n.sys.Unit(unit.Power))
}

func (n *note) tempUnit() string { return n.sys.Unit(unit.Temperature) }
func (n *note) diffUnit() string { return n.sys.Unit(unit.TemperatureDifference) }

// show is Show with the minus sign of the note.
func (n *note) show(k unit.Kind, si float64, decimals int) string {
	return minus(n.sys.Show(k, si, decimals))
}

// bare is a number as Show writes it, without its unit.
func (n *note) bare(k unit.Kind, si float64, decimals int) string {
	s := n.show(k, si, decimals)
	if i := strings.Index(s, unit.NoBreak); i > 0 {
		return s[:i]
	}
	return s
}

// pm is value ± U.
func (n *note) pm(k, u float64) string {
	if u <= 0 {
		return n.temp(k)
	}
	return minus(n.sys.ShowPM(unit.Temperature, k, u))
}

// uncertainty is a U rounded up to two significant digits, with its unit.
func (n *note) uncertainty(u float64) string {
	up, decimals := unit.RoundUp(n.sys.Value(unit.TemperatureDifference, u))
	return strconv.FormatFloat(up, 'f', max(decimals, 0), 64) + unit.NoBreak + n.diffUnit()
}

// barePM is value ± U without units, for columns that name them once.
func (n *note) barePM(k, u float64) string {
	if u <= 0 {
		return n.bare(unit.Temperature, k, 1)
	}
	up, dec := unit.RoundUp(n.sys.Value(unit.TemperatureDifference, u))
	return n.bare(unit.Temperature, k, dec) + unit.NoBreak + "±" + unit.NoBreak + strconv.FormatFloat(up, 'f', max(dec, 0), 64)
}

// uncertaintyOf is the larger side of the uncertainty of a temperature: the one
// that is printed where one is.
func uncertaintyOf(t checks.Temp) float64 { return math.Max(t.PlusK, t.MinusK) }

// digits writes x with a number of significant digits, in TeX where a power
// of ten is needed.
func digits(x float64, sig int) string {
	if math.IsNaN(x) || math.IsInf(x, 0) {
		return `\text{` + notComputed + `}`
	}
	s := strconv.FormatFloat(x, 'e', sig-1, 64)
	mantissa, e, _ := strings.Cut(s, "e")
	exp, _ := strconv.Atoi(e)
	switch {
	case x == 0:
		return "0"
	case exp >= -3 && exp <= 4:
		return strconv.FormatFloat(x, 'f', max(0, sig-1-exp), 64)
	}
	return mantissa + ` \times 10^{` + strconv.Itoa(exp) + `}`
}

// plainDigits is digits for running text and tables: 2.054·10⁹.
func plainDigits(x float64, sig int) string {
	if math.IsNaN(x) || math.IsInf(x, 0) {
		return notComputed
	}
	s := minus(digits(x, sig))
	mantissa, exp, found := strings.Cut(s, ` \times 10^{`)
	if !found {
		return s
	}
	return mantissa + "·10" + superscript(strings.TrimSuffix(exp, "}"))
}

var (
	negative = regexp.MustCompile(`(^|[\s\x{00A0}\x{2009}(\[/±=…])-(\d)`)
	less     = regexp.MustCompile(`(\d) - (\d)`)
)

// minus writes the minus sign where a hyphen stands before a number. Ranges
// such as 1323-1329 and dates stay.
func minus(s string) string {
	if !strings.Contains(s, "-") {
		return s
	}
	return less.ReplaceAllString(negative.ReplaceAllString(s, "$1−$2"), "$1 − $2")
}

func superscript(s string) string {
	return strings.NewReplacer("-", "⁻", "0", "⁰", "1", "¹", "2", "²", "3", "³", "4", "⁴", "5", "⁵", "6", "⁶", "7", "⁷", "8", "⁸", "9", "⁹").Replace(s)
}

// rangeText tells a range with an open end where none is given.
func rangeText(symbol string, low, high float64) string {
	if high <= 0 {
		return fmt.Sprintf("%s ≥ %s", symbol, short(low))
	}
	return fmt.Sprintf("%s ≤ %s ≤ %s", short(low), symbol, short(high))
}

// short is a range bound: 0.1, 1e12 as 10¹², 2.2e4 as 2.2·10⁴.
func short(x float64) string {
	if x == 0 || math.Abs(x) >= 0.01 && math.Abs(x) < 1e4 {
		return strconv.FormatFloat(x, 'g', 4, 64)
	}
	m, e, _ := strings.Cut(strconv.FormatFloat(x, 'e', -1, 64), "e")
	exp, _ := strconv.Atoi(e)
	power := "10" + superscript(strconv.Itoa(exp))
	if m == "1" {
		return power
	}
	return m + "·" + power
}

var powerOfTen = regexp.MustCompile(`\b(\d+(?:\.\d+)?)e([+-]?\d{1,3})\b`)

// powers writes 1e9 as 10⁹ in running text.
func powers(s string) string {
	return powerOfTen.ReplaceAllStringFunc(s, func(m string) string {
		mantissa, e, _ := strings.Cut(m, "e")
		exp, _ := strconv.Atoi(e)
		power := "10" + superscript(strconv.Itoa(exp))
		if mantissa == "1" {
			return power
		}
		return mantissa + "·" + power
	})
}

var raised = regexp.MustCompile(`\b(L/)?(Ra|Gr|Pr|Nu|\d+)\^(?:\((\d/\d)\)|(\d))`)

// united finds a number and its unit with a plain space between them.
var united = regexp.MustCompile(`(\d) (Δ?°[CF]|K|W|kW|mm|m|s|min|h|kPa|Pa|%)([^\pL\d]|$)`)

// prose is running text as runs: minus signs, powers of ten, no break between
// number and unit, and Ra^(1/4) set as a formula.
func prose(s string) []pdf.Run {
	s = united.ReplaceAllString(minus(powers(s)), "$1"+unit.NoBreak+"$2$3")
	var out []pdf.Run
	at := 0
	for _, m := range raised.FindAllStringSubmatchIndex(s, -1) {
		head := s[at:m[0]]
		if m[2] >= 0 {
			head += s[m[2]:m[3]]
		}
		from, to := m[6], m[7]
		if from < 0 {
			from, to = m[8], m[9]
		}
		out = append(out, pdf.Run{Text: head}, inline(s[m[4]:m[5]]+"^{"+s[from:to]+"}"))
		at = m[1]
	}
	return append(out, pdf.Run{Text: s[at:]})
}

// tidySource closes the gaps that joined citations leave before a semicolon.
func tidySource(s string) string { return strings.ReplaceAll(strings.TrimSpace(s), " ;", ";") }

func orNone(s string) string {
	if strings.TrimSpace(s) == "" {
		return "none given"
	}
	return s
}

func plural(n int, one, many string) string {
	if n == 1 {
		return "1 " + one
	}
	return fmt.Sprintf("%d %s", n, many)
}

// capital starts a sentence.
func capital(s string) string {
	if s == "" {
		return s
	}
	r := []rune(s)
	return strings.ToUpper(string(r[0])) + string(r[1:])
}
