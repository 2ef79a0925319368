package fluid

import "math"

// U.S. Standard Atmosphere, 1976, NOAA/NASA/USAF, Washington 1976: the layer
// below 11 km, where temperature falls by 6.5 K per kilometre of geopotential.
const (
	atmRadius   = 6356766 // m, effective radius of the Earth
	atmT0       = 288.15  // K at sea level
	atmP0       = 101325  // Pa at sea level
	atmLapse    = 0.0065  // K/m
	atmExponent = 5.25588 // g0 M / (R* L)
	atmLow      = -5000.0 // m
	atmHigh     = 11000.0 // m of geopotential
)

// geopotential turns a geometric altitude z into the geopotential altitude,
// both in m, held within -5..11 km.
func geopotential(z float64) float64 {
	return hold(atmRadius*z/(atmRadius+z), atmLow, atmHigh)
}

// StandardPressure is the pressure in Pa at the geometric altitude z in m
// above sea level in the U.S. Standard Atmosphere 1976. It holds from 5 km
// below sea level to 11 km of geopotential altitude; beyond, the value at the
// nearer end is returned.
func StandardPressure(z float64) float64 {
	return atmP0 * math.Pow(StandardTemperature(z)/atmT0, atmExponent)
}

// StandardTemperature is the temperature in K at the geometric altitude z in
// m in the U.S. Standard Atmosphere 1976, in the same range.
func StandardTemperature(z float64) float64 {
	if math.IsNaN(z) {
		z = 0
	}
	z = hold(z, -6000, 12000)
	return atmT0 - atmLapse*geopotential(z)
}
