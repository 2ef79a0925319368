package limit_test

import (
	"fmt"
	"slices"
	"strings"
	"testing"

	"stillair/checks/limit"
)

func TestEveryEntry(t *testing.T) {
	all := limit.All()
	if len(all) != 207 {
		t.Errorf("%d entries, the table has 207 rows", len(all))
	}
	kinds := []string{"limit_abs", "limit_rise", "threshold_abs", "threshold_increment", "ambient", "contact_time", "property", "constant", "rule", "equation", "definition"}
	seen := make(map[string]bool)
	for _, e := range all {
		t.Run(e.ID, func(t *testing.T) {
			if seen[e.ID] || e.ID == "" || e.Item == "" || e.Group == "" {
				t.Error("no id, item or group of its own")
			}
			seen[e.ID] = true
			if !slices.Contains(kinds, e.Kind) {
				t.Errorf("kind %q", e.Kind)
			}
			if e.HasLow && e.HasHigh && e.Low > e.High {
				t.Errorf("range %g to %g", e.Low, e.High)
			}
			if e.Source == "" || e.VerifiedBy == "" || !slices.Contains([]string{"high", "medium", "low"}, e.Confidence) {
				t.Errorf("source %q, verified by %q, confidence %q", e.Source, e.VerifiedBy, e.Confidence)
			}
			if e.VerifiedBy == "memory" && e.Confidence != "low" {
				t.Error("a value from memory alone must be of low confidence")
			}
			if found, ok := limit.Find(strings.ToLower(e.ID)); !ok || found.ID != e.ID {
				t.Errorf("its own id finds %q", found.ID)
			}
			if e.Usable() && e.Unit != "°C" && e.Unit != "K" {
				t.Errorf("usable in %q", e.Unit)
			}
			if text := e.Text(); strings.Contains(text, "degC") || e.Usable() && strings.Contains(text, "_") || !strings.Contains(text, e.Item) {
				t.Errorf("text %q", text)
			}
		})
	}
}

// Limits as their sources quote them.
func TestLimitAgainstSource(t *testing.T) {
	const ambient = 35 + limit.Celsius0
	for _, c := range []struct {
		id, from string
		celsius  float64 // with an ambient of 35 °C
	}{
		{"C1055-60C", "insulation-industry articles citing ASTM C1055: 60 °C, 140 °F, about 5 s", 60},
		{"C1055-52C", "Ontario Building Code appendix note B-6.5.1.1.(3): 52 °C", 52},
		{"PIP-60", "process-industry practice: 60 °C", 60},
		{"PLANT-71", "facility practice note: 160 °F", 71},
		{"60950-m", "UL 1950 / EN 60950 Table 16 part 2: 45 K", 80},
		{"61439-term", "BS EN 61439 Table 6: terminals 70 K", 105},
		{"61439-enc-m", "from memory: IEC 61439-1 Table 6, metal covers 30 K", 65},
		{"61439-enc-i", "from memory: IEC 61439-1 Table 6, insulating covers 40 K", 75},
		{"TC-T4", "IEC 60079-0 temperature class T4: 135 °C", 135},
		{"TC-T6", "IEC 60079-0 temperature class T6: 85 °C", 85},
		{"62115-164", "IEC 62115 heating clause, metal handles: 25 K", 60},
		{"62368-TS1-1-10-plastic_rubber", "IEC 62368-1 Table 38, TS1 plastic: 77 °C", 77},
		{"NEC-term", "NEC 110.14(C): 60 °C, the lower of 60 °C and 75 °C", 60},
	} {
		t.Run(c.id+" "+c.from, func(t *testing.T) {
			e, err := limit.Rule(c.id)
			if err != nil {
				t.Fatal(err)
			}
			K, ok := e.Kelvin(ambient)
			if got := K - limit.Celsius0; !ok || !near(got, c.celsius) {
				t.Errorf("got %g °C, want %g °C", got, c.celsius)
			}
		})
	}
}

func near(a, b float64) bool { return a-b < 1e-9 && b-a < 1e-9 }

func TestRule(t *testing.T) {
	for id, problem := range map[string]string{
		"c1055-60c":  "",
		"BT-bm-60":   "",
		"C1055-70C":  "there is no limit",
		"":           "there is no limit",
		"OSHA-none":  "is no limit",
		"HM-E":       "is no limit",
		"HM-basal":   "is no limit", // inside the skin
		"C1055-eq-5": "is no limit", // of the skin
		"TC-margin":  "is no limit",
		"61439-alt":  "is no limit",
	} {
		_, err := limit.Rule(id)
		if problem == "" && err != nil || problem != "" && (err == nil || !strings.Contains(err.Error(), problem)) {
			t.Errorf("%q: error %v, want %q", id, err, problem)
		}
	}
	if e, _ := limit.Find("HM-E"); e.IsRise() {
		t.Error("an activation energy is no rise")
	}
	if e, _ := limit.Find("OSHA-none"); e.Usable() {
		t.Error("a rule without a number cannot be judged")
	} else if K, ok := e.Kelvin(300); ok || K != 0 {
		t.Errorf("Kelvin of a rule is %g", K)
	}
}

func TestText(t *testing.T) {
	for id, want := range map[string]string{
		"C1055-60C":             "at most 60 °C, personnel protection limit, metal, contact 5 s (industry practice from ASTM C1055)",
		"61439-man-m":           "rise of at most 15 K above ambient, manual operating means, metal (IEC 61439-1 (2011/2020), Table 6)",
		"508A-int":              "at most 50 °C (range 50 to 60 °C), usual internal-air design values (practice)",
		"BT-cg-0.5":             "84 °C, lower edge of the band 84 to 90 °C, burn threshold band, ceramic glass stone, contact 0.5 s (EN 563:2001 / ISO 13732-1, 0.5 s extension table)",
		"62368-TS2-60+-wood":    "at most 58 °C, TS2 limit: handles, knobs, grips held continuously (>= 1 min), wood, contact 60 s or longer (IEC 62368-1 ed.2/3, Table 38)",
		"62368-TS1-<1-metal":    "at most 70 °C, TS1 limit: need not be touched to operate (<1 s), metal, contact below 1 s (IEC 62368-1 ed.2/3, Table 38)",
		"62368-TS1-10-60-metal": "at most 51 °C, TS1 limit: held for short periods or touched occasionally (>10 s and <1 min), metal, contact 10 to 60 s (IEC 62368-1 ed.2/3, Table 38)",
		"HM-first":              "0.53, damage Omega for first degree (Henriques & Moritz 1947)",
	} {
		e, _ := limit.Find(id)
		if got := strings.ReplaceAll(e.Text(), "\u00a0", " "); got != want {
			t.Errorf("%s:\n got %s\nwant %s", id, got, want)
		}
	}
}

func TestAllIsACopy(t *testing.T) {
	limit.All()[0].Low = -1
	if limit.All()[0].Low == -1 {
		t.Error("a caller can change the table")
	}
	if len(limit.DataVersion()) != 12 {
		t.Errorf("data version %q", limit.DataVersion())
	}
}

func ExampleRule() {
	e, _ := limit.Rule("61439-enc-m")
	K, _ := e.Kelvin(35 + limit.Celsius0)
	fmt.Printf("%s, %s confidence: %.0f °C\n", e.Standard, e.Confidence, K-limit.Celsius0)
	// Output: IEC 61439-1 (2011/2020), low confidence: 65 °C
}
