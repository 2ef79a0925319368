package limit

import "math"

// Coefficients of the Magnus form of O. A. Alduchov & R. E. Eskridge, Improved
// Magnus form approximation of saturation vapor pressure, J. Appl. Meteor. 35
// (1996) 601-609: the vapour pressure over liquid water goes as
// exp(a t/(b + t)), t in °C. Written from memory of the paper; several open
// implementations that cite it have the same figures.
const (
	magnusA = 17.625
	magnusB = 243.04 // °C
)

// The paper fits -40 °C to 50 °C (from memory).
const (
	DewPointMinT = Celsius0 - 40
	DewPointMaxT = Celsius0 + 50
)

// DewPoint is the temperature in kelvin at which air at T in kelvin with a
// relative humidity over liquid water, 0 to 1, begins to shed water:
//
//	γ = ln(humidity) + a t/(b + t),  t_d = b γ/(a - γ)   in °C
//
// It is never below -243.04 °C, the value that the formula tends to in dry air,
// and for air warmer than that never above T. Humidity above 1 counts as 1;
// humidity of zero, below zero or no number as dry air. A surface below 0 °C
// meets frost at a temperature above this dew point, by about a tenth of the
// distance to 0 °C.
func DewPoint(T, humidity float64) float64 {
	const dry = Celsius0 - magnusB
	t := T - Celsius0
	if !(humidity > 0) || !(t > -magnusB) {
		return dry
	}
	if humidity >= 1 {
		return T
	}
	gamma := math.Log(humidity) + magnusA*t/(magnusB+t)
	if !(gamma < magnusA) {
		return dry
	}
	return max(dry, min(T, Celsius0+magnusB*gamma/(magnusA-gamma)))
}

// DewPointInRange reports whether T in kelvin lies within the fit behind
// DewPoint and the humidity within 0 to 1.
func DewPointInRange(T, humidity float64) bool {
	return T >= DewPointMinT && T <= DewPointMaxT && humidity > 0 && humidity <= 1
}
