package pdf

import (
	"bytes"
	"errors"
	"net/http"

	"github.com/jung-kurt/gofpdf"

	"stillair/templates/drawing"
)

// Line draws a straight stroke; width in mm.
func (d *Doc) Line(x1, y1, x2, y2, width float64, c Color) {
	if !d.finite(x1, y1, x2, y2, width) {
		return
	}
	d.stroke(width, c)
	d.pdf.Line(x1, y1, x2, y2)
}

// Rect draws a rectangle: filled when fill is not nil, stroked when width > 0.
func (d *Doc) Rect(x, y, w, h float64, fill *Color, width float64, c Color) {
	d.Polygon([]float64{x, x + w, x + w, x}, []float64{y, y, y + h, y + h}, fill, width, c)
}

// Polygon draws a closed polygon in the same manner.
func (d *Doc) Polygon(x, y []float64, fill *Color, width float64, c Color) {
	if len(x) < 2 || len(x) != len(y) || !d.finite(x...) || !d.finite(y...) || !d.finite(width) {
		return
	}
	style := d.paint(fill, width, c)
	if style == "" {
		return
	}
	pts := make([]gofpdf.PointType, len(x))
	for i := range x {
		pts[i] = gofpdf.PointType{X: x[i], Y: y[i]}
	}
	d.pdf.Polygon(pts, style)
}

// Circle draws a circle in the same manner.
func (d *Doc) Circle(x, y, r float64, fill *Color, width float64, c Color) {
	if !d.finite(x, y, r, width) {
		return
	}
	if style := d.paint(fill, width, c); style != "" {
		d.pdf.Circle(x, y, r, style)
	}
}

// Path draws an open stroke through points with round joins.
func (d *Doc) Path(x, y []float64, width float64, c Color) {
	if len(x) < 2 || len(x) != len(y) || !d.finite(x...) || !d.finite(y...) || !d.finite(width) {
		return
	}
	d.stroke(width, c)
	d.pdf.SetLineJoinStyle("round")
	d.pdf.MoveTo(x[0], y[0])
	for i := 1; i < len(x); i++ {
		d.pdf.LineTo(x[i], y[i])
	}
	d.pdf.DrawPath("D")
	d.pdf.SetLineJoinStyle("miter")
}

func (d *Doc) paint(fill *Color, width float64, c Color) string {
	style := ""
	if fill != nil {
		d.pdf.SetFillColor(int(fill.R), int(fill.G), int(fill.B))
		style = "F"
	}
	if width > 0 {
		d.stroke(width, c)
		style += "D"
	}
	return style
}

func (d *Doc) stroke(width float64, c Color) {
	d.pdf.SetLineWidth(width)
	d.pdf.SetDrawColor(int(c.R), int(c.G), int(c.B))
}

// Scene draws a picture with its top left corner at x, y.
func (d *Doc) Scene(s drawing.Scene, x, y float64) {
	for _, it := range s.Items {
		switch it := it.(type) {
		case drawing.Line:
			d.sceneLine(it, x, y)
		case drawing.Area:
			d.Polygon(shift(it.X, x), shift(it.Y, y), it.Fill, it.Width, it.Stroke)
		case drawing.Label:
			d.sceneLabel(it, x, y)
		}
	}
}

func (d *Doc) sceneLine(l drawing.Line, x, y float64) {
	if len(l.Dash) > 0 && d.finite(l.Dash...) {
		d.pdf.SetDashPattern(l.Dash, 0)
		defer d.pdf.SetDashPattern(nil, 0)
	}
	d.Line(x+l.X1, y+l.Y1, x+l.X2, y+l.Y2, l.Width, l.Color)
}

func (d *Doc) sceneLabel(l drawing.Label, x, y float64) {
	st := Style{Size: l.Size / CapHeight / pointMM, Color: l.Color}
	if l.Bold {
		st.Face = Bold
	}
	px, py := x+l.X, y+l.Y
	if !d.finite(px, py, l.Turn, st.Size) {
		return
	}
	if l.Turn != 0 {
		d.pdf.TransformBegin()
		d.pdf.TransformRotate(l.Turn, px, py)
		defer d.pdf.TransformEnd()
	}
	w := d.TextWidth(l.Text, st)
	switch l.Anchor {
	case drawing.Centre:
		px -= w / 2
	case drawing.Right:
		px -= w
	}
	d.Text(px, py, l.Text, st)
}

// Turned draws a line of text turned counter-clockwise about its middle.
func (d *Doc) Turned(x, y, degrees float64, s string, st Style) {
	if !d.finite(x, y, degrees) {
		return
	}
	d.pdf.TransformBegin()
	d.pdf.TransformRotate(degrees, x, y)
	d.Text(x-d.TextWidth(s, st)/2, y, s, st)
	d.pdf.TransformEnd()
}

func shift(v []float64, by float64) []float64 {
	out := make([]float64, len(v))
	for i := range v {
		out[i] = v[i] + by
	}
	return out
}

// ErrLogo says that the logo is not a picture the document can hold.
var ErrLogo = errors.New("the logo is neither a PNG nor a JPEG picture that can be read")

// Logo draws the logo of the setup inside the box w by h and tells its width.
func (d *Doc) Logo(x, y, w, h float64) float64 {
	if len(d.setup.Logo) == 0 {
		return 0
	}
	kind := map[string]string{"image/png": "PNG", "image/jpeg": "JPG"}[http.DetectContentType(d.setup.Logo)]
	if kind == "" {
		d.err = errors.Join(d.err, ErrLogo)
		return 0
	}
	opt := gofpdf.ImageOptions{ImageType: kind}
	info := d.pdf.RegisterImageOptionsReader("logo", opt, bytes.NewReader(d.setup.Logo))
	if d.pdf.Err() || info == nil || info.Width() <= 0 || info.Height() <= 0 {
		d.err = errors.Join(d.err, ErrLogo)
		return 0
	}
	scale := min(w/info.Width(), h/info.Height())
	d.pdf.ImageOptions("logo", x, y, info.Width()*scale, info.Height()*scale, false, opt, 0, "")
	return info.Width() * scale
}
