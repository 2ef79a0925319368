package plot

import (
	"image/color"
	"math"
	"strconv"
	"strings"
	"unicode"

	"gonum.org/v1/plot"
	"gonum.org/v1/plot/text"
	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"

	"stillair/templates/drawing"
)

// Measures in mm.
const (
	textSize = 2.3 // height of capitals
	edge     = 1.0 // free of ink around a chart
	thin     = 0.2 // axes and ticks
	hair     = 0.1 // grid and hatching
)

// Ink: black, its tints, and one accent. All of them copy.
var (
	ink    = color.RGBA{A: 0xFF}
	accent = color.RGBA{R: 0x1F, G: 0x4E, B: 0x79, A: 0xFF}
	grey   = color.RGBA{R: 0x60, G: 0x60, B: 0x60, A: 0xFF}
	light  = color.RGBA{R: 0xD0, G: 0xD0, B: 0xD0, A: 0xFF}
	paper  = color.RGBA{R: 0xFF, G: 0xFF, B: 0xFF, A: 0xFF}
)

func mm(v float64) vg.Length { return vg.Length(v) * vg.Millimeter }

func pen(c color.Color, width float64) draw.LineStyle {
	return draw.LineStyle{Color: c, Width: mm(width)}
}

// newPlot is an empty plot without background in the hand of the note.
func newPlot(w text.Plain) *plot.Plot {
	p := plot.New()
	p.BackgroundColor = nil
	p.TextHandler = w
	styles := []*text.Style{&p.Title.TextStyle, &p.Legend.TextStyle}
	for _, a := range []*plot.Axis{&p.X, &p.Y} {
		a.LineStyle, a.Tick.LineStyle = pen(ink, thin), pen(ink, thin)
		a.Tick.Length, a.Label.Padding, a.Padding = mm(1), mm(0.8), 0
		styles = append(styles, &a.Label.TextStyle, &a.Tick.Label)
	}
	for _, s := range styles {
		s.Handler, s.Font = w, sized(textSize)
	}
	return p
}

// writer writes lines of text whose capitals are centred on a height.
type writer struct{ text.Plain }

func (w writer) left(c draw.Canvas, x, y vg.Length, s string) {
	f := sized(textSize)
	c.SetColor(ink)
	c.FillString(w.Fonts.Lookup(f, f.Size), vg.Point{X: x, Y: y - mm(textSize/2)}, s)
}

// width of a text in mm, on the large side.
func width(s string) float64 { return drawing.TextWidth(s, textSize) }

// fit shortens a text to a width in mm, with an ellipsis when it had to.
func fit(s string, most float64) string {
	most += 1e-6 // what arithmetic may have lost
	if width(s) <= most {
		return s
	}
	runes := []rune(s)
	for len(runes) > 0 {
		runes = runes[:len(runes)-1]
		if short := strings.TrimRight(string(runes), " ,.:") + "…"; width(short) <= most {
			return short
		}
	}
	return ""
}

// plain makes one line of printable characters of a text somebody typed.
func plain(s string) string {
	s = strings.Map(func(r rune) rune {
		if unicode.IsControl(r) && !unicode.IsSpace(r) {
			return -1
		}
		return r
	}, strings.ToValidUTF8(s, ""))
	return strings.Join(strings.FieldsFunc(s, func(r rune) bool { return unicode.IsSpace(r) && r != '\u00A0' }), " ")
}

// niceStep is the least of 1, 2 and 5 times a power of ten that is not below v.
func niceStep(v float64) float64 {
	e := math.Pow10(int(math.Floor(math.Log10(v))))
	for _, m := range []float64{1, 2, 5} {
		if m*e >= v*(1-1e-9) {
			return m * e
		}
	}
	return 10 * e
}

// evenTicks are the multiples of a nice step within a range, at most n or so.
func evenTicks(lo, hi float64, n int, least float64) plot.ConstantTicks {
	step := math.Max(niceStep((hi-lo)/float64(max(n, 1))), least)
	decimals := max(0, -int(math.Floor(math.Log10(step)+1e-9)))
	first := math.Ceil(lo/step - 1e-9)
	var ticks plot.ConstantTicks
	for i := range n + 2 {
		if at := (first + float64(i)) * step; at <= hi+1e-9*step {
			ticks = append(ticks, plot.Tick{Value: at, Label: strconv.FormatFloat(at+0, 'f', decimals, 64)})
		}
	}
	return ticks
}
