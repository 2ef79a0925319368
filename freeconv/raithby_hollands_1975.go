package freeconv

import "math"

// G. D. Raithby, K. G. T. Hollands, A general method of obtaining approximate
// solutions to laminar and turbulent free convection problems, Adv. Heat
// Transfer 11 (1975) 265-315; coefficients as in Handbook of Heat Transfer,
// 3rd ed., McGraw-Hill 1998, ch. 4.
//
// The thin-layer value Nu_T becomes the laminar Nu_l = c/ln(1 + c/Nu_T), which
// is blended with the turbulent Nu_t: Nu = (Nu_l^m + Nu_t^m)^(1/m).

const raithbyHollandsCitation = "G. D. Raithby, K. G. T. Hollands, Adv. Heat Transfer 11 (1975) 265-315; " +
	"Handbook of Heat Transfer, 3rd ed., McGraw-Hill 1998, ch. 4"

const raithbyHollandsScatter = "a few percent, from memory; no figure seen in print"

var raithbyHollandsVertical = Correlation{
	ID: "raithby-hollands-1975-plate", Name: "Raithby & Hollands 1975, vertical plate",
	Kinds: []Kind{VerticalPlate}, Citation: raithbyHollandsCitation,
	Equation: `\mathrm{Nu} = \left( \mathrm{Nu}_{l}^{6} + \mathrm{Nu}_{t}^{6} \right)^{1/6}` + "\n" +
		`\mathrm{Nu}_{l} = \frac{2.0}{\ln\left( 1 + \frac{2.0}{\mathrm{Nu}_{T}} \right)}` + "\n" +
		`\mathrm{Nu}_{T} = \frac{0.671\,\mathrm{Ra}^{1/4}}{\left[ 1 + \left( \frac{0.492}{\mathrm{Pr}} \right)^{9/16} \right]^{4/9}}` + "\n" +
		`\mathrm{Nu}_{t} = \frac{0.13\,\mathrm{Pr}^{0.22}}{\left( 1 + 0.61\,\mathrm{Pr}^{0.81} \right)^{0.42}} \cdot \frac{\mathrm{Ra}^{1/3}}{1 + 1.4 \cdot 10^{9} \cdot \frac{\mathrm{Pr}}{\mathrm{Ra}}}`,
	Length: Height, FilmWeight: 0.5, BetaWeight: 0.5,
	RaMin: 0.1, RaMax: 1e12, ScatterNote: raithbyHollandsScatter, Verification: FromMemory,
	Note: "Form, range and scatter from memory; the turbulent coefficient was seen in print.",
	Nu:   raithbyHollandsV,
}

var raithbyHollandsUp = Correlation{
	ID: "raithby-hollands-1975-up", Name: "Raithby & Hollands 1975, horizontal plate, unstable side",
	Kinds: []Kind{PlateUp}, Citation: raithbyHollandsCitation,
	Equation: `\mathrm{Nu} = \left( \mathrm{Nu}_{l}^{10} + \mathrm{Nu}_{t}^{10} \right)^{1/10}` + "\n" +
		`\mathrm{Nu}_{l} = \frac{1.4}{\ln\left( 1 + \frac{1.4}{\mathrm{Nu}_{T}} \right)}` + "\n" +
		`\mathrm{Nu}_{T} = 0.835 \cdot \frac{0.671\,\mathrm{Ra}^{1/4}}{\left[ 1 + \left( \frac{0.492}{\mathrm{Pr}} \right)^{9/16} \right]^{4/9}}` + "\n" +
		`\mathrm{Nu}_{t} = 0.14 \cdot \frac{1 + 0.0107\,\mathrm{Pr}}{1 + 0.01\,\mathrm{Pr}} \cdot \mathrm{Ra}^{1/3}`,
	Length: AreaOverPerimeter, FilmWeight: 0.5, BetaWeight: 0.5,
	RaMin: 1, RaMax: 0, ScatterNote: raithbyHollandsScatter, Verification: InPrint,
	Note: "Range and scatter from memory. A copy with 0.01707 for 0.0107 circulates; its limit at high Pr (0.239 for 0.15) speaks against it.",
	Nu:   raithbyHollandsU,
}

var raithbyHollandsDown = Correlation{
	ID: "raithby-hollands-1975-down", Name: "Raithby & Hollands 1975, horizontal plate, stable side",
	Kinds: []Kind{PlateDown}, Citation: raithbyHollandsCitation,
	Equation: `\mathrm{Nu} = \frac{2.5}{\ln\left( 1 + \frac{2.5}{\mathrm{Nu}_{T}} \right)}` + "\n" +
		`\mathrm{Nu}_{T} = \frac{0.527\,\mathrm{Ra}^{1/5}}{\left[ 1 + \left( \frac{1.9}{\mathrm{Pr}} \right)^{0.9} \right]^{2/9}}`,
	Length: AreaOverPerimeter, FilmWeight: 0.5, BetaWeight: 0.5,
	RaMin: 1e3, RaMax: 1e10, ScatterNote: raithbyHollandsScatter, Verification: InPrint,
	Note: "Range and scatter from memory.",
	Nu:   raithbyHollandsD,
}

var raithbyHollandsInclinedUp = Correlation{
	ID: "raithby-hollands-1975-inclined-up", Name: "Raithby & Hollands 1975, inclined plate, unstable side",
	Kinds: []Kind{InclinedUp}, Citation: raithbyHollandsCitation, Equation: largerPart,
	Length: Height, FilmWeight: 0.5, BetaWeight: 0.5,
	RaMin: 0.1, RaMax: 1e12, ScatterNote: "none published", Verification: InPrint, Note: raithbyHollandsRuleNote,
	Nu: func(in Input) float64 { return inclinedNu(in, raithbyHollandsV, raithbyHollandsU) },
	parts: func(Choice) (first, second part) {
		return part{VerticalPlate, byID["raithby-hollands-1975-plate"]}, part{PlateUp, byID["raithby-hollands-1975-up"]}
	},
}

var raithbyHollandsInclinedDown = Correlation{
	ID: "raithby-hollands-1975-inclined-down", Name: "Raithby & Hollands 1975, inclined plate, stable side",
	Kinds: []Kind{InclinedDown}, Citation: raithbyHollandsCitation, Equation: largerPart,
	Length: Height, FilmWeight: 0.5, BetaWeight: 0.5,
	RaMin: 0.1, RaMax: 1e12, ScatterNote: "none published", Verification: InPrint, Note: raithbyHollandsRuleNote,
	Nu: func(in Input) float64 { return inclinedNu(in, raithbyHollandsV, raithbyHollandsD) },
	parts: func(Choice) (first, second part) {
		return part{VerticalPlate, byID["raithby-hollands-1975-plate"]}, part{PlateDown, byID["raithby-hollands-1975-down"]}
	},
}

const raithbyHollandsRuleNote = "The rule was seen in print; its vertical law, the ranges and the scatter are from memory. " +
	"The range is that of the vertical law."

// raithbyHollandsCl is C_l, 0.515 for air.
func raithbyHollandsCl(Pr float64) float64 { return 0.671 * universalPr(0.492, Pr, 4.0/9) }

// raithbyHollandsV is the vertical plate.
func raithbyHollandsV(in Input) float64 {
	Ra, Pr := in.Ra, in.Pr
	NuT := raithbyHollandsCl(Pr) * root4(Ra)
	Nul := conducting(2.0, NuT)
	CtV := 0.13 * math.Pow(Pr, 0.22) / math.Pow(1+0.61*math.Pow(Pr, 0.81), 0.42) // 0.103 for air
	Nut := CtV * math.Cbrt(Ra) / (1 + 1.4e9*Pr/Ra)
	return blend(6, Nul, Nut)
}

// raithbyHollandsU is the horizontal plate, unstable side.
func raithbyHollandsU(in Input) float64 {
	Ra, Pr := in.Ra, in.Pr
	NuT := 0.835 * raithbyHollandsCl(Pr) * root4(Ra)
	Nul := conducting(1.4, NuT)
	Nut := 0.14 * (1 + 0.0107*Pr) / (1 + 0.01*Pr) * math.Cbrt(Ra)
	return blend(10, Nul, Nut)
}

// raithbyHollandsD is the horizontal plate, stable side.
func raithbyHollandsD(in Input) float64 {
	NuT := 0.527 * math.Pow(in.Ra, 0.2) / math.Pow(1+math.Pow(1.9/in.Pr, 0.9), 2.0/9)
	return conducting(2.5, NuT)
}
