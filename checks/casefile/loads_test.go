package casefile

import (
	"slices"
	"strings"
	"testing"
)

// findingsOf reads a case and gives what is wrong with it.
func findingsOf(text string) []Finding {
	_, findings := Read("a.yaml", []byte(text), Defaults{})
	return findings
}

const plateHead = "title: x\nsurroundings: {air: 30 °C}\nbody: {plate: {width: 1 m, height: 1 m, emissivity: 0.9, faces: {back: wall}}}\nheat: 10 W\n"

// What goes wrong in a load case names it and points to what it types.
func TestFindingsNameTheirLoadCase(t *testing.T) {
	box := "title: x\nsurroundings: {air: 30 °C}\nbody: {box: {width: 1 m, height: 1 m, depth: 1 m, emissivity: 0.9, wall: {material: zinc, thickness: 100 mm}}}\nheat: 10 W\n"
	for _, c := range []struct{ what, text, code, message, at string }{
		{"sun on a surface of unknown absorptance", plateHead + "loads:\n  - {name: a}\n  - {name: b,\n     sun: {front: 700 W/m²}}\n", "E-409", `in load case "b": sun is given`, "front: 700"},
		{"last face covered", plateHead + "loads:\n  - {name: a}\n  - {name: b,\n     body: {plate: {faces: {front: wall}}}}\n", "E-413", `in load case "b": every face is covered`, "faces: {front"},
		{"a box that shrinks onto its wall", box + "loads:\n  - {name: a}\n  - {name: b,\n     body: {box: {depth: 150 mm}}}\n", "E-403", `in load case "b": the wall is thicker`, "depth: 150"},
		{"no air in one of them", "title: x\nbody: {sphere: {diameter: 1 m, emissivity: 0.9}}\nheat: 1 W\nloads:\n  - {name: a, air: 1 °C}\n  - {name: b}\n", "E-204", `in load case "b": `, "name: b"},
		{"two of three", plateHead + "loads:\n  - {name: a, body: {plate: {faces: {front: wall}}}}\n  - {name: b}\n  - {name: c, body: {plate: {faces: {front: free}}}}\n", "E-413", `in load case "a": `, "faces: {front: wall"},
		{"a layer without thickness", plateHead + "loads:\n  - {name: a}\n  - {name: b, body: {plate: {layers: [{material: zinc}]}}}\n", "E-204", `in load case "b": `, "{material: zinc"},
		{"covered face in the sun", plateHead + "loads:\n  - {name: a}\n  - {name: b, sun: {back: 7 W/m²}}\n", "E-505", `in load case "b": sun is given for back`, "back: 7"},
	} {
		findings := findingsOf(c.text)
		if len(findings) != 1 {
			t.Errorf("%s: %d findings\n%s", c.what, len(findings), formatted(findings))
			continue
		}
		f := findings[0]
		lines := strings.Split(c.text, "\n")
		rest := string([]rune(lines[f.Line-1])[f.Column-1:])
		if f.Code != c.code || !strings.HasPrefix(f.Message, c.message) || !strings.HasPrefix(rest, c.at) {
			t.Errorf("%s: marked %q\n%s", c.what, rest, formatted(findings))
		}
	}
}

// What all load cases inherit is told once and names none of them.
func TestSharedFindingsComeOnce(t *testing.T) {
	covered := strings.Replace(plateHead, "{back: wall}", "{back: wall, front: wall}", 1)
	findings := findingsOf(covered + "loads:\n  - {name: a}\n  - {name: b, body: {plate: {faces: {back: floor}}}}\n  - {name: c, body: {plate: {width: 2 m}}}\n")
	if len(findings) != 1 || findings[0].Code != "E-413" || findings[0].Line != 3 || !strings.HasPrefix(findings[0].Message, "every face") {
		t.Error(formatted(findings))
	}
	findings = findingsOf(covered + "loads:\n  - {name: a}\n  - {name: b}\n  - {name: c, body: {plate: {faces: {front: free}}}}\n")
	if len(findings) != 1 || findings[0].Line != 3 || !strings.HasPrefix(findings[0].Message, `in load cases "a" and "b": every face`) {
		t.Error(formatted(findings))
	}
	findings = findingsOf(covered + "loads:\n  - {name: c, body: {plate: {faces: {front: free}}}}\n")
	if len(findings) != 0 {
		t.Error(formatted(findings))
	}
}

// A limit on a face that some load case leaves free is judged there.
func TestLimitOnFaceCoveredNowAndThen(t *testing.T) {
	limit := "limits:\n  - {at: back, most: 60 °C, why: project limit}\n"
	free := "  - {name: b, body: {plate: {faces: {back: free}}}}\n"
	if findings := findingsOf(plateHead + limit + "loads:\n  - {name: a}\n" + free); len(findings) != 0 {
		t.Error(formatted(findings))
	}
	for _, loads := range []string{"", "loads:\n  - {name: a}\n  - {name: c}\n"} {
		findings := findingsOf(plateHead + limit + loads)
		if len(findings) != 1 || findings[0].Code != "E-406" || findings[0].Line != 6 || strings.Contains(findings[0].Message, "load case") {
			t.Error(formatted(findings))
		}
	}
}

// A list in a load case replaces the list of the case; help and errors say so.
func TestListsOfLoadCasesReplace(t *testing.T) {
	text := strings.Replace(plateHead, "faces:", "layers: [{material: zinc, thickness: 1 mm}, {material: brick, thickness: 1 cm}], faces:", 1)
	f, findings := Read("a", []byte(text+"loads:\n  - {name: a}\n  - {name: b, body: {plate: {layers: [{material: zinc, thickness: 2 mm}]}}}\n"), Defaults{})
	if f == nil || len(f.Cases[0].Body.Layers) != 2 || len(f.Cases[1].Body.Layers) != 1 {
		t.Fatal(formatted(findings))
	}
	findings = findingsOf(text + "loads:\n  - {name: a}\n  - {name: b, body: {plate: {layers: [{thickness: 2 mm}]}}}\n")
	if len(findings) != 1 || findings[0].Code != "E-411" || !strings.Contains(findings[0].Help, "replaces the whole list") {
		t.Error(formatted(findings))
	}
	for _, path := range []string{"loads", "body.plate.layers", "loads[].body.box.layers"} {
		i := slices.IndexFunc(Inputs(), func(d Description) bool { return d.Path == path })
		if i < 0 || !strings.Contains(Inputs()[i].Help, "replaces the whole list") {
			t.Errorf("the help of %s does not say that a list replaces", path)
		}
	}
}

// The purposes of load cases are told where they are typed.
func TestPurposesAreExplained(t *testing.T) {
	in := loadEntry.part("for")
	for _, w := range in.words.words() {
		if !strings.Contains(in.help, w+": ") {
			t.Errorf("the help of for: does not define %q", w)
		}
	}
}

// The radiant temperature that nobody typed follows the air of each load case.
func TestRadiantFollowsTheAir(t *testing.T) {
	radiantOf := func(text string) Input {
		f, findings := Read("a", []byte(text), Defaults{})
		if f == nil {
			t.Fatal(formatted(findings))
		}
		i := slices.IndexFunc(f.Inputs, func(in Input) bool { return in.Path == "surroundings.radiant" })
		return f.Inputs[i]
	}
	const each = "the air temperature of each load case"
	in := radiantOf(plateHead + "loads:\n  - {name: a}\n  - {name: b, air: 0 °C}\n")
	if in.Typed != "as the air" || in.SI != each || in.Source != "default: "+each || !in.Assumption {
		t.Errorf("%+v", in)
	}
	in = radiantOf(strings.Replace(plateHead, "air: 30 °C", "altitude: 1 m", 1) + "loads:\n  - {name: a, air: 5 °C}\n")
	if in.SI != each {
		t.Errorf("air from load cases alone: %+v", in)
	}
	if in = radiantOf(plateHead); in.Typed != "as the air" || in.SI != "303.15\u00a0K" || !in.Assumption {
		t.Errorf("without load cases: %+v", in)
	}
}

// The uncertainty of the humidity is an input where a humidity is one.
func TestUncertaintyOfHumidity(t *testing.T) {
	listed := func(text string) (File, bool) {
		f, findings := Read("a", []byte(text), Defaults{})
		if f == nil {
			t.Fatal(formatted(findings))
		}
		return *f, slices.ContainsFunc(f.Inputs, func(in Input) bool { return in.Path == "uncertainty.humidity" && in.Typed == "5 %" && in.Assumption })
	}
	if _, ok := listed(plateHead + "loads: [{name: a}]\n"); ok {
		t.Error("listed without a humidity")
	}
	f, ok := listed(plateHead + "loads: [{name: a}, {name: b, humidity: 80 %}]\n")
	if !ok {
		t.Error("not listed")
	}
	near(t, "default", f.Cases[1].Uncertainty.Humidity, 0.05)
	f, _ = listed(plateHead + "uncertainty: {humidity: 3 %}\n")
	near(t, "typed", f.Cases[0].Uncertainty.Humidity, 0.03)
}
