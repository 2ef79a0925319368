package pdf

import (
	"bytes"
	"fmt"
	"math"
	"os"
	"path/filepath"
	"regexp"
	"strconv"
	"strings"
	"testing"
	"time"

	"stillair/templates/drawing"
	"stillair/templates/pdf/pdftest"
)

var body = Style{Size: 10}

func setup() Setup {
	return Setup{
		Paper: A4, Left: 25, Right: 15, Top: 25, Bottom: 20,
		Info: Info{Title: "Größe ≥ 3 (test)", Author: "A. Preparer", Producer: "test", Date: time.Date(2026, 11, 30, 0, 0, 0, 0, time.UTC)},
		Frame: func(d *Doc) {
			d.Text(25, 15, fmt.Sprintf("page %d of %d", d.Page(), d.Pages()), body)
		},
	}
}

func build(t *testing.T, s Setup, draw func(*Doc)) *Result {
	t.Helper()
	r, err := Build(s, draw)
	if err != nil {
		t.Fatal(err)
	}
	return r
}

func hundredRows(d *Doc) {
	t := Table{X: d.Left(), W: d.Width(), Style: Style{Size: 8.5}, Columns: []Column{{Head: "Head of names", Width: 3}, {Head: "Number", Width: 1, Align: AlignDecimal}}}
	for i := range 100 {
		t.Rows = append(t.Rows, Row{Cells: []Cell{C(fmt.Sprintf("row %d begins here and is long enough that its text wraps onto a second line, where it says end%d", i, i)), C(fmt.Sprintf("%.*f", i%4, 1.5*float64(i)))}})
	}
	d.Table(t)
}

func TestSameInputSameBytes(t *testing.T) {
	s := setup()
	s.Attachments = []Attachment{{Name: "b.txt", MIME: "text/plain", Relationship: "Data", Data: []byte("data")}}
	draw := func(d *Doc) { d.Mark("one", "One", 0); hundredRows(d) }
	a := build(t, s, draw)
	for _, zone := range []*time.Location{time.FixedZone("east", 9*3600), time.FixedZone("west", -8*3600)} {
		s.Info.Date = s.Info.Date.In(zone)
		if b := build(t, s, draw); !bytes.Equal(a.Bytes, b.Bytes) {
			t.Errorf("other bytes in time zone %s", zone)
		}
	}
}

func TestEveryPageKnowsTheCount(t *testing.T) {
	r := build(t, setup(), hundredRows)
	pages := strings.Split(strings.TrimSuffix(pdftest.Tool(t, r.Bytes, "pdftotext", "-layout", "FILE", "-"), "\f"), "\f")
	if len(pages) != r.Pages || r.Pages < 3 {
		t.Fatalf("%d pages, the result says %d", len(pages), r.Pages)
	}
	for i, p := range pages {
		if want := fmt.Sprintf("page %d of %d", i+1, r.Pages); !strings.Contains(p, want) {
			t.Errorf("page %d does not say %q", i+1, want)
		}
	}
}

func TestTableHeadsRepeatAndRowsStayWhole(t *testing.T) {
	r := build(t, setup(), hundredRows)
	seen := 0
	for _, p := range strings.Split(strings.TrimSuffix(pdftest.Tool(t, r.Bytes, "pdftotext", "-layout", "FILE", "-"), "\f"), "\f") {
		if !strings.Contains(p, "Head of names") {
			t.Error("a page without the head of the table")
		}
		for i := range 100 {
			begins := strings.Contains(p, fmt.Sprintf("row %d begins", i))
			ends := regexp.MustCompile(fmt.Sprintf(`\bend%d\b`, i)).MatchString(p)
			if begins != ends {
				t.Errorf("row %d is split", i)
			}
			if begins {
				seen++
			}
		}
	}
	if seen != 100 {
		t.Errorf("%d rows", seen)
	}
}

func TestDecimalPointsAreInLine(t *testing.T) {
	d, err := pass(setup(), func(*Doc) {}, nil, 0)
	if err != nil {
		t.Fatal(err)
	}
	g := grid{d: d, t: Table{X: 20, W: 100, Style: body, Columns: []Column{{Width: 1, Align: AlignDecimal}},
		Rows: []Row{{Cells: []Cell{C("1.25")}}, {Cells: []Cell{C("-120")}}, {Cells: []Cell{C("13.5 K")}}}}}
	g.columns()
	for _, r := range g.t.Rows {
		head, _, _ := atPoint(r.Cells[0])
		at := g.start(r.Cells[0], 0, line{}, 1) + d.TextWidth(head, body)
		if math.Abs(at-g.point[0]) > 1e-9 {
			t.Errorf("%q: point at %.3f, want %.3f", r.Cells[0].Runs[0].Text, at, g.point[0])
		}
	}
}

func TestHostileTextIsShownAndReported(t *testing.T) {
	word := strings.Repeat("W", 5000)
	r := build(t, setup(), func(d *Doc) {
		for _, s := range []string{"emoji 😀", "bell \a", "bad \xff\xfe", "漢字", "Ελληνικά", "\u202eturned", word, "tab\tnew\nline", "\\)(("} {
			d.Para(T(s), body, d.Left(), 60)
			d.Table(Table{X: d.Left(), W: 80, Style: body, Columns: []Column{{Head: s, Width: 1}}, Rows: []Row{{Cells: []Cell{C(s)}}}})
		}
		d.Mark("k", "title 😀 \xff", 0)
	})
	got := fmt.Sprint(r.Replaced)
	for _, want := range []string{"U+0007", "U+1F600", "U+6F22", "U+202E", "not UTF-8"} {
		if !strings.Contains(got, want) {
			t.Errorf("%s is not reported: %s", want, got)
		}
	}
	if strings.Contains(got, "U+0395") {
		t.Error("Greek letters were replaced")
	}
	text := pdftest.Tool(t, r.Bytes, "pdftotext", "FILE", "-")
	for _, want := range []string{"emoji �", "Ελληνικά", "tab new line", `\)((`} {
		if !strings.Contains(text, want) {
			t.Errorf("the page does not show %q", want)
		}
	}
}

func TestAttachmentsComeBackAndBookmarksStayRight(t *testing.T) {
	s := setup()
	data := bytes.Repeat([]byte("line of the file\r\n\x00"), 900)
	s.Attachments = []Attachment{
		{Name: "case.yaml", MIME: "application/yaml", Description: "Größe", Relationship: "Source", Data: []byte("a: 1\n")},
		{Name: "result.json", MIME: "application/json", Description: "d", Relationship: "Data", Data: data},
	}
	r := build(t, s, func(d *Doc) {
		for i := range 4 {
			d.Mark(fmt.Sprint("k", i), fmt.Sprintf("Part %d ß", i), i%2)
			d.LinkTo("k3", 20, d.Y, 30, 5)
			d.Y = 150
			d.NewPage()
		}
	})
	if out := pdftest.Tool(t, r.Bytes, "qpdf", "--check", "FILE"); !strings.Contains(out, "No syntax or stream encoding errors") {
		t.Error(out)
	}
	js := pdftest.Tool(t, r.Bytes, "qpdf", "--json", "--json-key=outlines", "--json-key=attachments", "FILE")
	dest := regexp.MustCompile(`"destpageposfrom1": (\w+)`).FindAllStringSubmatch(js, -1)
	if len(dest) != 4 {
		t.Fatalf("%d bookmarks:\n%s", len(dest), js)
	}
	for _, page := range r.Anchors {
		if !strings.Contains(js, `"destpageposfrom1": `+strconv.Itoa(page.Page)) {
			t.Errorf("no bookmark points at page %d", page.Page)
		}
	}
	for i, f := range s.Attachments {
		out := filepath.Join(t.TempDir(), "out")
		pdftest.Tool(t, r.Bytes, "pdfdetach", "-save", strconv.Itoa(i+1), "-o", out, "FILE")
		if got, err := os.ReadFile(out); err != nil || !bytes.Equal(got, f.Data) {
			t.Errorf("%s came back changed (%v)", f.Name, err)
		}
	}
	for _, want := range []string{"/AFRelationship /Source", "/AFRelationship /Data", "/Subtype /application#2fyaml", "/AF [", "/DisplayDocTitle true", "/Lang (en)", "/ID [<"} {
		if !bytes.Contains(r.Bytes, []byte(want)) {
			t.Errorf("the file has no %q", want)
		}
	}
}

func TestBrokenCoordinatesAreAnError(t *testing.T) {
	_, err := Build(setup(), func(d *Doc) { d.Line(0, math.NaN(), 1, 1, 0.2, Black) })
	if err == nil || !strings.Contains(err.Error(), "page 1") {
		t.Errorf("got %v", err)
	}
}

func TestBadLogoIsAnError(t *testing.T) {
	for _, logo := range [][]byte{[]byte("no picture"), []byte("\x89PNG\r\n\x1a\nrest")} {
		s := setup()
		s.Logo = logo
		if _, err := Build(s, func(d *Doc) { d.Logo(10, 10, 20, 10) }); err == nil {
			t.Errorf("%.8q was accepted", logo)
		}
	}
}

func TestSceneKeepsCapHeight(t *testing.T) {
	red := Color{R: 200}
	s := drawing.Scene{W: 50, H: 30, Items: []drawing.Item{
		drawing.Line{X1: 1, Y1: 1, X2: 40, Y2: 1, Width: 0.5, Dash: []float64{2, 1}},
		drawing.Area{X: []float64{5, 20, 20}, Y: []float64{5, 5, 20}, Fill: &red, Width: 0.25},
		drawing.Label{X: 20, Y: 20, Size: 2.5, Text: "right word", Anchor: drawing.Right, Turn: 90},
	}}
	r := build(t, setup(), func(d *Doc) { d.Scene(s, 30, 40) })
	if text := pdftest.Tool(t, r.Bytes, "pdftotext", "FILE", "-"); !strings.Contains(text, "right word") {
		t.Error("the label is missing")
	}
	if e := ExtentOf(Regular, 'H'); math.Abs(e.Up-CapHeight) > 0.001 {
		t.Errorf("cap height %.4f em, want %.3f", e.Up, CapHeight)
	}
}

func TestFontsHoldWhatNotesNeed(t *testing.T) {
	const need = "°Δεσλρμναβηθ≤≥²³⁴·−×±→✓✗•…–—“”’½Ø�∥√∞ÄÖÜäöüßéőЙ☐☑ ₁\u00a0\u2009"
	for f := range faces {
		for _, r := range need {
			if !Has(Face(f), r) && !(Face(f) == Mono && strings.ContainsRune("∥", r)) {
				t.Errorf("face %d lacks %q", f, r)
			}
		}
	}
}

func TestFitEndsWithAnEllipsis(t *testing.T) {
	d, err := pass(setup(), func(*Doc) {}, nil, 0)
	if err != nil {
		t.Fatal(err)
	}
	s := d.Fit("a rather long line of text", body, 20)
	if !strings.HasSuffix(s, "…") || d.TextWidth(s, body) > 20 {
		t.Errorf("%q is %.1f mm", s, d.TextWidth(s, body))
	}
}
