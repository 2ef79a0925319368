package unit

import (
	"regexp"
	"slices"
	"strings"
)

// Pieces of a pattern that ECMA 262 and RE2 both read; special characters stand
// for themselves. Look-alikes are those of normalise.
const (
	patternSpaces = "[ \u00a0\t]*"
	patternSpace  = "[ \u00a0\t]"
	patternMinus  = "\\-\u2212\u2013\u2010\u2011"
	patternDegree = "[°\u00ba\u02da]"
	patternDelta  = "[Δ\u2206]"

	patternExponent = "[eE][+" + patternMinus + "]?(?:0{0,2}(?:30|[12][0-9])|0{0,3}[0-9])"
	patternNumber   = "^" + patternSpaces + "[+" + patternMinus + "]?(?:[0-9]{1,3}(?:[\u2009\u202f][0-9]{3})+|[0-9]+)" +
		"(?:\\.[0-9]+)?(?:" + patternExponent + ")?" + patternSpaces

	patternPower = "(?:\\^?[⁻" + patternMinus + "]?[0⁰]*[0-6⁰¹²³⁴⁵⁶])?"
	patternJoin  = "(?:" + patternSpaces + "[·/\u22c5\u2219\u2022*\u00d7]" + patternSpaces + "|" + patternSpace + "+)"

	// patternTemperature takes the units of temperature and of angle inside an
	// expression: "deg F", "Δ°C", "delta deg F".
	patternTemperature = "[CFKR℃℉]|(?:" + patternDegree + "|deg)[CFR]?|degK|" +
		"(?:" + patternDelta + "|delta" + patternSpace + ")(?:K|(?:" + patternDegree + "|deg)?[CF])|delta" + patternSpace + "deg" + patternSpace + "[CF]"
)

// MaxText is the length of a quantity in characters that Parse reads at most.
const MaxText = maxText

// Pattern is a regular expression for the schema of the case file. What it
// takes Parse reads, apart from the dimension of a unit expression, numbers
// beyond what a computer holds, and texts longer than MaxText.
func Pattern(k Kind) string {
	in := k.info()
	if !in.single {
		return patternNumber + expression(0) + patternSpaces + "$"
	}
	optional := ""
	if in.dim == (dim{}) {
		optional = "?"
	}
	return patternNumber + "(?:" + strings.Join(plainUnits(k), "|") + ")" + optional + patternSpaces + "$"
}

// expression is the pattern of units joined by ·, a space or /, with brackets.
func expression(depth int) string {
	base := "(?:" + anyUnit() + ")"
	if depth < maxNesting {
		base = "(?:" + anyUnit() + "|\\(" + patternSpaces + expression(depth+1) + patternSpaces + "\\))"
	}
	factor := base + patternPower
	return factor + "(?:" + patternJoin + factor + ")*"
}

// anyUnit takes every unit symbol. Those of temperature are written together,
// to keep the schema short.
func anyUnit() string {
	var plain, prefixed []string
	for name, s := range symbols {
		switch {
		case s.prefix:
			prefixed = append(prefixed, name)
		case s.scale == noScale && name != "°" && name != "deg":
			plain = append(plain, name)
		}
	}
	slices.Sort(plain)
	slices.Sort(prefixed)
	return "[" + prefixLetters() + "]?(?:" + strings.Join(prefixed, "|") + ")|" + strings.Join(plain, "|") + "|" + patternTemperature
}

func prefixLetters() string {
	var letters []rune
	for p := range prefixes {
		letters = append(letters, p)
	}
	slices.Sort(letters)
	return string(letters)
}

// plainUnits lists the unit symbols of a kind, quoted for a pattern.
func plainUnits(k Kind) []string {
	var list []string
	for name, s := range symbols {
		if s.dim != k.info().dim || !s.fits(k) {
			continue
		}
		spelt := regexp.QuoteMeta(name)
		switch {
		case k == Temperature || k == TemperatureDifference:
			spelt = severalSpellings.Replace(spelt)
		case s.prefix:
			spelt = "[" + prefixLetters() + "]?" + spelt
		default:
			spelt = lookAlike.Replace(spelt)
		}
		list = append(list, spelt)
	}
	slices.Sort(list)
	return list
}

// lookAlike allows what normalise allows; severalSpellings allows what
// temperatureName does beside it.
var (
	lookAlike        = strings.NewReplacer("°", patternDegree, "Δ", patternDelta)
	severalSpellings = strings.NewReplacer("deg", "deg"+patternSpace+"?", "°", patternDegree+patternSpace+"?",
		"Δ", "(?:"+patternDelta+"|delta"+patternSpace+"?)")
)

// fits says whether a temperature unit can carry a place or a step.
func (s symbol) fits(k Kind) bool {
	switch k {
	case Temperature:
		return s.scale != step
	case TemperatureDifference:
		return s.scale == absolute || s.scale == step
	}
	return true
}
