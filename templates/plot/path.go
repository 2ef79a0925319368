package plot

import (
	"math"

	"gonum.org/v1/plot/vg"
)

// affine maps points of the user of the canvas to mm of the scene:
// X = xx x + xy y + x, Y = yx x + yy y + y.
type affine struct{ xx, xy, yx, yy, x, y float64 }

// after is the transformation that does b first and then a.
func (a affine) after(b affine) affine {
	return affine{
		xx: a.xx*b.xx + a.xy*b.yx, xy: a.xx*b.xy + a.xy*b.yy, x: a.xx*b.x + a.xy*b.y + a.x,
		yx: a.yx*b.xx + a.yy*b.yx, yy: a.yx*b.xy + a.yy*b.yy, y: a.yx*b.x + a.yy*b.y + a.y,
	}
}

func (a affine) apply(p vg.Point) vg.Point {
	x, y := float64(p.X), float64(p.Y)
	return vg.Point{X: vg.Length(a.xx*x + a.xy*y + a.x), Y: vg.Length(a.yx*x + a.yy*y + a.y)}
}

// scale is how much longer a length becomes, the mean of both directions.
func (a affine) scale() float64 { return math.Sqrt(math.Abs(a.xx*a.yy - a.xy*a.yx)) }

// flattener turns a path into runs of straight pieces in mm.
type flattener struct {
	at   affine
	runs [][]vg.Point
	last vg.Point // before the transformation
}

// flatten gives the parts of a path, each a run of points in mm. A closed part
// ends where it began. Parts with a coordinate that is not finite are left out.
func (r *Recorder) flatten(p vg.Path) [][]vg.Point {
	f := flattener{at: r.now.at}
	for _, c := range p {
		f.add(c)
	}
	var good [][]vg.Point
	for _, run := range f.runs {
		x, y := coordinates(run)
		if len(run) > 1 && finite(x...) && finite(y...) {
			good = append(good, run)
		}
	}
	return good
}

func (f *flattener) add(c vg.PathComp) {
	switch c.Type {
	case vg.MoveComp:
		f.runs = append(f.runs, nil)
		f.lineTo(c.Pos)
	case vg.LineComp:
		f.lineTo(c.Pos)
	case vg.ArcComp:
		f.arc(c)
	case vg.CurveComp:
		f.curve(c)
	case vg.CloseComp:
		f.close()
	}
}

func (f *flattener) lineTo(p vg.Point) {
	if len(f.runs) == 0 {
		f.runs = append(f.runs, nil)
	}
	n := len(f.runs) - 1
	q := f.at.apply(p)
	if run := f.runs[n]; len(run) == 0 || run[len(run)-1] != q {
		f.runs[n] = append(run, q)
	}
	f.last = p
}

func (f *flattener) close() {
	if n := len(f.runs) - 1; n >= 0 && len(f.runs[n]) > 1 {
		if first := f.runs[n][0]; f.runs[n][len(f.runs[n])-1] != first {
			f.runs[n] = append(f.runs[n], first)
		}
	}
}

// arc joins a part of a circle to the path by a straight line. A chord over
// the angle a is r (1 - cos a/2) off its arc.
func (f *flattener) arc(c vg.PathComp) {
	radius := float64(c.Radius) * f.at.scale()
	n := 4.0
	if radius > flatness && finite(radius, c.Angle) {
		n = math.Abs(c.Angle) / (2 * math.Acos(1-flatness/radius))
	}
	steps := int(math.Ceil(min(max(n, 4), 720)))
	for i := range steps {
		f.lineTo(onCircle(c, float64(i)/float64(steps)))
	}
	end := 1.0
	if math.Abs(math.Abs(c.Angle)-2*math.Pi) < 1e-9 {
		end = 0 // the first point again, to the last bit
	}
	f.lineTo(onCircle(c, end))
}

func onCircle(c vg.PathComp, part float64) vg.Point {
	sin, cos := math.Sincos(c.Start + part*c.Angle)
	return vg.Point{X: c.Pos.X + c.Radius*vg.Length(cos), Y: c.Pos.Y + c.Radius*vg.Length(sin)}
}

// curve is a Bézier curve of degree two or three.
func (f *flattener) curve(c vg.PathComp) {
	if len(c.Control) == 0 {
		f.lineTo(c.Pos)
		return
	}
	pts := append(append([]vg.Point{f.last}, c.Control...), c.Pos)
	steps := f.pieces(pts)
	for i := 1; i <= steps; i++ {
		f.lineTo(casteljau(pts, vg.Length(i)/vg.Length(steps)))
	}
}

// pieces is how many straight pieces keep a Bézier curve of degree d within
// flatness: n² = d (d-1)/8 · largest second difference of its points/flatness.
func (f *flattener) pieces(pts []vg.Point) int {
	bend := 0.0
	for i := 2; i < len(pts); i++ {
		x := float64(pts[i].X - 2*pts[i-1].X + pts[i-2].X)
		y := float64(pts[i].Y - 2*pts[i-1].Y + pts[i-2].Y)
		bend = math.Max(bend, math.Hypot(x, y))
	}
	d := float64(len(pts) - 1)
	n := math.Sqrt(d * (d - 1) / 8 * bend * f.at.scale() / flatness)
	if !finite(n) {
		return 1
	}
	return int(math.Ceil(min(max(n, 1), 720)))
}

// casteljau is the point of a Bézier curve at t by repeated interpolation.
func casteljau(pts []vg.Point, t vg.Length) vg.Point {
	p := append([]vg.Point(nil), pts...)
	for n := len(p) - 1; n > 0; n-- {
		for i := range n {
			p[i] = between(p[i], p[i+1], t)
		}
	}
	return p[0]
}
