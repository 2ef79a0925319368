package freeconv

import (
	"encoding/json"
	"fmt"
	"math"
	"slices"
	"strings"
	"testing"

	"stillair/freeconv/fluid"
	"stillair/geometry"
)

const atm = 101325

// still is the state of a surface dT above air at 20 °C.
func still(dT float64) State {
	return State{Gas: fluid.Air, P: atm, Ts: 293.15 + dT, Ta: 293.15, DT: dT}
}

func panel(facing float64) geometry.Face {
	return geometry.Face{Name: "panel", Facing: facing, Height: 0.8, Width: 0.6, Area: 0.48, Perimeter: 2.8}
}

func disc(facing float64) geometry.Face {
	return geometry.Face{Name: "head", Facing: facing, Diameter: 0.5, Area: math.Pi / 16}
}

func pipe(d float64) geometry.Face {
	return geometry.Face{Name: "side", Shape: geometry.HorizontalCylinder, Diameter: d, Width: 1, Height: d, Area: math.Pi * d}
}

func column(d, l float64) geometry.Face {
	return geometry.Face{Name: "side", Shape: geometry.VerticalCylinder, Diameter: d, Height: l, Area: math.Pi * d * l}
}

func ball(d float64) geometry.Face {
	return geometry.Face{Name: "surface", Shape: geometry.Spherical, Diameter: d, Area: math.Pi * d * d}
}

func bodies() []geometry.Face {
	return []geometry.Face{panel(0), panel(30), panel(89), panel(90), panel(91), panel(120), panel(180), disc(0), disc(180),
		pipe(0.001), pipe(0.1), column(0.4, 1.1), column(0.001, 0.5), ball(0.06), {}}
}

func TestKindOf(t *testing.T) {
	for _, c := range []struct {
		face geometry.Face
		dT   float64
		want Kind
	}{
		{panel(0), 20, PlateUp}, {panel(0), -20, PlateDown},
		{panel(180), 20, PlateDown}, {panel(180), -20, PlateUp},
		{panel(90), 20, VerticalPlate}, {panel(90), -20, VerticalPlate},
		{panel(60), 20, InclinedUp}, {panel(60), -20, InclinedDown},
		{panel(120), 20, InclinedDown}, {panel(120), -20, InclinedUp},
		{panel(89.995), 20, VerticalPlate}, {panel(89.98), 20, InclinedUp},
		{panel(0.005), 20, PlateUp}, {panel(179.995), 20, PlateDown}, {panel(179.98), 20, InclinedDown},
		{pipe(0.1), 5, HorizontalCylinder}, {column(0.1, 1), 5, VerticalCylinder}, {ball(0.1), 5, Sphere},
	} {
		if got := KindOf(c.face, c.dT); got != c.want {
			t.Errorf("facing %g°, %+g K: %s, want %s", c.face.Facing, c.dT, got, c.want)
		}
	}
}

// Evaluate and HeatCoefficient share one core and may never differ.
func TestHeatCoefficientIsThatOfTheFilm(t *testing.T) {
	for _, c := range All() {
		choice := Choice{}
		for _, k := range c.Kinds {
			choice[k] = c.ID
		}
		for _, f := range bodies() {
			for _, dT := range []float64{0, 1e-9, 0.3, 25, 400, -25} {
				h, film := HeatCoefficient(f, still(dT), choice), Evaluate(f, still(dT), choice)
				if h != film.H || !(h >= 0) || math.IsInf(h, 0) {
					t.Errorf("%s, %s, %g K: %g and %g", c.ID, film.Kind, dT, h, film.H)
				}
			}
		}
	}
}

func TestNoInputGivesNaN(t *testing.T) {
	odd := []float64{math.NaN(), math.Inf(1), math.Inf(-1), 0, -5, 1e30}
	for _, f := range append(bodies(), geometry.Face{Area: -1, Perimeter: math.NaN(), Height: math.NaN()}) {
		for _, x := range odd {
			for _, s := range []State{{P: x, Ta: 293, DT: 10}, {P: atm, Ta: x, DT: 10}, {P: atm, Ta: 293, DT: x}} {
				if h := HeatCoefficient(f, s, nil); !(h >= 0) || math.IsInf(h, 0) {
					t.Errorf("face %+v, state %+v: h = %g", f, s, h)
				}
			}
		}
	}
}

// The numbers of a film hang together as a checker would redo them.
func TestFilmIsConsistent(t *testing.T) {
	for _, f := range bodies()[:14] {
		for _, dT := range []float64{0.3, 25, -25} {
			m := Evaluate(f, still(dT), nil)
			beta := 1 / m.TBeta
			Ra := m.Gravity * beta * math.Abs(dT) * math.Pow(m.Length, 3) / (m.Props.Nu * m.Props.Alpha)
			for name, pair := range map[string][2]float64{
				"Ra": {m.Ra, Ra}, "Gr Pr": {m.Gr * m.Props.Pr, m.Ra}, "Nu": {m.Nu, m.Method.Nu(m.In)},
				"h": {m.H, m.Nu * m.Props.K / m.Length}, "film temperature": {m.TProps, 293.15 + dT/2},
				"In.Ra": {m.In.Ra, m.Ra}, "1/beta": {m.TBeta, m.TProps},
			} {
				if math.Abs(pair[0]/pair[1]-1) > 1e-12 {
					t.Errorf("%s at %g°, %g K: %s is %g, should be %g", m.Kind, f.Facing, dT, name, pair[0], pair[1])
				}
			}
		}
	}
}

// h must not jump with the temperature difference or with the tilt, or a
// balance that passes there would hunt.
func TestDefaultsDoNotJump(t *testing.T) {
	for _, f := range bodies()[:14] {
		last := HeatCoefficient(f, still(-120), nil)
		for dT := -119.9; dT < 120; dT += 0.1 {
			h := HeatCoefficient(f, still(dT), nil)
			if math.Abs(dT) > 1 && math.Abs(h/last-1) > 0.05 {
				t.Fatalf("%s facing %g°: h goes from %.4f to %.4f at %.1f K", f.Name, f.Facing, last, h, dT)
			}
			last = h
		}
	}
	for _, dT := range []float64{40, -40, 1} {
		last := HeatCoefficient(panel(0), still(dT), nil)
		for facing := 0.004; facing <= 180; facing += 0.004 {
			h := HeatCoefficient(panel(facing), still(dT), nil)
			if math.Abs(h/last-1) > 0.002 {
				t.Fatalf("%g K: h goes from %.5f to %.5f at %.3f°", dT, last, h, facing)
			}
			last = h
		}
	}
}

// The one Nusselt number of a rule is that of the part that governs, put on
// the rule's own length.
func TestRuleAgreesWithItsParts(t *testing.T) {
	for _, facing := range []float64{10, 50, 80, 100, 140, 170} {
		for _, dT := range []float64{0.5, 40} {
			m := Evaluate(panel(facing), still(dT), nil)
			if m.Rule == nil {
				t.Fatalf("facing %g° is not under a rule", facing)
			}
			AP := (0.48 / 2.8) / 0.8
			full := StandardGravity / m.TBeta * dT * 0.8 * 0.8 * 0.8 / (m.Props.Nu * m.Props.Alpha)
			h := m.Rule.Nu(Input{Ra: full, Pr: m.Props.Pr, Theta: math.Abs(90 - facing), AP: AP}) * m.Props.K / 0.8
			if math.Abs(h/m.H-1) > 1e-12 {
				t.Errorf("facing %g°, %g K: rule %.6f, film %.6f", facing, dT, h, m.H)
			}
		}
	}
	m := Evaluate(column(0.005, 1), still(30), nil)
	if nu := m.Rule.Nu(m.In); math.Abs(nu/m.Nu-1) > 1e-12 || m.Method.ID != "popiel-2008-vertical-cylinder" {
		t.Errorf("slender cylinder: rule %g, film %g by %s", nu, m.Nu, m.Method.ID)
	}
}

func TestInclinedFilmSaysWhichPartGoverns(t *testing.T) {
	steep, flat := Evaluate(panel(80), still(30), nil), Evaluate(panel(20), still(30), nil)
	if steep.Method != &churchillChuPlate || steep.LengthText != "slope length = 0.800 m" {
		t.Errorf("80°: %s, %s", steep.Method.ID, steep.LengthText)
	}
	if flat.Method != &largestUp || flat.LengthText != "A/P = 0.171 m" {
		t.Errorf("20°: %s, %s", flat.Method.ID, flat.LengthText)
	}
	if g := StandardGravity * math.Cos(math.Pi/18); math.Abs(steep.Gravity-g) > 1e-12 {
		t.Errorf("g cos(10°) = %.5f, film has %.5f", g, steep.Gravity)
	}
	for _, m := range []Film{steep, flat} {
		if !hasNote(m, "governs with h") {
			t.Errorf("no note on the governing part: %q", m.Notes)
		}
	}
}

func hasNote(m Film, part string) bool {
	return slices.ContainsFunc(m.Notes, func(n string) bool { return strings.Contains(n, part) })
}

func TestRangeNotes(t *testing.T) {
	for _, c := range []struct {
		film Film
		want string
	}{
		{Evaluate(panel(180), still(0.001), nil), "is below 10⁴, the lower end of the range (Radziemska"},
		{Evaluate(panel(90), still(30), Choice{VerticalPlate: "lefevre-1956-plate"}), "is above 10⁹, the upper end of the range (LeFevre"},
		{Evaluate(panel(170), still(30), Choice{InclinedDown: "rich-1953-inclined-down"}), "the tilt from the vertical = 80° is above 60°"},
		{Evaluate(geometry.Face{Facing: 90, Area: 0.25}, still(30), nil), "the face has no height"},
	} {
		if c.film.InRange || !strings.Contains(c.film.RangeNote, c.want) {
			t.Errorf("%q should hold %q", c.film.RangeNote, c.want)
		}
	}
	if m := Evaluate(panel(90), still(30), nil); !m.InRange || m.RangeNote != "" || !m.PropsInRange {
		t.Errorf("in range, but: %q", m.RangeNote)
	}
	if m := Evaluate(panel(90), State{P: atm, Ta: 120, Ts: 121, DT: 1}, nil); m.PropsInRange {
		t.Error("air at 120 K passes as in range")
	}
}

func TestRegimes(t *testing.T) {
	for _, c := range []struct {
		film Film
		want string
	}{
		{Evaluate(panel(90), still(1), nil), "laminar"},
		{Evaluate(panel(90), still(60), nil), "transition"},
		{Evaluate(column(1, 3), still(60), nil), "turbulent"},
		{Evaluate(panel(0), still(60), nil), "turbulent"},
		{Evaluate(panel(180), still(60), nil), "laminar"},
		{Evaluate(pipe(0.001), still(30), nil), "near the conduction limit"},
		{Evaluate(ball(0.005), still(30), nil), "near the conduction limit"},
	} {
		if c.film.Regime != c.want {
			t.Errorf("%s, Ra = %.3g: %s, want %s", c.film.Kind, c.film.Ra, c.film.Regime, c.want)
		}
	}
	if m := Evaluate(ball(0.005), still(30), nil); !hasNote(m, "conduction limit 2.00") {
		t.Errorf("notes: %q", m.Notes)
	}
}

// Y. A. Cengel, Heat Transfer: A Practical Approach, 2nd ed. 2003, solutions
// manual, Problem 9-45 (first page seen in print): for a tank of 0.4 m by 1.1 m
// at 44 °C in 20 °C air, 35 L/Gr^(1/4) = 0.1542 m, so the side counts as a plate.
func TestSlenderNote(t *testing.T) {
	m := Evaluate(column(0.4, 1.1), still(24), nil)
	if !hasNote(m, "D = 0.400 m is at least 35 L/Gr^(1/4) = 0.15") {
		t.Errorf("notes: %q", m.Notes)
	}
	if least := 35 * 1.1 / root4(m.Gr); math.Abs(least/0.1542-1) > 0.01 {
		t.Errorf("35 L/Gr^(1/4) = %.4f m, published 0.1542 m", least)
	}
	if m := Evaluate(column(0.02, 1.1), still(24), nil); !hasNote(m, "is less than 35 L/Gr^(1/4)") {
		t.Errorf("notes: %q", m.Notes)
	}
}

func TestDefaultsAndAlternatives(t *testing.T) {
	for _, k := range Kinds() {
		c, why := Default(k)
		other := Alternative(k)
		if c == nil || why == "" || other == nil || c == other || !c.Fits(k) || !other.Fits(k) {
			t.Errorf("%s: default %v (%q), alternative %v", k, c, why, other)
		}
		if list := For(k); len(list) < 2 || list[0] != c || !slices.Contains(list, other) {
			t.Errorf("%s: list %v", k, list)
		}
	}
	if c, _ := Default("no such kind"); c != &churchillChuPlate {
		t.Errorf("unknown kind: %v", c)
	}
	if Alternative("no such kind") == nil {
		t.Error("unknown kind has no alternative")
	}
}

// Default and alternative are independent sources for one thing: within their
// common range, air and usual sizes they should be within 30 %.
func TestAlternativesAreNear(t *testing.T) {
	for _, f := range []geometry.Face{panel(0), panel(45), panel(90), panel(135), panel(180), pipe(0.1), column(0.1, 1), column(0.4, 1.1), ball(0.04)} {
		for _, dT := range []float64{5, 20, 60} {
			first := Evaluate(f, still(dT), nil)
			second := Evaluate(f, still(dT), Choice{first.Kind: Alternative(first.Kind).ID})
			if ratio := second.H / first.H; first.InRange && second.InRange && math.Abs(ratio-1) > 0.30 {
				t.Errorf("%s, %g K: %s gives %.3f, %s %.3f", first.Kind, dT, first.Method.ID, first.H, second.Method.ID, second.H)
			}
			if second.Why != "asked for by name: "+Alternative(first.Kind).Name {
				t.Errorf("why: %q", second.Why)
			}
		}
	}
}

func TestCheck(t *testing.T) {
	if errs := Check(Choice{VerticalPlate: "mcadams-1954-plate", Sphere: "yuge-1960-sphere"}); errs != nil {
		t.Errorf("a proper choice gives %v", errs)
	}
	bad := Choice{VerticalPlate: "yuge-1960-sphere", Sphere: "no-such", "flying carpet": "mcadams-1954-plate"}
	errs := Check(bad)
	var all []string
	for _, err := range errs {
		all = append(all, err.Error())
	}
	text := strings.Join(all, "\n")
	for _, want := range []string{
		"flying carpet: there is no such situation; there are: vertical plate; ",
		`sphere: there is no method "no-such"; for this situation there are: churchill-1983-sphere, yuge-1960-sphere, yovanovich-1987-sphere`,
		`vertical plate: the method "yuge-1960-sphere" is for another situation`,
	} {
		if !strings.Contains(text, want) {
			t.Errorf("%q is missing in\n%s", want, text)
		}
	}
	if len(errs) != 3 {
		t.Errorf("%d errors, want 3", len(errs))
	}
	if m := Evaluate(ball(0.1), still(10), bad); m.Method != &churchillSphere || !strings.Contains(m.Why, `"no-such" asked for does not fit`) {
		t.Errorf("%s: %s", m.Method.ID, m.Why)
	}
}

// A choice for the plates also enters the rule for inclined faces.
func TestChoiceEntersTheRule(t *testing.T) {
	m := Evaluate(panel(80), still(30), Choice{VerticalPlate: "mcadams-1954-plate"})
	if m.Method.ID != "mcadams-1954-plate" || m.Rule != &inclinedRuleUp {
		t.Errorf("method %s, rule %v", m.Method.ID, m.Rule)
	}
}

// The one branch of the joint record that was not seen in print says so where
// it governs, and only there.
func TestBranchFromMemoryIsTold(t *testing.T) {
	small := geometry.Face{Name: "lid", Height: 0.01, Width: 0.01, Area: 1e-4, Perimeter: 0.04}
	if m := Evaluate(small, still(20), nil); m.Ra > 990 || !hasNote(m, "from memory") {
		t.Errorf("Ra = %.3g: %q", m.Ra, m.Notes)
	}
	if m := Evaluate(panel(0), still(20), nil); hasNote(m, "from memory") {
		t.Errorf("Ra = %.3g: %q", m.Ra, m.Notes)
	}
}

// Fujii & Imura take the properties three quarters of the way to the wall and
// beta one quarter.
func TestReferenceTemperatures(t *testing.T) {
	m := Evaluate(panel(120), still(40), Choice{InclinedDown: "fujii-imura-1972-inclined-down"})
	if math.Abs(m.TProps-(293.15+30)) > 1e-9 || math.Abs(m.TBeta-(293.15+10)) > 1e-9 {
		t.Errorf("properties at %.2f K, beta at %.2f K", m.TProps, m.TBeta)
	}
}

func TestLengths(t *testing.T) {
	for _, c := range []struct {
		face geometry.Face
		id   string
		want string
	}{
		{panel(0), "", "A/P = 0.171 m"},
		{disc(0), "", "A/P = 0.125 m"},
		{panel(0), "mcadams-1954-up", "mean side = 0.700 m"},
		{disc(0), "mcadams-1954-up", "mean side = 0.450 m"},
		{panel(0), "fujii-imura-1972-up", "shorter side = 0.600 m"},
		{disc(0), "fujii-imura-1972-up", "shorter side = 0.500 m"},
		{pipe(0.0213), "", "diameter = 0.0213 m"},
		{ball(0.1), "yovanovich-1987-sphere", "√A = 0.177 m"},
		{panel(90), "", "height = 0.800 m"},
	} {
		k := KindOf(c.face, 10)
		choice := Choice{}
		if c.id != "" {
			choice[k] = c.id
		}
		if got := Evaluate(c.face, still(10), choice).LengthText; got != c.want {
			t.Errorf("%s, %s: %q, want %q", k, c.id, got, c.want)
		}
	}
}

func TestFilmMarshals(t *testing.T) {
	if _, err := json.Marshal(Evaluate(panel(45), still(10), nil)); err != nil {
		t.Error(err)
	}
	if _, err := json.Marshal(All()); err != nil {
		t.Error(err)
	}
}

func TestNumbersInSentences(t *testing.T) {
	for x, want := range map[float64]string{3210: "3.21e3", 1e4: "1e4", 0.109: "0.109", 0: "0", 1e-5: "1e-5", 60: "60"} {
		if got := plain(x); got != want {
			t.Errorf("plain(%g) = %s, want %s", x, got, want)
		}
	}
	for x, want := range map[float64]string{3.8: "3.80", 0.02327: "0.0233", 123.4: "123", 1234: "1230", 0: "0", 1e-9: "1e-9"} {
		if got := threeDigits(x); got != want {
			t.Errorf("threeDigits(%g) = %s, want %s", x, got, want)
		}
	}
}

func BenchmarkHeatCoefficient(b *testing.B) {
	for _, f := range []geometry.Face{panel(0), panel(60), panel(90), pipe(0.1), column(0.1, 1)} {
		b.Run(fmt.Sprint(KindOf(f, 20)), func(b *testing.B) {
			b.ReportAllocs()
			for b.Loop() {
				HeatCoefficient(f, still(20), nil)
			}
		})
	}
}

func BenchmarkEvaluate(b *testing.B) {
	b.ReportAllocs()
	for b.Loop() {
		Evaluate(panel(60), still(20), nil)
	}
}

// A vertical pipe too slender for the plate law, at a Ra beyond the laminar
// slender law, is covered by no published law and says so.
func TestSlenderCylinderBeyondEveryLaw(t *testing.T) {
	face := geometry.Cylinder(0.010, 3, false, false, geometry.Stack{})[0].Face
	f := Evaluate(face, State{Gas: fluid.Air, P: 101325, Ts: 400, Ta: 293.15, DT: 106.85}, nil)
	if f.InRange || !strings.Contains(f.RangeNote, "too slender") {
		t.Errorf("in range %v: %q", f.InRange, f.RangeNote)
	}
	thick := geometry.Cylinder(1, 3, false, false, geometry.Stack{})[0].Face
	if f := Evaluate(thick, State{Gas: fluid.Air, P: 101325, Ts: 400, Ta: 293.15, DT: 106.85}, nil); !f.InRange {
		t.Errorf("a thick cylinder is a plate: %q", f.RangeNote)
	}
}
