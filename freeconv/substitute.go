package freeconv

import (
	"math"
	"strconv"
	"strings"
)

// substituter gives a function that writes an equation with numbers for its
// symbols. A symbol that follows a number or a bracket is written \,\mathrm{Ra}
// there, and the thin space becomes a multiplication dot. Angles are in degrees.
func substituter(equation string) func(Input) string {
	return func(in Input) string {
		values := []struct {
			symbol string
			value  float64
		}{
			{`\mathrm{Ra}`, in.Ra},
			{`\mathrm{Pr}`, in.Pr},
			{`\frac{L}{D}`, in.LD},
			{`\theta`, in.Theta},
		}
		var pairs []string
		for _, v := range values {
			n := texNumber(v.value)
			pairs = append(pairs, `\,`+v.symbol, ` \cdot `+n, v.symbol, n)
		}
		return strings.NewReplacer(pairs...).Replace(equation)
	}
}

// texNumber writes x with four significant digits; a number with a power of
// ten is put in brackets so that an exponent may follow.
func texNumber(x float64) string {
	if math.IsNaN(x) || math.IsInf(x, 0) {
		return `\mathrm{-}`
	}
	if x == 0 || math.Abs(x) >= 1e-2 && math.Abs(x) < 1e4 {
		return strconv.FormatFloat(round(x, 4), 'f', -1, 64)
	}
	mantissa, exponent, _ := strings.Cut(strconv.FormatFloat(x, 'e', 3, 64), "e")
	n, err := strconv.Atoi(exponent)
	if err != nil {
		return mantissa
	}
	return `\left( ` + mantissa + ` \cdot 10^{` + strconv.Itoa(n) + `} \right)`
}

// round keeps n significant digits.
func round(x float64, n int) float64 {
	r, err := strconv.ParseFloat(strconv.FormatFloat(x, 'g', n, 64), 64)
	if err != nil {
		return x
	}
	return r
}

// plain writes a number for a sentence with up to three significant digits:
// 0.109, 3.2e3, 1e11.
func plain(x float64) string {
	if x == 0 || math.Abs(x) >= 1e-2 && math.Abs(x) < 1e3 {
		return strconv.FormatFloat(round(x, 3), 'f', -1, 64)
	}
	mantissa, exponent, _ := strings.Cut(strconv.FormatFloat(round(x, 3), 'e', -1, 64), "e")
	n, err := strconv.Atoi(exponent)
	if err != nil {
		return mantissa
	}
	return mantissa + "e" + strconv.Itoa(n)
}

// threeDigits writes x with three significant digits, zeros included: 3.80.
func threeDigits(x float64) string {
	if x == 0 {
		return "0"
	}
	decimals := 2 - int(math.Floor(math.Log10(math.Abs(x))))
	if decimals < 0 {
		return strconv.FormatFloat(round(x, 3), 'f', 0, 64)
	}
	if decimals > 6 {
		return plain(x)
	}
	return strconv.FormatFloat(x, 'f', decimals, 64)
}
