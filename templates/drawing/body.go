package drawing

import (
	"fmt"
	"math"
	"strings"

	"stillair/checks"
	"stillair/checks/casefile"
	"stillair/checks/unit"
)

// Room at the edge of a picture, and for the strip below it with the scale
// note and the colour scale, in mm.
const (
	margin      = 1.5
	stripHeight = 14.0
)

// Body draws the body of load case number load to the largest scale of ISO
// 5455 that leaves room for dimensions and labels in wMM by hMM millimetres.
// The smallest frame in which every body finds room is about 130 mm by 90 mm.
// Faces are filled with the colour of their temperature; covered faces are
// hatched. Without temperatures the faces stay white.
//
// Views of a box are unfolded round its front. Line widths, arrows and
// dimensions follow ISO 128-2 and ISO 129-1. A picture that cannot be drawn
// says so in words.
func Body(o *checks.Outcome, load int, wMM, hMM float64) Scene {
	if o == nil || load < 0 || load >= len(o.Loads) {
		return message(wMM, hMM, "No drawing: there is no such load case.")
	}
	d := newDraft(&o.Loads[load])
	views, ok := d.variants()
	if !ok {
		return message(wMM, hMM, "No drawing: a dimension of the body is missing.")
	}
	w, h := wMM-2*margin, hMM-2*margin-stripHeight
	for _, scale := range scales() {
		if scale*1000*d.largest() > math.Max(w, h) {
			continue
		}
		for _, view := range views {
			k := view(scale * 1000)
			if k.box.w() > w || k.box.h() > h || !k.writeTags(w, h) || k.clashes() {
				continue
			}
			return d.compose(k, scale, wMM, hMM)
		}
	}
	return message(wMM, hMM, "No drawing: the frame is too small for the labels.")
}

// message is a picture that only says why there is none.
func message(w, h float64, words string) Scene {
	words = fit(words, textSize, w-2*margin)
	return Scene{W: w, H: h, Title: words, Items: []Item{
		Label{X: w / 2, Y: h / 2, Size: textSize, Anchor: Centre, Text: words},
	}}
}

// draft holds what the views of one body share.
type draft struct {
	load   *checks.LoadOutcome
	body   *casefile.Body
	sys    unit.System
	lo, hi float64 // K, ends of the colour scale
	ticks  []float64
}

func newDraft(load *checks.LoadOutcome) *draft {
	d := &draft{load: load, body: &load.Case.Body, sys: unit.SystemOf(load.Case.Units)}
	d.span()
	return d
}

// faces lists the names of the faces of the body.
func (d *draft) faces() []string {
	lying := d.body.Axis == "horizontal"
	switch d.body.Kind {
	case "box":
		return []string{"front", "back", "left", "right", "top", "bottom"}
	case "plate":
		return []string{"front", "back"}
	case "cylinder":
		if lying {
			return []string{"side", "left end", "right end"}
		}
		return []string{"side", "top", "bottom"}
	case "pipe":
		return []string{"side"}
	case "sphere":
		return []string{"surface"}
	case "vessel":
		if lying {
			return []string{"shell", "left head", "right head"}
		}
		return []string{"shell", "top head", "bottom head"}
	}
	return nil
}

// temperature is that of an outer surface, or of whatever else has the name.
func (d *draft) temperature(at string) (float64, bool) {
	found, ok := 0.0, false
	for _, t := range d.load.Temps {
		if t.At != at || math.IsNaN(t.K) || math.IsInf(t.K, 0) {
			continue
		}
		if t.Kind == "outer surface" {
			return t.K, true
		}
		if !ok {
			found, ok = t.K, true
		}
	}
	return found, ok
}

// span sets the ends and ticks of the colour scale: whole steps of 1, 2 or 5
// times a power of ten around the temperatures of the faces and the air.
func (d *draft) span() {
	lo, hi := math.Inf(1), math.Inf(-1)
	include := func(k float64) {
		v := d.sys.Value(unit.Temperature, k)
		lo, hi = math.Min(lo, v), math.Max(hi, v)
	}
	for _, f := range d.faces() {
		if k, ok := d.temperature(f); ok {
			include(k)
		}
	}
	if lo > hi {
		return
	}
	if air := d.load.Case.Surroundings.Air.SI; air > 0 {
		include(air)
	}
	size := niceStep((hi - lo) / 5)
	first, last := math.Floor(lo/size), math.Ceil(hi/size)
	if first == last {
		last++
	}
	for i := first; i <= last; i++ {
		d.ticks = append(d.ticks, i*size)
	}
	d.lo, d.hi = first*size, last*size
}

// niceStep is the smallest of 1, 2, 5, 10, 20, 25, 50 ... that is not below x.
func niceStep(x float64) float64 {
	for p := 1.0; p < 1e6; p *= 10 {
		for _, m := range []float64{1, 2, 2.5, 5} {
			if m*p >= x && (m != 2.5 || p > 1) {
				return m * p
			}
		}
	}
	return x
}

// fill is the colour of a face, nil when it has no temperature.
func (d *draft) fill(name string) *Color {
	k, ok := d.temperature(name)
	if !ok || d.hi <= d.lo {
		return nil
	}
	c := Viridis((d.sys.Value(unit.Temperature, k) - d.lo) / (d.hi - d.lo))
	return &c
}

// words are the lines written about a face, and which of them has the sun.
func (d *draft) words(name string) (lines []string, sun int) {
	lines, sun = []string{name}, -1
	if k, ok := d.temperature(name); ok {
		lines = append(lines, temperatureText(d.sys, k))
	}
	if why, ok := d.body.Covered[name]; ok {
		if why == "" || why == "covered" {
			why = "covered"
		} else {
			why = "covered: " + why
		}
		lines = append(lines, fit(why, textSize, 38))
	}
	if q, ok := d.load.Case.Surroundings.Sun[name]; ok && q.SI > 0 {
		sun = len(lines)
		lines = append(lines, "sun "+d.sys.Show(unit.Flux, q.SI, 0))
	}
	return lines, sun
}

// face draws one face: filled, hatched when covered, outlined. Its label goes
// into room, or beside with a leader from one of the targets.
func (d *draft) face(k *sketch, name string, poly []point, room rect, targets ...point) {
	covered := d.paint(k, name, poly)
	k.area(poly, nil, wide)
	d.label(k, name, poly, room, covered, targets...)
}

// paint fills a face with its colour, or hatches it.
func (d *draft) paint(k *sketch, name string, poly []point) (covered bool) {
	_, covered = d.body.Covered[name]
	fill := d.fill(name)
	if covered {
		fill = nil
	}
	if fill != nil {
		k.area(poly, fill, 0)
	}
	if covered {
		k.hatch(poly)
	}
	return covered
}

// label asks for the words about a face.
func (d *draft) label(k *sketch, name string, poly []point, room rect, covered bool, targets ...point) {
	t := tag{inside: room, targets: targets, poly: poly, hatched: true, view: len(k.views)}
	t.lines, t.sun = d.words(name)
	if !covered {
		t.fill = d.fill(name)
	}
	b := boundsOf(poly)
	t.thin = math.Min(b.w(), b.h()) < 2.5
	k.tags = append(k.tags, t)
}

// rectFace is a rectangular face in a view of its own.
func (d *draft) rectFace(k *sketch, name string, r rect) {
	c := r.centre()
	targets := []point{c}
	for _, f := range []float64{0.2, 0.35, 0.65, 0.8} {
		if r.w() > r.h() {
			targets = append(targets, point{r.x0 + f*r.w(), c.y})
		} else {
			targets = append(targets, point{c.x, r.y0 + f*r.h()})
		}
	}
	d.face(k, name, r.corners(), r, targets...)
	k.views = append(k.views, r)
}

// compose centres the finished sketch on its sheet and adds the strip below.
func (d *draft) compose(k *sketch, scale, w, h float64) Scene {
	s := Scene{W: w, H: h}
	room := rect{margin, margin, w - margin, h - margin - stripHeight}
	c, b := room.centre(), k.box.centre()
	s.Items = moved(k.items, c.x-b.x, c.y-b.y)
	strip := newSketch()
	top := h - margin - stripHeight
	d.upArrow(strip, point{margin + 3, h - margin})
	notes := []string{
		"scale " + scaleText(scale) + ", dimensions in " + d.lengthUnit(),
		d.airNote(), k.note,
	}
	barLeft := w - margin - scaleWidth
	if len(d.ticks) == 0 {
		barLeft = w - margin
	}
	for i, n := range notes {
		n = fit(n, textSize, barLeft-margin-10-3)
		if n != "" {
			strip.text(point{margin + 10, top + 4.5 + float64(i)*linePitch}, Left, 0, n, black)
		}
	}
	d.colourScale(strip, barLeft, top)
	s.Items = append(s.Items, strip.items...)
	s.Title = d.title(notes[0])
	return s
}

// lengthUnit is the unit of all dimensions, in words that do not repeat "in".
func (d *draft) lengthUnit() string {
	if d.sys == unit.US {
		return "inches"
	}
	return d.sys.Unit(unit.Length)
}

// airNote names the temperatures that belong to no face.
func (d *draft) airNote() string {
	var parts []string
	if air := d.load.Case.Surroundings.Air.SI; air > 0 {
		parts = append(parts, "air "+temperatureText(d.sys, air))
	}
	for _, at := range []string{"inside air", "contents"} {
		if k, ok := d.temperature(at); ok {
			parts = append(parts, at+" "+temperatureText(d.sys, k))
		}
	}
	return strings.Join(parts, ", ")
}

// title is the picture in words.
func (d *draft) title(scale string) string {
	var parts []string
	for _, f := range d.faces() {
		lines, _ := d.words(f)
		parts = append(parts, strings.Join(lines, " "))
	}
	return fmt.Sprintf("Drawing of the %s, %s. Faces: %s.", d.body.Kind, scale, strings.Join(parts, "; "))
}

// upArrow shows which way is up.
func (d *draft) upArrow(k *sketch, foot point) {
	tip := foot.add(0, -stripHeight+2)
	k.line(foot.add(0, -0.5), tip.add(0, arrowLength), wide, black, nil)
	k.head(tip, 0, -1, arrowLength+1, 0.6, black)
	k.text(foot.add(1.2, -0.5), Left, 0, "up", black)
}

// scaleWidth is the length of the colour scale in mm.
const scaleWidth = 52.0

// colourScale draws the colours with their temperatures.
func (d *draft) colourScale(k *sketch, left, top float64) {
	if len(d.ticks) == 0 {
		return
	}
	const pieces = 52
	x0, x1 := left+6, left+scaleWidth-7
	y0, y1 := top+6, top+9
	k.text(point{left, top + 4.5}, Left, 0, "surface temperature, "+d.sys.Unit(unit.Temperature), black)
	for i := range pieces {
		c := Viridis((float64(i) + 0.5) / pieces)
		a := x0 + (x1-x0)*float64(i)/pieces
		k.area(rect{a, y0, x1, y1}.corners(), &c, 0) // over the one before, so that no seam shows
	}
	k.area(rect{x0, y0, x1, y1}.corners(), nil, narrow)
	for i := 0; i < len(d.ticks); i += d.tickStride(x1 - x0) {
		x := x0 + (x1-x0)*(d.ticks[i]-d.lo)/(d.hi-d.lo)
		k.line(point{x, y1}, point{x, y1 + 0.8}, narrow, black, nil)
		k.text(point{x, y1 + 4}, Centre, 0, tickText(d.ticks[i]), black)
	}
}

func tickText(v float64) string { return unit.SI.Show(unit.Ratio, v, 0) }

// tickStride is the smallest step through the ticks that ends on the last and
// leaves room between the numbers.
func (d *draft) tickStride(length float64) int {
	widest := 0.0
	for _, t := range d.ticks {
		widest = max(widest, TextWidth(tickText(t), textSize))
	}
	steps := len(d.ticks) - 1
	for n := 1; n < steps; n++ {
		if steps%n == 0 && length*float64(n)/float64(steps) >= widest+1.5 {
			return n
		}
	}
	return steps
}
