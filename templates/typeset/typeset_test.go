package typeset

import (
	"encoding/xml"
	"errors"
	"math"
	"strings"
	"testing"

	"pgregory.net/rapid"

	"stillair/templates/pdf"
)

// Published forms the note prints; each must set without error.
var published = []string{
	`Nu = \left\{ 0.825 + \frac{0.387\, Ra^{1/6}}{\left[1 + (0.492/Pr)^{9/16}\right]^{8/27}} \right\}^2`,
	`\frac{2}{Nu} = \ln\left\{1 + \frac{2}{\left[\left(0.518 Ra^{1/4} \left[1+\left(\frac{0.559}{Pr}\right)^{3/5}\right]^{-5/12}\right)^{15} + (0.1 Ra^{1/3})^{15}\right]^{1/15}}\right\}`,
	`\mathrm{Nu} = \max\left(0.54\,\mathrm{Ra}^{1/4}, 0.15\,\mathrm{Ra}^{1/3}\right)`,
	`Q = \varepsilon \sigma A \left(T_\mathrm{s}^4 - T_\mathrm{r}^4\right)`,
	`\dot{Q} = \sqrt[3]{x^2} + \bar{h} \cdot A \quad \text{for } \theta \le 60\degree`,
}

func TestPublishedFormsAreRead(t *testing.T) {
	for _, src := range published {
		f, err := Parse(src)
		if err != nil {
			t.Errorf("%s: %v", src, err)
			continue
		}
		w, up, down := f.Extent(nil, 10)
		if !(w > 10 && w < 200 && up > 2 && up < 40 && down >= 0 && down < 40) {
			t.Errorf("%s: size %.1f, %.1f, %.1f mm", src, w, up, down)
		}
	}
}

func TestErrorsTellThePlace(t *testing.T) {
	for src, offset := range map[string]int{
		`a + \foo`: 4, `{a`: 1, `a}`: 1, `^2`: 0, `\left( a`: 6, `\right)`: 0, `x_`: 2,
		`\frac{1}`: 8, `x^2^3`: 3, `a^^b`: 2, `\mathrm a`: 0, `\mathrm{a{b}`: 9, "a\xff": 1, `\`: 0, `\left x`: 6,
	} {
		_, err := Parse(src)
		var e *Error
		if !errors.As(err, &e) {
			t.Errorf("%q: no error", src)
			continue
		}
		if e.Offset != offset || e.Message == "" {
			t.Errorf("%q: offset %d, want %d (%s)", src, e.Offset, offset, e.Message)
		}
	}
}

func TestNestingIsBounded(t *testing.T) {
	for _, src := range []string{strings.Repeat("{", 9000), strings.Repeat(`\sqrt`, 3000), strings.Repeat(`\frac1`, 3000), strings.Repeat("x", maxLength+1), strings.Repeat("x^{", 5000)} {
		if _, err := Parse(src); err == nil {
			t.Errorf("%.10s... was accepted", src)
		}
	}
}

func TestFacesFollowTheRules(t *testing.T) {
	f := Must(`T_\mathrm{s} = 12.5\ \mathrm{K} \ln x`)
	want := map[string]pdf.Face{"T": pdf.Italic, "s": pdf.Regular, "12.5": pdf.Regular, "K": pdf.Regular, "ln": pdf.Regular, "x": pdf.Italic}
	for _, g := range (style{size: 1}).layout(f.root).glyphs {
		if face, ok := want[g.text]; ok && g.face != face {
			t.Errorf("%q is set in face %d, want %d", g.text, g.face, face)
		}
		delete(want, g.text)
	}
	if len(want) > 0 {
		t.Errorf("not set: %v", want)
	}
}

func TestSignInFrontIsNoOperation(t *testing.T) {
	minus := Must(`-a`).root
	if c := (style{}).classAt(minus, 0, opening); c != ordinary {
		t.Errorf("leading sign has class %d", c)
	}
	after, _, _ := Must(`a-b`).Extent(nil, 10)
	alone, _, _ := Must(`a{-}b`).Extent(nil, 10)
	if after <= alone {
		t.Errorf("an operation has no room around it: %.2f against %.2f mm", after, alone)
	}
}

func TestLongLinesBreakAtRelations(t *testing.T) {
	f := Must(`a = ` + strings.Repeat(`1234567890 + `, 20) + `1 = 2`)
	lines := f.lines(40)
	if len(lines) < 4 {
		t.Fatalf("%d lines", len(lines))
	}
	for i, l := range lines {
		if l.box.w+l.indent > 40+1e-9 {
			t.Errorf("line %d is %.1f em wide", i, l.box.w+l.indent)
		}
	}
	last := lines[len(lines)-1]
	if got := text(last.box); got != "=2" {
		t.Errorf("last line %q", got)
	}
}

func text(b box) string {
	s := ""
	for _, g := range b.glyphs {
		s += g.text
	}
	return s
}

func TestMathMLIsWellFormed(t *testing.T) {
	for _, src := range published {
		m := Must(src).MathML()
		if err := xml.Unmarshal([]byte(m), new(struct{})); err != nil {
			t.Errorf("%s: %v", m, err)
		}
	}
	if m := Must(`x^2 < 3`).MathML(); !strings.Contains(m, "<msup><mi>x</mi>") || !strings.Contains(m, "&lt;") {
		t.Error(m)
	}
}

// sound tells whether a formula has finite boxes.
func sound(f *Formula) bool {
	w, up, down := f.Extent(nil, 10)
	return !math.IsNaN(w+up+down) && !math.IsInf(w+up+down, 0) && len(f.lines(20)) > 0 && f.MathML() != ""
}

func TestAnyTextNeverPanics(t *testing.T) {
	words := []string{`\frac`, `\sqrt`, `\left(`, `\right)`, `\left\{`, `\right\}`, `\mathrm{ab}`, `{`, `}`, `^`, `_`, `[`, `]`, `a`, `12.5`, `\dot`, `=`, `+`, `-`, ` `, `\`, `中`, `😀`, `\,`, `\ln`}
	rapid.Check(t, func(r *rapid.T) {
		src := strings.Join(rapid.SliceOfN(rapid.SampledFrom(words), 0, 40).Draw(r, "words"), "")
		if f, err := Parse(src); err == nil && !sound(f) {
			r.Fatalf("%q has no sound size", src)
		}
	})
}

func FuzzParse(f *testing.F) {
	for _, src := range published {
		f.Add(src)
	}
	f.Fuzz(func(t *testing.T, src string) {
		if g, err := Parse(src); err == nil && !sound(g) {
			t.Errorf("%q has no sound size", src)
		}
	})
}
