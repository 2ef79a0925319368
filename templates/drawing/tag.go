package drawing

import (
	"math"
	"slices"
	"strings"
)

// tag is what has to be written about a part of the drawing: inside it when
// there is room, else beside the drawing with a leader line.
type tag struct {
	lines   []string
	sun     int     // index of the line with the sun arrows, -1 for none
	inside  rect    // free room within the part; zero when there is none
	targets []point // where a leader may end
	poly    []point // the part
	fill    *Color  // its colour
	view    int     // index of its view, -1 for none
	thin    bool    // too slim for a dot: the leader ends with an arrow head
	hatched bool    // the text needs a clear ground
	bare    bool    // the leader ends without head or dot
}

const (
	tagPad     = 1.3 // free margin around a label inside a part
	tagClear   = 1.6 // and outside
	sunRoom    = 6.0 // for the sun arrows before their line
	swatchRoom = 4.0 // for the colour sample before the first line
	shoulder   = 2.0 // level piece of a leader before the text
	searchStep = 2.0 // of the search for free room
)

// indent is the room kept before line i.
func (t tag) indent(i int, outside bool) float64 {
	switch {
	case i == t.sun:
		return sunRoom
	case i == 0 && outside && t.thin && t.fill != nil:
		return swatchRoom
	}
	return 0
}

func (t tag) size(outside bool) (w, h float64) {
	for i, s := range t.lines {
		w = math.Max(w, t.indent(i, outside)+TextWidth(s, textSize))
	}
	return w, float64(len(t.lines)-1)*linePitch + ascent + descent
}

// writeInside puts the tag into its part, level or turned; false when there
// is no room.
func (k *sketch) writeInside(t tag) bool {
	return k.writeWithin(t, true) || k.writeWithin(t.narrower(), true) || k.writeWithin(t, false)
}

// narrower puts the word before a value with sun on a line of its own.
func (t tag) narrower() tag {
	if t.sun < 0 {
		return t
	}
	word, value, ok := strings.Cut(t.lines[t.sun], " ")
	if ok {
		t.lines = slices.Replace(slices.Clone(t.lines), t.sun, t.sun+1, word, value)
	}
	return t
}

func (k *sketch) writeWithin(t tag, level bool) bool {
	w, h := t.size(false)
	c, room := t.inside.centre(), t.inside
	bw, bh, turn := w, h, 0.0
	if !level {
		bw, bh, turn = h, w, 90
	}
	if room.w() < bw+2*tagPad || room.h() < bh+2*tagPad {
		return false
	}
	if t.hatched {
		ground := rect{c.x - bw/2 - 1, c.y - bh/2 - 1, c.x + bw/2 + 1, c.y + bh/2 + 1}
		fill := white
		if t.fill != nil {
			fill = *t.fill
		}
		k.area(ground.corners(), &fill, 0)
	}
	ink := inkOn(t.fill)
	for i, s := range t.lines {
		half := t.indent(i, false) / 2
		down := -h/2 + ascent + float64(i)*linePitch
		lw := TextWidth(s, textSize)
		if level {
			k.text(point{c.x + half, c.y + down}, Centre, turn, s, ink)
			k.sunArrows(t, i, point{c.x - half - lw/2, c.y + down}, 0, ink)
		} else {
			k.text(point{c.x + down, c.y - half}, Centre, turn, s, ink)
			k.sunArrows(t, i, point{c.x + down, c.y + half + lw/2}, 90, ink)
		}
	}
	return true
}

// sunArrows draws three slanting arrows from the start of line i of the tag.
func (k *sketch) sunArrows(t tag, i int, start point, turn float64, ink Color) {
	if i != t.sun {
		return
	}
	for n := range 3 {
		u := 0.3 + 1.6*float64(n)
		tail, tip := point{u, -2.5}, point{u + 1.4, 0}
		if turn == 90 { // the line runs up the paper
			tail, tip = point{tail.y, -tail.x}, point{tip.y, -tip.x}
		}
		tail, tip = tail.add(start.x, start.y), tip.add(start.x, start.y)
		k.line(tail, tip, narrow, ink, nil)
		k.head(tip, tip.x-tail.x, tip.y-tail.y, 1.4, 0.4, ink)
		k.texts = append(k.texts, segment{tail, tip}.bounds())
	}
}

// spot is one way to write a tag beside the drawing.
type spot struct {
	block  rect
	right  bool // the text stands right of its leader
	target point
	knee   point // where the leader becomes level
	end    point
	cost   float64
}

// writeBeside finds the best free place on the sheet for a tag and its leader;
// false when there is none.
func (k *sketch) writeBeside(t tag, leaders *[]segment) bool {
	best := spot{cost: math.Inf(1)}
	for _, step := range []float64{3 * searchStep, searchStep} { // the coarse search spares most of the fine one
		k.search(&best, t, step, *leaders)
	}
	if math.IsInf(best.cost, 1) {
		return false
	}
	k.write(t, best, leaders)
	return true
}

// search tries the places of a grid.
func (k *sketch) search(best *spot, t tag, step float64, leaders []segment) {
	bw, bh := t.size(true)
	x0, x1 := k.box.x1-k.sheetW, k.box.x0+k.sheetW-bw
	y0, y1 := k.box.y1-k.sheetH, k.box.y0+k.sheetH-bh
	for y := y0; y <= y1; y += step {
		for x := x0; x <= x1; x += step {
			block := rect{x, y, x + bw, y + bh}
			if t.away(block) >= best.cost || k.blocked(block, leaders) {
				continue
			}
			for _, target := range t.targets {
				for _, right := range []bool{true, false} {
					k.consider(best, t, newSpot(block, right, target), leaders)
				}
			}
		}
	}
}

// away is a lower bound of the length of a leader from a block.
func (t tag) away(block rect) float64 {
	least := math.Inf(1)
	r := block.grown(0.8 + shoulder)
	for _, p := range t.targets {
		dx := max(r.x0-p.x, p.x-r.x1, 0)
		dy := max(r.y0-p.y, p.y-r.y1, 0)
		least = min(least, max(dx, dy))
	}
	return least
}

func newSpot(block rect, right bool, target point) spot {
	s := spot{block: block, right: right, target: target}
	y := block.y0 + ascent - textSize/2
	s.end, s.knee = point{block.x0 - 0.8, y}, point{block.x0 - 0.8 - shoulder, y}
	if !right {
		s.end, s.knee = point{block.x1 + 0.8, y}, point{block.x1 + 0.8 + shoulder, y}
	}
	return s
}

// blocked tells whether a block touches anything drawn.
func (k *sketch) blocked(block rect, leaders []segment) bool {
	clear := block.grown(tagClear)
	for _, r := range k.texts {
		if clear.meets(r) {
			return true
		}
	}
	for _, r := range k.views {
		if clear.meets(r) {
			return true
		}
	}
	tight := block.grown(0.8)
	for _, list := range [][]segment{k.thin, leaders} {
		for _, s := range list {
			if s.touches(tight) {
				return true
			}
		}
	}
	return false
}

// consider keeps a spot when its leader is free and it is the best so far:
// short, with few lines and no other views crossed.
func (k *sketch) consider(best *spot, t tag, s spot, leaders []segment) {
	lead := segment{s.target, s.knee}
	if max(math.Abs(s.knee.x-s.target.x), math.Abs(s.knee.y-s.target.y)) >= best.cost {
		return
	}
	s.cost = lead.length()
	if backwards := (s.knee.x < s.target.x) == s.right; backwards {
		s.cost += 25
	}
	if lead.length() < 3 || s.cost >= best.cost {
		return
	}
	grow := k.box.union(s.block).union(segment{s.knee, s.end}.bounds())
	if grow.w() > k.sheetW || grow.h() > k.sheetH || !k.open(s, leaders) {
		return
	}
	s.cost += 0.4*(grow.w()-k.box.w()+grow.h()-k.box.h()) + k.crossings(t, s)
	if s.cost < best.cost {
		*best = s
	}
}

// open tells whether the leader of a spot meets no text and no other leader.
func (k *sketch) open(s spot, leaders []segment) bool {
	lead, level := segment{s.target, s.knee}, segment{s.knee, s.end}
	if lead.touches(s.block.grown(0.5)) {
		return false
	}
	for _, r := range k.texts {
		if lead.touches(r.grown(0.6)) || level.touches(r.grown(0.6)) {
			return false
		}
	}
	for _, l := range leaders {
		if lead.crosses(l) || level.crosses(l) {
			return false
		}
	}
	return true
}

// crossings is the price, in mm of leader, of what a leader crosses.
func (k *sketch) crossings(t tag, s spot) float64 {
	cost := 0.0
	lead, level := segment{s.target, s.knee}, segment{s.knee, s.end}
	for i, r := range k.views {
		if i != t.view && (lead.touches(r) || level.touches(r)) {
			cost += 40
		}
	}
	for _, l := range k.thin {
		if lead.crosses(l) || level.crosses(l) {
			cost += 8
		}
	}
	if t.thin {
		if in, ok := lead.within(t.poly); ok && in.length() > arrowLength {
			cost += 15 // along a slim face it would be lost
		}
	}
	return cost
}

// write draws a tag at its spot.
func (k *sketch) write(t tag, s spot, leaders *[]segment) {
	lead := segment{s.target, s.knee}
	k.inkLine(lead, t.poly, t.fill, narrow, nil)
	k.line(s.knee, s.end, narrow, black, nil)
	*leaders = append(*leaders, lead, segment{s.knee, s.end})
	switch {
	case t.bare:
	case t.thin:
		ink := black
		if in, ok := lead.within(t.poly); ok && in.length() > arrowLength/2 {
			ink = inkOn(t.fill)
		}
		k.head(s.target, s.target.x-s.knee.x, s.target.y-s.knee.y, arrowLength, arrowHalf, ink)
	default:
		ink := inkOn(t.fill)
		k.area(circle(s.target, 0.5), &ink, 0)
	}
	for i, text := range t.lines {
		in := t.indent(i, true)
		y := s.block.y0 + ascent + float64(i)*linePitch
		x := s.block.x0
		if !s.right { // lines end at the leader
			x = s.block.x1 - TextWidth(text, textSize) - in
		}
		k.text(point{x + in, y}, Left, 0, text, black)
		k.sunArrows(t, i, point{x, y}, 0, black)
		if in == swatchRoom && i != t.sun {
			sample := rect{x, y - textSize, x + 3, y}
			k.area(sample.corners(), t.fill, narrow)
			k.texts = append(k.texts, sample)
		}
	}
}

// writeTags writes all tags on a sheet of w by h; false when one finds no
// place.
func (k *sketch) writeTags(w, h float64) bool {
	k.sheetW, k.sheetH = w, h
	var beside []tag
	for _, t := range k.tags {
		if !k.writeInside(t) {
			beside = append(beside, t)
		}
	}
	var leaders []segment
	for _, t := range beside {
		if !k.writeBeside(t, &leaders) {
			return false
		}
	}
	return true
}

// clashes tells whether two texts overlap. The views keep dimensions apart, so
// this is the last guard for a body nobody thought of.
func (k *sketch) clashes() bool {
	for i, r := range k.texts {
		for _, o := range k.texts[:i] {
			if r.meets(o) {
				return true
			}
		}
	}
	return false
}
