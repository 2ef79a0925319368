package freeconv

// S. W. Churchill, H. H. S. Chu, Correlating equations for laminar and
// turbulent free convection from a horizontal cylinder, Int. J. Heat Mass
// Transfer 18 (1975) 1049-1053, doi 10.1016/0017-9310(75)90222-7.
//
// Nu and Ra on the diameter D; properties at the film temperature.

const churchillChuCylinderCitation = "S. W. Churchill, H. H. S. Chu, Int. J. Heat Mass Transfer 18 (1975) 1049-1053, " +
	"doi 10.1016/0017-9310(75)90222-7"

var churchillChuCylinder = Correlation{
	ID: "churchill-chu-1975-cylinder", Name: "Churchill & Chu 1975, horizontal cylinder, all Ra",
	Kinds: []Kind{HorizontalCylinder}, Citation: churchillChuCylinderCitation,
	Equation: `\mathrm{Nu} = \left\{ 0.60 + \frac{0.387\,\mathrm{Ra}^{1/6}}{\left[ 1 + \left( \frac{0.559}{\mathrm{Pr}} \right)^{9/16} \right]^{8/27}} \right\}^{2}`,
	Length:   Diameter, FilmWeight: 0.5, BetaWeight: 0.5,
	RaMin: 1e-5, RaMax: 1e12, ScatterNote: "none published", Verification: InPrint,
	Note: "Range from memory. Thin wires (Ra below 100) lose up to a third more by Morgan 1975 and by Kuehn & Goldstein 1976.",
	Nu: func(in Input) float64 {
		s := 0.60 + 0.387*root6(in.Ra)*universalPr(0.559, in.Pr, 8.0/27)
		return s * s
	},
}

var churchillChuCylinderLaminar = Correlation{
	ID: "churchill-chu-1975-cylinder-laminar", Name: "Churchill & Chu 1975, horizontal cylinder, laminar",
	Kinds: []Kind{HorizontalCylinder}, Citation: churchillChuCylinderCitation,
	Equation: `\mathrm{Nu} = 0.36 + \frac{0.518\,\mathrm{Ra}^{1/4}}{\left[ 1 + \left( \frac{0.559}{\mathrm{Pr}} \right)^{9/16} \right]^{4/9}}`,
	Length:   Diameter, FilmWeight: 0.5, BetaWeight: 0.5,
	RaMin: 1e-6, RaMax: 1e9, ScatterNote: "none published", Verification: InPrint,
	Note: "Range from memory.",
	Nu: func(in Input) float64 {
		return 0.36 + 0.518*root4(in.Ra)*universalPr(0.559, in.Pr, 4.0/9)
	},
}
