package plot

import (
	"image/color"
	"math"

	"gonum.org/v1/plot"
	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"

	"stillair/checks"
	"stillair/checks/unit"
	"stillair/templates/drawing"
)

// Measures of the checks at a glance in mm.
const (
	axisRoom   = 11.5 // axis with its numbers and name
	leastPitch = 4.6  // from line to line
	goodPitch  = 5.4
	mostPitch  = 7.0
	indent     = 3.0 // of a check under its limit
	gap        = 3.5 // between words and marks
	signRoom   = 3.2 // of the sign before the verdict
	signRadius = 0.95
	leastAxis  = 30.0
)

// MarginsCaption explains the marks; it is meant to stand under the chart.
const MarginsCaption = "Sign with bar: calculated temperature with ± U. Heavy stroke: limit. Hatched: guard band, one U on the permitted side of the limit."

// MarginsHeight is the height in mm at which Margins shows all it can with
// comfortable lines; 0 when no limit was judged.
func MarginsHeight(o *checks.Outcome) float64 {
	if o == nil {
		return 0
	}
	s := choose(o, math.MaxInt)
	if len(s.groups) == 0 {
		return 0
	}
	return math.Ceil(2*edge + axisRoom + goodPitch*float64(s.slots()))
}

// Margins shows the checks at a glance: under each limit the calculated
// temperatures with their uncertainty against it, with the verdict. It shows
// the checks that govern a limit first of all, then all that are not a pass, then
// the worst of every limit and load case, at most 14, and sums up the others. The second result is false when
// nothing was judged or the frame, in mm, is too small to tell anything.
func Margins(o *checks.Outcome, wMM, hMM float64) (drawing.Scene, bool) {
	w, err := words()
	if o == nil || err != nil || !finite(wMM, hMM) {
		return drawing.Scene{}, false
	}
	s := choose(o, int(max(0, min(1000, (hMM-2*edge-axisRoom)/leastPitch))))
	if len(s.groups) == 0 {
		return drawing.Scene{}, false
	}
	m := marginChart{selection: s, writer: writer{w}, sys: system(o), loads: len(o.Loads), w: wMM}
	m.columns()
	if m.right-m.left < leastAxis {
		return drawing.Scene{}, false
	}
	r := NewRecorder(wMM, hMM)
	m.draw(draw.New(r))
	return r.Scene(s.title(m.sys, m.loads)), true
}

// marginChart is the chart as a plotter; left and right are where its axis
// may begin and end, in mm.
type marginChart struct {
	selection
	writer
	sys            unit.System
	loads          int
	w, left, right float64
}

// columns gives the words on both sides their room.
func (m *marginChart) columns() {
	names, verdicts := 0.0, 0.0
	for _, g := range m.groups {
		for _, c := range g.rows {
			names = math.Max(names, width(c.label(m.loads)))
			verdicts = math.Max(verdicts, width(string(c.Verdict)))
		}
	}
	m.left = edge + indent + math.Min(names, 0.36*m.w) + gap
	m.right = m.w - edge - verdicts - signRoom - gap
}

// shown is a temperature in the unit of the axis.
func (m *marginChart) shown(k float64) float64 { return m.sys.Value(unit.Temperature, k) }

// reach is the range of all that is drawn.
func (m *marginChart) reach() (lo, hi float64) {
	lo, hi = math.Inf(1), math.Inf(-1)
	for _, g := range m.groups {
		for _, c := range g.rows {
			from, to := c.guard()
			for _, k := range []float64{from, to, c.ValueK - c.Uncertainty, c.ValueK + c.Uncertainty} {
				lo, hi = math.Min(lo, m.shown(k)), math.Max(hi, m.shown(k))
			}
		}
	}
	pad := math.Max(0.04*(hi-lo), 0.5)
	return lo - pad, hi + pad
}

// draw lays the chart out; lines closer together than mostPitch leave no
// room at the foot.
func (m *marginChart) draw(c draw.Canvas) {
	p := newPlot(m.Plain)
	p.HideY()
	p.Y.Padding = 0
	p.Y.Min, p.Y.Max = 0, float64(m.slots())
	p.X.Min, p.X.Max = m.reach()
	p.X.Tick.Marker = evenTicks(p.X.Min, p.X.Max, int((m.right-m.left)/14), 0)
	p.X.Label.Text = "temperature / " + m.sys.Unit(unit.Temperature)
	p.Add(m)
	c = draw.Crop(c, mm(m.left), -mm(m.w-m.right), mm(edge), -mm(edge))
	if spare := p.DataCanvas(c).Size().Y - mm(mostPitch)*vg.Length(m.slots()); spare > 0 {
		c = draw.Crop(c, 0, 0, spare, 0)
	}
	p.Draw(c)
}

// Plot draws the lines of the chart from the top down.
func (m *marginChart) Plot(c draw.Canvas, p *plot.Plot) {
	pitch := c.Size().Y / vg.Length(m.slots())
	y := c.Max.Y - pitch/2
	for _, g := range m.groups {
		m.writer.left(c, mm(edge), y, fit(g.heading(m.sys), m.w-2*edge))
		y -= pitch
		m.grid(c, p, y+pitch/2, y+pitch/2-pitch*vg.Length(len(g.rows)))
		for _, r := range g.rows {
			m.row(c, p, r, y, pitch)
			y -= pitch
		}
	}
	if m.rest != "" {
		m.writer.left(c, mm(edge), y, fit(m.rest, m.w-2*edge))
	}
}

// grid draws the grid behind the checks of one limit, so that it strikes out
// no words.
func (m *marginChart) grid(c draw.Canvas, p *plot.Plot, top, bottom vg.Length) {
	for _, t := range p.X.Tick.Marker.Ticks(p.X.Min, p.X.Max) {
		x := c.X(p.X.Norm(t.Value))
		c.StrokeLine2(pen(light, hair), x, bottom, x, top)
	}
}

// row draws one check at a height. A white rim keeps its sign apart from the
// limit under it.
func (m *marginChart) row(c draw.Canvas, p *plot.Plot, r check, y, pitch vg.Length) {
	x := func(k float64) vg.Length { return c.X(p.X.Norm(m.shown(k))) }
	from, to := r.guard()
	c.StrokeLine2(pen(light, hair), mm(m.left-gap/2), y, c.Max.X, y)
	hatch(c, vg.Rectangle{Min: vg.Point{X: x(from), Y: y - 0.3*pitch}, Max: vg.Point{X: x(to), Y: y + 0.3*pitch}})
	c.StrokeLine2(pen(ink, 0.8), x(r.LimitK), y-0.42*pitch, x(r.LimitK), y+0.42*pitch)
	fill(c, paper, shape(r.Verdict, x(r.ValueK), y, mm(signRadius+0.3)))
	bar(c, x(r.ValueK-r.Uncertainty), x(r.ValueK+r.Uncertainty), y)
	sign(c, r.Verdict, x(r.ValueK), y)

	m.writer.left(c, mm(edge+indent), y, fit(r.label(m.loads), m.left-gap-edge-indent))
	sign(c, r.Verdict, mm(m.right+gap+signRadius), y)
	m.writer.left(c, mm(m.right+gap+signRoom), y, string(r.Verdict))
}

// hatch fills a rectangle with slanted hair lines and outlines it.
func hatch(c draw.Canvas, r vg.Rectangle) {
	box := draw.Canvas{Canvas: c.Canvas, Rectangle: r}
	h := r.Size().Y
	for x := r.Min.X - h; x < r.Max.X; x += mm(0.8) {
		line := []vg.Point{{X: x, Y: r.Min.Y}, {X: x + h, Y: r.Max.Y}}
		c.StrokeLines(pen(grey, hair), box.ClipLinesXY(line)...)
	}
	c.SetLineStyle(pen(grey, hair))
	c.Stroke(r.Path())
}

// bar is the uncertainty of a value: a line with ends.
func bar(c draw.Canvas, from, to, y vg.Length) {
	if to-from < mm(0.1) {
		return
	}
	end := mm(0.6)
	c.StrokeLine2(pen(accent, 0.4), from, y, to, y)
	c.StrokeLine2(pen(accent, 0.4), from, y-end, from, y+end)
	c.StrokeLine2(pen(accent, 0.4), to, y-end, to, y+end)
}

// sign marks a value by its verdict. The conditional ones are open.
func sign(c draw.Canvas, v checks.Verdict, x, y vg.Length) {
	fill(c, accent, shape(v, x, y, mm(signRadius)))
	if v == checks.ConditionalPass || v == checks.ConditionalFail {
		fill(c, paper, shape(v, x, y, mm(signRadius-0.38)))
	}
}

// shape of a sign: a circle when the limit is met, a triangle when it is not.
func shape(v checks.Verdict, x, y, r vg.Length) vg.Path {
	if v == checks.Pass || v == checks.ConditionalPass {
		return circle(x, y, r)
	}
	return triangle(x, y, r)
}

func fill(c draw.Canvas, ink color.Color, p vg.Path) {
	c.SetColor(ink)
	c.Fill(p)
}

func circle(x, y, r vg.Length) vg.Path {
	var p vg.Path
	p.Move(vg.Point{X: x + r, Y: y})
	p.Arc(vg.Point{X: x, Y: y}, r, 0, 2*math.Pi)
	p.Close()
	return p
}

// triangle stands on its base; r is the radius of a circle of like weight.
func triangle(x, y, r vg.Length) vg.Path {
	r *= 1.35
	var p vg.Path
	for i, a := range []float64{90, 210, 330} {
		sin, cos := math.Sincos(a * math.Pi / 180)
		pt := vg.Point{X: x + r*vg.Length(cos), Y: y + r*vg.Length(sin) - r/8}
		if i == 0 {
			p.Move(pt)
		} else {
			p.Line(pt)
		}
	}
	p.Close()
	return p
}
