package main

import (
	"bytes"
	"fmt"
	"regexp"
	"strings"
	"text/tabwriter"
	"unicode/utf8"
)

// listing is a catalogue as a person searches it: a line for each entry, and
// every field of an entry when there is only one.
type listing struct {
	what  string // "finish": for messages
	heads []string
	rows  []listRow
	foot  string
}

// listRow is one entry: its id, the words of its line, and its fields.
type listRow struct {
	id     string
	cells  []string
	fields [][2]string // name and text; empty texts are left out
}

func (l *listing) ids() []string {
	ids := make([]string, len(l.rows))
	for i, r := range l.rows {
		ids[i] = r.id
	}
	return ids
}

// find keeps the entries that hold every word; an exact id keeps only itself.
func (l *listing) find(words string) []listRow {
	var kept []listRow
	for _, r := range l.rows {
		if strings.EqualFold(r.id, words) {
			return []listRow{r}
		}
		if r.holds(words) {
			kept = append(kept, r)
		}
	}
	return kept
}

func (r listRow) holds(words string) bool {
	text := strings.ToLower(strings.Join(r.cells, " "))
	for _, w := range strings.Fields(strings.ToLower(words)) {
		if !strings.Contains(text, w) {
			return false
		}
	}
	return true
}

// show prints what matches the words typed; none typed shows everything.
func (a *app) show(l *listing, args []string) error {
	words := strings.Join(args, " ")
	rows := l.find(words)
	switch len(rows) {
	case 0:
		help := didYouMean(words, l.ids())
		if help == "" {
			help = "Without a word the command lists them all."
		}
		return usageError(help, "No %s matches %q.", l.what, words)
	case 1:
		return a.out.print(oneEntry(rows[0], a.wide))
	}
	return a.out.print(l.lines(rows, a.wide))
}

// lines prints a line for each entry. On a terminal of some width the widest
// column is wrapped to fit; elsewhere nothing is.
func (l *listing) lines(rows []listRow, wide int) []byte {
	table := [][]string{l.heads}
	for _, r := range rows {
		table = append(table, r.cells)
	}
	var b bytes.Buffer
	w := tabwriter.NewWriter(&b, 0, 0, gutter, ' ', 0)
	column, width := widest(table, wide)
	for _, cells := range table {
		for _, line := range wrapCell(cells, column, width) {
			fmt.Fprintln(w, strings.Join(line, "\t"))
		}
	}
	_ = w.Flush() // into memory
	text := blankEnds.ReplaceAll(b.Bytes(), nil)
	if l.foot != "" {
		text = fmt.Appendf(text, "\n%s\n", l.foot)
	}
	return text
}

// blankEnds are the blanks that padded columns leave at the ends of lines.
var blankEnds = regexp.MustCompile(`(?m) +$`)

// oneEntry prints every field of an entry, its lines below each other.
func oneEntry(r listRow, wide int) []byte {
	var table [][]string
	for _, f := range r.fields {
		name := f[0]
		for _, line := range strings.Split(f[1], "\n") {
			if line != "" {
				table = append(table, []string{name, line})
				name = ""
			}
		}
	}
	return (&listing{heads: table[0]}).lines(rowsOf(table[1:]), wide)
}

func rowsOf(table [][]string) (rows []listRow) {
	for _, cells := range table {
		rows = append(rows, listRow{cells: cells})
	}
	return rows
}

// gutter is the space between columns, leastColumn the narrowest a column is
// wrapped to.
const (
	gutter      = 2
	leastColumn = 24
)

// widest is the widest column of a table and the width it can have on a
// terminal; 0 when it need not be wrapped.
func widest(table [][]string, wide int) (column, width int) {
	widths := make([]int, len(table[0]))
	total := gutter * (len(widths) - 1)
	for i := range widths {
		for _, cells := range table {
			widths[i] = max(widths[i], utf8.RuneCountInString(cells[i]))
		}
		total += widths[i]
		if widths[i] > widths[column] {
			column = i
		}
	}
	if wide <= 0 || total <= wide {
		return column, 0
	}
	return column, max(leastColumn, widths[column]-(total-wide))
}

// wrapCell breaks one cell at spaces into lines of a width and leaves the
// others empty from the second line on. Width 0 breaks nothing.
func wrapCell(cells []string, column, width int) (lines [][]string) {
	if width == 0 {
		return [][]string{cells}
	}
	for i, part := range wrap(cells[column], width) {
		line := make([]string, len(cells))
		if i == 0 {
			copy(line, cells)
		}
		line[column] = part
		lines = append(lines, line)
	}
	return lines
}

// wrap breaks a text at spaces; a longer word keeps its length.
func wrap(text string, width int) []string {
	lines := []string{""}
	for _, word := range strings.Split(text, " ") {
		last := &lines[len(lines)-1]
		switch {
		case *last == "":
			*last = word
		case utf8.RuneCountInString(*last)+1+utf8.RuneCountInString(word) <= width:
			*last += " " + word
		default:
			lines = append(lines, word)
		}
	}
	return lines
}

// span shows low to high, or one number when both are the same.
func span(low, high float64) string {
	if low == high {
		return fmt.Sprintf("%.4g", low)
	}
	return fmt.Sprintf("%.4g to %.4g", low, high)
}
