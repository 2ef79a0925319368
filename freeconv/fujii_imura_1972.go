package freeconv

import "math"

// T. Fujii, H. Imura, Natural-convection heat transfer from a plate with
// arbitrary inclination, Int. J. Heat Mass Transfer 15 (1972) 755-767.
//
// Properties at T_w - 0.25 (T_w - T_inf), beta at T_inf + 0.25 (T_w - T_inf).
// theta is the tilt from the vertical. Measured in water on plates 30 cm by
// 15 cm and 5 cm by 10 cm (from memory).

const fujiiImuraCitation = "T. Fujii, H. Imura, Int. J. Heat Mass Transfer 15 (1972) 755-767"

const fujiiImuraNote = "Ranges from memory. Properties at Ts - 0.25 (Ts - Ta), beta at Ta + 0.25 (Ts - Ta). "

var fujiiImuraInclinedDown = Correlation{
	ID: "fujii-imura-1972-inclined-down", Name: "Fujii & Imura 1972, inclined plate, stable side",
	Kinds: []Kind{InclinedDown}, Citation: fujiiImuraCitation,
	Equation: `\mathrm{Nu} = 0.56\,\mathrm{Ra}^{1/4}`,
	Length:   Height, FilmWeight: 0.75, BetaWeight: 0.25,
	RaMin: 1e5, RaMax: 1e11, ThetaMin: 0, ThetaMax: 88, CosG: true,
	ScatterNote: "none published", Verification: InPrint,
	Note: fujiiImuraNote + "Ra is taken with g cos(theta).",
	Nu:   func(in Input) float64 { return 0.56 * root4(in.Ra) },
}

var fujiiImuraDown = Correlation{
	ID: "fujii-imura-1972-down", Name: "Fujii & Imura 1972, horizontal plate, stable side",
	Kinds: []Kind{PlateDown}, Citation: fujiiImuraCitation,
	Equation: `\mathrm{Nu} = 0.58\,\mathrm{Ra}^{1/5}`,
	Length:   ShortSide, FilmWeight: 0.75, BetaWeight: 0.25,
	RaMin: 1e6, RaMax: 1e11, ScatterNote: "none published", Verification: InPrint,
	Note: fujiiImuraNote + "That the length is the shorter side is from memory.",
	Nu:   func(in Input) float64 { return 0.58 * math.Pow(in.Ra, 0.2) },
}

var fujiiImuraUp = Correlation{
	ID: "fujii-imura-1972-up", Name: "Fujii & Imura 1972, horizontal plate, unstable side",
	Kinds: []Kind{PlateUp}, Citation: fujiiImuraCitation,
	Equation: `\mathrm{Nu} = C\,\mathrm{Ra}^{1/3}`,
	Length:   ShortSide, FilmWeight: 0.75, BetaWeight: 0.25,
	RaMin: 5e6, RaMax: 1e11, ScatterNote: "none published", Verification: InPrint,
	Note: fujiiImuraNote + "C = 0.16 below Ra = 2e8 and 0.13 above 5e8; between them, where the source gives nothing, a straight line in " +
		"logarithms joins the two values. That the length is the shorter side is from memory.",
	Nu:         fujiiImuraU,
	Substitute: func(in Input) string { return fujiiImuraUpEquation(in) },
}

var fujiiImuraInclinedUp = Correlation{
	ID: "fujii-imura-1972-inclined-up", Name: "Fujii & Imura 1972, inclined plate, unstable side",
	Kinds:    []Kind{InclinedUp},
	Citation: fujiiImuraCitation + "; as given in J. P. Holman, Heat Transfer, ch. 7",
	Equation: `\mathrm{Nu} = 0.13 \cdot \left[ \left( \frac{\mathrm{Ra}}{\cos \theta} \right)^{1/3} - \left( \mathrm{Gr}_{c}\,\mathrm{Pr} \right)^{1/3} \right] ` +
		`+ 0.56 \cdot \left( \mathrm{Gr}_{c}\,\mathrm{Pr} \cos \theta \right)^{1/4}`,
	Length: Height, FilmWeight: 0.75, BetaWeight: 0.25,
	RaMin: 1e5, RaMax: 1e11, ThetaMin: 15, ThetaMax: 75, CosG: true,
	ScatterNote: "none published", Verification: FromMemory,
	Note: fujiiImuraNote + "Form from memory. Ra is taken with g cos(theta). The source lists Gr_c = 5e9, 2e9, 1e8, 1e6 at 15, 30, 60, 75 degrees " +
		"from the vertical; between them log Gr_c is interpolated, beyond them held, a convention of this program. Below Gr_c the law is 0.56 Ra^(1/4).",
	Nu:         fujiiImuraInclined,
	Substitute: fujiiImuraInclinedEquation,
}

// fujiiImuraU is the horizontal plate, unstable side.
func fujiiImuraU(in Input) float64 { return fujiiImuraC(in.Ra) * math.Cbrt(in.Ra) }

// fujiiImuraC is 0.16 or 0.13 with the join between 2e8 and 5e8.
func fujiiImuraC(Ra float64) float64 {
	const from, to = 2e8, 5e8
	if Ra <= from {
		return 0.16
	}
	if Ra >= to {
		return 0.13
	}
	return 0.16 * math.Pow(0.13/0.16, math.Log(Ra/from)/math.Log(to/from))
}

func fujiiImuraUpEquation(in Input) string {
	return `\mathrm{Nu} = ` + texNumber(fujiiImuraC(in.Ra)) + ` \cdot ` + texNumber(in.Ra) + `^{1/3}`
}

// fujiiImuraGrc is the Grashof number at which the layer breaks up.
func fujiiImuraGrc(theta float64) float64 {
	table := [...]struct{ theta, log float64 }{
		{15, math.Log(5e9)}, {30, math.Log(2e9)}, {60, math.Log(1e8)}, {75, math.Log(1e6)},
	}
	if theta <= table[0].theta {
		return math.Exp(table[0].log)
	}
	for i := 1; i < len(table); i++ {
		if a, b := table[i-1], table[i]; theta <= b.theta {
			return math.Exp(a.log + (b.log-a.log)*(theta-a.theta)/(b.theta-a.theta))
		}
	}
	return math.Exp(table[len(table)-1].log)
}

// fujiiImuraInclined is the inclined plate, unstable side; in.Ra has g cos(theta).
func fujiiImuraInclined(in Input) float64 {
	cos := math.Cos(in.Theta * math.Pi / 180)
	RaC := fujiiImuraGrc(in.Theta) * in.Pr
	if !(cos > 0) || in.Ra/cos <= RaC {
		return 0.56 * root4(in.Ra)
	}
	return 0.13*(math.Cbrt(in.Ra/cos)-math.Cbrt(RaC)) + 0.56*root4(RaC*cos)
}

func fujiiImuraInclinedEquation(in Input) string {
	cos := math.Cos(in.Theta * math.Pi / 180)
	Grc := fujiiImuraGrc(in.Theta)
	if !(cos > 0) || in.Ra/cos <= Grc*in.Pr {
		return `\mathrm{Nu} = 0.56 \cdot ` + texNumber(in.Ra) + `^{1/4}`
	}
	gp := texNumber(Grc) + ` \cdot ` + texNumber(in.Pr)
	angle := texNumber(in.Theta)
	return `\mathrm{Nu} = 0.13 \cdot \left[ \left( \frac{` + texNumber(in.Ra) + `}{\cos ` + angle + `} \right)^{1/3} - \left( ` + gp +
		` \right)^{1/3} \right] + 0.56 \cdot \left( ` + gp + ` \cdot \cos ` + angle + ` \right)^{1/4}`
}
