package unit

import "math"

// symbol is a unit with its size in SI as num/den. Two whole numbers instead
// of one fraction keep decimal input exact: 1.5 mm is 1.5/1000, the double
// nearest to 0.0015.
type symbol struct {
	num, den float64
	dim      dim
	prefix   bool // takes SI prefixes
	scale    int  // temperature units: which scale, see below
}

// Temperature units. On a scale of degrees the same symbol can mean a place
// or a step, so Parse looks at the scale; kelvin and degrees Rankine count
// from absolute zero and mean both; a Δ marks a step.
const (
	noScale = iota
	absolute
	celsius
	fahrenheit
	step
)

// symbols lists what can be typed. Factors: NIST SP 811 (2008) appendix B,
// B.8 (exact ones in bold there): in, ft, lb, lbf, Btu(IT), cal(IT), psi, °F,
// °R, atm, bar; hp is the mechanical horsepower of 550 ft·lbf/s.
var symbols = func() map[string]symbol {
	var (
		kelvin = dim{0, 0, 0, 1}
		force  = dim{1, 1, -2}
		energy = dim{2, 1, -2}
	)
	t := map[string]symbol{
		"m":   {1, 1, dim{1}, true, 0},
		"g":   {1, 1000, dim{0, 1}, true, 0},
		"s":   {1, 1, dim{0, 0, 1}, true, 0},
		"W":   {1, 1, dim{2, 1, -3}, true, 0},
		"J":   {1, 1, energy, true, 0},
		"N":   {1, 1, force, true, 0},
		"Pa":  {1, 1, dim{-1, 1, -2}, true, 0},
		"bar": {100000, 1, dim{-1, 1, -2}, true, 0},
		"min": {60, 1, dim{0, 0, 1}, false, 0},
		"h":   {3600, 1, dim{0, 0, 1}, false, 0},
		"d":   {86400, 1, dim{0, 0, 1}, false, 0},
		"in":  {254, 10000, dim{1}, false, 0},
		"ft":  {3048, 10000, dim{1}, false, 0},
		"lb":  {45359237, 1e8, dim{0, 1}, false, 0},
		"lbf": {45359237 * 9.80665, 1e8, force, false, 0},
		"Btu": {105505585262, 1e8, energy, false, 0},
		"cal": {41868, 10000, energy, true, 0},
		"hp":  {horsepower, 1, dim{2, 1, -3}, false, 0},
		"psi": {psi, 1, dim{-1, 1, -2}, false, 0},
		"atm": {101325, 1, dim{-1, 1, -2}, false, 0},
		"rad": {1, 1, dim{0, 0, 0, 0, 1}, false, 0},
		"deg": {math.Pi, 180, dim{0, 0, 0, 0, 1}, false, 0},
		"%":   {1, 100, dim{}, false, 0},
		"K":   {1, 1, kelvin, false, absolute},
		"°R":  {10, 18, kelvin, false, absolute},
		"°C":  {1, 1, kelvin, false, celsius},
		"°F":  {10, 18, kelvin, false, fahrenheit},
		"Δ°C": {1, 1, kelvin, false, step},
		"Δ°F": {10, 18, kelvin, false, step},
		"ΔK":  {1, 1, kelvin, false, step},
	}
	for also, name := range aliases {
		t[also] = t[name]
	}
	return t
}()

// aliases are other spellings people use.
var aliases = map[string]string{
	"degC": "°C", "C": "°C", "℃": "°C",
	"degF": "°F", "F": "°F", "℉": "°F",
	"degR": "°R", "R": "°R",
	"degK": "K", "K": "K",
	"ΔdegC": "Δ°C", "ΔC": "Δ°C",
	"ΔdegF": "Δ°F", "ΔF": "Δ°F",
	"BTU": "Btu", "hr": "h", "sec": "s", "°": "deg", "inch": "in", "lbm": "lb",
}

var prefixes = map[rune]struct{ num, den float64 }{
	'G': {1e9, 1}, 'M': {1e6, 1}, 'k': {1e3, 1}, 'h': {100, 1},
	'd': {1, 10}, 'c': {1, 100}, 'm': {1, 1e3}, 'µ': {1, 1e6}, 'μ': {1, 1e6}, 'u': {1, 1e6},
}

// lookup finds a unit symbol, with or without an SI prefix.
func lookup(name string) (symbol, bool) {
	if s, ok := symbols[name]; ok {
		return s, true
	}
	r := []rune(name)
	if len(r) < 2 {
		return symbol{}, false
	}
	p, isPrefix := prefixes[r[0]]
	s, known := symbols[string(r[1:])]
	if !isPrefix || !known || !s.prefix {
		return symbol{}, false
	}
	s.num *= p.num
	s.den *= p.den
	return s, true
}
