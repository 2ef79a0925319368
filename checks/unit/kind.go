package unit

import "math"

// Kind is what a number measures. Two kinds may share a dimension and differ
// in how they are shown (Length in mm, Altitude in m); Temperature and
// TemperatureDifference share one and never mix.
type Kind int

// The kinds of quantity. The comment gives the SI unit values are held in.
const (
	Temperature           Kind = iota // K, a place on the scale
	TemperatureDifference             // K, a step on the scale
	Length                            // m
	Altitude                          // m
	Area                              // m²
	Power                             // W
	Flux                              // W/m²
	HeatPerLength                     // W/m
	Coefficient                       // W/(m²·K)
	Conductivity                      // W/(m·K)
	Resistance                        // K/W
	Pressure                          // Pa
	Time                              // s
	Angle                             // rad
	Ratio                             // 1, shown as a number
	Percent                           // 1, shown in %
	Velocity                          // m/s
	Diffusivity                       // m²/s
	Viscosity                         // Pa·s
	Density                           // kg/m³
	SpecificHeat                      // J/(kg·K)
	kinds
)

// dim holds the powers of metre, kilogram, second, kelvin and radian.
type dim [5]int

// display is a unit results are shown in: shown = (si − zero) / size.
type display struct {
	symbol     string
	size, zero float64
}

type kindInfo struct {
	name    string // with its article: "a power"
	example string
	dim     dim
	single  bool // one unit symbol only, no expression
	si, us  display
}

// Sizes of units shown in the US system, from the exact definitions of NIST
// SP 811 (2008) appendix B; see symbols.
const (
	inch  = 0.0254
	foot  = 0.3048
	pound = 0.45359237
	btu   = 1055.05585262
	hour  = 3600
	psi   = pound * 9.80665 / (inch * inch)
	degF  = 1 / 1.8

	// horsepower is 745.69987158227022 W.
	horsepower = 550 * foot * pound * 9.80665

	// 0 °C and 0 °F in kelvin: T/K = t/°C + 273.15 = (t/°F + 459.67)/1.8.
	zeroC = 273.15
	zeroF = 459.67 / 1.8

	degree = math.Pi / 180
)

var info = [kinds]kindInfo{
	Temperature: {"a temperature", "40 °C", dim{0, 0, 0, 1}, true,
		display{"°C", 1, zeroC}, display{"°F", degF, zeroF}},
	TemperatureDifference: {"a temperature difference", "10 K", dim{0, 0, 0, 1}, true,
		display{"K", 1, 0}, display{"Δ°F", degF, 0}},
	Length:        {"a length", "600 mm", dim{1}, true, display{"mm", 1e-3, 0}, display{"in", inch, 0}},
	Altitude:      {"an altitude", "120 m", dim{1}, true, display{"m", 1, 0}, display{"ft", foot, 0}},
	Area:          {"an area", "0.5 m²", dim{2}, false, display{"m²", 1, 0}, display{"ft²", foot * foot, 0}},
	Power:         {"a power", "250 W", dim{2, 1, -3}, false, display{"W", 1, 0}, display{"W", 1, 0}},
	Flux:          {"a heat flux", "700 W/m²", dim{0, 1, -3}, false, display{"W/m²", 1, 0}, display{"Btu/(h·ft²)", btu / (hour * foot * foot), 0}},
	HeatPerLength: {"a heat per length", "75 W/m", dim{1, 1, -3}, false, display{"W/m", 1, 0}, display{"Btu/(h·ft)", btu / (hour * foot), 0}},
	Coefficient: {"a heat transfer coefficient", "5 W/(m²·K)", dim{0, 1, -3, -1}, false,
		display{"W/(m²·K)", 1, 0}, display{"Btu/(h·ft²·°F)", btu / (hour * foot * foot * degF), 0}},
	Conductivity: {"a thermal conductivity", "0.05 W/(m·K)", dim{1, 1, -3, -1}, false,
		display{"W/(m·K)", 1, 0}, display{"Btu·in/(h·ft²·°F)", btu * inch / (hour * foot * foot * degF), 0}},
	Resistance: {"a thermal resistance", "0.3 K/W", dim{-2, -1, 3, 1}, false,
		display{"K/W", 1, 0}, display{"Δ°F/W", degF, 0}},
	Pressure:     {"a pressure", "100 kPa", dim{-1, 1, -2}, false, display{"kPa", 1e3, 0}, display{"psi", psi, 0}},
	Time:         {"a time", "10 s", dim{0, 0, 1}, true, display{"s", 1, 0}, display{"s", 1, 0}},
	Angle:        {"an angle", "45 deg", dim{0, 0, 0, 0, 1}, true, display{"°", degree, 0}, display{"°", degree, 0}},
	Ratio:        {"a number", "0.85", dim{}, true, display{"", 1, 0}, display{"", 1, 0}},
	Percent:      {"a share", "10 %", dim{}, true, display{"%", 0.01, 0}, display{"%", 0.01, 0}},
	Velocity:     {"a velocity", "0.5 m/s", dim{1, 0, -1}, false, display{"m/s", 1, 0}, display{"ft/s", foot, 0}},
	Diffusivity:  {"a diffusivity", "1.6e-5 m²/s", dim{2, 0, -1}, false, display{"m²/s", 1, 0}, display{"ft²/s", foot * foot, 0}},
	Viscosity:    {"a viscosity", "1.85e-5 Pa·s", dim{-1, 1, -1}, false, display{"Pa·s", 1, 0}, display{"lb/(ft·h)", pound / (foot * hour), 0}},
	Density:      {"a density", "120 kg/m³", dim{-3, 1}, false, display{"kg/m³", 1, 0}, display{"lb/ft³", pound / (foot * foot * foot), 0}},
	SpecificHeat: {"a specific heat", "900 J/(kg·K)", dim{2, 0, -2, -1}, false, display{"J/(kg·K)", 1, 0}, display{"Btu/(lb·°F)", btu / (pound * degF), 0}},
}

// Name is the kind in words with its article: "a power".
func (k Kind) Name() string { return k.info().name }

// Example is a value of the kind as a person writes it: "250 W".
func (k Kind) Example() string { return k.info().example }

// SIUnit is the symbol of the coherent SI unit that values are held in; empty
// for plain numbers.
func (k Kind) SIUnit() string {
	switch k {
	case Temperature:
		return "K"
	case Length:
		return "m"
	case Pressure:
		return "Pa"
	case Angle:
		return "rad"
	case Percent:
		return ""
	}
	return k.info().si.symbol
}

func (k Kind) info() kindInfo {
	if k < 0 || k >= kinds {
		return info[Ratio]
	}
	return info[k]
}

// kindOf names a dimension that Parse met where it expected another.
func kindOf(d dim) string {
	for k := Length; k < kinds; k++ {
		if info[k].dim == d {
			return info[k].name
		}
	}
	return "a unit of another kind"
}
