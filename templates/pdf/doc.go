// Package pdf writes paged documents: a thin layer over one PDF library that
// keeps its pitfalls in one place. Text from users is always made printable,
// the same input gives the same bytes on any machine and day, page counts are
// known on every page, rows of tables never split, and files ride along as
// attachments in an incremental update.
//
// Lengths are millimetres from the top left of the page, y down; font sizes
// are points. Out of scope: encryption, forms, raster pictures other than a
// logo.
package pdf

import (
	"bytes"
	"errors"
	"fmt"
	"math"
	"time"

	"github.com/jung-kurt/gofpdf"

	"stillair/templates/drawing"
)

// Color is an sRGB colour.
type Color = drawing.Color

// Black is the colour of text unless a style says otherwise.
var Black = Color{}

// Paper is a page size in millimetres.
type Paper struct {
	Name string
	W, H float64
}

// The papers (ISO 216 A4; ANSI A, "Letter").
var (
	A4     = Paper{"A4", 210, 297}
	Letter = Paper{"Letter", 215.9, 279.4}
)

// Info describes a document to readers and archives.
type Info struct {
	Title, Author, Subject, Producer string
	Lang                             string    // BCP 47, "en" when empty
	Date                             time.Time // of creation, as written into the file
}

// Setup is what a document needs before its first page.
type Setup struct {
	Paper                    Paper
	Info                     Info
	Left, Right, Top, Bottom float64      // margins of the text block, mm
	Frame                    func(d *Doc) // drawn on every page before its content
	Attachments              []Attachment // embedded after the pages
	Logo                     []byte       // PNG or JPEG; drawn by Doc.Logo
}

// Result is a finished document.
type Result struct {
	Bytes    []byte
	Pages    int
	Anchors  []Anchor
	Replaced []Replacement // characters that could not be printed
}

// Anchor is a place in the document that contents lists and links refer to.
type Anchor struct {
	Key, Title string
	Level      int // 0 is the top level of the bookmarks
	Page       int
}

// Doc is a document being drawn. Drawing goes on after an error; Build
// returns the first one.
type Doc struct {
	// Y is the height of the cursor: where the next paragraph begins.
	Y float64

	setup    Setup
	pdf      *gofpdf.Fpdf
	page     int
	known    []Anchor // of the pass before
	total    int      // pages of the pass before
	anchors  []Anchor
	links    map[string]int
	replaced map[rune]int
	latin    *[len(faces)][256]float64
	err      error
}

// maxPasses bounds the search for a steady page count; two are the rule, a
// contents list takes three.
const maxPasses = 6

// Build draws the document again and again until every page number it prints
// is the true one, then attaches the files.
func Build(s Setup, draw func(*Doc)) (*Result, error) {
	if s.Info.Date.IsZero() {
		s.Info.Date = time.Date(2000, 1, 1, 0, 0, 0, 0, time.UTC)
	}
	s.Info.Date = s.Info.Date.UTC()
	var known []Anchor
	total := 0
	for range maxPasses {
		d, err := pass(s, draw, known, total)
		if err != nil {
			return nil, err
		}
		if d.steady() {
			return d.finish()
		}
		known, total = d.anchors, d.page
	}
	return nil, errors.New("the page numbers of the document do not settle")
}

func pass(s Setup, draw func(*Doc), known []Anchor, total int) (*Doc, error) {
	p := gofpdf.NewCustom(&gofpdf.InitType{UnitStr: "mm", Size: gofpdf.SizeType{Wd: s.Paper.W, Ht: s.Paper.H}})
	p.SetCatalogSort(true)
	p.SetCreationDate(s.Info.Date)
	p.SetModificationDate(s.Info.Date)
	p.SetAutoPageBreak(false, 0)
	p.SetMargins(0, 0, 0)
	p.SetCellMargin(0)
	if err := addFonts(p); err != nil {
		return nil, err
	}
	widths := latin()
	d := &Doc{latin: &widths, setup: s, pdf: p, known: known, total: total, links: map[string]int{}, replaced: map[rune]int{}}
	p.SetTitle(d.clean(s.Info.Title, Regular), true)
	p.SetAuthor(d.clean(s.Info.Author, Regular), true)
	p.SetSubject(d.clean(s.Info.Subject, Regular), true)
	p.SetProducer(d.clean(s.Info.Producer, Regular), true)
	d.NewPage()
	draw(d)
	return d, errors.Join(d.err, p.Error())
}

// steady tells that this pass printed true page numbers.
func (d *Doc) steady() bool {
	if d.total != d.page || len(d.known) != len(d.anchors) {
		return false
	}
	for i, a := range d.anchors {
		if a != d.known[i] {
			return false
		}
	}
	return true
}

func (d *Doc) finish() (*Result, error) {
	var b bytes.Buffer
	if err := d.pdf.Output(&b); err != nil {
		return nil, fmt.Errorf("writing the pages: %w", err)
	}
	out, err := attach(b.Bytes(), d.setup.Info, d.setup.Attachments)
	if err != nil {
		return nil, err
	}
	return &Result{Bytes: out, Pages: d.page, Anchors: d.anchors, Replaced: d.Replaced()}, nil
}

// NewPage begins a page, draws its frame and sets the cursor to its top.
func (d *Doc) NewPage() {
	d.pdf.AddPage()
	d.page++
	if d.setup.Frame != nil {
		d.setup.Frame(d)
	}
	d.Y = d.setup.Top
}

// Page is the number of the present page, from 1.
func (d *Doc) Page() int { return d.page }

// Pages is the number of pages in the document.
func (d *Doc) Pages() int { return max(d.total, d.page) }

// Left is the left edge of the text block.
func (d *Doc) Left() float64 { return d.setup.Left }

// Width is the width of the text block.
func (d *Doc) Width() float64 { return d.setup.Paper.W - d.setup.Left - d.setup.Right }

// Top is the upper edge of the text block.
func (d *Doc) Top() float64 { return d.setup.Top }

// Bottom is the lower edge of the text block.
func (d *Doc) Bottom() float64 { return d.setup.Paper.H - d.setup.Bottom }

// Paper is the paper the document is drawn on.
func (d *Doc) Paper() Paper { return d.setup.Paper }

// AtTop tells that nothing stands on the page yet.
func (d *Doc) AtTop() bool { return d.Y <= d.setup.Top+0.01 }

// Need begins a new page when less than h is left on this one.
func (d *Doc) Need(h float64) {
	if d.Y+h > d.Bottom() && !d.AtTop() {
		d.NewPage()
	}
}

// Space moves the cursor down, except at the top of a page.
func (d *Doc) Space(h float64) {
	if !d.AtTop() {
		d.Y += h
	}
}

// Mark sets an anchor and its bookmark at the cursor.
func (d *Doc) Mark(key, title string, level int) {
	d.anchors = append(d.anchors, Anchor{key, d.clean(title, Regular), level, d.page})
	d.pdf.SetFont(faces[Regular].family, "", 10) // bookmark titles take the encoding of the font in use
	d.pdf.Bookmark(d.clean(title, Regular), level, math.Max(0, d.Y-2))
	d.pdf.SetLink(d.link(key), math.Max(0, d.Y-2), d.page)
}

// Anchors lists the anchors of the finished document; it is empty while the
// page numbers are being found.
func (d *Doc) Anchors() []Anchor { return d.known }

// PageOf is the page of an anchor, 0 while it is not known.
func (d *Doc) PageOf(key string) int {
	for _, a := range d.known {
		if a.Key == key {
			return a.Page
		}
	}
	return 0
}

// LinkTo makes an area a link to an anchor; unknown anchors make none.
func (d *Doc) LinkTo(key string, x, y, w, h float64) {
	if d.PageOf(key) > 0 {
		d.pdf.Link(x, y, w, h, d.link(key))
	}
}

func (d *Doc) link(key string) int {
	id, ok := d.links[key]
	if !ok {
		id = d.pdf.AddLink()
		d.links[key] = id
	}
	return id
}

// finite refuses coordinates that would break the page silently.
func (d *Doc) finite(v ...float64) bool {
	for _, x := range v {
		if math.IsNaN(x) || math.IsInf(x, 0) || math.Abs(x) > 1e5 {
			if d.err == nil {
				d.err = fmt.Errorf("page %d: a drawing coordinate is not a usable number (%g)", d.page, x)
			}
			return false
		}
	}
	return true
}
