package drawing

import (
	"bufio"
	"fmt"
	"html"
	"io"
	"math"
	"strconv"
	"strings"
)

// capHeight is the height of the capitals of DejaVu Sans over its em.
const capHeight = float64(capUnits) / 2048

// SVG writes the scene as a stand-alone SVG 1.1 picture in true millimetres,
// with its title as text for those who cannot see it. The same scene always
// gives the same bytes.
func SVG(w io.Writer, s Scene) error {
	b := bufio.NewWriter(w)
	fmt.Fprintf(b, `<svg xmlns="http://www.w3.org/2000/svg" role="img" width="%smm" height="%smm" viewBox="0 0 %s %s">`+"\n",
		mm(s.W), mm(s.H), mm(s.W), mm(s.H))
	fmt.Fprintf(b, "<title>%s</title>\n", html.EscapeString(s.Title))
	b.WriteString(`<g stroke-linejoin="round" font-family="'DejaVu Sans', Verdana, 'Liberation Sans', Arial, sans-serif">` + "\n")
	for _, it := range s.Items {
		switch v := it.(type) {
		case Line:
			svgLine(b, v)
		case Area:
			svgArea(b, v)
		case Label:
			svgLabel(b, v)
		}
	}
	b.WriteString("</g>\n</svg>\n")
	return b.Flush() // a bufio.Writer keeps the first error
}

func svgLine(w io.Writer, l Line) {
	dash := ""
	if len(l.Dash) > 0 {
		list := make([]string, len(l.Dash))
		for i, d := range l.Dash {
			list[i] = mm(d)
		}
		dash = ` stroke-dasharray="` + strings.Join(list, " ") + `"`
	}
	fmt.Fprintf(w, `<line x1="%s" y1="%s" x2="%s" y2="%s" stroke="%s" stroke-width="%s"%s/>`+"\n",
		mm(l.X1), mm(l.Y1), mm(l.X2), mm(l.Y2), hex(l.Color), mm(l.Width), dash)
}

func svgArea(w io.Writer, a Area) {
	points := make([]string, len(a.X))
	for i := range a.X {
		points[i] = mm(a.X[i]) + "," + mm(a.Y[i])
	}
	fill, stroke := "none", ""
	if a.Fill != nil {
		fill = hex(*a.Fill)
	}
	if a.Width > 0 {
		stroke = fmt.Sprintf(` stroke="%s" stroke-width="%s"`, hex(a.Stroke), mm(a.Width))
	}
	fmt.Fprintf(w, `<polygon points="%s" fill="%s"%s/>`+"\n", strings.Join(points, " "), fill, stroke)
}

func svgLabel(w io.Writer, l Label) {
	anchor := map[Anchor]string{Left: "start", Centre: "middle", Right: "end"}[l.Anchor]
	extra := ""
	if l.Bold {
		extra = ` font-weight="bold"`
	}
	if l.Turn != 0 {
		extra += fmt.Sprintf(` transform="rotate(%s %s %s)"`, mm(-l.Turn), mm(l.X), mm(l.Y))
	}
	fmt.Fprintf(w, `<text x="%s" y="%s" font-size="%s" text-anchor="%s" fill="%s"%s>%s</text>`+"\n",
		mm(l.X), mm(l.Y), mm(l.Size/capHeight), anchor, hex(l.Color), extra, html.EscapeString(l.Text))
}

// mm is a number to a thousandth, without trailing zeros.
func mm(v float64) string {
	return strconv.FormatFloat(math.Round(v*1000)/1000+0, 'f', -1, 64)
}

func hex(c Color) string { return fmt.Sprintf("#%02x%02x%02x", c.R, c.G, c.B) }
