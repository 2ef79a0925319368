package calcnote

import (
	"fmt"
	"math"
	"strings"

	"stillair/checks"
	"stillair/checks/unit"
	"stillair/freeconv"
	"stillair/templates/pdf"
)

// second compares with other published correlations.
func (n *note) second() {
	n.sectionRoom("Second method", 50)
	s := n.load().Second
	if s == nil || len(s.Rows) == 0 {
		n.text("Not computed for the governing load case.")
		return
	}
	n.textf("The same balance of load case “%s” with another published correlation on every face. The difference shows how far the two published sets disagree; it is not an error of either.", n.load().Name)
	n.secondOutside()
	n.secondChanges()
	n.secondRows(s)
	n.otherSecond()
	n.secondHeat()
	n.secondMethods()
	n.secondFilms(s)
}

// secondOutside names the films of the second method that are outside the
// range of their source.
func (n *note) secondOutside() {
	var parts []string
	for _, l := range n.o.Loads {
		if l.Second == nil {
			continue
		}
		var places []string
		for _, f := range l.Second.Films {
			if !f.InRange {
				places = append(places, placeOf(f))
			}
		}
		if len(places) > 0 {
			parts = append(parts, fmt.Sprintf("load case “%s”: %s", l.Name, strings.Join(places, ", ")))
		}
	}
	if len(parts) > 0 {
		n.textf("The second method is outside the range of its source in %s. Where that is so, the difference is no measure of the uncertainty.", strings.Join(parts, "; "))
	}
}

// secondChanges lists the checks whose verdict the second method changes.
func (n *note) secondChanges() {
	var rows []pdf.Row
	judged := false
	for _, l := range n.o.Loads {
		judged = judged || l.Second != nil && len(l.Second.Verdicts) > 0
		for _, v := range l.Second.Changed() {
			rows = append(rows, cells(l.Name, v.At, minus(v.Limit), n.bare(unit.Temperature, v.LimitK, 1), n.barePM(v.ValueK, v.U), string(v.First), string(v.Second)))
		}
	}
	switch {
	case len(rows) > 0:
		n.text("Verdicts that the second method changes; its value is judged with the U of this note:")
		n.table([]pdf.Column{{Head: "Load case", Width: 28}, {Head: "At", Width: 18}, {Head: "Limit", Width: 30}, {Head: "Limit / " + n.tempUnit(), Width: 16, Align: pdf.AlignRight},
			{Head: "Second ± U / " + n.tempUnit(), Width: 30, Align: pdf.AlignRight}, {Head: "This note", Width: 25}, {Head: "Second", Width: 25}}, rows)
	case judged:
		n.text(changesNothing)
	}
}

const changesNothing = "The second method changes no verdict."

// secondHeat compares the heat shed. A heat that is given is the same for both.
func (n *note) secondHeat() {
	var rows []pdf.Row
	most := n.largestHeat()
	for _, l := range n.o.Loads {
		if s := l.Second; l.Case.Contents.Set && s != nil && s.Status == checks.Converged {
			rows = append(rows, cells(l.Name, n.bareWatts(l.HeatW, most), n.bareWatts(s.HeatW, most), n.bareWatts(s.HeatW-l.HeatW, most)))
		}
	}
	if len(rows) == 0 {
		n.text("The heat to shed is given, so both methods shed the same.")
		return
	}
	n.tableIn(n.left(), measure, []pdf.Column{{Head: "Heat shed", Width: 58}, {Head: "This note / W", Width: 28, Align: pdf.AlignDecimal},
		{Head: "Second / W", Width: 28, Align: pdf.AlignDecimal}, {Head: "Difference / W", Width: 30, Align: pdf.AlignDecimal}}, rows)
}

func (n *note) secondRows(s *checks.SecondMethod) {
	var rows []pdf.Row
	for _, r := range s.Rows {
		rows = append(rows, cells(r.At, n.bare(unit.Temperature, r.FirstK, 1), n.bare(unit.Temperature, r.K, 1), signText(n.sys.Value(unit.TemperatureDifference, r.DiffK), 1)))
	}
	n.tableIn(n.left(), measure, []pdf.Column{{Head: "At", Width: 58}, {Head: "This note / " + n.tempUnit(), Width: 28, Align: pdf.AlignDecimal},
		{Head: "Second / " + n.tempUnit(), Width: 28, Align: pdf.AlignDecimal}, {Head: "Difference / " + n.diffUnit(), Width: 30, Align: pdf.AlignDecimal}}, rows)
	n.small(unrounded)
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
		rows = append(rows, cells(l.Name, dash(at), signText(n.sys.Value(unit.TemperatureDifference, most), 1)))
	}
	if len(rows) > 0 {
		n.tableIn(n.left(), measure, []pdf.Column{{Head: "Other load cases", Width: 58}, {Head: "Largest difference at", Width: 56}, {Head: "Difference / " + n.diffUnit(), Width: 30, Align: pdf.AlignDecimal}}, rows)
	}
}

// secondMethods prints the correlations of all load cases that section 4 does
// not have.
func (n *note) secondMethods() {
	n.part("Its correlations", 34)
	shown := map[*freeconv.Correlation]bool{}
	for _, l := range n.o.Loads {
		for _, u := range used(l.Films) {
			shown[u.method] = true
		}
	}
	for _, u := range used(n.secondFilmsOfAll()) {
		if shown[u.method] {
			n.text(u.method.Name + ": see the section on methods.")
			continue
		}
		n.correlationHead(u.method, 26)
		n.d.Para(append([]pdf.Run{inline(weighted(u.method.FilmWeight, `T`) + betaNote(u.method)), {Text: ". "}}, prose(secondFacts(u))...), smallStyle, n.left()+6, n.width()-6)
		n.d.Y += 1.2
	}
}

// secondFilmsOfAll are the films of the second method in all load cases.
func (n *note) secondFilmsOfAll() []checks.FilmRow {
	var films []checks.FilmRow
	for _, l := range n.o.Loads {
		if l.Second != nil {
			films = append(films, l.Second.Films...)
		}
	}
	return films
}

// secondFacts is the record of a correlation in a few words.
func secondFacts(u *usage) string {
	m := u.method
	s := fmt.Sprintf("Length: %s. Range: %s. Form %s.", lengthRule(m), rangeOf(m), m.Verification)
	if len(u.places) > 0 {
		s += " Used on " + strings.Join(u.places, ", ") + "."
	}
	return s + " " + m.Note
}

// secondColumns is how many films stand side by side.
const secondColumns = 6

// secondFilms gives the numbers of one film of each kind, so that it can be
// redone.
func (n *note) secondFilms(s *checks.SecondMethod) {
	picks := representative(s.Films)
	if len(picks) == 0 {
		return
	}
	picks = picks[:min(len(picks), secondColumns)]
	var films []checks.FilmRow
	for _, i := range picks {
		films = append(films, s.Films[i])
	}
	cols := []pdf.Column{{Head: "Film", Width: 26}, {Width: 22}}
	for _, f := range films {
		cols = append(cols, pdf.Column{Head: placeOf(f), Width: 24, Align: pdf.AlignRight})
	}
	if spare := secondColumns - len(films); spare > 0 {
		cols = append(cols, pdf.Column{Width: 24 * float64(spare)})
	}
	n.partTable("One film of each kind by the second method", "", cols, secondTable(films))
	for _, f := range films {
		for _, note := range f.Notes {
			n.small(placeOf(f) + ": " + note + ".")
		}
		if !f.InRange {
			n.small(placeOf(f) + ": " + f.Range + ".")
		}
	}
}

// secondTable has a row per symbol and a column per film.
func secondTable(films []checks.FilmRow) []pdf.Row {
	var rows []pdf.Row
	for _, q := range secondQuantities {
		row := pdf.Row{Cells: []pdf.Cell{mathCell(q.symbol), pdf.C(q.unit)}}
		for _, f := range films {
			row.Cells = append(row.Cells, pdf.C(q.of(f)))
		}
		rows = append(rows, row)
	}
	inside := pdf.Row{Cells: []pdf.Cell{pdf.C("In range"), pdf.C("")}}
	for _, f := range films {
		inside.Cells = append(inside.Cells, pdf.C(inRange(f)))
	}
	return append(rows, inside)
}

// quantity is one symbol of a film.
type quantity struct {
	symbol, unit string
	of           func(checks.FilmRow) string
}

var secondQuantities = []quantity{
	{`T_\mathrm{s}`, "K", func(f checks.FilmRow) string { return kelvin(f.Film.Ts, 1) }},
	{`T_\mathrm{a}`, "K", func(f checks.FilmRow) string { return kelvin(f.Film.Ta, 1) }},
	{`\Delta T`, "K", func(f checks.FilmRow) string { return plainDigits(f.Film.DT, 5) }},
	{`T_\beta = 1/\beta`, "K", func(f checks.FilmRow) string { return kelvin(f.Film.TBeta, 1) }},
	{`g`, "m/s²", func(f checks.FilmRow) string { return plainDigits(f.Film.Gravity, 6) }},
	{`L`, "m", func(f checks.FilmRow) string { return plainDigits(f.Film.Length, 5) }},
	{`k`, "W/(m·K)", func(f checks.FilmRow) string { return plainDigits(f.Film.Props.K, 5) }},
	{`\nu`, "m²/s", func(f checks.FilmRow) string { return plainDigits(f.Film.Props.Nu, 5) }},
	{`\alpha`, "m²/s", func(f checks.FilmRow) string { return plainDigits(f.Film.Props.Alpha, 5) }},
	{`Pr`, "1", func(f checks.FilmRow) string { return plainDigits(f.Film.Props.Pr, 5) }},
	{`Ra`, "1", func(f checks.FilmRow) string { return plainDigits(f.Ra, 5) }},
	{`Nu`, "1", func(f checks.FilmRow) string { return plainDigits(f.Nu, 5) }},
	{`h`, "W/(m²·K)", func(f checks.FilmRow) string { return plainDigits(f.H, 5) }},
}
