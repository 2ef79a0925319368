package checks

import (
	"math"
	"os"
	"strings"
	"testing"
)

// The scenarios below are invented; the expected numbers are independent
// estimates made with other code from the same published relations (Churchill
// & Chu 1975, Lloyd & Moran 1974, Radziemska & Lewandowski 2001). They show
// that two people get the same answer, not that nature agrees. Tolerances:
// 0.5 K on temperatures and 1 % on heat flows, because the property fits
// differ.
const (
	scenarioK = 0.5
	scenarioQ = 0.01
)

func starterCase(t testing.TB, name string) string {
	t.Helper()
	b, err := os.ReadFile("../templates/starter/" + name)
	if err != nil {
		t.Fatal(err)
	}
	return string(b)
}

func loadNamed(t testing.TB, o *Outcome, name string) LoadOutcome {
	t.Helper()
	for _, l := range o.Loads {
		if l.Name == name {
			if l.Status != Converged {
				t.Fatal(l.Message)
			}
			return l
		}
	}
	t.Fatalf("no load case %q", name)
	return LoadOutcome{}
}

func temp(t testing.TB, l LoadOutcome, at string) Temp {
	t.Helper()
	for _, x := range l.Temps {
		if x.At == at {
			return x
		}
	}
	t.Fatalf("%s: no temperature at %s", l.Name, at)
	return Temp{}
}

func celsius(k float64) float64 { return k - 273.15 }

// Sealed outdoor control panel, 250 W, wall mounted.
func TestScenarioSealedPanel(t *testing.T) {
	o := run(t, starterCase(t, "panel.yaml"))
	for _, c := range []struct {
		load, at string
		want     float64 // °C
	}{
		{"summer sun", "inside air", 82.8},
		{"summer sun", "front", 74.0},
		{"summer shade", "inside air", 67.7},
		{"sun shield", "inside air", 70.1},
		{"sun shield", "front", 56.7},
		{"winter night", "inside air", -5.7},
		{"winter night", "top", -14.6},
		{"humid night", "inside air", 13.5},
		{"humid night", "top", 9.3},
	} {
		got := celsius(temp(t, loadNamed(t, o, c.load), c.at).K)
		if math.Abs(got-c.want) > scenarioK {
			t.Errorf("%s, %s: %.2f °C, independent estimate %.1f °C", c.load, c.at, got, c.want)
		}
	}
	sun := 0.0
	for _, h := range loadNamed(t, o, "summer sun").Heat {
		if h.By == "sun" {
			sun += h.W
		}
	}
	if math.Abs(sun/383-1) > scenarioQ {
		t.Errorf("absorbed sun %.1f W, independent estimate 383 W", sun)
	}
	if dew := celsius(loadNamed(t, o, "humid night").DewPointK); math.Abs(dew-12.5) > 0.1 {
		t.Errorf("dew point %.2f °C, independent estimate 12.5 °C", dew)
	}
	if u := temp(t, loadNamed(t, o, "summer sun"), "inside air").PlusK; math.Abs(u-5.5) > 1.0 {
		t.Errorf("uncertainty in the sun %.2f K, independent estimate 5.5 K from nearly the same shifts", u)
	}
	for _, l := range []string{"summer sun", "summer shade", "sun shield"} {
		if v := verdictOf(t, loadNamed(t, o, l), "inside air", "at most 55"); v != Fail {
			t.Errorf("%s: inside air %s, independent estimate fail", l, v)
		}
	}
	if v := verdictOf(t, loadNamed(t, o, "humid night"), "top", "no condensation"); v != Fail && v != ConditionalFail {
		t.Errorf("condensation on the roof: %s", v)
	}
}

func verdictOf(t testing.TB, l LoadOutcome, at, limit string) Verdict {
	t.Helper()
	for _, v := range l.Verdicts {
		if v.At == at && strings.HasPrefix(v.Limit, limit) {
			return v.Verdict
		}
	}
	t.Fatalf("%s: %s was not judged against %q", l.Name, at, limit)
	return ""
}

// The sensitivities of the panel in the sun, as the independent estimate lists
// them. Both codes shift the same inputs by the same amounts.
func TestScenarioPanelSensitivities(t *testing.T) {
	l := loadNamed(t, run(t, starterCase(t, "panel.yaml")), "summer sun")
	for of, want := range map[string]float64{
		"solar absorptance": 3.0, "effective emissivity inside": 2.8, "heat": 2.1, "sun": 1.4,
	} {
		found := false
		for _, e := range l.Effects {
			if e.At == "inside air" && e.Of == of {
				found = true
				if got := math.Max(e.UpK, e.DownK); math.Abs(got-want) > 0.25 {
					t.Errorf("%s: %+.2f K, independent estimate %+.1f K", of, got, want)
				}
			}
		}
		if !found {
			t.Errorf("no effect of %s", of)
		}
	}
}

// The starter case of the steam pipe, with the conductivity table of its wool
// carried on beyond 150 °C: its mean is 1.6 % above the estimate's, and so is
// the loss.
func TestScenarioSteamPipeStarter(t *testing.T) {
	l := loadNamed(t, run(t, starterCase(t, "steam-pipe.yaml")), "bright jacket")
	if ts := celsius(temp(t, l, "side").K); math.Abs(ts-54.6) > scenarioK {
		t.Errorf("jacket %.2f °C, independent estimate 54.6 °C", ts)
	}
	if math.Abs(l.HeatPerM/75.9-1) > 0.02 {
		t.Errorf("loss %.2f W/m, independent estimate 75.9 W/m", l.HeatPerM)
	}
	if u := temp(t, l, "side").PlusK; math.Abs(u-5.7) > 1 {
		t.Errorf("uncertainty %.2f K, independent estimate 5.7 K", u)
	}
}

// Horizontal steam pipe, bare and lagged. The mean conductivity 0.04951
// W/(m·K) is the one printed in the estimate's check line.
func TestScenarioSteamPipe(t *testing.T) {
	pipe := func(insulation, emissivity string) LoadOutcome {
		text := "title: steam pipe\nsurroundings: {air: 30 °C}\nbody:\n  pipe: {diameter: 114.3 mm, emissivity: " + emissivity
		if insulation != "" {
			text += ", layers: [{thickness: " + insulation + ", conductivity: 0.04951 W/(m·K)}]"
		}
		o := run(t, text+"}\ncontents: 184 °C\n")
		if o.Loads[0].Status != Converged {
			t.Fatal(o.Loads[0].Message)
		}
		return o.Loads[0]
	}
	for _, c := range []struct {
		insulation, emissivity string
		ts, loss               float64 // °C, W/m; 0: not given
	}{
		{"", "0.85", 184, 1009},
		{"", "0.4", 184, 687},
		{"40 mm", "0.10", 54.6, 75.9},
		{"50 mm", "0.10", 50.4, 0},
		{"31.1 mm", "0.10", 60, 0},
		{"30 mm", "0.20", 58.2, 93.2},
		{"27.8 mm", "0.20", 60, 0},
		{"20 mm", "0.90", 55.2, 133.6},
		{"16.1 mm", "0.90", 60, 0},
	} {
		l := pipe(c.insulation, c.emissivity)
		if ts := celsius(temp(t, l, "side").K); math.Abs(ts-c.ts) > scenarioK {
			t.Errorf("%s, emissivity %s: %.2f °C, independent estimate %.1f °C", c.insulation, c.emissivity, ts, c.ts)
		}
		if c.loss > 0 && math.Abs(l.HeatW/c.loss-1) > scenarioQ {
			t.Errorf("%s, emissivity %s: %.2f W/m, independent estimate %.1f W/m", c.insulation, c.emissivity, l.HeatW, c.loss)
		}
	}
}
