package plot

import (
	"bytes"
	"fmt"
	"math"
	"math/rand/v2"
	"reflect"
	"slices"
	"strconv"
	"strings"
	"testing"

	"stillair/checks"
	"stillair/checks/casefile"
	"stillair/checks/unit"
	"stillair/templates/drawing"
	"stillair/templates/starter"
)

// run computes a starter case.
func run(t *testing.T, name string) *checks.Outcome {
	t.Helper()
	data, ok := starter.Get(name)
	if !ok {
		t.Fatalf("no starter %s", name)
	}
	f, findings := casefile.Read(name, data, casefile.Defaults{})
	if f == nil {
		t.Fatalf("%s: %v", name, findings)
	}
	return checks.Run(f, checks.Program{})
}

func labels(s drawing.Scene) []drawing.Label {
	var list []drawing.Label
	for _, it := range s.Items {
		if l, ok := it.(drawing.Label); ok {
			list = append(list, l)
		}
	}
	return list
}

type box struct{ x0, y0, x1, y1 float64 }

func bounds(it drawing.Item) box {
	switch v := it.(type) {
	case drawing.Line:
		return box{min(v.X1, v.X2), min(v.Y1, v.Y2), max(v.X1, v.X2), max(v.Y1, v.Y2)}
	case drawing.Area:
		return box{slices.Min(v.X), slices.Min(v.Y), slices.Max(v.X), slices.Max(v.Y)}
	case drawing.Label:
		w := drawing.TextWidth(v.Text, v.Size)
		if v.Turn == 90 {
			return box{v.X - v.Size, v.Y - w, v.X + 0.34*v.Size, v.Y}
		}
		return box{v.X, v.Y - v.Size, v.X + w, v.Y + 0.34*v.Size}
	}
	return box{math.NaN(), 0, 0, 0}
}

// faults lists what no chart may have.
func faults(s drawing.Scene) []string {
	var list []string
	for _, it := range s.Items {
		b := bounds(it)
		if !(b.x0 >= -1e-6 && b.y0 >= -1e-6 && b.x1 <= s.W+1e-6 && b.y1 <= s.H+1e-6) {
			list = append(list, fmt.Sprintf("outside the frame or not a number: %+v", it))
		}
		for _, c := range colours(it) {
			grey := c.R == c.G && c.G == c.B
			if !grey && c != (drawing.Color{R: 0x1F, G: 0x4E, B: 0x79}) {
				list = append(list, fmt.Sprintf("colour %v", c))
			}
		}
	}
	all := labels(s)
	for i, a := range all {
		if a.Size < 2.2 {
			list = append(list, fmt.Sprintf("%q is %.2f mm high", a.Text, a.Size))
		}
		for _, b := range all[i+1:] {
			p, q := bounds(a), bounds(b)
			if p.x0 < q.x1 && q.x0 < p.x1 && p.y0 < q.y1 && q.y0 < p.y1 {
				list = append(list, fmt.Sprintf("%q and %q overlap", a.Text, b.Text))
			}
		}
	}
	return list
}

func colours(it drawing.Item) []drawing.Color {
	switch v := it.(type) {
	case drawing.Line:
		return []drawing.Color{v.Color}
	case drawing.Label:
		return []drawing.Color{v.Color}
	case drawing.Area:
		if v.Fill != nil {
			return []drawing.Color{*v.Fill}
		}
		return []drawing.Color{v.Stroke}
	}
	return nil
}

// scaleOf reads the axis of the chart: the value of a place in mm, from the
// first and the last tick and the numbers at them.
func scaleOf(t *testing.T, s drawing.Scene) func(x float64) float64 {
	t.Helper()
	var xs, values []float64
	for _, it := range s.Items {
		if l, ok := it.(drawing.Line); ok && l.X1 == l.X2 && math.Abs(l.Width-thin) < 1e-9 {
			xs = append(xs, l.X1)
		}
	}
	for _, l := range labels(s) {
		if v, err := strconv.ParseFloat(l.Text, 64); err == nil {
			values = append(values, v)
		}
	}
	slices.Sort(xs)
	slices.Sort(values)
	n := len(xs) - 1
	if n < 1 || len(values) != n+1 {
		t.Fatalf("%d ticks, %d numbers", len(xs), len(values))
	}
	return func(x float64) float64 { return values[0] + (x-xs[0])*(values[n]-values[0])/(xs[n]-xs[0]) }
}

func TestMarginsOfTheStarterCases(t *testing.T) {
	for _, name := range starter.Names() {
		o := run(t, name)
		s, ok := Margins(o, 170, MarginsHeight(o))
		if !ok {
			t.Errorf("%s: no chart", name)
			continue
		}
		for _, f := range faults(s) {
			t.Errorf("%s: %s", name, f)
		}
		again, _ := Margins(run(t, name), 170, MarginsHeight(o))
		if !reflect.DeepEqual(s, again) {
			t.Errorf("%s: two runs differ", name)
		}
		var svg bytes.Buffer
		if err := drawing.SVG(&svg, s); err != nil || strings.Contains(svg.String(), "NaN") {
			t.Errorf("%s: picture is broken: %v", name, err)
		}
		inPlace(t, name, o, s)
	}
}

// inPlace checks that limits, guard bands, values and verdicts stand where
// the outcome has them.
func inPlace(t *testing.T, name string, o *checks.Outcome, s drawing.Scene) {
	t.Helper()
	value, sys := scaleOf(t, s), system(o)
	shown := choose(o, math.MaxInt)
	var limits, bands, verdicts []string
	for _, it := range s.Items {
		switch v := it.(type) {
		case drawing.Line:
			if v.Width > 0.7 {
				limits = append(limits, fmt.Sprintf("%.2f", value(v.X1)))
			}
		case drawing.Area:
			if v.Fill == nil {
				bands = append(bands, fmt.Sprintf("%.2f..%.2f", value(slices.Min(v.X)), value(slices.Max(v.X))))
			}
		case drawing.Label:
			if checks.Verdict(v.Text).Rank() >= checks.Pass.Rank() {
				verdicts = append(verdicts, v.Text)
			}
		}
	}
	var wantLimits, wantBands, wantVerdicts []string
	for _, g := range shown.groups {
		for _, c := range g.rows {
			k := func(k float64) float64 { return sys.Value(unit.Temperature, k) }
			lo, hi := k(c.LimitK-c.Uncertainty), k(c.LimitK)
			if c.Lower {
				lo, hi = k(c.LimitK), k(c.LimitK+c.Uncertainty)
			}
			wantLimits = append(wantLimits, fmt.Sprintf("%.2f", k(c.LimitK)))
			wantBands = append(wantBands, fmt.Sprintf("%.2f..%.2f", lo, hi))
			wantVerdicts = append(wantVerdicts, string(c.Verdict))
		}
	}
	same(t, name+" limits", limits, wantLimits)
	same(t, name+" guard bands", bands, wantBands)
	same(t, name+" verdicts", verdicts, wantVerdicts)
}

func same(t *testing.T, what string, got, want []string) {
	t.Helper()
	if !slices.Equal(got, want) {
		t.Errorf("%s: %v, want %v", what, got, want)
	}
}

func TestSignStandsAtTheValue(t *testing.T) {
	o := made(check{Judged: checks.Judged{At: "side", Limit: "at most 60 °C", LimitK: 333.15, ValueK: 343.15, MarginK: -10, Uncertainty: 4, Verdict: checks.Pass, Governing: true}})
	s, _ := Margins(o, 170, 60)
	value := scaleOf(t, s)
	var middles []float64
	for _, it := range s.Items {
		if a, ok := it.(drawing.Area); ok && a.Fill != nil && *a.Fill != (drawing.Color{R: 255, G: 255, B: 255}) {
			middles = append(middles, value((slices.Min(a.X)+slices.Max(a.X))/2))
		}
	}
	if len(middles) != 2 {
		t.Fatalf("%d signs, want one at the value and one at the verdict", len(middles))
	}
	near(t, "sign", middles[0], 70, 0.01)
}

// made is an outcome of checks put together by hand, a load case for each.
func made(list ...check) *checks.Outcome {
	o := &checks.Outcome{}
	for _, c := range list {
		if n := len(o.Loads); n == 0 || o.Loads[n-1].Name != c.load {
			o.Loads = append(o.Loads, checks.LoadOutcome{Name: c.load, Status: checks.Converged})
		}
		l := &o.Loads[len(o.Loads)-1]
		l.Verdicts = append(l.Verdicts, c.Judged)
	}
	return o
}

func TestVerdictsDifferWithoutColour(t *testing.T) {
	forms := map[string]checks.Verdict{}
	for _, v := range []checks.Verdict{checks.Pass, checks.ConditionalPass, checks.ConditionalFail, checks.Fail} {
		o := made(check{Judged: checks.Judged{At: "side", Limit: "l", LimitK: 300, ValueK: 300, Uncertainty: 1, Verdict: v, Governing: true}})
		s, _ := Margins(o, 170, 60)
		form := ""
		for _, it := range s.Items {
			if a, ok := it.(drawing.Area); ok && a.Fill != nil {
				form += fmt.Sprintf("%d corners, dark %v; ", len(a.X), a.Fill.R < 128)
			}
		}
		if other, taken := forms[form]; taken {
			t.Errorf("%s looks like %s", v, other)
		}
		forms[form] = v
	}
}

var verdictWords = []checks.Verdict{checks.Pass, checks.ConditionalPass, checks.ConditionalFail, checks.Fail}

// random is an outcome with long and odd texts.
func random(r *rand.Rand) *checks.Outcome {
	text := func() string {
		return strings.Repeat([]string{"front ", "W", "日本 ", "a\x00\n ", "\xff🙂 "}[r.IntN(5)], 1+r.IntN(40))
	}
	o := &checks.Outcome{}
	for range 1 + r.IntN(6) {
		l := checks.LoadOutcome{Name: text(), Status: checks.Converged}
		if r.IntN(5) == 0 {
			l.Status = checks.NotConverged
		} else {
			for range r.IntN(12) {
				l.Verdicts = append(l.Verdicts, judged(r, text()))
			}
		}
		l.Case.Units = []string{"SI", "US"}[r.IntN(2)]
		o.Loads = append(o.Loads, l)
	}
	return o
}

func judged(r *rand.Rand, at string) checks.Judged {
	j := checks.Judged{
		At: at, Limit: fmt.Sprintf("limit %d ", r.IntN(8)) + at, LimitK: 250 + 300*r.Float64(), ValueK: 250 + 300*r.Float64(),
		MarginK: 20 - 40*r.Float64(), Uncertainty: 30 * r.Float64() * r.Float64(), Verdict: verdictWords[r.IntN(4)],
		Lower: r.IntN(3) == 0, Governing: r.IntN(4) == 0,
	}
	if r.IntN(20) == 0 {
		j.ValueK = math.NaN()
	}
	if r.IntN(20) == 0 {
		j.Uncertainty = 0
	}
	return j
}

func TestMarginsOfRandomOutcomes(t *testing.T) {
	r := rand.New(rand.NewPCG(3, 5))
	drawn := 0
	for n := range 300 {
		o := random(r)
		s, ok := Margins(o, 140+60*r.Float64(), 20+140*r.Float64())
		if !ok {
			continue
		}
		drawn++
		if list := faults(s); len(list) > 0 {
			t.Fatalf("chart %d: %s", n, strings.Join(list, "; "))
		}
	}
	if drawn < 150 {
		t.Errorf("only %d of 300 outcomes gave a chart", drawn)
	}
}

func TestEveryCheckIsDrawnOrCounted(t *testing.T) {
	r := rand.New(rand.NewPCG(8, 1))
	for n := range 300 {
		o := random(r)
		lines := r.IntN(25)
		s := choose(o, lines)
		drawn, all := 0, 0
		for _, l := range o.Loads {
			all += len(l.Verdicts)
		}
		for _, g := range s.groups {
			drawn += len(g.rows)
		}
		counted := 0
		if number, _, ok := strings.Cut(s.rest, " further check"); ok {
			counted, _ = strconv.Atoi(number)
		}
		if drawn+counted != all || drawn > mostRows || len(s.groups) > 0 && s.slots() > lines {
			t.Fatalf("outcome %d: %d drawn, %q, %d in all, %d lines of %d", n, drawn, s.rest, all, s.slots(), lines)
		}
	}
}

func TestGoverningChecksComeFirst(t *testing.T) {
	o := run(t, "panel")
	for lines := 2; lines < 24; lines++ {
		drawn, governing := 0, 0
		for _, g := range choose(o, lines).groups {
			for _, c := range g.rows {
				drawn++
				if c.Governing {
					governing++
				}
			}
		}
		if governing != min(drawn, 5) { // the case has five limits
			t.Errorf("%d lines: %d of %d checks govern", lines, governing, drawn)
		}
	}
}

// TestGraveChecksComeBeforePasses gives one load case more checks than lines:
// every check that is not a pass is drawn before a pass that does not govern.
func TestGraveChecksComeBeforePasses(t *testing.T) {
	var l checks.LoadOutcome
	l.Name, l.Status = "only", checks.Converged
	add := func(n int, limit string, v checks.Verdict, governs bool) {
		for i := range n {
			l.Verdicts = append(l.Verdicts, checks.Judged{At: fmt.Sprintf("%s %d", limit, i), Limit: limit, LimitK: 330, ValueK: 320, MarginK: 10, Uncertainty: 2, Verdict: v, Governing: governs && i == 0})
		}
	}
	add(1, "governing pass", checks.Pass, true)
	for i := range 6 {
		add(2, fmt.Sprintf("pass %d", i), checks.Pass, false)
	}
	add(4, "conditional", checks.ConditionalPass, true)
	add(3, "failing", checks.Fail, true)
	s := choose(&checks.Outcome{Loads: []checks.LoadOutcome{l}}, math.MaxInt)
	drawn := map[checks.Verdict]int{}
	for _, g := range s.groups {
		for _, c := range g.rows {
			drawn[c.Verdict]++
		}
	}
	if drawn[checks.ConditionalPass] != 4 || drawn[checks.Fail] != 3 || drawn[checks.Pass] != 7 {
		t.Errorf("drawn %v, want all 4 conditional passes, all 3 fails and 7 passes", drawn)
	}
}

// TestNameOfThePromiseIsClearOfTheCurve looks for marks within the words.
func TestNameOfThePromiseIsClearOfTheCurve(t *testing.T) {
	for name, watts := range map[string][]float64{
		"fast": {10, 1e-3, 1e-9}, "slow": {10, 1, 0.1, 1e-2, 1e-3, 1e-4, 1e-5, 1e-6, 1e-7, 1e-8, 1e-9}, "at once": {1e-12}, "tail": {1, 1e-8, 1e-8, 1e-9, 1e-9, 1e-9},
	} {
		s, ok := Closure(iterated(100, watts...), 0, 76, 55)
		if !ok {
			t.Fatalf("%s: no chart", name)
		}
		for _, l := range labels(s) {
			if !slices.Contains(promiseName, l.Text) {
				continue
			}
			words := bounds(l)
			for _, it := range s.Items {
				if a, ok := it.(drawing.Area); ok && a.Fill != nil && a.Fill.R == 0x1F {
					if b := bounds(a); b.x0 < words.x1 && words.x0 < b.x1 && b.y0 < words.y1 && words.y0 < b.y1 {
						t.Errorf("%s: a mark stands in %q", name, l.Text)
					}
				}
			}
		}
	}
}

func TestSummaryTellsTheTruth(t *testing.T) {
	v := func(list ...checks.Verdict) []check {
		var out []check
		for _, w := range list {
			out = append(out, check{Judged: checks.Judged{Verdict: w}})
		}
		return out
	}
	for want, got := range map[string]string{
		"":                                   summary(nil, 0),
		"1 further check: fail":              summary(v(checks.Fail), 0),
		"2 further checks, all pass":         summary(v(checks.Pass, checks.Pass), 0),
		"3 further checks: 1 fail, 2 pass":   summary(v(checks.Pass, checks.Fail, checks.Pass), 0),
		"1 load case without a valid result": summary(nil, 1),
		"1 further check: pass; 2 load cases without a valid result": summary(v(checks.Pass), 2),
	} {
		if got != want {
			t.Errorf("%q, want %q", got, want)
		}
	}
}

func TestHeadingGivesTheValueOnce(t *testing.T) {
	of := func(text string, k ...float64) group {
		g := group{limit: text}
		for _, k := range k {
			g.rows = append(g.rows, check{Judged: checks.Judged{LimitK: k}})
		}
		return g
	}
	for _, c := range []struct {
		g    group
		sys  unit.System
		want string
	}{
		{of("at most 55 °C", 328.15), unit.SI, "at most 55 °C"},
		{of("at most 55 °C", 328.15), unit.US, "131.0\u00A0°F: at most 55 °C"},
		{of("rise of at most 40 K", 333.15), unit.SI, "60.0\u00A0°C: rise of at most 40 K"},
		{of("rise of at most 40 K", 333.15, 323.15), unit.SI, "rise of at most 40 K"},
	} {
		if got := c.g.heading(c.sys); got != c.want {
			t.Errorf("%q, want %q", got, c.want)
		}
	}
}

func TestNoChartWithoutMatter(t *testing.T) {
	none := &checks.Outcome{Loads: []checks.LoadOutcome{{Name: "a", Status: checks.NotConverged}}}
	panel := run(t, "panel")
	for name, c := range map[string]struct {
		o    *checks.Outcome
		w, h float64
	}{
		"nil": {nil, 170, 100}, "nothing judged": {none, 170, 100}, "flat": {panel, 170, 15}, "narrow": {panel, 60, 120},
		"not a number": {panel, math.NaN(), 120}, "without end": {panel, 170, math.Inf(1)},
	} {
		if _, ok := Margins(c.o, c.w, c.h); ok {
			t.Errorf("%s: a chart", name)
		}
	}
	if MarginsHeight(nil) != 0 || MarginsHeight(none) != 0 {
		t.Error("a height for nothing")
	}
}

func TestClosureOfTheStarterCases(t *testing.T) {
	for _, name := range starter.Names() {
		o := run(t, name)
		for i, l := range o.Loads {
			s, ok := Closure(o, i, 85, 55)
			if ok != (len(l.Record) > 0) {
				t.Errorf("%s, %s: chart %v with %d iterations", name, l.Name, ok, len(l.Record))
			}
			for _, f := range faults(s) {
				t.Errorf("%s, %s: %s", name, l.Name, f)
			}
			if ok {
				closurePlaces(t, l, s)
			}
		}
	}
}

// closurePlaces checks marks and promise against the ticks of the upright axis.
func closurePlaces(t *testing.T, l checks.LoadOutcome, s drawing.Scene) {
	t.Helper()
	var ys, marks, promise, powers []float64
	for _, it := range s.Items {
		switch v := it.(type) {
		case drawing.Line:
			if v.Y1 == v.Y2 && math.Abs(v.Width-thin) < 1e-9 && math.Abs(v.X2-v.X1) < 1.5 {
				ys = append(ys, v.Y1)
			}
			if math.Abs(v.Width-0.35) < 1e-9 {
				promise = append(promise, v.Y1)
			}
		case drawing.Area:
			if v.Fill != nil && v.Fill.R == 0x1F {
				marks = append(marks, (slices.Min(v.Y)+slices.Max(v.Y))/2)
			}
		case drawing.Label:
			if e, ok := strings.CutPrefix(v.Text, "10"); ok && v.Turn == 0 {
				powers = append(powers, exponent(e))
			}
		}
	}
	slices.Sort(ys)
	slices.Reverse(ys)
	slices.Sort(powers)
	n := len(ys) - 1
	if n < 1 || len(powers) != n+1 || len(marks) != len(l.Record) || len(promise) == 0 {
		t.Fatalf("%s: %d ticks, %d numbers, %d marks, %d dashes", l.Name, n+1, len(powers), len(marks), len(promise))
	}
	value := func(y float64) float64 { return powers[0] + (y-ys[0])*(powers[n]-powers[0])/(ys[n]-ys[0]) }
	for i, it := range l.Record {
		if it.ClosureW > 0 {
			near(t, l.Name+" mark", value(marks[i]), math.Log10(it.ClosureW), 0.02)
		} else if at := value(marks[i]); at > math.Log10(1e-9*scale(l)) {
			t.Errorf("%s: nothing left over is drawn at %.2f", l.Name, at)
		}
	}
	if heat := l.Case.Heat.SI; heat > 0 && len(l.Case.Surroundings.Sun) == 0 {
		near(t, l.Name+" promise", value(promise[0]), math.Log10(1e-9*heat), 0.02)
	}
}

// exponent reads raised digits.
func exponent(s string) float64 {
	v, sign := 0.0, 1.0
	for _, r := range s {
		if r == '⁻' {
			sign = -1
			continue
		}
		v = 10*v + float64(slices.Index([]rune("⁰¹²³⁴⁵⁶⁷⁸⁹"), r))
	}
	return sign * v
}

// course of a made-up iteration of a 100 W case.
func iterated(heat float64, watts ...float64) *checks.Outcome {
	l := checks.LoadOutcome{Name: "made", Status: checks.Converged}
	l.Case.Heat.SI = heat
	for i, w := range watts {
		l.Record = append(l.Record, checks.Iteration{N: i + 1, ClosureW: w})
	}
	return &checks.Outcome{Loads: []checks.LoadOutcome{l}}
}

func TestClosureCopesWithAnyRecord(t *testing.T) {
	slow := make([]float64, 400)
	for i := range slow {
		slow[i] = 100 * math.Pow(0.93, float64(i))
	}
	for name, c := range map[string]struct {
		o    *checks.Outcome
		want bool
	}{
		"ends in nothing":   {iterated(100, 3, 1e-4, 0), true},
		"only nothing":      {iterated(100, 0, 0), true},
		"one step":          {iterated(100, 5), true},
		"flat":              {iterated(100, 5, 5, 5), true},
		"without heat":      {iterated(0, 5, 1e-8), true},
		"slow":              {iterated(100, slow...), true},
		"huge and tiny":     {iterated(100, 1e308, 1e-300, 5e-324), true},
		"gaps":              {iterated(100, math.NaN(), 5, math.Inf(1), 1e-9), true},
		"nothing of zero":   {iterated(0, 0, 0), false},
		"no record":         {iterated(100), false},
		"not a number":      {iterated(100, math.NaN()), false},
		"heat not a number": {iterated(math.NaN(), 5, 1e-9), true},
	} {
		s, ok := Closure(c.o, 0, 85, 55)
		if ok != c.want {
			t.Errorf("%s: chart %v", name, ok)
		}
		for _, f := range faults(s) {
			t.Errorf("%s: %s", name, f)
		}
	}
	o := iterated(100, 5, 1e-9)
	for _, load := range []int{-1, 1} {
		if _, ok := Closure(o, load, 85, 55); ok {
			t.Errorf("a chart of load case %d", load)
		}
	}
	if _, ok := Closure(o, 0, 20, 55); ok {
		t.Error("a chart in 20 mm")
	}
}

func TestNothingLeftOverIsMarked(t *testing.T) {
	s, _ := Closure(iterated(100, 3, 1e-4, 0), 0, 85, 55)
	if !slices.ContainsFunc(labels(s), func(l drawing.Label) bool { return l.Text == "0" }) {
		t.Error("no 0 at the point that has no place on the axis")
	}
	if !strings.Contains(s.Title, "0\u00A0W after iteration 3") {
		t.Errorf("title %q", s.Title)
	}
	if !slices.ContainsFunc(labels(s), func(l drawing.Label) bool { return strings.HasPrefix(l.Text, "closed below 10⁻⁹") }) {
		t.Error("the promise has no name")
	}
}
