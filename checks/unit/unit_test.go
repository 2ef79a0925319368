package unit

import (
	"errors"
	"fmt"
	"math"
	"regexp"
	"strings"
	"testing"

	"pgregory.net/rapid"
)

// Expected values follow from the exact definitions in NIST SP 811 (2008),
// appendix B.8, worked with decimals by hand; the table there rounds to seven
// digits, which is the tolerance where a quotient does not end.
var good = []struct {
	text string
	kind Kind
	want float64
	tol  float64 // relative; 0 means the very same double
}{
	{"250 W", Power, 250, 0},
	{"0.25 kW", Power, 250, 0},
	{"250W", Power, 250, 0},
	{"1 Btu/h", Power, 0.2930711, 5e-7}, // SP 811 B.8, Btu(IT) per hour
	{"40 °C", Temperature, 313.15, 0},
	{"40 degC", Temperature, 313.15, 0},
	{"40 deg C", Temperature, 313.15, 0},
	{"40 C", Temperature, 313.15, 0},
	{"40\u00A0°C", Temperature, 313.15, 0},
	{"\u221215 °C", Temperature, 258.15, 1e-15},
	{"104 °F", Temperature, 313.15, 1e-15},
	{"104 degF", Temperature, 313.15, 1e-15},
	{"104 F", Temperature, 313.15, 1e-15},
	{"300 K", Temperature, 300, 0},
	{"540 °R", Temperature, 300, 0},
	{"10 K", TemperatureDifference, 10, 0},
	{"18 Δ°F", TemperatureDifference, 10, 0},
	{"18 delta degF", TemperatureDifference, 10, 0},
	{"18 °R", TemperatureDifference, 10, 0},
	{"10 Δ°C", TemperatureDifference, 10, 0},
	{"12 in", Length, 0.3048, 0},
	{"600 mm", Length, 0.6, 0},
	{"1.5 mm", Length, 0.0015, 0},
	{"2.5 cm", Length, 0.025, 0},
	{"400 ft", Altitude, 121.92, 0},
	{"1.2 km", Altitude, 1200, 0},
	{"0.85", Ratio, 0.85, 0},
	{"10 %", Percent, 0.1, 0},
	{"85%", Percent, 0.85, 0},
	{"700 W/m²", Flux, 700, 0},
	{"700 W/m2", Flux, 700, 0},
	{"700 W/m^2", Flux, 700, 0},
	{"700 W·m⁻²", Flux, 700, 0},
	{"700 W m^-2", Flux, 700, 0},
	{"1 Btu/(h·ft²·°F)", Coefficient, 5.678263, 5e-7}, // SP 811 B.8
	{"5 W/(m2*K)", Coefficient, 5, 0},
	{"5 W/(m²·°C)", Coefficient, 5, 0},
	{"5 W/(m² K)", Coefficient, 5, 0},
	{"0.05 W/(m·K)", Conductivity, 0.05, 0},
	{"0.05 W/m/K", Conductivity, 0.05, 0},
	{"50 mW/(m·K)", Conductivity, 0.05, 0},
	{"1 Btu·in/(h·ft²·°F)", Conductivity, 0.1442279, 5e-7}, // SP 811 B.8
	{"1 Btu/(hr·ft·deg F)", Conductivity, 1.730735, 5e-7},  // SP 811 B.8
	{"9.8 m·s⁻²·s", Velocity, 9.8, 0},
	{"101.3 kPa", Pressure, 101300, 0},
	{"1013 hPa", Pressure, 101300, 0},
	{"14.7 psi", Pressure, 101353, 1e-5}, // 1 psi = 6894.757 Pa, SP 811 B.8
	{"1 bar", Pressure, 1e5, 0},
	{"1 atm", Pressure, 101325, 0},
	{"10 s", Time, 10, 0},
	{"2 min", Time, 120, 0},
	{"8 h", Time, 28800, 0},
	{"45 deg", Angle, math.Pi / 4, 1e-15},
	{"45°", Angle, math.Pi / 4, 1e-15},
	{"75 W/m", HeatPerLength, 75, 0},
	{"1 Btu/(h·ft)", HeatPerLength, 0.9615194, 5e-7}, // 0.2930711/0.3048,
	{"1 lb/ft³", Density, 16.01846, 5e-7},            // SP 811 B.8
	{"1 Btu/(lb·°F)", SpecificHeat, 4186.8, 1e-12},   // exact, SP 811 B.8
	{"0.3 K/W", Resistance, 0.3, 0},
	{"12\u2009345 Pa", Pressure, 12345, 0},
	{"1.2e3 W", Power, 1200, 0},
	{"1 hp", Power, 745.69987158227022, 1e-15},           // 550 ft·lbf/s; SP 811 B.8 prints 7.456999 E+02
	{"1 kcal/h", Power, 4186.8 / 3600, 1e-15},            // calorie (IT) 4.1868 J exactly, SP 811 B.8
	{"0.04 kcal/(h·m·°C)", Conductivity, 0.04652, 1e-12}, // 0.04 × 4186.8/3600
}

func TestParseReads(t *testing.T) {
	for _, c := range good {
		got, err := Parse(c.text, c.kind)
		if err != nil {
			t.Errorf("%q: %v", c.text, err)
			continue
		}
		if math.Abs(got-c.want) > c.tol*math.Abs(c.want) {
			t.Errorf("%q = %v, want %v", c.text, got, c.want)
		}
	}
}

func TestParseRefuses(t *testing.T) {
	for _, c := range []struct {
		text          string
		kind          Kind
		message       string // part of the message
		offset, width int
	}{
		{"10 °C", TemperatureDifference, "write 10 K", 3, 2},
		{"18 °F", TemperatureDifference, "write 18 Δ°F or 10 K", 3, 2},
		{"18 Δ°F", Temperature, "a temperature has no Δ", 3, 3},
		{"250 W", Length, "found a power (W), expected a length, such as 600 mm", 4, 1},
		{"250 W", Temperature, "found a power (W), expected a temperature", 4, 1},
		{"600", Length, `found "600" without a unit, expected a length, such as 600 mm`, 0, 3},
		{"40", Temperature, "without a unit", 0, 2},
		{"1,5 W", Power, "write 1.5 W", 0, 3},
		{"1,500 W", Power, "write 1500 W or 1.500 W", 0, 5},
		{"NaN W", Power, "only finite numbers", 0, 3},
		{".inf", Ratio, "only finite numbers", 0, 4},
		{"-inf K", Temperature, "only finite numbers", 0, 4},
		{"0x10 W", Power, "hexadecimal", 0, 6},
		{"1e999 W", Power, "powers of ten beyond 30", 0, 5},
		{"1e99999999 W", Power, "", 0, 1},
		{strings.Repeat("9", 200) + " W", Power, "very long", 0, 202},
		{"5 m^99", Length, "powers of units go up to 6", 3, 3},
		{"5 W/(m²·K", Coefficient, "bracket that is not closed", 4, 5},
		{"5 W/m²·K", Coefficient, "write W/(m²·K)", 2, 6},
		{"5 W/m²K", Coefficient, "two units run together", 5, 2},
		{"5 W/m2K", Coefficient, "two units run together", 5, 2},
		{"0.05 W/mK", Conductivity, "write m·K", 7, 2},
		{"5 KW", Power, "write kW", 2, 2},
		{"5 furlong", Length, "unknown unit", 2, 7},
		{"1 500 W", Power, "without spaces", 0, 7},
		{"1/2 in", Length, "fractions", 0, 6},
		{"1-1/2 in", Length, "fractions", 0, 8},
		{".5", Ratio, "write a zero before", 0, 2},
		{"5. W", Power, "between digits", 0, 2},
		{"", Power, "found nothing", 0, 1},
		{"warm", Temperature, "begin with a number", 0, 4},
		{"5 W extra", Power, "unknown unit", 4, 5},
		{"5 W)", Power, "after the unit", 3, 1},
		{"5 /m", Length, "a unit symbol is missing", 2, 2},
		{"5 m/", Length, "", 4, 1},
		{"5 m²/m", Length, "write one plain unit", 2, 4},
		{"5 ((((((m))))))", Area, "too many brackets", 3, 12},
		{"40 °C °C", Temperature, "", 3, 5},
		{"0.85 W", Ratio, "found a power (W), expected a number, such as 0.85", 5, 1},
	} {
		_, err := Parse(c.text, c.kind)
		var pe *ParseError
		if !errors.As(err, &pe) {
			t.Errorf("%q as %s: no ParseError (%v)", c.text, c.kind.Name(), err)
			continue
		}
		if !strings.Contains(pe.Error(), c.message) {
			t.Errorf("%q: %q lacks %q", c.text, pe.Error(), c.message)
		}
		if pe.Offset != c.offset || (c.message != "" && pe.Width != c.width) {
			t.Errorf("%q: place %d+%d, want %d+%d (%v)", c.text, pe.Offset, pe.Width, c.offset, c.width, pe)
		}
	}
}

// place gives where a number typed on a scale lies, step what it measures, in
// kelvin; NaN where the scale cannot say it. Formulas of NIST SP 811, B.9.
type scale struct {
	unit        string
	place, step func(x float64) float64
}

func never(float64) float64 { return math.NaN() }

var scales = []scale{
	{"°C", func(x float64) float64 { return x + 273.15 }, never},
	{"°F", func(x float64) float64 { return (x + 459.67) / 1.8 }, never},
	{"K", func(x float64) float64 { return x }, func(x float64) float64 { return x }},
	{"°R", func(x float64) float64 { return x / 1.8 }, func(x float64) float64 { return x / 1.8 }},
	{"Δ°C", never, func(x float64) float64 { return x }},
	{"Δ°F", never, func(x float64) float64 { return x / 1.8 }},
	{"ΔK", never, func(x float64) float64 { return x }},
}

// Every pair of temperature units under every operation is right or refused.
// Values are only combined after Parse, so the operation states the kinds its
// operands must have: place + step, place - step, place - place, step ± step,
// compare place with place and step with step, scale a step by a number.
func TestTemperatureCrossTable(t *testing.T) {
	const a, b = 90.0, 20.0
	ops := []struct {
		name        string
		left, right Kind
		do          func(x, y float64) float64
	}{
		{"place + step", Temperature, TemperatureDifference, func(x, y float64) float64 { return x + y }},
		{"place - step", Temperature, TemperatureDifference, func(x, y float64) float64 { return x - y }},
		{"place - place", Temperature, Temperature, func(x, y float64) float64 { return x - y }},
		{"step + step", TemperatureDifference, TemperatureDifference, func(x, y float64) float64 { return x + y }},
		{"step - step", TemperatureDifference, TemperatureDifference, func(x, y float64) float64 { return x - y }},
		{"step / step", TemperatureDifference, TemperatureDifference, func(x, y float64) float64 { return x / y }},
		{"compare places", Temperature, Temperature, func(x, y float64) float64 { return sign(x - y) }},
		{"compare steps", TemperatureDifference, TemperatureDifference, func(x, y float64) float64 { return sign(x - y) }},
		{"step * number", TemperatureDifference, Ratio, func(x, y float64) float64 { return x * y }},
		{"place * number", Temperature, Ratio, func(_, _ float64) float64 { return math.NaN() }},
	}
	right, refused := 0, 0
	for _, op := range ops {
		for _, l := range scales {
			for _, r := range scales {
				got, err := combine(l.unit, r.unit, op.left, op.right, a, b, op.do)
				want := op.do(reference(l, op.left, a), reference(r, op.right, b))
				switch {
				case math.IsNaN(want) && (err != nil || math.IsNaN(got)):
					refused++
				case err == nil && math.Abs(got-want) < 1e-12*math.Abs(want)+1e-12:
					right++
				default:
					t.Errorf("%s with %s, %s: got %v (%v), want %v", op.name, l.unit, r.unit, got, err, want)
				}
			}
		}
	}
	if right+refused != len(ops)*len(scales)*len(scales) || right == 0 || refused == 0 {
		t.Errorf("%d right, %d refused of %d", right, refused, len(ops)*len(scales)*len(scales))
	}
}

func sign(x float64) float64 {
	if math.IsNaN(x) {
		return x
	}
	return math.Copysign(1, x)
}

func reference(s scale, k Kind, x float64) float64 {
	switch k {
	case Temperature:
		return s.place(x)
	case TemperatureDifference:
		return s.step(x)
	}
	return x
}

func combine(l, r string, lk, rk Kind, a, b float64, do func(x, y float64) float64) (float64, error) {
	x, err := Parse(fmt.Sprintf("%g %s", a, l), lk)
	if err != nil {
		return 0, err
	}
	if rk == Ratio {
		r = ""
	}
	y, err := Parse(fmt.Sprintf("%g %s", b, r), rk)
	if err != nil {
		return 0, err
	}
	return do(x, y), nil
}

func TestParseNeverPanics(t *testing.T) {
	pieces := rapid.SampledFrom([]string{"1", "0", ".", ",", "-", "−", "e", "9", " ", "W", "m", "°", "C", "F", "K", "deg", "Δ",
		"(", ")", "/", "·", "*", "^", "²", "⁻", "%", "k", "\u2009", "\u00A0", "\x00", "inf", "x"})
	rapid.Check(t, func(t *rapid.T) {
		text := strings.Join(rapid.SliceOfN(pieces, 0, 12).Draw(t, "pieces"), "")
		if rapid.Bool().Draw(t, "any text") {
			text = rapid.String().Draw(t, "text")
		}
		k := Kind(rapid.IntRange(-1, int(kinds)).Draw(t, "kind"))
		si, err := Parse(text, k)
		if err == nil && (math.IsNaN(si) || math.IsInf(si, 0)) {
			t.Fatalf("%q gave %v", text, si)
		}
		var pe *ParseError
		if err != nil && (!errors.As(err, &pe) || pe.Offset < 0 || pe.Width < 1 || pe.Found == "") {
			t.Fatalf("%q: incomplete error %#v", text, err)
		}
	})
}

// What is shown can be typed again.
func TestShownReadsBack(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		k := Kind(rapid.IntRange(0, int(kinds)-1).Draw(t, "kind"))
		s := System(rapid.IntRange(0, 1).Draw(t, "system"))
		shown := rapid.Float64Range(-200, 99999).Draw(t, "shown")
		d := s.display(k)
		si := shown*d.size + d.zero
		text := s.Show(k, si, 6)
		back, err := Parse(text, k)
		if err != nil {
			t.Fatalf("%q: %v", text, err)
		}
		if math.Abs(back-si) > 1e-6*d.size*1.01+1e-11*math.Abs(si) {
			t.Fatalf("%v shown as %q read back as %v", si, text, back)
		}
	})
}

func TestExamplesRead(t *testing.T) {
	for k := Kind(0); k < kinds; k++ {
		if _, err := Parse(k.Example(), k); err != nil {
			t.Errorf("%s: %v", k.Name(), err)
		}
		if _, err := Parse("1 "+US.Unit(k), k); err != nil {
			t.Errorf("%s in US units: %v", k.Name(), err)
		}
	}
}

// The pattern of the schema and the reader agree on what they are shown.
func TestPatternAgrees(t *testing.T) {
	for k := Kind(0); k < kinds; k++ {
		re := regexp.MustCompile(Pattern(k))
		for _, c := range good {
			_, err := Parse(c.text, k)
			if err == nil && !re.MatchString(c.text) {
				t.Errorf("pattern of %s refuses %q", k.Name(), c.text)
			}
			if info[k].single && err != nil && re.MatchString(c.text) {
				t.Errorf("pattern of %s takes %q: %v", k.Name(), c.text, err)
			}
		}
	}
}

const nb = NoBreak

func TestShow(t *testing.T) {
	for _, c := range []struct {
		system   System
		kind     Kind
		si       float64
		decimals int
		want     string
	}{
		{SI, Temperature, 326.45, 1, "53.3" + nb + "°C"},
		{US, Temperature, 326.45, 1, "127.9" + nb + "°F"}, // 53.3·1.8 + 32 = 127.94
		{SI, Length, 0.6, 0, "600" + nb + "mm"},
		{US, Length, 0.3048, 1, "12.0" + nb + "in"},
		{SI, TemperatureDifference, 10, 1, "10.0" + nb + "K"},
		{US, TemperatureDifference, 10, 1, "18.0" + nb + "Δ°F"},
		{SI, Pressure, 12345678, 0, "12" + Thin + "346" + nb + "kPa"},
		{SI, Power, 1234, 0, "1234" + nb + "W"},
		{SI, Angle, math.Pi / 4, 0, "45°"},
		{SI, Ratio, 0.285, 2, "0.29"}, // a tie in decimal, below it in binary
		{SI, Power, -0.04, 1, "0.0" + nb + "W"},
		{SI, Power, -2.5, 0, "-3" + nb + "W"},
		{SI, Temperature, math.NaN(), 1, NotComputed},
		{SI, Percent, 0.85, 0, "85" + nb + "%"},
	} {
		if got := c.system.Show(c.kind, c.si, c.decimals); got != c.want {
			t.Errorf("Show(%v, %v) = %q, want %q", c.kind.Name(), c.si, got, c.want)
		}
	}
}

func TestShowPM(t *testing.T) {
	pm := nb + "±" + nb
	for _, c := range []struct {
		system   System
		kind     Kind
		value, u float64
		want     string
	}{
		{SI, Temperature, 326.45, 4.12, "53.3" + nb + "°C" + pm + "4.2" + nb + "K"},
		{SI, Temperature, 326.45, 4.2, "53.3" + nb + "°C" + pm + "4.2" + nb + "K"}, // stays
		{SI, Temperature, 326.40, 4.2, "53.3" + nb + "°C" + pm + "4.2" + nb + "K"}, // 53.25: tie, away from zero
		{SI, Temperature, 326.45, 9.96, "53" + nb + "°C" + pm + "10" + nb + "K"},   // carry
		{SI, Temperature, 326.45, 0.0996, "53.30" + nb + "°C" + pm + "0.10" + nb + "K"},
		{SI, Temperature, 326.45, 121, "50" + nb + "°C" + pm + "130" + nb + "K"},
		{US, Temperature, 326.45, 4.2, "127.9" + nb + "°F" + pm + "7.6" + nb + "Δ°F"}, // 7.56 up
		{SI, Power, 1009.4, 33.1, "1009" + nb + "W" + pm + "34" + nb + "W"},
		{SI, Power, 75.9, 0, "75.9" + nb + "W" + pm + "0.0" + nb + "W"},
		{SI, Power, 75.9, math.Inf(1), NotComputed},
	} {
		if got := c.system.ShowPM(c.kind, c.value, c.u); got != c.want {
			t.Errorf("ShowPM(%v, %v) = %q, want %q", c.value, c.u, got, c.want)
		}
	}
}

// U is never rounded down and by less than a unit of its second digit up.
func TestRoundUpIsAnUpperBound(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		u := rapid.Float64Range(1e-9, 1e9).Draw(t, "u")
		up, decimals := RoundUp(u)
		if up < u*(1-1e-9) || up-u > math.Pow10(-decimals)*(1+1e-9) {
			t.Fatalf("%v rounded to %v with %d decimals", u, up, decimals)
		}
		if digits := up * math.Pow10(decimals); digits < 10-1e-6 || digits > 99+1e-6 {
			t.Fatalf("%v rounded to %v: %v digits", u, up, digits)
		}
	})
}

func ExampleParse() {
	si, _ := Parse("1.5 mm", Length)
	fmt.Println(si)
	_, err := Parse("10 °C", TemperatureDifference)
	fmt.Println(err)
	// Output:
	// 0.0015
	// found a temperature (°C), expected a temperature difference, such as 10 K: a difference is written in kelvin: write 10 K
}

// One of the SI unit is held as 1.
func TestSIUnitIsTheUnitHeld(t *testing.T) {
	for k := Kind(0); k < kinds; k++ {
		if got, err := Parse("1 "+k.SIUnit(), k); err != nil || got != 1 {
			t.Errorf("1 %s as %s = %v, %v", k.SIUnit(), k.Name(), got, err)
		}
	}
}
