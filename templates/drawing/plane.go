package drawing

import "math"

// point is a place on the paper, mm, y down.
type point struct{ x, y float64 }

func (p point) add(dx, dy float64) point { return point{p.x + dx, p.y + dy} }

// rect is an upright rectangle on the paper.
type rect struct{ x0, y0, x1, y1 float64 }

func (r rect) w() float64 { return r.x1 - r.x0 }
func (r rect) h() float64 { return r.y1 - r.y0 }

func (r rect) centre() point { return point{(r.x0 + r.x1) / 2, (r.y0 + r.y1) / 2} }

func (r rect) grown(d float64) rect { return rect{r.x0 - d, r.y0 - d, r.x1 + d, r.y1 + d} }

func (r rect) moved(dx, dy float64) rect {
	return rect{r.x0 + dx, r.y0 + dy, r.x1 + dx, r.y1 + dy}
}

func (r rect) meets(o rect) bool {
	return r.x0 < o.x1 && o.x0 < r.x1 && r.y0 < o.y1 && o.y0 < r.y1
}

func (r rect) union(o rect) rect {
	return rect{min(r.x0, o.x0), min(r.y0, o.y0), max(r.x1, o.x1), max(r.y1, o.y1)}
}

func (r rect) corners() []point {
	return []point{{r.x0, r.y0}, {r.x1, r.y0}, {r.x1, r.y1}, {r.x0, r.y1}}
}

// segment is a straight piece of line.
type segment struct{ a, b point }

func (s segment) length() float64 { return math.Hypot(s.b.x-s.a.x, s.b.y-s.a.y) }

// at is the point a fraction t along the segment.
func (s segment) at(t float64) point {
	return point{s.a.x + t*(s.b.x-s.a.x), s.a.y + t*(s.b.y-s.a.y)}
}

// crosses tells whether two segments meet.
func (s segment) crosses(o segment) bool {
	side := func(p, q, r point) float64 { return (q.x-p.x)*(r.y-p.y) - (q.y-p.y)*(r.x-p.x) }
	return side(s.a, s.b, o.a)*side(s.a, s.b, o.b) <= 0 && side(o.a, o.b, s.a)*side(o.a, o.b, s.b) <= 0 &&
		s.bounds().grown(1e-9).meets(o.bounds().grown(1e-9))
}

func (s segment) bounds() rect {
	return rect{min(s.a.x, s.b.x), min(s.a.y, s.b.y), max(s.a.x, s.b.x), max(s.a.y, s.b.y)}
}

// touches tells whether the segment enters a rectangle.
func (s segment) touches(r rect) bool {
	if max(s.a.x, s.b.x) < r.x0 || min(s.a.x, s.b.x) > r.x1 || max(s.a.y, s.b.y) < r.y0 || min(s.a.y, s.b.y) > r.y1 {
		return false
	}
	_, ok := s.within(r.corners())
	return ok
}

// within is the part of the segment inside a convex polygon (Cyrus & Beck
// 1978 clipping by half planes).
func (s segment) within(poly []point) (segment, bool) {
	turn := 1.0
	if signedArea(poly) < 0 {
		turn = -1
	}
	lo, hi := 0.0, 1.0
	for i, p := range poly {
		q := poly[(i+1)%len(poly)]
		side := func(r point) float64 { return turn * ((q.x-p.x)*(r.y-p.y) - (q.y-p.y)*(r.x-p.x)) }
		a, b := side(s.a), side(s.b)
		switch {
		case a < 0 && b < 0:
			return segment{}, false
		case a < 0:
			lo = math.Max(lo, a/(a-b))
		case b < 0:
			hi = math.Min(hi, a/(a-b))
		}
	}
	return segment{s.at(lo), s.at(hi)}, lo < hi
}

func signedArea(poly []point) float64 {
	sum := 0.0
	for i, p := range poly {
		q := poly[(i+1)%len(poly)]
		sum += p.x*q.y - q.x*p.y
	}
	return sum / 2
}

func boundsOf(poly []point) rect {
	r := rect{math.Inf(1), math.Inf(1), math.Inf(-1), math.Inf(-1)}
	for _, p := range poly {
		r = r.union(rect{p.x, p.y, p.x, p.y})
	}
	return r
}

// arc lists points of an ellipse about c with half axes rx and ry from one
// angle to another (degrees, clockwise on the paper from the x axis).
func arc(c point, rx, ry, from, to float64) []point {
	n := max(8, int(math.Abs(to-from)/5))
	pts := make([]point, n+1)
	for i := range pts {
		sin, cos := math.Sincos((from + (to-from)*float64(i)/float64(n)) * math.Pi / 180)
		pts[i] = point{c.x + rx*cos, c.y + ry*sin}
	}
	return pts
}

// circle is a closed ring of points.
func circle(c point, r float64) []point {
	pts := arc(c, r, r, 0, 360)
	return pts[:len(pts)-1]
}

// hatchLines are the 45° lines (or 135°) at the given spacing within the
// bounds of a shape, to be cut by it.
func hatchLines(b rect, spacing float64, back bool) []segment {
	var list []segment
	if b.w()+b.h() > 4000 || spacing <= 0 { // far off any paper
		return nil
	}
	for d := spacing / 2; d < b.w()+b.h(); d += spacing {
		s := segment{point{b.x0 + d, b.y0}, point{b.x0 + d - b.h(), b.y1}}
		if back {
			s = segment{point{b.x0 + d - b.h(), b.y0}, point{b.x0 + d, b.y1}}
		}
		list = append(list, s)
	}
	return list
}

// outsideCircle is what remains of a segment outside a circle.
func outsideCircle(s segment, c point, r float64) []segment {
	l := s.length()
	if l == 0 {
		return nil
	}
	ux, uy := (s.b.x-s.a.x)/l, (s.b.y-s.a.y)/l
	along := (c.x-s.a.x)*ux + (c.y-s.a.y)*uy
	off := math.Abs((c.x-s.a.x)*uy - (c.y-s.a.y)*ux)
	if off >= r {
		return []segment{s}
	}
	half := math.Sqrt(r*r - off*off)
	var left []segment
	if t := (along - half) / l; t > 0 {
		left = append(left, segment{s.a, s.at(math.Min(t, 1))})
	}
	if t := (along + half) / l; t < 1 {
		left = append(left, segment{s.at(math.Max(t, 0)), s.b})
	}
	return left
}
