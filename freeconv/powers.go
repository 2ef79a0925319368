package freeconv

import "math"

// root4 is x^(1/4).
func root4(x float64) float64 { return math.Sqrt(math.Sqrt(x)) }

// root6 is x^(1/6).
func root6(x float64) float64 { return math.Cbrt(math.Sqrt(x)) }

// blend is (a^m + b^m)^(1/m) for a, b >= 0, the smooth larger-of-two of
// S. W. Churchill and R. Usagi, AIChE J. 18 (1972) 1121-1128.
func blend(m, a, b float64) float64 {
	high, low := math.Max(a, b), math.Min(a, b)
	if high == 0 {
		return 0
	}
	return high * math.Pow(1+math.Pow(low/high, m), 1/m)
}

// conducting corrects a thin-layer Nusselt number for the thickness of the
// layer: c/ln(1 + c/Nu). It is 0 at Nu = 0.
func conducting(c, nu float64) float64 { return c / math.Log1p(c/nu) }

// universalPr is [1 + (a/Pr)^(9/16)]^(-e), the Prandtl number function of
// S. W. Churchill and co-workers.
func universalPr(a, Pr, e float64) float64 {
	return math.Pow(1+math.Pow(a/Pr, 9.0/16), -e)
}
