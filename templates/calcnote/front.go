package calcnote

import (
	"fmt"
	"strings"

	"stillair/checks"
	"stillair/checks/limit"
	"stillair/checks/unit"
	"stillair/templates/pdf"
)

// frame is what every page carries: mark of the status, head and foot.
func (n *note) frame() {
	n.statusMark()
	if n.d.Page() > 1 {
		n.pageHead()
	}
	n.pageFoot()
}

// marked statuses print across the page.
var marked = map[string]string{
	"draft": "DRAFT", "preliminary": "PRELIMINARY", "superseded": "SUPERSEDED", "void": "VOID", "cancelled": "CANCELLED", "hold": "HOLD",
}

func (n *note) statusMark() {
	word := marked[strings.ToLower(strings.TrimSpace(n.head().Status))]
	if word == "" {
		return
	}
	p := n.d.Paper()
	size := min(110, 0.92*p.W/(0.70*float64(len(word)))/0.3528)
	n.d.Turned(p.W/2+size*0.12, p.H/2+size*0.12, 52, word, pdf.Style{Face: pdf.Bold, Size: size, Color: pale})
}

func (n *note) pageHead() {
	d, h := n.d, n.head()
	x, w := n.left(), n.width()
	d.Text(x, 15, n.number()+revisionText(h.Revision), smallStyle.With(pdf.Bold))
	right := strings.Join(nonEmpty(h.Project, n.o.Case.Tag, h.Status), "  ·  ")
	right = d.Fit(right, labelStyle, 0.42*w)
	d.TextRight(x+w, 15, right, labelStyle)
	d.Text(x, 19.5, d.Fit(n.o.Case.Title, smallStyle, w-32), smallStyle)
	d.TextRight(x+w, 19.5, n.pageOf(), smallStyle)
	d.Line(x, 22, x+w, 22, 0.25, accent)
}

func (n *note) pageFoot() {
	d, h := n.d, n.head()
	x, w, y := n.left(), n.width(), n.d.Paper().H-15
	d.Line(x, y-4, x+w, y-4, 0.1, hair)
	by := fmt.Sprintf("Prepared: %s  ·  Checked: %s  ·  Approved: %s  ·  %s", dash(h.Prepared), dash(h.Checked), dash(h.Approved), dash(h.Date))
	d.Text(x, y, d.Fit(by, labelStyle, w-52), labelStyle)
	d.TextRight(x+w, y, "inputs SHA-256 "+shortHash(n.o.Case.SHA256), labelStyle)
	d.Text(x, y+4.2, "Uncontrolled when printed: check the current revision.", labelStyle)
	d.TextRight(x+w, y+4.2, n.pageOf(), labelStyle)
}

func (n *note) pageOf() string { return fmt.Sprintf("page %d of %d", n.d.Page(), n.d.Pages()) }

func revisionText(r string) string {
	if r == "" {
		return ""
	}
	return "  rev. " + r
}

func nonEmpty(list ...string) []string {
	var out []string
	for _, s := range list {
		if strings.TrimSpace(s) != "" {
			out = append(out, s)
		}
	}
	return out
}

func dash(s string) string {
	if strings.TrimSpace(s) == "" {
		return "–"
	}
	return s
}

func shortHash(h string) string {
	if len(h) > 12 {
		return h[:12] + "…"
	}
	return dash(h)
}

func (n *note) frontPage() {
	n.letterhead()
	n.titleBlock()
	n.verdictPanel()
	n.glance()
	n.signOff()
	n.revisions()
	n.contents()
}

// letterhead is the strip over the title block.
func (n *note) letterhead() {
	d := n.d
	x := n.left()
	if w := d.Logo(x, 11, 40, 13); w > 0 {
		x += w + 4
	}
	if n.opt.Company != "" {
		d.Text(x, 21, d.Fit(n.opt.Company, headStyle, n.width()*0.6), headStyle)
	}
	d.TextRight(n.left()+n.width(), 21, documentType, headStyle)
	d.Y = 25
}

// field is one box of the title block; share is its part of the row.
type field struct {
	label, value string
	share        float64
}

// titleBlock has the eight mandatory fields of ISO 7200 (legal owner,
// identification number, date of issue, sheet number, title, approver,
// creator, document type) and revision, project, tag, status, client.
func (n *note) titleBlock() {
	h := n.head()
	owner := h.Owner
	if owner == "" {
		owner = n.opt.Company
	}
	n.d.Line(n.left(), n.d.Y, n.left()+n.width(), n.d.Y, 0.5, accent)
	n.titleRow()
	rows := [][]field{
		{{"Legal owner", owner, 2}, {"Identification number", n.number0(), 1}, {"Revision", h.Revision, 1}},
		{{"Project", h.Project, 2}, {"Tag", n.o.Case.Tag, 1}, {"Document type", documentType, 1}},
		{{"Client", h.Client, 2}, {"Date of issue", h.Date, 1}, {"Status", h.Status, 1}},
		{{"Creator", h.Prepared, 1}, {"Checker", h.Checked, 1}, {"Approver", h.Approved, 1}, {"Sheet", n.pageOf(), 1}},
	}
	for _, r := range rows {
		n.fieldRow(r)
	}
	n.d.Line(n.left(), n.d.Y, n.left()+n.width(), n.d.Y, 0.5, accent)
}

// number0 is the identification number, empty when none is given.
func (n *note) number0() string { return n.head().Number }

func (n *note) titleRow() {
	d := n.d
	st := titleStyle
	if d.TextWidth(n.o.Case.Title, st) > n.width()-4 {
		st = pdf.Style{Face: pdf.Bold, Size: 12}
	}
	lines := d.Clip(n.o.Case.Title, st, n.width()-4, 3)
	d.Text(n.left()+1.5, d.Y+4, "Title", labelStyle)
	if len(lines) == 0 {
		n.emptyField(n.left(), d.Y, n.width(), 13)
		lines = []string{""}
	}
	y := d.Y + 5.5
	for _, l := range lines {
		y += st.Leading()
		d.Text(n.left()+1.5, y-0.8, l, st)
	}
	d.Y = y + 1.6
}

const fieldHeight = 9.8

func (n *note) fieldRow(fields []field) {
	d := n.d
	total := 0.0
	for _, f := range fields {
		total += f.share
	}
	x := n.left()
	d.Line(x, d.Y, x+n.width(), d.Y, 0.1, hair)
	for i, f := range fields {
		w := n.width() * f.share / total
		if i > 0 {
			d.Line(x, d.Y, x, d.Y+fieldHeight, 0.1, hair)
		}
		if strings.TrimSpace(f.value) == "" {
			n.emptyField(x, d.Y, w, fieldHeight)
		}
		d.Text(x+1.5, d.Y+3.7, f.label, labelStyle)
		d.Text(x+1.5, d.Y+8.2, d.Fit(f.value, bodyStyle, w-3), bodyStyle)
		x += w
	}
	d.Y += fieldHeight
}

// emptyField marks a box nobody filled in.
func (n *note) emptyField(x, y, w, h float64) {
	n.d.Rect(x+0.6, y+0.6, w-1.2, h-1.2, nil, 0.25, grey)
	n.d.TextRight(x+w-2, y+h-2, "not given", labelStyle.With(pdf.Italic))
}

// verdictPanel tells the result, and what it rests on, in the first half page.
func (n *note) verdictPanel() {
	d := n.d
	d.Y += 3
	top, page := d.Y, d.Page()
	d.Y += 2.5
	x := n.left() + 4
	w := n.width() - 8
	big := pdf.Style{Face: pdf.Bold, Size: 16}
	sw, _, _ := sign{n.o.Verdict}.Extent(d, big.Size)
	sign{n.o.Verdict}.Draw(d, x, d.Y+6, big.Size)
	d.Text(x+sw+1, d.Y+6, strings.ToUpper(string(n.o.Verdict)), big)
	d.TextRight(x+w, d.Y+5.6, n.tally(), labelStyle)
	d.Y += 9
	for _, s := range n.verdictSentences() {
		d.Para(prose(s), bodyStyle, x, w)
		d.Y += 0.6
	}
	if s := n.unjudged(); s != "" {
		d.Para(pdf.T(s), boldStyle, x, w)
		d.Y += 0.6
	}
	if len(n.o.Cautions) > 0 {
		d.Y += 0.4
		d.Para(append([]pdf.Run{{Text: "Burn caution. ", Face: pdf.Bold}}, n.burnCaution()...), smallStyle, x, w)
	}
	d.Y += 2
	if d.Page() == page {
		d.Rect(n.left(), top, n.width(), d.Y-top, nil, 0.35, pdf.Black)
	}
	d.Y += 1
}

// burnCaution says what the comparison leaves out and points to the section
// with the cautions.
func (n *note) burnCaution() []pdf.Run {
	key, number := n.sectionOf(cautionsTitle)
	about := "Burn thresholds hold for short contact of a small area of healthy skin; pain and a startled movement begin lower."
	if !n.burnJudged() {
		about = noBurnThreshold
	}
	if n.uncertainThreshold() {
		about += " " + lowConfidence
	}
	return []pdf.Run{{Text: about + " Local hot spots are hotter than the mean of a face. " + limit.CautionHead + " See "},
		{Text: "section\u00A0" + number, Link: key}, {Text: "."}}
}

// lowConfidence stands beside verdicts on thresholds of low confidence.
const lowConfidence = "The threshold rests partly on memory or interpolation: confirm it in the standard before relying on the verdict."

// uncertainThreshold tells whether a burn threshold of low confidence was
// judged.
func (n *note) uncertainThreshold() bool {
	for _, l := range n.o.Loads {
		for _, v := range ofKind(l, kindBurn) {
			if v.Confidence == "low" {
				return true
			}
		}
	}
	return false
}

// sectionOf finds a section by its title, once the contents are known.
func (n *note) sectionOf(title string) (key, number string) {
	for _, a := range n.d.Anchors() {
		if num, t, _ := strings.Cut(a.Title, "  "); a.Level == 0 && t == title {
			return a.Key, num
		}
	}
	return "", ""
}

// tally counts the verdicts.
func (n *note) tally() string {
	count := map[checks.Verdict]int{}
	total := 0
	for _, l := range n.o.Loads {
		for _, v := range l.Verdicts {
			count[v.Verdict]++
			total++
		}
	}
	if total == 0 {
		return "no check was made"
	}
	var parts []string
	for _, v := range []checks.Verdict{checks.Fail, checks.ConditionalFail, checks.ConditionalPass, checks.Pass} {
		if count[v] > 0 {
			parts = append(parts, fmt.Sprintf("%d %s", count[v], v))
		}
	}
	return plural(total, "check", "checks") + ": " + strings.Join(parts, ", ")
}

func (n *note) verdictSentences() []string {
	var list []string
	for _, l := range n.o.Loads {
		if l.Status != checks.Converged {
			list = append(list, fmt.Sprintf("Load case “%s” has no valid result (%s). %s", l.Name, l.Status, capital(l.Message)))
		}
	}
	v, load := n.o.Deciding()
	if v == nil {
		if n.converged() {
			list = append(list, nothingJudged(n.o.Verdict))
		}
		return list
	}
	return append(list, n.decisiveSentence(*v, load.Name))
}

// nothingJudged tells why there is no verdict.
func nothingJudged(v checks.Verdict) string {
	if v == checks.NotJudged {
		return "Limits are given, but no load case has a purpose that judges one: the note reports temperatures only."
	}
	return "No limit is given: the note reports temperatures only."
}

func (n *note) decisiveSentence(v checks.Judged, load string) string {
	return fmt.Sprintf("%s Governing: load case “%s”, %s %s, limit %s (%s), margin %s.",
		meaning[v.Verdict], load, v.At, n.pm(v.ValueK, v.Uncertainty), n.limitText(v), shortSource(v.Source), n.diff(v.MarginK))
}

// unjudged names the limits that no load case judged.
func (n *note) unjudged() string {
	if len(n.o.Unjudged) == 0 {
		return ""
	}
	return minus(fmt.Sprintf("Not judged in any load case: %s.", strings.Join(n.o.Unjudged, "; ")))
}

// shortSource is the head of a long citation; the whole stands in the
// references.
func shortSource(s string) string {
	const enough = 90
	s = tidySource(s)
	if r := []rune(s); len(r) > enough {
		head, _, _ := strings.Cut(s, "; ")
		if r = []rune(head); len(r) <= enough && balanced(head) {
			return head
		}
		return cutSource(string(r[:min(enough, len(r))]))
	}
	return s
}

func balanced(s string) bool { return strings.Count(s, "(") == strings.Count(s, ")") }

// cutSource ends the beginning of a citation before a bracket that it would
// leave open, or after a whole word.
func cutSource(s string) string {
	if i := strings.LastIndex(s, "("); i > 0 && !balanced(s) {
		return strings.TrimRight(s[:i], " ,:;")
	}
	if i := strings.LastIndex(s, " "); i > 0 {
		s = s[:i]
	}
	return strings.TrimRight(s, " ,:;") + "…"
}

// limitText is a limit in words with its value when the words do not have it.
func (n *note) limitText(v checks.Judged) string {
	value := n.temp(v.LimitK)
	if strings.Contains(squash(minus(v.Limit)), squash(strings.TrimSuffix(value, " "))) {
		return minus(v.Limit)
	}
	return minus(v.Limit) + " = " + value
}

func squash(s string) string {
	return strings.NewReplacer(" ", "", "\u00A0", "", ".0\u00A0", "", ".0", "").Replace(s)
}

// meaning says what a verdict word stands for.
var meaning = map[checks.Verdict]string{
	checks.Pass:            "The calculated results meet every limit with their uncertainty.",
	checks.ConditionalPass: "The calculated results meet every limit, but at least one not with its whole uncertainty.",
	checks.ConditionalFail: "At least one calculated result does not meet its limit; the excess is smaller than its uncertainty.",
	checks.Fail:            "At least one calculated result does not meet its limit.",
	checks.None:            "No limit is given.",
	checks.NotJudged:       "No limit was judged.",
	checks.NoResult:        "At least one load case has no valid result, so there is no verdict.",
}

// signOff is the table that people sign in ink.
func (n *note) signOff() {
	h := n.head()
	d := n.d
	d.Y += 0.5
	cols := []struct {
		head  string
		share float64
	}{{"", 22}, {"Name", 42}, {"Role", 34}, {"Date", 26}, {"Signature", 46}}
	names := []string{h.Prepared, h.Checked, h.Approved}
	x0, scale := n.left(), n.width()/170
	x := x0
	for _, c := range cols {
		d.Text(x+1.5, d.Y+3.4, c.head, smallStyle.With(pdf.Bold))
		x += c.share * scale
	}
	d.Y += 5
	d.Line(x0, d.Y, x0+n.width(), d.Y, 0.35, accent)
	for i, role := range []string{"Prepared", "Checked", "Approved"} {
		d.Text(x0+1.5, d.Y+5.6, role, bodyStyle)
		d.Text(x0+22*scale+1.5, d.Y+5.6, d.Fit(names[i], bodyStyle, 42*scale-3), bodyStyle)
		x = x0
		for _, c := range cols {
			if c.head != "" && (c.head != "Name" || names[i] == "") {
				d.Rect(x+0.7, d.Y+0.9, c.share*scale-1.4, 7, nil, 0.1, grey)
			}
			x += c.share * scale
		}
		d.Y += 8.4
	}
	d.Line(x0, d.Y, x0+n.width(), d.Y, 0.25, accent)
}

func (n *note) revisions() {
	h := n.head()
	n.d.Y += 2
	n.table([]pdf.Column{{Head: "Revision", Width: 18}, {Head: "Date", Width: 26}, {Head: "Reason", Width: 84}, {Head: "Prepared by", Width: 42}},
		[]pdf.Row{cells(dash(h.Revision), dash(h.Date), orNone(h.Reason), dash(h.Prepared))})
}

// contents lists the sections with links, in two columns, and the conventions.
func (n *note) contents() {
	d := n.d
	var list []pdf.Anchor
	for _, a := range d.Anchors() {
		if a.Level == 0 {
			list = append(list, a)
		}
	}
	half := (len(list) + 1) / 2
	lead := 4.6
	d.Need(14 + float64(half)*lead)
	d.Y += 2.5
	d.Text(n.left(), d.Y, "Contents", boldStyle)
	d.Y += 2
	top, w := d.Y, (n.width()-8)/2
	for i, a := range list {
		x, y := n.left(), top+float64(i%half+1)*lead
		if i >= half {
			x += w + 8
		}
		number, title, _ := strings.Cut(a.Title, "  ")
		d.Text(x, y, number, bodyStyle)
		title = d.Fit(title, bodyStyle, w-20)
		d.Text(x+9, y, title, bodyStyle)
		page := fmt.Sprint(a.Page)
		d.TextRight(x+w, y, page, bodyStyle)
		d.Line(x+11+d.TextWidth(title, bodyStyle), y, x+w-2-d.TextWidth(page, bodyStyle), y, 0.1, hair)
		d.LinkTo(a.Key, x, y-3.6, w, lead)
	}
	d.Y = top + float64(half)*lead + 2
	d.Para(pdf.T(n.conventions()), smallStyle, n.left(), n.width())
}

func (n *note) conventions() string {
	s := "Results in SI units"
	if n.sys == unit.US {
		s = "Results in US customary units, worked surfaces in SI units; heats stay in W, and the iteration record, the solver and typed shifts in SI units"
	}
	return s + "; decimal point; groups of three digits set apart by a thin space; ± U is about two standard deviations, rounded up."
}

// glanceRows is how many load cases fit on the first page.
const glanceRows = 6

// glance is one line per load case: the body, its hottest face, the verdict.
func (n *note) glance() {
	if len(n.o.Loads) > glanceRows {
		return
	}
	n.d.Y += 2.5
	core := "Inside"
	var rows []pdf.Row
	for _, l := range n.o.Loads {
		row := cells(l.Name, notComputed, notComputed, "")
		if len(l.Temps) > 0 && l.Status == checks.Converged {
			core = capital(l.Temps[0].At)
			row.Cells[1] = pdf.C(n.pm(l.Temps[0].K, uncertaintyOf(l.Temps[0])))
			if t, ok := hottestFace(l); ok {
				row.Cells[2] = pdf.C(t.At + " " + n.pm(t.K, uncertaintyOf(t)))
			}
		}
		row.Cells[3] = pdf.Cell{Runs: verdictRuns(l.Verdict)}
		rows = append(rows, n.markGoverning(row, l.Governing))
	}
	n.table([]pdf.Column{{Head: "Load case", Width: 50}, {Head: core, Width: 34}, {Head: "Hottest face", Width: 50}, {Head: "Verdict", Width: 36}}, rows)
}

func hottestFace(l checks.LoadOutcome) (hot checks.Temp, found bool) {
	for _, t := range l.Temps {
		if t.Kind == "outer surface" && (!found || t.K > hot.K) {
			hot, found = t, true
		}
	}
	return hot, found
}
