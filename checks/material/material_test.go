package material_test

import (
	"fmt"
	"math"
	"slices"
	"testing"

	"pgregory.net/rapid"

	"stillair/checks/material"
)

const zero = material.Celsius0

func TestEveryMaterial(t *testing.T) {
	points := 0
	seen := make(map[string]bool)
	for _, m := range material.All() {
		t.Run(m.ID, func(t *testing.T) {
			if seen[m.ID] || m.ID == "" || m.Name == "" {
				t.Error("no id or name of its own")
			}
			seen[m.ID] = true
			points += len(m.Points)
			checkPoints(t, m.Points)
			if m.Class != "structural" && m.Class != "insulation" {
				t.Errorf("class %q", m.Class)
			}
			if m.Source == "" || m.VerifiedBy == "" || !slices.Contains([]string{"high", "medium", "low"}, m.Confidence) {
				t.Errorf("source %q, verified by %q, confidence %q", m.Source, m.VerifiedBy, m.Confidence)
			}
			if found, ok := material.Find(m.Name); !ok || found.ID != m.ID {
				t.Errorf("its own name finds %q", found.ID)
			}
		})
	}
	// 124 rows; each of the four formulas is one row and gives two points.
	if points != 124+4 {
		t.Errorf("%d points", points)
	}
}

func checkPoints(t *testing.T, points []material.Point) {
	t.Helper()
	if len(points) == 0 {
		t.Error("no conductivity")
	}
	for i, p := range points {
		if !(p.K > 0 && p.K < 500 && p.T > 0) {
			t.Errorf("point %+v", p)
		}
		if i > 0 && !(p.T > points[i-1].T) {
			t.Errorf("points not in order at %g K", p.T)
		}
	}
}

// Conductivities as their sources print them, all but the marked ones in print.
func TestConductivityAgainstSource(t *testing.T) {
	for _, c := range []struct {
		name string
		t, k float64 // °C, W/(m·K)
		from string
	}{
		{"aluminium, pure", 27, 237, "Incropera et al., Table A.1, 300 K"},
		{"aluminium, pure", 527, 218, "Incropera et al., Table A.1, 800 K"},
		{"copper, pure", 327, 379, "Incropera et al., Table A.1, 600 K"},
		{"stainless AISI 316", 127, 15.2, "Incropera et al., Table A.1, 400 K"},
		{"steel, design value", 20, 50, "EN ISO 10456:2007"},
		{"stainless, design value", 20, 17, "EN ISO 10456:2007"},
		{"steel sheet (metal surface)", 20, 45.28, "ASHRAE Handbook of Fundamentals 2005, ch. 30"},
		{"carbon steel AISI 1010", 127, 58.7, "from memory: Incropera et al., Table A.1, 400 K"},
		{"stone-wool pipe section 120 kg/m³, curve 1", 50, 0.037, "data sheet to EN 14303"},
		{"stone-wool pipe section 120 kg/m³, curve 2", 150, 0.056, "data sheet to EN 14303"},
		{"cellular glass block", -73, 0.0303, "NIA chart of ASTM C552 maxima"},
		{"calcium silicate ASTM C533 Type I (maximum)", 38, 0.0591, "ASTM C533, 0.41 Btu·in/(h·ft²·°F) at 100 °F"},
		{"structural carbon steel, Eurocode", 20, 53.334, "EN 1993-1-2:2005, 3.4.1.3: 54 - 3.33e-2 × 20"},
		{"structural carbon steel, Eurocode", 100, 50.67, "EN 1993-1-2:2005, 3.4.1.3: 54 - 3.33e-2 × 100"},
		{"structural carbon steel, Eurocode", 800, 27.36, "EN 1993-1-2:2005, 3.4.1.3: 54 - 3.33e-2 × 800"},
		{"stainless, Eurocode", 100, 15.87, "from memory: EN 1993-1-2, Annex C: 14.6 + 1.27e-2 × 100"},
		{"aluminium 3xxx/6xxx", 100, 197, "from memory: EN 1999-1-2: 0.07 × 100 + 190"},
		{"aluminium 5xxx/7xxx", 100, 150, "from memory: EN 1999-1-2: 0.10 × 100 + 140"},
	} {
		t.Run(fmt.Sprintf("%s %g °C, %s", c.name, c.t, c.from), func(t *testing.T) {
			m, ok := material.Find(c.name)
			if !ok {
				t.Fatal("not found")
			}
			if k := m.At(c.t + zero); math.Abs(k-c.k) > 1e-9*c.k {
				t.Errorf("got %g W/(m·K), the source has %g", k, c.k)
			}
		})
	}
}

// One Btu·in/(h·ft²·°F) is 0.1442279 W/(m·K) (NIST SP 811, Appendix B.8); the
// C533 maxima are 0.41 and 0.50 of them.
func TestCalciumSilicateConversion(t *testing.T) {
	for name, imperial := range map[string]float64{"cs_c533_1": 0.41, "cs_c533_2": 0.50} {
		m, _ := material.Find(name)
		if k := m.At(38 + zero); math.Abs(k-imperial*0.1442279) > 0.00005 {
			t.Errorf("%s: %g W/(m·K)", name, k)
		}
	}
}

// The mean from 10 °C to 100 °C of the stone-wool curve 1 (0.033, 0.037, 0.044
// W/(m·K) at 10 °C, 50 °C, 100 °C) by hand: two trapezia over 90 K.
func TestMeanByHand(t *testing.T) {
	wool, _ := material.Find("rw_pipe_1")
	want := (40*(0.033+0.037)/2 + 50*(0.037+0.044)/2) / 90
	if k := wool.Mean(10+zero, 100+zero); math.Abs(k-want) > 1e-15 {
		t.Errorf("got %.17g, want %.17g", k, want)
	}
	// Below the table the end value holds: 30 K of it, then the first trapezium.
	want = (30*0.033 + 40*(0.033+0.037)/2) / 70
	if k := wool.Mean(-20+zero, 50+zero); math.Abs(k-want) > 1e-15 {
		t.Errorf("got %.17g, want %.17g", k, want)
	}
}

// The mean of a straight line is its value in the middle, whatever the distance,
// so close temperatures keep all digits.
func TestMeanKeepsDigits(t *testing.T) {
	wool, _ := material.Find("rw_pipe_1")
	T := 30 + zero
	for _, dT := range []float64{0, 1e-12, 1e-9, 1e-6, 1e-3, 1} {
		k := wool.Mean(T, T+dT)
		if want := 0.035 + 0.0001*dT/2; math.Abs(k-want) > 1e-15 {
			t.Errorf("over %g K: %.17g, want %.17g", dT, k, want)
		}
	}
}

var temperature = rapid.Float64Range(100, 1100)

func TestMeanProperties(t *testing.T) {
	all := material.All()
	rapid.Check(t, func(t *rapid.T) {
		m := rapid.SampledFrom(all).Draw(t, "material")
		a, b, c := temperature.Draw(t, "a"), temperature.Draw(t, "b"), temperature.Draw(t, "c")
		if m.Mean(a, b) != m.Mean(b, a) {
			t.Error("the order of the temperatures matters")
		}
		low, high := min(m.At(a), m.At(b)), max(m.At(a), m.At(b))
		for _, p := range m.Points {
			low, high = min(low, p.K), max(high, p.K)
		}
		if k := m.Mean(a, b); k < low*(1-1e-12) || k > high*(1+1e-12) {
			t.Errorf("mean %g outside %g to %g", k, low, high)
		}
		whole := m.Mean(a, c) * (c - a)
		if parts := m.Mean(a, b)*(b-a) + m.Mean(b, c)*(c-b); math.Abs(parts-whole) > 1e-9*high*1000 {
			t.Errorf("integral %g over the whole, %g in parts", whole, parts)
		}
	})
}

// Beyond its hot end a rising table goes on with its last slope, so that hot
// insulation is not made better than it is; a falling one, and the cold end of
// both, are held.
func TestBeyondTheTable(t *testing.T) {
	wool, _ := material.Find("rw_pipe_2")
	last := wool.Points[len(wool.Points)-1]
	slope := (last.K - wool.Points[len(wool.Points)-2].K) / 50
	if got, want := wool.At(last.T+30), last.K+30*slope; math.Abs(got-want) > 1e-12 {
		t.Errorf("30 K above the table: %g, want %g", got, want)
	}
	if got := wool.At(wool.Points[0].T - 30); got != wool.Points[0].K {
		t.Errorf("30 K below the table: %g, want %g", got, wool.Points[0].K)
	}
	copper, _ := material.Find("cu")
	if got, end := copper.At(2000), copper.Points[len(copper.Points)-1].K; got != end {
		t.Errorf("a falling table is held: %g, want %g", got, end)
	}
}

// A fine sum of the conductivity itself agrees with the exact mean.
func TestMeanAgainstSum(t *testing.T) {
	for _, m := range material.All() {
		const from, to, n = 150.0, 900.0, 20000
		sum := 0.0
		for i := range n {
			sum += m.At(from + (to-from)*(float64(i)+0.5)/n)
		}
		if k := m.Mean(from, to); math.Abs(k-sum/n) > 1e-6*k {
			t.Errorf("%s: mean %g, sum %g", m.ID, k, sum/n)
		}
	}
}

// No input gives NaN, and a material without points conducts nothing.
func TestNeverNaN(t *testing.T) {
	odd := []float64{0, -1, math.NaN(), math.Inf(1), math.Inf(-1), math.MaxFloat64, -math.MaxFloat64, 300}
	wool, _ := material.Find("rw_pipe_1")
	for _, a := range odd {
		if k := wool.At(a); !(k >= 0.033 && k <= 0.5) {
			t.Errorf("At(%g) is %g", a, k)
		}
		for _, b := range odd {
			if k := wool.Mean(a, b); !(k >= 0.033 && k <= 0.5000001) {
				t.Errorf("Mean(%g, %g) is %g", a, b, k)
			}
		}
	}
	if none := (material.Material{}); none.Mean(300, 400) != 0 || none.InRange(300, 300) {
		t.Error("a material without points must conduct nothing and have no range")
	}
}

func TestInRange(t *testing.T) {
	for _, c := range []struct {
		id     string
		t1, t2 float64 // °C
		want   bool
	}{
		{"rw_pipe_1", 10, 150, true}, {"rw_pipe_1", 150, 10, true}, {"rw_pipe_1", 9, 50, false}, {"rw_pipe_1", 50, 151, false},
		{"st_en", 20, 800, true}, {"st_en", 20, 801, false},
		{"cs_c533_1", -12, 88, true}, {"cs_c533_1", -12.1, 20, false}, {"cs_c533_1", 20, 88.1, false}, {"cs_c533_1", 38, 184, false},
	} {
		m, _ := material.Find(c.id)
		if got := m.InRange(c.t1+zero, c.t2+zero); got != c.want {
			t.Errorf("%s from %g °C to %g °C: %v", c.id, c.t1, c.t2, got)
		}
	}
}

func TestFind(t *testing.T) {
	for name, id := range map[string]string{
		"ST_DESIGN":          "st_design",
		"steel, design":      "st_design",
		"Plain Carbon Steel": "st_plain",
		"aluminum pure":      "al_pure",
		"stone wool pipe section 120 kg/m3, curve 1": "rw_pipe_1",
		"stainless AISI 304":                         "ss_304",
		"softwood":                                   "softwood",
		"steel":                                      "",
		"carbon steel sheet":                         "",
		"aluminium":                                  "",
		"stone-wool":                                 "",
		"":                                           "",
	} {
		if m, ok := material.Find(name); m.ID != id || ok != (id != "") {
			t.Errorf("%q finds %q, want %q", name, m.ID, id)
		}
	}
}

// A material is as well known as its least known point.
func TestConfidence(t *testing.T) {
	m, _ := material.Find("st_1010") // 27 °C in print, the others from memory
	if m.Confidence != "low" || m.VerifiedBy != "print ; memory" {
		t.Errorf("confidence %q, verified by %q", m.Confidence, m.VerifiedBy)
	}
	if m, _ := material.Find("al_pure"); m.Confidence != "high" || m.C != 903 || m.Rho != 2702 {
		t.Errorf("aluminium: %+v", m)
	}
}

func TestDataVersion(t *testing.T) {
	if len(material.DataVersion()) != 12 {
		t.Errorf("data version %q", material.DataVersion())
	}
}

// The mean conductivity of the stone-wool section of the EN 14303 data sheet
// between a pipe of 150 °C and a jacket of 50 °C, by hand
// (50 × (0.037 + 0.044)/2 + 50 × (0.044 + 0.052)/2)/100.
func ExampleMaterial_Mean() {
	wool, _ := material.Find("stone-wool pipe section 120 kg/m³, curve 1")
	fmt.Printf("%.5f W/(m·K)\n", wool.Mean(150+material.Celsius0, 50+material.Celsius0))
	// Output: 0.04425 W/(m·K)
}
