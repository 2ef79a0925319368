package unit

import (
	"maps"
	"strings"
)

// unknown explains a unit symbol that does not exist.
func (p *parser) unknown(start int, name string) *ParseError {
	err := p.fail(start, p.pos, "the unknown unit "+quote(name), "")
	if name == "mK" || name == "mC" {
		err.Hint = "write m·K for metre kelvin"
		return err
	}
	if reason := refused(name); reason != "" {
		err.Hint = reason
		return err
	}
	if right := rightSpelling(name); right != "" {
		err.Hint, err.Nearest = "write "+right, right
		if strings.EqualFold(name, right) {
			err.Hint = "capital and small letters differ: write " + right
		}
	}
	return err
}

// suggest adds the unit that was most likely meant when the whole text behind
// the number is a word people use for a unit.
func (p *parser) suggest(err *ParseError, unitAt int) {
	typed := strings.Trim(string(p.runes[unitAt:]), " ")
	if reason := refused(typed); reason != "" {
		err.Found, err.Hint, err.Nearest = quote(typed), reason, ""
		err.Offset, err.Width = unitAt, len([]rune(typed))
		return
	}
	right := rightSpelling(typed)
	if right == "" || right == typed {
		return
	}
	number := strings.Trim(string(p.runes[:unitAt]), " ")
	err.Offset, err.Width = unitAt, len([]rune(typed))
	if _, again := Parse(number+" "+right, p.kind); again != nil {
		other := again.(*ParseError) // Parse makes no other error
		err.Found, err.Hint, err.Nearest = other.Found, other.Hint, other.Nearest
		return
	}
	err.Nearest = right
	if !strings.EqualFold(typed, right) { // capital letters have their own words
		err.Hint = "write " + number + " " + right
	}
}

// refused tells why a unit that people use is not read; "" for others.
func refused(typed string) string {
	plain := strings.NewReplacer("(", "", ")", "", " ", "").Replace(strings.ToLower(typed))
	switch plain {
	case "barg", "mbarg", "psig", "kpag", "mpag", "pag", "atmg", "barü", "atü":
		return "a gauge pressure counts from the air pressure around it: write the absolute pressure, such as 101.3 kPa"
	case "va", "kva", "mva", "var", "kvar":
		return "apparent and reactive power are no heat: write the heat that is turned out, in W"
	}
	return ""
}

// rightSpelling is the unit symbol that a word stands for; "" when nobody
// knows.
func rightSpelling(typed string) string {
	low := strings.Join(strings.Fields(strings.ToLower(typed)), " ")
	if right := spoken[low]; right != "" {
		return right
	}
	var near []string
	for _, try := range usual {
		if strings.EqualFold(try, typed) {
			near = append(near, try)
		}
	}
	if len(near) == 1 {
		return near[0]
	}
	return ""
}

// usual units, for slips of capital and small letters.
var usual = []string{"kW", "W", "mm", "cm", "m", "km", "in", "ft", "Pa", "kPa", "hPa", "bar", "mbar", "psi", "s", "min", "h",
	"Btu", "kcal", "hp", "deg", "rad", "K"}

// spoken lists words that stand for a unit, in small letters.
var spoken = func() map[string]string {
	words := map[string]string{
		"watt": "W", "kilowatt": "kW", "milliwatt": "mW", "horsepower": "hp",
		"metre": "m", "meter": "m", "millimetre": "mm", "millimeter": "mm", "centimetre": "cm", "centimeter": "cm",
		"kilometre": "km", "kilometer": "km", "inche": "in", "foot": "ft", "feet": "ft",
		"second": "s", "minute": "min", "hour": "h", "hr": "h", "sec": "s", "day": "d",
		"pascal": "Pa", "kilopascal": "kPa", "psia": "psi", "bara": "bar", "atmosphere": "atm",
		"degree": "deg", "radian": "rad", "percent": "%", "per cent": "%", "pct": "%",
		"kelvin": "K", "k": "K", "°k": "K", "deg kelvin": "K",
	}
	for word, unit := range maps.Clone(words) {
		if len(word) > 2 {
			words[word+"s"] = unit
		}
	}
	for letter, name := range map[string]string{"c": "celsius", "f": "fahrenheit"} {
		unit := "°" + strings.ToUpper(letter)
		for _, before := range []string{"", "°", "° ", "o", "deg", "deg ", "deg. ", "degree ", "degrees "} {
			words[before+letter], words[before+name] = unit, unit
		}
	}
	words["centigrade"], words["degrees centigrade"] = "°C", "°C"
	return words
}()
