package freeconv

import (
	"math"

	"stillair/freeconv/fluid"
	"stillair/geometry"
)

// alignment is the angle, in degrees, within which a face counts as exactly
// vertical or horizontal.
const alignment = 0.01

// part is one law in the situation it is used for.
type part struct {
	kind Kind
	c    *Correlation
}

// result is one law applied to a face: numbers only, so that a solver can ask
// for thousands of them.
type result struct {
	part
	in           Input
	length       float64
	sized        bool // the face has the length the law asks for
	g            float64
	tProps, beta float64 // K, 1/K
	props        fluid.Properties
	gr, nu, h    float64
}

// outcome is the result that counts, and for a rule the one that gave way.
type outcome struct {
	kind    Kind
	method  *Correlation // record asked for or default: a law or a rule
	asked   bool
	governs result
	other   result // of a rule only
}

// HeatCoefficient is the coefficient of free convection h on the face in
// W/(m²·K), the same number as Evaluate gives, without the record around it.
// It is finite and not negative for any input; it allocates nothing.
func HeatCoefficient(f geometry.Face, s State, choice Choice) float64 {
	return solve(&f, &s, choice).governs.h
}

// KindOf is the situation of a face whose surface is dT kelvin above the air.
// A hot face turned up and a cold face turned down are on the unstable side.
// A face within 0.01 degrees of the vertical or the horizontal is exactly that.
func KindOf(f geometry.Face, dT float64) Kind {
	switch f.Shape {
	case geometry.HorizontalCylinder:
		return HorizontalCylinder
	case geometry.VerticalCylinder:
		return VerticalCylinder
	case geometry.Spherical:
		return Sphere
	}
	tilt := f.FromVertical()
	unstable := (f.Facing < 90) == (dT >= 0)
	switch {
	case tilt <= alignment:
		return VerticalPlate
	case tilt >= 90-alignment && unstable:
		return PlateUp
	case tilt >= 90-alignment:
		return PlateDown
	case unstable:
		return InclinedUp
	}
	return InclinedDown
}

// solve finds the situation, picks the method and applies it.
func solve(f *geometry.Face, s *State, choice Choice) outcome {
	st := tidy(s)
	kind := KindOf(*f, st.DT)
	method, asked := pick(kind, choice)
	out := outcome{kind: kind, method: method, asked: asked}
	if !method.IsRule() {
		out.governs = apply(part{kind, method}, f, &st, nil)
		return out
	}
	first, second := method.parts(choice)
	a := apply(first, f, &st, nil)
	b := apply(second, f, &st, &a)
	if b.h > a.h {
		a, b = b, a
	}
	out.governs, out.other = a, b
	return out
}

// tidy puts air where no gas is named and zero where a temperature is no number.
func tidy(s *State) State {
	st := *s
	if st.Gas == nil {
		st.Gas = fluid.Air
	}
	if math.IsNaN(st.DT) || math.IsInf(st.DT, 0) {
		st.DT = 0
	}
	if math.IsNaN(st.Ta) {
		st.Ta = 0
	}
	return st
}

// apply evaluates one law on a face. Properties are taken over from like when
// it stands at the same temperature.
func apply(p part, f *geometry.Face, s *State, like *result) result {
	r := result{part: p}
	r.length, r.sized = lengthOf(p.c.Length, f)
	r.in = Input{Pr: 0, LD: slenderness(f), Theta: tiltOf(p.kind, f), AP: edgeRatio(f)}
	r.g = gravity(p, f)
	r.tProps = s.Ta + p.c.FilmWeight*s.DT
	if like != nil && like.tProps == r.tProps {
		r.props = like.props
	} else {
		r.props = s.Gas.At(r.tProps, s.P)
	}
	r.beta = 1 / math.Max(s.Ta+p.c.BetaWeight*s.DT, 1)
	pr := &r.props
	r.gr = r.g * r.beta * math.Abs(s.DT) * r.length * r.length * r.length / (pr.Nu * pr.Nu)
	r.in.Pr = pr.Pr
	r.in.Ra = r.gr * pr.Pr
	r.nu = p.c.Nu(r.in)
	r.h = r.nu * pr.K / r.length
	return r
}

// gravity is the component of g that drives the law: along the plate for a
// vertical law on an inclined plate, across it for a horizontal law.
func gravity(p part, f *geometry.Face) float64 {
	if f.Shape != geometry.Flat || p.kind != VerticalPlate && !p.c.CosG && p.kind != PlateUp && p.kind != PlateDown {
		return StandardGravity
	}
	tilt := f.FromVertical()
	if tilt <= alignment || tilt >= 90-alignment {
		return StandardGravity
	}
	sin, cos := math.Sincos(tilt * math.Pi / 180)
	if p.kind == PlateUp || p.kind == PlateDown {
		return StandardGravity * sin
	}
	return StandardGravity * cos
}

// tiltOf is the tilt from the vertical that enters an inclined law.
func tiltOf(k Kind, f *geometry.Face) float64 {
	if k == InclinedUp || k == InclinedDown {
		return f.FromVertical()
	}
	return 0
}

// slenderness is height over diameter of a vertical cylinder.
func slenderness(f *geometry.Face) float64 {
	if f.Shape != geometry.VerticalCylinder || !(f.Diameter > 0) {
		return 0
	}
	return f.Height / f.Diameter
}

// edgeRatio is A/P over the slope length of a flat face.
func edgeRatio(f *geometry.Face) float64 {
	if f.Shape != geometry.Flat || !(f.Height > 0) {
		return 0
	}
	return f.AreaOverPerimeter() / f.Height
}

// lengthOf is the characteristic length of a face in m, and whether the face
// has it. A face without it is measured by the square root of its area, or by
// 1 m if it has no area either.
func lengthOf(rule Length, f *geometry.Face) (length float64, sized bool) {
	if l := ruledLength(rule, f); l > 0 && !math.IsInf(l, 0) {
		return l, true
	}
	if l := math.Sqrt(f.Area); l > 0 && !math.IsInf(l, 0) {
		return l, false
	}
	return 1, false
}

func ruledLength(rule Length, f *geometry.Face) float64 {
	disc := f.Shape == geometry.Flat && f.Diameter > 0
	switch rule {
	case Height:
		if disc && !(f.Height > 0) {
			return f.Diameter
		}
		return f.Height
	case AreaOverPerimeter:
		return f.AreaOverPerimeter()
	case Diameter:
		return f.Diameter
	case MeanSide:
		if disc {
			return 0.9 * f.Diameter
		}
		return (f.Height + f.Width) / 2
	case ShortSide:
		if disc {
			return f.Diameter
		}
		return math.Min(f.Height, f.Width)
	}
	return math.Sqrt(f.Area)
}
