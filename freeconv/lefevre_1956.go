package freeconv

import "math"

// E. J. LeFevre, Laminar free convection from a vertical plane surface, Proc.
// 9th Int. Congr. Applied Mechanics, Brussels 1956, vol. 4, 168-174: a fit of
// the similarity solution of S. Ostrach, NACA TR 1111 (1953).
//
// Mean Nu on the height, thin laminar boundary layer on a plate at uniform
// temperature: Nu = (4/3) (Gr/4)^(1/4) g(Pr).

var lefevrePlate = Correlation{
	ID: "lefevre-1956-plate", Name: "LeFevre 1956, vertical plate, similarity solution",
	Kinds:    []Kind{VerticalPlate},
	Citation: "E. J. LeFevre, Proc. 9th Int. Congr. Applied Mechanics, Brussels 1956, vol. 4, 168-174; fit of S. Ostrach, NACA TR 1111 (1953)",
	Equation: `\mathrm{Nu} = \frac{4}{3} \cdot \left( \frac{\mathrm{Ra}}{4\,\mathrm{Pr}} \right)^{1/4} \cdot ` +
		`\frac{0.75\,\mathrm{Pr}^{1/2}}{\left( 0.609 + 1.221\,\mathrm{Pr}^{1/2} + 1.238\,\mathrm{Pr} \right)^{1/4}}`,
	Length: Height, FilmWeight: 0.5, BetaWeight: 0.5,
	RaMin: 1e4, RaMax: 1e9, ScatterNote: "none published against measurements (0.5 % about the similarity solution it fits, from memory)", Verification: FromMemory,
	Note: "Fit, citation and range from memory; the solution it fits is integrated again in the tests. No allowance for the " +
		"thickness of the layer: low at small Ra.",
	Nu: func(in Input) float64 { return 4.0 / 3 * similarity(in.Pr) * root4(in.Ra/(4*in.Pr)) },
}

// similarity is g(Pr), the slope of temperature at the wall in the similarity
// variable.
func similarity(Pr float64) float64 {
	s := math.Sqrt(Pr)
	return 0.75 * s / root4(0.609+1.221*s+1.238*Pr)
}
