package freeconv

import "math"

// The default for the unstable side of a horizontal plate joins two papers:
// R. J. Goldstein, E. M. Sparrow, D. C. Jones, Int. J. Heat Mass Transfer 16
// (1973) 1025-1035, for low Ra, and J. R. Lloyd, W. R. Moran, J. Heat Transfer
// 96 (1974) 443-447, with the limits of the textbooks, beyond. Length A/P.

var largestUp = Correlation{
	ID: "goldstein-lloyd-moran-up", Name: "Goldstein et al. 1973 and Lloyd & Moran 1974, horizontal plate, unstable side",
	Kinds: []Kind{PlateUp}, Citation: goldsteinCitation + "; " + lloydMoranCitation,
	Equation: `\mathrm{Nu} = \max\left( 0.96\,\mathrm{Ra}^{1/6}, 0.54\,\mathrm{Ra}^{1/4}, 0.15\,\mathrm{Ra}^{1/3} \right)`,
	Length:   AreaOverPerimeter, FilmWeight: 0.5, BetaWeight: 0.5,
	RaMin: 1, RaMax: 1e11, ScatterNote: "none published for the joined laws (5 % about their own data is claimed by Lloyd & Moran, from memory)", Verification: partlyFromMemory,
	Note: "The branches 0.54 Ra^(1/4) and 0.15 Ra^(1/3) were seen in print, 0.96 Ra^(1/6) is from memory, as are the ranges. " +
		"The largest of the three counts: they meet at Ra = 1.0e3 and 4.7e6 (published changes 200 and 8e6 or 1e7). The source's 0.59 Ra^(1/4) for " +
		"200..1e4 is left out, up to 9 % low there.",
	Nu: func(in Input) float64 {
		return math.Max(0.96*root6(in.Ra), quarterOrThird(in.Ra, 0.54, 0.15))
	},
}

// partlyFromMemory marks a record whose least-used branch was not seen in print.
const partlyFromMemory Verification = "two branches seen in print, the branch for low Ra from memory"

// governingBranchUp names the branch that is the largest.
func governingBranchUp(Ra float64) string {
	switch {
	case lowBranchUp(Ra):
		return "the branch 0.96 Ra^(1/6) governs, which is from memory, not seen in print"
	case 0.15*math.Cbrt(Ra) > 0.54*math.Sqrt(math.Sqrt(Ra)):
		return "the branch 0.15 Ra^(1/3) governs"
	}
	return "the branch 0.54 Ra^(1/4) governs"
}

// lowBranchUp reports whether the branch of Goldstein et al. is the largest.
func lowBranchUp(Ra float64) bool { return 0.96*root6(Ra) > quarterOrThird(Ra, 0.54, 0.15) }
