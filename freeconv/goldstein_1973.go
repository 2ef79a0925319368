package freeconv

import "math"

// R. J. Goldstein, E. M. Sparrow, D. C. Jones, Natural convection mass
// transfer adjacent to horizontal plates, Int. J. Heat Mass Transfer 16 (1973)
// 1025-1035: the paper that brought in the length A/P.

var goldsteinUp = Correlation{
	ID: "goldstein-sparrow-jones-1973-up", Name: "Goldstein, Sparrow & Jones 1973, horizontal plate, unstable side, low Ra",
	Kinds:    []Kind{PlateUp},
	Citation: goldsteinCitation,
	Equation: `\mathrm{Nu} = \max\left( 0.96\,\mathrm{Ra}^{1/6}, 0.59\,\mathrm{Ra}^{1/4} \right)`,
	Length:   AreaOverPerimeter, FilmWeight: 0.5, BetaWeight: 0.5,
	RaMin: 1, RaMax: 1e4, ScatterNote: "none published", Verification: FromMemory,
	Note: "Form, range and citation from memory. Published with the change of branch at Ra = 200, where it falls by 4 %; taken as the " +
		"larger of both, which meet at 345. Measured as mass transfer (naphthalene).",
	Nu: func(in Input) float64 { return math.Max(0.96*root6(in.Ra), 0.59*root4(in.Ra)) },
}

const goldsteinCitation = "R. J. Goldstein, E. M. Sparrow, D. C. Jones, Int. J. Heat Mass Transfer 16 (1973) 1025-1035"
