package calcnote

import (
	"fmt"
	"math"
	"strconv"
	"strings"
	"testing"

	"stillair/checks"
)

// TestWorkedLinesCanBeRedone works every printed line out again from the
// numbers on paper, as a checker with a pocket calculator does.
func TestWorkedLinesCanBeRedone(t *testing.T) {
	lines := 0
	for _, name := range starters() {
		o := outcome(t, name)
		for i := range o.Loads {
			n := (note{o: o}).with(nil)
			n.gov = i
			var all []string
			for _, f := range o.Loads[i].Films {
				all = append(all, n.surfaceLines(f)...)
			}
			all = append(all, wholeLine(n.load()))
			for _, z := range n.altitudes() {
				for _, line := range pressureLines(z) {
					all = append(all, strings.Split(line, `, \quad `)...)
				}
			}
			if s := o.Loads[i].Case.Surroundings; s.Humidity.Set {
				all = append(all, dewPointLines(s.Air.SI, s.Humidity.SI, o.Loads[i].DewPointK)...)
			}
			for _, src := range all {
				if redo(t, name, src) {
					lines++
				}
			}
		}
	}
	if lines < 200 {
		t.Errorf("only %d lines were redone", lines)
	}
}

// redo compares the numbers of a line with its result. A line without numbers
// to work out is not redone.
func redo(t *testing.T, name, src string) bool {
	t.Helper()
	parts := strings.Split(src, " = ")
	if len(parts) < 2 {
		return false
	}
	sum, err1 := evaluate(parts[len(parts)-2])
	result, err2 := evaluate(strings.Split(parts[len(parts)-1], `\ \mathrm`)[0])
	if err1 != nil || err2 != nil {
		t.Errorf("%s: %s: %v %v", name, src, err1, err2)
		return false
	}
	// The terms of a sum or difference may be much larger than the result.
	tolerance := Rounding * math.Max(math.Abs(result), cancellation(parts[len(parts)-2]))
	if math.Abs(sum-result) > tolerance {
		t.Errorf("%s: %s: redone %.6g", name, src, sum)
	}
	return true
}

// cancellation is the size below which a difference of printed numbers means
// nothing: a hundredth of the largest term.
func cancellation(src string) float64 {
	if !strings.Contains(src, " - ") && !strings.Contains(src, " + ") || strings.Contains(src, "frac") {
		return 0
	}
	most := 0.0
	for _, w := range strings.FieldsFunc(src, func(r rune) bool { return !strings.ContainsRune("0123456789.", r) }) {
		if v, err := strconv.ParseFloat(w, 64); err == nil && !strings.Contains(src, "^4") {
			most = math.Max(most, v/20)
		}
	}
	return most
}

// evaluate works out the numeric TeX of the worked lines.
func evaluate(src string) (v float64, err error) {
	defer func() {
		if r := recover(); r != nil {
			err = fmt.Errorf("%q: %v", src, r)
		}
	}()
	c := calculator{s: strings.NewReplacer(`\left`, "", `\right`, "", `\{`, "(", `\}`, ")", "[", "(", "]", ")", `\,`, " ", `\max`, "max", `\cos`, "cos", `\ln`, "ln").Replace(src)}
	v = c.sum()
	c.space()
	if c.i < len(c.s) {
		return 0, fmt.Errorf("%q: rest %q", src, c.s[c.i:])
	}
	return v, nil
}

// calculator is a recursive descent over sums, products and powers.
type calculator struct {
	s string
	i int
}

func (c *calculator) space() {
	for c.i < len(c.s) && c.s[c.i] == ' ' {
		c.i++
	}
}

func (c *calculator) take(word string) bool {
	c.space()
	if strings.HasPrefix(c.s[c.i:], word) {
		c.i += len(word)
		return true
	}
	return false
}

func (c *calculator) must(word string) {
	if !c.take(word) {
		panic("no " + word + " at " + c.s[c.i:])
	}
}

func (c *calculator) sum() float64 {
	v := 0.0
	if c.take("-") {
		v = -c.product()
	} else {
		v = c.product()
	}
	for {
		switch {
		case c.take("+"):
			v += c.product()
		case c.take("-"):
			v -= c.product()
		default:
			return v
		}
	}
}

func (c *calculator) product() float64 {
	v := c.power()
	for {
		c.space()
		switch {
		case c.take(`\times`):
			v *= c.power()
		case c.take("/"):
			v /= c.power()
		case c.i < len(c.s) && strings.ContainsRune(`(\cml0123456789`, rune(c.s[c.i])):
			v *= c.power()
		default:
			return v
		}
	}
}

func (c *calculator) power() float64 {
	v := c.atom()
	if c.take("^") {
		if c.take("{") {
			e := c.sum()
			c.must("}")
			return math.Pow(v, e)
		}
		c.space()
		e := float64(c.s[c.i] - '0')
		c.i++
		return math.Pow(v, e)
	}
	return v
}

func (c *calculator) group(open, shut string) float64 {
	c.must(open)
	v := c.sum()
	c.must(shut)
	return v
}

func (c *calculator) atom() float64 {
	c.space()
	switch {
	case c.take(`\frac`):
		over := c.group("{", "}")
		return over / c.group("{", "}")
	case c.take("max"):
		c.must("(")
		v := c.sum()
		for c.take(",") {
			v = math.Max(v, c.sum())
		}
		c.must(")")
		return v
	case c.take("cos"):
		return math.Cos(c.power() * math.Pi / 180)
	case c.take("ln"):
		return math.Log(c.power())
	case c.s[c.i] == '(':
		return c.group("(", ")")
	case c.s[c.i] == '{':
		return c.group("{", "}")
	}
	from := c.i
	for c.i < len(c.s) && (c.s[c.i] == '.' || c.s[c.i] >= '0' && c.s[c.i] <= '9') {
		c.i++
	}
	v, err := strconv.ParseFloat(c.s[from:c.i], 64)
	if err != nil {
		panic(err)
	}
	return v
}

func TestCalculatorOfTheTest(t *testing.T) {
	for src, want := range map[string]float64{
		`\frac{2 \times 3}{4}`: 1.5, `\left\{ 1 + 2\,\left( 3 \right) \right\}^{2}`: 49,
		`\max\left( 2, 8^{1/3} \times 3 \right) - 1`: 5, `1.5 \times 10^{-3}`: 0.0015,
	} {
		if got, err := evaluate(src); err != nil || math.Abs(got-want) > 1e-12 {
			t.Errorf("%s = %g (%v), want %g", src, got, err, want)
		}
	}
}

func TestLayersCanBeRedone(t *testing.T) {
	rows := 0
	for _, name := range starters() {
		n := (note{o: outcome(t, name)}).with(nil)
		l := n.load()
		if l.Status != checks.Converged {
			continue
		}
		for _, layer := range l.Layers {
			row := layerRow(layer.At, "(a)", layer, smallestStep(l.Layers))
			var v [8]float64
			for j := 3; j < 8; j++ {
				v[j] = printed(t, row.Cells[j].Runs[0].Text)
			}
			if q := v[4] * v[3] * (v[5] - v[6]); math.Abs(q-v[7]) > Rounding*math.Abs(v[7])+1e-9 {
				t.Errorf("%s, %s: k S (T1-T2) = %.6g, printed %.6g", name, layer.At, q, v[7])
			}
			if s := shapeFactor(t, row.Cells[2].Runs[0].Text); math.Abs(s-v[3]) > Rounding*v[3] {
				t.Errorf("%s, %s: S from %q is %.6g, printed %.6g", name, layer.At, row.Cells[2].Runs[0].Text, s, v[3])
			}
			rows++
		}
	}
	if rows < 8 {
		t.Errorf("only %d layers", rows)
	}
}

// printed reads a number as the note prints it.
func printed(t *testing.T, text string) float64 {
	t.Helper()
	text = strings.NewReplacer("−", "-", "·10", "e", "⁻", "-", "⁰", "0", "¹", "1", "²", "2", "³", "3", "⁴", "4", "⁵", "5", "⁶", "6", "⁷", "7", "⁸", "8", "⁹", "9").Replace(text)
	v, err := strconv.ParseFloat(text, 64)
	if err != nil {
		t.Errorf("%q is no number", text)
	}
	return v
}

// shapeFactor works S out from the sizes printed beside it: A/t of a plane
// layer, 2 pi l/ln(r2/r1) of a cylinder, 4 pi r1 r2/(r2 - r1) of a sphere.
func shapeFactor(t *testing.T, text string) float64 {
	t.Helper()
	size := map[string]float64{}
	for _, part := range strings.Split(text, ", ") {
		f := strings.Fields(strings.ReplaceAll(part, "\u00A0", " "))
		size[f[0]] = printed(t, f[2])
	}
	r1, r2 := size["r₁"], size["r₂"]
	switch {
	case size["A"] > 0:
		return size["A"] / (size["t"] / 1000)
	case size["ℓ"] > 0:
		return 2 * math.Pi * size["ℓ"] / math.Log(r2/r1)
	}
	return 4 * math.Pi * r1 * r2 / (r2 - r1)
}

// TestSecondMethodCanBeRedone works Ra, Nu and h of the second method out again
// from the numbers of its table.
func TestSecondMethodCanBeRedone(t *testing.T) {
	films := 0
	for _, name := range starters() {
		for _, l := range outcome(t, name).Loads {
			if l.Second == nil {
				continue
			}
			for _, f := range l.Second.Films {
				redoFilm(t, name, f)
				films++
			}
		}
	}
	if films < 20 {
		t.Errorf("only %d films", films)
	}
}

func redoFilm(t *testing.T, name string, f checks.FilmRow) {
	t.Helper()
	v := map[string]float64{}
	for _, q := range secondQuantities {
		v[q.symbol] = printed(t, q.of(f))
	}
	agree := func(what string, got, want float64) {
		if math.Abs(got-want) > Rounding*math.Abs(want)+1e-9 {
			t.Errorf("%s, %s, %s: %s = %.6g from printed numbers, printed %.6g", name, f.At, f.Side, what, got, want)
		}
	}
	agree("Ra", v["g"]*math.Abs(v[`\Delta T`])*math.Pow(v["L"], 3)/(v[`T_\beta = 1/\beta`]*v[`\nu`]*v[`\alpha`]), v["Ra"])
	in := f.Film.In
	in.Ra, in.Pr = v["Ra"], v["Pr"]
	agree("Nu", f.Film.Method.Nu(in), v["Nu"])
	agree("h", v["Nu"]*v["k"]/v["L"], v["h"])
}
