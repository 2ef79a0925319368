package freeconv_test

import (
	"fmt"
	"math"

	"stillair/freeconv"
	"stillair/freeconv/fluid"
	"stillair/geometry"
)

// Y. A. Cengel, A. J. Ghajar, Heat and Mass Transfer, 5th ed. 2015, Example 9-1
// (seen in print): a hot-water pipe of 8 cm at 70 °C in a room at 20 °C. The
// book finds h = 5.87 W/(m²·K) with its own table of air, whose conductivity
// lies 3 % below the newer equations used here; see TestBooksWithOurAir.
func ExampleEvaluate() {
	pipe := geometry.Face{Name: "pipe", Shape: geometry.HorizontalCylinder, Diameter: 0.08, Width: 6, Area: math.Pi * 0.08 * 6}
	film := freeconv.Evaluate(pipe, freeconv.State{Gas: fluid.Air, P: 101325, Ts: 343.15, Ta: 293.15, DT: 50}, nil)
	fmt.Println(film.Method.Name)
	fmt.Println(film.LengthText)
	fmt.Printf("h = %.0f W/(m²·K), %s\n", film.H, film.Regime)
	// Output:
	// Churchill & Chu 1975, horizontal cylinder, all Ra
	// diameter = 0.0800 m
	// h = 6 W/(m²·K), laminar
}

// Y. A. Cengel, A. J. Ghajar, Heat and Mass Transfer, 5th ed. 2015, Example 9-2(a)
// (seen in print): a plate of 0.6 m standing upright at 90 °C in a room at
// 30 °C. The book finds Nu = 113.3 at Ra = 7.649e8 and Pr = 0.7202.
func ExampleFind() {
	law, ok := freeconv.Find("churchill-chu-1975-plate")
	fmt.Println(ok)
	fmt.Printf("Nu = %.1f\n", law.Nu(freeconv.Input{Ra: 7.649e8, Pr: 0.7202}))
	// Output:
	// true
	// Nu = 113.3
}

// The same plate lying with its hot face down, Example 9-2(c) of the same book:
// A/P = 0.15 m. The book takes the older law and finds h = 3.0 W/(m²·K).
func ExampleHeatCoefficient() {
	plate := geometry.Face{Facing: 180, Height: 0.6, Width: 0.6, Area: 0.36, Perimeter: 2.4}
	state := freeconv.State{Gas: fluid.Air, P: 101325, Ts: 363.15, Ta: 303.15, DT: 60}
	h := freeconv.HeatCoefficient(plate, state, freeconv.Choice{freeconv.PlateDown: "mcadams-1954-down"})
	fmt.Printf("h = %.1f W/(m²·K)\n", h)
	// Output: h = 3.0 W/(m²·K)
}

// The equation of the note, as published and with numbers (Example 9-1 of the
// same book: Ra = 1.867e6, Pr = 0.7241, Nu = 17.39).
func ExampleCorrelation() {
	law, _ := freeconv.Default(freeconv.HorizontalCylinder)
	in := freeconv.Input{Ra: 1.867e6, Pr: 0.7241}
	fmt.Println(law.Citation)
	fmt.Println("Ra", law.RaRange(), "- Pr", law.PrRange(), "-", law.Verification)
	fmt.Println(law.Substitute(in))
	fmt.Printf("Nu = %.2f\n", law.Nu(in))
	// Output:
	// S. W. Churchill, H. H. S. Chu, Int. J. Heat Mass Transfer 18 (1975) 1049-1053, doi 10.1016/0017-9310(75)90222-7
	// Ra 1e-5 to 1e12 - Pr all - seen in print
	// \mathrm{Nu} = \left\{ 0.60 + \frac{0.387 \cdot \left( 1.867 \cdot 10^{6} \right)^{1/6}}{\left[ 1 + \left( \frac{0.559}{0.7241} \right)^{9/16} \right]^{8/27}} \right\}^{2}
	// Nu = 17.39
}

// The choice in a case file is checked before anything is computed.
func ExampleCheck() {
	for _, err := range freeconv.Check(freeconv.Choice{freeconv.Sphere: "morgan-1975-cylinder"}) {
		fmt.Println(err)
	}
	// Output:
	// sphere: the method "morgan-1975-cylinder" is for another situation; for this one there are: churchill-1983-sphere, yuge-1960-sphere, yovanovich-1987-sphere
}

// The default of a kind comes with its reason.
func ExampleDefault() {
	law, why := freeconv.Default(freeconv.PlateDown)
	fmt.Println(law.ID)
	fmt.Println(why)
	fmt.Println("second method:", freeconv.Alternative(freeconv.PlateDown).ID)
	// Output:
	// radziemska-lewandowski-2001-down
	// the exponent 1/5 is that of a stable layer draining over its edge; the older 1/4 law runs high at large Ra
	// second method: raithby-hollands-1975-down
}
