package fluid

import "math"

// E. W. Lemmon, R. T Jacobsen, Viscosity and thermal conductivity equations
// for nitrogen, oxygen, argon and air, Int. J. Thermophys. 25 (2004) 21-69.
// eta in µPa·s and lambda in mW/(m·K), as in the paper. The critical
// enhancement of lambda is left out: it is negligible for the gas well above
// the critical temperature of 132.5 K.

// Lennard-Jones parameters and molar mass of air in the dilute-gas viscosity.
const (
	ljMolarMass = 28.9586 // g/mol
	ljSigma     = 0.360   // nm
	ljEps       = 103.3   // K
)

// ljB holds b_i of the collision integral, ln Omega = sum b_i (ln T*)^i.
var ljB = [...]float64{0.431, -0.4623, 0.08406, 0.005341, -0.00331}

// residualTerm is N tau^t delta^d exp(-gamma delta^l).
type residualTerm struct {
	N, t float64
	d, l int // l = 0: no exponential
}

// Residual viscosity of air.
var ljEta = [...]residualTerm{
	{10.72, 0.2, 1, 0},
	{1.122, 0.05, 4, 0},
	{0.002019, 2.4, 9, 0},
	{-8.876, 0.6, 1, 1},
	{-0.02916, 3.6, 8, 1},
}

// Residual thermal conductivity of air.
var ljLambda = [...]residualTerm{
	{8.743, 0.1, 1, 0},
	{14.76, 0, 2, 0},
	{-16.62, 0.5, 3, 2},
	{3.793, 2.7, 7, 2},
	{-6.142, 0.3, 7, 2},
	{-0.3778, 1.3, 11, 2},
}

// etaDilute is the viscosity of the dilute gas, µPa·s.
func etaDilute(T float64) float64 {
	x := math.Log(T / ljEps)
	lnOmega := 0.0
	for i := len(ljB) - 1; i >= 0; i-- {
		lnOmega = lnOmega*x + ljB[i]
	}
	return 0.0266958 * math.Sqrt(ljMolarMass*T) / (ljSigma * ljSigma * math.Exp(lnOmega))
}

// lambdaDilute is the conductivity of the dilute gas, mW/(m·K).
func lambdaDilute(eta0, lnTau float64) float64 {
	return 1.308*eta0 + 1.405*math.Exp(-1.1*lnTau) - 1.036*math.Exp(-0.3*lnTau)
}

// residual sums terms at the reduced density delta.
func residual(terms []residualTerm, lnTau, delta float64) float64 {
	sum := 0.0
	for _, c := range terms {
		x := c.N * math.Exp(c.t*lnTau) * powInt(delta, c.d)
		if c.l > 0 {
			x *= math.Exp(-powInt(delta, c.l))
		}
		sum += x
	}
	return sum
}

// powInt is x^n for n >= 0.
func powInt(x float64, n int) float64 {
	y := 1.0
	for ; n > 0; n-- {
		y *= x
	}
	return y
}

// airTransport gives the viscosity in Pa·s and the conductivity in W/(m·K).
func airTransport(T, tau, lnTau, delta float64) (mu, k float64) {
	eta0 := etaDilute(T)
	mu = 1e-6 * (eta0 + residual(ljEta[:], lnTau, delta))
	k = 1e-3 * (lambdaDilute(eta0, lnTau) + residual(ljLambda[:], lnTau, delta))
	return mu, k
}
