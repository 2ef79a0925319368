package freeconv

// M. M. Yovanovich, On the effect of shape, aspect ratio and orientation upon
// natural convection from isothermal bodies of complex shape, ASME HTD-82
// (1987) 23-35; also AIAA paper 87-1643.
//
//	Nu = S* + F(Pr) G Ra^(1/4),  F = 0.670/[1 + (0.5/Pr)^(9/16)]^(4/9)
//
// on the square root of the whole area. S* is the conduction shape factor, G
// the body-gravity function.

const yovanovichCitation = "M. M. Yovanovich, ASME HTD-82 (1987) 23-35; AIAA paper 87-1643"

var yovanovichSphere = Correlation{
	ID: "yovanovich-1987-sphere", Name: "Yovanovich 1987, sphere",
	Kinds: []Kind{Sphere}, Citation: yovanovichCitation,
	Equation: `\mathrm{Nu} = 3.545 + 1.023 \cdot \frac{0.670\,\mathrm{Ra}^{1/4}}{\left[ 1 + \left( \frac{0.5}{\mathrm{Pr}} \right)^{9/16} \right]^{4/9}}`,
	Length:   SqrtArea, FilmWeight: 0.5, BetaWeight: 0.5,
	RaMin: 0, RaMax: 1e8, ScatterNote: "none published", Verification: FromMemory,
	Note: "Form, constants, range and citation from memory. The first constant is 2 sqrt(pi), which is exact; the second term agrees with Churchill 1983.",
	Nu:   func(in Input) float64 { return yovanovich(in, 3.545, 1.023) },
}

var yovanovichCube = Correlation{
	ID: "yovanovich-1987-cube", Name: "Yovanovich 1987, cube",
	Kinds: []Kind{AnyShape}, Citation: yovanovichCitation,
	Equation: `\mathrm{Nu} = 3.388 + 0.951 \cdot \frac{0.670\,\mathrm{Ra}^{1/4}}{\left[ 1 + \left( \frac{0.5}{\mathrm{Pr}} \right)^{9/16} \right]^{4/9}}`,
	Length:   SqrtArea, FilmWeight: 0.5, BetaWeight: 0.5,
	RaMin: 0, RaMax: 1e8, ScatterNote: "none published", Verification: FromMemory,
	Note: "Form, constants, range and citation from memory.",
	Nu:   func(in Input) float64 { return yovanovich(in, 3.388, 0.951) },
}

var yovanovichAny = Correlation{
	ID: "yovanovich-1987-any-shape", Name: "Yovanovich 1987, body of any shape, air",
	Kinds: []Kind{AnyShape}, Citation: yovanovichCitation,
	Equation: `\mathrm{Nu} = 3.47 + 0.51\,\mathrm{Ra}^{1/4}`,
	Length:   SqrtArea, FilmWeight: 0.5, BetaWeight: 0.5,
	RaMin: 0, RaMax: 1e8, PrMin: 0.68, PrMax: 0.76, ScatterNote: "none published", Verification: FromMemory,
	Note: "Form, range and citation from memory. Given for Pr = 0.72; the ends of Pr are those of air.",
	Nu:   func(in Input) float64 { return 3.47 + 0.51*root4(in.Ra) },
}

// yovanovich is S* + F(Pr) G Ra^(1/4).
func yovanovich(in Input, S, G float64) float64 {
	return S + 0.670*universalPr(0.5, in.Pr, 4.0/9)*G*root4(in.Ra)
}
