package unit

import (
	"regexp"
	"slices"
	"strings"
)

// number and its white space in a pattern that ECMA 262 and RE2 both read;
// special characters stand for themselves.
const (
	patternSpace  = "[ \u00a0]*"
	patternNumber = "^" + patternSpace + "[+\\-\u2212\u2013\u2010\u2011]?[0-9][0-9\u2009\u202f]*(\\.[0-9]+)?([eE][+\\-\u2212]?[0-9]+)?" + patternSpace
	// patternAny is the head of a unit expression that only Parse can judge.
	patternAny = "[A-Za-z(\u00b5\u03bc°][^,]*$"
)

// Pattern is a regular expression for the schema of the case file. Kinds of
// one plain unit list their units; the others take any unit expression.
func Pattern(k Kind) string {
	in := k.info()
	if !in.single {
		return patternNumber + patternAny
	}
	optional := ""
	if in.dim == (dim{}) {
		optional = "?"
	}
	return patternNumber + "(" + strings.Join(plainUnits(k), "|") + ")" + optional + patternSpace + "$"
}

// plainUnits lists the unit symbols of a kind, quoted for a pattern.
func plainUnits(k Kind) []string {
	var list []string
	for name, s := range symbols {
		if s.dim != k.info().dim || !s.fits(k) {
			continue
		}
		list = append(list, spelling.Replace(regexp.QuoteMeta(name)))
		if !s.prefix {
			continue
		}
		for p := range prefixes {
			list = append(list, string(p)+name)
		}
	}
	slices.Sort(list)
	return list
}

// spelling allows what temperatureName allows.
var spelling = strings.NewReplacer("deg", "deg ?", "°", "[°\u00ba\u02da] ?", "Δ", "(Δ|\u2206|delta ?)")

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
