package calcnote

import (
	"fmt"
	"math"
	"slices"
	"strings"

	"stillair/checks"
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
	formulaCylinder   = `Q_\mathrm{k} = \bar{k}\,S \left(T_1 - T_2\right), \quad S = \frac{2 \pi\,\ell}{\ln\left(r_2/r_1\right)}`
	formulaSphere     = `Q_\mathrm{k} = \bar{k}\,S \left(T_1 - T_2\right), \quad S = \frac{4 \pi\,r_1 r_2}{r_2 - r_1}`
	formulaBalance    = `\sum Q_\mathrm{in} = \sum Q_\mathrm{out}`
	formulaUpper      = `T_\mathrm{upper} = T_\mathrm{a} + f \left(T_\mathrm{inside} - T_\mathrm{a}\right)`
	formulaPressure   = `H = \frac{6356766\,z}{6356766 + z}, \quad T_H = 288.15 - 0.0065\,H, \quad p = 101325 \left(\frac{T_H}{288.15}\right)^{5.25588}`
	formulaDewPoint   = `\gamma = \ln \varphi + \frac{17.625\,t_\mathrm{a}}{243.04 + t_\mathrm{a}}, \quad t_\mathrm{d} = \frac{243.04\,\gamma}{17.625 - \gamma}`
	formulaCombine    = `U_{+} = \sqrt{\sum_i \max\left(0, \Delta_i\right)^2}, \quad U_{-} = \sqrt{\sum_i \min\left(0, \Delta_i\right)^2}`
)

// methods explains the model: its symbols, its equations, and each correlation
// in use.
func (n *note) methods() {
	n.sectionRoom("Methods", 46)
	n.symbols()
	n.balanceEquations()
	n.part("Correlations in use", 46)
	var films []checks.FilmRow
	for _, l := range n.o.Loads {
		films = append(films, l.Films...)
	}
	for _, u := range used(films) {
		n.correlation(u)
	}
	n.part("Air", 30)
	n.cited("Properties of dry air at the property temperature and the pressure stated: density ρ, specific heat, viscosity μ and conductivity k from published equations; the others follow from them.", fluid.Air.Sources()...)
	n.formula(formulaProperties)
	n.pressure()
}

// pressure tells how the pressure follows from the altitude.
func (n *note) pressure() {
	altitudes := n.altitudes()
	if len(altitudes) == 0 {
		return
	}
	if len(altitudes) == 1 && altitudes[0] == 0 {
		n.cited("At sea level the pressure is 101.325 kPa.", atmosphere)
		return
	}
	n.text("The pressure p in Pa follows from the altitude z, both lengths in m and T in K:")
	n.formula(formulaPressure, atmosphere)
	for _, z := range altitudes {
		for _, line := range pressureLines(z) {
			n.display(line, "")
		}
	}
}

// altitudes lists the altitudes, m, of the load cases that take their pressure
// from one.
func (n *note) altitudes() []float64 {
	var list []float64
	for _, l := range n.o.Loads {
		if s := l.Case.Surroundings; !s.Pressure.Set && !slices.Contains(list, s.Altitude.SI) {
			list = append(list, s.Altitude.SI)
		}
	}
	return list
}

// pressureLines is the standard atmosphere with numbers in it.
func pressureLines(z float64) []string {
	t := fluid.StandardTemperature(z)
	h := (288.15 - t) / 0.0065
	return []string{
		fmt.Sprintf(`H = \frac{6356766 \times %[1]s}{6356766 + %[1]s} = %[2]s\ \mathrm{m}, \quad T_H = 288.15 - 0.0065 \times %[2]s = %.3[3]f\ \mathrm{K}`, signed(z), signed(h), t),
		fmt.Sprintf(`p = 101325 \times \left(\frac{%.3f}{288.15}\right)^{5.25588} = %s\ \mathrm{Pa}`, t, digits(fluid.StandardPressure(z), 6)),
	}
}

func (n *note) balanceEquations() {
	c := n.o.Loads[0].Case
	n.part("Heat balance", 24)
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
		n.conductionEquations(b.Kind)
	}
	if c.Body.Kind == "box" {
		n.textf("Upper zone of the inside air, with the assumed factor f = %s. The factor applies to a rise; where the inside air is cooler than the air outside, the upper zone is taken at its mean:", orNone(c.Inside.UpperZone.Typed))
		n.formula(formulaUpper)
	}
	n.dewPoint()
	n.uncertaintyEquations()
}

// dewPoint prints the Magnus formula and works it out for each state of the
// air.
func (n *note) dewPoint() {
	var lines []string
	for _, l := range n.o.Loads {
		if s := l.Case.Surroundings; s.Humidity.Set && l.DewPointK > 0 {
			for _, line := range dewPointLines(s.Air.SI, s.Humidity.SI, l.DewPointK) {
				if !slices.Contains(lines, line) {
					lines = append(lines, line)
				}
			}
		}
	}
	if len(lines) == 0 {
		return
	}
	n.runs(pdf.Run{Text: "Dew point "}, inline(`t_\mathrm{d}`), pdf.Run{Text: " of air at "}, inline(`t_\mathrm{a}`), pdf.Run{Text: ", both in °C, with the relative humidity "}, inline(`\varphi`),
		pdf.Run{Text: " (Magnus form of Alduchov & Eskridge 1996; coefficients from memory):"})
	n.formula(formulaDewPoint, dewPointSource)
	for _, line := range lines {
		n.display(line, "")
	}
}

// dewPointLines is the dew point with numbers in it.
func dewPointLines(air, humidity, dew float64) []string {
	t, d := air-zeroCelsius, dew-zeroCelsius
	if !(humidity > 0) || t <= -243 {
		return nil
	}
	gamma := math.Log(humidity) + 17.625*t/(243.04+t)
	return []string{
		fmt.Sprintf(`\gamma = \ln\left(%s\right) + \frac{17.625 \times %s}{243.04 + %[2]s} = %s`, exactTeX(humidity), signed(t), digits(gamma, 6)),
		fmt.Sprintf(`t_\mathrm{d} = \frac{243.04 \times %s}{17.625 - %[1]s} = %s\ \mathrm{°C}`, bracketed(digits(gamma, 6)), digits(d, 4)),
	}
}

// bracketed puts brackets around a negative number in a formula.
func bracketed(number string) string {
	if strings.HasPrefix(number, "-") {
		return `\left(` + number + `\right)`
	}
	return number
}

// zeroCelsius is 0 °C in kelvin.
const zeroCelsius = 273.15

func (n *note) conductionEquations(kind string) {
	text := "Conduction through a layer with the mean conductivity between its two sides"
	switch kind {
	case "pipe", "sphere":
		text += ":"
	case "cylinder", "vessel":
		text += "; in plane layers A is the mean of the inner and the outer area:"
	default:
		text += "; A is the mean of the inner and the outer area of the layer:"
	}
	n.text(text)
	n.formula(conductionFormula(kind), fourierSource)
}

// uncertaintyEquations define U and how it is printed and used.
func (n *note) uncertaintyEquations() {
	n.text("Uncertainty: each input is shifted by about two standard deviations both ways and the balance solved anew. The changes Δ of a temperature are combined as the root of the sum of squares, those that warm it into one value and those that cool it into another:")
	n.formula(formulaCombine, gumSource)
	n.runs(append([]pdf.Run{{Text: "Every U is printed rounded up to two significant digits. Where one U is printed, it is the larger of "}, inline(`U_{+}`), {Text: " and "}, inline(`U_{-}`)},
		pdf.T(". A check takes the one on the side of its limit; for a limit that moves with the air (a rise, the dew point) without the uncertainty of the air, and for the dew point with that of the humidity. Probabilities are computed with the unrounded U.")...)...)
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
	whys   []string
	places []string
}

// usages collects correlations in the order they appear.
type usages []*usage

func (list *usages) add(m *freeconv.Correlation, why, place string) {
	i := slices.IndexFunc(*list, func(u *usage) bool { return u.method == m })
	if i < 0 {
		*list = append(*list, &usage{method: m})
		i = len(*list) - 1
	}
	u := (*list)[i]
	if !slices.Contains(u.whys, why) {
		u.whys = append(u.whys, why)
	}
	if place != "" && !slices.Contains(u.places, place) {
		u.places = append(u.places, place)
	}
}

// used lists the correlations behind films in the order they appear; a rule
// comes before the two laws that it joins.
func used(films []checks.FilmRow) usages {
	var list usages
	for _, f := range films {
		m, rule := f.Film.Method, f.Film.Rule
		switch {
		case m == nil:
		case rule == nil:
			list.add(m, f.Why, placeOf(f))
		default:
			part := "one of the two laws that the rule “" + rule.Name + "” joins"
			list.add(rule, f.Why, placeOf(f))
			list.add(m, part, placeOf(f))
			for _, law := range f.Film.Laws {
				list.add(law, part, "")
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
	n.correlationHead(u.method, 44)
	var rows []pdf.Row
	for _, f := range correlationFacts(u) {
		if f[1] != "" {
			rows = append(rows, pdf.Row{Cells: []pdf.Cell{{Runs: pdf.T(f[0])}, f2(f[1])}})
		}
	}
	n.tableIn(n.left()+6, n.width()-6, []pdf.Column{{Width: 32}, {Width: 132}}, rows)
}

// correlationHead is the name and the equation of a correlation.
func (n *note) correlationHead(m *freeconv.Correlation, room float64) {
	d := n.d
	d.Need(room)
	d.Space(1)
	n.margin(d.Y+3.6, n.refs.marks(m.Citation))
	d.Para(pdf.T(m.Name), boldStyle, n.left(), measure)
	d.Y += 0.8
	n.equation(m.Equation)
}

func f2(s string) pdf.Cell {
	if src, ok := strings.CutPrefix(s, "$"); ok {
		return mathCell(src)
	}
	return pdf.Cell{Runs: prose(s)}
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
		{"Length", lengthRule(m)},
		{"Property temperature", "$" + weighted(m.FilmWeight, `T`) + betaNote(m)},
		{"Range of the source", rangeOf(m)},
		{"Published scatter", scatterOf(m)},
		{"Form", capital(string(m.Verification))},
		{"Used on", strings.Join(u.places, ", ")},
		{"Why this one", capital(strings.Join(u.whys, "; "))},
		{"Note", m.Note},
	}
}

// lengthRule is the rule for the characteristic length in words.
func lengthRule(m *freeconv.Correlation) string {
	inclined := m.Fits(freeconv.InclinedUp) || m.Fits(freeconv.InclinedDown)
	switch {
	case m.IsRule() && inclined:
		return "that of the law that governs: slope length in the vertical law, A/P in the horizontal law"
	case m.IsRule():
		return "that of the law that governs"
	case m.Length == freeconv.Height && inclined:
		return "slope length"
	case m.Length == freeconv.Height && m.Fits(freeconv.VerticalPlate):
		return "height; slope length on an inclined plate"
	}
	return string(m.Length)
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
		return capital(m.ScatterNote) + "; the uncertainty of the film coefficient in the inputs is used"
	}
	return "None published; the uncertainty of the film coefficient in the inputs is used"
}

func hasSun(c caseOf) bool { return len(c.Surroundings.Sun) > 0 }
