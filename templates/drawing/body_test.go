package drawing

import (
	"fmt"
	"math"
	"math/rand/v2"
	"regexp"
	"slices"
	"strconv"
	"strings"
	"testing"

	"stillair/checks"
	"stillair/checks/casefile"
	"stillair/checks/unit"
)

func labelsOf(s Scene) (list []Label) {
	for _, it := range s.Items {
		if l, ok := it.(Label); ok {
			list = append(list, l)
		}
	}
	return list
}

func linesOf(s Scene) (list []Line) {
	for _, it := range s.Items {
		if l, ok := it.(Line); ok {
			list = append(list, l)
		}
	}
	return list
}

func areasOf(s Scene) (list []Area) {
	for _, it := range s.Items {
		if a, ok := it.(Area); ok {
			list = append(list, a)
		}
	}
	return list
}

// faults lists what a draughtsman would send back: labels that overlap, are
// too small or leave the frame, ink outside the frame.
func faults(s Scene) (list []string) {
	frame := rect{0, 0, s.W, s.H}
	outside := func(r rect) bool { return r.union(frame) != frame }
	labels := labelsOf(s)
	for i, l := range labels {
		if outside(labelBox(l)) {
			list = append(list, fmt.Sprintf("label %q leaves the frame", l.Text))
		}
		if l.Size < 2.5 {
			list = append(list, fmt.Sprintf("label %q is too small", l.Text))
		}
		for _, m := range labels[:i] {
			if labelBox(l).meets(labelBox(m)) {
				list = append(list, fmt.Sprintf("labels %q and %q overlap", l.Text, m.Text))
			}
		}
	}
	for _, l := range linesOf(s) {
		if outside(segment{point{l.X1, l.Y1}, point{l.X2, l.Y2}}.bounds()) {
			list = append(list, "a line leaves the frame")
		}
	}
	for _, a := range areasOf(s) {
		if outside(boundsOf(polygonOf(a))) {
			list = append(list, "an area leaves the frame")
		}
	}
	return list
}

// struck lists labels that a full line crosses.
func struck(s Scene) (list []string) {
	for _, t := range labelsOf(s) {
		for _, l := range linesOf(s) {
			if l.Dash == nil && (segment{point{l.X1, l.Y1}, point{l.X2, l.Y2}}).touches(labelBox(t)) {
				list = append(list, fmt.Sprintf("a line crosses %q", t.Text))
			}
		}
	}
	return list
}

func polygonOf(a Area) (pts []point) {
	for i := range a.X {
		pts = append(pts, point{a.X[i], a.Y[i]})
	}
	return pts
}

// named tells whether a face is named in a label of its own.
func named(s Scene, face string) bool {
	return slices.ContainsFunc(labelsOf(s), func(l Label) bool { return l.Text == face })
}

var kinds = []string{"box", "plate", "cylinder", "pipe", "sphere", "vessel"}

// randomOutcome is a body of any proportions from 1:100 to 100:1 and any size
// from a chip to a tank.
func randomOutcome(r *rand.Rand, kind string) *checks.Outcome {
	size := math.Pow(10, -2+3*r.Float64())
	ratio := func() float64 { return math.Pow(10, 4*r.Float64()-2) }
	b := casefile.Body{Kind: kind, Axis: []string{"horizontal", "vertical"}[r.IntN(2)], Heads: []string{"dished", "flat"}[r.IntN(2)]}
	b.Width, b.Diameter = q(size), q(size)
	b.Height, b.Length, b.Depth = q(size*ratio()), q(size*ratio()), q(size*ratio())
	for b.Depth.SI/b.Height.SI > 100 || b.Height.SI/b.Depth.SI > 100 {
		b.Depth = q(size * ratio())
	}
	b.Tilt = q([]float64{0, math.Pi / 2, -math.Pi / 2, math.Pi * (r.Float64() - 0.5)}[r.IntN(4)])
	if r.IntN(2) == 0 {
		w := layer("carbon steel sheet", size*0.01*r.Float64())
		b.Wall = &w
	}
	for range r.IntN(4) {
		b.Layers = append(b.Layers, layer("mineral wool pipe section, 100 kg/m3", size*0.3*r.Float64()))
	}
	temps := make([]float64, 6)
	for i := range temps {
		temps[i] = -30 + 300*r.Float64()
	}
	o := outcome(b, temps...)
	decorate(r, o)
	return o
}

// decorate adds sun, covers and the other units to some outcomes.
func decorate(r *rand.Rand, o *checks.Outcome) {
	l := &o.Loads[0]
	l.Case.Units = []string{"SI", "US"}[r.IntN(2)]
	if r.IntN(2) == 0 {
		l.Temps = append(l.Temps, checks.Temp{At: "contents", Kind: "contents", K: celsius(1234)})
	}
	d := newDraft(l)
	l.Case.Body.Covered = map[string]string{}
	l.Case.Surroundings.Sun = map[string]casefile.Quantity{}
	for _, f := range d.faces() {
		switch r.IntN(5) {
		case 0:
			l.Case.Surroundings.Sun[f] = q(1000 * r.Float64())
		case 1:
			l.Case.Body.Covered[f] = []string{"wall", "floor", "neighbour", "covered"}[r.IntN(4)]
		}
	}
}

func TestBodyOfAnyProportionsHasReadableLabels(t *testing.T) {
	bodies := 500
	if testing.Short() {
		bodies = 50
	}
	for _, kind := range kinds {
		t.Run(kind, func(t *testing.T) {
			r := rand.New(rand.NewPCG(1, uint64(len(kind))))
			for n := range bodies {
				o := randomOutcome(r, kind)
				w, h := 150+50*r.Float64(), 95+40*r.Float64()
				s := Body(o, 0, w, h)
				list := faults(s)
				if len(o.Loads[0].Case.Body.Covered) == 0 { // hatching lies under labels on clear ground
					list = append(list, struck(s)...)
				}
				d := newDraft(&o.Loads[0])
				for _, f := range d.faces() {
					if !named(s, f) {
						list = append(list, "no label for "+f)
					}
				}
				if len(list) > 0 {
					t.Fatalf("body %d %+v in %.1f by %.1f mm: %s", n, o.Loads[0].Case.Body, w, h, strings.Join(list, "; "))
				}
			}
		})
	}
}

func TestSmallestFrameTakesEverydayBodies(t *testing.T) {
	for name, o := range samples() {
		s := Body(o, 0, 130, 90)
		for _, f := range newDraft(&o.Loads[0]).faces() {
			if !named(s, f) {
				t.Errorf("%s: no label for %s; %s", name, f, s.Title)
			}
		}
		for _, f := range faults(s) {
			t.Errorf("%s: %s", name, f)
		}
	}
}

var scaleNote = regexp.MustCompile(`^scale (\d+):(\d+), dimensions in (mm|inches)$`)

// scaleOf reads the scale note: paper millimetres per unit of the dimensions.
func scaleOf(t *testing.T, s Scene) float64 {
	t.Helper()
	for _, l := range labelsOf(s) {
		m := scaleNote.FindStringSubmatch(l.Text)
		if m == nil {
			continue
		}
		a, _ := strconv.ParseFloat(m[1], 64)
		b, _ := strconv.ParseFloat(m[2], 64)
		if a != 1 && b != 1 || !strings.Contains("1 2 5", strings.TrimRight(strconv.Itoa(int(a*b)), "0")) {
			t.Errorf("%s is no scale of ISO 5455", l.Text)
		}
		if m[3] == "inches" {
			return a / b * 25.4
		}
		return a / b
	}
	t.Fatal("no scale note")
	return 0
}

// tips lists the points of the arrow heads of dimension lines: triangles of
// 2.5 mm length whose angle at the tip is 15°.
func tips(s Scene) (list []point) {
	for _, a := range areasOf(s) {
		if len(a.X) != 3 {
			continue
		}
		p := polygonOf(a)
		base := segment{p[1], p[2]}
		height := segment{p[0], base.at(0.5)}.length()
		angle := 2 * math.Atan(base.length()/2/height) * 180 / math.Pi
		if math.Abs(height-2.5) < 1e-6 && math.Abs(angle-15) < 0.1 {
			list = append(list, p[0])
		}
	}
	return list
}

var dimensionText = regexp.MustCompile(`^\(?Ø?([0-9.\x{2009}]+)\)?$`)

// dimensionsOf lists the numbers on dimension lines, scale ticks excluded.
func dimensionsOf(s Scene) (list []float64) {
	for _, l := range labelsOf(s) {
		if m := dimensionText.FindStringSubmatch(l.Text); m != nil && l.Y < s.H-stripHeight-margin {
			v, _ := strconv.ParseFloat(strings.ReplaceAll(m[1], unit.Thin, ""), 64)
			list = append(list, v)
		}
	}
	return list
}

func TestDrawingIsToScale(t *testing.T) {
	for name, o := range samples() {
		s := Body(o, 0, 170, 105)
		scale := scaleOf(t, s)
		dims := dimensionsOf(s)
		want := map[string]int{"box": 3, "plate": 2, "cylinder": 2, "pipe": 2, "sphere": 1, "vessel": 2}[o.Loads[0].Case.Body.Kind]
		if len(dims) != want {
			t.Errorf("%s: %d dimensions %v, want %d", name, len(dims), dims, want)
		}
		heads := tips(s)
		for _, v := range dims {
			if strings.HasPrefix(name, "pipe") && v == 1000 {
				continue // broken view
			}
			found := false
			for i, p := range heads {
				for _, o := range heads[:i] {
					level := math.Abs(p.y-o.y) < 1e-6 || math.Abs(p.x-o.x) < 1e-6
					found = found || level && math.Abs(segment{p, o}.length()-v*scale) < 1e-6*v*scale+1e-9
				}
			}
			if !found {
				t.Errorf("%s: no dimension line of %g mm for %g", name, v*scale, v)
			}
		}
	}
}

func TestBoxOutlinesAreToScale(t *testing.T) {
	s := Body(samples()["box"], 0, 170, 105)
	scale := scaleOf(t, s)
	count := map[string]int{}
	for _, a := range areasOf(s) {
		if a.Width == wide {
			b := boundsOf(polygonOf(a))
			count[fmt.Sprintf("%.0f×%.0f", b.w()/scale, b.h()/scale)]++
		}
	}
	want := map[string]int{"600×800": 2, "250×800": 2, "600×250": 2}
	if fmt.Sprint(count) != fmt.Sprint(want) {
		t.Errorf("outlines %v, want %v", count, want)
	}
}

func TestDimensionLinesStandTenMillimetresOff(t *testing.T) {
	s := Body(samples()["box"], 0, 170, 105)
	far := boundsOf(nil)
	for _, a := range areasOf(s) {
		if b := boundsOf(polygonOf(a)); a.Width == wide && b.h()/b.w() > 1 { // the upright faces
			far = far.union(b)
		}
	}
	left, under := 0, 0
	for _, p := range tips(s) {
		if math.Abs(far.x0-p.x-10) < 1e-9 {
			left++
		}
		if math.Abs(p.y-far.y1-10) < 1e-9 {
			under++
		}
	}
	if left != 2 || under != 4 {
		t.Errorf("%d arrow heads 10 mm left of the outline, want 2; %d below it, want 4", left, under)
	}
}

func TestLinesFollowTheStandard(t *testing.T) {
	for name, o := range samples() {
		s := Body(o, 0, 170, 105)
		for _, l := range linesOf(s) {
			if l.Width != 0.25 && l.Width != 0.5 {
				t.Errorf("%s: a line is %g mm wide", name, l.Width)
			}
		}
		outlines := 0
		for _, a := range areasOf(s) {
			if a.Width == 0.5 && a.Fill == nil {
				outlines++
			}
			if a.Width != 0 && a.Width != 0.25 && a.Width != 0.5 {
				t.Errorf("%s: an outline is %g mm wide", name, a.Width)
			}
		}
		if outlines == 0 && !strings.HasPrefix(name, "pipe") {
			t.Errorf("%s: no outline of 0.5 mm", name)
		}
	}
}

func TestCoveredFaceIsHatchedAndSaysWhy(t *testing.T) {
	o := samples()["box"]
	s := Body(o, 0, 170, 105)
	if !named(s, "covered: wall") {
		t.Error("the reason is missing")
	}
	before := len(linesOf(s))
	o.Loads[0].Case.Body.Covered = nil
	if after := len(linesOf(Body(o, 0, 170, 105))); after > before-5 {
		t.Errorf("%d lines covered, %d open: no hatching", before, after)
	}
}

func TestSunArrowsAreDrawn(t *testing.T) {
	o := samples()["box"]
	count := func() int {
		n := 0
		for _, a := range areasOf(Body(o, 0, 170, 105)) {
			if len(a.X) == 3 {
				n++
			}
		}
		return n
	}
	with := count()
	o.Loads[0].Case.Surroundings.Sun = nil
	if without := count(); with-without != 6 {
		t.Errorf("%d arrow heads for two faces in the sun, want 6", with-without)
	}
}

func TestTemperaturesAreInTheUnitsOfTheCase(t *testing.T) {
	s := Body(samples()["box_us"], 0, 170, 105)
	if !named(s, "127\u00A0°F") { // 53 °C
		t.Error("no 127 °F in the picture")
	}
	if !named(s, "8.5") || !named(s, "24") || !named(s, "30") {
		t.Error("dimensions are not in inches")
	}
}

func TestTextStandsOutOnItsFill(t *testing.T) {
	for i := 0; i <= 100; i++ {
		c := Viridis(float64(i) / 100)
		ink := inkOn(&c)
		hi, lo := Luminance(c), Luminance(ink)
		if hi < lo {
			hi, lo = lo, hi
		}
		if ratio := (hi + 0.05) / (lo + 0.05); ratio < 4.5 { // WCAG 2.1, 1.4.3
			t.Errorf("contrast %.2f at %d %%", ratio, i)
		}
	}
}

func TestBadOutcomesGiveAMessage(t *testing.T) {
	empty := &checks.Outcome{Loads: []checks.LoadOutcome{{}}}
	flat := samples()["box"]
	flat.Loads[0].Case.Body.Depth = q(math.NaN())
	for _, o := range []*checks.Outcome{nil, {}, empty, flat} {
		for _, s := range []Scene{Body(o, 0, 170, 100), HeatBalance(o, 0, 170, 100), Body(o, -1, 170, 100)} {
			if len(faults(s)) > 0 || s.Title == "" {
				t.Errorf("%q: %v", s.Title, faults(s))
			}
		}
	}
	if s := Body(samples()["box"], 0, 20, 10); len(labelsOf(s)) != 1 {
		t.Error("a tiny frame must give a message")
	}
}

func TestDrawingWithoutTemperatures(t *testing.T) {
	o := samples()["vessel_standing"]
	o.Loads[0].Status, o.Loads[0].Temps = checks.NotConverged, nil
	s := Body(o, 0, 170, 105)
	if !named(s, "shell") || len(faults(s)) > 0 {
		t.Errorf("faults %v", faults(s))
	}
	for _, l := range labelsOf(s) {
		if strings.Contains(l.Text, "surface temperature") {
			t.Error("a colour scale without colours")
		}
	}
}

func BenchmarkBody(b *testing.B) {
	o := samples()["box"]
	for b.Loop() {
		Body(o, 0, 170, 105)
	}
}
