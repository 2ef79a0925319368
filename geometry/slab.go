package geometry

import "math"

// Curvature says how the heat spreads on its way through a layer.
type Curvature int

// The three shapes of a layer.
const (
	Plane Curvature = iota
	CylinderWall
	SphereWall
)

// Slab is one layer of solid crossed by the heat from its inner to its outer
// side.
type Slab struct {
	Curvature    Curvature
	Thickness    float64 // m
	Area         float64 // m², plane: mean of the inner and the outer side
	Length       float64 // m, cylinder
	Inner, Outer float64 // m, radii of cylinder and sphere
}

// Factor is the shape factor S of the layer in metres: with a conductivity
// that depends on temperature the heat is Q = S ∫ k dT between both sides.
//
//	plane     S = A/t
//	cylinder  S = 2 π L / ln(r2/r1)
//	sphere    S = 4 π r1 r2 / (r2 - r1)
//
// Source: Fourier's law integrated over the layer; in every heat transfer
// textbook, e.g. Incropera et al., Fundamentals of Heat and Mass Transfer,
// 6th ed. 2007, Table 3.3.
func (s Slab) Factor() float64 {
	switch s.Curvature {
	case CylinderWall:
		return 2 * math.Pi * s.Length / math.Log1p(s.Thickness/s.Inner)
	case SphereWall:
		return 4 * math.Pi * s.Inner * s.Outer / s.Thickness
	}
	return s.Area / s.Thickness
}
