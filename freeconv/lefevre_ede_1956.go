package freeconv

// E. J. LeFevre, A. J. Ede, Laminar free convection from the outer surface of a
// vertical circular cylinder, Proc. 9th Int. Congr. Applied Mechanics, Brussels
// 1956, vol. 4, 175-183. Integral solution, mean Nu on the length L.

var lefevreEde = Correlation{
	ID: "lefevre-ede-1956-vertical-cylinder", Name: "LeFevre & Ede 1956, vertical cylinder, laminar",
	Kinds:    []Kind{VerticalCylinder},
	Citation: "E. J. LeFevre, A. J. Ede, Proc. 9th Int. Congr. Applied Mechanics, Brussels 1956, vol. 4, 175-183",
	Equation: `\mathrm{Nu} = \frac{4}{3} \cdot \left[ \frac{7\,\mathrm{Ra} \cdot \mathrm{Pr}}{5 \cdot \left( 20 + 21\,\mathrm{Pr} \right)} \right]^{1/4} ` +
		`+ \frac{4 \cdot \left( 272 + 315\,\mathrm{Pr} \right)}{35 \cdot \left( 64 + 63\,\mathrm{Pr} \right)} \cdot \frac{L}{D}`,
	Length: Height, FilmWeight: 0.5, BetaWeight: 0.5,
	RaMin: 1e4, RaMax: 1e9, ScatterNote: "none published", Verification: FromMemory,
	Note: "Form, citation and range from memory. Within 13 % of Popiel 2008 over Gr = 1e5..1e9 and L/D = 1..100.",
	Nu: func(in Input) float64 {
		Ra, Pr := in.Ra, in.Pr
		return 4.0/3*root4(7*Ra*Pr/(5*(20+21*Pr))) + 4*(272+315*Pr)/(35*(64+63*Pr))*in.LD
	},
}
