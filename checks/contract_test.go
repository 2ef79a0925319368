package checks

import (
	"encoding/json"
	"math"
	"strings"
	"testing"
)

// contract is the part of the JSON form that was promised; fields may be added
// to it, never taken away or renamed.
const contract = `{"case": {"title": "", "tag": "", "sha256": ""}, "program": {"version": ""},
 "loads": [{"name": "", "status": "", "iterations": 0, "closure_W": 0.0,
   "temperatures": [{"at": "", "K": 0.0, "minus_K": 0.0, "plus_K": 0.0}],
   "heat": [{"from": "", "to": "", "by": "", "W": 0.0}],
   "films": [{"at": "", "method": "", "source": "", "length_m": 0, "film_K": 0, "Ra": 0, "Pr": 0, "Nu": 0,
              "h_W_m2K": 0, "in_range": true}],
   "verdicts": [{"at": "", "limit": "", "source": "", "limit_K": 0, "value_K": 0, "margin_K": 0,
                 "uncertainty_K": 0, "verdict": ""}]}],
 "verdict": ""}`

// holds reports what the promised shape has and the value lacks.
func holds(t *testing.T, path string, want, got any) {
	switch w := want.(type) {
	case map[string]any:
		g, ok := got.(map[string]any)
		if !ok {
			t.Errorf("%s is %T, want an object", path, got)
			return
		}
		for k, v := range w {
			if _, ok := g[k]; !ok {
				t.Errorf("%s has no %q", path, k)
				continue
			}
			holds(t, path+"."+k, v, g[k])
		}
	case []any:
		g, ok := got.([]any)
		if !ok || len(g) == 0 {
			t.Errorf("%s is %T with nothing in it", path, got)
			return
		}
		for _, v := range g {
			holds(t, path+"[]", w[0], v)
		}
	default:
		if gotType, wantType := jsonType(got), jsonType(want); gotType != wantType {
			t.Errorf("%s is a %s, want a %s", path, gotType, wantType)
		}
	}
}

func jsonType(v any) string {
	switch v.(type) {
	case string:
		return "string"
	case float64:
		return "number"
	case bool:
		return "boolean"
	}
	return "other"
}

func TestOutcomeKeepsTheMachineContract(t *testing.T) {
	o := run(t, starterCase(t, "panel.yaml"))
	b, err := json.Marshal(o)
	if err != nil {
		t.Fatal(err)
	}
	var want, got any
	if err := json.Unmarshal([]byte(contract), &want); err != nil {
		t.Fatal(err)
	}
	if err := json.Unmarshal(b, &got); err != nil {
		t.Fatal(err)
	}
	holds(t, "outcome", want, got)
	for _, l := range o.Loads {
		if l.Status != Converged || l.ClosureW > 1e-9*math.Max(l.HeatW, 1) {
			t.Errorf("%s: %s, closure %.3g W of %.4g W", l.Name, l.Status, l.ClosureW, l.HeatW)
		}
		if !l.CrossCheck.Agrees {
			t.Errorf("%s: damped substitution differs by %.3g K", l.Name, l.CrossCheck.MaxDiffK)
		}
	}
}

// Whatever carries a touch verdict carries the cautions.
func TestCautionsComeWithTouchVerdicts(t *testing.T) {
	base := "title: plate\nsurroundings: {air: 20 °C}\nbody:\n  plate: {width: 300 mm, height: 300 mm, emissivity: 0.9}\nheat: 50 W\n"
	if o := run(t, base); o.Verdict != None || o.Cautions != nil {
		t.Errorf("without limits: verdict %q, %d cautions", o.Verdict, len(o.Cautions))
	}
	for _, l := range []string{"{at: any face, touch: bare metal, contact: 5 s}", "{at: front, most: 60 °C, why: owner rule}", "{at: any face, rule: C1055-60C}"} {
		o := run(t, base+"limits:\n  - "+l+"\n")
		if len(o.Cautions) == 0 {
			t.Errorf("%s: no cautions", l)
		}
		for _, v := range o.Loads[0].Verdicts {
			if v.Source == "" || !v.Touch {
				t.Errorf("%s: source %q, touch %v", l, v.Source, v.Touch)
			}
		}
	}
}

// A body cooled below what its surroundings can supply is said to be
// impossible, and nothing is judged.
func TestImpossibleCaseHasNoVerdict(t *testing.T) {
	o := run(t, "title: plate\nsurroundings: {air: 20 °C}\nbody:\n  plate: {width: 100 mm, height: 100 mm, emissivity: 0.9}\nheat: -500 W\nlimits:\n  - {at: front, most: 60 °C, why: test}\n")
	if l := o.Loads[0]; l.Status != Impossible || !strings.Contains(l.Message, "as described") || o.Verdict != NoResult || len(l.Verdicts) != 0 {
		t.Errorf("status %s, message %q, verdict %s", l.Status, l.Message, o.Verdict)
	}
	hot := run(t, "title: plate\nsurroundings: {air: 20 °C}\nbody:\n  plate: {width: 10 mm, height: 10 mm, emissivity: 0.1}\nheat: 100 kW\n")
	if l := hot.Loads[0]; l.Status != OutOfProperties || hot.Verdict != NoResult {
		t.Errorf("status %s, verdict %s", l.Status, hot.Verdict)
	}
}

// The four-way rule with the guard band, end to end: the same plate against
// limits around its temperature.
func TestFourWayVerdictEndToEnd(t *testing.T) {
	base := "title: plate\nsurroundings: {air: 20 °C}\nbody:\n  plate: {width: 300 mm, height: 300 mm, emissivity: 0.9}\nheat: 50 W\nlimits:\n"
	first := run(t, base+"  - {at: front, most: 500 °C, why: test}\n").Loads[0]
	at := temp(t, first, "front")
	for _, c := range []struct {
		limit float64
		want  Verdict
	}{
		{at.K + at.PlusK + 0.5, Pass}, {at.K + at.PlusK/2, ConditionalPass},
		{at.K - at.PlusK/2, ConditionalFail}, {at.K - at.PlusK - 0.5, Fail},
	} {
		o := run(t, base+"  - {at: front, most: "+number2(c.limit)+" K, why: test}\n")
		if o.Verdict != c.want {
			t.Errorf("%.2f K against %.2f K (U %.2f K): %s, want %s", at.K, c.limit, at.PlusK, o.Verdict, c.want)
		}
	}
}

func number2(v float64) string {
	b, _ := json.Marshal(math.Round(100*v) / 100)
	return string(b)
}

// A limit that the purposes of the load cases leave aside is named, so that
// nobody takes it for met.
func TestLimitsNobodyJudgedAreNamed(t *testing.T) {
	o := run(t, `title: plate
surroundings: {air: 20 °C}
body:
  plate: {width: 300 mm, height: 300 mm, emissivity: 0.9}
heat: 50 W
limits:
  - {at: any face, touch: bare metal, contact: 5 s}
  - {at: front, most: 90 °C, why: coating}
loads:
  - {name: long run, for: component}
  - {name: heat demand, for: loss, air: 5 °C}
`)
	if len(o.Unjudged) != 1 || !strings.Contains(o.Unjudged[0], "bare metal") {
		t.Errorf("unjudged limits: %q", o.Unjudged)
	}
	if o.Loads[1].Verdict != NotJudged || o.Verdict != Pass {
		t.Errorf("loss case %q, whole %q", o.Loads[1].Verdict, o.Verdict)
	}
}

// A limit of the inside air that only the mean meets is pointed out, unless the
// upper zone has its own limit.
func TestUpperZoneAboveTheLimitOfTheMeanIsSaid(t *testing.T) {
	box := "title: b\nsurroundings: {air: 20 °C}\nbody:\n  box: {width: 500 mm, height: 500 mm, depth: 200 mm, emissivity: 0.8}\ncontents: 40 °C\nlimits:\n  - {at: inside air, most: 42 °C, why: test}\n"
	for extra, want := range map[string]bool{"": true, "  - {at: upper zone, most: 60 °C, why: test}\n": false} {
		notes := strings.Join(run(t, box+extra).Loads[0].Notes, "\n")
		if got := strings.Contains(notes, "not by the upper zone"); got != want {
			t.Errorf("own limit %q: notes %q", extra, notes)
		}
	}
}
