package unit

import (
	"errors"
	"math"
	"regexp"
	"slices"
	"strings"
	"testing"

	"pgregory.net/rapid"
)

// pieces of quantities, right and wrong; whole units come often enough that
// many strings can be read.
var pieces = []string{"1", "0", "25", "300", ".5", ",", "-", "−", "+", "e3", "E-2", "e31", "9", " ", " ", "\u00a0", "\u2009", "\u202f500", "0x1",
	"W", "kW", "mW", "m", "mm", "h", "s", "Btu", "ft", "in", "K", "°C", "°F", "º", "deg", "deg C", "degF", "C", "F", "R", "Δ", "∆°F", "delta ", "delta", "ton", "furlong",
	"Pa", "kPa", "psi", "µm", "μm", "cal", "hp", "lb", "%", "rad", "d", "(", ")", "/", "·", "⋅", "*", "×", "^", "²", "⁻", "³", "2", "-2", "^-2", "x", "\t"}

func quantityText(t *rapid.T) string {
	list := rapid.SliceOfN(rapid.SampledFrom(pieces), 1, 9).Draw(t, "pieces")
	if rapid.Bool().Draw(t, "number first") {
		list = slices.Insert(list, 0, rapid.SampledFrom([]string{"1 ", "0.5 ", "12\u2009345 ", "-2e3", "7"}).Draw(t, "number"))
	}
	return strings.Join(list, "")
}

// expressionText is a unit expression that is mostly right.
func expressionText(t *rapid.T, depth int) string {
	var b strings.Builder
	for i := range rapid.IntRange(1, 3).Draw(t, "factors") {
		if i > 0 {
			b.WriteString(rapid.SampledFrom([]string{"·", " ", "/", " / ", " * ", "  "}).Draw(t, "join"))
		}
		if depth < 3 && rapid.IntRange(0, 3).Draw(t, "bracket") == 0 {
			b.WriteString("(" + expressionText(t, depth+1) + ")")
		} else {
			b.WriteString(rapid.SampledFrom([]string{"W", "m", "K", "°C", "deg C", "delta deg F", "delta C", "delta R", "Δ°F", "kW", "ft", "h", "cal", "kcal", "ton", "Btu", "deg", "%"}).Draw(t, "unit"))
		}
		b.WriteString(rapid.SampledFrom([]string{"", "", "2", "²", "^2", "^-1", "⁻²", "^7", "02"}).Draw(t, "power"))
	}
	return b.String()
}

// Whatever the schema takes the reader takes, or refuses for its dimension or
// size alone; whatever the reader takes the schema takes.
func TestPatternAndParseAgree(t *testing.T) {
	var patterns [kinds]*regexp.Regexp
	for k := range kinds {
		patterns[k] = regexp.MustCompile(Pattern(k))
	}
	both := 0
	rapid.Check(t, func(t *rapid.T) {
		text := quantityText(t)
		if rapid.Bool().Draw(t, "expression") {
			text = "2.5 " + expressionText(t, 0)
		}
		for k := range kinds {
			_, err := Parse(text, k)
			takes := patterns[k].MatchString(text)
			switch {
			case err == nil && !takes:
				t.Fatalf("the pattern of %s refuses %q, which Parse reads", k.Name(), text)
			case err != nil && takes && !ofSize(err, text, k):
				t.Fatalf("the pattern of %s takes %q: %v", k.Name(), text, err)
			case takes:
				both++
			}
		}
	})
	if both < 20 {
		t.Errorf("only %d strings were taken", both)
	}
}

// ofSize reports whether a text is well formed and refused for its dimension,
// its magnitude or its length.
func ofSize(err error, text string, k Kind) bool {
	var pe *ParseError
	if !errors.As(err, &pe) || info[k].single {
		return false
	}
	p := &parser{kind: k, runes: normalise(text)}
	value, numberError := p.number()
	p.spaces()
	got, unitError := p.product(0)
	if numberError != nil || unitError != nil || p.pos < len(p.runes) {
		return len(p.runes) > maxText
	}
	return got.dim != info[k].dim || math.IsInf(value*got.num, 0) || math.IsNaN(value*got.num/got.den)
}

func TestPatternRefusesUnknownUnits(t *testing.T) {
	for text, k := range map[string]Kind{"1 ton": Power, "0x10 W": Power, "1 Watt": Power, "5 W/mK": Conductivity, "5 W/(m·K": Conductivity,
		"5 W·": Power, "5 furlong": Length, "5 ((W))": Power, "5 m2K": Coefficient, "1e31 W": Power, "1,5 W": Power} {
		if regexp.MustCompile(Pattern(k)).MatchString(text) {
			t.Errorf("the pattern of %s takes %q", k.Name(), text)
		}
	}
}

// The nearest right unit for what people type instead.
func TestNearestUnit(t *testing.T) {
	for _, c := range []struct {
		text          string
		kind          Kind
		nearest, hint string
	}{
		{"250 Watt", Power, "W", "write 250 W"},
		{"250 watts", Power, "W", "write 250 W"},
		{"250 w", Power, "W", "write W"},
		{"5 KW", Power, "kW", "write kW"},
		{"40 Celsius", Temperature, "°C", "write 40 °C"},
		{"40 oC", Temperature, "°C", "write 40 °C"},
		{"40 degrees C", Temperature, "°C", "write 40 °C"},
		{"-5.5 degrees Celsius", Temperature, "°C", "write -5.5 °C"},
		{"100 deg. F", Temperature, "°F", "write 100 °F"},
		{"300 Kelvin", Temperature, "K", "write 300 K"},
		{"10 degrees C", TemperatureDifference, "K", "write 10 K"},
		{"30 kelvins", TemperatureDifference, "K", "write 30 K"},
		{"600 millimeters", Length, "mm", "write 600 mm"},
		{"30 degrees", Angle, "deg", "write 30 deg"},
		{"80 percent", Percent, "%", "write 80 %"},
		{"700 watt/m²", Flux, "W", "write W"},
		{"14.7 psia", Pressure, "psi", "write 14.7 psi"},
		{"0 barg", Pressure, "", "gauge pressure"},
		{"0 bar(g)", Pressure, "", "gauge pressure"},
		{"0 bar g", Pressure, "", "gauge pressure"},
		{"0 psig", Pressure, "", "gauge pressure"},
		{"250 VA", Power, "", "apparent"},
		{"2 kVA", Power, "", "apparent"},
		{"250 zorks", Power, "", ""},
	} {
		_, err := Parse(c.text, c.kind)
		var pe *ParseError
		if !errors.As(err, &pe) {
			t.Errorf("%q was read", c.text)
			continue
		}
		if pe.Nearest != c.nearest || !strings.Contains(pe.Hint, c.hint) || c.hint == "" && pe.Hint != "" {
			t.Errorf("%q: nearest %q, hint %q; want %q, %q", c.text, pe.Nearest, pe.Hint, c.nearest, c.hint)
		}
		if !pe.InUnit || pe.Offset < 1 || pe.Offset+pe.Width > len([]rune(c.text)) {
			t.Errorf("%q: place %d+%d", c.text, pe.Offset, pe.Width)
		}
	}
}

func TestPatternKnowsEverySymbol(t *testing.T) {
	any := regexp.MustCompile("^(?:" + anyUnit() + ")$")
	for name := range symbols {
		if !any.MatchString(name) {
			t.Errorf("the pattern of unit expressions lacks %q", name)
		}
	}
}
