// Package geometry turns bodies into the faces that shed their heat and the
// layers the heat passes on its way there: areas, directions, characteristic
// dimensions. It knows nothing of temperatures. Lengths are in metres, areas
// in square metres, angles in degrees.
//
// Out of scope: gaps, channels, fins, view factors between faces.
package geometry

import "math"

// Shape says how air meets a face.
type Shape int

// The shapes of face a body is made of.
const (
	Flat               Shape = iota // plane rectangle or disc at any tilt
	HorizontalCylinder              // curved side of a cylinder lying down
	VerticalCylinder                // curved side of a cylinder standing up
	Spherical                       // the whole of a sphere
)

var shapeNames = [...]string{"flat", "horizontal cylinder", "vertical cylinder", "sphere"}

// String is the name of the shape in plain words.
func (s Shape) String() string { return shapeNames[s] }

// Face is one isothermal surface in still air.
type Face struct {
	Name  string
	Shape Shape

	// Facing is the angle between the outward normal and straight up, in
	// degrees: 0 faces up, 90 is vertical, 180 faces down. Flat faces only.
	Facing float64

	Area      float64 // m², the surface that sheds heat
	Perimeter float64 // m, of a flat face
	Height    float64 // m, along the rise of the air: height, slope length, cylinder length when vertical
	Width     float64 // m, across it
	Diameter  float64 // m, of a cylinder, a sphere or a disc
}

// FromVertical is the tilt of a flat face away from the vertical, in degrees,
// 0 (vertical) to 90 (horizontal).
func (f Face) FromVertical() float64 { return math.Abs(90 - f.Facing) }

// AreaOverPerimeter is the length A/P of a flat face, in metres. A/P is taken
// of the flat projection, so a dished head uses its rim circle.
func (f Face) AreaOverPerimeter() float64 {
	if f.Diameter > 0 && f.Shape == Flat {
		return f.Diameter / 4
	}
	return f.Area / f.Perimeter
}

// Reversed is the same face seen from its other side: a top seen from inside
// the box faces down.
func (f Face) Reversed() Face {
	f.Facing = 180 - f.Facing
	return f
}
