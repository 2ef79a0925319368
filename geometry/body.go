package geometry

import "math"

// Part is one way out of a body: the layers the heat passes and the face that
// sheds it. Inside is the same part seen by the air within a box.
type Part struct {
	Face   Face
	Inside Face
	Slabs  []Slab // from the inside out; empty when no wall is modelled
}

// Stack lists the layers of a body. The wall lies within the stated size of
// the bare body, the layers are added on its outside. All in metres.
type Stack struct {
	Wall   float64 // 0: not modelled
	Layers []float64
}

// Total is the thickness added on the outside of the bare body.
func (s Stack) Total() float64 {
	t := 0.0
	for _, l := range s.Layers {
		t += l
	}
	return t
}

// eachLayer calls f with the thickness and the distance of both sides of each
// layer from the outside of the bare body, positive outwards.
func (s Stack) eachLayer(f func(t, inner, outer float64)) {
	if s.Wall > 0 {
		f(s.Wall, -s.Wall, 0)
	}
	at := 0.0
	for _, t := range s.Layers {
		f(t, at, at+t)
		at += t
	}
}

// plane makes the slabs of a flat part whose area is area(d) at the distance d
// outside the bare body.
func (s Stack) plane(area func(d float64) float64) []Slab {
	var slabs []Slab
	s.eachLayer(func(t, in, out float64) {
		slabs = append(slabs, Slab{Curvature: Plane, Thickness: t, Area: (area(in) + area(out)) / 2})
	})
	return slabs
}

func (s Stack) cylinder(radius, length float64) []Slab {
	var slabs []Slab
	s.eachLayer(func(t, in, out float64) {
		slabs = append(slabs, Slab{Curvature: CylinderWall, Thickness: t, Length: length, Inner: radius + in, Outer: radius + out})
	})
	return slabs
}

func (s Stack) sphere(radius float64) []Slab {
	var slabs []Slab
	s.eachLayer(func(t, in, out float64) {
		slabs = append(slabs, Slab{Curvature: SphereWall, Thickness: t, Inner: radius + in, Outer: radius + out})
	})
	return slabs
}

// rectangle is a flat face of the given width and height (along the slope).
func rectangle(name string, width, height, facing float64) Face {
	return Face{
		Name: name, Shape: Flat, Facing: facing,
		Area: width * height, Perimeter: 2 * (width + height),
		Width: width, Height: height,
	}
}

// disc is a flat round face. Standing upright its height for the rising air is
// the mean chord π D/4 (area over diameter; common practice, no source).
func disc(name string, diameter, facing float64) Face {
	return Face{
		Name: name, Shape: Flat, Facing: facing,
		Area: math.Pi / 4 * diameter * diameter, Perimeter: math.Pi * diameter,
		Width: diameter, Height: math.Pi / 4 * diameter, Diameter: diameter,
	}
}

// Plate is a thin plate of width and height (along its slope) with both faces;
// tilt is its angle from the vertical in degrees, positive when the front
// turns up. The edges are left out. The layers lie on both faces.
func Plate(width, height, tilt float64, s Stack) []Part {
	area := func(float64) float64 { return width * height }
	faces := []Face{
		rectangle("front", width, height, 90-tilt),
		rectangle("back", width, height, 90+tilt),
	}
	var parts []Part
	for _, f := range faces {
		parts = append(parts, Part{Face: f, Slabs: s.plane(area)})
	}
	return parts
}

// Box is a cuboid with six faces named front, back, left, right, top, bottom.
// width, height and depth are the outside of the bare box.
func Box(width, height, depth float64, s Stack) []Part {
	type side struct {
		name   string
		w, h   float64
		facing float64
	}
	sides := []side{
		{"front", width, height, 90}, {"back", width, height, 90},
		{"left", depth, height, 90}, {"right", depth, height, 90},
		{"top", width, depth, 0}, {"bottom", width, depth, 180},
	}
	grow := 2 * s.Total()
	var parts []Part
	for _, v := range sides {
		area := func(d float64) float64 { return (v.w + 2*d) * (v.h + 2*d) }
		parts = append(parts, Part{
			Face:   rectangle(v.name, v.w+grow, v.h+grow, v.facing),
			Inside: rectangle(v.name, v.w-2*s.Wall, v.h-2*s.Wall, v.facing).Reversed(),
			Slabs:  s.plane(area),
		})
	}
	return parts
}

// Cylinder is a solid or hollow cylinder of the given outside diameter and
// length. With ends it has three faces (side and two ends), without only its
// side. The ring where the layers of side and end meet is left out.
func Cylinder(diameter, length float64, horizontal, ends bool, s Stack) []Part {
	parts := []Part{cylinderSide("side", diameter, length, horizontal, s)}
	if !ends {
		return parts
	}
	for _, e := range endFaces("top", "bottom", "left end", "right end", horizontal) {
		parts = append(parts, flatEnd(e.name, diameter, e.facing, s))
	}
	return parts
}

// Vessel is a cylinder of the given diameter and straight shell length closed
// by two heads, flat or dished.
func Vessel(diameter, length float64, horizontal, dished bool, s Stack) []Part {
	parts := []Part{cylinderSide("shell", diameter, length, horizontal, s)}
	for _, e := range endFaces("top head", "bottom head", "left head", "right head", horizontal) {
		if dished {
			parts = append(parts, dishedEnd(e.name, diameter, e.facing, s))
		} else {
			parts = append(parts, flatEnd(e.name, diameter, e.facing, s))
		}
	}
	return parts
}

// Ball is a sphere of the given outside diameter.
func Ball(diameter float64, s Stack) []Part {
	d := diameter + 2*s.Total()
	return []Part{{
		Face:  Face{Name: "surface", Shape: Spherical, Area: math.Pi * d * d, Diameter: d, Height: d},
		Slabs: s.sphere(diameter / 2),
	}}
}

func cylinderSide(name string, diameter, length float64, horizontal bool, s Stack) Part {
	d := diameter + 2*s.Total()
	f := Face{Name: name, Shape: VerticalCylinder, Area: math.Pi * d * length, Height: length, Diameter: d}
	if horizontal {
		f.Shape, f.Height, f.Width = HorizontalCylinder, d, length
	}
	return Part{Face: f, Slabs: s.cylinder(diameter/2, length)}
}

type end struct {
	name   string
	facing float64
}

func endFaces(top, bottom, left, right string, horizontal bool) []end {
	if horizontal {
		return []end{{left, 90}, {right, 90}}
	}
	return []end{{top, 0}, {bottom, 180}}
}

func flatEnd(name string, diameter, facing float64, s Stack) Part {
	area := func(d float64) float64 { return math.Pi / 4 * (diameter + 2*d) * (diameter + 2*d) }
	return Part{Face: disc(name, diameter+2*s.Total(), facing), Slabs: s.plane(area)}
}

func dishedEnd(name string, diameter, facing float64, s Stack) Part {
	area := func(d float64) float64 { return DishArea(diameter + 2*d) }
	f := disc(name, diameter+2*s.Total(), facing)
	f.Area = DishArea(diameter + 2*s.Total())
	return Part{Face: f, Slabs: s.plane(area)}
}

// DishArea is the surface of one 2:1 semi-ellipsoidal head in m²: half an
// oblate spheroid with semi-axes D/2 and D/4,
//
//	A = π (D/2)² [1 + (1-e²)/e · artanh e],  e = √3/2,  that is 1.084 D².
//
// Source: surface of the oblate spheroid, e.g. Bronshtein & Semendyayev,
// Handbook of Mathematics (formula from memory; the 1.084 D² is common
// practice of vessel makers).
func DishArea(diameter float64) float64 {
	e := math.Sqrt(3) / 2
	return math.Pi / 4 * diameter * diameter * (1 + 0.25/e*math.Atanh(e))
}
