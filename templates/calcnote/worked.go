package calcnote

import (
	"fmt"
	"math"
	"slices"
	"strconv"
	"strings"

	"stillair/checks"
	"stillair/checks/casefile"
	"stillair/checks/unit"
	"stillair/freeconv"
	"stillair/templates/pdf"
)

type caseOf = casefile.Case

// sigma is the Stefan-Boltzmann constant as the worked surfaces print it.
const sigmaText = `5.670374 \times 10^{-8}`

// Rounding is the promise of the worked surfaces: what a reader gets by redoing
// a line from its printed numbers agrees with the printed result this well.
const Rounding = 0.001

// worked substitutes numbers into the equations, one surface per kind of film.
func (n *note) worked() {
	n.section("Worked surfaces")
	l := n.load()
	if l.Status != checks.Converged || len(l.Films) == 0 {
		n.text("Not computed: the governing load case has no valid result.")
		return
	}
	n.textf("Load case “%s”, one surface for each kind of film, the one that carries the most heat. Temperatures are those of the converged solution. "+
		"The program carries all digits and rounds once, for print; a line redone from its printed numbers agrees with its printed result within 0.1 %%. Units are SI.", l.Name)
	shown := map[int]bool{}
	for _, i := range representative(l.Films) {
		shown[i] = true
		n.surface(l.Films[i])
	}
	n.layersWorked()
	n.wholeBody()
	n.otherFilms(shown)
}

// representative picks, for every side and method, the film with the most heat.
func representative(films []checks.FilmRow) []int {
	type group struct{ side, kind, method string }
	best := map[group]int{}
	var order []group
	for i, f := range films {
		g := group{f.Side, string(f.Film.Kind), f.MethodID}
		j, seen := best[g]
		if !seen {
			order = append(order, g)
		}
		if f.Film.Method != nil && (!seen || math.Abs(f.W) > math.Abs(films[j].W)) {
			best[g] = i
		}
	}
	var list []int
	for _, g := range order {
		if i, ok := best[g]; ok {
			list = append(list, i)
		}
	}
	return list
}

// surface is one film with numbers for every symbol.
func (n *note) surface(f checks.FilmRow) {
	v := f.Film
	if v.Method == nil {
		return
	}
	n.part(fmt.Sprintf("%s, %s: %s", capital(f.At), f.Side, v.Kind), 56)
	n.d.Y += 0.5
	n.cited(fmt.Sprintf("%s; %s; %s.", f.Method, strings.ReplaceAll(f.Length, " ", "\u00A0"), v.Regime), v.Method.Citation)
	n.givens(f)
	for _, line := range n.surfaceLines(f) {
		n.display(line, "")
	}
	n.closing(f)
	for _, s := range f.Notes {
		n.d.Para(pdf.T("Remark: "+s), smallStyle, n.left()+6, measure-6)
		n.d.Y += 1
	}
	if !f.InRange {
		n.d.Para(pdf.T("Outside the range of the source: "+f.Range), smallStyle.With(pdf.Bold), n.left()+6, measure-6)
	}
}

// surfaceLines are the equations of a surface with numbers in them, in the
// order a reader redoes them.
func (n *note) surfaceLines(f checks.FilmRow) []string {
	v := f.Film
	lines := append([]string{rayleighLine(v)}, nusseltLines(v)...)
	lines = append(lines,
		fmt.Sprintf(`h = \frac{Nu\,k}{L} = \frac{%s \times %s}{%s} = %s\ \mathrm{W/(m²·K)}`,
			digits(v.Nu, 5), digits(v.Props.K, 5), digits(v.Length, 5), digits(v.H, 5)),
		convectionLine(f))
	if f.Side == "inside" {
		return append(lines, n.insideLines(f)...)
	}
	return append(lines, n.outsideLines(f)...)
}

// givens is the table of what goes into the formulas.
func (n *note) givens(f checks.FilmRow) {
	v, p := f.Film, f.Film.Props
	type given struct{ symbol, value, unit string }
	celsius := func(k float64) string {
		return fmt.Sprintf("%.3f", k)
	}
	list := []given{
		{`T_\mathrm{s}`, celsius(v.Ts), "K  (" + n.temp(v.Ts) + ")"},
		{`T_\mathrm{a}`, celsius(v.Ta), "K  (" + n.temp(v.Ta) + ")"},
		{`\Delta T`, plainDigits(v.DT, 5), "K"},
		{`T`, celsius(v.TProps), "K, property temperature"},
		{`\beta = 1/T_\beta`, plainDigits(1/v.TBeta, 5), fmt.Sprintf("1/K, at %.3f\u00A0K", v.TBeta)},
		{`g`, plainDigits(v.Gravity, 6), "m/s²"},
		{`L`, plainDigits(v.Length, 5), "m"},
		{`A`, plainDigits(f.AreaM2, 5), "m²"},
		{`p`, plainDigits(p.P/1000, 6), "kPa"},
		{`\rho`, plainDigits(p.Rho, 5), "kg/m³"},
		{`c_p`, plainDigits(p.Cp, 6), "J/(kg·K)"},
		{`\mu`, plainDigits(p.Mu, 5), "Pa·s"},
		{`k`, plainDigits(p.K, 5), "W/(m·K)"},
		{`\nu`, plainDigits(p.Nu, 5), "m²/s"},
		{`\alpha`, plainDigits(p.Alpha, 5), "m²/s"},
		{`Pr`, plainDigits(p.Pr, 5), ""},
	}
	half := (len(list) + 1) / 2
	var rows []pdf.Row
	for i := range half {
		a, b := list[i], list[i+half]
		rows = append(rows, pdf.Row{Cells: []pdf.Cell{mathCell(a.symbol), pdf.C(a.value), pdf.C(a.unit), mathCell(b.symbol), pdf.C(b.value), pdf.C(b.unit)}})
	}
	n.tableIn(n.left()+6, measure, []pdf.Column{
		{Head: "Symbol", Width: 17}, {Head: "Value", Width: 21, Align: pdf.AlignRight}, {Head: "Unit", Width: 40},
		{Head: "Symbol", Width: 15}, {Head: "Value", Width: 24, Align: pdf.AlignRight}, {Head: "Unit", Width: 22}}, rows)
}

func rayleighLine(v freeconv.Film) string {
	return fmt.Sprintf(`Ra = \frac{g\,\beta \left|\Delta T\right| L^3}{\nu\,\alpha} = \frac{%s \times %s \times %s \times %s^3}{%s \times %s} = %s`,
		digits(v.Gravity, 6), digits(1/v.TBeta, 5), digits(math.Abs(v.DT), 5), digits(v.Length, 5),
		digits(v.Props.Nu, 5), digits(v.Props.Alpha, 5), digits(v.Ra, 5))
}

// nusseltLines is the correlation with its numbers, as its record writes it,
// side equations first.
func nusseltLines(v freeconv.Film) []string {
	result := ` = ` + digits(v.Nu, 5)
	if v.Method.Substitute == nil {
		return []string{`Nu` + result}
	}
	src := strings.ReplaceAll(quantities(v.Method.Substitute(v.In)), `\cdot`, `\times`)
	lines := strings.Split(src, "\n")
	slices.Reverse(lines)
	lines[len(lines)-1] += result
	return lines
}

func convectionLine(f checks.FilmRow) string {
	v := f.Film
	diff, dt := `T_\mathrm{s} - T_\mathrm{a}`, v.DT
	if f.Side == "inside" {
		diff, dt = `T_\mathrm{a} - T_\mathrm{s}`, -v.DT
	}
	return fmt.Sprintf(`Q_\mathrm{c} = h\,A \left(%s\right) = %s \times %s \times %s = %s\ \mathrm{W}`,
		diff, digits(v.H, 5), digits(f.AreaM2, 5), signed(dt), digits(f.W, 5))
}

// exact writes a typed number without padding.
func exact(x float64) string { return strconv.FormatFloat(x, 'g', 6, 64) }

// signed puts a negative number in brackets, so that it can follow an operator.
func signed(x float64) string {
	if x < 0 {
		return `\left(` + digits(x, 5) + `\right)`
	}
	return digits(x, 5)
}

// outsideLines are radiation, sun and their sum with the convection.
func (n *note) outsideLines(f checks.FilmRow) []string {
	l := n.load()
	rad, ok := find(l.Heat, func(h checks.HeatPath) bool { return h.From == f.At && h.By == "radiation" && h.Final })
	if !ok {
		return nil
	}
	c := l.Case
	tr := c.Surroundings.Radiant.SI
	if q, own := c.Surroundings.Sees[f.At]; own {
		tr = q.SI
	}
	lines := []string{radiationLine(c.Body.Emissivity.Typical, f.AreaM2, f.Film.Ts, tr, rad.W, `T_\mathrm{s}^4 - T_\mathrm{r}^4`)}
	sum, numbers, total := `Q_\mathrm{c} + Q_\mathrm{r}`, digits(f.W, 5)+` + `+signed(rad.W), f.W+rad.W
	if sun, ok := find(l.Heat, func(h checks.HeatPath) bool { return h.To == f.At && h.By == "sun" }); ok {
		lines = append(lines, fmt.Sprintf(`Q_\mathrm{s} = \alpha_\mathrm{s}\,G\,A = %s \times %s \times %s = %s\ \mathrm{W}`,
			exact(c.Body.Absorb.Typical), exact(c.Surroundings.Sun[f.At].SI), digits(f.AreaM2, 5), digits(sun.W, 5)))
		sum += ` - Q_\mathrm{s}`
		numbers += ` - ` + signed(sun.W)
		total -= sun.W
	}
	return append(lines, fmt.Sprintf(`%s = %s = %s\ \mathrm{W}`, sum, numbers, digits(total, 5)))
}

// insideLines are the radiation to the wall and its sum with the convection.
func (n *note) insideLines(f checks.FilmRow) []string {
	l := n.load()
	rad, ok := find(l.Heat, func(h checks.HeatPath) bool {
		return h.By == "radiation" && !h.Final && (h.To == f.At || h.To == f.At+", inside")
	})
	if !ok {
		return nil
	}
	return []string{
		radiationLine(l.Case.Inside.Emissivity.SI, f.AreaM2, f.Film.Ta, f.Film.Ts, rad.W, `T_\mathrm{a}^4 - T_\mathrm{s}^4`),
		fmt.Sprintf(`Q_\mathrm{c} + Q_\mathrm{r} = %s + %s = %s\ \mathrm{W}`, digits(f.W, 5), signed(rad.W), digits(f.W+rad.W, 5)),
	}
}

// closing compares what leaves the face with what reaches it from the body.
func (n *note) closing(f checks.FilmRow) {
	if f.Side == "inside" {
		n.text("The inside air stands for the equipment; this heat goes on through the wall.")
		return
	}
	in, out := 0.0, 0.0
	found := false
	for _, h := range n.load().Heat {
		switch {
		case h.Final && h.From == f.At:
			out += h.W
		case h.By == "sun" && h.To == f.At:
			out -= h.W
		case h.To == f.At:
			in, found = in+h.W, true
		}
	}
	if found {
		n.textf("From inside the body %s\u00A0W reach this face: the balance closes within %s\u00A0W.", plainDigits(in, 5), plainDigits(math.Abs(in-out), 1))
	}
}

// wholeBody adds up all faces: what leaves must be what the body gets.
func (n *note) wholeBody() {
	l := n.load()
	sum := map[string]float64{}
	for _, h := range l.Heat {
		if h.Final || h.By == "sun" {
			sum[h.By] += h.W
		}
	}
	n.part("All faces together", 20)
	symbols, numbers := `\sum Q_\mathrm{c} + \sum Q_\mathrm{r}`, digits(sum["convection"], 6)+` + `+signed(sum["radiation"])
	if sum["sun"] != 0 {
		symbols += ` - \sum Q_\mathrm{s}`
		numbers += ` - ` + digits(sum["sun"], 6)
	}
	n.display(fmt.Sprintf(`%s = %s = %s\ \mathrm{W}`, symbols, numbers, digits(l.HeatW, 6)), "")
	if l.Case.Heat.Set {
		n.textf("The heat to shed is %s\u00A0W; the largest heat left over anywhere in the balance is %s\u00A0W.", exact(l.Case.Heat.SI), closure(l.ClosureW))
	}
}

func radiationLine(eps, area, t1, t2, w float64, powers string) string {
	return fmt.Sprintf(`Q_\mathrm{r} = \varepsilon\,\sigma\,A \left(%s\right) = %s \times %s \times %s \times \left(%.3f^4 - %.3f^4\right) = %s\ \mathrm{W}`,
		powers, exact(eps), sigmaText, digits(area, 5), t1, t2, digits(w, 5))
}

func find(list []checks.HeatPath, is func(checks.HeatPath) bool) (checks.HeatPath, bool) {
	for _, h := range list {
		if is(h) {
			return h, true
		}
	}
	return checks.HeatPath{}, false
}

// otherFilms is the table of the films that were not worked out above.
func (n *note) otherFilms(shown map[int]bool) {
	films := n.load().Films
	if len(films) == len(shown) {
		return
	}
	n.part("All films of this load case", 30)
	var rows []pdf.Row
	for _, f := range films {
		r := cells(placeOf(f), string(f.Film.Kind), plainDigits(f.LengthM, 4), fmt.Sprintf("%.2f", f.FilmK), plainDigits(f.Ra, 4), plainDigits(f.Nu, 4),
			n.bare(unit.Coefficient, f.H, 3), plainDigits(f.AreaM2, 4), n.bare(unit.Power, f.W, 2), inRange(f))
		rows = append(rows, r)
	}
	n.table([]pdf.Column{
		{Head: "Film", Width: 29}, {Head: "Situation", Width: 41}, {Head: "L / m", Width: 14, Align: pdf.AlignDecimal}, {Head: "T / K", Width: 14, Align: pdf.AlignDecimal},
		{Head: "Ra", Width: 19}, {Head: "Nu", Width: 13, Align: pdf.AlignDecimal}, {Head: "h / " + n.sys.Unit(unit.Coefficient), Width: 18, Align: pdf.AlignDecimal},
		{Head: "A / m²", Width: 14, Align: pdf.AlignDecimal}, {Head: "Q / W", Width: 15, Align: pdf.AlignDecimal}, {Head: "In range", Width: 12}}, rows)
}

func inRange(f checks.FilmRow) string {
	if f.InRange {
		return "yes"
	}
	return "no"
}
