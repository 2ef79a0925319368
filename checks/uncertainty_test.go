package checks

import (
	"fmt"
	"math"
	"strings"
	"testing"

	"stillair/checks/balance"
	"stillair/freeconv"
)

func effect(t testing.TB, l LoadOutcome, at, of string) Effect {
	t.Helper()
	for _, e := range l.Effects {
		if e.At == at && strings.HasPrefix(e.Of, of) {
			return e
		}
	}
	t.Fatalf("no effect of %s on %s", of, at)
	return Effect{}
}

func first(t testing.TB, text string) LoadOutcome {
	t.Helper()
	l := run(t, text).Loads[0]
	if l.Status != Converged {
		t.Fatal(l.Message)
	}
	return l
}

// Air, radiant and seen temperatures move together: the whole plate then moves
// by nearly the shift, whichever of them it loses its heat to (a little less,
// because radiation grows steeper with temperature); moving only one of the two
// would move it by half of that.
func TestSurroundingsMoveTogether(t *testing.T) {
	base := "title: p\nsurroundings: {air: 20 °C%s}\nbody:\n  plate: {width: 500 mm, height: 500 mm, emissivity: 0.9}\nheat: 100 W\nuncertainty: {air: 2 K}\n"
	for _, s := range []string{"", ", radiant: 5 °C", ", sees: {front: -10 °C, back: 0 °C}"} {
		e := effect(t, first(t, fmt.Sprintf(base, s)), "front", ofAir)
		if e.UpK < 1.5 || e.UpK > 2 || e.DownK > -1.5 || e.DownK < -2 {
			t.Errorf("surroundings %q: 2 K move the plate by %+.3f K and %+.3f K", s, e.UpK, e.DownK)
		}
	}
}

// A shift is the difference to the case with the shifted number typed in.
func TestShiftsEqualTheTypedCase(t *testing.T) {
	pipe := func(k, thickness string) LoadOutcome {
		return first(t, "title: p\nsurroundings: {air: 20 °C}\nbody:\n  pipe: {diameter: 60 mm, emissivity: 0.2, layers: [{thickness: "+thickness+", conductivity: "+k+"}]}\n"+
			"contents: 150 °C\nuncertainty: {conductivity: 10 %, thickness: 10 %}\n")
	}
	base := pipe("0.050 W/(m·K)", "40 mm")
	side := temp(t, base, "side").K
	for _, c := range []struct {
		of, k, thickness string
		up               bool
	}{
		{"conductivity", "0.055 W/(m·K)", "40 mm", true}, {"conductivity", "0.045 W/(m·K)", "40 mm", false},
		{"thickness", "0.050 W/(m·K)", "44 mm", true}, {"thickness", "0.050 W/(m·K)", "36 mm", false},
	} {
		e := effect(t, base, "side", c.of)
		got := map[bool]float64{true: e.UpK, false: e.DownK}[c.up]
		if want := temp(t, pipe(c.k, c.thickness), "side").K - side; math.Abs(got-want) > 1e-6 || math.Abs(want) < 0.1 {
			t.Errorf("%s to %s, %s: effect %+.6f K, typed case %+.6f K", c.of, c.k, c.thickness, got, want)
		}
	}
}

// Both ends of the emissivity range count, one warming, one cooling; the
// emissivity inside stays within 1.
func TestEmissivityShiftsBothWays(t *testing.T) {
	box := "title: b\nsurroundings: {air: 20 °C}\nbody:\n  box: {width: 500 mm, height: 500 mm, depth: 200 mm, emissivity: 0.8}\nheat: 100 W\ninside: {emissivity: %s}\n"
	l := first(t, fmt.Sprintf(box, "0.9"))
	if e := effect(t, l, "front", "emissivity outside"); !(e.UpK < -0.1 && e.DownK > 0.1) {
		t.Errorf("emissivity outside: %+.3f K and %+.3f K", e.UpK, e.DownK)
	}
	full := temp(t, first(t, fmt.Sprintf(box, "1")), "inside air").K
	e := effect(t, l, "inside air", "effective emissivity inside")
	if got := temp(t, l, "inside air").K + e.UpK; math.Abs(got-full) > 1e-6 {
		t.Errorf("0.9 + 0.2 gives %.6f K, emissivity 1 gives %.6f K", got, full)
	}
}

// Where a source publishes its scatter, that is the shift; else the case's.
func TestPublishedScatterIsUsed(t *testing.T) {
	pipe := "title: p\nsurroundings: {air: 20 °C}\nbody:\n  pipe: {diameter: 60 mm, emissivity: 0.9}\nheat: 200 W\nuncertainty: {correlation: 15 %}\n"
	if e := effect(t, first(t, pipe), "side", "film outside"); e.Shift != "± 15 %" {
		t.Errorf("Churchill & Chu publish no scatter: shift %q", e.Shift)
	}
	morgan, _ := freeconv.Find("morgan-1975-cylinder")
	want := fmt.Sprintf("± %.3g %%", 100*morgan.Scatter)
	if e := effect(t, first(t, pipe+"methods: {horizontal cylinder: morgan-1975-cylinder}\n"), "side", "film outside"); e.Shift != want || morgan.Scatter == 0 {
		t.Errorf("Morgan: shift %q, want %q", e.Shift, want)
	}
}

// The combination is the root of the sum of squares, sides apart.
func TestUncertaintyIsTheRootOfTheSumOfSquares(t *testing.T) {
	l := loadNamed(t, run(t, starterCase(t, "panel.yaml")), "summer sun")
	plus, minus := 0.0, 0.0
	for _, e := range l.Effects {
		if e.At == "top" {
			plus += math.Pow(math.Max(0, math.Max(e.UpK, e.DownK)), 2)
			minus += math.Pow(math.Min(0, math.Min(e.UpK, e.DownK)), 2)
		}
	}
	top := temp(t, l, "top")
	if math.Abs(top.PlusK-math.Sqrt(plus)) > 1e-9 || math.Abs(top.MinusK-math.Sqrt(minus)) > 1e-9 || plus == minus {
		t.Errorf("top: +%.6f -%.6f K, by hand +%.6f -%.6f K", top.PlusK, top.MinusK, math.Sqrt(plus), math.Sqrt(minus))
	}
}

// The heat loss of a body at its contents' temperature carries its uncertainty:
// a lone layer between fixed temperatures gives the conductivity's own.
func TestHeatLossHasItsUncertainty(t *testing.T) {
	l := first(t, "title: p\nsurroundings: {air: 20 °C}\nbody:\n  pipe: {diameter: 60 mm, length: 2 m, emissivity: 0.9, layers: [{thickness: 100 mm, conductivity: 0.03 W/(m·K)}]}\n"+
		"contents: 220 °C\nuncertainty: {conductivity: 10 %, air: 0 K, contents: 0 K, correlation: 0 %, emissivity: 0, thickness: 0 %}\n")
	if r := l.HeatPlusW / l.HeatW; r < 0.085 || r > 0.1 {
		t.Errorf("10 %% more conductivity of a thick layer: %.3f of the loss", r)
	}
	if math.Abs(l.HeatPerM-l.HeatW/2) > 1e-9 {
		t.Errorf("%.6f W/m of %.6f W over 2 m", l.HeatPerM, l.HeatW)
	}
}

// A rise is judged with the uncertainty of the rise, not with that of the air.
func TestRiseIsNotBlamedForTheAir(t *testing.T) {
	l := first(t, "title: p\nsurroundings: {air: 20 °C}\nbody:\n  plate: {width: 500 mm, height: 500 mm, emissivity: 0.9}\nheat: 100 W\nuncertainty: {air: 10 K}\n"+
		"limits:\n  - {at: front, rise: 40 K, why: test}\n  - {at: front, most: 60 °C, why: test}\n")
	rise, most := l.Verdicts[0], l.Verdicts[1]
	if math.Abs(rise.LimitK-most.LimitK) > 1e-9 || !(rise.Uncertainty < most.Uncertainty/2) || most.Uncertainty < 8 {
		t.Errorf("rise: limit %.3f K, U %.3f K; most: limit %.3f K, U %.3f K", rise.LimitK, rise.Uncertainty, most.LimitK, most.Uncertainty)
	}
}

// What each purpose judges.
func TestPurposes(t *testing.T) {
	base := `title: b
surroundings: {air: 20 °C, humidity: 60 %}
body:
  box: {width: 500 mm, height: 500 mm, depth: 200 mm, emissivity: 0.8}
heat: 100 W
limits:
  - {at: inside air, most: 55 °C, why: a}
  - {at: front, most: 55 °C, why: b}
  - {at: front, touch: bare metal, contact: 5 s}
  - {at: front, rule: C1055-60C}
  - {at: inside air, least: 0 °C, why: c}
  - {at: front, condensation: none}
loads:
  - {name: only`
	for purpose, want := range map[string]string{
		"": "123456", "touch": "234", "component": "125", "condensation": "56", "loss": "",
	} {
		load := base + "}\n"
		if purpose != "" {
			load = base + ", for: " + purpose + "}\n"
		}
		l, got := first(t, load), ""
		for i := range l.Case.Limits {
			if l.judged(i) {
				got += fmt.Sprint(i + 1)
			}
		}
		if got != want || len(l.Verdicts) != len(want) {
			t.Errorf("purpose %q judges limits %s (%d rows), want %s", purpose, got, len(l.Verdicts), want)
		}
	}
}

// Air pressure counts, typed or from the altitude: at 79.5 kPa, the standard
// pressure of 2000 m, both give the same film.
func TestPressureOrAltitude(t *testing.T) {
	plate := "title: p\nsurroundings: {air: 20 °C%s}\nbody:\n  plate: {width: 500 mm, height: 500 mm, emissivity: 0.1}\nheat: 100 W\n"
	sea, high := first(t, fmt.Sprintf(plate, "")), first(t, fmt.Sprintf(plate, ", altitude: 2000 m"))
	typed := first(t, fmt.Sprintf(plate, ", pressure: 79501 Pa"))
	a, b, c := temp(t, sea, "front").K, temp(t, high, "front").K, temp(t, typed, "front").K
	if b-a < 1 || math.Abs(c-b) > 0.01 {
		t.Errorf("sea level %.3f K, 2000 m %.3f K, 79.501 kPa %.3f K", a, b, c)
	}
}

// Inside air cooler than outside is not "warmer above" by the factor.
func TestUpperZoneOfACooledBox(t *testing.T) {
	l := first(t, "title: b\nsurroundings: {air: 20 °C}\nbody:\n  box: {width: 500 mm, height: 500 mm, depth: 200 mm, emissivity: 0.8}\ncontents: 5 °C\n")
	if up := temp(t, l, "upper zone").K; math.Abs(up-278.15) > 1e-9 {
		t.Errorf("upper zone %.3f K", up)
	}
	warm := first(t, "title: b\nsurroundings: {air: 20 °C}\nbody:\n  box: {width: 500 mm, height: 500 mm, depth: 200 mm, emissivity: 0.8}\ncontents: 30 °C\n")
	if up := temp(t, warm, "upper zone").K; math.Abs(up-(293.15+13)) > 1e-9 {
		t.Errorf("upper zone of a warm box %.3f K", up)
	}
}

// The cross-check tells when the solutions differ.
func TestCrossCheckSeesADifference(t *testing.T) {
	f := readCase(t, starterCase(t, "indoor-panel.yaml"))
	m := compile(f.Cases[0], freeconv.Choice{}, tuning{})
	s := m.b.Solve()
	if x := crossCheck(m, s); !x.Agrees {
		t.Errorf("the two solvers differ by %g K", x.MaxDiffK)
	}
	s.T[balance.Node(2)] += 1e-5
	if x := crossCheck(m, s); x.Agrees {
		t.Error("a difference of 1e-5 K goes unnoticed")
	}
}

// A case in which nothing drives any heat agrees with itself too.
func TestNothingDrivesAnyHeat(t *testing.T) {
	l := first(t, "title: b\nsurroundings: {air: 20 °C}\nbody:\n  box: {width: 500 mm, height: 500 mm, depth: 200 mm, emissivity: 0.8}\nheat: 0 W\n")
	if !l.CrossCheck.Agrees || math.Abs(temp(t, l, "inside air").K-293.15) > 1e-9 {
		t.Errorf("agrees %v, inside air %.6f K", l.CrossCheck.Agrees, temp(t, l, "inside air").K)
	}
}

// The second method is another publication and another answer, judged anew.
func TestSecondMethodIsAnother(t *testing.T) {
	l := loadNamed(t, run(t, starterCase(t, "panel.yaml")), "summer shade")
	used := map[string]bool{}
	for _, f := range l.Films {
		used[f.MethodID] = true
	}
	for _, f := range l.Second.Films {
		if used[f.MethodID] {
			t.Errorf("%s serves both methods", f.MethodID)
		}
	}
	for _, r := range l.Second.Rows {
		if r.At == "inside air" && (r.DiffK == 0 || math.Abs(r.DiffK) > 5) {
			t.Errorf("inside air differs by %.3f K", r.DiffK)
		}
	}
	if len(l.Second.Verdicts) != len(l.Verdicts) {
		t.Errorf("%d verdicts of %d", len(l.Second.Verdicts), len(l.Verdicts))
	}
}

// A load case's finish takes the place of a typed emissivity.
func TestFinishOfALoadReplacesTheEmissivity(t *testing.T) {
	o := run(t, "title: p\nsurroundings: {air: 20 °C}\nbody:\n  plate: {width: 500 mm, height: 500 mm, emissivity: 0.1}\nheat: 100 W\nloads:\n  - {name: bare}\n  - {name: painted, body: {plate: {finish: paint_white}}}\n")
	bare, painted := temp(t, o.Loads[0], "front").K, temp(t, o.Loads[1], "front").K
	if painted > bare-5 || o.Loads[1].Case.Body.Emissivity.Typical < 0.8 {
		t.Errorf("bare %.2f K, painted %.2f K, emissivity %.2f", bare, painted, o.Loads[1].Case.Body.Emissivity.Typical)
	}
}

// The dew point carries the uncertainty of the humidity: 5 % of relative
// humidity at 15 °C and 85 % are 0.87 K (Magnus formula by hand: dew point
// 12.50 °C at 85 %, 13.37 °C at 90 %).
func TestDewPointCarriesTheHumidity(t *testing.T) {
	u := func(humidity string) float64 {
		l := first(t, "title: p\nsurroundings: {air: 15 °C, humidity: 85 %, sees: {front: 0 °C, back: 0 °C}}\nbody:\n  plate: {width: 500 mm, height: 500 mm, emissivity: 0.9}\nheat: 0 W\n"+
			"limits:\n  - {at: front, condensation: none}\nuncertainty: {humidity: "+humidity+"}\n")
		return l.Verdicts[0].Uncertainty
	}
	if got := math.Sqrt(u("5 %")*u("5 %") - u("0 %")*u("0 %")); math.Abs(got-0.875) > 0.01 {
		t.Errorf("5 %% of humidity are worth %.3f K of the dew point", got)
	}
}

// What sheds no heat is said among the assumptions.
func TestCoveredFacesAreAmongTheAssumptions(t *testing.T) {
	o := run(t, starterCase(t, "indoor-panel.yaml"))
	if !strings.Contains(strings.Join(o.Assumptions, "\n"), "back (wall)") {
		t.Errorf("assumptions: %q", o.Assumptions)
	}
}

// The uncertainty of a check is that on the side of the limit: upwards as long
// as the temperature is below it, downwards once it is above.
func TestGuardBandIsOnTheSideOfTheLimit(t *testing.T) {
	effects := []Effect{{At: "x", Of: "a", UpK: 3, DownK: -1}, {At: "x", Of: "b", UpK: 4, DownK: -1}}
	at := Temp{At: "x", K: 300}
	for _, c := range []struct {
		limit float64
		lower bool
		want  float64
	}{{310, false, 5}, {299, false, math.Sqrt2}, {290, true, math.Sqrt2}, {301, true, 5}} {
		got := criterion{k: c.limit, lower: c.lower}.judge(at, effects, 2).Uncertainty
		if math.Abs(got-c.want) > 1e-12 {
			t.Errorf("limit %g K, lower %v: U %.4f K, want %.4f K", c.limit, c.lower, got, c.want)
		}
	}
}
