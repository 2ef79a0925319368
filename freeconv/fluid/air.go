package fluid

import "math"

// Air is dry air. Density and heat capacity are those of Lemmon et al. 2000,
// viscosity and conductivity those of Lemmon & Jacobsen 2004.
//
// Range 150..2000 K. The upper end is that of both papers. The lower end is
// where the density series, cut after its first term, is still within 0.01 %
// at atmospheric pressure; the papers themselves go lower. Pressure is held
// within 1 kPa..1 MPa for the same reason.
//
// Accuracy stated by the source, as remembered and not seen in print: about
// 1 % for the viscosity and 2 % for the conductivity of the gas.
var Air Gas = air{}

type air struct{}

const (
	airTLow, airTHigh = 150, 2000 // K
	airPLow, airPHigh = 1e3, 1e6  // Pa
)

// Name is "dry air".
func (air) Name() string { return "dry air" }

// Range is 150 K to 2000 K.
func (air) Range() (low, high float64) { return airTLow, airTHigh }

// Sources names the paper behind each property.
func (air) Sources() []string {
	return []string{
		"density and heat capacity: E. W. Lemmon, R. T Jacobsen, S. G. Penoncello, D. G. Friend, " +
			"J. Phys. Chem. Ref. Data 29 (2000) 331-385; ideal gas and the terms linear in density",
		"viscosity and conductivity: E. W. Lemmon, R. T Jacobsen, Int. J. Thermophys. 25 (2004) 21-69; " +
			"without the critical enhancement",
	}
}

// At gives the properties at T (K) and p (Pa), both held within the range.
func (air) At(T, p float64) Properties {
	T = hold(T, airTLow, airTHigh)
	p = hold(p, airPLow, airPHigh)
	tau := airTj / T
	lnTau := math.Log(tau)
	delta, rho, cp := airState(T, p, tau, lnTau)
	mu, k := airTransport(T, tau, lnTau, delta)
	nu, alpha := mu/rho, k/(rho*cp)
	return Properties{T: T, P: p, Rho: rho, Cp: cp, Mu: mu, K: k, Nu: nu, Alpha: alpha, Pr: nu / alpha}
}

// hold brings x into low..high; a value that is no number becomes low.
func hold(x, low, high float64) float64 {
	if !(x > low) {
		return low
	}
	return math.Min(x, high)
}
