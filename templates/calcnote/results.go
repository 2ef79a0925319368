package calcnote

import (
	"fmt"
	"math"
	"slices"
	"strings"

	"stillair/checks"
	"stillair/checks/unit"
	"stillair/templates/pdf"
)

// solution is the record of the solver.
func (n *note) solution() {
	n.section("Solution")
	n.text("Each balance is solved by successive linear solutions with the film and radiation coefficients of the step before, until temperatures and the heat balance close. The same balance is solved a second time by plain damped substitution; the largest difference between both is given.")
	var rows []pdf.Row
	for _, l := range n.o.Loads {
		row := cells(l.Name, string(l.Status), fmt.Sprint(l.Iterations), closure(l.ClosureW), fmt.Sprint(l.CrossCheck.Iterations), closure(l.CrossCheck.MaxDiffK), agrees(l))
		if l.Status != checks.Converged {
			for i := 3; i < len(row.Cells); i++ {
				row.Cells[i] = pdf.C(notComputed)
			}
		}
		rows = append(rows, n.markGoverning(row, l.Governing))
	}
	n.table([]pdf.Column{
		{Head: "Load case", Width: 40}, {Head: "Status", Width: 26}, {Head: "Steps", Width: 14, Align: pdf.AlignRight}, {Head: "Heat left over / W", Width: 24, Align: pdf.AlignRight},
		{Head: "Damped steps", Width: 20, Align: pdf.AlignRight}, {Head: "Difference / K", Width: 24, Align: pdf.AlignRight}, {Head: "Agrees", Width: 18}}, rows)
	for _, l := range n.o.Loads {
		if l.Message != "" {
			n.bullet(capital(l.Message))
		}
	}
	n.record()
}

func (n *note) markGoverning(r pdf.Row, governing bool) pdf.Row {
	if governing && len(n.o.Loads) > 1 {
		r.Cells[0].Face = pdf.Bold
		r.Shade = true
	}
	return r
}

func closure(x float64) string { return plainDigits(x, 2) }

func agrees(l checks.LoadOutcome) string {
	if l.CrossCheck.Agrees {
		return "yes"
	}
	if l.CrossCheck.Iterations == 0 {
		return notComputed
	}
	return "no"
}

// most rows of an iteration record that are printed.
const recordRows = 16

func (n *note) record() {
	rec := n.load().Record
	if len(rec) == 0 {
		return
	}
	n.part(fmt.Sprintf("Iteration record of “%s”", n.load().Name), 24)
	var rows []pdf.Row
	for i, it := range rec {
		if len(rec) > recordRows && i == recordRows-4 {
			rows = append(rows, cells("…", "", fmt.Sprintf("%d steps left out", len(rec)-recordRows+1)))
		}
		if len(rec) > recordRows && i >= recordRows-4 && i < len(rec)-3 {
			continue
		}
		rows = append(rows, cells(fmt.Sprint(it.N), closure(it.ClosureW), closure(it.ChangeK)))
	}
	n.tableIn(n.left(), 90, []pdf.Column{{Head: "Step", Width: 14, Align: pdf.AlignRight}, {Head: "Largest heat left over / W", Width: 38, Align: pdf.AlignRight}, {Head: "Largest change / K", Width: 38, Align: pdf.AlignRight}}, rows)
}

// loadsATable is how many load cases stand side by side.
const loadsATable = 5

// results are the temperatures and heat flows of all load cases side by side.
func (n *note) results() {
	n.sectionRoom("Results by load case", 72)
	if !n.converged() {
		n.text("Not computed: no load case has a valid result.")
		return
	}
	unitText := n.tempUnit()
	n.textf("Temperatures in %s with their uncertainty U in %s; ▲ marks the highest value of a row over all load cases. The governing load case is “%s”.", unitText, n.diffUnit(), n.load().Name)
	n.part("Temperatures", 30)
	n.matrix("At", n.places(), n.temperatureCell)
	n.part("Heat that leaves, by face and way, in W", 30)
	n.textf("Positive to the air and the surroundings; negative values come in.")
	n.matrix("Face and way", n.ways(), n.wayCell)
	n.part("Film coefficients in "+n.sys.Unit(unit.Coefficient), 30)
	n.matrix("Film", n.filmPlaces(), n.filmCell)
	n.loadRemarks()
}

// matrix is a table with a column per load case, continued below when there
// are many.
func (n *note) matrix(head string, rows []string, cell func(l checks.LoadOutcome, row string) pdf.Cell) {
	for chunk := range slices.Chunk(n.o.Loads, loadsATable) {
		cols := []pdf.Column{{Head: head, Width: 48}}
		for _, l := range chunk {
			name := l.Name
			if l.Governing && len(n.o.Loads) > 1 {
				name += " (governing)"
			}
			cols = append(cols, pdf.Column{Head: name, Width: 26, Align: pdf.AlignRight})
		}
		if spare := loadsATable - len(chunk); spare > 0 {
			cols = append(cols, pdf.Column{Width: 26 * float64(spare)})
		}
		var out []pdf.Row
		for _, r := range rows {
			row := cells(r)
			for _, l := range chunk {
				row.Cells = append(row.Cells, cell(l, r))
			}
			out = append(out, row)
		}
		n.table(cols, out)
	}
}

// collect lists what the load cases name, in order of appearance.
func (n *note) collect(names func(checks.LoadOutcome) []string) []string {
	var list []string
	for _, l := range n.o.Loads {
		for _, s := range names(l) {
			if !slices.Contains(list, s) {
				list = append(list, s)
			}
		}
	}
	return list
}

func (n *note) places() []string {
	return n.collect(func(l checks.LoadOutcome) (names []string) {
		for _, t := range l.Temps {
			names = append(names, t.At)
		}
		return names
	})
}

func (n *note) temperatureCell(l checks.LoadOutcome, at string) pdf.Cell {
	for _, t := range l.Temps {
		if t.At == at {
			s := n.barePM(t.K, uncertaintyOf(t))
			if t.Governing && len(n.o.Loads) > 1 {
				s = "▲\u00A0" + s
			}
			return pdf.C(s)
		}
	}
	return pdf.C(notComputed)
}

const (
	sunWay   = "sun taken in"
	totalWay = "net heat shed by the body"
)

func (n *note) ways() []string {
	list := n.collect(func(l checks.LoadOutcome) (names []string) {
		for _, h := range l.Heat {
			if h.Final {
				names = append(names, h.From+", "+h.By)
			}
		}
		return names
	})
	if n.loadsWith(hasSun) != "" {
		list = append(list, sunWay)
	}
	return append(list, totalWay)
}

func (n *note) wayCell(l checks.LoadOutcome, way string) pdf.Cell {
	if l.Status != checks.Converged {
		return pdf.C(notComputed)
	}
	sum, found := 0.0, way == sunWay
	for _, h := range l.Heat {
		if way == sunWay && h.By == "sun" || h.Final && h.From+", "+h.By == way {
			sum, found = sum+h.W, true
		}
	}
	if way == totalWay {
		return pdf.Cell{Runs: pdf.T(n.bare(unit.Power, l.HeatW, 1)), Face: pdf.Bold}
	}
	if !found {
		return pdf.C("–")
	}
	return pdf.C(n.bare(unit.Power, sum, 1))
}

func (n *note) filmPlaces() []string {
	return n.collect(func(l checks.LoadOutcome) (names []string) {
		for _, f := range l.Films {
			names = append(names, placeOf(f))
		}
		return names
	})
}

func (n *note) filmCell(l checks.LoadOutcome, place string) pdf.Cell {
	for _, f := range l.Films {
		if placeOf(f) == place {
			decimals := 2
			if n.sys == unit.US {
				decimals = 3 // the unit is more than five times as large
			}
			s := n.bare(unit.Coefficient, f.H, decimals)
			if !f.InRange {
				s += " *"
			}
			return pdf.C(s)
		}
	}
	return pdf.C(notComputed)
}

// loadRemarks prints what the calculation noted on single load cases.
func (n *note) loadRemarks() {
	var list []string
	for _, l := range n.o.Loads {
		for _, s := range l.Notes {
			list = append(list, fmt.Sprintf("%s: %s.", l.Name, strings.TrimSuffix(s, ".")))
		}
		if l.DewPointK > 0 {
			list = append(list, fmt.Sprintf("%s: the dew point of the air is %s.", l.Name, n.temp(l.DewPointK)))
		}
	}
	if len(list) == 0 {
		return
	}
	n.part("Remarks on load cases (* film outside the range of its source)", 12)
	for _, s := range list {
		n.bullet(s)
	}
}

// checks compares with the limits.
func (n *note) checks() {
	n.section("Checks against limits")
	groups := n.limits()
	if len(groups) == 0 {
		n.text("No limit was judged: the case gives none that applies to a load case with a result.")
		return
	}
	n.decisionRule()
	n.text("Bold rows govern: the smallest margin for that limit over all load cases. P is the probability that the limit is met.")
	var rows []pdf.Row
	for _, g := range groups {
		rows = append(rows, n.limitRows(g)...)
	}
	n.table([]pdf.Column{
		{Head: "Load case", Width: 28}, {Head: "At", Width: 22}, {Head: "Limit", Width: 17, Align: pdf.AlignRight}, {Head: "Calculated ± U", Width: 36, Align: pdf.AlignRight},
		{Head: "Margin", Width: 17, Align: pdf.AlignRight}, {Head: "Verdict", Width: 34}, {Head: "P", Width: 15, Align: pdf.AlignRight}}, rows)
	n.thresholds(groups)
	n.conclusion()
}

// judgedRow is one verdict with its load case.
type judgedRow struct {
	load string
	v    checks.Judged
}

// limits groups the verdicts by limit.
func (n *note) limits() [][]judgedRow {
	var keys []string
	byKey := map[string][]judgedRow{}
	for _, l := range n.o.Loads {
		for _, v := range l.Verdicts {
			key := v.Limit + "|" + v.Source
			if byKey[key] == nil {
				keys = append(keys, key)
			}
			byKey[key] = append(byKey[key], judgedRow{l.Name, v})
		}
	}
	var groups [][]judgedRow
	for _, k := range keys {
		groups = append(groups, byKey[k])
	}
	return groups
}

func (n *note) limitRows(g []judgedRow) []pdf.Row {
	first := g[0].v
	head := capital(first.Limit) + ": " + shortSource(first.Source)
	if !strings.HasPrefix(first.Source, "project limit") {
		head += " " + n.refs.marks(first.Source)
	}
	if first.Why != "" && !strings.Contains(first.Source, first.Why) {
		head += "  (" + first.Why + ")"
	}
	if first.Confidence != "" && first.Confidence != "high" {
		head += "; confidence in the quotation: " + first.Confidence
	}
	rows := []pdf.Row{{Cells: []pdf.Cell{pdf.C("")}, Span: pdf.T(head), Strong: true}}
	for _, j := range g {
		v := j.v
		r := cells(j.load, v.At, n.temp(v.LimitK), n.pm(v.ValueK, v.Uncertainty), n.diff(v.MarginK), "", percent(v.Conformance))
		r.Cells[5] = pdf.Cell{Runs: verdictRuns(v.Verdict)}
		if v.Governing {
			r.Shade = true
			for i := range r.Cells {
				r.Cells[i].Face = pdf.Bold
			}
		}
		rows = append(rows, r)
	}
	return rows
}

// percent is a probability that never pretends to be certain.
func percent(p float64) string {
	switch {
	case math.IsNaN(p):
		return notComputed
	case p > 0.999:
		return ">\u00A099.9\u00A0%"
	case p < 0.001:
		return "<\u00A00.1\u00A0%"
	}
	return fmt.Sprintf("%.1f\u00A0%%", 100*p)
}

// thresholds prints how touch limits were found.
func (n *note) thresholds(groups [][]judgedRow) {
	for _, g := range groups {
		v := g[0].v
		if len(v.Steps) == 0 {
			continue
		}
		n.textf("How the limit “%s” was found:", v.Limit)
		for _, s := range v.Steps {
			n.bullet(s)
		}
	}
}

func (n *note) conclusion() {
	n.part("Conclusion", 14)
	n.runs(append([]pdf.Run{{Inline: sign{n.o.Verdict}}, {Text: capital(string(n.o.Verdict)) + ". ", Face: pdf.Bold}}, pdf.T(strings.Join(n.verdictSentences(), " "))...)...)
	if len(n.o.Cautions) > 0 {
		n.text("A touch verdict is a comparison with a quoted number, not a statement about persons. Local codes and the practice of licensed engineers come first; see the cautions.")
	}
}

// second compares with other published correlations.
func (n *note) second() {
	n.section("Second method")
	s := n.load().Second
	if s == nil || len(s.Rows) == 0 {
		n.text("Not computed for the governing load case.")
		return
	}
	n.textf("The same balance of load case “%s” with another published correlation on every face: %s. The difference shows how far sound methods disagree; it is not an error of either.", n.load().Name, strings.Join(s.Methods, "; "))
	var rows []pdf.Row
	for _, r := range s.Rows {
		rows = append(rows, cells(r.At, n.bare(unit.Temperature, r.FirstK, 1), n.bare(unit.Temperature, r.K, 1), signText(n.sys.Value(unit.TemperatureDifference, r.DiffK))))
	}
	n.tableIn(n.left(), measure, []pdf.Column{{Head: "At", Width: 58}, {Head: "This note / " + n.tempUnit(), Width: 26, Align: pdf.AlignDecimal},
		{Head: "Second / " + n.tempUnit(), Width: 26, Align: pdf.AlignDecimal}, {Head: "Difference / " + n.diffUnit(), Width: 26, Align: pdf.AlignDecimal}}, rows)
	n.otherSecond()
}

func (n *note) otherSecond() {
	var rows []pdf.Row
	for _, l := range n.o.Loads {
		if l.Governing || l.Second == nil {
			continue
		}
		at, most := "", 0.0
		for _, r := range l.Second.Rows {
			if math.Abs(r.DiffK) >= math.Abs(most) {
				at, most = r.At, r.DiffK
			}
		}
		rows = append(rows, cells(l.Name, dash(at), signText(n.sys.Value(unit.TemperatureDifference, most))))
	}
	if len(rows) > 0 {
		n.tableIn(n.left(), measure, []pdf.Column{{Head: "Other load cases", Width: 58}, {Head: "Largest difference at", Width: 52}, {Head: "Difference / " + n.diffUnit(), Width: 26, Align: pdf.AlignDecimal}}, rows)
	}
}

func signText(x float64) string { return strings.Replace(fmt.Sprintf("%+.1f", x), "-0.0", "+0.0", 1) }

// effectRows is how many effects are worth a row.
const effectRows = 12

// sensitivity ranks what moves the temperatures that decide.
func (n *note) sensitivity() {
	n.section("What matters most")
	places := n.decisivePlaces()
	if len(n.load().Effects) == 0 || len(places) == 0 {
		n.text("Not computed for the governing load case.")
		return
	}
	n.textf("Load case “%s”: change of the temperature when one input is shifted both ways, the largest first. Filled bar: shifted up; hollow bar: shifted down. All bars of a table have one scale.", n.load().Name)
	for _, at := range places {
		n.effects(at)
	}
}

// decisivePlaces are the place of the decisive check and the hottest face.
func (n *note) decisivePlaces() []string {
	var list []string
	l := n.load()
	if v, load := n.decisive(); v != nil && load == l.Name {
		list = append(list, v.At)
	}
	hot, _ := hottestFace(*l)
	at := hot.At
	if len(list) == 0 && len(l.Temps) > 0 {
		list = append(list, l.Temps[0].At)
	}
	if at != "" && !slices.Contains(list, at) {
		list = append(list, at)
	}
	return list
}

func (n *note) effects(at string) {
	ranked := n.load().Ranked(at)
	if len(ranked) == 0 {
		return
	}
	n.part(capital(at), 30)
	largest := math.Max(math.Abs(ranked[0].UpK), math.Abs(ranked[0].DownK))
	barWidth := 34.0
	var rows []pdf.Row
	for i, e := range ranked {
		if i == effectRows {
			rows = append(rows, cells("", fmt.Sprintf("%s with smaller effects: in the attached results", plural(len(ranked)-effectRows, "more shift", "more shifts"))))
			break
		}
		row := cells(fmt.Sprint(i+1), e.Of, e.Shift, n.effect(e.UpK), n.effect(e.DownK), "")
		if largest > 0 {
			row.Cells[5] = pdf.Cell{Runs: []pdf.Run{{Inline: bar{barWidth, e.UpK / largest, e.DownK / largest}}}}
		}
		rows = append(rows, row)
	}
	n.table([]pdf.Column{{Head: "", Width: 6, Align: pdf.AlignRight}, {Head: "Input shifted", Width: 68}, {Head: "Shift", Width: 24},
		{Head: "Up / " + n.diffUnit(), Width: 17, Align: pdf.AlignDecimal}, {Head: "Down / " + n.diffUnit(), Width: 19, Align: pdf.AlignDecimal},
		{Head: fmt.Sprintf("− %[1]s … 0 … + %[1]s", n.bare(unit.TemperatureDifference, largest, 1)), Width: barWidth + 2, Align: pdf.AlignCentre}}, rows)
	for _, t := range n.load().Temps {
		if t.At == at {
			n.textf("Together: U = + %s / − %s on %s.", n.diff(t.PlusK), n.diff(t.MinusK), n.temp(t.K))
		}
	}
}

func (n *note) effect(k float64) string {
	return strings.Replace(fmt.Sprintf("%+.2f", n.sys.Value(unit.TemperatureDifference, k)), "-0.00", "+0.00", 1)
}
