// Package calcnote pours an outcome into a calculation note: a PDF that a
// second engineer can redo with a pocket calculator and sign. Every number in
// it is read from the outcome; the case file and the results ride along as
// attachments. Same outcome, same bytes.
//
// Out of scope: digital signatures, drawings beyond those of the drawing
// package, any calculation that would change a result.
package calcnote

import (
	"fmt"
	"io"
	"strings"
	"time"

	"stillair/checks"
	"stillair/checks/casefile"
	"stillair/checks/unit"
	"stillair/templates/pdf"
)

// Options are what the user's settings add to the note.
type Options struct {
	Company string
	Logo    []byte // PNG or JPEG
	Paper   string // "A4" (default) or "Letter"

	// Replaced, where set, gets the characters that the fonts could not print,
	// by code point and count: "U+65E5 (2)".
	Replaced *[]string
}

// Write writes the note of an outcome.
func Write(w io.Writer, o *checks.Outcome, opt Options) error {
	if o == nil || len(o.Loads) == 0 {
		return fmt.Errorf("calculation note: there is no load case to report")
	}
	results, err := checks.JSON(o)
	if err != nil {
		return fmt.Errorf("calculation note: the results cannot be written as JSON: %w", err)
	}
	r, err := build(o, opt, results)
	if err != nil {
		return fmt.Errorf("calculation note: %w", err)
	}
	if opt.Replaced != nil {
		*opt.Replaced = nil
		for _, c := range r.Replaced {
			*opt.Replaced = append(*opt.Replaced, c.String())
		}
	}
	_, err = w.Write(r.Bytes)
	return err
}

func build(o *checks.Outcome, opt Options, results []byte) (*pdf.Result, error) {
	n := note{o: o, opt: opt, data: results}
	s := pdf.Setup{
		Paper: pdf.A4, Left: 25, Right: 15, Top: 31, Bottom: 24, Logo: opt.Logo,
		Info: pdf.Info{
			Title:    n.number() + " " + o.Case.Title,
			Author:   n.head().Prepared,
			Subject:  documentType + strings.TrimRight(" "+o.Case.Tag, " "),
			Producer: strings.TrimSpace(o.Program.Name + " " + o.Program.Version),
			Lang:     "en",
			Date:     dateOf(n.head().Date),
		},
		Attachments: attachments(o, results),
	}
	if strings.EqualFold(opt.Paper, "letter") {
		s.Paper = pdf.Letter
	}
	s.Frame = func(d *pdf.Doc) { n.with(d).frame() }
	return pdf.Build(s, func(d *pdf.Doc) { n.with(d).draw() })
}

// Names of the files that ride along.
const (
	caseAttachment   = "case.yaml"
	resultAttachment = "result.json"
	documentType     = "Calculation note"
)

func attachments(o *checks.Outcome, results []byte) []pdf.Attachment {
	var list []pdf.Attachment
	if o.File != nil {
		list = append(list, pdf.Attachment{Name: caseAttachment, MIME: "application/yaml", Relationship: "Source",
			Description: "case file of this note", Data: o.File.Text})
	}
	return append(list, pdf.Attachment{Name: resultAttachment, MIME: "application/json", Relationship: "Data",
		Description: "results of this note, schema " + o.Schema, Data: results})
}

// dateOf is the date of issue as the date of the file, zero when none is given.
func dateOf(text string) time.Time {
	t, err := time.Parse(time.DateOnly, strings.TrimSpace(text))
	if err != nil {
		return time.Time{}
	}
	return t
}

// note is one pass over the document.
type note struct {
	o    *checks.Outcome
	opt  Options
	data []byte // the results as attached

	d        *pdf.Doc
	sys      unit.System
	gov      int // index of the governing load case
	sections int
	parts    int // subsections of the present section
	formulas int
	figures  int
	refs     references
}

// with is a fresh note on a document.
func (n note) with(d *pdf.Doc) *note {
	n.d = d
	n.sys = unit.SystemOf(n.o.Loads[0].Case.Units)
	for i, l := range n.o.Loads {
		if l.Governing {
			n.gov = i
		}
	}
	return &n
}

func (n *note) load() *checks.LoadOutcome { return &n.o.Loads[n.gov] }

// head is the document side of the case.
func (n *note) head() casefile.Note { return n.o.Loads[0].Case.Note }

func (n *note) number() string {
	if s := n.head().Number; s != "" {
		return s
	}
	return "(no number)"
}

// draw draws the note from the first page to the last.
func (n *note) draw() {
	n.frontPage()
	n.purpose()
	n.inputs()
	n.pictures()
	n.methods()
	n.worked()
	n.solution()
	n.results()
	n.checks()
	n.second()
	n.sensitivity()
	n.cautions()
	n.review()
	n.identification()
	n.references()
	n.listing()
}

// converged tells whether any load case has a result.
func (n *note) converged() bool {
	for _, l := range n.o.Loads {
		if l.Status == checks.Converged {
			return true
		}
	}
	return false
}
