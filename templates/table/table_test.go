package table

import (
	"os"
	"path/filepath"
	"strings"
	"testing"

	"stillair/checks"
	"stillair/checks/casefile"
	"stillair/checks/unit"
)

// invented is an outcome with invented numbers: it tests the layout, not the
// physics.
func invented() *checks.Outcome {
	sun := checks.LoadOutcome{
		Name: "summer sun", Status: checks.Converged, Iterations: 12, ClosureW: 3.2e-10, HeatW: 632.9, Governing: true, Verdict: checks.Fail,
		Temps: []checks.Temp{
			{At: "inside air", K: 355.95, MinusK: 5.2, PlusK: 5.47, Kind: "air", Governing: true},
			{At: "front", K: 347.15, MinusK: 4.41, PlusK: 4.6, Kind: "outer surface"},
			{At: "top", K: 271.04, MinusK: 0.31, PlusK: 0.42, Kind: "outer surface"},
		},
		Heat: []checks.HeatPath{
			{From: "inside air", To: "front", By: "convection", W: 67.68},
			{From: "front", To: "air", By: "convection", W: 119.1, Share: 0.188, Final: true},
		},
		Films: []checks.FilmRow{
			{At: "front", Side: "outside", Method: "long name", MethodID: "churchill-chu-1975-plate", LengthM: 1, Ra: 2.054e9, Nu: 153.3, H: 4.37, InRange: true},
			{At: "top", Side: "inside", MethodID: "lloyd-moran-1974", LengthM: 0.109, Ra: 12500, Nu: 5.7, H: 1.37, Range: "Ra below 20 000"},
		},
		Verdicts: []checks.Judged{
			{At: "inside air", Limit: "at most 55 °C", Why: "device list", LimitK: 328.15, ValueK: 355.95, MarginK: -27.8, Uncertainty: 5.47, Verdict: checks.Fail, Governing: true},
			{At: "front", Limit: "at most 60 °C", Source: "Standard X:2020", Confidence: "low", LimitK: 333.15, ValueK: 333.19, MarginK: -0.04, Uncertainty: 4.6, Verdict: checks.ConditionalFail, Touch: true},
		},
		Effects:    []checks.Effect{{At: "inside air", Of: "heat", Shift: "+10 %", UpK: 2.1, DownK: -2.2}, {At: "inside air", Of: "emissivity", Shift: "0.85 .. 0.95", UpK: 0.8, DownK: -0.7}},
		Second:     &checks.SecondMethod{Methods: []string{"A 1950"}, Status: checks.Converged, Rows: []checks.SecondRow{{At: "inside air", FirstK: 355.95, K: 357.65, DiffK: 1.7}}},
		CrossCheck: checks.CrossCheck{Iterations: 40, MaxDiffK: 1e-9, Agrees: true},
		PressurePa: 101325, Notes: []string{"the roof is in the sun"},
	}
	shade := checks.LoadOutcome{
		Name: "shade", Status: checks.Converged, HeatW: 250, Verdict: checks.Pass,
		Temps:    []checks.Temp{{At: "inside air", K: 320, PlusK: 3, Kind: "air"}, {At: "front", K: 315, Kind: "outer surface"}},
		Verdicts: []checks.Judged{{At: "inside air", Limit: "at most 55 °C", LimitK: 328.15, ValueK: 320, MarginK: 8.15, Uncertainty: 3, Verdict: checks.Pass}},
	}
	return &checks.Outcome{
		Case:    checks.CaseID{Title: "Panel", Tag: "CP-1", SHA256: "ab12"},
		Program: checks.Program{Name: "stillair", Version: "v0", Data: "d0"},
		Loads:   []checks.LoadOutcome{sun, shade}, Verdict: checks.Fail, Governs: "summer sun",
		Cautions: []string{"one", "two", "three", "four", "five"},
		Assumed:  []casefile.Input{{Label: "radiant temperature", Typed: "40 °C", Source: "air temperature"}},
		File:     &casefile.File{Warnings: []casefile.Finding{{Code: "W-1", Line: 3, Message: "odd but allowed"}}},
	}
}

func render(t *testing.T, o *checks.Outcome, opt Options) string {
	t.Helper()
	var b strings.Builder
	if err := Check(&b, o, opt); err != nil {
		t.Fatal(err)
	}
	return b.String()
}

// TestGolden compares the layout with testdata; UPDATE=1 rewrites it.
func TestGolden(t *testing.T) {
	for name, opt := range map[string]Options{
		"si.txt":         {},
		"us-verbose.txt": {Units: unit.US, Verbose: true},
		"narrow.txt":     {Width: 60, Partial: "Only the load cases asked for were computed."},
	} {
		got := render(t, invented(), opt)
		path := filepath.Join("testdata", name)
		if os.Getenv("UPDATE") != "" {
			if err := os.WriteFile(path, []byte(got), 0o644); err != nil {
				t.Fatal(err)
			}
		}
		want, err := os.ReadFile(path)
		if err != nil {
			t.Fatal(err)
		}
		if got != string(want) {
			t.Errorf("%s differs (UPDATE=1 go test rewrites it):\n%s", name, got)
		}
	}
}

func TestColourAddsNothingButColour(t *testing.T) {
	plain := render(t, invented(), Options{})
	coloured := render(t, invented(), Options{Color: true})
	for _, code := range []string{reset, "\x1b[32m", "\x1b[33m", "\x1b[1;31m"} {
		coloured = strings.ReplaceAll(coloured, code, "")
	}
	if coloured != plain {
		t.Error("the coloured report says something else than the plain one")
	}
}

func TestHostileTextIsHarmless(t *testing.T) {
	o := invented()
	o.Case.Title = "a\x1b[2Jb\u202Ec\nd"
	if got := render(t, o, Options{}); strings.ContainsAny(got, "\x1b\u202E") || !strings.Contains(got, "c d") {
		t.Errorf("control characters reach the terminal: %q", strings.SplitN(got, "\n", 2)[0])
	}
}

func TestNothingIsCut(t *testing.T) {
	o := invented()
	o.Case.Tag = strings.Repeat("x", 200)
	o.Loads[0].Verdicts[0].Why = strings.Repeat("long reason ", 40) + "end"
	got := render(t, o, Options{})
	for _, want := range []string{o.Case.Tag, o.Loads[0].Verdicts[0].Why} {
		if !strings.Contains(got, want) {
			t.Errorf("cut: %q", want)
		}
	}
}

// A margin of -0.04 K must not read as 0.0: the verdict has to be visible in
// the numbers beside it.
func TestMarginNeverRoundsOntoTheLimit(t *testing.T) {
	if got := render(t, invented(), Options{}); !strings.Contains(got, "-0.04") {
		t.Errorf("margin is not visible:\n%s", got)
	}
}

func TestNoResult(t *testing.T) {
	o := invented()
	o.Loads[1] = checks.LoadOutcome{Name: "shade", Status: checks.Impossible, Message: "Load case shade: the front face sheds no heat."}
	o.Verdict = checks.NoResult
	got := render(t, o, Options{})
	for _, want := range []string{"NO RESULT", "impossible", "the front face sheds no heat"} {
		if !strings.Contains(got, want) {
			t.Errorf("%q is missing:\n%s", want, got)
		}
	}
}

func TestPower(t *testing.T) {
	for v, want := range map[float64]string{0: "0.00", 2.054e9: "2.05·10⁹", 12500: "12\u2009500", 5.7: "5.70", 123: "123", 3e-10: "3.00·10⁻¹⁰"} {
		if got := power(v); got != want {
			t.Errorf("power(%g) = %q, want %q", v, got, want)
		}
	}
}

func TestEveryVerdictHasAMeaning(t *testing.T) {
	for _, v := range []checks.Verdict{checks.Pass, checks.ConditionalPass, checks.ConditionalFail, checks.Fail, checks.None, checks.NotJudged, checks.NoResult} {
		if meaning[v] == "" {
			t.Errorf("%q is not explained", v)
		}
	}
}
