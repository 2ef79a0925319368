package freeconv

import "math"

// The default for a vertical cylinder takes the larger of the flat-plate law
// of Churchill & Chu 1975 and the slender-cylinder law of Popiel 2008: the
// first governs thick cylinders and turbulent flow, the second slender ones.
// Whether the side may be taken as a plate at all is told by the test
// D >= 35 L/Gr^(1/4), E. M. Sparrow, J. L. Gregg, Trans. ASME 78 (1956) 1823.

var verticalCylinderRule = Correlation{
	ID: "churchill-chu-popiel-vertical-cylinder", Name: "Churchill & Chu 1975 and Popiel 2008, vertical cylinder",
	Kinds:    []Kind{VerticalCylinder},
	Citation: churchillChuPlateCitation + "; C. O. Popiel, Heat Transfer Eng. 29 (2008) 521-536",
	Equation: `h = \max\left( h_{\mathrm{plate}}, h_{\mathrm{slender}} \right)`,
	Length:   Height, FilmWeight: 0.5, BetaWeight: 0.5,
	RaMin: 0.1, RaMax: 1e12, PrMin: 0.01, PrMax: 100, ScatterNote: churchillChuScatter, Verification: InPrint,
	Note: "Joining the two laws by the larger h is a convention of this program: it has no jump. Range from memory.",
	Nu:   func(in Input) float64 { return math.Max(churchillChuAll(in, 0.492), popiel(in)) },
	parts: func(Choice) (first, second part) {
		return part{VerticalCylinder, byID["churchill-chu-1975-plate"]}, part{VerticalCylinder, byID["popiel-2008-vertical-cylinder"]}
	},
}

// The second opinion on a vertical cylinder: the larger of the flat-plate law of
// McAdams 1954, which reaches into turbulence, and the slender-cylinder law of
// LeFevre & Ede 1956.

var otherVerticalCylinderRule = Correlation{
	ID: "mcadams-lefevre-ede-vertical-cylinder", Name: "McAdams 1954 and LeFevre & Ede 1956, vertical cylinder",
	Kinds:    []Kind{VerticalCylinder},
	Citation: mcAdamsCitation + "; E. J. LeFevre, A. J. Ede, Proc. 9th Int. Congr. Applied Mechanics, Brussels 1956, vol. 4, 175-183",
	Equation: `h = \max\left( h_{\mathrm{plate}}, h_{\mathrm{slender}} \right)`,
	Length:   Height, FilmWeight: 0.5, BetaWeight: 0.5,
	RaMin: 1e4, RaMax: 1e13, ScatterNote: mcAdamsScatter, Verification: FromMemory,
	Note: "Joining the two laws by the larger h is a convention of this program: it has no jump. The slender-cylinder law and the ranges are from memory.",
	Nu:   func(in Input) float64 { return math.Max(mcAdamsVertical.Nu(in), lefevreEde.Nu(in)) },
	parts: func(Choice) (first, second part) {
		return part{VerticalCylinder, byID["mcadams-1954-plate"]}, part{VerticalCylinder, byID["lefevre-ede-1956-vertical-cylinder"]}
	},
}
