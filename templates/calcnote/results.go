package calcnote

import (
	"fmt"
	"math"
	"slices"
	"strings"

	"stillair/checks"
	"stillair/checks/unit"
	"stillair/templates/pdf"
	"stillair/templates/plot"
)

// solution is the record of the solver.
func (n *note) solution() {
	n.sectionRoom("Solution", 53)
	n.text("Each balance is solved by fixed-point iteration on the temperatures above the air: films and radiation with their slopes at the temperatures of the step before, one linear solution, repeated until the heat balance closes. It is solved a second time, from another start, by plain damped substitution without slopes; the largest difference between both is given.")
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
		{Head: "Load case", Width: 42}, {Head: "Status", Width: 24}, {Head: "Steps", Width: 12, Align: pdf.AlignRight}, {Head: "Heat left over / W", Width: 32, Align: pdf.AlignRight},
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

// recordRows is how many rows of an iteration record are printed at most.
const recordRows = 12

// Size of the plot beside the iteration record, mm.
const (
	closureWidth  = 76.0
	closureHeight = 55.0
)

func (n *note) record() {
	rec := n.load().Record
	if len(rec) == 0 {
		return
	}
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
	n.recordBeside(rows)
}

// recordBeside draws the iteration record with its plot at the right.
func (n *note) recordBeside(rows []pdf.Row) {
	x, w := n.left(), n.width()-closureWidth-4
	columns := []pdf.Column{{Head: "Step", Width: 12, Align: pdf.AlignRight}, {Head: "Heat left over / W", Width: 40, Align: pdf.AlignRight}, {Head: "Largest change / K", Width: 40, Align: pdf.AlignRight}}
	room := max(n.d.TableHeight(styled(x, w, columns, rows)), closureHeight+5) + 2
	n.part(fmt.Sprintf("Iteration record of “%s”", n.load().Name), room)
	n.d.Need(room)
	top := n.d.Y
	n.tableIn(x, w, columns, rows)
	if s, ok := plot.Closure(n.o, n.gov, closureWidth, closureHeight); ok {
		bottom := n.d.Y
		n.d.Scene(withMinus(s), x+w+4, top)
		n.d.Y = top + closureHeight
		n.caption("Heat left over, by iteration.", x+w+4, closureWidth)
		n.d.Y = max(n.d.Y, bottom)
	}
}

// loadsATable is how many load cases stand side by side.
const loadsATable = 5

// results are the temperatures and heat flows of all load cases side by side.
func (n *note) results() {
	n.sectionRoom("Results by load case", 60)
	if !n.converged() {
		n.text("Not computed: no load case has a valid result.")
		return
	}
	n.textf("Temperatures in %s with their uncertainty U in %s; ▲ marks the highest value of a row over all load cases. The governing load case is “%s”.", n.tempUnit(), n.diffUnit(), n.load().Name)
	n.part("Temperatures", 26)
	n.matrix("At", n.places(), n.temperatureCell)
	n.part("Heat that leaves, by face and mode, in W", 32)
	n.text("Positive to the air and the surroundings; negative values come in.")
	n.matrix("Face and mode", n.modes(), n.modeCell)
	n.small(unrounded)
	n.part("Film coefficients in "+n.sys.Unit(unit.Coefficient), 26)
	n.matrix("Film", n.filmPlaces(), n.filmCell)
	if slices.ContainsFunc(n.o.Loads, func(l checks.LoadOutcome) bool { return anyOutside(l.Films) }) {
		n.small(starLegend)
	}
	n.loadRemarks()
}

// anyOutside tells whether a film is marked as outside its range.
func anyOutside(films []checks.FilmRow) bool {
	return slices.ContainsFunc(films, func(f checks.FilmRow) bool { return !f.InRange })
}

// matrix is a table with a column per load case, continued below when there
// are many.
func (n *note) matrix(head string, rows []string, cell func(l checks.LoadOutcome, row string) pdf.Cell) {
	for chunk := range slices.Chunk(n.o.Loads, loadsATable) {
		cols := []pdf.Column{{Head: head, Width: 48}}
		width := min(40, 26*loadsATable/float64(len(chunk)))
		for _, l := range chunk {
			name := l.Name
			if l.Governing && len(n.o.Loads) > 1 {
				name += " (governing)"
			}
			cols = append(cols, pdf.Column{Head: name, Width: width, Align: pdf.AlignRight})
		}
		if spare := 26*loadsATable - width*float64(len(chunk)); spare > 1 {
			cols = append(cols, pdf.Column{Width: spare})
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
	sunMode   = "sun taken in"
	totalMode = "heat shed by the body"
	netMode   = "net heat shed by the body"
)

func (n *note) modes() []string {
	list := n.collect(func(l checks.LoadOutcome) (names []string) {
		for _, h := range l.Heat {
			if h.Final {
				names = append(names, h.From+", "+h.By)
			}
		}
		return names
	})
	if n.loadsWith(hasSun) != "" {
		return append(list, sunMode, netMode)
	}
	return append(list, totalMode)
}

func (n *note) modeCell(l checks.LoadOutcome, mode string) pdf.Cell {
	if l.Status != checks.Converged {
		return pdf.C(notComputed)
	}
	sum, found := 0.0, mode == sunMode
	for _, h := range l.Heat {
		if mode == sunMode && h.By == "sun" || h.Final && h.From+", "+h.By == mode {
			sum, found = sum+h.W, true
		}
	}
	if mode == totalMode || mode == netMode {
		return pdf.Cell{Runs: pdf.T(n.bareWatts(l.HeatW, shedScale(l, n.largestHeat()))), Face: pdf.Bold}
	}
	if !found {
		return pdf.C("–")
	}
	return pdf.C(n.bareWatts(sum, n.largestHeat()))
}

// largestHeat is the largest heat flow of all load cases, W; it sets the
// decimals of tables of heats.
func (n *note) largestHeat() float64 {
	most := 0.0
	for _, l := range n.o.Loads {
		most = math.Max(most, throughput(l))
	}
	return most
}

// throughput is the largest heat flow of a load case, W.
func throughput(l checks.LoadOutcome) float64 {
	most := math.Abs(l.HeatW)
	for _, h := range l.Heat {
		if h.Final || h.By == "sun" {
			most = math.Max(most, math.Abs(h.W))
		}
	}
	return most
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
			return pdf.C(n.bare(unit.Coefficient, f.H, decimals) + outOfRange(f))
		}
	}
	return pdf.C(notComputed)
}

// loadRemarks prints what the calculation noted on single load cases.
func (n *note) loadRemarks() {
	var list []string
	for _, l := range n.o.Loads {
		for _, s := range joinedNotes(l) {
			list = append(list, fmt.Sprintf("%s: %s.", l.Name, strings.TrimSuffix(s, ".")))
		}
		if l.DewPointK > 0 {
			list = append(list, fmt.Sprintf("%s: the dew point of the air is %s.", l.Name, n.temp(l.DewPointK)))
		}
	}
	if len(list) == 0 {
		return
	}
	n.part("Remarks on load cases", 12)
	for _, s := range list {
		n.bullet(s)
	}
}

// joinedNotes says once what a load case notes on several faces. What the second
// method changes has its own section.
func joinedNotes(l checks.LoadOutcome) []string {
	var said []string
	faces := map[string][]string{}
	for _, s := range l.Notes {
		if strings.HasPrefix(s, "second method: ") {
			continue
		}
		face, rest, found := strings.Cut(s, ": ")
		if !found || !slices.ContainsFunc(l.Temps, func(t checks.Temp) bool { return t.At == face }) {
			face, rest = "", s
		}
		if !slices.Contains(said, rest) {
			said = append(said, rest)
		}
		if face != "" {
			faces[rest] = append(faces[rest], face)
		}
	}
	for i, rest := range said {
		if f := faces[rest]; len(f) > 0 {
			said[i] = strings.Join(f, ", ") + ": " + rest
		}
	}
	return said
}
