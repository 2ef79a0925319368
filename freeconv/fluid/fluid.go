// Package fluid gives the properties of gases that free convection needs,
// from published equations, and the pressure of the standard atmosphere.
// All values are SI; temperatures are absolute, in kelvin.
package fluid

// Properties of a gas at one temperature and pressure.
type Properties struct {
	T     float64 // K
	P     float64 // Pa
	Rho   float64 // density, kg/m³
	Cp    float64 // specific heat at constant pressure, J/(kg·K)
	Mu    float64 // dynamic viscosity, Pa·s
	K     float64 // thermal conductivity, W/(m·K)
	Nu    float64 // kinematic viscosity Mu/Rho, m²/s
	Alpha float64 // thermal diffusivity K/(Rho·Cp), m²/s
	Pr    float64 // Prandtl number Nu/Alpha
}

// Gas is a substance whose properties can be asked for.
type Gas interface {
	Name() string
	// Sources lists the citation of each equation in use.
	Sources() []string
	// Range is the span of temperature, in K, over which the equations hold.
	Range() (low, high float64)
	// At gives the properties at T (K) and p (Pa). Outside Range the
	// temperature is held at the nearer end: the caller reports it, the
	// result is never NaN.
	At(T, p float64) Properties
}
