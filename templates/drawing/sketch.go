package drawing

import "math"

// Line widths and lengths in mm. ISO 128-2: wide to narrow at least 2:1; ISO
// 129-1: filled arrow heads of 15°, ten narrow lines long.
const (
	wide         = 0.5
	narrow       = 0.25
	arrowLength  = 2.5
	arrowHalf    = 0.329 // 2.5 mm × tan 7.5°
	firstDim     = 10.0  // outline to dimension line
	pastDim      = 2.0   // extension line beyond the dimension line
	overLine     = 0.9   // text above its line
	viewGap      = 7.0   // between neighbouring views
	hatchSpacing = 2.0
)

// chain is the long-dashed dotted narrow line of centre lines (ISO 128-2).
var chain = []float64{6, 0.75, 0.25, 0.75}

// sketch is a drawing in the making, in mm on the paper at its scale but not
// yet placed on the sheet. Next to the items it remembers what later labels
// have to keep clear of.
type sketch struct {
	items []Item
	texts []rect    // nothing may touch these
	views []rect    // labels stay out of these unless they belong there
	thin  []segment // labels stay off these
	tags  []tag
	box   rect // everything so far
	note  string
	empty bool

	sheetW, sheetH float64 // room on the sheet, for the labels
}

func newSketch() *sketch { return &sketch{empty: true} }

// reach extends the box of the drawing.
func (k *sketch) reach(r rect) {
	if k.empty {
		k.box, k.empty = r, false
		return
	}
	k.box = k.box.union(r)
}

func (k *sketch) line(a, b point, width float64, c Color, dash []float64) {
	k.items = append(k.items, Line{X1: a.x, Y1: a.y, X2: b.x, Y2: b.y, Width: width, Dash: dash, Color: c})
	k.reach(segment{a, b}.bounds().grown(width / 2))
}

// thinLine is a narrow line that labels keep off.
func (k *sketch) thinLine(a, b point, dash []float64) {
	k.line(a, b, narrow, black, dash)
	k.thin = append(k.thin, segment{a, b})
}

func (k *sketch) area(poly []point, fill *Color, width float64) {
	a := Area{Fill: fill, Width: width}
	for _, p := range poly {
		a.X, a.Y = append(a.X, p.x), append(a.Y, p.y)
	}
	k.items = append(k.items, a)
	k.reach(boundsOf(poly).grown(width / 2))
}

// text writes one line and keeps its place free.
func (k *sketch) text(at point, anchor Anchor, turn float64, s string, c Color) {
	l := Label{X: at.x, Y: at.y, Size: textSize, Anchor: anchor, Text: s, Turn: turn, Color: c}
	k.items = append(k.items, l)
	k.texts = append(k.texts, labelBox(l))
	k.reach(labelBox(l))
}

// labelBox is the room a label takes, from the highest to the lowest letter.
func labelBox(l Label) rect {
	w := TextWidth(l.Text, l.Size)
	start := map[Anchor]float64{Left: 0, Centre: -w / 2, Right: -w}[l.Anchor]
	up, down := ascent/textSize*l.Size, descent/textSize*l.Size
	if l.Turn == 90 {
		return rect{l.X - up, l.Y - start - w, l.X + down, l.Y - start}
	}
	return rect{l.X + start, l.Y - up, l.X + start + w, l.Y + down}
}

// arrow is a filled head with its tip at a point, flying along (dx, dy).
func (k *sketch) arrow(tip point, dx, dy float64) { k.head(tip, dx, dy, arrowLength, arrowHalf, black) }

// head is a filled triangle of the given length and half width.
func (k *sketch) head(tip point, dx, dy, length, half float64, c Color) {
	l := math.Hypot(dx, dy)
	dx, dy = dx/l, dy/l
	base := tip.add(-length*dx, -length*dy)
	k.area([]point{tip, base.add(-half*dy, half*dx), base.add(half*dy, -half*dx)}, &c, 0)
}

// across dimensions the distance from x1 to x2 below an outline at y,
// the value above the line. Where the value does not fit
// between the arrows they come from outside and the value stands beside, on
// the left if asked.
func (k *sketch) across(x1, x2, y float64, value string, left bool) {
	at := y + firstDim
	for _, x := range []float64{x1, x2} {
		k.thinLine(point{x, y + 1}, point{x, at + pastDim}, nil)
	}
	k.dimension(point{x1, at}, point{x2, at}, value, left)
}

// upright dimensions the distance from y1 to y2 left of an outline at x; the
// value reads from the right. Where it does not fit it stands above, or below
// if asked.
func (k *sketch) upright(y1, y2, x float64, value string, under bool) {
	at := x - firstDim
	for _, y := range []float64{y1, y2} {
		k.thinLine(point{x - 1, y}, point{at - pastDim, y}, nil)
	}
	k.dimension(point{at, y2}, point{at, y1}, value, under)
}

// dimension draws the line from a to b, which is rightwards or upwards, with
// arrows and value.
func (k *sketch) dimension(a, b point, value string, before bool) {
	s := segment{a, b}
	l, w := s.length(), TextWidth(value, textSize)
	if l == 0 {
		return
	}
	ux, uy := (b.x-a.x)/l, (b.y-a.y)/l
	turn := 0.0
	if uy < 0 {
		turn = 90
	}
	write := func(from float64) { // the text starts this far after a
		at := a.add(ux*from+uy*overLine, uy*from-math.Abs(ux)*overLine)
		k.text(at, Left, turn, value, black)
	}
	if l >= w+2*arrowLength+1.5 {
		k.thinLine(a, b, nil)
		k.arrow(a, -ux, -uy)
		k.arrow(b, ux, uy)
		write((l - w) / 2)
		return
	}
	tail, text := arrowLength+2, arrowLength+w+2
	start, end := -tail, l+text
	if before {
		start, end = -text, l+tail
	}
	k.thinLine(a.add(ux*start, uy*start), a.add(ux*end, uy*end), nil)
	k.arrow(a, ux, uy)
	k.arrow(b, -ux, -uy)
	if before {
		write(start)
	} else {
		write(end - w)
	}
}

// centreLine is a chain line that passes both ends of a view by 3 mm; within
// the view it takes the ink that shows on the fill.
func (k *sketch) centreLine(a, b point, poly []point, fill *Color) {
	s := segment{a, b}
	past := 3 / s.length()
	a, b = s.at(-past), s.at(1+past)
	k.thin = append(k.thin, segment{a, b})
	k.inkLine(segment{a, b}, poly, fill, narrow, chain)
}

// inkLine draws a line black outside a filled shape and in the contrasting
// ink inside it.
func (k *sketch) inkLine(s segment, poly []point, fill *Color, width float64, dash []float64) {
	in, ok := s.within(poly)
	if !ok || inkOn(fill) == black {
		k.line(s.a, s.b, width, black, dash)
		return
	}
	for _, part := range []segment{{s.a, in.a}, {in.b, s.b}} {
		if part.length() > 1e-6 {
			k.line(part.a, part.b, width, black, dash)
		}
	}
	k.line(in.a, in.b, width, inkOn(fill), dash)
}

// hatch fills a convex shape with 45° narrow lines.
func (k *sketch) hatch(poly []point) {
	for _, s := range hatchLines(boundsOf(poly), hatchSpacing, false) {
		if in, ok := s.within(poly); ok {
			k.line(in.a, in.b, narrow, black, nil)
		}
	}
}

// hatchRing fills the ring between two radii; the direction turns over from
// one material to the next.
func (k *sketch) hatchRing(c point, inner, outer float64, back bool) {
	poly := circle(c, outer)
	for _, s := range hatchLines(boundsOf(poly), hatchSpacing, back) {
		in, ok := s.within(poly)
		if !ok {
			continue
		}
		for _, part := range outsideCircle(in, c, inner) {
			k.line(part.a, part.b, narrow, black, nil)
		}
	}
}

// moved shifts everything that was drawn.
func moved(items []Item, dx, dy float64) []Item {
	out := make([]Item, 0, len(items))
	for _, it := range items {
		switch v := it.(type) {
		case Line:
			v.X1, v.X2, v.Y1, v.Y2 = v.X1+dx, v.X2+dx, v.Y1+dy, v.Y2+dy
			out = append(out, v)
		case Label:
			v.X, v.Y = v.X+dx, v.Y+dy
			out = append(out, v)
		case Area:
			xs, ys := make([]float64, len(v.X)), make([]float64, len(v.Y))
			for i := range v.X {
				xs[i], ys[i] = v.X[i]+dx, v.Y[i]+dy
			}
			v.X, v.Y = xs, ys
			out = append(out, v)
		}
	}
	return out
}
