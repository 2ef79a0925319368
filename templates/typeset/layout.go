package typeset

import (
	"math"

	"stillair/templates/pdf"
)

// box is a laid out part: its size and what to draw, relative to the left end
// of its baseline, y up. All in em of the formula's size.
type box struct {
	w, up, down float64
	glyphs      []glyphs
	strokes     []stroke
}

// glyphs is text at a place and a relative size.
type glyphs struct {
	x, y, size float64
	text       string
	face       pdf.Face
}

// stroke is an open line through points.
type stroke struct {
	x, y  []float64
	width float64
}

// Relative sizes and clearances, in em of the surrounding text.
const (
	scriptScale  = 0.72
	smallest     = 0.52 // of the formula's size: nothing gets smaller
	nestedScale  = 0.86 // of a fraction inside a fraction
	axis         = 0.31 // height of fraction bars and of the middle of fences
	barWidth     = 0.055
	fractionGap  = 0.17
	tallFence    = 1.15 // taller bodies get drawn fences instead of glyphs
	scriptGapSub = 0.18
)

// put adds b with its origin at x, y.
func (a *box) put(b box, x, y float64) {
	for _, g := range b.glyphs {
		g.x += x
		g.y += y
		a.glyphs = append(a.glyphs, g)
	}
	for _, s := range b.strokes {
		a.strokes = append(a.strokes, stroke{moved(s.x, x), moved(s.y, y), s.width})
	}
	a.up, a.down = max(a.up, b.up+y), max(a.down, b.down-y)
}

func moved(v []float64, by float64) []float64 {
	out := make([]float64, len(v))
	for i := range v {
		out[i] = v[i] + by
	}
	return out
}

// style is the size of the part and whether it is a script.
type style struct {
	size   float64
	script bool
	inFrac bool
}

func (s style) scripted() style {
	s.size = max(s.size*scriptScale, smallest)
	s.script = true
	return s
}

func (s style) fraction() style {
	if s.inFrac || s.script {
		s.size = max(s.size*nestedScale, smallest)
	}
	s.inFrac = true
	return s
}

func (s style) layout(n node) box {
	switch n := n.(type) {
	case row:
		return s.row(n)
	case symbol:
		return s.symbol(n)
	case fraction:
		return s.frac(n)
	case scripts:
		return s.scripts(n)
	case root:
		return s.root(n)
	case fence:
		return s.fence(n)
	case accent:
		return s.accent(n)
	case gap:
		return box{w: float64(n) * s.size}
	}
	return box{}
}

func (s style) row(r row) box {
	var b box
	prev := opening
	for i, n := range r {
		c := s.classAt(r, i, prev)
		x := b.w
		if i > 0 {
			x += (spacing(prev, c, s.script) + product(r[i-1], n)) * s.size
		}
		nb := s.layout(n)
		b.put(nb, x, 0)
		b.w = x + nb.w
		if _, ok := n.(gap); !ok {
			prev = c
		}
	}
	return b
}

// classAt is the class of a node, where a sign in front is no operation.
func (s style) classAt(r row, i int, prev class) class {
	c := classOf(r[i])
	if c == binary && (prev == opening || prev == relation || prev == binary || prev == punctuation || i == len(r)-1) {
		return ordinary
	}
	return c
}

func classOf(n node) class {
	switch n := n.(type) {
	case symbol:
		return n.class
	case scripts:
		if c := classOf(n.base); c == function || c == closing {
			return c
		}
	}
	return ordinary
}

// spacing between two classes, in em.
func spacing(a, b class, script bool) float64 {
	k := 1.0
	if script {
		k = 0.35
	}
	switch {
	case a == relation || b == relation:
		return 0.30 * k
	case a == binary || b == binary:
		return 0.22 * k
	case a == punctuation:
		return 0.20
	case a == function && b != opening, b == function && a != opening:
		return 0.17
	}
	return 0
}

// product is the room between factors that stand side by side, em.
func product(a, b node) float64 {
	if !isFactor(a) {
		return 0
	}
	switch b := b.(type) {
	case symbol:
		if b.italic {
			return 0.12
		}
	case scripts:
		return product(a, b.base)
	case row, fence, fraction, root, accent:
		return 0.10
	}
	return 0
}

// isFactor tells whether a node ends a factor: a number or something raised.
func isFactor(n node) bool {
	switch n := n.(type) {
	case symbol:
		return n.text != "" && n.text[0] >= '0' && n.text[0] <= '9'
	case scripts:
		return classOf(n) == ordinary
	}
	return false
}

func (s style) symbol(n symbol) box {
	face := pdf.Regular
	if n.italic {
		face = pdf.Italic
	}
	b := box{glyphs: []glyphs{{size: s.size, text: n.text, face: face}}}
	for _, r := range n.text {
		e := pdf.ExtentOf(face, r)
		b.up, b.down = max(b.up, e.Up*s.size), max(b.down, e.Down*s.size)
		b.w += e.Advance * s.size
	}
	return b
}

func (s style) frac(f fraction) box {
	in := s.fraction()
	over, under := in.layout(f.over), in.layout(f.under)
	pad := 0.08 * s.size
	b := box{w: max(over.w, under.w) + 2*pad}
	bar, gap := axis*s.size, fractionGap*s.size
	b.put(over, (b.w-over.w)/2, bar+gap+over.down)
	b.put(under, (b.w-under.w)/2, bar-gap-under.up)
	b.strokes = append(b.strokes, stroke{[]float64{pad / 3, b.w - pad/3}, []float64{bar, bar}, barWidth * s.size})
	out := box{w: b.w + 2*pad}
	out.put(b, pad, 0)
	return out
}

func (s style) scripts(n scripts) box {
	base := s.layout(n.base)
	in := s.scripted()
	out := box{w: base.w}
	out.put(base, 0, 0)
	x := base.w + 0.04*s.size
	tall := base.up > 0.9*s.size
	if n.sup != nil {
		sup := in.layout(n.sup)
		rise := max(0.38*s.size, sup.down+0.24*s.size)
		if tall {
			rise = max(rise, base.up-0.45*s.size)
		}
		out.put(sup, x+lean(n.base)*s.size, rise)
		out.w = max(out.w, x+lean(n.base)*s.size+sup.w)
	}
	if n.sub != nil {
		sub := in.layout(n.sub)
		drop := max(scriptGapSub*s.size, sub.up-0.42*s.size)
		if tall {
			drop = max(drop, base.down)
		}
		out.put(sub, x-lean(n.base)*s.size/2, -drop)
		out.w = max(out.w, x-lean(n.base)*s.size/2+sub.w)
	}
	return out
}

// lean is the extra room a slanted base needs before a superscript, em.
func lean(n node) float64 {
	if s, ok := n.(symbol); ok && s.italic {
		return 0.04
	}
	return 0
}

func (s style) root(n root) box {
	body := s.layout(n.body)
	line := barWidth * s.size
	top := max(body.up, 0.7*s.size) + 0.12*s.size
	h := top + body.down
	x0 := 0.0
	out := box{}
	if n.degree != nil {
		deg := s.scripted().scripted().layout(n.degree)
		out.put(deg, 0, -body.down+0.5*h)
		x0 = max(0, deg.w-0.2*s.size)
	}
	hook := 0.5*s.size + 0.05*h
	out.put(body, x0+hook+0.08*s.size, 0)
	out.w = x0 + hook + body.w + 0.16*s.size
	out.strokes = append(out.strokes, stroke{
		[]float64{x0, x0 + 0.14*s.size, x0 + 0.30*s.size, x0 + hook, out.w},
		[]float64{-body.down + 0.40*h, -body.down + 0.47*h, -body.down, top, top}, line})
	out.up = max(out.up, top+line)
	return out
}

func (s style) accent(n accent) box {
	body := s.layout(n.body)
	out := box{w: body.w}
	out.put(body, 0, 0)
	y := body.up + 0.14*s.size
	if n.mark == "dot" {
		r := 0.03 * s.size
		out.strokes = append(out.strokes, stroke{[]float64{body.w/2 - r, body.w/2 + r}, []float64{y, y}, 0.09 * s.size})
	} else {
		out.strokes = append(out.strokes, stroke{[]float64{0.05 * s.size, body.w}, []float64{y, y}, barWidth * s.size})
	}
	out.up = y + 0.08*s.size
	return out
}

func (s style) fence(n fence) box {
	body := s.row(n.body)
	half := max(body.up-axis*s.size, body.down+axis*s.size) + 0.06*s.size
	left, right := s.delimiter(n.left, half), s.delimiter(n.right, half)
	var out box
	out.put(left, 0, 0)
	out.put(body, left.w, 0)
	out.put(right, left.w+body.w, 0)
	out.w = left.w + body.w + right.w
	return out
}

// delimiter draws one fence reaching half above and below the axis.
func (s style) delimiter(d string, half float64) box {
	if d == "" {
		return box{}
	}
	if 2*half <= tallFence*s.size {
		return s.symbol(symbol{text: d})
	}
	w := min(0.34+0.03*half/s.size, 0.5) * s.size
	mid := axis * s.size
	x, y := outline(d, w, half)
	b := box{w: w + 0.06*s.size, up: mid + half, down: half - mid}
	b.strokes = []stroke{{moved(x, 0.03*s.size), moved(y, mid), 0.065 * s.size}}
	return b
}

// outline is the centre line of a fence w wide and 2·half high.
func outline(d string, w, half float64) (x, y []float64) {
	a, b := 0.25*w, 0.85*w // the upright and the ends of a left fence
	switch d {
	case "[", "]":
		x, y = []float64{b, a, a, b}, []float64{half, half, -half, -half}
	case "|":
		x, y = []float64{w / 2, w / 2}, []float64{half, -half}
	case "{", "}":
		x, y = brace(a, b, half)
	default:
		const n = 24
		for i := 0; i <= n; i++ {
			t := math.Pi / 2 * (2*float64(i)/n - 1)
			x = append(x, b-(b-a)*math.Cos(t))
			y = append(y, -half*math.Sin(t))
		}
	}
	if d == "]" || d == ")" || d == "}" {
		for i := range x {
			x[i] = w - x[i]
		}
	}
	return x, y
}

func brace(a, b, half float64) (x, y []float64) {
	m := (a + b) / 2
	r := min(m-a+0.12, half/2)
	arc := func(cx, cy, rx, ry, from, to float64) {
		const n = 8
		for i := 0; i <= n; i++ {
			t := (from + (to-from)*float64(i)/n) * math.Pi / 180
			x = append(x, cx+rx*math.Cos(t))
			y = append(y, cy+ry*math.Sin(t))
		}
	}
	arc(b, half-r, b-m, r, 90, 180)
	arc(a, r, m-a, r, 0, -90)
	arc(a, -r, m-a, r, 90, 0)
	arc(b, -half+r, b-m, r, 180, 270)
	return x, y
}
