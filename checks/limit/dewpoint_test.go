package limit_test

import (
	"fmt"
	"math"
	"testing"

	"pgregory.net/rapid"

	"stillair/checks/limit"
)

// Dew points in °C of a published dew-point table of the German building trade
// (Taupunkttabelle, rounded values in print) by air temperature in °C, for
// relative humidities of 50, 60, 70, 80 and 90 %. Dew points above 0 °C only:
// below, the table has frost points.
func TestDewPointTable(t *testing.T) {
	humidity := []float64{0.5, 0.6, 0.7, 0.8, 0.9}
	for air, row := range map[float64][]float64{
		10: {0.0, 2.5, 4.8, 6.8, 8.5},
		15: {4.7, 7.4, 9.6, 11.7, 13.5},
		20: {9.3, 12.0, 14.4, 16.5, 18.4},
		25: {13.8, 16.7, 19.1, 21.4, 23.3},
		30: {18.4, 21.4, 23.9, 26.1, 28.2},
	} {
		for i, want := range row {
			t.Run(fmt.Sprintf("%g °C %g %%", air, 100*humidity[i]), func(t *testing.T) {
				got := limit.DewPoint(air+limit.Celsius0, humidity[i]) - limit.Celsius0
				if math.Abs(got-want) > 0.15 {
					t.Errorf("got %.2f °C, the table has %.1f °C", got, want)
				}
			})
		}
	}
}

// Frost points of the same table at 50 %: the surface temperature lies above
// the dew point by about a tenth of its distance to 0 °C, as DewPoint says.
func TestFrostAboveDewPoint(t *testing.T) {
	for air, frost := range map[float64]float64{2: -6.6, 4: -4.9, 6: -3.1, 8: -1.6} {
		dew := limit.DewPoint(air+limit.Celsius0, 0.5) - limit.Celsius0
		if got := 0.9 * dew; math.Abs(got-frost) > 0.25 {
			t.Errorf("%g °C: %.2f °C, the table has %.1f °C", air, got, frost)
		}
	}
}

// The dew point is where the vapour pressure of the air is that of saturation,
// with the coefficients as Alduchov & Eskridge 1996 are quoted.
func TestDewPointProperties(t *testing.T) {
	pressure := func(K float64) float64 {
		t := K - limit.Celsius0
		return 610.94 * math.Exp(17.625*t/(243.04+t))
	}
	rapid.Check(t, func(t *rapid.T) {
		T := rapid.Float64Range(limit.DewPointMinT, limit.DewPointMaxT).Draw(t, "T")
		a, b := rapid.Float64Range(0.01, 1).Draw(t, "a"), rapid.Float64Range(0.01, 1).Draw(t, "b")
		dew := limit.DewPoint(T, a)
		if dew > T || math.Abs(pressure(dew)/(a*pressure(T))-1) > 1e-9 {
			t.Errorf("dew point %g K of air at %g K and %g", dew, T, a)
		}
		if a < b && limit.DewPoint(T, a) > limit.DewPoint(T, b) {
			t.Error("damper air has the lower dew point")
		}
		if !limit.DewPointInRange(T, a) {
			t.Error("out of range")
		}
	})
}

func TestDewPointAtTheEnds(t *testing.T) {
	if limit.DewPoint(300, 1) != 300 || limit.DewPoint(300, 1.2) != 300 {
		t.Error("saturated air must have its own temperature as dew point")
	}
	odd := []float64{0, -1, 30, math.NaN(), math.Inf(1), math.Inf(-1), 1e300}
	for _, T := range odd {
		for _, humidity := range append(odd, 0.5, 1) {
			if math.IsNaN(limit.DewPoint(T, humidity)) {
				t.Errorf("DewPoint(%g, %g) is no number", T, humidity)
			}
		}
	}
	if limit.DewPointInRange(limit.Celsius0+51, 0.5) || limit.DewPointInRange(300, 0) || limit.DewPointInRange(math.NaN(), 0.5) {
		t.Error("outside the fit counts as in range")
	}
}
