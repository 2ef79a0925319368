package radiation_test

import (
	"slices"
	"strings"
	"testing"

	"stillair/radiation"
)

func TestEveryFinish(t *testing.T) {
	all := radiation.Finishes()
	if len(all) != 81 {
		t.Errorf("%d finishes, the table has 81 rows", len(all))
	}
	seen := make(map[string]bool)
	for _, f := range all {
		t.Run(f.ID, func(t *testing.T) {
			if seen[f.ID] || f.ID == "" || f.Name == "" {
				t.Error("no id or name of its own")
			}
			seen[f.ID] = true
			if !ordered(f.Low, f.Typical, f.High) {
				t.Errorf("emissivity %g, %g, %g not in order within 0 to 1", f.Low, f.Typical, f.High)
			}
			if f.HasAbsorb && !ordered(f.AbsorbLow, f.Absorb, f.AbsorbHigh) {
				t.Errorf("absorptance %g, %g, %g not in order within 0 to 1", f.AbsorbLow, f.Absorb, f.AbsorbHigh)
			}
			if f.Source == "" || f.VerifiedBy == "" || f.Band == "" {
				t.Error("source, verification or band missing")
			}
			if !slices.Contains([]string{"high", "medium", "low"}, f.Confidence) {
				t.Errorf("confidence %q", f.Confidence)
			}
			if strings.HasPrefix(f.Source, "from memory") && !strings.Contains(f.VerifiedBy, "memory") {
				t.Error("a value from memory must say so")
			}
			if found, ok := radiation.FindFinish(f.Name); !ok || found.ID != f.ID {
				t.Errorf("its own name finds %q", found.ID)
			}
		})
	}
}

func ordered(low, typical, high float64) bool {
	return 0 < low && low <= typical && typical <= high && high <= 1
}

// Rows checked against what their sources say.
func TestFinishAgainstSource(t *testing.T) {
	for _, c := range []struct {
		id, source         string
		low, typical, high float64
	}{
		{"al_ht_polished", "HEDH (Heat Exchanger Design Handbook) 5.5.7", 0.03, 0.05, 0.06}, // 0.03 at 200 K, 0.05 at 400 K, 0.06 at 600 K
		{"st_iron_ht", "HEDH (Heat Exchanger Design Handbook) 5.5.7", 0.05, 0.09, 0.14},     // 0.05 at 200 K, 0.09 at 400 K, 0.14 at 600 K
		{"paint_al_si", "SCIRP journal table of balloon coatings", 0.28, 0.28, 0.45},        // two coatings, 0.28 and 0.45
		{"al_anod_chromic", "Wolfe", 0.55, 0.55, 0.55},                                      // sheet at 100 °C, total
		{"paint_transf", "thermography maker", 0.94, 0.94, 0.94},
		{"ss_304_heated", "infrared-camera manual", 0.36, 0.40, 0.44}, // 215 °C to 490 °C
	} {
		t.Run(c.id+" "+c.source, func(t *testing.T) {
			f, ok := radiation.FindFinish(c.id)
			if !ok || !strings.Contains(f.Source, c.source) {
				t.Fatalf("source is %q", f.Source)
			}
			if f.Low != c.low || f.Typical != c.typical || f.High != c.high {
				t.Errorf("got %g, %g, %g", f.Low, f.Typical, f.High)
			}
		})
	}
}

// Fortescue, Swinerd & Stark, Spacecraft Systems Engineering, 4th ed. 2011,
// Table 11.3: white silicone paint 0.83 with solar absorptance 0.26, 0.29 after
// 1000 h of ultraviolet; black polyurethane 0.95.
func TestAbsorptanceAgainstSource(t *testing.T) {
	white, _ := radiation.FindFinish("paint_white_space")
	if white.Typical != 0.83 || white.Absorb != 0.26 || white.AbsorbHigh != 0.29 {
		t.Errorf("white silicone paint: %+v", white)
	}
	black, _ := radiation.FindFinish("paint_black_pu")
	if black.Absorb != 0.95 {
		t.Errorf("black polyurethane: %+v", black)
	}
}

// Where the table has only the ends the upper one counts, where it has only one
// value that one, and where it has none there is none.
func TestAbsorptanceGaps(t *testing.T) {
	ends, _ := radiation.FindFinish("al_polished")
	if !ends.HasAbsorb || ends.AbsorbLow != 0.09 || ends.Absorb != 0.24 {
		t.Errorf("ends only: %+v", ends)
	}
	one, _ := radiation.FindFinish("al_anod")
	if !one.HasAbsorb || one.AbsorbLow != 0.14 || one.Absorb != 0.14 || one.AbsorbHigh != 0.14 {
		t.Errorf("one value: %+v", one)
	}
	if none, _ := radiation.FindFinish("st_oxid"); none.HasAbsorb {
		t.Errorf("no value: %+v", none)
	}
}

func TestFindFinish(t *testing.T) {
	for name, id := range map[string]string{
		"PAINT_LGREY":                         "paint_lgrey",
		"light grey paint (near RAL 7035)":    "paint_lgrey",
		"light grey paint":                    "paint_lgrey",
		"  Light-Gray   paint,":               "paint_lgrey",
		"galvanized sheet new bright":         "gi_new",
		"aluminum anodized, light gray":       "al_anod_grey",
		"aluminium cladding, bright":          "al_clad_bright",
		"concrete":                            "concrete",
		"wood":                                "wood",
		"stainless polished":                  "ss_polished",
		"aluminium oxidised at 600 °C":        "al_oxid_furnace",
		"aluminium, roughened (10 µm wavelen": "",
		"aluminium":                           "",
		"steel":                               "",
		"light gre":                           "",
		"":                                    "",
		" - ":                                 "",
	} {
		if f, ok := radiation.FindFinish(name); f.ID != id || ok != (id != "") {
			t.Errorf("%q finds %q, want %q", name, f.ID, id)
		}
	}
}

// The band of an infrared camera is carried and told apart.
func TestTotalEmissivity(t *testing.T) {
	partial := 0
	for _, f := range radiation.Finishes() {
		if !f.TotalEmissivity() {
			partial++
		}
	}
	if partial != 10 {
		t.Errorf("%d finishes are not total, the table has nine 8 µm to 14 µm and one 10 µm", partial)
	}
	if f, _ := radiation.FindFinish("al_anod_grey"); f.TotalEmissivity() || !strings.HasPrefix(f.Band, "8-14") {
		t.Errorf("band %q", f.Band)
	}
}

// The list handed out is a copy.
func TestFinishesIsACopy(t *testing.T) {
	radiation.Finishes()[0].Typical = 99
	if radiation.Finishes()[0].Typical == 99 {
		t.Error("a caller can change the catalogue")
	}
	if len(radiation.DataVersion()) != 12 {
		t.Errorf("data version %q", radiation.DataVersion())
	}
}
