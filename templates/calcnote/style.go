package calcnote

import (
	"fmt"

	"stillair/templates/pdf"
	"stillair/templates/typeset"
)

// Four sizes, and a smaller one for the listing; two families, one accent colour.
var (
	accent = pdf.Color{R: 0x1B, G: 0x4F, B: 0x72}
	grey   = pdf.Color{R: 0x44, G: 0x44, B: 0x44}
	hair   = pdf.Color{R: 0xC4, G: 0xC8, B: 0xCC}
	tint   = pdf.Color{R: 0xF1, G: 0xF3, B: 0xF5}
	pale   = pdf.Color{R: 0xEF, G: 0xF0, B: 0xF2}

	titleStyle = pdf.Style{Face: pdf.Bold, Size: 16}
	headStyle  = pdf.Style{Face: pdf.Bold, Size: 12, Color: accent}
	bodyStyle  = pdf.Style{Size: 10}
	boldStyle  = pdf.Style{Face: pdf.Bold, Size: 10}
	smallStyle = pdf.Style{Size: 8.5}
	labelStyle = pdf.Style{Size: 8.5, Color: grey}
	monoStyle  = pdf.Style{Face: pdf.Mono, Size: 7.5}
)

// measure is the width of running text: about 85 characters a line. The rest
// of the text block is the margin column for citations.
const measure = 148.0

func (n *note) left() float64  { return n.d.Left() }
func (n *note) width() float64 { return n.d.Width() }

// section begins a numbered section with its bookmark.
func (n *note) section(title string) { n.sectionRoom(title, 36) }

// sectionRoom begins a section that needs room on its first page.
func (n *note) sectionRoom(title string, room float64) {
	n.sections++
	n.parts = 0
	n.d.Space(5)
	n.d.Need(room)
	n.heading(fmt.Sprintf("s%d", n.sections), fmt.Sprintf("%d", n.sections), title)
}

func (n *note) heading(key, number, title string) {
	d := n.d
	d.Mark(key, number+"  "+title, 0)
	d.Y += 4.6
	d.Text(n.left(), d.Y, number, headStyle)
	d.Text(n.left()+10, d.Y, title, headStyle)
	d.Y += 1.8
	d.Line(n.left(), d.Y, n.left()+n.width(), d.Y, 0.25, accent)
	d.Y += 3
}

// part begins a numbered subsection.
func (n *note) part(title string, room float64) {
	n.parts++
	n.d.Space(2.5)
	n.d.Need(8 + room)
	number := fmt.Sprintf("%d.%d", n.sections, n.parts)
	n.d.Mark("p"+number, number+"  "+title, 1)
	n.d.Y += 3.8
	n.d.Text(n.left(), n.d.Y, number, boldStyle)
	n.d.Text(n.left()+10, n.d.Y, n.d.Fit(title, boldStyle, n.width()-10), boldStyle)
	n.d.Y += 2.2
}

// text is a paragraph.
func (n *note) text(s string) { n.runs(prose(s)...) }

func (n *note) textf(format string, a ...any) { n.text(fmt.Sprintf(format, a...)) }

func (n *note) runs(r ...pdf.Run) {
	n.d.Para(r, bodyStyle, n.left(), measure)
	n.d.Y += 1.5
}

// cited is a paragraph with references in the margin column beside its first line.
func (n *note) cited(s string, sources ...string) {
	n.d.Need(2 * bodyStyle.Leading())
	n.margin(n.d.Y+0.76*bodyStyle.Leading(), n.refs.marks(sources...))
	n.text(s)
}

// margin writes into the margin column.
func (n *note) margin(baseline float64, s string) {
	n.d.TextRight(n.left()+n.width(), baseline, s, labelStyle)
}

// bullet is one item of a list.
func (n *note) bullet(s string) {
	n.together(s, measure-6)
	n.d.Text(n.left()+1.5, n.d.Y+0.76*bodyStyle.Leading(), "–", bodyStyle)
	n.d.Para(prose(s), bodyStyle, n.left()+6, measure-6)
	n.d.Y += 0.8
}

// together keeps a short paragraph on one page.
func (n *note) together(s string, w float64) {
	n.d.Need(min(n.d.ParaHeight(pdf.T(s), bodyStyle, w), 6*bodyStyle.Leading()))
}

// item is one numbered item of a list.
func (n *note) item(number, s string) {
	n.together(s, measure-10)
	n.d.Text(n.left(), n.d.Y+0.76*bodyStyle.Leading(), number, bodyStyle)
	n.d.Para(prose(s), bodyStyle, n.left()+10, measure-10)
	n.d.Y += 0.9
}

// formula displays a numbered formula with its references.
func (n *note) formula(src string, sources ...string) string {
	n.formulas++
	label := fmt.Sprintf("(%d)", n.formulas)
	mark := n.refs.marks(sources...)
	if mark != "" {
		label = mark + "  " + label
	}
	n.display(src, label)
	return label
}

// display sets a formula with a label in the margin column.
func (n *note) display(src, label string) {
	f, w := typeset.Must(src), n.displayWidth(label)
	n.d.Need(min(f.Height(w, bodyStyle.Size), 40))
	top := n.d.Y
	f.Display(n.d, n.left()+6, w, bodyStyle.Size)
	if label != "" {
		n.margin((top+n.d.Y)/2+1, label)
	}
	n.d.Y += displayGap
}

// displayGap stands after a displayed formula, mm.
const displayGap = 0.5

func (n *note) displayWidth(label string) float64 {
	if label == "" {
		return n.width() - 12
	}
	return measure - 6
}

// lineHeight is the room that display takes for a formula without a label.
func (n *note) lineHeight(src string) float64 {
	return typeset.Must(src).Height(n.displayWidth(""), bodyStyle.Size) + displayGap
}

func inline(src string) pdf.Run { return pdf.Run{Inline: typeset.Must(src)} }

// unrounded stands under tables whose printed numbers are sums or differences
// of one another.
const unrounded = "Sums and differences are taken from unrounded values; printed terms are rounded."

// small is a paragraph in the small size, under tables.
func (n *note) small(s string) {
	n.d.Para(prose(s), smallStyle, n.left(), n.width())
	n.d.Y += 1.5
}

// table draws a table in the style of the note.
func (n *note) table(cols []pdf.Column, rows []pdf.Row) {
	n.tableIn(n.left(), n.width(), cols, rows)
}

func (n *note) tableIn(x, w float64, cols []pdf.Column, rows []pdf.Row) {
	n.d.Table(styled(x, w, cols, rows))
	n.d.Y += 2.5
}

// partTable is a subsection of one table, with a paragraph before it where
// there is something to say. The heading stays with the beginning of the table.
func (n *note) partTable(title, intro string, cols []pdf.Column, rows []pdf.Row) {
	room := n.d.TableStart(styled(n.left(), n.width(), cols, rows))
	if intro != "" {
		room += n.d.ParaHeight(prose(intro), bodyStyle, measure) + 1.5
	}
	n.part(title, room)
	if intro != "" {
		n.text(intro)
	}
	n.table(cols, rows)
}

func styled(x, w float64, cols []pdf.Column, rows []pdf.Row) pdf.Table {
	return pdf.Table{X: x, W: w, Columns: cols, Rows: rows, Style: smallStyle, Rule: accent, Hair: hair, Tint: tint}
}

func cells(texts ...string) pdf.Row {
	r := pdf.Row{}
	for _, t := range texts {
		r.Cells = append(r.Cells, pdf.C(t))
	}
	return r
}

func mathCell(src string) pdf.Cell { return pdf.Cell{Runs: []pdf.Run{inline(src)}} }
