package freeconv

import "math"

// The rule of G. D. Raithby and K. G. T. Hollands for inclined plates (Adv.
// Heat Transfer 11 (1975) 265-315; Handbook of Heat Transfer, 3rd ed. 1998,
// ch. 4): take the larger heat flow of the vertical law with g cos(theta) and
// the horizontal law with g sin(theta), theta from the vertical. Here the two
// laws are the ones in use for vertical and horizontal plates.

const largerPart = `h = \max\left( h_{\mathrm{vertical}}, h_{\mathrm{horizontal}} \right)`

const inclinedRuleNote = "The rule was seen in print; it is used here with the vertical law (g cos(theta), slope length) and the " +
	"horizontal law (g sin(theta), A/P) in use for those situations, a convention of this program. The range is that of the default vertical law."

var inclinedRuleUp = Correlation{
	ID: "inclined-rule-up", Name: "Rule of Raithby & Hollands 1975, inclined plate, unstable side",
	Kinds: []Kind{InclinedUp}, Citation: raithbyHollandsCitation, Equation: largerPart,
	Length: Height, FilmWeight: 0.5, BetaWeight: 0.5,
	RaMin: 0.1, RaMax: 1e12, ScatterNote: "none published", Verification: InPrint, Note: inclinedRuleNote,
	Nu: func(in Input) float64 { return inclinedNu(in, churchillChuPlate.Nu, largestUp.Nu) },
	parts: func(choice Choice) (first, second part) {
		return chosen(VerticalPlate, choice), chosen(PlateUp, choice)
	},
}

var inclinedRuleDown = Correlation{
	ID: "inclined-rule-down", Name: "Rule of Raithby & Hollands 1975, inclined plate, stable side",
	Kinds: []Kind{InclinedDown}, Citation: raithbyHollandsCitation, Equation: largerPart,
	Length: Height, FilmWeight: 0.5, BetaWeight: 0.5,
	RaMin: 0.1, RaMax: 1e12, ScatterNote: "none published", Verification: InPrint, Note: inclinedRuleNote,
	Nu: func(in Input) float64 { return inclinedNu(in, churchillChuPlate.Nu, radziemskaDown.Nu) },
	parts: func(choice Choice) (first, second part) {
		return chosen(VerticalPlate, choice), chosen(PlateDown, choice)
	},
}

// chosen is the law in use for a kind as part of a rule.
func chosen(k Kind, choice Choice) part {
	c, _ := pick(k, choice)
	return part{k, c}
}

// inclinedNu is the rule written for one Nusselt number on the slope length.
func inclinedNu(in Input, vertical, horizontal func(Input) float64) float64 {
	sin, cos := math.Sincos(in.Theta * math.Pi / 180)
	v, h := in, in
	v.Ra = in.Ra * cos
	if !(in.AP > 0) {
		return vertical(v)
	}
	h.Ra = in.Ra * sin * in.AP * in.AP * in.AP
	return math.Max(vertical(v), horizontal(h)/in.AP)
}
