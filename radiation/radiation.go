// Package radiation holds what surfaces emit and absorb: the exchange of
// thermal radiation between grey diffuse surfaces, absorbed sunlight, and a
// catalogue of surface finishes. Temperatures are absolute, in kelvin.
//
// Out of scope: view factors of two given surfaces, enclosures of three or more
// surfaces, spectral surfaces, gases that absorb, the temperature of the sky.
package radiation

import "math"

// Sigma is the Stefan-Boltzmann constant in W/(m²·K⁴), exact in the SI of 2019.
// Source: CODATA 2018, Rev. Mod. Phys. 93 (2021) 025010.
const Sigma = 5.670374419e-8

// Exchange is the net heat flux in W/m² that a small grey surface of the given
// emissivity (0..1) at T1 loses to large surroundings at T2, where dT = T1 - T2.
//
//	q = ε σ (T1⁴ - T2⁴) = ε σ dT (T1 + T2)(T1² + T2²)
//
// The product form is used because T1⁴ - T2⁴ loses its leading digits when the
// temperatures are close: at 300 K and a difference of 1 µK eight digits are
// gone. For the same reason the caller, who often knows the difference better
// than the two temperatures, gives it separately.
//
// With a conductance in m² from Between in place of the emissivity the result
// is the heat between the two surfaces in W.
func Exchange(emissivity, dT, T1, T2 float64) float64 {
	return Coefficient(emissivity, T1, T2) * dT
}

// Coefficient is the radiation heat-transfer coefficient in W/(m²·K) of a small
// grey surface at T1 in large surroundings at T2,
//
//	h = ε σ (T1 + T2)(T1² + T2²)
//
// so that the flux is h (T1 - T2). It is positive, the same when T1 and T2
// change places, and 4 ε σ T³ when they are equal.
func Coefficient(emissivity, T1, T2 float64) float64 {
	return emissivity * Sigma * (T1 + T2) * (T1*T1 + T2*T2)
}

// Between is the conductance in m² between two grey diffuse surfaces of
// emissivity e1, e2 (0..1) and area A1, A2 (m²) that see only each other,
// F12 being the share of what leaves the first that strikes the second:
//
//	1/G = (1 - e1)/(e1 A1) + 1/(A1 F12) + (1 - e2)/(e2 A2),  Q = G σ (T1⁴ - T2⁴)
//
// It covers long parallel plates (A1 = A2, F12 = 1), long concentric cylinders
// and concentric spheres (first surface inside, F12 = 1), and a body in large
// surroundings (A2 infinite: G = e1 A1). A surface that does not emit, an area
// or a view factor of zero gives 0.
//
// Source: A. K. Oppenheim, Trans. ASME 78 (1956) 725-735, network method; the
// formula as printed in any textbook, e.g. Cengel & Ghajar, 5th ed. 2015, ch. 13.
func Between(e1, A1, e2, A2, F12 float64) float64 {
	return Series(conductance(A1*e1, 1-e1), conductance(A1*F12, 1), conductance(A2*e2, 1-e2))
}

// Series is the conductance of conductances in a row, such as the two gaps
// beside a radiation shield: 1/G = 1/G1 + 1/G2 + ... None, or one of them zero
// or no number, gives 0.
func Series(conductances ...float64) float64 {
	resistance := 0.0
	for _, g := range conductances {
		if !(g > 0) {
			return 0
		}
		resistance += 1 / g
	}
	switch {
	case len(conductances) == 0:
		return 0
	case resistance == 0:
		return math.Inf(1)
	}
	return 1 / resistance
}

// conductance is a/b; without any resistance b it is infinite.
func conductance(a, b float64) float64 {
	switch {
	case !(a > 0) || !(b >= 0):
		return 0
	case b == 0:
		return math.Inf(1)
	}
	return a / b
}

// Absorbed is the sunlight in W/m² that a surface of the given solar
// absorptance (0..1) takes up from an irradiance in W/m² on its own plane.
func Absorbed(irradiance, absorptance float64) float64 { return absorptance * irradiance }
