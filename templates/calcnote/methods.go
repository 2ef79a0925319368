package calcnote

import (
	"fmt"
	"slices"
	"strings"

	"stillair/checks"
	"stillair/checks/limit"
	"stillair/freeconv"
	"stillair/freeconv/fluid"
	"stillair/templates/pdf"
)

// Formulas of the note, in the order they are numbered.
const (
	formulaRayleigh   = `Ra = \frac{g\,\beta \left|\Delta T\right| L^3}{\nu\,\alpha}, \quad \Delta T = T_\mathrm{s} - T_\mathrm{a}, \quad \beta = \frac{1}{T_\beta}`
	formulaFilm       = `h = \frac{Nu\,k}{L}, \quad Q_\mathrm{c} = h\,A \left(T_\mathrm{s} - T_\mathrm{a}\right)`
	formulaProperties = `\nu = \frac{\mu}{\rho}, \quad \alpha = \frac{k}{\rho\,c_p}, \quad Pr = \frac{\nu}{\alpha}`
	formulaRadiation  = `Q_\mathrm{r} = \varepsilon\,\sigma\,A \left(T_\mathrm{s}^4 - T_\mathrm{r}^4\right), \quad \sigma = 5.670374 \times 10^{-8}\ \mathrm{W/(m²·K⁴)}`
	formulaSun        = `Q_\mathrm{s} = \alpha_\mathrm{s}\,G\,A`
	formulaPlane      = `Q_\mathrm{k} = \bar{k}\,S \left(T_1 - T_2\right), \quad S = \frac{A}{t}`
	formulaCylinder   = `Q_\mathrm{k} = \bar{k}\,S \left(T_1 - T_2\right), \quad S = \frac{2 \pi L}{\ln\left(r_2/r_1\right)}`
	formulaSphere     = `Q_\mathrm{k} = \bar{k}\,S \left(T_1 - T_2\right), \quad S = \frac{4 \pi\,r_1 r_2}{r_2 - r_1}`
	formulaBalance    = `\sum Q_\mathrm{in} = \sum Q_\mathrm{out}`
	formulaUpper      = `T_\mathrm{upper} = T_\mathrm{a} + f \left(T_\mathrm{inside} - T_\mathrm{a}\right)`
	formulaCombine    = `U_{+} = \sqrt{\sum_i \max\left(0, \Delta_i\right)^2}, \quad U_{-} = \sqrt{\sum_i \min\left(0, \Delta_i\right)^2}`
)

// methods explains the model: its equations, and each correlation in use.
func (n *note) methods() {
	n.section("Methods")
	n.balanceEquations()
	n.part("Correlations in use", 66)
	for _, u := range n.used() {
		n.correlation(u)
	}
	n.part("Air", 30)
	n.cited("Properties of dry air at the property temperature and the pressure stated: density ρ, specific heat, viscosity μ and conductivity k from published equations; the others follow from them.", fluid.Air.Sources()...)
	n.formula(formulaProperties)
	if !n.pressureTyped() {
		n.cited("The pressure follows from the altitude.", atmosphere)
	}
}

func (n *note) pressureTyped() bool {
	for _, l := range n.o.Loads {
		if !l.Case.Surroundings.Pressure.Set {
			return false
		}
	}
	return true
}

func (n *note) balanceEquations() {
	c := n.o.Loads[0].Case
	n.part("Heat balance", 30)
	n.text("The body is a network of temperatures joined by heat flows. In the steady state the heat that reaches each unknown temperature leaves it again:")
	n.formula(formulaBalance)
	n.runs(pdf.Run{Text: "Free convection on a face at its mean temperature, with the characteristic length "}, inline(`L`), pdf.Run{Text: " and the property temperature of its correlation:"})
	n.formula(formulaRayleigh, gravitySource)
	n.formula(formulaFilm)
	n.runs(pdf.Run{Text: "Radiation of a grey face of emissivity "}, inline(`\varepsilon`), pdf.Run{Text: " to surroundings at "}, inline(`T_\mathrm{r}`), pdf.Run{Text: ":"})
	n.formula(formulaRadiation, sigmaSource)
	if n.loadsWith(hasSun) != "" {
		n.runs(pdf.Run{Text: "Sun of irradiance "}, inline(`G`), pdf.Run{Text: " on a face of solar absorptance "}, inline(`\alpha_\mathrm{s}`), pdf.Run{Text: ":"})
		n.formula(formulaSun)
	}
	if b := c.Body; b.Wall != nil || len(b.Layers) > 0 {
		n.text("Conduction through a layer with the mean conductivity between its two sides:")
		n.formula(conductionFormula(b.Kind), fourierSource)
	}
	if c.Body.Kind == "box" {
		n.textf("Upper zone of the inside air, with the assumed factor f = %s:", orNone(c.Inside.UpperZone.Typed))
		n.formula(formulaUpper)
	}
	n.text("Uncertainty: each input is shifted by about two standard deviations both ways and the balance solved anew; the changes Δ of a temperature are combined as the root of the sum of squares, apart for those that warm and those that cool it:")
	n.formula(formulaCombine, gumSource)
}

func conductionFormula(kind string) string {
	switch kind {
	case "pipe":
		return formulaCylinder
	case "sphere":
		return formulaSphere
	case "cylinder", "vessel":
		return formulaCylinder + `\ \text{or}\ \frac{A}{t}`
	}
	return formulaPlane
}

// usage is one correlation and where it was used.
type usage struct {
	method *freeconv.Correlation
	why    string
	places []string
}

// used lists the correlations of all load cases in the order they appear, the
// rules that chose them included.
func (n *note) used() []*usage {
	var list []*usage
	add := func(m *freeconv.Correlation, why, place string) {
		i := slices.IndexFunc(list, func(u *usage) bool { return u.method == m })
		if i < 0 {
			list = append(list, &usage{method: m, why: why})
			i = len(list) - 1
		}
		if !slices.Contains(list[i].places, place) {
			list[i].places = append(list[i].places, place)
		}
	}
	for _, l := range n.o.Loads {
		for _, f := range l.Films {
			if f.Film.Method == nil {
				continue
			}
			add(f.Film.Method, f.Why, placeOf(f))
			if f.Film.Rule != nil {
				add(f.Film.Rule, f.Why, placeOf(f))
			}
		}
	}
	return list
}

func placeOf(f checks.FilmRow) string {
	if f.Side == "inside" {
		return f.At + " (inside)"
	}
	return f.At
}

// correlation is the record of one correlation.
func (n *note) correlation(u *usage) {
	m := u.method
	d := n.d
	d.Need(64)
	d.Space(1.5)
	n.margin(d.Y+3.6, n.refs.marks(m.Citation))
	d.Para(pdf.T(m.Name), boldStyle, n.left(), measure)
	d.Y += 1.5
	n.equation(m.Equation)
	var rows []pdf.Row
	for _, f := range correlationFacts(u) {
		if f[1] != "" {
			rows = append(rows, pdf.Row{Cells: []pdf.Cell{{Runs: pdf.T(f[0])}, f2(f[1])}})
		}
	}
	n.tableIn(n.left()+6, n.width()-6, []pdf.Column{{Width: 34}, {Width: 130}}, rows)
}

func f2(s string) pdf.Cell {
	if src, ok := strings.CutPrefix(s, "$"); ok {
		return mathCell(src)
	}
	return pdf.C(s)
}

// equation displays the equation of a correlation, which may have lines.
func (n *note) equation(src string) {
	for i, line := range strings.Split(src, "\n") {
		label := ""
		if i == 0 {
			n.formulas++
			label = fmt.Sprintf("(%d)", n.formulas)
		}
		n.display(quantities(line), label)
	}
}

// quantities sets the characteristic numbers in italics (ISO 80000-11).
func quantities(src string) string {
	for _, q := range []string{"Nu", "Ra", "Pr", "Gr"} {
		src = strings.ReplaceAll(src, `\mathrm{`+q+`}`, `{`+q+`}`)
	}
	return src
}

func correlationFacts(u *usage) [][2]string {
	m := u.method
	return [][2]string{
		{"Length", string(m.Length)},
		{"Property temperature", "$" + weighted(m.FilmWeight, `T`) + betaNote(m)},
		{"Range of the source", rangeOf(m)},
		{"Published scatter", scatterOf(m)},
		{"Form", capital(string(m.Verification))},
		{"Used on", strings.Join(u.places, ", ")},
		{"Why this one", capital(powers(u.why))},
		{"Note", powers(m.Note)},
	}
}

// weighted is Ta + w (Ts - Ta) as a formula.
func weighted(w float64, symbol string) string {
	s := symbol + ` = T_\mathrm{a} + ` + digitsTrim(w) + ` \left(T_\mathrm{s} - T_\mathrm{a}\right)`
	if w == 0.5 {
		s = symbol + ` = \left(T_\mathrm{s} + T_\mathrm{a}\right)/2`
	}
	return s
}

func betaNote(m *freeconv.Correlation) string {
	return `, \quad ` + weighted(m.BetaWeight, `T_\beta`)
}

func digitsTrim(x float64) string {
	return strings.TrimRight(strings.TrimRight(fmt.Sprintf("%.3f", x), "0"), ".")
}

func rangeOf(m *freeconv.Correlation) string {
	s := rangeText("Ra", m.RaMin, m.RaMax)
	if m.CosG {
		s += " (Ra with g cos θ)"
	}
	if m.PrMin > 0 || m.PrMax > 0 {
		s += ", " + rangeText("Pr", m.PrMin, m.PrMax)
	} else {
		s += ", all Pr"
	}
	if m.ThetaMin != 0 || m.ThetaMax != 0 {
		s += fmt.Sprintf(", tilt from the vertical %g° to %g°", m.ThetaMin, m.ThetaMax)
	}
	return s
}

func scatterOf(m *freeconv.Correlation) string {
	if m.Scatter > 0 {
		return fmt.Sprintf("± %.3g\u00A0%%: %s", 100*m.Scatter, m.ScatterNote)
	}
	if m.ScatterNote != "" {
		return capital(m.ScatterNote) + "; the shift of the uncertainty table is used instead"
	}
	return "None published; the shift of the uncertainty table is used instead"
}

// decisionRule prints the rule that turns margins into verdicts.
func (n *note) decisionRule() {
	n.cited(limit.DecisionRule, ilacSource, jcgm106Source)
}

func hasSun(c caseOf) bool { return len(c.Surroundings.Sun) > 0 }
