package geometry

import (
	"math"
	"testing"
)

func near(t *testing.T, what string, got, want, rel float64) {
	t.Helper()
	if math.Abs(got-want) > rel*math.Abs(want) {
		t.Errorf("%s = %.6g, want %.6g within %.2g", what, got, want, rel)
	}
}

// Exact areas of bodies whose surface is known in closed form.
func TestAreasAreThoseOfTheSolid(t *testing.T) {
	sum := func(parts []Part) float64 {
		a := 0.0
		for _, p := range parts {
			a += p.Face.Area
		}
		return a
	}
	near(t, "box 0.8 x 1.0 x 0.3", sum(Box(0.8, 1.0, 0.3, Stack{})), 2*(0.8*1.0+0.8*0.3+1.0*0.3), 1e-12)
	near(t, "plate both faces", sum(Plate(0.5, 0.3, 20, Stack{})), 2*0.15, 1e-12)
	near(t, "cylinder with ends", sum(Cylinder(0.1, 0.5, true, true, Stack{})), math.Pi*0.1*0.5+2*math.Pi/4*0.01, 1e-12)
	near(t, "sphere", sum(Ball(0.2, Stack{})), math.Pi*0.04, 1e-12)
}

// A box grows by its layers on all sides; a wall stays within the stated size.
func TestLayersGrowTheBodyWallsDoNot(t *testing.T) {
	bare := Box(1, 1, 1, Stack{Wall: 0.01})[0]
	lagged := Box(1, 1, 1, Stack{Wall: 0.01, Layers: []float64{0.05, 0.02}})[0]
	near(t, "bare front", bare.Face.Area, 1, 1e-12)
	near(t, "inside of the front", bare.Inside.Area, 0.98*0.98, 1e-12)
	near(t, "lagged front", lagged.Face.Area, 1.14*1.14, 1e-12)
	if len(lagged.Slabs) != 3 {
		t.Errorf("%d slabs, want wall and two layers", len(lagged.Slabs))
	}
	near(t, "mean area of the first layer", lagged.Slabs[1].Area, (1+1.1*1.1)/2, 1e-12)
	pipe := Cylinder(0.1143, 1, true, false, Stack{Layers: []float64{0.04}})
	near(t, "lagged pipe diameter", pipe[0].Face.Diameter, 0.1943, 1e-12)
}

func TestFacingAndTilt(t *testing.T) {
	p := Plate(1, 1, 30, Stack{})
	if p[0].Face.Facing != 60 || p[1].Face.Facing != 120 {
		t.Errorf("a front turned up by 30 degrees faces %g and %g", p[0].Face.Facing, p[1].Face.Facing)
	}
	near(t, "tilt of the back", p[1].Face.FromVertical(), 30, 1e-12)
	top := Box(1, 1, 1, Stack{})[4]
	if top.Face.Facing != 0 || top.Inside.Facing != 180 {
		t.Errorf("the top faces %g outside and %g inside", top.Face.Facing, top.Inside.Facing)
	}
}

// A/P of a 0.6 m square plate is 0.15 m: Cengel & Ghajar, Heat and Mass
// Transfer, 5th ed. 2015, Example 9-2(b). A disc has D/4: Gavhane, Heat
// Transfer, Example 3.34 (open re-typed copy).
func TestAreaOverPerimeter(t *testing.T) {
	near(t, "square", Plate(0.6, 0.6, 90, Stack{})[0].Face.AreaOverPerimeter(), 0.15, 1e-12)
	near(t, "disc", disc("d", 0.16, 0).AreaOverPerimeter(), 0.04, 1e-12)
	near(t, "dished head like its rim", Vessel(0.16, 1, false, true, Stack{})[1].Face.AreaOverPerimeter(), 0.04, 1e-12)
}

// The shape factor of each curvature tends to the plane one for thin layers,
// and reproduces the closed forms.
func TestSlabFactor(t *testing.T) {
	cyl := Slab{Curvature: CylinderWall, Thickness: 0.04, Inner: 0.05715, Outer: 0.09715, Length: 1}
	near(t, "cylinder", cyl.Factor(), 2*math.Pi/math.Log(0.09715/0.05715), 1e-12)
	sph := Slab{Curvature: SphereWall, Thickness: 0.1, Inner: 0.2, Outer: 0.3}
	near(t, "sphere", sph.Factor(), 4*math.Pi/(1/0.2-1/0.3), 1e-12)
	thin := Slab{Curvature: CylinderWall, Thickness: 1e-9, Inner: 0.05, Outer: 0.05 + 1e-9, Length: 1}
	near(t, "thin cylinder", thin.Factor(), 2*math.Pi*0.05/1e-9, 1e-7)
}

// The constant 1.084 D² is common practice of vessel makers (no single
// source); the integral of the surface of revolution is done here by
// Simpson's rule as an independent check of the closed form.
func TestDishArea(t *testing.T) {
	near(t, "1.084 D²", DishArea(1), 1.084, 1e-3)
	const n = 20000
	a, b := 0.5, 0.25
	sum := 0.0
	for i := 0; i <= n; i++ {
		u := math.Pi / 2 * float64(i) / n
		w := 2.0 + 2*float64(i%2)
		if i == 0 || i == n {
			w = 1
		}
		ds := math.Hypot(a*math.Sin(u), b*math.Cos(u))
		sum += w * 2 * math.Pi * a * math.Cos(u) * ds
	}
	near(t, "surface of revolution", DishArea(1), sum*math.Pi/2/n/3, 1e-8)
}

// Two-layer lagged pipe: r 44, 94, 124 mm; k 0.087 and 0.064 W/(m·K); 623 K to
// 313 K; 149.2 W/m. Gavhane, Heat Transfer, Example 2.3 (open re-typed copy of
// the book's worked example).
func TestTwoLayerPipePublished(t *testing.T) {
	layers := Cylinder(0.088, 1, true, false, Stack{Layers: []float64{0.050, 0.030}})[0].Slabs
	r := 1/(0.087*layers[0].Factor()) + 1/(0.064*layers[1].Factor())
	near(t, "heat per metre", (623.0-313)/r, 149.2, 0.002)
}

// Steam pipe with 30 mm of insulation between given films: inner film 60, outer
// film 18 W/(m²·K), wall k 80, insulation k 0.05 W/(m·K), 320 °C to 5 °C:
// 120.8 W/m. Cengel, Example 3-8 (open re-typed copy of the worked example).
func TestInsulatedSteamPipePublished(t *testing.T) {
	p := Cylinder(0.055, 1, true, false, Stack{Wall: 0.0025, Layers: []float64{0.03}})[0]
	r := 1/(60*math.Pi*0.05) + 1/(80*p.Slabs[0].Factor()) + 1/(0.05*p.Slabs[1].Factor()) + 1/(18*p.Face.Area)
	near(t, "heat per metre", (320.0-5)/r, 120.8, 0.001)
}
