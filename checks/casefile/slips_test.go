package casefile

import (
	"strings"
	"testing"
)

// one reads a case that has one slip and gives its finding.
func one(t *testing.T, text string) Finding {
	t.Helper()
	findings := findingsOf(text)
	if len(findings) != 1 {
		t.Fatalf("%d findings in\n%s%s", len(findings), text, formatted(findings))
	}
	return findings[0]
}

// A decimal comma between braces is one slip, wherever it stands.
func TestDecimalCommaInBraces(t *testing.T) {
	for _, c := range []struct{ old, new, found, help string }{
		{"{air: 30 °C}", "{air: 20,5 °C}", `"20,5"`, "write 20.5 °C"},
		{"{air: 30 °C}", "{air: -20,5 °C, altitude: 3 m}", `"-20,5"`, "write -20.5 °C"},
		{"emissivity: 0.9", "emissivity: 0,9", `"0,9"`, "write 0.9"},
		{"loads: [{name: a}]", "loads: [{name: a, air: 7,25 °C}]", `"7,25"`, "write 7.25 °C"},
		{"loads: [{name: a}]", "loads: [{name: a, body: {plate: {height: 1,500 m}}}]", `"1,500"`, "write 1500 m or 1.500 m"},
	} {
		f := one(t, strings.Replace(plateHead+"loads: [{name: a}]\n", c.old, c.new, 1))
		if f.Code != "E-301" || f.Found != c.found || !strings.Contains(f.Help, c.help) || f.Width != len(c.found)-2 {
			t.Errorf("%s: %+v", c.new, f)
		}
	}
	two := findingsOf(strings.Replace(plateHead, "width: 1 m, height: 1 m", "width: 1,5 m, height: 2,5 m", 1))
	if len(two) != 2 || two[0].Code != "E-301" || two[1].Code != "E-301" {
		t.Error(formatted(two))
	}
	f := one(t, plateHead+"note: {number: 12,5}\n")
	if f.Code != "E-206" || !strings.Contains(f.Help, "quotes") {
		t.Errorf("%+v", f)
	}
}

// What people type instead of what is right, and what they are offered.
func TestNearestWords(t *testing.T) {
	for _, c := range []struct{ old, new, nearest, help string }{
		{"heat: 10 W", "heat: 250 Watt", "W", "write 250 W"},
		{"heat: 10 W", "heat: 250 VA", "", "apparent"},
		{"air: 30 °C", "air: 40 Celsius", "°C", "write 40 °C"},
		{"air: 30 °C", "air: 30 °C, pressure: 0 barg", "", "absolute"},
		{"{back: wall}", "{rear: wall}", "back", ""},
		{"{back: wall}", "{back: 30 °C}", "", "surroundings: {sees: {back: 30 °C}}"},
		{"heat: 10 W", "heat: 10 W\nlimits: [{at: rear, most: 80 °C, why: x}]", "back", ""},
		{"surroundings: {air: 30 °C}", "air: 30 °C", "surroundings: {air: 30 °C}", "surroundings"},
		{"surroundings: {air: 30 °C}", "surroundings: {altitude: 3 m}\nair: 30 °C", "surroundings: {air: 30 °C}", "surroundings"},
	} {
		f := one(t, strings.Replace(plateHead, c.old, c.new, 1))
		if f.Nearest != c.nearest || !strings.Contains(f.Help, c.help) {
			t.Errorf("%s: %s", c.new, formatted([]Finding{f}))
		}
	}
	if findings := findingsOf(strings.Replace(plateHead, "10 W", "0.5 hp", 1)); len(findings) > 0 {
		t.Error(formatted(findings))
	}
}

// A word finds a finish or material when it belongs to a single entry.
func TestCatalogueWords(t *testing.T) {
	for _, c := range []struct{ typed, code, expected string }{
		{"finish: paint", "E-306", "oil paint, any colour; white paint or lacquer; white silicone paint (space grade);"},
		{"finish: light grey paint", "", ""},
		{"finish: grey light paint", "", ""},
		{"finish: paint-coated metal cladding", "", ""},
		{"finish: painted_clad", "", ""},
		{"emissivity: 0.9, layers: [{material: carbon steel, thickness: 1 mm}]", "E-307", "carbon steel AISI 1010; plain carbon steel; structural carbon steel, Eurocode"},
		{"emissivity: 0.9, layers: [{material: structural carbon steel, thickness: 1 mm}]", "", ""},
	} {
		findings := findingsOf(strings.Replace(plateHead, "emissivity: 0.9", c.typed, 1))
		var errors []Finding
		for _, f := range findings {
			if f.Severity == Error {
				errors = append(errors, f)
			}
		}
		if c.code == "" && len(errors) == 0 {
			continue
		}
		if len(errors) != 1 || errors[0].Code != c.code || !strings.Contains(errors[0].Expected, c.expected) || strings.Count(errors[0].Expected, ";") > 5 {
			t.Errorf("%s:\n%s", c.typed, formatted(findings))
		}
	}
}

// A temperature in kelvin that no case has is more likely in °C, or a rise.
func TestColdKelvin(t *testing.T) {
	f := one(t, plateHead+"limits: [{at: front, most: 55 K, why: x}]\n")
	if f.Code != "E-507" || f.Severity != Warning || f.Nearest != "55 °C" || f.Help != "a rise over the air is written rise: 55 K" {
		t.Errorf("%+v", f)
	}
	for _, fine := range []string{"most: 328 K", "rise: 55 K", "least: -5 °C"} {
		if findings := findingsOf(plateHead + "limits: [{at: front, " + fine + ", why: x}]\n"); len(findings) > 0 {
			t.Error(formatted(findings))
		}
	}
	file, findings := Read("a", []byte("title: x\nbody: {sphere: {diameter: 1 m, emissivity: 0.9}}\nheat: 1 W\n"), Defaults{Air: "40 K"})
	if file == nil || len(findings) != 1 || findings[0].Code != "E-507" {
		t.Error(formatted(findings))
	}
}
