package table

import (
	"math"
	"strconv"
	"strings"

	"stillair/checks/unit"
)

// number shows a value that is already in display units.
func number(v float64, decimals int) string { return unit.SI.Show(unit.Ratio, v, decimals) }

// up shows an uncertainty, rounded up at the last decimal shown.
func up(v float64, decimals int) string {
	scale := math.Pow10(decimals)
	return number(math.Ceil(v*scale-1e-9)/scale, decimals)
}

// decimalsFor is the number of decimals that leaves the largest uncertainty of
// a column two significant digits, 0 to 2.
func decimalsFor(us ...float64) int {
	biggest := 0.0
	for _, u := range us {
		biggest = math.Max(biggest, u)
	}
	switch {
	case biggest == 0:
		return 1
	case biggest >= 9.95:
		return 0
	case biggest >= 0.995:
		return 1
	}
	return 2
}

// power shows a number of many magnitudes with three digits: 2.05·10⁹.
func power(v float64) string {
	if a := math.Abs(v); v == 0 || a >= 0.01 && a < 1e5 {
		return number(v, max(0, 2-int(math.Floor(math.Log10(math.Max(a, 1))))))
	}
	digits, exponent, _ := strings.Cut(strconv.FormatFloat(v, 'e', 2, 64), "e")
	n, _ := strconv.Atoi(exponent)
	return digits + "·10" + superscript(n)
}

func superscript(n int) string {
	return strings.NewReplacer("-", "⁻", "0", "⁰", "1", "¹", "2", "²", "3", "³", "4", "⁴",
		"5", "⁵", "6", "⁶", "7", "⁷", "8", "⁸", "9", "⁹").Replace(strconv.Itoa(n))
}

// value converts SI to the units of the report.
func (p *page) value(k unit.Kind, si float64) float64 { return p.opt.Units.Value(k, si) }

// unit names the unit of the report.
func (p *page) unit(k unit.Kind) string { return p.opt.Units.Unit(k) }
