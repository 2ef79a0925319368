package freeconv

import (
	"fmt"
	"math"
	"strconv"
	"strings"
	"testing"
)

// The equation printed in the note must be the one that was computed: the
// tests read the TeX of every record and work it out.

// texReader works out one expression of the small TeX subset.
type texReader struct {
	rest    string
	symbols map[string]float64
}

type texError string

// texValue is the value of an expression.
func texValue(tex string, symbols map[string]float64) (x float64, err error) {
	defer func() {
		if r := recover(); r != nil {
			failed, ok := r.(texError)
			if !ok {
				panic(r)
			}
			err = fmt.Errorf("%s in %s", string(failed), tex)
		}
	}()
	r := &texReader{tex, symbols}
	x = r.sum()
	if r.skip(); r.rest != "" {
		r.fail("left over: " + r.rest)
	}
	return x, nil
}

func (r *texReader) fail(message string) { panic(texError(message)) }

func (r *texReader) skip() { r.rest = strings.TrimLeft(r.rest, " ") }

// eat takes a token if it stands next.
func (r *texReader) eat(token string) bool {
	r.skip()
	rest, ok := strings.CutPrefix(r.rest, token)
	if ok && strings.HasPrefix(token, `\`) && rest != "" && isLetter(token[len(token)-1]) && isLetter(rest[0]) {
		return false
	}
	if ok {
		r.rest = rest
	}
	return ok
}

func isLetter(b byte) bool { return b >= 'a' && b <= 'z' || b >= 'A' && b <= 'Z' }

func (r *texReader) want(token string) {
	if !r.eat(token) {
		r.fail("wanted " + token + " at " + r.rest)
	}
}

func (r *texReader) sum() float64 {
	sign := 1.0
	if r.eat("-") {
		sign = -1
	}
	x := sign * r.product()
	for {
		switch {
		case r.eat("+"):
			x += r.product()
		case r.eat("-"):
			x -= r.product()
		default:
			return x
		}
	}
}

// product reads factors joined by a dot, a thin space, a solidus or nothing.
func (r *texReader) product() float64 {
	x := r.power()
	for {
		switch {
		case r.eat(`\cdot`), r.eat(`\,`):
			x *= r.power()
		case r.eat("/"):
			x /= r.power()
		case r.startsFactor():
			x *= r.power()
		default:
			return x
		}
	}
}

func (r *texReader) startsFactor() bool {
	r.skip()
	if r.rest == "" || strings.ContainsRune("+-=,}", rune(r.rest[0])) {
		return false
	}
	return !strings.HasPrefix(r.rest, `\right`) && r.rest[0] != '\n'
}

func (r *texReader) power() float64 {
	x := r.factor()
	if r.eat("^") {
		return math.Pow(x, r.braced())
	}
	return x
}

func (r *texReader) braced() float64 {
	r.want("{")
	x := r.sum()
	r.want("}")
	return x
}

var brackets = [][2]string{{"(", ")"}, {"[", "]"}, {`\{`, `\}`}}

// bracketed reads a pair of sized brackets and gives the values inside.
func (r *texReader) bracketed() []float64 {
	for _, pair := range brackets {
		if r.eat(`\left` + pair[0]) {
			list := []float64{r.sum()}
			for r.eat(",") {
				list = append(list, r.sum())
			}
			r.want(`\right` + pair[1])
			return list
		}
	}
	r.fail("no bracket at " + r.rest)
	return nil
}

func (r *texReader) factor() float64 {
	switch {
	case r.eat(`\frac`):
		a := r.braced()
		return a / r.braced()
	case r.eat(`\sqrt`):
		return math.Sqrt(r.braced())
	case r.eat(`\ln`):
		return math.Log(r.bracketed()[0])
	case r.eat(`\cos`):
		return math.Cos(r.factor() * math.Pi / 180)
	case r.eat(`\max`):
		list := r.bracketed()
		x := list[0]
		for _, y := range list[1:] {
			x = math.Max(x, y)
		}
		return x
	}
	if r.skip(); strings.HasPrefix(r.rest, `\left`) {
		return r.bracketed()[0]
	}
	if r.rest != "" && r.rest[0] >= '0' && r.rest[0] <= '9' {
		return r.figure()
	}
	return r.symbol()
}

func (r *texReader) figure() float64 {
	n := 0
	for n < len(r.rest) && (r.rest[n] >= '0' && r.rest[n] <= '9' || r.rest[n] == '.') {
		n++
	}
	x, err := strconv.ParseFloat(r.rest[:n], 64)
	if err != nil {
		r.fail(err.Error())
	}
	r.rest = r.rest[n:]
	return x
}

// symbol reads the longest known symbol.
func (r *texReader) symbol() float64 {
	best := ""
	for s := range r.symbols {
		if strings.HasPrefix(r.rest, s) && len(s) > len(best) {
			best = s
		}
	}
	if best == "" {
		r.fail("unknown symbol at " + r.rest)
	}
	r.rest = r.rest[len(best):]
	return r.symbols[best]
}

// texNu works out an equation of one or more lines; later lines define the
// symbols of earlier ones.
func texNu(t *testing.T, equation string, in Input) float64 {
	t.Helper()
	symbols := map[string]float64{`\mathrm{Ra}`: in.Ra, `\mathrm{Pr}`: in.Pr, `\theta`: in.Theta, `L`: in.LD, `D`: 1}
	symbols[`\mathrm{Gr}_{c}`] = fujiiImuraGrc(in.Theta)
	lines := strings.Split(equation, "\n")
	for i := len(lines) - 1; i >= 0; i-- {
		name, right, ok := strings.Cut(lines[i], " = ")
		if !ok {
			t.Fatalf("no equation: %s", lines[i])
		}
		x, err := texValue(right, symbols)
		if err != nil {
			t.Fatal(err)
		}
		symbols[name] = x
	}
	return symbols[`\mathrm{Nu}`]
}

// unresolved are records whose equation has a coefficient that depends on the
// range; only the numeric form can be worked out.
var unresolved = map[string]bool{"morgan-1975-cylinder": true, "fujii-imura-1972-up": true, "fujii-imura-1972-inclined-up": true}

func TestEquationsSayWhatIsComputed(t *testing.T) {
	for _, c := range All() {
		if c.IsRule() {
			continue // its equation is that of the larger h; see TestRuleAgreesWithItsParts
		}
		t.Run(c.ID, func(t *testing.T) {
			for _, Ra := range []float64{0.5, 37, 2.3456e4, 5.1e6, 3.3e8, 8.7e10} {
				in := Input{Ra: Ra, Pr: 0.7071, LD: 12.5, Theta: 33, AP: 0.25}
				want := c.Nu(in)
				if !unresolved[c.ID] {
					if got := texNu(t, c.Equation, in); math.Abs(got/want-1) > 1e-12 {
						t.Errorf("Ra = %g: the equation gives %.12g, the function %.12g", Ra, got, want)
					}
				}
				if got := texNu(t, c.Substitute(in), in); math.Abs(got/want-1) > 4e-4 {
					t.Errorf("Ra = %g: the equation with numbers gives %.6g, the function %.6g: %s", Ra, got, want, c.Substitute(in))
				}
			}
		})
	}
}

// After substitution no symbol of the input may be left on the page.
func TestSubstituteLeavesNoSymbol(t *testing.T) {
	in := Input{Ra: 1.234e6, Pr: 0.7071, LD: 12.5, Theta: 33, AP: 0.25}
	for _, c := range All() {
		text := c.Substitute(in)
		for _, symbol := range []string{`\mathrm{Ra}`, `\mathrm{Pr}`, `\theta`, `\frac{L}{D}`} {
			if strings.Contains(text, symbol) {
				t.Errorf("%s: %s is left in %s", c.ID, symbol, text)
			}
		}
	}
}

// The typesetter of the note knows these commands only.
func TestEquationsKeepToTheSubset(t *testing.T) {
	known := strings.NewReplacer(`\frac`, "", `\sqrt`, "", `\left`, "", `\right`, "", `\mathrm`, "", `\cdot`, "", `\ln`, "",
		`\cos`, "", `\max`, "", `\theta`, "", `\,`, "", `\{`, "", `\}`, "")
	in := Input{Ra: 1.234e6, Pr: 0.7071, LD: 12.5, Theta: 33, AP: 0.25}
	for _, c := range All() {
		for _, text := range []string{c.Equation, c.Substitute(in)} {
			if rest := known.Replace(text); strings.ContainsAny(rest, `\#&%$~`) {
				t.Errorf("%s leaves the subset: %s", c.ID, rest)
			}
			if strings.Count(text, "{") != strings.Count(text, "}") || strings.Count(text, `\left`) != strings.Count(text, `\right`) {
				t.Errorf("%s: brackets do not pair in %s", c.ID, text)
			}
		}
	}
}

func TestTexNumber(t *testing.T) {
	for x, want := range map[float64]string{
		0: "0", 0.7071: "0.7071", 213.44: "213.4", 5: "5",
		1.8673e6: `\left( 1.867 \cdot 10^{6} \right)`, 2.5e-5: `\left( 2.500 \cdot 10^{-5} \right)`,
	} {
		if got := texNumber(x); got != want {
			t.Errorf("texNumber(%g) = %s, want %s", x, got, want)
		}
	}
}
