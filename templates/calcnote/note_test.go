package calcnote

import (
	"bytes"
	"crypto/sha256"
	"encoding/json"
	"fmt"
	"os"
	"os/exec"
	"path/filepath"
	"regexp"
	"strconv"
	"strings"
	"testing"

	"stillair/checks"
	"stillair/checks/casefile"
	"stillair/freeconv"
	"stillair/templates/pdf"
	"stillair/templates/pdf/pdftest"
	"stillair/templates/starter"
	"stillair/templates/typeset"
)

func starters() []string { return starter.Names() }

func outcome(t *testing.T, name string) *checks.Outcome {
	t.Helper()
	text, ok := starter.Get(name)
	if !ok {
		t.Fatalf("no starter %q", name)
	}
	return run(t, name+".yaml", text)
}

func run(t *testing.T, name string, text []byte) *checks.Outcome {
	t.Helper()
	f, findings := casefile.Read(name, text, casefile.Defaults{})
	if f == nil {
		t.Fatalf("%s: %v", name, findings)
	}
	return checks.Run(f, checks.Program{Name: "stillair", Version: "v0.0.0-test", Data: "data-hash"})
}

func write(t *testing.T, o *checks.Outcome, opt Options) []byte {
	t.Helper()
	var b bytes.Buffer
	if err := Write(&b, o, opt); err != nil {
		t.Fatal(err)
	}
	return b.Bytes()
}

func pages(t *testing.T, doc []byte) []string {
	t.Helper()
	text := pdftest.Tool(t, doc, "pdftotext", "-layout", "FILE", "-")
	return strings.Split(strings.TrimSuffix(text, "\f"), "\f")
}

func issue(o *checks.Outcome) {
	for i := range o.Loads {
		o.Loads[i].Case.Note.Status = "issued for review"
	}
}

// flat is text with every run of white space as one space.
func flat(s string) string { return strings.Join(strings.Fields(s), " ") }

func TestEveryStarterMakesACompleteNote(t *testing.T) {
	for _, name := range starters() {
		t.Run(name, func(t *testing.T) {
			o := outcome(t, name)
			issue(o) // a status mark would stand between the words of the extracted text
			doc := write(t, o, Options{Company: "Example Engineering"})
			if out := pdftest.Tool(t, doc, "qpdf", "--check", "FILE"); !strings.Contains(out, "No syntax or stream encoding errors") {
				t.Error(out)
			}
			p := pages(t, doc)
			checkPages(t, o, p)
			checkNumbers(t, o, flat(strings.Join(p, " ")))
			checkUnits(t, strings.Join(p, " "))
		})
	}
}

// checkPages looks for what every page carries and what the first one must.
func checkPages(t *testing.T, o *checks.Outcome, p []string) {
	t.Helper()
	h := o.Loads[0].Case.Note
	for i, text := range p {
		for _, want := range []string{fmt.Sprintf("page %d of %d", i+1, len(p)), h.Number, h.Prepared, h.Date, o.Case.SHA256[:12], "Uncontrolled when printed"} {
			if !strings.Contains(text, want) {
				t.Errorf("page %d lacks %q", i+1, want)
			}
		}
	}
	for _, want := range []string{"Legal owner", "Identification number", "Date of issue", "Sheet", "Title", "Approver", "Creator", "Document type",
		"Revision", "Project", "Tag", "Status", "not given", "Prepared", "Checked", "Approved", "Signature", "Contents",
		o.Case.Title, o.Case.Tag, h.Number, strings.ToUpper(string(o.Verdict)), "decimal point"} {
		if !strings.Contains(p[0], want) {
			t.Errorf("the first page lacks %q", want)
		}
	}
	half := flat(strings.Join(strings.Split(p[0], "\n")[:len(strings.Split(p[0], "\n"))/2], " "))
	if len(o.Cautions) > 0 && !strings.Contains(half, "Burn caution") || !strings.Contains(half, strings.ToUpper(string(o.Verdict))) {
		t.Error("verdict and burn caution are not in the first half page")
	}
}

// checkNumbers looks for every temperature, margin, verdict and limit.
func checkNumbers(t *testing.T, o *checks.Outcome, text string) {
	t.Helper()
	n := (note{o: o}).with(nil)
	find := func(what, want string) {
		if !strings.Contains(text, flat(want)) {
			t.Errorf("%s %q is not printed", what, want)
		}
	}
	for _, l := range o.Loads {
		for _, v := range l.Temps {
			find(l.Name+", "+v.At, n.barePM(v.K, uncertaintyOf(v)))
		}
		for _, v := range l.Verdicts {
			find(v.At, n.pm(v.ValueK, v.Uncertainty))
			find(v.At+" margin", n.diff(v.MarginK))
			find("verdict", string(v.Verdict))
		}
		for _, f := range l.Films {
			find("method", f.Method)
		}
	}
	for _, s := range append(append([]string{}, n.cautionList()...), o.Assumptions...) {
		find("sentence", s)
	}
	find("inputs hash", o.Case.SHA256)
	find("program", o.Program.Version)
}

// One digit before K or W is left out: in a cell that holds only "2 K" the
// extracting program takes the evenly spread characters for one word.
var glued = regexp.MustCompile(`\d(°C|°F|mm|kPa|W/|J/|kg/)|\d\d[KW] |(^|[ (])\.\d|W/m²K|W/mK`)

// checkUnits looks for numbers glued to units outside the printed case file.
func checkUnits(t *testing.T, text string) {
	t.Helper()
	body := text[:strings.LastIndex(text, "Case file")]
	for _, m := range glued.FindAllStringIndex(body, -1) {
		t.Errorf("unit without its space: %q", body[max(0, m[0]-20):min(len(body), m[1]+10)])
	}
}

func TestBookmarksPointAtTheirPages(t *testing.T) {
	o := outcome(t, "panel")
	doc := write(t, o, Options{})
	js := pdftest.Tool(t, doc, "qpdf", "--json", "--json-key=outlines", "FILE")
	var outline struct {
		Outlines []struct {
			Title string `json:"title"`
			Page  int    `json:"destpageposfrom1"`
		} `json:"outlines"`
	}
	if err := json.Unmarshal([]byte(js), &outline); err != nil {
		t.Fatal(err)
	}
	p := pages(t, doc)
	if len(outline.Outlines) != 15 {
		t.Errorf("%d sections", len(outline.Outlines))
	}
	for _, b := range outline.Outlines {
		_, title, _ := strings.Cut(b.Title, "  ")
		if b.Page < 1 || !strings.Contains(p[b.Page-1], title) {
			t.Errorf("bookmark %q points at page %d", b.Title, b.Page)
		}
		if !regexp.MustCompile(regexp.QuoteMeta(title) + `\s+` + strconv.Itoa(b.Page) + `\b`).MatchString(p[0]) {
			t.Errorf("the contents list does not give page %d for %q", b.Page, title)
		}
	}
}

func TestAttachmentsComeBack(t *testing.T) {
	o := outcome(t, "steam-pipe")
	doc := write(t, o, Options{})
	results, err := checks.JSON(o)
	if err != nil {
		t.Fatal(err)
	}
	for i, want := range [][]byte{o.File.Text, results} {
		out := filepath.Join(t.TempDir(), "out")
		pdftest.Tool(t, doc, "pdfdetach", "-save", strconv.Itoa(i+1), "-o", out, "FILE")
		if got, err := os.ReadFile(out); err != nil || !bytes.Equal(got, want) {
			t.Errorf("attachment %d came back changed (%v)", i+1, err)
		}
	}
	if sum := fmt.Sprintf("%x", sha256.Sum256(results)); !strings.Contains(flat(strings.Join(pages(t, doc), " ")), sum) {
		t.Error("the hash of the results is not printed")
	}
}

func TestNormalTextIsPrintedWhole(t *testing.T) {
	for _, name := range starters() {
		o := outcome(t, name)
		r, err := build(o, Options{Company: "Ingenieurbüro Größe"}, []byte("{}"))
		if err != nil {
			t.Fatal(err)
		}
		if len(r.Replaced) > 0 {
			t.Errorf("%s: replaced %v", name, r.Replaced)
		}
	}
}

// word is one word of the extracting program with its box in points.
var word = regexp.MustCompile(`xMin="([\d.]+)" yMin="([\d.]+)" xMax="([\d.]+)" yMax="([\d.]+)">(.*)</word>`)

// TestNothingLeavesTheTextBlock checks every word of every page.
func TestNothingLeavesTheTextBlock(t *testing.T) {
	for _, name := range []string{"panel", "cabinet", "vessel"} {
		for _, paper := range []string{"A4", "Letter"} {
			o := outcome(t, name)
			issue(o)
			out := pdftest.Tool(t, write(t, o, Options{Paper: paper}), "pdftotext", "-bbox", "FILE", "-")
			sheet := pdf.A4
			if paper == "Letter" {
				sheet = pdf.Letter
			}
			const mm = 72 / 25.4
			for _, m := range word.FindAllStringSubmatch(out, -1) {
				x0, _ := strconv.ParseFloat(m[1], 64)
				x1, _ := strconv.ParseFloat(m[3], 64)
				y1, _ := strconv.ParseFloat(m[4], 64)
				if x0 < 24.9*mm || x1 > (sheet.W-14.9)*mm || y1 > (sheet.H-8)*mm {
					t.Errorf("%s, %s: %q at %s..%s", name, paper, m[5], m[1], m[3])
				}
			}
		}
	}
}

func TestStatusMark(t *testing.T) {
	o := outcome(t, "plate")
	for status, want := range map[string]bool{"draft": true, "issued for review": false} {
		for i := range o.Loads {
			o.Loads[i].Case.Note.Status = status
		}
		out := pdftest.Tool(t, write(t, o, Options{}), "pdftotext", "-bbox", "FILE", "-")
		for i, p := range strings.Split(out, "<page ")[1:] {
			marked := false
			for _, m := range word.FindAllStringSubmatch(p, -1) {
				top, _ := strconv.ParseFloat(m[2], 64)
				end, _ := strconv.ParseFloat(m[4], 64)
				marked = marked || end-top > 50 && strings.Contains("DRAFT", m[5])
			}
			if marked != want {
				t.Errorf("status %q, page %d: mark %v", status, i+1, marked)
			}
		}
	}
}

// TestSameOutcomeSameBytes compares with another process in another time zone.
func TestSameOutcomeSameBytes(t *testing.T) {
	if out := os.Getenv("NOTE_OUT"); out != "" {
		if err := os.WriteFile(out, write(t, outcome(t, "panel"), Options{}), 0o600); err != nil {
			t.Fatal(err)
		}
		return
	}
	first := write(t, outcome(t, "panel"), Options{})
	if !bytes.Equal(first, write(t, outcome(t, "panel"), Options{})) {
		t.Error("two notes of one process differ")
	}
	out := filepath.Join(t.TempDir(), "note.pdf")
	cmd := exec.Command(os.Args[0], "-test.run=^TestSameOutcomeSameBytes$")
	cmd.Env = append(os.Environ(), "NOTE_OUT="+out, "TZ=Asia/Tokyo")
	if msg, err := cmd.CombinedOutput(); err != nil {
		t.Fatalf("%v\n%s", err, msg)
	}
	if got, err := os.ReadFile(out); err != nil || !bytes.Equal(first, got) {
		t.Errorf("another process writes other bytes (%v)", err)
	}
}

func TestHostileWordsDoNoHarm(t *testing.T) {
	for _, s := range []string{"emoji 😀", "bell\a and \x00", "bad \xff\xfe", "漢字かな", "Ελληνικά Größe", strings.Repeat("W", 5000), strings.Repeat("long words ", 500), `\frac{1}{ (`, "%s %d \\", "a\nb\tc"} {
		o := outcome(t, "cylinder")
		o.Case.Title, o.Case.Tag = s, s
		o.File.Text = []byte(s)
		o.Assumptions = append(o.Assumptions, s)
		for i := range o.Loads {
			l := &o.Loads[i]
			l.Name += s
			l.Case.Note = casefile.Note{Number: s, Revision: s, Project: s, Client: s, Status: s, Prepared: s, Checked: s, Approved: s, Date: s, Reason: s, Purpose: s, Owner: s}
			l.Case.Remarks = []string{s}
			l.Notes = append(l.Notes, s)
			for j := range l.Verdicts {
				l.Verdicts[j].Source, l.Verdicts[j].Limit = s, s
			}
		}
		r, err := build(o, Options{Company: s}, []byte("{}"))
		if err != nil {
			t.Errorf("%.12q: %v", s, err)
			continue
		}
		if odd := strings.ContainsAny(s, "😀\a漢") || strings.Contains(s, "\xff"); odd != (len(r.Replaced) > 0) {
			t.Errorf("%.12q: replaced %v", s, r.Replaced)
		}
		if strings.Contains(s, "😀") && !strings.Contains(flat(strings.Join(pages(t, r.Bytes), " ")), "cannot print are shown as �: U+1F600") {
			t.Error("the note does not report the character it could not print")
		}
	}
}

func TestEmptyOutcomesSayNotComputed(t *testing.T) {
	if err := Write(&bytes.Buffer{}, nil, Options{}); err == nil {
		t.Error("no outcome was accepted")
	}
	if err := Write(&bytes.Buffer{}, &checks.Outcome{}, Options{}); err == nil {
		t.Error("an outcome without load cases was accepted")
	}
	o := &checks.Outcome{Schema: checks.SchemaName, Verdict: checks.NoResult, Loads: []checks.LoadOutcome{
		{Name: "only", Status: checks.NotConverged, Message: `load case "only": front does not settle`, Governing: true}}}
	text := flat(strings.Join(pages(t, write(t, o, Options{})), " "))
	for _, want := range []string{"NO RESULT", "front does not settle", "Not computed: the governing load case has no valid result.", "not given", "not available"} {
		if !strings.Contains(strings.ToLower(text), strings.ToLower(want)) {
			t.Errorf("the note does not say %q", want)
		}
	}
}

func TestUSUnits(t *testing.T) {
	text := flat(strings.Join(pages(t, write(t, outcome(t, "cabinet"), Options{Paper: "Letter"})), " "))
	if !strings.Contains(text, "US customary units") || !strings.Contains(text, "°F") {
		t.Error("no US units")
	}
}

func TestBadLogoIsAnError(t *testing.T) {
	if err := Write(&bytes.Buffer{}, outcome(t, "plate"), Options{Logo: []byte("no picture")}); err == nil {
		t.Error("a logo that is no picture was accepted")
	}
}

// TestAllFormulasCanBeSet reads every formula the note may print.
func TestAllFormulasCanBeSet(t *testing.T) {
	sources := []string{formulaRayleigh, formulaFilm, formulaProperties, formulaRadiation, formulaSun, formulaPlane, formulaCylinder, formulaSphere, formulaBalance, formulaUpper, formulaCombine, formulaPressure, conductionFormula("vessel")}
	for _, c := range freeconv.All() {
		sources = append(sources, strings.Split(quantities(c.Equation), "\n")...)
		sources = append(sources, strings.Split(quantities(c.Substitute(freeconv.Input{Ra: 1.234e7, Pr: 0.7, LD: 3, Theta: 30, AP: 0.3})), "\n")...)
	}
	for _, src := range sources {
		if _, err := typeset.Parse(src); err != nil {
			t.Errorf("%s: %v", src, err)
		}
	}
}

func TestNumbersAreWrittenByTheRules(t *testing.T) {
	for _, c := range []struct {
		x    float64
		sig  int
		want string
	}{{0, 5, "0"}, {347.219, 5, "347.22"}, {2.0425e9, 5, `2.0425 \times 10^{9}`}, {-0.0123456, 4, "-0.01235"}, {99999.6, 5, `1.0000 \times 10^{5}`}, {1.8671e-5, 5, `1.8671 \times 10^{-5}`}} {
		if got := digits(c.x, c.sig); got != c.want {
			t.Errorf("digits(%g, %d) = %s, want %s", c.x, c.sig, got, c.want)
		}
	}
	if got := powers("Ra = 1e9 and 4.8e6, 8e-3"); got != "Ra = 10⁹ and 4.8·10⁶, 8·10⁻³" {
		t.Error(got)
	}
	if got := percent(0.99996); got != ">\u00A099.9\u00A0%" {
		t.Error(got)
	}
}

func TestManyLoadCasesContinueBelow(t *testing.T) {
	o := outcome(t, "panel")
	issue(o)
	one := o.Loads[0]
	one.Governing = false
	for i := range 20 {
		l := one
		l.Name = fmt.Sprintf("extra load %d end", i)
		o.Loads = append(o.Loads, l)
	}
	text := flat(strings.Join(pages(t, write(t, o, Options{})), " "))
	for i := range 20 {
		name := fmt.Sprintf("extra load %d end", i)
		if got := strings.Count(text, name); got < 4 {
			t.Errorf("%q is named %d times", name, got)
		}
	}
}

func BenchmarkWrite(b *testing.B) {
	text, _ := starter.Get("panel")
	f, _ := casefile.Read("panel.yaml", text, casefile.Defaults{})
	o := checks.Run(f, checks.Program{Name: "stillair", Version: "v0"})
	for b.Loop() {
		if err := Write(&bytes.Buffer{}, o, Options{}); err != nil {
			b.Fatal(err)
		}
	}
}
