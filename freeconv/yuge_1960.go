package freeconv

// T. Yuge, Experiments on heat transfer from spheres including combined
// natural and forced convection, J. Heat Transfer 82 (1960) 214-220.

var yugeSphere = Correlation{
	ID: "yuge-1960-sphere", Name: "Yuge 1960, sphere in air",
	Kinds:    []Kind{Sphere},
	Citation: "T. Yuge, J. Heat Transfer 82 (1960) 214-220",
	Equation: `\mathrm{Nu} = 2 + 0.43\,\mathrm{Ra}^{1/4}`,
	Length:   Diameter, FilmWeight: 0.5, BetaWeight: 0.5,
	RaMin: 1, RaMax: 1e5, PrMin: 0.6, PrMax: 0.8, ScatterNote: "none published", Verification: InPrint,
	Note: "Range from memory; the source is for air, which the ends of Pr here stand for. One textbook puts Gr where Ra is meant.",
	Nu:   func(in Input) float64 { return 2 + 0.43*root4(in.Ra) },
}
