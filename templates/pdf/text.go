package pdf

import (
	"strings"
	"sync"
	"unicode/utf8"
)

// Style is how a piece of text looks. Size is in points.
type Style struct {
	Face  Face
	Size  float64
	Color Color
}

// With is the same style in another face.
func (s Style) With(f Face) Style { s.Face = f; return s }

// Leading is the distance of baselines, 1.35 times the size, in mm.
func (s Style) Leading() float64 { return s.Size * pointMM * 1.35 }

// Em is the size in millimetres.
func (s Style) Em() float64 { return s.Size * pointMM }

// Inline is something that stands in a line of text like a word: a formula,
// a symbol. Sizes in mm; Draw puts it with its baseline at y.
type Inline interface {
	Extent(d *Doc, size float64) (width, up, down float64)
	Draw(d *Doc, x, y, size float64)
}

// Run is a stretch of text in one face, or an Inline.
type Run struct {
	Text   string
	Face   Face
	Inline Inline
	Link   string // key of an anchor
}

// Text draws one line with its baseline at y.
func (d *Doc) Text(x, y float64, s string, st Style) {
	if s == "" || !d.finite(x, y, st.Size) {
		return
	}
	d.font(st)
	d.pdf.Text(x, y, d.clean(s, st.Face))
}

// TextRight draws one line that ends at x.
func (d *Doc) TextRight(x, y float64, s string, st Style) {
	d.Text(x-d.TextWidth(s, st), y, s, st)
}

// TextWidth is the width of a line in mm.
func (d *Doc) TextWidth(s string, st Style) float64 {
	w := 0.0
	for _, r := range s {
		w += d.advance(st.Face, r)
	}
	return w * st.Em()
}

// latin holds the advance widths of the commonest characters.
var latin = sync.OnceValue(func() (w [len(faces)][256]float64) {
	for f := range w {
		for r := range w[f] {
			w[f][r] = advanceOf(Face(f), rune(r))
		}
	}
	return w
})

// advance is the width of one rune as clean will print it, in em.
func (d *Doc) advance(f Face, r rune) float64 {
	if r >= 0 && r < 256 {
		return d.latin[f][r]
	}
	return advanceOf(f, r)
}

func advanceOf(f Face, r rune) float64 {
	switch {
	case r == '\u00ad':
		return 0
	case r == '\t' || r == '\n' || r == '\r':
		r = ' '
	case !printable(f, r):
		r = utf8.RuneError
	}
	return ExtentOf(f, r).Advance
}

func (d *Doc) font(st Style) {
	f := faces[st.Face]
	d.pdf.SetFont(f.family, f.style, st.Size)
	d.pdf.SetTextColor(int(st.Color.R), int(st.Color.G), int(st.Color.B))
}

// Fit is the text cut to a width, with an ellipsis when it was cut.
func (d *Doc) Fit(s string, st Style, w float64) string {
	room := w - d.TextWidth("…", st)
	used, keep := 0.0, 0
	for i, r := range s {
		used += d.advance(st.Face, r) * st.Em()
		if used > w {
			return strings.TrimRight(s[:keep], " ") + "…"
		}
		if used <= room {
			keep = i + utf8.RuneLen(r)
			if r == utf8.RuneError {
				keep = i + 1
			}
		}
	}
	return s
}

// piece is part of a line that was laid out.
type piece struct {
	run  Run
	x, w float64
}

// line is one line of laid out runs.
type line struct {
	pieces   []piece
	w        float64
	up, down float64 // beyond the text's own, because of inlines; mm
}

// setRuns breaks runs into lines no wider than w.
func (d *Doc) setRuns(runs []Run, st Style, w float64) []line {
	s := setter{d: d, st: st, w: w}
	for _, r := range runs {
		if r.Inline != nil {
			iw, up, down := r.Inline.Extent(d, st.Size)
			s.word(piece{run: r, w: iw}, up, down)
			continue
		}
		s.text(r)
	}
	s.flush()
	s.endLine()
	return s.lines
}

// setter fills lines word by word. A word may consist of several pieces, when
// the face changes inside it.
type setter struct {
	d       *Doc
	st      Style
	w       float64
	lines   []line
	cur     line
	gap     float64 // space before the present word
	word0   []piece // the present word
	wordW   float64
	wordUp  float64
	wordDn  float64
	pending bool // a space was read since the last word
}

func (s *setter) text(r Run) {
	st := s.st.With(r.Face)
	for i, part := range strings.FieldsFunc(strings.Map(blank, r.Text), isSpace) {
		if i > 0 || startsBlank(r.Text) {
			s.space(st)
		}
		sub := r
		sub.Text = part
		s.word(piece{run: sub, w: s.d.TextWidth(part, st)}, 0, 0)
	}
	if endsBlank(r.Text) {
		s.space(st)
	}
}

func isSpace(r rune) bool       { return r == ' ' }
func startsBlank(t string) bool { return t != "" && blank(rune(t[0])) == ' ' }
func endsBlank(t string) bool   { return t != "" && blank(rune(t[len(t)-1])) == ' ' }

func blank(r rune) rune {
	if r == '\n' || r == '\t' || r == '\r' {
		return ' '
	}
	return r
}

func (s *setter) space(st Style) {
	s.flush()
	s.gap = s.d.TextWidth(" ", st)
	s.pending = true
}

func (s *setter) word(p piece, up, down float64) {
	s.word0 = append(s.word0, p)
	s.wordW += p.w
	s.wordUp, s.wordDn = max(s.wordUp, up), max(s.wordDn, down)
}

// flush puts the present word on a line.
func (s *setter) flush() {
	if len(s.word0) == 0 {
		return
	}
	gap := 0.0
	if s.pending && len(s.cur.pieces) > 0 {
		gap = s.gap
	}
	if len(s.cur.pieces) > 0 && s.cur.w+gap+s.wordW > s.w+1e-6 {
		s.endLine()
		gap = 0
	}
	s.place(gap)
	s.word0, s.wordW, s.wordUp, s.wordDn, s.pending = nil, 0, 0, 0, false
}

func (s *setter) place(gap float64) {
	s.cur.w += gap
	s.cur.up, s.cur.down = max(s.cur.up, s.wordUp), max(s.cur.down, s.wordDn)
	for _, p := range s.word0 {
		for p.run.Inline == nil && s.cur.w+p.w > s.w+1e-6 {
			var done bool
			if p, done = s.chop(p); done {
				break
			}
		}
		p.x = s.cur.w
		s.cur.pieces = append(s.cur.pieces, p)
		s.cur.w += p.w
	}
}

// chop breaks a word that is too long for any line and leaves the rest.
func (s *setter) chop(p piece) (rest piece, done bool) {
	st := s.st.With(p.run.Face)
	runes := []rune(p.run.Text)
	n, w, nice := 0, s.cur.w, 0
	for n < len(runes) {
		a := s.d.advance(st.Face, runes[n]) * st.Em()
		if w+a > s.w {
			break
		}
		w += a
		n++
		if strings.ContainsRune("/-_.,;:=+", runes[n-1]) {
			nice = n
		}
	}
	if nice > n/2 {
		n = nice
	}
	if n == 0 && len(s.cur.pieces) == 0 {
		n = 1 // a column narrower than a character
	}
	if n >= len(runes) {
		return p, true
	}
	if n > 0 {
		head := p
		head.run.Text = string(runes[:n])
		head.w, head.x = s.d.TextWidth(head.run.Text, st), s.cur.w
		s.cur.pieces = append(s.cur.pieces, head)
		s.cur.w += head.w
	}
	s.endLine()
	rest = p
	rest.run.Text = string(runes[n:])
	if n > 0 {
		rest.w = p.w - s.d.TextWidth(string(runes[:n]), st)
	}
	return rest, false
}

func (s *setter) endLine() {
	if len(s.cur.pieces) == 0 {
		return
	}
	s.cur.pieces = s.joined(s.cur.pieces)
	s.lines = append(s.lines, s.cur)
	s.cur = line{}
}

// joined makes one piece of neighbours in the same face, so that the file
// holds whole phrases with their spaces for search and copying.
func (s *setter) joined(pieces []piece) []piece {
	var out []piece
	for _, p := range pieces {
		if len(out) == 0 || p.run.Inline != nil || out[len(out)-1].run.Inline != nil {
			out = append(out, p)
			continue
		}
		last := &out[len(out)-1]
		gap := p.x - last.x - last.w
		space := s.d.TextWidth(" ", s.st.With(p.run.Face))
		switch {
		case p.run.Face != last.run.Face || p.run.Link != last.run.Link:
			out = append(out, p)
			continue
		case gap > space/2:
			last.run.Text += " " + p.run.Text
		default:
			last.run.Text += p.run.Text
		}
		last.w = p.x + p.w - last.x
	}
	return out
}

// height is the room the line takes with a leading for its text.
func (l line) height(st Style) float64 {
	lead := st.Leading()
	return lead + max(0, l.up-0.78*lead) + max(0, l.down-0.30*lead)
}

// baseline is the distance from the top of the line to its baseline.
func (l line) baseline(st Style) float64 {
	lead := st.Leading()
	return 0.76*lead + max(0, l.up-0.78*lead)
}

func (d *Doc) drawLine(l line, x, y float64, st Style) {
	for _, p := range l.pieces {
		if p.run.Inline != nil {
			p.run.Inline.Draw(d, x+p.x, y, st.Size)
			continue
		}
		d.Text(x+p.x, y, p.run.Text, st.With(p.run.Face))
		if p.run.Link != "" {
			d.LinkTo(p.run.Link, x+p.x, y-st.Em(), p.w, 1.3*st.Em())
		}
	}
}

// T is plain text as runs. The face of the style applies.
func T(s string) []Run { return []Run{{Text: s}} }

// Para sets runs in the column from x, w wide, at the cursor, and goes on on
// the next page where needed. At least two lines stay together.
func (d *Doc) Para(runs []Run, st Style, x, w float64) {
	if st.Face != Regular {
		runs = inFace(runs, st.Face)
	}
	lines := d.setRuns(runs, st, w)
	for i, l := range lines {
		need := l.height(st)
		if i == 0 || i == len(lines)-2 {
			need += min(float64(len(lines)-1-i), 1) * st.Leading()
		}
		d.Need(need)
		d.drawLine(l, x, d.Y+l.baseline(st), st)
		d.Y += l.height(st)
	}
}

// ParaHeight is the height Para would take.
func (d *Doc) ParaHeight(runs []Run, st Style, w float64) float64 {
	if st.Face != Regular {
		runs = inFace(runs, st.Face)
	}
	h := 0.0
	for _, l := range d.setRuns(runs, st, w) {
		h += l.height(st)
	}
	return h
}

func inFace(runs []Run, f Face) []Run {
	out := make([]Run, len(runs))
	for i, r := range runs {
		if r.Face == Regular {
			r.Face = f
		}
		out[i] = r
	}
	return out
}

// Clip breaks text into at most n lines of width w; the last ends with an
// ellipsis when there is more.
func (d *Doc) Clip(s string, st Style, w float64, n int) []string {
	var out []string
	lines := d.setRuns(inFace(T(s), st.Face), st, w)
	for i := 0; i < min(n, len(lines)); i++ {
		text := lines[i].text()
		if i == n-1 && len(lines) > n {
			text = d.Fit(text+" "+lines[n].text(), st, w)
		}
		out = append(out, text)
	}
	return out
}

func (l line) text() string {
	var words []string
	for _, p := range l.pieces {
		words = append(words, p.run.Text)
	}
	return strings.Join(words, " ")
}
