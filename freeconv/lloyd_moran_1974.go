package freeconv

// J. R. Lloyd, W. R. Moran, Natural convection adjacent to horizontal surface
// of various planforms, J. Heat Transfer 96 (1974) 443-447. Length A/P.

const lloydMoranCitation = "J. R. Lloyd, W. R. Moran, J. Heat Transfer 96 (1974) 443-447"

var lloydMoran = Correlation{
	ID: "lloyd-moran-1974-up", Name: "Lloyd & Moran 1974, horizontal plate, unstable side",
	Kinds: []Kind{PlateUp}, Citation: lloydMoranCitation,
	Equation: `\mathrm{Nu} = \max\left( 0.54\,\mathrm{Ra}^{1/4}, 0.15\,\mathrm{Ra}^{1/3} \right)`,
	Length:   AreaOverPerimeter, FilmWeight: 0.5, BetaWeight: 0.5,
	RaMin: 2.2e4, RaMax: 1.6e9, Scatter: 0.05, ScatterNote: "5 % about the fit in the source, from memory", Verification: InPrint,
	Note: "Published with the change of branch at Ra = 8e6 (textbooks 1e7, and 1e4..1e11 as range), where it rises by 6 %; taken as the " +
		"larger of both, which meet at 4.8e6. Range and scatter from memory. Measured as mass transfer at Sc of about 2200.",
	Nu: func(in Input) float64 { return quarterOrThird(in.Ra, 0.54, 0.15) },
}
