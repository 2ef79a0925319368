package typeset

import "stillair/templates/pdf"

const pointMM = 25.4 / 72

// Extent is the size of the formula in mm at a font size in points.
func (f *Formula) Extent(_ *pdf.Doc, size float64) (width, up, down float64) {
	b := style{size: 1}.layout(f.root)
	em := size * pointMM
	return b.w * em, b.up * em, b.down * em
}

// Draw draws the formula with its baseline starting at x, y.
func (f *Formula) Draw(d *pdf.Doc, x, y, size float64) {
	style{size: 1}.layout(f.root).draw(d, x, y, size)
}

func (b box) draw(d *pdf.Doc, x, y, size float64) {
	em := size * pointMM
	for _, g := range b.glyphs {
		d.Text(x+g.x*em, y-g.y*em, g.text, pdf.Style{Face: g.face, Size: g.size * size})
	}
	for _, s := range b.strokes {
		px, py := make([]float64, len(s.x)), make([]float64, len(s.y))
		for i := range s.x {
			px[i], py[i] = x+s.x[i]*em, y-s.y[i]*em
		}
		d.Path(px, py, s.width*em, pdf.Black)
	}
}

// Display sets the formula as a block from x, w wide, at the cursor, broken
// at top-level relations, or at sums and products where that is not enough.
// A formula that still does not fit is set smaller, never cut.
func (f *Formula) Display(d *pdf.Doc, x, w, size float64) {
	for _, l := range f.lines(w / (size * pointMM)) {
		pt := size
		if room := w - l.indent*size*pointMM; l.box.w*size*pointMM > room {
			pt = size * room / (l.box.w * size * pointMM)
		}
		em := pt * pointMM
		h := max(l.box.up*em, 0.75*em) + max(l.box.down*em, 0.25*em) + 0.55*em
		d.Need(h)
		l.box.draw(d, x+l.indent*size*pointMM, d.Y+max(l.box.up*em, 0.75*em)+0.2*em, pt)
		d.Y += h
	}
}

// Height is what Display will need, in mm.
func (f *Formula) Height(w, size float64) float64 {
	em := size * pointMM
	h := 0.0
	for _, l := range f.lines(w / em) {
		h += max(l.box.up, 0.75)*em + max(l.box.down, 0.25)*em + 0.55*em
	}
	return h
}

// brokenLine is one line of a display, indented by indent em.
type brokenLine struct {
	box    box
	indent float64
}

// lines breaks the formula for a width in em.
func (f *Formula) lines(w float64) []brokenLine {
	s := style{size: 1}
	whole := s.layout(f.root)
	if whole.w <= w {
		return []brokenLine{{box: whole}}
	}
	parts := splitAt(f.root, func(n node) bool { return classOf(n) == relation })
	indent := 0.0
	if len(parts) > 1 {
		indent = min(s.row(parts[0]).w+0.3, w/4)
	}
	var out []brokenLine
	for i, part := range join(parts, w, indent) {
		in := indent
		if i == 0 {
			in = 0
		}
		for j, sub := range breakSum(part, w-in-1) {
			extra := 0.0
			if j > 0 {
				in, extra = indent, 1.2
			}
			out = append(out, brokenLine{s.row(sub), in + extra})
		}
	}
	return out
}

// join fills lines with relations; the left side stays with the first one.
func join(parts []row, w, indent float64) []row {
	if len(parts) < 2 {
		return parts
	}
	s := style{size: 1}
	out := []row{append(append(row{}, parts[0]...), parts[1]...)}
	for _, p := range parts[2:] {
		last := len(out) - 1
		room := w
		if last > 0 {
			room -= indent
		}
		if both := append(append(row{}, out[last]...), p...); s.row(both).w <= room {
			out[last] = both
			continue
		}
		out = append(out, p)
	}
	return out
}

// breakSum breaks a part that is too wide at sums, else at products.
func breakSum(r row, w float64) []row {
	s := style{size: 1}
	if s.row(r).w <= w {
		return []row{r}
	}
	var out []row
	var cur row
	for _, term := range splitAt(r, func(n node) bool { return classOf(n) == binary }) {
		if len(cur) > 0 && s.row(append(append(row{}, cur...), term...)).w > w {
			out = append(out, cur)
			cur = nil
		}
		cur = append(cur, term...)
	}
	return append(out, cur)
}

// splitAt cuts a row before the nodes that match, outside of brackets.
func splitAt(r row, match func(node) bool) []row {
	var out []row
	depth, from := 0, 0
	for i, n := range r {
		switch classOf(n) {
		case opening:
			depth++
		case closing:
			depth--
		}
		if i > from && depth == 0 && match(n) {
			out = append(out, r[from:i])
			from = i
		}
	}
	return append(out, r[from:])
}
