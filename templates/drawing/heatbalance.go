package drawing

import (
	"fmt"
	"math"
	"slices"

	"stillair/checks"
	"stillair/checks/unit"
)

// Measures of the heat-balance picture in mm.
const (
	footer     = 6.0
	barWidth   = 2.0
	bodyWidth  = 5.5
	slotMin    = linePitch + 0.3 // room of one line of text
	inSlotMin  = 2*linePitch + 0.5
	groupGap   = 2.0
	columnGap  = 2.5
	smallShare = 0.01 // paths below this share are drawn together as "others"
)

// Colours of the bands; they differ in lightness and every band has its label.
var (
	sourceColour     = Color{95, 95, 95}
	sunColour        = Color{230, 159, 0}
	warmColour       = Color{0, 114, 178}
	convectionColour = Color{86, 180, 233}
	radiationColour  = Color{213, 94, 0}
	otherColour      = Color{170, 170, 170}
	throughColour    = Color{215, 215, 215}
	barColour        = Color{60, 60, 60}
)

// flow is one band at the edge of the picture.
type flow struct {
	name   string
	w      float64 // W, positive
	colour Color
	group  string // face it leaves by
}

// balance holds the bands of a picture: what comes in and what goes out.
type balance struct {
	in, out []flow
	total   float64 // W
}

// HeatBalance shows where the heat of load case number load comes from and
// where it goes: bands whose width is proportional to the heat in watts, from
// the sources on the left through the body to the ways out of each face on the
// right. Shares are of all the heat that leaves. Ways below 1 % are drawn
// together as "others". Heat that warm air or surroundings give to a face
// counts as coming in.
func HeatBalance(o *checks.Outcome, load int, wMM, hMM float64) Scene {
	if o == nil || load < 0 || load >= len(o.Loads) {
		return message(wMM, hMM, "No heat balance: there is no such load case.")
	}
	d := newDraft(&o.Loads[load])
	b := d.balance()
	if b.total <= 0 {
		return message(wMM, hMM, "No heat balance: no heat flows were computed.")
	}
	b.in = lump(b.in, smallShare*b.total)
	b.out = lump(b.out, smallShare*b.total)
	return d.drawBalance(b, wMM, hMM)
}

// balance sorts the heat paths that cross the outside of the body.
func (d *draft) balance() balance {
	var b balance
	for _, p := range d.load.Heat {
		if math.IsNaN(p.W) || math.IsInf(p.W, 0) || p.W == 0 {
			continue
		}
		switch {
		case p.By == "sun":
			b.in = gather(b.in, flow{name: "sun", w: p.W, colour: sunColour})
		case p.By == "source":
			b.in = gather(b.in, flow{name: d.sourceName(), w: p.W, colour: sourceColour})
		case p.Final:
			b.cross(p, slices.Contains(d.faces(), p.To))
		}
	}
	b.close(d.sourceName())
	return b
}

// cross adds a path between a face and what is around it.
func (b *balance) cross(p checks.HeatPath, inwards bool) {
	face, w := p.From, p.W
	if inwards {
		face, w = p.To, -w
	}
	colour := map[string]Color{"convection": convectionColour, "radiation": radiationColour}[p.By]
	if colour == (Color{}) {
		colour = otherColour
	}
	if w > 0 {
		b.out = append(b.out, flow{name: p.By, w: w, colour: colour, group: face})
		return
	}
	name := "warm air"
	if p.By != "convection" {
		name = "warm surroundings"
	}
	b.in = gather(b.in, flow{name: name, w: -w, colour: warmColour})
}

// close makes heat in and out equal. What a body held at the temperature of
// its contents gives off has no path of its own; it is the difference. A
// difference below half a percent is the closure of the solution and only
// evens the widths.
func (b *balance) close(source string) {
	in, out := sum(b.in), sum(b.out)
	b.total = math.Max(in, out)
	if math.Abs(out-in) <= 0.005*b.total {
		b.total = out
		return
	}
	if source == heatSource && in > 0 {
		source = "not accounted for"
	}
	if out > in {
		b.in = append(b.in, flow{name: source, w: out - in, colour: sourceColour})
	} else {
		b.out = append(b.out, flow{name: "taken up", w: in - out, colour: sourceColour, group: source})
	}
}

const heatSource = "heat inside"

func (d *draft) sourceName() string {
	if d.load.Case.Contents.Set {
		return "contents"
	}
	return heatSource
}

func sum(list []flow) float64 {
	s := 0.0
	for _, f := range list {
		s += f.w
	}
	return s
}

// gather adds a flow to the one of the same name.
func gather(list []flow, f flow) []flow {
	if f.w <= 0 {
		return list
	}
	for i := range list {
		if list[i].name == f.name {
			list[i].w += f.w
			return list
		}
	}
	return append(list, f)
}

const others = "others"

// lump draws flows below a size together; a single small one keeps its name.
func lump(list []flow, below float64) []flow {
	var kept []flow
	rest := flow{name: others, colour: otherColour}
	for _, f := range list {
		if f.w < below || f.name == others {
			rest.w += f.w
		} else {
			kept = append(kept, f)
		}
	}
	if rest.w == 0 {
		return list
	}
	return append(kept, rest)
}

// lumpSmallest takes the smallest named flow into the others.
func lumpSmallest(list []flow) []flow {
	smallest := math.Inf(1)
	for _, f := range list {
		if f.name != others {
			smallest = math.Min(smallest, f.w)
		}
	}
	return lump(list, math.Nextafter(smallest, math.Inf(1)))
}

// groups splits flows by the face they leave, in order of appearance.
func groups(list []flow) [][]flow {
	var names []string
	by := map[string][]flow{}
	for _, f := range list {
		if _, ok := by[f.group]; !ok {
			names = append(names, f.group)
		}
		by[f.group] = append(by[f.group], f)
	}
	if i := slices.Index(names, ""); i >= 0 { // others last
		names = append(slices.Delete(names, i, i+1), "")
	}
	var out [][]flow
	for _, n := range names {
		out = append(out, by[n])
	}
	return out
}

func slot(f flow, perW, least float64) float64 { return math.Max(f.w*perW, least) }

// inHeight and outHeight are the heights of both sides at a width per watt.
func (b balance) inHeight(perW float64) float64 {
	h := groupGap * float64(len(b.in)-1)
	for _, f := range b.in {
		h += slot(f, perW, inSlotMin)
	}
	return h
}

func (b balance) outHeight(perW float64) float64 {
	h := -groupGap
	for _, g := range groups(b.out) {
		h += groupGap
		if g[0].group != "" {
			h += linePitch
		}
		for _, f := range g {
			h += slot(f, perW, slotMin)
		}
	}
	return h
}

// fitBands finds the width per watt that fills a height without more than
// three fifths of it taken by bands, drawing small flows together until the
// bands take at least a quarter.
func (b *balance) fitBands(height float64) float64 {
	for {
		lo, hi := 0.0, 0.6*height/b.total
		for range 50 {
			mid := (lo + hi) / 2
			if math.Max(b.inHeight(mid), b.outHeight(mid)) <= height {
				lo = mid
			} else {
				hi = mid
			}
		}
		if lo*b.total >= 0.25*height || len(b.out) <= 2 {
			return lo
		}
		b.out = lumpSmallest(b.out)
	}
}

// drawBalance lays the picture out.
func (d *draft) drawBalance(b balance, w, h float64) Scene {
	perW := b.fitBands(h - 2*margin - footer)
	k := newSketch()
	labels := d.outTexts(b)
	left := d.inWidth(b, w*0.27)
	x := balanceColumns{
		in:  margin + left + 1.5,
		out: w - margin - labels.width() - 1.5,
	}
	x.body = x.in + (x.out-x.in)*0.38
	x.face = x.in + (x.out-x.in)*0.74
	mid := margin + (h-2*margin-footer)/2
	bodyTop := mid - b.total*perW/2
	d.drawIn(k, b, x, perW, mid, bodyTop, left)
	d.drawOut(k, b, x, perW, mid, bodyTop, labels, w)
	d.drawBodyBar(k, x.body, bodyTop, b.total*perW)
	d.drawFooter(k, b, perW, w, h)
	return Scene{W: w, H: h, Title: d.balanceTitle(b), Items: k.items}
}

// balanceColumns are the left edges of the bars.
type balanceColumns struct{ in, body, face, out float64 }

// inWidth is the width of the labels on the left, limited.
func (d *draft) inWidth(b balance, most float64) float64 {
	w := 0.0
	for _, f := range b.in {
		for _, s := range d.inLines(f, b.total) {
			w = math.Max(w, TextWidth(s, textSize))
		}
	}
	return math.Min(w, most)
}

func (d *draft) inLines(f flow, total float64) []string {
	return []string{f.name, powerText(d.sys, f.w, total) + ", " + shareText(f.w/total)}
}

// drawIn draws what comes in, with its labels.
func (d *draft) drawIn(k *sketch, b balance, x balanceColumns, perW, mid, bodyTop, width float64) {
	y, at := mid-b.inHeight(perW)/2, bodyTop
	even := b.total / sum(b.in) // evens a difference within the closure
	for _, f := range b.in {
		s, band := slot(f, perW, inSlotMin), f.w*even*perW
		c := y + s/2
		k.band(x.in, c-band/2, x.body, at, band, f.colour)
		for i, line := range d.inLines(f, b.total) {
			k.text(point{margin + width, c + (float64(i)-0.5)*linePitch + textSize/2}, Right, 0, fit(line, textSize, width), black)
		}
		y += s + groupGap
		at += band
	}
}

// outLabels are the three columns of text on the right.
type outLabels struct{ name, power, share float64 }

func (l outLabels) width() float64 { return l.name + l.power + l.share + 2*columnGap }

func (d *draft) outTexts(b balance) outLabels {
	var l outLabels
	for _, f := range b.out {
		l.name = math.Max(l.name, TextWidth(f.name, textSize))
		l.power = math.Max(l.power, TextWidth(powerText(d.sys, f.w, b.total), textSize))
		l.share = math.Max(l.share, TextWidth(shareText(f.w/b.total), textSize))
	}
	return l
}

// drawOut draws the bands to each face and on to its ways out.
func (d *draft) drawOut(k *sketch, b balance, x balanceColumns, perW, mid, bodyTop float64, l outLabels, w float64) {
	y, at := mid-b.outHeight(perW)/2, bodyTop
	for _, g := range groups(b.out) {
		if g[0].group != "" {
			k.text(point{x.face, y + ascent}, Left, 0, d.groupName(g[0].group), black)
			y += linePitch
		}
		height := 0.0
		for _, f := range g {
			height += slot(f, perW, slotMin)
		}
		band := sum(g) * perW
		faceTop := y + height/2 - band/2
		k.band(x.body+bodyWidth, at, x.face, faceTop, band, throughColour)
		at += band
		bar := faceTop
		for _, f := range g {
			s := slot(f, perW, slotMin)
			d.drawWayOut(k, f, b.total, x, bar, y+s/2, perW, l, w)
			bar += f.w * perW
			y += s
		}
		k.area(rect{x.face, faceTop, x.face + barWidth, faceTop + band}.corners(), &barColour, 0)
		y += groupGap
	}
}

// drawWayOut draws one band from its face to the right, and its label.
func (d *draft) drawWayOut(k *sketch, f flow, total float64, x balanceColumns, bar, c, perW float64, l outLabels, w float64) {
	band := f.w * perW
	k.band(x.face+barWidth, bar, x.out, c-band/2, band, f.colour)
	base, right := c+textSize/2, w-margin
	k.text(point{x.out + 1.5, base}, Left, 0, f.name, black)
	k.text(point{right - l.share - columnGap, base}, Right, 0, powerText(d.sys, f.w, total), black)
	k.text(point{right, base}, Right, 0, shareText(f.w/total), black)
}

func (d *draft) groupName(face string) string {
	if t, ok := d.temperature(face); ok {
		return face + ", " + temperatureText(d.sys, t)
	}
	return face
}

// band is a curved stripe of the same height h at both ends.
func (k *sketch) band(x0, y0, x1, y1, h float64, c Color) {
	const n = 24
	var upper, lower []point
	for i := 0; i <= n; i++ {
		t := float64(i) / n
		x, y := x0+t*(x1-x0), y0+(y1-y0)*t*t*(3-2*t)
		upper = append(upper, point{x, y})
		lower = append(lower, point{x, y + h})
	}
	slices.Reverse(lower)
	k.area(append(upper, lower...), &c, 0)
}

// drawBodyBar draws the body, with its name when there is room.
func (d *draft) drawBodyBar(k *sketch, x, top, height float64) {
	k.area(rect{x, top, x + bodyWidth, top + height}.corners(), &barColour, 0)
	name := d.bodyName()
	if TextWidth(name, textSize)+2 > height {
		name = d.body.Kind
	}
	if TextWidth(name, textSize)+2 > height {
		return
	}
	k.text(point{x + (bodyWidth+textSize)/2, top + height/2}, Centre, 90, name, inkOn(&barColour))
}

func (d *draft) bodyName() string {
	for _, at := range []string{"inside air", "contents"} {
		if t, ok := d.temperature(at); ok {
			return at + " " + temperatureText(d.sys, t)
		}
	}
	return d.body.Kind
}

// drawFooter tells both sums and what a width means.
func (d *draft) drawFooter(k *sketch, b balance, perW, w, h float64) {
	text := fmt.Sprintf("in %s, out %s; band width to scale, 10%smm = %s", powerText(d.sys, sum(b.in), b.total),
		powerText(d.sys, sum(b.out), b.total), unit.NoBreak, powerText(d.sys, 10/perW, b.total))
	k.text(point{margin, h - margin - descent}, Left, 0, fit(text, textSize, w-2*margin), black)
}

// balanceTitle is the picture in words.
func (d *draft) balanceTitle(b balance) string {
	text := "Heat balance. In:"
	for _, f := range b.in {
		text += fmt.Sprintf(" %s %s;", f.name, powerText(d.sys, f.w, b.total))
	}
	text += " out:"
	for _, f := range b.out {
		name := f.name
		if f.group != "" {
			name = f.group + " by " + f.name
		}
		text += fmt.Sprintf(" %s %s (%s);", name, powerText(d.sys, f.w, b.total), shareText(f.w/b.total))
	}
	return text[:len(text)-1] + "."
}
