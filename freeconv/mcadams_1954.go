package freeconv

import "math"

// W. H. McAdams, Heat Transmission, 3rd ed., McGraw-Hill, New York 1954, ch. 7.
//
// Each law has a laminar branch C Ra^(1/4) and a turbulent one C Ra^(1/3) that
// do not meet where the source changes from one to the other. The records take
// the larger of both, so that no result jumps; the notes say what that moves.

const mcAdamsCitation = "W. H. McAdams, Heat Transmission, 3rd ed., McGraw-Hill, New York 1954, ch. 7"

const mcAdamsScatter = "none published"

var mcAdamsVertical = Correlation{
	ID: "mcadams-1954-plate", Name: "McAdams 1954, vertical plate",
	Kinds:    []Kind{VerticalPlate, VerticalCylinder},
	Citation: mcAdamsCitation + "; 0.10: C. Y. Warner, V. S. Arpaci, Int. J. Heat Mass Transfer 11 (1968) 397-406",
	Equation: `\mathrm{Nu} = \max\left( 0.59\,\mathrm{Ra}^{1/4}, 0.10\,\mathrm{Ra}^{1/3} \right)`,
	Length:   Height, FilmWeight: 0.5, BetaWeight: 0.5,
	RaMin: 1e4, RaMax: 1e13, ScatterNote: mcAdamsScatter, Verification: InPrint,
	Note: "Published as 0.59 Ra^(1/4) up to Ra = 1e9 (some books 1e10) and 0.10 Ra^(1/3) beyond (0.13 in older editions). " +
		"Taken as the larger of both branches, which meet at 1.8e9: up to 5 % above the turbulent branch just beyond 1e9. Ranges from memory.",
	Nu: func(in Input) float64 { return quarterOrThird(in.Ra, 0.59, 0.10) },
}

var mcAdamsUp = Correlation{
	ID: "mcadams-1954-up", Name: "McAdams 1954, horizontal plate, unstable side",
	Kinds: []Kind{PlateUp}, Citation: mcAdamsCitation,
	Equation: `\mathrm{Nu} = \max\left( 0.54\,\mathrm{Ra}^{1/4}, 0.14\,\mathrm{Ra}^{1/3} \right)`,
	Length:   MeanSide, FilmWeight: 0.5, BetaWeight: 0.5,
	RaMin: 1e5, RaMax: 3e10, ScatterNote: mcAdamsScatter, Verification: FromMemory,
	Note: "The length is the mean side, 0.9 D of a disc. Published with the change of branch at Ra = 2e7; taken as the larger of both, " +
		"which meet at 1.1e7. Range from memory.",
	Nu: func(in Input) float64 { return quarterOrThird(in.Ra, 0.54, 0.14) },
}

var mcAdamsDown = Correlation{
	ID: "mcadams-1954-down", Name: "McAdams 1954, horizontal plate, stable side",
	Kinds: []Kind{PlateDown}, Citation: mcAdamsCitation,
	Equation: `\mathrm{Nu} = 0.27\,\mathrm{Ra}^{1/4}`,
	Length:   AreaOverPerimeter, FilmWeight: 0.5, BetaWeight: 0.5,
	RaMin: 1e5, RaMax: 1e10, ScatterNote: mcAdamsScatter, Verification: InPrint,
	Note: "With the length A/P of later textbooks. At Ra = 1e9 it is 46 % above Radziemska & Lewandowski 2001. Range from memory; some books give 1e11.",
	Nu:   func(in Input) float64 { return 0.27 * root4(in.Ra) },
}

var mcAdamsCylinder = Correlation{
	ID: "mcadams-1954-cylinder", Name: "McAdams 1954, horizontal cylinder",
	Kinds: []Kind{HorizontalCylinder}, Citation: mcAdamsCitation,
	Equation: `\mathrm{Nu} = \max\left( 0.53\,\mathrm{Ra}^{1/4}, 0.13\,\mathrm{Ra}^{1/3} \right)`,
	Length:   Diameter, FilmWeight: 0.5, BetaWeight: 0.5,
	RaMin: 1e4, RaMax: 1e12, ScatterNote: mcAdamsScatter, Verification: InPrint,
	Note: "Published as 0.53 Ra^(1/4) up to Ra = 1e9 and 0.13 Ra^(1/3) beyond, a jump of 38 %. Taken as the larger of both branches, " +
		"which meet at 2.1e7: above the published branch by 14 % at 1e8 and by 38 % just below 1e9. Ranges from memory.",
	Nu: func(in Input) float64 { return quarterOrThird(in.Ra, 0.53, 0.13) },
}

// quarterOrThird is the larger of a Ra^(1/4) and b Ra^(1/3).
func quarterOrThird(Ra, a, b float64) float64 {
	return math.Max(a*root4(Ra), b*math.Cbrt(Ra))
}
