package unit

import (
	"math"
	"strconv"
	"strings"
)

// System is the set of units results are shown in. Values are held in SI
// units whatever is shown.
type System int

// SI shows metric units; US the inch-pound units of the trade. Electrical
// dissipation is shown in watts in both.
const (
	SI System = iota
	US
)

// NoBreak is the no-break space between number and unit, Thin the thin space
// between groups of three digits.
const (
	NoBreak = "\u00A0"
	Thin    = "\u2009"
)

// NotComputed is shown for a value that is not a finite number.
const NotComputed = "not computed"

// SystemOf reads the word of a case file or setting: "SI" or "US".
func SystemOf(word string) System {
	if strings.EqualFold(word, "US") {
		return US
	}
	return SI
}

// String is the word a case file uses.
func (s System) String() string {
	if s == US {
		return "US"
	}
	return "SI"
}

func (s System) display(k Kind) display {
	if s == US {
		return k.info().us
	}
	return k.info().si
}

// Value is the number in the unit that Unit names.
func (s System) Value(k Kind, si float64) float64 {
	d := s.display(k)
	return (si - d.zero) / d.size
}

// Unit is the symbol of the unit shown for a kind; empty for a plain number.
func (s System) Unit(k Kind) string { return s.display(k).symbol }

// Show is the number with its unit, rounded to decimals (negative: to tens,
// hundreds ...), halves away from zero (ISO 80000-1:2009, B.3, rule B).
func (s System) Show(k Kind, si float64, decimals int) string {
	v := s.Value(k, si)
	if math.IsNaN(v) || math.IsInf(v, 0) {
		return NotComputed
	}
	return join(group(round(v, decimals)), s.Unit(k))
}

// ShowPM is the value with its uncertainty u (SI, a difference for
// temperatures): u rounded up to two significant digits, the value to the same
// decimal place (JCGM 100:2008, 7.2.6).
func (s System) ShowPM(k Kind, value, u float64) string {
	of := k
	if k == Temperature {
		of = TemperatureDifference
	}
	width := math.Abs(s.Value(of, u))
	if math.IsNaN(width) || math.IsInf(width, 0) {
		return NotComputed
	}
	up, decimals := RoundUp(width)
	shown := s.Show(k, value, decimals)
	if shown == NotComputed {
		return shown
	}
	return shown + NoBreak + "±" + NoBreak + join(group(round(up, decimals)), s.Unit(of))
}

// RoundUp rounds an uncertainty up to two significant digits and gives the
// number of decimals that shows it. What is already there stays.
func RoundUp(u float64) (up float64, decimals int) {
	if u <= 0 || math.IsNaN(u) || math.IsInf(u, 0) {
		return 0, 1
	}
	decimals = 1 - int(math.Floor(math.Log10(u)))
	digits := math.Ceil(u*math.Pow10(decimals) - 1e-9)
	if digits >= 100 { // 9.96 becomes 10, not 10.0
		decimals--
		digits = math.Ceil(digits / 10)
	}
	return digits / math.Pow10(decimals), decimals
}

// round gives the decimal digits of v. The value is first read to 12
// significant digits, so that a half which arithmetic left a hair below is
// still a half.
func round(v float64, decimals int) string {
	neat, _ := strconv.ParseFloat(strconv.FormatFloat(v, 'e', 11, 64), 64)
	scale := math.Pow10(-decimals)
	if decimals >= 0 {
		scale = math.Pow10(decimals)
		neat = math.Round(nudge(neat*scale)) / scale
	} else {
		neat = math.Round(nudge(neat/scale)) * scale
	}
	text := strconv.FormatFloat(neat, 'f', max(decimals, 0), 64)
	if strings.Trim(text, "-0.") == "" {
		return strings.TrimPrefix(text, "-")
	}
	return text
}

// nudge reads a scaled value to 12 significant digits.
func nudge(v float64) float64 {
	n, _ := strconv.ParseFloat(strconv.FormatFloat(v, 'e', 11, 64), 64)
	return n
}

// group puts thin spaces between groups of three when a side of the point has
// five digits or more (NIST SP 811, 10.5.3).
func group(digits string) string {
	sign := ""
	if strings.HasPrefix(digits, "-") {
		sign, digits = "-", digits[1:]
	}
	whole, fraction, point := strings.Cut(digits, ".")
	if len(whole) >= 5 {
		for i := len(whole) - 3; i > 0; i -= 3 {
			whole = whole[:i] + Thin + whole[i:]
		}
	}
	if point {
		whole += "." + fraction
	}
	return sign + whole
}

func join(number, symbol string) string {
	switch symbol {
	case "":
		return number
	case "°": // the degree of an angle follows without a space
		return number + symbol
	}
	return number + NoBreak + symbol
}
