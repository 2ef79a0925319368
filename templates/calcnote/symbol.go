package calcnote

import (
	"stillair/checks"
	"stillair/templates/pdf"
)

// sign is the mark of a verdict, drawn so that it reads in black and white: a
// tick in a ring for a pass, a cross in a square for a fail, filled where the
// verdict holds with the whole uncertainty, hollow where it does not.
type sign struct{ verdict checks.Verdict }

// Extent is the size of the mark in mm.
func (s sign) Extent(_ *pdf.Doc, size float64) (w, up, down float64) {
	em := pdf.Style{Size: size}.Em()
	return 1.25 * em, 0.85 * em, 0.2 * em
}

// Draw draws the mark with its baseline at y.
func (s sign) Draw(d *pdf.Doc, x, y, size float64) {
	em := pdf.Style{Size: size}.Em()
	r := 0.46 * em
	cx, cy := x+r, y-0.36*em
	ink, fill := pdf.Black, &pdf.Black
	white := pdf.Color{R: 255, G: 255, B: 255}
	switch s.verdict {
	case checks.Pass, checks.Fail:
		ink = white
	default:
		fill = &white
	}
	w := 0.09 * em
	switch s.verdict {
	case checks.Pass, checks.ConditionalPass:
		d.Circle(cx, cy, r, fill, w, pdf.Black)
		d.Path([]float64{cx - 0.5*r, cx - 0.12*r, cx + 0.55*r}, []float64{cy + 0.05*r, cy + 0.45*r, cy - 0.42*r}, 1.3*w, ink)
	case checks.Fail, checks.ConditionalFail:
		d.Rect(cx-r, cy-r, 2*r, 2*r, fill, w, pdf.Black)
		k := 0.5 * r
		d.Path([]float64{cx - k, cx + k}, []float64{cy - k, cy + k}, 1.3*w, ink)
		d.Path([]float64{cx - k, cx + k}, []float64{cy + k, cy - k}, 1.3*w, ink)
	default:
		d.Rect(cx-r, cy-r, 2*r, 2*r, fill, w, pdf.Black)
		d.Path([]float64{cx - 0.5*r, cx + 0.5*r}, []float64{cy, cy}, 1.3*w, ink)
	}
}

// verdictRuns is a verdict as mark and word.
func verdictRuns(v checks.Verdict) []pdf.Run {
	return []pdf.Run{{Inline: sign{v}}, {Text: string(v), Face: pdf.Bold}}
}

// bar is a pair of bars about a middle line: filled for one direction of a
// shift, hollow for the other. Lengths are shares of half the width.
type bar struct{ width, up, down float64 }

// Extent is the size of the bars in mm.
func (b bar) Extent(_ *pdf.Doc, size float64) (w, up, down float64) {
	return b.width, 0.8 * pdf.Style{Size: size}.Em(), 0.15 * pdf.Style{Size: size}.Em()
}

// Draw draws the bars with the baseline at y.
func (b bar) Draw(d *pdf.Doc, x, y, size float64) {
	em := pdf.Style{Size: size}.Em()
	mid, half := x+b.width/2, b.width/2
	white := pdf.Color{R: 255, G: 255, B: 255}
	draw := func(share float64, top float64, fill *pdf.Color) {
		if share != 0 {
			d.Rect(mid+min(0, share)*half, y-top, max(share, -share)*half, 0.42*em, fill, 0.15, pdf.Black)
		}
	}
	draw(b.up, 0.80*em, &accent)
	draw(b.down, 0.30*em, &white)
	d.Line(mid, y-0.95*em, mid, y+0.3*em, 0.15, pdf.Black)
}

// barScale stands over a column of bars: its numbers are at the ends of the
// longest bars.
type barScale struct {
	width float64
	end   string
}

// Extent is the size of the scale in mm.
func (b barScale) Extent(_ *pdf.Doc, size float64) (w, up, down float64) {
	return bar{width: b.width}.Extent(nil, size)
}

// Draw draws the scale with its baseline at y.
func (b barScale) Draw(d *pdf.Doc, x, y, size float64) {
	st := pdf.Style{Face: pdf.Bold, Size: size}
	d.Text(x, y, "−"+b.end, st)
	d.Text(x+b.width/2-d.TextWidth("0", st)/2, y, "0", st)
	d.TextRight(x+b.width, y, "+"+b.end, st)
}
