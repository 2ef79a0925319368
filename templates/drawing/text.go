package drawing

import (
	"math"
	"strconv"
	"strings"

	"stillair/checks/unit"
)

// Character heights and line spacing in mm.
const (
	textSize  = 2.5             // capital letters, ISO 3098 series
	linePitch = 1.6 * textSize  // from baseline to baseline
	ascent    = 1.05 * textSize // of the highest small letters
	descent   = 0.34 * textSize
)

// capUnits is the height of the capitals of DejaVu Sans, whose em is 2048.
const capUnits = 1493

// advance holds the advance widths of DejaVu Sans for the characters space to
// tilde, in units of 1/2048 em.
var advance = [95]uint16{
	651, 821, 942, 1716, 1303, 1946, 1597, 563, 799, 799, 1024, 1716, 651, 739, 651, 690,
	1303, 1303, 1303, 1303, 1303, 1303, 1303, 1303, 1303, 1303, 690, 690, 1716, 1716, 1716, 1087,
	2048, 1401, 1405, 1430, 1577, 1294, 1178, 1587, 1540, 604, 604, 1343, 1141, 1767, 1532, 1612,
	1235, 1612, 1423, 1300, 1251, 1499, 1401, 2025, 1403, 1251, 1403, 799, 690, 799, 1716, 1024,
	1024, 1255, 1300, 1126, 1300, 1260, 721, 1300, 1298, 569, 569, 1186, 569, 1995, 1298, 1253,
	1300, 1300, 842, 1067, 803, 1298, 1212, 1675, 1212, 1212, 1075, 1303, 690, 1303, 1716,
}

// advanceMore holds those of other characters the drawings use.
var advanceMore = map[rune]uint16{
	'\u00A0': 651, '\u2009': 409, '\u202F': 409, '°': 1024, '·': 651, '²': 821, '³': 821,
	'±': 1716, '×': 1716, 'Ø': 1612, '–': 1024, 'Δ': 1401, 'ä': 1255, 'ö': 1253, 'ü': 1298,
	'⁻': 1081, '⁰': 821, '¹': 821, '⁴': 821, '⁵': 821, '⁶': 821, '⁷': 821, '⁸': 821, '⁹': 821, '−': 1716,
	'é': 1260, 'è': 1260, 'ß': 1290, 'Ä': 1401, 'Ö': 1612, 'Ü': 1499,
}

// TextWidth is the width in mm of a line of text with the given character
// height in mm, from the advance widths of DejaVu Sans without kerning. A
// character that is not in the table counts as a whole em, so the width errs
// on the large side. Most other sans serif faces, Liberation Sans among them,
// run narrower.
func TextWidth(s string, size float64) float64 {
	units := 0
	for _, r := range s {
		units += int(runeWidth(r))
	}
	return float64(units) / capUnits * size
}

func runeWidth(r rune) uint16 {
	if r >= ' ' && r <= '~' {
		return advance[r-' ']
	}
	if w, ok := advanceMore[r]; ok {
		return w
	}
	return 2048
}

// fit shortens a text to a width in mm, with an ellipsis when it had to.
func fit(s string, size, width float64) string {
	if TextWidth(s, size) <= width {
		return s
	}
	runes := []rune(s)
	for len(runes) > 0 {
		runes = runes[:len(runes)-1]
		short := strings.TrimRight(string(runes), " ,.") + "..."
		if TextWidth(short, size) <= width {
			return short
		}
	}
	return ""
}

// wrap breaks a text into at most two lines of a width in mm.
func wrap(s string, size, width float64) []string {
	if TextWidth(s, size) <= width {
		return []string{s}
	}
	words := strings.Fields(s)
	for n := len(words) - 1; n > 0; n-- {
		first := strings.Join(words[:n], " ")
		if TextWidth(first, size) <= width {
			return []string{first, fit(strings.Join(words[n:], " "), size, width)}
		}
	}
	return []string{fit(s, size, width)}
}

// lengthText is a length as it stands on a dimension line: without unit, at
// most five significant digits and a tenth of a millimetre (a thousandth of an
// inch) unless it is smaller.
func lengthText(sys unit.System, si float64) string {
	v := sys.Value(unit.Length, si)
	decimals := 1
	if sys == unit.US {
		decimals = 3
	}
	for decimals < 6 && math.Abs(v)*math.Pow10(decimals) < 10 {
		decimals++
	}
	text := strings.TrimSuffix(sys.Show(unit.Length, si, decimals), unit.NoBreak+sys.Unit(unit.Length))
	if strings.Contains(text, ".") {
		text = strings.TrimRight(strings.TrimRight(text, "0"), ".")
	}
	return text
}

// temperatureText is a temperature to the whole degree.
func temperatureText(sys unit.System, k float64) string {
	return sys.Show(unit.Temperature, k, 0)
}

// powerText is a heat flow beside others of which the largest is given.
func powerText(sys unit.System, w, largest float64) string {
	return HeatText(sys, unit.Power, w, largest)
}

// Below leastPlain, and from mostPlain on, heats are written with a power of
// ten.
const (
	leastPlain = 1e-3
	mostPlain  = 1e9
)

// HeatText is a heat, or a heat per length, beside others of which the largest
// is given: at least three significant digits of that, the same decimals for
// all; where the largest is very small or very large a power of ten, such as
// 1.00·10⁻⁶ W.
func HeatText(sys unit.System, k unit.Kind, si, largest float64) string {
	a := math.Abs(sys.Value(k, largest))
	switch {
	case a > 0 && a < leastPlain, a >= mostPlain:
		return scientific(sys.Value(k, si)) + unit.NoBreak + sys.Unit(k)
	case a == 0, a >= 100 && a < 1000:
		return sys.Show(k, si, 1)
	case a >= 1000:
		return sys.Show(k, si, 0)
	}
	return sys.Show(k, si, 2-int(math.Floor(math.Log10(a))))
}

var raised = strings.NewReplacer("-", "⁻", "0", "⁰", "1", "¹", "2", "²", "3", "³", "4", "⁴", "5", "⁵", "6", "⁶", "7", "⁷", "8", "⁸", "9", "⁹")

// scientific is a number of three significant digits with a power of ten.
func scientific(v float64) string {
	mantissa, e, _ := strings.Cut(strconv.FormatFloat(v, 'e', 2, 64), "e")
	exponent, err := strconv.Atoi(e)
	switch {
	case v == 0:
		return "0"
	case err != nil: // no finite number
		return unit.NotComputed
	}
	return mantissa + "·10" + raised.Replace(strconv.Itoa(exponent))
}

// shareText is a share of a whole, 0..1, in percent to one decimal.
func shareText(share float64) string { return unit.SI.Show(unit.Percent, share, 1) }

// scaleText is a scale in the form of ISO 5455: "1:20", "1:1", "5:1".
func scaleText(scale float64) string {
	if scale >= 1 {
		return strconv.FormatFloat(math.Round(scale), 'f', -1, 64) + ":1"
	}
	return "1:" + strconv.FormatFloat(math.Round(1/scale), 'f', -1, 64)
}

// scales lists the scales of ISO 5455 (1, 2 and 5 times powers of ten) from
// the largest to the smallest that any body of this program can need.
func scales() []float64 {
	var list []float64
	for e := 5; e >= -9; e-- {
		for _, m := range []float64{5, 2, 1} {
			n := m * math.Pow10(e)
			if e < 0 {
				n = 1 / (10 / m * math.Pow10(-e-1)) // 1:2, 1:5, 1:10
			}
			list = append(list, n)
		}
	}
	return list
}
