package fluid_test

import (
	"fmt"

	"stillair/freeconv/fluid"
)

// Y. A. Cengel, A. J. Ghajar, Heat and Mass Transfer, 5th ed. 2015, Table A-15,
// air at 20 °C and 1 atm: density 1.204 kg/m³, specific heat 1007 J/(kg·K); the
// equations give 1006 J/(kg·K).
func Example() {
	air := fluid.Air.At(293.15, 101325)
	fmt.Printf("rho = %.2f kg/m³\n", air.Rho)
	fmt.Printf("cp  = %.2f kJ/(kg·K)\n", air.Cp/1000)
	// Output:
	// rho = 1.20 kg/m³
	// cp  = 1.01 kJ/(kg·K)
}

// U.S. Standard Atmosphere 1976 (table values from memory): 79 501 Pa at a
// geometric altitude of 2000 m.
func ExampleStandardPressure() {
	fmt.Printf("%.0f Pa\n", fluid.StandardPressure(2000))
	// Output: 79501 Pa
}

// U.S. Standard Atmosphere 1976 (table values from memory): 281.651 K at a
// geometric altitude of 1000 m.
func ExampleStandardTemperature() {
	fmt.Printf("%.3f K\n", fluid.StandardTemperature(1000))
	// Output: 281.651 K
}
