package freeconv

// H. B. Squire, in S. Goldstein (ed.), Modern Developments in Fluid Dynamics,
// Clarendon Press, Oxford 1938; E. R. G. Eckert, Introduction to the Transfer
// of Heat and Mass, McGraw-Hill 1950; as given in J. H. Lienhard IV, J. H.
// Lienhard V, A Heat Transfer Textbook, ch. 8.
//
// Integral solution of the laminar boundary layer with a cubic velocity
// profile.

var squireEckert = Correlation{
	ID: "squire-eckert-1950-plate", Name: "Squire & Eckert 1950, vertical plate, integral solution",
	Kinds:    []Kind{VerticalPlate},
	Citation: "H. B. Squire 1938, E. R. G. Eckert 1950, as given in Lienhard & Lienhard, A Heat Transfer Textbook, 3rd ed., ch. 8",
	Equation: `\mathrm{Nu} = 0.678\,\mathrm{Ra}^{1/4} \cdot \left( \frac{\mathrm{Pr}}{0.952 + \mathrm{Pr}} \right)^{1/4}`,
	Length:   Height, FilmWeight: 0.5, BetaWeight: 0.5,
	RaMin: 1e4, RaMax: 1e9, ScatterNote: "none published", Verification: InPrint,
	Note: "Laminar only; the ends of the range are those of other laminar laws. 6 % to 7 % above the exact solution.",
	Nu:   func(in Input) float64 { return 0.678 * root4(in.Ra*in.Pr/(0.952+in.Pr)) },
}
