package pdf

import (
	"math"
	"strings"
	"unicode"
)

// Align says how a column lines up.
type Align int

// The alignments. Decimal puts the decimal points of a column in line.
const (
	AlignLeft Align = iota
	AlignRight
	AlignCentre
	AlignDecimal
)

// Column is the head and the shape of a column. Width is a share of the
// table's width. HeadRuns, where given, stand in place of Head.
type Column struct {
	Head     string
	HeadRuns []Run
	Width    float64
	Align    Align
}

// Cell is what one row holds in one column.
type Cell struct {
	Runs []Run
	Face Face // of the whole cell, where the runs do not say
}

// C is a cell of plain text.
func C(s string) Cell { return Cell{Runs: T(s)} }

// Row is one row. A strong row is bold with a rule above it. A row with a
// Span is one text across the table and stays with the row after it.
type Row struct {
	Cells  []Cell
	Span   []Run
	Shade  bool
	Strong bool
}

// Table is drawn at the cursor across X..X+W. Without a head in any column it
// begins with a rule.
type Table struct {
	X, W    float64
	Columns []Column
	Rows    []Row
	Style   Style
	Rule    Color // of the lines under the head and at the end
	Hair    Color // of the lines between rows
	Tint    Color // of shaded rows
}

const (
	cellPad = 0.6 // mm, above and below the text of a cell
	gutter  = 2.4 // mm, between columns
)

// grid is a table being drawn.
type grid struct {
	d     *Doc
	t     Table
	x, w  []float64
	point []float64 // where the decimal point stands, from the left of the column
	headH float64
	heads [][]line
}

// Table draws a table. The head repeats on every page; a row is never split
// unless it is taller than a page; the first two rows stay together, and so do
// the last two.
func (d *Doc) Table(t Table) {
	if len(t.Columns) == 0 {
		return
	}
	g := grid{d: d, t: t}
	g.columns()
	first := g.rowHeight(0) + g.rowHeight(1)
	d.Need(g.headH + min(first, d.Bottom()-d.Top()-g.headH))
	g.head()
	for i, r := range t.Rows {
		follow := 0.0
		if r.Span != nil || len(t.Rows) > 2 && i == len(t.Rows)-2 {
			follow = g.rowHeight(i + 1)
		}
		g.row(r, i == 0, follow)
	}
	d.Line(t.X, d.Y, t.X+t.W, d.Y, 0.25, t.Rule)
	d.Y += 0.2
}

// TableHeight is the height of a table that no page break cuts.
func (d *Doc) TableHeight(t Table) float64 {
	if len(t.Columns) == 0 {
		return 0
	}
	g := grid{d: d, t: t}
	g.columns()
	h := g.headH + 0.2
	for i := range t.Rows {
		h += g.rowHeight(i)
	}
	return h
}

// TableStart is the height of the head of a table and its first two rows,
// which stay together.
func (d *Doc) TableStart(t Table) float64 {
	t.Rows = t.Rows[:min(2, len(t.Rows))]
	return d.TableHeight(t)
}

// rowHeight is the height of row i, 0 past the last.
func (g *grid) rowHeight(i int) float64 {
	if i >= len(g.t.Rows) {
		return 0
	}
	_, h := g.layout(g.t.Rows[i])
	return h
}

func (g *grid) columns() {
	total := 0.0
	for _, c := range g.t.Columns {
		total += c.Width
	}
	room := g.t.W
	for i := range g.t.Columns {
		room -= g.gap(i)
	}
	x := g.t.X
	for i, c := range g.t.Columns {
		w := room * c.Width / total
		x += g.gap(i)
		g.x, g.w = append(g.x, x), append(g.w, w)
		x += w
	}
	bold := g.t.Style.With(Bold)
	for i, c := range g.t.Columns {
		var ls []line
		if runs := c.headRuns(); runs != nil {
			ls = g.d.setRuns(inFace(runs, Bold), bold, g.w[i])
			g.headH = max(g.headH, height(ls, bold)+2*cellPad)
		}
		g.heads = append(g.heads, ls)
		g.point = append(g.point, g.pointOf(i, c))
	}
}

func (c Column) headRuns() []Run {
	if c.HeadRuns == nil && c.Head != "" {
		return T(c.Head)
	}
	return c.HeadRuns
}

// gap is the room before a column; numbers need more before words.
func (g *grid) gap(i int) float64 {
	if i == 0 {
		return 0
	}
	before, at := g.t.Columns[i-1].Align, g.t.Columns[i].Align
	if at == AlignLeft && (before == AlignRight || before == AlignDecimal) {
		return 1.8 * gutter
	}
	return gutter
}

func height(ls []line, st Style) float64 {
	h := 0.0
	for _, l := range ls {
		h += l.height(st)
	}
	return h
}

// pointOf finds the place of the decimal point in a decimal column: the
// longest fraction ends at the right edge.
func (g *grid) pointOf(i int, c Column) float64 {
	if c.Align != AlignDecimal {
		return 0
	}
	after := 0.0
	for _, r := range g.t.Rows {
		if i < len(r.Cells) {
			if _, tail, ok := atPoint(r.Cells[i]); ok {
				after = max(after, g.d.TextWidth(tail, g.style(r, r.Cells[i])))
			}
		}
	}
	return g.w[i] - after
}

// atPoint splits a number where its decimal point is, or would be.
func atPoint(c Cell) (head, tail string, ok bool) {
	if len(c.Runs) != 1 || c.Runs[0].Inline != nil {
		return "", "", false
	}
	s := c.Runs[0].Text
	digit := strings.IndexFunc(s, unicode.IsDigit)
	if digit < 0 {
		return "", "", false
	}
	for i, r := range s {
		if i > digit && !unicode.IsDigit(r) && r != '\u2009' {
			return s[:i], s[i:], true
		}
	}
	return s, "", true
}

func (g *grid) style(r Row, c Cell) Style {
	st := g.t.Style
	if c.Face != Regular {
		st.Face = c.Face
	}
	if r.Strong && st.Face == Regular {
		st.Face = Bold
	}
	return st
}

func (g *grid) head() {
	d, bold := g.d, g.t.Style.With(Bold)
	for i, ls := range g.heads {
		y := d.Y + g.headH - cellPad - height(ls, bold)
		for _, l := range ls {
			d.drawLine(l, g.x[i]+g.offset(g.t.Columns[i].Align, i, l), y+l.baseline(bold), bold)
			y += l.height(bold)
		}
	}
	d.Y += g.headH
	d.Line(g.t.X, d.Y, g.t.X+g.t.W, d.Y, 0.35, g.t.Rule)
}

func (g *grid) offset(a Align, i int, l line) float64 {
	switch a {
	case AlignRight, AlignDecimal:
		return g.w[i] - l.w
	case AlignCentre:
		return (g.w[i] - l.w) / 2
	}
	return 0
}

// layout sets the cells of a row; a span counts as its only cell.
func (g *grid) layout(r Row) ([][]line, float64) {
	if r.Span != nil {
		st := g.t.Style.With(Bold)
		ls := g.d.setRuns(inFace(r.Span, Bold), st, g.t.W)
		return [][]line{ls}, height(ls, st) + 2*cellPad
	}
	cells := make([][]line, len(g.t.Columns))
	h := 0.0
	for i := range cells {
		if i >= len(r.Cells) {
			continue
		}
		st := g.style(r, r.Cells[i])
		runs := r.Cells[i].Runs
		if st.Face != Regular {
			runs = inFace(runs, st.Face)
		}
		cells[i] = g.d.setRuns(runs, st, g.w[i])
		h = max(h, height(cells[i], st))
	}
	if h == 0 {
		h = g.t.Style.Leading()
	}
	return cells, h + 2*cellPad
}

// row draws a row; follow is the height of what must stay with it.
func (g *grid) row(r Row, first bool, follow float64) {
	d := g.d
	cells, h := g.layout(r)
	full := d.Bottom() - d.Top() - g.headH
	if h > full {
		g.tall(r, cells, full)
		return
	}
	if d.Y+h+min(follow, full-h) > d.Bottom() {
		g.next()
		first = true
	}
	if r.Shade {
		d.Rect(g.t.X, d.Y+0.1, g.t.W, h-0.2, &g.t.Tint, 0, Black)
	}
	switch {
	case first:
	case r.Strong:
		d.Line(g.t.X, d.Y, g.t.X+g.t.W, d.Y, 0.25, g.t.Rule)
	default:
		d.Line(g.t.X, d.Y, g.t.X+g.t.W, d.Y, 0.1, g.t.Hair)
	}
	g.cells(r, cells)
	d.Y += h
}

// next goes on on the next page with the head repeated.
func (g *grid) next() {
	g.d.Line(g.t.X, g.d.Y, g.t.X+g.t.W, g.d.Y, 0.1, g.t.Hair)
	g.d.NewPage()
	g.head()
}

func (g *grid) cells(r Row, cells [][]line) {
	for i, ls := range cells {
		c := Cell{Face: Bold} // of a span
		if r.Span == nil {
			if i >= len(r.Cells) {
				continue
			}
			c = r.Cells[i]
		}
		st := g.style(r, c)
		y := g.d.Y + cellPad
		for _, l := range ls {
			x := g.x[i]
			if r.Span == nil {
				x += g.start(c, i, l, len(ls))
			}
			g.d.drawLine(l, x, y+l.baseline(st), st)
			y += l.height(st)
		}
	}
}

// start is where a line of a cell begins, from the left of its column.
func (g *grid) start(c Cell, i int, l line, lines int) float64 {
	a := g.t.Columns[i].Align
	if a == AlignDecimal && lines == 1 {
		if head, _, ok := atPoint(c); ok {
			return math.Max(0, g.point[i]-g.d.TextWidth(head, g.style(Row{}, c)))
		}
	}
	return g.offset(a, i, l)
}

// tall spreads a row that no page can hold over several pages.
func (g *grid) tall(r Row, cells [][]line, full float64) {
	st := g.t.Style
	at := make([]int, len(cells))
	for more := true; more; {
		g.d.Need(4 * st.Leading())
		if g.d.AtTop() {
			g.head()
		}
		room := min(full, g.d.Bottom()-g.d.Y) - 2*cellPad
		part := make([][]line, len(cells))
		more = false
		used := 0.0
		for i, ls := range cells {
			from, h := at[i], 0.0
			for at[i] < len(ls) && (h+ls[at[i]].height(st) <= room || at[i] == from) {
				h += ls[at[i]].height(st)
				at[i]++
			}
			part[i], used = ls[from:at[i]], max(used, h)
			more = more || at[i] < len(ls)
		}
		g.cells(r, part)
		g.d.Y += used + 2*cellPad
	}
}
