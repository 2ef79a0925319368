package freeconv

import "math"

// E. Radziemska, W. M. Lewandowski, Heat transfer by natural convection from
// an isothermal downward-facing round plate in unlimited space, Applied Energy
// 68 (2001) 347-366. Length A/P.

var radziemskaDown = Correlation{
	ID: "radziemska-lewandowski-2001-down", Name: "Radziemska & Lewandowski 2001, horizontal plate, stable side",
	Kinds:    []Kind{PlateDown},
	Citation: "E. Radziemska, W. M. Lewandowski, Applied Energy 68 (2001) 347-366",
	Equation: `\mathrm{Nu} = 0.52\,\mathrm{Ra}^{1/5}`,
	Length:   AreaOverPerimeter, FilmWeight: 0.5, BetaWeight: 0.5,
	RaMin: 1e4, RaMax: 1e9, PrMin: 0.7, ScatterNote: "none published", Verification: InPrint,
	Note: "Range and citation from memory. Measured on round plates; current textbooks use it for any outline.",
	Nu:   func(in Input) float64 { return 0.52 * math.Pow(in.Ra, 0.2) },
}
