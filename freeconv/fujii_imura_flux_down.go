package freeconv

import "math"

// Hot face down with uniform heat flux, as given in J. H. Lienhard IV, J. H.
// Lienhard V, A Heat Transfer Textbook, 3rd ed., ch. 8, after T. Fujii,
// H. Imura, Int. J. Heat Mass Transfer 15 (1972) 755-767:
//
//	Nu^(6/5) = 0.82 Ra*^(1/5) Pr^0.034,  Ra* = Ra Nu
//
// on the diameter or the side. With Ra on the mean temperature difference this
// is Nu = 0.82 Ra^(1/5) Pr^0.034.

var fluxDown = Correlation{
	ID: "fujii-imura-flux-down", Name: "Lienhard after Fujii & Imura 1972, horizontal plate, stable side, uniform heat flux",
	Kinds:    []Kind{PlateDown},
	Citation: "Lienhard & Lienhard, A Heat Transfer Textbook, 3rd ed., ch. 8; after " + fujiiImuraCitation,
	Equation: `\mathrm{Nu} = 0.82\,\mathrm{Ra}^{1/5} \cdot \mathrm{Pr}^{0.034}`,
	Length:   ShortSide, FilmWeight: 0.5, BetaWeight: 0.5,
	RaMin: 1e4, RaMax: 1e11, ScatterNote: "none published", Verification: InPrint, Flux: true,
	Note: "No range was seen; the one given here is taken from neighbouring laws. Written with Ra on the mean temperature difference, which is the " +
		"same as the published form with Ra* = Ra Nu.",
	Nu: func(in Input) float64 { return 0.82 * math.Pow(in.Ra, 0.2) * math.Pow(in.Pr, 0.034) },
}
