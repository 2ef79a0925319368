package freeconv

// S. W. Churchill, H. H. S. Chu, Correlating equations for laminar and
// turbulent free convection from a vertical plate, Int. J. Heat Mass Transfer
// 18 (1975) 1323-1329, doi 10.1016/0017-9310(75)90243-4.
//
// Nu and Ra on the height L; properties at the film temperature.

const churchillChuPlateCitation = "S. W. Churchill, H. H. S. Chu, Int. J. Heat Mass Transfer 18 (1975) 1323-1329, " +
	"doi 10.1016/0017-9310(75)90243-4"

const churchillChuScatter = "none published; textbooks advise 10 % to 20 %"

var churchillChuPlate = Correlation{
	ID: "churchill-chu-1975-plate", Name: "Churchill & Chu 1975, vertical plate, all Ra",
	Kinds: []Kind{VerticalPlate, VerticalCylinder}, Citation: churchillChuPlateCitation,
	Equation: `\mathrm{Nu} = \left\{ 0.825 + \frac{0.387\,\mathrm{Ra}^{1/6}}{\left[ 1 + \left( \frac{0.492}{\mathrm{Pr}} \right)^{9/16} \right]^{8/27}} \right\}^{2}`,
	Length:   Height, FilmWeight: 0.5, BetaWeight: 0.5,
	RaMin: 0.1, RaMax: 1e12, ScatterNote: churchillChuScatter, Verification: InPrint,
	Note: "Range from memory. About a third above the laminar form at Ra = 1e9, which agrees better below that.",
	Nu:   func(in Input) float64 { return churchillChuAll(in, 0.492) },
}

var churchillChuPlateLaminar = Correlation{
	ID: "churchill-chu-1975-plate-laminar", Name: "Churchill & Chu 1975, vertical plate, laminar",
	Kinds: []Kind{VerticalPlate, VerticalCylinder}, Citation: churchillChuPlateCitation,
	Equation: `\mathrm{Nu} = 0.68 + \frac{0.670\,\mathrm{Ra}^{1/4}}{\left[ 1 + \left( \frac{0.492}{\mathrm{Pr}} \right)^{9/16} \right]^{4/9}}`,
	Length:   Height, FilmWeight: 0.5, BetaWeight: 0.5,
	RaMin: 0, RaMax: 1e9, ScatterNote: "none published", Verification: InPrint,
	Note: "Range from memory. Copies with 0.663 for 0.670, or with 1e8 for the upper end, circulate and are wrong.",
	Nu:   func(in Input) float64 { return churchillChuLaminar(in, 0.492) },
}

var churchillChuPlateFlux = Correlation{
	ID: "churchill-chu-1975-plate-flux", Name: "Churchill & Chu 1975, vertical plate, uniform heat flux, all Ra",
	Kinds: []Kind{VerticalPlate, VerticalCylinder}, Citation: churchillChuPlateCitation,
	Equation: `\mathrm{Nu} = \left\{ 0.825 + \frac{0.387\,\mathrm{Ra}^{1/6}}{\left[ 1 + \left( \frac{0.437}{\mathrm{Pr}} \right)^{9/16} \right]^{8/27}} \right\}^{2}`,
	Length:   Height, FilmWeight: 0.5, BetaWeight: 0.5,
	RaMin: 0.1, RaMax: 1e12, ScatterNote: churchillChuScatter, Verification: FromMemory, Flux: true,
	Note: "The constant 0.437 and the range are from memory. The temperature difference is that at mid-height or the mean one.",
	Nu:   func(in Input) float64 { return churchillChuAll(in, 0.437) },
}

var churchillChuPlateFluxLaminar = Correlation{
	ID: "churchill-chu-1975-plate-flux-laminar", Name: "Churchill & Chu 1975, vertical plate, uniform heat flux, laminar",
	Kinds: []Kind{VerticalPlate, VerticalCylinder}, Citation: churchillChuPlateCitation,
	Equation: `\mathrm{Nu} = 0.68 + \frac{0.670\,\mathrm{Ra}^{1/4}}{\left[ 1 + \left( \frac{0.437}{\mathrm{Pr}} \right)^{9/16} \right]^{4/9}}`,
	Length:   Height, FilmWeight: 0.5, BetaWeight: 0.5,
	RaMin: 0, RaMax: 1e9, ScatterNote: "none published", Verification: FromMemory, Flux: true,
	Note: "The constant 0.437 and the range are from memory. The temperature difference is that at mid-height or the mean one.",
	Nu:   func(in Input) float64 { return churchillChuLaminar(in, 0.437) },
}

// churchillChuAll is the equation for laminar and turbulent flow; a is 0.492
// for a uniform temperature and 0.437 for a uniform flux.
func churchillChuAll(in Input, a float64) float64 {
	s := 0.825 + 0.387*root6(in.Ra)*universalPr(a, in.Pr, 8.0/27)
	return s * s
}

// churchillChuLaminar is the equation for laminar flow.
func churchillChuLaminar(in Input, a float64) float64 {
	return 0.68 + 0.670*root4(in.Ra)*universalPr(a, in.Pr, 4.0/9)
}
