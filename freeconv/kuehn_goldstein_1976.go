package freeconv

import "math"

// T. H. Kuehn, R. J. Goldstein, Correlating equations for natural convection
// heat transfer between horizontal circular cylinders, Int. J. Heat Mass
// Transfer 19 (1976) 1127-1134: the limit of a single cylinder in free space.

var kuehnGoldstein = Correlation{
	ID: "kuehn-goldstein-1976-cylinder", Name: "Kuehn & Goldstein 1976, horizontal cylinder",
	Kinds:    []Kind{HorizontalCylinder},
	Citation: "T. H. Kuehn, R. J. Goldstein, Int. J. Heat Mass Transfer 19 (1976) 1127-1134",
	Equation: `\mathrm{Nu} = \frac{2}{\ln\left( 1 + \frac{2}{\mathrm{Nu}_{T}} \right)}` + "\n" +
		`\mathrm{Nu}_{T} = \left[ \left( 0.518\,\mathrm{Ra}^{1/4} \cdot \left[ 1 + \left( \frac{0.559}{\mathrm{Pr}} \right)^{3/5} \right]^{-5/12} \right)^{15} ` +
		`+ \left( 0.1\,\mathrm{Ra}^{1/3} \right)^{15} \right]^{1/15}`,
	Length: Diameter, FilmWeight: 0.5, BetaWeight: 0.5,
	ScatterNote: "none published", Verification: InPrint,
	Note: "Given for all Ra.",
	Nu: func(in Input) float64 {
		laminar := 0.518 * root4(in.Ra) * math.Pow(1+math.Pow(0.559/in.Pr, 3.0/5), -5.0/12)
		return conducting(2, blend(15, laminar, 0.1*math.Cbrt(in.Ra)))
	},
}
