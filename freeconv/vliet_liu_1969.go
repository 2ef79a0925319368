package freeconv

import "math"

// G. C. Vliet, C. K. Liu, An experimental study of turbulent natural
// convection boundary layers, J. Heat Transfer 91 (1969) 517-531.
//
// Local laws for a vertical plate of uniform flux q, on the distance x from
// the lower edge and Ra* = Ra_x Nu_x = g beta q x^4 Pr/(k nu²):
//
//	Nu_x = 0.60 Ra*^(1/5)   laminar,   Ra* 1e5..1e11
//	Nu_x = 0.17 Ra*^(1/4)   turbulent, Ra* 2e13..1e16
//
// The mean wall temperature of a plate of height L follows by integration:
// the difference grows with x^(1/5) in laminar flow, so its mean is L^(1/5)/1.2
// and Nu = 1.2 Nu_x(L); it is uniform in turbulent flow. With Ra = Ra*/Nu on
// the mean difference the laws read Nu = 0.72^(5/4) Ra^(1/4) and
// Nu = 0.17^(4/3) Ra^(1/3).

var (
	vlietLiuLaminar   = math.Pow(1.2*0.60, 5.0/4)
	vlietLiuTurbulent = math.Pow(0.17, 4.0/3)
)

var vlietLiu = Correlation{
	ID: "vliet-liu-1969-flux", Name: "Vliet & Liu 1969, vertical plate, uniform heat flux",
	Kinds:    []Kind{VerticalPlate},
	Citation: "G. C. Vliet, C. K. Liu, J. Heat Transfer 91 (1969) 517-531",
	Equation: `\mathrm{Nu} = \max\left( 0.72^{5/4}\,\mathrm{Ra}^{1/4}, 0.17^{4/3}\,\mathrm{Ra}^{1/3} \right)`,
	Length:   Height, FilmWeight: 0.5, BetaWeight: 0.5,
	RaMin: 1.4e4, RaMax: 5.9e12, ScatterNote: "none published", Verification: InPrint, Flux: true,
	Note: "Local laws turned into the mean wall temperature by integration. Taken as the larger of both branches, which meet at " +
		"Ra* = 3.4e12, in the gap 1e11..2e13 that the source leaves. The range is that of the source, Ra* = 1e5..1e16, put into Ra. Measured in water.",
	Nu: func(in Input) float64 { return quarterOrThird(in.Ra, vlietLiuLaminar, vlietLiuTurbulent) },
}
