package plot

import (
	"image"
	"image/color"
	"math"

	"golang.org/x/image/font"
	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"

	plotfont "gonum.org/v1/plot/font"

	"stillair/templates/drawing"
)

// capHeight is the height of the capitals of DejaVu Sans over its em.
const capHeight = 1493.0 / 2048

// flatness is the most a curve may be off the straight pieces drawn for it, mm.
const flatness = 0.005

// Recorder is a vg.CanvasSizer that keeps what is drawn on it as the items of
// a drawing.Scene. Curves become straight pieces, dashes single strokes, and
// whatever reaches over the frame is cut off. Transparent colours are mixed
// with white, for a Scene knows no transparency.
type Recorder struct {
	w, h  float64 // mm
	now   state
	stack []state
	items []drawing.Item
}

// state is what Push saves. Lengths are in the units of the user of the canvas.
type state struct {
	width  vg.Length
	dash   []vg.Length
	offset vg.Length
	color  drawing.Color
	at     affine
}

var _ vg.CanvasSizer = (*Recorder)(nil)

// NewRecorder is an empty canvas of width and height in mm.
func NewRecorder(wMM, hMM float64) *Recorder {
	mm := float64(vg.Millimeter)
	return &Recorder{w: wMM, h: hMM, now: state{width: vg.Points(1), at: affine{xx: 1 / mm, yy: -1 / mm, y: hMM}}}
}

// Scene is what was drawn so far, under a title as alternative text.
func (r *Recorder) Scene(title string) drawing.Scene {
	return drawing.Scene{W: r.w, H: r.h, Title: title, Items: append([]drawing.Item(nil), r.items...)}
}

// Size of the canvas.
func (r *Recorder) Size() (x, y vg.Length) {
	return vg.Length(r.w) * vg.Millimeter, vg.Length(r.h) * vg.Millimeter
}

// SetLineWidth sets the width of strokes; nothing is stroked at zero or less.
func (r *Recorder) SetLineWidth(w vg.Length) { r.now.width = w }

// SetLineDash sets the lengths of dashes and gaps and where in them to begin.
func (r *Recorder) SetLineDash(pattern []vg.Length, offset vg.Length) {
	r.now.dash, r.now.offset = append([]vg.Length(nil), pattern...), offset
}

// SetColor sets the colour of strokes, areas and words; nil is black.
func (r *Recorder) SetColor(c color.Color) {
	if c == nil {
		c = color.Black
	}
	red, green, blue, alpha := c.RGBA() // premultiplied, 16 bits
	over := func(v uint32) uint8 { return uint8((v + 0xFFFF - alpha) >> 8) }
	r.now.color = drawing.Color{R: over(red), G: over(green), B: over(blue)}
}

// Rotate turns what is drawn next counter-clockwise about the origin, radians.
func (r *Recorder) Rotate(rad float64) {
	sin, cos := math.Sincos(rad)
	r.now.at = r.now.at.after(affine{xx: cos, xy: -sin, yx: sin, yy: cos})
}

// Translate moves the origin.
func (r *Recorder) Translate(pt vg.Point) {
	r.now.at = r.now.at.after(affine{xx: 1, yy: 1, x: float64(pt.X), y: float64(pt.Y)})
}

// Scale stretches what is drawn next.
func (r *Recorder) Scale(x, y float64) { r.now.at = r.now.at.after(affine{xx: x, yy: y}) }

// Push saves width, dashes, colour and transformation.
func (r *Recorder) Push() { r.stack = append(r.stack, r.now) }

// Pop restores what the matching Push saved.
func (r *Recorder) Pop() {
	if n := len(r.stack); n > 0 {
		r.now, r.stack = r.stack[n-1], r.stack[:n-1]
	}
}

// Stroke draws along a path.
func (r *Recorder) Stroke(p vg.Path) {
	width := float64(r.now.width) * r.now.at.scale()
	if !(width > 0) || math.IsInf(width, 0) {
		return
	}
	frame := r.frame()
	for _, run := range r.flatten(p) {
		pieces := frame.ClipLinesXY(run)
		uncut := len(pieces) == 1 && len(pieces[0]) == len(run)
		for _, piece := range pieces {
			switch dashes := r.dashes(piece); {
			case dashes != nil:
				for _, d := range dashes {
					r.stroke(d, width, false)
				}
			default:
				r.stroke(piece, width, uncut && len(run) > 2 && run[0] == run[len(run)-1])
			}
		}
	}
}

// stroke records a run of straight pieces. A Scene joins corners only around
// areas, so a run with corners is an unfilled area: closed, or there and back.
func (r *Recorder) stroke(run []vg.Point, width float64, closed bool) {
	if len(run) == 2 {
		a, b := run[0], run[1]
		r.items = append(r.items, drawing.Line{
			X1: float64(a.X), Y1: float64(a.Y), X2: float64(b.X), Y2: float64(b.Y), Width: width, Color: r.now.color})
		return
	}
	if closed {
		run = run[:len(run)-1]
	} else {
		for i := len(run) - 2; i > 0; i-- {
			run = append(run[:len(run):len(run)], run[i])
		}
	}
	x, y := coordinates(run)
	r.items = append(r.items, drawing.Area{X: x, Y: y, Width: width, Stroke: r.now.color})
}

// Fill fills a path by the non-zero winding rule. Its parts are joined by
// seams without width into one area, so that a hole stays a hole.
func (r *Recorder) Fill(p vg.Path) {
	var outline []vg.Point
	for _, run := range r.flatten(p) {
		if len(run) < 3 {
			continue
		}
		joined := len(outline) > 0
		outline = append(append(outline, run...), run[0])
		if joined {
			outline = append(outline, outline[0])
		}
	}
	frame := r.frame()
	outline = frame.ClipPolygonXY(outline)
	if len(outline) < 3 {
		return
	}
	x, y := coordinates(outline)
	fill := r.now.color
	r.items = append(r.items, drawing.Area{X: x, Y: y, Fill: &fill})
}

// FillString writes a line of text from its baseline point.
func (r *Recorder) FillString(f plotfont.Face, pt vg.Point, text string) {
	p := r.now.at.apply(pt)
	size := float64(f.Font.Size) * r.now.at.scale() * capHeight
	turn := math.Atan2(-r.now.at.yx, r.now.at.xx) * 180 / math.Pi
	if text == "" || !(size > 0) || !finite(float64(p.X), float64(p.Y), size, turn) {
		return
	}
	r.items = append(r.items, drawing.Label{
		X: float64(p.X), Y: float64(p.Y), Size: size, Text: text, Bold: f.Font.Weight >= font.WeightSemiBold,
		Turn: math.Round(turn*1e6) / 1e6, Color: r.now.color,
	})
}

// DrawImage draws nothing: a Scene holds no pictures made of pixels.
func (r *Recorder) DrawImage(vg.Rectangle, image.Image) {}

// frame clips; its lengths are mm.
func (r *Recorder) frame() draw.Canvas {
	return draw.NewCanvas(r, vg.Length(r.w), vg.Length(r.h))
}

// dashes cuts a run into the strokes of the dash pattern; nil when it is solid.
func (r *Recorder) dashes(run []vg.Point) [][]vg.Point {
	scale := vg.Length(r.now.at.scale())
	period := vg.Length(0)
	for _, d := range r.now.dash {
		if d < 0 {
			return nil
		}
		period += d * scale
	}
	if !(period > 0.02) || math.IsInf(float64(period), 0) { // mm; finer than any printer
		return nil
	}
	d := dasher{pattern: r.now.dash, scale: scale}
	d.skip(vg.Length(math.Mod(float64(r.now.offset*scale), float64(2*period))))
	for i := 1; i < len(run); i++ {
		d.walk(run[i-1], run[i])
	}
	return d.strokes
}

// dasher walks along a run, laying down dashes.
type dasher struct {
	pattern []vg.Length
	scale   vg.Length
	at      int       // place in the pattern; even is a dash
	used    vg.Length // of the present dash or gap, mm
	strokes [][]vg.Point
}

// left is the length of what remains of the present dash or gap.
func (d *dasher) left() vg.Length { return d.pattern[d.at%len(d.pattern)]*d.scale - d.used }

func (d *dasher) next() { d.at, d.used = d.at+1, 0 }

func (d *dasher) skip(length vg.Length) {
	for length > 0 && length >= d.left() {
		length -= d.left()
		d.next()
	}
	d.used += max(length, 0)
}

func (d *dasher) walk(a, b vg.Point) {
	total := vg.Length(math.Hypot(float64(b.X-a.X), float64(b.Y-a.Y)))
	for done := vg.Length(0); done < total; {
		step := min(d.left(), total-done)
		if d.at%2 == 0 && step > 0 {
			d.strokes = append(d.strokes, []vg.Point{between(a, b, done/total), between(a, b, (done+step)/total)})
		}
		if done += step; step < d.left() {
			d.used += step
		} else {
			d.next()
		}
	}
}

func between(a, b vg.Point, t vg.Length) vg.Point {
	return vg.Point{X: a.X + t*(b.X-a.X), Y: a.Y + t*(b.Y-a.Y)}
}

func coordinates(run []vg.Point) (x, y []float64) {
	for _, p := range run {
		x, y = append(x, float64(p.X)), append(y, float64(p.Y))
	}
	return x, y
}

func finite(values ...float64) bool {
	for _, v := range values {
		if math.IsNaN(v) || math.IsInf(v, 0) {
			return false
		}
	}
	return true
}
