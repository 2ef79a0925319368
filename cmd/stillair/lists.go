package main

import (
	"bytes"
	"fmt"
	"strings"
	"text/tabwriter"
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
		return a.out.print(oneEntry(rows[0]))
	}
	return a.out.print(l.lines(rows))
}

func (l *listing) lines(rows []listRow) []byte {
	var b bytes.Buffer
	w := tabwriter.NewWriter(&b, 0, 0, 2, ' ', 0)
	fmt.Fprintln(w, strings.Join(l.heads, "\t"))
	for _, r := range rows {
		fmt.Fprintln(w, strings.Join(r.cells, "\t"))
	}
	_ = w.Flush() // into memory
	if l.foot != "" {
		fmt.Fprintf(&b, "\n%s\n", l.foot)
	}
	return b.Bytes()
}

func oneEntry(r listRow) []byte {
	var b bytes.Buffer
	w := tabwriter.NewWriter(&b, 0, 0, 2, ' ', 0)
	for _, f := range r.fields {
		if f[1] != "" {
			fmt.Fprintf(w, "%s\t%s\n", f[0], f[1])
		}
	}
	_ = w.Flush() // into memory
	return b.Bytes()
}

// span shows low..high, or one number when both are the same.
func span(low, high float64) string {
	if low == high {
		return fmt.Sprintf("%.4g", low)
	}
	return fmt.Sprintf("%.4g..%.4g", low, high)
}
