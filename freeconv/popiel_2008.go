package freeconv

import "math"

// C. O. Popiel, Free convection heat transfer from vertical slender cylinders:
// a review, Heat Transfer Eng. 29 (2008) 521-536; C. O. Popiel, J. Wojtkowiak,
// K. Bober, Exp. Therm. Fluid Sci. 32 (2007) 607-613. A fit of the solution of
// T. Cebeci, Proc. 5th Int. Heat Transfer Conf., Tokyo 1974, vol. 3, 15-19.
//
//	Nu/Nu_plate = 1 + B [32^(1/2) Gr^(-1/4) L/D]^C
//	B = 0.0571322 + 0.20305 Pr^(-0.43)
//	C = 0.9165 - 0.0043 Pr^(1/2) + 0.01333 ln Pr + 0.0004809/Pr

var popielCylinder = Correlation{
	ID: "popiel-2008-vertical-cylinder", Name: "Popiel 2008 after Cebeci 1974, slender vertical cylinder, laminar",
	Kinds: []Kind{VerticalCylinder},
	Citation: "C. O. Popiel, Heat Transfer Eng. 29 (2008) 521-536; C. O. Popiel, J. Wojtkowiak, K. Bober, Exp. Therm. Fluid Sci. 32 (2007) 607-613; " +
		"T. Cebeci, Proc. 5th Int. Heat Transfer Conf., Tokyo 1974, vol. 3, 15-19",
	Equation: `\mathrm{Nu} = \mathrm{Nu}_{\mathrm{plate}} \cdot \left[ 1 + B \cdot \left( \sqrt{32} \cdot \left( \frac{\mathrm{Ra}}{\mathrm{Pr}} \right)^{-1/4} \cdot \frac{L}{D} \right)^{C} \right]` + "\n" +
		`B = 0.0571322 + 0.20305\,\mathrm{Pr}^{-0.43}` + "\n" +
		`C = 0.9165 - 0.0043\,\mathrm{Pr}^{1/2} + 0.01333 \cdot \ln\left( \mathrm{Pr} \right) + \frac{0.0004809}{\mathrm{Pr}}` + "\n" +
		`\mathrm{Nu}_{\mathrm{plate}} = \frac{4}{3} \cdot \left( \frac{\mathrm{Ra}}{4\,\mathrm{Pr}} \right)^{1/4} \cdot ` +
		`\frac{0.75\,\mathrm{Pr}^{1/2}}{\left( 0.609 + 1.221\,\mathrm{Pr}^{1/2} + 1.238\,\mathrm{Pr} \right)^{1/4}}`,
	Length: Height, FilmWeight: 0.5, BetaWeight: 0.5,
	RaMin: 0, RaMax: 1e9, PrMin: 0.01, PrMax: 100, ScatterNote: "none published", Verification: InPrint,
	Note: "Two reviews misprint 32^(1/2) as 32^2. The plate law is the similarity solution (LeFevre 1956), which the factor was computed against and " +
		"which keeps Nu rising with Ra. The upper end of Ra is that of laminar flow.",
	Nu: popiel,
}

// popiel is written out as a sum so that it is 0, not 0/0, at Ra = 0.
func popiel(in Input) float64 {
	Pr := in.Pr
	Gr := in.Ra / Pr
	plate := 4.0 / 3 * similarity(Pr) / root4(4) // times Gr^(1/4)
	B := 0.0571322 + 0.20305*math.Pow(Pr, -0.43)
	C := 0.9165 - 0.0043*math.Sqrt(Pr) + 0.01333*math.Log(Pr) + 0.0004809/Pr
	curved := B * math.Pow(math.Sqrt(32)*in.LD, C)
	return plate * (root4(Gr) + curved*math.Pow(Gr, (1-C)/4))
}
