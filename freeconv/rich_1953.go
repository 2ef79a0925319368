package freeconv

// B. R. Rich, An investigation of heat transfer from an inclined flat plate in
// free convection, Trans. ASME 75 (1953) 489-499; also G. C. Vliet, J. Heat
// Transfer 91 (1969) 511-516: on the stable side up to 60 degrees from the
// vertical the vertical-plate relation holds with g cos(theta) for g.

var richDown = Correlation{
	ID: "rich-1953-inclined-down", Name: "Rich 1953, inclined plate, stable side, g cos(theta)",
	Kinds: []Kind{InclinedDown},
	Citation: "B. R. Rich, Trans. ASME 75 (1953) 489-499; G. C. Vliet, J. Heat Transfer 91 (1969) 511-516; with " +
		churchillChuPlateCitation,
	Equation: churchillChuPlate.Equation,
	Length:   Height, FilmWeight: 0.5, BetaWeight: 0.5,
	RaMin: 0.1, RaMax: 1e12, ThetaMin: 0, ThetaMax: 60, CosG: true,
	ScatterNote: "none published", Verification: InPrint,
	Note: "Ra is taken with g cos(theta) on the slope length, in the vertical-plate equation of Churchill & Chu 1975 for all Ra. Citations from memory.",
	Nu:   func(in Input) float64 { return churchillChuAll(in, 0.492) },
}
