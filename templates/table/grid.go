package table

import (
	"strings"
	"unicode/utf8"
)

// align says where the text of a column stands.
type align int

const (
	left align = iota
	decimal
)

// cell is one entry of a grid. Paint is a terminal colour sequence, used only
// when colour is wanted; it never carries meaning of its own.
type cell struct{ text, paint string }

// longName is the width above which a name in the first two columns gets a
// line of its own, so that it does not push the numbers off the page.
const longName = 36

// grid is a table of left-aligned words and numbers whose decimal points
// stand in line. Nothing is ever cut.
type grid struct {
	aligns []align
	rows   [][]cell
}

// newGrid names the columns; a leading "." asks for decimal alignment.
func newGrid(heads ...string) *grid {
	g := &grid{}
	for i, h := range heads {
		g.aligns = append(g.aligns, left)
		if rest, ok := strings.CutPrefix(h, "."); ok {
			g.aligns[i], heads[i] = decimal, rest
		}
	}
	g.add(heads...)
	return g
}

// add appends a row of plain texts.
func (g *grid) add(texts ...string) {
	row := make([]cell, len(texts))
	for i, t := range texts {
		row[i] = cell{text: t}
	}
	g.rows = append(g.rows, row)
}

// paintLast colours the cell of the newest row in column c.
func (g *grid) paintLast(c int, paint string) {
	g.rows[len(g.rows)-1][c].paint = paint
}

// lines renders the grid. The first row is the head and stands at the right
// end of a number column.
func (g *grid) lines(color bool) []string {
	out := make([]string, 0, len(g.rows))
	whole, after := g.widths()
	for r, row := range g.rows {
		out = append(out, g.longNames(row)...)
		var b strings.Builder
		for c, x := range row {
			if c > 0 {
				b.WriteString("  ")
			}
			b.WriteString(g.pad(x, c, r == 0, whole[c], after[c], color))
		}
		out = append(out, strings.TrimRight(b.String(), " "))
	}
	return out
}

// tooLong tells whether a cell is shown on a line of its own.
func (g *grid) tooLong(x cell, c int) bool {
	return c < 2 && g.aligns[c] == left && width(x.text) > longName
}

// longNames are the names of a row that get lines of their own.
func (g *grid) longNames(row []cell) []string {
	var out []string
	for c, x := range row {
		if g.tooLong(x, c) {
			out = append(out, strings.Repeat(" ", 3*c)+x.text)
		}
	}
	return out
}

// widths gives each column's whole width and the room it keeps for the point
// and what follows it.
func (g *grid) widths() (whole, after []int) {
	whole, after = make([]int, len(g.aligns)), make([]int, len(g.aligns))
	before := make([]int, len(g.aligns))
	for r, row := range g.rows {
		for c, x := range row {
			if g.tooLong(x, c) {
				continue
			}
			if r == 0 || g.aligns[c] == left {
				whole[c] = max(whole[c], width(x.text))
				continue
			}
			t := tail(x.text)
			after[c] = max(after[c], t)
			before[c] = max(before[c], width(x.text)-t)
		}
	}
	for c := range whole {
		whole[c] = max(whole[c], before[c]+after[c])
	}
	return whole, after
}

func (g *grid) pad(x cell, c int, head bool, whole, after int, color bool) string {
	if g.tooLong(x, c) {
		x.text = ""
	}
	text := x.text
	if color && x.paint != "" {
		text = x.paint + text + reset
	}
	fill := whole - width(x.text)
	if g.aligns[c] == left {
		return text + strings.Repeat(" ", fill)
	}
	right := 0
	if !head {
		right = after - tail(x.text)
	}
	return strings.Repeat(" ", fill-right) + text + strings.Repeat(" ", right)
}

// tail counts the characters from the decimal point to the end.
func tail(s string) int {
	if i := strings.LastIndexByte(s, '.'); i >= 0 {
		return width(s[i:])
	}
	return 0
}

func width(s string) int { return utf8.RuneCountInString(s) }
