package drawing

import (
	"math"
	"strconv"
)

// Slenderness from which a long body is drawn broken, and as how long.
const (
	breakFrom = 6.0
	drawnAs   = 4.5
	breakGap  = 2.5 // mm between both pieces
)

// axial draws along the axis of a body: u runs along the axis from the first
// end (left or top), v across it.
type axial struct {
	lying bool
}

func (a axial) at(u, v float64) point {
	if a.lying {
		return point{u, v}
	}
	return point{v, u}
}

func (a axial) polygon(uv ...[2]float64) []point {
	var pts []point
	for _, p := range uv {
		pts = append(pts, a.at(p[0], p[1]))
	}
	return pts
}

// side says where the views along the axis stand.
type side int

const (
	along   side = iota // at the ends of the elevation
	rightOf             // in a row right of it
	below               // in a row below it
)

// round draws cylinder, pipe and vessel: the elevation, flat ends square on,
// and a section where there is a wall or a layer.
func (d *draft) round(s float64, where side) *sketch {
	k := newSketch()
	faces := d.faces()
	a := axial{lying: d.body.Axis == "horizontal" || (d.body.Kind == "pipe" && d.body.Axis != "vertical")}
	r := (d.body.Diameter.SI/2 + d.added()) * s
	long := d.body.Length.SI * s
	broken := long > breakFrom*2*r
	if broken {
		long = drawnAs * 2 * r
		k.note = "long view broken"
	}
	d.shell(k, a, faces[0], r, long, broken)
	dished := d.body.Kind == "vessel" && d.body.Heads != "flat"
	head := 0.0
	if dished {
		head = r / 2
		k.note = joinNotes(k.note, "heads drawn as 2:1 ellipses")
		d.dish(k, a, faces[1], r, 0, -1)
		d.dish(k, a, faces[2], r, long, 1)
	}
	view := boundsOf(a.polygon([2]float64{-head, -r}, [2]float64{long + head, r}))
	k.views = append(k.views, view)
	k.centreLine(a.at(-head, 0), a.at(long+head, 0), view.corners(), d.fill(faces[0]))
	if a.lying {
		crowded := where == along && len(faces) == 3 && !dished && !d.cut() // the diameter is on the left
		k.across(0, long, r, d.length(d.body.Length.SI), !crowded)
	} else {
		k.upright(0, long, -r, d.length(d.body.Length.SI), false)
	}
	d.roundViews(k, a, r, s, long, where, len(faces) == 3 && !dished)
	return k
}

func joinNotes(a, b string) string {
	if a == "" {
		return b
	}
	return a + ", " + b
}

// cut tells whether a section has something to show.
func (d *draft) cut() bool { return d.wall() > 0 || d.added() > 0 }

// roundViews adds the views along the axis and the diameter.
func (d *draft) roundViews(k *sketch, a axial, r, s, long float64, where side, ends bool) {
	faces := d.faces()
	cut := d.cut()
	var sized *point // the view that carries the diameter
	pitch := 2*r + viewGap + 3
	next := point{view0(k).x1 + viewGap + 3 + math.Max(r, 9), view0(k).centre().y}
	if where == below {
		next = point{view0(k).x0 + r + firstDim, k.box.y1 + viewGap + r}
	}
	if ends {
		for i, sign := range []float64{-1, 1} {
			c := a.at(long/2+sign*(long/2+r+viewGap), 0)
			if where != along {
				c = next
				next = next.add(pitch, 0)
			}
			d.discFace(k, faces[i+1], c, r)
			if (a.lying && where == along) == (i == 0) {
				sized = &c
			}
		}
		if a.lying && where == along {
			next.x += 2*r + viewGap
		}
	}
	if cut {
		d.section(k, next, s)
		sized = &next
	}
	first := a.lying && where == along && ends && !cut
	d.diameter(k, a, sized, r, first)
}

// view0 is the elevation.
func view0(k *sketch) rect { return k.views[0] }

// diameter dimensions the outside below a view along the axis, or on the
// elevation when there is none. A value that does not fit stands on the right,
// or on the left.
func (d *draft) diameter(k *sketch, a axial, at *point, r float64, left bool) {
	value := "Ø" + d.length(d.body.Diameter.SI+2*d.added())
	if d.added() > 0 {
		value = "(" + value + ")" // follows from bare body and layers
	}
	e := view0(k)
	switch {
	case at != nil:
		k.thinFrom(at.x-r, at.y, at.y+r)
		k.thinFrom(at.x+r, at.y, at.y+r)
		k.across(at.x-r, at.x+r, at.y+r, value, left)
	case a.lying:
		k.upright(-r, r, e.x0, value, false)
	default:
		k.across(-r, r, e.y1, value, false)
	}
}

// thinFrom draws the piece of an extension line from the widest point of a
// circle to its lowest.
func (k *sketch) thinFrom(x, y0, y1 float64) {
	k.thinLine(point{x, y0}, point{x, y1 + 1}, nil)
}

// discFace is a flat round face square on.
func (d *draft) discFace(k *sketch, name string, c point, r float64) {
	q := r * 0.66 // half the side of the room for a label
	d.face(k, name, circle(c, r), rect{c.x - q, c.y - q*0.95, c.x + q, c.y + q*0.95},
		c, c.add(0, -0.6*r), c.add(0, 0.6*r), c.add(0.6*r, 0), c.add(-0.6*r, 0))
	k.views = append(k.views, rect{c.x - r, c.y - r, c.x + r, c.y + r})
}

// shell is the curved side in elevation, in two pieces when broken.
func (d *draft) shell(k *sketch, a axial, name string, r, long float64, broken bool) {
	whole := a.polygon([2]float64{0, -r}, [2]float64{long, -r}, [2]float64{long, r}, [2]float64{0, r})
	targets := []point{a.at(long*0.3, r/2), a.at(long*0.3, -r/2), a.at(long*0.7, r/2), a.at(long*0.7, -r/2), a.at(long/2, -r/2), a.at(long/2, r/2)}
	if 2*r < 2.5 || long < 2.5 {
		targets = []point{a.at(long/2, 0), a.at(long*0.3, 0), a.at(long*0.7, 0)}
		if long < 2.5 {
			targets = append(targets, a.at(long/2, r/2), a.at(long/2, -r/2), a.at(long/2, 0.8*r), a.at(long/2, -0.8*r))
		}
	}
	if !broken {
		d.face(k, name, whole, boundsOf(whole), targets...)
		return
	}
	cut := long/2 - breakGap/2
	covered := false
	for _, side := range []float64{1, -1} { // the second piece is the first, turned about the middle
		at := func(u, v float64) point {
			if side < 0 {
				u, v = long-u, -v
			}
			return a.at(u, v)
		}
		wave := breakLine(at, cut, r)
		piece := append([]point{at(0, r), at(0, -r)}, wave...)
		covered = d.paint(k, name, piece)
		for i := range wave[1:] {
			k.line(wave[i], wave[i+1], narrow, black, nil)
		}
		k.line(at(0, -r), at(0, r), wide, black, nil)
		k.line(at(0, -r), wave[0], wide, black, nil)
		k.line(at(0, r), wave[len(wave)-1], wide, black, nil)
	}
	room := boundsOf(a.polygon([2]float64{0, -r}, [2]float64{cut - 1, r}))
	d.label(k, name, whole, room, covered, targets[:2]...)
}

// breakLine is the free-hand line of a broken view, ISO 128-3.
func breakLine(at func(u, v float64) point, u, r float64) []point {
	var pts []point
	for i := 0; i <= 16; i++ {
		t := float64(i)/8 - 1
		pts = append(pts, at(u+math.Min(1, r/4)*math.Sin(t*math.Pi), t*r))
	}
	return pts
}

// dish is a dished head at u on the axis, bulging along sign.
func (d *draft) dish(k *sketch, a axial, name string, r, u, sign float64) {
	var poly []point
	for _, p := range arc(point{}, r/2, r, -90, 90) {
		poly = append(poly, a.at(u+sign*p.x, p.y))
	}
	room := boundsOf(a.polygon([2]float64{u, -r * 0.6}, [2]float64{u + sign*r*0.38, r * 0.6}))
	d.face(k, name, poly, room, a.at(u+sign*r*0.25, r*0.3), a.at(u+sign*r*0.25, -r*0.3),
		a.at(u+sign*r*0.2, 0.6*r), a.at(u+sign*r*0.2, -0.6*r))
}

// sphere draws the ball, and beside it the section through its layers.
func (d *draft) sphere(s float64) *sketch {
	k := newSketch()
	r := (d.body.Diameter.SI/2 + d.added()) * s
	d.discFace(k, "surface", point{}, r)
	for _, v := range []point{{r, 0}, {0, r}} {
		k.centreLine(point{-v.x, -v.y}, v, circle(point{}, r), d.fill("surface"))
	}
	at := point{}
	if d.cut() {
		at.x = r + 2*viewGap + math.Max(r, 9)
		d.section(k, at, s)
	}
	d.diameter(k, axial{}, &at, r, false)
	return k
}

// section draws the cut across the axis: bare body, wall and layers.
func (d *draft) section(k *sketch, c point, s float64) {
	bare := d.body.Diameter.SI / 2 * s
	outer := bare + d.added()*s
	view := rect{c.x - outer, c.y - outer, c.x + outer, c.y + outer}
	k.area(circle(c, outer), &white, 0)
	rings := d.rings(bare, s)
	for i := len(rings) - 1; i >= 0; i-- {
		d.ring(k, c, rings[i], i)
	}
	if len(rings) == 0 || !rings[0].wall {
		k.area(circle(c, bare), &white, wide)
	}
	for _, v := range []point{{outer, 0}, {0, outer}} {
		k.centreLine(c.add(-v.x, -v.y), c.add(v.x, v.y), nil, nil)
	}
	k.text(c.add(0, -outer-4.2), Centre, 0, "section", black)
	d.ringTags(k, c, rings, bare)
	k.views = append(k.views, view)
}

// ring is one material between two radii on the paper.
type ring struct {
	inner, outer float64
	name, thick  string
	wall         bool
}

// rings lists wall and layers from the inside out.
func (d *draft) rings(bare, s float64) []ring {
	var list []ring
	if t := d.wall(); t > 0 {
		name := d.body.Wall.Material
		if name == "" {
			name = "wall"
		}
		list = append(list, ring{math.Max(0, bare-t*s), bare, name, "wall " + d.length(t) + " thick", true})
	}
	at := bare
	for i, l := range d.body.Layers {
		t := math.Max(0, l.Thickness.SI)
		name := l.Material
		if name == "" {
			name = "layer " + strconv.Itoa(i+1)
		}
		list = append(list, ring{at, at + t*s, name, d.length(t) + " thick", false})
		at += t * s
	}
	return list
}

// ring draws one ring: hatched, or filled where it is too thin for that (ISO
// 128-3 allows thin sections to be filled).
func (d *draft) ring(k *sketch, c point, g ring, i int) {
	t := g.outer - g.inner
	line := wide
	if t < 1 {
		line = narrow
	}
	if t < 1 && t > 0.1 {
		k.area(circle(c, g.outer), &black, line)
		if g.inner > 0 {
			k.area(circle(c, g.inner), &white, line)
		}
		return
	}
	k.area(circle(c, g.outer), &white, line)
	if t >= 1 {
		k.hatchRing(c, g.inner, g.outer, i%2 == 1)
	}
	if g.inner > 0 {
		k.area(circle(c, g.inner), &white, line)
	}
}

// maxRingTags is the number of materials named one by one.
const maxRingTags = 4

// ringTags names the materials, and the bare body within its layers.
func (d *draft) ringTags(k *sketch, c point, rings []ring, bare float64) {
	around := func(r float64) []point {
		var pts []point
		for _, deg := range []float64{-35, -60, 35, 60, -145, -120, 145, 120} {
			sin, cos := math.Sincos(deg * math.Pi / 180)
			pts = append(pts, c.add(r*cos, r*sin))
		}
		return pts
	}
	add := func(r float64, thin bool, lines ...string) {
		k.tags = append(k.tags, tag{lines: lines, sun: -1, targets: around(r), poly: circle(c, r), view: len(k.views), thin: thin})
	}
	if d.added() > 0 {
		add(bare, true, "bare Ø"+d.length(d.body.Diameter.SI))
	}
	for i, g := range rings {
		if i == maxRingTags-1 && len(rings) > maxRingTags {
			rest := strconv.Itoa(len(rings) - i)
			add((g.outer+rings[len(rings)-1].outer)/2, true, rest+" more layers")
			return
		}
		t := g.outer - g.inner
		add((g.inner+g.outer)/2, t < 2.5, append(wrap(g.name, textSize, 40), g.thick)...)
	}
}
