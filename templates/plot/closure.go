package plot

import (
	"fmt"
	"math"
	"strconv"
	"strings"

	"gonum.org/v1/plot"
	"gonum.org/v1/plot/plotter"
	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"

	"stillair/checks"
	"stillair/checks/unit"
	"stillair/templates/drawing"
)

// promised is the part of the heat that a solution may leave over at any
// place and still count as converged.
const promised = 1e-9

// Least frame of a closure chart in mm.
const (
	leastWidth  = 60.0
	leastHeight = 35.0
	axesRoom    = 15.0 // above and below the field, with the numbers and the name of the axis
)

// Closure shows how the heat left over at the worst place, in W, shrinks from
// iteration to iteration in load case number load, and the promise of 1e-9 of
// the heat. A heat left over of exactly nothing has no place on a logarithmic
// axis; it is an open circle at the foot, marked "0". The second result is
// false when there is no iteration record or the frame, in mm, is too small.
func Closure(o *checks.Outcome, load int, wMM, hMM float64) (drawing.Scene, bool) {
	w, err := words()
	if o == nil || err != nil || load < 0 || load >= len(o.Loads) || !(wMM >= leastWidth && hMM >= leastHeight) || !finite(wMM, hMM) {
		return drawing.Scene{}, false
	}
	l := o.Loads[load]
	v := course{writer: writer{w}, promise: promised * scale(l)}
	for _, it := range l.Record {
		if finite(it.ClosureW) && it.ClosureW >= 0 {
			v.points = append(v.points, plotter.XY{X: float64(it.N), Y: it.ClosureW})
		}
	}
	if len(v.points) == 0 || !v.decades(hMM-axesRoom) {
		return drawing.Scene{}, false
	}
	r := NewRecorder(wMM, hMM)
	if !v.draw(draw.New(r), hMM) {
		return drawing.Scene{}, false
	}
	return r.Scene(v.title(l)), true
}

// scale is the heat against which the closure is judged, in W: all sources
// together or the largest flow, whichever is more. Without a valid result
// there are no flows, and the heat the case asks for stands in.
func scale(l checks.LoadOutcome) float64 {
	sources, largest := 0.0, math.Abs(l.Case.Heat.SI)
	for _, p := range l.Heat {
		if p.By == "source" || p.By == "sun" {
			sources += math.Abs(p.W)
		}
		largest = math.Max(largest, math.Abs(p.W))
	}
	if s := math.Max(sources, largest); finite(s) {
		return s
	}
	return 0
}

// course is the heat left over by iteration, as a plotter. The axis runs in
// powers of ten, so that no value can be out of its reach.
type course struct {
	writer
	points  plotter.XYs
	promise float64 // W; 0 when unknown
	lo, hi  float64 // powers of ten at the ends of the axis, whole numbers
}

// decades finds the ends of the axis: full powers of ten around all that is
// above nothing, with a free one at the foot and room for the name of the
// promise in a field of a height in mm.
func (v *course) decades(field float64) bool {
	v.lo, v.hi = math.Inf(1), math.Inf(-1)
	for _, y := range append(v.heats(), v.promise) {
		if e := math.Log10(y); finite(e) {
			v.lo, v.hi = math.Min(v.lo, e), math.Max(v.hi, e)
		}
	}
	v.lo, v.hi = math.Floor(v.lo)-1, math.Ceil(v.hi)
	v.hi = math.Max(v.hi, v.lo+3)
	if !finite(v.lo, v.hi) {
		return false
	}
	if p := math.Log10(v.promise); finite(p) {
		for (p-v.lo)*field < nameRoom*(v.hi-v.lo) && nameRoom < field {
			v.lo--
		}
	}
	return true
}

func (v *course) heats() []float64 {
	var list []float64
	for _, p := range v.points {
		list = append(list, p.Y)
	}
	return list
}

// drawn are the points as powers of ten, with nothing at the foot of the axis.
func (v *course) drawn() (all, zero plotter.XYs) {
	for _, p := range v.points {
		e := math.Max(math.Log10(p.Y), v.lo)
		all = append(all, plotter.XY{X: p.X, Y: e})
		if p.Y == 0 {
			zero = append(zero, plotter.XY{X: p.X, Y: e})
		}
	}
	return all, zero
}

func (v *course) draw(c draw.Canvas, hMM float64) bool {
	all, _ := v.drawn()
	line, err := plotter.NewLine(all)
	if err != nil {
		return false
	}
	line.LineStyle = pen(accent, 0.4)
	grid := plotter.NewGrid()
	grid.Vertical.Color, grid.Horizontal = nil, pen(light, hair)
	p := newPlot(v.Plain)
	p.Add(grid, line, v)
	p.X.Label.Text, p.Y.Label.Text = "iteration", "heat left over / W"
	p.X.Min, p.X.Max = all[0].X-0.5, all[len(all)-1].X+0.5
	p.Y.Min, p.Y.Max = v.lo, v.hi
	p.X.Tick.Marker = evenTicks(p.X.Min, p.X.Max, 12, 1)
	p.Y.Tick.Marker = decadeTicks(int(v.lo), int(v.hi), int((hMM-axesRoom)/6))
	p.Draw(draw.Crop(c, mm(edge), -mm(edge), mm(edge), -mm(edge)))
	return true
}

// Plot draws the promise and the marks of the iterations.
func (v *course) Plot(c draw.Canvas, p *plot.Plot) {
	at := func(pt plotter.XY) vg.Point {
		return vg.Point{X: c.X(p.X.Norm(pt.X)), Y: c.Y(p.Y.Norm(pt.Y))}
	}
	all, zero := v.drawn()
	var curve []vg.Point
	for _, pt := range all {
		curve = append(curve, at(pt))
	}
	if v.promise > 0 {
		y := c.Y(p.Y.Norm(math.Log10(v.promise)))
		style := pen(ink, 0.35)
		style.Dashes = []vg.Length{mm(2), mm(1)}
		c.StrokeLine2(style, c.Min.X, y, c.Max.X, y)
		v.name(c, y, curve)
	}
	if len(all) <= 40 {
		for _, pt := range curve {
			fill(c, accent, circle(pt.X, pt.Y, mm(0.8)))
		}
	}
	for _, pt := range zero {
		fill(c, paper, circle(at(pt).X, at(pt).Y, mm(0.5)))
	}
	if n := len(zero); n > 0 {
		v.left(c, at(zero[n-1]).X-mm(width("0")/2), at(zero[n-1]).Y+mm(1.3+textSize/2), "0")
	}
}

// promiseName is what stands at the line of the promise, in two lines.
var promiseName = []string{"closed below " + power(-9), "of the largest heat"}

// Measures of the name of the promise in mm.
const (
	nameOff   = 1.1            // from the line to the words
	namePitch = 1.6 * textSize // from line to line of words
	nameRoom  = nameOff + 2*namePitch
)

// name writes what the promise is beside its line, clear of the curve: below
// the line at the left where that is free.
func (v *course) name(c draw.Canvas, y vg.Length, curve []vg.Point) {
	box := v.nameBox(c, y, curve)
	for i, s := range promiseName {
		mid := box.Max.Y - mm(namePitch)*(vg.Length(i)+0.5)
		v.patched(c, box.Min.X, mid, s)
	}
}

// nameBox finds a free place for the name.
func (v *course) nameBox(c draw.Canvas, y vg.Length, curve []vg.Point) vg.Rectangle {
	w, h := mm(math.Max(width(promiseName[0]), width(promiseName[1]))), mm(2*namePitch)
	at := func(x, top vg.Length) vg.Rectangle {
		return vg.Rectangle{Min: vg.Point{X: x, Y: top - h}, Max: vg.Point{X: x + w, Y: top}}
	}
	below, above := y-mm(nameOff), y+mm(nameOff)+h
	for _, top := range []vg.Length{below, above} {
		for x := c.Min.X + mm(1.5); x+w <= c.Max.X-mm(1); x += mm(1) {
			if box := at(x, top); box.Min.Y >= c.Min.Y && box.Max.Y <= c.Max.Y && clearOf(curve, box) {
				return box
			}
		}
	}
	return at(c.Min.X+mm(1.5), below)
}

// patched writes on a white ground, so that the grid strikes nothing out.
func (v *course) patched(c draw.Canvas, x, mid vg.Length, s string) {
	w, h := mm(width(s)), mm(0.7*textSize)
	fill(c, paper, vg.Rectangle{Min: vg.Point{X: x, Y: mid - h}, Max: vg.Point{X: x + w, Y: mid + h}}.Path())
	v.left(c, x, mid, s)
}

// clearOf tells whether a curve and its marks keep off a rectangle.
func clearOf(curve []vg.Point, r vg.Rectangle) bool {
	box := draw.Canvas{Rectangle: vg.Rectangle{
		Min: vg.Point{X: r.Min.X - mm(1), Y: r.Min.Y - mm(1)}, Max: vg.Point{X: r.Max.X + mm(1), Y: r.Max.Y + mm(1)}}}
	for _, p := range curve {
		if box.Contains(p) {
			return false
		}
	}
	return len(box.ClipLinesXY(curve)) == 0
}

// scientific is a number as one digit, a decimal, and a power of ten.
func scientific(v float64) string {
	m, e, _ := strings.Cut(strconv.FormatFloat(v, 'e', 1, 64), "e")
	exponent, _ := strconv.Atoi(e)
	return m + unit.NoBreak + "×" + unit.NoBreak + power(exponent)
}

// decadeTicks are powers of ten, at most n or so.
func decadeTicks(lo, hi, n int) plot.ConstantTicks {
	step := int(niceStep(math.Max(float64(hi-lo)/float64(max(n, 1)), 1)))
	var ticks plot.ConstantTicks
	for e := lo; e <= hi; e++ {
		if e%step == 0 {
			ticks = append(ticks, plot.Tick{Value: float64(e), Label: power(e)})
		}
	}
	return ticks
}

var raised = strings.NewReplacer("-", "⁻", "0", "⁰", "1", "¹", "2", "²", "3", "³", "4", "⁴", "5", "⁵", "6", "⁶", "7", "⁷", "8", "⁸", "9", "⁹")

// power is a power of ten in print.
func power(e int) string { return "10" + raised.Replace(strconv.Itoa(e)) }

// title is the chart in words.
func (v *course) title(l checks.LoadOutcome) string {
	first, last := v.points[0], v.points[len(v.points)-1]
	text := fmt.Sprintf("Heat left over by iteration, load case %s: %s after iteration %g, %s after iteration %g",
		plain(l.Name), watts(first.Y), first.X, watts(last.Y), last.X)
	if v.promise > 0 {
		text += "; closed below " + watts(v.promise)
	}
	return text + "."
}

func watts(w float64) string {
	if w == 0 {
		return "0" + unit.NoBreak + "W"
	}
	return scientific(w) + unit.NoBreak + "W"
}
