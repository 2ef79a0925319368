package main

import (
	"strings"
	"testing"

	"stillair/freeconv"
)

func TestPlainEquation(t *testing.T) {
	for id, want := range map[string]string{
		"churchill-chu-1975-plate":               "Nu = {0.825 + 0.387 Ra^(1/6) / [1 + (0.492/Pr)^(9/16)]^(8/27)}^2",
		"yuge-1960-sphere":                       "Nu = 2 + 0.43 Ra^(1/4)",
		"squire-eckert-1950-plate":               "Nu = 0.678 Ra^(1/4) · (Pr/(0.952 + Pr))^(1/4)",
		"mcadams-1954-plate":                     "Nu = max(0.59 Ra^(1/4), 0.10 Ra^(1/3))",
		"churchill-chu-popiel-vertical-cylinder": "h = max(h_plate, h_slender)",
		"lefevre-ede-1956-vertical-cylinder":     "Nu = 4/3 · [7 Ra · Pr / (5 · (20 + 21 Pr))]^(1/4) + 4 · (272 + 315 Pr) / (35 · (64 + 63 Pr)) · L/D",
		"fujii-imura-1972-inclined-up":           "Nu = 0.13 · [(Ra/(cos θ))^(1/3) - (Gr_c Pr)^(1/3)] + 0.56 · (Gr_c Pr cos θ)^(1/4)",
		"raithby-hollands-1975-up": "Nu = (Nu_l^10 + Nu_t^10)^(1/10)\nNu_l = 1.4/ln(1 + 1.4/Nu_T)\n" +
			"Nu_T = 0.835 · 0.671 Ra^(1/4) / [1 + (0.492/Pr)^(9/16)]^(4/9)\nNu_t = 0.14 · (1 + 0.0107 Pr)/(1 + 0.01 Pr) · Ra^(1/3)",
	} {
		c, ok := freeconv.Find(id)
		if !ok {
			t.Fatalf("no method %s", id)
		}
		if got := plainEquation(c.Equation); got != want {
			t.Errorf("%s:\n got %s\nwant %s", id, got, want)
		}
	}
}

// No equation of the catalogue leaves TeX behind, and brackets pair.
func TestPlainEquationsOfTheCatalogue(t *testing.T) {
	for _, c := range freeconv.All() {
		got := plainEquation(c.Equation)
		if strings.ContainsAny(got, `\`) || strings.Contains(got, "frac") || strings.Contains(got, "mathrm") {
			t.Errorf("%s: %s", c.ID, got)
		}
		for _, pair := range []string{"()", "[]", "{}"} {
			if strings.Count(got, pair[:1]) != strings.Count(got, pair[1:]) {
				t.Errorf("%s: brackets %s do not pair in %s", c.ID, pair, got)
			}
		}
	}
}

// What is cut off in the middle comes out as far as it goes.
func TestPlainEquationCutOff(t *testing.T) {
	for source, want := range map[string]string{`\frac{1}{`: "1/", `\left( x`: "(x", `a^`: "a^", `a \left`: "a", `\`: ""} {
		if got := plainEquation(source); got != want {
			t.Errorf("%q becomes %q, want %q", source, got, want)
		}
	}
}

func TestTenPowers(t *testing.T) {
	for in, want := range map[string]string{
		"1 to 1e11": "1 to 1·10¹¹", "from 1": "from 1", "1e-10..1e-2": "1·10⁻¹⁰..1·10⁻²", "2.2e4 to 1.6e9": "2.2·10⁴ to 1.6·10⁹", "the1e9x": "the1e9x",
	} {
		if got := tenPowers(in); got != want {
			t.Errorf("%q becomes %q, want %q", in, got, want)
		}
	}
}
