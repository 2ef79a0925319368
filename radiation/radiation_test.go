package radiation_test

import (
	"fmt"
	"math"
	"math/big"
	"os"
	"strconv"
	"strings"
	"testing"

	"pgregory.net/rapid"

	"stillair/radiation"
	"stillair/radiation/catalogue"
)

// Each function computes the quantity of one row of testdata/published.csv from
// the inputs printed in that row.
var published = map[string]func() float64{
	"RD01":   func() float64 { return 0.36 * radiation.Exchange(1, 363-303, 363, 303) },
	"RD02":   func() float64 { return 1.508 * radiation.Exchange(1, 343-293, 343, 293) },
	"VC07b":  func() float64 { return math.Pi * 0.25 * 0.12 * radiation.Exchange(0.95, 98-25, 371.15, 298.15) },
	"RAD-05": func() float64 { return between(1, 0.5, 1, 0.5, 0.285, 1273, 773) / 1000 },
	"RAD-28": func() float64 { return between(1, disc(0.05), 1, disc(0.05), 0.808, 1473, 373) },
	"RAD-29": func() float64 { return between(1, 25, 1, 25, 0.2, 800, 1500) / 1000 },
	"RAD-31": func() float64 { return between(0.2, 1, 0.7, 1, 1, 800, 500) },
	"RAD-32": func() float64 { return exchange(shielded(0.2, 0.1, 0.7), 800, 500) },
	"RAD-37": func() float64 { return 650 + radiation.Exchange(0.6, 250, 650, 400)/80 },
	"RAD-40": func() float64 {
		return between(0.02, math.Pi*0.02, 0.05, math.Pi*0.05, 1, 77, 300)
	},
	"RAD-41": func() float64 {
		bare := radiation.Between(0.02, 0.02, 0.05, 0.05, 1)
		with := radiation.Series(radiation.Between(0.02, 0.02, 0.02, 0.035, 1), radiation.Between(0.02, 0.035, 0.05, 0.05, 1))
		return 100 * (with/bare - 1)
	},
	"RAD-49": func() float64 { return finned(0.2) },
	"RAD-50": func() float64 { return finned(0.5) },
	"RAD-52": func() float64 {
		return 100 * (1 - shielded(0.3, 0.04, 0.8)/radiation.Between(0.3, 1, 0.8, 1, 1))
	},
	"RAD-58": func() float64 { return math.Pi * 0.00635 * radiation.Exchange(0.2, 230-80, 230, 80) },
	"RAD-59": func() float64 {
		room := math.Inf(1)
		bare := radiation.Between(0.2, 0.00635, 1, room, 1)
		with := radiation.Series(radiation.Between(0.2, 0.00635, 0.2, 0.0127, 1), radiation.Between(0.2, 0.0127, 1, room, 1))
		return 100 * (1 - with/bare)
	},
	"RAD-64": func() float64 { return between(1, sphere(0.5), 1, sphere(1), 1, 400, 300) },
	"RAD-65": func() float64 { return between(0.5, sphere(0.5), 0.5, sphere(1), 1, 400, 300) },
	"RAD-68": func() float64 {
		const foot, wattPerBtuPerHour = 0.3048, 0.29307107
		W := between(0.03, sphere(foot), 0.03, sphere(1.5*foot), 1, 163/1.8, 490/1.8)
		return W / wattPerBtuPerHour
	},
	"RAD-70": func() float64 { return between(0.3, 1, 0.5, 1, 1, 1073, 573) / 1000 },
	"RAD-71": func() float64 {
		q := exchange(shielded(0.3, 0.05, 0.5), 1073, 573)
		G := radiation.Between(0.3, 1, 0.05, 1, 1)
		return math.Pow(math.Pow(1073, 4)-q/(G*radiation.Sigma), 0.25) - 273.15
	},
	"RAD-73": func() float64 { return between(0.8, 1, 0.7, 1, 1, 866.5, 588.8) },
	"RAD-74": func() float64 { return between(0.05, 1, 0.05, 1, 1, 368, 293) },
}

func between(e1, A1, e2, A2, F12, T1, T2 float64) float64 {
	return exchange(radiation.Between(e1, A1, e2, A2, F12), T1, T2)
}

func exchange(G, T1, T2 float64) float64 { return radiation.Exchange(G, T1-T2, T1, T2) }

// shielded is the conductance per m² of two plates with a shield between them.
func shielded(e1, shield, e2 float64) float64 {
	return radiation.Series(radiation.Between(e1, 1, shield, 1, 1), radiation.Between(shield, 1, e2, 1, 1))
}

// finned is the effective emissivity of a surface with grooves of 60 behind
// openings of 10 and flat tips of 5, per unit depth.
func finned(e float64) float64 {
	return (radiation.Between(e, 60, 1, math.Inf(1), 10.0/60) + e*5) / (10 + 5)
}

func disc(r float64) float64   { return math.Pi * r * r }
func sphere(D float64) float64 { return math.Pi * D * D }

func TestPublishedExamples(t *testing.T) {
	data, err := os.ReadFile("testdata/published.csv")
	if err != nil {
		t.Fatal(err)
	}
	rows, err := catalogue.Read(string(data))
	if err != nil {
		t.Fatal(err)
	}
	if len(rows) != len(published) {
		t.Errorf("%d rows, %d computations", len(rows), len(published))
	}
	for _, r := range rows {
		t.Run(r.Text("id")+" "+r.Text("source"), func(t *testing.T) {
			compute, ok := published[r.Text("id")]
			if !ok {
				t.Fatal("no computation for this row")
			}
			want, _, err := r.Number("published")
			if err != nil {
				t.Fatal(err)
			}
			tolerance, _, err := r.Number("tolerance_rel")
			if err != nil {
				t.Fatal(err)
			}
			got := compute() * sigmaRatio(r.Text("inputs"))
			if !(math.Abs(got-want) <= tolerance*math.Abs(want)) {
				t.Errorf("%s %s: got %.6g %s, published %g ± %g %% (%s)",
					r.Text("description"), r.Text("quantity"), got, r.Text("unit"), want, 100*tolerance, r.Text("provenance"))
			}
		})
	}
}

// sigmaRatio allows for an older Stefan-Boltzmann constant that a source states.
func sigmaRatio(inputs string) float64 {
	_, text, found := strings.Cut(inputs, "sigma=5")
	if !found {
		return 1
	}
	number, _, _ := strings.Cut("5"+text, " ")
	sigma, err := strconv.ParseFloat(number, 64)
	if err != nil {
		return math.NaN()
	}
	return sigma / radiation.Sigma
}

// The constant as CODATA 2018 derives it from the exact k, h and c of the SI:
// σ = 2π⁵k⁴/(15h³c²).
func TestSigma(t *testing.T) {
	const k, h, c = 1.380649e-23, 6.62607015e-34, 299792458.0
	want := 2 * math.Pow(math.Pi, 5) * math.Pow(k, 4) / (15 * math.Pow(h, 3) * c * c)
	if math.Abs(radiation.Sigma/want-1) > 1e-9 {
		t.Errorf("Sigma is %.10g, CODATA 2018 gives %.10g", radiation.Sigma, want)
	}
}

// The product form keeps its digits where the difference of fourth powers has
// lost them. The expectation is the difference itself with 200 bits.
func TestSmallDifferences(t *testing.T) {
	for _, dT := range []float64{1e-12, 1e-9, 1e-6, 1e-3, 1, 100} {
		t.Run(fmt.Sprint(dT, " K"), func(t *testing.T) {
			want := fourthPowers(300, dT)
			got := radiation.Exchange(1, dT, 300+dT, 300) / radiation.Sigma
			if math.Abs(got/want-1) > 1e-14 {
				t.Errorf("got %.17g, want %.17g", got, want)
			}
		})
	}
}

// fourthPowers is (T + dT)⁴ - T⁴ to 200 bits.
func fourthPowers(T, dT float64) float64 {
	fourth := func(x *big.Float) *big.Float {
		square := new(big.Float).SetPrec(200).Mul(x, x)
		return square.Mul(square, square)
	}
	cold := new(big.Float).SetPrec(200).SetFloat64(T)
	hot := new(big.Float).SetPrec(200).Add(cold, big.NewFloat(dT))
	difference, _ := new(big.Float).SetPrec(200).Sub(fourth(hot), fourth(cold)).Float64()
	return difference
}

var (
	temperature = rapid.Float64Range(50, 2000)
	fraction    = rapid.Float64Range(0.01, 1)
	area        = rapid.Float64Range(0.01, 100)
)

func TestExchangeProperties(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		e, T1, T2 := fraction.Draw(t, "e"), temperature.Draw(t, "T1"), temperature.Draw(t, "T2")
		q := radiation.Exchange(e, T1-T2, T1, T2)
		if q != -radiation.Exchange(e, T2-T1, T2, T1) {
			t.Error("not antisymmetric")
		}
		if radiation.Exchange(e, 0, T1, T1) != 0 {
			t.Error("heat flows between equal temperatures")
		}
		if T1 > T2 && q <= 0 {
			t.Error("heat flows from cold to hot")
		}
		if h := radiation.Coefficient(e, T1, T2); !(h > 0) || h != radiation.Coefficient(e, T2, T1) {
			t.Errorf("coefficient %g is not positive and symmetric", h)
		}
		if !near(4*e*radiation.Sigma*T1*T1*T1, radiation.Coefficient(e, T1, T1)) {
			t.Error("not 4 ε σ T³ at equal temperatures")
		}
	})
}

func TestBetweenProperties(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		e1, e2 := fraction.Draw(t, "e1"), fraction.Draw(t, "e2")
		A1, A2 := area.Draw(t, "A1"), area.Draw(t, "A2")
		F12 := fraction.Draw(t, "share") * min(1, A2/A1)
		G := radiation.Between(e1, A1, e2, A2, F12)
		if back := radiation.Between(e2, A2, e1, A1, F12*A1/A2); !near(G, back) {
			t.Errorf("reciprocity: %g one way, %g the other", G, back)
		}
		if most := min(A1*F12, A1*e1, A2*e2); !(G > 0) || (G > most && !near(G, most)) {
			t.Errorf("conductance %g outside 0 to %g", G, most)
		}
		if black := radiation.Between(1, A1, 1, A2, F12); !near(black, A1*F12) {
			t.Errorf("black surfaces: %g, want A1 F12 = %g", black, A1*F12)
		}
		if room := radiation.Between(e1, A1, e2, math.Inf(1), 1); !near(room, e1*A1) {
			t.Errorf("large surroundings: %g, want e1 A1 = %g", room, e1*A1)
		}
	})
}

func near(a, b float64) bool { return math.Abs(a-b) <= 1e-12*math.Abs(b) }

// Meaningless surfaces pass no heat, and nothing is ever NaN.
func TestBetweenWithoutExchange(t *testing.T) {
	for _, bad := range []float64{0, -1, math.NaN()} {
		for i := range 5 {
			v := []float64{0.5, 1, 0.5, 1, 0.5}
			v[i] = bad
			if G := radiation.Between(v[0], v[1], v[2], v[3], v[4]); G != 0 {
				t.Errorf("Between(%v) is %g, want 0", v, G)
			}
		}
	}
	if radiation.Between(1.5, 1, 0.5, 1, 1) != 0 {
		t.Error("an emissivity above 1 must not exchange heat")
	}
	if radiation.Series() != 0 {
		t.Error("an empty row of conductances must pass nothing")
	}
}

// RD01: Cengel & Ghajar, Heat and Mass Transfer, 5th ed. 2015, Example 9-2,
// radiation of a black plate of 0.36 m² at 363 K to a room at 303 K.
// The book prints 182 W.
func ExampleExchange() {
	q := radiation.Exchange(1, 60, 363, 303)
	fmt.Printf("%.0f W\n", 0.36*q)
	// Output: 182 W
}

// RAD-31: Cengel & Ghajar, Example 13-7, large grey parallel plates at 800 K
// and 500 K with emissivities of 0.2 and 0.7. The book prints 3625 W/m², with
// 5.67e-8 for the Stefan-Boltzmann constant.
func ExampleBetween() {
	G := radiation.Between(0.2, 1, 0.7, 1, 1)
	fmt.Printf("%.2f kW/m²\n", radiation.Exchange(G, 300, 800, 500)/1000)
	// Output: 3.63 kW/m²
}

// White paint, aged, takes up 0.34 of the sun (EPA AP-42 chapter 7.1, from
// memory).
func ExampleAbsorbed() {
	white, _ := radiation.FindFinish("white paint or lacquer")
	fmt.Printf("%.0f W/m²\n", radiation.Absorbed(700, white.AbsorbHigh))
	// Output: 238 W/m²
}
