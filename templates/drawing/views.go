package drawing

import (
	"math"

	"stillair/checks/casefile"
	"stillair/checks/unit"
)

// view builds a sketch at a scale in mm of paper per metre.
type view func(s float64) *sketch

// variants are the arrangements of views that suit the body, the better ones
// first; false when a dimension is missing.
func (d *draft) variants() ([]view, bool) {
	b := d.body
	switch b.Kind {
	case "box":
		return []view{d.box, d.boxInRows}, positive(b.Width, b.Height, b.Depth)
	case "plate":
		return []view{
			func(s float64) *sketch { return d.plate(s, false) },
			func(s float64) *sketch { return d.plate(s, true) },
		}, positive(b.Width, b.Height)
	case "cylinder", "pipe", "vessel":
		return []view{
			func(s float64) *sketch { return d.round(s, along) },
			func(s float64) *sketch { return d.round(s, rightOf) },
			func(s float64) *sketch { return d.round(s, below) },
		}, positive(b.Diameter, b.Length)
	case "sphere":
		return []view{d.sphere}, positive(b.Diameter)
	}
	return nil, false
}

func positive(list ...casefile.Quantity) bool {
	for _, q := range list {
		if !(q.SI > 0) || math.IsInf(q.SI, 0) {
			return false
		}
	}
	return true
}

// largest is the largest dimension of the body in m that is never broken,
// without its layers.
func (d *draft) largest() float64 {
	b := d.body
	switch b.Kind {
	case "box":
		return max(b.Width.SI, b.Height.SI, b.Depth.SI)
	case "plate":
		return max(b.Width.SI, b.Height.SI)
	}
	return b.Diameter.SI
}

// added is the thickness of the layers on the outside of the bare body, m.
func (d *draft) added() float64 {
	t := 0.0
	for _, l := range d.body.Layers {
		t += math.Max(0, l.Thickness.SI)
	}
	return t
}

// wall is the thickness of the wall within the bare body, m.
func (d *draft) wall() float64 {
	if d.body.Wall == nil {
		return 0
	}
	return math.Max(0, d.body.Wall.Thickness.SI)
}

func (d *draft) length(si float64) string { return lengthText(d.sys, si) }

// boxSize is the outside of the box with its layers, m.
func (d *draft) boxSize() (width, height, depth float64) {
	grow := 2 * d.added()
	return d.body.Width.SI + grow, d.body.Height.SI + grow, d.body.Depth.SI + grow
}

// box draws the six faces, unfolded round the front: left of it the left
// face, above it the top, and so on, each as seen from outside.
func (d *draft) box(s float64) *sketch {
	k := newSketch()
	width, height, depth := d.boxSize()
	x, y := d.boxRow(k, s, depth*s+viewGap)
	w, h, dp := width*s, height*s, depth*s
	d.rectFace(k, "top", rect{x[1], 0, x[1] + w, dp})
	d.rectFace(k, "bottom", rect{x[1], y + h + viewGap, x[1] + w, y + h + viewGap + dp})
	k.across(x[3], x[3]+w, y+h, d.length(width), false)
	k.across(x[0], x[0]+dp, y+h, d.length(depth), true)
	d.boxNote(k, "faces unfolded round the front")
	return k
}

// boxInRows draws the upright faces in one row, top and bottom in a second,
// for boxes too deep to unfold.
func (d *draft) boxInRows(s float64) *sketch {
	k := newSketch()
	width, height, depth := d.boxSize()
	x, y := d.boxRow(k, s, 0)
	w, dp := width*s, depth*s
	y += height*s + viewGap
	top := rect{x[1], y, x[1] + w, y + dp}
	d.rectFace(k, "top", top)
	d.rectFace(k, "bottom", top.moved(w+viewGap, 0))
	k.across(x[1], x[1]+w, y+dp, d.length(width), false)
	k.upright(y, y+dp, x[1], d.length(depth), true)
	d.boxNote(k, "each face seen square on")
	return k
}

// boxRow draws left, front, right and back side by side at y, with the height.
func (d *draft) boxRow(k *sketch, s, y float64) (x [4]float64, top float64) {
	width, height, depth := d.boxSize()
	w, h, dp := width*s, height*s, depth*s
	x = [4]float64{0, dp + viewGap, dp + w + 2*viewGap, 2*dp + w + 3*viewGap}
	for i, name := range []string{"left", "front", "right", "back"} {
		d.rectFace(k, name, rect{x[i], y, x[i] + [4]float64{dp, w, dp, w}[i], y + h})
	}
	k.upright(y, y+h, x[0], d.length(height), false)
	return x, y
}

func (d *draft) boxNote(k *sketch, views string) {
	k.note = views
	if d.added() > 0 {
		k.note = "bare box " + d.length(d.body.Width.SI) + " × " + d.length(d.body.Height.SI) +
			" × " + d.length(d.body.Depth.SI)
	}
}

// plate draws both faces square on, and the plate from its edge at its tilt.
func (d *draft) plate(s float64, stacked bool) *sketch {
	k := newSketch()
	w, h := d.body.Width.SI*s, d.body.Height.SI*s
	edge := d.plateEdge(s)
	front := rect{0, 0, w, h}
	d.rectFace(k, "front", front)
	k.upright(0, h, 0, d.length(d.body.Height.SI), false)
	k.across(0, w, h, d.length(d.body.Width.SI), true)
	c := edge.box.centre()
	if stacked {
		back := front.moved(w+viewGap, 0)
		d.rectFace(k, "back", back)
		k.add(edge, w+viewGap/2-c.x, math.Max(h+viewGap, k.box.y1+4)-edge.box.y0)
	} else {
		k.add(edge, w+viewGap-edge.box.x0, h/2-c.y)
		back := front.moved(w+2*viewGap+edge.box.w(), 0)
		d.rectFace(k, "back", back)
	}
	return k
}

// add takes over another sketch, shifted.
func (k *sketch) add(o *sketch, dx, dy float64) {
	k.items = append(k.items, moved(o.items, dx, dy)...)
	k.reach(o.box.moved(dx, dy))
	for _, r := range o.texts {
		k.texts = append(k.texts, r.moved(dx, dy))
	}
	base := len(k.views)
	for _, r := range o.views {
		k.views = append(k.views, r.moved(dx, dy))
	}
	for _, s := range o.thin {
		k.thin = append(k.thin, segment{s.a.add(dx, dy), s.b.add(dx, dy)})
	}
	for _, t := range o.tags {
		t.view += base
		t.inside = t.inside.moved(dx, dy)
		t.targets, t.poly = shift(t.targets, dx, dy), shift(t.poly, dx, dy)
		k.tags = append(k.tags, t)
	}
}

func shift(pts []point, dx, dy float64) []point {
	out := make([]point, len(pts))
	for i, p := range pts {
		out[i] = p.add(dx, dy)
	}
	return out
}

// plateEdge is the view from the side: the plate as a band at its tilt from
// the vertical, its front on the left.
func (d *draft) plateEdge(s float64) *sketch {
	k := newSketch()
	h := d.body.Height.SI * s
	sin, cos := math.Sincos(d.body.Tilt.SI)
	along, normal := point{sin, -cos}, point{-cos, -sin} // up the plate, out of its front
	at := func(u, n float64) point {                     // u along from the middle, n out of the front
		return point{u*along.x + n*normal.x, u*along.y + n*normal.y}
	}
	thick := (d.wall() + 2*d.added()) * s
	band := []point{at(-h/2, -thick/2), at(h/2, -thick/2), at(h/2, thick/2), at(-h/2, thick/2)}
	if thick > 1 {
		k.area(band, nil, wide)
		if t := d.added() * s; t > 0.7 && d.wall() > 0 {
			k.line(at(-h/2, thick/2-t), at(h/2, thick/2-t), wide, black, nil)
			k.line(at(-h/2, t-thick/2), at(h/2, t-thick/2), wide, black, nil)
		}
	} else {
		thick = 0
		k.line(at(-h/2, 0), at(h/2, 0), wide, black, nil)
	}
	k.thin = append(k.thin, segment{at(-h/2, 0), at(h/2, 0)})
	d.sideName(k, "front", at(h/4, 0), normal, thick/2)
	d.sideName(k, "back", at(h/4, 0), point{-normal.x, -normal.y}, thick/2)
	d.tiltAngle(k, at(-h/2, 0), h)
	d.plateBuildUp(k, at(h/2, 0), band)
	k.views = append(k.views, boundsOf(band).grown(0.5))
	return k
}

// sideName writes the name of a side next to the edge view, a quarter of its
// length from the upper end.
func (d *draft) sideName(k *sketch, name string, at, n point, thick float64) {
	w := TextWidth(name, textSize)
	away := thick + math.Abs(n.x)*w/2 + math.Abs(n.y)*(ascent+descent)/2 + 1.6
	k.text(at.add(n.x*away, n.y*away+(ascent-descent)/2), Centre, 0, name, black)
}

// tiltAngle shows the tilt between the vertical and the plate, with an arc
// where the plate is long enough on the paper.
func (d *draft) tiltAngle(k *sketch, foot point, h float64) {
	tilt := d.body.Tilt.SI
	degrees := tilt * 180 / math.Pi
	if math.Abs(degrees) < 0.5 {
		return
	}
	t := tag{lines: tiltWords(d.sys, tilt), sun: -1, view: len(k.views), bare: true}
	t.targets = []point{foot.add(0.4*h*math.Sin(tilt), -0.4*h*math.Cos(tilt))}
	if h > 26 {
		r := math.Min(0.45*h, 18)
		k.thinLine(foot, foot.add(0, -r-3), chain)
		pts := arc(foot, r, r, -90, -90+degrees)
		for i := range pts[1:] {
			k.thinLine(pts[i], pts[i+1], nil)
		}
		t.targets = []point{pts[len(pts)/2]}
		if math.Abs(tilt)*r > 2.5*arrowLength {
			d.arcArrows(k, foot, r, tilt)
		}
	}
	t.poly = []point{t.targets[0], t.targets[0], t.targets[0]}
	k.tags = append(k.tags, t)
}

// arcArrows puts arrow heads on both ends of the arc, along the chord of each
// head.
func (d *draft) arcArrows(k *sketch, foot point, r, tilt float64) {
	turn := math.Copysign(1, tilt)
	lean := arrowLength / 2 / r
	sin, cos := math.Sincos(tilt - turn*lean)
	k.arrow(foot.add(r*math.Sin(tilt), -r*math.Cos(tilt)), turn*cos, turn*sin)
	k.arrow(foot.add(0, -r), -turn*math.Cos(lean), -math.Sin(lean))
}

func tiltWords(sys unit.System, tilt float64) []string {
	side := "front turned up"
	if tilt < 0 {
		side = "front turned down"
	}
	return []string{"tilt " + sys.Show(unit.Angle, math.Abs(tilt), 0) + " from vertical", side}
}

// plateBuildUp names the thickness of wall and layers.
func (d *draft) plateBuildUp(k *sketch, top point, band []point) {
	var lines []string
	if d.wall() > 0 {
		lines = append(lines, "wall "+d.length(d.wall())+" thick")
	}
	if d.added() > 0 {
		lines = append(lines, "layers "+d.length(d.added())+" thick on each face")
	}
	if len(lines) == 0 {
		return
	}
	k.tags = append(k.tags, tag{lines: lines, sun: -1, targets: []point{top}, poly: band, view: len(k.views), thin: true})
}
