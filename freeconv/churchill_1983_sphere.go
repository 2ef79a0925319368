package freeconv

// S. W. Churchill, Free convection around immersed bodies, in Heat Exchanger
// Design Handbook, Hemisphere, New York 1983, sec. 2.5.7.

var churchillSphere = Correlation{
	ID: "churchill-1983-sphere", Name: "Churchill 1983, sphere",
	Kinds:    []Kind{Sphere},
	Citation: "S. W. Churchill, in Heat Exchanger Design Handbook, Hemisphere, New York 1983, sec. 2.5.7",
	Equation: `\mathrm{Nu} = 2 + \frac{0.589\,\mathrm{Ra}^{1/4}}{\left[ 1 + \left( \frac{0.469}{\mathrm{Pr}} \right)^{9/16} \right]^{4/9}}`,
	Length:   Diameter, FilmWeight: 0.5, BetaWeight: 0.5,
	RaMin: 0, RaMax: 1e11, PrMin: 0.7, ScatterNote: "none published", Verification: InPrint,
	Note: "Range from memory.",
	Nu:   func(in Input) float64 { return 2 + 0.589*root4(in.Ra)*universalPr(0.469, in.Pr, 4.0/9) },
}
