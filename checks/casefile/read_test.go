package casefile

import (
	"math"
	"strings"
	"testing"

	"stillair/radiation"
)

func mustRead(t *testing.T, file string, d Defaults) *File {
	t.Helper()
	f, findings := Read(file, read(t, file), d)
	if f == nil {
		t.Fatalf("%s:\n%s", file, formatted(findings))
	}
	return f
}

func near(t *testing.T, what string, got Quantity, want float64) {
	t.Helper()
	if !got.Set || math.Abs(got.SI-want) > 1e-9*math.Abs(want) {
		t.Errorf("%s = %v (set %v), want %v", what, got.SI, got.Set, want)
	}
}

func TestPanel(t *testing.T) {
	f := mustRead(t, "testdata/panel.yaml", Defaults{})
	if len(f.Cases) != 3 || f.Cases[1].Load.Name != "summer sun" || f.Cases[1].Load.Purpose != "touch" {
		t.Fatalf("%d cases", len(f.Cases))
	}
	shade, sunny, winter := f.Cases[0], f.Cases[1], f.Cases[2]
	near(t, "air", shade.Surroundings.Air, 313.15)
	near(t, "radiant", shade.Surroundings.Radiant, 313.15)
	near(t, "width", shade.Body.Width, 0.6)
	near(t, "wall", shade.Body.Wall.Thickness, 0.0015)
	near(t, "heat", shade.Heat, 250)
	near(t, "sun", sunny.Surroundings.Sun["front"], 700)
	near(t, "sees stays", sunny.Surroundings.Sees["top"], 273.15)
	near(t, "winter air", winter.Surroundings.Air, 258.15)
	near(t, "winter radiant follows", winter.Surroundings.Radiant, 258.15)
	near(t, "winter sees", winter.Surroundings.Sees["top"], 238.15)
	near(t, "winter heat", winter.Heat, 60)
	near(t, "winter inside", winter.Inside.Emissivity, 0.6)
	near(t, "winter upper zone stays", winter.Inside.UpperZone, 1.3)
	near(t, "winter width stays", winter.Body.Width, 0.6)
	if len(shade.Surroundings.Sun) != 0 || shade.Surroundings.Humidity.Set || shade.Contents.Set {
		t.Error("a load case leaked into another")
	}
	if e := winter.Body.Emissivity; e.Typical != 0.8 || math.Abs(e.Low-0.75) > 1e-12 || math.Abs(e.High-0.85) > 1e-12 {
		t.Errorf("emissivity %+v", e)
	}
	if a := shade.Body.Absorb; math.Abs(a.Low-0.35) > 1e-12 || math.Abs(a.High-0.55) > 1e-12 {
		t.Errorf("absorptance %+v", a)
	}
	if len(winter.Load.Changed) != 6 || len(shade.Load.Changed) != 0 || winter.Load.Changed[0].Source == "" {
		t.Errorf("changed: %+v", winter.Load.Changed)
	}
	if shade.Body.Covered["back"] != "wall" || len(shade.Body.Covered) != 1 {
		t.Errorf("covered: %v", shade.Body.Covered)
	}
	if len(shade.Limits) != 6 || !shade.Limits[5].NoCondensation || shade.Limits[3].Rule != "C1055-60C" || shade.Limits[1].Contact.SI != 10 {
		t.Errorf("limits: %+v", shade.Limits)
	}
}

func TestPipeInUSUnits(t *testing.T) {
	f := mustRead(t, "testdata/pipe-us.yaml", Defaults{})
	c := f.Cases[0]
	if len(f.Cases) != 1 || c.Load.Name != AsDescribed || c.Units != "US" || c.Title != "4408" {
		t.Errorf("case %q, units %s, title %q", c.Load.Name, c.Units, c.Title)
	}
	near(t, "air", c.Surroundings.Air, 303.15)   // 86 °F = 30 °C
	near(t, "diameter", c.Body.Diameter, 0.1143) // 4.5·25.4 mm
	near(t, "length", c.Body.Length, 1)          // default
	near(t, "insulation", c.Body.Layers[0].Thickness, 0.0381)
	near(t, "uncertainty of air", c.Uncertainty.Air, 4/1.8)
	if c.Body.Axis != "horizontal" || c.Body.Length.Source == "" || !c.Surroundings.Pressure.Set || c.Surroundings.Altitude.Set {
		t.Errorf("%+v", c.Body)
	}
	if c.Body.Layers[1].Material != "jacket" || !c.Body.Layers[1].Conductivity.Set || c.Body.Layers[0].Conductivity.Set {
		t.Errorf("layers %+v", c.Body.Layers)
	}
}

func TestFinishGivesRanges(t *testing.T) {
	f := mustRead(t, "testdata/vessel.yaml", Defaults{})
	want, _ := radiation.FindFinish("white paint or lacquer")
	b := f.Cases[0].Body
	if b.Finish != want.Name || b.Emissivity.Low != want.Low || b.Emissivity.High != want.High || b.Absorb.Typical != want.Absorb || !b.Absorb.Set {
		t.Errorf("%+v", b)
	}
	heated, black := f.Cases[1], f.Cases[2]
	if heated.Contents.Set || heated.Heat.SI != 2000 {
		t.Error("heat of a load case replaces the contents")
	}
	if black.Body.Finish != "" || black.Body.Emissivity.Typical != 0.95 || black.Body.Axis != "vertical" {
		t.Errorf("%+v", black.Body)
	}
}

// A value nobody typed is marked as an assumption with where it comes from.
func TestInputsOfTheNote(t *testing.T) {
	f := mustRead(t, "testdata/pipe-us.yaml", Defaults{})
	by := map[string]Input{}
	for _, in := range f.Inputs {
		if in.Label == "" || in.Typed == "" || in.SI == "" || in.Source == "" {
			t.Errorf("incomplete input %+v", in)
		}
		by[in.Path] = in
	}
	if in := by["body.pipe.length"]; !in.Assumption || !strings.HasPrefix(in.Source, "default: ") {
		t.Errorf("%+v", in)
	}
	if in := by["body.pipe.diameter"]; in.Assumption || in.SI != "0.1143\u00a0m" || in.Typed != "4.5 in" || in.Label != "diameter of the pipe" {
		t.Errorf("%+v", in)
	}
	if in := by["body.pipe.layers[1].thickness"]; in.Label != "thickness of layer 1" {
		t.Errorf("%+v", in)
	}
	if in := by["body.pipe.finish"]; !strings.Contains(in.SI, "emissivity") || !strings.Contains(in.Source, "confidence") {
		t.Errorf("%+v", in)
	}
	if in := by["uncertainty.conductivity"]; !strings.Contains(in.Source, "C16.30") {
		t.Errorf("%+v", in)
	}
}

func TestSettingsStandIn(t *testing.T) {
	data := []byte("title: Pipe\nbody: {pipe: {diameter: 60 mm, emissivity: 0.9}}\nheat: 10 W\n")
	d := Defaults{Units: "US", Owner: "Example Engineering", Air: "35 °C", Radiant: "20 °C", Altitude: "500 m"}
	f, findings := Read("a.yaml", data, d)
	if f == nil {
		t.Fatal(formatted(findings))
	}
	c := f.Cases[0]
	near(t, "air", c.Surroundings.Air, 308.15)
	near(t, "radiant", c.Surroundings.Radiant, 293.15)
	near(t, "altitude", c.Surroundings.Altitude, 500)
	if c.Units != "US" || c.Note.Owner != "Example Engineering" || c.Surroundings.Air.Source != "setting" || c.Surroundings.Air.Line != 0 {
		t.Errorf("%+v", c)
	}
	f, _ = Read("a.yaml", append(data, "surroundings: {air: 10 °C, pressure: 90 kPa}\nnote: {owner: Other}\nunits: SI\n"...), d)
	c = f.Cases[0]
	near(t, "typed air wins", c.Surroundings.Air, 283.15)
	near(t, "radiant follows typed air", c.Surroundings.Radiant, 283.15)
	if c.Surroundings.Altitude.Set || c.Note.Owner != "Other" || c.Units != "SI" {
		t.Errorf("%+v", c)
	}
}

// Radiant from the settings does not outlive a load case that types its air.
func TestSettingRadiantFollowsLoad(t *testing.T) {
	f, _ := Read("a.yaml", []byte("title: x\nbody: {sphere: {diameter: 1 m, emissivity: 1}}\nheat: 1 W\nloads: [{name: a}, {name: b, air: 0 °C}]\n"), Defaults{Air: "30 °C", Radiant: "20 °C"})
	near(t, "a", f.Cases[0].Surroundings.Radiant, 293.15)
	near(t, "b", f.Cases[1].Surroundings.Radiant, 273.15)
}

// The air may come from every load case alone.
func TestAirFromLoads(t *testing.T) {
	text := "title: x\nbody: {sphere: {diameter: 1 m, emissivity: 1}}\nheat: 1 W\nloads:\n  - {name: a, air: 1 °C}\n  - {name: b%s}\n"
	if f, findings := Read("a", []byte(strings.Replace(text, "%s", ", air: 2 °C", 1)), Defaults{}); f == nil {
		t.Error(formatted(findings))
	}
	if f, findings := Read("a", []byte(strings.Replace(text, "%s", "", 1)), Defaults{}); f != nil || len(findings) != 1 || findings[0].Code != "E-204" {
		t.Error(formatted(findings))
	}
}

// Windows line ends, a byte order mark and JSON are read alike.
func TestSpellingsOfYAML(t *testing.T) {
	plain := "title: x\nsurroundings: {air: 30 °C}\nbody: {sphere: {diameter: 1 m, emissivity: 0.9}}\nheat: 1 W\n"
	json := `{"title": "x", "surroundings": {"air": "30 °C"}, "body": {"sphere": {"diameter": "1 m", "emissivity": 0.9}}, "heat": "1 W"}`
	for _, text := range []string{plain, strings.ReplaceAll(plain, "\n", "\r\n"), "\ufeff" + plain, json} {
		f, findings := Read("a", []byte(text), Defaults{})
		if f == nil || f.Cases[0].Heat.SI != 1 {
			t.Errorf("%q: %s", text, formatted(findings))
		}
	}
}

// Columns count characters, not bytes.
func TestColumnsAreCharacters(t *testing.T) {
	_, findings := Read("a", []byte("title: x\nremarks: [\"ÄÖÜ°\", 'é']\nsurroundings: {air: \"30 °C\", sees: {frönt: 3 °C}}\nbody: {sphere: {diameter: 1 m, emissivity: 0.9}}\nheat: 1 W\n"), Defaults{})
	if len(findings) != 1 || findings[0].Line != 3 || findings[0].Column != 37 || findings[0].Width != 5 {
		t.Errorf("%+v", findings)
	}
}

// A face that a load case takes away by turning the axis is not passed over.
func TestTurnedAxis(t *testing.T) {
	text := "title: x\nsurroundings: {air: 30 °C}\nbody: {vessel: {diameter: 1 m, length: 2 m, emissivity: 0.9, faces: {top head: wall}}}\nheat: 1 W\nloads: [{name: a}, {name: b, body: {vessel: {axis: horizontal}}}]\n"
	f, findings := Read("a", []byte(text), Defaults{})
	if f != nil || len(findings) != 1 || findings[0].Code != "E-305" || findings[0].Line != 5 || !strings.HasPrefix(findings[0].Message, `in load case "b": `) {
		t.Error(formatted(findings))
	}
}

// Where a limit can stand depends on the body and on its covered faces.
func TestPlacesOfLimits(t *testing.T) {
	box := "title: x\nsurroundings: {air: 30 °C}\nbody: {box: {width: 1 m, height: 1 m, depth: 1 m, emissivity: 0.9, faces: {back: wall}}}\nheat: 1 W\nlimits:\n  - {"
	for limit, want := range map[string]string{
		"at: back, most: 60 °C, why: a":                   "a covered face",
		"at: inside air, touch: wood, contact: 2 s":       "needs a face",
		"at: inside air, condensation: none":              "needs a face",
		"at: contents, most: 60 °C, why: a":               "a box has no contents",
		"at: side, most: 60 °C, why: a":                   "a box has no side",
		"at: upper zone, most: 60 °C, source: IEC X:2020": "",
		"at: top, rule: c1055-60c":                        "",
	} {
		_, findings := Read("a", []byte(box+limit+"}\n"), Defaults{})
		text := formatted(findings)
		if want == "" && len(findings) > 0 || !strings.Contains(text, want) {
			t.Errorf("%s: want %q in\n%s", limit, want, text)
		}
	}
}

// One slip makes one finding: a misspelt key counts as the key it stands for.
func TestOneSlipOneFinding(t *testing.T) {
	good := string(read(t, "testdata/pipe-us.yaml"))
	for _, slip := range [][2]string{{"title:", "titel:"}, {"air: 86", "ari: 86"}, {"body:", "bdoy:"}, {"pipe:", "pip:"}, {"diameter:", "diametre:"},
		{"contents:", "content:"}, {"finish:", "finsh:"}, {"thickness: 1.5", "thicknes: 1.5"}, {"most:", "mots:"}, {"why:", "whi:"}, {"at:", "att:"}} {
		_, findings := Read("a", []byte(strings.Replace(good, slip[0], slip[1], 1)), Defaults{})
		errors := 0
		for _, f := range findings {
			if f.Severity == Error {
				errors++
			}
		}
		if errors != 1 {
			t.Errorf("%s: %d errors\n%s", slip[1], errors, formatted(findings))
		}
	}
}

// A date that no calendar has is refused where it stands.
func TestDateOfTheNote(t *testing.T) {
	text := "title: x\nnote: {date: %s}\nsurroundings: {air: 20 °C}\nbody: {sphere: {diameter: 60 mm, emissivity: 0.9}}\nheat: 1 W\n"
	for date, good := range map[string]bool{"2026-11-30": true, "2028-02-29": true, "2026-02-29": false, "2026-13-45": false, "30.11.2026": false} {
		_, findings := Read("a.yaml", []byte(strings.Replace(text, "%s", date, 1)), Defaults{})
		if HasErrors(findings) == good {
			t.Errorf("date %s: %s", date, formatted(findings))
		}
	}
}
