package fluid

import "math"

// E. W. Lemmon, R. T Jacobsen, S. G. Penoncello, D. G. Friend, Thermodynamic
// properties of air and mixtures of nitrogen, argon and oxygen from 60 to
// 2000 K at pressures to 2000 MPa, J. Phys. Chem. Ref. Data 29 (2000) 331-385.
//
// The reduced Helmholtz energy is alpha = alpha0(delta, tau) + alphaR(delta, tau)
// with tau = Tj/T and delta = rho/rhoj. Of the 19 terms of alphaR only the six
// that are linear in delta are kept: alphaR = a(tau) delta, the second virial
// coefficient. Coefficients read from an open re-typed copy of the paper's
// tables, not from the paper.

const (
	airTj   = 132.6312   // K, maxcondentherm temperature
	airRhoj = 10447.7    // mol/m³, maxcondentherm density
	airR    = 8.31451    // J/(mol·K), as used in the paper
	airM    = 0.02896546 // kg/mol
)

// lemmonN holds N_1..N_13 of the ideal-gas equation.
var lemmonN = [14]float64{1: 6.057194e-8, -2.10274769e-5, -1.58860716e-4, -13.841928076, 17.275266575,
	-1.9536342e-4, 2.490888032, 0.791309509, 0.212236768, -0.197938904, 25.36365, 16.90741, 87.31279}

// lemmonLinear holds the terms N tau^t delta of alphaR, as numbered in the paper.
var lemmonLinear = [...]struct{ N, t float64 }{
	{0.118160747229, 0},    // 1
	{0.713116392079, 0.33}, // 2
	{-1.61824192067, 1.01}, // 3
	{-0.101365037912, 1.6}, // 11, its exp(-delta) is 1 to this order
	{-0.146629609713, 3.6}, // 15, exp(-delta²) likewise
	{0.0148287891978, 3.5}, // 18, exp(-delta³) likewise
}

// airIdealCv is cv0/R = -tau² d²alpha0/dtau².
func airIdealCv(tau, sqrtTau float64) float64 {
	N := &lemmonN
	t2 := tau * tau
	// d²/dtau² of the polynomial and of N6 tau^1.5, times tau²
	s := 12*N[1]/(t2*tau) + 6*N[2]/t2 + 2*N[3]/tau + 0.75*N[6]*tau*sqrtTau
	s -= N[7]
	s -= N[8]*planck(N[11]*tau, -1) + N[9]*planck(N[12]*tau, -1)
	// ln[2/3 + exp(N13 tau)]
	s += N[10] * planck(N[13]*tau, 2.0/3)
	return -s
}

// planck is x² e^(-x)·c'/(1 + c e^(-x))², the curvature of ln(1 + c e^(-x))
// times x²; for c = -1 its sign is that of the vibration term of a gas.
func planck(x, c float64) float64 {
	e := math.Exp(-x)
	q := 1 + c*e
	return math.Abs(c) * x * x * e / (q * q)
}

// airLinear gives a(tau), tau a'(tau) and tau² a”(tau).
func airLinear(lnTau float64) (a, ta, tta float64) {
	for _, c := range lemmonLinear {
		x := c.N * math.Exp(c.t*lnTau)
		a += x
		ta += c.t * x
		tta += c.t * (c.t - 1) * x
	}
	return a, ta, tta
}

// airState solves p = rho R T (1 + a delta) for the reduced density and gives
// the density in kg/m³ and cp in J/(kg·K) with it.
func airState(T, p, tau, lnTau float64) (delta, rho, cp float64) {
	a, ta, tta := airLinear(lnTau)
	d0 := p / (airRhoj * airR * T)
	delta = 2 * d0 / (1 + math.Sqrt(math.Max(0, 1+4*a*d0)))
	cv := airIdealCv(tau, math.Sqrt(tau)) - tta*delta
	num := 1 + delta*a - delta*ta
	cp = airR / airM * (cv + num*num/(1+2*delta*a))
	return delta, delta * airRhoj * airM, cp
}
